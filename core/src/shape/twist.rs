//! Best-incidence twist: for the drawn chords, the angles that put every station at its own angle of best
//! lift-to-drag.
//!
//! At a condition with its own induced flow each station's balance is solved with lift and drag held at the
//! best angle `α*` of its section at its Reynolds and Mach number, and `β = φ + α*`. The new blade meets the
//! flight point's setting at another rpm, so blade and setting take turns until the angles rest.
//! Along several flight points each station takes the angle of least `Σ w (α − α*)²` or of least weighted
//! loss of lift-to-drag, which lies between its best angles. A governor gives rpm and power both, which
//! angles at their best cannot meet as well: there the twist is the one with which all stations depart alike,
//! and that common departure is the governor's. Where no angle carries the lift, and inside 0.2 R and outside
//! 0.95 R also where the factor of tip and hub leaves little load, the geometric pitch of the nearest solved
//! station is held, so that the blade can be carved.

use std::ops::RangeInclusive;

use super::brief::compared;
use super::variant::{accepted, rounded, with_angles};
use super::{ShapeError, Shaped};
use crate::fit::{self, Near};
use crate::job::{PitchControl, Setting};
use crate::result::{Origin, Twist, TwistStation};
use crate::rig::{Rig, air_of};
use crate::rotor::Condition;
use crate::rotor::element::{Balance, Element};

/// Radius fractions between which every station with an answer is solved. The examples' blades have 6 to 8 %
/// of their thrust outside of them at the tip and less than 1 % at the hub.
const WORKING: RangeInclusive<f64> = 0.2..=0.95;
/// Least factor of tip and hub at which one nearer to hub or tip is solved. The less it is, the more the air
/// there is turned for the same lift, and the coarser is the angle that gives it: on the examples' blades it
/// is up to 1.6° more than at 0.95 R where the factor is 0.35, but 3 to 6° more at 0.995 R, where it is 0.1
/// to 0.15 and the pitch that is held would have it finer.
pub(crate) const LEAST_FACTOR: f64 = 0.35;
/// Angles rest when none changes by more, rad.
const AT_REST_RAD: f64 = 1e-6;
const MOST_PASSES: u32 = 120;
/// Golden-section passes between the best angles of several flight points.
const NARROWINGS: u32 = 40;
/// Widest part of the gap between two blades that one pass goes, rad.
const WIDEST_STEP_RAD: f64 = 0.1;

/// What is made least along several flight points.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum TwistBy {
    /// The weighted squares of the departures.
    #[default]
    Departure,
    /// The weighted loss of lift-to-drag against its best.
    Loss,
}

/// A flight point that counts.
struct Counted {
    index: usize,
    weight: f64,
    at: Condition,
}

/// The best-incidence twist along the flight points with a weight above 0, in the order of the job.
///
/// # Errors
/// No weight; a point that counts without an answer; no station that carries its best lift.
///
/// ```
/// use spokeshave::{job::{DEMOS, Job}, rig::Rig, shape::twist};
/// let rig = Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap();
/// let shaped = twist(&rig, &[0.0, 0.0, 1.0, 0.0]).unwrap();
/// assert!(shaped.result.settled);
/// ```
pub fn twist(rig: &Rig, weights: &[f64]) -> Result<Shaped<Twist>, ShapeError> {
    twist_by(rig, weights, TwistBy::Departure)
}

/// The same by what is made least.
///
/// # Errors
/// As [`twist`].
pub fn twist_by(rig: &Rig, weights: &[f64], by: TwistBy) -> Result<Shaped<Twist>, ShapeError> {
    let allowed = |w: &f64| w.is_finite() && *w >= 0.0;
    if !weights.iter().all(allowed) || !weights.iter().any(|w| *w > 0.0) {
        return Err(ShapeError::NoWeight);
    }
    let governed = matches!(rig.job.propeller.pitch_control, PitchControl::ConstantSpeed { .. });
    let (mut now, mut passes, mut settled) = (rig.clone(), 0, false);
    let mut origins = Vec::new();
    while passes < MOST_PASSES && !settled {
        passes += 1;
        let counted = counted(&now, weights).map_err(|e| if passes > 1 { with_new_angles(e) } else { e })?;
        let wanted: Vec<Option<f64>> = if governed {
            alike(&now, &counted)
        } else {
            now.rotor.blade.station_radii_m().map(|r| solved(&now, r, &counted, by)).collect()
        };
        let (angles, from) = filled(&now, &wanted, &rig.job.flight_points[counted[0].index].name)?;
        let old: Vec<f64> =
            now.rotor.blade.station_radii_m().map(|r| now.rotor.blade.cut(r).angle_rad).collect();
        let gap = old.iter().zip(&angles).map(|(a, b)| (a - b).abs()).fold(0.0, f64::max);
        // From a blade far off, in steps: the settings must stay within what the engine can meet.
        let part = (WIDEST_STEP_RAD / gap).min(1.0);
        let next: Vec<f64> = old.iter().zip(&angles).map(|(a, b)| a + part * (b - a)).collect();
        settled = gap <= AT_REST_RAD;
        now = accepted(&now, with_angles(&now, &next))?;
        origins = from;
    }
    let counted = counted(&now, weights).map_err(with_new_angles)?;
    let stations = stations(rig, &now, &origins, &counted);
    let result = Twist {
        weights: counted.iter().map(|c| (rig.job.flight_points[c.index].name.clone(), c.weight)).collect(),
        governor_departure_deg: if governed { common(&stations, &counted) } else { None },
        stations,
        settled,
        passes,
        flight_points: compared(rig, &now),
    };
    Ok(Shaped { job: now.job, result })
}

fn with_new_angles(e: ShapeError) -> ShapeError {
    match e {
        ShapeError::NoAnswer { name, state } => ShapeError::NoneSo { name, state },
        other => other,
    }
}

fn counted(rig: &Rig, weights: &[f64]) -> Result<Vec<Counted>, ShapeError> {
    let points = rig.job.flight_points.iter().zip(weights).enumerate().filter(|(_, (_, w))| **w > 0.0);
    let all: Result<Vec<Counted>, ShapeError> = points
        .map(|(index, (point, &weight))| {
            let no_answer = |state| ShapeError::NoAnswer { name: point.name.clone(), state };
            let air = air_of(point).map_err(|_| no_answer(crate::result::State::OutOfReach))?;
            // Full throttle is drawn back where it would pass the limit rpm.
            let at = if point.setting == (Setting::FullThrottle {}) {
                fit::answer(rig, point, air, &mut Near::default()).map(|answer| answer.condition)
            } else {
                fit::condition(rig, point, air)
            };
            let at = at.map_err(no_answer)?;
            Ok(Counted { index, weight, at })
        })
        .collect();
    all.and_then(|all| if all.is_empty() { Err(ShapeError::NoWeight) } else { Ok(all) })
}

/// Whether a station carries enough to be solved for itself.
fn loaded(rig: &Rig, radius_m: f64, balance: &Balance) -> bool {
    WORKING.contains(&(radius_m / rig.rotor.blade.radius_m)) || balance.loss > LEAST_FACTOR
}

/// The drawn angle of least weighted departure at a radius, rad; `None` where no point that counts can be
/// carried.
fn solved(rig: &Rig, radius_m: f64, counted: &[Counted], by: TwistBy) -> Option<f64> {
    let ring = rig.rotor.ring(radius_m);
    let mut wanted: Vec<Wanted> = Vec::new();
    for c in counted {
        let element = rig.rotor.element(&ring, &c.at).0;
        let Some(best) = element.section.best() else { continue };
        let Some(balance) = element.balance_at(best.alpha_rad).filter(|b| loaded(rig, radius_m, b)) else {
            continue;
        };
        let angle = balance.inflow_rad + best.alpha_rad - c.at.turn_rad;
        wanted.push(Wanted {
            element,
            turn_rad: c.at.turn_rad,
            best_rad: best.alpha_rad,
            best_ratio: best.lift_to_drag,
            angle,
            weight: c.weight,
        });
    }
    let low = wanted.iter().map(|w| w.angle).reduce(f64::min)?;
    let high = wanted.iter().map(|w| w.angle).reduce(f64::max)?;
    Some(if high - low < AT_REST_RAD { low } else { least(&wanted, (low, high), by) })
}

/// The drawn angles with which, at the governed rpm, all stations depart alike from their best, weighted over
/// the points that count; `None` where there is no balance to judge by.
fn alike(rig: &Rig, counted: &[Counted]) -> Vec<Option<f64>> {
    let blade = &rig.rotor.blade;
    let departure = |radius_m: f64| {
        let ring = rig.rotor.ring(radius_m);
        let one = |c: &Counted| {
            let element = rig.rotor.element(&ring, &c.at).0;
            let (best, balance) =
                (element.section.best()?, element.balance().filter(|b| loaded(rig, radius_m, b))?);
            Some((c.weight, c.weight * (balance.alpha_rad - best.alpha_rad)))
        };
        let known: Option<Vec<(f64, f64)>> = counted.iter().map(one).collect();
        let (weight, sum) = known?.into_iter().fold((0.0, 0.0), |(w, s), (a, b)| (w + a, s + b));
        Some(sum / weight)
    };
    let departures: Vec<Option<f64>> = blade.station_radii_m().map(departure).collect();
    let count = departures.iter().flatten().count().max(1) as f64;
    let mean = departures.iter().flatten().sum::<f64>() / count;
    let angle = |(r, d): (f64, &Option<f64>)| d.map(|d| blade.cut(r).angle_rad - (d - mean));
    blade.station_radii_m().zip(&departures).map(angle).collect()
}

/// The departure that the solved stations have in common, weighted over the points that count, degrees.
fn common(stations: &[TwistStation], counted: &[Counted]) -> Option<f64> {
    let solved = stations.iter().filter(|s| s.origin == Origin::Solved);
    let one = |s: &TwistStation| {
        let parts = s.departures_deg.iter().zip(counted);
        let (sum, weight) = parts
            .fold((0.0, 0.0), |(sum, w), (d, c)| d.map_or((sum, w), |d| (sum + c.weight * d, w + c.weight)));
        (weight > 0.0).then_some(sum / weight)
    };
    let all: Vec<f64> = solved.filter_map(one).collect();
    (!all.is_empty()).then(|| all.iter().sum::<f64>() / all.len() as f64)
}

struct Wanted<'f> {
    element: Element<'f>,
    turn_rad: f64,
    best_rad: f64,
    best_ratio: f64,
    angle: f64,
    weight: f64,
}

impl Wanted<'_> {
    fn loss(&self, angle: f64, by: TwistBy) -> f64 {
        let element = Element { angle_rad: angle + self.turn_rad, ..self.element };
        let lost = |alpha_rad: f64| match by {
            TwistBy::Departure => (alpha_rad - self.best_rad).powi(2),
            TwistBy::Loss => {
                let c = element.section.at(alpha_rad);
                1.0 - c.cl / c.cd / self.best_ratio
            }
        };
        element.balance().map_or(0.0, |b| self.weight * lost(b.alpha_rad))
    }
}

/// Least weighted sum by golden section: each part grows with the distance from its own angle.
fn least(wanted: &[Wanted], (mut low, mut high): (f64, f64), by: TwistBy) -> f64 {
    const G: f64 = 0.618_033_988_749_894_9;
    let loss = |angle: f64| wanted.iter().map(|w| w.loss(angle, by)).sum::<f64>();
    for _ in 0..NARROWINGS {
        let (a, b) = (high - G * (high - low), low + G * (high - low));
        if loss(a) <= loss(b) { high = b } else { low = a }
    }
    0.5 * (low + high)
}

/// All angles, with the pitch of the nearest solved station where there is none.
fn filled(rig: &Rig, wanted: &[Option<f64>], name: &str) -> Result<(Vec<f64>, Vec<Origin>), ShapeError> {
    let radii: Vec<f64> = rig.rotor.blade.station_radii_m().collect();
    let known: Vec<(usize, f64)> = wanted.iter().enumerate().filter_map(|(i, a)| a.map(|a| (i, a))).collect();
    let first = known.first().ok_or_else(|| ShapeError::NoStation { name: name.into() })?.0;
    let angle = |i: usize| {
        let nearest = |&&(j, _): &&(usize, f64)| (radii[i] - radii[j]).abs();
        let by = |a: &&(usize, f64), b: &&(usize, f64)| nearest(a).total_cmp(&nearest(b));
        wanted[i].or_else(|| {
            let (j, a) = *known.iter().min_by(by)?;
            Some((radii[j] * a.tan() / radii[i]).atan())
        })
    };
    let origin = |i: usize| match wanted[i] {
        Some(_) => Origin::Solved,
        None if i < first => Origin::HeldInboard,
        None => Origin::HeldAtTip,
    };
    Ok(((0..wanted.len()).filter_map(angle).collect(), (0..wanted.len()).map(origin).collect()))
}

fn stations(drawn: &Rig, shaped: &Rig, origins: &[Origin], counted: &[Counted]) -> Vec<TwistStation> {
    let blade = &shaped.rotor.blade;
    let told = |(r, &origin): (f64, &Origin)| {
        let angle_rad = blade.cut(r).angle_rad;
        let ring = shaped.rotor.ring(r);
        let departures = counted.iter().map(|c| {
            let element = shaped.rotor.element(&ring, &c.at).0;
            let (best, balance) = (element.section.best()?, element.balance()?);
            Some((balance.alpha_rad - best.alpha_rad).to_degrees())
        });
        TwistStation {
            radius_m: r,
            radius_fraction: r / blade.radius_m,
            drawn_angle_deg: drawn.rotor.blade.cut(r).angle_rad.to_degrees(),
            angle_deg: rounded(angle_rad.to_degrees(), 1e8),
            face_angle_deg: blade.face_to_chord_rad(r).map(|f| (angle_rad - f).to_degrees()),
            origin,
            departures_deg: departures.collect(),
        }
    };
    blade.station_radii_m().zip(origins).map(told).collect()
}
