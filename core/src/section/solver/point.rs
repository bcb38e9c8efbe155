//! One point of a polar.

use serde::{Deserialize, Serialize};

/// Whether a point can be relied on.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum State {
    /// The coupled equations hold to the tolerance.
    Converged,
    /// They do not, or the solution is not believable: the figures of the point are void.
    Failed,
    /// They do, but the suction at the nose is more than a laminar bubble there survives: the section has
    /// stalled from the nose and the figures are void.
    Stalled,
}

/// One point of a polar.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
pub struct Solved {
    /// Angle of attack from the chord line, degrees.
    pub alpha_deg: f64,
    /// Lift coefficient; NaN where it failed.
    pub cl: f64,
    /// Drag coefficient.
    pub cd: f64,
    /// Moment coefficient about the quarter chord, nose up positive.
    pub cm: f64,
    /// Transition on the upper side, in chords from the nose along the chord; 1 if it stays laminar.
    pub xtr_upper: f64,
    /// Transition on the lower side.
    pub xtr_lower: f64,
    /// Newton iterations, all attempts together.
    pub iterations: usize,
    /// Root mean square of what the speeds lack at the end.
    pub residual: f64,
    /// Whether the point converged.
    pub state: State,
}

impl Solved {
    /// A point without figures.
    pub(super) fn void(alpha_deg: f64, state: State, iterations: usize, residual: f64) -> Self {
        let none = f64::NAN;
        Self {
            alpha_deg,
            cl: none,
            cd: none,
            cm: none,
            xtr_upper: none,
            xtr_lower: none,
            iterations,
            residual,
            state,
        }
    }
}
