//! The figures of a flight point as people read them: name with unit, units per SI unit, decimals.

use spokeshave::job::Figure;

/// How a figure is told.
pub(super) struct Words {
    pub(super) name: &'static str,
    /// Of the unit told in one of the figure's own.
    pub(super) per: f64,
    pub(super) decimals: usize,
}

pub(super) fn words(figure: Figure) -> Words {
    let (name, per, decimals) = match figure {
        Figure::AirspeedMS => ("airspeed km/h", 3.6, 1),
        Figure::Rpm => ("rpm", 1.0, 0),
        Figure::ThrustN => ("thrust N", 1.0, 1),
        Figure::PowerW => ("power kW", 1e-3, 3),
        Figure::Efficiency => ("efficiency", 1.0, 4),
        Figure::RateOfClimbMS => ("climb m/s", 1.0, 2),
        Figure::EnduranceS => ("endurance min", 1.0 / 60.0, 1),
        Figure::TakeOffM => ("take-off to 15 m, m", 1.0, 0),
        Figure::TipMach => ("tip Mach number", 1.0, 3),
    };
    Words { name, per, decimals }
}

/// A figure by the name it has in the job file, or that without its unit.
pub(super) fn figure_named(name: &str) -> Option<Figure> {
    let lower = name.to_lowercase().replace('-', "_");
    let whole = serde_json::from_value(serde_json::Value::String(lower.clone())).ok();
    whole.or(match lower.as_str() {
        "speed" | "airspeed" => Some(Figure::AirspeedMS),
        "thrust" => Some(Figure::ThrustN),
        "power" => Some(Figure::PowerW),
        "climb" => Some(Figure::RateOfClimbMS),
        "endurance" => Some(Figure::EnduranceS),
        "take_off" => Some(Figure::TakeOffM),
        "noise" => Some(Figure::TipMach),
        _ => None,
    })
}

/// The names a figure may be called by.
pub(super) const NAMES: [&str; 9] =
    ["efficiency", "speed", "climb", "endurance", "power", "thrust", "noise", "rpm", "take-off"];
