//! Holes through the boss of a solid.
//!
//! The boss has two flat faces. Of each the triangles are taken out; what is left open is filled again round
//! the holes: a strip from the rim to a circle, and the plate within the circle by ear clipping; the walls of
//! the holes join both faces.

use std::collections::HashMap;
use std::f64::consts::{PI, TAU};

use earcut::Earcut;

use super::loft::Boss;
use super::solid::Solid;
use crate::drilling::Hole;

/// Sides of a hole and of the circle round all holes.
const HOLE_SIDES: u32 = 48;
const CIRCLE_SIDES: u32 = 96;
/// How near (m) a corner lies to a face to be of it.
const FLAT_M: f64 = 1e-9;
/// Turns by which circles begin: no three corners of different ones stand in line.
const BEGINS: [f64; 2] = [0.123, 0.457];

/// A face of the boss.
#[derive(Clone, Copy)]
struct Face {
    height_m: f64,
    /// 1 where it looks forward, −1 aft.
    looks: f64,
    /// How far from the axis, along a blade, it is plain, m.
    plain_m: f64,
    blades: f64,
}

impl Face {
    /// Whether a corner lies on its plain part.
    fn has(&self, [x, y, z]: [f64; 3]) -> bool {
        let share = TAU / self.blades;
        let angle = y.atan2(x);
        // Within the boss a blade has its share of the turn: its own half circle is pressed into it.
        let from_blade = (angle - share * (angle / share).round()) * 0.5 * self.blades;
        (z - self.height_m).abs() < FLAT_M && x.hypot(y) * from_blade.cos() < (1.0 - 1e-6) * self.plain_m
    }
}

impl Solid {
    /// The solid with holes along the axis through the boss of so many blades; `None` where its faces do not
    /// lie flat and whole round the holes.
    #[must_use]
    pub fn pierced(&self, holes: &[Hole], boss: Boss, blades: u32) -> Option<Self> {
        if holes.is_empty() {
            return Some(self.clone());
        }
        let mut solid = self.clone();
        let face = |height_m: f64, looks: f64| {
            let (plain_m, blades) = (boss.plain_m(), f64::from(blades));
            Face { height_m, looks, plain_m, blades }
        };
        let aft = solid.opened(face(boss.faces_m[0], -1.0), holes)?;
        let ahead = solid.opened(face(boss.faces_m[1], 1.0), holes)?;
        for (low, high) in aft.into_iter().zip(ahead) {
            solid.wall(&low, &high);
        }
        Some(solid.without_spares())
    }

    /// One face opened for the holes: corners of each hole's rim, anticlockwise seen from ahead.
    fn opened(&mut self, face: Face, holes: &[Hole]) -> Option<Vec<Vec<u32>>> {
        let rim = self.lift(face)?;
        let reach = |h: &Hole| h.at_m[0].hypot(h.at_m[1]) + h.radius_m;
        let most = holes.iter().map(reach).fold(0.0, f64::max);
        let near = rim.iter().map(|i| self.axis_away_m(*i)).fold(f64::INFINITY, f64::min);
        if most >= near {
            return None;
        }
        // A chord of the circle must pass outside the holes.
        let circle = self.circle([0.0, 0.0], 0.5 * (most + near), CIRCLE_SIDES, face, BEGINS[0]);
        if 0.5 * (most + near) * (PI / f64::from(CIRCLE_SIDES)).cos() <= most {
            return None;
        }
        self.strip(&rim, &circle, face)?;
        let around = |h: &Hole| self.circle(h.at_m, h.radius_m, HOLE_SIDES, face, BEGINS[1]);
        let rims: Vec<Vec<u32>> = holes.iter().map(around).collect();
        self.plate(&circle, &rims, face)?;
        Some(rims)
    }

    fn axis_away_m(&self, i: u32) -> f64 {
        let [x, y, _] = self.vertices[i as usize];
        x.hypot(y)
    }

    /// Takes a face's triangles out and gives its rim, anticlockwise seen from ahead; `None` unless the rim
    /// is one loop round the axis.
    fn lift(&mut self, face: Face) -> Option<Vec<u32>> {
        let on = |i: &u32| face.has(self.vertices[*i as usize]);
        let (flat, rest): (Vec<[u32; 3]>, Vec<[u32; 3]>) =
            self.triangles.iter().copied().partition(|t| t.iter().all(on));
        let mut next: HashMap<u32, u32> = HashMap::new();
        let edges: Vec<[u32; 2]> = flat.iter().flat_map(|[a, b, c]| [[*a, *b], [*b, *c], [*c, *a]]).collect();
        let all: std::collections::HashSet<[u32; 2]> = edges.iter().copied().collect();
        for [a, b] in edges.into_iter().filter(|[a, b]| !all.contains(&[*b, *a])) {
            if next.insert(a, b).is_some() {
                return None;
            }
        }
        // The same loop whatever order a table of hashes has.
        let first = *next.keys().min()?;
        let mut rim = vec![first];
        while let Some(after) = next.get(rim.last()?).filter(|i| **i != first && rim.len() <= next.len()) {
            rim.push(*after);
        }
        if face.looks < 0.0 {
            rim.reverse();
        }
        let turns = (0..rim.len()).map(|k| self.turn(rim[k], rim[(k + 1) % rim.len()]));
        let round = turns.clone().all(|t| t > 0.0) && (turns.sum::<f64>() - TAU).abs() < 1e-6;
        (rim.len() == next.len() && round).then(|| {
            self.triangles = rest;
            rim
        })
    }

    /// Angle about the axis from one corner to another, −π to π.
    fn turn(&self, from: u32, to: u32) -> f64 {
        let ([x, y, _], [u, v, _]) = (self.vertices[from as usize], self.vertices[to as usize]);
        (x * v - y * u).atan2(x * u + y * v)
    }

    fn circle(&mut self, [x, y]: [f64; 2], radius_m: f64, sides: u32, face: Face, begins: f64) -> Vec<u32> {
        let corner = |k: u32| {
            let (s, c) = (begins + TAU * f64::from(k) / f64::from(sides)).sin_cos();
            [x + radius_m * c, y + radius_m * s, face.height_m]
        };
        (0..sides).map(|k| self.add(corner(k))).collect()
    }

    /// Triangles between two loops round the axis, the outer one first.
    fn strip(&mut self, rim: &[u32], circle: &[u32], face: Face) -> Option<()> {
        let away = |i: &usize| self.turn(circle[0], rim[*i]).abs();
        let start = (0..rim.len()).min_by(|a, b| away(a).total_cmp(&away(b)))?;
        let (n, m) = (rim.len(), circle.len());
        let outer = |k: usize| rim[(start + k) % n];
        let inner = |k: usize| circle[k % m];
        let (mut i, mut j) = (0, 0);
        while i < n || j < m {
            // The side whose next corner comes first about the axis goes on.
            let ahead = self.turn(inner(j + 1), outer(i + 1)) <= 0.0;
            if j == m || (i < n && ahead) {
                self.facing([outer(i), outer(i + 1), inner(j)], face);
                i += 1;
            } else {
                self.facing([outer(i), inner(j + 1), inner(j)], face);
                j += 1;
            }
        }
        Some(())
    }

    /// The plate within a circle, round the holes.
    fn plate(&mut self, circle: &[u32], rims: &[Vec<u32>], face: Face) -> Option<()> {
        let mut corners: Vec<u32> = circle.to_vec();
        let mut begin = Vec::new();
        for rim in rims {
            begin.push(corners.len() as u32);
            corners.extend(rim);
        }
        let flat = corners.iter().map(|i| [self.vertices[*i as usize][0], self.vertices[*i as usize][1]]);
        let mut cut: Vec<u32> = Vec::new();
        Earcut::new().earcut(flat.collect::<Vec<_>>(), &begin, &mut cut);
        // Every corner is used, or the plate would not join its neighbours.
        if cut.len() / 3 != corners.len() + 2 * rims.len() - 2 {
            return None;
        }
        for t in cut.chunks_exact(3) {
            self.facing([0, 1, 2].map(|k| corners[t[k] as usize]), face);
        }
        Some(())
    }

    /// Adds a flat triangle that looks where its face does.
    fn facing(&mut self, t: [u32; 3], face: Face) {
        let [a, b, c] = t.map(|i| self.vertices[i as usize]);
        let twice = (b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1]);
        self.triangles.push(if twice * face.looks > 0.0 { t } else { [t[0], t[2], t[1]] });
    }

    /// The wall of a hole between its two rims: it looks at the hole's own middle.
    fn wall(&mut self, low: &[u32], high: &[u32]) {
        let n = low.len();
        for k in 0..n {
            let next = (k + 1) % n;
            self.triangles.push([low[k], high[k], low[next]]);
            self.triangles.push([low[next], high[k], high[next]]);
        }
    }
}
