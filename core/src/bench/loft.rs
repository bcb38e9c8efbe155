//! The rings of the surface from the axis, or the hub's edge, to the tip.
//!
//! A propeller of one piece has a boss: a round block as thick as the hub. Its rings are rectangles as wide
//! as the circle at that distance from the axis; between the boss and the first station they are led over,
//! point by point, into the section there. Blades of their own begin at the hub's edge.

use super::form::{Form, SIDE_POINTS};
use super::ring::Ring;

/// Rings across the boss, and from the boss to the first section.
const BOSS_RINGS: u32 = 14;
/// Rings over the whole radius of the blade, about.
const BLADE_RINGS: f64 = 72.0;
/// Rings over the rounded tip.
const TIP_RINGS: u32 = 12;
/// Up to this share of its radius the boss is a plain block, farther where it is drilled farther out.
const PLAIN_BOSS: f64 = 0.8;
/// Softness of the corner between boss and blade in plan, in hub radii.
const FAIRING: f64 = 0.5;
/// A blade of one piece stands free of the boss from this share of the hub's radius on, if its first station
/// is not farther out.
const FREE_OF_BOSS: f64 = 1.25;

/// Block in the middle of a propeller of one piece.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Boss {
    /// Radius, m.
    pub radius_m: f64,
    /// Rear and front face along the direction of flight, m.
    pub faces_m: [f64; 2],
    /// How far its holes reach from the axis, m; 0 without any.
    pub drilled_m: f64,
}

impl Boss {
    /// Up to this distance from the axis it is a plain block, m.
    pub(super) fn plain_m(&self) -> f64 {
        let beside = 0.5 * (self.drilled_m + self.radius_m);
        if self.drilled_m > 0.0 { beside.max(PLAIN_BOSS * self.radius_m) } else { PLAIN_BOSS * self.radius_m }
    }
}

/// Radius from which on the blade is as drawn, m.
#[must_use]
pub fn root_radius_m(form: &Form) -> f64 {
    let hub = form.blade.hub_radius_m;
    let first = form.station_radii_m().next().unwrap_or(hub);
    if form.one_piece { first.max(FREE_OF_BOSS * hub) } else { hub.min(first) }
}

/// Rings of the blade outboard of its root, with every station among them, to just short of the tip.
pub(super) fn blade_rings(form: &Form) -> Vec<Ring> {
    blade_radii_m(form).into_iter().map(|r| form.ring(r)).collect()
}

/// All rings of one blade, from the inside out; `boss` where hub and blades are one piece.
#[must_use]
pub fn loft(form: &Form, boss: Option<Boss>) -> Vec<Ring> {
    let blade = blade_rings(form);
    let mut rings = boss.map_or_else(Vec::new, |boss| boss_rings(form, boss, &blade[0]));
    rings.extend(blade);
    rings
}

fn blade_radii_m(form: &Form) -> Vec<f64> {
    let (root, tip) = (root_radius_m(form), form.blade.radius_m);
    let mut marks: Vec<f64> = vec![root];
    marks.extend(form.station_radii_m().filter(|r| *r > root && *r < form.tip_from_m));
    if form.tip_from_m > root {
        marks.push(form.tip_from_m);
    }
    marks.dedup_by(|b, a| *b - *a < 1e-6 * tip);
    let mut radii = Vec::new();
    for pair in marks.windows(2) {
        let steps = ((pair[1] - pair[0]) / tip * BLADE_RINGS).ceil().max(1.0);
        radii.extend((0..steps as u32).map(|i| pair[0] + (pair[1] - pair[0]) * f64::from(i) / steps));
    }
    let last = marks[marks.len() - 1];
    // Closer and closer to the tip, so that its round end is drawn evenly.
    let turn = |i: u32| std::f64::consts::FRAC_PI_2 * f64::from(i) / f64::from(TIP_RINGS);
    radii.extend((0..TIP_RINGS).map(|i| last + (tip - last) * turn(i).sin()));
    radii
}

fn boss_rings(form: &Form, boss: Boss, root: &Ring) -> Vec<Ring> {
    let (r, plain) = (boss.radius_m, boss.plain_m());
    let across = (0..BOSS_RINGS).map(|i| {
        let turn = std::f64::consts::FRAC_PI_2 * f64::from(i) / f64::from(BOSS_RINGS);
        plain * turn.sin()
    });
    let out = (0..BOSS_RINGS).map(|i| plain + (root.radius_m - plain) * f64::from(i) / f64::from(BOSS_RINGS));
    let root_half = root.span(0).map(f64::abs).into_iter().fold(0.0, f64::max).min(r);
    across.chain(out).map(|x| boss_ring(boss, x, root, root_half, form)).collect()
}

fn boss_ring(boss: Boss, x: f64, root: &Ring, root_half_m: f64, form: &Form) -> Ring {
    let r = boss.radius_m;
    let plain = boss.plain_m();
    let t = ((x - plain) / (root.radius_m - plain)).clamp(0.0, 1.0);
    let half_m = if x < plain {
        (r * r - x * x).sqrt()
    } else {
        // Along the circle's tangent, led over into the section's own half width.
        let circle = (r * r - plain * plain).sqrt();
        let past = circle - (x - plain) * plain / circle - root_half_m;
        root_half_m + 0.5 * (past + past.hypot(FAIRING * r * t))
    };
    let share = t * t * (3.0 - 2.0 * t);
    let block = block(boss, half_m, share * towards_edge(boss, root));
    let shift = |axis: usize| form.axis_m(x)[axis] - form.axis_m(root.radius_m)[axis];
    let pairs = block.iter().zip(&root.points);
    let points = pairs.map(|(b, s)| [0, 1].map(|a| b[a] + share * (s[a] + shift(a) - b[a]))).collect();
    Ring { radius_m: x, points }
}

/// Points of half a block's rim: up its side behind, over its front, and down its side ahead to the middle.
fn rim(boss: Boss) -> (f64, f64) {
    let half_high = 0.5 * (boss.faces_m[1] - boss.faces_m[0]);
    let per_side = SIDE_POINTS as f64;
    let share = half_high / (2.0 * half_high + 2.0 * boss.radius_m);
    let up = (per_side * share).floor().clamp(4.0, 0.5 * per_side - 8.0);
    (up, per_side - 2.0 * up)
}

/// A rectangle with as many points as a section, corners among them, the same seen from both sides: point 0
/// in the middle of the side behind, the middle point in the middle of the side ahead; all moved on by `turn`
/// points round the rim.
fn block(boss: Boss, half_m: f64, turn: f64) -> Vec<[f64; 2]> {
    let [low, high] = boss.faces_m;
    let (middle, half_high) = (0.5 * (low + high), 0.5 * (high - low));
    let ((up, over), per_side) = (rim(boss), SIDE_POINTS as f64);
    let half_rim = |k: f64| -> [f64; 2] {
        if k <= up {
            [-half_m, half_high * k / up]
        } else if k <= up + over {
            [half_m * (2.0 * (k - up) / over - 1.0), half_high]
        } else {
            [half_m, half_high * (per_side - k) / up]
        }
    };
    let point = |k: usize| {
        let at = (k as f64 + turn).rem_euclid(2.0 * per_side);
        let [y, z] = if at < per_side { half_rim(at) } else { half_rim(at - per_side).map(|v| -v) };
        [y, middle + z]
    };
    (0..2 * SIDE_POINTS).map(point).collect()
}

/// By how many points the leading edge of the root lies round the rim from the middle of the block's side, so
/// that the surface does not shrink on its way between the two.
fn towards_edge(boss: Boss, root: &Ring) -> f64 {
    let [low, high] = boss.faces_m;
    let [y, z] = root.leading_edge();
    let up = ((z - 0.5 * (low + high)) / (0.5 * (high - low))).clamp(-0.9, 0.9);
    if y > 0.0 { -up * rim(boss).0 } else { 0.0 }
}
