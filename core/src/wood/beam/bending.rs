//! Bending out of the plane of rotation and in it: deflection under load, and natural frequencies.
//!
//! Hermite's cubic beam elements (Euler and Bernoulli's beam; O. C. Zienkiewicz, *The Finite Element Method*;
//! from memory), root clamped, tip free: `K = ∫ EI w″² + N w′² dx`, in the plane of rotation less `Ω² ∫ m w²
//! dx`, `M = ∫ m w² dx`, `N(r) = Ω² ∫_r^R m x dx`. The stiffening of a turning blade is that of R. V.
//! Southwell and F. Gough, ARC R&M 766, 1921: `ω² = ω0² + Ks Ω²`. Left out: shear, rotary inertia, Coriolis'
//! force.

use super::banded::Banded;
use super::figures::{ELEMENTS, Tension, at, element_m, points, slope};
use super::modes::lowest;

/// A beam in bending.
#[derive(Clone, Copy, Debug)]
pub struct Bending<'a> {
    /// Radii from root to tip, m.
    pub radii_m: &'a [f64],
    /// Mass per metre, kg/m.
    pub mass_kg_m: &'a [f64],
    /// Bending stiffness out of the plane of rotation, N m².
    pub out_n_m2: &'a [f64],
    /// Bending stiffness in the plane of rotation, and what couples the two, N m²; `None` for out of the
    /// plane alone.
    pub in_n_m2: Option<[&'a [f64]; 2]>,
    /// Speed of rotation, rad/s.
    pub rotation_rad_s: f64,
}

/// A natural mode of bending.
#[derive(Clone, Debug, PartialEq)]
pub struct BendingMode {
    /// Frequency, rad/s.
    pub rad_s: f64,
    /// Share of the energy of motion that is out of the plane of rotation.
    pub out_share: f64,
}

/// Values and second derivatives (times the length squared) of the four cubics at a place along an element.
fn cubics(s: f64) -> ([f64; 4], [f64; 4], [f64; 4]) {
    let value =
        [1.0 - s * s * (3.0 - 2.0 * s), s * (1.0 - s).powi(2), s * s * (3.0 - 2.0 * s), s * s * (s - 1.0)];
    let slope = [6.0 * s * (s - 1.0), (1.0 - s) * (1.0 - 3.0 * s), 6.0 * s * (1.0 - s), s * (3.0 * s - 2.0)];
    let bend = [12.0 * s - 6.0, 6.0 * s - 4.0, 6.0 - 12.0 * s, 6.0 * s - 2.0];
    (value, slope, bend)
}

impl Bending<'_> {
    /// Deflection out of the plane of rotation and in it, m, at the radii, under loads per metre, N/m, and
    /// from offsets of the unloaded beam, m, in the same two directions: tension pulls those straight,
    /// `−∫ N w0′ w′ + Ω² m w0 w dx` (the last in the plane of rotation alone). `None` where the beam does not
    /// stand.
    #[must_use]
    pub fn deflection_m(&self, loads_n_m: [&[f64]; 2], offsets_m: [&[f64]; 2]) -> Option<Vec<[f64; 2]>> {
        let (stiffness, _) = self.matrices();
        let mut load = vec![0.0; self.size()];
        let length = element_m(self.radii_m);
        let tension = Tension::new(self.radii_m, self.mass_kg_m, self.rotation_rad_s);
        for (e, s, x, weight) in points(self.radii_m) {
            let (value, slopes, _) = cubics(s);
            let figure = |values: &[f64]| at(self.radii_m, values, x);
            let outward = figure(self.mass_kg_m) * self.rotation_rad_s.powi(2) * figure(offsets_m[1]);
            for plane in 0..self.planes() {
                let pull = tension.at(x) * slope(self.radii_m, offsets_m[plane], x) / length;
                let q = figure(loads_n_m[plane]) + if plane == 1 { outward } else { 0.0 };
                for k in 0..4 {
                    if let Some(i) = self.unknown(e, plane, k) {
                        load[i] += (q * value[k] - pull * slopes[k]) * lever(k, length) * weight;
                    }
                }
            }
        }
        let solved = stiffness.factored()?.solve(&load);
        Some(self.radii_m.iter().map(|r| [0, 1].map(|plane| self.value(&solved, plane, *r))).collect())
    }

    /// The lowest natural modes. `None` where the beam does not stand.
    #[must_use]
    pub fn modes(&self, count: usize) -> Option<Vec<BendingMode>> {
        let (stiffness, mass) = self.matrices();
        let found = lowest(&stiffness, &mass, self.size(), count)?;
        let mode = |(rad_s, x): (f64, Vec<f64>)| {
            let per_node = 2 * self.planes();
            let out: Vec<f64> =
                x.iter().enumerate().map(|(i, v)| if i % per_node < 2 { *v } else { 0.0 }).collect();
            let share = out.iter().zip(mass.times(&out)).map(|(a, b)| a * b).sum();
            BendingMode { rad_s, out_share: share }
        };
        Some(found.into_iter().map(mode).collect())
    }

    fn planes(&self) -> usize {
        if self.in_n_m2.is_some() { 2 } else { 1 }
    }

    fn size(&self) -> usize {
        2 * self.planes() * ELEMENTS
    }

    /// Index of an element's unknown in a plane: deflection and slope at its near end (0, 1) and far end (2,
    /// 3); none at the clamped root.
    fn unknown(&self, element: usize, plane: usize, k: usize) -> Option<usize> {
        let node = (element + k / 2).checked_sub(1)?;
        Some((node * self.planes() + plane) * 2 + k % 2)
    }

    /// Stiffness and mass.
    fn matrices(&self) -> (Banded, Banded) {
        let half = 4 * self.planes() - 1;
        let (mut stiffness, mut mass) = (Banded::new(self.size(), half), Banded::new(self.size(), half));
        let length = element_m(self.radii_m);
        let tension = Tension::new(self.radii_m, self.mass_kg_m, self.rotation_rad_s);
        for (e, s, x, weight) in points(self.radii_m) {
            let point = Point { value: cubics(s), length, weight };
            let figure = |values: &[f64]| at(self.radii_m, values, x);
            let (n, m) = (tension.at(x), figure(self.mass_kg_m));
            let out = [figure(self.out_n_m2), n, 0.0];
            self.put(&mut stiffness, e, [0, 0], &point, out);
            self.put(&mut mass, e, [0, 0], &point, [0.0, 0.0, m]);
            if let Some([inside, both]) = self.in_n_m2 {
                let softer = -m * self.rotation_rad_s.powi(2);
                self.put(&mut stiffness, e, [1, 1], &point, [figure(inside), n, softer]);
                self.put(&mut stiffness, e, [0, 1], &point, [figure(both), 0.0, 0.0]);
                self.put(&mut mass, e, [1, 1], &point, [0.0, 0.0, m]);
            }
        }
        (stiffness, mass)
    }

    /// Adds `bend w″ w″ + pull w′ w′ + own w w` of two planes at a point.
    fn put(
        &self,
        into: &mut Banded,
        element: usize,
        planes: [usize; 2],
        p: &Point,
        [bend, pull, own]: [f64; 3],
    ) {
        let (value, slope, curve) = p.value;
        for a in 0..4 {
            for b in 0..4 {
                let places = (self.unknown(element, planes[0], a), self.unknown(element, planes[1], b));
                let (Some(i), Some(j)) = places else { continue };
                // The mirror image is kept once within a plane; between planes every pair counts.
                if planes[0] == planes[1] && j > i {
                    continue;
                }
                let lever = lever(a, p.length) * lever(b, p.length) * p.weight;
                let bent = bend * curve[a] * curve[b] / p.length.powi(4);
                let pulled = pull * slope[a] * slope[b] / p.length.powi(2);
                into.add(i, j, lever * (bent + pulled + own * value[a] * value[b]));
            }
        }
    }

    fn value(&self, solved: &[f64], plane: usize, radius_m: f64) -> f64 {
        if plane >= self.planes() {
            return 0.0;
        }
        let length = element_m(self.radii_m);
        let along = (radius_m - self.radii_m[0]) / length;
        let e = (along.max(0.0) as usize).min(ELEMENTS - 1);
        let (value, ..) = cubics(along - e as f64);
        (0..4).filter_map(|k| Some(solved[self.unknown(e, plane, k)?] * value[k] * lever(k, length))).sum()
    }
}

/// A Gauss point of an element.
struct Point {
    value: ([f64; 4], [f64; 4], [f64; 4]),
    length: f64,
    weight: f64,
}

/// Slopes are unknowns per metre, the cubics per element.
fn lever(k: usize, length: f64) -> f64 {
    if k % 2 == 1 { length } else { 1.0 }
}
