//! `spokeshave shape` as a script meets it.
#![cfg(feature = "cli")]

mod command;

use command::{err, out, run};
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
