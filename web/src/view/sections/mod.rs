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

use spokeshave::result::PointResult;
use yew::prelude::*;

use super::Seen;
use crate::app::RigRef;
use crate::state::State;
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
    html! {
        <div class="sections">
            <Used state={props.state.clone()} rig={props.rig.clone()} />
            <Maker state={props.state.clone()} {reynolds} {thickness} />
            <Import />
        </div>
    }
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
