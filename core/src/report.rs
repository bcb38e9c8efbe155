//! From the balance of elements to the figures and stations of a flight point.

use std::f64::consts::PI;

use crate::air::Air;
use crate::job::FlightPoint;
use crate::result::{Figures, Meeting, Note, PointResult, SectionPoint, State, StationResult};
use crate::rotor::element::{Balance, Element};
use crate::rotor::{Coefficients, Condition, Loads, Ring, Rotor};
use crate::section::{Situation, working_band};

/// Mach number above which the corrections are not to be relied on: from about there shocks decide of lift
/// and drag (common practice).
const LARGEST_MACH: f64 = 0.85;

/// A flight point with its condition known.
#[must_use]
pub fn point(rotor: &Rotor, point: &FlightPoint, at: &Condition) -> PointResult {
    let loads = rotor.loads(at);
    let stations: Vec<StationResult> =
        rotor.blade.station_radii_m().map(|r| station(rotor, &rotor.ring(r), at)).collect();
    PointResult {
        name: point.name.clone(),
        state: State::Ok,
        airspeed_m_s: Some(at.airspeed_m_s),
        rpm: Some(60.0 * at.turns_per_s()),
        turn_deg: at.turn_rad.to_degrees(),
        density_kg_m3: at.air.density_kg_m3,
        figures: figures(rotor, at, &loads),
        meeting: Meeting::default(),
        notes: point_notes(&stations, &loads),
        stations,
        held: None,
    }
}

/// A flight point without an answer.
#[must_use]
pub fn unanswered(point: &FlightPoint, air: &Air, state: State, turn_rad: f64) -> PointResult {
    PointResult {
        name: point.name.clone(),
        state,
        airspeed_m_s: point.airspeed_m_s,
        rpm: None,
        turn_deg: turn_rad.to_degrees(),
        density_kg_m3: air.density_kg_m3,
        figures: Figures::default(),
        meeting: Meeting::default(),
        stations: Vec::new(),
        notes: Vec::new(),
        held: None,
    }
}

/// Figures of the whole propeller.
#[must_use]
pub fn figures(rotor: &Rotor, at: &Condition, loads: &Loads) -> Figures {
    let blade = &rotor.blade;
    let c = Coefficients::new(loads, at, 2.0 * blade.radius_m);
    let power = loads.torque_n_m * at.rotation_rad_s;
    let r75 = 0.75 * blade.radius_m;
    let pitch = blade.pitch_075_m(at.turn_rad);
    let advance = at.airspeed_m_s / at.turns_per_s();
    let attack = rotor.element(&rotor.ring(r75), at).0.balance().map(|b| b.alpha_rad.to_degrees());
    let tip_speed = at.airspeed_m_s.hypot(at.rotation_rad_s * blade.radius_m);
    Figures {
        advance_ratio: finite(c.advance_ratio),
        ct: finite(c.ct),
        cp: finite(c.cp),
        cq: finite(c.cq),
        ct_over_cq: finite(c.ct / c.cq),
        efficiency: c.efficiency,
        ideal_efficiency: c.ideal_efficiency(),
        figure_of_merit: figure_of_merit(at, loads, blade.radius_m),
        thrust_n: finite(loads.thrust_n),
        torque_n_m: finite(loads.torque_n_m),
        power_w: finite(power),
        tip_mach: finite(tip_speed / at.air.sound_speed_m_s),
        blade_angle_075_deg: finite((blade.cut(r75).angle_rad + at.turn_rad).to_degrees()),
        advance_angle_075_deg: finite(at.airspeed_m_s.atan2(at.rotation_rad_s * r75).to_degrees()),
        angle_of_attack_075_deg: attack,
        geometric_pitch_m: finite(pitch),
        effective_pitch_m: finite(advance),
        slip: if pitch.abs() > 1e-9 { finite(1.0 - advance / pitch) } else { None },
    }
}

/// `T^1.5/(sqrt(2 ρ π R²) P)`, at rest only.
fn figure_of_merit(at: &Condition, loads: &Loads, radius_m: f64) -> Option<f64> {
    let power = loads.torque_n_m * at.rotation_rad_s;
    let disc = 2.0 * at.air.density_kg_m3 * PI * radius_m * radius_m;
    let hovers = at.airspeed_m_s == 0.0 && loads.thrust_n > 0.0 && power > 0.0;
    hovers.then(|| loads.thrust_n.powf(1.5) / (disc.sqrt() * power))
}

fn finite(x: f64) -> Option<f64> {
    x.is_finite().then_some(x)
}

/// One station at a condition.
#[must_use]
pub fn station(rotor: &Rotor, ring: &Ring, at: &Condition) -> StationResult {
    let (element, situation) = rotor.element(ring, at);
    let face = rotor.blade.face_to_chord_rad(ring.cut.radius_m);
    let mut s = StationResult {
        radius_m: ring.cut.radius_m,
        radius_fraction: ring.cut.radius_m / rotor.blade.radius_m,
        chord_m: ring.cut.chord_m,
        thickness_ratio: ring.cut.thickness_ratio,
        blade_angle_deg: element.angle_rad.to_degrees(),
        face_angle_deg: face.map(|f| (element.angle_rad - f).to_degrees()),
        reynolds: situation.reynolds,
        mach: at.airspeed_m_s.hypot(at.rotation_rad_s * ring.cut.radius_m) / at.air.sound_speed_m_s,
        ..StationResult::default()
    };
    add_section(&mut s, &element);
    match element.balance() {
        Some(balance) => add_balance(&mut s, rotor, ring, at, &element, &balance),
        None if element.ends.bare() => s.notes.push(Note::NoLoadAtEnd),
        None => s.notes.push(Note::NoBalance),
    }
    add_table_notes(&mut s, &element, &situation);
    s
}

/// Coefficients over angle of attack as the station's section has them at a condition, −12° to 24° by quarter
/// degrees.
#[must_use]
pub fn section_curve(rotor: &Rotor, ring: &Ring, at: &Condition) -> Vec<SectionPoint> {
    let element = rotor.element(ring, at).0;
    (-48..=96)
        .map(|i| {
            let alpha_deg = f64::from(i) * 0.25;
            let c = element.section.at(alpha_deg.to_radians());
            SectionPoint { alpha_deg, cl: c.cl, cd: c.cd, lift_to_drag: c.cl / c.cd }
        })
        .collect()
}

fn add_section(s: &mut StationResult, element: &Element) {
    s.stall_angle_deg = finite(element.section.stall_rad().to_degrees());
    if let Some(best) = element.section.best() {
        let (low, high) = working_band(|a| element.section.at(a), best);
        s.best_angle_deg = finite(best.alpha_rad.to_degrees());
        s.best_lift_to_drag = finite(best.lift_to_drag);
        s.band_low_deg = finite((low - best.alpha_rad).to_degrees());
        s.band_high_deg = finite((high - best.alpha_rad).to_degrees());
    }
}

fn add_balance(
    s: &mut StationResult,
    rotor: &Rotor,
    ring: &Ring,
    at: &Condition,
    element: &Element,
    b: &Balance,
) {
    let (thrust, torque) = rotor.grading(ring, at, b);
    let alpha_deg = b.alpha_rad.to_degrees();
    s.inflow_angle_deg = finite(b.inflow_rad.to_degrees());
    s.angle_of_attack_deg = finite(alpha_deg);
    s.departure_deg = s.best_angle_deg.map(|best| alpha_deg - best);
    s.share_of_best = s.best_lift_to_drag.map(|best| b.section.cl / b.section.cd / best);
    s.cl = finite(b.section.cl);
    s.cd = finite(b.section.cd);
    s.relative_speed_m_s = finite(b.speed_m_s);
    s.induced_axial_m_s = finite(b.induced_axial_m_s);
    s.induced_swirl_m_s = finite(b.induced_swirl_m_s);
    s.axial_factor = if at.airspeed_m_s > 0.0 { finite(b.induced_axial_m_s / at.airspeed_m_s) } else { None };
    s.swirl_factor = finite(b.induced_swirl_m_s / element.turning_m_s);
    s.loss_factor = finite(b.loss);
    s.thrust_n_per_m = thrust;
    s.torque_n_m_per_m = torque;
    if b.alpha_rad > element.section.stall_rad() || b.alpha_rad < element.section.negative_stall_rad() {
        s.notes.push(Note::Stalled);
    }
    if element
        .section
        .parts()
        .any(|(l, _)| b.alpha_rad > l.landmarks().last || b.alpha_rad < l.landmarks().first)
    {
        s.notes.push(Note::PastTable);
    }
    if thrust < 0.0 {
        s.notes.push(Note::Windmilling);
    }
}

fn add_table_notes(s: &mut StationResult, element: &Element, situation: &Situation) {
    if element.section.parts().any(|(l, _)| l.outside().reynolds) {
        s.notes.push(Note::ReynoldsOutsideTables);
    }
    if element.section.parts().any(|(l, _)| l.outside().thickness) {
        s.notes.push(Note::ThicknessOutsideTables);
    }
    if situation.mach > LARGEST_MACH {
        s.notes.push(Note::MachNotReliable);
    }
}

fn point_notes(stations: &[StationResult], loads: &Loads) -> Vec<Note> {
    let mut notes: Vec<Note> = Vec::new();
    let worth = |n: &Note| *n != Note::NoLoadAtEnd;
    for note in stations.iter().flat_map(|s| s.notes.iter().copied()).filter(worth) {
        if !notes.contains(&note) {
            notes.push(note);
        }
    }
    if loads.unbalanced > 0 && !notes.contains(&Note::NoBalance) {
        notes.push(Note::NoBalance);
    }
    notes
}
