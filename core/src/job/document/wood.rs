//! What the blade is made of, and how it is held.

use serde::de::{Deserializer, Error};
use serde::{Deserialize, Serialize};
use serde_json::Value;

use crate::job::by_kind::rest;

/// What the blade is made of, by what its strength is judged, and how it is held.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Wood {
    /// A species or another material by name, or the user's own values.
    pub species: Species,
    /// Number of laminations.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub laminations: Option<u32>,
    /// Moisture content of the wood, percent of its dry weight.
    #[serde(default = "usual_moisture")]
    pub moisture_percent: f64,
    /// What the strength that is left after scatter and repeated load is divided by.
    #[serde(default = "usual_safety")]
    pub safety_factor: f64,
    /// Limits of stress in place of those worked out from the material.
    #[serde(default, skip_serializing_if = "StressLimits::is_empty")]
    pub limits: StressLimits,
    /// Speed of rotation of the overspeed case over the highest rpm of the job.
    #[serde(default = "usual_overspeed")]
    pub overspeed: f64,
    /// Lean of the blade forward of the plane of rotation, degrees.
    #[serde(default)]
    pub rake_deg: f64,
    /// How the propeller is bolted on; without it the hub is not judged.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub hub: Option<Hub>,
}

impl Default for Wood {
    fn default() -> Self {
        Self {
            species: Species::Named(USUAL_SPECIES.into()),
            laminations: None,
            moisture_percent: usual_moisture(),
            safety_factor: usual_safety(),
            limits: StressLimits::default(),
            overspeed: usual_overspeed(),
            rake_deg: 0.0,
            hub: None,
        }
    }
}

/// The species taken where a job names none.
pub const USUAL_SPECIES: &str = "yellow-birch";

/// A species or another material by name, or the user's own values.
#[derive(Clone, Debug, PartialEq, Serialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(untagged)]
pub enum Species {
    /// One of the program's materials.
    Named(String),
    /// The user's own.
    Own(OwnMaterial),
}

impl<'de> Deserialize<'de> for Species {
    fn deserialize<D: Deserializer<'de>>(from: D) -> Result<Self, D::Error> {
        match Value::deserialize(from)? {
            Value::String(name) => Ok(Self::Named(name)),
            value @ Value::Object(_) => rest(value).map(Self::Own),
            other => Err(D::Error::custom(format!(
                "{other} is neither the name of a species nor an object with own values"
            ))),
        }
    }
}

/// Values of the user's own material, as the blade will have them: no moisture is allowed for.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct OwnMaterial {
    /// What it is called.
    pub name: String,
    /// Density, kg/m³.
    pub density_kg_m3: f64,
    /// Young's modulus along the blade, Pa.
    pub modulus_pa: f64,
    /// Mean strength in bending or tension along the blade (for wood the modulus of rupture), Pa.
    pub bending_strength_pa: f64,
    /// Mean strength in compression along the blade, Pa; without it three quarters of the bending strength.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub compression_strength_pa: Option<f64>,
    /// Mean strength in shear along the blade, Pa; without it a tenth of the bending strength.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub shear_strength_pa: Option<f64>,
    /// Mean strength against crushing across the grain, Pa; without it a fifteenth of the bending strength.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub crushing_strength_pa: Option<f64>,
    /// Shear modulus, Pa; without it a fourteenth of Young's modulus.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub shear_modulus_pa: Option<f64>,
    /// Coefficient of variation of its strength; without it that of wood.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub scatter: Option<f64>,
    /// Share of its strength that lasts under repeated load; without it that of wood.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub lasting_share: Option<f64>,
}

/// Limits of stress, Pa, in place of those worked out from the material.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct StressLimits {
    /// Most tension along the blade, Pa.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub tension_pa: Option<f64>,
    /// Most compression along the blade, Pa.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub compression_pa: Option<f64>,
    /// Most shear, Pa.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub shear_pa: Option<f64>,
}

impl StressLimits {
    fn is_empty(&self) -> bool {
        *self == Self::default()
    }
}

/// How the propeller is bolted to the engine: a flat boss between two plates.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Hub {
    /// Thickness of the boss along the axis, m.
    pub thickness_m: f64,
    /// Diameter of the plates that clamp the boss, m.
    pub flange_diameter_m: f64,
    /// Diameter of the hole in the middle, m; 0 for none.
    #[serde(default)]
    pub bore_m: f64,
    /// Number of bolts.
    #[serde(default = "usual_bolts")]
    pub bolts: u32,
    /// Diameter of the circle the bolts stand on, m.
    pub bolt_circle_m: f64,
    /// Diameter of a bolt, m.
    pub bolt_diameter_m: f64,
    /// Torque a bolt's nut is tightened with, N m; without it the clamping is not judged.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub bolt_torque_n_m: Option<f64>,
}

fn usual_moisture() -> f64 {
    12.0
}

fn usual_safety() -> f64 {
    1.5
}

fn usual_overspeed() -> f64 {
    1.1
}

fn usual_bolts() -> u32 {
    6
}
