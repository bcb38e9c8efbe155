//! Pitching moment of a section about its quarter chord by thin aerofoil theory.

use crate::section::outline::{interpolate, sides};

/// Steps along the chord, evenly in the angle θ with `x = (1 − cos θ)/2`.
const STEPS: u32 = 200;

/// Moment coefficient about the quarter chord, nose up positive: `−½ ∫ z′ (cos θ − cos 2θ) dθ` over the mean
/// line z (H. Glauert, *The Elements of Aerofoil and Airscrew Theory*, 1926). Before the stall; real sections
/// have some tenths less.
pub(super) fn quarter_chord(points: &[[f64; 2]]) -> f64 {
    let (upper, lower) = sides(points);
    let mean = |x: f64| 0.5 * (interpolate(&upper, x) + interpolate(&lower, x));
    let step = std::f64::consts::PI / f64::from(STEPS);
    let place = |k: u32| 0.5 * (1.0 - (f64::from(k) * step).cos());
    let piece = |k: u32| {
        let (a, b, theta) = (place(k), place(k + 1), (f64::from(k) + 0.5) * step);
        (mean(b) - mean(a)) / (b - a) * (theta.cos() - (2.0 * theta).cos())
    };
    -0.5 * step * (0..STEPS).map(piece).sum::<f64>()
}
