//! Figures of the propeller that hold for every station.

use spokeshave::job::{AngleReference, PitchControl, Rotation};
use yew::prelude::*;

use super::{one_section, section_options};
use crate::act::{Act, Seen, use_act};
use crate::form::{Labelled, Pick, Shown};
use crate::state::{Action, Choice, ControlKind, Field, Running};

/// Properties of [`BladeSettings`].
#[derive(Properties, PartialEq)]
pub struct BladeSettingsProps {
    /// The state.
    pub state: Seen,
}

/// Boxes and lists in columns.
#[component]
pub fn BladeSettings(props: &BladeSettingsProps) -> Html {
    let act = use_act();
    let state = &props.state;
    let labelled = |field, label: &'static str| {
        html! { <Labelled shown={Shown::of(state, &[], field)} {label} /> }
    };
    html! {
        <div class="settings">
            { labelled(Field::Blades, "Blades") }
            { labelled(Field::Diameter, "Diameter") }
            { labelled(Field::Hub, "Hub diameter") }
            { rotation(&act, state) }
            { reference(&act, state) }
            { section(&act, state) }
            { control(&act, state) }
            <Labelled shown={Shown::of(state, &[], Field::Blockage)} label="Air slowed by the body behind"
                hint="none" />
            { for control_fields(state).iter().map(|&(field, label)| labelled(field, label)) }
        </div>
    }
}

fn rotation(act: &Act, state: &Seen) -> Html {
    const ALL: [Rotation; 2] = [Rotation::ClockwiseFromBehind, Rotation::AnticlockwiseFromBehind];
    let options = vec!["clockwise from behind".into(), "anticlockwise from behind".into()];
    let picked = ALL.iter().position(|r| *r == state.job().propeller.rotation);
    let onpick = chosen(act, |i| Choice::Rotation(ALL[i.min(1)]));
    html! { <Pick label="Rotation" {options} {picked} {onpick} /> }
}

fn reference(act: &Act, state: &Seen) -> Html {
    const ALL: [AngleReference; 2] = [AngleReference::ChordLine, AngleReference::FlatFace];
    let options = vec!["chord line".into(), "flat face".into()];
    let picked = ALL.iter().position(|r| *r == state.job().propeller.angle_reference);
    let onpick = chosen(act, |i| Choice::Reference(ALL[i.min(1)]));
    html! { <Pick label="Angles measured to" {options} {picked} {onpick} /> }
}

fn section(act: &Act, state: &Seen) -> Html {
    let sections = section_options(state.job());
    let one = one_section(state.job());
    let mut options: Vec<AttrValue> = sections.iter().map(|o| o.words.clone()).collect();
    let off: Vec<bool> = sections.iter().map(|o| o.off).collect();
    if one.is_none() {
        options.push("by station".into());
    }
    let picked = one.map_or(Some(sections.len()), |one| sections.iter().position(|o| o.name == one));
    let onpick = act.on(move |i: usize| match sections.get(i) {
        Some(o) => Action::Choose(Choice::SectionOfAll(o.name.clone()), Running::default()),
        None => Action::Dismiss,
    });
    html! { <Pick label="Section" {options} {off} {picked} {onpick} /> }
}

fn control(act: &Act, state: &Seen) -> Html {
    let options = ControlKind::ALL.iter().map(|k| AttrValue::from(k.words())).collect::<Vec<_>>();
    let now = ControlKind::of(&state.job().propeller.pitch_control);
    let picked = ControlKind::ALL.iter().position(|k| *k == now);
    let onpick = chosen(act, |i| Choice::PitchControl(ControlKind::ALL[i.min(2)]));
    html! { <Pick label="Pitch" {options} {picked} {onpick} /> }
}

fn control_fields(state: &Seen) -> &'static [(Field, &'static str)] {
    match state.job().propeller.pitch_control {
        PitchControl::Fixed {} => &[],
        PitchControl::GroundAdjustable { .. } => &[(Field::Turn, "Blades turned by")],
        PitchControl::ConstantSpeed { .. } => &[
            (Field::GovernedRpm, "Governed rpm"),
            (Field::FineStop, "Fine stop"),
            (Field::CoarseStop, "Coarse stop"),
        ],
    }
}

fn chosen(act: &Act, choice: impl Fn(usize) -> Choice + 'static) -> Callback<usize> {
    act.on(move |i| Action::Choose(choice(i), Running::default()))
}
