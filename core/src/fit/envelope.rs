//! The fit over the whole speed range at one air.

use super::figures::{full_throttle, level};
use super::full::Full;
use super::settle::Met;
use super::slipstream::kept_share;
use super::trail::Trail;
use super::{Solver, marks, top_speed};
use crate::abreast::abreast;
use crate::aircraft::{propellers, speeds, thrust_asked_n};
use crate::job::{Aircraft, FlightPoint};
use crate::result::{Envelope, EnvelopePoint, FullThrottle, Level, State};
use crate::rig::{Rig, air_of};
use crate::rotor::{Condition, departure_map, thrustless_speed_m_s};

/// How far the range goes beyond top speed.
const BEYOND_TOP: f64 = 1.12;

/// The fit at `count` equal steps of speed (at least 3) from rest to somewhat beyond top speed, at the air of
/// a flight point, with departures at the given radius fractions. Without an aircraft it ends where the
/// thrust at full throttle is gone, without an engine there is none; `None` then, and where the engine cannot
/// turn the propeller.
#[must_use]
pub fn envelope(rig: &Rig, point: &FlightPoint, count: u32, radius_fractions: &[f64]) -> Option<Envelope> {
    let air = air_of(point).ok()?;
    let at = rig.unsolved(air, 0.0);
    let stall = stall_m_s(rig, &at);
    let top = top_speed::fastest(rig, &at).ok().filter(|top| top.condition.airspeed_m_s >= stall);
    let end = end_m_s(rig, &at, top.as_ref())?;
    let count = count.max(3);
    let speeds_m_s = (0..count).map(|i| end * f64::from(i) / f64::from(count - 1));
    let course = Course::new(rig, &at, speeds_m_s.collect(), radius_fractions);
    let (points, followed) = course.points();
    let aeroplane = match &rig.aircraft {
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
        marks: marks::marks(rig, &at, &points, &followed, top),
        points,
    })
}

/// The stall in the air of a condition, m/s; 0 where none is known.
pub(super) fn stall_m_s(rig: &Rig, at: &Condition) -> f64 {
    match &rig.aircraft {
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

/// The answers of a line of speeds, from which those between them can be led.
#[derive(Default)]
pub(super) struct Followed {
    pub(super) full: Vec<Met>,
    pub(super) level: Vec<Met>,
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

    fn points(&self) -> (Vec<EnvelopePoint>, Followed) {
        let ((full, met_full), (level, met_level)) = abreast(|| self.full(), || self.level());
        let followed = Followed { full: met_full, level: met_level };
        let asked = |v: f64| {
            let aircraft = self.solver.rig.aircraft.as_ref()?;
            let drag = thrust_asked_n(aircraft, &self.at.air, v)? * propellers(aircraft);
            Some(drag / kept_share(self.solver.rig))
        };
        let both = full.into_iter().zip(level);
        let points = both
            .zip(&self.speeds_m_s)
            .map(|(((full, full_state), (level, level_state)), &v)| EnvelopePoint {
                airspeed_m_s: v,
                asked_n: asked(v),
                full,
                full_state,
                level,
                level_state,
            })
            .collect();
        (points, followed)
    }

    fn stall_m_s(&self) -> f64 {
        stall_m_s(self.solver.rig, &self.at)
    }

    fn here(&self, airspeed_m_s: f64) -> Condition {
        Condition { airspeed_m_s, ..self.at }
    }

    /// At full throttle, and the answers on the way.
    fn full(&self) -> (Vec<(Option<FullThrottle>, State)>, Vec<Met>) {
        let mut trail = Trail::default();
        let mut followed = Vec::new();
        let mut held = false;
        let found: Vec<Result<Full, State>> = self
            .speeds_m_s
            .iter()
            .map(|&v| {
                let at = self.here(v);
                // Once past the limit rpm, a look at that rpm tells whether it still is: near rest a
                // propeller may come to take more with speed.
                let past = if held { self.solver.past_limit(&at) } else { None };
                let full = past.unwrap_or_else(|| self.solver.full(&at, &mut trail));
                held = match &full {
                    Ok(f) => f.held,
                    Err(state) => *state == State::OverLimitRpm,
                };
                followed.extend(trail.last().filter(|met| full.is_ok() && met.condition.airspeed_m_s == v));
                full
            })
            .collect();
        let departures = self.departures(found.iter().map(|f| f.as_ref().ok().map(|f| f.condition)));
        let told = found.into_iter().zip(departures).map(|(full, departure_deg)| match full {
            Ok(f) => {
                let state = if f.held { State::OverLimitRpm } else { State::Ok };
                (Some(full_throttle(self.solver.rig, &f, departure_deg)), state)
            }
            Err(state) => (None, state),
        });
        (told.collect(), followed)
    }

    /// Level, and the answers on the way.
    fn level(&self) -> (Vec<(Option<Level>, State)>, Vec<Met>) {
        let mut trail = Trail::default();
        let mut followed = Vec::new();
        let found: Vec<Result<_, State>> = self
            .speeds_m_s
            .iter()
            .map(|&v| {
                let met = self.solver.level_by_thrust(&self.here(v), &trail)?;
                trail.push(&met);
                followed.push(met);
                let state = if v < self.stall_m_s() {
                    State::BelowStall
                } else {
                    self.solver.within_engine(&met).err().unwrap_or(State::Ok)
                };
                Ok((met, state))
            })
            .collect();
        let departures = self.departures(found.iter().map(|f| f.as_ref().ok().map(|(m, _)| m.condition)));
        let told = found.into_iter().zip(departures).map(|(found, departure_deg)| match found {
            Ok((met, state)) => {
                (Some(level(self.solver.rig, &met.condition, &met.loads, state, departure_deg)), state)
            }
            Err(state) => (None, state),
        });
        (told.collect(), followed)
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
