//! Cubic splines, and a plane curve made of them.
//!
//! Ends are parabolic (the second derivative is held over the last piece) unless a slope is given. de Boor,
//! "A Practical Guide to Splines", 1978, chapter IV.

/// What is known of a spline at one of its ends.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) enum End {
    /// Second derivative constant over the last piece.
    Parabolic,
    /// First derivative given.
    Slope(f64),
}

/// A cubic spline of one value over a strictly increasing parameter.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Cubic {
    t: Vec<f64>,
    y: Vec<f64>,
    second: Vec<f64>,
}

impl Cubic {
    /// Fits a spline. `t` strictly increasing, at least two values, as long as `y`.
    pub(crate) fn new(t: &[f64], y: &[f64], first: End, last: End) -> Self {
        let n = t.len();
        let mut second = vec![0.0; n];
        if n > 2 {
            second = second_derivatives(t, y, first, last);
        }
        Self { t: t.to_vec(), y: y.to_vec(), second }
    }

    fn piece(&self, t: f64) -> usize {
        let after = self.t.partition_point(|&knot| knot <= t);
        after.clamp(1, self.t.len() - 1) - 1
    }

    /// Value, first and second derivative at `t`; the end pieces carry on outside.
    pub(crate) fn at(&self, t: f64) -> [f64; 3] {
        let k = self.piece(t);
        let h = self.t[k + 1] - self.t[k];
        let (a, b) = ((self.t[k + 1] - t) / h, (t - self.t[k]) / h);
        let (y0, y1, m0, m1) = (self.y[k], self.y[k + 1], self.second[k], self.second[k + 1]);
        [
            a * y0 + b * y1 + ((a * a * a - a) * m0 + (b * b * b - b) * m1) * h * h / 6.0,
            (y1 - y0) / h + ((1.0 - 3.0 * a * a) * m0 + (3.0 * b * b - 1.0) * m1) * h / 6.0,
            a * m0 + b * m1,
        ]
    }
}

/// Second derivatives at the knots, by elimination of the three-term system.
fn second_derivatives(t: &[f64], y: &[f64], first: End, last: End) -> Vec<f64> {
    let n = t.len();
    let slope = |k: usize| (y[k + 1] - y[k]) / (t[k + 1] - t[k]);
    let (mut diagonal, mut upper, mut right) = (vec![1.0; n], vec![0.0; n], vec![0.0; n]);
    (upper[0], right[0]) = match first {
        End::Parabolic => (-1.0, 0.0),
        End::Slope(value) => (0.5, 3.0 / (t[1] - t[0]) * (slope(0) - value)),
    };
    for k in 1..n {
        let (lower, diag, up, rhs) = if k < n - 1 {
            let (h0, h1) = (t[k] - t[k - 1], t[k + 1] - t[k]);
            (h0 / 6.0, (h0 + h1) / 3.0, h1 / 6.0, slope(k) - slope(k - 1))
        } else {
            match last {
                End::Parabolic => (-1.0, 1.0, 0.0, 0.0),
                End::Slope(value) => (0.5, 1.0, 0.0, 3.0 / (t[k] - t[k - 1]) * (value - slope(k - 1))),
            }
        };
        let factor = lower / diagonal[k - 1];
        diagonal[k] = diag - factor * upper[k - 1];
        right[k] = rhs - factor * right[k - 1];
        upper[k] = up;
    }
    let mut second = vec![0.0; n];
    for k in (0..n).rev() {
        let next = if k + 1 < n { upper[k] * second[k + 1] } else { 0.0 };
        second[k] = (right[k] - next) / diagonal[k];
    }
    second
}

/// Position and derivatives with respect to arc length on a [`Curve`].
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct CurvePoint {
    /// Position.
    pub(crate) at: [f64; 2],
    /// First derivative.
    pub(crate) first: [f64; 2],
    /// Second derivative.
    pub(crate) second: [f64; 2],
}

impl CurvePoint {
    /// Curvature, positive where the curve turns left.
    pub(crate) fn curvature(&self) -> f64 {
        let [dx, dy] = self.first;
        let speed = dx.hypot(dy).max(f64::MIN_POSITIVE);
        (dx * self.second[1] - dy * self.second[0]) / speed.powi(3)
    }
}

/// A smooth curve through points, broken where it has a corner; the parameter is the length of the chords.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Curve {
    pieces: Vec<(f64, Cubic, Cubic)>,
    length: f64,
}

/// A turn sharper than this, 50 degrees, is a corner of the outline and not a curve, radians.
const CORNER_RAD: f64 = 50.0 * std::f64::consts::PI / 180.0;

impl Curve {
    /// A curve through at least two distinct points.
    pub(crate) fn new(points: &[[f64; 2]]) -> Self {
        let mut s = vec![0.0];
        for pair in points.windows(2) {
            let step = (pair[1][0] - pair[0][0]).hypot(pair[1][1] - pair[0][1]);
            s.push(s[s.len() - 1] + step);
        }
        let mut breaks = vec![0];
        breaks.extend((1..points.len() - 1).filter(|&k| turn_rad(points, k).abs() > CORNER_RAD));
        breaks.push(points.len() - 1);
        let pieces = breaks.windows(2).map(|ends| {
            let range = ends[0]..=ends[1];
            let coordinate = |axis: usize| {
                let values: Vec<f64> = points[range.clone()].iter().map(|p| p[axis]).collect();
                Cubic::new(&s[range.clone()], &values, End::Parabolic, End::Parabolic)
            };
            (s[ends[1]], coordinate(0), coordinate(1))
        });
        Self { pieces: pieces.collect(), length: s[s.len() - 1] }
    }

    /// Largest value of the parameter.
    pub(crate) fn length(&self) -> f64 {
        self.length
    }

    /// The point at parameter `s`.
    pub(crate) fn at(&self, s: f64) -> CurvePoint {
        let k = self.pieces.iter().position(|piece| s <= piece.0).unwrap_or(self.pieces.len() - 1);
        let (_, x, y) = &self.pieces[k];
        let (x, y) = (x.at(s), y.at(s));
        CurvePoint { at: [x[0], y[0]], first: [x[1], y[1]], second: [x[2], y[2]] }
    }
}

/// Change of direction at point `k` of a list, radians, positive to the left.
pub(crate) fn turn_rad(points: &[[f64; 2]], k: usize) -> f64 {
    let (a, b, c) = (points[k - 1], points[k], points[k + 1]);
    let (u, v) = ([b[0] - a[0], b[1] - a[1]], [c[0] - b[0], c[1] - b[1]]);
    (u[0] * v[1] - u[1] * v[0]).atan2(u[0] * v[0] + u[1] * v[1])
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_parabola_is_reproduced_exactly() {
        let t = [0.0, 0.3, 0.5, 1.1, 2.0];
        let y: Vec<f64> = t.iter().map(|t| 1.0 + 2.0 * t - 3.0 * t * t).collect();
        let spline = Cubic::new(&t, &y, End::Parabolic, End::Slope(2.0 - 12.0));
        for t in [0.1, 0.4, 0.9, 1.7] {
            let [value, first, second] = spline.at(t);
            assert!((value - (1.0 + 2.0 * t - 3.0 * t * t)).abs() < 1e-12);
            assert!((first - (2.0 - 6.0 * t)).abs() < 1e-11);
            assert!((second + 6.0).abs() < 1e-10);
        }
    }

    #[test]
    fn a_circle_has_its_curvature() {
        let points: Vec<[f64; 2]> = (0..=60)
            .map(|k| f64::from(k) / 60.0 * std::f64::consts::PI)
            .map(|a| [0.5 * a.cos(), 0.5 * a.sin()])
            .collect();
        let curve = Curve::new(&points);
        assert!((curve.at(curve.length() / 2.0).curvature() - 2.0).abs() < 2e-3);
    }
}
