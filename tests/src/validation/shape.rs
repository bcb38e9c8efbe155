//! Least induced loss against an independent implementation of the same published equations (see
//! `reference/README.md`).

use spokeshave::job::TipLoss;
use spokeshave::rig::rotation_rad_s;
use spokeshave::shape::adkins_liebeck::{Design, Task, Wanted, design};

use crate::check::{Basis, Check, Mark, worst};
use crate::goldstein::Goldstein;
use crate::reference::{ADKINS_LIEBECK, case, numbers};

const BASIS: Basis = Basis {
    source: ADKINS_LIEBECK,
    mark: Mark::Computed,
    why: "the same equations: what two ways of integrating differ by, figures 1e-4, power 1e-6 (it is what \
          was asked for), geometry 5e-4",
};

/// The case's propeller asked for by power, thrust, or whatever.
///
/// # Panics
/// When the case is not understood.
#[must_use]
pub fn task(wanted: Wanted) -> Task {
    let given = &case("40_al_sample_power")["inputs"];
    let input = |key: &str| given[key].as_f64().expect("a number");
    Task {
        airspeed_m_s: input("V"),
        rotation_rad_s: rotation_rad_s(input("rpm")),
        radius_m: input("R"),
        hub_radius_m: input("r_hub"),
        blades: 2,
        density_kg_m3: input("rho"),
        wanted,
        tip_loss: TipLoss::Prandtl,
    }
}

/// Figures and geometry of the sample propeller.
pub(super) fn least_loss() -> Vec<Check> {
    let case = case("40_al_sample_power");
    let (given, answers) = (&case["inputs"], &case["answers"]);
    let input = |key: &str| given[key].as_f64().expect("a number");
    let answer = |key: &str| answers[key].as_f64().expect("a number");
    let eps = input("cd_over_cl");
    let found = design(task(Wanted::Power(input("power"))), |_| eps).expect("a design");
    // The same propeller asked for by its thrust.
    let again = design(task(Wanted::Thrust(answer("T"))), |_| eps).expect("a design");
    let told = |key: &str, got, rel| BASIS.relative(key, got, answer(key), rel);
    let mut checks = vec![
        told("zeta", found.zeta, 1e-4),
        told("Tc", found.tc, 1e-4),
        told("Pc", found.pc, 1e-4),
        told("eta", found.efficiency(), 1e-4),
        told("T", found.thrust_n(), 1e-4).unit("N"),
        told("P", found.power_w(), 1e-6).unit("W"),
        BASIS.relative("zeta, asked for by thrust", again.zeta, answer("zeta"), 1e-4),
    ];
    let columns = [
        ("chord", "m"),
        ("phi_deg", "°"),
        ("beta_deg", "°"),
        ("a", ""),
        ("a_prime", ""),
        ("W", "m/s"),
        ("F", ""),
    ];
    for (k, (key, unit)) in columns.into_iter().enumerate() {
        let expected = numbers(&answers[key]);
        let one = |(xi, expected): (f64, f64)| {
            let got = geometry(&found, xi, eps, input("cl"), input("alpha_design_deg"))[k];
            BASIS.within(format!("at {xi:.3} R"), got, expected, (5e-4 * expected.abs()).max(1e-6)).unit(unit)
        };
        let rows = numbers(&given["r_over_R"]).into_iter().zip(expected).map(one).collect();
        checks.push(worst(&format!("{key} over the radius"), rows));
    }
    checks
}

const LIGHT: Basis = Basis {
    source: "S. Goldstein, On the Vortex Theory of Screw Propellers, Proc. Royal Society A 123 (1929), \
             solved anew in `tests/src/goldstein.rs`",
    mark: Mark::Computed,
    why: "what the program's table of his factor is held to, 0.001, and as much for a load that is light \
          but not nothing",
};

/// The circulation of designs for next to no thrust, over that of a propeller of very many blades:
/// Goldstein's factor.
pub(super) fn least_loss_goldstein() -> Vec<Check> {
    let propellers = [(2, 0.2), (2, 0.4), (3, 0.3), (4, 0.25)];
    let each = propellers.into_iter().map(|(blades, lambda)| {
        let exact = Goldstein::new(blades, lambda);
        let (airspeed_m_s, radius_m) = (40.0, 0.8);
        let task = Task {
            airspeed_m_s,
            rotation_rad_s: airspeed_m_s / (lambda * radius_m),
            radius_m,
            hub_radius_m: 0.0,
            blades,
            density_kg_m3: 1.2,
            wanted: Wanted::Thrust(1.0),
            tip_loss: TipLoss::Goldstein,
        };
        let found = design(task, |_| 0.0).expect("a design");
        let at = |xi: f64| {
            let flow = found.flow(xi, 0.0);
            let circulation = 0.5 * flow.speed_m_s * flow.chord_lift_m;
            let mu = xi / lambda;
            let wake = 2.0 * std::f64::consts::PI * found.zeta * airspeed_m_s * airspeed_m_s;
            let share =
                f64::from(blades) * circulation * task.rotation_rad_s / wake * (1.0 + mu * mu) / (mu * mu);
            LIGHT.within(format!("at {xi:.2} R"), share, exact.factor(xi), 0.002)
        };
        let rows = [0.5, 0.6, 0.7, 0.8, 0.9, 0.95].map(at).into();
        worst(&format!("circulation over the radius, {blades} blades, λ {lambda}"), rows)
    });
    each.collect()
}

/// Chord, inflow and blade angle, the two factors, speed and loss at a fraction of the radius.
fn geometry(found: &Design, xi: f64, eps: f64, cl: f64, alpha_deg: f64) -> [f64; 7] {
    let flow = found.flow(xi, eps);
    let phi = flow.inflow_rad.to_degrees();
    [flow.chord_lift_m / cl, phi, phi + alpha_deg, flow.axial, flow.swirl, flow.speed_m_s, flow.loss]
}
