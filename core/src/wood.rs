//! Will the blade hold: material, real sections, loads, stress, vibration, weight.
//!
//! The blade is a slender beam clamped at the hub, its sections threaded at their centroids on a straight line that may lean
//! forward by a rake. [`beam`] is plain mathematics on arrays; [`section`] measures the outline; the rest puts a job's blade through both.

pub mod beam;
mod blade;
mod mass;
mod material;
mod moisture;
pub mod section;
mod species;

pub use blade::{BladeBeam, WoodError};
pub use mass::mass;
pub use material::{Material, Strength, material};
pub use moisture::at_moisture;
pub use species::{Kind, SPECIES, Species};
