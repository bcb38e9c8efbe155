//! The job file as written: one JSON document, SI units, names fixed.
//!
//! These are plain data. [`super::Job::from_json`] reads and checks them; [`crate::rig::Rig`] turns them into what is
//! computed.

use serde::{Deserialize, Serialize};

use super::by_kind::by_kind;
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
    /// How it is computed.
    #[serde(default)]
    pub method: Method,
}

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
    /// No-load current, A.
    pub no_load_current_a: f64,
    /// Voltage at which the no-load current was read, V.
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
    /// By how much the body behind slows the air at the propeller, as a share of the airspeed; without it not at all.
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
    /// The flat back face, where the protractor lies.
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
    /// Points of the outline in chords, from one side of the trailing edge round the nose to the other, so that it
    /// can be drawn; left out when it is not known.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub outline: Vec<[f64; 2]>,
    /// Korn factor for drag divergence.
    #[serde(default = "ordinary_korn")]
    pub korn_factor: f64,
    /// The polars.
    pub polars: Vec<Polar>,
}

/// What the blade is made of.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Wood {
    /// Species.
    pub species: String,
    /// Number of laminations.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub laminations: Option<u32>,
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
    /// Amplification exponent at transition of the shipped tables: 9 quiet air, 4 disturbed air.
    pub n_crit: f64,
}

impl Default for Method {
    fn default() -> Self {
        Self { elements: 40, compressibility: true, stall_delay: true, hub_loss: true, n_crit: 9.0 }
    }
}

fn one() -> u32 {
    1
}
fn unity() -> f64 {
    1.0
}
pub(super) fn ordinary_korn() -> f64 {
    0.87
}
