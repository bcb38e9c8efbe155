//! One figure of a carved blade at a station.

use spokeshave::job::{AngleReference, BladeReading, Carved, CarvedBlade, Job};

use crate::units::Quantity;

/// A reading this near to a station is one of it, m.
const AT_STATION_M: f64 = 1e-3;

/// A figure measured on a blade at a station.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum BladeFigure {
    /// Blade angle.
    Angle,
    /// Chord.
    Chord,
    /// Greatest thickness.
    Thickness,
    /// How far it lies ahead of the plane of the hub.
    Track,
}

impl BladeFigure {
    /// All, in the order shown.
    pub const ALL: [Self; 4] = [Self::Angle, Self::Chord, Self::Thickness, Self::Track];

    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Angle => "angle",
            Self::Chord => "chord",
            Self::Thickness => "thickness",
            Self::Track => "track",
        }
    }

    pub(in crate::state) fn key(self) -> &'static str {
        match self {
            Self::Angle => "angle_deg",
            Self::Chord => "chord_m",
            Self::Thickness => "thickness_m",
            Self::Track => "track_m",
        }
    }

    /// What it measures.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        if self == Self::Angle { Quantity::Angle } else { Quantity::Length }
    }

    fn place(self, reading: &mut BladeReading) -> &mut Option<f64> {
        match self {
            Self::Angle => &mut reading.angle_deg,
            Self::Chord => &mut reading.chord_m,
            Self::Thickness => &mut reading.thickness_m,
            Self::Track => &mut reading.track_m,
        }
    }

    /// The figure of a reading, SI.
    #[must_use]
    pub fn of(self, mut reading: BladeReading) -> Option<f64> {
        *self.place(&mut reading)
    }

    /// The figure read, SI.
    pub(in crate::state) fn value(self, job: &Job, blade: usize, station: usize) -> Option<f64> {
        self.of(*readings(job, blade).get(at_station(job, blade, station)?)?)
    }

    /// Where in the file the reading stands, or would stand.
    pub(in crate::state) fn index(job: &Job, blade: usize, station: usize) -> usize {
        let radius = radius_m(job, station).unwrap_or(0.0);
        readings(job, blade).partition_point(|r| r.radius_m < radius - AT_STATION_M)
    }

    /// Writes the figure, SI; whether there is such a station.
    pub(in crate::state) fn write(self, job: &mut Job, blade: usize, station: usize, value: f64) -> bool {
        let Some(radius_m) = radius_m(job, station) else { return false };
        let at = Self::index(job, blade, station);
        let started = started(job);
        let carved = job.carved.get_or_insert(started);
        if carved.blades.len() <= blade {
            carved.blades.resize(blade + 1, CarvedBlade::default());
        }
        let readings = &mut carved.blades[blade].readings;
        if readings.get(at).is_none_or(|r| (r.radius_m - radius_m).abs() > AT_STATION_M) {
            readings.insert(at, BladeReading { radius_m, ..BladeReading::default() });
        }
        *self.place(&mut readings[at]) = Some(value);
        // Another figure is another reading.
        readings[at].confirmed = false;
        true
    }

    /// Takes the figure out, and a reading that holds none any more.
    pub(in crate::state) fn clear(self, job: &mut Job, blade: usize, station: usize) -> bool {
        let (Some(radius), at) = (radius_m(job, station), Self::index(job, blade, station)) else {
            return false;
        };
        let Some(carved) = &mut job.carved else { return true };
        let Some(blade) = carved.blades.get_mut(blade) else { return true };
        if let Some(reading) =
            blade.readings.get_mut(at).filter(|r| (r.radius_m - radius).abs() <= AT_STATION_M)
        {
            *self.place(reading) = None;
            reading.confirmed = false;
            if *reading == (BladeReading { radius_m: reading.radius_m, ..BladeReading::default() }) {
                blade.readings.remove(at);
            }
        }
        true
    }
}

/// Readings of a blade that no station's boxes show, each with its place in the file.
#[must_use]
pub fn between_stations(job: &Job, blade: usize) -> Vec<(usize, BladeReading)> {
    let boxed: Vec<usize> =
        (0..job.propeller.stations.len()).filter_map(|s| at_station(job, blade, s)).collect();
    let all = readings(job, blade).iter().copied().enumerate();
    all.filter(|(i, _)| !boxed.contains(i)).collect()
}

/// Place of the reading that is one of a station.
fn at_station(job: &Job, blade: usize, station: usize) -> Option<usize> {
    let (radius, at) = (radius_m(job, station)?, BladeFigure::index(job, blade, station));
    let reading = readings(job, blade).get(at)?;
    ((reading.radius_m - radius).abs() <= AT_STATION_M).then_some(at)
}

fn readings(job: &Job, blade: usize) -> &[BladeReading] {
    job.carved.as_ref().and_then(|c| c.blades.get(blade)).map_or(&[], |b| &b.readings)
}

/// Readings to begin with: angles on the flat face where every station has one.
pub(in crate::state) fn started(job: &Job) -> Carved {
    let faces = spokeshave::drawn::measured_by(job, AngleReference::FlatFace).is_some();
    let angle_reference = if faces { AngleReference::FlatFace } else { AngleReference::ChordLine };
    Carved { angle_reference, blades: vec![CarvedBlade::default()], ..Carved::default() }
}

fn radius_m(job: &Job, station: usize) -> Option<f64> {
    Some(0.5 * job.propeller.diameter_m * job.propeller.stations.get(station)?.radius_fraction)
}
