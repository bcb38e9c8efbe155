//! Blade-element momentum against an independent implementation of the same equations (see
//! `reference/README.md`).

use serde_json::Value;
use spokeshave::air::Air;
use spokeshave::report::station;
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::rotor::element::{Balance, Blend, Element};
use spokeshave::rotor::loss::Ends;
use spokeshave::rotor::{Coefficients, Condition};
use spokeshave::section::{About, Family, Local, Situation};

use crate::check::{Basis, Check, Mark, worst};
use crate::reference::{INDEPENDENT, case, job, section};

const BASIS: Basis = Basis {
    source: INDEPENDENT,
    mark: Mark::Computed,
    why: "the same equations, its polar being a formula and ours a table of it: figures of the whole \
          propeller, whose elements are its own, 0.1 %; loads of a station 0.05 % of the largest, angles \
          0.01°, lift 0.001, drag 0.0001, factors 0.0005; departures 0.02°: the best of lift over drag is flat",
};

const SINGLE: Basis = Basis {
    why: "the same equations, the polar a table of straight pieces in both: what two ways to the root leave, \
          angles 0.001°, the speed 1e-5, the rest 5e-4",
    ..BASIS
};

/// How near a whole propeller's figures come, as a share of each.
const WHOLE: f64 = 1e-3;
/// How near a load of a station comes, as a share of the largest.
const LOAD: f64 = 5e-4;

fn number(v: &Value) -> f64 {
    v.as_f64().expect("a number")
}

/// The case's density belongs to sea level, whose standard air differs from it by less than 1e-6.
fn condition(inputs: &Value) -> Condition {
    let mut air = Air::standard(0.0, 0.0).expect("sea level");
    air.density_kg_m3 = number(&inputs["rho"]);
    Condition {
        air,
        airspeed_m_s: number(&inputs["V"]),
        rotation_rad_s: rotation_rad_s(number(&inputs["rpm"])),
        turn_rad: 0.0,
    }
}

/// A check by a share and by an amount, whichever is more.
fn near(basis: &Basis, what: String, got: Option<f64>, expected: &Value, rel: f64, abs: f64) -> Check {
    let expected = number(expected);
    basis.within(what, got.unwrap_or(f64::NAN), expected, (rel * expected.abs()).max(abs))
}

/// Two whole propellers, in flight and at rest, and their stations.
pub(super) fn whole_propellers() -> Vec<Check> {
    let cases = [
        ("13_wood2_V40_2400", "2 blades, 40 m/s, 2400 rpm"),
        ("20_uav3_static_6000", "3 blades, at rest, 6000 rpm"),
    ];
    cases.into_iter().flat_map(|(case, name)| whole_propeller(case, name)).collect()
}

fn whole_propeller(file: &str, name: &str) -> Vec<Check> {
    let case = case(file);
    let rig = Rig::new(&job(&case["inputs"])).expect("a valid job");
    let at = condition(&case["inputs"]);
    let c = Coefficients::new(&rig.rotor.loads(&at), &at, 2.0 * rig.rotor.blade.radius_m);
    let answers = &case["answers"];
    let told = |key: &str, got| near(&BASIS, format!("{name}: {key}"), got, &answers[key], WHOLE, 0.0);
    let mut checks = vec![told("CT", Some(c.ct)), told("CP", Some(c.cp))];
    if answers["eta"].is_number() {
        checks.push(told("eta", c.efficiency));
    }
    checks.extend(stations(name, &rig, &at, &case));
    checks
}

/// A figure of a station: its name in the case, what we get, its unit, how near it comes.
type Figure = (&'static str, Option<f64>, &'static str, f64);

fn figures(rig: &Rig, at: &Condition, radius_m: f64, largest: &dyn Fn(&str) -> f64) -> [Figure; 9] {
    let got = station(&rig.rotor, &rig.rotor.ring(radius_m), at);
    [
        ("phi_deg", got.inflow_angle_deg, "°", 0.01),
        ("alpha_deg", got.angle_of_attack_deg, "°", 0.01),
        ("cl", got.cl, "", 1e-3),
        ("cd", got.cd, "", 1e-4),
        ("F", got.loss_factor, "", 5e-4),
        ("a_prime", got.swirl_factor, "", 5e-4),
        ("a", got.axial_factor, "", 5e-4),
        ("dT_dr", Some(got.thrust_n_per_m), "N/m", LOAD * largest("dT_dr")),
        ("dQ_dr", Some(got.torque_n_m_per_m), "N m/m", LOAD * largest("dQ_dr")),
    ]
}

fn stations(name: &str, rig: &Rig, at: &Condition, case: &Value) -> Vec<Check> {
    let stations = case["answers"]["stations"].as_array().expect("stations");
    let largest = |key: &str| stations.iter().map(|s| number(&s[key]).abs()).fold(0.0, f64::max);
    let mut columns: Vec<(&str, Vec<Check>)> = Vec::new();
    let mut departures = Vec::new();
    for (i, s) in stations.iter().enumerate() {
        let radius_m = number(&s["r_m"]);
        for (key, got, unit, limit) in figures(rig, at, radius_m, &largest) {
            // At rest there is no axial factor.
            if key == "a" && !s[key].is_number() {
                continue;
            }
            let check = near(&BASIS, format!("r {radius_m:.3} m"), got, &s[key], 0.0, limit).unit(unit);
            match columns.iter_mut().find(|c| c.0 == key) {
                Some(column) => column.1.push(check),
                None => columns.push((key, vec![check])),
            }
        }
        if let Some(departure) = case["answers"]["departure_deg"].get(i) {
            let got = station(&rig.rotor, &rig.rotor.ring(radius_m), at).departure_deg;
            departures.push(
                near(&BASIS, format!("r {radius_m:.3} m"), got, &departure["value"], 0.0, 0.02).unit("°"),
            );
        }
    }
    if !departures.is_empty() {
        columns.push(("departure", departures));
    }
    columns
        .into_iter()
        .map(|(key, column)| worst(&format!("{name}: {key} of the stations"), column))
        .collect()
}

fn element<'f>(g: &dyn Fn(&str) -> f64, family: &'f Family, situation: Situation) -> Element<'f> {
    let (r, b) = (g("r"), g("blades"));
    Element {
        axial_m_s: g("V"),
        turning_m_s: g("Omega") * r,
        angle_rad: g("beta_deg").to_radians(),
        solidity: b * g("chord") / (std::f64::consts::TAU * r),
        ends: Ends::new(b, r, g("R"), g("r_hub"), true),
        section: Blend::new(Local::new(family, situation), None),
    }
}

/// Single stations of all kinds of flow, with whether each is in the windmill brake state.
///
/// # Panics
/// When the case is not understood, or a station has no balance.
#[must_use]
pub fn balances() -> Vec<(Value, Value, Balance)> {
    let case = case("05_stations_normal");
    let tables: spokeshave::job::Section =
        serde_json::from_value(section(&case["inputs"]["polar"])).expect("a section");
    let family = Family::new(About::default(), &tables.polars).expect("a family");
    let situation = Situation { thickness_ratio: 0.1, reynolds: 1e6, mach: 0.0, stall_delay: 0.0 };
    let list = |v: &Value| v.as_array().expect("a list").clone();
    let (inputs, answers) = (list(&case["inputs"]["list"]), list(&case["answers"]));
    assert_eq!(inputs.len(), answers.len());
    let found = |(given, expected): (Value, Value)| {
        let balance = element(&|key| number(&given[key]), &family, situation).balance().expect("a balance");
        (given, expected, balance)
    };
    inputs.into_iter().zip(answers).map(found).collect()
}

/// The figures of [`balances`].
pub(super) fn single_stations() -> Vec<Check> {
    let all = balances();
    let column = |key: &'static str, unit: &'static str, rel, abs, of: &dyn Fn(&Value, &Balance) -> f64| {
        let one = |(given, expected, balance): &(Value, Value, Balance)| {
            let name = given["name"].as_str().expect("a name");
            near(&SINGLE, name.into(), Some(of(given, balance)), &expected[key], rel, abs).unit(unit)
        };
        worst(&format!("single stations, {key}"), all.iter().map(one).collect())
    };
    let head = |g: &Value, b: &Balance| {
        0.5 * number(&g["rho"]) * b.speed_m_s.powi(2) * number(&g["chord"]) * number(&g["blades"])
    };
    let torque = |g: &Value, b: &Balance| head(g, b) * b.normal_and_tangential().1 * number(&g["r"]);
    vec![
        column("phi_deg", "°", 0.0, 1e-3, &|_, b| b.inflow_rad.to_degrees()),
        column("alpha_deg", "°", 0.0, 1e-3, &|_, b| b.alpha_rad.to_degrees()),
        column("W", "m/s", 1e-5, 0.0, &|_, b| b.speed_m_s),
        column("u", "m/s", 5e-4, 0.0, &|_, b| b.induced_axial_m_s),
        column("v", "m/s", 5e-4, 0.0, &|_, b| b.induced_swirl_m_s),
        column("F", "", 0.0, 5e-4, &|_, b| b.loss),
        column("dT_dr", "N/m", 5e-4, 0.0, &|g, b| head(g, b) * b.normal_and_tangential().0),
        column("dQ_dr", "N m/m", 5e-4, 0.0, &torque),
    ]
}
