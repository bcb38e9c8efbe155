//! `spokeshave shape` as a script meets it.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::Value;
use spokeshave::job::Job;

const DEMO: [&str; 3] = ["shape", "--demo", "light-aeroplane"];

fn shape(rest: &[&str]) -> std::process::Output {
    run(&[&DEMO[..], rest].concat(), "")
}

#[test]
fn a_shaped_blade_is_told_for_people_for_programs_and_as_a_job() {
    for (how, key) in [("twist", "settled"), ("least-loss", "displacement")] {
        let people = shape(&[how, "--point", "Cruise"]);
        let text = out(&people);
        assert_eq!(people.status.code(), Some(0), "{}", err(&people));
        assert!(text.contains("shaped") && text.contains("Strength is not judged"), "{text}");
        assert!(!text.contains("NaN") && !text.contains("inf"));
        let json: Value = serde_json::from_str(&out(&shape(&[how, "--point", "Cruise", "--json"]))).unwrap();
        assert!(!json[key].is_null());
        let job = Job::from_json(&out(&shape(&[how, "--point", "Cruise", "--job"]))).unwrap();
        assert!(job.title.contains('('), "{}", job.title);
        let kept = json["stations"][5]["angle_deg"].as_f64().unwrap();
        assert!((job.propeller.stations[5].angle_deg.unwrap() - kept).abs() < 1e-6);
    }
}

#[test]
fn what_has_no_answer_ends_with_1_and_bad_input_with_2() {
    let o = shape(&["least-loss", "--point", "Standing start"]);
    assert_eq!((o.status.code(), out(&o).as_str()), (Some(1), ""));
    assert!(err(&o).contains("the airspeed is 0"), "{}", err(&o));
    let o = shape(&["least-loss", "--point", "Cruise", "--thrust-n", "9000"]);
    assert_eq!(o.status.code(), Some(1));
    assert!(err(&o).contains("at most about"), "{}", err(&o));
    for bad in [&["twist", "--point", "Nowhere"][..], &["twist", "--point", "Cruise=-1"], &["carve"]] {
        assert_eq!(shape(bad).status.code(), Some(2), "{bad:?}");
    }
}

#[test]
fn a_search_takes_wishes_limits_and_what_is_held_on_the_command_line() {
    let asked = ["search", "--aim", "Cruise:efficiency=2", "--aim", "climb:climb", "--hold", "diameter"];
    let limits = ["--rpm", "Cruise=2000..2900", "--standing-rpm-least", "2500", "--tip-mach-most", "0.8"];
    let all = [&asked[..], &limits, &["--most-trials", "60"]].concat();
    let people = shape(&all);
    assert_eq!(people.status.code(), Some(0), "{}", err(&people));
    let text = out(&people);
    assert!(text.contains("greatest number of blades") && text.contains("to spare"), "{text}");
    let json: Value = serde_json::from_str(&out(&shape(&[&all[..], &["--json"]].concat()))).unwrap();
    assert_eq!(json["aims"][0]["weight"], 2.0);
    assert!(json["free"].as_array().unwrap().iter().all(|f| f["name"] != "diameter"));
    let job = Job::from_json(&out(&shape(&[&all[..], &["--job"]].concat()))).unwrap();
    assert!(job.title.ends_with("(search)"));
    for (bad, words) in [
        (&["search", "--aim", "Cruise:beauty"][..], "allowed are efficiency"),
        (&["search", "--aim", "Moon:power"], "no flight point"),
        (&["search", "--tip-mach-most", "7"], "wishes.limits.tip_mach_most: 7"),
        (&["search", "--start", "0,2"], "figures from -1 to 1"),
    ] {
        let o = shape(bad);
        assert_eq!(o.status.code(), Some(2), "{bad:?}");
        assert!(err(&o).contains(words), "{}", err(&o));
    }
    let o = shape(&["search", "--diameter-most-mm", "800", "--most-trials", "100"]);
    assert_eq!(o.status.code(), Some(1));
    assert!(err(&o).contains("diameter") && err(&o).contains("past the limit"), "{}", err(&o));
}

#[test]
fn a_chart_is_told_for_people_and_for_programs() {
    let asked = ["chart", "--point", "Cruise", "--pitch-mm", "1100..1400:4", "--diameter-mm", "1400..1600:3"];
    let limited = [&asked[..], &["--shaft-height-mm", "1000", "--ground-clearance-mm", "230"]].concat();
    let text = out(&shape(&limited));
    assert!(text.starts_with("efficiency at Cruise; drawn: pitch") && text.contains('*'), "{text}");
    assert!(text.contains("judged at Cruise alone"), "{text}");
    let csv = out(&shape(&[&limited[..], &["--csv"]].concat()));
    assert_eq!(csv.lines().count(), 13, "{csv}");
    assert_eq!(csv.lines().filter(|l| l.ends_with("diameter-most")).count(), 4, "{csv}");
    let json: Value = serde_json::from_str(&out(&shape(&[&asked[..], &["--json"]].concat()))).unwrap();
    assert_eq!(json["cells"].as_array().unwrap().len(), 4);
    assert_eq!(shape(&["chart", "--pitch-mm", "wide"]).status.code(), Some(2));
    let o = shape(&["chart", "--figure", "nope"]);
    assert_eq!(o.status.code(), Some(2));
    assert!(err(&o).contains("--figure: nope; allowed are efficiency, speed, climb"), "{}", err(&o));
}

#[test]
fn what_an_error_costs_is_told_for_people_and_for_programs() {
    let text = out(&shape(&["error", "--angle-deg", "0.4"]));
    assert!(text.contains("±0.4°") && text.contains("Cruise"), "{text}");
    let json: Value = serde_json::from_str(&out(&shape(&["error", "--angle-deg", "0.4", "--json"]))).unwrap();
    assert_eq!(json["tolerance"]["angle_deg"], 0.4);
    assert_eq!(json["radii_m"].as_array().map(Vec::len), Some(11));
    let below = shape(&["error", "--angle-deg", "-1"]);
    assert_eq!(below.status.code(), Some(2));
    assert!(err(&below).contains("angle: -1; allowed is a tolerance of 0 to 1000"), "{}", err(&below));
}
