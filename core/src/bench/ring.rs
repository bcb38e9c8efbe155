//! One section as it stands in the propeller: a closed ring of points in a plane square to the blade.

use crate::section::outline::Place;
use crate::section::outline::crossings;

/// A section in its plane. Points run from the middle of the trailing edge over the cambered side round the
/// leading edge and back along the face: point 0 the trailing edge, the middle one the leading edge.
#[derive(Clone, Debug, PartialEq)]
pub struct Ring {
    /// Radius of the plane, m.
    pub radius_m: f64,
    /// Points `[y, z]`, m: along the direction of turning, and along the direction of flight.
    pub points: Vec<[f64; 2]>,
}

impl Ring {
    /// Leading edge, m.
    #[must_use]
    pub fn leading_edge(&self) -> [f64; 2] {
        self.points[self.points.len() / 2]
    }

    /// Middle of the trailing edge, m.
    #[must_use]
    pub fn trailing_edge(&self) -> [f64; 2] {
        self.points[0]
    }

    /// The cambered side from the middle of the trailing edge to the leading edge.
    #[must_use]
    pub fn upper(&self) -> &[[f64; 2]] {
        &self.points[..=self.points.len() / 2]
    }

    /// The face from the leading edge to the middle of the trailing edge.
    #[must_use]
    pub fn lower(&self) -> Vec<[f64; 2]> {
        let mut side = self.points[self.points.len() / 2..].to_vec();
        side.push(self.points[0]);
        side
    }

    /// The face line: the straight line under the face that touches the section on both sides of the middle
    /// of its chord, and under which it has no wood; on a flat face it lies, a hollow one it bridges, a
    /// round one it touches. Two points of the outline, the one nearer the trailing edge first, m.
    #[must_use]
    pub fn face_line(&self) -> [[f64; 2]; 2] {
        let (lead, trail) = (self.leading_edge(), self.trailing_edge());
        let chord = [lead[0] - trail[0], lead[1] - trail[1]];
        let seen = |p: &[f64; 2]| {
            let d = [p[0] - trail[0], p[1] - trail[1]];
            // Along the chord line, and above it; both times the chord.
            ([d[0] * chord[0] + d[1] * chord[1], d[1] * chord[0] - d[0] * chord[1]], *p)
        };
        let middle = 0.5 * (chord[0].powi(2) + chord[1].powi(2));
        let (behind, ahead): (Vec<_>, Vec<_>) =
            self.points.iter().map(seen).partition(|([along, _], _)| *along < middle);
        let over_middle = |a: [f64; 2], b: [f64; 2]| a[1] + (b[1] - a[1]) * (middle - a[0]) / (b[0] - a[0]);
        let pairs = behind.iter().flat_map(|a| ahead.iter().map(move |b| (a, b)));
        let lowest = pairs.min_by(|p, q| over_middle(p.0.0, p.1.0).total_cmp(&over_middle(q.0.0, q.1.0)));
        lowest.map_or([trail, lead], |(a, b)| [a.1, b.1])
    }

    /// Angle of the face line to the plane of rotation, rad.
    #[must_use]
    pub fn face_rad(&self) -> f64 {
        let [a, b] = self.face_line();
        (b[1] - a[1]).atan2(b[0] - a[0])
    }

    /// Least and greatest of one coordinate, m: 0 along the turning, 1 along the flight.
    #[must_use]
    pub fn span(&self, axis: usize) -> [f64; 2] {
        let values = self.points.iter().map(|p| p[axis]);
        values.fold([f64::INFINITY, f64::NEG_INFINITY], |[low, high], v| [low.min(v), high.max(v)])
    }

    /// Area, m².
    #[must_use]
    pub fn area_m2(&self) -> f64 {
        let n = self.points.len();
        let cross = |k: usize| {
            let (a, b) = (self.points[k], self.points[(k + 1) % n]);
            a[0] * b[1] - b[0] * a[1]
        };
        0.5 * (0..n).map(cross).sum::<f64>().abs()
    }

    /// The cut of the surface's triangles between this ring and the next one outward, a share of the way.
    pub(super) fn between(&self, next: &Self, share: f64) -> Self {
        let n = self.points.len();
        let mix = |a: [f64; 2], b: [f64; 2]| [0, 1].map(|i| a[i] + share * (b[i] - a[i]));
        // Along the side of a pair of triangles, then along its diagonal.
        let pair = |k: usize| {
            let (side, diagonal) = (self.points[k], self.points[(k + 1) % n]);
            [mix(side, next.points[k]), mix(diagonal, next.points[k])]
        };
        Self {
            radius_m: self.radius_m + share * (next.radius_m - self.radius_m),
            points: (0..n).flat_map(pair).collect(),
        }
    }

    /// By how much the next ring is turned against this one, rad, 0 to π.
    pub(super) fn turned_rad(&self, next: &Self) -> f64 {
        let [a, b] = [self, next].map(|r| {
            let (lead, trail) = (r.leading_edge(), r.trailing_edge());
            [lead[0] - trail[0], lead[1] - trail[1]]
        });
        (a[0] * b[1] - a[1] * b[0]).atan2(a[0] * b[0] + a[1] * b[1]).abs()
    }

    /// Length of outline, m, between two places where the ring crosses itself; `None` where it does not.
    pub(super) fn crossing_m(&self) -> Option<f64> {
        // The ring closed by its own first point, so that the last piece is looked at too.
        let closed: Vec<[f64; 2]> = self.points.iter().chain(self.points.first()).copied().collect();
        let places: Vec<Place> = (0..closed.len()).map(|point| Place { point, line: None }).collect();
        let (first, second) = match crossings(&closed, &places) {
            Err(crate::section::outline::OutlineError::Crossing { first, second }) => {
                (first.point, second.point)
            }
            _ => return None,
        };
        let piece = |k: usize| {
            let (a, b) = (closed[k], closed[k + 1]);
            (a[0] - b[0]).hypot(a[1] - b[1])
        };
        Some((first..=second).map(piece).sum())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_face_line_bridges_a_hollow_face() {
        // From the trailing edge over the back round the leading edge and along a face that is hollow in the
        // middle, feet at 0.2 and 0.7.
        let points =
            vec![[0.0, 0.0], [0.3, 0.2], [0.7, 0.2], [1.0, 0.0], [0.7, -0.06], [0.5, 0.02], [0.2, -0.05]];
        let ring = Ring { radius_m: 0.3, points };
        assert_eq!((ring.leading_edge(), ring.face_line()), ([1.0, 0.0], [[0.2, -0.05], [0.7, -0.06]]));
    }

    #[test]
    fn a_ring_that_crosses_itself_says_over_what_length() {
        let bow = vec![[0.0, 0.0], [1.0, 1.0], [1.0, 0.0], [0.0, 1.0]];
        let ring = |points| Ring { radius_m: 0.3, points };
        let over = ring(bow).crossing_m().unwrap();
        assert!((over - (1.0 + 2.0 * 2.0_f64.sqrt())).abs() < 1e-12, "{over}");
        let square = vec![[0.0, 0.0], [1.0, 0.0], [1.0, 1.0], [0.0, 1.0]];
        assert_eq!(ring(square).crossing_m(), None);
    }
}
