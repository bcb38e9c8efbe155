//! Least induced loss against an independent implementation of the same published equations (Adkins and Liebeck 1994; see
//! `reference/README.md`).

use spokeshave::rig::rotation_rad_s;
use spokeshave::shape::adkins_liebeck::{Task, Wanted, design};
use spokeshave_tests::reference::{case, numbers};

fn near(what: &str, got: f64, expected: f64, rel: f64, abs: f64) {
    let allowed = (rel * expected.abs()).max(abs);
    assert!((got - expected).abs() <= allowed, "{what}: got {got}, expected {expected} ± {allowed}");
}

#[test]
fn validate_least_loss_adkins_liebeck() {
    let case = case("40_al_sample_power");
    let (given, answers) = (&case["inputs"], &case["answers"]);
    let input = |key: &str| given[key].as_f64().unwrap();
    let answer = |key: &str| answers[key].as_f64().unwrap();
    let (cl, eps) = (input("cl"), input("cd_over_cl"));
    let task = |wanted| Task {
        airspeed_m_s: input("V"),
        rotation_rad_s: rotation_rad_s(input("rpm")),
        radius_m: input("R"),
        hub_radius_m: input("r_hub"),
        blades: 2,
        density_kg_m3: input("rho"),
        wanted,
    };
    let found = design(task(Wanted::Power(input("power"))), |_| eps).unwrap();
    for (key, got) in [("zeta", found.zeta), ("Tc", found.tc), ("Pc", found.pc), ("eta", found.efficiency())]
    {
        near(key, got, answer(key), 1e-4, 0.0);
    }
    near("T", found.thrust_n(), answer("T"), 1e-4, 0.0);
    near("P", found.power_w(), answer("P"), 1e-6, 0.0);
    let fractions = numbers(&given["r_over_R"]);
    let columns: Vec<Vec<f64>> =
        ["chord", "phi_deg", "beta_deg", "a", "a_prime", "W", "F"].map(|k| numbers(&answers[k])).into();
    for (i, xi) in fractions.iter().enumerate() {
        let flow = found.flow(*xi, eps);
        let phi = flow.inflow_rad.to_degrees();
        let got = [
            flow.chord_lift_m / cl,
            phi,
            phi + input("alpha_design_deg"),
            flow.axial,
            flow.swirl,
            flow.speed_m_s,
            flow.loss,
        ];
        for (column, got) in columns.iter().zip(got) {
            near(&format!("at {xi}"), got, column[i], 5e-4, 1e-6);
        }
    }
    // The same propeller asked for by its thrust.
    let again = design(task(Wanted::Thrust(answer("T"))), |_| eps).unwrap();
    near("zeta by thrust", again.zeta, answer("zeta"), 1e-4, 0.0);
    let most = design(task(Wanted::Thrust(1e6)), |_| eps).unwrap_err().to_string();
    assert!(most.contains("cannot be had") && most.contains("at most about"), "{most}");
}
