//! The Bench panel: will the blade hold, what it weighs, how it twists and vibrates.

mod cases;
mod charts;
mod figures;
mod form;
mod running;
mod stations;

use std::rc::Rc;

use spokeshave::result::{Finding, Governing, Strength};
use spokeshave::wood::{Say, sentence};
use yew::prelude::*;

use super::caution;
use crate::act::Seen;
use crate::number::{signed, with_unit};
use crate::results::Sheet;
use crate::state::State;
use crate::units::{Quantity, Units};
use cases::{Cases, HubTable, Near};
use charts::Charts;
use figures::Figures;
use form::WoodForm;
use running::Running;
use stations::Stations;

/// Properties of [`BenchPanel`].
#[derive(Properties, PartialEq)]
pub struct BenchPanelProps {
    /// The state.
    pub state: Seen,
    /// The strength of the blade; may be a frame old, not there before it is worked out.
    pub strength: Option<Rc<Sheet>>,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_bench(a: &State, b: &State) -> bool {
    a.job().wood == b.job().wood && a.drafts == b.drafts && a.units == b.units && a.station == b.station
}

/// The bench in a line.
#[must_use]
pub fn in_a_line(state: &State, sheet: Option<&Sheet>) -> String {
    let Some(Ok(sheet)) = sheet else { return "stress and margin, weight, twist and vibration".into() };
    let mass = with_unit(state.units, Quantity::Mass, Some(sheet.mass.blades_kg));
    let verdict = &sheet.verdict;
    let margin = verdict.margin.map_or_else(String::new, |m| format!("{} %", signed(100.0 * m, 0)));
    let margin = match verdict.finding {
        Finding::Held => format!("holds, margin {margin}"),
        Finding::HeldAsFarAsJudged => format!("holds as far as judged, margin {margin}"),
        Finding::OverTheLimit => format!("not strong enough, margin {margin}"),
        Finding::NotJudged => "not judged, no load known".into(),
    };
    format!("{}: {margin}; blades {mass}", sheet.material.name)
}

/// Boxes beside what follows from them.
#[component]
pub fn BenchPanel(props: &BenchPanelProps) -> Html {
    let state = &props.state;
    let sheet = match props.strength.as_deref() {
        None => {
            html! { <p class="note" aria-busy="true">{ "The strength is worked out while this panel is open." }</p> }
        }
        Some(Err(why)) => html! { <p class="note" role="alert">{ why.to_string() }</p> },
        Some(Ok(sheet)) => told(state, sheet),
    };
    html! {
        <div class="bench">
            <div class="machine">
                <WoodForm state={state.clone()} />
                <div class="machine-readings">{ sheet }</div>
            </div>
            { caution::bench(state.job()) }
        </div>
    }
}

fn told(state: &Seen, sheet: &Strength) -> Html {
    let units = state.units;
    html! {
        <>
            { decides(sheet, units) }
            <Figures sheet={sheet.clone()} {units} />
            <Charts sheet={sheet.clone()} {units} />
            <Stations stations={sheet.stations.clone()} {units} selected={state.station} />
            <Cases cases={sheet.cases.clone()} {units} />
            <Running running={sheet.running.clone()} {units} />
            <Near near={sheet.vibration.near.clone()} />
            if let Some(hub) = &sheet.hub { <HubTable hub={hub.clone()} {units} /> }
            <details class="taken"><summary>{ "Taken for granted" }</summary>
                <ul>{ for sheet.assumptions.iter().map(|a| html! { <li>{ a }</li> }) }</ul>
            </details>
        </>
    }
}

/// Whether it holds and what was not judged, then what decides with the reason of its limit.
fn decides(sheet: &Strength, units: Units) -> Html {
    let over = matches!(sheet.verdict.finding, Finding::OverTheLimit | Finding::NotJudged);
    let class = if over { "decides over" } else { "decides" };
    let stress = |pa: f64| with_unit(units, Quantity::Stress, Some(pa));
    let length = |m: f64| with_unit(units, Quantity::Length, Some(m));
    let missing = |m: f64| format!("{}\u{a0}{}", stations::missing(units, m), units.symbol(Quantity::Length));
    let say = Say { stress: &stress, length: &length, missing: &missing };
    let told = |g: &Governing| {
        let decided = sentence(g, &sheet.stations, &sheet.verdict, &say);
        format!("{decided} That limit is {}.", g.reason)
    };
    let reason = sheet.governing.as_ref().map(told);
    html! { <p {class} role="status">{ &sheet.verdict.sentence }<small>{ reason }</small></p> }
}
