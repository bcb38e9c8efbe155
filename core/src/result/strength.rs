//! Will the blade hold: names are those of the JSON.

use serde::Serialize;

use super::{State, Verdict, Vibration};

/// All that is known of the strength of a job's blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Strength {
    /// Version of the contract.
    pub spokeshave: u32,
    /// The job's title.
    pub title: String,
    /// The material.
    pub material: MaterialUsed,
    /// Weight and balance.
    pub mass: Mass,
    /// What the blade was judged at, in order: flight points, standing start, overspeed.
    pub cases: Vec<CaseResult>,
    /// Stress and margin at the edge of the hub and at the stations, each under the case that is worst
    /// there.
    pub stations: Vec<StressStation>,
    /// Whether blade and hub hold, and what was not judged.
    pub verdict: Verdict,
    /// What decides of the blade; none where no case has an answer.
    pub governing: Option<Governing>,
    /// Natural frequencies and what they meet.
    pub vibration: Vibration,
    /// How far the blade turns under its load at each flight point that has an answer, and what that does to
    /// it.
    pub running: Vec<RunningTwist>,
    /// Bolts and boss, where the job has a hub.
    pub hub: Option<HubResult>,
    /// What was taken for granted.
    pub assumptions: Vec<String>,
}

/// The material and what may be asked of it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct MaterialUsed {
    /// The name for people.
    pub name: String,
    /// The job names no material, so that the program's usual one was taken.
    pub assumed: bool,
    /// Where the values come from.
    pub source: String,
    /// Whether it is wood: only then moisture, grain and knots count.
    pub is_wood: bool,
    /// Moisture content, percent of the dry weight; of no account where it is not wood.
    pub moisture_percent: f64,
    /// Density, kg/m³.
    pub density_kg_m3: f64,
    /// Young's modulus along the blade, Pa.
    pub modulus_pa: f64,
    /// Shear modulus, Pa.
    pub shear_modulus_pa: f64,
    /// Most tension along the blade, Pa.
    pub tension_limit_pa: f64,
    /// How that came about.
    pub tension_reason: String,
    /// Most compression along the blade, Pa.
    pub compression_limit_pa: f64,
    /// How that came about.
    pub compression_reason: String,
    /// Most shear along the grain, Pa.
    pub shear_limit_pa: f64,
    /// How that came about.
    pub shear_reason: String,
}

/// Weight and balance of the blades, from the edge of the hub to the tip.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Mass {
    /// Mass of one blade, kg.
    pub blade_kg: f64,
    /// Mass of all blades, kg; the boss is not in it.
    pub blades_kg: f64,
    /// Distance of a blade's centre of gravity from the axis, m.
    pub centre_m: f64,
    /// Static moment of one blade about the axis, kg m: blades balance where theirs are the same.
    pub static_moment_kg_m: f64,
    /// Moment of inertia of one blade about the axis, kg m².
    pub blade_inertia_kg_m2: f64,
    /// Moment of inertia of all blades about the axis, kg m².
    pub inertia_kg_m2: f64,
    /// Volume of one blade, m³.
    pub volume_m3: f64,
}

/// What sort of case it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
#[non_exhaustive]
pub enum CaseKind {
    /// A flight point of the job.
    FlightPoint,
    /// At rest at full throttle.
    Standing,
    /// Turned faster than any other case.
    Overspeed,
}

/// One condition the blade was judged at.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CaseResult {
    /// Its name.
    pub name: String,
    /// What sort of case it is.
    pub kind: CaseKind,
    /// Whether there is an answer, else why not.
    pub state: State,
    /// Throttled back to the limit rpm.
    pub held: bool,
    /// Its figures; null without an answer.
    pub figures: Option<CaseFigures>,
}

/// Figures of a case.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CaseFigures {
    /// Propeller rpm.
    pub rpm: f64,
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
    /// Thrust of all blades, N.
    pub thrust_n: f64,
    /// Torque of all blades, N m.
    pub torque_n_m: f64,
    /// Centrifugal tension of one blade at the edge of the hub, N.
    pub root_tension_n: f64,
    /// Bending moment of one blade at the edge of the hub forward, N m, after relief by rake and by
    /// deflection.
    pub root_forward_n_m: f64,
    /// Bending moment of one blade at the edge of the hub against the turning, N m, after relief by
    /// deflection.
    pub root_against_n_m: f64,
    /// The same forward of a blade that did not give, relieved by rake alone, N m.
    pub rigid_forward_n_m: f64,
    /// The same against the turning of a blade that did not give, N m.
    pub rigid_against_n_m: f64,
    /// Deflection of the tip forward, m; tension taken into account.
    pub tip_forward_m: Option<f64>,
    /// Deflection of the tip against the turning, m.
    pub tip_against_m: Option<f64>,
    /// Twist of the tip under load, degrees, coarser positive; by the loads of the blade as drawn.
    pub tip_twist_deg: Option<f64>,
    /// Least margin anywhere on the blade: limit over stress, less 1.
    pub margin: f64,
}

/// Which stress decides.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum StressKind {
    /// Pulled along the blade.
    Tension,
    /// Pressed along the blade.
    Compression,
    /// Shear along the grain.
    Shear,
}

impl StressKind {
    /// In a word.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Self::Tension => "tension",
            Self::Compression => "compression",
            Self::Shear => "shear",
        }
    }
}

/// Stress at the edge of the hub or at a station, under the case that is worst there.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StressStation {
    /// Number of the station from the hub, from 1; none at the edge of the hub.
    pub station: Option<usize>,
    /// Radius, m.
    pub radius_m: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Thickness, m.
    pub thickness_m: f64,
    /// Area of the section, m².
    pub area_m2: f64,
    /// Second moment for bending out of the chord line, m⁴.
    pub flat_m4: f64,
    /// Second moment for bending along the chord line, m⁴.
    pub edge_m4: f64,
    /// Least and greatest second moment, m⁴.
    pub principal_m4: [f64; 2],
    /// Angle from the chord line to the axis of the least second moment, degrees.
    pub principal_deg: f64,
    /// Torsion constant, m⁴.
    pub torsion_m4: f64,
    /// The worst case here; the following are of it.
    pub case: Option<String>,
    /// Centrifugal tension, N.
    pub tension_n: Option<f64>,
    /// Bending moment out of the chord line, N m.
    pub flat_n_m: Option<f64>,
    /// Bending moment along the chord line, N m.
    pub edge_n_m: Option<f64>,
    /// Twisting moment, N m.
    pub twisting_n_m: Option<f64>,
    /// Centrifugal stress `N/A`, Pa.
    pub axial_pa: Option<f64>,
    /// Greatest tension along the blade, Pa.
    pub tension_pa: Option<f64>,
    /// Greatest compression along the blade, Pa.
    pub compression_pa: Option<f64>,
    /// Greatest shear, Pa.
    pub shear_pa: Option<f64>,
    /// Which stress decides.
    pub kind: Option<StressKind>,
    /// Least margin: limit over stress, less 1.
    pub margin: Option<f64>,
    /// Thickness that is missing here, m, rounded up to a tenth of a millimetre, so that every margin comes
    /// to nothing with all that is missing elsewhere, the blade's own weight and stiffness taken into
    /// account, the air's load as it is; none where nothing is missing or twice the thickness does not do.
    pub thicker_m: Option<f64>,
}

/// What decides about the blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Governing {
    /// The case.
    pub case: String,
    /// Number of the station from the hub, from 1; none at the edge of the hub.
    pub station: Option<usize>,
    /// Radius, m.
    pub radius_m: f64,
    /// Which stress.
    pub kind: StressKind,
    /// The stress, Pa.
    pub stress_pa: f64,
    /// Its limit, Pa.
    pub limit_pa: f64,
    /// How the limit came about.
    pub reason: String,
    /// Limit over stress, less 1; below zero the blade is over the limit.
    pub margin: f64,
    /// In words: what holds as far as it was judged, or what would restore the margin; margins are limit
    /// over stress, less 1.
    pub sentence: String,
}

/// The blade turned by its own load at a flight point.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct RunningTwist {
    /// The flight point.
    pub flight_point: String,
    /// Times that load and twist were worked out in turn.
    pub passes: u32,
    /// Whether they agree within 0.01°.
    pub settled: bool,
    /// Rpm of the blade as drawn.
    pub drawn_rpm: f64,
    /// Rpm of the blade as it runs.
    pub running_rpm: Option<f64>,
    /// By station.
    pub stations: Vec<RunningStation>,
}

/// One station as it runs.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct RunningStation {
    /// Radius, m.
    pub radius_m: f64,
    /// How far it is turned by the load, degrees, coarser positive.
    pub twist_deg: f64,
    /// Departure of the blade as drawn, degrees.
    pub drawn_departure_deg: Option<f64>,
    /// Departure of the blade as it runs, degrees.
    pub running_departure_deg: Option<f64>,
}

/// Bolts and boss under the case that asks most of each.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct HubResult {
    /// Greatest torque of any case, N m.
    pub torque_n_m: f64,
    /// What one bolt would carry of it with no friction at all, N.
    pub bolt_force_n: f64,
    /// That force over bolt diameter and boss thickness, Pa.
    pub bearing_pa: f64,
    /// Most bearing stress, Pa: that against crushing across the grain, repeated load taken into account.
    pub bearing_limit_pa: f64,
    /// Greatest pull of a blade on the boss, N.
    pub pull_n: f64,
    /// That pull over the boss's section through the axis, holes taken out, Pa; none for other than one or
    /// two blades.
    pub boss_tension_pa: Option<f64>,
    /// Most tension, Pa.
    pub boss_limit_pa: f64,
    /// Pressure of the plates by the bolts' tightening, Pa; none where no torque is given.
    pub clamp_pa: Option<f64>,
    /// Most steady pressure across the grain, Pa: what 19 pieces in 20 bear.
    pub clamp_limit_pa: f64,
    /// Torque per nut that reaches this pressure, N m.
    pub most_bolt_torque_n_m: f64,
    /// Torque that friction of one plate carries over the greatest torque; none where no bolt torque is
    /// given.
    pub friction_share: Option<f64>,
    /// How much farther the holes reach than the boss can hold, m; none where they fit.
    pub past_boss_m: Option<f64>,
    /// Least margin of those above that apply: limit over stress, less 1; where the holes do not fit, the
    /// boss's radius over the one they need, less 1, too.
    pub margin: f64,
}
