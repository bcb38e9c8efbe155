//! Mass, tension, bending and flap frequency against an independent implementation of the same equations (see `reference/README.md`).
//!
//! Every case of the folder whose kind begins with `wood.` is read; what it asks for is known by the names of its answers.

use serde_json::Value;
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::wood::beam::{Bending, bending_n_m, first_moment, second_moment, tension_n, total};
use spokeshave::wood::{Carried, strength};
use spokeshave_tests::reference::{case, numbers};
use spokeshave_tests::wood_case::{WoodCase, spread};

fn near(what: &str, got: f64, expected: f64, rel: f64) {
    assert!(
        (got - expected).abs() <= rel * expected.abs(),
        "{what}: got {got}, expected {expected} within {rel}"
    );
}

/// Every case of kind `wood.…` in the folder.
fn cases() -> Vec<(String, Value)> {
    let folder = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("reference");
    let files = std::fs::read_dir(folder).expect("the folder of reference cases").filter_map(Result::ok);
    let names = files.filter_map(|f| f.file_name().to_str()?.strip_suffix(".json").map(String::from));
    let all = names.map(|name| (name.clone(), case(&name)));
    all.filter(|(_, c)| c["kind"].as_str().is_some_and(|k| k.starts_with("wood."))).collect()
}

/// Figures of a case by the names of its answers: one number, or one for each radius asked for.
fn figures(inputs: &Value, key: &str) -> Option<Vec<f64>> {
    let blade = WoodCase::new(inputs);
    let (r, m) = (&blade.radii_m, &blade.mass_kg_m);
    let omega = rotation_rad_s(inputs["rpm"].as_f64().unwrap_or(0.0));
    let asked = inputs["r"].as_array().map(|_| numbers(&inputs["r"])).unwrap_or_default();
    let at_asked = |values: Vec<f64>| Some(asked.iter().map(|x| blade.at(&values, *x)).collect());
    let by_section = |of: &dyn Fn(usize) -> f64| at_asked((0..r.len()).map(of).collect());
    match key {
        "mass_one_blade" => Some(vec![total(r, m)]),
        "inertia_one_blade" => Some(vec![second_moment(r, m)]),
        "centre_of_gravity" => Some(vec![first_moment(r, m) / total(r, m)]),
        "tension" => at_asked(tension_n(r, m, omega)),
        "stress_axial" => {
            let n = tension_n(r, m, omega);
            by_section(&|i| n[i] / blade.section(i).area_m2)
        }
        "A" => by_section(&|i| blade.section(i).area_m2),
        "I_flat" => by_section(&|i| blade.section(i).flat_m4),
        "I_edge" => by_section(&|i| blade.section(i).edge_m4),
        "MT" | "MQ" | "M_T" | "M_Q" | "M_flat" | "M_edge" | "sigma" | "stress" | "stress_max" => {
            bending(inputs, &blade, omega, key).and_then(at_asked)
        }
        "flap_rad_s" | "omega" | "omega1" => flap(inputs, &blade).map(|f| vec![f]),
        "flap_hz" | "frequency_hz" | "f1_hz" => flap(inputs, &blade).map(|f| vec![f / std::f64::consts::TAU]),
        _ => None,
    }
}

/// Moments of one blade and the stress at the corners, from thrust and torque per metre.
fn bending(inputs: &Value, blade: &WoodCase, omega: f64, key: &str) -> Option<Vec<f64>> {
    let list = ["r_load", "r"].iter().find_map(|k| inputs[*k].as_array().map(|_| numbers(&inputs[*k])))?;
    let r = &blade.radii_m;
    let thrust = spread(&inputs["dT_dr"], &list, r);
    let torque = spread(&inputs["dQ_dr"], &list, r);
    let forward: Vec<f64> = thrust.iter().map(|t| t / blade.blades).collect();
    let against: Vec<f64> = torque.iter().zip(r).map(|(q, r)| q / r / blade.blades).collect();
    let (mt, mq) = (bending_n_m(r, &forward), bending_n_m(r, &against));
    let n = tension_n(r, &blade.mass_kg_m, omega);
    let of = |i: usize| {
        let (s, c) = blade.angles_rad[i].sin_cos();
        let carried = Carried {
            tension_n: n[i],
            flat_n_m: mt[i] * c + mq[i] * s,
            edge_n_m: mq[i] * c - mt[i] * s,
            ..Carried::default()
        };
        match key {
            "MT" | "M_T" => mt[i],
            "MQ" | "M_Q" => mq[i],
            "M_flat" => carried.flat_n_m,
            "M_edge" => -carried.edge_n_m,
            _ => carried.stresses(&blade.shape, blade.chords_m[i], blade.thickness_ratios[i]).tension_pa,
        }
    };
    Some((0..r.len()).map(of).collect())
}

fn flap(inputs: &Value, blade: &WoodCase) -> Option<f64> {
    let stiffness: Vec<f64> =
        (0..blade.radii_m.len()).map(|i| blade.modulus_pa * blade.section(i).flat_m4).collect();
    let beam = Bending {
        radii_m: &blade.radii_m,
        mass_kg_m: &blade.mass_kg_m,
        out_n_m2: &stiffness,
        in_n_m2: None,
        rotation_rad_s: rotation_rad_s(inputs["rpm"].as_f64().unwrap_or(0.0)),
    };
    Some(beam.modes(1)?[0].rad_s)
}

#[test]
fn validate_wood_independent_implementation() {
    let all = cases();
    assert!(!all.is_empty());
    for (name, case) in all {
        let rel = case["tolerance"]["rel"].as_f64().unwrap_or(0.005);
        for (key, expected) in case["answers"].as_object().expect("answers") {
            let expected = if expected.is_array() {
                numbers(expected)
            } else {
                vec![expected.as_f64().expect("a number")]
            };
            let got =
                figures(&case["inputs"], key).unwrap_or_else(|| panic!("{name}: {key} is not understood"));
            assert_eq!(got.len(), expected.len(), "{name} {key}");
            for (i, (g, e)) in got.into_iter().zip(expected).enumerate() {
                // What is computed by exact integrals of the same blade needs far less than the case allows.
                near(&format!("{name} {key} {i}"), g, e, rel.min(1e-4));
            }
        }
    }
}

/// The same blade as a job: stations, a section without an outline, a material of one's own.
#[test]
fn a_job_gives_the_same_mass_and_tension() {
    let case = case("70_wood_mass_tension");
    let (inputs, answers) = (&case["inputs"], &case["answers"]);
    let rig = Rig::new(&WoodCase::new(inputs).job(inputs)).expect("a valid job");
    let sheet = strength(&rig).expect("a known material");
    let rel = case["tolerance"]["rel"].as_f64().expect("a tolerance");
    near("mass", sheet.mass.blade_kg, answers["mass_one_blade"].as_f64().unwrap(), rel);
    near("inertia", sheet.mass.blade_inertia_kg_m2, answers["inertia_one_blade"].as_f64().unwrap(), rel);
    let (tension, stress, area) =
        (numbers(&answers["tension"]), numbers(&answers["stress_axial"]), numbers(&answers["A"]));
    for (i, r) in numbers(&inputs["r"]).into_iter().enumerate() {
        let nearest =
            sheet.stations.iter().min_by(|a, b| (a.radius_m - r).abs().total_cmp(&(b.radius_m - r).abs()));
        let station = nearest.expect("stations");
        assert!((station.radius_m - r).abs() < 1e-6, "{r}");
        near(&format!("area at {r}"), station.area_m2, area[i], rel);
        near(&format!("tension at {r}"), station.tension_n.unwrap(), tension[i], rel);
        near(&format!("stress at {r}"), station.axial_pa.unwrap(), stress[i], rel);
    }
}
