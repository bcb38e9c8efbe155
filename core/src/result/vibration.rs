//! What a blade vibrates at: names are those of the JSON.

use serde::Serialize;

/// Natural frequencies of one blade clamped at the edge of the hub.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Vibration {
    /// Frequencies by rpm, from rest to the fastest case.
    pub lines: Vec<FrequencyLine>,
    /// Modes that come near a whole number of times a turn in some case.
    pub near: Vec<NearOrder>,
}

/// One natural mode over the rpm.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct FrequencyLine {
    /// What moves.
    pub mode: ModeKind,
    /// Number of the mode among those of bending or of torsion, from 1.
    pub number: usize,
    /// Propeller rpm.
    pub rpm: Vec<f64>,
    /// Frequency, Hz, at each.
    pub hz: Vec<f64>,
}

impl FrequencyLine {
    /// The mode in two words, short enough to stand at its line.
    #[must_use]
    pub fn words(&self) -> String {
        let nth = match self.number {
            1 => "st",
            2 => "nd",
            3 => "rd",
            _ => "th",
        };
        let mode = match self.mode {
            ModeKind::Flap => "flap",
            ModeKind::Lag => "lag",
            ModeKind::Torsion => "twist",
        };
        format!("{}{nth} {mode}", self.number)
    }
}

/// What moves in a natural mode.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum ModeKind {
    /// Mostly out of the plane of rotation.
    Flap,
    /// Mostly in the plane of rotation.
    Lag,
    /// Twist.
    Torsion,
}

impl ModeKind {
    /// In a few words.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Flap => "bending, mostly out of the disc",
            Self::Lag => "bending, mostly in the disc",
            Self::Torsion => "twist",
        }
    }
}

/// A natural frequency near a whole number of times a turn.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct NearOrder {
    /// The case.
    pub case: String,
    /// What moves.
    pub mode: ModeKind,
    /// Number of the mode.
    pub number: usize,
    /// Frequency there, Hz.
    pub hz: f64,
    /// Times a turn.
    pub order: u32,
    /// Whether it is a turn of the engine, which a gear makes another than the propeller's.
    pub of_engine: bool,
    /// Frequency over that of the order, less 1.
    pub away: f64,
}
