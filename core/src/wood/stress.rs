//! Stress of a section under tension, bending about both axes, shear and torsion.

use super::bent::Bent;
use super::loads::BladeLoads;
use super::section::{Section, Shape};
use super::{BladeBeam, Place};

/// What a section carries.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Carried {
    /// Tension along the blade, N.
    pub tension_n: f64,
    /// Moment that bends the blade towards its back, N m: `MT cos β + MQ sin β`.
    pub flat_n_m: f64,
    /// Moment that bends the blade towards its trailing edge, N m: `MQ cos β − MT sin β`.
    pub edge_n_m: f64,
    /// Force across the blade, N.
    pub shear_n: f64,
    /// Twisting moment, N m.
    pub twisting_n_m: f64,
}

/// Greatest stresses of a section, Pa.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Stresses {
    /// Greatest pull along the blade; 0 where nothing is pulled.
    pub tension_pa: f64,
    /// Greatest pressure along the blade; 0 where nothing is pressed.
    pub compression_pa: f64,
    /// Greatest shear.
    pub shear_pa: f64,
}

impl Carried {
    /// What a place of the blade carries under loads, the blades turned by `turn_rad` besides the drawing.
    pub(super) fn at(
        beam: &BladeBeam,
        loads: &BladeLoads,
        bent: &Bent,
        place: &Place,
        turn_rad: f64,
    ) -> Self {
        let i = place.index;
        let (mt, mq) = (bent.forward_n_m[i], bent.against_n_m[i]);
        let (s, c) = (beam.angles_rad[i] + turn_rad).sin_cos();
        let twisting = super::beam::total(&beam.radii_m[i..], &loads.twisting_n[i..]);
        Self {
            tension_n: loads.tension_n[i],
            flat_n_m: mt * c + mq * s,
            edge_n_m: mq * c - mt * s,
            shear_n: loads.across_n[0][i].hypot(loads.across_n[1][i]),
            twisting_n_m: twisting + loads.offset_twisting_n_m[i],
        }
    }

    /// Greatest stresses of a section of a chord (m) and thickness ratio.
    ///
    /// Along the blade `σ = N/A − (a ξ + b η)` at every point of the rim, where a and b follow from both
    /// moments and the section's second moments, product included (unsymmetric bending; S. Timoshenko,
    /// *Strength of Materials*; from memory). Shear `3/2 V/A + |T| t/J`: a rectangle's and a slender
    /// section's, added as if they met.
    #[must_use]
    pub fn stresses(&self, shape: &Shape, chord_m: f64, thickness_ratio: f64) -> Stresses {
        let section = shape.sized(chord_m, thickness_ratio);
        let thickness_m = chord_m * thickness_ratio;
        let mean = self.tension_n / section.area_m2;
        let [a, b] = self.curvatures(&section);
        let mut s = Stresses::default();
        for [x, y] in &shape.rim {
            let here = mean - (a * x * chord_m + b * y * thickness_m);
            s.tension_pa = s.tension_pa.max(here);
            s.compression_pa = s.compression_pa.max(-here);
        }
        s.shear_pa =
            1.5 * self.shear_n / section.area_m2 + self.twisting_n_m.abs() * thickness_m / section.torsion_m4;
        s
    }

    /// Growth of pressure along the chord and across it, Pa/m.
    fn curvatures(&self, s: &Section) -> [f64; 2] {
        let whole = s.edge_m4 * s.flat_m4 - s.product_m4 * s.product_m4;
        [
            (self.edge_n_m * s.flat_m4 - self.flat_n_m * s.product_m4) / whole,
            (self.flat_n_m * s.edge_m4 - self.edge_n_m * s.product_m4) / whole,
        ]
    }
}
