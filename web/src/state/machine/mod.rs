//! The aircraft, the engine and the wood of a job: their figures, and what is picked, added and taken out.

pub mod aircraft;
pub mod engine;
pub mod engine_choice;
pub mod making;
mod place;
mod untouched;
pub mod wood;

pub use aircraft::{AircraftChoice, AircraftFigure, AircraftKind, DragBy};
pub use engine::EngineFigure;
pub use engine_choice::{AltitudeKind, EngineChoice, EngineKind, FuelBy};
pub use making::MakingFigure;
pub use untouched::{aircraft_untouched, engine_untouched};
pub use wood::{WoodChoice, WoodFigure, species_of, wood_of};

use spokeshave::job::Job;

/// What an example has, to start from: of those that have one, the example whose propeller is nearest in
/// size.
fn example_of<T>(job: &Job, part: impl Fn(&Job) -> Option<T>) -> Option<T> {
    let size = |other: &Job| (other.propeller.diameter_m / job.propeller.diameter_m).ln().abs();
    let sized = untouched::EXAMPLES.iter().filter_map(|example| Some((size(example), part(example)?)));
    sized.min_by(|a, b| a.0.total_cmp(&b.0)).map(|(_, part)| part)
}
