//! The tables of a section of the user's own, before a job names them.

use serde::{Deserialize, Serialize};

use super::polar::Polar;

/// Angle of the flat face at one thickness ratio.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct FaceAngle {
    /// Thickness over chord.
    pub thickness_ratio: f64,
    /// Angle from the flat face up to the chord line, degrees.
    pub angle_deg: f64,
}

/// Polars with where they come from and what is known of the outline.
#[derive(Clone, Debug, PartialEq)]
pub struct Table {
    /// Where the polars come from, said to the reader of the job.
    pub origin: String,
    /// Angles of the flat face, by rising thickness; empty without a flat face.
    pub face_angles: Vec<FaceAngle>,
    /// Points of the outline, as [`super::outline::Outline::points`] gives them; empty when it is not known.
    pub outline: Vec<[f64; 2]>,
    /// The polars.
    pub polars: Vec<Polar>,
}
