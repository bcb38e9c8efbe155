//! Writes new figures into a copy of the drawn propeller.

use super::ShapeError;
use crate::job::{AngleReference, Propeller};
use crate::rig::Rig;

/// The propeller with other blade angles (rad, to the chord line), kept to its own reference.
pub(super) fn with_angles(rig: &Rig, angles_rad: &[f64]) -> Propeller {
    let mut propeller = rig.job.propeller.clone();
    let face = |r: f64| rig.rotor.blade.face_to_chord_rad(r).unwrap_or(0.0);
    let radii = rig.rotor.blade.station_radii_m();
    for ((station, r), angle) in propeller.stations.iter_mut().zip(radii).zip(angles_rad) {
        let kept = match rig.job.propeller.angle_reference {
            AngleReference::ChordLine => *angle,
            AngleReference::FlatFace => angle - face(r),
        };
        // Eight decimals of a degree are nothing on a blade, and the file stays readable.
        station.angle_deg = Some(rounded(kept.to_degrees(), 1e8));
        station.pitch_m = None;
    }
    propeller
}

/// The same, each angle by the number of its station and the drawn angle.
pub(super) fn with_angles_of(rig: &Rig, of: impl Fn(usize, f64) -> f64) -> Propeller {
    let blade = &rig.rotor.blade;
    let angles = blade.station_radii_m().enumerate().map(|(i, r)| of(i, blade.cut(r).angle_rad));
    with_angles(rig, &angles.collect::<Vec<_>>())
}

pub(super) fn rounded(value: f64, parts: f64) -> f64 {
    (value * parts).round() / parts
}

/// The job with a propeller, refused where its check does.
pub(super) fn accepted(rig: &Rig, propeller: Propeller) -> Result<Rig, ShapeError> {
    let new = rig.with_propeller(propeller)?;
    match new.job.check_propeller() {
        problems if problems.is_empty() => Ok(new),
        problems => Err(ShapeError::Refused(problems)),
    }
}
