//! The figures of one speed of an envelope.

use super::full::Full;
use super::slipstream::kept_share;
use super::{power_w, rpm_of};
use crate::aircraft::{propellers, thrust_asked_n, weight_n};
use crate::job::Aircraft;
use crate::result::{FullThrottle, Level, State};
use crate::rig::Rig;
use crate::rotor::{Condition, Loads};

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
    let aircraft = rig.aircraft.as_ref();
    let thrust_n = loads.thrust_n * aircraft.map_or(1.0, propellers);
    let climb = aircraft.filter(|a| matches!(a, Aircraft::Aeroplane(_))).and_then(|a| {
        let drag = thrust_asked_n(a, &at.air, at.airspeed_m_s)? * propellers(a);
        Some((thrust_n * kept_share(rig) - drag) / weight_n(a))
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
    let engines = rig.aircraft.as_ref().map_or(1.0, propellers);
    let shaft = rig.shaft.as_ref().filter(|_| state == State::Ok);
    let endurance_s = shaft.and_then(|s| s.endurance_s(rpm, power, &at.air, engines));
    let given = shaft.and_then(|s| s.available_w(rpm, &at.air));
    Level {
        rpm,
        turn_deg: at.turn_rad.to_degrees(),
        power_w: power,
        power_share: given.map(|given| power / given),
        efficiency: efficiency(at, loads),
        tip_mach: tip_mach(rig, at),
        fuel_kg_per_h: shaft.and_then(|s| s.fuel_kg_s(rpm, power, &at.air)).map(|f| 3600.0 * f * engines),
        battery_current_a: shaft.and_then(|s| s.electrics(rpm, power)).map(|e| e.battery_current_a),
        endurance_s,
        range_m: endurance_s.map(|t| t * at.airspeed_m_s),
        departure_deg,
    }
}
