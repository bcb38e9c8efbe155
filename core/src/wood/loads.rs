//! What the air, the rotation and the sections' places do to one blade: forces and moments per metre of
//! radius.

use std::f64::consts::{FRAC_PI_2, PI};

use super::BladeBeam;
use super::beam::{at as at_radius, bending_n_m, outboard, tension_n};
use crate::rotor::{Condition, Graded, Rotor};

/// Place along the chord where the air's force acts before the stall, from the leading edge: thin aerofoil
/// theory, the section's own moment apart.
const QUARTER: f64 = 0.25;
/// Angles past the stall over which the force moves back to where it acts on a flat plate, rad.
const BREAKING_RAD: f64 = 5.0 * PI / 180.0;

/// Loads of one blade at one condition, at the radii of its beam.
#[derive(Clone, Debug)]
pub(super) struct BladeLoads {
    /// Of the air, forward along the axis, N/m.
    pub(super) forward_n_m: Vec<f64>,
    /// Of the air, in the plane of rotation, against the turning, N/m.
    pub(super) against_n_m: Vec<f64>,
    /// Twisting about the line of centroids, towards coarser pitch, N m/m: centrifugal and of the air.
    pub(super) twisting_n: Vec<f64>,
    /// Where the centroids stand beside the radius through the axis, forward and against the turning, m.
    pub(super) offsets_m: [Vec<f64>; 2],
    /// Twisting moment by those offsets, towards coarser pitch, N m.
    pub(super) offset_twisting_n_m: Vec<f64>,
    /// Forces across the blade outboard, forward and against the turning, N.
    pub(super) across_n: [Vec<f64>; 2],
    /// Centrifugal tension, N.
    pub(super) tension_n: Vec<f64>,
    /// Bending moments of the two loads, what the offsets take off taken off, N m.
    pub(super) forward_bending_n_m: Vec<f64>,
    /// The same in the plane of rotation.
    pub(super) against_bending_n_m: Vec<f64>,
    /// Speed of rotation, rad/s.
    pub(super) rotation_rad_s: f64,
}

/// The air's load on one blade, before it is put on the beam's radii: forward, against the turning, twisting.
struct Air {
    radii_m: Vec<f64>,
    figures: [Vec<f64>; 3],
}

impl BladeLoads {
    /// Loads at a condition of the rotor, whose blade may be a twisted one, on the beam as drawn.
    pub(super) fn new(beam: &BladeBeam, rotor: &Rotor, at: &Condition) -> Self {
        let air = Air::of(beam, rotor, at);
        let omega = at.rotation_rad_s;
        let on_beam = |which: usize| -> Vec<f64> {
            beam.radii_m.iter().map(|r| at_radius(&air.radii_m, &air.figures[which], *r)).collect()
        };
        let (forward_n_m, against_n_m, mut twisting_n) = (on_beam(0), on_beam(1), on_beam(2));
        let turn = beam.beyond_rad(at);
        for (i, twisting) in twisting_n.iter_mut().enumerate() {
            *twisting += beam.centrifugal_twisting_n(i, turn, omega);
        }
        let offsets_m = beam.offsets_m(turn);
        // A blade that stands ahead or aside is pulled back by what centrifugal force has across it.
        let offset = beam.offset(&offsets_m, omega);
        let less =
            |all: Vec<f64>, off: &[f64]| -> Vec<f64> { all.iter().zip(off).map(|(a, b)| a - b).collect() };
        let ([m, q], [f, g]) = (offset.relief_n_m(), offset.relief_n());
        let r = &beam.radii_m;
        Self {
            tension_n: tension_n(&beam.radii_m, &beam.mass_kg_m, omega),
            forward_bending_n_m: less(bending_n_m(r, &forward_n_m), &m),
            against_bending_n_m: less(bending_n_m(r, &against_n_m), &q),
            across_n: [less(outboard(r, &forward_n_m), &f), less(outboard(r, &against_n_m), &g)],
            offset_twisting_n_m: if offset.is_none() {
                vec![0.0; r.len()]
            } else {
                offset.twisting_n_m(&forward_n_m, &against_n_m)
            },
            forward_n_m,
            against_n_m,
            twisting_n,
            offsets_m,
            rotation_rad_s: omega,
        }
    }
}

impl Air {
    /// Nothing at the two ends, the elements' loads between them.
    fn of(beam: &BladeBeam, rotor: &Rotor, at: &Condition) -> Self {
        let blades = f64::from(beam.blades);
        let (root, tip) = (beam.radii_m[0], beam.radii_m[beam.radii_m.len() - 1]);
        let mut air = Self { radii_m: vec![root], figures: [vec![0.0], vec![0.0], vec![0.0]] };
        for g in rotor.spread(at).into_iter().filter(|g| g.radius_m > root && g.radius_m < tip) {
            let (forward, against) = (g.thrust_n_m / blades, g.torque_n / g.radius_m / blades);
            let turn = beam.beyond_rad(at);
            let twisting = beam.air_twisting_n(&g, turn, [forward, against]);
            air.radii_m.push(g.radius_m);
            for (figure, value) in air.figures.iter_mut().zip([forward, against, twisting]) {
                figure.push(value);
            }
        }
        air.radii_m.push(tip);
        for figure in &mut air.figures {
            figure.push(0.0);
        }
        air
    }
}

impl BladeBeam {
    /// Centrifugal twisting moment per metre at a radius by index, with the blades turned by `turn_rad`
    /// besides: `−ρ Ω² ∫ u w dA`, u in the plane of rotation and w along the axis (mass swings into the
    /// plane of rotation; standard, from memory).
    pub(super) fn centrifugal_twisting_n(&self, i: usize, turn_rad: f64, rotation_rad_s: f64) -> f64 {
        let (s, c) = (2.0 * (self.angles_rad[i] + turn_rad)).sin_cos();
        let section = &self.sections[i];
        let product = 0.5 * s * (section.edge_m4 - section.flat_m4) - c * section.product_m4;
        -self.material.density_kg_m3 * rotation_rad_s.powi(2) * product
    }

    /// How much it grows against the angle, N m/(m rad).
    pub(super) fn centrifugal_hold_n(&self, i: usize, turn_rad: f64, rotation_rad_s: f64) -> f64 {
        let (s, c) = (2.0 * (self.angles_rad[i] + turn_rad)).sin_cos();
        let section = &self.sections[i];
        let growth = c * (section.edge_m4 - section.flat_m4) + 2.0 * s * section.product_m4;
        self.material.density_kg_m3 * rotation_rad_s.powi(2) * growth
    }

    /// The air's twisting moment per metre about the centroid of a section under forces forward and against
    /// the turning.
    fn air_twisting_n(&self, g: &Graded, turn_rad: f64, [forward, against]: [f64; 2]) -> f64 {
        let i = self.radii_m.partition_point(|r| *r < g.radius_m).min(self.radii_m.len() - 1);
        let (s, c) = (self.angles_rad[i] + turn_rad).sin_cos();
        let (section, chord) = (&self.sections[i], self.chords_m[i]);
        let (lift, along) = (forward * c + against * s, against * c - forward * s);
        let broken = broken(g);
        let own = (1.0 - broken) * section.moment * g.pressure_pa * chord * chord;
        let place = QUARTER + broken * (plate_centre(g.alpha_rad) - QUARTER);
        lift * (section.centroid_m[0] - place * chord) - along * section.centroid_m[1] + own
    }
}

/// How far the flow has left the section, 0 before the stall to 1.
fn broken(g: &Graded) -> f64 {
    let past = (g.alpha_rad - g.stall_rad[0]).max(g.stall_rad[1] - g.alpha_rad);
    (past / BREAKING_RAD).clamp(0.0, 1.0)
}

/// Where the force acts on a flat plate past the stall, in chords from the leading edge: `0.5 − 0.175 (1 −
/// |α|/90°)` (C. Lindenburg, ECN-C--03-025, 2003; from memory).
fn plate_centre(alpha_rad: f64) -> f64 {
    0.5 - 0.175 * (1.0 - (alpha_rad.abs() / FRAC_PI_2).min(1.0))
}
