//! Checks of the readings of carved blades.

use crate::job::document::{BladeReading, Carved, Job};
use crate::job::found::Found;
use crate::sheet::likely;

/// Most readings of one blade.
const MOST_READINGS: usize = 200;

pub(super) fn check_carved(found: &mut Found, job: &Job, carved: &Carved) {
    found.optional("carved.density_kg_m3".into(), carved.density_kg_m3, 50.0..=3_000.0, "kg/m³");
    found.range("carved.least_chord_share".into(), carved.least_chord_share, 0.5..=1.0, "of the drawn chord");
    let path = "carved.least_thickness_share".into();
    found.range(path, carved.least_thickness_share, 0.5..=1.0, "of the drawn thickness");
    found.count("carved.blades", carved.blades.len(), 1..=job.propeller.blades.max(1) as usize);
    for (b, blade) in carved.blades.iter().enumerate() {
        found.count(&format!("carved.blades[{b}].readings"), blade.readings.len(), 0..=MOST_READINGS);
        for (i, reading) in blade.readings.iter().enumerate() {
            let at = |name: &str| format!("carved.blades[{b}].readings[{i}].{name}");
            check_reading(found, &at, reading, job.propeller.diameter_m);
            let before = i.checked_sub(1).map(|j| blade.readings[j].radius_m);
            if let Some(before) = before.filter(|before| reading.radius_m - before < 1e-6) {
                let allowed = format!("above {before}, the reading before");
                found.refuse(at("radius_m"), reading.radius_m, allowed);
            }
        }
    }
}

fn check_reading(found: &mut Found, at: &impl Fn(&str) -> String, r: &BladeReading, diameter_m: f64) {
    let tip_m = 0.5 * diameter_m;
    if !(r.radius_m > 0.0 && r.radius_m <= tip_m * (1.0 + 1e-9)) {
        let hint = likely(r.radius_m, 0.02 * tip_m..=tip_m, &[(1e-3, "mm"), (0.0254, "inches")]);
        found.refuse(at("radius_m"), r.radius_m, format!("above 0, up to the tip, {tip_m} m{hint}"));
        found.above(0.0, tip_m);
    }
    if let Some(angle) = r.angle_deg.filter(|a| !(-90.0..=90.0).contains(a)) {
        let other = angle > 90.0 && angle <= 270.0;
        let hint = if other { "; perhaps read from the other side: then it is 180° less this" } else { "" };
        found.refuse(at("angle_deg"), angle, format!("-90 to 90 degrees{hint}"));
        found.within(-90.0, 90.0);
    }
    for (name, value) in [("chord_m", r.chord_m), ("thickness_m", r.thickness_m)] {
        let Some(value) = value.filter(|v| !(*v > 0.0 && *v <= diameter_m)) else { continue };
        let hint = likely(value, 0.001..=diameter_m, &[(1e-3, "mm"), (0.0254, "inches")]);
        found.refuse(at(name), value, format!("above 0, up to the diameter, {diameter_m} m{hint}"));
        found.above(0.0, diameter_m);
    }
    if let (Some(chord), Some(thickness)) = (r.chord_m, r.thickness_m)
        && thickness > chord
    {
        let allowed = format!("at most the chord, {chord} m; perhaps chord and thickness are swapped");
        found.refuse(at("thickness_m"), thickness, allowed);
    }
    found.optional(at("track_m"), r.track_m, -0.2..=0.2, "m");
}
