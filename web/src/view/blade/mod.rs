//! The Blade panel: the propeller's own figures, the table of stations, the curves.

pub mod head;
pub mod row;
pub mod settings;
pub mod table;

use spokeshave::job::{AngleReference, Job, Section};
use spokeshave::section::library;
use yew::AttrValue;

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

/// A section as it stands in a list.
#[derive(Clone, Debug, PartialEq)]
pub struct SectionOption {
    /// Its name in the job file.
    pub name: String,
    /// Its title.
    pub words: AttrValue,
    /// Whether it cannot be picked: angles are measured on a flat face, and it has none.
    pub off: bool,
}

/// The sections a station may have.
#[must_use]
pub fn section_options(job: &Job) -> Vec<SectionOption> {
    let on_face = job.propeller.angle_reference == AngleReference::FlatFace;
    section_names(job)
        .into_iter()
        .map(|name| {
            let own = job.sections.iter().find(|s| s.name == name);
            let has_face = own.map_or_else(|| library().has_face(&name), Section::has_face);
            let title = if own.is_some() { None } else { library().title(&name) };
            // A title begins with the family's name; what follows a comma is said in the Sections panel.
            let title = title.map_or(name.as_str(), |t| t.split(", flat face").next().unwrap_or(t));
            let off = on_face && !has_face;
            let words = if off { format!("{title} (no flat face)") } else { title.to_string() };
            SectionOption { words: words.into(), off, name }
        })
        .collect()
}

/// Names of the sections a station may have: the job's own, then those that come with the program.
#[must_use]
pub fn section_names(job: &Job) -> Vec<String> {
    let own = job.sections.iter().map(|s| s.name.clone());
    let shipped = library().names().map(str::to_string);
    let mut names: Vec<String> = own.collect();
    names.extend(shipped.filter(|n| !job.sections.iter().any(|s| s.name == *n)));
    names
}
