//! The page's state and the one reducer ([`State::after`]) that changes it. Nothing here touches the browser: texts
//! and events come in as actions, and what has to be stored or computed is read off the state that comes out.

pub mod action;
pub mod choice;
pub mod drag;
pub mod entry;
pub mod field;
pub mod history;
pub mod machine;
pub mod measure;
pub mod notice;
pub mod opened;
pub mod point_figure;
pub mod readings;
mod reducer;
#[cfg(test)]
mod tests;
#[cfg(test)]
mod tests_machine;
#[cfg(test)]
mod tests_readings;
#[cfg(test)]
mod tests_wood;
pub mod variant;
pub mod wishes;

use std::rc::Rc;

use spokeshave::fit::Along;
use spokeshave::job::{DEMOS, Job};

pub use action::Action;
pub use choice::{Choice, ControlKind, Running, SettingKind};
pub use drag::{Drag, Held, drawn, follows};
pub use entry::{Draft, Drafts, shown_text};
pub use field::Field;
pub use history::History;
pub use machine::{
    AircraftChoice, AircraftFigure, AircraftKind, AltitudeKind, DragBy, EngineChoice, EngineFigure,
    EngineKind, FuelBy, MakingFigure, WoodChoice, WoodFigure, aircraft_untouched, engine_untouched,
    species_of, wood_of,
};
pub use measure::Measure;
pub use notice::Notice;
pub use opened::{Opened, Part};
pub use point_figure::PointFigure;
pub use readings::{BladeFigure, CarvedChoice, LogFigure, LogbookChoice, between_stations};
pub use variant::{Beside, Variant, Variants};
pub use wishes::{LimitFigure, RpmBound};

use notice::refused;

use crate::units::Units;

/// A job to start from: a plain two-blade propeller of one pitch.
pub const BLANK: &str = include_str!("blank.json");

/// Colours of the page.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, serde::Serialize, serde::Deserialize)]
pub enum Theme {
    /// As the device says.
    #[default]
    Auto,
    /// Light.
    Light,
    /// Dark.
    Dark,
}

/// The state of the page.
#[derive(Clone, Debug)]
pub struct State {
    /// The job, its past and its future.
    pub history: History,
    /// Flight point selected.
    pub point: usize,
    /// Station selected.
    pub station: usize,
    /// Texts that are not part of the job.
    pub drafts: Drafts,
    /// A drag that has begun.
    pub drag: Option<Drag>,
    /// Stations on either side that follow a drag.
    pub follow: usize,
    /// Units shown.
    pub units: Units,
    /// Whether the user picked the units.
    pub units_picked: bool,
    /// What the departure map follows.
    pub along: Along,
    /// Colours.
    pub theme: Theme,
    /// Something to say.
    pub notice: Option<Notice>,
    /// The job as it was last opened from or saved as a file.
    pub filed: Option<Rc<Job>>,
    /// Panels that are open.
    pub opened: Opened,
    /// Blades beside the drawn one.
    pub variants: Variants,
}

impl State {
    /// The state with a job.
    #[must_use]
    pub fn new(job: Job) -> Self {
        let units = Units::suiting(job.propeller.diameter_m);
        let (point, station) = places(&job);
        Self {
            history: History::new(job),
            point,
            station,
            drafts: Drafts::new(),
            drag: None,
            follow: 1,
            units,
            units_picked: false,
            along: Along::default(),
            theme: Theme::default(),
            notice: None,
            filed: None,
            opened: Opened::default(),
            variants: Variants::default(),
        }
    }

    /// The state to start with: the job found, else the first example. A job that cannot be read is said. A
    /// page that was saved with a job is a file of that job.
    #[must_use]
    pub fn started(found: Option<&str>, in_file: Option<&str>) -> Self {
        match found.map(Job::from_json) {
            Some(Ok(job)) => {
                let filed = in_file.and_then(|text| Job::from_json(text).ok()).map(Rc::new);
                Self { filed, ..Self::new(job) }
            }
            Some(Err(error)) => {
                let title = "The job kept here cannot be read. It was put aside; an example is shown.";
                Self { notice: Some(refused(title, &error)), ..Self::new(example()) }
            }
            None => Self::new(example()),
        }
    }

    /// The job.
    #[must_use]
    pub fn job(&self) -> &Rc<Job> {
        self.history.job()
    }

    /// Whether the job is as it was last opened from or saved as a file.
    #[must_use]
    pub fn is_filed(&self) -> bool {
        self.filed.as_ref().is_some_and(|filed| filed == self.job())
    }
}

/// The example to start with.
fn example() -> Job {
    // A test of the core reads every example, and one below reads the plain job.
    Job::from_json(DEMOS[0].json).expect("the examples are valid jobs")
}

/// The flight point and the station shown first: the cruise, if one is called so, and the station nearest to
/// three quarters of the radius.
fn places(job: &Job) -> (usize, usize) {
    let off = |f: f64| (f - 0.75).abs();
    let stations = job.propeller.stations.iter().enumerate();
    let near = stations.min_by(|a, b| off(a.1.radius_fraction).total_cmp(&off(b.1.radius_fraction)));
    let cruise = job.flight_points.iter().position(|p| p.name.to_lowercase().contains("cruise"));
    (cruise.unwrap_or(0), near.map_or(0, |(i, _)| i))
}
