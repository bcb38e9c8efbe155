//! `spokeshave logbook` as a script meets it.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::Value;
use spokeshave::job::Job;

const SHEET: &str = "rpm,throttle,airspeed_km_h,altitude_m,temperature_c,level,fuel_kg_h
2950,full,0,100,20,,
2945,full,0,100,20,,17.1
2700,full,110,300,18,,16
2560,,170,600,12,yes,10.1
2440,,155,600,12,yes,
";

fn logbook(rest: &[&str], sheet: &str) -> std::process::Output {
    run(&[&["logbook", "--demo", "light-aeroplane", "--readings", "-"], rest].concat(), sheet)
}

#[test]
fn readings_are_told_for_people_for_programs_as_a_sheet_and_as_a_job() {
    let people = logbook(&[], SHEET);
    let text = out(&people);
    assert_eq!(people.status.code(), Some(0), "{}", err(&people));
    for said in ["propeller as drawn", "engine power", "told by the readings", "before", "Before you act"] {
        assert!(text.contains(said), "{said}: {text}");
    }
    assert!(!text.contains("NaN") && !text.contains("inf"));
    let json: Value = serde_json::from_str(&out(&logbook(&["--json"], SHEET))).unwrap();
    let factor = json["logbook"]["estimate"]["factors"]["engine_power"].as_f64().unwrap();
    assert!((0.85..1.1).contains(&factor), "{factor}");
    assert_eq!(out(&logbook(&["--csv"], SHEET)).lines().count(), 6);
    let job = Job::from_json(&out(&logbook(&["--job"], SHEET))).unwrap();
    let kept = job.logbook.unwrap();
    assert!(
        kept.in_use && (kept.factors.unwrap().engine_power - factor).abs() < 1e-9 && kept.readings.len() == 5
    );
}

#[test]
fn what_to_change_is_told_with_its_side_effects() {
    let o = run(&["logbook", "--demo", "light-aeroplane", "--point", "Climb", "--want-rpm", "2800"], "");
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    for said in ["Wanted at Climb: 2800 rpm", "The whole blade turned", "mm of diameter", "changed"] {
        assert!(out(&o).contains(said), "{said}: {}", out(&o));
    }
    let o = run(&["logbook", "--demo", "light-aeroplane", "--point", "Top speed", "--want-km-h", "400"], "");
    assert_eq!(o.status.code(), Some(1), "{}", err(&o));
    assert!(out(&o).contains("Not reached"));
}

#[test]
fn bad_readings_end_with_2_and_say_where() {
    let o = logbook(&[], "rpm,throttle\n2900,lots\n");
    assert_eq!(o.status.code(), Some(2));
    assert!(err(&o).contains("line 2, column 2: throttle: \"lots\""), "{}", err(&o));
}
