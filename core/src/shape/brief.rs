//! The figures of a flight point that decide between blades, without its stations.

use crate::fit;
use crate::job::FlightPoint;
use crate::report;
use crate::result::{Brief, Compared, Figures, Meeting, State};
use crate::rig::{Rig, air_of};

/// The deciding figures of a flight point; where full throttle would pass the limit rpm, those held at it.
#[must_use]
pub fn brief(rig: &Rig, point: &FlightPoint) -> Brief {
    let empty =
        |state| told(point, state, (point.airspeed_m_s, None), &Figures::default(), &Meeting::default());
    let Ok(air) = air_of(point) else { return empty(State::OutOfReach) };
    match fit::condition(rig, point, air) {
        Ok(at) => {
            let figures = report::figures(&rig.rotor, &at, &rig.rotor.loads(&at));
            let meeting = fit::meeting(rig, &at, &figures);
            told(point, State::Ok, (Some(at.airspeed_m_s), Some(fit::rpm_of(&at))), &figures, &meeting)
        }
        Err(state) => fit::held(rig, point, air, state).map_or_else(
            || empty(state),
            |held| {
                let here = (Some(held.airspeed_m_s), Some(held.rpm));
                Brief { held_at_limit: true, ..told(point, state, here, &held.figures, &held.meeting) }
            },
        ),
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
    }
}
