//! Ceilings: the heights at which the best rate of climb at full throttle falls to 0.5 m/s and to nothing.

use std::ops::Range;

use roots::{SimpleConvergency, find_root_brent};

use super::Solver;
use super::marks::vertex;
use super::slipstream::kept_share;
use super::top_speed::FASTEST_MACH;
use super::trail::Trail;
use crate::air::{Air, HIGHEST_M};
use crate::aircraft::{drag_n, propellers, speeds, weight_n};
use crate::job::{Aeroplane, Aircraft};
use crate::result::Ceilings;
use crate::rig::Rig;

/// Rate of climb at the service ceiling, m/s: common practice.
const SERVICE_M_S: f64 = 0.5;
/// Slowest speed looked at over that of least power, where no stall is known.
const SLOWEST: f64 = 0.8;
/// How far one speed looked at lies above the one before, as a share. A parabola through three of them
/// refines the best: the examples' ceilings are then within 0.04 m of those by steps of 0.02, less than what
/// a ceiling is sought to; steps of 0.2 miss by up to 1.6 m.
const STEP: f64 = 0.1;
/// Speeds in a row without gain after which faster ones are not looked at. One would do for the examples,
/// whose best climb has a single top; two more step over a dip a third of the speed wide, as a kink in an
/// engine's or a section's table may make. To look on to the end gives them the same, in forty times the
/// time.
const MOST_VAIN: u32 = 3;
/// How near a ceiling is sought, m: less than the metre it is told to.
const CONVERGED_M: f64 = 0.5;

/// The ceilings of an aeroplane at a temperature offset, as pressure altitudes between sea level and the end
/// of the atmosphere's table, by the best climb from the stall on. `None` for other jobs.
#[must_use]
pub fn ceilings(rig: &Rig, isa_offset_k: f64) -> Option<Ceilings> {
    let Some(Aircraft::Aeroplane(a)) = &rig.aircraft else { return None };
    rig.shaft.as_ref()?;
    let best = |h: f64| best_climb_m_s(rig, a, h, isa_offset_k);
    let (lowest, highest) = (best(0.0), best(HIGHEST_M));
    let spare = |above: f64| {
        let over = |climb: Option<f64>| climb.map_or(-1.0, |c| c - above);
        let climb = |h: f64| over(best(h));
        let (low, high) = (over(lowest), over(highest));
        if low <= 0.0 || high >= 0.0 {
            return None;
        }
        let mut rule = SimpleConvergency { eps: CONVERGED_M, max_iter: 40 };
        let mut rest = |h: f64| if h == 0.0 { 1e3 * low } else { 1e3 * climb(h) };
        find_root_brent(0.0, HIGHEST_M, &mut rest, &mut rule).ok()
    };
    Some(Ceilings { service_m: spare(SERVICE_M_S), absolute_m: spare(0.0), sea_level_climb_m_s: lowest })
}

/// The best rate of climb at full throttle at a height, from the stall on, held to the limit rpm; `None`
/// where there is no answer at any speed.
fn best_climb_m_s(rig: &Rig, a: &Aeroplane, altitude_m: f64, isa_offset_k: f64) -> Option<f64> {
    let air = Air::standard(altitude_m, isa_offset_k).ok()?;
    let solver = Solver::new(rig);
    let aircraft = Aircraft::Aeroplane(a.clone());
    let kept = kept_share(rig);
    let climb = |v: f64, trail: &mut Trail| {
        let at = rig.unsolved(air, v);
        let full = solver.full(&at, trail).ok()?;
        let thrust = full.loads.thrust_n * propellers(&aircraft) * kept;
        Some((thrust - drag_n(a, &air, v)?) * v / weight_n(&aircraft))
    };
    let known = speeds(a, &air);
    let slowest = known.stall_m_s.unwrap_or(SLOWEST * known.least_power_m_s);
    let mut trail = Trail::default();
    let seen = uphill(slowest..FASTEST_MACH * air.sound_speed_m_s, |v| Some((v, climb(v, &mut trail)?)));
    let best = (0..seen.len()).max_by(|a, b| seen[*a].1.total_cmp(&seen[*b].1))?;
    let (top, before) = (seen[best], best.checked_sub(1).map(|i| seen[i]));
    let between = before.zip(seen.get(best + 1)).map(|(a, c)| vertex(a, top, *c));
    let refined = between.and_then(|v| climb(v, &mut Trail::default()));
    Some(refined.map_or(top.1, |climb| climb.max(top.1)))
}

/// Values at speeds from the slowest on, up to where several in a row gain nothing; those without an answer
/// are left out.
fn uphill(speeds_m_s: Range<f64>, mut value: impl FnMut(f64) -> Option<(f64, f64)>) -> Vec<(f64, f64)> {
    let (mut seen, mut most, mut vain) = (Vec::new(), f64::NEG_INFINITY, 0);
    let mut v = speeds_m_s.start;
    while v < speeds_m_s.end && vain < MOST_VAIN {
        let here = value(v);
        match here.filter(|here| here.1 > most) {
            Some(higher) => (most, vain) = (higher.1, 0),
            None if !seen.is_empty() => vain += 1,
            None => {}
        }
        seen.extend(here);
        v *= 1.0 + STEP;
    }
    seen
}

#[cfg(test)]
mod tests {
    use super::*;

    fn looked(value: impl Fn(f64) -> Option<f64>) -> Vec<f64> {
        uphill(10.0..60.0, |v| Some((v, value(v)?))).iter().map(|s| s.0).collect()
    }

    /// Steps of a tenth from the slowest on, three of them past a top, none past the end; speeds without an
    /// answer before the first one do not count.
    #[test]
    fn speeds_are_looked_at_until_three_gain_nothing() {
        let speed = |i: i32| 10.0 * 1.1_f64.powi(i);
        let same = |found: &[f64], from: i32, last: i32| {
            assert_eq!(found.len(), (last - from + 1) as usize, "{found:?}");
            (from..=last).zip(found).for_each(|(i, v)| assert!((v - speed(i)).abs() < 1e-9, "{found:?}"));
        };
        same(&looked(|v| Some(-(v - speed(4)).abs())), 0, 7);
        same(&looked(|v| (v > 15.0).then(|| -(v - speed(9)).abs())), 5, 12);
        // 10 · 1.1^18 is 55.6, and the next lies beyond the end.
        same(&looked(Some), 0, 18);
        // A dip of two steps is stepped over.
        let dips = |v: f64| Some(if (v > speed(4) + 0.1) && (v < speed(6) + 0.1) { 0.0 } else { v });
        same(&looked(dips), 0, 18);
    }
}
