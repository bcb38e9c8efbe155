//! Where propeller, engine and aircraft meet: from a flight point's setting to a condition of the propeller.
//!
//! At full throttle the propeller takes what the shaft gives: the rpm is sought over the engine's range, and where the two
//! meet more than once the highest rpm counts at which the propeller's demand rises through the offer, for that one is stable.
//! In level flight thrust equals drag. A constant-speed propeller holds its rpm and turns its blades between its stops
//! instead; at a stop it is a fixed one.

use std::ops::RangeInclusive;

use crate::air::Air;
use crate::aircraft::thrust_asked_n;
use crate::engine::Shaft;
use crate::job::{FlightPoint, PitchControl, Setting};
use crate::result::State;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, Loads};

mod line;
mod meeting;
mod top_speed;

pub use line::line;
pub use meeting::meeting;

/// Fastest tip considered where no engine sets a limit, as a Mach number.
const FASTEST_TIP_MACH: f64 = 1.2;
/// Slowest rotation considered over the fastest.
const SLOWEST: f64 = 0.01;
/// Nodes of a search over rpm.
const NODES: u32 = 24;
/// How far the rpm may change from one speed to the next for the short search to find it.
const NEAR: f64 = 0.1;
/// Of a search, as a share of its range.
const CONVERGED: f64 = 1e-9;

/// The condition at which a flight point's setting is met.
///
/// # Errors
/// The state that says why there is none.
pub fn condition(rig: &Rig, point: &FlightPoint, air: Air) -> Result<Condition, State> {
    let still =
        |airspeed_m_s: f64| Condition { air, airspeed_m_s, rotation_rad_s: 1.0, turn_rad: rig.turn_rad() };
    let at = still(point.airspeed_m_s.unwrap_or(0.0));
    match point.setting {
        Setting::Rpm { rpm } => Ok(Condition { rotation_rad_s: rotation_rad_s(rpm), ..at }),
        Setting::Power { power_w } => power_condition(rig, &at, power_w),
        Setting::FullThrottle {} if point.airspeed_m_s.is_none() => top_speed::condition(rig, &at),
        Setting::FullThrottle {} => throttle_condition(rig, &at, 1.0),
        Setting::Throttle { fraction } => throttle_condition(rig, &at, fraction),
        Setting::Level {} => level_condition(rig, &at),
    }
}

/// What the propeller takes at a condition, W.
fn power_w(loads: &Loads, at: &Condition) -> f64 {
    loads.torque_n_m * at.rotation_rad_s
}

/// The condition at which the engine at a throttle setting turns the propeller, at the speed and air of `at`.
///
/// # Errors
/// No engine; the engine too weak; the rpm past its limit or curve.
pub fn throttle_condition(rig: &Rig, at: &Condition, throttle: f64) -> Result<Condition, State> {
    let shaft = rig.shaft.as_ref().ok_or(State::NeedsEngine)?;
    let governed =
        governed(rig, at, |c| power_w(&rig.rotor.loads(c), c) - shaft.power_w(rpm_of(c), &at.air, throttle));
    match governed {
        Some(Governed::Held(condition)) => Ok(condition),
        Some(Governed::AtStop(stop)) => fixed_throttle(rig, shaft, &stop, throttle, None),
        None => fixed_throttle(rig, shaft, at, throttle, None),
    }
}

/// The same for blades that do not turn; `near` an rpm that a neighbouring speed gave saves most of the search.
fn fixed_throttle(
    rig: &Rig,
    shaft: &Shaft,
    at: &Condition,
    throttle: f64,
    near: Option<f64>,
) -> Result<Condition, State> {
    let (low, high) = shaft.rpm_range();
    let with = |rpm: f64| Condition { rotation_rad_s: rotation_rad_s(rpm), ..*at };
    let spare = |rpm: f64| {
        let c = with(rpm);
        power_w(&rig.rotor.loads(&c), &c) - shaft.power_w(rpm, &at.air, throttle)
    };
    let nearby = near.and_then(|rpm| {
        rising_root(((1.0 - NEAR) * rpm).max(low)..=((1.0 + NEAR) * rpm).min(high), 2, &spare).ok()
    });
    let rpm = match nearby.map_or_else(|| rising_root(low..=high, NODES, &spare), Ok) {
        Ok(rpm) => rpm,
        Err(Missed::AboveRange) => return Err(State::OverLimitRpm),
        Err(Missed::BelowRange) => return Err(State::EngineCannotTurnIt),
    };
    match shaft.limit_rpm() {
        Some(limit) if rpm > limit => Err(State::OverLimitRpm),
        _ => Ok(with(rpm)),
    }
}

/// The condition at which the propeller takes a power, at the speed and air of `at`.
fn power_condition(rig: &Rig, at: &Condition, asked_w: f64) -> Result<Condition, State> {
    let spare = |c: &Condition| power_w(&rig.rotor.loads(c), c) - asked_w;
    demanded(rig, at, spare)
}

/// The condition of level flight (or of hover) at the speed and air of `at`.
fn level_condition(rig: &Rig, at: &Condition) -> Result<Condition, State> {
    let aircraft = rig.job.aircraft.as_ref().ok_or(State::NeedsAircraft)?;
    let asked = thrust_asked_n(aircraft, &at.air, at.airspeed_m_s).ok_or(State::OutOfReach)?;
    let condition = demanded(rig, at, |c| rig.rotor.loads(c).thrust_n - asked)?;
    within_engine(rig, condition)
}

/// Where a demand that rises with rpm (or with the blade angle of a governed propeller) is met.
fn demanded(rig: &Rig, at: &Condition, spare: impl Fn(&Condition) -> f64) -> Result<Condition, State> {
    let at = match governed(rig, at, &spare) {
        Some(Governed::Held(condition)) => return Ok(condition),
        Some(Governed::AtStop(stop)) => stop,
        None => *at,
    };
    let with = |w: f64| Condition { rotation_rad_s: w, ..at };
    let fastest = FASTEST_TIP_MACH * at.air.sound_speed_m_s / rig.rotor.blade.radius_m;
    rising_root(SLOWEST * fastest..=fastest, 2 * NODES, &|w| spare(&with(w)))
        .map(with)
        .map_err(|_| State::OutOfReach)
}

/// Whether the engine, where there is one, gives what the condition takes.
fn within_engine(rig: &Rig, condition: Condition) -> Result<Condition, State> {
    let Some(shaft) = &rig.shaft else { return Ok(condition) };
    let rpm = rpm_of(&condition);
    let highest = shaft.limit_rpm().unwrap_or(f64::INFINITY).min(shaft.rpm_range().1);
    if rpm > highest {
        return Err(State::OverLimitRpm);
    }
    let taken = power_w(&rig.rotor.loads(&condition), &condition);
    if taken > shaft.power_w(rpm, &condition.air, 1.0) { Err(State::OutOfReach) } else { Ok(condition) }
}

/// Propeller rpm of a condition.
#[must_use]
pub fn rpm_of(at: &Condition) -> f64 {
    60.0 * at.turns_per_s()
}

enum Governed {
    /// The governor holds its rpm.
    Held(Condition),
    /// The blades rest at a stop.
    AtStop(Condition),
}

/// The condition of a constant-speed propeller for a demand that rises with the blade angle; `None` for other propellers.
fn governed(rig: &Rig, at: &Condition, spare: impl Fn(&Condition) -> f64) -> Option<Governed> {
    let PitchControl::ConstantSpeed { rpm, turn_min_deg, turn_max_deg } = rig.job.propeller.pitch_control
    else {
        return None;
    };
    let turned = |turn_rad: f64| Condition { rotation_rad_s: rotation_rad_s(rpm), turn_rad, ..*at };
    let (fine, coarse) = (turn_min_deg.to_radians(), turn_max_deg.to_radians());
    if fine == coarse {
        return Some(Governed::AtStop(turned(fine)));
    }
    Some(match first_rising_root(fine..=coarse, NODES, &|turn| spare(&turned(turn))) {
        Ok(turn) => Governed::Held(turned(turn)),
        Err(Missed::BelowRange) => Governed::AtStop(turned(fine)),
        Err(Missed::AboveRange) => Governed::AtStop(turned(coarse)),
    })
}

/// Why a search found nothing: the demand is met only beyond this end.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Missed {
    BelowRange,
    AboveRange,
}

/// The highest root at which `spare` rises from below to above zero, found on equal steps and refined by Brent.
fn rising_root(range: RangeInclusive<f64>, steps: u32, spare: &impl Fn(f64) -> f64) -> Result<f64, Missed> {
    let nodes = (0..steps).rev();
    search(range, steps, nodes, spare)
}

/// The lowest such root.
fn first_rising_root(
    range: RangeInclusive<f64>,
    steps: u32,
    spare: &impl Fn(f64) -> f64,
) -> Result<f64, Missed> {
    search(range, steps, 0..steps, spare)
}

fn search(
    range: RangeInclusive<f64>,
    steps: u32,
    mut order: impl Iterator<Item = u32>,
    spare: &impl Fn(f64) -> f64,
) -> Result<f64, Missed> {
    let (low, high) = range.into_inner();
    let node = |i: u32| low + (high - low) * f64::from(i) / f64::from(steps);
    let mut known = vec![None; steps as usize + 1];
    let mut value = |i: u32| *known[i as usize].get_or_insert_with(|| spare(node(i)));
    let Some(i) = order.find(|&i| value(i) < 0.0 && value(i + 1) >= 0.0) else {
        return Err(if value(steps) < 0.0 { Missed::AboveRange } else { Missed::BelowRange });
    };
    let (a, b) = ((node(i), value(i)), (node(i + 1), value(i + 1)));
    let ends = |x: f64| match x {
        x if x == a.0 => a.1,
        x if x == b.0 => b.1,
        x => spare(x),
    };
    let mut rule = roots::SimpleConvergency { eps: CONVERGED * (high - low), max_iter: 60 };
    Ok(roots::find_root_brent(a.0, b.0, ends, &mut rule).unwrap_or(b.0))
}
