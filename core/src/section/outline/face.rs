//! The flat face: the straight part of the lower side on which a carver lays the straight-edge.

use super::measure::{interpolate, sides};

/// A flat face on the lower side.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Face {
    /// Angle by which the chord line is nose up from the face, radians.
    pub angle_rad: f64,
    /// Height of the face line at the nose abscissa, in chords, below the chord line negative.
    pub height_at_nose: f64,
}

/// Part of the chord over which the lower side must be straight.
const STRAIGHT: [f64; 2] = [0.38, 0.9];
/// Largest departure from a straight line that still counts as flat, in chords.
const FLAT_WITHIN: f64 = 3e-4;

/// Looks for a flat face: least-squares line through the lower side from 38 % to 90 % of the chord.
pub(crate) fn find(points: &[[f64; 2]]) -> Option<Face> {
    let lower = sides(points).1;
    let samples: Vec<[f64; 2]> = (0..=26)
        .map(|k| STRAIGHT[0] + (STRAIGHT[1] - STRAIGHT[0]) * f64::from(k) / 26.0)
        .map(|x| [x, interpolate(&lower, x)])
        .collect();
    let n = samples.len() as f64;
    let mean = |axis: usize| samples.iter().map(|p| p[axis]).sum::<f64>() / n;
    let (mx, my) = (mean(0), mean(1));
    let covariance: f64 = samples.iter().map(|p| (p[0] - mx) * (p[1] - my)).sum();
    let variance: f64 = samples.iter().map(|p| (p[0] - mx).powi(2)).sum();
    let slope = covariance / variance;
    let line = |x: f64| my + slope * (x - mx);
    let flat = samples.iter().all(|p| (p[1] - line(p[0])).abs() <= FLAT_WITHIN);
    flat.then(|| Face { angle_rad: slope.atan(), height_at_nose: line(0.0) })
}
