//! What was read in ground runs and flights.

use serde::{Deserialize, Serialize};

/// Readings of ground runs and flights, and what was learned from them.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Logbook {
    /// The readings.
    #[serde(default)]
    pub readings: Vec<LogReading>,
    /// How far the job's own figures may be off.
    #[serde(default)]
    pub widths: Widths,
    /// What the readings told, kept so that the whole job can be worked out with it.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub factors: Option<Factors>,
    /// Whether the factors are used.
    #[serde(default, rename = "use")]
    pub in_use: bool,
}

/// One reading, steady.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct LogReading {
    /// A few words.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub note: String,
    /// Pressure altitude, m; without it and without a pressure sea level.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub altitude_m: Option<f64>,
    /// Pressure of the air, Pa, in place of the altitude.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub pressure_pa: Option<f64>,
    /// Temperature of the air, °C; without it that of the standard atmosphere.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub temperature_c: Option<f64>,
    /// True airspeed, m/s; 0 for a ground run.
    #[serde(default)]
    pub airspeed_m_s: f64,
    /// Engine or motor rpm; a reading without it tells nothing yet.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub engine_rpm: Option<f64>,
    /// Throttle, 1 for full; without it nothing is known of it.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub throttle: Option<f64>,
    /// Whether it was level flight at a steady speed.
    #[serde(default, skip_serializing_if = "std::ops::Not::not")]
    pub level: bool,
    /// Fuel flow of all engines, kg/h.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub fuel_kg_per_h: Option<f64>,
    /// Battery current of all motors, A.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub current_a: Option<f64>,
    /// Whether the reading is left out.
    #[serde(default, skip_serializing_if = "std::ops::Not::not")]
    pub left_out: bool,
}

/// How far the job's figures may be off before anything is read: standard deviations, as shares.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, default)]
pub struct Widths {
    /// Of the engine's power.
    pub engine_power: f64,
    /// Of the aircraft's drag area.
    pub drag_area: f64,
    /// Of the power the propeller takes.
    pub propeller_power: f64,
    /// Of fuel flow or current for a power.
    pub consumption: f64,
}

impl Default for Widths {
    fn default() -> Self {
        Self { engine_power: 0.05, drag_area: 0.15, propeller_power: 0.05, consumption: 0.05 }
    }
}

/// By how much the job's figures are multiplied.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, default)]
pub struct Factors {
    /// Shaft power at every throttle.
    pub engine_power: f64,
    /// Drag without lift.
    pub drag_area: f64,
    /// Power the propeller takes.
    pub propeller_power: f64,
    /// Fuel flow or current for a power.
    pub consumption: f64,
}

impl Default for Factors {
    fn default() -> Self {
        Self { engine_power: 1.0, drag_area: 1.0, propeller_power: 1.0, consumption: 1.0 }
    }
}
