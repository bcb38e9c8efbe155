//! What a variable pitch is worth over the pitch as it stands, by flight point.

use super::trail::Trail;
use super::{Solver, top_speed};
use crate::aircraft::propellers;
use crate::job::{FlightPoint, PitchControl, Setting};
use crate::result::{PitchWorth, WorthOf};
use crate::rig::{Rig, air_of};
use crate::rotor::Condition;

/// How far the blades are turned from where they stand, degrees.
const FINEST_DEG: f64 = -15.0;
const COARSEST_DEG: f64 = 25.0;
/// Step of the first look, degrees, and how often it is halved round the best.
const STEP_DEG: f64 = 2.5;
const HALVINGS: u32 = 6;
/// Steps without gain after which a side is given up.
const MOST_VAIN: u32 = 4;

/// What turning the blades would gain at a flight point: at a throttle setting or a power in thrust, at top
/// speed in speed, in level flight in shaft power. The engine is held at its limit rpm where it would pass
/// it. The blades are turned from where they stand as long as that betters it. `None` for a constant-speed
/// propeller, whose blades turn as it is, and for a flight point by rpm, at which nothing is to be gained.
#[must_use]
pub fn pitch_worth(rig: &Rig, point: &FlightPoint) -> Option<PitchWorth> {
    if matches!(rig.job.propeller.pitch_control, PitchControl::ConstantSpeed { .. }) {
        return None;
    }
    let of = match (&point.setting, point.airspeed_m_s) {
        (Setting::Rpm { .. }, _) => return None,
        (Setting::Level {}, _) => WorthOf::ShaftPower,
        (Setting::FullThrottle {}, None) => WorthOf::TopSpeed,
        _ => WorthOf::Thrust,
    };
    let stands_deg = rig.turn_rad().to_degrees();
    let figure = |turn_deg: f64| figure(rig, point, stands_deg + turn_deg);
    let sign = if of == WorthOf::ShaftPower { -1.0 } else { 1.0 };
    let best = highest(&|turn_deg| Some(sign * figure(turn_deg)?));
    let as_set = figure(0.0);
    let at_best = best.map(|(_, value)| sign * value);
    Some(PitchWorth {
        flight_point: point.name.clone(),
        of,
        as_set,
        best: at_best,
        turn_deg: best.map(|(turn_deg, _)| stands_deg + turn_deg),
        at_end_of_search: best.is_some_and(|(t, _)| t - FINEST_DEG < 1e-9 || COARSEST_DEG - t < 1e-9),
        gain: as_set.zip(at_best).filter(|(a, _)| *a > 0.0).map(|(a, b)| sign * (b - a) / a),
    })
}

/// The figure that counts at a flight point with the blades turned; `None` where the setting has no answer.
fn figure(rig: &Rig, point: &FlightPoint, turn_deg: f64) -> Option<f64> {
    let air = air_of(point).ok()?;
    let drawn = rig.unsolved(air, point.airspeed_m_s.unwrap_or(0.0));
    let at = Condition { turn_rad: turn_deg.to_radians(), ..drawn };
    let solver = Solver::new(rig);
    let all = rig.aircraft.as_ref().map_or(1.0, propellers);
    let mut trail = Trail::default();
    match point.setting {
        Setting::Level {} => {
            let met = solver.level(&at, &trail).ok()?;
            Some(super::power_w(&met.loads, &met.condition))
        }
        Setting::FullThrottle {} if point.airspeed_m_s.is_none() => {
            Some(top_speed::fastest(rig, &at).ok()?.condition.airspeed_m_s)
        }
        Setting::FullThrottle {} => Some(all * solver.full(&at, &mut trail).ok()?.loads.thrust_n),
        Setting::Throttle { fraction } => {
            Some(all * solver.throttle(&at, fraction, &trail).ok()?.loads.thrust_n)
        }
        Setting::Power { power_w } => {
            let met = solver.power(&at, power_w).ok()?;
            solver.within_engine(&met).ok()?;
            Some(all * met.loads.thrust_n)
        }
        Setting::Rpm { .. } => None,
    }
}

/// The turn of the highest value with that value: the best of a look by equal steps, which are then halved
/// round it.
fn highest(value: &dyn Fn(f64) -> Option<f64>) -> Option<(f64, f64)> {
    let known = |turn: f64| value(turn).map(|v| (turn, v));
    let stands = known(0.0);
    let better = |a: Option<Turned>, b: Option<Turned>| {
        if b.is_some_and(|b| a.is_none_or(|a| b.1 > a.1)) { b } else { a }
    };
    let mut best = better(uphill(&known, stands, FINEST_DEG), uphill(&known, stands, COARSEST_DEG))?;
    let mut step = STEP_DEG;
    for _ in 0..HALVINGS {
        step *= 0.5;
        let beside = [best.0 - step, best.0 + step];
        let within = beside.into_iter().filter(|turn| (FINEST_DEG..=COARSEST_DEG).contains(turn));
        best = within.filter_map(known).fold(best, |b, k| if k.1 > b.1 { k } else { b });
    }
    Some(best)
}

/// A turn of the blades and the value there.
type Turned = (f64, f64);

/// The best by equal steps from where the blades stand towards an end, given up after four steps that gain
/// nothing: a blade that stands stalled may first get worse.
fn uphill(known: &dyn Fn(f64) -> Option<Turned>, stands: Option<Turned>, end_deg: f64) -> Option<Turned> {
    let steps = (end_deg.abs() / STEP_DEG).round() as u32;
    let (mut best, mut vain) = (stands, 0);
    for turn in (1..=steps).map(|i| STEP_DEG.copysign(end_deg) * f64::from(i)) {
        match known(turn) {
            Some(here) if best.is_none_or(|b| here.1 > b.1) => (best, vain) = (Some(here), 0),
            _ if best.is_some() => vain += 1,
            _ => {}
        }
        if vain == MOST_VAIN {
            break;
        }
    }
    best
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The top of a smooth figure to the last halving, 2.5°/64, from either side; at an end that end.
    #[test]
    fn the_best_turn_is_the_top_of_a_figure_or_the_end_of_the_search() {
        for (top, expected) in [(3.3, 3.3), (-7.9, -7.9), (0.02, 0.02), (-40.0, -15.0), (60.0, 25.0)] {
            let figure = |turn: f64| Some(100.0 - (turn - top).powi(2));
            let (turn, value) = highest(&figure).unwrap();
            assert!((turn - expected).abs() < 0.5 * STEP_DEG / 64.0 + 1e-9, "{top}: {turn}");
            assert!((value - figure(turn).unwrap()).abs() < 1e-12);
        }
        assert!(highest(&|_| None).is_none());
        // Where there is no answer as the blades stand, the first one on the way counts.
        let later = |turn: f64| (turn > 11.0).then(|| 100.0 - (turn - 14.0).powi(2));
        assert!((highest(&later).unwrap().0 - 14.0).abs() < 0.05);
    }

    /// Four steps that gain nothing end a side; three do not.
    #[test]
    fn a_dip_is_stepped_over_only_where_it_is_short() {
        let after =
            |far: f64| move |turn: f64| Some((turn, if turn >= far { 2.0 } else { 1.0 - 0.01 * turn }));
        let best = |far: f64| uphill(&after(far), Some((0.0, 1.0)), COARSEST_DEG).unwrap().0;
        assert!((best(4.0 * STEP_DEG) - 4.0 * STEP_DEG).abs() < 1e-9);
        assert!(best(5.0 * STEP_DEG).abs() < 1e-9);
        let looked = std::cell::Cell::new(0.0_f64);
        let rises = |turn: f64| {
            looked.set(looked.get().min(turn));
            Some((turn, -turn))
        };
        let found = uphill(&rises, None, FINEST_DEG).unwrap();
        assert!((found.0 - FINEST_DEG).abs() < 1e-9 && (looked.get() - FINEST_DEG).abs() < 1e-9);
    }
}
