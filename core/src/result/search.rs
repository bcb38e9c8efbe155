//! Results of a search for the best blade, as plain data.

use serde::Serialize;

use super::{Compared, Figure, Margin};

/// Why a search stopped.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Stopped {
    /// No step of the least size gains.
    AtRest,
    /// As many trials as were allowed.
    MostTrials,
    /// Called off.
    CalledOff,
}

impl Stopped {
    /// One plain sentence.
    #[must_use]
    pub fn sentence(self) -> &'static str {
        match self {
            Self::AtRest => "It stopped because no further step gained anything.",
            Self::MostTrials => {
                "It stopped at the greatest number of blades to try; more might gain a little."
            }
            Self::CalledOff => "It was called off; this is the best it had found.",
        }
    }
}

/// A free figure of the search and its value found.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct FreeValue {
    /// Its name.
    pub name: &'static str,
    /// Value found; 0 is the blade as drawn.
    pub value: f64,
    /// Lowest and highest allowed.
    pub span: (f64, f64),
    /// Unit.
    pub unit: &'static str,
    /// Whether it lies at an end of its span, so that more might gain more.
    pub at_end: bool,
}

/// What counted, and what came of it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct AimResult {
    /// The flight point.
    pub flight_point: String,
    /// The figure.
    pub figure: Figure,
    /// Its weight.
    pub weight: f64,
    /// With the drawn blade.
    pub drawn: Option<f64>,
    /// With the blade found.
    pub shaped: Option<f64>,
}

/// What a search found.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Search {
    /// Weighted mean gain over the drawn blade, as a share (geometric mean of the figures' ratios).
    pub gain: f64,
    /// What counted.
    pub aims: Vec<AimResult>,
    /// Free figures.
    pub free: Vec<FreeValue>,
    /// Blades tried.
    pub trials: u32,
    /// Why it stopped.
    pub stopped: Stopped,
    /// Limits with what is left of them.
    pub margins: Vec<Margin>,
    /// All flight points, drawn and shaped.
    pub flight_points: Vec<Compared>,
}
