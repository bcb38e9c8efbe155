//! The table of readings.

use web_sys::Element;
use yew::prelude::*;

use super::{choose, is_electric};
use crate::act::{Act, Seen, use_act};
use crate::form::{Entry, Message, Shown, Switch};
use crate::state::{Field, LogFigure, LogbookChoice};
use crate::view::onward;

/// What is asked of a reading: what the engine draws is fuel or current, and the other only where it was read
/// all the same.
fn columns(state: &Seen) -> Vec<LogFigure> {
    let all = state.job().logbook.iter().flat_map(|l| &l.readings);
    let (fuel, current) = all.fold((false, false), |(fuel, current), r| {
        (fuel || r.fuel_kg_per_h.is_some(), current || r.current_a.is_some())
    });
    let electric = is_electric(state);
    let mut columns = vec![
        LogFigure::Rpm,
        LogFigure::Throttle,
        LogFigure::Airspeed,
        LogFigure::Altitude,
        LogFigure::Temperature,
    ];
    columns.extend((!electric || fuel).then_some(LogFigure::Fuel));
    columns.extend((electric || current).then_some(LogFigure::Current));
    columns
}

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
    let (electric, columns) = (is_electric(state), columns(state));
    let table = use_node_ref();
    // How many rows there are once the one asked for is there.
    let asked = use_mut_ref(|| 0);
    {
        let (table, asked) = (table.clone(), asked.clone());
        use_effect_with(count, move |count| {
            if asked.take() == *count {
                first_of_last(&table);
            }
        });
    }
    let add = choose(&act, move |_: MouseEvent| {
        asked.replace(count + 1);
        LogbookChoice::Add
    });
    let heading = |f: &LogFigure| {
        let (name, unit) = match f {
            LogFigure::Rpm => (if electric { "Motor rpm" } else { "Engine rpm" }, ""),
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
                { "One row for each steady reading. Ground runs go without an airspeed; full throttle is \
                   100 or full. Tick level for flight that neither climbs nor sinks. Pressure altitude and \
                   true airspeed, please; leave empty what was not read." }
            </p>
            if count > 0 {
                <div class="scroll" tabindex="0" role="region" aria-label="Readings"
                    ref={table} onkeydown={Callback::from(|e: KeyboardEvent| onward::next(&e, ".logbook"))}>
                    <table class="sheet-table log-readings">
                        <thead><tr>
                            <th scope="col">{ "Reading" }</th>
                            { for columns.iter().map(heading) }
                            <th scope="col">{ "Level" }</th><th scope="col">{ "Left out" }</th>
                            <th><span class="unseen">{ "Remove" }</span></th>
                        </tr></thead>
                        <tbody>{ for (0..count).map(|i| row(&act, state, &columns, i)) }</tbody>
                    </table>
                </div>
            }
            <p class="buttons">
                <button type="button" class="act next" onclick={add}>{ "Add a reading" }</button>
            </p>
        </>
    }
}

/// To the first box of the last reading; the row of its messages comes after it.
fn first_of_last(table: &NodeRef) {
    let Some(table) = table.cast::<Element>() else { return };
    if let Ok(Some(first)) = table.query_selector("tr:nth-last-child(2) .entry") {
        onward::go_to(&first);
    }
}

fn row(act: &Act, state: &Seen, columns: &[LogFigure], i: usize) -> Html {
    let boxes: Vec<Shown> = columns.iter().map(|f| Shown::of(state, &[], Field::Log(i, *f))).collect();
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
                { for boxes.iter().map(|s| html! { <td><Entry shown={s.clone()} enter="next" /></td> }) }
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
