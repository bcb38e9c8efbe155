//! `spokeshave fit` and `--vary` as a script meets them.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::Value;

const DEMO: &str = "light-aeroplane";

#[test]
fn the_fit_is_told_for_people_for_programs_and_as_rows() {
    let people = out(&run(&["fit", "--demo", DEMO], ""));
    for words in ["Standing start", "Ground roll", "Best rate of climb", "Top speed", "Service ceiling"] {
        assert!(people.contains(words), "{words} in\n{people}");
    }
    assert!(!people.contains("NaN") && !people.contains("inf"));
    let o = run(&["fit", "--demo", DEMO, "--json", "--point", "Cruise", "--speeds", "12"], "");
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    let got: Value = serde_json::from_str(&out(&o)).unwrap();
    assert_eq!(got["points"].as_array().unwrap().len(), 12);
    assert!(got["marks"]["top_speed"]["airspeed_m_s"].as_f64().unwrap() > 40.0);
    let rows = out(&run(&["fit", "--demo", DEMO, "--csv", "--speeds", "12"], ""));
    assert_eq!(rows.lines().count(), 13);
}

#[test]
fn the_fit_tells_the_dive_and_what_a_variable_pitch_is_worth() {
    let people = out(&run(&["fit", "--demo", DEMO], ""));
    for words in ["dive with closed throttle", "A variable pitch would give", "top speed km/h"] {
        assert!(people.contains(words), "{words} in\n{people}");
    }
    let got: Value =
        serde_json::from_str(&out(&run(&["fit", "--demo", DEMO, "--json", "--speeds", "12"], ""))).unwrap();
    assert!(got["marks"]["closed_throttle_dive"]["airspeed_m_s"].as_f64().unwrap() > 50.0);
    let worth = got["pitch_worth"].as_array().unwrap();
    assert!(!worth.is_empty() && worth.iter().all(|w| w["gain"].as_f64().unwrap() >= 0.0), "{worth:?}");
}

#[test]
fn a_multirotor_is_told_in_its_own_words() {
    let demo: Value = serde_json::from_str(&out(&run(&["demo", "multirotor"], ""))).unwrap();
    let told = |mass_kg: f64| {
        let mut job = demo.clone();
        job["aircraft"]["mass_kg"] = mass_kg.into();
        out(&run(&["fit", "-", "--speeds", "12"], &job.to_string()))
    };
    let (fit, heavy) = (told(demo["aircraft"]["mass_kg"].as_f64().unwrap()), told(40.0));
    for words in ["weight N", "Fastest climb straight up", "Longest aloft"] {
        assert!(fit.contains(words), "{words} in\n{fit}");
    }
    assert!(heavy.contains("It cannot hover: full throttle is ") && heavy.contains(" N short of"), "{heavy}");
    for words in ["drag", "stall", "Ground roll", "ceiling"] {
        assert!(!fit.contains(words) && !heavy.contains(words), "{words} in\n{heavy}");
    }
}

#[test]
fn the_map_is_told_for_programs() {
    let o = run(&["map", "--demo", DEMO, "--point", "cruise", "--json", "--speeds", "5", "--radii", "4"], "");
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    let got: Value = serde_json::from_str(&out(&o)).unwrap();
    assert_eq!(got["flight_point"], "Cruise");
    for key in ["departure_deg", "share_of_best", "past_stall_deg"] {
        let rows = got[key].as_array().unwrap();
        assert!(rows.len() == 4 && rows.iter().all(|r| r.as_array().unwrap().len() == 5), "{key}");
    }
    assert_eq!(got["airspeeds_m_s"].as_array().unwrap().len(), 5);
}

#[test]
fn any_number_or_two_of_the_file_may_vary() {
    let o =
        run(&["fit", "--demo", DEMO, "--vary", "propeller.diameter_m=1.45..1.60:4", "--speeds", "12"], "");
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    let text = out(&o);
    let rpm: Vec<f64> = text.lines().skip(1).map(|l| l.split(',').nth(1).unwrap().parse().unwrap()).collect();
    assert!(text.starts_with("propeller.diameter_m,standing_rpm"));
    assert!(
        rpm.len() == 4 && rpm.windows(2).all(|w| w[1] < w[0]),
        "a larger propeller turns slower: {rpm:?}"
    );
    let two =
        ["--vary", "propeller.stations[3].chord_m=0.08..0.1:2", "--vary", "aircraft.mass_kg=400..450:3"];
    let o = run(&[&["analyse", "--demo", DEMO, "--point", "Cruise"], &two[..]].concat(), "");
    assert_eq!((o.status.code(), out(&o).lines().count()), (Some(0), 7), "{}", err(&o));
}

#[test]
fn a_wrong_variation_is_told_by_its_path() {
    for (vary, words) in [
        ("propeller.diametr_m=1..2:3", "diametr_m"),
        ("propellor.diameter_m=1..2:3", "no propellor"),
        ("propeller.stations[99].chord_m=0.1..0.2:3", "stations[99]"),
        ("propeller.diameter_m=-1..1.5:3", "propeller.diameter_m: -1"),
        ("title=1..2:3", "not a number"),
        ("propeller.diameter_m=1..2", "PATH=A..B:N"),
        ("propeller.diameter_m=1..2:90000", "PATH=A..B:N"),
    ] {
        let o = run(&["fit", "--demo", DEMO, "--vary", vary], "");
        assert_eq!(o.status.code(), Some(2), "{vary}");
        assert!(err(&o).contains(words), "{vary}: {}", err(&o));
    }
}
