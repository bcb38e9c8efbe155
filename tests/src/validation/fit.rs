//! Full-throttle matching against an independent implementation of the same equations (see
//! `reference/README.md`).

use serde_json::{Value, json};
use spokeshave::job::Job;
use spokeshave::rig::Rig;

use crate::check::{Basis, Check, Mark, worst};
use crate::reference::{INDEPENDENT, case, job, numbers};

const BASIS: Basis = Basis {
    source: INDEPENDENT,
    mark: Mark::Computed,
    why: "what the propeller's own 0.1 % of CT and CP makes of the rpm (0.03 %), thrust (0.1 %), power (0.05 \
          %), efficiency (0.001)",
};

/// The case's propeller, with its engine and one full-throttle flight point a speed.
fn matched(inputs: &Value) -> Job {
    let mut blade = inputs.clone();
    blade["blade"] = inputs["propeller"].clone();
    (blade["V"], blade["rpm"]) = (json!(0.0), json!(2400.0));
    let mut document: Value = serde_json::to_value(job(&blade)).expect("a job");
    let curve = numbers(&inputs["engine"]["rpm"]).into_iter().zip(numbers(&inputs["engine"]["power_W"]));
    let points: Vec<Value> = curve.map(|(rpm, power_w)| json!({"rpm": rpm, "power_w": power_w})).collect();
    document["engine"] =
        json!({"kind": "piston", "full_throttle": points, "interpolation": inputs["interpolation"]});
    let speeds = numbers(&inputs["V"]);
    document["flight_points"] = speeds
        .iter()
        .map(|v| json!({"name": format!("{v}"), "airspeed_m_s": v, "setting": {"kind": "full-throttle"}}))
        .collect();
    Job::from_json(&document.to_string()).expect("a valid job")
}

/// Seven speeds.
pub(super) fn full_throttle() -> Vec<Check> {
    let case = case("50_match_rpm_linear");
    let points = Rig::new(&matched(&case["inputs"])).expect("a valid job").analysis().flight_points;
    let answers = case["answers"].as_array().expect("answers");
    assert_eq!((points.len(), answers.len()), (7, 7));
    let column =
        |key: &str, unit: &'static str, (rel, abs): (f64, f64), got: &dyn Fn(usize) -> Option<f64>| {
            let one = |i: usize| {
                let expected = answers[i][key].as_f64()?;
                let allowed = abs.max(rel * expected);
                let got = got(i).unwrap_or(f64::NAN);
                Some(BASIS.within(format!("at {} m/s", points[i].name), got, expected, allowed).unit(unit))
            };
            worst(&format!("full throttle over speed, {key}"), (0..answers.len()).filter_map(one).collect())
        };
    vec![
        column("rpm", "rpm", (3e-4, 0.0), &|i| points[i].rpm),
        column("T", "N", (1e-3, 0.0), &|i| points[i].figures.thrust_n),
        column("P", "W", (5e-4, 0.0), &|i| points[i].figures.power_w),
        column("eta", "", (0.0, 1e-3), &|i| points[i].figures.efficiency),
    ]
}
