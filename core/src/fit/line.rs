//! The line of conditions along which the departure map is drawn.

use super::full::run_up;
use super::trail::Trail;
use super::{Solver, highest_rpm, rpm_of};
use crate::curve::Curve;
use crate::result::State;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, thrustless_speed_m_s};

/// Speeds at which the full-throttle rpm is worked out; between them it follows a monotone cubic.
const NODES: u32 = 8;

/// Conditions at equal steps of speed from rest, at the air of `at`: at full throttle as far as the engine can be
/// matched and, where its limit rpm is what ends that, on at that rpm (throttled back); without an engine at the rpm
/// of `at`. Up to where the thrust is gone at the rpm of `at`.
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

/// Full-throttle conditions at rising speeds, held to the limit rpm, up to the first that has none.
fn full_throttle(rig: &Rig, at: &Condition, speeds: impl Iterator<Item = f64>) -> Vec<Condition> {
    let Some(shaft) = &rig.shaft else { return Vec::new() };
    let highest = highest_rpm(shaft);
    let mut trail = Trail::default();
    let (mut matched, mut held) = (false, false);
    speeds
        .map_while(|v| {
            let here = Condition { airspeed_m_s: v, ..*at };
            let at_limit = run_up(rig, &here, highest);
            if held {
                return Some(at_limit);
            }
            let full = Solver::new(rig).throttle(&here, 1.0, &trail);
            // Only past a speed that was matched: a propeller too fine to be run up at rest has no such line.
            held = matched && full.as_ref().is_err_and(|e| *e == State::OverLimitRpm);
            if held {
                return Some(at_limit);
            }
            let met = full.ok()?;
            trail.push(&met);
            matched = true;
            Some(met.condition)
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{DEMOS, Job};

    #[test]
    fn every_full_throttle_point_lies_on_its_own_line() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        let rig = Rig::new(&job).unwrap();
        for (i, point) in job.flight_points.iter().enumerate() {
            let at = rig.condition(i).unwrap();
            let line = line(&rig, &at, 60);
            let fastest = line.last().unwrap().airspeed_m_s;
            assert!(at.airspeed_m_s < fastest, "{}: {} of {fastest} m/s", point.name, at.airspeed_m_s);
            let highest =
                rig.shaft.as_ref().and_then(crate::engine::Shaft::limit_rpm).unwrap_or(f64::INFINITY);
            assert!(line.iter().all(|c| rpm_of(c) <= highest * (1.0 + 1e-9)), "{}", point.name);
        }
    }
}
