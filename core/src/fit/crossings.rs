//! Every rpm at which propeller and engine agree at full throttle, with the one that counts.

use super::{Solver, highest_rpm, power_w, rpm_of};
use crate::engine::Shaft;
use crate::result::Crossing;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::Condition;

/// Steps over the engine's range.
const STEPS: u32 = 48;

/// Every rpm of the engine's range at which the propeller, with its blades as at `at`, takes what full
/// throttle gives at that speed and air, from low to high. It is stable where the demand rises through the
/// offer; the highest stable one within the limit rpm is chosen. None without an engine.
#[must_use]
pub fn crossings(rig: &Rig, at: &Condition) -> Vec<Crossing> {
    let Some(shaft) = &rig.shaft else { return Vec::new() };
    let (low, high) = shaft.rpm_range();
    let looks: Vec<(f64, f64)> = (0..=STEPS)
        .map(|i| low + (high - low) * f64::from(i) / f64::from(STEPS))
        .map(|rpm| (rpm, spare_w(rig, shaft, at, rpm)))
        .collect();
    let mut found: Vec<Crossing> = looks
        .windows(2)
        .filter(|w| (w[0].1 < 0.0) != (w[1].1 < 0.0))
        .map(|w| {
            let mut rule = roots::SimpleConvergency { eps: 1e-6 * (high - low), max_iter: 60 };
            let root = roots::find_root_brent(w[0].0, w[1].0, |rpm| spare_w(rig, shaft, at, rpm), &mut rule);
            Crossing { rpm: root.unwrap_or(w[1].0), stable: w[0].1 < 0.0, chosen: false }
        })
        .collect();
    let highest = highest_rpm(shaft);
    if let Some(c) = found.iter_mut().rev().find(|c| c.stable)
        && c.rpm <= highest
    {
        c.chosen = true;
    }
    found
}

fn spare_w(rig: &Rig, shaft: &Shaft, at: &Condition, rpm: f64) -> f64 {
    let c = Condition { rotation_rad_s: rotation_rad_s(rpm), ..*at };
    power_w(&Solver::new(rig).loads(&c), &c) - shaft.power_w(rpm_of(&c), &at.air, 1.0)
}
