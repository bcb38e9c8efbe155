//! The propeller as carved.

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
pub(super) const LEAST_GRAMS: f64 = 0.005;

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

impl Doubt {
    /// Where it is and what it is about.
    #[must_use]
    pub fn says(&self) -> String {
        format!("blade {}, {:.1} mm: {}", self.blade, 1e3 * self.radius_m, self.message)
    }
}
