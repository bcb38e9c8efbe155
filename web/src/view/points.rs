//! The flight points as a table: what each is set to and what comes of it.

use std::rc::Rc;

use spokeshave::aircraft::hovers;
use spokeshave::job::FlightPoint;
use spokeshave::result::{PointResult, State as Answer};
use yew::prelude::*;

use super::caution;
use super::verdict::throttled_back;
use crate::act::{Seen, use_act};
use crate::form::{Entry, Message, Pick, Shown};
use crate::number::{figure, fixed_or_none};
use crate::state::{Action, Choice, Field, PointFigure, Running, SettingKind};
use crate::units::{Quantity, Units};

/// Properties of [`Points`].
#[derive(Properties, PartialEq)]
pub struct PointsProps {
    /// The state.
    pub state: Seen,
    /// Every flight point worked out; shorter until the later frame.
    pub results: Vec<Rc<Option<PointResult>>>,
}

/// The table and what is done with its rows.
#[component]
pub fn Points(props: &PointsProps) -> Html {
    let act = use_act();
    let (state, job) = (&props.state, props.state.job());
    let selected = state.point;
    let rows = (0..job.flight_points.len()).map(|i| {
        html! {
            <PointRow key={i} index={i} state={state.clone()}
                result={props.results.get(i).cloned().unwrap_or_default()} />
        }
    });
    let rest = job.flight_points.get(selected).is_some_and(|p| p.airspeed_m_s == Some(0.0));
    let add = act.on(move |_: MouseEvent| Action::Choose(Choice::AddPoint(selected), Running::default()));
    html! {
        <>
            <div class="scroll" tabindex="0" role="region" aria-label="Flight points">
                <table class="sheet-table points">
                    <PointsHead units={state.units} />
                    <tbody>{ for rows }</tbody>
                </table>
            </div>
            <p class="buttons"><button type="button" class="act" onclick={add}>{ "Add a flight point" }</button></p>
            if rest { { caution::standing_start() } }
        </>
    }
}

#[derive(Properties, PartialEq)]
struct PointsHeadProps {
    units: Units,
}

#[component]
fn PointsHead(props: &PointsHeadProps) -> Html {
    let units = props.units;
    let columns = [
        ("Height", units.symbol(Quantity::Height)),
        ("Warmer than standard", "K"),
        ("Airspeed", units.symbol(Quantity::Speed)),
        ("Set by", ""),
        ("Setting", ""),
        ("Rpm", ""),
        ("Thrust", units.symbol(Quantity::Force)),
        ("Power", units.symbol(Quantity::Power)),
        ("Of full power", "%"),
        ("Climb", units.symbol(Quantity::Climb)),
        ("Efficiency", ""),
        ("Advance ratio", ""),
        ("Tip Mach", ""),
    ];
    let cells =
        columns.iter().map(|(name, unit)| html! { <th scope="col">{ name }<small>{ unit }</small></th> });
    html! {
        <thead>
            <tr>
                <th scope="col">{ "Flight point" }</th>{ for cells }<th><span class="unseen">{ "Remove" }</span></th>
            </tr>
        </thead>
    }
}

#[derive(Properties, PartialEq)]
struct PointRowProps {
    index: usize,
    state: Seen,
    result: Rc<Option<PointResult>>,
}

#[component]
fn PointRow(props: &PointRowProps) -> Html {
    let act = use_act();
    let (i, state) = (props.index, &props.state);
    let Some(point) = state.job().flight_points.get(i) else { return html! {} };
    let shown = |figure| Shown::of(state, &[], Field::Point(i, figure));
    let boxes: Vec<Shown> = [
        PointFigure::Name,
        PointFigure::Height,
        PointFigure::Temperature,
        PointFigure::Airspeed,
        PointFigure::Setting,
    ]
    .map(shown)
    .into();
    let remove = act.on(move |_: MouseEvent| Action::Choose(Choice::RemovePoint(i), Running::default()));
    let messages = boxes.iter().filter(|s| s.message.is_some());
    let messages = messages.map(|s| html! { <Message shown={s.clone()} named=true /> }).collect::<Html>();
    let wrong = boxes.iter().any(|s| s.message.is_some());
    let hovers = hovers(state.job().aircraft.as_ref());
    html! {
        <>
            <tr class={classes!((i == state.point).then_some("selected"))}>
                <th scope="row"><Entry shown={boxes[0].clone()} is_text=true class="name" /></th>
                { for boxes[1..3].iter().map(|s| html! { <td><Entry shown={s.clone()} /></td> }) }
                <td>
                    <Entry shown={boxes[3].clone()} hint={top_speed(state.units, props.result.as_ref().as_ref())} />
                </td>
                <td><SettingPick index={i} point={point.clone()} {hovers} result={props.result.clone()} /></td>
                <td class="setting">{ setting_box(point, &boxes[4]) }</td>
                <PointAnswer result={props.result.clone()} units={state.units} />
                <td>
                    <button type="button" class="icon" aria-label={format!("Remove {}", point.name)} onclick={remove}>
                        { "×" }
                    </button>
                </td>
            </tr>
            if wrong { <tr class="messages"><td colspan="15">{ messages }</td></tr> }
        </>
    }
}

/// The airspeed that came out, for a box left empty.
fn top_speed(units: Units, result: Option<&PointResult>) -> String {
    result.and_then(|r| r.airspeed_m_s).map_or_else(String::new, |v| figure(units, Quantity::Speed, Some(v)))
}

fn setting_box(point: &FlightPoint, shown: &Shown) -> Html {
    match SettingKind::of(&point.setting) {
        SettingKind::FullThrottle | SettingKind::Level => html! {},
        _ => html! { <><Entry shown={shown.clone()} /><span class="unit">{ shown.unit }</span></> },
    }
}

#[derive(Properties, PartialEq)]
struct SettingPickProps {
    index: usize,
    point: FlightPoint,
    /// Whether the aircraft hovers.
    hovers: bool,
    result: Rc<Option<PointResult>>,
}

#[component]
fn SettingPick(props: &SettingPickProps) -> Html {
    let act = use_act();
    let i = props.index;
    let running = (*props.result)
        .as_ref()
        .map_or_else(Running::default, |r| Running { rpm: r.rpm, power_w: r.figures.power_w });
    let words = if props.hovers { SettingKind::hovering_words } else { SettingKind::words };
    let options: Vec<AttrValue> = SettingKind::ALL.iter().map(|k| words(*k).into()).collect();
    let picked = SettingKind::ALL.iter().position(|k| *k == SettingKind::of(&props.point.setting));
    let onpick =
        act.on(move |k: usize| Action::Choose(Choice::Setting(i, SettingKind::ALL[k.min(4)]), running));
    html! { <Pick label={format!("What {} is set by", props.point.name)} {options} {picked} {onpick} bare=true /> }
}

#[derive(Properties, PartialEq)]
struct PointAnswerProps {
    result: Rc<Option<PointResult>>,
    units: Units,
}

#[component]
fn PointAnswer(props: &PointAnswerProps) -> Html {
    let Some(r) = &*props.result else { return html! { <td colspan="8"></td> } };
    if r.state != Answer::Ok {
        let words = format!("{}{}", r.state.sentence(), throttled_back(props.units, r));
        return html! { <td colspan="8" class="state">{ words }</td> };
    }
    let (units, f) = (props.units, &r.figures);
    let cells = [
        figure(units, Quantity::Rpm, r.rpm),
        figure(units, Quantity::Force, f.thrust_n),
        figure(units, Quantity::Power, f.power_w),
        figure(units, Quantity::Share, r.meeting.power_share),
        figure(units, Quantity::Climb, r.meeting.rate_of_climb_m_s),
        fixed_or_none(f.efficiency, 3),
        fixed_or_none(f.advance_ratio, 3),
        fixed_or_none(f.tip_mach, 2),
    ];
    html! { { for cells.into_iter().map(|c| html! { <td class="figure-cell">{ c }</td> }) } }
}
