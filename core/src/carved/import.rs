//! Readings of carved blades as a sheet: `blade`, `radius` (or `station`, the share of the tip radius),
//! `angle` (or `face angle`, `chord-line angle`), `chord`, `thickness`, `track`; units in the headings, all
//! but the place may be missing. An angle may be in degrees and minutes.

use crate::job::{AngleReference, BladeReading, Carved, CarvedBlade, Propeller};
use crate::sheet::{Quantity, Row, Sheet, SheetError, likely};

const LENGTH: &[(&str, f64, f64)] =
    &[("m", 1.0, 0.0), ("mm", 1e-3, 0.0), ("cm", 1e-2, 0.0), ("in", 0.0254, 0.0), ("inch", 0.0254, 0.0)];
const ANGLE: &[(&str, f64, f64)] =
    &[("deg", 1.0, 0.0), ("°", 1.0, 0.0), ("degrees", 1.0, 0.0), ("deg_min", 1.0, 0.0), ("", 1.0, 0.0)];
const SHARE: &[(&str, f64, f64)] = &[("", 1.0, 0.0), ("%", 0.01, 0.0), ("percent", 0.01, 0.0)];

const QUANTITIES: [Quantity; 9] = [
    Quantity {
        name: "blade",
        names: &["blade", "blade_number"],
        units: &[("", 1.0, 0.0)],
        allowed: 1.0..=12.0,
    },
    Quantity { name: "radius", names: &["radius", "r"], units: LENGTH, allowed: 1e-4..=6.0 },
    Quantity {
        name: "station",
        names: &["station", "radius_fraction", "r/r"],
        units: SHARE,
        allowed: 0.001..=1.0,
    },
    Quantity { name: "angle", names: &["angle", "blade_angle"], units: ANGLE, allowed: -90.0..=90.0 },
    Quantity { name: "face angle", names: &["face_angle"], units: ANGLE, allowed: -90.0..=90.0 },
    Quantity { name: "chord-line angle", names: &["chord_line_angle"], units: ANGLE, allowed: -90.0..=90.0 },
    Quantity { name: "chord", names: &["chord"], units: LENGTH, allowed: 1e-4..=3.0 },
    Quantity { name: "thickness", names: &["thickness"], units: LENGTH, allowed: 1e-5..=1.0 },
    Quantity { name: "track", names: &["track"], units: LENGTH, allowed: -0.2..=0.2 },
];

/// The readings of a sheet, and the headings that were not used. What the angles were read on is what the
/// heading says, else what the propeller is measured by; limits and density are those of `before`, where
/// there is one.
///
/// # Errors
/// [`SheetError`] with line, column, what stands there, what is allowed and what may have happened.
///
/// ```
/// use spokeshave::{carved::import, job::{DEMOS, Job}};
/// let job = Job::from_json(DEMOS[0].json).unwrap();
/// let text = "blade,radius_mm,face angle,chord_mm\n1,540,18 30,75\n2,540,19.1,\n";
/// let (carved, _) = import::read(text, &job.propeller, None)?;
/// assert_eq!(carved.blades[0].readings[0].angle_deg, Some(18.5));
/// # Ok::<(), spokeshave::sheet::SheetError>(())
/// ```
pub fn read(text: &str, p: &Propeller, before: Option<&Carved>) -> Result<(Carved, Vec<String>), SheetError> {
    let sheet = Sheet::read(text, &QUANTITIES)?;
    if !sheet.has("radius") && !sheet.has("station") {
        return Err(sheet.without("radius_mm or station"));
    }
    let named: Vec<&str> =
        ["angle", "face angle", "chord-line angle"].into_iter().filter(|name| sheet.has(name)).collect();
    if named.len() > 1 {
        return Err(SheetError {
            line: sheet.header_line,
            column: None,
            message: format!("columns {}; one of them is enough", named.join(" and ")),
        });
    }
    let angle = named.first().copied().unwrap_or("angle");
    if sheet.rows().all(|row| READ.iter().chain([&angle]).all(|name| sheet.word(row, name).is_empty())) {
        return Err(nothing_read(&sheet, angle));
    }
    let mut blades = vec![CarvedBlade::default(); 1];
    for row in sheet.rows() {
        let (blade, reading) = one(&sheet, row, angle, p)?;
        if blade > p.blades as usize {
            return Err(sheet.refused(row, "blade", &format!("1 to {}, the blades of the job", p.blades)));
        }
        if blades.len() < blade {
            blades.resize(blade, CarvedBlade::default());
        }
        put(&sheet, row, &mut blades[blade - 1].readings, reading)?;
    }
    let angle_reference = match angle {
        "face angle" => AngleReference::FlatFace,
        "chord-line angle" => AngleReference::ChordLine,
        _ => p.angle_reference,
    };
    let kept = before.cloned().unwrap_or_default();
    Ok((Carved { angle_reference, blades, ..kept }, sheet.unused))
}

fn one(sheet: &Sheet, row: &Row, angle: &str, p: &Propeller) -> Result<(usize, BladeReading), SheetError> {
    let tip_m = 0.5 * p.diameter_m;
    let radius = sheet.figure(row, "radius")?;
    let share = sheet.figure(row, "station").map_err(|fault| counted(sheet, row, p, fault))?;
    let (name, radius_m) = match (radius, share) {
        (Some(radius), _) => ("radius", radius),
        (None, Some(share)) => ("station", share * tip_m),
        (None, None) => {
            let name = if sheet.has("radius") { "radius" } else { "station" };
            return Err(sheet.refused(row, name, "a number: where on the blade it was read"));
        }
    };
    within(sheet, row, p, (name, radius_m))?;
    let blade = sheet.figure(row, "blade")?.unwrap_or(1.0);
    if blade.fract() != 0.0 {
        return Err(sheet.refused(row, "blade", "a whole number from 1"));
    }
    let reading = BladeReading {
        radius_m,
        angle_deg: sheet.figure_by(row, angle, angle_of).map_err(|fault| {
            let minutes = minutes_fault(sheet.word(row, angle));
            minutes.map_or(fault, |why| {
                sheet.refused(row, angle, &format!("degrees, or degrees and minutes; {why}"))
            })
        })?,
        chord_m: sheet.figure(row, "chord")?,
        thickness_m: sheet.figure(row, "thickness")?,
        track_m: sheet.figure(row, "track")?,
        confirmed: false,
    };
    if let (Some(chord), Some(thickness)) = (reading.chord_m, reading.thickness_m)
        && thickness > chord
    {
        let allowed = "at most the chord; perhaps chord and thickness are swapped";
        return Err(sheet.refused(row, "thickness", allowed));
    }
    Ok((blade as usize, reading))
}

/// What a reading may hold besides the angle, by the names of the quantities.
const READ: [&str; 3] = ["chord", "thickness", "track"];

/// The fault of a sheet that says where but not what was read.
fn nothing_read(sheet: &Sheet, angle: &str) -> SheetError {
    let columns =
        [(angle, "angle"), ("chord", "chord_mm"), ("thickness", "thickness_mm"), ("track", "track_mm")];
    let missing: Vec<&str> = columns.iter().filter(|(name, _)| !sheet.has(name)).map(|c| c.1).collect();
    let columns = if missing.is_empty() {
        String::new()
    } else {
        format!("; there is no column {}", missing.join(", "))
    };
    let message = format!("no line holds an angle, a chord, a thickness or a track{columns}");
    SheetError { line: sheet.header_line, column: None, message }
}

/// Refuses a place beyond the tip, or inside of both the hub and the innermost station drawn.
fn within(sheet: &Sheet, row: &Row, p: &Propeller, (name, radius_m): (&str, f64)) -> Result<(), SheetError> {
    let tip_m = 0.5 * p.diameter_m;
    let hub_m = 0.5 * p.hub_diameter_m;
    let first_m = p.stations.first().map_or(hub_m, |s| s.radius_fraction * tip_m);
    let (low_m, from) = if first_m < hub_m { (first_m, "innermost station") } else { (hub_m, "hub") };
    let allowed_m = low_m * (1.0 - 1e-9)..=tip_m * (1.0 + 1e-9);
    if allowed_m.contains(&radius_m) {
        return Ok(());
    }
    let written = sheet.word(row, "radius").replace(',', ".").parse::<f64>().ok();
    let units: Vec<(f64, &str)> = LENGTH.iter().map(|u| (u.1, u.0)).collect();
    let hint = written.filter(|_| name == "radius").map(|value| likely(value, allowed_m, &units));
    let [low, high] = [low_m, tip_m].map(|m| 1e3 * m);
    let allowed = format!("{low:.1} to {high:.1} mm, from the {from} to the tip{}", hint.unwrap_or_default());
    Err(sheet.refused(row, name, &allowed))
}

/// The fault of a station that is no share of the radius: likely the number of a station.
fn counted(sheet: &Sheet, row: &Row, p: &Propeller, fault: SheetError) -> SheetError {
    let number = sheet.word(row, "station").parse::<usize>().ok();
    let station = number.and_then(|n| p.stations.get(n.checked_sub(1)?));
    station.map_or(fault, |station| {
        let radius_mm = 500.0 * p.diameter_m * station.radius_fraction;
        let allowed = format!(
            "a share of the tip radius, 0.001 to 1; perhaps it is the number of a station: write {:.4} \
             here, or {radius_mm:.1} in a column radius_mm",
            station.radius_fraction
        );
        sheet.refused(row, "station", &allowed)
    })
}

/// Puts a reading in its place by radius; a second one at the same place is refused.
fn put(
    sheet: &Sheet,
    row: &Row,
    readings: &mut Vec<BladeReading>,
    new: BladeReading,
) -> Result<(), SheetError> {
    let at = readings.partition_point(|r| r.radius_m < new.radius_m - 1e-6);
    if readings.get(at).is_some_and(|r| (r.radius_m - new.radius_m).abs() <= 1e-6) {
        let name = if sheet.has("radius") { "radius" } else { "station" };
        return Err(sheet.refused(row, name, "one reading of a blade at a place; this is the second"));
    }
    readings.insert(at, new);
    Ok(())
}

/// An angle in degrees from text: decimals (`18.5`), or degrees and minutes with a sign between them (`18
/// 30`, `18°30'`, `18:30`). `None` for anything else.
#[must_use]
pub fn angle_of(text: &str) -> Option<f64> {
    let text = trimmed(text);
    if let Ok(degrees) = text.parse::<f64>() {
        return degrees.is_finite().then_some(degrees);
    }
    let (sign, degrees, minutes) = parts(&text)?;
    MINUTES.contains(&minutes).then(|| sign * (f64::from(degrees) + minutes / 60.0))
}

/// Why a text of degrees and minutes is no angle, where that is the fault of its minutes.
#[must_use]
pub fn minutes_fault(text: &str) -> Option<String> {
    let (_, degrees, minutes) = parts(&trimmed(text))?;
    let wrong = !MINUTES.contains(&minutes);
    wrong.then(|| format!("{minutes} minutes behind {degrees} degrees; minutes are 0 to 59"))
}

/// Minutes that are less than a degree.
const MINUTES: std::ops::Range<f64> = 0.0..60.0;

fn trimmed(text: &str) -> String {
    text.trim().trim_end_matches(['\'', '′', '°']).replace(['−', '–'], "-").replace(',', ".")
}

/// Sign, whole degrees and minutes.
fn parts(text: &str) -> Option<(f64, u16, f64)> {
    // A phone's keys for figures have no space: two points stand for it.
    let text = text.replace("..", " ");
    let (sign, text) = text.strip_prefix('-').map_or((1.0, text.as_str()), |rest| (-1.0, rest));
    let (whole, minutes) = text.split_once(['°', ':', ' ', '-'])?;
    Some((sign, whole.trim().parse().ok()?, minutes.trim().parse().ok()?))
}
