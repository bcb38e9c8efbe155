//! Chord and angle of least induced loss for a job's flight point, section by section.
//!
//! Circulation times blades is given by the method; how a station carries it is a choice ([`Lift`]). At low
//! Reynolds numbers the best incidence of a station asks for more lift and so for less chord, which lowers
//! its Reynolds number and calls for still more lift: there the chord of least drag for the lift it
//! carries, its Reynolds number going with it, is the better choice. Chord and sections take turns with the
//! flow until they rest. Where the chord meets its least or greatest, the circulation is kept and the lift
//! coefficient follows, up to 90 % of the section's greatest lift.
//!
//! The chord of least drag jumps between stations where a section has two tops of lift-to-drag; so that it
//! can be carved, the lift coefficients found are smoothed along the blade by a cubic, weighted by the load,
//! and the chords follow from them. Stations, sections and thickness ratios are those of the drawn blade;
//! where its last station lies well inboard of the tip, whose chord would be held to the end, one more near
//! the tip gives the tip its shape.

mod smooth;
mod working;

use super::adkins_liebeck::{Design, Task, Wanted, design};
use super::brief::compared;
use super::variant::{accepted, rounded, with_angles};
use super::{ShapeError, Shaped};
use crate::curve::Curve;
use crate::drawn::with_station;
use crate::fit;
use crate::job::{Propeller, Setting};
use crate::result::{LeastLoss, LossStation, State};
use crate::rig::{Rig, air_of, rotation_rad_s};
use crate::rotor::Condition;
use smooth::smoothed;
use working::{Limits, Working, works};

/// How a station carries its share of the lift.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub enum Lift {
    /// With the chord of least drag for it, Reynolds and Mach number those of that chord.
    #[default]
    LeastDrag,
    /// At the best incidence for its own Reynolds and Mach number.
    BestIncidence,
    /// At the same lift coefficient everywhere.
    Coefficient(f64),
}

/// What to design. Where nothing is given, rpm and power (in level flight, thrust) are those of the drawn
/// blade at the flight point.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct LossTask {
    /// Index of the flight point.
    pub point: usize,
    /// Thrust or power of one propeller.
    pub wanted: Option<Wanted>,
    /// Propeller rpm.
    pub rpm: Option<f64>,
    /// How stations carry their lift.
    pub lift: Lift,
    /// Least chord, m; a hundredth of the diameter where not given.
    pub least_chord_m: Option<f64>,
    /// Greatest chord, m; a quarter of the diameter where not given.
    pub greatest_chord_m: Option<f64>,
    /// Each station by itself: lift coefficients are not smoothed along the blade.
    pub by_station: bool,
    /// The stations of the drawn blade and no other near the tip.
    pub stations_as_drawn: bool,
}

/// Where a station is added near the tip, and from where on one is near enough, as shares of the tip radius.
const TIP_STATION: f64 = 0.98;
const NEAR_TIP: f64 = 0.97;
/// Degree of the polynomial through the lift coefficients.
const DEGREE: u32 = 3;
const MOST_PASSES: u32 = 60;
/// Passes after which steps grow smaller.
const WHOLE_STEPS: u32 = 10;
/// Chords rest when none changes by more, as a share of the radius.
const AT_REST: f64 = 1e-7;

/// The blade of least induced loss.
///
/// # Errors
/// No such point, or none with a speed and an answer; figures outside their range; thrust that cannot be had;
/// no convergence.
pub fn least_loss(rig: &Rig, asked: &LossTask) -> Result<Shaped<LeastLoss>, ShapeError> {
    let at = condition(rig, asked)?;
    let task = task(rig, asked, &at)?;
    let limits = limits(rig, asked)?;
    let (drawn, with_tip) = (rig, with_tip(rig).filter(|_| !asked.stations_as_drawn));
    let rig = with_tip.as_ref().unwrap_or(rig);
    let (mut design, mut working) = rested(rig, task, &at, &limits, None)?;
    let radii: Vec<f64> = rig.rotor.blade.station_radii_m().collect();
    if limits.lift == Lift::LeastDrag && !asked.by_station {
        let lifts = smooth_lifts(&task, &design, &radii, &working);
        (design, working) = rested(rig, task, &at, &limits, Some(&lifts))?;
    }
    let angle = |(r, w): (&f64, &Working)| {
        design.flow(fraction(&task, *r), w.drag_to_lift).inflow_rad + w.alpha_rad - at.turn_rad
    };
    let angles: Vec<f64> = radii.iter().zip(&working).map(angle).collect();
    let shaped = accepted(rig, with_chords(with_angles(rig, &angles), &working))?;
    let loads = shaped.rotor.loads(&at);
    let result = LeastLoss {
        flight_point: rig.job.flight_points[asked.point].name.clone(),
        airspeed_m_s: at.airspeed_m_s,
        rpm: fit::rpm_of(&at),
        displacement: design.zeta,
        thrust_n: design.thrust_n(),
        power_w: design.power_w(),
        efficiency: design.thrust_n() * at.airspeed_m_s / design.power_w(),
        analysed_thrust_n: loads.thrust_n,
        analysed_power_w: loads.torque_n_m * at.rotation_rad_s,
        stations: radii.iter().zip(&working).map(|(r, w)| station(&shaped, &design, *r, w)).collect(),
        flight_points: compared(drawn, &shaped),
    };
    Ok(Shaped { job: shaped.job, result })
}

/// The blade with a station near the tip; `None` where it has one.
fn with_tip(rig: &Rig) -> Option<Rig> {
    let last = rig.job.propeller.stations.last()?.radius_fraction;
    let job = (last < NEAR_TIP).then(|| with_station(&rig.job, TIP_STATION)).flatten()?;
    rig.with_propeller(job.propeller).ok()
}

/// The lift coefficients of the stations in a smooth run along the blade, within those found.
fn smooth_lifts(task: &Task, design: &Design, radii: &[f64], working: &[Working]) -> Vec<f64> {
    let x: Vec<f64> = radii.iter().map(|r| r / task.radius_m).collect();
    let cl: Vec<f64> = working.iter().map(|w| w.cl).collect();
    let load = |(r, w): (&f64, &Working)| {
        let flow = design.flow(fraction(task, *r), w.drag_to_lift);
        flow.chord_lift_m * flow.speed_m_s.powi(2)
    };
    let weight: Vec<f64> = radii.iter().zip(working).map(load).map(|w| w.max(0.0)).collect();
    let (low, high) = cl.iter().fold((f64::INFINITY, 0.0f64), |(l, h), c| (l.min(*c), h.max(*c)));
    smoothed(&x, &cl, &weight, DEGREE).into_iter().map(|c| c.clamp(low, high)).collect()
}

/// Speed, rpm and air to design for.
fn condition(rig: &Rig, asked: &LossTask) -> Result<Condition, ShapeError> {
    let point = rig.job.flight_points.get(asked.point).ok_or(ShapeError::NoPoint(asked.point))?;
    let no_answer = |state| ShapeError::NoAnswer { name: point.name.clone(), state };
    let air = air_of(point).map_err(|_| no_answer(State::OutOfReach))?;
    if point.airspeed_m_s == Some(0.0) {
        return Err(ShapeError::AtRest { name: point.name.clone() });
    }
    let at = match (asked.rpm, point.airspeed_m_s) {
        (Some(rpm), Some(airspeed_m_s)) => {
            within("rpm", rpm, 1.0, 100_000.0, "1 to 100 000 rpm")?;
            Condition { air, airspeed_m_s, rotation_rad_s: rotation_rad_s(rpm), turn_rad: rig.turn_rad() }
        }
        (rpm, _) => {
            let at = fit::condition(rig, point, air).map_err(no_answer)?;
            Condition { rotation_rad_s: rpm.map_or(at.rotation_rad_s, rotation_rad_s), ..at }
        }
    };
    if at.airspeed_m_s > 0.0 { Ok(at) } else { Err(ShapeError::AtRest { name: point.name.clone() }) }
}

fn task(rig: &Rig, asked: &LossTask, at: &Condition) -> Result<Task, ShapeError> {
    let blade = &rig.rotor.blade;
    let wanted = asked.wanted.unwrap_or_else(|| {
        let loads = rig.rotor.loads(at);
        match rig.job.flight_points[asked.point].setting {
            Setting::Level {} => Wanted::Thrust(loads.thrust_n),
            _ => Wanted::Power(loads.torque_n_m * at.rotation_rad_s),
        }
    });
    match wanted {
        Wanted::Thrust(n) => within("thrust", n, 1e-6, 1e7, "above 0, up to 10 000 000 N")?,
        Wanted::Power(w) => within("power", w, 1e-6, 1e9, "above 0, up to 1 000 000 000 W")?,
    }
    Ok(Task {
        airspeed_m_s: at.airspeed_m_s * blade.axial_share,
        rotation_rad_s: at.rotation_rad_s,
        radius_m: blade.radius_m,
        hub_radius_m: blade.hub_radius_m,
        blades: blade.count,
        density_kg_m3: at.air.density_kg_m3,
        wanted,
        tip_loss: rig.job.method.tip_loss,
    })
}

fn within(
    name: &'static str,
    found: f64,
    low: f64,
    high: f64,
    allowed: &'static str,
) -> Result<(), ShapeError> {
    if (low..=high).contains(&found) { Ok(()) } else { Err(ShapeError::Figure { name, found, allowed }) }
}

fn limits(rig: &Rig, asked: &LossTask) -> Result<Limits, ShapeError> {
    let diameter = rig.job.propeller.diameter_m;
    let least_m = asked.least_chord_m.unwrap_or(0.01 * diameter);
    let greatest_m = asked.greatest_chord_m.unwrap_or_else(|| (0.25 * diameter).max(least_m));
    within("least chord", least_m, 1e-6, diameter, "above 0, up to the diameter")?;
    within("greatest chord", greatest_m, least_m, diameter, "from the least chord up to the diameter")?;
    if let Lift::Coefficient(cl) = asked.lift {
        within("lift coefficient", cl, 0.05, 2.0, "0.05 to 2")?;
    }
    Ok(Limits { least_m, greatest_m, lift: asked.lift })
}

/// Radius over tip radius, no nearer than the hub and a little short of the tip.
fn fraction(task: &Task, radius_m: f64) -> f64 {
    (radius_m / task.radius_m).clamp(task.hub_radius_m / task.radius_m, 1.0)
}

/// Design and sections taking turns. Where a section's best angle jumps between two tops as its Reynolds
/// number changes, ever smaller steps of the chord that tells the Reynolds number bring it to rest; chord and
/// lift coefficient given belong together at every pass.
fn rested(
    rig: &Rig,
    task: Task,
    at: &Condition,
    limits: &Limits,
    lifts: Option<&[f64]>,
) -> Result<(Design, Vec<Working>), ShapeError> {
    let lift = |i: usize| lifts.and_then(|all| all.get(i).copied());
    let blade = &rig.rotor.blade;
    let radii: Vec<f64> = blade.station_radii_m().collect();
    let fractions: Vec<f64> = radii.iter().map(|r| r / task.radius_m).collect();
    let mut chords: Vec<f64> = radii.iter().map(|&r| blade.cut(r).chord_m).collect();
    let first = radii.iter().zip(&chords).enumerate();
    let first = first.map(|(i, (&r, &c))| works(rig, at, r, (c, None), limits, lift(i)));
    let mut working: Vec<Working> = first.collect::<Result<_, _>>()?;
    let mut pass = 0;
    loop {
        let ratio = working.iter().map(|w| w.drag_to_lift).collect();
        let along = Curve::new(fractions.clone(), ratio).ok_or(ShapeError::NotConverged)?;
        let found = design(task, |xi| along.at(xi))?;
        for (i, ((&r, w), &chord)) in radii.iter().zip(&mut working).zip(&chords).enumerate() {
            let flow = found.flow(fraction(&task, r), w.drag_to_lift);
            *w = works(rig, at, r, (chord, Some(flow.chord_lift_m)), limits, lift(i))?;
        }
        let step = 1.0 / f64::from(u32::max(1, pass.max(WHOLE_STEPS) - WHOLE_STEPS));
        let mut change: f64 = 0.0;
        for (chord, w) in chords.iter_mut().zip(&working) {
            change = change.max((w.chord_m - *chord).abs());
            *chord += step * (w.chord_m - *chord);
        }
        pass += 1;
        if change <= AT_REST * task.radius_m || pass == MOST_PASSES {
            return Ok((found, working));
        }
    }
}

fn with_chords(mut propeller: Propeller, working: &[Working]) -> Propeller {
    for (station, w) in propeller.stations.iter_mut().zip(working) {
        station.chord_m = rounded(w.chord_m, 1e9);
    }
    propeller
}

fn station(shaped: &Rig, design: &Design, radius_m: f64, w: &Working) -> LossStation {
    let blade = &shaped.rotor.blade;
    let angle_rad = blade.cut(radius_m).angle_rad;
    let flow = design.flow(fraction(&design.task, radius_m), w.drag_to_lift);
    LossStation {
        radius_m,
        radius_fraction: radius_m / blade.radius_m,
        chord_m: w.chord_m,
        angle_deg: rounded(angle_rad.to_degrees(), 1e8),
        face_angle_deg: blade.face_to_chord_rad(radius_m).map(|f| (angle_rad - f).to_degrees()),
        inflow_angle_deg: flow.inflow_rad.to_degrees(),
        angle_of_attack_deg: w.alpha_rad.to_degrees(),
        cl: w.cl,
        lift_to_drag: 1.0 / w.drag_to_lift,
        reynolds: w.reynolds,
        bound: w.bound,
    }
}
