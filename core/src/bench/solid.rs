//! The closed surface: one propeller of one piece, or one blade.

use std::f64::consts::{PI, TAU};

use super::ring::Ring;

/// A closed surface of triangles, outward side by the right hand.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Solid {
    /// Corners `[x, y, z]`, m: see [`crate::bench`] for the frame.
    pub vertices: Vec<[f64; 3]>,
    /// Corners of each triangle.
    pub triangles: Vec<[u32; 3]>,
}

/// Where the plan between a boss and its blades is bent into each blade's share of the turn, in hub radii.
const BENT_TO: f64 = 1.6;

impl Solid {
    /// One blade, closed flat at its inner end, for a propeller that turns clockwise seen from behind.
    #[must_use]
    pub fn blade(rings: &[Ring], tip_m: f64) -> Self {
        let mut solid = Self::default();
        let Some(first) = rings.first() else { return solid };
        let ids: Vec<Vec<u32>> = rings.iter().map(|ring| solid.ring(ring, |p| p)).collect();
        solid.skin(&ids, rings, tip_m);
        let n = first.points.len() as f64;
        let sum = first.points.iter().fold([0.0, 0.0], |s, p| [s[0] + p[0] / n, s[1] + p[1] / n]);
        let middle = solid.add([first.radius_m, sum[0], sum[1]]);
        let ring = &ids[0];
        (0..ring.len()).for_each(|k| solid.triangles.push([ring[k], ring[(k + 1) % ring.len()], middle]));
        solid
    }

    /// A whole propeller of one piece that turns clockwise seen from behind: `rings` of one blade from the
    /// axis out, the boss among them.
    #[must_use]
    pub fn propeller(rings: &[Ring], tip_m: f64, blades: u32, boss_radius_m: f64) -> Self {
        let mut solid = Self::default();
        let Some(first) = rings.first() else { return solid };
        let n = first.points.len();
        // The ring at the axis lies half in the plane shared with the next blade, half in that with the one
        // before.
        let bend = |j: u32| move |p: [f64; 3]| bent(p, f64::from(blades), boss_radius_m, f64::from(j));
        let seams: Vec<Vec<u32>> = (0..blades).map(|j| solid.ring(first, bend(j))).collect();
        let ends = [n / 4, 3 * n / 4].map(|k| seams[0][k]);
        for j in 0..blades {
            let (own, before) = (&seams[j as usize], &seams[((j + blades - 1) % blades) as usize]);
            let at_axis = (0..n).map(|k| match k {
                k if k == n / 4 => ends[0],
                k if k == 3 * n / 4 => ends[1],
                k if k > n / 4 && k < 3 * n / 4 => own[k],
                k => before[(n / 2 + n - k) % n],
            });
            let mut ids = vec![at_axis.collect()];
            ids.extend(rings[1..].iter().map(|ring| solid.ring(ring, bend(j))));
            let tip_from = solid.vertices.len();
            solid.skin(&ids, rings, tip_m);
            solid.vertices[tip_from..].iter_mut().for_each(|v| *v = bend(j)(*v));
        }
        solid.without_spares()
    }

    /// Volume, m³.
    #[must_use]
    pub fn volume_m3(&self) -> f64 {
        let of = |t: &[u32; 3]| {
            let [a, b, c] = t.map(|i| self.vertices[i as usize]);
            let cross = [b[1] * c[2] - b[2] * c[1], b[2] * c[0] - b[0] * c[2], b[0] * c[1] - b[1] * c[0]];
            (a[0] * cross[0] + a[1] * cross[1] + a[2] * cross[2]) / 6.0
        };
        self.triangles.iter().map(of).sum()
    }

    pub(super) fn add(&mut self, v: [f64; 3]) -> u32 {
        self.vertices.push(v);
        self.vertices.len() as u32 - 1
    }

    fn ring(&mut self, ring: &Ring, place: impl Fn([f64; 3]) -> [f64; 3]) -> Vec<u32> {
        ring.points.iter().map(|p| self.add(place([ring.radius_m, p[0], p[1]]))).collect()
    }

    /// Triangles between neighbouring rings, and from the last one to a point at the tip.
    fn skin(&mut self, ids: &[Vec<u32>], rings: &[Ring], tip_m: f64) {
        for pair in ids.windows(2) {
            let n = pair[0].len();
            for k in 0..n {
                let next = (k + 1) % n;
                self.triangles.push([pair[0][k], pair[1][k], pair[0][next]]);
                self.triangles.push([pair[0][next], pair[1][k], pair[1][next]]);
            }
        }
        let (Some(last), Some(ring)) = (ids.last(), rings.last()) else { return };
        let [lead, trail] = [ring.leading_edge(), ring.trailing_edge()];
        let tip = self.add([tip_m, 0.5 * (lead[0] + trail[0]), 0.5 * (lead[1] + trail[1])]);
        (0..last.len()).for_each(|k| self.triangles.push([last[k], tip, last[(k + 1) % last.len()]]));
    }

    /// Leaves out corners that no triangle uses.
    pub(super) fn without_spares(self) -> Self {
        let mut to = vec![u32::MAX; self.vertices.len()];
        let mut vertices = Vec::with_capacity(self.vertices.len());
        let triangles = self.triangles.iter().map(|t| {
            t.map(|i| {
                let i = i as usize;
                if to[i] == u32::MAX {
                    to[i] = vertices.len() as u32;
                    vertices.push(self.vertices[i]);
                }
                to[i]
            })
        });
        let triangles = triangles.collect();
        Self { vertices, triangles }
    }

    /// Mirrored for a propeller that turns the other way.
    #[must_use]
    pub fn handed(mut self, right_handed: bool) -> Self {
        if !right_handed {
            self.vertices.iter_mut().for_each(|v| v[1] = -v[1]);
            self.triangles.iter_mut().for_each(|t| t.swap(1, 2));
        }
        self
    }
}

/// A point of blade `j`: near the hub its half plane is bent into the blade's share of the turn, then turned
/// into place.
fn bent([x, y, z]: [f64; 3], blades: f64, boss_radius_m: f64, j: f64) -> [f64; 3] {
    let (far, angle) = (x.hypot(y), y.atan2(x));
    let past = ((far / boss_radius_m - 1.0) / (BENT_TO - 1.0)).clamp(0.0, 1.0);
    let whole = past * past * (3.0 - 2.0 * past);
    let share = 2.0 / blades + (1.0 - 2.0 / blades) * whole;
    let turned = angle * share + TAU * j / blades;
    debug_assert!(angle.abs() <= PI);
    [far * turned.cos(), far * turned.sin(), z]
}
