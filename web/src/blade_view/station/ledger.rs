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
        <div>
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
            if !adds_up(station) { <p class="ledger-note">{ "each rounded by itself" }</p> }
        </div>
    }
}

/// Whether the figures as written make the departure as written.
fn adds_up(station: &StationResult) -> bool {
    let tenths = |deg: f64| (10.0 * deg).round() as i64;
    let s = station;
    let (Some(air), Some(attack), Some(best), Some(departure)) =
        (s.inflow_angle_deg, s.angle_of_attack_deg, s.best_angle_deg, s.departure_deg)
    else {
        return true;
    };
    tenths(s.blade_angle_deg) - tenths(air) == tenths(attack)
        && tenths(attack) - tenths(best) == tenths(departure)
}

fn row(sign: &'static str, words: &'static str, angle_deg: Option<f64>, class: &'static str) -> Html {
    let figure = angle_deg.map_or_else(|| NONE.to_owned(), |a| format!("{}°", fixed(a, 1)));
    html! { <tr {class}><td aria-hidden="true">{ sign }</td><th scope="row">{ words }</th><td>{ figure }</td></tr> }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn figures_that_do_not_add_up_as_written_are_owned_to() {
        let station = |blade, air, best| StationResult {
            blade_angle_deg: blade,
            inflow_angle_deg: Some(air),
            angle_of_attack_deg: Some(blade - air),
            best_angle_deg: Some(best),
            departure_deg: Some(blade - air - best),
            ..Default::default()
        };
        assert!(adds_up(&station(19.5, 18.4, 2.0)));
        assert!(!adds_up(&station(19.5, 18.96, 2.98)), "0.5 − 3.0 is not −2.4");
        assert!(adds_up(&StationResult::default()));
    }
}
