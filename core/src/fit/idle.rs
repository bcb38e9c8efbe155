//! The propeller at the engine's idle rpm, standing: what brakes and chocks have to hold.

use super::Solver;
use super::full::{Full, run_up};
use crate::job::PitchControl;
use crate::rig::Rig;
use crate::rotor::Condition;

/// The standing propeller at idle, in the air of `at`, blades of a governed propeller at the fine stop: a
/// governor cannot hold so little. `None` without an idle rpm.
#[must_use]
pub(super) fn idle(rig: &Rig, at: &Condition) -> Option<Full> {
    let rpm = rig.shaft.as_ref()?.idle_rpm()?;
    let still = Condition { airspeed_m_s: 0.0, ..run_up(rig, at, rpm) };
    let turn_rad = match rig.job.propeller.pitch_control {
        PitchControl::ConstantSpeed { turn_min_deg, .. } => turn_min_deg.to_radians(),
        PitchControl::Fixed {} | PitchControl::GroundAdjustable { .. } => still.turn_rad,
    };
    let condition = Condition { turn_rad, ..still };
    Some(Full { condition, loads: Solver::new(rig).loads(&condition), held: false })
}
