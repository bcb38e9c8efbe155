//! The Blade panel: the propeller's own figures, the table of stations, the curves.

pub mod head;
pub mod row;
pub mod settings;
pub mod table;

use spokeshave::job::Job;

pub use settings::BladeSettings;
pub use table::StationTable;

use crate::number::with_unit;
use crate::units::{Quantity, Units};

/// The blade in a line.
#[must_use]
pub fn in_a_line(job: &Job, units: Units) -> String {
    let p = &job.propeller;
    let blades = if p.blades == 1 { "1 blade".into() } else { format!("{} blades", p.blades) };
    let across = with_unit(units, Quantity::Length, Some(p.diameter_m));
    format!("{blades}, {across} across, {} stations", p.stations.len())
}

/// The section all stations have; `None` when they differ.
#[must_use]
pub fn one_section(job: &Job) -> Option<&str> {
    let first = job.propeller.stations.first()?.section.as_str();
    job.propeller.stations.iter().all(|s| s.section == first).then_some(first)
}

/// Names of the sections a station may have: the job's own, then those that come with the program.
#[must_use]
pub fn section_names(job: &Job) -> Vec<String> {
    let own = job.sections.iter().map(|s| s.name.clone());
    let shipped = spokeshave::section::library().names().map(str::to_string);
    let mut names: Vec<String> = own.collect();
    names.extend(shipped.filter(|n| !job.sections.iter().any(|s| s.name == *n)));
    names
}
