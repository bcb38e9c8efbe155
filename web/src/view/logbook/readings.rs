//! The table of readings.

use yew::prelude::*;

use super::choose;
use crate::state::{Field, LogFigure, LogbookChoice};
use crate::view::form::{Entry, Message, Shown, Switch};
use crate::view::{Act, Seen, use_act};

const COLUMNS: [LogFigure; 7] = [
    LogFigure::Rpm,
    LogFigure::Throttle,
    LogFigure::Airspeed,
    LogFigure::Altitude,
    LogFigure::Temperature,
    LogFigure::Fuel,
    LogFigure::Current,
];

/// Properties of [`Readings`].
#[derive(Properties, PartialEq)]
pub(super) struct ReadingsProps {
    pub(super) state: Seen,
}

/// The readings in rows, and a button for one more.
#[component]
pub(super) fn Readings(props: &ReadingsProps) -> Html {
    let (act, state) = (use_act(), &props.state);
    let count = state.job().logbook.as_ref().map_or(0, |l| l.readings.len());
    let heading = |f: &LogFigure| {
        let (name, unit) = match f {
            LogFigure::Rpm => ("Engine rpm", ""),
            LogFigure::Throttle => ("Throttle", "%"),
            LogFigure::Airspeed => ("True airspeed", state.units.symbol(f.quantity())),
            LogFigure::Altitude => ("Altitude", state.units.symbol(f.quantity())),
            LogFigure::Temperature => ("Temperature", "°C"),
            LogFigure::Fuel => ("Fuel", state.units.symbol(f.quantity())),
            LogFigure::Current => ("Current", state.units.symbol(f.quantity())),
        };
        html! { <th scope="col">{ name }<small>{ unit }</small></th> }
    };
    html! {
        <>
            <p class="note">
                { "One row for each steady reading. Ground runs go without an airspeed; full throttle is 100. Tick level for flight that neither climbs nor sinks. \
                   Pressure altitude and true airspeed, please; leave empty what was not read." }
            </p>
            if count > 0 {
                <div class="scroll" tabindex="0" role="region" aria-label="Readings">
                    <table class="sheet-table log-readings">
                        <thead><tr>
                            <th scope="col">{ "Reading" }</th>
                            { for COLUMNS.iter().map(heading) }
                            <th scope="col">{ "Level" }</th><th scope="col">{ "Left out" }</th>
                            <th><span class="unseen">{ "Remove" }</span></th>
                        </tr></thead>
                        <tbody>{ for (0..count).map(|i| row(&act, state, i)) }</tbody>
                    </table>
                </div>
            }
            <p class="buttons">
                <button type="button" class="act" onclick={choose(&act, |_: MouseEvent| LogbookChoice::Add)}>{ "Add a reading" }</button>
            </p>
        </>
    }
}

fn row(act: &Act, state: &Seen, i: usize) -> Html {
    let boxes = COLUMNS.map(|f| Shown::of(state, &[], Field::Log(i, f)));
    let reading = state.job().logbook.as_ref().and_then(|l| l.readings.get(i)).cloned().unwrap_or_default();
    let wrong = boxes.iter().any(|s| s.message.is_some());
    let switch = |label: &str, on: bool, make: fn(usize, bool) -> LogbookChoice| {
        let label = format!("{label}, reading {}", i + 1);
        html! { <Switch {label} {on} onswitch={choose(act, move |on| make(i, on))} /> }
    };
    html! {
        <>
            <tr class={classes!(reading.left_out.then_some("left-out"))}>
                <th scope="row" title={reading.note.clone()}>{ i + 1 }</th>
                { for boxes.iter().map(|s| html! { <td><Entry shown={s.clone()} /></td> }) }
                <td class="tick">{ switch("level", reading.level, LogbookChoice::Level) }</td>
                <td class="tick">{ switch("left out", reading.left_out, LogbookChoice::LeaveOut) }</td>
                <td>
                    <button type="button" class="icon" aria-label={format!("Remove reading {}", i + 1)}
                        onclick={choose(act, move |_: MouseEvent| LogbookChoice::Remove(i))}>{ "×" }</button>
                </td>
            </tr>
            // Always there: a row that came and went would make the boxes anew and take the focus away.
            <tr class="messages" hidden={!wrong}><td colspan="11">
                { for boxes.iter().map(|s| html! { <Message shown={s.clone()} named=true /> }) }
            </td></tr>
        </>
    }
}
