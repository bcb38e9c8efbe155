//! The figures of a flight point.

use spokeshave::job::{Job, Setting};

/// A figure of a flight point.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum PointFigure {
    /// Its name; a text.
    Name,
    /// Pressure altitude.
    Height,
    /// Temperature offset.
    Temperature,
    /// Airspeed.
    Airspeed,
    /// The figure of its setting.
    Setting,
}

impl PointFigure {
    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Name => "name",
            Self::Height => "height",
            Self::Temperature => "temperature offset",
            Self::Airspeed => "airspeed",
            Self::Setting => "setting",
        }
    }

    /// Its name in the job file.
    pub(super) fn key(self, job: &Job, i: usize) -> &'static str {
        match self {
            Self::Name => "name",
            Self::Height => "altitude_m",
            Self::Temperature => "isa_offset_k",
            Self::Airspeed => "airspeed_m_s",
            Self::Setting => match job.flight_points.get(i).map(|p| &p.setting) {
                Some(Setting::Power { .. }) => "setting.power_w",
                Some(Setting::Throttle { .. }) => "setting.fraction",
                _ => "setting.rpm",
            },
        }
    }

    /// The figure, SI.
    pub(super) fn value(self, job: &Job, i: usize) -> Option<f64> {
        let point = job.flight_points.get(i)?;
        match self {
            Self::Name => None,
            Self::Height => Some(point.altitude_m),
            Self::Temperature => Some(point.isa_offset_k),
            Self::Airspeed => point.airspeed_m_s,
            Self::Setting => match point.setting {
                Setting::Rpm { rpm } => Some(rpm),
                Setting::Power { power_w } => Some(power_w),
                Setting::Throttle { fraction } => Some(fraction),
                Setting::FullThrottle {} | Setting::Level {} => None,
            },
        }
    }

    /// Writes the figure, SI; whether there was a place for it.
    pub(super) fn write(self, job: &mut Job, i: usize, value: f64) -> bool {
        let Some(point) = job.flight_points.get_mut(i) else { return false };
        match (self, &mut point.setting) {
            (Self::Height, _) => point.altitude_m = value,
            (Self::Temperature, _) => point.isa_offset_k = value,
            (Self::Airspeed, _) => point.airspeed_m_s = Some(value),
            (Self::Setting, Setting::Rpm { rpm }) => *rpm = value,
            (Self::Setting, Setting::Power { power_w }) => *power_w = value,
            (Self::Setting, Setting::Throttle { fraction }) => *fraction = value,
            (Self::Name, _) | (Self::Setting, Setting::FullThrottle {} | Setting::Level {}) => return false,
        }
        true
    }
}
