//! Closed forms.

use std::f64::consts::FRAC_PI_2;

use super::*;

const N: usize = 201;

fn radii(root: f64, tip: f64) -> Vec<f64> {
    (0..N).map(|i| root + (tip - root) * i as f64 / (N - 1) as f64).collect()
}

fn even() -> Vec<f64> {
    vec![1.0; N]
}

fn near(what: &str, got: f64, expected: f64, rel: f64) {
    assert!((got - expected).abs() <= rel * expected.abs(), "{what}: {got}, expected {expected}");
}

fn beam<'a>(
    radii_m: &'a [f64],
    mass_kg_m: &'a [f64],
    out_n_m2: &'a [f64],
    rotation_rad_s: f64,
) -> Bending<'a> {
    Bending { radii_m, mass_kg_m, out_n_m2, in_n_m2: None, rotation_rad_s }
}

#[test]
fn in_the_plane_of_rotation_the_square_is_less_by_that_of_the_rotation() {
    let (r, one, none) = (radii(0.1, 1.1), even(), vec![0.0; N]);
    let both = Bending { in_n_m2: Some([&one, &none]), ..beam(&r, &one, &one, 3.0) };
    let (two, out) = (both.modes(2).unwrap(), beam(&r, &one, &one, 3.0).modes(1).unwrap()[0].rad_s);
    near("in", two[0].rad_s.powi(2), out.powi(2) - 9.0, 1e-9);
    near("out", two[1].rad_s, out, 1e-9);
    assert!(two[0].out_share < 1e-9 && two[1].out_share > 1.0 - 1e-9);
}

#[test]
fn a_turned_section_vibrates_in_its_own_axes() {
    // Second moments 1 and 4, turned by 30°: the modes stay those of 1 and 4.
    let (s, c) = 30_f64.to_radians().sin_cos();
    let r = radii(0.0, 1.0);
    let of = |v: f64| vec![v; N];
    let (out, inside, both) = (of(c * c + 4.0 * s * s), of(s * s + 4.0 * c * c), of(3.0 * s * c));
    let one = of(1.0);
    let turned = Bending { in_n_m2: Some([&inside, &both]), ..beam(&r, &one, &out, 0.0) };
    let modes = turned.modes(2).unwrap();
    near("soft", modes[0].rad_s, 3.516_015, 1e-6);
    near("hard", modes[1].rad_s, 2.0 * 3.516_015, 1e-6);
    near("share", modes[0].out_share, c * c, 1e-6);
}

#[test]
fn deflection_under_an_even_load_is_that_of_the_beam_tables() {
    let (r, one, none) = (radii(0.3, 2.3), even(), vec![0.0; N]);
    let (ei, q) = (vec![5.0; N], vec![0.7; N]);
    let tip = beam(&r, &one, &ei, 0.0).deflection_m([&q, &one], [&none, &none]).unwrap()[N - 1];
    near("tip", tip[0], 0.7 * 16.0 / (8.0 * 5.0), 1e-9);
    assert_eq!(tip[1], 0.0);
    let turning = beam(&r, &one, &ei, 2.0).deflection_m([&q, &one], [&none, &none]).unwrap()[N - 1][0];
    assert!(turning < 0.7 * tip[0]);
}

/// A beam without stiffness of its own, turning, is a string: whatever its offset, it ends on the radius
/// through its root.
#[test]
fn a_soft_beam_is_pulled_straight() {
    let (r, one, none) = (radii(0.3, 2.3), even(), vec![0.0; N]);
    let soft = vec![1e-5; N];
    let bowed: Vec<f64> = r.iter().map(|x| 0.04 * (x - 0.3).powi(2)).collect();
    let both = Bending { in_n_m2: Some([&soft, &none]), ..beam(&r, &one, &soft, 10.0) };
    let bent = both.deflection_m([&none, &none], [&bowed, &bowed]).unwrap();
    near("out", bent[N - 1][0], -bowed[N - 1], 5e-3);
    near("in", bent[N - 1][1], -bowed[N - 1], 5e-3);
}

/// `N = ½ m Ω² (R² − r²)` of an even mass; `M = ½ q (R − r)²` of an even load.
#[test]
fn tension_and_bending_of_an_even_beam() {
    let r = radii(0.2, 1.2);
    let (m, q) = (vec![2.0; N], vec![3.0; N]);
    for (i, (n, b)) in tension_n(&r, &m, 10.0).into_iter().zip(bending_n_m(&r, &q)).enumerate() {
        near("N", n, 100.0 * (1.44 - r[i] * r[i]), 1e-9);
        near("M", b, 1.5 * (1.2 - r[i]).powi(2), 1e-9);
    }
    near("mass", total(&r, &m), 2.0, 1e-12);
    near("moment", first_moment(&r, &m), 1.44 - 0.04, 1e-12);
    near("inertia", second_moment(&r, &m), 2.0 / 3.0 * (1.728 - 0.008), 1e-12);
}

/// Even bar: `ω = π/2 sqrt(G J/i)/L`, tip twist `½ τ L²/(G J)` (standard tables); turning, held by `c = i Ω²`
/// as a thin section at no angle is, `ω² = ω0² + Ω²` but for the tension.
#[test]
fn twist_and_frequency_of_an_even_bar() {
    let (r, one) = (radii(0.0, 2.0), even());
    let (small, none) = (vec![1e-6; N], vec![0.0; N]);
    let (stiff, hold) = (vec![3.0; N], vec![1e-6 * 100.0; N]);
    let bar = Twisting {
        radii_m: &r,
        mass_kg_m: &one,
        stiffness_n_m2: &stiff,
        gyration_m2: &small,
        hold_n: &none,
        rotation_rad_s: 0.0,
    };
    let rest = bar.frequencies_rad_s(1).unwrap()[0];
    near("rest", rest, FRAC_PI_2 * (3.0 / 1e-6_f64).sqrt() / 2.0, 1e-4);
    near("tip", bar.twist_rad(&one, &none, &none).unwrap()[N - 1], 0.5 * 4.0 / 3.0, 1e-9);
    // The same load as the moment it adds up to.
    let carried: Vec<f64> = r.iter().map(|x| 2.0 - x).collect();
    near("carried", bar.twist_rad(&none, &carried, &none).unwrap()[N - 1], 0.5 * 4.0 / 3.0, 1e-9);
    let held = Twisting { hold_n: &hold, ..bar }.frequencies_rad_s(1).unwrap()[0];
    near("held", held.powi(2) - rest.powi(2), 100.0, 1e-5);
    // Tension untwists: a bar of no torsional stiffness of its own straightens out.
    let soft = vec![1e-9; N];
    let angle: Vec<f64> = r.iter().map(|x| -0.2 * x).collect();
    let slack = Twisting { stiffness_n_m2: &soft, gyration_m2: &small, rotation_rad_s: 100.0, ..bar };
    let twist = slack.twist_rad(&none, &none, &angle).unwrap();
    near("half way", twist[N / 2], 0.2, 1e-3);
}
