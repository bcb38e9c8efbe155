//! The figures of a flight point that decide between blades, without its stations.

use super::limits::NO_FIGURE;
use crate::aircraft::propellers;
use crate::fit::{self, Answer, Near, Spare};
use crate::job::{Figure, FlightPoint, Setting};
use crate::report;
use crate::result::{Brief, Compared, Figures, Meeting, State};
use crate::rig::{Rig, air_of};
use crate::rotor::{Condition, Loads};

/// The deciding figures of a flight point; where full throttle would pass the limit rpm, those held at it.
#[must_use]
pub fn brief(rig: &Rig, point: &FlightPoint) -> Brief {
    let Ok(air) = air_of(point) else { return empty(point, State::OutOfReach) };
    match fit::condition(rig, point, air) {
        Ok(at) => told_at(rig, point, &at, &rig.rotor.loads(&at)),
        Err(state) => fit::held(rig, point, air, state).map_or_else(
            || empty(point, state),
            |held| {
                let here = (Some(held.airspeed_m_s), Some(held.rpm));
                Brief { held_at_limit: true, ..told(point, state, here, &held.figures, &held.meeting) }
            },
        ),
    }
}

/// A flight point as a search sees it: level flight is told even where the engine does not give it.
pub(super) struct Look {
    pub(super) brief: Brief,
    /// What the engine has to spare in level flight.
    pub(super) spare: Option<Spare>,
}

/// Where level flight has no answer nothing is to spare.
const NOTHING: Spare = Spare { rpm_share: NO_FIGURE, power_share: NO_FIGURE, highest_rpm: 0.0, given_w: 0.0 };

pub(super) fn look(rig: &Rig, point: &FlightPoint, near: &mut Near) -> Look {
    let level = point.setting == (Setting::Level {}) && rig.shaft.is_some();
    let answer =
        air_of(point).map_err(|_| State::OutOfReach).and_then(|air| fit::answer(rig, point, air, near));
    match answer {
        Err(state) => Look { brief: empty(point, state), spare: level.then_some(NOTHING) },
        Ok(Answer { condition, loads, held }) => {
            let mut brief = told_at(rig, point, &condition, &loads);
            let spare = level.then(|| fit::spare(rig, &condition, brief.power_w.unwrap_or(0.0)));
            brief.held_at_limit = held;
            brief.state = if held { State::OverLimitRpm } else { State::Ok };
            Look { brief, spare: spare.flatten() }
        }
    }
}

fn empty(point: &FlightPoint, state: State) -> Brief {
    told(point, state, (point.airspeed_m_s, None), &Figures::default(), &Meeting::default())
}

fn told_at(rig: &Rig, point: &FlightPoint, at: &Condition, loads: &Loads) -> Brief {
    let figures = report::figures(&rig.rotor, at, loads);
    let meeting = fit::meeting(rig, at, &figures);
    let here = (Some(at.airspeed_m_s), Some(fit::rpm_of(at)));
    let engines = rig.job.aircraft.as_ref().map_or(1.0, propellers);
    let lasts = |w: f64| rig.shaft.as_ref()?.endurance_s(fit::rpm_of(at), w, &at.air, engines);
    let given = |w: &f64| *w > 0.0 && fit::beyond_engine(rig, at, *w).is_empty();
    let endurance_s = figures.power_w.filter(given).and_then(lasts);
    Brief { endurance_s, ..told(point, State::Ok, here, &figures, &meeting) }
}

/// One figure of a flight point; `None` where it has none.
#[must_use]
pub fn figure_at(rig: &Rig, point: &FlightPoint, figure: Figure) -> Option<f64> {
    match figure {
        Figure::TakeOffM => Some(fit::take_off_in(rig, &air_of(point).ok()?)?.distance_to_15_m),
        figure => figure.of(&brief(rig, point)),
    }
}

/// The deciding figures of every flight point.
#[must_use]
pub fn briefs(rig: &Rig) -> Vec<Brief> {
    rig.job.flight_points.iter().map(|point| brief(rig, point)).collect()
}

/// Every flight point with the drawn and with the shaped blade.
pub(super) fn compared(drawn: &Rig, shaped: &Rig) -> Vec<Compared> {
    let pairs = briefs(drawn).into_iter().zip(briefs(shaped));
    pairs.map(|(drawn, shaped)| Compared { drawn, shaped }).collect()
}

fn told(
    point: &FlightPoint,
    state: State,
    at: (Option<f64>, Option<f64>),
    f: &Figures,
    m: &Meeting,
) -> Brief {
    Brief {
        name: point.name.clone(),
        state,
        held_at_limit: false,
        airspeed_m_s: at.0,
        rpm: at.1,
        thrust_n: f.thrust_n,
        power_w: f.power_w,
        efficiency: f.efficiency,
        figure_of_merit: f.figure_of_merit,
        rate_of_climb_m_s: m.rate_of_climb_m_s,
        tip_mach: f.tip_mach,
        power_share: m.power_share,
        endurance_s: None,
        take_off_m: None,
    }
}
