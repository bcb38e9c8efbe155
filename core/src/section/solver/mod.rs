//! Lift, drag and moment of a section from its outline: potential flow coupled with integral boundary layers.
//!
//! Potential flow by vortices on the outline and sources on outline and wake; two-equation integral boundary
//! layer with a lag equation for the turbulent shear stress; transition where waves have grown by `e^n`
//! (envelope method) or at a trip; the coupled equations by Newton's method, each iteration starting with a
//! quasi-simultaneous march. Angles of attack are swept with each start taken from the neighbour; those that
//! fail are tried once more from their neighbours on both sides.
//!
//! Limits: a single section, Reynolds number 1e4 to 1e8, free-stream Mach number to 0.6 without shocks,
//! trailing edge open by at most 1 % for trustworthy drag. Beyond the angle where the layer leaves the
//! section at once the method has no solution: such points are marked as failed and never filled in. Thin
//! sections (below about 9 %) stall later here than measured at high Reynolds number. The method is
//! deterministic.
//!
//! # References
//! Drela, Giles, AIAA J. 25(10), 1987; Drela, Lecture Notes in Engineering 54, 1989; Veldman, AIAA J. 19(1),
//! 1981.

pub mod alone;
mod attempt;
mod chains;
mod closure;
mod couple;
mod dense;
mod dual;
mod forces;
mod interval;
mod layer;
mod linear;
mod march;
mod mend;
mod point;
mod potential;
mod settings;
mod singularity;
mod spacing;
mod station;
mod sweep;
mod wake;

pub use point::{Solved, State};
pub use settings::{Settings, SolverError, USUAL_NODES};
pub use sweep::{Sweep, sweep};

#[cfg(test)]
mod tests;
