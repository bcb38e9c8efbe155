//! Will the blade hold: material, real sections, loads, stress, vibration, weight.
//!
//! The blade is a slender beam clamped at the hub, its sections threaded at their centroids on the stacking
//! line or beside it, and leaning by a rake. [`beam`] is plain mathematics on arrays; [`section`] measures
//! the outline; the rest puts a job's blade through both.

mod assumptions;
pub mod beam;
mod bent;
mod blade;
mod cases;
mod hub;
mod judged;
mod loads;
mod margin;
mod mass;
mod material;
mod moisture;
mod places;
mod remedy;
pub mod section;
mod species;
mod stands;
mod strength;
mod stress;
mod twist;
mod verdict;
mod vibration;

pub use blade::{BladeBeam, WoodError};
pub use margin::{least_margin, least_margin_like};
pub use mass::mass;
pub use material::is_wood;
pub use material::{Material, Strength, material};
pub use moisture::at_moisture;
pub use places::{Doubt, Place};
pub use remedy::{Say, no_less, sentence};
pub use species::{Kind, SPECIES, Species};
pub use strength::strength;
pub use stress::{Carried, Stresses};
pub use verdict::verdict;
