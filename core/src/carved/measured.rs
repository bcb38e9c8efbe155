//! From readings to every blade at every station.

use crate::curve::Curve;
use crate::job::{AngleReference, BladeReading, Carved, Propeller, Station};
use crate::result::{Doubt, Known};
use crate::rig::Rig;

use super::CarvedError;
use super::doubt::{believed, doubts};

/// A reading this near to a station was taken there, m.
const AT_STATION_M: f64 = 1e-3;

/// One blade at one radius.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Size {
    /// Blade angle to the chord line, rad.
    pub angle_rad: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Greatest thickness, m.
    pub thickness_m: f64,
    /// How far it lies ahead of the plane of the hub, m, where it was read.
    pub track_m: Option<f64>,
    /// Where angle, chord and thickness come from.
    pub known: [Known; 3],
}

/// All blades at all radii: those of the drawn stations and those of readings that lie between them.
#[derive(Clone, Debug)]
pub struct Measured {
    /// Radii, m, rising.
    pub radii_m: Vec<f64>,
    /// By blade and radius.
    pub blades: Vec<Vec<Size>>,
    /// Whether each blade has any reading.
    pub read: Vec<bool>,
}

impl Measured {
    /// The blades of a job's readings.
    ///
    /// # Errors
    /// No reading at all, or none that is believed.
    pub fn new(rig: &Rig) -> Result<Self, CarvedError> {
        let given = rig.job.carved.as_ref().ok_or(CarvedError::NoReadings)?;
        let carved = &believable(rig, given);
        let read: Vec<bool> = (0..rig.job.propeller.blades as usize)
            .map(|b| carved.blades.get(b).is_some_and(|blade| blade.readings.iter().any(tells)))
            .collect();
        if !read.contains(&true) {
            let any = given.blades.iter().flat_map(|b| &b.readings).any(tells);
            let why = || doubts(rig).iter().map(Doubt::says).collect();
            return Err(if any { CarvedError::NoneBelieved(why()) } else { CarvedError::NoReadings });
        }
        let radii_m = radii(rig, carved);
        let own = |b: usize| read[b].then(|| blade(rig, carved, &carved.blades[b].readings, &radii_m));
        let known: Vec<Option<Vec<Size>>> = (0..read.len()).map(own).collect();
        let measured: Vec<&Vec<Size>> = known.iter().flatten().collect();
        let rest: Vec<Size> = (0..radii_m.len())
            .map(|s| Size { known: [Known::OtherBlades; 3], ..mean(measured.iter().map(|b| b[s])) })
            .collect();
        let blades = known.iter().map(|b| b.clone().unwrap_or_else(|| rest.clone())).collect();
        Ok(Self { radii_m, blades, read })
    }

    /// The mean of the blades at each radius.
    #[must_use]
    pub fn mean(&self) -> Vec<Size> {
        (0..self.radii_m.len()).map(|s| mean(self.blades.iter().map(|b| b[s]))).collect()
    }
}

/// The readings without what is hard to believe of them and was not confirmed.
fn believable(rig: &Rig, given: &Carved) -> Carved {
    let mut carved = given.clone();
    for reading in carved.blades.iter_mut().flat_map(|b| &mut b.readings) {
        *reading = believed(rig, given.angle_reference, reading);
    }
    carved
}

fn tells(reading: &BladeReading) -> bool {
    reading.angle_deg.is_some() || reading.chord_m.is_some() || reading.thickness_m.is_some()
}

/// Those of the drawn stations, and those of readings not taken at one.
fn radii(rig: &Rig, carved: &Carved) -> Vec<f64> {
    let mut radii: Vec<f64> = rig.rotor.blade.station_radii_m().collect();
    let last = rig.rotor.blade.radius_m;
    for reading in carved.blades.iter().flat_map(|b| &b.readings).filter(|r| tells(r)) {
        if radii.iter().all(|r| (r - reading.radius_m).abs() > AT_STATION_M) {
            radii.push(reading.radius_m.min(last));
            radii.sort_by(f64::total_cmp);
        }
    }
    radii
}

/// A difference from the drawing over the radius.
struct Difference {
    curve: Option<Curve>,
    at: Vec<f64>,
}

impl Difference {
    fn new(readings: &[BladeReading], of: impl Fn(&BladeReading) -> Option<f64>) -> Self {
        let (at, by): (Vec<f64>, Vec<f64>) =
            readings.iter().filter_map(|r| of(r).map(|value| (r.radius_m, value))).unzip();
        Self { curve: Curve::new(at.clone(), by), at }
    }

    fn at(&self, radius_m: f64) -> (f64, Known) {
        let Some(curve) = &self.curve else { return (0.0, Known::AsDrawn) };
        let (low, high) = curve.range();
        let known = if self.at.iter().any(|r| (r - radius_m).abs() <= AT_STATION_M) {
            Known::Measured
        } else if (low..=high).contains(&radius_m) {
            Known::Interpolated
        } else {
            Known::Held
        };
        (curve.at(radius_m), known)
    }
}

fn blade(rig: &Rig, carved: &Carved, readings: &[BladeReading], radii_m: &[f64]) -> Vec<Size> {
    let drawn = &rig.rotor.blade;
    // Without a flat face there is nothing to turn by: the reading counts as one of the chord line.
    let on_face = |r: f64, thickness_ratio: f64| match carved.angle_reference {
        AngleReference::ChordLine => 0.0,
        AngleReference::FlatFace => drawn.face_to_chord_of(r, thickness_ratio).unwrap_or(0.0),
    };
    let drawn_reading = |r: f64| drawn.cut(r).angle_rad - on_face(r, drawn.cut(r).thickness_ratio);
    let angle = Difference::new(readings, |r| Some(r.angle_deg?.to_radians() - drawn_reading(r.radius_m)));
    let chord = Difference::new(readings, |r| Some(r.chord_m? - drawn.cut(r.radius_m).chord_m));
    let thickness = Difference::new(readings, |r| {
        let cut = drawn.cut(r.radius_m);
        Some(r.thickness_m? - cut.thickness_ratio * cut.chord_m)
    });
    let track = |r: f64| readings.iter().find(|x| (x.radius_m - r).abs() <= AT_STATION_M)?.track_m;
    let size = |&r: &f64| {
        let cut = drawn.cut(r);
        let (by_chord, chord_known) = chord.at(r);
        let (by_thickness, thickness_known) = thickness.at(r);
        let (by_angle, angle_known) = angle.at(r);
        // Differences held on to the tip must not eat it up.
        let chord_m = (cut.chord_m + by_chord).max(0.2 * cut.chord_m);
        let drawn_thickness_m = cut.thickness_ratio * cut.chord_m;
        let thickness_m = (drawn_thickness_m + by_thickness).max(0.2 * drawn_thickness_m).min(chord_m);
        Size {
            angle_rad: drawn_reading(r) + by_angle + on_face(r, thickness_m / chord_m),
            chord_m,
            thickness_m,
            track_m: track(r),
            known: [angle_known, chord_known, thickness_known],
        }
    };
    radii_m.iter().map(size).collect()
}

fn mean(sizes: impl Iterator<Item = Size>) -> Size {
    let all: Vec<Size> = sizes.collect();
    let of = |value: fn(&Size) -> f64| all.iter().map(value).sum::<f64>() / all.len() as f64;
    Size {
        angle_rad: of(|s| s.angle_rad),
        chord_m: of(|s| s.chord_m),
        thickness_m: of(|s| s.thickness_m),
        track_m: None,
        known: [Known::OtherBlades; 3],
    }
}

/// The drawn propeller with other sizes, its angles to the chord line.
pub(super) fn propeller(rig: &Rig, radii_m: &[f64], sizes: &[Size]) -> Propeller {
    let drawn = &rig.job.propeller;
    let tip_m = rig.rotor.blade.radius_m;
    let section = |r: f64| {
        let at = drawn.stations.partition_point(|s| s.radius_fraction * tip_m <= r + 1e-9).saturating_sub(1);
        drawn.stations.get(at).map_or_else(String::new, |s| s.section.clone())
    };
    let station = |(&r, s): (&f64, &Size)| Station {
        radius_fraction: r / tip_m,
        chord_m: s.chord_m,
        angle_deg: Some(s.angle_rad.to_degrees()),
        pitch_m: None,
        thickness_ratio: (s.thickness_m / s.chord_m).clamp(0.005, 1.0),
        section: section(r),
    };
    let stations = radii_m.iter().zip(sizes).map(station).collect();
    Propeller { angle_reference: AngleReference::ChordLine, stations, ..drawn.clone() }
}
