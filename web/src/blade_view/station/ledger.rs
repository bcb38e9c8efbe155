//! How the departure adds up.

use crate::chart::departure;
use crate::chart::number::{NONE, fixed, signed};
use spokeshave::result::StationResult;
use yew::prelude::*;

/// Blade angle less the air's makes the angle of attack; less the best makes the departure.
pub(super) fn ledger(station: &StationResult) -> Html {
    let tag = classes!("tag", departure::style(station.departure_deg));
    let departure = station.departure_deg.map_or_else(|| NONE.to_owned(), |d| format!("{}°", signed(d, 1)));
    html! {
        <table class="ledger" aria-label="How the departure adds up">
            <tbody>
                { row("", "blade angle", Some(station.blade_angle_deg), "") }
                { row("−", "air comes in at", station.inflow_angle_deg, "") }
                { row("=", "angle of attack", station.angle_of_attack_deg, "is-sum") }
                { row("−", "best here", station.best_angle_deg, "") }
                <tr class="is-sum is-total">
                    <td aria-hidden="true">{ "=" }</td><th scope="row">{ "departure" }</th>
                    <td><span class={tag}>{ departure }</span></td>
                </tr>
            </tbody>
        </table>
    }
}

fn row(sign: &'static str, words: &'static str, angle_deg: Option<f64>, class: &'static str) -> Html {
    let figure = angle_deg.map_or_else(|| NONE.to_owned(), |a| format!("{}°", fixed(a, 1)));
    html! { <tr {class}><td aria-hidden="true">{ sign }</td><th scope="row">{ words }</th><td>{ figure }</td></tr> }
}
