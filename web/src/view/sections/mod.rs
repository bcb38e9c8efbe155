//! Sections: the tables a blade uses and where they come from, polars made of an outline, measured tables.

pub(in crate::view) mod boxes;
mod carved;
mod charts;
mod drawing;
mod form;
mod import;
mod maker;
mod progress;
mod used;

use std::rc::Rc;

use spokeshave::job::{Job, Section};
use spokeshave::result::PointResult;
use spokeshave::section::library;
use yew::prelude::*;

use crate::act::{Act, Seen};
use crate::results::RigRef;
use crate::state::{Action, Choice, Running, State};
use import::Import;
use maker::Maker;
use used::Used;

/// Properties of [`Sections`].
#[derive(Properties, PartialEq)]
pub struct SectionsProps {
    /// The state.
    pub state: Seen,
    /// The job made ready.
    pub rig: Option<RigRef>,
    /// Every flight point worked out.
    pub points: Vec<Rc<Option<PointResult>>>,
}

/// What the panel holds.
#[component]
pub fn Sections(props: &SectionsProps) -> Html {
    let reynolds: Vec<f64> = over_stations(props).map(|s| s.reynolds).collect();
    let thickness: Vec<f64> =
        props.state.job().propeller.stations.iter().map(|s| s.thickness_ratio).collect();
    // The section whose tables are shown: the one picked, or the one that joined last.
    let picked = use_state_eq(|| None::<String>);
    let onpick = {
        let picked = picked.setter();
        Callback::from(move |name| picked.set(Some(name)))
    };
    html! {
        <div class="sections">
            <Used state={props.state.clone()} rig={props.rig.clone()} picked={(*picked).clone()}
                onpick={onpick.clone()} />
            <Maker state={props.state.clone()} {reynolds} {thickness} onjoin={onpick.clone()} />
            <Import state={props.state.clone()} onjoin={onpick} />
        </div>
    }
}

/// Why a section of one's own cannot have a name: a family that comes with the program has it.
fn taken(name: &str) -> Option<String> {
    let mut names = library().names();
    let why = || format!("“{name}” is one of the program’s own sections: give yours another name.");
    names.any(|shipped| shipped == name).then(why)
}

/// Joins a section to the job. Says what it replaces and where a station can take it.
///
/// # Errors
/// Why the job cannot take it.
fn join(act: &Act, job: &Job, section: Section) -> Result<String, String> {
    let (name, choice) = (section.name.clone(), Choice::JoinSection(Box::new(section)));
    choice.made(job, Running::default())?;
    act.send(Action::Choose(choice, Running::default()));
    Ok(joined(job, &name))
}

fn joined(job: &Job, name: &str) -> String {
    let replaced = if job.sections.iter().any(|own| own.name == name) {
        format!(" “{name}” replaced the one of that name; Undo brings it back.")
    } else {
        String::new()
    };
    format!("{replaced} Pick it under Blade → Section.")
}

fn over_stations(props: &SectionsProps) -> impl Iterator<Item = &spokeshave::result::StationResult> {
    props.points.iter().filter_map(|p| p.as_ref().as_ref()).flat_map(|p| &p.stations)
}

/// The sections in a line.
#[must_use]
pub fn in_a_line(state: &State) -> String {
    let job = state.job();
    let mut names: Vec<&str> = job.propeller.stations.iter().map(|s| s.section.as_str()).collect();
    names.dedup();
    names.sort_unstable();
    names.dedup();
    let own = match job.sections.len() {
        0 => String::new(),
        1 => "; 1 of the job's own".into(),
        n => format!("; {n} of the job's own"),
    };
    format!("{}{own}", names.join(", "))
}

/// Whether the panel shows the same.
#[must_use]
pub fn same(a: &State, b: &State) -> bool {
    let used = |s: &State| -> Vec<(String, u64)> {
        let stations = s.job().propeller.stations.iter();
        stations.map(|s| (s.section.clone(), s.thickness_ratio.to_bits())).collect()
    };
    a.job().sections == b.job().sections
        && a.job().method.n_crit == b.job().method.n_crit
        && a.station == b.station
        && used(a) == used(b)
}
