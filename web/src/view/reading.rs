//! One radius axis, three readings: the blade, the departure map, one station.

use std::rc::Rc;

use spokeshave::drawn::DrawnStation;
use spokeshave::fit::Along;
use spokeshave::job::{Rotation, Section};
use spokeshave::result::{PointResult, StationResult};
use spokeshave::rotor::DepartureMap;
use spokeshave::section::library;
use yew::prelude::*;

use super::chips::{Chips, air_words, flown_line, sentence};
use super::page::PageProps;
use super::room::{Room, use_room};
use super::verdict::Brief;
use crate::act::{Act, Seen, use_act};
use crate::blade_view::{
    BladeRack, BladeStrip, DepartureChart, FlightMark, Ghost, Planform, RadiusAxis, StationCard,
};
use crate::form::Pick;
use crate::number::with_unit;
use crate::results::{Compared, Later};
use crate::state::{Action, State};
use crate::units::Quantity;

/// Length of the radius axis, pixels.
const AXIS_PX: f64 = 440.0;

/// The radius axis of the job's blade.
fn axis(state: &State) -> RadiusAxis {
    let p = &state.job().propeller;
    RadiusAxis::new(p.hub_diameter_m / 2.0, p.diameter_m / 2.0, AXIS_PX)
}

/// The stations at the flight point selected; as drawn, without a departure, where it has no answer.
fn stations(props: &PageProps) -> Vec<StationResult> {
    let answered = props.now.point.as_ref().as_ref().filter(|r| !r.stations.is_empty());
    let tip_m = props.state.job().propeller.diameter_m / 2.0;
    let as_drawn = |d: &DrawnStation| StationResult {
        radius_m: d.radius_m,
        radius_fraction: d.radius_m / tip_m,
        chord_m: d.chord_m,
        blade_angle_deg: d.angle_deg,
        ..StationResult::default()
    };
    answered.map_or_else(|| props.now.drawn.iter().map(as_drawn).collect(), |r| r.stations.clone())
}

/// The blade standing: flight points, their sentence, the blade with its departure.
#[component]
pub fn Standing(props: &PageProps) -> Html {
    let act = use_act();
    html! {
        <div class="side">
            <Chosen ..props.clone() />
            { blade(props, false, &act.on(Action::SelectStation)) }
            if let Some(result) = &*props.now.point { <Brief result={result.clone()} units={props.state.units} /> }
        </div>
    }
}

/// The blade lying down, on narrow screens.
#[component]
pub fn Lying(props: &PageProps) -> Html {
    let act = use_act();
    html! {
        <div class="lying">
            <Chips state={props.state.part(same_chips)} points={props.later.points.clone()} />
            { blade(props, true, &act.on(Action::SelectStation)) }
        </div>
    }
}

fn same_chips(a: &State, b: &State) -> bool {
    a.job().flight_points == b.job().flight_points && (a.point, a.units) == (b.point, b.units)
}

#[component]
fn Chosen(props: &PageProps) -> Html {
    let state = &props.state;
    let point = state.job().flight_points.get(state.point);
    html! {
        <>
            <Chips state={state.part(same_chips)} points={props.later.points.clone()} />
            <p class="point-note">
                { point.map(|p| sentence(state.units, state.job(), p, (*props.now.point).as_ref())) }
            </p>
        </>
    }
}

fn blade(props: &PageProps, lying: bool, on_select: &Callback<usize>) -> Html {
    let state = &props.state;
    let Some(rig) = &props.now.rig else { return html! {} };
    let shape = Rc::new(Planform::of(&rig.0.rotor.blade));
    let stations = Rc::new(stations(props));
    let (length, selected) = (state.units.unit(Quantity::Length), state.station);
    let ghost = props.now.beside.as_deref().map(ghost);
    if lying {
        return html! { <BladeStrip {shape} {stations} {length} {selected} {ghost} on_select={on_select.clone()} /> };
    }
    let leading_right = state.job().propeller.rotation == Rotation::ClockwiseFromBehind;
    html! {
        <BladeRack {shape} {stations} axis={axis(state)} {length} {selected} {leading_right} {ghost}
            on_select={on_select.clone()} />
    }
}

/// The blade compared, as the drawings have it.
fn ghost(beside: &Compared) -> Ghost {
    let stations = beside.point.iter().flat_map(|r| &r.stations);
    Ghost {
        name: beside.name.clone().into(),
        points: stations.filter_map(|s| Some((s.radius_m, s.departure_deg?))).collect(),
        shape: Some(Rc::new(Planform::of(&beside.rig.0.rotor.blade))),
    }
}

fn no_answer(what: &str) -> Html {
    html! { <p class="no-answer">{ format!("Without an answer at this flight point there is no {what}.") }</p> }
}

/// The departure map, or why there is none.
#[component]
pub fn MapReading(props: &PageProps) -> Html {
    let act = use_act();
    let answered = props.now.point.as_ref().as_ref().is_some_and(|r| r.rpm.is_some());
    let map = use_memo(props.later.map.clone(), |map| map.as_ref().clone().map(Rc::new));
    match (*map).clone() {
        Some(map) if answered => {
            html! { <MapFigure state={props.state.part(same_map)} later={props.later.clone()} {map} /> }
        }
        _ => {
            let level = props.later.along == Along::Level;
            let words = if answered && level && props.state.along == Along::Level {
                html! {
                    <div class="no-answer">{ along(&act, &props.state) }
                        { " Nothing is flown level here: that takes an aircraft with a drag that the \
                           propeller can meet." }
                    </div>
                }
            } else if answered {
                html! { <p class="no-answer">{ "Working out the map…" }</p> }
            } else {
                no_answer("map")
            };
            html! { <div class="map-place map-waiting" aria-busy={answered.then_some("true")}>{ words }</div> }
        }
    }
}

fn same_map(a: &State, b: &State) -> bool {
    let (p, q) = (&a.job().propeller, &b.job().propeller);
    p.diameter_m == q.diameter_m
        && p.hub_diameter_m == q.hub_diameter_m
        && a.job().flight_points == b.job().flight_points
        && a.job().aircraft.is_some() == b.job().aircraft.is_some()
        && (a.point, a.station, a.units, a.along) == (b.point, b.station, b.units, b.along)
}

/// What the map follows, to pick from; nothing where there is no choice.
fn along(act: &Act, state: &State) -> Html {
    let level = flown_line(state.job());
    let all = [(Along::FullThrottle, "full throttle"), (Along::Level, level)];
    if state.job().aircraft.is_none() && state.along == Along::FullThrottle {
        return html! {};
    }
    let options = all.iter().map(|(_, words)| AttrValue::from(*words)).collect::<Vec<_>>();
    let picked = all.iter().position(|(to, _)| *to == state.along);
    let onpick = act.on(move |i: usize| Action::Along(all[i.min(1)].0));
    html! { <Pick label="The map follows" {options} {picked} {onpick} bare=true /> }
}

#[derive(Properties, PartialEq)]
struct MapFigureProps {
    state: Seen,
    later: Rc<Later>,
    map: Rc<DepartureMap>,
}

#[component]
fn MapFigure(props: &MapFigureProps) -> Html {
    let act = use_act();
    let state = &props.state;
    let narrow = use_room() == Room::Narrow;
    let selected = props.later.selected();
    let stations = selected.iter().flat_map(|r| &r.stations).map(|s| (s.radius_m, s.departure_deg));
    html! {
        <div class="map-place">
            <DepartureChart map={props.map.clone()} axis={axis(state)} marks={marks(props)}
                stations={stations.collect::<Vec<_>>()}
                selected={state.station} length={state.units.unit(Quantity::Length)}
                speed={state.units.unit(Quantity::Speed)}
                note={map_note(props)} along={along(&act, state)} radius_figures={narrow}
                on_station={act.on(Action::SelectStation)}
                on_mark={act.on(Action::SelectPoint)} />
        </div>
    }
}

fn marks(props: &MapFigureProps) -> Vec<FlightMark> {
    let (state, later) = (&props.state, &props.later);
    let points = state.job().flight_points.iter().enumerate();
    let advance = |r: Option<&PointResult>| r.and_then(|r| r.figures.effective_pitch_m);
    points
        .map(|(i, p)| FlightMark {
            name: p.name.clone().into(),
            advance_m: advance(later.points.get(i).and_then(|r| r.as_ref().as_ref())),
            selected: i == state.point,
        })
        .collect()
}

/// What the map was worked out for, behind the list of what it follows: full throttle where the rpm follows
/// the speed, else one rpm.
fn map_note(props: &MapFigureProps) -> String {
    let (state, map) = (&props.state, &props.map);
    let (low, high) = map.rpm.iter().fold((f64::INFINITY, 0.0_f64), |(a, b), r| (a.min(*r), b.max(*r)));
    let at_most = map.rpm.iter().filter(|r| (**r - high).abs() < 1e-6).count() > 1;
    let rpm = || with_unit(state.units, Quantity::Rpm, Some(high));
    let moves = high - low > 0.5;
    let line = match (props.later.along, moves, state.job().aircraft.is_some()) {
        (Along::Level, ..) => String::new(),
        (_, true, _) if at_most => format!(" held to {}", rpm()),
        (_, true, true) => String::new(),
        (_, true, false) => "full throttle".into(),
        (_, false, _) => format!(" at {}", rpm()),
    };
    let air =
        state.job().flight_points.get(state.point).map_or_else(String::new, |p| air_words(state.units, p));
    format!("{line}{air}; each mark stands at its advance per turn")
}

/// The station selected, in detail.
#[component]
pub fn StationReading(props: &PageProps) -> Html {
    let act = use_act();
    let (state, now) = (&props.state, &props.now);
    let i = state.station;
    let result = now.point.as_ref().as_ref().filter(|r| !r.stations.is_empty());
    let thickness = result.and_then(|r| r.stations.get(i)).map_or(0.0, |s| s.thickness_ratio);
    let outline = use_outline(section(props), thickness);
    let Some((point, station)) = result.and_then(|r| Some((r, r.stations.get(i)?))) else {
        return html! { <div class="detail">{ no_answer("angle of attack at its stations") }</div> };
    };
    html! {
        <div class="detail">
            <StationCard station={station.clone()} index={i} count={point.stations.len()}
                airspeed_m_s={point.airspeed_m_s}
                rpm={point.rpm} {outline} lift_to_drag={now.lift_to_drag.clone()}
                length={state.units.unit(Quantity::Length)} speed={state.units.unit(Quantity::Speed)}
                thrust={state.units.unit(Quantity::Grading)}
                torque={state.units.unit(Quantity::TorqueGrading)}
                on_select={act.on(Action::SelectStation)} />
        </div>
    }
}

/// Name of the station's section, and its outline where the job brought one.
fn section(props: &PageProps) -> Option<(String, Option<Section>)> {
    let job = props.state.job();
    let name = &job.propeller.stations.get(props.state.station)?.section;
    Some((name.clone(), job.sections.iter().find(|own| own.name == *name).cloned()))
}

/// The outline of a section at a thickness, made anew only when one of the two changes; empty where it is not
/// known.
#[hook]
fn use_outline(section: Option<(String, Option<Section>)>, thickness_ratio: f64) -> Rc<Vec<[f64; 2]>> {
    use_memo((section, thickness_ratio.to_bits()), move |(section, _)| {
        let outline = section.as_ref().and_then(|(name, own)| match own {
            Some(own) => own.outline_at(thickness_ratio),
            None => library().outline(name, thickness_ratio),
        });
        outline.map_or_else(Vec::new, |o| o.points().to_vec())
    })
}
