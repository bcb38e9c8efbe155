//! The lines of conditions along which the departure map is drawn.

use super::full::run_up;
use super::trail::Trail;
use super::{Solver, highest_rpm, rpm_of, top_speed};
use crate::aircraft::speeds;
use crate::curve::Curve;
use crate::job::Aircraft;
use crate::result::State;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, thrustless_speed_m_s};

/// Speeds at which the full-throttle rpm is worked out; between them it follows a monotone cubic.
const NODES: u32 = 8;
/// The same of level flight, whose rpm bends more.
const LEVEL_NODES: u32 = 16;
/// Where level flight of an aircraft without a known stall begins, as a share of the speed of least power.
const SLOWEST_SHARE: f64 = 0.7;
/// Where it ends without an engine that sets its end, as a share of the fast-cruise speed.
const FASTEST_SHARE: f64 = 1.5;
/// Where it ends for a multirotor without such an engine, m/s.
const FASTEST_CLIMB_M_S: f64 = 10.0;

/// What a line of conditions follows.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Along {
    /// Full throttle.
    #[default]
    FullThrottle,
    /// Level flight at part throttle; hover and steady climb of a multirotor.
    Level,
}

/// Conditions at equal steps of speed from rest, at the air of `at`: at full throttle as far as the engine
/// can be matched and, where its limit rpm is what ends that, on at that rpm (throttled back); without an
/// engine at the rpm of `at`. Up to where the thrust is gone at the rpm of `at`.
#[must_use]
pub fn line(rig: &Rig, at: &Condition, speeds: u32) -> Vec<Condition> {
    let count = speeds.max(2);
    let step = |end: f64, i: u32, of: u32| end * f64::from(i) / f64::from(of);
    let end = thrustless_speed_m_s(&rig.rotor, at);
    let nodes: Vec<Condition> = full_throttle(rig, at, (0..=NODES).map(|i| step(end, i, NODES)));
    between(&nodes, count).unwrap_or_else(|| {
        (0..count).map(|i| Condition { airspeed_m_s: step(end, i, count - 1), ..*at }).collect()
    })
}

/// Conditions at equal steps of speed along level flight at the air of `at`: from the stall (or somewhat
/// below the speed of least power) to the fastest level flight of the engine. Empty without an aircraft and
/// where nothing is flown level.
#[must_use]
pub fn level_line(rig: &Rig, at: &Condition, speeds: u32) -> Vec<Condition> {
    let Some((slowest, fastest)) = level_span_m_s(rig, at) else { return Vec::new() };
    let solver = Solver::new(rig);
    let mut trail = Trail::default();
    let nodes: Vec<Condition> = (0..=LEVEL_NODES)
        .map(|i| slowest + (fastest - slowest) * f64::from(i) / f64::from(LEVEL_NODES))
        .filter_map(|v| {
            let met = solver.level_by_thrust(&Condition { airspeed_m_s: v, ..*at }, &trail).ok()?;
            trail.push(&met);
            Some(met.condition)
        })
        .collect();
    between(&nodes, speeds.max(2)).unwrap_or_default()
}

/// The slowest and the fastest level flight.
fn level_span_m_s(rig: &Rig, at: &Condition) -> Option<(f64, f64)> {
    let top = top_speed::fastest(rig, at).ok().map(|full| full.condition.airspeed_m_s);
    match rig.aircraft.as_ref()? {
        Aircraft::Aeroplane(a) => {
            let named = speeds(a, &at.air);
            let slowest = named.stall_m_s.unwrap_or(SLOWEST_SHARE * named.least_power_m_s);
            Some((slowest, top.unwrap_or(FASTEST_SHARE * named.fast_cruise_m_s).max(1.05 * slowest)))
        }
        Aircraft::Multirotor(_) => Some((0.0, top.unwrap_or(FASTEST_CLIMB_M_S))),
    }
}

/// Conditions at equal steps of speed between the first and the last of a few, rpm and blade angle following
/// monotone cubics; `None` where there are too few.
fn between(nodes: &[Condition], count: u32) -> Option<Vec<Condition>> {
    let (first, last) = (nodes.first()?, nodes.last()?);
    if nodes.len() < 3 {
        return None;
    }
    let speed: Vec<f64> = nodes.iter().map(|c| c.airspeed_m_s).collect();
    let rpm = Curve::new(speed.clone(), nodes.iter().map(rpm_of).collect())?;
    let turn = Curve::new(speed, nodes.iter().map(|c| c.turn_rad).collect())?;
    let (low, high) = (first.airspeed_m_s, last.airspeed_m_s);
    let at = |v: f64| Condition {
        airspeed_m_s: v,
        rotation_rad_s: rotation_rad_s(rpm.at(v)),
        turn_rad: turn.at(v),
        ..*first
    };
    let last = count - 1;
    Some((0..=last).map(|i| at(low + (high - low) * f64::from(i) / f64::from(last))).collect())
}

/// Full-throttle conditions at rising speeds, held to the limit rpm, up to the first that has none.
fn full_throttle(rig: &Rig, at: &Condition, speeds: impl Iterator<Item = f64>) -> Vec<Condition> {
    let Some(shaft) = &rig.shaft else { return Vec::new() };
    let highest = highest_rpm(shaft);
    let mut trail = Trail::default();
    let solver = Solver::new(rig);
    let mut held = false;
    speeds
        .map_while(|v| {
            let here = Condition { airspeed_m_s: v, ..*at };
            let full = if held && solver.past_limit(&here).is_some() {
                Err(State::OverLimitRpm)
            } else {
                solver.throttle(&here, 1.0, &trail)
            };
            held = full.as_ref().is_err_and(|e| *e == State::OverLimitRpm);
            if held {
                return Some(run_up(rig, &here, highest));
            }
            let met = full.ok()?;
            trail.push(&met);
            Some(met.condition)
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::aircraft::thrust_asked_n;
    use crate::fit::slipstream::kept_share;
    use crate::job::{DEMOS, Job};

    #[test]
    fn every_full_throttle_point_lies_on_its_own_line() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        let rig = Rig::new(&job).unwrap();
        for (i, point) in job.flight_points.iter().enumerate() {
            let at = rig.condition(i).unwrap();
            let line = line(&rig, &at, 60);
            let fastest = line.last().unwrap().airspeed_m_s;
            assert!(at.airspeed_m_s < fastest, "{}: {} of {fastest} m/s", point.name, at.airspeed_m_s);
            let highest =
                rig.shaft.as_ref().and_then(crate::engine::Shaft::limit_rpm).unwrap_or(f64::INFINITY);
            assert!(line.iter().all(|c| rpm_of(c) <= highest * (1.0 + 1e-9)), "{}", point.name);
        }
    }

    #[test]
    fn thrust_equals_what_is_asked_along_level_flight() {
        for demo in DEMOS {
            let job = Job::from_json(demo.json).unwrap();
            let rig = Rig::new(&job).unwrap();
            let at = (0..job.flight_points.len()).find_map(|i| rig.condition(i)).unwrap();
            let line = level_line(&rig, &at, 60);
            assert_eq!(line.len(), 60, "{}", demo.name);
            for c in &line {
                let asked = thrust_asked_n(job.aircraft.as_ref().unwrap(), &c.air, c.airspeed_m_s).unwrap();
                let thrust = rig.rotor.loads(c).thrust_n * kept_share(&rig);
                assert!((thrust / asked - 1.0).abs() < 0.01, "{}: {thrust} of {asked} N", demo.name);
            }
        }
    }

    #[test]
    fn without_an_aircraft_nothing_is_flown_level() {
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        let at = Rig::new(&job).unwrap().condition(0).unwrap();
        job.aircraft = None;
        assert!(level_line(&Rig::new(&job).unwrap(), &at, 60).is_empty());
    }

    /// Without an engine nothing but the polar tells where level flight ends: at 1.5 times the speed of fast
    /// cruise, with a stall beyond that at 1.05 times the stall; a multirotor's climb at 10 m/s.
    #[test]
    fn without_an_engine_level_flight_ends_where_the_polar_says() {
        let ends = |job: &Job| {
            let rig = Rig::new(job).unwrap();
            let air = crate::air::Air::standard(0.0, 0.0).unwrap();
            let at = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: 1.0, turn_rad: 0.0 };
            let line = level_line(&rig, &at, 30);
            assert_eq!(line.len(), 30);
            let named = match &job.aircraft {
                Some(Aircraft::Aeroplane(a)) => Some(speeds(a, &air)),
                _ => None,
            };
            (line[0].airspeed_m_s, line[29].airspeed_m_s, named)
        };
        let near = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 1e-12, "{a} {b}");
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        job.engine = None;
        let (slow, fast, named) = ends(&job);
        near(slow, named.unwrap().stall_m_s.unwrap());
        near(fast, 1.5 * named.unwrap().fast_cruise_m_s);
        let cl_max = |job: &mut Job, cl_max: Option<f64>| {
            let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else { panic!("an aeroplane") };
            a.cl_max = cl_max;
        };
        cl_max(&mut job, Some(0.1));
        let (slow, fast, named) = ends(&job);
        near(slow, named.unwrap().stall_m_s.unwrap());
        near(fast, 1.05 * slow);
        cl_max(&mut job, None);
        near(ends(&job).0, 0.7 * named.unwrap().least_power_m_s);
        let mut job = Job::from_json(DEMOS[2].json).unwrap();
        job.engine = None;
        let (slow, fast, _) = ends(&job);
        assert!(slow.abs() < 1e-12 && (fast - 10.0).abs() < 1e-12, "{slow} {fast}");
    }

    /// Equal steps of speed through three conditions or more, each met; two make no curve.
    #[test]
    fn three_conditions_are_enough_for_a_line() {
        let air = crate::air::Air::standard(0.0, 0.0).unwrap();
        let node = |i: i32| {
            let i = f64::from(i);
            Condition {
                air,
                airspeed_m_s: 4.0 + 3.0 * i,
                rotation_rad_s: 200.0 + 10.0 * i,
                turn_rad: 0.1 * i,
            }
        };
        let nodes = [node(0), node(1), node(2)];
        let line = between(&nodes, 5).unwrap();
        assert_eq!(line.len(), 5);
        for (i, c) in line.iter().enumerate() {
            let i = 0.5 * i as f64;
            let near = |a: f64, b: f64| assert!((a - b).abs() < 1e-9, "{a} {b}");
            near(c.airspeed_m_s, 4.0 + 3.0 * i);
            near(c.rotation_rad_s, 200.0 + 10.0 * i);
            near(c.turn_rad, 0.1 * i);
        }
        assert!(between(&nodes[..2], 5).is_none() && between(&[], 5).is_none());
    }
}
