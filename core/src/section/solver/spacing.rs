//! Nodes round a section: close where it curves and at the trailing edge.

use crate::section::outline::{Curve, Outline};

/// Samples along the outline on which the density is laid.
const SAMPLES: usize = 2400;
/// Turn between two nodes at the nose, radians: the panel there is this part of the radius.
const TURN: f64 = 0.12;
/// Panel at the trailing edge over the mean panel.
const EDGE_PART: f64 = 0.35;
/// Stretch of the closer spacing at the trailing edge, chords.
const EDGE_REACH: f64 = 0.06;
/// Spread of the smoothing of curvature, chords.
const SMOOTHING: f64 = 0.004;
/// Curvature counts fully beyond the second and not within the first of these distances from the edge,
/// chords.
const TAPER: [f64; 2] = [0.15, 0.35];

/// Nodes from the upper trailing edge round the nose to the lower one.
pub(super) fn nodes(outline: &Outline, count: usize) -> Vec<[f64; 2]> {
    let curve = outline.curve();
    let step = curve.length() / SAMPLES as f64;
    let bend = smoothed(&curvature(curve, step), step);
    let distance = |i: usize| (i as f64).min((SAMPLES - i) as f64) * step;
    let density = |mean: f64, i: usize| {
        let edge = (1.0 / EDGE_PART - 1.0) * (-distance(i) / EDGE_REACH).exp();
        let taper = ((distance(i) - TAPER[0]) / (TAPER[1] - TAPER[0])).clamp(0.0, 1.0);
        1.0 + mean / TURN * bend[i] * taper + edge
    };
    // The mean panel is found so that the count comes out: the total is linear in it.
    let total =
        |mean: f64| (0..SAMPLES).map(|i| 0.5 * (density(mean, i) + density(mean, i + 1)) * step).sum::<f64>();
    let (plain, slope) = (total(0.0), total(1.0) - total(0.0));
    let panels = (count - 1) as f64;
    // total(mean) = panels * mean  =>  mean = plain / (panels - slope), bounded so that the nose leaves
    // panels elsewhere.
    let mean = plain / (panels - slope).max(0.4 * panels);
    place(curve, count, step, |i| density(mean, i))
}

/// Absolute curvature, bounded, at the samples.
fn curvature(curve: &Curve, step: f64) -> Vec<f64> {
    (0..=SAMPLES).map(|i| curve.at(step * i as f64).curvature().abs().min(2000.0)).collect()
}

/// Gaussian smoothing along the arc.
fn smoothed(values: &[f64], step: f64) -> Vec<f64> {
    let reach = ((3.0 * SMOOTHING / step).ceil() as usize).max(1);
    let weight = |offset: usize| (-0.5 * (offset as f64 * step / SMOOTHING).powi(2)).exp();
    (0..values.len())
        .map(|i| {
            let (low, high) = (i.saturating_sub(reach), (i + reach).min(values.len() - 1));
            let (sum, total) = (low..=high).fold((0.0, 0.0), |(sum, total), j| {
                let w = weight(i.abs_diff(j));
                (sum + w * values[j], total + w)
            });
            sum / total
        })
        .collect()
}

/// Puts nodes at equal steps of the running integral of the density.
fn place(curve: &Curve, count: usize, step: f64, density: impl Fn(usize) -> f64) -> Vec<[f64; 2]> {
    let mut running = vec![0.0];
    for i in 0..SAMPLES {
        running.push(running[i] + 0.5 * (density(i) + density(i + 1)) * step);
    }
    let whole = running[SAMPLES];
    (0..count)
        .map(|k| {
            let wanted = whole * k as f64 / (count - 1) as f64;
            let i = running.partition_point(|&r| r <= wanted).clamp(1, SAMPLES) - 1;
            let part = ((wanted - running[i]) / (running[i + 1] - running[i])).clamp(0.0, 1.0);
            curve.at(step * (i as f64 + part)).at
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A single bend is spread as a Gaussian of the width asked for; cut off at three widths its second moment is
    /// 0.973 of the whole (tables of the normal distribution).
    #[test]
    fn smoothing_spreads_a_bend_by_its_width() {
        let step = 2e-4;
        let mut values = vec![0.0; 401];
        values[200] = 1.0;
        let spread = smoothed(&values, step);
        let sum: f64 = spread.iter().sum();
        let second = |(i, v): (usize, &f64)| v * ((i as f64 - 200.0) * step).powi(2);
        let width = (spread.iter().enumerate().map(second).sum::<f64>() / sum).sqrt();
        assert!(
            (sum - 1.0).abs() < 1e-9 && (width / SMOOTHING - 0.973_f64.sqrt()).abs() < 2e-3,
            "{sum} {width}"
        );
    }
}
