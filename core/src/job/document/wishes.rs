//! What a search for the best blade is asked for.

use serde::{Deserialize, Serialize};

/// What a search for the best blade is asked for.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, default)]
pub struct Wishes {
    /// What counts, weighted; without any, each flight point by what it is for.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    pub aims: Vec<Aim>,
    /// Limits of the finished propeller.
    #[serde(skip_serializing_if = "Limits::is_none")]
    pub limits: Limits,
    /// What stays as drawn.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    pub held: Vec<Held>,
}

/// What a flight point is judged by.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Aim {
    /// Name of the flight point.
    pub flight_point: String,
    /// The figure.
    pub figure: Figure,
    /// Its weight, above 0.
    #[serde(default = "one")]
    pub weight: f64,
}

/// A figure of a flight point by which blades are told apart.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "snake_case")]
pub enum Figure {
    /// True airspeed, m/s; of top speed.
    AirspeedMS,
    /// Propeller rpm.
    Rpm,
    /// Thrust of one propeller, N.
    ThrustN,
    /// Shaft power of one propeller, W.
    PowerW,
    /// `T V/P`.
    Efficiency,
    /// Rate of climb, m/s.
    RateOfClimbMS,
    /// How long fuel or battery last, s.
    EnduranceS,
    /// Take-off distance to 15 m, m.
    TakeOffM,
    /// Helical Mach number of the tip, for its noise.
    TipMach,
}

/// Limits of the finished propeller; what is not given is no limit.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields, default)]
pub struct Limits {
    /// Greatest propeller rpm at any flight point.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub rpm_most: Option<f64>,
    /// Propeller rpm by flight point.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    pub rpm: Vec<RpmLimit>,
    /// Least propeller rpm standing at full throttle.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub standing_rpm_least: Option<f64>,
    /// Greatest helical Mach number of the tip at any flight point.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub tip_mach_most: Option<f64>,
    /// Greatest diameter, m.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub diameter_most_m: Option<f64>,
    /// Height of the shaft above the ground, m; with `ground_clearance_m` it limits the diameter.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub shaft_height_m: Option<f64>,
    /// What is to be left between tip and ground, m.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub ground_clearance_m: Option<f64>,
    /// Greatest width of the blank that blades and boss need in the plane of rotation, m, nothing left over.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub blank_width_most_m: Option<f64>,
    /// Greatest thickness of the blank that blades and boss need along the axis, m, nothing left over.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub blank_depth_most_m: Option<f64>,
    /// Least stress margin anywhere on the blade, limit over stress less 1; only where the job names its
    /// wood.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub stress_margin_least: Option<f64>,
}

/// Limits of rpm at one flight point.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct RpmLimit {
    /// Name of the flight point.
    pub flight_point: String,
    /// Least propeller rpm.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub least: Option<f64>,
    /// Greatest propeller rpm.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub most: Option<f64>,
}

/// What a search may leave as drawn.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(rename_all = "kebab-case")]
pub enum Held {
    /// The diameter.
    Diameter,
    /// The angle of the blade as a whole.
    Pitch,
    /// How the angle runs along the blade.
    Twist,
    /// Chords, but for the scale of the diameter.
    Chord,
}

impl Wishes {
    /// What is wished for at a flight point goes along with its new name.
    pub fn rename_point(&mut self, from: &str, to: &str) {
        let aims = self.aims.iter_mut().map(|aim| &mut aim.flight_point);
        let limits = self.limits.rpm.iter_mut().map(|limit| &mut limit.flight_point);
        aims.chain(limits).filter(|name| *name == from).for_each(|name| to.clone_into(name));
    }

    /// What is wished for at a flight point goes with it.
    pub fn forget_point(&mut self, name: &str) {
        self.aims.retain(|aim| aim.flight_point != name);
        self.limits.rpm.retain(|limit| limit.flight_point != name);
    }
}

impl Limits {
    /// Whether there is no limit.
    #[must_use]
    pub fn is_none(&self) -> bool {
        *self == Self::default()
    }

    /// The greatest diameter, m, by itself and by the ground.
    #[must_use]
    pub fn greatest_diameter_m(&self) -> Option<f64> {
        let left = self.shaft_height_m.map(|h| 2.0 * (h - self.ground_clearance_m.unwrap_or(0.0)));
        [self.diameter_most_m, left].into_iter().flatten().reduce(f64::min)
    }
}

fn one() -> f64 {
    1.0
}
