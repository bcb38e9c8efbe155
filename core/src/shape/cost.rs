//! What an error of the blade costs: slopes by central differences through the whole fit, station by station.
//!
//! Every difference is a blade of its own, matched anew with engine and aircraft. The bands are linear in the
//! errors: right for small ones. The polars are doubted as a whole: all lift, and all drag coefficients, too
//! great or too small by the same share.

use std::sync::Arc;

use super::variant::{accepted, with_angles_of};
use super::{ShapeError, brief};
use crate::job::{FlightPoint, Propeller, Setting};
use crate::result::{Brief, Cost, ErrorCosts, Figure, Tolerance};
use crate::rig::Rig;

/// Half the width of a difference, degrees.
const STEP_DEG: f64 = 0.1;
/// Half the width of a difference, mm, or this share of the chord or thickness where that is less.
const STEP_MM: f64 = 0.1;
const STEP_SHARE: f64 = 0.02;
/// Half the width of a difference of the polars, as a share.
const STEP_POLARS: f64 = 0.01;

/// Which figure of a station is off.
#[derive(Clone, Copy)]
enum Off {
    Angle,
    Chord,
    Thickness,
}

/// What errors cost at every flight point of the job, and standing and at top speed where engine and aircraft
/// tell.
///
/// # Errors
/// A tolerance below zero or not a number; a changed blade that the job's check refuses.
pub fn error_costs(rig: &Rig, tolerance: Tolerance) -> Result<ErrorCosts, ShapeError> {
    let parts = [
        ("angle", tolerance.angle_deg),
        ("chord", tolerance.chord_mm),
        ("thickness", tolerance.thickness_mm),
        ("lift", tolerance.lift_percent),
        ("drag", tolerance.drag_percent),
    ];
    for (name, found) in parts {
        if !(0.0..=1e3).contains(&found) {
            return Err(ShapeError::Figure { name, found, allowed: "a tolerance of 0 to 1000" });
        }
    }
    let points = judged(rig);
    let all = |rig: &Rig| -> Vec<Brief> { points.iter().map(|p| brief(rig, p)).collect() };
    let drawn = all(rig);
    let mut costs: Vec<Cost> = points.iter().zip(&drawn).flat_map(|(p, b)| empty(p, b)).collect();
    for station in 0..rig.job.propeller.stations.len() {
        for off in [Off::Angle, Off::Chord, Off::Thickness] {
            let step = step(&rig.job.propeller, station, off);
            let beside = |by| changed(rig, station, off, by).map(|other| all(&other));
            let (less, more) = (beside(-step)?, beside(step)?);
            for cost in &mut costs {
                let point = points.iter().position(|p| p.name == cost.flight_point);
                let at = |briefs: &[Brief]| point.and_then(|p| cost.figure.of(&briefs[p]));
                let slope = at(&more).zip(at(&less)).map(|(a, b)| (a - b) / (2.0 * step));
                match off {
                    Off::Angle => cost.per_degree.push(slope),
                    Off::Chord => cost.per_mm_chord.push(slope),
                    Off::Thickness => cost.per_mm_thickness.push(slope),
                }
            }
        }
    }
    let doubted = |lift, drag| all(&with_polars(rig, lift, drag));
    let lift = [doubted(1.0 - STEP_POLARS, 1.0), doubted(1.0 + STEP_POLARS, 1.0)];
    let drag = [doubted(1.0, 1.0 - STEP_POLARS), doubted(1.0, 1.0 + STEP_POLARS)];
    for cost in &mut costs {
        let point = points.iter().position(|p| p.name == cost.flight_point);
        let at = |briefs: &[Brief]| point.and_then(|p| cost.figure.of(&briefs[p]));
        let per_percent = |[less, more]: &[Vec<Brief>; 2]| {
            at(more).zip(at(less)).map(|(a, b)| (a - b) / (200.0 * STEP_POLARS))
        };
        let (per_lift, per_drag) = (per_percent(&lift), per_percent(&drag));
        (cost.per_percent_lift, cost.per_percent_drag) = (per_lift, per_drag);
        band(cost, &tolerance);
    }
    Ok(ErrorCosts { radii_m: rig.rotor.blade.station_radii_m().collect(), tolerance, costs })
}

/// The flight points of the job, with standing and top speed where they are missing and may be asked for.
fn judged(rig: &Rig) -> Vec<FlightPoint> {
    let mut points = rig.job.flight_points.clone();
    let Some(first) = points.first().cloned() else { return points };
    let full =
        |v: Option<f64>| points.iter().any(|p| p.setting == Setting::FullThrottle {} && p.airspeed_m_s == v);
    let (standing, top) =
        (!full(Some(0.0)) && rig.shaft.is_some(), !full(None) && rig.job.aircraft.is_some());
    let mut add = |name: &str, airspeed_m_s| {
        let name = if points.iter().any(|p| p.name == name) {
            format!("{name}, full throttle")
        } else {
            name.into()
        };
        points.push(FlightPoint { name, airspeed_m_s, setting: Setting::FullThrottle {}, ..first.clone() });
    };
    if standing {
        add("Standing", Some(0.0));
    }
    if top && rig.shaft.is_some() {
        add("Top speed", None);
    }
    points
}

/// Figures of a flight point that can change: airspeed only at top speed.
fn empty(point: &FlightPoint, drawn: &Brief) -> Vec<Cost> {
    let may = |f: &Figure| *f != Figure::AirspeedMS || point.airspeed_m_s.is_none();
    let known = |figure: Figure| figure.of(drawn).map(|value| (figure, value));
    let cost = |(figure, drawn)| Cost {
        flight_point: point.name.clone(),
        figure,
        drawn,
        per_degree: Vec::new(),
        per_mm_chord: Vec::new(),
        per_mm_thickness: Vec::new(),
        band_worst: 0.0,
        band_independent: 0.0,
        per_percent_lift: None,
        per_percent_drag: None,
        band_polars: 0.0,
    };
    Figure::JUDGED.into_iter().filter(may).filter_map(known).map(cost).collect()
}

/// Half the width of a difference in degrees or mm.
fn step(propeller: &Propeller, station: usize, off: Off) -> f64 {
    let s = &propeller.stations[station];
    match off {
        Off::Angle => STEP_DEG,
        Off::Chord => STEP_MM.min(STEP_SHARE * 1e3 * s.chord_m),
        Off::Thickness => STEP_MM.min(STEP_SHARE * 1e3 * s.chord_m * s.thickness_ratio),
    }
}

/// The blade with one station off by degrees or mm; a chord that changes keeps its thickness in mm.
fn changed(rig: &Rig, station: usize, off: Off, by: f64) -> Result<Rig, ShapeError> {
    let mut propeller = rig.job.propeller.clone();
    match off {
        Off::Angle => {
            propeller = with_angles_of(rig, |i, a| if i == station { a + by.to_radians() } else { a });
        }
        Off::Chord => {
            let s = &mut propeller.stations[station];
            let thickness_m = s.thickness_ratio * s.chord_m;
            s.chord_m += 1e-3 * by;
            s.thickness_ratio = (thickness_m / s.chord_m).clamp(0.005, 1.0);
        }
        Off::Thickness => {
            let s = &mut propeller.stations[station];
            s.thickness_ratio = (s.thickness_ratio + 1e-3 * by / s.chord_m).clamp(0.005, 1.0);
        }
    }
    accepted(rig, propeller)
}

/// The blade with all coefficients of its polars times a factor.
fn with_polars(rig: &Rig, lift: f64, drag: f64) -> Rig {
    let mut other = rig.clone();
    for family in &mut other.rotor.blade.families {
        *family = Arc::new(family.scaled(lift, drag));
    }
    other
}

fn band(cost: &mut Cost, t: &Tolerance) {
    let of = |slopes: &[Option<f64>], by: f64| -> Vec<f64> {
        slopes.iter().flatten().map(|s| (s * by).abs()).collect()
    };
    let parts = [
        of(&cost.per_degree, t.angle_deg),
        of(&cost.per_mm_chord, t.chord_mm),
        of(&cost.per_mm_thickness, t.thickness_mm),
    ]
    .concat();
    cost.band_worst = parts.iter().sum();
    let polars = [(cost.per_percent_lift, t.lift_percent), (cost.per_percent_drag, t.drag_percent)];
    cost.band_polars = polars.iter().map(|(s, by)| (s.unwrap_or(0.0) * by).powi(2)).sum::<f64>().sqrt();
    cost.band_independent = parts.iter().map(|p| p * p).sum::<f64>().sqrt();
}
