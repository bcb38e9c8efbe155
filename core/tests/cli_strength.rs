//! `spokeshave bench … strength` as a script meets it.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::{Value, json};
use spokeshave::job::DEMOS;

fn bench(job: &Value, rest: &[&str]) -> std::process::Output {
    run(&[&["bench", "-", "strength"], rest].concat(), &job.to_string())
}

fn demo() -> Value {
    serde_json::from_str(DEMOS[0].json).unwrap()
}

#[test]
fn the_sheet_is_told_for_people_for_programs_and_as_csv() {
    let mut unnamed = demo();
    unnamed.as_object_mut().unwrap().remove("wood");
    let people = bench(&unnamed, &[]);
    let text = out(&people);
    assert_eq!(people.status.code(), Some(0), "{}", err(&people));
    for part in [
        "yellow birch (taken: the job names none)",
        "limit",
        "Before you act",
        "Taken for granted",
        "margin %",
    ] {
        assert!(text.contains(part), "{part}: {text}");
    }
    assert!(!text.contains("NaN") && !text.contains("inf "));
    assert!(out(&bench(&demo(), &[])).contains("greatest torque, N m"));
    let json: Value = serde_json::from_str(&out(&bench(&demo(), &["--json"]))).unwrap();
    assert!(json["governing"]["margin"].is_number() && json["mass"]["blade_kg"].as_f64().unwrap() > 0.1);
    let csv = out(&bench(&demo(), &["--csv"]));
    assert_eq!(csv.lines().count(), 1 + json["stations"].as_array().unwrap().len());
    assert!(csv.starts_with("station,radius_m,chord_m"));
}

#[test]
fn what_has_no_answer_ends_with_1_and_bad_input_with_2() {
    let mut job = demo();
    job["wood"] = json!({"species": "unobtainium"});
    let o = bench(&job, &[]);
    assert_eq!(o.status.code(), Some(2));
    assert!(
        err(&o).contains("wood.species: \"unobtainium\" is not known; allowed is one of sugar-maple"),
        "{}",
        err(&o)
    );
    let mut job = demo();
    job.as_object_mut().unwrap().remove("engine");
    job["flight_points"] = json!([{"name": "level", "airspeed_m_s": 300, "setting": {"kind": "level"}}]);
    let o = bench(&job, &[]);
    assert_eq!(o.status.code(), Some(1), "{}", out(&o));
    assert!(err(&o).contains("no load is known") && out(&o).contains("kg"), "{}", err(&o));
    let mut job = demo();
    job["propeller"]["stations"][0]["thickness_ratio"] = json!(1.2);
    let o = bench(&job, &[]);
    assert_eq!(o.status.code(), Some(2));
    assert!(err(&o).contains("propeller.stations[0].thickness_ratio: 1.2"), "{}", err(&o));
}
