//! Results of what an error costs and of the chart over pitch and diameter, as plain data.

use ndarray::Array2;
use serde::{Serialize, Serializer};

use super::{Brief, Limit};
use crate::job::Figure;

impl Figure {
    /// Those that an error of the blade is judged by.
    pub const JUDGED: [Self; 6] =
        [Self::AirspeedMS, Self::Rpm, Self::ThrustN, Self::PowerW, Self::Efficiency, Self::RateOfClimbMS];

    /// Its value at a flight point.
    #[must_use]
    pub fn of(self, b: &Brief) -> Option<f64> {
        match self {
            Self::AirspeedMS => b.airspeed_m_s,
            Self::Rpm => b.rpm,
            Self::ThrustN => b.thrust_n,
            Self::PowerW => b.power_w,
            Self::Efficiency => b.efficiency,
            Self::RateOfClimbMS => b.rate_of_climb_m_s,
            Self::EnduranceS => b.endurance_s,
            Self::TakeOffM => b.take_off_m,
            Self::TipMach => b.tip_mach,
        }
    }

    /// Whether less of it is better.
    #[must_use]
    pub fn less_is_better(self) -> bool {
        matches!(self, Self::PowerW | Self::TakeOffM | Self::TipMach | Self::Rpm)
    }
}

/// Errors of carving, by which each station may be off either way, on its own; and doubt of the polars.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Tolerance {
    /// Blade angle, degrees.
    pub angle_deg: f64,
    /// Chord, mm.
    pub chord_mm: f64,
    /// Thickness, mm.
    pub thickness_mm: f64,
    /// All lift coefficients of the polars at once, percent.
    pub lift_percent: f64,
    /// All drag coefficients of the polars at once, percent.
    pub drag_percent: f64,
}

/// One figure with what errors make of it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Cost {
    /// The flight point.
    pub flight_point: String,
    /// The figure.
    pub figure: Figure,
    /// Its value with the blade as drawn.
    pub drawn: f64,
    /// Change per degree of blade angle, station by station; `None` where the changed blade has no answer.
    pub per_degree: Vec<Option<f64>>,
    /// Change per millimetre of chord, station by station.
    pub per_mm_chord: Vec<Option<f64>>,
    /// Change per millimetre of thickness, station by station.
    pub per_mm_thickness: Vec<Option<f64>>,
    /// Linear: the most the figure changes either way if every station is off to the worse side.
    pub band_worst: f64,
    /// Linear: root of the sum of squares over all stations, for errors that are independent of one another.
    pub band_independent: f64,
    /// Change per percent of all lift coefficients; `None` where the changed polars have no answer.
    pub per_percent_lift: Option<f64>,
    /// Change per percent of all drag coefficients.
    pub per_percent_drag: Option<f64>,
    /// Linear: root of the sum of squares of what the doubt of lift and of drag make of it.
    pub band_polars: f64,
}

/// What errors of the blade cost.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ErrorCosts {
    /// Radius of each station, m.
    pub radii_m: Vec<f64>,
    /// The tolerance of the bands.
    pub tolerance: Tolerance,
    /// Figures by flight point.
    pub costs: Vec<Cost>,
}

/// One propeller of the chart.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ChartCell {
    /// Its figures.
    pub figures: Brief,
    /// Rpm standing at full throttle, where a limit asks for it.
    pub standing_rpm: Option<f64>,
    /// The limits it breaks; those of rpm and tip Mach number at the chart's flight point alone.
    pub broken: Vec<Limit>,
}

/// Figures over pitch and diameter.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PitchDiameter {
    /// The flight point.
    pub flight_point: String,
    /// Geometric pitches at 0.75 R, m.
    pub pitches_m: Vec<f64>,
    /// Diameters, m.
    pub diameters_m: Vec<f64>,
    /// Pitch and diameter as drawn, m.
    pub drawn_m: (f64, f64),
    /// `[pitch, diameter]`; `None` where no such blade may be.
    #[serde(serialize_with = "rows")]
    pub cells: Array2<Option<ChartCell>>,
}

fn rows<T: Serialize, S: Serializer>(cells: &Array2<T>, to: S) -> Result<S::Ok, S::Error> {
    to.collect_seq(cells.outer_iter().map(|row| row.into_iter().collect::<Vec<&T>>()))
}
