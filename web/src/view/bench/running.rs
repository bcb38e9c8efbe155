//! The blade as it runs: twisted by its own load.

use spokeshave::result::RunningTwist;
use yew::prelude::*;

use crate::number::{figure, signed, signed_or_none, with_unit};
use crate::units::{Quantity, Units};

/// Properties of [`Running`].
#[derive(Properties, PartialEq)]
pub(super) struct RunningProps {
    pub(super) running: Vec<RunningTwist>,
    pub(super) units: Units,
}

/// A row for each station, twist and departure for each flight point.
#[component]
pub(super) fn Running(props: &RunningProps) -> Html {
    let Some(first) = props.running.first() else { return html! {} };
    let units = props.units;
    let heads = props
        .running
        .iter()
        .map(|t| html! { <th scope="colgroup" colspan="2" class="group">{ &t.flight_point }</th> });
    let subs = props.running.iter().map(|_| {
        html! {
            <>
                <th scope="col">{ "Twist" }<small>{ "deg" }</small></th>
                <th scope="col">{ "Departure" }<small>{ "deg" }</small></th>
            </>
        }
    });
    let row = |i: usize| {
        let cells = props.running.iter().filter_map(|t| t.stations.get(i)).map(|s| {
            html! { <><td>{ signed(s.twist_deg, 2) }</td><td>{ signed_or_none(s.running_departure_deg, 1) }</td></> }
        });
        html! {
            <tr>
                <th scope="row">{ i + 1 }</th>
                <td>{ figure(units, Quantity::Length, Some(first.stations[i].radius_m)) }</td>{ for cells }
            </tr>
        }
    };
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Running twist">
            <table class="sheet-table">
                <caption>{ format!("As it runs, twisted by its load. {}", rpm(props)) }</caption>
                <thead>
                    <tr>
                        <th scope="col" rowspan="2">{ "Station" }</th>
                        <th scope="col" rowspan="2">
                            { "Radius" }<small>{ units.symbol(Quantity::Length) }</small>
                        </th>
                        { for heads }
                    </tr>
                    <tr>{ for subs }</tr>
                </thead>
                <tbody>{ for (0..first.stations.len()).map(row) }</tbody>
            </table>
        </div>
    }
}

fn rpm(props: &RunningProps) -> String {
    let one = |t: &RunningTwist| {
        let shown = |v| with_unit(props.units, Quantity::Rpm, v);
        let doubt = if t.settled { "" } else { " (load and twist do not settle)" };
        format!("{}: {} instead of {}{doubt}", t.flight_point, shown(t.running_rpm), shown(Some(t.drawn_rpm)))
    };
    props.running.iter().map(one).collect::<Vec<_>>().join("; ") + "."
}
