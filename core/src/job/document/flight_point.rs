//! Where the job is judged.

use serde::{Deserialize, Serialize};

/// Where the job is judged.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct FlightPoint {
    /// Its name.
    pub name: String,
    /// Pressure altitude, m.
    #[serde(default)]
    pub altitude_m: f64,
    /// Temperature offset from the standard atmosphere, K.
    #[serde(default)]
    pub isa_offset_k: f64,
    /// True airspeed, m/s; absent with full throttle means top speed.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub airspeed_m_s: Option<f64>,
    /// What the engine is set to.
    pub setting: Setting,
}

/// What the engine is set to at a flight point.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(tag = "kind", rename_all = "kebab-case", deny_unknown_fields)]
pub enum Setting {
    /// Full throttle.
    FullThrottle {},
    /// Thrust equals drag.
    Level {},
    /// A propeller rpm.
    Rpm {
        /// Propeller rpm.
        rpm: f64,
    },
    /// A shaft power per propeller.
    Power {
        /// Shaft power, W.
        power_w: f64,
    },
    /// A share of full throttle.
    Throttle {
        /// 0 to 1.
        fraction: f64,
    },
}
