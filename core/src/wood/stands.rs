//! Where the sections' centroids stand beside the radius through the axis.

use super::BladeBeam;
use super::beam::Offset;

impl BladeBeam {
    /// Offsets of the centroids at the radii, m, forward and against the turning, the blades turned by
    /// `beyond_rad` besides the angles kept here. The stacking line and what stands on it turn with the
    /// blade; the lean does not.
    pub(super) fn offsets_m(&self, beyond_rad: f64) -> [Vec<f64>; 2] {
        let turn = (self.turn_rad + beyond_rad).sin_cos();
        let all: Vec<[f64; 2]> =
            (0..self.radii_m.len()).map(|i| self.offset_m(i, turn, beyond_rad)).collect();
        [0, 1].map(|k| all.iter().map(|o| o[k]).collect())
    }

    fn offset_m(&self, i: usize, (sin, cos): (f64, f64), beyond_rad: f64) -> [f64; 2] {
        let r = self.radii_m[i];
        let [along, ahead] = self.line.at(r);
        let (mut forward, mut against) = (along * sin + ahead * cos, ahead * sin - along * cos);
        if let Some(fraction) = self.line.fraction {
            let [x, up] = self.sections[i].centroid_m;
            let behind = x - fraction * self.chords_m[i];
            let (s, c) = (self.angles_rad[i] + beyond_rad).sin_cos();
            forward += up * c - behind * s;
            against += behind * c + up * s;
        }
        [forward + self.line.lean * r, against]
    }

    /// The blade with its offsets at a speed of rotation.
    pub(super) fn offset<'a>(&'a self, offsets_m: &'a [Vec<f64>; 2], rotation_rad_s: f64) -> Offset<'a> {
        Offset {
            radii_m: &self.radii_m,
            mass_kg_m: &self.mass_kg_m,
            rotation_rad_s,
            forward_m: &offsets_m[0],
            against_m: &offsets_m[1],
        }
    }
}
