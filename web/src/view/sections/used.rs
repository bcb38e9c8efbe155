//! The sections of the job: those the blade uses and those of its own, with where their tables come from.

use std::rc::Rc;
use std::sync::Arc;

use spokeshave::section::{Family, section_curves};
use yew::prelude::*;

use super::charts::Charts;
use crate::act::{Seen, use_act};
use crate::form::Pick;
use crate::number::fixed;
use crate::results::RigRef;
use crate::state::{Action, Choice, Running, State};

/// Properties of [`Used`].
#[derive(Properties, PartialEq)]
pub(super) struct UsedProps {
    pub(super) state: Seen,
    pub(super) rig: Option<RigRef>,
    /// Name of the section to show.
    pub(super) picked: Option<String>,
    pub(super) onpick: Callback<String>,
}

/// A family with how the job has it.
#[derive(Clone)]
struct Shown {
    family: Arc<Family>,
    own: bool,
    stations: usize,
}

/// A list to pick from and the tables of the one picked.
#[component]
pub(super) fn Used(props: &UsedProps) -> Html {
    let shown = families(&props.state, props.rig.as_ref());
    let name_of = |s: &Shown| s.family.about.name.clone();
    let chosen =
        props.picked.as_ref().and_then(|name| shown.iter().position(|s| name_of(s) == *name)).unwrap_or(0);
    let Some(current) = shown.get(chosen).cloned() else { return html! {} };
    let options: Vec<AttrValue> = shown.iter().map(|s| words(s).into()).collect();
    let names: Vec<String> = shown.iter().map(name_of).collect();
    let onpick = {
        let picked = props.onpick.clone();
        Callback::from(move |i: usize| names.get(i).cloned().into_iter().for_each(|name| picked.emit(name)))
    };
    html! {
        <div class="used-sections">
            <h3>{ "Tables of the sections" }</h3>
            <Pick label="Section" {options} picked={Some(chosen)} {onpick} />
            <Tables state={props.state.clone()} shown={Held(current)} />
        </div>
    }
}

/// The families of the blade, then those of the job's own that no station has.
fn families(state: &State, rig: Option<&RigRef>) -> Vec<Shown> {
    let job = state.job();
    let own = |name: &str| job.sections.iter().any(|s| s.name == name);
    let stations = |name: &str| job.propeller.stations.iter().filter(|s| s.section == name).count();
    let used = rig.iter().flat_map(|rig| rig.0.rotor.blade.families.iter().cloned());
    let mut shown: Vec<Shown> = used
        .map(|family| Shown { own: own(&family.about.name), stations: stations(&family.about.name), family })
        .filter(|s| s.stations > 0)
        .collect();
    let spare = job.sections.iter().filter(|s| stations(&s.name) == 0);
    let spare = spare.filter_map(|s| Family::new(s.about(), &s.polars).ok());
    shown.extend(spare.map(|family| Shown { family: Arc::new(family), own: true, stations: 0 }));
    shown
}

fn words(shown: &Shown) -> String {
    let at = match shown.stations {
        0 => "at no station".into(),
        1 => "at 1 station".into(),
        n => format!("at {n} stations"),
    };
    format!("{}, {at}", shown.family.about.name)
}

/// A section compared by its tables' identity and place.
#[derive(Clone)]
struct Held(Shown);

impl PartialEq for Held {
    fn eq(&self, other: &Self) -> bool {
        Arc::ptr_eq(&self.0.family, &other.0.family) && self.0.stations == other.0.stations
    }
}

#[derive(Properties, PartialEq)]
struct TablesProps {
    state: Seen,
    shown: Held,
}

/// Origin, thickness and charts of one section.
#[component]
fn Tables(props: &TablesProps) -> Html {
    let act = use_act();
    let Shown { family, own, stations } = &props.shown.0;
    let ratios = family.thickness_ratios();
    let picked = use_state_eq(|| None::<usize>);
    let station = props.state.job().propeller.stations.get(props.state.station);
    let wanted = station.map_or(0.12, |s| s.thickness_ratio);
    let index = picked.filter(|i| *i < ratios.len()).unwrap_or_else(|| nearest(&ratios, wanted));
    let thickness = ratios.get(index).copied().unwrap_or(wanted);
    let curves = use_memo((props.shown.clone(), thickness.to_bits()), |(shown, _)| {
        Rc::new(section_curves(&shown.0.family, thickness))
    });
    let options: Vec<AttrValue> =
        ratios.iter().map(|t| format!("{} % thick", fixed(100.0 * t, 1)).into()).collect();
    let name = family.about.name.clone();
    let everywhere = act.on({
        let name = name.clone();
        move |_: MouseEvent| Action::Choose(Choice::SectionOfAll(name.clone()), Running::default())
    });
    let remove =
        act.on(move |_: MouseEvent| Action::Choose(Choice::RemoveSection(name.clone()), Running::default()));
    html! {
        <>
            if !ratios.is_empty() {
                <Pick label="Tables for" {options} picked={Some(index)}
                    onpick={Callback::from(move |i| picked.set(Some(i)))} />
            }
            <p class="note">
                { if family.about.origin.is_empty() {
                    "The job does not say where the tables come from."
                } else {
                    &family.about.origin
                } }
            </p>
            if *own {
                <p class="buttons">
                    <button type="button" class="act" onclick={everywhere}>{ "Use at every station" }</button>
                    if *stations == 0 {
                        <button type="button" class="act" onclick={remove}>{ "Take out of the job" }</button>
                    }
                </p>
            }
            <Charts curves={(*curves).clone()} />
        </>
    }
}

fn nearest(ratios: &[f64], wanted: f64) -> usize {
    let off = |t: &f64| (t - wanted).abs();
    (0..ratios.len()).min_by(|&a, &b| off(&ratios[a]).total_cmp(&off(&ratios[b]))).unwrap_or(0)
}
