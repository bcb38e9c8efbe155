//! Twisting: angle under load, and natural frequencies.
//!
//! Straight elements: `K = ∫ (G J + N kA²) φ′² + c φ² dx`, `M = ∫ i φ² dx`. `N kA²`, with `kA² = Ip/A`, is
//! what tension adds to a twisting bar, and `−∫ N kA² β′ φ′ dx` how it untwists a bar of angle β(r) (J. C.
//! Houbolt and G. W. Brooks, NACA Report 1346, 1958; from memory). `c` is how much the centrifugal
//! twisting moment grows with the angle. Left out: warping, coupling with bending.

use super::banded::Banded;
use super::figures::{ELEMENTS, Tension, at, element_m, points};
use super::modes::lowest;

/// A bar in torsion, clamped at the root.
#[derive(Clone, Copy, Debug)]
pub struct Twisting<'a> {
    /// Radii from root to tip, m.
    pub radii_m: &'a [f64],
    /// Mass per metre, kg/m.
    pub mass_kg_m: &'a [f64],
    /// Stiffness G J, N m².
    pub stiffness_n_m2: &'a [f64],
    /// Square of the radius of gyration of the section about the radial line, `Ip/A`, m².
    pub gyration_m2: &'a [f64],
    /// Moment per metre and radian that holds the section in its angle, N m/(m rad).
    pub hold_n: &'a [f64],
    /// Speed of rotation, rad/s.
    pub rotation_rad_s: f64,
}

impl Twisting<'_> {
    /// Twist at the radii, rad, under a twisting moment per metre, N m/m, a twisting moment carried besides,
    /// N m, and the tension on a bar of angle `angle_rad`. `None` where the bar does not stand.
    #[must_use]
    pub fn twist_rad(&self, moment_n: &[f64], carried_n_m: &[f64], angle_rad: &[f64]) -> Option<Vec<f64>> {
        let (stiffness, _) = self.matrices();
        let (length, root) = (element_m(self.radii_m), self.radii_m[0]);
        let tension = Tension::new(self.radii_m, self.mass_kg_m, self.rotation_rad_s);
        let angle = |node: usize| at(self.radii_m, angle_rad, root + node as f64 * length);
        let mut load = vec![0.0; ELEMENTS];
        for (e, s, x, weight) in points(self.radii_m) {
            let figure = |values: &[f64]| at(self.radii_m, values, x);
            let (moment, slope) = (figure(moment_n), (angle(e + 1) - angle(e)) / length);
            let untwist = (tension.at(x) * figure(self.gyration_m2) * slope - figure(carried_n_m)) / length;
            if e > 0 {
                load[e - 1] += weight * (moment * (1.0 - s) + untwist);
            }
            load[e] += weight * (moment * s - untwist);
        }
        let solved = stiffness.factored()?.solve(&load);
        let nodes: Vec<f64> = (0..=ELEMENTS).map(|i| root + i as f64 * length).collect();
        let values: Vec<f64> = std::iter::once(0.0).chain(solved).collect();
        Some(self.radii_m.iter().map(|r| at(&nodes, &values, *r)).collect())
    }

    /// The lowest natural frequencies, rad/s. `None` where the bar does not stand.
    #[must_use]
    pub fn frequencies_rad_s(&self, count: usize) -> Option<Vec<f64>> {
        let (stiffness, mass) = self.matrices();
        Some(lowest(&stiffness, &mass, ELEMENTS, count)?.into_iter().map(|mode| mode.0).collect())
    }

    fn matrices(&self) -> (Banded, Banded) {
        let (mut stiffness, mut inertia) = (Banded::new(ELEMENTS, 1), Banded::new(ELEMENTS, 1));
        let length = element_m(self.radii_m);
        let tension = Tension::new(self.radii_m, self.mass_kg_m, self.rotation_rad_s);
        for (e, s, x, weight) in points(self.radii_m) {
            let figure = |values: &[f64]| at(self.radii_m, values, x);
            let square = figure(self.gyration_m2);
            let bar = (figure(self.stiffness_n_m2) + tension.at(x) * square) / length.powi(2);
            let (hold, own) = (figure(self.hold_n), figure(self.mass_kg_m) * square);
            let value = [1.0 - s, s];
            let slope = [-1.0, 1.0];
            for (a, b) in [(0, 0), (1, 0), (1, 1)] {
                let (Some(i), Some(j)) = ((e + a).checked_sub(1), (e + b).checked_sub(1)) else { continue };
                stiffness.add(i, j, weight * (bar * slope[a] * slope[b] + hold * value[a] * value[b]));
                inertia.add(i, j, weight * own * value[a] * value[b]);
            }
        }
        (stiffness, inertia)
    }
}
