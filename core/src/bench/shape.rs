//! The shape of a section in its chord-line frame, in chords, ready to be led over into its neighbour's.

use crate::section::outline::{Outline, thicken};

/// Points of a section of chord 1 from the upper trailing edge round the nose to the lower one, as many on
/// each side.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Shape {
    pub(super) points: Vec<[f64; 2]>,
    thickness_at: f64,
    has_face: bool,
}

impl Shape {
    /// `least_radius`: least radius of the nose, in chords.
    pub(super) fn new(outline: &Outline, per_side: usize, least_radius: f64) -> Self {
        let mut points = outline.sampled(per_side);
        if outline.measures().nose_radius < least_radius {
            blunt_nose(&mut points, least_radius);
        }
        Self { points, thickness_at: outline.measures().thickness_at, has_face: outline.face().is_some() }
    }

    /// The shape a share of the way to another.
    pub(super) fn towards(&self, other: &Self, share: f64) -> Self {
        let mix = |a: f64, b: f64| a + share * (b - a);
        let pairs = self.points.iter().zip(&other.points);
        Self {
            points: pairs.map(|(a, b)| [mix(a[0], b[0]), mix(a[1], b[1])]).collect(),
            thickness_at: mix(self.thickness_at, other.thickness_at),
            has_face: self.has_face && other.has_face,
        }
    }

    /// The same with its ordinates multiplied.
    pub(super) fn thicker(mut self, factor: f64) -> Self {
        self.points.iter_mut().for_each(|p| p[1] *= factor);
        self
    }

    /// The same with its trailing edge at least so thick, in chords.
    pub(super) fn with_edge(mut self, least: f64) -> Self {
        let added = least - self.edge();
        if added > 0.0 {
            let nose = self.points.len() / 2;
            thicken(&mut self.points, nose, self.thickness_at, added, self.has_face);
        }
        self
    }

    /// Thickness of its trailing edge, in chords.
    pub(super) fn edge(&self) -> f64 {
        self.points[0][1] - self.points[self.points.len() - 1][1]
    }

    /// Centroid, in chords.
    pub(super) fn centroid(&self) -> [f64; 2] {
        let n = self.points.len();
        let (mut area, mut x, mut y) = (0.0, 0.0, 0.0);
        for k in 0..n {
            let (a, b) = (self.points[k], self.points[(k + 1) % n]);
            let cross = a[0] * b[1] - b[0] * a[1];
            area += cross;
            x += cross * (a[0] + b[0]) / 3.0;
            y += cross * (a[1] + b[1]) / 3.0;
        }
        [x / area, y / area]
    }
}

/// Passes in which the circle is made larger by what drawing the chord out will flatten it.
const PASSES: usize = 4;

/// Takes wood off a nose until a circle of `radius` fits it, then draws the chord out to its length again.
fn blunt_nose(points: &mut Vec<[f64; 2]>, radius: f64) {
    let mut circle = radius;
    let mut blunt = None;
    for _ in 0..PASSES {
        let Some(cut) = cut_nose(points, circle) else { break };
        // Stretched by s, a circle of radius r has the radius r/s at its end.
        circle = radius / (1.0 - cut[points.len() / 2][0]);
        blunt = Some(cut);
    }
    let Some(blunt) = blunt else { return };
    let [short, turn] = blunt[blunt.len() / 2];
    // Turned as well, so that the new nose lies on the chord line.
    let drawn_out = |p: [f64; 2]| {
        let back = (1.0 - p[0]) / (1.0 - short);
        [1.0 - back, p[1] - turn * back]
    };
    *points = blunt.into_iter().map(drawn_out).collect();
}

/// The points with everything ahead of a circle between the sides taken off; `None` where it fits nowhere.
fn cut_nose(points: &[[f64; 2]], radius: f64) -> Option<Vec<[f64; 2]>> {
    let centre = circle_centre(points, points.len() / 2, radius)?;
    let cut = points.iter().map(|p| {
        let d = [p[0] - centre[0], p[1] - centre[1]];
        let far = d[0].hypot(d[1]);
        if p[0] < centre[0] && far > radius {
            [centre[0] + d[0] * radius / far, centre[1] + d[1] * radius / far]
        } else {
            *p
        }
    });
    Some(cut.collect())
}

/// Where on the mean line a circle first fits between the sides.
fn circle_centre(points: &[[f64; 2]], nose: usize, radius: f64) -> Option<[f64; 2]> {
    let middle = |k: usize| {
        let (a, b) = (points[nose - k], points[nose + k]);
        [0.5 * (a[0] + b[0]), 0.5 * (a[1] + b[1])]
    };
    let room = |c: [f64; 2]| {
        let far = points.iter().filter(|p| p[0] > 0.2 * c[0]).map(|p| (p[0] - c[0]).hypot(p[1] - c[1]));
        far.fold(f64::INFINITY, f64::min)
    };
    let at = (2..nose).find(|&k| room(middle(k)) >= radius)?;
    let (mut near, mut far) = (middle(at - 1), middle(at));
    for _ in 0..40 {
        let half = [0.5 * (near[0] + far[0]), 0.5 * (near[1] + far[1])];
        if room(half) >= radius { far = half } else { near = half }
    }
    Some(far)
}
