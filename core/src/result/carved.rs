//! The propeller as carved, and what can be put right.

use serde::Serialize;

use super::Brief;
use crate::job::AngleReference;

/// Where a figure of a carved blade comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Known {
    /// Read there.
    Measured,
    /// The difference from the drawing is interpolated between readings.
    Interpolated,
    /// Beyond the readings the difference of the outermost is held.
    Held,
    /// Never read on this blade: as drawn.
    AsDrawn,
    /// The blade has no readings: the mean of the others.
    OtherBlades,
}

impl Known {
    /// A few plain words.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Measured => "measured",
            Self::Interpolated => "between readings",
            Self::Held => "beyond the readings",
            Self::AsDrawn => "not read, as drawn",
            Self::OtherBlades => "not read, mean of the other blades",
        }
    }
}

/// The carved blades.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Carved {
    /// Version of the contract.
    pub spokeshave: u32,
    /// The job's title.
    pub title: String,
    /// What the angles were read on.
    pub angle_reference: AngleReference,
    /// The blades.
    pub blades: Vec<CarvedBlade>,
    /// Flight points, drawn and carved.
    pub flight_points: Vec<CarvedPoint>,
    /// Static balance.
    pub balance: StaticBalance,
    /// Whether the carved blades hold; `None` where the job names no wood or no case has an answer.
    pub strength: Option<CarvedStrength>,
    /// Readings that are hard to believe.
    pub doubts: Vec<Doubt>,
}

/// The least margin of strength of the carved blades: limit over stress less 1.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CarvedStrength {
    /// The blade with the least, from 1.
    pub blade: usize,
    /// The case in which it has it.
    pub case: String,
    /// Its margin.
    pub margin: f64,
    /// That of the blade as drawn.
    pub drawn_margin: Option<f64>,
}

/// One carved blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CarvedBlade {
    /// Its number, from 1.
    pub blade: usize,
    /// How many readings it has.
    pub readings: usize,
    /// By radius.
    pub stations: Vec<CarvedStation>,
}

/// A carved figure with its differences.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Read {
    /// As carved.
    pub carved: f64,
    /// Carved less drawn.
    pub from_drawn: f64,
    /// This blade less the mean of the blades.
    pub from_mean: f64,
    /// Where it comes from.
    pub known: Known,
}

/// One blade at one radius.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CarvedStation {
    /// Radius, m.
    pub radius_m: f64,
    /// Radius over tip radius.
    pub radius_fraction: f64,
    /// Blade angle to the chord line, degrees.
    pub angle_deg: Read,
    /// Blade angle on the flat face, degrees; `None` without one.
    pub face_angle_deg: Option<f64>,
    /// Chord, m.
    pub chord_m: Read,
    /// Greatest thickness, m.
    pub thickness_m: Read,
    /// How far it lies ahead of the plane of the hub, m, where it was read.
    pub track_m: Option<f64>,
}

/// A flight point with the drawn and the carved propeller.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct CarvedPoint {
    /// As drawn.
    pub drawn: Brief,
    /// The propeller of mean carved blades.
    pub carved: Brief,
    /// Load of each blade.
    pub blades: Vec<LoadOf>,
    /// What shakes once per turn; `None` without an answer, or with one blade.
    pub once_per_turn: Option<OncePerTurn>,
    /// Departures by radius.
    pub stations: Vec<StationDeparture>,
}

/// What the air does to one blade.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct LoadOf {
    /// Thrust, N.
    pub thrust_n: f64,
    /// Torque, N m.
    pub torque_n_m: f64,
    /// Moment of the thrust about the hub, N m.
    pub bending_n_m: f64,
    /// Force in the plane of rotation, N.
    pub drag_n: f64,
}

/// What unequal blades do to the shaft once per turn.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct OncePerTurn {
    /// Moment across the shaft by unequal thrust, N m.
    pub moment_n_m: f64,
    /// Force across the shaft by unequal drag of the blades, N.
    pub air_force_n: f64,
    /// Force across the shaft by unequal masses, N: unbalance times the square of the speed of rotation;
    /// `None` where chord and thickness were not read on every blade.
    pub mass_force_n: Option<f64>,
    /// Moment across the shaft by blades whose masses lie ahead of one another, N m; `None` where no track
    /// was read.
    pub track_moment_n_m: Option<f64>,
}

/// Departures at one radius, degrees.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StationDeparture {
    /// Radius, m.
    pub radius_m: f64,
    /// As drawn.
    pub drawn_deg: Option<f64>,
    /// Of each blade.
    pub blades_deg: Vec<Option<f64>>,
}

/// Static balance by the blades' shapes.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct StaticBalance {
    /// Density of the wood, kg/m³.
    pub density_kg_m3: f64,
    /// Whether the job gives it; otherwise it is a usual one.
    pub density_given: bool,
    /// Whether chord or thickness was read on every blade. Otherwise the masses are those of the drawing or
    /// of other blades, and the balance tells nothing of the wood.
    pub read: bool,
    /// Each blade.
    pub blades: Vec<MassOf>,
    /// Unbalance, kg m.
    pub unbalance_kg_m: f64,
    /// The blade that sinks, from 1.
    pub heavy_blade: Option<usize>,
    /// The same as a mass at the tip, g.
    pub grams_at_tip: f64,
}

impl StaticBalance {
    /// Which blade sinks, in a few words.
    #[must_use]
    pub fn says(&self) -> String {
        match self.heavy_blade {
            _ if !self.read => {
                "not known, for neither chord nor thickness was read on every blade; hang it up".into()
            }
            Some(blade) if self.grams_at_tip >= LEAST_GRAMS => {
                format!("blade {blade} sinks, as by {:.2} g at the tip", self.grams_at_tip)
            }
            _ => "by the readings it hangs level".into(),
        }
    }
}

/// What is nothing to a balance, g.
const LEAST_GRAMS: f64 = 0.005;

/// Where wood that is taken off for balance is thought to lie, as a share of the tip radius.
const BALANCE_AT: f64 = 0.75;
/// What is nothing to a blade's margin.
const LEAST_MARGIN: f64 = 0.01;

impl RemovalPlan {
    /// What the cuts do to balance and strength, and what to do about it, a sentence each.
    #[must_use]
    pub fn warns(&self, before: &Carved) -> Vec<String> {
        let mut all = Vec::new();
        let (was, is) = (&before.balance, &self.after.balance);
        if let (true, Some(heavy)) = (is.read && is.grams_at_tip >= LEAST_GRAMS, is.heavy_blade) {
            let worse = if is.grams_at_tip > was.grams_at_tip {
                format!(
                    "The cuts make the balance worse, from {:.2} to {:.2} g at the tip. ",
                    was.grams_at_tip, is.grams_at_tip
                )
            } else {
                String::new()
            };
            all.push(format!(
                "{worse}Then take about {:.1} g more off the back of blade {heavy} round three quarters of the radius, evenly and a little at a time, and hang it up again.",
                is.grams_at_tip / BALANCE_AT
            ));
        }
        if let (Some(was), Some(is)) = (&before.strength, &self.after.strength)
            && is.margin < was.margin - LEAST_MARGIN
        {
            all.push(format!(
                "The cuts take strength: the least margin falls from {:.0} to {:.0} %.",
                100.0 * was.margin,
                100.0 * is.margin
            ));
        }
        all
    }
}

impl CarvedStrength {
    /// Whether it holds, in a sentence.
    #[must_use]
    pub fn says(&self) -> String {
        let drawn = self.drawn_margin.map_or_else(String::new, |m| format!("; {:.0} % as drawn", 100.0 * m));
        if self.margin < 0.0 {
            format!(
                "Not strong enough: blade {} has a margin of {:.0} % in the case {}{drawn}. Do not run it.",
                self.blade,
                100.0 * self.margin,
                self.case
            )
        } else {
            format!(
                "Strength in hand by its measured sizes: {:.0} %, blade {} in the case {}{drawn}.",
                100.0 * self.margin,
                self.blade,
                self.case
            )
        }
    }
}

/// Mass of one blade outside the hub.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct MassOf {
    /// Mass, kg.
    pub mass_kg: f64,
    /// Mass moment about the axis, kg m.
    pub moment_kg_m: f64,
}

/// A reading that is hard to believe.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Doubt {
    /// Blade, from 1.
    pub blade: usize,
    /// Its number among the readings of the blade, from 1.
    pub reading: usize,
    /// Radius, m.
    pub radius_m: f64,
    /// What it is about, and the likely cause.
    pub message: String,
    /// Whether it counts all the same, for it was confirmed; otherwise it is left out.
    pub counted: bool,
}

/// What to take off, and what comes of it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct RemovalPlan {
    /// The flight point at which departure is restored.
    pub flight_point: String,
    /// By blade and radius.
    pub blades: Vec<PlannedBlade>,
    /// The propeller as the plan leaves it.
    pub after: Carved,
}

/// What to take off one blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PlannedBlade {
    /// Its number, from 1.
    pub blade: usize,
    /// By radius.
    pub stations: Vec<PlannedStation>,
}

/// What to take off at one radius of one blade. Nothing is ever added.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PlannedStation {
    /// Radius, m.
    pub radius_m: f64,
    /// Depth off the face at the leading edge, falling to nothing at the trailing edge, m.
    pub face_leading_m: f64,
    /// Depth off the face at the trailing edge, falling to nothing at the leading edge, m.
    pub face_trailing_m: f64,
    /// Depth off the back at the thickest place, fading to the edges, m.
    pub back_m: f64,
    /// Off the trailing edge, after the face, m.
    pub trailing_edge_m: f64,
    /// Chord that planing the face takes off the edges by itself, m.
    pub chord_lost_m: f64,
    /// Least and greatest angle to the chord line that planing reaches within the limits, degrees.
    pub reachable_deg: (f64, f64),
    /// The angle that would restore departure, degrees.
    pub wanted_deg: f64,
    /// The angle after the plan, degrees.
    pub angle_deg: f64,
    /// The same on the flat face, degrees.
    pub face_angle_deg: Option<f64>,
    /// Chord after the plan, m.
    pub chord_m: f64,
    /// Thickness after the plan, m.
    pub thickness_m: f64,
    /// Whether there is a flat face to plane.
    pub has_face: bool,
    /// Whether the blade's angle was read here or on both sides of here. Where it was not, the face is not
    /// turned.
    pub read: bool,
}

impl PlannedStation {
    /// What keeps it from being put right, in a few words; empty where nothing does.
    #[must_use]
    pub fn note(&self) -> &'static str {
        match (self.read, self.has_face) {
            (false, _) => "not read, so not turned",
            (true, false) => "no flat face, so not turned",
            (true, true) => "",
        }
    }
}

impl Doubt {
    /// Where it is and what it is about.
    #[must_use]
    pub fn says(&self) -> String {
        format!("blade {}, {:.1} mm: {}", self.blade, 1e3 * self.radius_m, self.message)
    }
}
