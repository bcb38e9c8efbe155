//! From a job to a better blade: a variant beside the drawn one, never over it.
//!
//! Angles alone at best incidence ([`twist()`]); chord and angle of least induced loss ([`least_loss()`]);
//! what an error costs ([`error_costs`]); figures over pitch and diameter ([`pitch_diameter`]). Strength is
//! not judged here: a blade that comes out thinner or narrower than a proven one needs its own check of
//! strength.

pub mod adkins_liebeck;
mod brief;
mod chart;
mod cost;
mod error;
mod least_loss;
mod limits;
mod search;
mod twist;
mod variant;
mod wood_size;

pub use brief::{brief, briefs, figure_at};
pub use chart::{MOST_CHART_STEPS, PitchBy, pitch_diameter, sized};
pub use cost::error_costs;
pub use error::ShapeError;
pub use least_loss::{Lift, LossTask, least_loss};
pub use limits::kept;
pub use search::{FREE, Listener, Progress, Wish, search, usual_aims};
pub(crate) use twist::LEAST_FACTOR;
pub use twist::{TwistBy, twist, twist_by};

use crate::job::Job;

/// A shaped blade: the whole job with it, and what is known of it.
#[derive(Clone, Debug, PartialEq)]
pub struct Shaped<T> {
    /// The job with the shaped propeller.
    pub job: Job,
    /// What is known of it.
    pub result: T,
}
