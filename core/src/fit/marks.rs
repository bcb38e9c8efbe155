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

#[cfg(test)]
mod tests {
    use super::*;
    use crate::result::State;

    fn full(value: f64, held_at_limit: bool) -> FullThrottle {
        FullThrottle {
            rpm: 2000.0,
            held_at_limit,
            turn_deg: 0.0,
            thrust_n: value,
            power_w: 1.0,
            efficiency: None,
            tip_mach: value,
            rate_of_climb_m_s: Some(value),
            climb_angle_deg: None,
            departure_deg: Vec::new(),
        }
    }

    fn points(values: &[(f64, Option<f64>)]) -> Vec<EnvelopePoint> {
        let point = |&(airspeed_m_s, value): &(f64, Option<f64>)| EnvelopePoint {
            airspeed_m_s,
            asked_n: None,
            full: value.map(|v| full(v, v > 0.0)),
            full_state: State::Ok,
            level: None,
            level_state: State::Ok,
        };
        values.iter().map(point).collect()
    }

    /// A parabola over speeds of any spacing has its top where it is.
    #[test]
    fn the_top_of_a_parabola_is_found_exactly() {
        let parabola = |v: f64| 7.0 - 0.3 * (v - 11.3).powi(2);
        let known = |v: f64| (v, parabola(v));
        assert!((vertex(known(9.0), known(11.0), known(14.0)) - 11.3).abs() < 1e-12);
        assert!((vertex(known(11.2), known(11.5), known(30.0)) - 11.3).abs() < 1e-12);
        // Three alike, or no top at all: the middle one.
        assert!((vertex((1.0, 2.0), (2.0, 2.0), (4.0, 2.0)) - 2.0).abs() < 1e-12);
        assert!((vertex((1.0, 2.0), (2.0, 1.0), (4.0, 2.0)) - 2.0).abs() < 1e-12);
    }

    fn summit(of: &dyn Fn(f64) -> f64, stall: f64, counts: bool) -> Option<Mark> {
        let looked: Vec<_> = (0..=10).map(|i| 2.0 * f64::from(i)).map(|v| (v, Some(of(v)))).collect();
        let line = Line {
            points: &points(&looked),
            slowest: Slowest { airspeed_m_s: stall, counts },
            known: |p| p.full.as_ref(),
            found: &|v| Some(full(of(v), false)),
            turns: |f| (f.rpm, f.held_at_limit),
        };
        line.best(|f| f.rate_of_climb_m_s)
    }

    /// Below the slowest flight nothing counts, at it the figure there does, and where a point of the range
    /// happens to lie at that speed nothing is different.
    #[test]
    fn the_best_is_sought_from_the_slowest_flight_on() {
        let top_at = |top: f64| move |v: f64| 9.0 - 0.01 * (v - top).powi(2);
        for (top, stall, expected) in
            [(11.3, 5.0, 11.3), (11.3, 6.0, 11.3), (11.3, 12.5, 12.5), (11.3, 12.0, 12.0), (30.0, 5.0, 20.0)]
        {
            let found = summit(&top_at(top), stall, true).unwrap();
            assert!((found.airspeed_m_s - expected).abs() < 1e-9, "{top} {stall}: {found:?}");
            assert!((found.value - top_at(top)(expected)).abs() < 1e-9, "{top} {stall}: {found:?}");
        }
        // A stall that is not known does not count itself, nor does rest.
        let falls = |v: f64| 9.0 - v;
        assert!((summit(&falls, 0.0, false).unwrap().airspeed_m_s - 2.0).abs() < 1e-12);
        assert!(summit(&falls, 0.0, true).unwrap().airspeed_m_s.abs() < 1e-12);
        // What is nowhere above zero is no best; nor is zero, as the range of what hovers and can do no more.
        assert!(summit(&|v| -1.0 - v, 0.0, false).is_none());
        assert!(summit(&|v| -v, 0.0, true).is_none());
    }

    /// A point at the slowest flight but for rounding, whose figure two roads to one root have made a little
    /// different, tells nothing of how the figure runs: from there on it falls, and its best is there.
    #[test]
    fn a_point_at_the_slowest_flight_does_not_count_twice() {
        let falls = |v: f64| 9.0 - 0.01 * (v - 11.5).powi(2) - if v < 12.0 { 2e-5 } else { 0.0 };
        for stall in [12.0 * (1.0 - 1e-9), 12.0 * (1.0 - 3e-7)] {
            let found = summit(&falls, stall, true).unwrap();
            assert!((found.airspeed_m_s - 12.0).abs() < 1e-5, "{stall}: {found:?}");
        }
    }

    #[test]
    fn a_value_passes_zero_on_the_line_between_two_points() {
        let at = |values: &[(f64, Option<f64>)]| passed(&points(values), |f| f.thrust_n);
        let rising = [(0.0, Some(-3.0)), (10.0, Some(-1.0)), (20.0, Some(3.0)), (30.0, Some(9.0))];
        assert!((at(&rising).unwrap() - 12.5).abs() < 1e-12);
        let again = [(0.0, Some(-3.0)), (10.0, Some(1.0)), (20.0, Some(-1.0)), (30.0, Some(9.0))];
        assert!((at(&again).unwrap() - 7.5).abs() < 1e-12, "the first time");
        let gap = [(0.0, Some(-3.0)), (10.0, None), (20.0, Some(3.0))];
        assert!((at(&gap).unwrap() - 10.0).abs() < 1e-12);
        assert_eq!(at(&[(4.0, Some(1.0)), (10.0, Some(-1.0))]), Some(4.0));
        assert_eq!(at(&[(4.0, Some(-1.0)), (10.0, Some(-0.5))]), None);
        assert_eq!(at(&[(4.0, None)]), None);
    }
}
