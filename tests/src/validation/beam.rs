//! Vibration, moisture and torsion of blades against beam tables and the Handbook's own example.

use spokeshave::wood::at_moisture;
use spokeshave::wood::beam::Bending;

use crate::check::{Basis, Check, Mark};

const N: usize = 201;

fn radii(root: f64, tip: f64) -> Vec<f64> {
    (0..N).map(|i| root + (tip - root) * i as f64 / (N - 1) as f64).collect()
}

/// A figure that falls from 1 at the root to nothing at the tip with a power of the distance from the tip.
fn falling(power: i32) -> Vec<f64> {
    (0..N).map(|i| (1.0 - i as f64 / (N - 1) as f64).powi(power)).collect()
}

/// First and second frequency, rad/s, both out of the plane of rotation.
fn frequencies(radii_m: &[f64], mass_kg_m: &[f64], out_n_m2: &[f64], rotation_rad_s: f64) -> [f64; 2] {
    let modes = Bending { radii_m, mass_kg_m, out_n_m2, in_n_m2: None, rotation_rad_s }.modes(2);
    let out = modes.filter(|m| m.iter().all(|mode| (mode.out_share - 1.0).abs() < 1e-9));
    out.map_or([f64::NAN; 2], |m| [m[0].rad_s, m[1].rad_s])
}

const AT_REST: Basis = Basis {
    source: "uniform beam 3.5160, 22.034 (standard beam tables); wedge of constant width and cone, clamped \
             at the thick end, 5.315, 15.207 and 8.719, 21.146 (G. Kirchhoff 1879); times sqrt(E I0/(m0 \
             L⁴))",
    mark: Mark::FromMemory,
    why: "half a unit of the last figure and 200 elements",
};

/// Beams at rest.
pub(super) fn at_rest() -> Vec<Check> {
    let r = radii(0.0, 2.0);
    let cases = [
        ("uniform beam", 0, 0, [3.516_015, 22.034_49]),
        ("wedge", 1, 3, [5.315, 15.207]),
        ("cone", 2, 4, [8.719, 21.146]),
    ];
    let of = |(name, mass, stiffness, expected): (&str, i32, i32, [f64; 2])| {
        let got = frequencies(&r, &falling(mass), &falling(stiffness), 0.0).map(|f| 4.0 * f);
        [0, 1].map(|k| AT_REST.relative(format!("{name}, frequency {}", k + 1), got[k], expected[k], 3e-4))
    };
    cases.into_iter().flat_map(of).collect()
}

const SOUTHWELL: Basis = Basis {
    source: "R. V. Southwell and F. Gough, ARC R&M 766, 1921: ω² = ω0² + (1.193 + 1.571 r0/L) Ω² at small \
             speed",
    mark: Mark::FromMemory,
    why: "half a unit of the last figure: 0.1 %",
};

/// Turning slowly.
pub(super) fn southwell() -> Vec<Check> {
    let of = |root: f64| {
        let (r, one) = (radii(root, root + 1.0), falling(0));
        let square = |omega: f64| frequencies(&r, &one, &one, omega)[0].powi(2);
        let got = (square(0.05) - square(0.0)) / 0.05_f64.powi(2);
        SOUTHWELL.relative(format!("coefficient of a beam from {root} L"), got, 1.193 + 1.571 * root, 1e-3)
    };
    [0.0, 0.1, 0.5, 1.0].map(of).into()
}

const FAST: Basis = Basis {
    source: "A. D. Wright and others, J. Applied Mechanics 49, 1982: uniform beam clamped at the axis, \
             times sqrt(m L⁴/E I)",
    mark: Mark::FromMemory,
    why: "half a unit of the last figure: 2e-5",
};

/// Turning fast.
pub(super) fn turning_fast() -> Vec<Check> {
    let (r, one) = (radii(0.0, 1.0), falling(0));
    let rows = [(1.0, [3.6816, 22.1810]), (4.0, [5.5850, 24.2733]), (12.0, [13.1702, 37.6031])];
    let of = |(omega, expected): (f64, [f64; 2])| {
        let got = frequencies(&r, &one, &one, omega);
        [0, 1].map(|k| {
            FAST.relative(format!("frequency {} at rotation {omega}", k + 1), got[k], expected[k], 2e-5)
        })
    };
    rows.into_iter().flat_map(of).collect()
}

const HANDBOOK: Basis = Basis {
    source: "USDA Wood Handbook, FPL-GTR-190 (2010), chapter 5, example of equation 5-3: bending strength \
             of white ash at 8 % moisture",
    mark: Mark::Read,
    why: "half a unit of the last printed figure",
};

/// Strength and moisture.
pub(super) fn moisture() -> Vec<Check> {
    let got = at_moisture(103_000.0, 66_000.0, 24.0, 8.0);
    vec![HANDBOOK.within("white ash at 8 %", got, 119_500.0, 50.0).unit("kPa")]
}
