//! The job file as written: one JSON document, SI units, names fixed.
//!
//! These are plain data. [`super::Job::from_json`] reads and checks them; [`crate::rig::Rig`] turns them into
//! what is computed.

mod aircraft;
mod carved;
mod engine;
mod flight_point;
mod logbook;
mod making;
mod propeller;
mod wishes;
mod wood;

pub use aircraft::{Aeroplane, Aircraft, Drag, Multirotor};
pub use carved::{BladeReading, Carved, CarvedBlade};
pub use engine::{
    AltitudeLaw, Battery, Electric, Engine, HeldTo, HeldToKind, Interpolation, LoadPoint, Piston, PowerPoint,
};
pub use flight_point::{FlightPoint, Setting};
pub use logbook::{Factors, LogReading, Logbook, Widths};
pub use making::{Flange, LinePoint, Making};
pub use propeller::{AngleReference, PitchControl, Propeller, Rotation, Station};
pub use wishes::{Aim, Figure, Held, Limits, RpmLimit, Wishes};
pub use wood::{Hub, OwnMaterial, Species, StressLimits, USUAL_SPECIES, Wood};

use serde::{Deserialize, Serialize};

use crate::section::{FaceAngle, Polar};

/// A whole job.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Job {
    /// Version of the file's contract; 1.
    pub spokeshave: u32,
    /// What the job is called.
    #[serde(default)]
    pub title: String,
    /// The aircraft; without it nothing that needs its drag or weight is computed.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub aircraft: Option<Aircraft>,
    /// The engine; without it flight points need an rpm.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub engine: Option<Engine>,
    /// The propeller as drawn.
    pub propeller: Propeller,
    /// Where the job is judged.
    pub flight_points: Vec<FlightPoint>,
    /// Tables of the user's own; looked up before the ones that come with the program.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub sections: Vec<Section>,
    /// What the blade is made of.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub wood: Option<Wood>,
    /// The blades as measured after carving.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub carved: Option<Carved>,
    /// What was read in ground runs and flights.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub logbook: Option<Logbook>,
    /// How the blade is made.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub bench: Option<Making>,
    /// What a search for the best blade is asked for.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub wishes: Option<Wishes>,
    /// How it is computed.
    #[serde(default)]
    pub method: Method,
}

/// Tables of the user's own.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Section {
    /// The name stations call it by.
    pub name: String,
    /// Where the tables come from.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub origin: String,
    /// Angle from the flat face up to the chord line, degrees; needed when angles are measured on the face.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub face_angle_deg: Option<f64>,
    /// The same angle by rising thickness, in place of `face_angle_deg`, for polars of several thicknesses.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub face_angles: Vec<FaceAngle>,
    /// Points of the outline in chords, from one side of the trailing edge round the nose to the other, so
    /// that it can be drawn; left out when it is not known.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub outline: Vec<[f64; 2]>,
    /// Korn factor for drag divergence.
    #[serde(default = "ordinary_korn")]
    pub korn_factor: f64,
    /// The polars.
    pub polars: Vec<Polar>,
}

/// How the blade is computed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, default)]
pub struct Method {
    /// Elements the integrals use.
    pub elements: u32,
    /// Whether Mach number changes lift and drag.
    pub compressibility: bool,
    /// Whether rotation delays stall inboard.
    pub stall_delay: bool,
    /// Whether the hub takes load off the root.
    pub hub_loss: bool,
    /// Whose factor tells what the tip takes off.
    pub tip_loss: TipLoss,
    /// Amplification exponent at transition of the shipped tables: 9 quiet air, 4 disturbed air.
    pub n_crit: f64,
}

/// Whose factor tells what the tip takes off the load.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum TipLoss {
    /// Prandtl's (1919): flat sheets behind the blades.
    #[default]
    Prandtl,
    /// Goldstein's (1929): helical sheets. Exact for light loads; at coarse pitch and with few blades smaller
    /// than Prandtl's.
    Goldstein,
}

impl Default for Method {
    fn default() -> Self {
        Self {
            elements: 40,
            compressibility: true,
            stall_delay: true,
            hub_loss: true,
            tip_loss: TipLoss::Prandtl,
            n_crit: 9.0,
        }
    }
}

pub(super) fn ordinary_korn() -> f64 {
    0.87
}
