//! Why a blade cannot be shaped as asked.

use thiserror::Error;

use crate::blade::BladeError;
use crate::job::Problem;
use crate::result::State;

/// Why a blade cannot be shaped as asked.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum ShapeError {
    /// There is no such flight point.
    #[error("flight point {0}: the job has no such point")]
    NoPoint(usize),
    /// There is no flight point of this name.
    #[error("flight point \"{0}\": the job has no such point")]
    NoPointNamed(String),
    /// A figure that a flight point does not have.
    #[error("{name}: {why}")]
    Aim {
        /// The flight point.
        name: String,
        /// Why.
        why: &'static str,
    },
    /// Nothing is free.
    #[error("diameter, pitch, twist and chord are all held: there is nothing to search")]
    AllHeld,
    /// No blade within the spans of the search keeps all limits.
    #[error("no blade within limits was found. The nearest one fails at this: {nearest}")]
    NoneWithinLimits {
        /// The limit most in the way, and by how much.
        nearest: String,
    },
    /// A limit that no blade can keep.
    #[error("no blade can keep this limit. {limit} {why}")]
    Impossible {
        /// The limit, with the nearest any blade can come and by how much that is off.
        limit: String,
        /// What is in the way.
        why: String,
    },
    /// No flight point has a weight.
    #[error("weights: no flight point counts; at least one needs a weight above 0, and none below 0")]
    NoWeight,
    /// A flight point that counts has no answer.
    #[error("{name}: {}", state.sentence())]
    NoAnswer {
        /// The flight point.
        name: String,
        /// Why.
        state: State,
    },
    /// A flight point that counts has an answer as drawn, but none with the angles found.
    #[error("{name}: with the angles that are best for all that counts there is no answer. {}", state.sentence())]
    NoneSo {
        /// The flight point.
        name: String,
        /// Why.
        state: State,
    },
    /// No station carries its best lift.
    #[error(
        "no station of the blade can carry the lift of its best angle at {name}: the chords are too wide \
         for this speed and rpm"
    )]
    NoStation {
        /// The first flight point that counts.
        name: String,
    },
    /// Least induced loss at rest.
    #[error("{name}: the airspeed is 0; a blade of least induced loss needs a flight point with a speed")]
    AtRest {
        /// The flight point.
        name: String,
    },
    /// More thrust than there is.
    #[error(
        "{asked_n:.1} N of thrust cannot be had at this speed, rpm and diameter: at most about {most_n:.1} N"
    )]
    Unattainable {
        /// Thrust asked for, N.
        asked_n: f64,
        /// Most thrust, N.
        most_n: f64,
    },
    /// A figure of the task is not allowed.
    #[error("{name}: {found}; allowed is {allowed}")]
    Figure {
        /// Which.
        name: &'static str,
        /// What was found.
        found: f64,
        /// What is allowed.
        allowed: &'static str,
    },
    /// A section lifts nowhere.
    #[error("the section at {radius_m:.3} m has no angle of best lift-to-drag")]
    NoLift {
        /// Radius, m.
        radius_m: f64,
    },
    /// The method did not come to rest.
    #[error(
        "the method did not come to rest: the speed, rpm and power asked for are too far from those of any propeller"
    )]
    NotConverged,
    /// The blade found is not one a job may have.
    #[error("the blade found cannot be kept: {}", .0.iter().map(ToString::to_string).collect::<Vec<_>>().join("; "))]
    Refused(Vec<Problem>),
    /// A propeller that the job's check refuses.
    #[error(transparent)]
    Blade(#[from] BladeError),
}
