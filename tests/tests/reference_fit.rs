//! Full-throttle matching against an independent implementation of the same equations (see `reference/README.md`).

use serde_json::{Value, json};
use spokeshave::job::Job;
use spokeshave::rig::Rig;
use spokeshave_tests::reference::{case, job, numbers};

fn near(what: &str, got: f64, expected: f64, rel: f64, abs: f64) {
    let allowed = (rel * expected.abs()).max(abs);
    assert!((got - expected).abs() <= allowed, "{what}: got {got}, expected {expected} ± {allowed}");
}

/// The case's propeller, with its engine and one full-throttle flight point a speed.
fn matched(inputs: &Value) -> Job {
    let mut blade = inputs.clone();
    blade["blade"] = inputs["propeller"].clone();
    (blade["V"], blade["rpm"]) = (json!(0.0), json!(2400.0));
    let mut document: Value = serde_json::to_value(job(&blade)).unwrap();
    let curve = numbers(&inputs["engine"]["rpm"]).into_iter().zip(numbers(&inputs["engine"]["power_W"]));
    let points: Vec<Value> = curve.map(|(rpm, power_w)| json!({"rpm": rpm, "power_w": power_w})).collect();
    document["engine"] =
        json!({"kind": "piston", "full_throttle": points, "interpolation": inputs["interpolation"]});
    let speeds = numbers(&inputs["V"]);
    document["flight_points"] = speeds
        .iter()
        .map(|v| json!({"name": format!("{v}"), "airspeed_m_s": v, "setting": {"kind": "full-throttle"}}))
        .collect();
    Job::from_json(&document.to_string()).unwrap()
}

#[test]
fn full_throttle_rpm_over_speed_agrees() {
    let case = case("50_match_rpm_linear");
    let rig = Rig::new(&matched(&case["inputs"])).unwrap();
    let answers = case["answers"].as_array().unwrap();
    assert_eq!(answers.len(), 7);
    for (point, expected) in rig.analysis().flight_points.iter().zip(answers) {
        let (f, e) = (&point.figures, |key: &str| expected[key].as_f64().unwrap());
        let rel = |key: &str| case["tolerance"][key]["rel"].as_f64().unwrap();
        near(&format!("{} rpm", point.name), point.rpm.unwrap(), e("rpm"), rel("rpm"), 0.0);
        near(&format!("{} T", point.name), f.thrust_n.unwrap(), e("T"), rel("T"), 0.0);
        near(&format!("{} P", point.name), f.power_w.unwrap(), e("P"), rel("P"), 0.0);
        if let Some(eta) = expected["eta"].as_f64() {
            near(&format!("{} eta", point.name), f.efficiency.unwrap(), eta, 0.0, 0.005);
        }
    }
}
