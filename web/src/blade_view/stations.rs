//! Choosing a station: the same list of options on the rack and on the strip.

use crate::chart::number::{fixed, signed};
use crate::chart::unit::Unit;
use spokeshave::result::StationResult;
use yew::prelude::*;

/// What one station is called by those who cannot see the drawing.
#[must_use]
pub fn spoken(index: usize, station: &StationResult, length: &Unit) -> String {
    let place = format!("Station {}, radius {}", index + 1, length.short(station.radius_m));
    match station.departure_deg {
        Some(d) => format!("{place}, departure {} degrees", signed(d, 1)),
        None => format!("{place}, no departure"),
    }
}

/// What a station says when the pointer rests on it.
#[must_use]
pub fn read_out(station: &StationResult, length: &Unit) -> String {
    let place = length.short(station.radius_m);
    let Some(departure) = station.departure_deg else { return format!("{place}: no departure") };
    let band = station.band_low_deg.zip(station.band_high_deg);
    let band = band.map_or_else(String::new, |(low, high)| {
        format!(", working band {}° to {}°", signed(low, 1), signed(high, 1))
    });
    let share = station
        .share_of_best
        .map_or_else(String::new, |s| format!(", {} % of the best lift-to-drag", fixed(100.0 * s, 0)));
    format!("{place}: {}°{band}{share}", signed(departure, 1))
}

/// The station a key moves to: up and right are outward, down and left inward.
#[must_use]
pub fn moved(key: &str, selected: usize, count: usize) -> Option<usize> {
    let last = count.checked_sub(1)?;
    match key {
        "ArrowUp" | "ArrowRight" => Some((selected + 1).min(last)),
        "ArrowDown" | "ArrowLeft" => Some(selected.saturating_sub(1)),
        "Home" => Some(0),
        "End" => Some(last),
        _ => None,
    }
}

/// Answers the keys of a list of stations.
#[must_use]
pub fn on_keys(selected: usize, count: usize, select: &Callback<usize>) -> Callback<KeyboardEvent> {
    let select = select.clone();
    Callback::from(move |event: KeyboardEvent| {
        if event.ctrl_key() || event.meta_key() || event.alt_key() {
            return;
        }
        if let Some(index) = moved(&event.key(), selected, count) {
            event.prevent_default();
            select.emit(index);
        }
    })
}

/// One option of the list.
pub struct StationOption<'a> {
    /// Prefix of the options' ids, different for each list in the page.
    pub list: &'a str,
    /// Which station.
    pub index: usize,
    /// Whether it is the chosen one.
    pub chosen: bool,
    /// Its name, from [`spoken`].
    pub name: String,
}

impl StationOption<'_> {
    /// The option about its drawing.
    pub fn around(self, select: &Callback<usize>, drawing: Html) -> Html {
        let Self { list, index, chosen, name } = self;
        let select = select.clone();
        let onclick = Callback::from(move |_: MouseEvent| select.emit(index));
        let class = classes!("station", chosen.then_some("is-chosen"));
        html! {
            <g {class} id={option_id(list, index)} role="option" aria-label={name}
                aria-selected={if chosen { "true" } else { "false" }} {onclick}>
                { drawing }
            </g>
        }
    }
}

/// Id of an option.
#[must_use]
pub fn option_id(list: &str, index: usize) -> String {
    format!("{list}-station-{}", index + 1)
}

/// The list about its options: one stop for the keyboard, on which the arrows choose.
pub fn list(list: &str, selected: usize, onkeydown: Callback<KeyboardEvent>, options: Html) -> Html {
    html! {
        <g class="stations" role="listbox" aria-label="Stations" tabindex="0"
            aria-activedescendant={option_id(list, selected)} {onkeydown}>
            { options }
        </g>
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn keys_stay_on_the_blade() {
        assert_eq!(moved("ArrowUp", 10, 11), Some(10));
        assert_eq!(moved("ArrowDown", 0, 11), Some(0));
        assert_eq!(moved("ArrowUp", 3, 11), Some(4));
        assert_eq!((moved("Home", 4, 11), moved("End", 4, 11)), (Some(0), Some(10)));
        assert_eq!((moved("x", 4, 11), moved("End", 0, 0)), (None, None));
    }

    #[test]
    fn names_say_number_place_and_departure() {
        let station = StationResult { radius_m: 0.54, departure_deg: Some(-0.94), ..Default::default() };
        assert_eq!(spoken(7, &station, &Unit::MM), "Station 8, radius 540 mm, departure −0.9 degrees");
        let silent = StationResult { radius_m: 0.54, ..Default::default() };
        assert_eq!(spoken(7, &silent, &Unit::MM), "Station 8, radius 540 mm, no departure");
    }
}
