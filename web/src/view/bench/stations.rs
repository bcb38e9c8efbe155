//! Stress and margin by station.

use spokeshave::result::StressStation;
use spokeshave::wood::no_less;
use yew::prelude::*;

use crate::number::{figure, signed_or_none};
use crate::units::{Quantity, Units};

/// Properties of [`Stations`].
#[derive(Properties, PartialEq)]
pub(super) struct StationsProps {
    pub(super) stations: Vec<StressStation>,
    pub(super) units: Units,
    /// Index of the station selected.
    pub(super) selected: usize,
}

/// A row for the edge of the hub and for each station.
#[component]
pub(super) fn Stations(props: &StationsProps) -> Html {
    let units = props.units;
    let (length, stress) = (units.symbol(Quantity::Length), units.symbol(Quantity::Stress));
    let rows = props.stations.iter().map(|s| row(units, s, s.station == Some(props.selected + 1)));
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Stress by station">
            <table class="sheet-table stress-table">
                <caption>{ "Stress and margin, each under the case that is worst there" }</caption>
                <thead><tr>
                    <th scope="col">{ "Station" }</th>
                    <th scope="col">{ "Margin" }<small>{ "%" }</small></th>
                    <th scope="col">{ "Radius" }<small>{ length }</small></th>
                    <th scope="col">{ "Thickness" }<small>{ length }</small></th>
                    <th scope="col">{ "Tension" }<small>{ stress }</small></th>
                    <th scope="col">{ "Compression" }<small>{ stress }</small></th>
                    <th scope="col">{ "Shear" }<small>{ stress }</small></th>
                    <th scope="col">{ "Missing" }<small>{ length }</small></th>
                    <th scope="col" class="state">{ "Decided by" }</th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}

fn row(units: Units, s: &StressStation, selected: bool) -> Html {
    let pa = |v| figure(units, Quantity::Stress, v);
    let name = s.station.map_or_else(|| "hub".to_string(), |n| n.to_string());
    let by = s.kind.zip(s.case.as_ref()).map(|(k, case)| format!("{}, {case}", k.word())).unwrap_or_default();
    let over = s.margin.is_some_and(|m| m < 0.0);
    let missing = s.thicker_m.map(|m| missing(units, m)).unwrap_or_default();
    html! {
        <tr class={classes!(selected.then_some("selected"), over.then_some("over"))}>
            <th scope="row">{ name }</th>
            <td>{ signed_or_none(s.margin.map(|m| 100.0 * m), 0) }</td>
            <td>{ figure(units, Quantity::Length, Some(s.radius_m)) }</td>
            <td>{ thickness(units, s.thickness_m) }</td>
            <td>{ pa(s.tension_pa) }</td>
            <td>{ pa(s.compression_pa) }</td>
            <td>{ pa(s.shear_pa) }</td>
            <td>{ missing }</td>
            <td class="state">{ by }</td>
        </tr>
    }
}

/// Thickness that is missing, never less than it.
pub(super) fn missing(units: Units, metres: f64) -> String {
    let decimals = units.decimals(Quantity::Length) + 1;
    crate::number::fixed(no_less(units.shown(Quantity::Length, metres), decimals), decimals)
}

/// One decimal of a millimetre more than a length has in running text.
pub(super) fn thickness(units: Units, metres: f64) -> String {
    crate::number::fixed(units.shown(Quantity::Length, metres), units.decimals(Quantity::Length) + 1)
}
