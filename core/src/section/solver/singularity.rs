//! Stream function and velocity of straight vortex and source elements of linear strength.
//!
//! An element runs along its own axis from its first end; `y` is to the left of it. Vortex strength is
//! positive clockwise. All results are for the strengths at the two ends and hold the factor 1/(2 pi).
//!
//! # References
//! Katz, Plotkin, "Low-Speed Aerodynamics", 2nd ed. 2001, chapter 10 (elements of linear strength); Drela,
//! Lecture Notes in Engineering 54, 1989, pp. 1-12 (stream-function formulation).

use std::f64::consts::{PI, TAU};

/// Heights below this, in chords, are on the element.
const ON_ELEMENT: f64 = 1e-13;

/// Distances below this, in chords, are at the end of the element: rounding must not decide the logarithm
/// there.
const AT_END: f64 = 1e-10;

/// Where the angle seen from a source element jumps.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Cut {
    /// On the right of the element: outside the section.
    Right,
    /// Ahead of the element, along it: down the wake.
    Ahead,
}

/// A straight element.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Element {
    start: [f64; 2],
    along: [f64; 2],
    length: f64,
}

impl Element {
    pub(super) fn new(a: [f64; 2], b: [f64; 2]) -> Self {
        let (dx, dy) = (b[0] - a[0], b[1] - a[1]);
        let length = dx.hypot(dy);
        let along = if length > 0.0 { [dx / length, dy / length] } else { [1.0, 0.0] };
        Self { start: a, along, length }
    }

    pub(super) fn along(&self) -> [f64; 2] {
        self.along
    }

    pub(super) fn length(&self) -> f64 {
        self.length
    }

    /// Abscissae of a point from both ends, and its height.
    fn local(&self, p: [f64; 2]) -> (f64, f64, f64) {
        let d = [p[0] - self.start[0], p[1] - self.start[1]];
        let x = d[0] * self.along[0] + d[1] * self.along[1];
        let y = d[1] * self.along[0] - d[0] * self.along[1];
        (x, x - self.length, if y.abs() < ON_ELEMENT { 0.0 } else { y })
    }

    /// Weights of the two ends from the integrals of 1 and of the abscissa.
    fn ends(&self, whole: f64, moment: f64) -> [f64; 2] {
        [(whole - moment / self.length) / TAU, moment / (self.length * TAU)]
    }

    /// Stream function at `p` of vorticity.
    pub(super) fn vortex_stream(&self, p: [f64; 2]) -> [f64; 2] {
        let (a, b, y) = self.local(p);
        let whole = |u: f64| u * ln_r(u, y) - u + y.abs() * u.atan2(y.abs());
        let square = |u: f64| {
            let r2 = u * u + y * y;
            0.5 * r2 * ln_r(u, y) - 0.25 * r2
        };
        let i0 = whole(a) - whole(b);
        self.ends(i0, a * i0 - (square(a) - square(b)))
    }

    /// Stream function at `p` of sources.
    pub(super) fn source_stream(&self, p: [f64; 2], cut: Cut) -> [f64; 2] {
        let (a, b, y) = self.local(p);
        let angle = |u: f64| match cut {
            Cut::Right => 0.5 * PI - u.atan2(y),
            Cut::Ahead => (-y).atan2(-u),
        };
        let whole = |u: f64| u * angle(u) + y * ln_r(u, y);
        let moment = |u: f64| 0.5 * u * u * angle(u) + 0.5 * y * (u - y * atan_ratio(u, y));
        let f0 = whole(a) - whole(b);
        self.ends(f0, a * f0 - (moment(a) - moment(b)))
    }

    /// Velocity at `p` of sources, for the first and the second end.
    pub(super) fn source_velocity(&self, p: [f64; 2]) -> [[f64; 2]; 2] {
        let (a, b, y) = self.local(p);
        let along = ln_r(a, y) - ln_r(b, y);
        let across = atan_ratio(a, y) - atan_ratio(b, y);
        let along_moment = a * along - (a - b - y * across);
        let across_moment = a * across - y * along;
        let (u, v) = (self.ends(along, along_moment), self.ends(across, across_moment));
        let turn =
            |u: f64, v: f64| [u * self.along[0] - v * self.along[1], u * self.along[1] + v * self.along[0]];
        [turn(u[0], v[0]), turn(u[1], v[1])]
    }

    /// Velocity at `p` of vorticity, for the first and the second end.
    pub(super) fn vortex_velocity(&self, p: [f64; 2]) -> [[f64; 2]; 2] {
        self.source_velocity(p).map(|[u, v]| [v, -u])
    }
}

/// Logarithm of the distance, 0 at the end itself, where it stands beside a factor that vanishes or cancels.
fn ln_r(u: f64, y: f64) -> f64 {
    let r2 = u * u + y * y;
    if r2 > AT_END * AT_END { 0.5 * r2.ln() } else { 0.0 }
}

/// `atan(u/y)`, 0 on the element's line.
fn atan_ratio(u: f64, y: f64) -> f64 {
    if y == 0.0 { 0.0 } else { (u / y).atan() }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The velocity is the curl of the stream function, for both kinds and both ends.
    #[test]
    fn velocity_is_the_derivative_of_the_stream_function() {
        let element = Element::new([0.1, -0.2], [0.7, 0.3]);
        let h = 1e-5;
        for p in [[0.5, 0.9], [-0.3, 0.4], [0.2, 0.2]] {
            let slope = |f: &dyn Fn([f64; 2]) -> [f64; 2], end: usize| {
                let dy = f([p[0], p[1] + h])[end] - f([p[0], p[1] - h])[end];
                let dx = f([p[0] + h, p[1]])[end] - f([p[0] - h, p[1]])[end];
                [dy / (2.0 * h), -dx / (2.0 * h)]
            };
            for end in 0..2 {
                let vortex = slope(&|p| element.vortex_stream(p), end);
                let source = slope(&|p| element.source_stream(p, Cut::Right), end);
                for axis in 0..2 {
                    assert!((vortex[axis] - element.vortex_velocity(p)[end][axis]).abs() < 1e-8);
                    assert!((source[axis] - element.source_velocity(p)[end][axis]).abs() < 1e-8);
                }
            }
        }
    }

    #[test]
    fn cuts_differ_by_a_constant_upstream() {
        let element = Element::new([1.0, 0.0], [1.3, 0.02]);
        let off = |p: [f64; 2]| {
            let (a, b) = (element.source_stream(p, Cut::Right), element.source_stream(p, Cut::Ahead));
            a[0] + a[1] - b[0] - b[1]
        };
        assert!((off([0.2, 0.1]) - off([0.6, 0.05])).abs() < 1e-12);
    }
}
