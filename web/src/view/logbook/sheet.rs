//! Readings brought in as a sheet.

use spokeshave::job::Logbook;
use spokeshave::logbook::import;
use spokeshave::sheet::MOST_BYTES;
use yew::prelude::*;

use super::choose;
use crate::act::{Seen, use_act};
use crate::state::LogbookChoice;
use crate::view::pasted::Pasted;

const HINT: &str =
    "rpm,throttle,airspeed_km_h,altitude_m,temperature_c,level\n2990,full,0,120,18,\n2520,,170,600,12,yes";

/// Properties of [`LogSheet`].
#[derive(Properties, PartialEq)]
pub(super) struct LogSheetProps {
    pub(super) state: Seen,
}

/// The sheet and its button.
#[component]
pub(super) fn LogSheet(props: &LogSheetProps) -> Html {
    let act = use_act();
    let take = {
        let state = props.state.clone();
        Callback::from(move |text: AttrValue| {
            let before = state.job().logbook.as_ref();
            let (logbook, unused) = import::read(&text, before).map_err(|e| e.to_string())?;
            let unused =
                if unused.is_empty() { String::new() } else { format!(" Not used: {}.", unused.join(", ")) };
            let said = format!("Readings taken over: {}.{unused}", logbook.readings.len());
            choose(&act, |logbook: Logbook| LogbookChoice::Readings(Box::new(logbook))).emit(logbook);
            Ok(said)
        })
    };
    html! {
        <details class="import unprinted">
            <summary>{ "Bring in a sheet of flights" }</summary>
            <p class="note">
                { "A line of headings with units, then a row for each reading: rpm, throttle (full, a share \
                   or [%]), airspeed_km_h, altitude_m or pressure_hpa, temperature_c, level (yes), \
                   fuel_kg_h, current_a, note. It takes the place of the readings above." }
            </p>
            <Pasted id="log-sheet" label="Flights" hint={HINT} most_bytes={MOST_BYTES} {take} />
        </details>
    }
}
