//! Why polars could not be made.

use crate::section::outline::short;
use thiserror::Error;

use crate::section::outline::OutlineError;
use crate::section::polar::FEWEST_POINTS;
use crate::section::solver::SolverError;

/// Why polars could not be made.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum MakeError {
    /// Something asked for is outside its range.
    #[error("{what} {}: {least} to {most} is allowed", short(*found))]
    Request {
        /// What.
        what: &'static str,
        /// Its value.
        found: f64,
        /// Least value.
        least: f64,
        /// Largest value.
        most: f64,
    },
    /// A list that must rise does not.
    #[error("{what}: {after} follows {before}; each must be above the one before")]
    Order {
        /// Which list.
        what: &'static str,
        /// A value.
        before: f64,
        /// The one after it.
        after: f64,
    },
    /// The outline cannot be drawn as asked.
    #[error("{0}")]
    Outline(#[from] OutlineError),
    /// The solver refused, or was stopped.
    #[error("{0}")]
    Solver(#[from] SolverError),
    /// No polar has enough points.
    #[error(
        "no polar has {FEWEST_POINTS} points that converged ({converged} of {tried} points did): nothing to \
         make a table of"
    )]
    NoTable {
        /// Points that converged.
        converged: usize,
        /// Points tried.
        tried: usize,
    },
}
