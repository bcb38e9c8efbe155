//! Checks of logbook readings.

use crate::air::{Air, HIGHEST_M, LARGEST_OFFSET_K, LOWEST_M};
use crate::job::document::{LogReading, Logbook};
use crate::job::found::Found;
use crate::sheet::likely;

/// Most readings of a logbook.
const MOST_READINGS: usize = 500;

pub(super) fn check_logbook(found: &mut Found, logbook: &Logbook) {
    found.count("logbook.readings", logbook.readings.len(), 0..=MOST_READINGS);
    for (i, reading) in logbook.readings.iter().enumerate() {
        let at = |name: &str| format!("logbook.readings[{i}].{name}");
        super::text(found, &at("note"), &reading.note, 0);
        check_air(found, &at, reading);
        check_running(found, &at, reading);
    }
    let w = &logbook.widths;
    for (name, width) in [
        ("engine_power", w.engine_power),
        ("drag_area", w.drag_area),
        ("propeller_power", w.propeller_power),
        ("consumption", w.consumption),
    ] {
        found.range(format!("logbook.widths.{name}"), width, 1e-4..=1.0, "");
    }
    for (name, factor) in logbook.factors.iter().flat_map(|f| {
        [
            ("engine_power", f.engine_power),
            ("drag_area", f.drag_area),
            ("propeller_power", f.propeller_power),
            ("consumption", f.consumption),
        ]
    }) {
        found.range(format!("logbook.factors.{name}"), factor, 0.2..=5.0, "");
    }
}

fn check_air(found: &mut Found, at: &impl Fn(&str) -> String, r: &LogReading) {
    found.optional(at("altitude_m"), r.altitude_m, LOWEST_M..=HIGHEST_M, "m");
    if let Some(pressure) = r.pressure_pa.filter(|p| !(5_000.0..=115_000.0).contains(p)) {
        let units = [(100.0, "hPa"), (3_386.39, "inches of mercury"), (1e3, "kPa")];
        let hint = likely(pressure, 50_000.0..=110_000.0, &units);
        found.refuse(at("pressure_pa"), pressure, format!("5000 to 115000 Pa{hint}"));
        found.within(5_000.0, 115_000.0);
    }
    if r.altitude_m.is_some() && r.pressure_pa.is_some() {
        found.refuse(at("pressure_pa"), "given beside altitude_m", "one of the two");
    }
    let Some(found_c) = r.temperature_c else { return };
    let height = r.altitude_m.filter(|h| (LOWEST_M..=HIGHEST_M).contains(h)).unwrap_or(0.0);
    let standard_c = Air::standard(height, 0.0).map_or(15.0, |air| air.temperature_k - 273.15);
    let (low, high) = ((standard_c - LARGEST_OFFSET_K).round(), (standard_c + LARGEST_OFFSET_K).round());
    if !(low..=high).contains(&found_c) {
        let hint = if (low..=high).contains(&(found_c - 273.15)) {
            "; perhaps it is in kelvin"
        } else if (low..=high).contains(&((found_c - 32.0) / 1.8)) {
            "; perhaps it is in degrees Fahrenheit"
        } else {
            ""
        };
        found.refuse(at("temperature_c"), found_c, format!("{low} to {high} °C{hint}"));
        found.within(low, high);
    }
}

fn check_running(found: &mut Found, at: &impl Fn(&str) -> String, r: &LogReading) {
    found.range(at("airspeed_m_s"), r.airspeed_m_s, 0.0..=340.0, "m/s");
    found.optional(at("engine_rpm"), r.engine_rpm, 10.0..=200_000.0, "rpm");
    if let Some(throttle) = r.throttle.filter(|t| !(0.0..=1.0).contains(t)) {
        let hint = likely(throttle, 0.01..=1.0, &[(0.01, "%")]);
        found.refuse(at("throttle"), throttle, format!("0 to 1{hint}"));
        found.within(0.0, 1.0);
    }
    if r.level && r.airspeed_m_s == 0.0 {
        found.refuse(at("airspeed_m_s"), 0, "above 0 in level flight");
    }
    found.optional(at("fuel_kg_per_h"), r.fuel_kg_per_h, 0.0..=2_000.0, "kg/h");
    found.optional(at("current_a"), r.current_a, 0.0..=5_000.0, "A");
}
