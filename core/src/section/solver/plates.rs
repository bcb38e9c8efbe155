//! The boundary layer alone against exact and measured layers in given speeds.

use super::closure::{Gas, Kind, Point, props};
use super::dual::Dual;
use super::layer::{State, fixed};
use super::station::{Closing, Upstream, solve};

/// Marches a layer through stations with given speeds; the states, as far as the equations have a solution.
fn march(gas: &Gas, kind: Kind, start: State, stations: &[(f64, f64)]) -> Vec<State> {
    let mut states = vec![start];
    for pair in stations.windows(2) {
        let before = states[states.len() - 1];
        let closing = Closing::Law { c: 0.0, v: pair[1].1 };
        let guess = [before[0], before[1], before[2], pair[1].1];
        match solve(gas, kind, Upstream::Station(&before, pair[1].0 - pair[0].0), closing, &[guess]) {
            Some(state) => states.push(state),
            None => break,
        }
    }
    states
}

fn friction(gas: &Gas, kind: Kind, state: &State) -> f64 {
    props(gas, &fixed::<0>(state), kind).cf.v
}

/// Blasius (1908): `theta sqrt(Re_x)/x = cf sqrt(Re_x) = 0.6641`, `H = 2.591`.
#[test]
fn validate_plate_laminar_blasius() {
    let gas = Gas::new(1e6, 0.0);
    let stations: Vec<(f64, f64)> =
        (0..=60).map(|k| (0.01 * 100_f64.powf(f64::from(k) / 60.0), 1.0)).collect();
    let theta = 0.6641 * (0.01_f64 / 1e6).sqrt();
    // The start is 5 % wrong in shape: it must be forgotten.
    let states = march(&gas, Kind::Laminar, [theta, 2.46 * theta, 0.0, 1.0], &stations);
    let end = states[60];
    assert!((end[0] * 1e3 / 0.6641 - 1.0).abs() < 0.02, "theta {}", end[0] * 1e3);
    assert!((friction(&gas, Kind::Laminar, &end) * 1e3 / 0.6641 - 1.0).abs() < 0.02);
    assert!((end[1] / end[0] / 2.591 - 1.0).abs() < 0.01, "H {}", end[1] / end[0]);
}

/// Waves on a plate reach e^9 near `Re_x = 3e6`, van Ingen (1956), Smith and Gamberoni (1956).
#[test]
fn validate_plate_transition_by_growth() {
    let gas = Gas::new(6e6, 0.0);
    let stations: Vec<(f64, f64)> =
        (0..=160).map(|k| (0.01 * 100_f64.powf(f64::from(k) / 160.0), 1.0)).collect();
    let theta = 0.6641 * (0.01_f64 / 6e6).sqrt();
    let states = march(&gas, Kind::Laminar, [theta, 2.591 * theta, 0.0, 1.0], &stations);
    let at = states.iter().position(|s| s[2] >= 9.0).expect("transition on the plate");
    let re_x = 6e6 * stations[at].0;
    assert!((2.5e6..3.6e6).contains(&re_x), "{re_x}");
}

/// Karman-Schoenherr: `1/cf = 17.08 (log10 Re_theta)^2 + 25.11 log10 Re_theta + 6.012`, to 5 %.
#[test]
fn validate_plate_turbulent_karman_schoenherr() {
    let gas = Gas::new(2e7, 0.0);
    let stations: Vec<(f64, f64)> =
        (0..=120).map(|k| (0.01 * 100_f64.powf(f64::from(k) / 120.0), 1.0)).collect();
    let theta = 400.0 / 2e7;
    let mut checked = 0;
    for state in march(&gas, Kind::Turbulent, [theta, 1.5 * theta, 0.05, 1.0], &stations) {
        let re_theta: f64 = 2e7 * state[0];
        if re_theta > 2000.0 {
            let log = re_theta.log10();
            let measured = 1.0 / (17.08 * log * log + 25.11 * log + 6.012);
            let error = friction(&gas, Kind::Turbulent, &state) / measured - 1.0;
            assert!(error.abs() < 0.05, "Re_theta {re_theta}: {error}");
            checked += 1;
        }
    }
    assert!(checked > 20);
}

/// Falkner and Skan (1931), Hartree (1937): friction vanishes at `beta = -0.1988` with `H = 4.03`; stagnation
/// flow, `beta = 1`, has `H = 2.216`, `beta = -0.1` has `H = 2.802`. The closure is a fit: 5 % in H and 0.01
/// in beta at separation, 2 % in H elsewhere.
#[test]
fn validate_similar_flows_falkner_skan() {
    let gas = Gas::new(1e6, 0.0);
    let beta = |h: f64| {
        let point = Point {
            theta: Dual::<0>::constant(1e-3),
            dstar: Dual::constant(h * 1e-3),
            c: Dual::constant(0.0),
            u: Dual::constant(1.0),
        };
        let q = props(&gas, &point, Kind::Laminar);
        let (f, g) = (0.5 * q.cf.v, q.di.v);
        // u = x^m: (1-m)/2 + (2+H) m = f K, (1-H) m = (g-f) K
        let m = 0.5 * (g - f) / ((1.0 - h) * f - (g - f) * (1.5 + h));
        (2.0 * m / (m + 1.0), f)
    };
    let separation =
        (380..440).map(|k| f64::from(k) / 100.0).find(|&h| beta(h).1 <= 0.0).expect("separation");
    assert!((separation / 4.03 - 1.0).abs() < 0.05, "H {separation}");
    assert!((beta(separation).0 + 0.1988).abs() < 0.01, "beta {}", beta(separation).0);
    for (exact, wanted) in [(2.216, 1.0), (2.591, 0.0), (2.802, -0.1)] {
        // beta falls as H rises: the H of the closure at this beta.
        let h =
            (215..400).map(|k| 0.01 * f64::from(k)).find(|&h| beta(h).0 < wanted).expect("a similar flow");
        assert!((h / exact - 1.0).abs() < 0.02, "H {h} for beta {wanted}");
    }
}

/// Howarth (1938): in `u = 1 - x` the layer separates at `x = 0.1199`; to 5 %.
#[test]
fn validate_linear_retardation_howarth() {
    let gas = Gas::new(1e6, 0.0);
    let stations: Vec<(f64, f64)> = (4..=300).map(|k| 0.0005 * f64::from(k)).map(|x| (x, 1.0 - x)).collect();
    let theta = 0.6641 * (0.002_f64 / 1e6).sqrt();
    let states = march(&gas, Kind::Laminar, [theta, 2.6 * theta, 0.0, 0.998], &stations);
    let at = states.iter().position(|s| friction(&gas, Kind::Laminar, s) <= 0.0).unwrap_or(states.len() - 1);
    let x = stations[at].0;
    assert!((x / 0.1199 - 1.0).abs() < 0.05, "x {x}");
}
