//! Boxes for one blade: large, in columns, the next one down on Enter.

use spokeshave::result::Doubt;
use wasm_bindgen::JsCast;
use web_sys::{Element, HtmlInputElement};
use yew::prelude::*;

use super::choose;
use crate::number::{figure, with_unit};
use crate::state::{BladeFigure, CarvedChoice, Field, State};
use crate::units::Quantity;
use crate::view::form::{Entry, Message, Shown};
use crate::view::{Act, Seen, use_act};

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
    let radius =
        |s: &f64| figure(state.units, Quantity::Length, Some(0.5 * state.job().propeller.diameter_m * s));
    let radii =
        state.job().propeller.stations.iter().map(|s| html! { <span>{ radius(&s.radius_fraction) }</span> });
    let unit = |q| match state.units.symbol(q) {
        "°" => "deg",
        other => other,
    };
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
        <fieldset class="carved-blade" onkeydown={Callback::from(|e: KeyboardEvent| onward(&e))}>
            <legend>{ format!("Blade {}", blade + 1) }</legend>
            <div class="carved-columns">
                <div class="carved-column radii" aria-hidden="true">
                    <span class="carved-head">{ "r" }<small>{ unit(Quantity::Length) }</small></span>
                    { for radii }
                </div>
                { for BladeFigure::ALL.iter().zip(&columns).map(column) }
            </div>
            // In a place of their own: beside the boxes a message that comes or goes would make the boxes anew and take the focus away.
            <div class="carved-said">
                { for wrong.map(|s| html! { <Message shown={s.clone()} named=true /> }) }
                { for props.doubts.iter().map(|d| doubted(&act, state, d)) }
            </div>
        </fieldset>
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

/// Enter goes to the next box of the panel; leaving the one before takes what was typed.
fn onward(e: &KeyboardEvent) {
    if e.key() != "Enter" {
        return;
    }
    let Some(here) = e.target_dyn_into::<HtmlInputElement>() else { return };
    let Ok(Some(panel)) = here.closest(".carved-blades") else { return };
    let Ok(boxes) = panel.query_selector_all("input.entry") else { return };
    let all: Vec<Element> = (0..boxes.length()).filter_map(|i| boxes.get(i)?.dyn_into().ok()).collect();
    let next = all.iter().position(|b| *b == **here).and_then(|i| all.get(i + 1));
    if let Some(next) = next.and_then(|n| n.dyn_ref::<HtmlInputElement>()) {
        e.prevent_default();
        // A box on the page can have the focus.
        let _ = next.focus();
        next.select();
    }
}
