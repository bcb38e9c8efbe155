//! Readings of a logbook as a sheet: `rpm` and any of `altitude` or `pressure`, `temperature`, `airspeed`
//! (true), `throttle` (`full`, a share, or a percentage by its heading or with its own %), `level` (`yes`),
//! `fuel`, `current`, `note`; units in the headings.

use crate::job::{LogReading, Logbook};
use crate::sheet::{Quantity, Row, Sheet, SheetError};

const NONE: &[(&str, f64, f64)] = &[("", 1.0, 0.0)];
const SPEED: &[(&str, f64, f64)] = &[
    ("m/s", 1.0, 0.0),
    ("m_s", 1.0, 0.0),
    ("km/h", 1.0 / 3.6, 0.0),
    ("km_h", 1.0 / 3.6, 0.0),
    ("kmh", 1.0 / 3.6, 0.0),
    ("kn", 0.514_444, 0.0),
    ("kt", 0.514_444, 0.0),
    ("knots", 0.514_444, 0.0),
    ("mph", 0.447_04, 0.0),
];
const PRESSURE: &[(&str, f64, f64)] =
    &[("Pa", 1.0, 0.0), ("hPa", 100.0, 0.0), ("mbar", 100.0, 0.0), ("inHg", 3_386.39, 0.0)];
const TEMPERATURE: &[(&str, f64, f64)] = &[
    ("°C", 1.0, 0.0),
    ("C", 1.0, 0.0),
    ("°F", 5.0 / 9.0, -160.0 / 9.0),
    ("F", 5.0 / 9.0, -160.0 / 9.0),
    ("K", 1.0, -273.15),
];

const QUANTITIES: [Quantity; 10] = [
    Quantity {
        name: "rpm",
        names: &["rpm", "engine_rpm", "motor_rpm"],
        units: NONE,
        allowed: 10.0..=200_000.0,
    },
    Quantity {
        name: "altitude",
        names: &["altitude", "height", "pressure_altitude"],
        units: &[("m", 1.0, 0.0), ("ft", 0.3048, 0.0), ("feet", 0.3048, 0.0)],
        allowed: -1_000.0..=20_000.0,
    },
    Quantity { name: "pressure", names: &["pressure"], units: PRESSURE, allowed: 5_000.0..=115_000.0 },
    Quantity {
        name: "temperature",
        names: &["temperature", "oat"],
        units: TEMPERATURE,
        allowed: -90.0..=75.0,
    },
    Quantity { name: "airspeed", names: &["airspeed", "tas", "speed"], units: SPEED, allowed: 0.0..=340.0 },
    Quantity {
        name: "throttle",
        names: &["throttle"],
        units: &[("", 1.0, 0.0), ("%", 0.01, 0.0)],
        allowed: 0.0..=1.0,
    },
    Quantity { name: "level", names: &["level", "level_flight"], units: NONE, allowed: 0.0..=1.0 },
    Quantity {
        name: "fuel",
        names: &["fuel", "fuel_flow"],
        units: &[("kg/h", 1.0, 0.0), ("kg_per_h", 1.0, 0.0), ("kg_h", 1.0, 0.0)],
        allowed: 0.0..=2_000.0,
    },
    Quantity { name: "current", names: &["current"], units: &[("A", 1.0, 0.0)], allowed: 0.0..=5_000.0 },
    Quantity { name: "note", names: &["note", "remark", "what"], units: NONE, allowed: 0.0..=0.0 },
];

/// The readings of a sheet, and the headings that were not used; widths and factors are those of `before`,
/// where there is one.
///
/// # Errors
/// [`SheetError`] with line, column, what stands there, what is allowed and what may have happened.
///
/// ```
/// use spokeshave::logbook::import;
/// let text = "rpm,throttle,airspeed_km_h,temperature_c,level\n2990,full,0,22,\n2510,,170,14,yes\n";
/// let (logbook, _) = import::read(text, None)?;
/// assert_eq!(logbook.readings[0].throttle, Some(1.0));
/// assert!(logbook.readings[1].level && (logbook.readings[1].airspeed_m_s - 47.222).abs() < 0.001);
/// # Ok::<(), spokeshave::sheet::SheetError>(())
/// ```
pub fn read(text: &str, before: Option<&Logbook>) -> Result<(Logbook, Vec<String>), SheetError> {
    let sheet = Sheet::read(text, &QUANTITIES)?;
    if !sheet.has("rpm") {
        return Err(sheet.without("rpm"));
    }
    let readings: Result<Vec<LogReading>, SheetError> = sheet.rows().map(|row| one(&sheet, row)).collect();
    let kept = before.cloned().unwrap_or_default();
    Ok((Logbook { readings: readings?, ..kept }, sheet.unused))
}

fn one(sheet: &Sheet, row: &Row) -> Result<LogReading, SheetError> {
    let engine_rpm = sheet.figure(row, "rpm")?.ok_or_else(|| sheet.refused(row, "rpm", "a number"))?;
    let airspeed_m_s = sheet.figure(row, "airspeed")?.unwrap_or(0.0);
    let level = level(sheet, row)?;
    if level && airspeed_m_s == 0.0 {
        return Err(sheet.refused(row, "airspeed", "above 0 in level flight"));
    }
    let (altitude_m, pressure_pa) = (sheet.figure(row, "altitude")?, sheet.figure(row, "pressure")?);
    if altitude_m.is_some() && pressure_pa.is_some() {
        return Err(sheet.refused(row, "pressure", "either an altitude or a pressure"));
    }
    Ok(LogReading {
        note: sheet.word(row, "note").chars().take(200).collect(),
        altitude_m,
        pressure_pa,
        temperature_c: sheet.figure(row, "temperature")?.map(|c| (c * 1e6).round() / 1e6),
        airspeed_m_s,
        engine_rpm: Some(engine_rpm),
        throttle: throttle(sheet, row)?,
        level,
        fuel_kg_per_h: sheet.figure(row, "fuel")?,
        current_a: sheet.figure(row, "current")?,
        left_out: false,
    })
}

fn throttle(sheet: &Sheet, row: &Row) -> Result<Option<f64>, SheetError> {
    let word = sheet.word(row, "throttle");
    if word.eq_ignore_ascii_case("full") {
        return Ok(Some(1.0));
    }
    let number = |text: &str| text.trim().replace(',', ".").parse::<f64>().ok();
    let refused = || sheet.refused(row, "throttle", "0 to 1, a percentage, or full");
    match word.strip_suffix('%') {
        // Its own sign counts, whatever the heading says.
        Some(percent) => match number(percent).filter(|p| (0.0..=100.0).contains(p)) {
            Some(percent) => Ok(Some(0.01 * percent)),
            None => Err(refused()),
        },
        None if !word.is_empty() && number(&word.replace('−', "-")).is_none() => Err(refused()),
        None => sheet.figure(row, "throttle"),
    }
}

fn level(sheet: &Sheet, row: &Row) -> Result<bool, SheetError> {
    match sheet.word(row, "level").to_lowercase().as_str() {
        "" | "no" | "n" | "0" | "false" => Ok(false),
        "yes" | "y" | "1" | "true" | "x" | "level" => Ok(true),
        _ => Err(sheet.refused(row, "level", "yes, no or nothing")),
    }
}
