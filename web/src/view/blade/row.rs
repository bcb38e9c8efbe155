//! One station in the table.

use std::rc::Rc;

use spokeshave::drawn::DrawnStation;
use yew::prelude::*;

use super::head::point_class;
use super::section_options;
use super::table::Columns;
use crate::act::{Seen, use_act};
use crate::chart::departure::style;
use crate::form::{Entry, Message, Pick, Shown};
use crate::number::signed_or_none;
use crate::state::{Action, Choice, Field, Measure, Running};

/// Properties of [`StationRow`].
#[derive(Properties, PartialEq)]
pub struct StationRowProps {
    /// Which station, from 0 at the hub.
    pub index: usize,
    /// The state.
    pub state: Seen,
    /// The stations as drawn.
    pub drawn: Rc<Vec<DrawnStation>>,
    /// Which columns there are.
    pub columns: Columns,
    /// Departure at each flight point shown, degrees.
    pub departures: Vec<Option<f64>>,
    /// Departure at the flight point selected, degrees.
    pub now: Option<f64>,
    /// What the blade compared has here.
    #[prop_or_default]
    pub beside: Option<String>,
}

/// A row of boxes and departures; under it, what was refused.
#[component]
pub fn StationRow(props: &StationRowProps) -> Html {
    let act = use_act();
    let (i, state, columns) = (props.index, &props.state, &props.columns);
    let selected = i == state.station;
    let boxes: Vec<Shown> = measures(columns.face)
        .iter()
        .map(|&m| Shown::of(state, &props.drawn, Field::Station(i, m)))
        .collect();
    let wrong: Vec<&Shown> = boxes.iter().filter(|s| s.message.is_some()).collect();
    let messages =
        wrong.iter().map(|s| html! { <Message shown={(*s).clone()} named=true /> }).collect::<Html>();
    html! {
        <>
            <tr class={classes!(selected.then_some("selected"))}>
                <th scope="row">
                    <button type="button" class="row-balloon" aria-pressed={if selected { "true" } else { "false" }}
                        aria-label={format!("Station {}", i + 1)}
                        onclick={act.on(move |_: MouseEvent| Action::SelectStation(i))}>{ i + 1 }</button>
                </th>
                <BoxCells boxes={boxes.clone()} />
                if columns.sections { <td><SectionPick index={i} state={state.clone()} /></td> }
                <DepartureCells points={columns.points.clone()} departures={props.departures.clone()}
                    point={state.point} now={props.now} />
                if columns.beside.is_some() { <td class="beside">{ props.beside.clone() }</td> }
            </tr>
            if !wrong.is_empty() { <tr class="messages"><td colspan="16">{ messages }</td></tr> }
        </>
    }
}

fn measures(face: bool) -> &'static [Measure] {
    const ALL: [Measure; 6] = [
        Measure::Radius,
        Measure::Chord,
        Measure::Thickness,
        Measure::Angle,
        Measure::Pitch,
        Measure::FaceAngle,
    ];
    const WITH_FACE: [Measure; 6] = [
        Measure::Radius,
        Measure::Chord,
        Measure::Thickness,
        Measure::Angle,
        Measure::FaceAngle,
        Measure::Pitch,
    ];
    if face { &WITH_FACE } else { &ALL[..5] }
}

#[derive(Properties, PartialEq)]
struct BoxCellsProps {
    boxes: Vec<Shown>,
}

/// Apart from the departures, so that boxes whose figure stays are left alone.
#[component]
fn BoxCells(props: &BoxCellsProps) -> Html {
    html! { <>{ for props.boxes.iter().map(box_cell) }</> }
}

fn box_cell(shown: &Shown) -> Html {
    let narrow = matches!(shown.field, Field::Station(_, Measure::Pitch));
    html! { <td class={narrow.then_some("wide-only")}><Entry shown={shown.clone()} /></td> }
}

#[derive(Properties, PartialEq)]
struct DepartureCellsProps {
    points: Vec<usize>,
    departures: Vec<Option<f64>>,
    point: usize,
    now: Option<f64>,
}

/// The departure at each flight point, and how far the blade would be turned to its best.
#[component]
fn DepartureCells(props: &DepartureCellsProps) -> Html {
    let cell = |(&p, &d): (&usize, &Option<f64>)| {
        let class = classes!(point_class(p == props.point), style(d));
        html! { <td {class}>{ signed_or_none(d, 1) }</td> }
    };
    html! {
        <>
            { for props.points.iter().zip(&props.departures).map(cell) }
            <td class="wide-only figure-cell">{ signed_or_none(props.now.map(|d| -d), 1) }</td>
        </>
    }
}

#[derive(Properties, PartialEq)]
struct SectionPickProps {
    index: usize,
    state: Seen,
}

#[component]
fn SectionPick(props: &SectionPickProps) -> Html {
    let act = use_act();
    let (i, job) = (props.index, props.state.job());
    let sections = section_options(job);
    let picked =
        job.propeller.stations.get(i).and_then(|s| sections.iter().position(|o| o.name == s.section));
    let options: Vec<AttrValue> = sections.iter().map(|o| o.words.clone()).collect();
    let off: Vec<bool> = sections.iter().map(|o| o.off).collect();
    let onpick = act.on(move |k: usize| {
        let name = sections.get(k).map(|o| o.name.clone()).unwrap_or_default();
        Action::Choose(Choice::Section(i, name), Running::default())
    });
    html! { <Pick label={format!("Section at station {}", i + 1)} {options} {off} {picked} {onpick} bare=true /> }
}
