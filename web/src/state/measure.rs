//! What is measured at a station, read from the blade as drawn and written into the job.

use spokeshave::drawn::{DrawnStation, kept_angle_deg};
use spokeshave::job::{AngleReference, Job, Station};

/// What is measured at a station.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Measure {
    /// Radius.
    Radius,
    /// Chord.
    Chord,
    /// Greatest thickness.
    Thickness,
    /// Blade angle to the chord line.
    Angle,
    /// Blade angle on the flat face.
    FaceAngle,
    /// Geometric pitch.
    Pitch,
}

impl Measure {
    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Radius => "radius",
            Self::Chord => "chord",
            Self::Thickness => "thickness",
            Self::Angle => "blade angle",
            Self::FaceAngle => "angle on the face",
            Self::Pitch => "pitch",
        }
    }

    /// The figure of a station as drawn.
    #[must_use]
    pub fn of(self, drawn: &DrawnStation) -> Option<f64> {
        match self {
            Self::Radius => Some(drawn.radius_m),
            Self::Chord => Some(drawn.chord_m),
            Self::Thickness => Some(drawn.thickness_m),
            Self::Angle => Some(drawn.angle_deg),
            Self::FaceAngle => drawn.face_angle_deg,
            Self::Pitch => Some(drawn.pitch_m),
        }
    }
}

impl Measure {
    /// Its name in the job file.
    pub(super) fn key(self) -> &'static str {
        match self {
            Self::Radius => "radius_fraction",
            Self::Chord => "chord_m",
            Self::Thickness => "thickness_ratio",
            Self::Angle | Self::FaceAngle => "angle_deg",
            Self::Pitch => "pitch_m",
        }
    }
}

/// Writes a measure of a station, SI; whether there was a place for it.
pub(super) fn write_station(job: &mut Job, i: usize, measure: Measure, value: f64) -> bool {
    let tip_m = job.propeller.diameter_m / 2.0;
    let kept_deg = match measure {
        Measure::Angle => kept_angle_deg(job, i, AngleReference::ChordLine, value),
        Measure::FaceAngle => kept_angle_deg(job, i, AngleReference::FlatFace, value),
        _ => None,
    };
    let Some(station) = job.propeller.stations.get_mut(i) else { return false };
    match measure {
        Measure::Radius => station.radius_fraction = value / tip_m,
        Measure::Chord => write_chord(station, value),
        Measure::Thickness => station.thickness_ratio = value / station.chord_m,
        Measure::Pitch => (station.angle_deg, station.pitch_m) = (None, Some(value)),
        Measure::Angle | Measure::FaceAngle => {
            if kept_deg.is_none() {
                return false;
            }
            (station.angle_deg, station.pitch_m) = (kept_deg, None);
        }
    }
    true
}

/// The thickness in millimetres stays: one entry changes one measure of the wood.
fn write_chord(station: &mut Station, chord_m: f64) {
    station.thickness_ratio *= station.chord_m / chord_m;
    station.chord_m = chord_m;
}
