//! Monotone cubic interpolation (PCHIP), as used for tables, stations and engine curves.
//!
//! Method: F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5(2), 1984: Hermite cubics whose slopes
//! are weighted harmonic means of the neighbouring secants, so that no overshoot appears between the points.
//! End slopes by the three-point formula limited to keep the shape.

/// Value and slope of a cubic at one place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Jet {
    /// The value.
    pub value: f64,
    /// The derivative.
    pub slope: f64,
}

/// A monotone cubic through points with strictly rising abscissae. Outside the points it holds the end
/// values.
#[derive(Clone, Debug, PartialEq)]
pub struct Curve {
    x: Vec<f64>,
    y: Vec<f64>,
    slope: Vec<f64>,
    straight: bool,
}

impl Curve {
    /// A curve through the points; `None` unless there is at least one, all are finite and `x` rises
    /// strictly.
    #[must_use]
    pub fn new(x: Vec<f64>, y: Vec<f64>) -> Option<Self> {
        let rising = x.windows(2).all(|w| w[0] < w[1]);
        let finite = x.iter().chain(&y).all(|v| v.is_finite());
        if x.is_empty() || x.len() != y.len() || !rising || !finite {
            return None;
        }
        let slope = slopes(&x, &y);
        Some(Self { x, y, slope, straight: false })
    }

    /// Straight lines through the points, under the same conditions.
    #[must_use]
    pub fn polyline(x: Vec<f64>, y: Vec<f64>) -> Option<Self> {
        Self::new(x, y).map(|curve| Self { straight: true, ..curve })
    }

    /// The value at `x`.
    #[must_use]
    pub fn at(&self, x: f64) -> f64 {
        self.jet(x).value
    }

    /// Value and slope at `x`; outside the points the end value with slope zero.
    #[must_use]
    pub fn jet(&self, x: f64) -> Jet {
        let last = self.x.len() - 1;
        // A NaN falls through to the first value.
        if x >= self.x[last] {
            let slope = if x > self.x[last] { 0.0 } else { self.slope[last] };
            return Jet { value: self.y[last], slope };
        }
        let i = self.x.partition_point(|&p| p <= x);
        if i == 0 {
            return Jet { value: self.y[0], slope: 0.0 };
        }
        let (a, b) = (i - 1, i);
        let h = self.x[b] - self.x[a];
        if self.straight {
            let slope = (self.y[b] - self.y[a]) / h;
            return Jet { value: self.y[a] + slope * (x - self.x[a]), slope };
        }
        hermite(h, (x - self.x[a]) / h, (self.y[a], self.slope[a]), (self.y[b], self.slope[b]))
    }

    /// The first and last abscissa.
    #[must_use]
    pub fn range(&self) -> (f64, f64) {
        (self.x[0], self.x[self.x.len() - 1])
    }
}

fn hermite(h: f64, t: f64, (y0, m0): (f64, f64), (y1, m1): (f64, f64)) -> Jet {
    let d = (y1 - y0) / h;
    // Newton form about the left end: y0 + t h (m0 + t (c + t b)).
    let c = 3.0 * d - 2.0 * m0 - m1;
    let b = m0 + m1 - 2.0 * d;
    Jet { value: y0 + t * h * (m0 + t * (c + t * b)), slope: m0 + t * (2.0 * c + 3.0 * t * b) }
}

fn slopes(x: &[f64], y: &[f64]) -> Vec<f64> {
    let n = x.len();
    if n < 2 {
        return vec![0.0; n];
    }
    let h: Vec<f64> = x.windows(2).map(|w| w[1] - w[0]).collect();
    let d: Vec<f64> = y.windows(2).zip(&h).map(|(w, h)| (w[1] - w[0]) / h).collect();
    if n == 2 {
        return vec![d[0]; 2];
    }
    let mut m = vec![0.0; n];
    for i in 1..n - 1 {
        m[i] = inner_slope(h[i - 1], h[i], d[i - 1], d[i]);
    }
    m[0] = end_slope(h[0], h[1], d[0], d[1]);
    m[n - 1] = end_slope(h[n - 2], h[n - 3], d[n - 2], d[n - 3]);
    m
}

fn inner_slope(h0: f64, h1: f64, d0: f64, d1: f64) -> f64 {
    if d0 * d1 <= 0.0 {
        return 0.0;
    }
    let (w0, w1) = (2.0 * h1 + h0, h1 + 2.0 * h0);
    (w0 + w1) / (w0 / d0 + w1 / d1)
}

fn end_slope(h0: f64, h1: f64, d0: f64, d1: f64) -> f64 {
    let m = ((2.0 * h0 + h1) * d0 - h0 * d1) / (h0 + h1);
    if m * d0 <= 0.0 {
        0.0
    } else if d0 * d1 <= 0.0 && m.abs() > 3.0 * d0.abs() {
        3.0 * d0
    } else {
        m
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn passes_through_its_points_and_holds_its_ends() {
        let c = Curve::new(vec![0.0, 1.0, 3.0], vec![2.0, 5.0, 4.0]).unwrap();
        for (x, y) in [(0.0, 2.0), (1.0, 5.0), (3.0, 4.0), (-9.0, 2.0), (9.0, 4.0)] {
            assert!((c.at(x) - y).abs() < 1e-15, "{x}");
        }
    }

    #[test]
    fn a_polyline_is_straight_between_its_points() {
        let c = Curve::polyline(vec![0.0, 1.0, 3.0], vec![2.0, 5.0, 4.0]).unwrap();
        assert_eq!((c.at(0.5), c.at(2.0), c.jet(2.0).slope), (3.5, 4.5, -0.5));
    }

    #[test]
    fn does_not_overshoot_a_step() {
        let c = Curve::new(vec![0.0, 1.0, 2.0, 3.0], vec![0.0, 0.0, 1.0, 1.0]).unwrap();
        for i in 0..=300 {
            let v = c.at(f64::from(i) * 0.01);
            assert!((0.0..=1.0).contains(&v));
        }
    }

    #[test]
    fn slope_is_the_derivative() {
        let c = Curve::new(vec![0.0, 1.0, 2.5, 3.0], vec![0.0, 1.0, 1.2, 4.0]).unwrap();
        for x in [0.3, 1.7, 2.6] {
            let fd = (c.at(x + 1e-6) - c.at(x - 1e-6)) / 2e-6;
            assert!((c.jet(x).slope - fd).abs() < 1e-7);
        }
    }

    #[test]
    fn refuses_points_that_make_no_curve() {
        assert!(Curve::new(vec![], vec![]).is_none());
        assert!(Curve::new(vec![0.0, 0.0], vec![1.0, 1.0]).is_none());
        assert!(Curve::new(vec![0.0, f64::NAN], vec![1.0, 1.0]).is_none());
    }
}
