//! The section as carved beside the section as drawn.

use spokeshave::section::make::Comparison;
use yew::prelude::*;

use super::charts::short;
use crate::number::{fixed, fixed_or_none, signed_or_none};

/// Properties of [`Carved`].
#[derive(Properties, PartialEq)]
pub(super) struct CarvedProps {
    pub(super) comparison: Vec<Comparison>,
}

/// Best angle and best lift-to-drag side by side.
#[component]
pub(super) fn Carved(props: &CarvedProps) -> Html {
    let rows = props.comparison.iter().map(|c| {
        let change = c.change();
        let cells = [
            signed_or_none(c.drawn.map(|p| p.angle_deg), 1),
            signed_or_none(c.carved.map(|p| p.angle_deg), 1),
            signed_or_none(change.map(|c| c.0), 1),
            fixed_or_none(c.drawn.map(|p| p.lift_to_drag), 0),
            fixed_or_none(c.carved.map(|p| p.lift_to_drag), 0),
            signed_or_none(change.map(|c| 100.0 * (c.1 - 1.0)), 0),
        ];
        let head = format!("{} %, {}", fixed(100.0 * c.thickness_ratio, 1), short(c.reynolds));
        html! { <tr><th scope="row">{ head }</th>{ for cells.into_iter().map(|c| html! { <td>{ c }</td> }) }</tr> }
    });
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="As carved against as drawn">
            <table class="sheet-table">
                <caption>{ "As carved against as drawn; angles to the chord line of the drawing" }</caption>
                <thead>
                    <tr><th scope="col" rowspan="2">{ "Thickness, Reynolds" }</th>
                        <th scope="colgroup" class="group" colspan="3">{ "Best angle, °" }</th>
                        <th scope="colgroup" class="group" colspan="3">{ "Best cl/cd" }</th></tr>
                    <tr>
                        <th scope="col">{ "drawn" }</th><th scope="col">{ "carved" }</th>
                        <th scope="col">{ "change" }</th>
                        <th scope="col">{ "drawn" }</th><th scope="col">{ "carved" }</th>
                        <th scope="col">{ "change, %" }</th>
                    </tr>
                </thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}
