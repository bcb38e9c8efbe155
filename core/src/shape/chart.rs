//! Figures over pitch and diameter: blades like the drawn one, scaled to a diameter and set to a pitch.

use ndarray::Array2;

use super::ShapeError;
use super::brief::look;
use super::limits::{beam, margins, standing};
use super::variant::{accepted, with_angles_of};
use crate::fit::Near;
use crate::job::Limits;
use crate::result::{ChartCell, PitchDiameter};
use crate::rig::Rig;

/// How a blade gets its pitch.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum PitchBy {
    /// The pitch of every station is scaled.
    #[default]
    Scale,
    /// The whole blade is turned.
    Turn,
}

/// Most pitches or diameters.
pub const MOST_CHART_STEPS: usize = 200;

/// The chart at a flight point over geometric pitches at 0.75 R and diameters, m. Chords go with the
/// diameter, thickness ratios stay. Limits of rpm and tip Mach number are judged at this flight point alone;
/// a search judges them at all that count.
///
/// # Errors
/// No such flight point; too many steps.
pub fn pitch_diameter(
    rig: &Rig,
    point: usize,
    pitches_m: &[f64],
    diameters_m: &[f64],
    by: PitchBy,
    limits: &Limits,
) -> Result<PitchDiameter, ShapeError> {
    let at = rig.job.flight_points.get(point).ok_or(ShapeError::NoPoint(point))?;
    for (name, steps) in [("pitches", pitches_m.len()), ("diameters", diameters_m.len())] {
        if !(1..=MOST_CHART_STEPS).contains(&steps) {
            return Err(ShapeError::Figure { name, found: steps as f64, allowed: "1 to 200" });
        }
    }
    let (standing, beam) = (standing(rig, limits), beam(rig, limits));
    // Each diameter goes on from its own answer at the pitch before.
    let mut near = vec![(Near::default(), Near::default()); diameters_m.len()];
    let mut cell = |(p, d): (usize, usize)| {
        let rig = sized(rig, pitches_m[p], diameters_m[d], by).ok()?;
        let (near, near_standing) = &mut near[d];
        let looked = look(&rig, at, near);
        let standing = standing.as_ref().map(|point| look(&rig, point, near_standing).brief);
        let all = margins(&rig, limits, std::slice::from_ref(&looked), standing.as_ref(), beam.as_ref());
        let broken = all.iter().filter(|m| m.share < 0.0).map(|m| m.limit).collect();
        Some(ChartCell { figures: looked.brief, standing_rpm: standing.and_then(|b| b.rpm), broken })
    };
    Ok(PitchDiameter {
        flight_point: at.name.clone(),
        pitches_m: pitches_m.to_vec(),
        diameters_m: diameters_m.to_vec(),
        drawn_m: (rig.rotor.blade.pitch_075_m(0.0), rig.job.propeller.diameter_m),
        cells: Array2::from_shape_fn((pitches_m.len(), diameters_m.len()), &mut cell),
    })
}

/// The drawn blade at another diameter and pitch, m.
///
/// # Errors
/// A propeller that the job's check refuses.
pub fn sized(rig: &Rig, pitch_m: f64, diameter_m: f64, by: PitchBy) -> Result<Rig, ShapeError> {
    let (blade, grown) = (&rig.rotor.blade, diameter_m / rig.job.propeller.diameter_m);
    let r75 = 0.75 * blade.radius_m;
    let drawn_rad = blade.cut(r75).angle_rad;
    let wanted_tan = pitch_m / (std::f64::consts::TAU * r75 * grown);
    let mut propeller = with_angles_of(rig, |_, angle| match by {
        PitchBy::Scale => (angle.tan() * wanted_tan / drawn_rad.tan()).atan(),
        PitchBy::Turn => angle + wanted_tan.atan() - drawn_rad,
    });
    propeller.diameter_m = diameter_m;
    for station in &mut propeller.stations {
        station.chord_m *= grown;
    }
    accepted(rig, propeller)
}
