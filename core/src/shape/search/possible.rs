//! Limits of rpm that no blade can keep, told before any is tried.

use crate::engine::Shaft;
use crate::fit::highest_rpm;
use crate::job::{FlightPoint, Limits, PitchControl, Setting};
use crate::result::{Limit, Margin};
use crate::rig::Rig;
use crate::shape::ShapeError;
use crate::shape::limits::{at_least, at_most};

/// Refuses limits of rpm outside what any blade can turn at a flight point; `standing` is that of the
/// standing limit.
pub(super) fn check_rpm(
    rig: &Rig,
    limits: &Limits,
    points: &[FlightPoint],
    standing: Option<&FlightPoint>,
) -> Result<(), ShapeError> {
    for point in points {
        let own = || limits.rpm.iter().filter(|own| own.flight_point == point.name);
        let most = limits.rpm_most.into_iter().chain(own().filter_map(|own| own.most));
        let least = own().filter_map(|own| own.least);
        span(rig, point).kept(&point.name, most.reduce(f64::min), least.reduce(f64::max), Limit::RpmLeast)?;
    }
    standing.map_or(Ok(()), |point| {
        span(rig, point).kept(&point.name, None, limits.standing_rpm_least, Limit::StandingRpmLeast)
    })
}

/// What propeller rpm a flight point may come to with any blade, and why.
struct Span {
    low: (f64, &'static str),
    high: (f64, &'static str),
}

fn span(rig: &Rig, point: &FlightPoint) -> Span {
    let governed = matches!(rig.job.propeller.pitch_control, PitchControl::ConstantSpeed { .. });
    let high = rig.shaft.as_ref().map_or((f64::INFINITY, ""), fastest);
    match point.setting {
        Setting::Rpm { rpm } => Span { low: (rpm, SET), high: (rpm, SET) },
        Setting::FullThrottle {} | Setting::Throttle { .. } if !governed => {
            let low = rig.shaft.as_ref().and_then(slowest_rpm).unwrap_or(0.0);
            Span { low: (low, SLOWEST), high }
        }
        Setting::FullThrottle {} | Setting::Throttle { .. } | Setting::Level {} => {
            Span { low: (0.0, ""), high }
        }
        Setting::Power { .. } => Span { low: (0.0, ""), high: (f64::INFINITY, "") },
    }
}

const SET: &str = "The flight point itself sets that rpm.";
const SLOWEST: &str = "The engine's power curve begins there: what it gives at fewer rpm is not known.";
const FASTEST: &str = "That is the engine's limit, or the end of its power curve.";
const UNLOADED: &str = "That is how fast the motor turns without load.";

/// The highest rpm, and what sets it.
fn fastest(shaft: &Shaft) -> (f64, &'static str) {
    let why = match shaft {
        Shaft::Piston(_) => FASTEST,
        Shaft::Electric(_) => UNLOADED,
    };
    (highest_rpm(shaft), why)
}

/// Where a piston engine's curve begins.
fn slowest_rpm(shaft: &Shaft) -> Option<f64> {
    matches!(shaft, Shaft::Piston(_)).then(|| shaft.rpm_range().0)
}

impl Span {
    fn kept(
        &self,
        name: &str,
        most: Option<f64>,
        least: Option<f64>,
        of_least: Limit,
    ) -> Result<(), ShapeError> {
        let place = || Some(name.to_string());
        let refused = |margin: Margin, why: &str| {
            Err(ShapeError::Impossible { limit: margin.sentence(), why: why.into() })
        };
        match (most, least) {
            (Some(most), _) if most < self.low.0 * SAME => {
                refused(at_most(Limit::RpmMost, place(), Some(self.low.0), most), self.low.1)
            }
            (_, Some(least)) if least * SAME > self.high.0 => {
                refused(at_least(of_least, place(), Some(self.high.0), least), self.high.1)
            }
            _ => Ok(()),
        }
    }
}

/// Rpm that lie closer together are the same.
const SAME: f64 = 1.0 - 1e-9;
