//! Texts that are no job file.

use spokeshave::job::{DEMOS, Job, JobError, MOST_BYTES};

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
    assert!(said.contains("column 33: the key \"chord_m\" stands twice"), "{said}");
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
