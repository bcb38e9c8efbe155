//! Mass, tension, bending and flap frequency against an independent implementation of the same equations
//! (see `reference/README.md`).
//!
//! Every case of the folder whose kind begins with `wood.` is read; what it asks for is known by the names
//! of its answers.

use serde_json::Value;
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::wood::beam::{Bending, bending_n_m, first_moment, second_moment, tension_n, total};
use spokeshave::wood::{Carried, strength};

use crate::check::{Basis, Check, Mark, worst};
use crate::reference::{INDEPENDENT, case, numbers};
use crate::wood_case::{WoodCase, spread};

const BASIS: Basis = Basis {
    source: INDEPENDENT,
    mark: Mark::Computed,
    why: "exact integrals of the same blade: what is left are the straight pieces between 601 radii",
};
const AS_JOB: Basis = Basis {
    why: "a job's stations: the blade is read off a smooth curve through 41 of them and more, of which \
          half a thousandth comes; 0.1 %",
    ..BASIS
};

/// How near the figures of a job come, as a share of each.
const SHARE: f64 = 1e-3;

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

/// The blade of every case as arrays.
pub(super) fn arrays() -> Vec<Check> {
    let all = cases();
    assert!(!all.is_empty(), "the folder has cases of wood");
    all.iter().flat_map(|(name, case)| answers(name, case)).collect()
}

fn answers(name: &str, case: &Value) -> Vec<Check> {
    let column = |(key, expected): (&String, &Value)| {
        let expected =
            if expected.is_array() { numbers(expected) } else { vec![expected.as_f64().expect("a number")] };
        let got = figures(&case["inputs"], key).unwrap_or_else(|| panic!("{name}: {key} is not understood"));
        assert_eq!(got.len(), expected.len(), "{name} {key}");
        let one = |(i, (got, expected))| BASIS.relative(format!("radius {i}"), got, expected, 1e-4);
        let column = got.into_iter().zip(expected).enumerate().map(one).collect();
        worst(&format!("reference blade, {key}"), column)
    };
    case["answers"].as_object().expect("answers").iter().map(column).collect()
}

/// The same blade as a job: stations, a section without an outline, a material of one's own.
pub(super) fn as_a_job() -> Vec<Check> {
    let case = case("70_wood_mass_tension");
    let (inputs, answers) = (&case["inputs"], &case["answers"]);
    let rig = Rig::new(&WoodCase::new(inputs).job(inputs)).expect("a valid job");
    let sheet = strength(&rig).expect("a known material");
    let number = |key: &str| answers[key].as_f64().expect("a number");
    let radii = numbers(&inputs["r"]);
    let station = |r: f64| {
        let found = sheet.stations.iter().find(|s| (s.radius_m - r).abs() < 1e-6);
        found.unwrap_or_else(|| panic!("no station at {r}"))
    };
    let column = |what: &str, unit, expected: Vec<f64>, got: &[Option<f64>]| {
        let one = |((r, expected), got): ((&f64, f64), &Option<f64>)| {
            AS_JOB.relative(format!("at {r} m"), got.unwrap_or(f64::NAN), expected, SHARE).unit(unit)
        };
        worst(&format!("as a job, {what}"), radii.iter().zip(expected).zip(got).map(one).collect())
    };
    let stations: Vec<_> = radii.iter().map(|r| station(*r)).collect();
    let of = |f: &dyn Fn(usize) -> Option<f64>| (0..radii.len()).map(f).collect::<Vec<_>>();
    let mass = sheet.mass.blade_kg;
    vec![
        AS_JOB.relative("as a job, mass", mass, number("mass_one_blade"), SHARE).unit("kg"),
        AS_JOB
            .relative("as a job, inertia", sheet.mass.blade_inertia_kg_m2, number("inertia_one_blade"), SHARE)
            .unit("kg m²"),
        column("area", "m²", numbers(&answers["A"]), &of(&|i| Some(stations[i].area_m2))),
        column("tension", "N", numbers(&answers["tension"]), &of(&|i| stations[i].tension_n)),
        column("stress", "Pa", numbers(&answers["stress_axial"]), &of(&|i| stations[i].axial_pa)),
    ]
}
