//! The answer of a flight point from that of a propeller a little different, which saves looking over the
//! whole range.

use super::full::Full;
use super::top_near::TopNear;
use super::trail::Trail;
use super::{Solver, condition, top_speed};
use crate::air::Air;
use crate::job::{FlightPoint, Setting};
use crate::result::State;
use crate::rig::Rig;
use crate::rotor::{Condition, Loads};

/// What is kept of the last answer of one flight point.
#[derive(Clone, Debug, Default)]
pub struct Near {
    trail: Trail,
    top: Option<TopNear>,
}

/// An answer.
#[derive(Clone, Copy, Debug)]
pub struct Answer {
    /// Where it is met.
    pub condition: Condition,
    /// What the propeller gives and takes there.
    pub loads: Loads,
    /// Whether full throttle would pass the limit rpm and is drawn back to it.
    pub held: bool,
}

impl From<Full> for Answer {
    fn from(full: Full) -> Self {
        Self { condition: full.condition, loads: full.loads, held: full.held }
    }
}

/// The answer of a flight point, full throttle drawn back where it would pass the limit rpm, level flight
/// whether or not the engine gives what it takes. Where a near answer leads to none, the whole range is
/// looked over.
///
/// # Errors
/// Why there is none.
pub fn answer(rig: &Rig, point: &FlightPoint, air: Air, near: &mut Near) -> Result<Answer, State> {
    let solver = Solver::new(rig);
    let airspeed_m_s = point.airspeed_m_s.unwrap_or(0.0);
    let at = Condition { air, airspeed_m_s, rotation_rad_s: 1.0, turn_rad: rig.turn_rad() };
    match point.setting {
        Setting::FullThrottle {} if point.airspeed_m_s.is_none() => {
            let led = near.top.take().and_then(|top| top.on(rig, &at));
            let top = led.map_or_else(|| top_speed::fastest(rig, &at).map(TopNear::from), Ok)?;
            Ok((*near.top.insert(top).full()).into())
        }
        Setting::FullThrottle {} => {
            let mut trail = std::mem::take(&mut near.trail);
            let full = solver.full(&at, &mut trail);
            near.trail = trail.newest();
            full.map(Answer::from)
        }
        Setting::Level {} => {
            let met = solver.level_by_thrust(&at, &near.trail)?;
            near.trail.push(&met);
            near.trail = std::mem::take(&mut near.trail).newest();
            Ok(Answer { condition: met.condition, loads: met.loads, held: false })
        }
        Setting::Rpm { .. } | Setting::Power { .. } | Setting::Throttle { .. } => {
            let condition = condition(rig, point, air)?;
            Ok(Answer { condition, loads: rig.rotor.loads(&condition), held: false })
        }
    }
}
