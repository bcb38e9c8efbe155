//! Spokeshave fits a propeller to one particular aircraft and engine.
pub mod air;
pub mod curve;
pub mod section;
