//! The figures of a job that are typed into boxes: where each stands, what it measures, how it is read and
//! written.

use spokeshave::drawn::DrawnStation;
use spokeshave::job::{AngleReference, Job, PitchControl, Setting};

use super::machine::{AircraftFigure, EngineFigure, MakingFigure, WoodFigure};
use super::measure::{Measure, write_station};
use super::point_figure::PointFigure;
use super::readings::{BladeFigure, LogFigure};
use super::wishes::{LimitFigure, RpmBound};
use crate::units::Quantity;

/// One figure of a job.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Field {
    /// Title of the job; a text.
    Title,
    /// Number of blades.
    Blades,
    /// Diameter of the propeller.
    Diameter,
    /// Diameter of the hub.
    Hub,
    /// How far the blades are turned on the ground.
    Turn,
    /// Rpm the governor holds.
    GovernedRpm,
    /// Fine stop.
    FineStop,
    /// Coarse stop.
    CoarseStop,
    /// By how much the body behind slows the air at the propeller.
    Blockage,
    /// A measure of a station.
    Station(usize, Measure),
    /// A figure of a flight point.
    Point(usize, PointFigure),
    /// Elements of the integrals.
    Elements,
    /// A figure of the aircraft.
    Aircraft(AircraftFigure),
    /// A figure of the engine.
    Engine(EngineFigure),
    /// A limit of the finished propeller.
    Limit(LimitFigure),
    /// A limit of rpm at a flight point.
    PointRpm(usize, RpmBound),
    /// A figure of the wood.
    Wood(WoodFigure),
    /// A figure of how the blade is made.
    Making(MakingFigure),
    /// A figure measured on a blade at a station.
    Reading(usize, usize, BladeFigure),
    /// A figure of a reading of the logbook.
    Log(usize, LogFigure),
}

impl Field {
    /// What it measures.
    #[must_use]
    pub fn quantity(self, job: &Job) -> Quantity {
        match self {
            Self::Blades | Self::Elements => Quantity::Count,
            Self::Title | Self::Point(_, PointFigure::Name) => Quantity::Number,
            Self::GovernedRpm | Self::PointRpm(..) => Quantity::Rpm,
            Self::Blockage => Quantity::Share,
            Self::Turn
            | Self::FineStop
            | Self::CoarseStop
            | Self::Station(_, Measure::Angle | Measure::FaceAngle) => Quantity::Angle,
            Self::Diameter | Self::Hub | Self::Station(..) => Quantity::Length,
            Self::Point(_, PointFigure::Height) => Quantity::Height,
            Self::Point(_, PointFigure::Temperature) => Quantity::Temperature,
            Self::Point(_, PointFigure::Airspeed) => Quantity::Speed,
            Self::Point(i, PointFigure::Setting) => match job.flight_points.get(i).map(|p| &p.setting) {
                Some(Setting::Power { .. }) => Quantity::Power,
                Some(Setting::Throttle { .. }) => Quantity::Share,
                _ => Quantity::Rpm,
            },
            Self::Aircraft(figure) => figure.quantity(),
            Self::Engine(figure) => figure.quantity(),
            Self::Limit(figure) => figure.quantity(),
            Self::Wood(figure) => figure.quantity(),
            Self::Making(figure) => figure.quantity(),
            Self::Reading(.., figure) => figure.quantity(),
            Self::Log(_, figure) => figure.quantity(),
        }
    }

    /// What it is called, with its place, as in “Undo: chord at station 9”.
    #[must_use]
    pub fn name(self, job: &Job) -> String {
        match self {
            Self::Title => "title".into(),
            Self::Blades => "number of blades".into(),
            Self::Diameter => "diameter".into(),
            Self::Hub => "hub diameter".into(),
            Self::Turn => "blades turned".into(),
            Self::GovernedRpm => "governed rpm".into(),
            Self::FineStop => "fine stop".into(),
            Self::CoarseStop => "coarse stop".into(),
            Self::Blockage => "air slowed by the body behind".into(),
            Self::Station(i, measure) => format!("{} at station {}", measure.name(), i + 1),
            Self::Point(i, figure) => of_point(job, i, figure.name()),
            Self::PointRpm(i, bound) => of_point(job, i, bound.name()),
            Self::Elements => "number of elements".into(),
            Self::Aircraft(figure) => figure.name().into(),
            Self::Engine(figure) => figure.name(),
            Self::Limit(figure) => figure.name().into(),
            Self::Wood(figure) => figure.name().into(),
            Self::Making(figure) => figure.name().into(),
            Self::Reading(blade, station, figure) => {
                format!("{} of blade {} at station {}", figure.name(), blade + 1, station + 1)
            }
            Self::Log(i, figure) => format!("{} of reading {}", figure.name(), i + 1),
        }
    }

    /// The name its path in the job file ends with, to tell its own problems from others'.
    #[must_use]
    pub fn path(self, job: &Job) -> String {
        match self {
            Self::Title => "title".into(),
            Self::Blades => "propeller.blades".into(),
            Self::Diameter => "propeller.diameter_m".into(),
            Self::Hub => "propeller.hub_diameter_m".into(),
            Self::Turn => "propeller.pitch_control.turn_deg".into(),
            Self::GovernedRpm => "propeller.pitch_control.rpm".into(),
            Self::FineStop => "propeller.pitch_control.turn_min_deg".into(),
            Self::CoarseStop => "propeller.pitch_control.turn_max_deg".into(),
            Self::Blockage => "propeller.blockage".into(),
            Self::Station(i, measure) => format!("propeller.stations[{i}].{}", measure.key()),
            Self::Point(i, figure) => format!("flight_points[{i}].{}", figure.key(job, i)),
            Self::Elements => "method.elements".into(),
            Self::Aircraft(figure) => figure.path(),
            Self::Engine(figure) => figure.path(),
            Self::Limit(figure) => figure.path(),
            Self::PointRpm(i, bound) => bound.path(job, i),
            Self::Wood(figure) => figure.path(),
            Self::Making(figure) => figure.path(),
            Self::Reading(blade, station, figure) => {
                let i = BladeFigure::index(job, blade, station);
                format!("carved.blades[{blade}].readings[{i}].{}", figure.key())
            }
            Self::Log(i, figure) => format!("logbook.readings[{i}].{}", figure.key()),
        }
    }

    /// Reads the figure out of a job, SI. Measures of a station come from the blade as drawn.
    #[must_use]
    pub fn value(self, job: &Job, drawn: &[DrawnStation]) -> Option<f64> {
        let p = &job.propeller;
        match (self, &p.pitch_control) {
            (Self::Blades, _) => Some(f64::from(p.blades)),
            (Self::Diameter, _) => Some(p.diameter_m),
            (Self::Hub, _) => Some(p.hub_diameter_m),
            (Self::Turn, PitchControl::GroundAdjustable { turn_deg }) => Some(*turn_deg),
            (Self::GovernedRpm, PitchControl::ConstantSpeed { rpm, .. }) => Some(*rpm),
            (Self::FineStop, PitchControl::ConstantSpeed { turn_min_deg, .. }) => Some(*turn_min_deg),
            (Self::CoarseStop, PitchControl::ConstantSpeed { turn_max_deg, .. }) => Some(*turn_max_deg),
            (Self::Blockage, _) => p.blockage,
            (Self::Station(i, measure), _) => drawn.get(i).and_then(|d| measure.of(d)),
            (Self::Point(i, figure), _) => figure.value(job, i),
            (Self::Elements, _) => Some(f64::from(job.method.elements)),
            (Self::Aircraft(figure), _) => figure.value(job),
            (Self::Engine(figure), _) => figure.value(job),
            (Self::Limit(figure), _) => figure.value(job),
            (Self::PointRpm(i, bound), _) => bound.value(job, i),
            (Self::Wood(figure), _) => figure.value(job),
            (Self::Making(figure), _) => figure.value(job),
            (Self::Reading(blade, station, figure), _) => figure.value(job, blade, station),
            (Self::Log(i, figure), _) => figure.value(job, i),
            _ => None,
        }
    }

    /// Whether the job file holds this very figure; else it follows from another one.
    #[must_use]
    pub fn is_given(self, job: &Job) -> bool {
        let Self::Station(i, measure) = self else { return true };
        let by_pitch = job.propeller.stations.get(i).is_some_and(|s| s.pitch_m.is_some());
        match measure {
            Measure::Radius | Measure::Chord | Measure::Thickness => true,
            Measure::Pitch => by_pitch,
            Measure::Angle => !by_pitch && job.propeller.angle_reference == AngleReference::ChordLine,
            Measure::FaceAngle => !by_pitch && job.propeller.angle_reference == AngleReference::FlatFace,
        }
    }

    /// The text, where the field is one.
    #[must_use]
    pub fn text(self, job: &Job) -> Option<&str> {
        match self {
            Self::Title => Some(&job.title),
            Self::Point(i, PointFigure::Name) => job.flight_points.get(i).map(|p| p.name.as_str()),
            _ => None,
        }
    }

    /// Writes a text into a job; whether the field is one.
    pub fn write_text(self, job: &mut Job, text: &str) -> bool {
        if let (Self::Point(..), Some(old)) = (self, self.text(job).map(String::from)) {
            job.wishes.iter_mut().for_each(|wishes| wishes.rename_point(&old, text));
        }
        let place = match self {
            Self::Title => Some(&mut job.title),
            Self::Point(i, PointFigure::Name) => job.flight_points.get_mut(i).map(|p| &mut p.name),
            _ => None,
        };
        place.map(|place| text.clone_into(place)).is_some()
    }

    /// Writes the figure, SI, into a job; whether there was a place for it. What is allowed is for
    /// [`Job::check`] to say.
    pub fn write(self, job: &mut Job, value: f64) -> bool {
        let p = &mut job.propeller;
        match (self, &mut p.pitch_control) {
            (Self::Blades, _) => p.blades = whole(value),
            (Self::Diameter, _) => p.diameter_m = value,
            (Self::Hub, _) => p.hub_diameter_m = value,
            (Self::Turn, PitchControl::GroundAdjustable { turn_deg }) => *turn_deg = value,
            (Self::GovernedRpm, PitchControl::ConstantSpeed { rpm, .. }) => *rpm = value,
            (Self::FineStop, PitchControl::ConstantSpeed { turn_min_deg, .. }) => *turn_min_deg = value,
            (Self::CoarseStop, PitchControl::ConstantSpeed { turn_max_deg, .. }) => *turn_max_deg = value,
            (Self::Blockage, _) => p.blockage = Some(value),
            (Self::Station(i, measure), _) => return write_station(job, i, measure, value),
            (Self::Point(i, figure), _) => return figure.write(job, i, value),
            (Self::Elements, _) => job.method.elements = whole(value),
            (Self::Aircraft(figure), _) => return figure.write(job, value),
            (Self::Engine(figure), _) => return figure.write(job, value),
            (Self::Limit(figure), _) => figure.write(job, value),
            (Self::PointRpm(i, bound), _) => return bound.write(job, i, Some(value)),
            (Self::Wood(figure), _) => return figure.write(job, value),
            (Self::Making(figure), _) => figure.write(job, Some(value)),
            (Self::Reading(blade, station, figure), _) => return figure.write(job, blade, station, value),
            (Self::Log(i, figure), _) => return figure.write(job, i, value),
            _ => return false,
        }
        true
    }

    /// Takes the figure out of a job; whether a job may go without it.
    pub fn clear(self, job: &mut Job) -> bool {
        match self {
            Self::Point(i, PointFigure::Airspeed) => {
                job.flight_points.get_mut(i).map(|p| p.airspeed_m_s = None).is_some()
            }
            Self::Blockage => {
                job.propeller.blockage = None;
                true
            }
            Self::Aircraft(figure) => figure.clear(job),
            Self::Engine(figure) => figure.clear(job),
            Self::Limit(figure) => {
                figure.clear(job);
                true
            }
            Self::PointRpm(i, bound) => bound.write(job, i, None),
            Self::Wood(figure) => figure.clear(job),
            Self::Making(figure) => {
                figure.write(job, None);
                true
            }
            Self::Reading(blade, station, figure) => figure.clear(job, blade, station),
            Self::Log(i, figure) => figure.clear(job, i),
            _ => false,
        }
    }
}

fn of_point(job: &Job, i: usize, what: &str) -> String {
    format!("{what} of {}", job.flight_points.get(i).map_or("", |p| p.name.as_str()))
}

/// A whole number; 0, which nothing allows, for what is none.
pub(super) fn whole(value: f64) -> u32 {
    if value.fract() == 0.0 && (0.0..=1e6).contains(&value) { value as u32 } else { 0 }
}
