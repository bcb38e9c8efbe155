//! Bad job files are refused by path, with what was found and what is allowed.

use serde_json::{Value, json};
use spokeshave::job::{DEMOS, Engine, Flange, Job, JobError, MOST_BYTES, PitchControl};

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

#[test]
fn each_wrong_value_of_the_bench_is_named_by_its_path() {
    refused(&[
        ("/bench", json!({"trailing_edge_m": 1}), "bench.trailing_edge_m: 1"),
        ("/bench", json!({"leading_edge_radius_m": -0.001}), "bench.leading_edge_radius_m: -0.001"),
        ("/bench", json!({"stacking_fraction": 1.5}), "bench.stacking_fraction: 1.5"),
        ("/bench", json!({"tip_length_m": 2}), "bench.tip_length_m: 2"),
        ("/bench", json!({"blank_thickness_m": 0}), "bench.blank_thickness_m: 0"),
        ("/bench", json!({"blank_width_m": "wide"}), "bench.blank_width_m: invalid type"),
        ("/bench", json!({"allowance_m": -1}), "bench.allowance_m: -1"),
        ("/bench", json!({"fan_step_deg": 90}), "bench.fan_step_deg: 90"),
        ("/bench", json!({"flange": "sae-9"}), "bench.flange: `sae-9`; allowed is one of `sae-1`"),
        ("/bench", json!({"paper": "a4"}), "bench.paper: unknown field"),
        (
            "/bench",
            json!({"stacking_line": [{"radius_fraction": 0.5}, {"radius_fraction": 0.5}]}),
            "bench.stacking_line[1].radius_fraction: 0.5; allowed is above 0.5",
        ),
        (
            "/bench",
            json!({"stacking_line": [{"radius_fraction": 0.5, "rake_m": 9}]}),
            "bench.stacking_line[0].rake_m: 9",
        ),
    ]);
}

#[test]
fn a_flange_is_written_with_a_hyphen_and_read_without_as_well() {
    for (written, flange) in
        [("sae-1", Flange::Sae1), ("sae1", Flange::Sae1), ("sae-2", Flange::Sae2), ("sae2", Flange::Sae2)]
    {
        let mut document = demo();
        document["bench"] = json!({ "flange": written });
        let job = Job::from_json(&document.to_string()).unwrap();
        assert_eq!(job.bench.as_ref().unwrap().flange, Some(flange), "{written}");
        let hyphened = format!("\"flange\": \"sae-{}\"", &written[written.len() - 1..]);
        assert!(job.to_json().contains(&hyphened), "{written}");
    }
}

#[test]
fn each_wrong_reading_is_named_by_its_path_with_its_likely_cause() {
    let cases = [
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 540}]}]}),
            "carved.blades[0].readings[0].radius_m: 540; allowed is above 0, up to the tip, 0.76 m; perhaps it is in mm",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "angle_deg": 160}]}]}),
            "carved.blades[0].readings[0].angle_deg: 160; allowed is -90 to 90 degrees; perhaps read from the other side",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "chord_m": 75}]}]}),
            "carved.blades[0].readings[0].chord_m: 75; allowed is above 0, up to the diameter, 1.52 m; perhaps it is in mm",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "chord_m": 0.01, "thickness_m": 0.08}]}]}),
            "at most the chord, 0.01 m; perhaps chord and thickness are swapped",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "angle_deg": "steep"}]}]}),
            "carved.blades[0].readings[0].angle_deg: invalid type",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5}, {"radius_m": 0.4}]}]}),
            "carved.blades[0].readings[1].radius_m: 0.4; allowed is above 0.5",
        ),
        ("/carved", json!({"blades": [{}, {}, {}]}), "carved.blades: 3"),
        ("/carved", json!({"blades": []}), "carved.blades: 0"),
        ("/carved", json!({"blades": [{}], "density_kg_m3": 5}), "carved.density_kg_m3: 5"),
        ("/carved", json!({"blades": [{}], "least_chord_share": 2}), "carved.least_chord_share: 2"),
        ("/carved", json!({"blades": [{}], "least_thickness_share": 0}), "carved.least_thickness_share: 0"),
        ("/logbook", json!({"readings": [{"rpm": 2900}]}), "logbook.readings[0].rpm: unknown field"),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "throttle": 100}]}),
            "logbook.readings[0].throttle: 100; allowed is 0 to 1; perhaps it is in %",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "pressure_pa": 1013}]}),
            "logbook.readings[0].pressure_pa: 1013; allowed is 5000 to 115000 Pa; perhaps it is in hPa",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "pressure_pa": 1e5, "altitude_m": 0}]}),
            "logbook.readings[0].pressure_pa: given beside altitude_m",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "temperature_c": 288}]}),
            "logbook.readings[0].temperature_c: 288; allowed is -45 to 75 °C; perhaps it is in kelvin",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "temperature_c": 80}]}),
            "allowed is -45 to 75 °C; perhaps it is in degrees Fahrenheit",
        ),
        ("/logbook", json!({"readings": [{"engine_rpm": 0}]}), "logbook.readings[0].engine_rpm: 0"),
        ("/logbook", json!({"readings": [{"engine_rpm": 2900, "level": true}]}), "above 0 in level flight"),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "airspeed_m_s": 400}]}),
            "readings[0].airspeed_m_s: 400",
        ),
        ("/logbook", json!({"widths": {"drag_area": 0}}), "logbook.widths.drag_area: 0"),
        ("/logbook", json!({"factors": {"engine_power": 9}}), "logbook.factors.engine_power: 9"),
        ("/logbook", json!({"use": "yes"}), "logbook.use: invalid type"),
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
fn wrong_wishes_are_named_by_their_path() {
    refused(&[
        ("/wishes", json!({"colour": 1}), "wishes.colour: unknown field"),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Cruise"}]}),
            "wishes.aims[0]: the key `figure` is missing",
        ),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Moon", "figure": "power_w"}]}),
            "wishes.aims[0].flight_point: \"Moon\"; allowed is a flight point: Standing start",
        ),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Cruise", "figure": "beauty"}]}),
            "wishes.aims[0].figure: `beauty`; allowed is one of `",
        ),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Cruise", "figure": "power_w", "weight": 0}]}),
            "wishes.aims[0].weight: 0",
        ),
        ("/wishes", json!({"held": ["hope"]}), "wishes.held[0]: `hope`; allowed is one of `"),
        ("/wishes", json!({"limits": {"tip_mach_most": 0}}), "wishes.limits.tip_mach_most: 0"),
        ("/wishes", json!({"limits": {"rpm_most": -1}}), "wishes.limits.rpm_most: -1"),
        ("/wishes", json!({"limits": {"stress_margin_least": -1}}), "wishes.limits.stress_margin_least: -1"),
        ("/wishes", json!({"limits": {"diameter_most_m": 0}}), "wishes.limits.diameter_most_m: 0"),
        ("/wishes", json!({"limits": {"ground_clearance_m": 0.2}}), "wishes.limits.ground_clearance_m: 0.2"),
        (
            "/wishes",
            json!({"limits": {"shaft_height_m": 0.9, "ground_clearance_m": 1}}),
            "wishes.limits.ground_clearance_m: 1",
        ),
        (
            "/wishes",
            json!({"limits": {"rpm": [{"flight_point": "Cruise", "least": 2500, "most": 2000}]}}),
            "wishes.limits.rpm[0].most: 2000; allowed is 2500",
        ),
    ]);
}

#[test]
fn a_wrong_mass_is_told_once() {
    let message = refusal("/aircraft/mass_kg", json!(0));
    assert!(message.starts_with("aircraft.mass_kg: 0") && !message.contains("fuel"), "{message}");
}

/// A governor holds the propeller's rpm; the limit is the engine's, or the end of its curve where none is
/// given.
#[test]
fn a_governor_stays_within_the_engine_through_its_gear() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    (piston.gear_ratio, piston.max_rpm) = (2.0, Some(3200.0));
    let governed = |rpm: f64| PitchControl::ConstantSpeed { rpm, turn_min_deg: -5.0, turn_max_deg: 20.0 };
    job.propeller.pitch_control = governed(1600.0);
    assert_eq!(job.check(), []);
    job.propeller.pitch_control = governed(1601.0);
    let problem = &job.check()[0];
    assert_eq!((problem.path.as_str(), problem.span), ("propeller.pitch_control.rpm", Some((10.0, 1600.0))));
    assert!(problem.allowed.contains("engine.max_rpm"), "{problem}");
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = None;
    assert_eq!(job.check(), []);
    job.propeller.pitch_control = governed(1651.0);
    assert!(job.check()[0].allowed.contains("the end of engine.full_throttle"));
}

/// Without load the motor of the second example turns 6 cells × 3.8 V × 470 rpm/V = 10,716 rpm.
#[test]
fn a_governor_stays_within_what_a_motor_turns_without_load() {
    let mut job = Job::from_json(DEMOS[1].json).unwrap();
    let governed = |rpm: f64| PitchControl::ConstantSpeed { rpm, turn_min_deg: -5.0, turn_max_deg: 20.0 };
    job.propeller.pitch_control = governed(10_716.0);
    assert_eq!(job.check(), []);
    job.propeller.pitch_control = governed(10_717.0);
    assert_eq!(
        job.check()[0].to_string(),
        "propeller.pitch_control.rpm: 10717 rpm, times gear_ratio 1 10717 rpm of the engine; allowed is up to \
         10716.0 rpm, with 10716 rpm of the engine as the motor turns without load: engine.kv_rpm_per_v times \
         the battery's voltage"
    );
    let Some(Engine::Electric(electric)) = &mut job.engine else { panic!("an electric motor") };
    electric.gear_ratio = 2.0;
    let (_, most) = job.check()[0].span.unwrap();
    assert!((most - 5358.0).abs() < 1e-6, "{most}, but for the rounding of a product");
}

#[test]
fn an_empty_battery_is_refused() {
    let mut job = Job::from_json(DEMOS[1].json).unwrap();
    let Some(Engine::Electric(electric)) = &mut job.engine else { panic!("an electric motor") };
    electric.battery.capacity_ah = 0.0;
    assert_eq!(job.check()[0].path, "engine.battery.capacity_ah");
}

#[test]
fn wrong_materials_and_hubs_are_named() {
    let own = |key: &str, value: f64| {
        let mut species =
            json!({"name": "own", "density_kg_m3": 700, "modulus_pa": 1.2e10, "bending_strength_pa": 1e8});
        species[key] = json!(value);
        json!({"species": species})
    };
    let hub = |key: &str, value: f64| {
        let mut hub = json!({"thickness_m": 0.1, "flange_diameter_m": 0.15, "bolt_circle_m": 0.1, "bolt_diameter_m": 0.008});
        hub[key] = json!(value);
        json!({"species": "white ash", "hub": hub})
    };
    let cases = [
        (own("density_kg_m3", 0.0), "wood.species.density_kg_m3: 0"),
        (own("modulus_pa", -1.0), "wood.species.modulus_pa: -1"),
        (own("bending_strength_pa", 1.0), "wood.species.bending_strength_pa: 1"),
        (own("compression_strength_pa", 1.0), "wood.species.compression_strength_pa: 1"),
        (own("shear_strength_pa", 1.0), "wood.species.shear_strength_pa: 1"),
        (own("crushing_strength_pa", 1.0), "wood.species.crushing_strength_pa: 1"),
        (own("shear_modulus_pa", 1.0), "wood.species.shear_modulus_pa: 1"),
        (own("scatter", 0.9), "wood.species.scatter: 0.9"),
        (own("lasting_share", 0.0), "wood.species.lasting_share: 0"),
        (own("colour", 0.0), "wood.species.colour: unknown field"),
        (hub("thickness_m", 0.0), "wood.hub.thickness_m: 0"),
        (hub("flange_diameter_m", 5.0), "wood.hub.flange_diameter_m: 5"),
        (hub("bore_m", 0.15), "wood.hub.bore_m: 0.15"),
        (hub("bolt_diameter_m", 0.2), "wood.hub.bolt_diameter_m: 0.2"),
        (hub("bolt_circle_m", 0.148), "wood.hub.bolt_circle_m: 0.148; allowed is 0.0160 to 0.1420 m"),
        (hub("bolt_torque_n_m", 0.0), "wood.hub.bolt_torque_n_m: 0"),
    ];
    for (wood, expected) in cases {
        let message = refusal("/wood", wood);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
    let mut bolts = hub("bore_m", 0.02);
    bolts["hub"]["bolts"] = json!(0);
    assert!(refusal("/wood", bolts).contains("wood.hub.bolts: 0"));
}

#[test]
fn wrong_tables_are_named_by_row() {
    let row = |a: f64, cl: f64, cd: f64| json!({"alpha_deg": a, "cl": cl, "cd": cd});
    let good: Vec<Value> = (0..6).map(|i| row(f64::from(i), 0.1 * f64::from(i), 0.01)).collect();
    let with = |points: Vec<Value>| json!([{"name": "own", "polars": [{"reynolds": 1e5, "points": points}]}]);
    let changed = |i: usize, p: Value| {
        let mut points = good.clone();
        points[i] = p;
        with(points)
    };
    let cases = [
        (with(vec![]), "sections[0].polars[0].points: 0 rows"),
        (changed(2, row(2.0, 0.2, -0.01)), "sections[0].polars[0].points[2].cd: -0.01"),
        (changed(2, row(0.5, 0.2, 0.01)), "sections[0].polars[0].points[2].alpha_deg: 0.5"),
        (changed(5, row(500.0, 0.2, 0.01)), "sections[0].polars[0].points[5].alpha_deg: 500"),
        (json!([{"name": "own", "polars": []}]), "sections[0].polars: 0"),
        (
            changed(2, json!({"alpha_deg": 2.0, "cl": "NaN", "cd": 0.01})),
            "sections[0].polars[0].points[2].cl",
        ),
    ];
    for (sections, expected) in cases {
        let message = refusal("/sections", sections);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}

#[test]
fn broken_text_is_refused_with_its_line() {
    let text = DEMOS[0].json;
    let cut = Job::from_json(&text[..text.len() / 2]).unwrap_err();
    let page = Job::from_json("<!doctype html><html>").unwrap_err();
    assert!(page.to_string().contains("this is a page"), "{page}");
    assert!(matches!(cut, JobError::Syntax { line, .. } if line > 10), "{cut}");
    for wrong in ["", "null", "[]", "NaN", "{\"spokeshave\": 1e999}", "\u{0}"] {
        assert!(Job::from_json(wrong).is_err(), "{wrong:?}");
    }
    let twice = text.replacen("\"chord_m\":", "\"chord_m\": 0.2, \"chord_m\":", 1);
    let said = Job::from_json(&twice).unwrap_err().to_string();
    assert!(said.contains("the key \"chord_m\" stands twice") && said.contains("line"), "{said}");
    let not_finite = text.replace("430.0", "1e999");
    assert!(Job::from_json(&not_finite).unwrap_err().to_string().contains("line"));
}

#[test]
fn a_huge_file_is_refused_by_its_size() {
    let huge = " ".repeat(MOST_BYTES + 1);
    assert!(matches!(Job::from_json(&huge), Err(JobError::TooLarge { .. })));
}

#[test]
fn values_that_are_not_finite_are_refused_however_they_come() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    job.propeller.stations[2].chord_m = f64::NAN;
    job.propeller.diameter_m = f64::INFINITY;
    job.flight_points[0].airspeed_m_s = Some(f64::NAN);
    let paths: Vec<String> = job.check().into_iter().map(|p| p.path).collect();
    for path in ["propeller.stations[2].chord_m", "propeller.diameter_m", "flight_points[0].airspeed_m_s"] {
        assert!(paths.iter().any(|p| p == path), "{path} is not among {paths:?}");
    }
}

#[test]
fn wrong_outlines_and_faces_of_own_sections_are_named() {
    let row = |i: u32| json!({"alpha_deg": i, "cl": 0.1 * f64::from(i), "cd": 0.01});
    let points: Vec<Value> = (0..6).map(row).collect();
    let with = |key: &str, value: Value| {
        let mut section = json!({"name": "own", "polars": [{"points": points}]});
        section[key] = value;
        json!([section])
    };
    let face = |t: f64, a: f64| json!({"thickness_ratio": t, "angle_deg": a});
    let both = {
        let mut sections = with("face_angle_deg", json!(2.0));
        sections[0]["face_angles"] = json!([face(0.1, 2.0)]);
        sections
    };
    let cases = [
        (
            with("outline", json!([[1.0, 0.0], [0.0, 0.0]])),
            "sections[0].outline: 2 points: 2 points: at least",
        ),
        (with("outline", json!([[1.0, 0.0, 3.0]])), "sections[0].outline[0]"),
        (with("outline", json!("round")), "sections[0].outline: invalid type"),
        (with("face_angles", json!([face(0.2, 2.0), face(0.1, 1.0)])), "face_angles[1].thickness_ratio: 0.1"),
        (with("face_angles", json!([face(0.1, 99.0)])), "sections[0].face_angles[0].angle_deg: 99"),
        (with("face_angles", json!([{"angle": 1}])), "sections[0].face_angles[0].angle: unknown field"),
        (both, "sections[0].face_angles: given beside face_angle_deg"),
        (with("shape", json!(1)), "sections[0].shape: unknown field"),
    ];
    for (sections, expected) in cases {
        let message = refusal("/sections", sections);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}
