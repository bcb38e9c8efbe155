//! What is asked of the solver, and how it can refuse.

use crate::section::outline::short;
use serde::{Deserialize, Serialize};
use thiserror::Error;

/// Conditions of one polar.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Settings {
    /// Reynolds number on the chord, 1e4 to 1e8.
    pub reynolds: f64,
    /// Mach number of the free stream, 0 to 0.6.
    #[serde(default)]
    pub mach: f64,
    /// Amplification exponent at transition, 1 to 14: 9 for quiet air, 4 for disturbed air.
    pub n_crit: f64,
    /// Trip on the upper side, in chords from the nose; none for free transition.
    #[serde(default)]
    pub trip_upper: Option<f64>,
    /// Trip on the lower side, in chords from the nose; none for free transition.
    #[serde(default)]
    pub trip_lower: Option<f64>,
    /// Nodes on the outline, 80 to 300.
    pub nodes: usize,
}

/// Nodes of a usual polar: 160 and 240 change lift by 0.2 % and drag by 1 %.
pub const USUAL_NODES: usize = 120;

impl Settings {
    /// Free transition in incompressible flow with the usual count of nodes.
    #[must_use]
    pub fn free(reynolds: f64, n_crit: f64) -> Self {
        Self { reynolds, mach: 0.0, n_crit, trip_upper: None, trip_lower: None, nodes: USUAL_NODES }
    }

    /// Checks every figure.
    ///
    /// # Errors
    /// [`SolverError::Setting`] with the figure, its value and what is allowed.
    pub fn check(&self) -> Result<(), SolverError> {
        let within = |what, found: f64, least: f64, most: f64| {
            if (least..=most).contains(&found) {
                Ok(())
            } else {
                Err(SolverError::Setting { what, found, least, most })
            }
        };
        within("reynolds", self.reynolds, 1e4, 1e8)?;
        within("mach", self.mach, 0.0, 0.6)?;
        within("n_crit", self.n_crit, 1.0, 14.0)?;
        within("trip_upper", self.trip_upper.unwrap_or(0.5), 0.0, 1.0)?;
        within("trip_lower", self.trip_lower.unwrap_or(0.5), 0.0, 1.0)?;
        within("nodes", self.nodes as f64, 80.0, 300.0)
    }
}

/// Why a polar cannot be computed at all. A point that does not converge is no error: it is marked.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum SolverError {
    /// A setting outside its range.
    #[error("{what} {}: {least} to {most} is allowed", short(*found))]
    Setting {
        /// Name of the setting.
        what: &'static str,
        /// Its value.
        found: f64,
        /// Least value.
        least: f64,
        /// Largest value.
        most: f64,
    },
    /// The angles asked for are none, too many, or not in order.
    #[error(
        "{count} angles from {first_deg} to {last_deg} degrees: 1 to 400 rising angles within -30 to 30 \
         degrees are allowed"
    )]
    Angles {
        /// How many.
        count: usize,
        /// First of them.
        first_deg: f64,
        /// Last of them.
        last_deg: f64,
    },
    /// The outline gives a singular system.
    #[error("no potential flow can be found about the outline `{name}`")]
    Singular {
        /// Name of the outline.
        name: String,
    },
    /// The caller asked to stop.
    #[error("stopped after {done} of {total} angles")]
    Stopped {
        /// Angles done.
        done: usize,
        /// Angles asked for.
        total: usize,
    },
}
