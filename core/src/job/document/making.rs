//! How the blade is made: where its sections stand, its edges, its tip, and the wood it is cut from.

use serde::{Deserialize, Serialize};

/// How the blade is made. Everything left out has a usual value.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Making {
    /// Point of the chord line, as a share of the chord from the leading edge, that stands on the stacking
    /// line; without it the centroid of every section stands there.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub stacking_fraction: Option<f64>,
    /// The stacking line by rising radius; without it straight and square to the axis.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub stacking_line: Vec<LinePoint>,
    /// Least thickness of the trailing edge, m, at most 5 % of every station's chord; without it a
    /// thousandth of the diameter.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub trailing_edge_m: Option<f64>,
    /// Least radius of the leading edge, m; without it that of the section.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub leading_edge_radius_m: Option<f64>,
    /// Length of blade over which the tip is rounded off, m; without it half of the last station's chord.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub tip_length_m: Option<f64>,
    /// Thickness of the blank along the axis, m; without it what the blade needs.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub blank_thickness_m: Option<f64>,
    /// Width of the blank, m; without it what the blade needs.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub blank_width_m: Option<f64>,
    /// Wood left round the blade on every side of the blank, m; without it a five-hundredth of the diameter.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub allowance_m: Option<f64>,
    /// By how much each lamination is turned about the axis against its neighbour, degrees; without it not
    /// at all.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub fan_step_deg: Option<f64>,
    /// A standard flange whose bolts the hub is drilled for, in place of the pattern of `wood.hub`.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub flange: Option<Flange>,
}

/// Where the stacking line runs at a radius.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct LinePoint {
    /// Radius over tip radius.
    pub radius_fraction: f64,
    /// How far the line runs behind the radius through the axis, against the direction of turning, m.
    #[serde(default)]
    pub sweep_m: f64,
    /// How far it runs ahead of the plane of the hub, in the direction of flight, m; beside the lean of
    /// `wood.rake_deg`.
    #[serde(default)]
    pub rake_m: f64,
}

/// A standard flange.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
pub enum Flange {
    /// SAE No. 1: six bolts of 3/8 in on a circle of 4 3/8 in.
    #[serde(rename = "sae-1", alias = "sae1")]
    Sae1,
    /// SAE No. 2: six bolts of 1/2 in on a circle of 4 3/4 in.
    #[serde(rename = "sae-2", alias = "sae2")]
    Sae2,
}
