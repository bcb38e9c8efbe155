//! The free figures of a search: few and smooth, each on top of the drawn blade.

use crate::job::Held;
use crate::result::FreeValue;
use crate::rig::Rig;
use crate::shape::ShapeError;
use crate::shape::variant::{accepted, with_angles_of};

/// Number of free figures.
pub const FREE: usize = 8;

/// A free figure.
struct Span {
    name: &'static str,
    /// Half of the span either way from the drawn blade.
    half: f64,
    unit: &'static str,
    /// What holds it.
    held: Held,
}

const fn span(name: &'static str, half: f64, unit: &'static str, held: Held) -> Span {
    Span { name, half, unit, held }
}

const SPANS: [Span; FREE] = [
    span("diameter", 0.15, "share of the diameter", Held::Diameter),
    span("pitch", 8.0, "degrees, everywhere alike", Held::Pitch),
    span("twist, root to tip", 6.0, "degrees at the tip, less at the root", Held::Twist),
    span("twist, bowed", 4.0, "degrees", Held::Twist),
    span("twist, third order", 3.0, "degrees", Held::Twist),
    span("chord", 0.15, "share of the chord, everywhere alike", Held::Chord),
    span("chord, root to tip", 0.15, "share of the chord at the tip, less at the root", Held::Chord),
    span("chord, bowed", 0.15, "share of the chord", Held::Chord),
];
/// How near to an end of its span counts as at it.
const AT_END: f64 = 0.999;

/// Which figures are free.
pub(super) fn free(held: &[Held]) -> Vec<usize> {
    (0..FREE).filter(|i| !held.contains(&SPANS[*i].held)).collect()
}

/// The free figures as told.
pub(super) fn told(x: &[f64; FREE], held: &[Held]) -> Vec<FreeValue> {
    let value = |i: usize| {
        let Span { name, half, unit, .. } = SPANS[i];
        FreeValue { name, value: x[i] * half, span: (-half, half), unit, at_end: x[i].abs() > AT_END }
    };
    free(held).into_iter().map(value).collect()
}

/// The blade of free figures, each from −1 to 1 of its span. Chords go with the diameter, thickness ratios
/// stay.
pub(super) fn shaped(rig: &Rig, x: &[f64; FREE]) -> Result<Rig, ShapeError> {
    let v: Vec<f64> = x.iter().zip(&SPANS).map(|(x, span)| x.clamp(-1.0, 1.0) * span.half).collect();
    let stations = &rig.job.propeller.stations;
    let inner = stations.first().map_or(0.0, |s| s.radius_fraction);
    let outer = stations.last().map_or(1.0, |s| s.radius_fraction);
    // Legendre polynomials from −1 at the first station to 1 at the last: each leaves the mean of the others
    // alone.
    let along = |i: usize| 2.0 * (stations[i].radius_fraction - inner) / (outer - inner) - 1.0;
    let bow = |u: f64| 0.5 * (3.0 * u * u - 1.0);
    let third = |u: f64| 0.5 * (5.0 * u * u * u - 3.0 * u);
    let mut propeller = with_angles_of(rig, |i, angle| {
        let u = along(i);
        angle + (v[1] + v[2] * u + v[3] * bow(u) + v[4] * third(u)).to_radians()
    });
    propeller.diameter_m *= 1.0 + v[0];
    for (i, station) in propeller.stations.iter_mut().enumerate() {
        let u = along(i);
        station.chord_m *= (1.0 + v[0]) * (1.0 + v[5] + v[6] * u + v[7] * bow(u));
    }
    accepted(rig, propeller)
}
