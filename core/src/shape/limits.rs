//! How far the limits of the finished propeller are kept.

use super::brief::{Look, look};
use super::wood_size::blank_m;
use crate::fit::Near;
use crate::job::{FlightPoint, Limits, Setting};
use crate::result::{Brief, Limit, Margin};
use crate::rig::Rig;
use crate::wood::{BladeBeam, least_margin_like};

/// How far the drawn blade keeps the limits of the job's wishes and, in level flight, those of its engine:
/// one margin for each limit and flight point.
#[must_use]
pub fn kept(rig: &Rig) -> Vec<Margin> {
    let none = Limits::default();
    let limits = rig.job.wishes.as_ref().map_or(&none, |wishes| &wishes.limits);
    let at = |point: &FlightPoint| look(rig, point, &mut Near::default());
    let looked_at: Vec<Look> = rig.job.flight_points.iter().map(at).collect();
    let standing = standing(rig, limits).map(|point| at(&point).brief);
    margins(rig, limits, &looked_at, standing.as_ref(), beam(rig, limits).as_ref())
}

/// The flight point of the standing limit: the air of the first flight point, at rest, full throttle.
pub(super) fn standing(rig: &Rig, limits: &Limits) -> Option<FlightPoint> {
    limits.standing_rpm_least?;
    let first = rig.job.flight_points.first()?.clone();
    let name = "Standing, full throttle".into();
    Some(FlightPoint { name, airspeed_m_s: Some(0.0), setting: Setting::FullThrottle {}, ..first })
}

/// The drawn blade as a beam, where a limit asks for its stress and the job names its wood.
pub(super) fn beam(rig: &Rig, limits: &Limits) -> Option<BladeBeam> {
    limits.stress_margin_least.filter(|_| rig.job.wood.is_some())?;
    BladeBeam::new(rig).ok()
}

/// Margins of a propeller with its figures at the flight points looked at; `standing` where that limit is
/// set. How many there are depends on the job and its limits alone.
pub(super) fn margins(
    rig: &Rig,
    limits: &Limits,
    looked_at: &[Look],
    standing: Option<&Brief>,
    beam: Option<&BladeBeam>,
) -> Vec<Margin> {
    let mut all: Vec<Margin> = looked_at.iter().flat_map(|look| at_point(limits, look)).collect();
    if let (Some(least), Some(b)) = (limits.standing_rpm_least, standing) {
        all.push(at_least(Limit::StandingRpmLeast, Some(b.name.clone()), b.rpm, least));
    }
    let wood = limits.blank_width_most_m.or(limits.blank_depth_most_m).map(|_| blank_m(rig)).unzip();
    let blade = [
        (Limit::DiameterMost, Some(rig.job.propeller.diameter_m), limits.greatest_diameter_m()),
        (Limit::BlankWidthMost, wood.0, limits.blank_width_most_m),
        (Limit::BlankDepthMost, wood.1, limits.blank_depth_most_m),
    ];
    all.extend(blade.into_iter().filter_map(|(limit, found, most)| Some(at_most(limit, None, found, most?))));
    all.extend(beam.and_then(|beam| stress(rig, limits, beam)));
    all
}

/// The stress margin; its share is that of the stress.
fn stress(rig: &Rig, limits: &Limits, drawn: &BladeBeam) -> Option<Margin> {
    let least = limits.stress_margin_least?;
    let found = least_margin_like(drawn, rig).ok().flatten();
    let share = found.as_ref().map_or(NO_FIGURE, |(_, margin)| (1.0 + margin) / (1.0 + least) - 1.0);
    let (flight_point, found) = found.unzip();
    Some(Margin { limit: Limit::StressMarginLeast, flight_point, found, allowed: Some(least), share })
}

/// Limits that a flight point has by itself.
fn at_point(limits: &Limits, look: &Look) -> Vec<Margin> {
    let b = &look.brief;
    let place = || Some(b.name.clone());
    let mut all = Vec::new();
    let share = if b.rpm.is_some() { 1.0 } else { NO_FIGURE };
    all.push(Margin { limit: Limit::Answer, flight_point: place(), found: None, allowed: None, share });
    if let Some(spare) = look.spare {
        let engine = [
            (Limit::EngineRpm, b.rpm, spare.highest_rpm, spare.rpm_share),
            (Limit::EnginePower, b.power_w, spare.given_w, spare.power_share),
        ];
        all.extend(engine.map(|(limit, found, allowed, share)| {
            let allowed = found.map(|_| allowed);
            Margin { limit, flight_point: place(), found, allowed, share }
        }));
    }
    all.extend(limits.rpm_most.map(|most| at_most(Limit::RpmMost, place(), b.rpm, most)));
    for own in limits.rpm.iter().filter(|own| own.flight_point == b.name) {
        all.extend(own.most.map(|most| at_most(Limit::RpmMost, place(), b.rpm, most)));
        all.extend(own.least.map(|least| at_least(Limit::RpmLeast, place(), b.rpm, least)));
    }
    all.extend(limits.tip_mach_most.map(|most| at_most(Limit::TipMachMost, place(), b.tip_mach, most)));
    all
}

/// The share of a limit that is left where there is no figure to judge by: as if it were broken by the whole
/// of it, for a search needs a number to get away from.
pub(super) const NO_FIGURE: f64 = -1.0;

pub(super) fn at_most(limit: Limit, flight_point: Option<String>, found: Option<f64>, most: f64) -> Margin {
    let share = found.map_or(NO_FIGURE, |f| 1.0 - f / most);
    Margin { limit, flight_point, found, allowed: Some(most), share }
}

pub(super) fn at_least(limit: Limit, flight_point: Option<String>, found: Option<f64>, least: f64) -> Margin {
    let share = found.map_or(NO_FIGURE, |f| f / least - 1.0);
    Margin { limit, flight_point, found, allowed: Some(least), share }
}
