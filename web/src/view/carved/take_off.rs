//! The sheet for the bench: what to take off, where.

use spokeshave::result::{PlannedBlade, PlannedStation};
use yew::prelude::*;

use super::found::{FoundProps, fine};
use crate::number::{NO_FIGURE, fixed, fixed_or_none, signed};
use crate::units::{Quantity, Units};

/// A table for each blade.
#[component]
pub(super) fn TakeOffSheet(props: &FoundProps) -> Html {
    match &props.found.plan {
        Err(why) => html! { <p class="note">{ format!("No plan of what to take off: {why}.") }</p> },
        Ok(plan) => html! {
            <>
                <h3>{ format!("What to take off, for the departure as drawn at {}", plan.flight_point) }</h3>
                <p class="note">
                    { "The face is the flat, rear side, the back the cambered, forward one. Depths off the \
                       face at the leading or the trailing edge fall to nothing at the other edge; off the \
                       back at the thickest place, fading to the edges; then off the trailing edge. Wood \
                       only comes off: what stays wrong is in the last column, and nothing is cut where \
                       nothing was read. Cut less than it says, and measure again." }
                </p>
                { for plan
                    .warns(&props.found.carved)
                    .into_iter()
                    .map(|warns| html! { <p class="warning">{ warns }</p> }) }
                <div class="duo">{ for plan.blades.iter().map(|b| table(b, props.units)) }</div>
            </>
        },
    }
}

/// What to take off one blade.
pub fn table(blade: &PlannedBlade, units: Units) -> Html {
    let name = format!("Blade {}: take off", blade.blade);
    let mm = units.symbol(Quantity::Length);
    let rows = blade.stations.iter().map(|s| row(s, units));
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label={name.clone()}>
            <table class="sheet-table take-off">
                <caption>{ name }</caption>
                <thead><tr>
                    <th scope="col">{ "r" }<small>{ mm }</small></th>
                    <th scope="col">{ "Face, leading edge" }<small>{ mm }</small></th>
                    <th scope="col">{ "Face, trailing edge" }<small>{ mm }</small></th>
                    <th scope="col">{ "Back" }<small>{ mm }</small></th>
                    <th scope="col">{ "Trailing edge" }<small>{ mm }</small></th>
                    <th scope="col">{ "Then face" }<small>{ "deg" }</small></th>
                    <th scope="col">{ "Then chord" }<small>{ mm }</small></th>
                    <th scope="col">{ "Then thick" }<small>{ mm }</small></th>
                    <th scope="col">{ "Left off by" }<small>{ "deg" }</small></th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
            <p class="note">{ notes(blade, units) }</p>
        </div>
    }
}

/// Which stations cannot be put right, and why.
fn notes(blade: &PlannedBlade, units: Units) -> String {
    let mut all: Vec<(&str, Vec<String>)> = Vec::new();
    for s in blade.stations.iter().filter(|s| !s.note().is_empty()) {
        let at = fine(units, s.radius_m);
        match all.iter_mut().find(|(why, _)| *why == s.note()) {
            Some((_, places)) => places.push(at),
            None => all.push((s.note(), vec![at])),
        }
    }
    let told = |(why, places): &(&str, Vec<String>)| format!("At {}: {why}.", places.join(", "));
    all.iter().map(told).collect::<Vec<_>>().join(" ")
}

fn row(s: &PlannedStation, units: Units) -> Html {
    let decimals = units.decimals(Quantity::Length) + 1;
    let depth = |v: f64| {
        let text = if v > 0.0 { fixed(units.shown(Quantity::Length, v), decimals) } else { "·".into() };
        html! { <td class={classes!((v > 0.0).then_some("depth"))}>{ text }</td> }
    };
    html! {
        <tr class={classes!((!s.read).then_some("guessed"))}>
            <th scope="row">{ fine(units, s.radius_m) }</th>
            { depth(s.face_leading_m) }{ depth(s.face_trailing_m) }{ depth(s.back_m) }{ depth(s.trailing_edge_m) }
            <td>{ fixed_or_none(s.face_angle_deg, 1) }</td>
            <td>{ fine(units, s.chord_m) }</td>
            <td>{ fine(units, s.thickness_m) }</td>
            <td title={s.note()}>
                { if s.note().is_empty() { signed(s.angle_deg - s.wanted_deg, 2) } else { NO_FIGURE.into() } }
            </td>
        </tr>
    }
}
