//! Spokeshave fits a propeller to one particular aircraft and engine, and shows how far each station of the
//! blade departs from its angle of best lift-to-drag.
//!
//! One direction: job file → [`job::Job`] → [`rig::Rig`] → computation ([`rotor`]) → plain results
//! ([`result`]). The library does no input or output and holds no state; angles are radians and units SI
//! inside, the names of results say otherwise (`_deg`).

mod abreast;
pub mod air;
pub mod aircraft;
pub mod bench;
pub mod blade;
pub mod carved;
mod caution;
pub mod change;
pub mod curve;
pub mod dossier;
pub mod drawn;
pub mod drilling;
pub mod engine;
pub mod fit;
pub mod job;
pub mod logbook;
pub mod report;
pub mod result;
pub mod rig;
pub mod rotor;
pub mod section;
pub mod shape;
pub mod sheet;
pub mod wood;

pub use caution::cautions;
