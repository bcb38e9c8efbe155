//! What is asked when polars are made from an outline.

use serde::{Deserialize, Serialize};

use super::MakeError;
use crate::section::outline::MAX_EDGE;
use crate::section::solver::USUAL_NODES;

/// Most polars of one request.
pub const MOST_TASKS: usize = 120;
/// Trips of a rough or taped leading edge, chords from the nose, upper and lower side: common practice in
/// wind-tunnel tests with a fixed transition.
pub const ROUGH_NOSE: [f64; 2] = [0.05, 0.10];
/// Reynolds numbers that can be asked for.
pub const REYNOLDS: [f64; 2] = [1e4, 1e8];

/// A span of angles of attack to the chord line, degrees.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Angles {
    /// First angle.
    pub first_deg: f64,
    /// Last angle.
    pub last_deg: f64,
    /// Step.
    pub step_deg: f64,
}

impl Default for Angles {
    fn default() -> Self {
        Self { first_deg: -6.0, last_deg: 14.0, step_deg: 0.5 }
    }
}

impl Angles {
    /// Most angles of one polar.
    pub const MOST: usize = 241;

    /// The angles themselves, whole multiples of the step from the first one on.
    ///
    /// # Errors
    /// [`MakeError::Request`] for a span outside −30° to 30°, a step below 0.05° or above 5°, fewer than five
    /// angles or more than [`Self::MOST`].
    pub fn list(&self) -> Result<Vec<f64>, MakeError> {
        super::within("first angle, degrees", self.first_deg, [-30.0, 30.0])?;
        super::within("last angle, degrees", self.last_deg, [-30.0, 30.0])?;
        super::within("step of angle, degrees", self.step_deg, [0.05, 5.0])?;
        let steps = ((self.last_deg - self.first_deg) / self.step_deg + 1e-9).floor();
        super::within("count of angles", steps + 1.0, [5.0, Self::MOST as f64])?;
        // Rounded, so that 0.1-degree steps meet whole degrees exactly.
        let at = |k: usize| ((self.first_deg + self.step_deg * k as f64) * 1e6).round() / 1e6;
        Ok((0..=steps as usize).map(at).collect())
    }
}

/// Conditions and departures from the drawing for which polars are made.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Request {
    /// Reynolds numbers, rising.
    pub reynolds: Vec<f64>,
    /// Thickness ratios, rising; none for the section as drawn.
    #[serde(default)]
    pub thickness_ratios: Vec<f64>,
    /// Amplification exponent at transition: 9 quiet air, 4 disturbed air.
    pub n_crit: f64,
    /// Angles of attack.
    #[serde(default)]
    pub angles: Angles,
    /// Thickness the trailing edge is left with, chords; none for the edge as drawn.
    #[serde(default)]
    pub edge_thickness: Option<f64>,
    /// Where the layer is tripped on the upper side, chords from the nose; none for free transition.
    #[serde(default)]
    pub trip_upper: Option<f64>,
    /// The same on the lower side.
    #[serde(default)]
    pub trip_lower: Option<f64>,
    /// Nodes on the outline, 80 to 300.
    #[serde(default = "usual_nodes")]
    pub nodes: usize,
}

fn usual_nodes() -> usize {
    USUAL_NODES
}

impl Request {
    /// The section as drawn, free transition.
    #[must_use]
    pub fn free(reynolds: &[f64], n_crit: f64) -> Self {
        Self {
            reynolds: reynolds.to_vec(),
            thickness_ratios: Vec::new(),
            n_crit,
            angles: Angles::default(),
            edge_thickness: None,
            trip_upper: None,
            trip_lower: None,
            nodes: USUAL_NODES,
        }
    }

    /// Whether the request asks for a departure from the drawing.
    #[must_use]
    pub fn departs(&self) -> bool {
        self.edge_thickness.is_some() || self.trip_upper.is_some() || self.trip_lower.is_some()
    }

    /// The same without the departures from the drawing.
    #[must_use]
    pub fn as_drawn(&self) -> Self {
        Self { edge_thickness: None, trip_upper: None, trip_lower: None, ..self.clone() }
    }

    /// Checks every figure but those of the thickness, which the outline checks.
    ///
    /// # Errors
    /// [`MakeError::Request`] with what is asked, its value and what is allowed; [`MakeError::Order`].
    pub fn check(&self) -> Result<(), MakeError> {
        self.angles.list()?;
        let thicknesses = self.thickness_ratios.len().max(1);
        super::within("count of Reynolds numbers", self.reynolds.len() as f64, [1.0, MOST_TASKS as f64])?;
        super::within(
            "count of polars",
            (self.reynolds.len() * thicknesses) as f64,
            [1.0, MOST_TASKS as f64],
        )?;
        self.reynolds.iter().try_for_each(|&re| super::within("Reynolds number", re, REYNOLDS))?;
        rising("Reynolds numbers", &self.reynolds)?;
        self.thickness_ratios.iter().try_for_each(|&t| super::within("thickness ratio", t, [0.01, 0.6]))?;
        rising("thickness ratios", &self.thickness_ratios)?;
        super::within("n at transition", self.n_crit, [1.0, 14.0])?;
        super::within("thickness of the trailing edge", self.edge_thickness.unwrap_or(0.0), [0.0, MAX_EDGE])?;
        super::within("trip on the upper side", self.trip_upper.unwrap_or(0.5), [0.0, 1.0])?;
        super::within("trip on the lower side", self.trip_lower.unwrap_or(0.5), [0.0, 1.0])?;
        super::within("nodes", self.nodes as f64, [80.0, 300.0])
    }
}

fn rising(what: &'static str, values: &[f64]) -> Result<(), MakeError> {
    match values.windows(2).find(|pair| pair[0] >= pair[1]) {
        Some(pair) => Err(MakeError::Order { what, before: pair[0], after: pair[1] }),
        None => Ok(()),
    }
}
