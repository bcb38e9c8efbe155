//! Thickness, camber, area, second moments and nose radius of an outline.
//!
//! Thickness and camber are taken square to the chord line on a grid of stations; area and moments are
//! those of the polygon, by the usual boundary sums.

use serde::{Deserialize, Serialize};

use super::spline::Curve;

/// Measures of a section of chord 1 in its chord-line frame.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[non_exhaustive]
pub struct Measures {
    /// Largest thickness, in chords.
    pub thickness_ratio: f64,
    /// Where it lies, in chords from the nose.
    pub thickness_at: f64,
    /// Largest height of the mean line over the chord line, signed, in chords.
    pub camber_ratio: f64,
    /// Where it lies, in chords from the nose.
    pub camber_at: f64,
    /// Area, in square chords.
    pub area: f64,
    /// Centroid, in chords.
    pub centroid: [f64; 2],
    /// Second moment about the axis through the centroid parallel to the chord line, in chords to the
    /// fourth.
    pub i_flat: f64,
    /// Second moment about the axis through the centroid square to the chord line, in chords to the fourth.
    pub i_edge: f64,
    /// Product of inertia about the centroid, in chords to the fourth.
    pub i_product: f64,
    /// Radius of the nose, in chords; 0 for a sharp one.
    pub nose_radius: f64,
    /// Thickness of the open trailing edge, in chords.
    pub edge_thickness: f64,
}

/// Stations along the chord at which thickness and camber are taken.
const STATIONS: usize = 400;

/// Parameter of the point of the curve farthest from the middle of its ends.
pub(crate) fn nose(curve: &Curve) -> f64 {
    let (a, b) = (curve.at(0.0).at, curve.at(curve.length()).at);
    let edge = [0.5 * (a[0] + b[0]), 0.5 * (a[1] + b[1])];
    let far = |s: f64| {
        let p = curve.at(s).at;
        (p[0] - edge[0]).hypot(p[1] - edge[1])
    };
    let step = curve.length() / 2000.0;
    let best = (0..=2000).max_by(|&i, &j| far(f64::from(i) * step).total_cmp(&far(f64::from(j) * step)));
    let middle = f64::from(best.unwrap_or(1000)) * step;
    golden_maximum(far, middle - step, middle + step)
}

/// Golden-section search for the maximum of a function on an interval.
fn golden_maximum(f: impl Fn(f64) -> f64, mut a: f64, mut b: f64) -> f64 {
    let ratio = 0.5 * (5.0_f64.sqrt() - 1.0);
    for _ in 0..60 {
        let (c, d) = (b - ratio * (b - a), a + ratio * (b - a));
        if f(c) >= f(d) { b = d } else { a = c }
    }
    0.5 * (a + b)
}

/// Measures an outline in its chord-line frame.
pub(crate) fn measure(points: &[[f64; 2]], curve: &Curve, nose_s: f64) -> Measures {
    let (upper, lower) = sides(points);
    let (mut thickness, mut camber) = ((0.0, 0.0), (0.0_f64, 0.0));
    for k in 1..STATIONS {
        let x = k as f64 / STATIONS as f64;
        let (top, bottom) = (interpolate(&upper, x), interpolate(&lower, x));
        if top - bottom > thickness.0 {
            thickness = (top - bottom, x);
        }
        if (top + bottom).abs() > 2.0 * camber.0.abs() {
            camber = (0.5 * (top + bottom), x);
        }
    }
    let [area, cx, cy, i_flat, i_edge, i_product] = moments(points);
    let (a, b) = (points[0], points[points.len() - 1]);
    Measures {
        thickness_ratio: thickness.0,
        thickness_at: thickness.1,
        camber_ratio: camber.0,
        camber_at: camber.1,
        area,
        centroid: [cx, cy],
        i_flat,
        i_edge,
        i_product,
        nose_radius: nose_radius(curve, nose_s),
        edge_thickness: (a[0] - b[0]).hypot(a[1] - b[1]),
    }
}

/// Mean curvature over a short stretch at the nose, as a radius.
fn nose_radius(curve: &Curve, nose_s: f64) -> f64 {
    let reach = 0.002;
    let curvature = |k: i32| curve.at(nose_s + reach * f64::from(k) / 2.0).curvature().abs();
    let mean = (-2..=2).map(curvature).sum::<f64>() / 5.0;
    let turn = curve.at(nose_s - reach).first;
    let turned = curve.at(nose_s + reach).first;
    let cross = turn[0] * turned[1] - turn[1] * turned[0];
    let angle = cross.atan2(turn[0] * turned[0] + turn[1] * turned[1]).abs();
    // A nose that turns more over the stretch than its curvature explains is a corner.
    if angle > 1.0 && mean * 2.0 * reach < 0.5 * angle { 0.0 } else { 1.0 / mean.max(1e-9) }
}

/// Upper side from nose to edge, and lower side from nose to edge.
pub(crate) fn sides(points: &[[f64; 2]]) -> (Vec<[f64; 2]>, Vec<[f64; 2]>) {
    let nose = (0..points.len()).min_by(|&i, &j| points[i][0].total_cmp(&points[j][0])).unwrap_or(0);
    let upper = points[..=nose].iter().rev().copied().collect();
    (upper, points[nose..].to_vec())
}

/// Ordinate of a side at `x`, linear between points and held outside.
pub(crate) fn interpolate(side: &[[f64; 2]], x: f64) -> f64 {
    let k = side.partition_point(|p| p[0] <= x).clamp(1, side.len().max(2) - 1);
    let (a, b) = (side[k - 1], side[k.min(side.len() - 1)]);
    let width = b[0] - a[0];
    if width.abs() < 1e-12 { b[1] } else { a[1] + (b[1] - a[1]) * ((x - a[0]) / width).clamp(0.0, 1.0) }
}

/// Area, centroid and central second moments of a polygon.
fn moments(points: &[[f64; 2]]) -> [f64; 6] {
    let n = points.len();
    let mut sum = [0.0; 6];
    for k in 0..n {
        let ([x0, y0], [x1, y1]) = (points[k], points[(k + 1) % n]);
        let cross = x0 * y1 - x1 * y0;
        sum[0] += cross / 2.0;
        sum[1] += cross * (x0 + x1) / 6.0;
        sum[2] += cross * (y0 + y1) / 6.0;
        sum[3] += cross * (y0 * y0 + y0 * y1 + y1 * y1) / 12.0;
        sum[4] += cross * (x0 * x0 + x0 * x1 + x1 * x1) / 12.0;
        sum[5] += cross * (x0 * y1 + 2.0 * x0 * y0 + 2.0 * x1 * y1 + x1 * y0) / 24.0;
    }
    let area = sum[0];
    let (cx, cy) = (sum[1] / area, sum[2] / area);
    [area, cx, cy, sum[3] - area * cy * cy, sum[4] - area * cx * cx, sum[5] - area * cx * cy]
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::section::outline::naca_four_digit;

    /// A right triangle of legs 3 and 2, away from the origin: area 3, centroid a third in from the right angle,
    /// `b h³/36`, `h b³/36` and `−b² h²/72` about it (tables of any textbook of statics; from memory).
    #[test]
    fn moments_of_a_right_triangle() {
        let (b, h, at): (f64, f64, [f64; 2]) = (3.0, 2.0, [5.0, -4.0]);
        let corners = [[at[0], at[1]], [at[0] + b, at[1]], [at[0], at[1] + h]];
        let expected = [
            0.5 * b * h,
            at[0] + b / 3.0,
            at[1] + h / 3.0,
            b * h.powi(3) / 36.0,
            h * b.powi(3) / 36.0,
            -(b * h).powi(2) / 72.0,
        ];
        for (found, expected) in moments(&corners).into_iter().zip(expected) {
            assert!((found - expected).abs() < 1e-9, "{found} {expected}");
        }
    }

    /// NACA Report 460: digits 4 and 4 are a camber of 4 % at 40 % of the chord, over the line from the beginning of
    /// the mean line. The chord line here begins at the nose itself, the front of a circle of radius 1.1019 t^2 whose
    /// centre lies on the mean line: above that beginning by the radius times the first slope.
    #[test]
    fn camber_is_that_of_the_digits() {
        for (camber, place) in [(4, 4), (2, 6), (6, 3)] {
            let m = *naca_four_digit(camber, place, 0.06).unwrap().measures();
            let (ratio, at) = (f64::from(camber) / 100.0, f64::from(place) / 10.0);
            let nose = 1.1019 * 0.06_f64.powi(2) * (2.0 * ratio / at).atan().sin();
            // Stations are a 400th apart, thickness laid square to the mean line moves the heights between them.
            assert!((m.camber_ratio - ratio + (1.0 - at) * nose).abs() < 1e-4, "{m:?}");
            assert!((m.camber_at - at).abs() < 0.015, "{m:?}");
        }
    }

    #[test]
    fn a_side_is_held_beyond_its_ends() {
        let side = [[0.0, 0.1], [0.5, 0.2], [1.0, 0.0]];
        for (x, expected) in [(-0.3, 0.1), (0.25, 0.15), (0.75, 0.1), (1.0, 0.0), (1.04, 0.0)] {
            assert!((interpolate(&side, x) - expected).abs() < 1e-15, "{x}");
        }
    }
}
