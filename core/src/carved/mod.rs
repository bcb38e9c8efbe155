//! The propeller as carved: what was measured, how far it is from the drawing, what it does, and what can be
//! put right.
//!
//! Readings of blade angle, chord and thickness by blade and radius stand in the job (`carved`) or come as a
//! sheet ([`import`]). Between readings, and where one is missing, the *difference from the drawing* is
//! interpolated by a monotone cubic over the radius and held beyond the outermost readings; a blade without
//! any reading is taken as the mean of the others. What is hard to believe ([`doubts`]) is left out until it
//! is confirmed. The propeller of mean blades is matched with engine and aircraft like the drawn one; each
//! blade's own load is worked out in the flow of that ([`crate::rotor::Rotor::blade_loads`]).
//!
//! What can be put right is in [`plan()`]: wood only comes off.

mod balance;
mod doubt;
mod even;
pub mod import;
mod load;
mod measured;
mod piece;
mod plan;
mod plane;

pub use doubt::doubts;
pub use import::{angle_of, minutes_fault};
pub use load::{analyse, analysed, mean_rig};
pub use measured::{Measured, Size};
pub use plan::{plan, planed, planing, usual_point};
pub use plane::{Cuts, Profile, Slab};

use thiserror::Error;

use crate::job::Problem;
use crate::shape::ShapeError;
use crate::wood::WoodError;

/// Why there is no answer about the carved blades.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum CarvedError {
    /// No readings.
    #[error("the job has no readings of carved blades: key carved")]
    NoReadings,
    /// Readings of which none is believed.
    #[error(
        "every reading is hard to believe and none is confirmed: mend them, or confirm those that are \
         right. {}",
        .0.join("; ")
    )]
    NoneBelieved(Vec<String>),
    /// A flight point without an answer for the drawn blade.
    #[error("{0} has no answer with the drawn blade; the removals are judged at a flight point that has one")]
    NoAnswer(String),
    /// A blade without readings, beside which no other may be cut.
    #[error(
        "blade {0} has no reading that counts: read every blade before one is cut, for a blade cut alone \
         may be set farther from the others"
    )]
    Unread(usize),
    /// The carved blade is not one a job may have.
    #[error(
        "the readings give a blade that cannot be: {}",
        .0.iter().map(ToString::to_string).collect::<Vec<_>>().join("; ")
    )]
    Refused(Vec<Problem>),
    /// The same, found in the blade itself.
    #[error(transparent)]
    Shape(#[from] ShapeError),
    /// The wood is not known.
    #[error(transparent)]
    Wood(#[from] WoodError),
}
