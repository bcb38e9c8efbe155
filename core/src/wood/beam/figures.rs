//! Figures along a beam, straight between radii, as its finite elements ask for them.

use super::integrate::tension_n;

/// Elements of a beam, all of one length.
pub(super) const ELEMENTS: usize = 40;
/// Gauss and Legendre's four points on −1 to 1, with their weights.
pub(super) const GAUSS: [(f64, f64); 4] = [
    (-0.861_136_311_594_052_6, 0.347_854_845_137_453_85),
    (-0.339_981_043_584_856_26, 0.652_145_154_862_546_1),
    (0.339_981_043_584_856_26, 0.652_145_154_862_546_1),
    (0.861_136_311_594_052_6, 0.347_854_845_137_453_85),
];

/// Value at `x` of a figure that runs straight between the radii; held outside.
pub(crate) fn at(radii_m: &[f64], values: &[f64], x: f64) -> f64 {
    let last = radii_m.len() - 1;
    let above = radii_m.partition_point(|r| *r <= x).clamp(1, last);
    let (a, b) = (above - 1, above);
    let share = ((x - radii_m[a]) / (radii_m[b] - radii_m[a])).clamp(0.0, 1.0);
    values[a] + share * (values[b] - values[a])
}

/// Slope at `x` of a figure that runs straight between the radii; that of the last piece outside.
pub(super) fn slope(radii_m: &[f64], values: &[f64], x: f64) -> f64 {
    let b = radii_m.partition_point(|r| *r <= x).clamp(1, radii_m.len() - 1);
    (values[b] - values[b - 1]) / (radii_m[b] - radii_m[b - 1])
}

/// Tension at any radius, exact for a mass that runs straight between the radii.
pub(super) struct Tension<'a> {
    radii_m: &'a [f64],
    mass_kg_m: &'a [f64],
    square: f64,
    at_radii_n: Vec<f64>,
}

impl<'a> Tension<'a> {
    pub(super) fn new(radii_m: &'a [f64], mass_kg_m: &'a [f64], rotation_rad_s: f64) -> Self {
        let at_radii_n = tension_n(radii_m, mass_kg_m, rotation_rad_s);
        Self { radii_m, mass_kg_m, square: rotation_rad_s.powi(2), at_radii_n }
    }

    pub(super) fn at(&self, x: f64) -> f64 {
        let b = self.radii_m.partition_point(|r| *r <= x).clamp(1, self.radii_m.len() - 1);
        let end = self.radii_m[b];
        let here = [x, end];
        let mass = [at(self.radii_m, self.mass_kg_m, x), self.mass_kg_m[b]];
        self.at_radii_n[b] + self.square * super::integrate::first_moment(&here, &mass)
    }
}

/// Gauss points of the beam's elements: index of the element, place along it from 0 to 1, radius (m) and
/// weight (m).
pub(super) fn points(radii_m: &[f64]) -> impl Iterator<Item = (usize, f64, f64, f64)> {
    let (root, length) = (radii_m[0], element_m(radii_m));
    (0..ELEMENTS).flat_map(move |e| {
        GAUSS.into_iter().map(move |(t, weight)| {
            let along = 0.5 * (1.0 + t);
            (e, along, root + (e as f64 + along) * length, 0.5 * weight * length)
        })
    })
}

/// Length of an element, m.
pub(super) fn element_m(radii_m: &[f64]) -> f64 {
    (radii_m[radii_m.len() - 1] - radii_m[0]) / ELEMENTS as f64
}
