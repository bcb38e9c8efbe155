//! How a station carries its share of the lift: its chord, lift coefficient and angle.

use super::Lift;
use crate::result::Bound;
use crate::rig::Rig;
use crate::rotor::Condition;
use crate::rotor::element::{Blend, Element};
use crate::shape::ShapeError;

/// Share of the greatest lift that a station may be asked for.
const STALL_SHARE: f64 = 0.9;
/// Lift coefficient below which drag over lift tells nothing.
const LEAST_LIFT: f64 = 0.05;
/// Steps of a look over the chord, from the least to the greatest in equal ratios.
const CHORDS: u32 = 24;
const NARROWINGS: u32 = 16;
const GOLDEN: f64 = 0.618_033_988_749_894_9;

/// How a station works.
#[derive(Clone, Copy)]
pub(super) struct Working {
    pub(super) chord_m: f64,
    pub(super) cl: f64,
    pub(super) drag_to_lift: f64,
    pub(super) alpha_rad: f64,
    pub(super) reynolds: f64,
    pub(super) bound: Bound,
}

/// Limits of the chord, and how stations carry their lift.
pub(super) struct Limits {
    pub(super) least_m: f64,
    pub(super) greatest_m: f64,
    pub(super) lift: Lift,
}

/// How a station works whose chord times lift coefficient (m) is given, its Reynolds number by the chord of
/// the pass before; at a lift coefficient where one is given.
pub(super) fn works(
    rig: &Rig,
    at: &Condition,
    radius_m: f64,
    (chord_m, chord_lift_m): (f64, Option<f64>),
    limits: &Limits,
    lift: Option<f64>,
) -> Result<Working, ShapeError> {
    let free = chord_lift_m.filter(|_| limits.lift == Lift::LeastDrag && lift.is_none());
    if let Some(found) = free.and_then(|kept| least_drag(rig, at, radius_m, kept, limits)) {
        return Ok(found);
    }
    let mut ring = rig.rotor.ring(radius_m);
    ring.cut.chord_m = chord_m;
    let (element, situation) = rig.rotor.element(&ring, at);
    let no_lift = ShapeError::NoLift { radius_m };
    let most = STALL_SHARE * element.section.at(element.section.stall_rad()).cl;
    let given = lift.and_then(|cl| incidence(&element.section, cl.min(most)));
    let alpha_rad = given.or_else(|| match limits.lift {
        Lift::Coefficient(cl) => incidence(&element.section, cl),
        Lift::LeastDrag | Lift::BestIncidence => element.section.best().map(|b| b.alpha_rad),
    });
    let alpha_rad = alpha_rad.ok_or(no_lift)?;
    let c = element.section.at(alpha_rad);
    let (free, reynolds) = (chord_lift_m.map_or(chord_m, |cc| cc / c.cl), situation.reynolds);
    let chord = free.clamp(limits.least_m, limits.greatest_m);
    let unbound = Working {
        chord_m: chord,
        cl: c.cl,
        drag_to_lift: c.cd / c.cl,
        alpha_rad,
        reynolds,
        bound: Bound::Free,
    };
    let Some(kept) = chord_lift_m.filter(|_| chord != free) else { return Ok(unbound) };
    Ok(bounded(&element, unbound, kept / chord, chord < free))
}

/// The chord of least drag for a chord times lift coefficient (m); `None` where no chord within the limits
/// carries it.
fn least_drag(rig: &Rig, at: &Condition, radius_m: f64, kept_m: f64, limits: &Limits) -> Option<Working> {
    let with = |place: f64| -> Option<Working> {
        let mut ring = rig.rotor.ring(radius_m);
        let chord_m = limits.least_m * (limits.greatest_m / limits.least_m).powf(place);
        ring.cut.chord_m = chord_m;
        let (element, situation) = rig.rotor.element(&ring, at);
        let cl = kept_m / chord_m;
        let most = STALL_SHARE * element.section.at(element.section.stall_rad()).cl;
        let alpha_rad = incidence(&element.section, cl).filter(|_| cl <= most && cl >= LEAST_LIFT)?;
        let (c, reynolds) = (element.section.at(alpha_rad), situation.reynolds);
        Some(Working { chord_m, cl, drag_to_lift: c.cd / cl, alpha_rad, reynolds, bound: Bound::Free })
    };
    let drag = |w: &Option<Working>| w.map_or(f64::INFINITY, |w| w.drag_to_lift);
    let node = |i: u32| f64::from(i) / f64::from(CHORDS);
    let by_drag = |a: &u32, b: &u32| drag(&with(node(*a))).total_cmp(&drag(&with(node(*b))));
    let top = (0..=CHORDS).min_by(by_drag).filter(|i| with(node(*i)).is_some())?;
    let (mut low, mut high) = (node(top.saturating_sub(1)), node((top + 1).min(CHORDS)));
    for _ in 0..NARROWINGS {
        let (a, b) = (high - GOLDEN * (high - low), low + GOLDEN * (high - low));
        if drag(&with(a)) <= drag(&with(b)) { high = b } else { low = a }
    }
    let bound = match 0.5 * (low + high) {
        place if place < 1e-3 => Bound::LeastChord,
        place if place > 1.0 - 1e-3 => Bound::GreatestChord,
        _ => Bound::Free,
    };
    with(0.5 * (low + high)).or_else(|| with(node(top))).map(|w| Working { bound, ..w })
}

/// A station whose chord is bound: the lift coefficient that keeps its circulation.
fn bounded(element: &Element, unbound: Working, cl: f64, narrow: bool) -> Working {
    let stall_rad = element.section.stall_rad();
    let most = STALL_SHARE * element.section.at(stall_rad).cl;
    let bound = match narrow {
        true if cl > most => Bound::NearStall,
        true => Bound::GreatestChord,
        false => Bound::LeastChord,
    };
    let Some(alpha_rad) = incidence(&element.section, cl.min(most)) else {
        return Working { bound, ..unbound };
    };
    let c = element.section.at(alpha_rad);
    // Near zero lift the drag over lift has no bound; what counts is that little circulation is lost there.
    Working { cl: c.cl, drag_to_lift: (c.cd / c.cl.max(0.05)).min(1.0), alpha_rad, bound, ..unbound }
}

/// The angle below stall at which a section gives a lift coefficient, rad.
fn incidence(section: &Blend, cl: f64) -> Option<f64> {
    let (mut low, mut high) = (section.negative_stall_rad(), section.stall_rad());
    if !(section.at(low).cl < cl && section.at(high).cl >= cl) {
        return None;
    }
    for _ in 0..60 {
        let middle = 0.5 * (low + high);
        if section.at(middle).cl < cl { low = middle } else { high = middle }
    }
    Some(0.5 * (low + high))
}
