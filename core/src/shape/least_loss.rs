//! Chord and angle of least induced loss for a job's flight point, section by section.
//!
//! Circulation times blades is given by the method; how a station carries it is a choice ([`Lift`]). At low Reynolds numbers the best incidence of a station
//! asks for more lift and so for less chord, which lowers its Reynolds number and calls for still more lift: there the chord of least drag for the lift it
//! carries, its Reynolds number going with it, is the better choice. Chord and sections take turns with the flow until they rest. Where the chord meets its least or greatest, the circulation is kept and the lift coefficient follows, up to 90 % of the
//! section's greatest lift. Stations, sections and thickness ratios are those of the drawn blade.

use super::adkins_liebeck::{Design, Task, Wanted, design};
use super::brief::compared;
use super::variant::{accepted, rounded, with_angles};
use super::{ShapeError, Shaped};
use crate::curve::Curve;
use crate::fit;
use crate::job::{Propeller, Setting};
use crate::report::best_of;
use crate::result::{Bound, LeastLoss, LossStation, State};
use crate::rig::{Rig, air_of, rotation_rad_s};
use crate::rotor::Condition;
use crate::rotor::element::{Blend, Element};

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

/// What to design. Where nothing is given, rpm and power (in level flight, thrust) are those of the drawn blade at the flight point.
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
}

/// Share of the greatest lift that a station may be asked for.
const STALL_SHARE: f64 = 0.9;
/// Lift coefficient below which drag over lift tells nothing.
const LEAST_LIFT: f64 = 0.05;
/// Steps of a look over the chord, from the least to the greatest in equal ratios.
const CHORDS: u32 = 24;
const NARROWINGS: u32 = 16;
const GOLDEN: f64 = 0.618_033_988_749_894_9;
const MOST_PASSES: u32 = 60;
/// Passes after which steps grow smaller.
const WHOLE_STEPS: u32 = 10;
/// Chords rest when none changes by more, as a share of the radius.
const AT_REST: f64 = 1e-7;

/// How a station works.
#[derive(Clone, Copy)]
struct Working {
    chord_m: f64,
    cl: f64,
    drag_to_lift: f64,
    alpha_rad: f64,
    reynolds: f64,
    bound: Bound,
}

struct Limits {
    least_m: f64,
    greatest_m: f64,
    lift: Lift,
}

/// The blade of least induced loss.
///
/// # Errors
/// No such point, or none with a speed and an answer; figures outside their range; thrust that cannot be had; no convergence.
pub fn least_loss(rig: &Rig, asked: &LossTask) -> Result<Shaped<LeastLoss>, ShapeError> {
    let at = condition(rig, asked)?;
    let task = task(rig, asked, &at)?;
    let limits = limits(rig, asked)?;
    let (design, working) = rested(rig, task, &at, &limits)?;
    let radii: Vec<f64> = rig.rotor.blade.station_radii_m().collect();
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
        flight_points: compared(rig, &shaped),
    };
    Ok(Shaped { job: shaped.job, result })
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

/// Design and sections taking turns. Where a section's best angle jumps between two tops as its Reynolds number changes, ever smaller steps of the chord
/// that tells the Reynolds number bring it to rest; chord and lift coefficient given belong together at every pass.
fn rested(
    rig: &Rig,
    task: Task,
    at: &Condition,
    limits: &Limits,
) -> Result<(Design, Vec<Working>), ShapeError> {
    let blade = &rig.rotor.blade;
    let radii: Vec<f64> = blade.station_radii_m().collect();
    let fractions: Vec<f64> = radii.iter().map(|r| r / task.radius_m).collect();
    let mut chords: Vec<f64> = radii.iter().map(|&r| blade.cut(r).chord_m).collect();
    let first = radii.iter().zip(&chords).map(|(&r, &c)| works(rig, at, r, (c, None), limits));
    let mut working: Vec<Working> = first.collect::<Result<_, _>>()?;
    let mut pass = 0;
    loop {
        let ratio = working.iter().map(|w| w.drag_to_lift).collect();
        let along = Curve::new(fractions.clone(), ratio).ok_or(ShapeError::NotConverged)?;
        let found = design(task, |xi| along.at(xi))?;
        for ((&r, w), &chord) in radii.iter().zip(&mut working).zip(&chords) {
            let flow = found.flow(fraction(&task, r), w.drag_to_lift);
            *w = works(rig, at, r, (chord, Some(flow.chord_lift_m)), limits)?;
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

/// How a station works whose chord times lift coefficient (m) is given, its Reynolds number by the chord of the pass before.
fn works(
    rig: &Rig,
    at: &Condition,
    radius_m: f64,
    (chord_m, chord_lift_m): (f64, Option<f64>),
    limits: &Limits,
) -> Result<Working, ShapeError> {
    let free = chord_lift_m.filter(|_| limits.lift == Lift::LeastDrag);
    if let Some(found) = free.and_then(|kept| least_drag(rig, at, radius_m, kept, limits)) {
        return Ok(found);
    }
    let mut ring = rig.rotor.ring(radius_m);
    ring.cut.chord_m = chord_m;
    let (element, situation) = rig.rotor.element(&ring, at);
    let no_lift = ShapeError::NoLift { radius_m };
    let alpha_rad = match limits.lift {
        Lift::Coefficient(cl) => incidence(&element.section, cl),
        Lift::LeastDrag | Lift::BestIncidence => best_of(&element).map(|b| b.alpha_rad),
    };
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

/// The chord of least drag for a chord times lift coefficient (m); `None` where no chord within the limits carries it.
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
