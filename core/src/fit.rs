//! From a flight point's setting to a condition of the propeller.

use crate::air::Air;
use crate::job::{FlightPoint, Setting};
use crate::result::State;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::Condition;

/// The condition at which a flight point's setting is met.
///
/// # Errors
/// The state that says why there is none.
pub fn condition(rig: &Rig, point: &FlightPoint, air: Air) -> Result<Condition, State> {
    let at = |rotation_rad_s: f64| Condition {
        air,
        airspeed_m_s: point.airspeed_m_s.unwrap_or(0.0),
        rotation_rad_s,
        turn_rad: rig.turn_rad(),
    };
    match point.setting {
        Setting::Rpm { rpm } => Ok(at(rotation_rad_s(rpm))),
        Setting::Power { power_w } => {
            power_rotation_rad_s(rig, &at(1.0), power_w).map(at).ok_or(State::OutOfReach)
        }
        Setting::FullThrottle {} | Setting::Throttle { .. } => Err(State::NeedsEngine),
        Setting::Level {} => Err(State::NeedsAircraft),
    }
}

/// Fastest tip considered, as a Mach number.
const FASTEST_TIP_MACH: f64 = 1.2;
/// Slowest rotation considered over the fastest.
const SLOWEST: f64 = 0.01;
const SCAN: u32 = 60;

/// The rotation at which the propeller takes a power: the fastest at which the power rises through it.
fn power_rotation_rad_s(rig: &Rig, at: &Condition, power_w: f64) -> Option<f64> {
    let fastest = FASTEST_TIP_MACH * at.air.sound_speed_m_s / rig.rotor.blade.radius_m;
    let spare = |w: f64| rig.rotor.loads(&Condition { rotation_rad_s: w, ..*at }).torque_n_m * w - power_w;
    let node = |i: u32| fastest * SLOWEST.powf(f64::from(i) / f64::from(SCAN));
    let below = (1..=SCAN).find(|&i| spare(node(i)) < 0.0 && spare(node(i - 1)) >= 0.0)?;
    let mut rule = roots::SimpleConvergency { eps: 1e-9, max_iter: 100 };
    roots::find_root_brent(node(below), node(below - 1), spare, &mut rule).ok()
}

/// The line of conditions of the departure map: the flight point's rpm and air from rest to past the speed where the thrust is gone.
#[must_use]
pub fn line(rig: &Rig, at: &Condition, speeds: u32) -> Vec<Condition> {
    let fastest = crate::rotor::thrustless_speed_m_s(&rig.rotor, at);
    let step = fastest / f64::from(speeds.max(2) - 1);
    (0..speeds).map(|i| Condition { airspeed_m_s: step * f64::from(i), ..*at }).collect()
}
