//! Readings that are hard to believe, each with its likely cause; they are left out until they are confirmed.

use std::fmt::Write;

use crate::job::{AngleReference, BladeReading};
use crate::result::Doubt;
use crate::rig::Rig;

/// A carver is rarely farther off than this, degrees. A choice, as those below: a reading that is doubted is
/// left out only until it is confirmed.
const FAR_DEG: f64 = 4.0;
/// Two angles count as the same within this, degrees.
const SAME_DEG: f64 = 1.0;
/// Chord or thickness is rarely farther off than this share.
const FAR_SHARE: f64 = 0.25;
/// Two lengths count as the same within this share.
const SAME_SHARE: f64 = 0.12;

/// Every reading of a job that lies far from the drawing, with what may have happened.
#[must_use]
pub fn doubts(rig: &Rig) -> Vec<Doubt> {
    let Some(carved) = &rig.job.carved else { return Vec::new() };
    let mut found = Vec::new();
    for (b, blade) in carved.blades.iter().enumerate() {
        for (i, reading) in blade.readings.iter().enumerate() {
            let doubt = |message| Doubt {
                blade: b + 1,
                reading: i + 1,
                radius_m: reading.radius_m,
                message,
                counted: reading.confirmed,
            };
            found.extend(doubted(rig, carved.angle_reference, reading).into_iter().flatten().map(doubt));
        }
    }
    found
}

/// A reading without what is hard to believe of it, unless it was confirmed.
pub(super) fn believed(rig: &Rig, reference: AngleReference, reading: &BladeReading) -> BladeReading {
    let [angle, chord, thickness] =
        doubted(rig, reference, reading).map(|d| d.is_none() || reading.confirmed);
    BladeReading {
        angle_deg: reading.angle_deg.filter(|_| angle),
        chord_m: reading.chord_m.filter(|_| chord),
        thickness_m: reading.thickness_m.filter(|_| thickness),
        ..*reading
    }
}

/// What is hard to believe of angle, chord and thickness.
fn doubted(rig: &Rig, reference: AngleReference, reading: &BladeReading) -> [Option<String>; 3] {
    let [chord, thickness] = lengths(rig, reading);
    [angle(rig, reference, reading), chord, thickness]
}

fn angle(rig: &Rig, reference: AngleReference, reading: &BladeReading) -> Option<String> {
    let found = reading.angle_deg?;
    let blade = &rig.rotor.blade;
    let chord_line = blade.cut(reading.radius_m).angle_rad.to_degrees();
    let face = blade.face_to_chord_rad(reading.radius_m).map(|f| chord_line - f.to_degrees());
    let (expected, other, words) = match reference {
        AngleReference::ChordLine => (chord_line, face, "on the flat face"),
        AngleReference::FlatFace => (face.unwrap_or(chord_line), Some(chord_line), "to the chord line"),
    };
    let near = |value: f64, to: f64| (value - to).abs() < SAME_DEG;
    let cause = if near(90.0 - found, expected) {
        "perhaps read from the shaft, not from the plane of rotation: then it is 90° less it"
    } else if near(-found, expected) {
        "perhaps the sign is turned"
    } else if near(180.0 - found, expected) {
        "perhaps read from the other side: then it is 180° less it"
    } else if near(found.to_degrees(), expected) {
        "perhaps it is in radians"
    } else if (found - expected).abs() < FAR_DEG {
        let confused = other.filter(|o| (o - expected).abs() > 1.5 && (found - o).abs() < 0.2);
        return confused
            .map(|_| told("angle", found, expected, "°", &format!("perhaps it was read {words}")));
    } else if other.is_some_and(|o| near(found, o)) {
        return Some(told("angle", found, expected, "°", &format!("perhaps it was read {words}")));
    } else {
        "perhaps it belongs to another station"
    };
    Some(told("angle", found, expected, "°", cause))
}

fn lengths(rig: &Rig, reading: &BladeReading) -> [Option<String>; 2] {
    let cut = rig.rotor.blade.cut(reading.radius_m);
    let drawn = [cut.chord_m, cut.thickness_ratio * cut.chord_m];
    let found = [reading.chord_m, reading.thickness_m];
    let names = ["chord", "thickness"];
    std::array::from_fn(|i| {
        let value = found[i]?;
        if (value / drawn[i] - 1.0).abs() < FAR_SHARE {
            return None;
        }
        let same = |v: f64, to: f64| (v / to - 1.0).abs() < SAME_SHARE;
        let cause = if same(value, drawn[1 - i]) {
            "perhaps chord and thickness are swapped"
        } else if same(value * 25.4, drawn[i]) {
            "perhaps it is in inches"
        } else if same(value / 25.4, drawn[i]) {
            "perhaps it was turned from inches to millimetres twice"
        } else if same(value * 10.0, drawn[i]) {
            "perhaps it is in centimetres"
        } else if same(value / 10.0, drawn[i]) {
            "perhaps a decimal point is missing"
        } else {
            "perhaps it belongs to another station"
        };
        Some(told(names[i], 1e3 * value, 1e3 * drawn[i], " mm", cause))
    })
}

fn told(what: &str, found: f64, expected: f64, unit: &str, cause: &str) -> String {
    let mut text = String::new();
    // Writing to a text cannot fail.
    let _ = write!(text, "{what} {found:.2}{unit} where {expected:.2}{unit} is drawn; {cause}");
    text
}
