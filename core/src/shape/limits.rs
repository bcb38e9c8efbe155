//! Limits of the finished propeller, and how far each is kept.

use crate::job::{FlightPoint, Setting};
use crate::result::{Brief, Limit, Margin};
use crate::rig::Rig;

/// Limits; `None` is no limit.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Limits {
    /// Greatest propeller rpm at any flight point looked at.
    pub rpm_most: Option<f64>,
    /// Least propeller rpm standing at full throttle.
    pub standing_rpm_least: Option<f64>,
    /// Greatest helical Mach number of the tip at any flight point looked at.
    pub tip_mach_most: Option<f64>,
    /// Greatest diameter, m: twice the height of the shaft less the clearance.
    pub diameter_most_m: Option<f64>,
    /// Greatest width of the blade in the plane of rotation, m.
    pub blank_width_most_m: Option<f64>,
    /// Greatest depth of the blade along the axis, m.
    pub blank_depth_most_m: Option<f64>,
}

/// The flight point of the standing limit: the air of the first flight point, at rest, full throttle.
pub(super) fn standing(rig: &Rig) -> Option<FlightPoint> {
    let first = rig.job.flight_points.first()?.clone();
    let name = "Standing, full throttle".into();
    Some(FlightPoint { name, airspeed_m_s: Some(0.0), setting: Setting::FullThrottle {}, ..first })
}

/// Margins of a propeller with its figures at the flight points looked at; `standing` where that limit is set.
pub(super) fn margins(
    rig: &Rig,
    limits: &Limits,
    looked_at: &[Brief],
    standing: Option<&Brief>,
) -> Vec<Margin> {
    let mut all = Vec::new();
    for b in looked_at {
        let place = Some(b.name.clone());
        let answer = if b.rpm.is_some() { 1.0 } else { -1.0 };
        all.push(Margin {
            limit: Limit::Answer,
            flight_point: place.clone(),
            found: None,
            allowed: 0.0,
            share: answer,
        });
        all.extend(limits.rpm_most.map(|most| at_most(Limit::RpmMost, place.clone(), b.rpm, most)));
        all.extend(limits.tip_mach_most.map(|most| at_most(Limit::TipMachMost, place, b.tip_mach, most)));
    }
    if let (Some(least), Some(b)) = (limits.standing_rpm_least, standing) {
        let share = b.rpm.map_or(-1.0, |rpm| rpm / least - 1.0);
        let flight_point = Some(b.name.clone());
        all.push(Margin {
            limit: Limit::StandingRpmLeast,
            flight_point,
            found: b.rpm,
            allowed: least,
            share,
        });
    }
    let (width_m, depth_m) = blank_m(rig);
    let blade = [
        (Limit::DiameterMost, rig.job.propeller.diameter_m, limits.diameter_most_m),
        (Limit::BlankWidthMost, width_m, limits.blank_width_most_m),
        (Limit::BlankDepthMost, depth_m, limits.blank_depth_most_m),
    ];
    all.extend(
        blade.into_iter().filter_map(|(limit, found, most)| Some(at_most(limit, None, Some(found), most?))),
    );
    all
}

fn at_most(limit: Limit, flight_point: Option<String>, found: Option<f64>, allowed: f64) -> Margin {
    let share = found.map_or(-1.0, |f| 1.0 - f / allowed);
    Margin { limit, flight_point, found, allowed, share }
}

/// Width and depth of the box round every station: chord line and thickness laid across one another, on the safe side.
fn blank_m(rig: &Rig) -> (f64, f64) {
    let blade = &rig.rotor.blade;
    blade.station_radii_m().map(|r| blade.cut(r)).fold((0.0, 0.0), |(width, depth), cut| {
        let (s, c) = cut.angle_rad.sin_cos();
        let t = cut.thickness_ratio;
        let side = |a: f64, b: f64| cut.chord_m * (a.abs() + t * b.abs());
        (f64::max(width, side(c, s)), f64::max(depth, side(s, c)))
    })
}
