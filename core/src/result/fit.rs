//! Results of the fit over the whole speed range, as plain data.

use serde::Serialize;

use super::{Figures, Meeting, State};
use crate::aircraft::Speeds;

/// What a flight point's setting would give if the throttle were drawn back to hold the engine at its limit
/// rpm (or at the end of its curve), where full throttle would pass it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct HeldAtLimit {
    /// True airspeed, m/s; for top speed the fastest level flight so held.
    pub airspeed_m_s: f64,
    /// Propeller rpm, that of the limit.
    pub rpm: f64,
    /// Angle the blades are turned in the hub, degrees.
    pub turn_deg: f64,
    /// Figures of the propeller.
    #[serde(flatten)]
    pub figures: Figures,
    /// What engine and aircraft make of it.
    #[serde(flatten)]
    pub meeting: Meeting,
}

/// The fit over the speed range at one flight point's air.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Envelope {
    /// The flight point whose air it is.
    pub flight_point: String,
    /// Pressure altitude, m.
    pub altitude_m: f64,
    /// Temperature offset from the standard atmosphere, K.
    pub isa_offset_k: f64,
    /// Air density, kg/m³.
    pub density_kg_m3: f64,
    /// Speeds that follow from the aeroplane's drag polar alone.
    pub speeds: Option<Speeds>,
    /// Radius fractions at which departures are given.
    pub radius_fractions: Vec<f64>,
    /// The speed range at equal steps from rest.
    pub points: Vec<EnvelopePoint>,
    /// Full throttle at rest: what the ground run shows.
    pub standing: Option<FullThrottle>,
    /// The places that decide.
    pub marks: Marks,
}

impl Envelope {
    /// The weight of a multirotor, N; `None` for other jobs.
    #[must_use]
    pub fn hover_n(&self) -> Option<f64> {
        self.points.first().filter(|p| p.airspeed_m_s == 0.0)?.asked_n
    }

    /// How much full throttle falls short of holding a multirotor up, all rotors together, N; `None` where it
    /// does not.
    #[must_use]
    pub fn hover_short_n(&self) -> Option<f64> {
        let short = self.hover_n()? - self.standing.as_ref()?.thrust_n;
        (short > 0.0).then_some(short)
    }

    /// That it cannot hover, and by how much, a force (N) said by `force`; `None` where it can, or need not.
    #[must_use]
    pub fn cannot_hover(&self, force: impl Fn(f64) -> String) -> Option<String> {
        let (weight, short) = (force(self.hover_n()?), force(self.hover_short_n()?));
        Some(format!("It cannot hover: full throttle is {short} short of the weight of {weight}."))
    }

    /// First and last speed (m/s) of the range at which full throttle cannot turn the propeller at any rpm of
    /// the engine's power curve; `None` where there is no such speed.
    #[must_use]
    pub fn too_slow_to_turn_m_s(&self) -> Option<(f64, f64)> {
        let mut there = self.points.iter().filter(|p| p.full_state == State::EngineCannotTurnIt);
        let first = there.next()?;
        Some((first.airspeed_m_s, there.next_back().unwrap_or(first).airspeed_m_s))
    }
}

/// One speed of an envelope.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct EnvelopePoint {
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
    /// Thrust that level flight asks of all propellers, the drag with what the slipstream adds to it, or the
    /// weight of a multirotor, N.
    pub asked_n: Option<f64>,
    /// Full throttle; `None` where there is no answer.
    pub full: Option<FullThrottle>,
    /// Why full throttle has no answer, or none unless held at the limit; `ok` otherwise.
    pub full_state: State,
    /// Level flight (or hover); `None` where no rpm gives the thrust.
    pub level: Option<Level>,
    /// Why level flight has no answer; `ok` otherwise. An answer beyond the engine's power or limit stands,
    /// marked by this.
    pub level_state: State,
}

/// Full throttle at one speed.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct FullThrottle {
    /// Propeller rpm.
    pub rpm: f64,
    /// Whether the throttle is drawn back to hold the engine at its limit rpm.
    pub held_at_limit: bool,
    /// Angle the blades are turned in the hub, degrees.
    pub turn_deg: f64,
    /// Thrust of all propellers, N.
    pub thrust_n: f64,
    /// Shaft power of one engine, W.
    pub power_w: f64,
    /// `T V/P`, where all are positive.
    pub efficiency: Option<f64>,
    /// Helical Mach number of the tip.
    pub tip_mach: f64,
    /// Rate of climb `(T − D) V/W` of an aeroplane, lift taken as weight, m/s.
    pub rate_of_climb_m_s: Option<f64>,
    /// Angle of climb, `sin γ = (T − D)/W`, degrees.
    pub climb_angle_deg: Option<f64>,
    /// Departure at each of the envelope's radius fractions, degrees.
    pub departure_deg: Vec<Option<f64>>,
}

/// Level flight (or hover) at one speed.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Level {
    /// Propeller rpm.
    pub rpm: f64,
    /// Angle the blades are turned in the hub, degrees.
    pub turn_deg: f64,
    /// Shaft power of one engine, W.
    pub power_w: f64,
    /// Shaft power over that at full throttle at this rpm.
    pub power_share: Option<f64>,
    /// `T V/P`, where all are positive.
    pub efficiency: Option<f64>,
    /// Helical Mach number of the tip.
    pub tip_mach: f64,
    /// Fuel flow of all engines, kg/h.
    pub fuel_kg_per_h: Option<f64>,
    /// Battery current of one motor, A.
    pub battery_current_a: Option<f64>,
    /// Time aloft on all fuel or on the usable charge, at this mass and without reserve, s.
    pub endurance_s: Option<f64>,
    /// The same as a distance in still air, m.
    pub range_m: Option<f64>,
    /// Departure at each of the envelope's radius fractions, degrees.
    pub departure_deg: Vec<Option<f64>>,
}

/// A place on the speed axis.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Mark {
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
    /// Propeller rpm there.
    pub rpm: f64,
    /// What is best there, in its own unit.
    pub value: f64,
    /// Whether the engine is held at its limit rpm there.
    pub held_at_limit: bool,
}

/// Places of an envelope that decide; `None` where there is none.
#[derive(Clone, Debug, Default, PartialEq, Serialize)]
pub struct Marks {
    /// Best rate of climb, m/s.
    pub best_rate_of_climb: Option<Mark>,
    /// Best angle of climb, degrees.
    pub best_angle_of_climb: Option<Mark>,
    /// Top speed; the value is thrust, N.
    pub top_speed: Option<Mark>,
    /// Longest range, m.
    pub best_range: Option<Mark>,
    /// Longest time aloft, s.
    pub best_endurance: Option<Mark>,
    /// Dive with closed throttle in which the air alone drives the propeller to the limit rpm, the engine
    /// neither driving nor braking (an engine that brakes allows more speed); the value is the
    /// propellers' thrust, N, below zero. What the airframe allows is another limit.
    pub closed_throttle_dive: Option<Mark>,
    /// Standing at the engine's idle rpm; the value is the thrust of all propellers, N.
    pub idle: Option<Mark>,
    /// Speed from which full throttle would pass the engine's limit rpm or the end of its curve, m/s.
    pub limit_rpm_from_m_s: Option<f64>,
    /// Speeds at which the tip at full throttle passes the Mach numbers of [`TIP_MACHS`], m/s, each where it
    /// is passed.
    pub tip_mach_from: Vec<TipMach>,
}

/// Where the tip passes a Mach number.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct TipMach {
    /// The Mach number.
    pub tip_mach: f64,
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
}

/// Helical Mach numbers of the tip that an envelope looks for. Common practice: above about 0.85 a propeller
/// loses efficiency and grows loud, above 0.92 badly so.
pub const TIP_MACHS: [f64; 2] = [0.85, 0.92];

/// Take-off on level hard ground without wind.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct TakeOff {
    /// Rolling friction over weight.
    pub rolling_friction: f64,
    /// Speed at lift-off, 1.2 of the stall, m/s.
    pub lift_off_m_s: f64,
    /// Ground roll, m.
    pub ground_roll_m: f64,
    /// Time of the ground roll, s.
    pub ground_roll_s: f64,
    /// Speed at 15 m, 1.3 of the stall, m/s.
    pub screen_m_s: f64,
    /// Distance from standstill to a height of 15 m, m.
    pub distance_to_15_m: f64,
}

/// Pressure altitudes that full throttle reaches.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Ceilings {
    /// Where the best rate of climb is 0.5 m/s, m; `None` below sea level or above the atmosphere's table.
    pub service_m: Option<f64>,
    /// Where it is nothing, m; `None` as above.
    pub absolute_m: Option<f64>,
    /// Best rate of climb at sea level, m/s; `None` where full throttle has no answer there.
    pub sea_level_climb_m_s: Option<f64>,
}

/// The figure that a better pitch betters.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum WorthOf {
    /// Thrust of all propellers, N; more is better.
    Thrust,
    /// Top speed, m/s; more is better.
    TopSpeed,
    /// Shaft power of one engine in level flight, W; less is better.
    ShaftPower,
}

/// What the best turn of the blades is worth at a flight point, over the pitch as it stands.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PitchWorth {
    /// The flight point's name.
    pub flight_point: String,
    /// The figure that counts there.
    pub of: WorthOf,
    /// The figure with the blades as they stand; `None` where there is no answer.
    pub as_set: Option<f64>,
    /// The figure at the best turn; `None` where no turn has an answer.
    pub best: Option<f64>,
    /// The best turn, degrees from the drawing, to about a twentieth of a degree; positive is coarser.
    pub turn_deg: Option<f64>,
    /// Whether the best lies at an end of what was searched, 15° finer to 25° coarser than the blades stand.
    pub at_end_of_search: bool,
    /// How much better the best is, as a share of the figure as set.
    pub gain: Option<f64>,
}

/// An rpm at which propeller and engine agree.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Crossing {
    /// Propeller rpm.
    pub rpm: f64,
    /// Whether a small change of rpm dies out.
    pub stable: bool,
    /// Whether it is the one that counts.
    pub chosen: bool,
}

/// All that is known of the fit at one flight point's air.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Fit {
    /// Version of the contract.
    pub spokeshave: u32,
    /// The job's title.
    pub title: String,
    /// The speed range.
    #[serde(flatten)]
    pub envelope: Envelope,
    /// Take-off.
    pub take_off: Option<TakeOff>,
    /// Ceilings, at the flight point's temperature offset.
    pub ceilings: Option<Ceilings>,
    /// What turning the blades would gain at each flight point of the job at which it could gain anything;
    /// empty where it was not asked for.
    pub pitch_worth: Vec<PitchWorth>,
    /// Where propeller and engine agree at rest, blades as drawn.
    pub standing_crossings: Vec<Crossing>,
}
