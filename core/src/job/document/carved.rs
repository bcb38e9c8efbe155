//! The blades as measured after carving.

use serde::{Deserialize, Serialize};

use super::AngleReference;

/// The carved blades as measured.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Carved {
    /// What the angles were read on.
    #[serde(default)]
    pub angle_reference: AngleReference,
    /// Density of the wood, kg/m³; without it a usual one is taken.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub density_kg_m3: Option<f64>,
    /// Least chord a correction may leave, as a share of the drawn one.
    #[serde(default = "least_share")]
    pub least_chord_share: f64,
    /// Least thickness a correction may leave, as a share of the drawn one.
    #[serde(default = "least_share")]
    pub least_thickness_share: f64,
    /// The blades in the sense of rotation, each with its readings.
    pub blades: Vec<CarvedBlade>,
}

/// One carved blade.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct CarvedBlade {
    /// Readings by rising radius.
    #[serde(default)]
    pub readings: Vec<BladeReading>,
}

/// What was measured on one blade at one radius; anything may be missing.
#[derive(Clone, Copy, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct BladeReading {
    /// Radius, m.
    pub radius_m: f64,
    /// Blade angle, degrees.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub angle_deg: Option<f64>,
    /// Chord, m.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub chord_m: Option<f64>,
    /// Greatest thickness, m.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub thickness_m: Option<f64>,
    /// How far the blade lies ahead of the plane of the hub, m.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub track_m: Option<f64>,
    /// Whether what is hard to believe of it was looked at again and is right; otherwise that is left out.
    #[serde(default, skip_serializing_if = "std::ops::Not::not")]
    pub confirmed: bool,
}

impl Default for Carved {
    fn default() -> Self {
        Self {
            angle_reference: AngleReference::default(),
            density_kg_m3: None,
            least_chord_share: least_share(),
            least_thickness_share: least_share(),
            blades: Vec::new(),
        }
    }
}

fn least_share() -> f64 {
    0.95
}
