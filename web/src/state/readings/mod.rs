//! What was measured on the carved blades and read in ground runs and flights: figures to type, choices to
//! make.

mod blade;
mod choice;
mod log;

pub use blade::{BladeFigure, between_stations};
pub use choice::{CarvedChoice, LogbookChoice};
pub use log::LogFigure;
