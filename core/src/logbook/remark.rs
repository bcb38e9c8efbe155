//! Plain words about what readings tell, and what may have gone wrong with one.

use super::equation::{Equation, Told};
use crate::engine::Shaft;
use crate::job::LogReading;
use crate::result::{FactorFound, Pair};
use crate::rig::Rig;

/// How near a mistaken figure must come to what is expected, as a share.
const NEAR: f64 = 0.06;

pub(super) fn of_all(
    equations: &[Option<Equation>],
    found: &[FactorFound],
    pairs: &[Pair],
    electric: bool,
) -> Vec<String> {
    let words = |name: &str| found.iter().find(|f| f.name == name).map_or("", |f| f.title);
    let tells = |what: Told| equations.iter().flatten().any(|e| e.told.contains(&what));
    let (engine, flow) = if electric { ("Motor", "current") } else { ("Engine", "fuel flow") };
    let mut remarks = Vec::new();
    if !tells(Told::Thrust) {
        remarks.push("Drag cannot be told: no reading is of steady level flight.".to_string());
    }
    if !tells(Told::Power) {
        remarks.push(format!("{engine} power cannot be told: no reading is at full throttle."));
    }
    if !tells(Told::Consumption) {
        remarks.push(format!(
            "No {flow} was read: rpm alone tells how strong the {0} is for this propeller, not whether the \
             {0} is weak or the propeller heavy to turn.",
            engine.to_lowercase()
        ));
    }
    for pair in pairs {
        let how = if pair.correlation > 0.0 { "divided by" } else { "multiplied by" };
        remarks.push(format!(
            "{} and {} cannot be told apart; what is known is {} {how} {}: {:.3} ± {:.3} of the job's figures.",
            words(pair.first),
            words(pair.second).to_lowercase(),
            words(pair.first).to_lowercase(),
            words(pair.second).to_lowercase(),
            pair.value,
            pair.value * pair.deviation
        ));
    }
    let far: Vec<&str> = found.iter().filter(|f| f.is_far()).map(|f| f.title).collect();
    if !far.is_empty() {
        remarks.push(format!(
            "Far from what was thought before: {}. Readings that disagree lead there; check them before you keep \
             this.",
            far.join(", ").to_lowercase()
        ));
    }
    let untold: Vec<&str> = found.iter().filter(|f| !f.told && !f.is_far()).map(|f| f.title).collect();
    if !untold.is_empty() {
        remarks.push(format!(
            "The readings say little of {}: there stands mostly what was thought before.",
            untold.join(", ").to_lowercase()
        ));
    }
    remarks
}

/// What is worth saying of a reading: why it tells nothing, or what may have happened when it is far off.
pub(super) fn of_reading(
    rig: &Rig,
    r: &LogReading,
    tells: bool,
    outlier: bool,
    expected_rpm: Option<f64>,
) -> String {
    if r.left_out {
        return "left out".into();
    }
    let Some(engine_rpm) = r.engine_rpm else { return "tells nothing: no rpm was read".into() };
    if !tells {
        let piston = matches!(rig.shaft, Some(Shaft::Piston(_)));
        return if piston && r.throttle.is_some_and(|t| t < 1.0) {
            "tells nothing: what a part of full throttle gives is not known; a fuel flow or level flight \
             would tell"
                .into()
        } else {
            "tells nothing: neither full throttle nor level flight nor a consumption, or no answer there"
                .into()
        };
    }
    if !outlier {
        return String::new();
    }
    let (Some(expected), Some(shaft)) = (expected_rpm, &rig.shaft) else { return "far off".into() };
    let near = |value: f64| (value / expected - 1.0).abs() < NEAR;
    let cause = if near(engine_rpm * shaft.gear_ratio()) && (shaft.gear_ratio() - 1.0).abs() > 2.0 * NEAR {
        "perhaps it is the propeller's rpm, not the engine's"
    } else if near(10.0 * engine_rpm) || near(100.0 * engine_rpm) {
        "perhaps the dial counts tens or hundreds"
    } else if near(2.0 * engine_rpm) || near(0.5 * engine_rpm) {
        "perhaps the tachometer is set to another number of blades or pulses"
    } else if r.airspeed_m_s > 0.0 {
        "perhaps the airspeed is in another unit, or is not the true one; or it was not steady"
    } else {
        "perhaps not at full throttle, or in wind"
    };
    format!("far off; {cause}")
}
