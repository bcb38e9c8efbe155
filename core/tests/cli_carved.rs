//! `spokeshave carved` as a script meets it.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::Value;
use spokeshave::job::Job;

const SHEET: &str = "blade,radius_mm,face angle,chord_mm,thickness_mm
1,300,31 15,112,25.8
1,540,17 30,89,14.8
1,720,14.2,49.5,6.5
2,300,30.1,111.5,26.1
2,540,18.2,88.5,14.6
";

fn carved(rest: &[&str], sheet: &str) -> std::process::Output {
    run(&[&["carved", "--demo", "light-aeroplane", "--readings", "-"], rest].concat(), sheet)
}

#[test]
fn readings_are_told_for_people_for_programs_as_a_sheet_and_as_a_job() {
    let people = carved(&[], SHEET);
    let text = out(&people);
    assert_eq!(people.status.code(), Some(0), "{}", err(&people));
    for said in [
        "Blade 2, 2 readings",
        "between readings",
        "planned",
        "take off, mm",
        "once per turn",
        "at 694 kg/m³:",
    ] {
        assert!(text.contains(said), "{said}: {text}");
    }
    assert!(!text.contains("NaN") && !text.contains("inf"));
    let json: Value = serde_json::from_str(&out(&carved(&["--json"], SHEET))).unwrap();
    assert_eq!(json["carved"]["blades"][0]["stations"].as_array().unwrap().len(), 11);
    assert!(json["plan"]["blades"][1]["stations"][3]["face_leading_m"].as_f64().unwrap() >= 0.0);
    let csv = out(&carved(&["--csv"], SHEET));
    assert_eq!(csv.lines().count(), 1 + 2 * 11);
    let job = Job::from_json(&out(&carved(&["--job"], SHEET))).unwrap();
    assert_eq!(job.carved.unwrap().blades[0].readings[1].angle_deg, Some(17.5));
}

#[test]
fn what_is_hard_to_believe_is_left_out_unless_confirmed() {
    let sheet = format!("{SHEET}2,720,75,44,6.0\n");
    let text = out(&carved(&[], &sheet));
    assert!(text.contains("Hard to believe, left out: blade 2, 720.0 mm: angle 75.00°"), "{text}");
    assert!(text.contains("perhaps read from the shaft"), "{text}");
    let text = out(&carved(&["--confirm"], &sheet));
    assert!(text.contains("Hard to believe, counted, as confirmed: blade 2"), "{text}");
    let job = Job::from_json(&out(&carved(&["--confirm", "--job"], &sheet))).unwrap();
    assert!(job.carved.unwrap().blades[1].readings.iter().any(|r| r.confirmed));
}

#[test]
fn bad_readings_end_with_2_and_say_where() {
    let o = carved(&[], "blade,radius_mm,angle\n1,540,north\n");
    assert_eq!(o.status.code(), Some(2));
    assert!(err(&o).contains("line 2, column 3: angle: \"north\""), "{}", err(&o));
    let o = run(&["carved", "--demo", "light-aeroplane"], "");
    assert_eq!(o.status.code(), Some(2));
    assert!(err(&o).contains("no readings of carved blades"), "{}", err(&o));
}
