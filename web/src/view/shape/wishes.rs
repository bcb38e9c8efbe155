//! What a search is asked for: what counts at each flight point, limits, what stays as drawn.

use spokeshave::job::{Aim, Figure, FlightPoint, Held, Setting, Wishes};
use spokeshave::shape::Wish;
use yew::prelude::*;

use super::figures::{ALL, name};
use crate::act::{Act, Seen, use_act};
use crate::form::{Labelled, Pick, Shown, Switch, capital};
use crate::number::fixed;
use crate::results::RigRef;
use crate::state::{Action, Choice, Field, LimitFigure, RpmBound, Running};

/// Properties of [`WishBoxes`].
#[derive(Properties, PartialEq)]
pub(super) struct WishBoxesProps {
    pub(super) state: Seen,
    pub(super) rig: RigRef,
}

/// Weights to pick from.
const WEIGHTS: [f64; 6] = [0.25, 0.5, 1.0, 2.0, 3.0, 5.0];
const HELD: [(Held, &str); 4] =
    [(Held::Diameter, "Diameter"), (Held::Pitch, "Pitch"), (Held::Twist, "Twist"), (Held::Chord, "Chord")];

/// The boxes, folded away.
#[component]
pub(super) fn WishBoxes(props: &WishBoxesProps) -> Html {
    let act = use_act();
    let state = &props.state;
    let aims = use_memo(props.rig.clone(), |rig| Wish::of(&rig.0).aims);
    let points = state.job().flight_points.iter().map(|point| point_rows(&act, point, &aims));
    let limits = LimitFigure::ALL.into_iter().map(|figure| {
        html! {
            <Labelled shown={Shown::of(state, &[], Field::Limit(figure))} label={capital(figure.name())}
                hint="no limit" />
        }
    });
    let at_points = state.job().flight_points.iter().enumerate().map(|(i, point)| rpm_row(state, i, point));
    let none = Wishes::default();
    let wishes = state.job().wishes.as_ref().unwrap_or(&none);
    let held = HELD.into_iter().map(|(what, label)| {
        let onswitch = act.on(move |on| Action::Choose(Choice::Hold(what, on), Running::default()));
        html! { <Switch {label} on={wishes.held.contains(&what)} {onswitch} /> }
    });
    html! {
        <details id="wishes" class="wishes unprinted">
            <summary>{ "What counts, limits, what stays as drawn" }</summary>
            <div class="wish-grid">
                <fieldset><legend>{ "What counts" }</legend>{ for points }</fieldset>
                <fieldset>
                    <legend>{ "Limits of the finished propeller" }</legend><div class="settings">{ for limits }</div>
                </fieldset>
                <fieldset class="rpm-by-point">
                    <legend>{ "Propeller rpm at each flight point" }</legend>
                    <div class="settings">{ for at_points }</div>
                </fieldset>
                <fieldset class="held"><legend>{ "The search leaves as drawn" }</legend>{ for held }</fieldset>
            </div>
        </details>
    }
}

/// What may count at a flight point.
fn possible(point: &FlightPoint) -> Vec<Figure> {
    let top = point.airspeed_m_s.is_none();
    let level = point.setting == Setting::Level {};
    let at_rest = point.airspeed_m_s == Some(0.0);
    let may = |figure: &Figure| match figure {
        Figure::AirspeedMS => top,
        Figure::Efficiency => !at_rest,
        Figure::RateOfClimbMS => !top && !level && !at_rest,
        Figure::ThrustN => !top && !level,
        _ => true,
    };
    ALL.into_iter().filter(may).collect()
}

/// A row for each figure that counts at a flight point, and one more to pick from.
fn point_rows(act: &Act, point: &FlightPoint, aims: &[Aim]) -> Html {
    let here = |(i, aim): (usize, &Aim)| (aim.flight_point == point.name).then_some(i);
    let places = aims.iter().enumerate().filter_map(here).map(Some).chain([None]);
    html! { { for places.enumerate().map(|(n, place)| aim_row(act, point, aims, place, n > 0)) } }
}

fn aim_row(act: &Act, point: &FlightPoint, aims: &[Aim], place: Option<usize>, more: bool) -> Html {
    let aim = place.map(|i| &aims[i]);
    let taken = |figure: &Figure| {
        let counts = |a: &Aim| a.flight_point == point.name && a.figure == *figure;
        aim.is_none_or(|a| a.figure != *figure) && aims.iter().any(counts)
    };
    let figures: Vec<Figure> = possible(point).into_iter().filter(|figure| !taken(figure)).collect();
    if figures.is_empty() {
        return html! {};
    }
    let none = if more && place.is_none() { "nothing more" } else { "does not count" };
    let mut options: Vec<AttrValue> = vec![none.into()];
    options.extend(figures.iter().map(|f| AttrValue::from(name(*f))));
    let picked = aim.map_or(Some(0), |a| figures.iter().position(|f| *f == a.figure).map(|i| i + 1));
    let changed = |with: Option<Aim>| changed(aims, place, with);
    let weight = aim.map_or(1.0, |a| a.weight);
    let with = |figure: Option<Figure>| {
        changed(figure.map(|figure| Aim { flight_point: point.name.clone(), figure, weight }))
    };
    let choices: Vec<Vec<Aim>> =
        std::iter::once(None).chain(figures.iter().copied().map(Some)).map(with).collect();
    let weighted: Vec<Vec<Aim>> =
        WEIGHTS.iter().map(|w| changed(aim.map(|a| Aim { weight: *w, ..a.clone() }))).collect();
    let weights: Vec<AttrValue> = WEIGHTS.iter().map(|w| format!("weight {}", fixed(*w, 2)).into()).collect();
    let now = WEIGHTS.iter().position(|w| (w - weight).abs() < 1e-9);
    html! {
        <div class="wish">
            <Pick label={if more { format!("{}, and", point.name) } else { point.name.clone() }} {options}
                {picked} onpick={picked_of(act, choices)} />
            if aim.is_some() {
                <Pick label={format!("Weight of {}, {}", point.name, aim.map_or("", |a| name(a.figure)))}
                    options={weights} picked={now} onpick={picked_of(act, weighted)} bare=true />
            }
        </div>
    }
}

/// The aims with one put in its place, added or taken out.
fn changed(aims: &[Aim], place: Option<usize>, with: Option<Aim>) -> Vec<Aim> {
    let mut next = aims.to_vec();
    match (place, with) {
        (Some(i), Some(aim)) => next[i] = aim,
        (Some(i), None) => drop(next.remove(i)),
        (None, with) => next.extend(with),
    }
    next
}

/// The rpm allowed at a flight point.
fn rpm_row(state: &Seen, i: usize, point: &FlightPoint) -> Html {
    let boxes = [(RpmBound::Least, "at least"), (RpmBound::Most, "at most")].map(|(bound, label)| {
        html! {
            <Labelled shown={Shown::of(state, &[], Field::PointRpm(i, bound))}
                label={format!("{}, {label}", point.name)} hint="no limit" />
        }
    });
    html! { <>{ for boxes }</> }
}

fn picked_of(act: &Act, choices: Vec<Vec<Aim>>) -> Callback<usize> {
    act.on(move |i: usize| match choices.get(i) {
        Some(aims) => Action::Choose(Choice::Aims(aims.clone()), Running::default()),
        None => Action::Dismiss,
    })
}
