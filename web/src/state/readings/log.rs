//! One figure of a reading of the logbook.

use spokeshave::job::{Job, LogReading};

use crate::units::Quantity;

/// A figure of a reading.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum LogFigure {
    /// Engine rpm.
    Rpm,
    /// Throttle.
    Throttle,
    /// True airspeed.
    Airspeed,
    /// Pressure altitude.
    Altitude,
    /// Temperature.
    Temperature,
    /// Fuel flow.
    Fuel,
    /// Battery current.
    Current,
}

/// Where a figure stands in a reading.
enum Place<'a> {
    /// Nothing stands for rest.
    OrRest(&'a mut f64),
    Optional(&'a mut Option<f64>),
}

impl LogFigure {
    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Rpm => "engine rpm",
            Self::Throttle => "throttle",
            Self::Airspeed => "true airspeed",
            Self::Altitude => "pressure altitude",
            Self::Temperature => "temperature in °C",
            Self::Fuel => "fuel flow",
            Self::Current => "battery current",
        }
    }

    pub(in crate::state) fn key(self) -> &'static str {
        match self {
            Self::Rpm => "engine_rpm",
            Self::Throttle => "throttle",
            Self::Airspeed => "airspeed_m_s",
            Self::Altitude => "altitude_m",
            Self::Temperature => "temperature_c",
            Self::Fuel => "fuel_kg_per_h",
            Self::Current => "current_a",
        }
    }

    /// What it measures.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        match self {
            Self::Rpm => Quantity::Rpm,
            Self::Throttle => Quantity::Share,
            Self::Airspeed => Quantity::Speed,
            Self::Altitude => Quantity::Height,
            Self::Temperature => Quantity::Number,
            Self::Fuel => Quantity::FuelFlow,
            Self::Current => Quantity::Current,
        }
    }

    fn place(self, r: &mut LogReading) -> Place<'_> {
        match self {
            Self::Rpm => Place::Optional(&mut r.engine_rpm),
            Self::Airspeed => Place::OrRest(&mut r.airspeed_m_s),
            Self::Throttle => Place::Optional(&mut r.throttle),
            Self::Altitude => Place::Optional(&mut r.altitude_m),
            Self::Temperature => Place::Optional(&mut r.temperature_c),
            Self::Fuel => Place::Optional(&mut r.fuel_kg_per_h),
            Self::Current => Place::Optional(&mut r.current_a),
        }
    }

    /// The figure, SI.
    pub(in crate::state) fn value(self, job: &Job, i: usize) -> Option<f64> {
        let mut reading = job.logbook.as_ref()?.readings.get(i)?.clone();
        match self.place(&mut reading) {
            Place::OrRest(value) => Some(*value).filter(|v| *v != 0.0),
            Place::Optional(value) => *value,
        }
    }

    /// Writes the figure, SI; whether there is such a reading. An altitude takes the place of a pressure.
    pub(in crate::state) fn write(self, job: &mut Job, i: usize, value: f64) -> bool {
        let Some(reading) = job.logbook.as_mut().and_then(|l| l.readings.get_mut(i)) else { return false };
        if self == Self::Altitude {
            reading.pressure_pa = None;
        }
        match self.place(reading) {
            Place::OrRest(place) => *place = value,
            Place::Optional(place) => *place = Some(value),
        }
        true
    }

    /// Takes the figure out; whether there is such a reading.
    pub(in crate::state) fn clear(self, job: &mut Job, i: usize) -> bool {
        let Some(reading) = job.logbook.as_mut().and_then(|l| l.readings.get_mut(i)) else { return false };
        match self.place(reading) {
            Place::OrRest(place) => *place = 0.0,
            Place::Optional(place) => *place = None,
        }
        true
    }
}
