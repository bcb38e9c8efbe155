//! Tables of the engine: rows to type in, to add and to remove.

use spokeshave::job::{Engine, Piston};
use yew::prelude::*;

use crate::act::{Seen, use_act};
use crate::form::{Entry, Message, Shown};
use crate::state::{Action, Choice, EngineChoice, EngineFigure, Field, Running};
use crate::units::Quantity;

/// A table of the engine.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum RowsOf {
    /// The full-throttle curve.
    FullThrottle,
    /// Fuel consumption by load.
    FuelByLoad,
}

/// What a table is called and holds.
struct About {
    name: &'static str,
    caption: &'static str,
    /// Headings with what they measure.
    columns: [(&'static str, Quantity); 2],
    count: usize,
    /// Rows it needs.
    least: usize,
}

impl RowsOf {
    fn about(self, piston: &Piston) -> About {
        match self {
            Self::FullThrottle => About {
                name: "Full-throttle curve",
                caption: "Full throttle at sea level, by rising engine rpm",
                columns: [("Engine rpm", Quantity::Count), ("Shaft power", Quantity::Power)],
                count: piston.full_throttle.len(),
                least: 2,
            },
            Self::FuelByLoad => About {
                name: "Fuel by load",
                caption: "Fuel consumption, by rising share of the full-throttle power",
                columns: [("Load", Quantity::Share), ("Fuel consumption", Quantity::Consumption)],
                count: piston.bsfc_by_load.len(),
                least: 1,
            },
        }
    }

    fn boxes(self, i: usize) -> [EngineFigure; 2] {
        match self {
            Self::FullThrottle => [EngineFigure::CurveRpm(i), EngineFigure::CurvePower(i)],
            Self::FuelByLoad => [EngineFigure::Load(i), EngineFigure::LoadConsumption(i)],
        }
    }

    fn add(self, i: usize) -> EngineChoice {
        match self {
            Self::FullThrottle => EngineChoice::AddRow(i),
            Self::FuelByLoad => EngineChoice::AddLoad(i),
        }
    }

    fn remove(self, i: usize) -> EngineChoice {
        match self {
            Self::FullThrottle => EngineChoice::RemoveRow(i),
            Self::FuelByLoad => EngineChoice::RemoveLoad(i),
        }
    }
}

/// Properties of [`Rows`].
#[derive(Properties, PartialEq)]
pub(super) struct RowsProps {
    pub(super) state: Seen,
    pub(super) of: RowsOf,
}

/// The table; nothing where it has no rows.
#[component]
pub(super) fn Rows(props: &RowsProps) -> Html {
    let (state, of) = (&props.state, props.of);
    let Some(Engine::Piston(piston)) = &state.job().engine else { return html! {} };
    let about = of.about(piston);
    if about.count == 0 {
        return html! {};
    }
    let few = about.count <= about.least;
    let rows = (0..about.count).map(
        |index| html! { <TableRow key={index} {of} {index} {few} table={about.name} state={state.clone()} /> },
    );
    let column = |(words, quantity): &(&'static str, Quantity)| {
        html! { <th scope="col">{ *words }<small>{ state.units.symbol(*quantity) }</small></th> }
    };
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label={about.name}>
            <table class="sheet-table curve-rows">
                <caption>{ about.caption }</caption>
                <thead><tr>
                    <th scope="col">{ "Row" }</th>
                    { for about.columns.iter().map(column) }
                    <th><span class="unseen">{ "Add and remove" }</span></th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}

#[derive(Properties, PartialEq)]
struct TableRowProps {
    of: RowsOf,
    index: usize,
    /// Whether no row may go.
    few: bool,
    /// What the table is called.
    table: &'static str,
    state: Seen,
}

#[component]
fn TableRow(props: &TableRowProps) -> Html {
    let act = use_act();
    let (i, state, of) = (props.index, &props.state, props.of);
    let boxes = of.boxes(i).map(|figure| Shown::of(state, &[], Field::Engine(figure)));
    let choose = |choice: EngineChoice| {
        act.on(move |_: MouseEvent| Action::Choose(Choice::Engine(choice), Running::default()))
    };
    let wrong = boxes.iter().any(|s| s.message.is_some());
    let named = |what: &str| format!("{}: {what} row {}", props.table, i + 1);
    html! {
        <>
            <tr>
                <th scope="row">{ i + 1 }</th>
                { for boxes.iter().map(|s| html! { <td><Entry shown={s.clone()} /></td> }) }
                <td>
                    <button type="button" class="icon" aria-label={named("add a row after")}
                        onclick={choose(of.add(i))}>
                        { "+" }
                    </button>
                    <button type="button" class="icon" aria-label={named("remove")} disabled={props.few}
                        onclick={choose(of.remove(i))}>{ "×" }</button>
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
