//! The answer throttled back to the limit rpm, where full throttle would pass it.

use super::trail::Trail;
use super::{Solver, meeting, rpm_of, top_speed};
use crate::air::Air;
use crate::job::{FlightPoint, Setting};
use crate::report;
use crate::result::{HeldAtLimit, State};
use crate::rig::Rig;

/// What a full-throttle flight point comes to when throttled back to the limit rpm; `None` for other settings
/// and states, and where the air alone drives the propeller to that rpm.
#[must_use]
pub fn held(rig: &Rig, point: &FlightPoint, air: Air, state: State) -> Option<HeldAtLimit> {
    if point.setting != (Setting::FullThrottle {}) || state != State::OverLimitRpm {
        return None;
    }
    let at = |airspeed_m_s| rig.unsolved(air, airspeed_m_s);
    let full = match point.airspeed_m_s {
        Some(v) => Solver::new(rig).full(&at(v), &mut Trail::default()),
        None => top_speed::fastest(rig, &at(0.0)),
    };
    let full = full.ok().filter(|full| full.held)?;
    let figures = report::figures(&rig.rotor, &full.condition, &full.loads);
    Some(HeldAtLimit {
        airspeed_m_s: full.condition.airspeed_m_s,
        rpm: rpm_of(&full.condition),
        turn_deg: full.condition.turn_rad.to_degrees(),
        meeting: meeting(rig, &full.condition, &figures),
        figures,
    })
}
