//! What the propeller moves or holds.

use serde::{Deserialize, Serialize};

use crate::job::by_kind::by_kind;

by_kind! {
    /// What the propeller has to move or to hold.
    pub enum Aircraft {
        /// An aeroplane with a drag polar.
        "aeroplane" => Aeroplane(Aeroplane),
        /// A multirotor that hovers.
        "multirotor" => Multirotor(Multirotor),
    }
}

/// An aeroplane.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Aeroplane {
    /// Mass in flight, kg.
    pub mass_kg: f64,
    /// Wing area, m².
    pub wing_area_m2: f64,
    /// Drag polar.
    pub drag: Drag,
    /// Greatest lift coefficient.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub cl_max: Option<f64>,
    /// Number of engines and propellers.
    #[serde(default = "one")]
    pub engines: u32,
    /// Rolling friction over weight on the take-off ground; 0.04 without it.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub rolling_friction: Option<f64>,
    /// Drag area (drag coefficient times area) of all parts that lie in the slipstreams, m²; without it the
    /// slipstream adds no drag.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub slipstream_drag_area_m2: Option<f64>,
}

/// Drag polar: CD = cd0 + k CL², or k from aspect ratio and Oswald factor, k = 1/(π e AR).
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Drag {
    /// Drag coefficient without lift.
    pub cd0: f64,
    /// Induced-drag factor.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub k: Option<f64>,
    /// Wing aspect ratio.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub aspect_ratio: Option<f64>,
    /// Oswald factor.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub oswald: Option<f64>,
}

/// A multirotor.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Multirotor {
    /// Mass in flight, kg.
    pub mass_kg: f64,
    /// Number of rotors.
    pub rotors: u32,
}

fn one() -> u32 {
    1
}
