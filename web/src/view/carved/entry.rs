//! Boxes for one blade: large, in columns, the next one down on Enter.

use wasm_bindgen::JsCast;
use web_sys::{Element, HtmlInputElement};
use yew::prelude::*;

use crate::number::figure;
use crate::state::{BladeFigure, Field};
use crate::units::Quantity;
use crate::view::Seen;
use crate::view::form::{Entry, Message, Shown};

/// Properties of [`BladeEntry`].
#[derive(Properties, PartialEq)]
pub(super) struct BladeEntryProps {
    /// Which blade, from 0.
    pub(super) blade: usize,
    pub(super) state: Seen,
}

/// The boxes of a blade.
#[component]
pub(super) fn BladeEntry(props: &BladeEntryProps) -> Html {
    let (state, blade) = (&props.state, props.blade);
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
                { for boxes.iter().map(|s| html! { <Entry shown={s.clone()} /> }) }
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
            { for wrong.map(|s| html! { <Message shown={s.clone()} named=true /> }) }
        </fieldset>
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
