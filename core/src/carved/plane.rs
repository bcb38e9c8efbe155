//! A section under the plane: what wood taken off face, back and edges makes of angle, chord and thickness.
//!
//! The face is planed flat from a depth `d` at the leading to a depth `e` at the trailing edge. Over the
//! chord `c` the face then turns by `atan((d − e)/c)`, leading edge up for `d > e`, and at the share `x` of
//! the chord the section loses `d (1 − x) + e x` of its height over the face. The greatest thickness is the
//! greatest height left. Where less is left than the height of the thinner edge, the edge is gone and the
//! chord is shorter: planing at a thin trailing edge costs chord at once, planing at a round leading edge
//! only past the nose. Wood off the back thins the section and keeps face and edges. What is left is taken as
//! the family's section of the new thickness, chord and face: the tables know no other.

use crate::section::outline::Outline;

/// Heights along the chord.
const PLACES: usize = 81;

/// Height of the back over the flat face along the chord, in thicknesses.
#[derive(Clone, Debug, PartialEq)]
pub struct Profile {
    height: Vec<f64>,
}

/// One section on the bench.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Slab {
    /// Angle of the flat face, rad.
    pub face_rad: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Greatest thickness, m.
    pub thickness_m: f64,
}

/// Depths of wood taken off, m, none below zero.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Cuts {
    /// Off the face at the leading edge, falling to nothing at the trailing edge.
    pub face_leading_m: f64,
    /// Off the face at the trailing edge, falling to nothing at the leading edge.
    pub face_trailing_m: f64,
    /// Off the back at the thickest place.
    pub back_m: f64,
    /// Off the trailing edge.
    pub trailing_edge_m: f64,
}

impl Profile {
    /// The back of an outline over its face; `None` without a flat face.
    #[must_use]
    pub fn new(outline: &Outline) -> Option<Self> {
        let face = outline.face()?;
        let (sin, cos) = face.angle_rad.sin_cos();
        let upper: Vec<[f64; 2]> = outline
            .upper_side()
            .iter()
            .map(|p| {
                let y = p[1] - face.height_at_nose;
                [p[0] * cos + y * sin, y * cos - p[0] * sin]
            })
            .collect();
        let (first, last) = (upper.first()?[0], upper.last()?[0]);
        let at = |k: usize| {
            let x = first + (last - first) * k as f64 / (PLACES - 1) as f64;
            let j = upper.partition_point(|p| p[0] <= x).clamp(1, upper.len() - 1);
            let (a, b) = (upper[j - 1], upper[j]);
            a[1] + (b[1] - a[1]) * ((x - a[0]) / (b[0] - a[0]).max(1e-12)).clamp(0.0, 1.0)
        };
        let height: Vec<f64> = (0..PLACES).map(at).collect();
        let most = height.iter().copied().fold(0.0, f64::max);
        (most > 0.0).then(|| Self { height: height.iter().map(|h| h.max(0.0) / most).collect() })
    }

    /// A profile by heights at even places from the leading to the trailing edge, the greatest of them 1;
    /// `None` for fewer than two.
    #[cfg(test)]
    #[must_use]
    pub fn by_heights(height: Vec<f64>) -> Option<Self> {
        (height.len() > 1 && height.iter().all(|h| (0.0..=1.0).contains(h))).then_some(Self { height })
    }

    /// What cuts leave of a section; a chord or thickness of 0 when nothing is left.
    #[must_use]
    pub fn cut(&self, slab: Slab, cuts: &Cuts) -> Slab {
        let last = (self.height.len() - 1) as f64;
        let (d, e) = (cuts.face_leading_m, cuts.face_trailing_m);
        let left = |k: usize| {
            let x = k as f64 / last;
            slab.thickness_m * self.height[k] - d * (1.0 - x) - e * x
        };
        let ends = self.height[0].min(self.height[self.height.len() - 1]);
        let edge_m = slab.thickness_m * ends - 1e-9;
        let over = |k: &usize| left(*k) >= edge_m;
        let all = 0..self.height.len();
        let (Some(first), Some(end)) = (all.clone().find(over), all.rev().find(over)) else {
            return Slab { chord_m: 0.0, thickness_m: 0.0, ..slab };
        };
        // Between the last place that is gone and the first that stands the height runs straight.
        let part = |gone: usize, stands: usize| (left(stands) - edge_m) / (left(stands) - left(gone));
        let front = if first > 0 { part(first - 1, first) } else { 0.0 };
        let back = if end + 1 < self.height.len() { part(end + 1, end) } else { 0.0 };
        let share = ((end - first) as f64 + front + back) / last;
        let most = (first..=end).map(left).fold(0.0, f64::max);
        Slab {
            face_rad: slab.face_rad + ((d - e) / slab.chord_m).atan(),
            chord_m: (slab.chord_m * share - cuts.trailing_edge_m).max(0.0),
            thickness_m: (most - cuts.back_m).max(0.0),
        }
    }
}

impl Cuts {
    /// The wedge off the face of a chord that turns it by an angle, rad: off the leading edge to turn it up,
    /// off the trailing edge to turn it down.
    #[must_use]
    pub fn turning(chord_m: f64, by_rad: f64) -> Self {
        let depth = chord_m * by_rad.abs().tan();
        let (leading, trailing) = if by_rad > 0.0 { (depth, 0.0) } else { (0.0, depth) };
        Self { face_leading_m: leading, face_trailing_m: trailing, ..Self::default() }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const SLAB: Slab = Slab { face_rad: 0.3, chord_m: 0.08, thickness_m: 0.01 };

    /// Plane geometry: a rectangle of 80 × 10 mm, 1.4 mm off one end, turns by atan(1.4/80) and keeps its
    /// height at the other.
    #[test]
    fn a_wedge_off_a_plank_turns_it_by_its_slope() {
        let plank = Profile::by_heights(vec![1.0; 41]).unwrap();
        let by = (1.4e-3_f64 / 0.08).atan();
        let cuts = Cuts::turning(0.08, by);
        assert!((cuts.face_leading_m - 1.4e-3).abs() < 1e-12);
        let after = plank.cut(SLAB, &Cuts { face_leading_m: 0.0, ..cuts });
        assert!((after.face_rad - 0.3).abs() < 1e-12 && (after.chord_m - 0.08).abs() < 1e-12);
        let wedge = Profile::by_heights((0..=80).map(|k| 1.0 - f64::from(k) / 80.0).collect()).unwrap();
        // A wedge 10 mm high at the leading edge and sharp at the trailing edge: turned down by a plane that
        // takes 2 mm off at the trailing edge, back and face meet where 10 (1 − x) = 2 x, at x = 5/6.
        let after = wedge.cut(SLAB, &Cuts { face_trailing_m: 2e-3, ..Cuts::default() });
        assert!((after.chord_m - 0.08 * 5.0 / 6.0).abs() < 1e-6, "{after:?}");
        assert!((after.face_rad - 0.3 + (2e-3_f64 / 0.08).atan()).abs() < 1e-12);
        assert!((after.thickness_m - 0.01).abs() < 1e-9);
    }

    #[test]
    fn nothing_off_leaves_a_clark_y_as_it_is_and_the_face_thins_it_by_the_place_of_its_thickness() {
        let outline = crate::section::library().outline("clark-y", 0.12).unwrap();
        let profile = Profile::new(&outline).unwrap();
        let same = profile.cut(SLAB, &Cuts::default());
        assert!((same.chord_m - 0.08).abs() < 1e-9 && (same.thickness_m - 0.01).abs() < 1e-9, "{same:?}");
        let up = profile.cut(SLAB, &Cuts { face_leading_m: 1e-3, ..Cuts::default() });
        // The section is thickest at about 0.3 of the chord; a millimetre at the leading edge is 0.7 mm
        // there.
        assert!((SLAB.thickness_m - up.thickness_m - 0.7e-3).abs() < 0.05e-3, "{up:?}");
        assert!((up.chord_m - SLAB.chord_m).abs() < 1e-9, "{up:?}");
        let down = profile.cut(SLAB, &Cuts { face_trailing_m: 1e-3, ..Cuts::default() });
        assert!(down.chord_m < SLAB.chord_m - 1e-3 && down.face_rad < SLAB.face_rad, "{down:?}");
    }
}
