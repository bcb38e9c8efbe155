//! What engine and aircraft make of a propeller's condition.

use super::rpm_of;
use super::slipstream::kept_share;
use crate::aircraft::{propellers, thrust_asked_n, weight_n};
use crate::job::Aircraft;
use crate::result::{Figures, Meeting};
use crate::rig::Rig;
use crate::rotor::Condition;

/// The meeting at a condition, from the propeller's figures there.
#[must_use]
pub fn meeting(rig: &Rig, at: &Condition, figures: &Figures) -> Meeting {
    let mut m = Meeting::default();
    add_engine(&mut m, rig, at, figures);
    add_aircraft(&mut m, rig, at, figures);
    m
}

fn add_engine(m: &mut Meeting, rig: &Rig, at: &Condition, figures: &Figures) {
    let (Some(shaft), Some(power)) = (&rig.shaft, figures.power_w) else { return };
    let rpm = rpm_of(at);
    m.engine_rpm = Some(rpm * shaft.gear_ratio());
    m.available_power_w = shaft.available_w(rpm, &at.air);
    m.power_share = m.available_power_w.map(|a| power / a);
    let engines = rig.aircraft.as_ref().map_or(1.0, propellers);
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
