//! What a pitch that can be set in flight would be worth over the blades as they stand.

use std::rc::Rc;

use spokeshave::result::{PitchWorth, WorthOf};
use yew::prelude::*;

use crate::number::{fixed_or_none, signed_or_none, with_unit};
use crate::units::{Quantity, Units};

/// Properties of [`Worth`].
#[derive(Properties, PartialEq)]
pub(super) struct WorthProps {
    pub(super) worth: Rc<Vec<PitchWorth>>,
    pub(super) units: Units,
    /// Whether there is more than one propeller.
    pub(super) several: bool,
}

/// A row for each flight point at which there is something to gain.
#[component]
pub(super) fn Worth(props: &WorthProps) -> Html {
    if props.worth.is_empty() {
        return html! {};
    }
    let rows = props.worth.iter().map(|w| row(props.units, props.several, w));
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="What a variable pitch is worth">
            <table class="sheet-table worth gain">
                <caption>{ "What blades that turn in flight would give, best turn of all" }</caption>
                <thead><tr>
                    <th scope="col">{ "Flight point" }</th><th scope="col">{ "Figure" }</th>
                    <th scope="col">{ "As set" }</th>
                    <th scope="col">{ "Best" }</th><th scope="col">{ "Gain" }<small>{ "%" }</small></th>
                    <th scope="col">{ "Turned" }<small>{ "deg" }</small></th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}

fn row(units: Units, several: bool, w: &PitchWorth) -> Html {
    let (name, quantity) = match w.of {
        WorthOf::Thrust => (if several { "thrust of all" } else { "thrust" }, Quantity::Force),
        WorthOf::TopSpeed => ("top speed", Quantity::Speed),
        WorthOf::ShaftPower => ("shaft power", Quantity::Power),
    };
    let turn = signed_or_none(w.turn_deg, 1) + if w.at_end_of_search { " or more" } else { "" };
    html! {
        <tr>
            <th scope="row">{ &w.flight_point }</th>
            <td>{ name }</td>
            <td>{ with_unit(units, quantity, w.as_set) }</td>
            <td>{ with_unit(units, quantity, w.best) }</td>
            <td>{ fixed_or_none(w.gain.map(|g| 100.0 * g), 1) }</td>
            <td>{ turn }</td>
        </tr>
    }
}
