//! Boss and bolts.
//!
//! Common practice for a flat wooden boss between two plates: the bolts' clamping carries the torque by
//! friction; the bolts are looked at as if there were none. Of the boss the section through the axis is
//! looked at, where one piece of wood carries one blade's pull to the other.

use std::f64::consts::PI;

use super::BladeBeam;
use crate::drilling::Pattern;
use crate::job::Hub;
use crate::result::HubResult;

/// Nut factor K of `T = K F d` for dry threads (common practice).
const NUT_FACTOR: f64 = 0.2;
/// Friction of wood on a dry metal plate (from memory).
const FRICTION: f64 = 0.25;
/// Coefficient of variation of the strength across the grain (Wood Handbook, FPL-GTR-190, Table 5-6; from
/// memory).
const SCATTER_ACROSS: f64 = 0.28;

/// The hub under the greatest torque (N m) and the greatest pull of a blade (N) of any case.
pub(super) fn hub(
    beam: &BladeBeam,
    hub: &Hub,
    boss_diameter_m: f64,
    holes: Option<Pattern>,
    torque_n_m: f64,
    pull_n: f64,
) -> HubResult {
    let bolts = f64::from(hub.bolts);
    let bolt_force_n = torque_n_m.abs() / (bolts * 0.5 * hub.bolt_circle_m);
    let bearing_pa = bolt_force_n / (hub.bolt_diameter_m * hub.thickness_m);
    let crushing = &beam.material.crushing;
    let steady_pa = crushing.mean_pa * (1.0 - 1.645 * SCATTER_ACROSS);
    let boss_tension_pa = boss_tension_pa(beam, hub, boss_diameter_m, pull_n);
    let area_m2 = clamped_m2(hub);
    let force = |torque: f64| torque / (NUT_FACTOR * hub.bolt_diameter_m);
    let clamp_pa = hub.bolt_torque_n_m.map(|t| bolts * force(t) / area_m2);
    let friction = |t: f64| FRICTION * bolts * force(t) * friction_radius_m(hub) / torque_n_m.abs().max(1e-9);
    let past_boss_m = holes.and_then(|p| p.past_boss_m(0.5 * boss_diameter_m));
    let margins = [
        past_boss_m.map(|past| 0.5 * boss_diameter_m / (0.5 * boss_diameter_m + past)),
        Some(crushing.limit_pa / bearing_pa.max(1.0)),
        boss_tension_pa.map(|pa| beam.material.tension.limit_pa / pa.max(1.0)),
        clamp_pa.map(|pa| steady_pa / pa.max(1.0)),
    ];
    HubResult {
        torque_n_m,
        bolt_force_n,
        bearing_pa,
        bearing_limit_pa: crushing.limit_pa,
        pull_n,
        boss_tension_pa,
        boss_limit_pa: beam.material.tension.limit_pa,
        clamp_pa,
        clamp_limit_pa: steady_pa,
        past_boss_m,
        most_bolt_torque_n_m: steady_pa * area_m2 / bolts * NUT_FACTOR * hub.bolt_diameter_m,
        friction_share: hub.bolt_torque_n_m.map(friction),
        margin: margins.into_iter().flatten().fold(f64::INFINITY, f64::min) - 1.0,
    }
}

/// Pull over the section through the axis with the bore and two bolt holes out of it; `None` for more than
/// two blades, whose boss is built up otherwise, and where the holes leave nothing.
fn boss_tension_pa(beam: &BladeBeam, hub: &Hub, boss_diameter_m: f64, pull_n: f64) -> Option<f64> {
    let holes = hub.bore_m + if hub.bolts > 1 { 2.0 * hub.bolt_diameter_m } else { 0.0 };
    let area_m2 = hub.thickness_m * (boss_diameter_m - holes);
    (beam.blades <= 2 && area_m2 > 0.0).then(|| pull_n / area_m2)
}

/// Wood under a plate, bore and bolt holes out of it, m².
fn clamped_m2(hub: &Hub) -> f64 {
    let disc = |d: f64| 0.25 * PI * d * d;
    disc(hub.flange_diameter_m) - disc(hub.bore_m) - f64::from(hub.bolts) * disc(hub.bolt_diameter_m)
}

/// Radius at which the friction of an evenly pressed ring acts, m: `⅔ (Ro³ − Ri³)/(Ro² − Ri²)`.
fn friction_radius_m(hub: &Hub) -> f64 {
    let (o, i) = (0.5 * hub.flange_diameter_m, 0.5 * hub.bore_m);
    2.0 / 3.0 * (o.powi(3) - i.powi(3)) / (o * o - i * i)
}
