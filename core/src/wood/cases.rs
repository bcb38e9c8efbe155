//! The conditions the blade is judged at: every flight point, a standing start at full throttle, and an
//! overspeed.

use crate::air::Air;
use crate::fit;
use crate::job::{FlightPoint, Setting};
use crate::result::{CaseKind, State};
use crate::rig::{Rig, air_of, rotation_rad_s};
use crate::rotor::Condition;

/// Airspeeds of the dive that are looked at, m/s: from one to the next, and the last, the speed of sound at
/// sea level.
const STEP_M_S: f64 = 5.0;
const FASTEST_M_S: f64 = 340.0;
const HALVINGS: u32 = 20;

/// A condition the blade is judged at, or why there is none.
#[derive(Clone, Debug)]
pub(super) struct Case {
    pub(super) name: String,
    pub(super) kind: CaseKind,
    /// The flight point it comes from.
    pub(super) point: Option<usize>,
    /// Throttled back to the limit rpm.
    pub(super) held: bool,
    pub(super) at: Result<Condition, State>,
}

/// All cases of a job; the overspeed only where some other case has an answer.
pub(super) fn cases(rig: &Rig, overspeed: f64) -> Vec<Case> {
    let points = rig.job.flight_points.iter().enumerate();
    let mut all: Vec<Case> =
        points.map(|(i, p)| case(rig, p, p.name.clone(), CaseKind::FlightPoint, Some(i))).collect();
    all.extend(standing(rig));
    all.extend(overspeeding(rig, &all, overspeed));
    all
}

fn case(rig: &Rig, point: &FlightPoint, name: String, kind: CaseKind, index: Option<usize>) -> Case {
    let found = air_of(point).map_err(|_| State::OutOfReach).and_then(|air| answer(rig, point, air));
    let held = matches!(found, Ok((_, true)));
    Case { name, kind, point: index, held, at: found.map(|f| f.0) }
}

/// The condition, and whether the throttle is drawn back for it.
fn answer(rig: &Rig, point: &FlightPoint, air: Air) -> Result<(Condition, bool), State> {
    fit::condition(rig, point, air).map(|at| (at, false)).or_else(|state| {
        let held = fit::held(rig, point, air, state).ok_or(state)?;
        let at = Condition {
            air,
            airspeed_m_s: held.airspeed_m_s,
            rotation_rad_s: rotation_rad_s(held.rpm),
            turn_rad: held.turn_deg.to_radians(),
        };
        Ok((at, true))
    })
}

/// A standing start in the air of the first flight point, where the job has an engine and no such flight
/// point.
fn standing(rig: &Rig) -> Option<Case> {
    let full_at_rest =
        |p: &FlightPoint| p.airspeed_m_s == Some(0.0) && p.setting == (Setting::FullThrottle {});
    if rig.shaft.is_none() || rig.job.flight_points.iter().any(full_at_rest) {
        return None;
    }
    let first = rig.job.flight_points.first()?.clone();
    let point = FlightPoint { airspeed_m_s: Some(0.0), setting: Setting::FullThrottle {}, ..first };
    Some(case(rig, &point, "Standing, full throttle".into(), CaseKind::Standing, None))
}

/// The case of the highest rpm, turned faster: the factor times the highest rpm of any case or of the
/// engine's limit, at the least airspeed (a dive) at which the propeller takes no more power than in any
/// case.
fn overspeeding(rig: &Rig, cases: &[Case], factor: f64) -> Option<Case> {
    let answered = cases.iter().filter_map(|c| Some((c, c.at.as_ref().ok()?)));
    let (fastest, at) = answered.max_by(|a, b| a.1.rotation_rad_s.total_cmp(&b.1.rotation_rad_s))?;
    let limit = rig.shaft.as_ref().and_then(crate::engine::Shaft::limit_rpm).map_or(0.0, rotation_rad_s);
    let rotation = factor * at.rotation_rad_s.max(limit);
    let power = |at: &Condition| rig.rotor.loads(at).torque_n_m * at.rotation_rad_s;
    let most_w = cases.iter().filter_map(|c| c.at.as_ref().ok()).map(power).fold(0.0, f64::max);
    let faster = Condition { rotation_rad_s: rotation, ..*at };
    Some(Case {
        name: format!("Overspeed, {:.0} rpm", fit::rpm_of(&faster)),
        kind: CaseKind::Overspeed,
        point: fastest.point,
        held: false,
        at: Ok(dived(&faster, |c| power(c) - most_w)),
    })
}

/// The least airspeed, from that given on, at which what is spare is not above zero; the highest looked at
/// where there is none.
fn dived(at: &Condition, spare: impl Fn(&Condition) -> f64) -> Condition {
    let with = |airspeed_m_s: f64| Condition { airspeed_m_s, ..*at };
    let (mut low, mut high) = (at.airspeed_m_s, at.airspeed_m_s);
    while high < FASTEST_M_S && spare(&with(high)) > 0.0 {
        (low, high) = (high, (high + STEP_M_S).min(FASTEST_M_S));
    }
    for _ in 0..if high > low { HALVINGS } else { 0 } {
        let middle = 0.5 * (low + high);
        if spare(&with(middle)) > 0.0 { low = middle } else { high = middle }
    }
    with(high)
}
