//! Prandtl's factor against Goldstein's exact circulation, light load.

use spokeshave::rotor::loss::Ends;

use crate::check::{Basis, Check, Mark};
use crate::goldstein::Goldstein;

const PRANDTL: Basis = Basis {
    source: "S. Goldstein, On the Vortex Theory of Screw Propellers, Proc. Roy. Soc. A 123, 1929: its \
             potential problem solved anew by finite volumes on two grids (tests/src/goldstein.rs); factor \
             = B Γ Ω/(2π V w) (1 + μ²)/μ² with μ = Ω r/V, λ = V/(Ω R) of the wake",
    mark: Mark::Computed,
    why: "0.05: where the factor is near 1, the air at a station is turned by 5 % more or less, 0.1 to \
          0.15° of the 2 to 3° of a climb, as exact as departures are told",
};
const SHEETS: &str = "Prandtl takes the sheets behind the blades for flat ones that run on without end on \
                      one side of their edge: true where the gap between them is small beside the radius, \
                      that is for fine pitch or many blades. Elsewhere F is too large, and the air that a \
                      station meets is computed as turned too little, by that share of the turning. The \
                      job may ask for Goldstein's factor";

/// Where the two are compared.
pub const FRACTIONS: [f64; 4] = [0.5, 0.7, 0.9, 0.95];
/// Blades and wake advance ratios.
pub const CASES: [(u32, f64); 6] = [(2, 0.1), (2, 0.2), (2, 0.4), (4, 0.1), (4, 0.2), (4, 0.4)];

/// Prandtl's factor, as the rotor uses it, at a fraction of the radius.
#[must_use]
pub fn prandtl(blades: u32, advance: f64, fraction: f64) -> f64 {
    let ends = Ends::new(f64::from(blades), fraction, 1.0, 0.0, false);
    ends.factor(advance / advance.hypot(fraction))
}

/// Two and four blades, at the advance of fine, usual and fast propellers (λ = J/π).
pub(super) fn prandtl_by_goldstein() -> Vec<Check> {
    let of = |(blades, advance): (u32, f64)| {
        let exact = Goldstein::new(blades, advance);
        FRACTIONS.map(|x| {
            let what = format!("Prandtl's F, {blades} blades, λ {advance}, {x} R");
            let check = PRANDTL.within(what, prandtl(blades, advance, x), exact.factor(x), 0.05);
            if MISSES.contains(&(blades, advance, x)) { check.misses(SHEETS) } else { check }
        })
    };
    CASES.into_iter().flat_map(of).collect()
}

/// Where Prandtl's factor is farther off.
const MISSES: &[(u32, f64, f64)] = &[
    (2, 0.2, 0.5),
    (2, 0.2, 0.7),
    (2, 0.4, 0.5),
    (2, 0.4, 0.7),
    (2, 0.4, 0.9),
    (2, 0.4, 0.95),
    (4, 0.4, 0.5),
    (4, 0.4, 0.7),
    (4, 0.4, 0.9),
];

const TABLE: Basis = Basis {
    source: "S. Goldstein 1929, as above, between the places of the core's table",
    mark: Mark::Computed,
    why: "what leading over between the table's places may cost: too little to be seen in thrust or power",
};

/// The factor that the core offers beside Prandtl's, where its table has no entry.
pub(super) fn the_core_by_goldstein() -> Vec<Check> {
    let of = |(blades, advance): (u32, f64)| {
        let exact = Goldstein::new(blades, advance);
        [0.45, 0.7, 0.88, 0.94].map(|x| core_at(&exact, blades, advance, x))
    };
    [
        (2, 0.07),
        (2, 0.14),
        (2, 0.28),
        (2, 0.55),
        (3, 0.14),
        (3, 0.28),
        (4, 0.28),
        (6, 0.55),
        (1, 0.14),
        (5, 0.2),
        (12, 0.3),
    ]
    .into_iter()
    .flat_map(of)
    .chain(INBOARD.map(|(blades, advance, x)| {
        core_at(&Goldstein::new(blades, advance), blades, advance, x).misses(ROWS)
    }))
    .collect()
}

/// Blades, wake advance ratio and place where the core's table is farther off.
const INBOARD: [(u32, f64, f64); 6] =
    [(1, 0.55, 0.25), (2, 0.08, 0.15), (2, 0.17, 0.25), (2, 0.3, 0.25), (3, 0.23, 0.25), (2, 1.1, 0.35)];
const ROWS: &str = "inboard of 0.45 R the share bends more between the table's rows, a tenth of the radius \
                    apart, than the cubic over them follows; the nearer to the axis the more";

/// The core's factor at one place.
fn core_at(exact: &Goldstein, blades: u32, advance: f64, x: f64) -> Check {
    let ends = Ends::new(f64::from(blades), x, 1.0, 0.0, false).exact_at_tip(blades, x);
    let plural = if blades == 1 { "" } else { "s" };
    let what = format!("Goldstein's F, {blades} blade{plural}, λ {advance}, {x} R");
    TABLE.within(what, ends.factor(advance / advance.hypot(x)), exact.factor(x), 0.001)
}

const KNOWN: Basis = Basis {
    source: "S. Goldstein 1929, as above, by another solution on a grid: B Γ Ω/(2π V w) at λ 0.2, two \
             blades 0.7707, 0.7470, 0.5199 and four 0.8479, 0.8866, 0.7104 at 0.5, 0.7, 0.9 R",
    mark: Mark::Computed,
    why: "two grids of different kinds, each good to about 0.0005",
};

/// The exact circulation that Prandtl's factor is held against.
pub(super) fn goldstein_twice() -> Vec<Check> {
    let rows = [(2, [0.7707, 0.7470, 0.5199]), (4, [0.8479, 0.8866, 0.7104])];
    let of = |(blades, expected): (u32, [f64; 3])| {
        let exact = Goldstein::new(blades, 0.2);
        [0, 1, 2].map(|k| {
            let x = [0.5, 0.7, 0.9][k];
            let mu: f64 = x / 0.2;
            let got = exact.factor(x) * mu * mu / (1.0 + mu * mu);
            KNOWN.within(
                format!("Goldstein's function, {blades} blades, λ 0.2, {x} R"),
                got,
                expected[k],
                0.001,
            )
        })
    };
    rows.into_iter().flat_map(of).collect()
}
