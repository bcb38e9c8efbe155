//! The solid turned and seen from afar, as flat faces from back to front.

use super::solid::Solid;
use super::work::Bench;

/// One face as it is seen.
#[derive(Clone, Debug, PartialEq)]
pub struct Face {
    /// Its corners, m: to the right and upward.
    pub corners: [[f64; 2]; 3],
    /// How squarely the light falls on it, 0 to 1.
    pub light: f64,
}

/// Every how many rings and points round a ring are kept: enough for the eye.
const COARSE: [usize; 2] = [3, 8];
/// Where the light comes from: over the left shoulder.
const LIGHT: [f64; 3] = [-0.4, 0.5, 0.77];

impl Bench {
    /// A coarse solid for the eye: what it looks like, not what is made.
    #[must_use]
    pub fn coarse(&self) -> Solid {
        let last = self.rings.len() - 1;
        let kept = self.rings.iter().enumerate().filter(|(i, _)| i % COARSE[0] == 0 || *i == last);
        let thinned = kept.map(|(_, ring)| {
            let points = ring.points.iter().step_by(COARSE[1]).copied().collect();
            super::ring::Ring { radius_m: ring.radius_m, points }
        });
        self.solid_of(&thinned.collect::<Vec<_>>())
    }
}

/// Faces of a solid that look at the eye, the far ones first. The first blade lies to the right; `turn_rad`
/// turns the propeller about its axis, `tilt_rad` about the line of that blade: at 0 it is seen from ahead.
#[must_use]
pub fn turned(solid: &Solid, turn_rad: f64, tilt_rad: f64) -> Vec<Face> {
    let ((st, ct), (sl, cl)) = (turn_rad.sin_cos(), tilt_rad.sin_cos());
    // Seen from ahead, +x right and +y up, +z towards the eye.
    let place = |[x, y, z]: &[f64; 3]| {
        let (x, y) = (x * ct - y * st, x * st + y * ct);
        [x, y * cl - z * sl, y * sl + z * cl]
    };
    let corners: Vec<[f64; 3]> = solid.vertices.iter().map(place).collect();
    let mut faces: Vec<(f64, Face)> = Vec::new();
    for t in &solid.triangles {
        let [a, b, c] = t.map(|i| corners[i as usize]);
        let d = |p: [f64; 3]| [p[0] - a[0], p[1] - a[1], p[2] - a[2]];
        let (u, v) = (d(b), d(c));
        let n = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
        let long = n.iter().map(|x| x * x).sum::<f64>().sqrt();
        if n[2] <= 0.0 || long == 0.0 {
            continue;
        }
        let light = n.iter().zip(LIGHT).map(|(n, l)| n * l / long).sum::<f64>().clamp(0.0, 1.0);
        let corners = [a, b, c].map(|p| [p[0], p[1]]);
        faces.push((a[2] + b[2] + c[2], Face { corners, light }));
    }
    faces.sort_by(|a, b| a.0.total_cmp(&b.0));
    faces.into_iter().map(|(_, face)| face).collect()
}
