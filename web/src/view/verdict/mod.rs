//! The few figures that decide, for the flight point selected, each against its limit where one is set.

mod cells;
mod findings;
mod gauge;

use spokeshave::result::{Margin, Note, PointResult, State as Answer};
use std::rc::Rc;
use yew::prelude::*;

use cells::cells;
pub use cells::{Against, inside_band};
use findings::Findings;
pub use gauge::Gauge;

use crate::number::{NO_FIGURE, with_unit};
use crate::results::Compared;
use crate::units::{Quantity, Units};

/// A figure that decides.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Cell {
    /// What it is.
    pub name: &'static str,
    /// The figure.
    pub figure: String,
    /// Its unit; empty where there is none.
    pub unit: &'static str,
    /// A line under it.
    pub more: String,
    /// The figure against what is allowed of it, where there is a limit.
    pub gauge: Option<Gauge>,
}

impl Cell {
    /// The figure large under its name.
    pub fn item(self) -> Html {
        self.beside(None)
    }

    /// The same with the figure of the blade compared in grey.
    fn beside(self, other: Option<String>) -> Html {
        html! {
            <li>
                <span class="verdict-name">{ self.name }</span>
                <span class="verdict-figure"><b>{ self.figure }</b>
                    if !self.unit.is_empty() { <span class="unit">{ self.unit }</span> }
                </span>
                if let Some(gauge) = self.gauge { { gauge.bar() } }
                if let Some(other) = other {
                    <span class="verdict-beside"><span class="unseen">{ "Compared: " }</span>{ other }</span>
                }
                <span class="verdict-more">{ self.more }</span>
            </li>
        }
    }
}

/// Properties of [`Verdict`].
#[derive(Properties, PartialEq)]
pub struct VerdictProps {
    /// The flight point worked out.
    pub result: PointResult,
    /// Units shown.
    pub units: Units,
    /// What the figures are held against.
    #[prop_or_default]
    pub against: Against,
    /// How far every limit is kept.
    #[prop_or_default]
    pub margins: Rc<Vec<Margin>>,
    /// The blade compared: its name and the same flight point.
    #[prop_or_default]
    pub beside: Option<Rc<Compared>>,
}

/// What throttling back to the limit rpm gives, where full throttle would pass it: a sentence after another.
pub(in crate::view) fn throttled_back(units: Units, result: &PointResult) -> String {
    result.held.as_deref().map_or_else(String::new, |held| {
        let told = [
            (Quantity::Rpm, Some(held.rpm)),
            (Quantity::Speed, Some(held.airspeed_m_s)),
            (Quantity::Force, held.figures.thrust_n),
        ];
        let told = told.map(|(quantity, value)| with_unit(units, quantity, value)).join(", ");
        format!(" Throttled back to the limit it comes to {told} of thrust.")
    })
}

/// The figures in a row; a sentence where there is no answer.
#[component]
pub fn Verdict(props: &VerdictProps) -> Html {
    let result = &props.result;
    if result.state != Answer::Ok {
        return html! {
            <section class="verdict-none" aria-label="Verdict">
                <b>{ format!("{}: no answer. ", result.name) }</b>{ result.state.sentence() }
                { throttled_back(props.units, result) }
                { " " }<a href="#points">{ "Set it another way" }</a>
            </section>
        };
    }
    let others = props.beside.as_ref().map(|beside| others(props.units, beside.point.as_ref()));
    let cells = cells(props.units, result, &props.against).into_iter().enumerate().map(|(i, cell)| {
        let other =
            others.as_ref().map(|all| all.get(i).map_or_else(|| NO_FIGURE.into(), |o| o.figure.clone()));
        cell.beside(other)
    });
    html! {
        <section aria-label={format!("Verdict at {}", result.name)}>
            <ul class="verdict">{ for cells }</ul>
            if let Some(beside) = &props.beside {
                <p class="verdict-notes">
                    { format!("Grey: {}. ", beside.name) }<a href="#shape">{ "Compare another" }</a>
                </p>
            }
            <Findings margins={props.margins.clone()} units={props.units} />
            <Notes notes={result.notes.clone()} />
        </section>
    }
}

/// The figures of the blade compared; none without an answer.
fn others(units: Units, beside: Option<&PointResult>) -> Vec<Cell> {
    beside.filter(|r| r.state == Answer::Ok).map_or_else(Vec::new, |r| cells(units, r, &Against::default()))
}

#[derive(Properties, PartialEq)]
struct NotesProps {
    notes: Vec<Note>,
}

/// What is worth knowing of the figures, with the way to where it holds.
#[component]
fn Notes(props: &NotesProps) -> Html {
    if props.notes.is_empty() {
        return html! {};
    }
    let words: Vec<&str> = props.notes.iter().map(|n| n.words()).collect();
    html! {
        <p class="verdict-notes">
            { format!("Worth knowing here: {}. ", words.join("; ")) }<a href="#method">{ "Where" }</a>
        </p>
    }
}

/// The same figures in brief, for under the blade where they stay in sight.
#[component]
pub fn Brief(props: &VerdictProps) -> Html {
    if props.result.state != Answer::Ok {
        return html! {};
    }
    let rows = cells(props.units, &props.result, &props.against).into_iter().map(|cell| {
        html! { <li><span>{ cell.name }</span><b>{ format!("{} {}", cell.figure, cell.unit) }</b></li> }
    });
    html! { <ul class="brief" aria-hidden="true">{ for rows }</ul> }
}
