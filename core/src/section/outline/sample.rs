//! Points of an outline at places that any two outlines have in common, so that one can be led over into
//! another.

use super::Outline;
use super::measure::nose;

/// See [`Outline::sampled`].
pub(crate) fn sampled(outline: &Outline, per_side: usize) -> Vec<[f64; 2]> {
    let curve = outline.curve();
    let nose_s = nose(curve);
    let last = per_side.max(2) - 1;
    // Close together at both edges: shares of the arc by a cosine.
    let share = |k: usize| 0.5 * (1.0 - (std::f64::consts::PI * k as f64 / last as f64).cos());
    let upper = (0..last).map(|k| nose_s * share(k));
    let lower = (0..=last).map(|k| nose_s + (curve.length() - nose_s) * share(k));
    upper.chain(lower).map(|s| curve.at(s).at).collect()
}
