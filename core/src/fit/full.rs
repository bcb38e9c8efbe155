//! Full throttle, or throttled back to the limit rpm where full throttle would pass it.

use super::settle::Met;
use super::trail::Trail;
use super::{Solver, highest_rpm, power_w};
use crate::job::PitchControl;
use crate::result::State;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, Loads};

/// What full throttle comes to.
#[derive(Clone, Copy, Debug)]
pub(super) struct Full {
    pub(super) condition: Condition,
    pub(super) loads: Loads,
    /// Whether the throttle is drawn back to hold the limit rpm.
    pub(super) held: bool,
}

impl From<Met> for Full {
    fn from(met: Met) -> Self {
        Self { condition: met.condition, loads: met.loads, held: false }
    }
}

/// A condition at an rpm that the propeller has run up to. By then a governor has turned the blades to its
/// coarse stop; one that holds more than that rpm leaves them at the fine one.
pub(super) fn run_up(rig: &Rig, at: &Condition, rpm: f64) -> Condition {
    let turn_rad = match rig.job.propeller.pitch_control {
        PitchControl::ConstantSpeed { rpm: governed, turn_min_deg, .. } if governed > rpm => {
            turn_min_deg.to_radians()
        }
        PitchControl::ConstantSpeed { turn_max_deg, .. } => turn_max_deg.to_radians(),
        PitchControl::Fixed {} | PitchControl::GroundAdjustable { .. } => at.turn_rad,
    };
    Condition { rotation_rad_s: rotation_rad_s(rpm), turn_rad, ..*at }
}

impl Solver<'_> {
    /// Full throttle or, where it would pass the limit rpm or the end of the engine's curve, that rpm; leads
    /// the trail on.
    pub(super) fn full(&self, at: &Condition, trail: &mut Trail) -> Result<Full, State> {
        match self.throttle(at, 1.0, trail) {
            Ok(met) => {
                trail.push(&met);
                Ok(met.into())
            }
            Err(State::OverLimitRpm) => self.held_at_limit(at).ok_or(State::OverLimitRpm),
            Err(state) => Err(state),
        }
    }

    /// The limit rpm, throttled back, or that the air alone drives the propeller past it, where full throttle
    /// gives more than the propeller takes there; `None` where it does not: then full throttle may be
    /// matched below the limit.
    pub(super) fn past_limit(&self, at: &Condition) -> Option<Result<Full, State>> {
        let shaft = self.rig.shaft.as_ref()?;
        let full = self.at_limit(at)?;
        let taken_w = power_w(&full.loads, &full.condition);
        let offered_w = shaft.available_w(highest_rpm(shaft), &at.air).unwrap_or(0.0);
        let past = taken_w < offered_w;
        past.then_some(if taken_w > 0.0 { Ok(full) } else { Err(State::OverLimitRpm) })
    }

    /// The limit rpm, throttled back; `None` where the air alone drives the propeller there, which no
    /// throttle holds.
    fn held_at_limit(&self, at: &Condition) -> Option<Full> {
        self.at_limit(at).filter(|full| power_w(&full.loads, &full.condition) > 0.0)
    }

    /// The propeller at the limit rpm, whatever drives it there; `None` without an engine.
    fn at_limit(&self, at: &Condition) -> Option<Full> {
        let condition = run_up(self.rig, at, highest_rpm(self.rig.shaft.as_ref()?));
        Some(Full { condition, loads: self.loads(&condition), held: true })
    }

    pub(super) fn loads(&self, at: &Condition) -> Loads {
        if self.rough { self.rig.rotor.rough_loads(at) } else { self.rig.rotor.loads(at) }
    }
}
