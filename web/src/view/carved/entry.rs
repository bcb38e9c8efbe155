//! Boxes for one blade: large, in columns, the next one down on Enter.

use spokeshave::job::BladeReading;
use spokeshave::result::Doubt;
use yew::prelude::*;

use super::choose;
use super::found::fine;
use crate::act::{Act, Seen, use_act};
use crate::form::{Entry, Message, Shown};
use crate::number::{fixed, with_unit};
use crate::state::{BladeFigure, CarvedChoice, Field, State, between_stations};
use crate::units::Quantity;
use crate::view::onward;

/// Properties of [`BladeEntry`].
#[derive(Properties, PartialEq)]
pub(super) struct BladeEntryProps {
    /// Which blade, from 0.
    pub(super) blade: usize,
    /// What is hard to believe of it.
    pub(super) doubts: Vec<Doubt>,
    pub(super) state: Seen,
}

/// The boxes of a blade.
#[component]
pub(super) fn BladeEntry(props: &BladeEntryProps) -> Html {
    let (act, state, blade) = (use_act(), &props.state, props.blade);
    let stations = state.job().propeller.stations.len();
    let shown = |figure: BladeFigure| -> Vec<Shown> {
        (0..stations).map(|s| Shown::of(state, &[], Field::Reading(blade, s, figure))).collect()
    };
    let columns = BladeFigure::ALL.map(shown);
    let radius = |s: &f64| fine(state.units, 0.5 * state.job().propeller.diameter_m * s);
    let radii =
        state.job().propeller.stations.iter().map(|s| html! { <span>{ radius(&s.radius_fraction) }</span> });
    let unit = |q| unit(state, q);
    let column = |(f, boxes): (&BladeFigure, &Vec<Shown>)| {
        html! {
            <div class="carved-column">
                <span class="carved-head">{ f.name() }<small>{ unit(f.quantity()) }</small></span>
                { for boxes.iter().map(|s| html! { <Entry shown={s.clone()} enter="next" /> }) }
            </div>
        }
    };
    let wrong = columns.iter().flatten().filter(|s| s.message.is_some());
    html! {
        <fieldset class="carved-blade"
            onkeydown={Callback::from(|e: KeyboardEvent| onward::next(&e, ".carved-blades"))}>
            <legend>{ format!("Blade {}", blade + 1) }</legend>
            <div class="carved-columns">
                <div class="carved-column radii" aria-hidden="true">
                    <span class="carved-head">{ "r" }<small>{ unit(Quantity::Length) }</small></span>
                    { for radii }
                </div>
                { for BladeFigure::ALL.iter().zip(&columns).map(column) }
            </div>
            // In a place of their own: beside the boxes a message that comes or goes would make the boxes anew and
            // take the focus away.
            <div class="carved-said">
                { for wrong.map(|s| html! { <Message shown={s.clone()} named=true /> }) }
                { for between_stations(state.job(), blade)
                    .into_iter()
                    .map(|(i, r)| between(&act, state, [blade, i], r)) }
                { for props.doubts.iter().map(|d| doubted(&act, state, d)) }
            </div>
        </fieldset>
    }
}

fn unit(state: &State, of: Quantity) -> &'static str {
    match state.units.symbol(of) {
        "°" => "deg",
        other => other,
    }
}

/// A reading that lies between the stations, where no box shows it, and a button to take it out.
fn between(act: &Act, state: &State, [blade, i]: [usize; 2], r: BladeReading) -> Html {
    let told = |q, si| {
        let units = state.units;
        format!("{}\u{a0}{}", fixed(units.shown(q, si), units.decimals(q) + 1), unit(state, q))
    };
    let read = |f: &BladeFigure| Some(format!(", {} {}", f.name(), told(f.quantity(), f.of(r)?)));
    let place = told(Quantity::Length, r.radius_m);
    let onclick = choose(act, move |_: MouseEvent| CarvedChoice::Remove(blade, i));
    html! {
        <p class="note">
            { "Between stations: radius " }{ &place }{ for BladeFigure::ALL.iter().filter_map(read) }{ ". " }
            <button type="button" class="inline" aria-label={format!("Take it out, radius {place}")} {onclick}>
                { "Take it out" }
            </button>
        </p>
    }
}

/// What is hard to believe, that it is left out, and a button to count it.
fn doubted(act: &Act, state: &State, d: &Doubt) -> Html {
    let (blade, reading, counts) = (d.blade - 1, d.reading - 1, !d.counted);
    let (said, label) = if d.counted {
        ("It counts, for you said that it is right.", "Leave it out")
    } else {
        ("Left out until it is mended or you say that it is right.", "It is right: count it")
    };
    let place = with_unit(state.units, Quantity::Length, Some(d.radius_m));
    let onclick = choose(act, move |_: MouseEvent| CarvedChoice::Confirm(blade, reading, counts));
    html! {
        <div class="doubts" role="status">
            <p>{ format!("Hard to believe at {place}: {}. {said}", d.message) }</p>
            <button type="button" class="act" {onclick}>{ label }</button>
        </div>
    }
}
