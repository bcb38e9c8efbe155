//! The fit over the whole speed range at one air.

use super::full::Full;
use super::trail::Trail;
use super::{Solver, marks, power_w, rpm_of, top_speed};
use crate::aircraft::{propellers, speeds, thrust_asked_n, weight_n};
use crate::job::{Aircraft, FlightPoint};
use crate::result::{Envelope, EnvelopePoint, FullThrottle, Level, State};
use crate::rig::{Rig, air_of};
use crate::rotor::{Condition, Loads, departure_map, thrustless_speed_m_s};

/// How far the range goes beyond top speed.
const BEYOND_TOP: f64 = 1.12;

/// The fit at `count` equal steps of speed (at least 3) from rest to somewhat beyond top speed, at the air of a flight point, with departures at the
/// given radius fractions. Without an aircraft it ends where the thrust at full throttle is gone, without an engine there is none; `None` then,
/// and where the engine cannot turn the propeller.
#[must_use]
pub fn envelope(rig: &Rig, point: &FlightPoint, count: u32, radius_fractions: &[f64]) -> Option<Envelope> {
    let air = air_of(point).ok()?;
    let at = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: 1.0, turn_rad: rig.turn_rad() };
    let stall = stall_m_s(rig, &at);
    let top = top_speed::fastest(rig, &at).ok().filter(|top| top.condition.airspeed_m_s >= stall);
    let end = end_m_s(rig, &at, top.as_ref())?;
    let count = count.max(3);
    let speeds_m_s = (0..count).map(|i| end * f64::from(i) / f64::from(count - 1));
    let course = Course::new(rig, &at, speeds_m_s.collect(), radius_fractions);
    let points = course.points();
    let aeroplane = match &rig.job.aircraft {
        Some(Aircraft::Aeroplane(a)) => Some(a),
        _ => None,
    };
    Some(Envelope {
        flight_point: point.name.clone(),
        altitude_m: point.altitude_m,
        isa_offset_k: point.isa_offset_k,
        density_kg_m3: air.density_kg_m3,
        speeds: aeroplane.map(|a| speeds(a, &air)),
        radius_fractions: radius_fractions.to_vec(),
        standing: points[0].full.clone(),
        marks: marks::marks(rig, &at, &points, top),
        points,
    })
}

/// The stall in the air of a condition, m/s; 0 where none is known.
pub(super) fn stall_m_s(rig: &Rig, at: &Condition) -> f64 {
    match &rig.job.aircraft {
        Some(Aircraft::Aeroplane(a)) => speeds(a, &at.air).stall_m_s.unwrap_or(0.0),
        _ => 0.0,
    }
}

/// Where the speed range ends.
fn end_m_s(rig: &Rig, at: &Condition, top: Option<&Full>) -> Option<f64> {
    if let Some(top) = top {
        return Some(BEYOND_TOP * top.condition.airspeed_m_s);
    }
    let static_rpm = Solver::new(rig).full(at, &mut Trail::default()).ok()?.condition;
    Some(thrustless_speed_m_s(&rig.rotor, &static_rpm))
}

/// A line of speeds at one air.
struct Course<'r> {
    solver: Solver<'r>,
    at: Condition,
    speeds_m_s: Vec<f64>,
    radii_m: Vec<f64>,
}

impl<'r> Course<'r> {
    fn new(rig: &'r Rig, at: &Condition, speeds_m_s: Vec<f64>, radius_fractions: &[f64]) -> Self {
        let radii_m = radius_fractions.iter().map(|x| x * rig.rotor.blade.radius_m).collect();
        Self { solver: Solver::new(rig), at: *at, speeds_m_s, radii_m }
    }

    fn points(&self) -> Vec<EnvelopePoint> {
        let (full, level) = (self.full(), self.level());
        let asked = |v: f64| {
            let aircraft = self.solver.rig.job.aircraft.as_ref()?;
            Some(thrust_asked_n(aircraft, &self.at.air, v)? * propellers(aircraft))
        };
        let both = full.into_iter().zip(level);
        both.zip(&self.speeds_m_s)
            .map(|(((full, full_state), (level, level_state)), &v)| EnvelopePoint {
                airspeed_m_s: v,
                asked_n: asked(v),
                full,
                full_state,
                level,
                level_state,
            })
            .collect()
    }

    fn stall_m_s(&self) -> f64 {
        stall_m_s(self.solver.rig, &self.at)
    }

    fn here(&self, airspeed_m_s: f64) -> Condition {
        Condition { airspeed_m_s, ..self.at }
    }

    fn full(&self) -> Vec<(Option<FullThrottle>, State)> {
        let mut trail = Trail::default();
        let mut held = false;
        let found: Vec<Result<Full, State>> = self
            .speeds_m_s
            .iter()
            .map(|&v| {
                let at = self.here(v);
                // Once past the limit rpm, more speed only leads farther past it.
                let full = if held {
                    self.solver.held_at_limit(&at).ok_or(State::OverLimitRpm)
                } else {
                    self.solver.full(&at, &mut trail)
                };
                held |= full.as_ref().is_ok_and(|f| f.held);
                full
            })
            .collect();
        let departures = self.departures(found.iter().map(|f| f.as_ref().ok().map(|f| f.condition)));
        let told = found.into_iter().zip(departures);
        told.map(|(full, departure_deg)| match full {
            Ok(f) => {
                let state = if f.held { State::OverLimitRpm } else { State::Ok };
                (Some(full_throttle(self.solver.rig, &f, departure_deg)), state)
            }
            Err(state) => (None, state),
        })
        .collect()
    }

    fn level(&self) -> Vec<(Option<Level>, State)> {
        let mut trail = Trail::default();
        let found: Vec<Result<_, State>> = self
            .speeds_m_s
            .iter()
            .map(|&v| {
                let met = self.solver.level_by_thrust(&self.here(v), &trail)?;
                trail.push(&met);
                let state = if v < self.stall_m_s() {
                    State::BelowStall
                } else {
                    self.solver.within_engine(&met).err().unwrap_or(State::Ok)
                };
                Ok((met, state))
            })
            .collect();
        let departures = self.departures(found.iter().map(|f| f.as_ref().ok().map(|(m, _)| m.condition)));
        let told = found.into_iter().zip(departures);
        told.map(|(found, departure_deg)| match found {
            Ok((met, state)) => {
                (Some(level(self.solver.rig, &met.condition, &met.loads, state, departure_deg)), state)
            }
            Err(state) => (None, state),
        })
        .collect()
    }

    /// Departures at the radii for each condition; none where there is no condition.
    fn departures(&self, conditions: impl Iterator<Item = Option<Condition>>) -> Vec<Vec<Option<f64>>> {
        let conditions: Vec<Option<Condition>> = conditions.collect();
        let line: Vec<Condition> = conditions.iter().flatten().copied().collect();
        let map = departure_map(&self.solver.rig.rotor, &line, &self.radii_m);
        let mut column = map.cells.columns().into_iter();
        let mut next = |has: bool| {
            let cells = if has { column.next() } else { None };
            cells.map_or_else(Vec::new, |c| c.iter().map(|cell| cell.departure_deg).collect())
        };
        conditions.iter().map(|c| next(c.is_some())).collect()
    }
}

/// `T V/P` where all are positive.
fn efficiency(at: &Condition, loads: &Loads) -> Option<f64> {
    let power = power_w(loads, at);
    let useful = loads.thrust_n > 0.0 && at.airspeed_m_s > 0.0 && power > 0.0;
    useful.then(|| loads.thrust_n * at.airspeed_m_s / power)
}

fn tip_mach(rig: &Rig, at: &Condition) -> f64 {
    at.airspeed_m_s.hypot(at.rotation_rad_s * rig.rotor.blade.radius_m) / at.air.sound_speed_m_s
}

/// What full throttle comes to, in figures.
pub(super) fn full_throttle(rig: &Rig, full: &Full, departure_deg: Vec<Option<f64>>) -> FullThrottle {
    let (at, loads) = (&full.condition, &full.loads);
    let aircraft = rig.job.aircraft.as_ref();
    let thrust_n = loads.thrust_n * aircraft.map_or(1.0, propellers);
    let climb = aircraft.filter(|a| matches!(a, Aircraft::Aeroplane(_))).and_then(|a| {
        let drag = thrust_asked_n(a, &at.air, at.airspeed_m_s)? * propellers(a);
        Some((thrust_n - drag) / weight_n(a))
    });
    FullThrottle {
        rpm: rpm_of(at),
        held_at_limit: full.held,
        turn_deg: at.turn_rad.to_degrees(),
        thrust_n,
        power_w: power_w(loads, at),
        efficiency: efficiency(at, loads),
        tip_mach: tip_mach(rig, at),
        rate_of_climb_m_s: climb.map(|sine| sine * at.airspeed_m_s),
        climb_angle_deg: climb.filter(|sine| sine.abs() <= 1.0).map(|sine| sine.asin().to_degrees()),
        departure_deg,
    }
}

/// What level flight comes to, in figures. Fuel, charge and share of power only where the engine gives it.
pub(super) fn level(
    rig: &Rig,
    at: &Condition,
    loads: &Loads,
    state: State,
    departure_deg: Vec<Option<f64>>,
) -> Level {
    let (rpm, power) = (rpm_of(at), power_w(loads, at));
    let engines = rig.job.aircraft.as_ref().map_or(1.0, propellers);
    let shaft = rig.shaft.as_ref().filter(|_| state == State::Ok);
    let endurance_s = shaft.and_then(|s| s.endurance_s(rpm, power, engines));
    let given = shaft.and_then(|s| s.available_w(rpm, &at.air));
    Level {
        rpm,
        turn_deg: at.turn_rad.to_degrees(),
        power_w: power,
        power_share: given.map(|given| power / given),
        efficiency: efficiency(at, loads),
        tip_mach: tip_mach(rig, at),
        fuel_kg_per_h: shaft.and_then(|s| s.fuel_kg_s(power)).map(|f| 3600.0 * f * engines),
        battery_current_a: shaft.and_then(|s| s.electrics(rpm, power)).map(|e| e.battery_current_a),
        endurance_s,
        range_m: endurance_s.map(|t| t * at.airspeed_m_s),
        departure_deg,
    }
}
