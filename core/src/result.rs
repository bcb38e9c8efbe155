//! Results as plain data. Names and units are those of the JSON output; figures without an answer are `None`,
//! never NaN.

use serde::Serialize;

mod carved;
mod chart;
mod fit;
mod limit;
mod logbook;
mod removal;
mod search;
mod shape;
mod strength;
mod verdict;
mod vibration;

pub use crate::job::Figure;
pub use carved::{
    Carved, CarvedBlade, CarvedPoint, CarvedStation, CarvedStrength, Doubt, Known, LoadOf, MassOf,
    OncePerTurn, Read, StaticBalance, StationDeparture,
};
pub use chart::{ChartCell, Cost, ErrorCosts, PitchDiameter, Tolerance};
pub use fit::{
    Ceilings, Crossing, Envelope, EnvelopePoint, Fit, FullThrottle, HeldAtLimit, Level, Mark, Marks,
    PitchWorth, TIP_MACHS, TakeOff, TipMach, WorthOf,
};
pub use limit::{Limit, Margin};
pub use logbook::{Change, Estimate, FactorFound, LogLine, Logged, Means, Pair};
pub use removal::{PlannedBlade, PlannedStation, RemovalPlan};
pub use search::{AimResult, FreeValue, Search, Stopped};
pub use shape::{Bound, Brief, Compared, LeastLoss, LossStation, Origin, Twist, TwistStation};
pub use strength::{
    CaseFigures, CaseKind, CaseResult, Governing, HubResult, Mass, MaterialUsed, RunningStation,
    RunningTwist, Strength, StressKind, StressStation,
};
pub use verdict::{Finding, Verdict};
pub use vibration::{FrequencyLine, ModeKind, NearOrder, Vibration};

/// All that is known of a job's flight points.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Analysis {
    /// Version of the contract.
    pub spokeshave: u32,
    /// The job's title.
    pub title: String,
    /// Figures of the propeller that no flight point changes.
    pub propeller: PropellerFigures,
    /// One result for each flight point, in order.
    pub flight_points: Vec<PointResult>,
}

/// Figures of the propeller alone.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PropellerFigures {
    /// Number of blades.
    pub blades: u32,
    /// Diameter, m.
    pub diameter_m: f64,
    /// Activity factor of one blade: `(100 000/16) ∫ (c/D) x³ dx` from the hub to the tip.
    pub activity_factor: f64,
    /// Blade area over disc area.
    pub solidity: f64,
    /// Blade angle to the chord line at 0.75 R, degrees.
    pub blade_angle_075_deg: f64,
    /// Geometric pitch at 0.75 R, m.
    pub geometric_pitch_m: f64,
}

/// Whether a flight point has an answer.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
#[non_exhaustive]
pub enum State {
    /// There is an answer.
    Ok,
    /// The setting needs an engine and the job has none.
    NeedsEngine,
    /// The setting needs an aircraft and the job has none.
    NeedsAircraft,
    /// The engine has too little power to turn the propeller at any rpm of its curve.
    EngineCannotTurnIt,
    /// The propeller would turn faster than the engine's curve or limit.
    OverLimitRpm,
    /// Some rpm gives the thrust of level flight, but the engine does not have the power for it there.
    EngineTooWeak,
    /// No rpm up to a tip Mach number of 1.2 absorbs the power or gives the thrust asked for.
    OutOfReach,
    /// Slower than the stall, and not to be flown level; in an envelope said of every level flight slower
    /// than the stall.
    BelowStall,
}

impl State {
    /// One plain sentence.
    #[must_use]
    pub fn sentence(self) -> &'static str {
        match self {
            Self::Ok => "There is an answer.",
            Self::NeedsEngine => "This setting needs an engine, and the job has none.",
            Self::NeedsAircraft => "This setting needs an aircraft, and the job has none.",
            Self::EngineCannotTurnIt => "The engine cannot turn this propeller at any rpm of its curve.",
            Self::OverLimitRpm => {
                "The propeller would run past the engine's limit rpm, or past the last point of its power curve."
            }
            Self::EngineTooWeak => {
                "Level flight takes more power here than the engine gives at full throttle."
            }
            Self::OutOfReach => "No rpm of this propeller gives what is asked for, whatever the engine.",
            Self::BelowStall => "Slower than the stall: the wing does not carry the aeroplane.",
        }
    }
}

/// Something worth knowing about an answer.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
#[non_exhaustive]
pub enum Note {
    /// Past the angle of greatest lift.
    Stalled,
    /// Angle of attack beyond the rows of the table: the extension past stall was used.
    PastTable,
    /// Reynolds number outside the tables, held at their edge.
    ReynoldsOutsideTables,
    /// Thickness outside the tables, held at their edge.
    ThicknessOutsideTables,
    /// Mach number above 0.85: not to be relied on.
    MachNotReliable,
    /// The blade is braked by the air (negative thrust) here.
    Windmilling,
    /// No balance of momentum was found here; no load is counted.
    NoBalance,
    /// At hub or tip, where the load is nothing by definition.
    NoLoadAtEnd,
    /// Full throttle would pass the limit rpm; [`PointResult::held`] is throttled back to it.
    HeldAtLimitRpm,
    /// Level flight slower than the stall.
    BelowStall,
    /// The engine would turn faster than its limit rpm, or than its curve or its battery's voltage lets it.
    PastLimitRpm,
    /// The propeller takes more power than the engine gives at full throttle.
    MoreThanEngine,
}

impl Note {
    /// Whether it is said of the flight point, not of a place on the blade.
    #[must_use]
    pub fn of_the_whole(self) -> bool {
        matches!(self, Self::HeldAtLimitRpm | Self::BelowStall | Self::PastLimitRpm | Self::MoreThanEngine)
    }

    /// A few plain words.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Stalled => "stalled",
            Self::PastTable => "angle past the table, extended",
            Self::ReynoldsOutsideTables => "Reynolds number outside the tables, held at their edge",
            Self::ThicknessOutsideTables => "thickness outside the tables, held at their edge",
            Self::MachNotReliable => "Mach number above 0.85, not to be relied on",
            Self::Windmilling => "driven by the air",
            Self::NoBalance => "no balance found, no load counted",
            Self::NoLoadAtEnd => "at the end of the blade or inside the hub, no load",
            Self::BelowStall => "slower than the stall, the wing does not carry the aeroplane",
            Self::PastLimitRpm => "past the engine's limit rpm, or past the end of its power curve",
            Self::MoreThanEngine => "more power than the engine has",
            Self::HeldAtLimitRpm => "throttled back to hold the limit rpm",
        }
    }
}

/// One flight point worked out.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PointResult {
    /// The flight point's name.
    pub name: String,
    /// Whether there is an answer.
    pub state: State,
    /// True airspeed, m/s.
    pub airspeed_m_s: Option<f64>,
    /// Propeller rpm.
    pub rpm: Option<f64>,
    /// Angle the blades are turned in the hub, degrees; positive is coarser.
    pub turn_deg: f64,
    /// Air density, kg/m³.
    pub density_kg_m3: f64,
    /// The figures of the whole propeller; null in the JSON when there is no answer.
    #[serde(flatten)]
    pub figures: Figures,
    /// What the engine and the aircraft make of it.
    #[serde(flatten)]
    pub meeting: Meeting,
    /// Figures by station, of the job file's stations.
    pub stations: Vec<StationResult>,
    /// What holds somewhere on the blade.
    pub notes: Vec<Note>,
    /// At full throttle with state `over-limit-rpm`: the answer throttled back to the limit rpm.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub held: Option<Box<HeldAtLimit>>,
}

/// Figures of the whole propeller (one propeller).
#[derive(Clone, Debug, Default, PartialEq, Serialize)]
pub struct Figures {
    /// `J = V/(n D)`.
    pub advance_ratio: Option<f64>,
    /// `CT = T/(ρ n² D⁴)`.
    pub ct: Option<f64>,
    /// `CP = P/(ρ n³ D⁵)`.
    pub cp: Option<f64>,
    /// `CQ = Q/(ρ n² D⁵)`.
    pub cq: Option<f64>,
    /// Thrust over torque coefficient.
    pub ct_over_cq: Option<f64>,
    /// `T V/P`, when thrust, speed and power are positive.
    pub efficiency: Option<f64>,
    /// What an actuator disc of this size without drag or swirl would reach, `2/(1 + sqrt(1 + Tc))`.
    pub ideal_efficiency: Option<f64>,
    /// `T^1.5/(sqrt(2 ρ π R²) P)` at rest.
    pub figure_of_merit: Option<f64>,
    /// Thrust, N.
    pub thrust_n: Option<f64>,
    /// Torque, N m, positive when the engine supplies it.
    pub torque_n_m: Option<f64>,
    /// Shaft power, W.
    pub power_w: Option<f64>,
    /// Helical Mach number of the tip.
    pub tip_mach: Option<f64>,
    /// Blade angle to the chord line at 0.75 R, turned, degrees.
    pub blade_angle_075_deg: Option<f64>,
    /// Advance angle `atan(V/(Ω r))` at 0.75 R, degrees.
    pub advance_angle_075_deg: Option<f64>,
    /// Angle of attack at 0.75 R, degrees.
    pub angle_of_attack_075_deg: Option<f64>,
    /// Geometric pitch at 0.75 R, `2π r tan(blade angle)`, m.
    pub geometric_pitch_m: Option<f64>,
    /// Effective pitch, advance per turn `V/n`, m.
    pub effective_pitch_m: Option<f64>,
    /// Slip, `1 − effective/geometric pitch`.
    pub slip: Option<f64>,
}

/// What engine and aircraft make of a propeller's condition. `None` where the job has no engine or aircraft,
/// or it does not apply.
#[derive(Clone, Debug, Default, PartialEq, Serialize)]
pub struct Meeting {
    /// Engine or motor rpm.
    pub engine_rpm: Option<f64>,
    /// Shaft power at full throttle at this rpm, per engine, W.
    pub available_power_w: Option<f64>,
    /// Shaft power over the available power.
    pub power_share: Option<f64>,
    /// Thrust over all propellers, N.
    pub total_thrust_n: Option<f64>,
    /// Thrust that level flight at this speed asks of all propellers, the drag with what the slipstream adds
    /// to it, or the weight of a multirotor, N.
    pub asked_n: Option<f64>,
    /// Rate of climb `(T − D) V/W` of an aeroplane, lift taken as weight, m/s.
    pub rate_of_climb_m_s: Option<f64>,
    /// Fuel flow of all engines, kg/h; `None` beyond the engine's power or limit rpm.
    pub fuel_kg_per_h: Option<f64>,
    /// Current through the windings of one motor, A: what the torque asks and the no-load current; below zero
    /// where the propeller drives the motor by more than that. `None` for a piston engine, and beyond what the
    /// motor gives: past its rpm without load, its current limit or full duty.
    pub motor_current_a: Option<f64>,
    /// Current that one motor draws from the battery, duty times the motor's, A, signed as that and known
    /// where that is.
    pub battery_current_a: Option<f64>,
    /// Battery voltage under the load of all motors, V; known where the motor's current is.
    pub battery_voltage_v: Option<f64>,
    /// Duty of the controller, 0 to 1; known where the motor's current is.
    pub duty: Option<f64>,
}

/// One station worked out.
#[derive(Clone, Debug, Default, PartialEq, Serialize)]
pub struct StationResult {
    /// Radius, m.
    pub radius_m: f64,
    /// Radius over tip radius.
    pub radius_fraction: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Thickness over chord.
    pub thickness_ratio: f64,
    /// Blade angle to the chord line, turned, degrees.
    pub blade_angle_deg: f64,
    /// Blade angle on the flat face, turned, degrees.
    pub face_angle_deg: Option<f64>,
    /// Angle of the air to the plane of rotation, degrees.
    pub inflow_angle_deg: Option<f64>,
    /// Angle of attack, degrees.
    pub angle_of_attack_deg: Option<f64>,
    /// Angle of best lift-to-drag at this Reynolds and Mach number, degrees.
    pub best_angle_deg: Option<f64>,
    /// Angle of attack minus best angle, degrees; below zero is slack, above is hard.
    pub departure_deg: Option<f64>,
    /// Lift-to-drag over its best.
    pub share_of_best: Option<f64>,
    /// Lower edge of the working band, as a departure, degrees.
    pub band_low_deg: Option<f64>,
    /// Upper edge of the working band, as a departure, degrees.
    pub band_high_deg: Option<f64>,
    /// Angle of greatest lift, degrees.
    pub stall_angle_deg: Option<f64>,
    /// Best lift-to-drag here.
    pub best_lift_to_drag: Option<f64>,
    /// Lift coefficient.
    pub cl: Option<f64>,
    /// Drag coefficient.
    pub cd: Option<f64>,
    /// Chord Reynolds number.
    pub reynolds: f64,
    /// Helical Mach number.
    pub mach: f64,
    /// Speed at which the air meets the blade, m/s.
    pub relative_speed_m_s: Option<f64>,
    /// Induced axial velocity at the disc, m/s.
    pub induced_axial_m_s: Option<f64>,
    /// Induced swirl at the disc, m/s.
    pub induced_swirl_m_s: Option<f64>,
    /// `u/V`; none at rest.
    pub axial_factor: Option<f64>,
    /// `v/(Ω r)`.
    pub swirl_factor: Option<f64>,
    /// The factor F of the loss at tip and hub, their product.
    pub loss_factor: Option<f64>,
    /// Thrust per metre of radius, all blades, N/m.
    pub thrust_n_per_m: f64,
    /// Torque per metre of radius, all blades, N m/m.
    pub torque_n_m_per_m: f64,
    /// What is worth knowing here.
    pub notes: Vec<Note>,
}

/// Coefficients of a section at one angle of attack.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct SectionPoint {
    /// Angle of attack, degrees.
    pub alpha_deg: f64,
    /// Lift coefficient.
    pub cl: f64,
    /// Drag coefficient.
    pub cd: f64,
    /// Lift over drag.
    pub lift_to_drag: f64,
}
