//! Blade-element momentum against an independent implementation of the same equations (see `reference/README.md`).

use serde_json::Value;
use spokeshave::air::Air;
use spokeshave::report::station;
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::rotor::element::{Blend, Element};
use spokeshave::rotor::loss::Ends;
use spokeshave::rotor::{Coefficients, Condition};
use spokeshave::section::{About, Family, Local, Situation};
use spokeshave_tests::reference::{case, job, section};

fn near(what: &str, got: f64, expected: f64, rel: f64, abs: f64) {
    let allowed = (rel * expected.abs()).max(abs);
    assert!((got - expected).abs() <= allowed, "{what}: got {got}, expected {expected} ± {allowed}");
}

fn number(v: &Value) -> f64 {
    v.as_f64().expect("a number")
}

/// The case's density belongs to sea level, whose standard air differs from it by less than 1e-6.
fn condition(inputs: &Value) -> Condition {
    let mut air = Air::standard(0.0, 0.0).unwrap();
    air.density_kg_m3 = number(&inputs["rho"]);
    Condition {
        air,
        airspeed_m_s: number(&inputs["V"]),
        rotation_rad_s: rotation_rad_s(number(&inputs["rpm"])),
        turn_rad: 0.0,
    }
}

#[test]
fn whole_propellers_agree() {
    for name in ["13_wood2_V40_2400", "20_uav3_static_6000"] {
        let case = case(name);
        let rig = Rig::new(&job(&case["inputs"])).unwrap();
        let at = condition(&case["inputs"]);
        let loads = rig.rotor.loads(&at);
        let c = Coefficients::new(&loads, &at, 2.0 * rig.rotor.blade.radius_m);
        let (answers, tolerance) = (&case["answers"], &case["tolerance"]);
        let limit =
            |key: &str| (number(&tolerance[key]["rel"]), tolerance[key]["abs"].as_f64().unwrap_or(0.0));
        let (rel, abs) = limit("CT");
        near(&format!("{name} CT"), c.ct, number(&answers["CT"]), rel, abs);
        let (rel, abs) = limit("CP");
        near(&format!("{name} CP"), c.cp, number(&answers["CP"]), rel, abs);
        if let Some(eta) = answers["eta"].as_f64() {
            near(&format!("{name} eta"), c.efficiency.unwrap(), eta, limit("eta").0, 0.0);
        }
        check_stations(name, &rig, &at, &case);
    }
}

fn check_stations(name: &str, rig: &Rig, at: &Condition, case: &Value) {
    let stations = case["answers"]["stations"].as_array().unwrap();
    let limits = &case["tolerance"]["station"];
    let largest = |key: &str| stations.iter().map(|s| number(&s[key]).abs()).fold(0.0, f64::max);
    for (i, s) in stations.iter().enumerate() {
        let got = station(&rig.rotor, &rig.rotor.ring(number(&s["r_m"])), at);
        let what = |key: &str| format!("{name} station {i} {key}");
        let figures = [
            ("phi_deg", got.inflow_angle_deg),
            ("alpha_deg", got.angle_of_attack_deg),
            ("cl", got.cl),
            ("cd", got.cd),
            ("F", got.loss_factor),
            ("a_prime", got.swirl_factor),
        ];
        for (key, figure) in figures {
            near(&what(key), figure.unwrap(), number(&s[key]), 0.0, number(&limits[key]));
        }
        if let Some(a) = s["a"].as_f64() {
            near(&what("a"), got.axial_factor.unwrap(), a, 0.0, number(&limits["a"]));
        }
        near(&what("dT_dr"), got.thrust_n_per_m, number(&s["dT_dr"]), 0.0, 0.01 * largest("dT_dr"));
        near(&what("dQ_dr"), got.torque_n_m_per_m, number(&s["dQ_dr"]), 0.0, 0.01 * largest("dQ_dr"));
        if let Some(departure) = case["answers"]["departure_deg"].get(i) {
            // The optimum is flat and the table linear in the reference: 0.1° as the method's note says.
            near(&what("departure"), got.departure_deg.unwrap(), number(&departure["value"]), 0.0, 0.1);
        }
    }
}

#[test]
fn single_stations_agree() {
    let case = case("05_stations_normal");
    let tables =
        serde_json::from_value::<spokeshave::job::Section>(section(&case["inputs"]["polar"])).unwrap();
    let family = Family::new(About::default(), &tables.polars).unwrap();
    let situation = Situation { thickness_ratio: 0.1, reynolds: 1e6, mach: 0.0, stall_delay: 0.0 };
    let inputs = case["inputs"]["list"].as_array().unwrap();
    let answers = case["answers"].as_array().unwrap();
    assert_eq!(inputs.len(), answers.len());
    for (given, expected) in inputs.iter().zip(answers) {
        let g = |key: &str| number(&given[key]);
        let (r, b, turning) = (g("r"), g("blades"), g("Omega") * g("r"));
        let solidity = b * g("chord") / (std::f64::consts::TAU * r);
        let element = Element {
            axial_m_s: g("V"),
            turning_m_s: turning,
            angle_rad: g("beta_deg").to_radians(),
            solidity,
            ends: Ends::new(b, r, g("R"), g("r_hub"), true),
            section: Blend::new(Local::new(&family, situation), None),
        };
        let got = element.balance().unwrap();
        let (cn, ct) = got.normal_and_tangential();
        let head = 0.5 * g("rho") * got.speed_m_s.powi(2) * g("chord") * b;
        let name = given["name"].as_str().unwrap();
        let e = |key: &str| number(&expected[key]);
        near(&format!("{name} phi"), got.inflow_rad.to_degrees(), e("phi_deg"), 0.0, 0.01);
        near(&format!("{name} alpha"), got.alpha_rad.to_degrees(), e("alpha_deg"), 0.0, 0.01);
        near(&format!("{name} W"), got.speed_m_s, e("W"), 0.001, 0.0);
        near(&format!("{name} u"), got.induced_axial_m_s, e("u"), 0.002, 0.01);
        near(&format!("{name} v"), got.induced_swirl_m_s, e("v"), 0.002, 0.01);
        near(&format!("{name} F"), got.loss, e("F"), 0.0, 0.002);
        near(&format!("{name} dT/dr"), head * cn, e("dT_dr"), 0.003, 0.05);
        near(&format!("{name} dQ/dr"), head * ct * r, e("dQ_dr"), 0.003, 0.02);
        assert_eq!(got.windmill_brake, expected["buhl"].as_bool().unwrap(), "{name} windmill brake");
    }
}
