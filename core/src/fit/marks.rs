//! Places of the speed range that decide: the tops of curves by the parabola through three points, and where
//! limits are passed.

use super::dive::dive;
use super::envelope::{Followed, stall_m_s};
use super::figures::{full_throttle, level};
use super::full::Full;
use super::idle::idle;
use super::trail::Trail;
use super::{Solver, rpm_of};
use crate::aircraft::propellers;
use crate::job::Aircraft;
use crate::result::{EnvelopePoint, FullThrottle, Level, Mark, Marks, State, TIP_MACHS, TipMach};
use crate::rig::Rig;
use crate::rotor::Condition;

/// The marks of an envelope's points, found on from the answers at their speeds; `top` is its top speed.
pub(super) fn marks(
    rig: &Rig,
    at: &Condition,
    points: &[EnvelopePoint],
    followed: &Followed,
    top: Option<Full>,
) -> Marks {
    let solver = Solver::new(rig);
    let stall = stall_m_s(rig, at);
    let here = |airspeed_m_s: f64| Condition { airspeed_m_s, ..*at };
    let hovers = matches!(rig.aircraft, Some(Aircraft::Multirotor(_)));
    let slowest = Slowest { airspeed_m_s: stall, counts: hovers || stall > 0.0 };
    let full = Line {
        points,
        slowest,
        known: |p| p.full.as_ref(),
        found: &|v| {
            let full = solver.full(&here(v), &mut Trail::beside(&followed.full, v)).ok()?;
            Some(full_throttle(rig, &full, Vec::new()))
        },
        turns: |f: &FullThrottle| (f.rpm, f.held_at_limit),
    };
    let flight = Line {
        points,
        slowest,
        known: |p| p.level.as_ref(),
        found: &|v| {
            let met = solver.level(&here(v), &Trail::beside(&followed.level, v)).ok()?;
            Some(level(rig, &met.condition, &met.loads, State::Ok, Vec::new()))
        },
        turns: |l: &Level| (l.rpm, false),
    };
    Marks {
        best_rate_of_climb: full.best(|f| f.rate_of_climb_m_s),
        best_angle_of_climb: full.best(|f| f.climb_angle_deg),
        top_speed: top.map(|f| {
            let told = full_throttle(rig, &f, Vec::new());
            let airspeed_m_s = f.condition.airspeed_m_s;
            Mark { airspeed_m_s, rpm: told.rpm, value: told.thrust_n, held_at_limit: f.held }
        }),
        closed_throttle_dive: dive(rig, at).map(|f| driven(rig, &f)),
        idle: idle(rig, at).map(|f| driven(rig, &f)),
        best_range: flight.best(|l| l.range_m),
        best_endurance: flight.best(|l| l.endurance_s),
        limit_rpm_from_m_s: passed(points, |f| if f.held_at_limit { 1.0 } else { -1.0 }),
        tip_mach_from: TIP_MACHS
            .iter()
            .filter_map(|&mach| {
                let airspeed_m_s = passed(points, |f| f.tip_mach - mach)?;
                Some(TipMach { tip_mach: mach, airspeed_m_s })
            })
            .collect(),
    }
}

/// Where the throttle is closed; the value is the thrust of all propellers.
fn driven(rig: &Rig, f: &Full) -> Mark {
    Mark {
        airspeed_m_s: f.condition.airspeed_m_s,
        rpm: rpm_of(&f.condition),
        value: f.loads.thrust_n * rig.aircraft.as_ref().map_or(1.0, propellers),
        held_at_limit: false,
    }
}

/// The slowest flight.
#[derive(Clone, Copy)]
struct Slowest {
    airspeed_m_s: f64,
    /// Whether it counts beside the envelope's points: what is best there would else depend on how near to it
    /// a point happens to lie. It does not where no stall is known.
    counts: bool,
}

/// One line of the map: full throttle, or level flight.
struct Line<'a, T> {
    points: &'a [EnvelopePoint],
    slowest: Slowest,
    /// The answer at one of the points.
    known: fn(&EnvelopePoint) -> Option<&T>,
    /// The answer at any speed, m/s.
    found: &'a dyn Fn(f64) -> Option<T>,
    /// Rpm of an answer, and whether it is held at the limit.
    turns: fn(&T) -> (f64, bool),
}

impl<T> Line<'_, T> {
    /// Where a figure is greatest, if it is above zero there.
    fn best(&self, of: fn(&T) -> Option<f64>) -> Option<Mark> {
        let airspeed_m_s = self.summit(of)?;
        let answer = (self.found)(airspeed_m_s)?;
        let (rpm, held_at_limit) = (self.turns)(&answer);
        of(&answer).filter(|value| *value > 0.0).map(|value| Mark { airspeed_m_s, rpm, value, held_at_limit })
    }

    /// The speed of the greatest value: the top of the parabola through the highest point and its neighbours,
    /// or the highest point where it is at an end. Only speeds above rest and from the slowest flight on
    /// count, which comes first itself where it is known.
    fn summit(&self, of: fn(&T) -> Option<f64>) -> Option<f64> {
        let Slowest { airspeed_m_s: stall, counts } = self.slowest;
        let first = counts.then_some(stall).and_then(|v| Some((v, of(&(self.found)(v)?)?)));
        let least = if first.is_some() { stall * (1.0 + 1e-6) } else { stall };
        let later = self.points.iter().filter(|p| p.airspeed_m_s > 0.0 && p.airspeed_m_s >= least);
        let later = later.filter_map(|p| Some((p.airspeed_m_s, of((self.known)(p)?)?)));
        let values: Vec<(f64, f64)> = first.into_iter().chain(later).collect();
        let top = (0..values.len()).max_by(|&a, &b| values[a].1.total_cmp(&values[b].1))?;
        let at = |i: usize| values.get(i).copied();
        let (Some(a), Some(b), Some(c)) = (top.checked_sub(1).and_then(at), at(top), at(top + 1)) else {
            return at(top).map(|p| p.0);
        };
        Some(vertex(a, b, c))
    }
}

/// The top of the parabola through three points of which the middle one is highest.
pub(super) fn vertex(a: (f64, f64), b: (f64, f64), c: (f64, f64)) -> f64 {
    let (left, right) = ((b.1 - a.1) / (b.0 - a.0), (c.1 - b.1) / (c.0 - b.0));
    let bend = (right - left) / (c.0 - a.0);
    if bend < 0.0 { (0.5 * (a.0 + b.0) - 0.5 * left / bend).clamp(a.0, c.0) } else { b.0 }
}

/// The speed at which a value of full throttle rises through zero, on the line between two points.
fn passed(points: &[EnvelopePoint], of: impl Fn(&FullThrottle) -> f64) -> Option<f64> {
    let values: Vec<(f64, f64)> =
        points.iter().filter_map(|p| p.full.as_ref().map(|f| (p.airspeed_m_s, of(f)))).collect();
    let first = values.first()?;
    if first.1 >= 0.0 {
        return Some(first.0);
    }
    values
        .windows(2)
        .find(|w| w[0].1 < 0.0 && w[1].1 >= 0.0)
        .map(|w| w[0].0 - w[0].1 * (w[1].0 - w[0].0) / (w[1].1 - w[0].1))
}
