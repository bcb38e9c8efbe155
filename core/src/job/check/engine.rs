//! What is allowed of an engine.

use super::super::document::{Aircraft, AltitudeLaw, Electric, Engine, Job, Piston, PitchControl};
use super::super::found::Found;
use crate::air::HIGHEST_M;

const MOST_LOADS: usize = 50;

/// Fuel on board is part of an aircraft's mass.
const MOST_FUEL_SHARE: f64 = 0.9;

pub(super) fn check_piston(found: &mut Found, p: &Piston, aircraft: Option<&Aircraft>) {
    let at = |name: &str| format!("engine.{name}");
    found.count("engine.full_throttle", p.full_throttle.len(), 2..=200);
    for (i, point) in p.full_throttle.iter().enumerate() {
        found.range(at(&format!("full_throttle[{i}].rpm")), point.rpm, 100.0..=60_000.0, "rpm");
        found.range(at(&format!("full_throttle[{i}].power_w")), point.power_w, 1.0..=5e6, "W");
        if i > 0 && point.rpm <= p.full_throttle[i - 1].rpm {
            let before = p.full_throttle[i - 1].rpm;
            found.refuse(
                at(&format!("full_throttle[{i}].rpm")),
                point.rpm,
                format!("above {before}, the one before"),
            );
        }
    }
    found.range(at("gear_ratio"), p.gear_ratio, 0.1..=20.0, "");
    found.optional(at("max_rpm"), p.max_rpm, 100.0..=60_000.0, "rpm");
    let last = p.full_throttle.last().map_or(20_000.0, |f| f.rpm);
    let most = p.max_rpm.map_or(last, |limit| limit.min(last)).clamp(50.0, 20_000.0);
    found.optional(at("idle_rpm"), p.idle_rpm, 50.0..=most, "rpm");
    found.optional(at("bsfc_kg_per_kwh"), p.bsfc_kg_per_kwh, 0.05..=3.0, "kg per kWh");
    check_loads(found, p);
    let mass_kg = aircraft.map(|a| match a {
        Aircraft::Aeroplane(a) => a.mass_kg,
        Aircraft::Multirotor(m) => m.mass_kg,
    });
    // A wrong mass is told by itself.
    let mass_kg = mass_kg.filter(|mass| *mass > 0.0);
    let most_fuel = mass_kg.map_or(50_000.0, |m| (MOST_FUEL_SHARE * m).clamp(0.0, 50_000.0));
    found.optional(at("fuel_kg"), p.fuel_kg, 0.0..=most_fuel, "kg, part of the aircraft's mass");
    if let AltitudeLaw::HeldTo(held) = &p.altitude_law {
        found.range(at("altitude_law.altitude_m"), held.altitude_m, 0.0..=HIGHEST_M, "m");
    }
}

/// The most propeller rpm a governor may hold, and what sets it: a piston engine's limit or the end of its
/// curve; how fast a motor turns without load.
fn most_governed(engine: &Engine) -> (f64, &'static str) {
    match engine {
        Engine::Piston(p) => {
            let last = p.full_throttle.last().map_or(f64::INFINITY, |f| f.rpm);
            let limit = p.max_rpm.unwrap_or(f64::INFINITY);
            let (most, of) = if limit <= last {
                (limit, "engine.max_rpm has it")
            } else {
                (last, "the end of engine.full_throttle has it")
            };
            (most / p.gear_ratio, of)
        }
        Engine::Electric(e) => {
            (e.no_load_rpm(), "the motor turns without load: engine.kv_rpm_per_v times the battery's voltage")
        }
    }
}

/// The most propeller rpm that a governor may hold on an engine; `None` where nothing sets it.
#[must_use]
pub fn most_governed_rpm(engine: Option<&Engine>) -> Option<f64> {
    engine.map(|engine| most_governed(engine).0).filter(|most| most.is_finite())
}

/// A governor that holds more rpm than the engine may turn, or its curve tells of, or the motor comes to
/// without load, governs nothing.
pub(super) fn check_governor(found: &mut Found, job: &Job) {
    let (Some(engine), PitchControl::ConstantSpeed { rpm, .. }) = (&job.engine, &job.propeller.pitch_control)
    else {
        return;
    };
    let (most, of) = most_governed(engine);
    if *rpm > most * (1.0 + 1e-9) {
        let gear = match engine {
            Engine::Piston(p) => p.gear_ratio,
            Engine::Electric(e) => e.gear_ratio,
        };
        found.refuse(
            "propeller.pitch_control.rpm".into(),
            format!("{rpm} rpm, times gear_ratio {gear} {:.0} rpm of the engine", rpm * gear),
            format!("up to {most:.1} rpm, with {:.0} rpm of the engine as {of}", most * gear),
        );
        found.within(10.0, most);
    }
}

/// Consumption by rising load, and not beside the constant one.
fn check_loads(found: &mut Found, p: &Piston) {
    let at = |i: usize, name: &str| format!("engine.bsfc_by_load[{i}].{name}");
    if p.bsfc_kg_per_kwh.is_some() && !p.bsfc_by_load.is_empty() {
        found.refuse("engine.bsfc_by_load".into(), "given beside bsfc_kg_per_kwh", "one of the two");
    }
    found.count("engine.bsfc_by_load", p.bsfc_by_load.len(), 0..=MOST_LOADS);
    for (i, point) in p.bsfc_by_load.iter().enumerate() {
        found.range(at(i, "load"), point.load, 0.0..=1.0, "of full throttle");
        found.range(at(i, "bsfc_kg_per_kwh"), point.bsfc_kg_per_kwh, 0.05..=3.0, "kg per kWh");
        if i > 0 && point.load <= p.bsfc_by_load[i - 1].load {
            let before = p.bsfc_by_load[i - 1].load;
            found.refuse(at(i, "load"), point.load, format!("above {before}, the one before"));
        }
    }
}

pub(super) fn check_electric(found: &mut Found, e: &Electric) {
    let at = |name: &str| format!("engine.{name}");
    found.range(at("kv_rpm_per_v"), e.kv_rpm_per_v, 1.0..=20_000.0, "rpm per V");
    found.range(at("resistance_ohm"), e.resistance_ohm, 1e-5..=100.0, "Ω");
    found.range(at("no_load_current_a"), e.no_load_current_a, 0.0..=1_000.0, "A");
    found.optional(at("no_load_voltage_v"), e.no_load_voltage_v, 0.1..=2_000.0, "V");
    found.optional(at("max_current_a"), e.max_current_a, 0.01..=10_000.0, "A");
    found.range(at("gear_ratio"), e.gear_ratio, 0.1..=50.0, "");
    found.range(at("controller_resistance_ohm"), e.controller_resistance_ohm, 0.0..=100.0, "Ω");
    found.range(at("battery.cells"), f64::from(e.battery.cells), 1.0..=500.0, "");
    found.range(at("battery.open_circuit_v_per_cell"), e.battery.open_circuit_v_per_cell, 0.5..=6.0, "V");
    found.range(at("battery.resistance_ohm_per_cell"), e.battery.resistance_ohm_per_cell, 0.0..=10.0, "Ω");
    found.range(at("battery.capacity_ah"), e.battery.capacity_ah, 0.001..=10_000.0, "A h");
    found.range(at("battery.usable_fraction"), e.battery.usable_fraction, 0.01..=1.0, "");
}
