//! Sections of the user's own: tables and outlines.

use serde_json::{Value, json};

use super::refusal;

#[test]
fn wrong_tables_are_named_by_row() {
    let row = |a: f64, cl: f64, cd: f64| json!({"alpha_deg": a, "cl": cl, "cd": cd});
    let good: Vec<Value> = (0..6).map(|i| row(f64::from(i), 0.1 * f64::from(i), 0.01)).collect();
    let with = |points: Vec<Value>| json!([{"name": "own", "polars": [{"reynolds": 1e5, "points": points}]}]);
    let changed = |i: usize, p: Value| {
        let mut points = good.clone();
        points[i] = p;
        with(points)
    };
    let cases = [
        (with(vec![]), "sections[0].polars[0].points: 0 rows"),
        (changed(2, row(2.0, 0.2, -0.01)), "sections[0].polars[0].points[2].cd: -0.01"),
        (changed(2, row(0.5, 0.2, 0.01)), "sections[0].polars[0].points[2].alpha_deg: 0.5"),
        (changed(5, row(500.0, 0.2, 0.01)), "sections[0].polars[0].points[5].alpha_deg: 500"),
        (json!([{"name": "own", "polars": []}]), "sections[0].polars: 0"),
        (
            changed(2, json!({"alpha_deg": 2.0, "cl": "NaN", "cd": 0.01})),
            "sections[0].polars[0].points[2].cl",
        ),
    ];
    for (sections, expected) in cases {
        let message = refusal("/sections", sections);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}

#[test]
fn wrong_outlines_and_faces_of_own_sections_are_named() {
    let row = |i: u32| json!({"alpha_deg": i, "cl": 0.1 * f64::from(i), "cd": 0.01});
    let points: Vec<Value> = (0..6).map(row).collect();
    let with = |key: &str, value: Value| {
        let mut section = json!({"name": "own", "polars": [{"points": points}]});
        section[key] = value;
        json!([section])
    };
    let face = |t: f64, a: f64| json!({"thickness_ratio": t, "angle_deg": a});
    let both = {
        let mut sections = with("face_angle_deg", json!(2.0));
        sections[0]["face_angles"] = json!([face(0.1, 2.0)]);
        sections
    };
    let cases = [
        (
            with("outline", json!([[1.0, 0.0], [0.0, 0.0]])),
            "sections[0].outline: 2 points: 2 points: at least",
        ),
        (with("outline", json!([[1.0, 0.0, 3.0]])), "sections[0].outline[0]"),
        (with("outline", json!("round")), "sections[0].outline: invalid type"),
        (with("face_angles", json!([face(0.2, 2.0), face(0.1, 1.0)])), "face_angles[1].thickness_ratio: 0.1"),
        (with("face_angles", json!([face(0.1, 99.0)])), "sections[0].face_angles[0].angle_deg: 99"),
        (with("face_angles", json!([{"angle": 1}])), "sections[0].face_angles[0].angle: unknown field"),
        (both, "sections[0].face_angles: given beside face_angle_deg"),
        (with("shape", json!(1)), "sections[0].shape: unknown field"),
    ];
    for (sections, expected) in cases {
        let message = refusal("/sections", sections);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}
