//! Properties of a section as a beam sees it: area, centroid, second moments, principal axes, torsion
//! constant, extreme fibres.
//!
//! Area and moments are those of the outline's polygon, by the usual boundary sums. Axes: ξ along the chord
//! line from leading to trailing edge, η square to it towards the back, through the centroid.

mod moment;
mod torsion;

use crate::section::outline::Outline;

/// A section's shape, in chords `c` and thicknesses `t` (ratio), from which sections of any chord and about
/// that thickness follow: `A = area c t`, `I = flat c t³`, and so on.
#[derive(Clone, Debug, PartialEq)]
pub struct Shape {
    /// Area over `c t`.
    pub area: f64,
    /// Centroid behind the leading edge over `c`, and above the chord line over `t`.
    pub centroid: [f64; 2],
    /// `∫ η² dA` over `c t³`.
    pub flat: f64,
    /// `∫ ξ² dA` over `c³ t`.
    pub edge: f64,
    /// `∫ ξ η dA` over `c² t²`.
    pub product: f64,
    /// Torsion constant over `c t³`.
    pub torsion: f64,
    /// Moment coefficient about the quarter chord over the thickness ratio.
    pub moment: f64,
    /// Points of the rim from the centroid, over `c` and over `t`.
    pub rim: Vec<[f64; 2]>,
}

/// A section's properties, in metres.
#[derive(Clone, Debug, PartialEq)]
pub struct Section {
    /// Area, m².
    pub area_m2: f64,
    /// Centroid behind the leading edge and above the chord line, m.
    pub centroid_m: [f64; 2],
    /// `∫ η² dA`, m⁴: bending out of the chord line.
    pub flat_m4: f64,
    /// `∫ ξ² dA`, m⁴: bending along the chord line.
    pub edge_m4: f64,
    /// `∫ ξ η dA`, m⁴.
    pub product_m4: f64,
    /// Torsion constant, m⁴.
    pub torsion_m4: f64,
    /// Moment coefficient about the quarter chord, nose up positive.
    pub moment: f64,
}

impl Shape {
    /// The shape of an outline.
    #[must_use]
    pub fn of(outline: &Outline) -> Self {
        let (m, t) = (outline.measures(), outline.thickness_ratio());
        let from_centroid = |p: &[f64; 2]| [p[0] - m.centroid[0], (p[1] - m.centroid[1]) / t];
        Self {
            area: m.area / t,
            centroid: [m.centroid[0], m.centroid[1] / t],
            flat: m.i_flat / t.powi(3),
            edge: m.i_edge / t,
            product: m.i_product / t.powi(2),
            torsion: torsion::constant(outline.points()) / t.powi(3),
            moment: moment::quarter_chord(outline.points()) / t,
            rim: outline.points().iter().map(from_centroid).collect(),
        }
    }

    /// What is taken where no outline is known: a usual section, its extreme fibres at the corners of a box,
    /// on the safe side (from memory).
    #[must_use]
    pub fn usual() -> Self {
        let (x, y) = (0.55, 0.55);
        Self {
            area: 0.70,
            centroid: [0.45, 0.45],
            flat: 0.040,
            edge: 0.045,
            product: 0.0,
            torsion: 0.15,
            moment: -0.6,
            rim: vec![[-x, -y], [x, -y], [x, y], [-x, y]],
        }
    }

    /// The section of a chord (m) and a thickness ratio.
    #[must_use]
    pub fn sized(&self, chord_m: f64, thickness_ratio: f64) -> Section {
        let (c, t) = (chord_m, chord_m * thickness_ratio);
        Section {
            area_m2: self.area * c * t,
            centroid_m: [self.centroid[0] * c, self.centroid[1] * t],
            flat_m4: self.flat * c * t.powi(3),
            edge_m4: self.edge * c.powi(3) * t,
            product_m4: self.product * (c * t).powi(2),
            torsion_m4: self.torsion * c * t.powi(3),
            moment: self.moment * thickness_ratio,
        }
    }
}

impl Section {
    /// The section a share of the way to another.
    #[must_use]
    pub fn towards(&self, other: &Self, share: f64) -> Self {
        let mix = |a: f64, b: f64| a + share * (b - a);
        Self {
            area_m2: mix(self.area_m2, other.area_m2),
            centroid_m: [0, 1].map(|i| mix(self.centroid_m[i], other.centroid_m[i])),
            flat_m4: mix(self.flat_m4, other.flat_m4),
            edge_m4: mix(self.edge_m4, other.edge_m4),
            product_m4: mix(self.product_m4, other.product_m4),
            torsion_m4: mix(self.torsion_m4, other.torsion_m4),
            moment: mix(self.moment, other.moment),
        }
    }

    /// Least and greatest second moment, m⁴, and the angle (rad) from the chord line to the axis of the
    /// least, positive where it rises towards the trailing edge.
    #[must_use]
    pub fn principal(&self) -> (f64, f64, f64) {
        let (mean, half) = (0.5 * (self.flat_m4 + self.edge_m4), 0.5 * (self.edge_m4 - self.flat_m4));
        let radius = half.hypot(self.product_m4);
        (mean - radius, mean + radius, 0.5 * self.product_m4.atan2(half))
    }

    /// Second moment about the radial line through the centroid, m⁴.
    #[must_use]
    pub fn polar_m4(&self) -> f64 {
        self.flat_m4 + self.edge_m4
    }
}
