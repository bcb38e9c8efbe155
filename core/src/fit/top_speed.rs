//! Top speed: the fastest level flight at full throttle.

use super::{fixed_throttle, rpm_of, throttle_condition};
use crate::aircraft::thrust_asked_n;
use crate::job::PitchControl;
use crate::result::State;
use crate::rig::Rig;
use crate::rotor::Condition;

/// Steps over speed.
const STEPS: u32 = 40;
/// Fastest speed considered, as a Mach number.
const FASTEST_MACH: f64 = 0.7;
const CONVERGED_M_S: f64 = 1e-6;
/// Thrust that may be left over, as a share of it.
const MET_SHARE: f64 = 1e-3;

/// The largest speed at which thrust still equals drag at full throttle, at the air of `at`.
///
/// # Errors
/// No aircraft or engine, or thrust below drag at every speed.
pub(super) fn condition(rig: &Rig, at: &Condition) -> Result<Condition, State> {
    let aircraft = rig.job.aircraft.as_ref().ok_or(State::NeedsAircraft)?;
    let shaft = rig.shaft.as_ref().ok_or(State::NeedsEngine)?;
    let governed = matches!(rig.job.propeller.pitch_control, PitchControl::ConstantSpeed { .. });
    let full = |v: f64, near: Option<f64>| {
        let here = Condition { airspeed_m_s: v, ..*at };
        if governed {
            throttle_condition(rig, &here, 1.0)
        } else {
            fixed_throttle(rig, shaft, &here, 1.0, near)
        }
    };
    let spare = |c: &Condition| {
        let asked = thrust_asked_n(aircraft, &at.air, c.airspeed_m_s)?;
        Some(rig.rotor.loads(c).thrust_n - asked)
    };
    let step = FASTEST_MACH * at.air.sound_speed_m_s / f64::from(STEPS);
    let (mut near, mut last, mut limit) = (None, None, State::OverLimitRpm);
    for v in (1..=STEPS).map(|i| step * f64::from(i)) {
        match full(v, near) {
            Ok(c) => {
                near = Some(rpm_of(&c));
                match spare(&c) {
                    Some(s) if s >= 0.0 => last = Some((v, near)),
                    _ if last.is_some() => break,
                    _ => limit = State::OutOfReach,
                }
            }
            // Past the engine's range before thrust falls to drag: that is what stops the aircraft.
            Err(state) => {
                limit = state;
                break;
            }
        }
    }
    let (mut low, near) = last.ok_or(limit)?;
    // Where there is no full-throttle condition any more, thrust counts as short.
    let left_over = |v: f64| full(v, near).ok().and_then(|c| spare(&c)).unwrap_or(-1.0);
    let mut rule = roots::SimpleConvergency { eps: CONVERGED_M_S, max_iter: 60 };
    low = roots::find_root_brent(low, low + step, left_over, &mut rule).unwrap_or(low);
    let found = full(low, near)?;
    // Where the engine's range ended first, thrust is still above drag.
    let met = spare(&found).is_some_and(|s| s < MET_SHARE * rig.rotor.loads(&found).thrust_n);
    if met { Ok(found) } else { Err(limit) }
}
