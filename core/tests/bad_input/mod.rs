//! Bad job files are refused by path, with what was found and what is allowed.

mod bench;
mod engine;
mod readings;
mod sections;
mod text;
mod wishes;

use serde_json::{Value, json};
use spokeshave::job::{DEMOS, Job};

fn demo() -> Value {
    serde_json::from_str(DEMOS[0].json).unwrap()
}

/// The message for the demo with one place changed by JSON pointer (`null` takes it out).
fn refusal(pointer: &str, value: Value) -> String {
    let mut document = demo();
    let (parent, name) = pointer.rsplit_once('/').unwrap();
    let parent = document.pointer_mut(parent).unwrap();
    match (parent, value) {
        (Value::Object(object), Value::Null) => drop(object.remove(name)),
        (Value::Object(object), value) => drop(object.insert(name.into(), value)),
        (Value::Array(array), value) => array[name.parse::<usize>().unwrap()] = value,
        _ => panic!("{pointer}"),
    }
    Job::from_json(&document.to_string()).unwrap_err().to_string()
}

#[test]
fn each_wrong_value_is_named_by_its_path() {
    let cases = [
        ("/propeller/stations/3/chord_m", json!(-0.1), "propeller.stations[3].chord_m: -0.1"),
        ("/propeller/stations/3/chord_m", json!("wide"), "propeller.stations[3].chord_m: invalid type"),
        ("/propeller/stations/3/radius_fraction", json!(0.1), "propeller.stations[3].radius_fraction: 0.1"),
        ("/propeller/stations/3/section", json!("plank"), "propeller.stations[3].section: \"plank\""),
        ("/propeller/stations/3/angle_deg", Value::Null, "propeller.stations[3].angle_deg: missing"),
        ("/propeller/stations/3/angle", json!(1), "propeller.stations[3].angle: unknown field"),
        ("/propeller/stations/3/thickness_ratio", json!(0.0), "propeller.stations[3].thickness_ratio: 0"),
        ("/propeller/stations", json!([]), "propeller.stations: 0"),
        ("/propeller/hub_diameter_m", json!(1.6), "propeller.hub_diameter_m: 1.6"),
        ("/propeller/diameter_m", json!(1e308), "propeller.diameter_m: 1e308"),
        ("/propeller/blades", json!(0), "propeller.blades: 0"),
        ("/propeller/pitch_control", json!({"kind": "magic"}), "propeller.pitch_control"),
        (
            "/propeller/pitch_control",
            json!({"kind": "constant-speed", "rpm": 3400, "turn_min_deg": -5, "turn_max_deg": 20}),
            "propeller.pitch_control.rpm: 3400 rpm, times gear_ratio 1 3400 rpm of the engine; allowed is up to 3300.0 rpm",
        ),
        ("/engine/full_throttle/1/rpm", json!("fast"), "engine.full_throttle[1].rpm: invalid type"),
        ("/engine/full_throttle/1/rpm", json!(1000), "engine.full_throttle[1].rpm: 1000"),
        ("/engine/full_throttle", json!([{"rpm": 2000, "power_w": 40_000}]), "engine.full_throttle: 1"),
        ("/engine/full_throttle/1/power_w", json!(0), "engine.full_throttle[1].power_w: 0"),
        ("/engine/idle_rpm", json!(3400), "engine.idle_rpm: 3400"),
        ("/engine/fuel_kg", json!(500), "engine.fuel_kg: 500"),
        ("/engine/gear_ratio", json!(0), "engine.gear_ratio: 0"),
        ("/aircraft/drag/cd0", json!(0), "aircraft.drag.cd0: 0"),
        ("/aircraft/mass_kg", json!(0), "aircraft.mass_kg: 0"),
        ("/aircraft/rolling_friction", json!(-0.1), "aircraft.rolling_friction: -0.1"),
        ("/aircraft/slipstream_drag_area_m2", json!(5), "aircraft.slipstream_drag_area_m2: 5"),
        ("/aircraft/slipstream_drag_area_m2", json!("all"), "aircraft.slipstream_drag_area_m2: invalid type"),
        ("/propeller/blockage", json!(0.9), "propeller.blockage: 0.9"),
        (
            "/engine/bsfc_by_load",
            json!([{"load": 0.5, "bsfc_kg_per_kwh": 0.3}]),
            "engine.bsfc_by_load: given beside",
        ),
        (
            "/engine/bsfc_by_load",
            json!([{"load": 1.5, "bsfc_kg_per_kwh": 0.3}]),
            "engine.bsfc_by_load[0].load: 1.5",
        ),
        (
            "/engine/bsfc_by_load",
            json!([{"load": 0.5, "bsfc_kg_per_kwh": 0}]),
            "bsfc_by_load[0].bsfc_kg_per_kwh: 0",
        ),
        ("/engine/bsfc_by_load", json!([{"load": 0.5}]), "engine.bsfc_by_load[0]: the key `bsfc_kg_per_kwh`"),
        (
            "/engine/bsfc_by_load",
            json!([{"load": 0.5, "bsfc_kg_per_kwh": 0.3}, {"load": 0.5, "bsfc_kg_per_kwh": 0.3}]),
            "engine.bsfc_by_load[1].load: 0.5; allowed is above 0.5",
        ),
        ("/engine/kind", json!("steam"), "engine.kind: \"steam\""),
        (
            "/engine/altitude_law",
            json!({"kind": "held-to"}),
            "engine.altitude_law: the key `altitude_m` is missing",
        ),
        (
            "/engine/altitude_law",
            json!({"kind": "held-to", "height_m": 3000}),
            "engine.altitude_law.height_m: unknown field `height_m`",
        ),
        ("/engine/turbo", json!(true), "engine.turbo: unknown field"),
        ("/aircraft/drag/cd0", json!(-0.03), "aircraft.drag.cd0: -0.03"),
        ("/aircraft/drag/k", Value::Null, "aircraft.drag: "),
        ("/aircraft/mass_kg", Value::Null, "aircraft: the key `mass_kg` is missing"),
        ("/flight_points/0/setting", json!({"kind": "rpm", "rpm": 0}), "flight_points[0].setting.rpm: 0"),
        ("/flight_points/0/setting", json!({"kind": "hope"}), "flight_points[0].setting"),
        ("/flight_points/2/airspeed_m_s", Value::Null, "flight_points[2].airspeed_m_s: missing"),
        ("/flight_points/2/altitude_m", json!(30_000), "flight_points[2].altitude_m: 30000"),
        ("/flight_points/1/name", json!("Standing start"), "flight_points[1].name"),
        ("/flight_points", json!([]), "flight_points: 0"),
        ("/wood", json!({}), "wood: the key `species` is missing"),
        ("/wood", json!({"species": 7}), "wood.species: 7 is neither"),
        ("/wood", json!({"species": {"name": "own"}}), "wood.species: the key `density_kg_m3` is missing"),
        ("/wood", json!({"species": "pla", "moisture_percent": 90}), "wood.moisture_percent: 90"),
        ("/wood", json!({"species": "pla", "safety_factor": 0}), "wood.safety_factor: 0"),
        ("/wood", json!({"species": "pla", "overspeed": 0.9}), "wood.overspeed: 0.9"),
        ("/wood", json!({"species": "pla", "rake_deg": 40}), "wood.rake_deg: 40"),
        ("/wood", json!({"species": "pla", "limits": {"shear_pa": 1}}), "wood.limits.shear_pa: 1"),
        ("/wood", json!({"species": "pla", "limits": {"all": 1}}), "wood.limits.all: unknown field"),
        (
            "/wood",
            json!({"species": "pla", "hub": {"bolts": 6}}),
            "wood.hub: the key `thickness_m` is missing",
        ),
        ("/method", json!({"elements": 4}), "method.elements: 4"),
        ("/colour", json!("red"), "colour: unknown field"),
        ("/spokeshave", json!(7), "spokeshave: 7"),
        ("/spokeshave", Value::Null, "spokeshave: missing"),
        ("/propeller", Value::Null, "the key `propeller` is missing"),
    ];
    refused(&cases);
}

fn refused(cases: &[(&str, Value, &str)]) {
    for (pointer, value, expected) in cases {
        let message = refusal(pointer, value.clone());
        assert!(message.contains(expected), "{pointer} = {value}: {message:?} has no {expected:?}");
    }
}

#[test]
fn a_wrong_mass_is_told_once() {
    let message = refusal("/aircraft/mass_kg", json!(0));
    assert!(message.starts_with("aircraft.mass_kg: 0") && !message.contains("fuel"), "{message}");
}
