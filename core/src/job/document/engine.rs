//! What turns the propeller.

use serde::{Deserialize, Serialize};

use crate::job::by_kind::by_kind;

by_kind! {
    /// What turns the propeller.
    pub enum Engine {
        /// A piston engine, by its full-throttle curve.
        "piston" => Piston(Piston),
        /// An electric motor with controller and battery.
        "electric" => Electric(Electric),
    }
}

/// A piston engine.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Piston {
    /// Full-throttle shaft power by engine rpm at sea level, by rising rpm.
    pub full_throttle: Vec<PowerPoint>,
    /// How the power runs between the points of the curve.
    #[serde(default)]
    pub interpolation: Interpolation,
    /// Engine rpm over propeller rpm.
    #[serde(default = "unity")]
    pub gear_ratio: f64,
    /// Limit of engine rpm.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub max_rpm: Option<f64>,
    /// Idle engine rpm.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub idle_rpm: Option<f64>,
    /// How power falls with height.
    #[serde(default)]
    pub altitude_law: AltitudeLaw,
    /// Brake specific fuel consumption, kg per kWh.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub bsfc_kg_per_kwh: Option<f64>,
    /// The same by rising load, in place of `bsfc_kg_per_kwh`.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub bsfc_by_load: Vec<LoadPoint>,
    /// Fuel on board, kg.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub fuel_kg: Option<f64>,
}

/// How a curve runs between its points.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum Interpolation {
    /// A smooth curve without overshoot.
    #[default]
    MonotoneCubic,
    /// Straight lines.
    Linear,
}

/// One point of a full-throttle curve.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct PowerPoint {
    /// Engine rpm.
    pub rpm: f64,
    /// Shaft power, W.
    pub power_w: f64,
}

/// Specific fuel consumption at one load.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct LoadPoint {
    /// Shaft power over that at full throttle at the same rpm and height, 0 to 1.
    pub load: f64,
    /// Brake specific fuel consumption, kg per kWh.
    pub bsfc_kg_per_kwh: f64,
}

/// How a piston engine's power falls with height.
#[derive(Clone, Debug, Default, PartialEq, Serialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum AltitudeLaw {
    /// Power follows density by Gagg and Ferrar's law.
    #[default]
    NaturallyAspirated,
    /// Sea-level power is held up to a height, then falls by the same law from there.
    #[serde(untagged)]
    HeldTo(HeldTo),
}

/// Power held up to a height.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct HeldTo {
    /// Always `held-to`.
    pub kind: HeldToKind,
    /// Height up to which power is held, m.
    pub altitude_m: f64,
}

/// The word `held-to`.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum HeldToKind {
    /// `held-to`.
    HeldTo,
}

/// An electric motor, its controller and its battery.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Electric {
    /// Speed constant, rpm per volt.
    pub kv_rpm_per_v: f64,
    /// Winding resistance, Ω.
    pub resistance_ohm: f64,
    /// No-load current, A; taken as the same at every voltage and rpm.
    pub no_load_current_a: f64,
    /// Voltage at which the no-load current was read, V. It only keeps a record of the reading: no figure
    /// depends on it.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub no_load_voltage_v: Option<f64>,
    /// Limit of motor current, A.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub max_current_a: Option<f64>,
    /// Motor rpm over propeller rpm.
    #[serde(default = "unity")]
    pub gear_ratio: f64,
    /// Resistance of controller and leads, Ω.
    #[serde(default)]
    pub controller_resistance_ohm: f64,
    /// The battery.
    pub battery: Battery,
}

impl Electric {
    /// Propeller rpm at full duty without current: the most that the motor turns by itself.
    #[must_use]
    pub fn no_load_rpm(&self) -> f64 {
        self.battery.open_circuit_v() * self.kv_rpm_per_v / self.gear_ratio
    }
}

impl Battery {
    /// Voltage without current, V.
    #[must_use]
    pub fn open_circuit_v(&self) -> f64 {
        f64::from(self.cells) * self.open_circuit_v_per_cell
    }
}

/// A battery.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Battery {
    /// Cells in series.
    pub cells: u32,
    /// Open-circuit voltage of a cell, V.
    pub open_circuit_v_per_cell: f64,
    /// Resistance of a cell, Ω.
    pub resistance_ohm_per_cell: f64,
    /// Capacity, A h.
    pub capacity_ah: f64,
    /// Part of the capacity that may be used, 0 to 1.
    #[serde(default = "unity")]
    pub usable_fraction: f64,
}

fn unity() -> f64 {
    1.0
}
