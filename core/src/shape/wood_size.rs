//! The size of the wood that a propeller needs.

use crate::blade::StackingLine;
use crate::job::PitchControl;
use crate::rig::Rig;

/// Corners of the box round a section of which no outline is known: from its middle, over chord and
/// thickness.
const BOX: [[f64; 2]; 4] = [[-0.5, -0.5], [0.5, -0.5], [0.5, 0.5], [-0.5, 0.5]];

/// Width in the plane of rotation and thickness along the axis of the smallest blank, m: the section at every
/// station where it stands, the other blade of a piece turned half round, and the boss. Without what is left
/// over for planing, and before tip and edges are rounded, which can take or give a millimetre.
pub(super) fn blank_m(rig: &Rig) -> (f64, f64) {
    let (job, blade) = (&rig.job, &rig.rotor.blade);
    let line = StackingLine::new(job, blade.radius_m);
    let one_piece = matches!(job.propeller.pitch_control, PitchControl::Fixed {});
    let mut half_m = if one_piece { blade.hub_radius_m } else { 0.0 };
    let (mut low_m, mut high_m) = (f64::INFINITY, f64::NEG_INFINITY);
    for (station, radius_m) in job.propeller.stations.iter().zip(blade.station_radii_m()) {
        let cut = blade.cut(radius_m);
        let (sin, cos) = cut.angle_rad.sin_cos();
        let [along_m, ahead_m] = line.at(radius_m);
        let axis_m = [along_m, ahead_m + line.lean * radius_m];
        for [behind, up] in rim(rig, &station.section, cut.thickness_ratio, line.fraction) {
            let (behind_m, up_m) = (cut.chord_m * behind, cut.chord_m * up);
            let across_m = axis_m[0] - behind_m * cos - up_m * sin;
            let axial_m = axis_m[1] - behind_m * sin + up_m * cos;
            half_m = half_m.max(across_m.abs());
            (low_m, high_m) = (low_m.min(axial_m), high_m.max(axial_m));
        }
    }
    let boss_m = job.wood.as_ref().and_then(|wood| wood.hub.as_ref()).map_or(0.0, |hub| hub.thickness_m);
    (2.0 * half_m, boss_m.max(high_m - low_m))
}

/// Points round a section behind and above the point that stands on the stacking line, in chords.
fn rim(rig: &Rig, section: &str, thickness_ratio: f64, fraction: Option<f64>) -> Vec<[f64; 2]> {
    let Some(outline) = rig.job.section_outline(section, thickness_ratio) else {
        let middle = fraction.map_or(0.0, |fraction| 0.5 - fraction);
        return BOX.map(|[x, y]| [x + middle, y * thickness_ratio]).to_vec();
    };
    let stands_on = fraction.map_or_else(|| outline.measures().centroid, |fraction| [fraction, 0.0]);
    outline.points().iter().map(|p| [p[0] - stands_on[0], p[1] - stands_on[1]]).collect()
}
