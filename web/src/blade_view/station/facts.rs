//! Eight figures of a station.

use crate::chart::number::{NONE, fixed, significant};
use crate::chart::unit::Unit;
use spokeshave::result::StationResult;
use yew::prelude::*;

/// The facts under the drawings, and what is worth noting about them.
pub(super) fn facts(station: &StationResult, thrust: Unit, torque: Unit) -> Html {
    let s = station;
    let figure = |value: Option<f64>, decimals| value.map(|v| fixed(v, decimals));
    let rows = [
        ("Reynolds", Some(significant(s.reynolds, 3)), ""),
        ("Mach", Some(fixed(s.mach, 2)), ""),
        ("lift coeff.", figure(s.cl, 2), ""),
        ("drag coeff.", s.cd.map(|cd| significant(cd, 3)), ""),
        ("thrust", Some(significant(thrust.of(s.thrust_n_per_m), 3)), thrust.name),
        ("torque", Some(significant(torque.of(s.torque_n_m_per_m), 3)), torque.name),
        ("loss factor", figure(s.loss_factor, 2), ""),
        ("of best L/D", figure(s.share_of_best.map(|share| 100.0 * share), 0), "%"),
    ];
    html! {
        <>
            <dl class="facts">{ for rows.into_iter().map(|(name, figure, unit)| fact(name, figure, unit)) }</dl>
            { notes(station) }
        </>
    }
}

fn fact(name: &'static str, figure: Option<String>, unit: &'static str) -> Html {
    let unit = figure.is_some().then(|| html! { <span class="unit">{ unit }</span> });
    html! { <div><dt>{ name }</dt><dd>{ figure.unwrap_or_else(|| NONE.to_owned()) }{ " " }{ unit }</dd></div> }
}

fn notes(station: &StationResult) -> Html {
    if station.notes.is_empty() {
        return Html::default();
    }
    let words: Vec<&str> = station.notes.iter().map(|n| n.words()).collect();
    html! { <p class="station-notes">{ format!("Worth knowing here: {}.", words.join("; ")) }</p> }
}
