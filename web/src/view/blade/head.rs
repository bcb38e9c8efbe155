//! The head of the table of stations: names and, under them, units.

use yew::prelude::*;

use super::table::Columns;
use crate::units::Quantity;
use crate::view::Seen;

/// Properties of [`TableHead`].
#[derive(Properties, PartialEq)]
pub struct TableHeadProps {
    /// Which columns there are.
    pub columns: Columns,
    /// The state.
    pub state: Seen,
}

/// Names and units.
#[component]
pub fn TableHead(props: &TableHeadProps) -> Html {
    let (columns, state) = (&props.columns, &props.state);
    let length = state.units.symbol(Quantity::Length);
    let th = |name: &'static str, unit: &str, class: &'static str| {
        html! { <th scope="col" rowspan="2" {class}>{ name }<small>{ unit.to_string() }</small></th> }
    };
    let job = state.job();
    let points = columns.points.iter().map(|&p| {
        let name = job.flight_points.get(p).map_or("", |f| f.name.as_str()).to_string();
        html! { <th scope="col" class={point_class(p == state.point)} title={name.clone()}>{ short(&name) }</th> }
    });
    let now = job.flight_points.get(state.point).map_or("", |f| f.name.as_str());
    html! {
        <thead>
            <tr>
                <th scope="col" rowspan="2"><span class="unseen">{ "Station" }</span></th>
                { th("Radius", length, "") }
                { th("Chord", length, "") }
                { th("Thick", length, "") }
                { th("Angle", "deg", "") }
                if columns.face { { th("On face", "deg", "") } }
                { th("Pitch", length, "wide-only") }
                if columns.sections { { th("Section", "", "") } }
                <th scope="colgroup" colspan={columns.points.len().to_string()} class="group">{ "Departure, degrees" }</th>
                <th scope="col" rowspan="2" class="wide-only" title={now.to_string()}>{ "To best" }<small>{ short(now) }</small></th>
            </tr>
            <tr>{ for points }</tr>
        </thead>
    }
}

/// Style of a departure column; narrow screens keep the one selected.
#[must_use]
pub fn point_class(selected: bool) -> &'static str {
    if selected { "departure-column now" } else { "departure-column" }
}

/// A name short enough for a narrow column: its last word, or its first letters.
fn short(name: &str) -> String {
    let word = name.split_whitespace().find(|w| w.chars().count() > 3).unwrap_or(name);
    let short: String = word.chars().take(8).collect();
    short.to_lowercase()
}
