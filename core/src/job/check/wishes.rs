//! Checks of what a search is asked for.

use super::super::document::{FlightPoint, Limits, RpmLimit, Wishes};
use super::super::found::Found;

const MOST_AIMS: usize = 50;
/// Propeller rpm that may be asked for: from hardly turning to more than the smallest propellers do (common
/// practice).
const RPM: std::ops::RangeInclusive<f64> = 1.0..=100_000.0;

pub(super) fn check_wishes(found: &mut Found, wishes: &Wishes, points: &[FlightPoint]) {
    found.count("wishes.aims", wishes.aims.len(), 0..=MOST_AIMS);
    for (i, aim) in wishes.aims.iter().enumerate() {
        known(found, format!("wishes.aims[{i}].flight_point"), &aim.flight_point, points);
        let path = format!("wishes.aims[{i}].weight");
        found.range(path, aim.weight, 1e-6..=1e6, "");
    }
    check_limits(found, &wishes.limits, points);
}

fn known(found: &mut Found, path: String, name: &str, points: &[FlightPoint]) {
    if !points.iter().any(|p| p.name == name) {
        let names: Vec<&str> = points.iter().map(|p| p.name.as_str()).collect();
        found.refuse(path, format!("\"{name}\""), format!("a flight point: {}", names.join(", ")));
    }
}

fn check_limits(found: &mut Found, limits: &Limits, points: &[FlightPoint]) {
    let at = |name: &str| format!("wishes.limits.{name}");
    found.optional(at("rpm_most"), limits.rpm_most, RPM, "rpm");
    found.optional(at("standing_rpm_least"), limits.standing_rpm_least, RPM, "rpm");
    found.optional(at("tip_mach_most"), limits.tip_mach_most, 0.01..=1.5, "");
    found.optional(at("diameter_most_m"), limits.diameter_most_m, 0.02..=12.0, "m");
    found.optional(at("shaft_height_m"), limits.shaft_height_m, 0.01..=20.0, "m");
    found.optional(at("blank_width_most_m"), limits.blank_width_most_m, 0.001..=12.0, "m");
    found.optional(at("blank_depth_most_m"), limits.blank_depth_most_m, 0.001..=12.0, "m");
    found.optional(at("stress_margin_least"), limits.stress_margin_least, 0.0..=100.0, "");
    check_clearance(found, limits);
    found.count(&at("rpm"), limits.rpm.len(), 0..=points.len());
    for (i, limit) in limits.rpm.iter().enumerate() {
        check_rpm(found, i, limit, points);
    }
}

fn check_clearance(found: &mut Found, limits: &Limits) {
    let Some(clearance) = limits.ground_clearance_m else { return };
    let path = "wishes.limits.ground_clearance_m";
    match limits.shaft_height_m {
        None => found.refuse(path.into(), clearance, "nothing without shaft_height_m"),
        Some(height) if !(clearance >= 0.0 && clearance < height) => {
            found.refuse(path.into(), clearance, format!("0 m to below the height of the shaft, {height} m"));
        }
        Some(_) => {}
    }
}

fn check_rpm(found: &mut Found, i: usize, limit: &RpmLimit, points: &[FlightPoint]) {
    let at = |name: &str| format!("wishes.limits.rpm[{i}].{name}");
    known(found, at("flight_point"), &limit.flight_point, points);
    found.optional(at("least"), limit.least, RPM, "rpm");
    found.optional(at("most"), limit.most, limit.least.unwrap_or(*RPM.start()).max(1.0)..=*RPM.end(), "rpm");
}
