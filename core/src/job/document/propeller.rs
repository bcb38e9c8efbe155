//! The propeller as drawn.

use serde::{Deserialize, Serialize};

/// A propeller as drawn.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Propeller {
    /// Number of blades.
    pub blades: u32,
    /// Diameter, m.
    pub diameter_m: f64,
    /// Diameter of the hub, m; the blade works from there on.
    pub hub_diameter_m: f64,
    /// Sense of rotation.
    #[serde(default)]
    pub rotation: Rotation,
    /// Whether and how the blades turn in the hub.
    #[serde(default)]
    pub pitch_control: PitchControl,
    /// What blade angles are measured to.
    #[serde(default)]
    pub angle_reference: AngleReference,
    /// By how much the body behind slows the air at the propeller, as a share of the airspeed; without it
    /// not at all.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub blockage: Option<f64>,
    /// Stations from hub to tip.
    pub stations: Vec<Station>,
}

/// Sense of rotation seen from behind.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum Rotation {
    /// Clockwise seen from behind.
    #[default]
    ClockwiseFromBehind,
    /// Anticlockwise seen from behind.
    AnticlockwiseFromBehind,
}

/// Whether and how the blades turn in the hub.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(tag = "kind", rename_all = "kebab-case", deny_unknown_fields)]
pub enum PitchControl {
    /// One piece.
    Fixed {},
    /// Set on the ground.
    GroundAdjustable {
        /// How far the blades are turned from the drawing, degrees; positive is coarser.
        turn_deg: f64,
    },
    /// A governor holds the rpm within its stops.
    ConstantSpeed {
        /// Governed propeller rpm.
        rpm: f64,
        /// Fine stop, degrees from the drawing.
        turn_min_deg: f64,
        /// Coarse stop, degrees from the drawing.
        turn_max_deg: f64,
    },
}

impl Default for PitchControl {
    fn default() -> Self {
        Self::Fixed {}
    }
}

/// What blade angles are measured to.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum AngleReference {
    /// The chord line.
    #[default]
    ChordLine,
    /// The flat face, where the protractor lies.
    FlatFace,
}

/// One station of the blade.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Station {
    /// Radius over tip radius.
    pub radius_fraction: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Blade angle, degrees; or give `pitch_m`.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub angle_deg: Option<f64>,
    /// Geometric pitch, m, in place of the angle: `2π r tan(angle)`.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub pitch_m: Option<f64>,
    /// Thickness over chord.
    pub thickness_ratio: f64,
    /// Name of the section.
    pub section: String,
}
