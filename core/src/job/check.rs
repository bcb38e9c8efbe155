//! Checks of a job's values, each by path.

use std::f64::consts::PI;

use super::document::{
    Aircraft, AngleReference, Engine, FlightPoint, Job, PitchControl, Propeller, Section, Setting, Station,
};
use super::error::{Problem, VERSION};
use super::found::Found;
use crate::air::{HIGHEST_M, LARGEST_OFFSET_K, LOWEST_M};
use crate::section::{check_polars, library};
use carved::check_carved;
pub use engine::most_governed_rpm;
use engine::{check_electric, check_governor, check_piston};
use logbook::check_logbook;
use making::check_making;
use wishes::check_wishes;
use wood::check_wood;

mod carved;
mod engine;
mod logbook;
mod making;
mod wishes;
mod wood;

const MOST_STATIONS: usize = 200;
const MOST_FLIGHT_POINTS: usize = 50;
const MOST_SECTIONS: usize = 40;
const MOST_TEXT: usize = 200;

/// Every problem of a job.
pub(super) fn problems(job: &Job) -> Vec<Problem> {
    let mut found = Found::default();
    if job.spokeshave != VERSION {
        found.refuse("spokeshave".into(), job.spokeshave, VERSION.to_string());
    }
    text(&mut found, "title", &job.title, 0);
    if let Some(aircraft) = &job.aircraft {
        check_aircraft(&mut found, aircraft, job.propeller.diameter_m);
    }
    match &job.engine {
        Some(Engine::Piston(piston)) => check_piston(&mut found, piston, job.aircraft.as_ref()),
        Some(Engine::Electric(electric)) => check_electric(&mut found, electric),
        None => {}
    }
    check_sections(&mut found, &job.sections);
    check_propeller(&mut found, &job.propeller);
    check_governor(&mut found, job);
    check_stations(&mut found, job);
    check_flight_points(&mut found, &job.flight_points);
    found.range("method.elements".into(), f64::from(job.method.elements), 10.0..=400.0, "");
    found.range("method.n_crit".into(), job.method.n_crit, 1.0..=14.0, "");
    if let Some(wood) = &job.wood {
        check_wood(&mut found, wood, &job.propeller);
    }
    if let Some(carved) = &job.carved {
        check_carved(&mut found, job, carved);
    }
    if let Some(logbook) = &job.logbook {
        check_logbook(&mut found, logbook);
    }
    if let Some(wishes) = &job.wishes {
        check_wishes(&mut found, wishes, &job.flight_points);
    }
    if let Some(making) = &job.bench {
        check_making(&mut found, making, &job.propeller);
    }
    found.0
}

/// Every problem of the propeller alone.
pub(super) fn propeller_problems(job: &Job) -> Vec<Problem> {
    let mut found = Found::default();
    check_propeller(&mut found, &job.propeller);
    check_governor(&mut found, job);
    check_stations(&mut found, job);
    if let Some(wood) = &job.wood {
        check_wood(&mut found, wood, &job.propeller);
    }
    found.0
}

fn text(found: &mut Found, path: &str, value: &str, fewest: usize) {
    let n = value.chars().count();
    if !(fewest..=MOST_TEXT).contains(&n) {
        found.refuse(path.into(), format!("{n} characters"), format!("{fewest} to {MOST_TEXT} characters"));
    }
}

fn check_aircraft(found: &mut Found, aircraft: &Aircraft, diameter_m: f64) {
    let at = |name: &str| format!("aircraft.{name}");
    match aircraft {
        Aircraft::Aeroplane(a) => {
            found.range(at("mass_kg"), a.mass_kg, 0.01..=100_000.0, "kg");
            found.range(at("wing_area_m2"), a.wing_area_m2, 0.001..=1_000.0, "m²");
            found.range(at("drag.cd0"), a.drag.cd0, 0.001..=1.0, "");
            found.optional(at("drag.k"), a.drag.k, 0.001..=1.0, "");
            found.optional(at("drag.aspect_ratio"), a.drag.aspect_ratio, 1.0..=60.0, "");
            found.optional(at("drag.oswald"), a.drag.oswald, 0.2..=1.2, "");
            if a.drag.k.is_some() == (a.drag.aspect_ratio.is_some() && a.drag.oswald.is_some()) {
                found.refuse(at("drag"), "neither or both", "either k, or aspect_ratio and oswald");
            }
            found.optional(at("cl_max"), a.cl_max, 0.2..=5.0, "");
            found.range(at("engines"), f64::from(a.engines), 1.0..=12.0, "");
            found.optional(at("rolling_friction"), a.rolling_friction, 0.0..=0.5, "of the weight");
            // At half of the discs the slipstream would eat half of the thrust.
            let discs_m2 = f64::from(a.engines) * PI * (0.5 * diameter_m).powi(2);
            let most = if discs_m2.is_finite() { 0.5 * discs_m2 } else { f64::MAX };
            found.optional(at("slipstream_drag_area_m2"), a.slipstream_drag_area_m2, 0.0..=most, "m²");
        }
        Aircraft::Multirotor(m) => {
            found.range(at("mass_kg"), m.mass_kg, 0.01..=10_000.0, "kg");
            found.range(at("rotors"), f64::from(m.rotors), 1.0..=32.0, "");
        }
    }
}

fn check_sections(found: &mut Found, sections: &[Section]) {
    found.count("sections", sections.len(), 0..=MOST_SECTIONS);
    for (i, s) in sections.iter().enumerate() {
        check_section(found, i, s);
        if sections[..i].iter().any(|other| other.name == s.name) {
            found.refuse(format!("sections[{i}].name"), format!("\"{}\" twice", s.name), "a name used once");
        }
    }
}

/// Every problem of a section by itself.
pub(super) fn section_problems(section: &Section) -> Vec<Problem> {
    let mut found = Found::default();
    check_section(&mut found, 0, section);
    found.0
}

fn check_section(found: &mut Found, i: usize, s: &Section) {
    text(found, &format!("sections[{i}].name"), &s.name, 1);
    found.optional(format!("sections[{i}].face_angle_deg"), s.face_angle_deg, -20.0..=20.0, "degrees");
    check_faces(found, i, s);
    if let Err(e) = s.drawn() {
        let points = format!("{} points", s.outline.len());
        found.refuse(
            format!("sections[{i}].outline"),
            format!("{points}: {e}"),
            "a section's outline, or none",
        );
    }
    found.range(format!("sections[{i}].korn_factor"), s.korn_factor, 0.7..=1.0, "");
    if let Err(e) = check_polars(&s.polars) {
        found.refuse(format!("sections[{i}].{}", e.place), e.found, e.allowed);
    }
}

/// Angles of the face by rising thickness, and not beside the single one.
fn check_faces(found: &mut Found, i: usize, s: &Section) {
    let at = |j: usize, name: &str| format!("sections[{i}].face_angles[{j}].{name}");
    if s.face_angle_deg.is_some() && !s.face_angles.is_empty() {
        found.refuse(format!("sections[{i}].face_angles"), "given beside face_angle_deg", "one of the two");
    }
    found.count(&format!("sections[{i}].face_angles"), s.face_angles.len(), 0..=MOST_SECTIONS);
    for (j, face) in s.face_angles.iter().enumerate() {
        found.range(at(j, "thickness_ratio"), face.thickness_ratio, 0.005..=1.0, "of the chord");
        found.range(at(j, "angle_deg"), face.angle_deg, -20.0..=20.0, "degrees");
        if j > 0 && face.thickness_ratio - s.face_angles[j - 1].thickness_ratio < 1e-9 {
            let before = s.face_angles[j - 1].thickness_ratio;
            found.refuse(
                at(j, "thickness_ratio"),
                face.thickness_ratio,
                format!("above {before}, the one before"),
            );
        }
    }
}

fn check_propeller(found: &mut Found, p: &Propeller) {
    let at = |name: &str| format!("propeller.{name}");
    found.range(at("blades"), f64::from(p.blades), 1.0..=12.0, "");
    found.range(at("diameter_m"), p.diameter_m, 0.02..=12.0, "m");
    if !(p.hub_diameter_m >= 0.0 && p.hub_diameter_m <= 0.9 * p.diameter_m) {
        found.refuse(at("hub_diameter_m"), p.hub_diameter_m, "0 m to nine tenths of the diameter");
        found.within(0.0, 0.9 * p.diameter_m);
    }
    found.optional(at("blockage"), p.blockage, 0.0..=0.5, "of the airspeed");
    match p.pitch_control {
        PitchControl::Fixed {} => {}
        PitchControl::GroundAdjustable { turn_deg } => {
            found.range(at("pitch_control.turn_deg"), turn_deg, -60.0..=60.0, "degrees");
        }
        PitchControl::ConstantSpeed { rpm, turn_min_deg, turn_max_deg } => {
            found.range(at("pitch_control.rpm"), rpm, 10.0..=60_000.0, "rpm");
            found.range(at("pitch_control.turn_min_deg"), turn_min_deg, -60.0..=60.0, "degrees");
            found.range(
                at("pitch_control.turn_max_deg"),
                turn_max_deg,
                turn_min_deg.max(-60.0)..=90.0,
                "degrees",
            );
        }
    }
}

fn check_stations(found: &mut Found, job: &Job) {
    let stations = &job.propeller.stations;
    found.count("propeller.stations", stations.len(), 2..=MOST_STATIONS);
    for (i, s) in stations.iter().enumerate() {
        let at = |name: &str| format!("propeller.stations[{i}].{name}");
        found.range(at("radius_fraction"), s.radius_fraction, 0.001..=1.0, "of the tip radius");
        if i > 0 && s.radius_fraction - stations[i - 1].radius_fraction < 1e-9 {
            let before = stations[i - 1].radius_fraction;
            found.refuse(
                at("radius_fraction"),
                s.radius_fraction,
                format!("above {before}, the station before"),
            );
        }
        let widest = job.propeller.diameter_m;
        if !(s.chord_m > 0.0 && s.chord_m <= widest) {
            found.refuse(at("chord_m"), s.chord_m, format!("above 0, up to the diameter, {widest} m"));
            found.above(0.0, widest);
        }
        found.range(at("thickness_ratio"), s.thickness_ratio, 0.005..=1.0, "of the chord");
        check_angle(found, &at, s);
        check_section_name(found, at("section"), s, job);
    }
}

fn check_angle(found: &mut Found, at: &impl Fn(&str) -> String, s: &Station) {
    found.optional(at("angle_deg"), s.angle_deg, -90.0..=90.0, "degrees");
    found.optional(at("pitch_m"), s.pitch_m, -100.0..=100.0, "m");
    match (s.angle_deg, s.pitch_m) {
        (None, None) => found.refuse(at("angle_deg"), "missing", "angle_deg or pitch_m"),
        (Some(_), Some(_)) => found.refuse(at("pitch_m"), "given beside angle_deg", "one of the two"),
        _ => {}
    }
}

fn check_section_name(found: &mut Found, path: String, s: &Station, job: &Job) {
    let own = job.sections.iter().find(|own| own.name == s.section);
    if !section_name_known(job, &s.section) {
        found.refuse(path, format!("\"{}\"", s.section), format!("one of {}", known_names(job)));
        return;
    }
    let has_face = own.map_or_else(|| library().has_face(&s.section), Section::has_face);
    if job.propeller.angle_reference == AngleReference::FlatFace && !has_face {
        let allowed = "a section with a flat face while angle_reference is flat-face";
        found.refuse(path, format!("\"{}\" has no flat face", s.section), allowed);
    }
}

/// Whether a station may call a section by this name.
#[must_use]
pub fn section_name_known(job: &Job, name: &str) -> bool {
    job.sections.iter().any(|own| own.name == name) || library().family(name, job.method.n_crit).is_some()
}

fn known_names(job: &Job) -> String {
    let own = job.sections.iter().map(|s| s.name.as_str());
    own.chain(library().names()).collect::<Vec<_>>().join(", ")
}

fn check_flight_points(found: &mut Found, points: &[FlightPoint]) {
    found.count("flight_points", points.len(), 1..=MOST_FLIGHT_POINTS);
    for (i, p) in points.iter().enumerate() {
        let at = |name: &str| format!("flight_points[{i}].{name}");
        text(found, &at("name"), &p.name, 1);
        if points[..i].iter().any(|other| other.name == p.name) {
            found.refuse(at("name"), format!("\"{}\" twice", p.name), "a name used once");
        }
        found.range(at("altitude_m"), p.altitude_m, LOWEST_M..=HIGHEST_M, "m");
        found.range(at("isa_offset_k"), p.isa_offset_k, -LARGEST_OFFSET_K..=LARGEST_OFFSET_K, "K");
        found.optional(at("airspeed_m_s"), p.airspeed_m_s, 0.0..=340.0, "m/s");
        match p.setting {
            Setting::Rpm { rpm } => found.range(at("setting.rpm"), rpm, 1.0..=100_000.0, "rpm"),
            Setting::Power { power_w } => found.range(at("setting.power_w"), power_w, 0.001..=5e6, "W"),
            Setting::Throttle { fraction } => found.range(at("setting.fraction"), fraction, 0.01..=1.0, ""),
            Setting::FullThrottle {} | Setting::Level {} => {}
        }
        if p.airspeed_m_s.is_none() && !matches!(p.setting, Setting::FullThrottle {}) {
            found.refuse(
                at("airspeed_m_s"),
                "missing",
                "an airspeed; only full-throttle may go without, for top speed",
            );
        }
    }
}
