//! What engine and aircraft make of a propeller's condition.

use super::slipstream::kept_share;
use super::{highest_rpm, rpm_of};
use crate::aircraft::{propellers, thrust_asked_n, weight_n};
use crate::job::Aircraft;
use crate::result::{Figures, Meeting, Note};
use crate::rig::Rig;
use crate::rotor::Condition;

/// Share beyond the engine that counts as such. What is met by a root is not: roots leave up to 1e-8 of the
/// power at the examples' flight points, and up to 1e-5 of it where airspeed and rpm are sought together
/// (`top_near::LEFT_OVER`); a thousandth is more than either and less than a rev counter shows.
const BEYOND: f64 = 1e-3;

/// The meeting at a condition, from the propeller's figures there.
#[must_use]
pub fn meeting(rig: &Rig, at: &Condition, figures: &Figures) -> Meeting {
    let mut m = Meeting::default();
    add_engine(&mut m, rig, at, figures);
    add_aircraft(&mut m, rig, at, figures);
    m
}

/// In what a condition at which the propeller takes a power is beyond the engine, W; empty without one.
#[must_use]
pub fn beyond_engine(rig: &Rig, at: &Condition, taken_w: f64) -> Vec<Note> {
    let Some(shaft) = &rig.shaft else { return Vec::new() };
    let (rpm, highest) = (rpm_of(at), highest_rpm(shaft));
    let given_w = shaft.power_w(rpm, &at.air, 1.0);
    let past = rpm > highest * (1.0 + BEYOND);
    let more = taken_w > given_w.max(0.0) * (1.0 + BEYOND);
    let notes = [(past, Note::PastLimitRpm), (more, Note::MoreThanEngine)];
    notes.into_iter().filter_map(|(holds, note)| holds.then_some(note)).collect()
}

fn add_engine(m: &mut Meeting, rig: &Rig, at: &Condition, figures: &Figures) {
    let (Some(shaft), Some(power)) = (&rig.shaft, figures.power_w) else { return };
    let rpm = rpm_of(at);
    m.engine_rpm = Some(rpm * shaft.gear_ratio());
    m.available_power_w = shaft.available_w(rpm, &at.air);
    m.power_share = m.available_power_w.map(|a| power / a);
    let engines = rig.aircraft.as_ref().map_or(1.0, propellers);
    if !beyond_engine(rig, at, power).is_empty() {
        return;
    }
    m.fuel_kg_per_h = shaft.fuel_kg_s(rpm, power, &at.air).map(|f| 3600.0 * f * engines);
    if let Some(e) = shaft.electrics(rpm, power) {
        m.motor_current_a = Some(e.motor_current_a);
        m.battery_current_a = Some(e.battery_current_a);
        m.battery_voltage_v = Some(e.battery_voltage_v);
        m.duty = Some(e.duty);
    }
}

fn add_aircraft(m: &mut Meeting, rig: &Rig, at: &Condition, figures: &Figures) {
    let (Some(aircraft), Some(thrust)) = (&rig.aircraft, figures.thrust_n) else { return };
    let total = thrust * propellers(aircraft);
    m.total_thrust_n = Some(total);
    let kept = kept_share(rig);
    let still = thrust_asked_n(aircraft, &at.air, at.airspeed_m_s).map(|each| each * propellers(aircraft));
    m.asked_n = still.map(|drag| drag / kept);
    if let (Aircraft::Aeroplane(_), Some(drag)) = (aircraft, still) {
        m.rate_of_climb_m_s = Some((total * kept - drag) * at.airspeed_m_s / weight_n(aircraft));
    }
}
