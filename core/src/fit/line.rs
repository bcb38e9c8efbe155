//! The line of conditions along which the departure map is drawn.

use super::{fixed_throttle, rpm_of, throttle_condition};
use crate::curve::Curve;
use crate::job::PitchControl;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, thrustless_speed_m_s};

/// Speeds at which the full-throttle rpm is worked out; between them it follows a monotone cubic.
const NODES: u32 = 8;

/// Conditions at equal steps of speed from rest, at the air of `at`: at full throttle as far as the engine can be
/// matched, or, without an engine, at the rpm of `at` up to where the thrust is gone.
#[must_use]
pub fn line(rig: &Rig, at: &Condition, speeds: u32) -> Vec<Condition> {
    let count = speeds.max(2);
    let step = |end: f64, i: u32, of: u32| end * f64::from(i) / f64::from(of);
    let end = thrustless_speed_m_s(&rig.rotor, at);
    let nodes: Vec<Condition> = full_throttle(rig, at, (0..=NODES).map(|i| step(end, i, NODES)));
    let speed: Vec<f64> = nodes.iter().map(|c| c.airspeed_m_s).collect();
    let rpm = Curve::new(speed.clone(), nodes.iter().map(rpm_of).collect());
    let turn = Curve::new(speed.clone(), nodes.iter().map(|c| c.turn_rad).collect());
    match (rpm, turn, speed.last()) {
        (Some(rpm), Some(turn), Some(&last)) if speed.len() > 2 => (0..count)
            .map(|i| step(last, i, count - 1))
            .map(|v| Condition {
                airspeed_m_s: v,
                rotation_rad_s: rotation_rad_s(rpm.at(v)),
                turn_rad: turn.at(v),
                ..*at
            })
            .collect(),
        _ => (0..count).map(|i| Condition { airspeed_m_s: step(end, i, count - 1), ..*at }).collect(),
    }
}

/// Full-throttle conditions at rising speeds, up to the first that has none.
fn full_throttle(rig: &Rig, at: &Condition, speeds: impl Iterator<Item = f64>) -> Vec<Condition> {
    let Some(shaft) = &rig.shaft else { return Vec::new() };
    let governed = matches!(rig.job.propeller.pitch_control, PitchControl::ConstantSpeed { .. });
    let mut near = None;
    speeds
        .map_while(|v| {
            let here = Condition { airspeed_m_s: v, ..*at };
            let full = if governed {
                throttle_condition(rig, &here, 1.0)
            } else {
                fixed_throttle(rig, shaft, &here, 1.0, near)
            };
            near = full.as_ref().ok().map(rpm_of);
            full.ok()
        })
        .collect()
}
