//! The full-throttle curve as a table: rows to type in, to add and to remove.

use spokeshave::job::Engine;
use yew::prelude::*;

use crate::state::{Action, Choice, EngineChoice, EngineFigure, Field, Running};
use crate::units::Quantity;
use crate::view::form::{Entry, Message, Shown};
use crate::view::{Seen, use_act};

/// Properties of [`CurveRows`].
#[derive(Properties, PartialEq)]
pub(super) struct CurveRowsProps {
    pub(super) state: Seen,
}

/// The table.
#[component]
pub(super) fn CurveRows(props: &CurveRowsProps) -> Html {
    let state = &props.state;
    let Some(Engine::Piston(piston)) = &state.job().engine else { return html! {} };
    let count = piston.full_throttle.len();
    let rows =
        (0..count).map(|i| html! { <CurveRow key={i} index={i} few={count <= 2} state={state.clone()} /> });
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Full-throttle curve">
            <table class="sheet-table curve-rows">
                <caption>{ "Full throttle at sea level, by rising engine rpm" }</caption>
                <thead><tr>
                    <th scope="col">{ "Row" }</th>
                    <th scope="col">{ "Engine rpm" }</th>
                    <th scope="col">{ "Shaft power" }<small>{ state.units.symbol(Quantity::Power) }</small></th>
                    <th><span class="unseen">{ "Add and remove" }</span></th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct CurveRowProps {
    index: usize,
    /// Whether no row may go.
    few: bool,
    state: Seen,
}

#[component]
fn CurveRow(props: &CurveRowProps) -> Html {
    let act = use_act();
    let (i, state) = (props.index, &props.state);
    let boxes = [EngineFigure::CurveRpm(i), EngineFigure::CurvePower(i)]
        .map(|figure| Shown::of(state, &[], Field::Engine(figure)));
    let choose = |choice: EngineChoice| {
        act.on(move |_: MouseEvent| Action::Choose(Choice::Engine(choice), Running::default()))
    };
    let wrong = boxes.iter().any(|s| s.message.is_some());
    html! {
        <>
            <tr>
                <th scope="row">{ i + 1 }</th>
                { for boxes.iter().map(|s| html! { <td><Entry shown={s.clone()} /></td> }) }
                <td>
                    <button type="button" class="icon" aria-label={format!("Add a row after row {}", i + 1)}
                        onclick={choose(EngineChoice::AddRow(i))}>{ "+" }</button>
                    <button type="button" class="icon" aria-label={format!("Remove row {}", i + 1)} disabled={props.few}
                        onclick={choose(EngineChoice::RemoveRow(i))}>{ "×" }</button>
                </td>
            </tr>
            if wrong {
                <tr class="messages"><td colspan="4">
                    { for boxes.iter().map(|s| html! { <Message shown={s.clone()} named=true /> }) }
                </td></tr>
            }
        </>
    }
}
