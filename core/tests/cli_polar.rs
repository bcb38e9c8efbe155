//! `polar` and `import` as a script meets them.
#![cfg(feature = "cli")]

use crate::command::{err, out, run};
use serde_json::{Value, json};
use spokeshave::job::{DEMOS, Job};
use spokeshave::section::outline::clark_y;

/// Clark Y as a list, flat face on the axis.
fn outline() -> String {
    let section = clark_y().unwrap();
    let points = section.points().iter().map(|[x, y]| format!("{x:.6} {y:.6}\n"));
    std::iter::once("Invented section\n".to_string()).chain(points).collect()
}

const QUICK: [&str; 6] = ["polar", "-", "--alpha", "0..4:1", "--re", "6e5"];

fn quick<'a>(more: &[&'a str]) -> Vec<&'a str> {
    QUICK.iter().chain(more).copied().collect()
}

#[test]
fn a_made_section_joins_a_job() {
    let o = run(&quick(&["--thickness", "0.10,0.15", "--section", "my-section"]), &outline());
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    let section: Value = serde_json::from_str(&out(&o)).unwrap();
    assert_eq!(section["face_angles"].as_array().unwrap().len(), 2);
    let mut job: Value = serde_json::from_str(DEMOS[0].json).unwrap();
    job["sections"] = json!([section]);
    for station in job["propeller"]["stations"].as_array_mut().unwrap() {
        station["section"] = json!("my-section");
    }
    job["propeller"]["angle_reference"] = json!("flat-face");
    let job = Job::from_json(&job.to_string()).unwrap();
    assert!(job.section_outline("my-section", 0.13).is_some());
    assert!(job.sections[0].origin.contains("not measured"), "{}", job.sections[0].origin);
    let analysis = spokeshave::rig::Rig::new(&job).unwrap().analysis();
    assert!(analysis.flight_points.iter().any(|p| p.stations.iter().any(|s| s.cl.is_some())));
    assert_eq!(Job::from_json(&job.to_json()).unwrap(), job);
}

#[test]
fn json_csv_and_words_tell_the_same_polar() {
    let document: Value = serde_json::from_str(&out(&run(&quick(&["--json"]), &outline()))).unwrap();
    let points = document["polars"][0]["points"].as_array().unwrap();
    assert_eq!(points.len(), 5);
    let csv = out(&run(&quick(&["--csv"]), &outline()));
    let row = csv.lines().nth(1 + 4).unwrap();
    let cells: Vec<&str> = row.split(',').collect();
    assert_eq!(cells[1], "600000");
    assert_eq!(cells[5].parse::<f64>().unwrap(), points[4]["cl"].as_f64().unwrap());
    let words = out(&run(&quick(&[]), &outline()));
    assert!(words.contains("Reynolds number 600000") && words.contains("best cl/cd"), "{words}");
    assert!(words.contains("Invented section"));
}

#[test]
fn a_comparison_shows_what_departures_cost() {
    let o = run(&quick(&["--rough", "--blunt", "0.01", "--compare", "--json"]), &outline());
    let document: Value = serde_json::from_str(&out(&o)).unwrap();
    let compared = &document["comparison"][0];
    let of = |which: &str| compared[which]["lift_to_drag"].as_f64().unwrap();
    assert!(of("carved") < of("drawn"), "{compared}");
}

#[test]
fn bad_outlines_and_options_are_exit_code_2() {
    let broken = outline().replace("0.5", "half");
    let good = outline();
    let far = good.replacen("0.5", "1e300 0 #", 1);
    let cases = [
        (vec!["polar", "-", "--re", "2e5"], broken.as_str(), "is not a pair of numbers"),
        (vec!["polar", "-", "--re", "2e5"], "", "no pair of coordinates"),
        (vec!["polar", "-", "--re", "2e5"], far.as_str(), "(1e300, 0) is outside"),
        (vec!["polar", "-", "--re", "1e99"], good.as_str(), "Reynolds number 1e99: 10000 to"),
        (vec!["polar", "no-such.dat", "--re", "2e5"], "", "no-such.dat"),
        (vec!["polar", "-"], good.as_str(), "--re"),
        (vec!["polar", "-", "--re", "5"], good.as_str(), "Reynolds number 5: 10000 to"),
        (vec!["polar", "-", "--re", "2e5,1e5"], good.as_str(), "follows"),
        (vec!["polar", "-", "--re", "2e5", "--alpha", "0..90"], good.as_str(), "last angle"),
        (vec!["polar", "-", "--re", "2e5", "--alpha", "some"], good.as_str(), "FIRST..LAST:STEP"),
        (vec!["polar", "-", "--re", "2e5", "--blunt", "0.4"], good.as_str(), "trailing edge 0.4"),
        (vec!["polar", "-", "--re", "2e5", "--trip", "0.05"], good.as_str(), "two places"),
        (vec!["polar", "-", "--re", "2e5", "--trip", "5,free"], good.as_str(), "upper side 5"),
        (vec!["polar", "-", "--re", "2e5", "--thickness", "12"], good.as_str(), "thickness ratio 12"),
        (vec!["polar", "-", "--re", "2e5", "--compare"], good.as_str(), "--blunt, --trip or --rough"),
        (vec!["import", "-", "--name", "x"], "alpha_deg,cl\n", "line 1: no column cd"),
        (vec!["import", "-", "--name", ""], "alpha_deg,cl,cd\n", "polars"),
        (vec!["import", "no-such.csv", "--name", "x"], "", "no-such.csv"),
    ];
    for (args, input, expected) in cases {
        let o = run(&args, input);
        assert_eq!(o.status.code(), Some(2), "{args:?} {}", err(&o));
        assert!(err(&o).contains(expected) && out(&o).is_empty(), "{args:?}: {}", err(&o));
    }
}

#[test]
fn an_imported_table_is_a_section_of_a_job() {
    let rows: Vec<String> = (0..8).map(|k| format!("{};0,{k};0,01;1e5", k - 2)).collect();
    let o = run(
        &["import", "-", "--name", "measured", "--face-angle", "2"],
        &format!("alpha [deg];cl;cd;Re;who\n{}", rows.join("\n")),
    );
    assert_eq!(o.status.code(), Some(0), "{}", err(&o));
    assert!(err(&o).contains("column \"who\" is not used"), "{}", err(&o));
    let section: spokeshave::job::Section = serde_json::from_str(&out(&o)).unwrap();
    assert_eq!(section.face_angle_deg, Some(2.0));
    assert_eq!(section.polars[0].points[3].cl, 0.3);
    assert!(section.problems().is_empty());
}
