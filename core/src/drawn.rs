//! The blade as drawn, station by station, before the hub turns it: what a table of stations shows and what
//! an edit writes.
//!
//! An angle may be typed to the chord line or on the flat face, or as a pitch; a station keeps one of them,
//! to the propeller's own reference. The functions here go from one to the other without changing the blade.

use std::f64::consts::TAU;

use crate::blade::Blade;
use crate::job::{AngleReference, Job, Station};

/// A station as drawn.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DrawnStation {
    /// Radius, m.
    pub radius_m: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Greatest thickness, m.
    pub thickness_m: f64,
    /// Blade angle to the chord line, degrees.
    pub angle_deg: f64,
    /// Blade angle on the flat face, degrees; `None` where the section has no flat face.
    pub face_angle_deg: Option<f64>,
    /// Geometric pitch `2π r tan(angle)` of the angle the propeller is measured by, m.
    pub pitch_m: f64,
}

/// All stations of a blade as drawn, from hub to tip.
///
/// ```
/// use spokeshave::{drawn::stations, job::{DEMOS, Job}, rig::Rig};
/// let job = Job::from_json(DEMOS[0].json).unwrap();
/// let drawn = stations(&Rig::new(&job).unwrap().rotor.blade, job.propeller.angle_reference);
/// assert!((drawn[0].angle_deg - 55.4).abs() < 1e-9);
/// ```
#[must_use]
pub fn stations(blade: &Blade, reference: AngleReference) -> Vec<DrawnStation> {
    blade.station_radii_m().map(|r| station(blade, reference, r)).collect()
}

fn station(blade: &Blade, reference: AngleReference, radius_m: f64) -> DrawnStation {
    let cut = blade.cut(radius_m);
    let face_rad = blade.face_to_chord_rad(radius_m).map(|f| cut.angle_rad - f);
    let given_rad = match reference {
        AngleReference::ChordLine => cut.angle_rad,
        AngleReference::FlatFace => face_rad.unwrap_or(cut.angle_rad),
    };
    DrawnStation {
        radius_m,
        chord_m: cut.chord_m,
        thickness_m: cut.thickness_ratio * cut.chord_m,
        angle_deg: cut.angle_rad.to_degrees(),
        face_angle_deg: face_rad.map(f64::to_degrees),
        pitch_m: TAU * radius_m * given_rad.tan(),
    }
}

/// The angle (degrees) a station keeps in the file when `angle_deg` was read to `read_on`; `None` where there
/// is no such station or no flat face to turn by.
#[must_use]
pub fn kept_angle_deg(job: &Job, index: usize, read_on: AngleReference, angle_deg: f64) -> Option<f64> {
    let reference = job.propeller.angle_reference;
    if read_on == reference {
        return Some(angle_deg);
    }
    let blade = Blade::new(job).ok()?;
    let radius_m = blade.station_radii_m().nth(index)?;
    let face_deg = blade.face_to_chord_rad(radius_m)?.to_degrees();
    Some(match reference {
        AngleReference::ChordLine => angle_deg + face_deg,
        AngleReference::FlatFace => angle_deg - face_deg,
    })
}

/// The same blade measured by another reference: every station's angle is rewritten. `None` where a station
/// has no flat face or the job is one that [`Job::check`] refuses.
///
/// ```
/// use spokeshave::{drawn::measured_by, job::{AngleReference, DEMOS, Job}};
/// let job = Job::from_json(DEMOS[0].json).unwrap();
/// let on_face = measured_by(&job, AngleReference::FlatFace).unwrap();
/// assert!(on_face.propeller.stations[0].angle_deg < job.propeller.stations[0].angle_deg);
/// ```
#[must_use]
pub fn measured_by(job: &Job, reference: AngleReference) -> Option<Job> {
    let drawn = stations(&Blade::new(job).ok()?, reference);
    let mut other = job.clone();
    other.propeller.angle_reference = reference;
    for (station, drawn) in other.propeller.stations.iter_mut().zip(drawn) {
        let angle_deg = match reference {
            AngleReference::ChordLine => drawn.angle_deg,
            AngleReference::FlatFace => drawn.face_angle_deg?,
        };
        // Eight decimals are a ten-thousandth of a second of arc: nothing on a blade, and the file stays
        // readable.
        station.angle_deg = Some((angle_deg * 1e8).round() / 1e8);
        station.pitch_m = None;
    }
    Some(other)
}

/// The job with a station more, lying on the blade as it is at a share of the tip radius, with the section of
/// its inner neighbour. The blade itself may change a little beside it, since its curves now pass through one
/// more point. `None` where a station stands already or for a job that [`Job::check`] refuses.
#[must_use]
pub fn with_station(job: &Job, radius_fraction: f64) -> Option<Job> {
    let blade = Blade::new(job).ok()?;
    let drawn = station(&blade, job.propeller.angle_reference, radius_fraction * blade.radius_m);
    let mut more = job.clone();
    let stations = &mut more.propeller.stations;
    let at = stations.partition_point(|s| s.radius_fraction < radius_fraction);
    let angle_deg = match job.propeller.angle_reference {
        AngleReference::ChordLine => drawn.angle_deg,
        AngleReference::FlatFace => drawn.face_angle_deg?,
    };
    let section = stations.get(at.saturating_sub(1))?.section.clone();
    stations.insert(
        at,
        Station {
            radius_fraction,
            chord_m: drawn.chord_m,
            angle_deg: Some(angle_deg),
            pitch_m: None,
            thickness_ratio: drawn.thickness_m / drawn.chord_m,
            section,
        },
    );
    more.check().is_empty().then_some(more)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::DEMOS;

    fn demo() -> Job {
        Job::from_json(DEMOS[0].json).unwrap()
    }

    #[test]
    fn another_reference_leaves_the_blade_as_it_is() {
        let job = demo();
        let there = measured_by(&job, AngleReference::FlatFace).unwrap();
        let back = measured_by(&there, AngleReference::ChordLine).unwrap();
        let (a, b) = (Blade::new(&job).unwrap(), Blade::new(&there).unwrap());
        for i in 1..50 {
            let r = 0.76 * f64::from(i) / 50.0;
            assert!((a.cut(r).angle_rad - b.cut(r).angle_rad).abs() < 1e-9, "{r}");
        }
        for (s, t) in job.propeller.stations.iter().zip(&back.propeller.stations) {
            assert!((s.angle_deg.unwrap() - t.angle_deg.unwrap()).abs() < 1e-7);
        }
    }

    #[test]
    fn an_angle_read_on_the_face_is_kept_to_the_chord_line() {
        let job = demo();
        let drawn = stations(&Blade::new(&job).unwrap(), AngleReference::ChordLine)[5];
        let kept = kept_angle_deg(&job, 5, AngleReference::FlatFace, drawn.face_angle_deg.unwrap()).unwrap();
        assert!((kept - drawn.angle_deg).abs() < 1e-9);
        assert_eq!(kept_angle_deg(&job, 99, AngleReference::FlatFace, 10.0), None);
    }

    #[test]
    fn a_station_more_lies_on_the_blade() {
        for job in [demo(), measured_by(&demo(), AngleReference::FlatFace).unwrap()] {
            let more = with_station(&job, 0.75).unwrap();
            let (a, b) = (Blade::new(&job).unwrap(), Blade::new(&more).unwrap());
            assert_eq!(more.propeller.stations.len(), job.propeller.stations.len() + 1);
            assert!((a.cut(0.57).angle_rad - b.cut(0.57).angle_rad).abs() < 1e-9);
            assert!((a.cut(0.57).chord_m - b.cut(0.57).chord_m).abs() < 1e-12);
        }
        let there = demo().propeller.stations[3].radius_fraction;
        assert_eq!(with_station(&demo(), there), None);
    }

    #[test]
    fn pitch_is_that_of_the_angle_the_propeller_is_measured_by() {
        let job = measured_by(&demo(), AngleReference::FlatFace).unwrap();
        let drawn = stations(&Blade::new(&job).unwrap(), AngleReference::FlatFace)[3];
        let mut by_pitch = job.clone();
        by_pitch.propeller.stations[3].angle_deg = None;
        by_pitch.propeller.stations[3].pitch_m = Some(drawn.pitch_m);
        let again = stations(&Blade::new(&by_pitch).unwrap(), AngleReference::FlatFace)[3];
        assert!((again.angle_deg - drawn.angle_deg).abs() < 1e-9);
    }
}
