//! The command line as a script meets it: output, exit codes, messages.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::Value;
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;

#[test]
fn analyse_prints_the_library_s_numbers_as_json() {
    for demo in DEMOS {
        let o = run(&["analyse", "-", "--json"], demo.json);
        assert_eq!(o.status.code(), Some(0), "{}", err(&o));
        let got: Value = serde_json::from_str(&out(&o)).unwrap();
        let expected = Rig::new(&Job::from_json(demo.json).unwrap()).unwrap().analysis();
        assert_eq!(got, serde_json::to_value(expected).unwrap(), "{}", demo.name);
    }
}

/// The names other programs rely on.
#[test]
fn the_fixed_names_are_there() {
    let got: Value =
        serde_json::from_str(&out(&run(&["analyse", "--demo", "light-aeroplane", "--json"], ""))).unwrap();
    let point = &got["flight_points"][2];
    for name in [
        "name",
        "state",
        "airspeed_m_s",
        "rpm",
        "density_kg_m3",
        "advance_ratio",
        "ct",
        "cp",
        "cq",
        "efficiency",
        "figure_of_merit",
        "thrust_n",
        "torque_n_m",
        "power_w",
        "tip_mach",
        "blade_angle_075_deg",
        "advance_angle_075_deg",
        "geometric_pitch_m",
        "effective_pitch_m",
        "slip",
        "stations",
        "notes",
    ] {
        assert!(point.get(name).is_some(), "{name}");
    }
    for name in [
        "radius_m",
        "radius_fraction",
        "chord_m",
        "blade_angle_deg",
        "inflow_angle_deg",
        "angle_of_attack_deg",
        "best_angle_deg",
        "departure_deg",
        "share_of_best",
        "cl",
        "cd",
        "reynolds",
        "mach",
        "axial_factor",
        "swirl_factor",
        "loss_factor",
        "thrust_n_per_m",
        "torque_n_m_per_m",
        "notes",
    ] {
        assert!(point["stations"][7].get(name).is_some(), "{name}");
    }
}

#[test]
fn people_get_a_table_and_scripts_a_csv() {
    let table = out(&run(&["analyse", "--demo"], ""));
    assert!(table.contains("departure") && table.contains("Cruise"));
    let csv = out(&run(&["analyse", "--demo", "unmanned", "--csv"], ""));
    let mut lines = csv.lines();
    assert!(lines.next().unwrap().starts_with("flight_point,state,station,radius_m"));
    let stations: usize = Job::from_json(DEMOS[1].json).unwrap().propeller.stations.len();
    assert_eq!(lines.count(), 4 * stations);
    for command in ["sweep", "map"] {
        let o = run(&[command, "--demo", "light-aeroplane", "--point", "cruise", "--csv"], "");
        assert!(o.status.success() && out(&o).lines().count() > 20, "{command}");
    }
}

#[test]
fn no_answer_is_exit_code_1_and_a_state() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    job.engine = None;
    let o = run(&["analyse", "-", "--json"], &job.to_json());
    assert_eq!(o.status.code(), Some(1));
    let got: Value = serde_json::from_str(&out(&o)).unwrap();
    assert_eq!(got["flight_points"][0]["state"], "needs-engine");
    assert!(got["flight_points"][0]["thrust_n"].is_null());
}

#[test]
fn bad_input_is_exit_code_2_and_a_message_by_path() {
    let negative = DEMOS[0].json.replacen("0.088", "-0.088", 1);
    let cases = [
        (vec!["analyse", "-"], negative.as_str(), "propeller.stations[0].chord_m: -0.088"),
        (vec!["analyse", "-"], "{\"spokeshave\": 1", "line 1"),
        (vec!["analyse", "no-such-file.json"], "", "no-such-file.json"),
        (vec!["analyse", "--demo", "submarine"], "", "light-aeroplane, unmanned, multirotor"),
        (vec!["sweep", "--demo", "unmanned", "--point", "Landing"], "", "Launch, Climb, Survey, Dash"),
        (vec!["sweep", "--demo", "unmanned", "--steps", "0"], "", "--steps"),
        (vec!["analyse"], "", "required"),
        (vec!["carve"], "", "carve"),
    ];
    for (args, input, expected) in cases {
        let o = run(&args, input);
        assert_eq!(o.status.code(), Some(2), "{args:?}");
        assert!(err(&o).contains(expected) && out(&o).is_empty(), "{args:?}: {}", err(&o));
    }
}

/// Every key in a document, however deep.
fn keys(value: &Value, into: &mut Vec<String>) {
    match value {
        Value::Object(o) => {
            for (k, v) in o {
                into.push(k.clone());
                keys(v, into);
            }
        }
        Value::Array(a) => a.iter().for_each(|v| keys(v, into)),
        _ => {}
    }
}

#[test]
fn the_schema_names_every_key_of_the_demos() {
    let schema = out(&run(&["schema"], ""));
    let mut names = Vec::new();
    for d in &DEMOS {
        keys(&serde_json::from_str(d.json).unwrap(), &mut names);
    }
    names.sort();
    names.dedup();
    assert!(names.len() > 40);
    for name in names {
        assert!(schema.contains(&format!("\"{name}\"")), "{name} is not in the schema");
    }
}

#[test]
fn help_has_examples() {
    assert!(out(&run(&["--help"], "")).contains("Examples:"));
}

#[test]
fn the_tables_of_one_family_are_listed() {
    let o = run(&["sections", "clark-y", "--thickness", "12"], "");
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    assert!(out(&o).contains("lift-to-drag") && out(&o).lines().count() >= 10, "{}", out(&o));
    let csv = out(&run(&["sections", "clark-y", "--csv"], ""));
    assert!(csv.starts_with("reynolds,alpha_deg,cl,cd\n30000,"), "{}", &csv[..80]);
    for (args, said) in [
        (["sections", "clark", "--thickness", "12"], "no section \"clark\"; there are arc-back"),
        (
            ["sections", "clark-y", "--thickness", "40"],
            "--thickness 40: clark-y has tables for 6 to 24 percent",
        ),
    ] {
        let o = run(&args, "");
        assert_eq!(o.status.code(), Some(2));
        assert!(err(&o).contains(said), "{}", err(&o));
    }
}
