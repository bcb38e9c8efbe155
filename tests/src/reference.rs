//! Reading the reference cases and turning them into jobs.

use std::path::PathBuf;

use serde_json::{Value, json};
use spokeshave::job::Job;

/// What most cases are.
pub const INDEPENDENT: &str = "an independent implementation of the same equations (SciPy; closed-form \
                               blade and polar; 240 to 960 cosine-spaced elements), computed for this \
                               project: see reference/README.md";
/// What those of least induced loss are.
pub const ADKINS_LIEBECK: &str = "C. N. Adkins and R. H. Liebeck, Design of Optimum Propellers, J. \
                                  Propulsion and Power 10(5), 1994: its equations by an independent \
                                  implementation: see reference/README.md";

/// One reference case by its file name without the ending.
///
/// # Panics
/// When the file is missing or is not JSON: then the tests cannot be run.
#[must_use]
pub fn case(name: &str) -> Value {
    let path = PathBuf::from(env!("CARGO_MANIFEST_DIR")).join("reference").join(format!("{name}.json"));
    let text = std::fs::read_to_string(&path).unwrap_or_else(|e| panic!("{}: {e}", path.display()));
    serde_json::from_str(&text).unwrap_or_else(|e| panic!("{}: {e}", path.display()))
}

/// The numbers of an array.
///
/// # Panics
/// When it is not an array of numbers.
#[must_use]
pub fn numbers(value: &Value) -> Vec<f64> {
    value.as_array().expect("an array").iter().map(|v| v.as_f64().expect("a number")).collect()
}

/// The polar of a case as one of a job's own sections, named `reference`.
#[must_use]
pub fn section(polar: &Value) -> Value {
    let polars: Vec<Value> = polar["polars"]
        .as_array()
        .into_iter()
        .flatten()
        .map(|p| {
            let t = &p["table"];
            let rows = numbers(&t["alpha_deg"]).into_iter().zip(numbers(&t["cl"])).zip(numbers(&t["cd"]));
            let points: Vec<Value> =
                rows.map(|((a, cl), cd)| json!({"alpha_deg": a, "cl": cl, "cd": cd})).collect();
            json!({"reynolds": p["Re"], "points": points})
        })
        .collect();
    json!({"name": "reference", "polars": polars})
}

/// A job with the blade, polar, speed and rpm of a case of kind `bem.analysis`, with everything switched off
/// that the cases do without. The stations are those of the blade's table; `extra` radii (m) are added by
/// linear interpolation.
///
/// # Panics
/// When the job made is refused.
#[must_use]
pub fn job(inputs: &Value) -> Job {
    let blade = &inputs["blade"];
    let radius = blade["R_m"].as_f64().expect("R_m");
    let figures =
        numbers(&blade["r_m"]).into_iter().zip(numbers(&blade["chord_m"])).zip(numbers(&blade["beta_deg"]));
    let stations: Vec<Value> = figures
        .map(|((r, c), b)| {
            json!({
                "radius_fraction": r / radius, "chord_m": c, "angle_deg": b,
                "thickness_ratio": 0.1, "section": "reference"
            })
        })
        .collect();
    let document = json!({
        "spokeshave": 1,
        "propeller": {
            "blades": blade["blades"],
            "diameter_m": 2.0 * radius,
            "hub_diameter_m": 2.0 * blade["r_hub_m"].as_f64().expect("r_hub_m"),
            "stations": stations
        },
        "flight_points": [
            {"name": "case", "airspeed_m_s": inputs["V"], "setting": {"kind": "rpm", "rpm": inputs["rpm"]}}
        ],
        "sections": [section(&inputs["polar"])],
        "method": {"compressibility": false, "stall_delay": false}
    });
    Job::from_json(&document.to_string()).expect("a valid job")
}
