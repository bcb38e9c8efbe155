//! A propeller measured in a wind tunnel, as a job, with its measurements.
//!
//! J. B. Brandt, R. W. Deters, G. K. Ananda, M. S. Selig, *UIUC Propeller Database*, vol. 2, 2015; R. W.
//! Deters, G. K. Ananda, M. S. Selig, *Reynolds Number Effects on the Performance of Small-Scale Propellers*,
//! AIAA 2014-2151: a 9.0 inch printed model of the blade form 5868-9 of NACA Report 640, Clark Y sections, 2
//! blades, 15° at 0.75 R by design. The print measured by its authors from photographs has 16.36° there.

use serde_json::{Value, json};
use spokeshave::job::Job;

/// r/R, c/R, design blade angle (degrees), t/c.
const BLADE: [(f64, f64, f64, f64); 15] = [
    (0.30, 0.1061, 32.091, 0.3671),
    (0.35, 0.1228, 29.631, 0.2439),
    (0.40, 0.1382, 27.052, 0.1786),
    (0.45, 0.1489, 24.286, 0.1402),
    (0.50, 0.1529, 22.047, 0.1194),
    (0.55, 0.1513, 20.101, 0.1092),
    (0.60, 0.1469, 18.497, 0.1027),
    (0.65, 0.1404, 17.140, 0.0967),
    (0.70, 0.1328, 16.012, 0.0929),
    (0.75, 0.1230, 15.000, 0.0895),
    (0.80, 0.1131, 14.193, 0.0869),
    (0.85, 0.1019, 13.435, 0.0844),
    (0.90, 0.0890, 12.796, 0.0825),
    (0.95, 0.0753, 12.222, 0.0812),
    (1.00, 0.0605, 11.662, 0.0812),
];

/// J, CT, CP measured at 6 004 and 6 068 rpm (merged), every third row of the published list.
pub const MEASURED: [(f64, f64, f64); 9] = [
    (0.1036, 0.0836, 0.0381),
    (0.1830, 0.0773, 0.0385),
    (0.2627, 0.0699, 0.0382),
    (0.3408, 0.0606, 0.0366),
    (0.4181, 0.0503, 0.0338),
    (0.4707, 0.0416, 0.0306),
    (0.5223, 0.0316, 0.0262),
    (0.5752, 0.0211, 0.0210),
    (0.6282, 0.0095, 0.0146),
];

/// Measured at rest at 6 457 rpm: CT, CP.
pub const AT_REST: (f64, f64) = (0.0891, 0.0374);

/// The print's blade angle at 0.75 R by photograph, over the design's, degrees.
pub const PRINT_TURN_DEG: f64 = 1.36;

const DIAMETER_M: f64 = 0.2286;

/// The propeller turned by some degrees from its design, one flight point for each measured J at 6 036 rpm
/// and one at rest. The hub is not published: 0.15 R is usual. The chord inboard of 0.30 R is not published
/// either and is held.
///
/// # Panics
/// When the job made is refused.
#[must_use]
pub fn job(turn_deg: f64, n_crit: f64) -> Job {
    let stations: Vec<Value> = BLADE
        .iter()
        .map(|(x, c, beta, t)| {
            json!({
                "radius_fraction": x, "chord_m": c * DIAMETER_M / 2.0, "angle_deg": beta,
                "thickness_ratio": t, "section": "clark-y"
            })
        })
        .collect();
    let point = |name: String, rpm: f64, j: f64| {
        let airspeed_m_s = j * rpm / 60.0 * DIAMETER_M;
        json!({"name": name, "airspeed_m_s": airspeed_m_s, "setting": {"kind": "rpm", "rpm": rpm}})
    };
    let moving = MEASURED.iter().map(|m| point(format!("J {}", m.0), 6_036.0, m.0));
    let points: Vec<Value> = moving.chain([point("at rest".into(), 6_457.0, 0.0)]).collect();
    let document = json!({
        "spokeshave": 1,
        "propeller": {
            "blades": 2, "diameter_m": DIAMETER_M, "hub_diameter_m": 0.15 * DIAMETER_M, "stations": stations,
            "pitch_control": {"kind": "ground-adjustable", "turn_deg": turn_deg}
        },
        "flight_points": points,
        "method": {"n_crit": n_crit}
    });
    Job::from_json(&document.to_string()).expect("a valid job")
}
