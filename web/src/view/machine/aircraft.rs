//! The Aircraft panel: its figures, the speeds that follow, drag and power over airspeed.

use spokeshave::air::Air;
use spokeshave::aircraft::{Asked, speeds, thrust_asked_n};
use spokeshave::job::{Aeroplane, Aircraft};
use spokeshave::rig::air_of;
use yew::prelude::*;

use super::asked::AskedCharts;
use super::picks::kinds;
use super::{hinted, labelled, optional, still_invented};
use crate::act::{Act, Seen, use_act};
use crate::number::{figure, fixed, with_unit};
use crate::state::{
    AircraftChoice, AircraftFigure, AircraftKind, Choice, DragBy, Field, State, aircraft_untouched,
};
use crate::units::{Quantity, Units};
use crate::view::chips::air_words;

/// Properties of [`AircraftPanel`].
#[derive(Properties, PartialEq)]
pub struct AircraftPanelProps {
    /// The state.
    pub state: Seen,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_aircraft(a: &State, b: &State) -> bool {
    let points = |s: &State| (s.point, s.job().flight_points.get(s.point).cloned());
    a.job().aircraft == b.job().aircraft
        && points(a) == points(b)
        && a.drafts == b.drafts
        && a.units == b.units
}

/// The air of the flight point selected.
pub(super) fn air(state: &State) -> Option<Air> {
    air_of(state.job().flight_points.get(state.point)?).ok()
}

/// The aircraft in a line.
#[must_use]
pub fn aircraft_in_a_line(state: &State) -> String {
    let units = state.units;
    let mass = |kg| with_unit(units, Quantity::Mass, Some(kg));
    match (&state.job().aircraft, air(state)) {
        (Some(Aircraft::Aeroplane(a)), Some(air)) => {
            let speeds = speeds(a, &air);
            let speed = |v| with_unit(units, Quantity::Speed, v);
            let stall = speeds.stall_m_s.map_or_else(String::new, |v| format!("stall {}, ", speed(Some(v))));
            format!(
                "{}, {}; {stall}least drag at {}",
                mass(a.mass_kg),
                with_unit(units, Quantity::Area, Some(a.wing_area_m2)),
                speed(Some(speeds.least_drag_m_s))
            )
        }
        (Some(Aircraft::Multirotor(m)), _) => format!("{}, {} rotors", mass(m.mass_kg), m.rotors),
        _ => "none, so nothing that needs drag or weight".into(),
    }
}

/// Boxes beside the charts.
#[component]
pub fn AircraftPanel(props: &AircraftPanelProps) -> Html {
    let act = use_act();
    let state = &props.state;
    let now = AircraftKind::of(state.job().aircraft.as_ref());
    let kind = kinds(&act, "Aircraft", &AircraftKind::ALL, AircraftKind::words, now, |kind| {
        Choice::Aircraft(AircraftChoice::Kind(kind))
    });
    html! {
        <div class="machine">
            <div class="machine-form">
                { kind }
                { still_invented(&aircraft_untouched(state.job())) }
                { figures(&act, state) }
            </div>
            { readings(state) }
        </div>
    }
}

fn figures(act: &Act, state: &Seen) -> Html {
    let figure = |figure| labelled(state, Field::Aircraft(figure));
    match &state.job().aircraft {
        None => html! {},
        Some(Aircraft::Multirotor(_)) => {
            html! { <>{ figure(AircraftFigure::Mass) }{ figure(AircraftFigure::Rotors) }</> }
        }
        Some(Aircraft::Aeroplane(a)) => html! {
            <>
                { figure(AircraftFigure::Mass) }
                { figure(AircraftFigure::WingArea) }
                { figure(AircraftFigure::ZeroLiftDrag) }
                { drag_due_to_lift(act, state, a) }
                { optional(state, Field::Aircraft(AircraftFigure::GreatestLift)) }
                { figure(AircraftFigure::Engines) }
                { hinted(state, Field::Aircraft(AircraftFigure::RollingFriction), "0.04") }
                { optional(state, Field::Aircraft(AircraftFigure::SlipstreamArea)) }
            </>
        },
    }
}

fn drag_due_to_lift(act: &Act, state: &Seen, a: &Aeroplane) -> Html {
    let now = if a.drag.k.is_some() { DragBy::Factor } else { DragBy::AspectRatio };
    let figures: &[AircraftFigure] = match now {
        DragBy::Factor => &[AircraftFigure::InducedFactor],
        DragBy::AspectRatio => &[AircraftFigure::AspectRatio, AircraftFigure::Oswald],
    };
    let pick = kinds(act, "Drag due to lift by", &DragBy::ALL, DragBy::words, now, |by| {
        Choice::Aircraft(AircraftChoice::DragBy(by))
    });
    html! { <>{ pick }{ for figures.iter().map(|&f| labelled(state, Field::Aircraft(f))) }</> }
}

fn readings(state: &Seen) -> Html {
    let (units, Some(air)) = (state.units, air(state)) else { return html! {} };
    match &state.job().aircraft {
        None => html! {
            <p class="note">
                { "Without an aircraft the propeller is looked at alone: flight points need an rpm, a power \
                   or an engine." }
            </p>
        },
        Some(aircraft @ Aircraft::Multirotor(_)) => {
            let each = thrust_asked_n(aircraft, &air, 0.0);
            html! {
                <p class="note">
                    { format!("To hover each rotor has to hold {}.", with_unit(units, Quantity::Force, each)) }
                </p>
            }
        }
        Some(Aircraft::Aeroplane(a)) => html! {
            <div class="machine-readings">
                <AskedCharts aircraft={a.clone()} {air} {units} />
                { speed_table(state, a, &air) }
            </div>
        },
    }
}

/// The speeds of an aeroplane by name; the stall only where it is known.
pub(super) fn named_speeds(a: &Aeroplane, air: &Air) -> Vec<(&'static str, f64)> {
    let s = speeds(a, air);
    let stall = s.stall_m_s.map(|v| ("stall", v));
    let others = [
        ("least power", s.least_power_m_s),
        ("least drag", s.least_drag_m_s),
        ("fast cruise", s.fast_cruise_m_s),
    ];
    stall.into_iter().chain(others).collect()
}

fn speed_table(state: &Seen, a: &Aeroplane, air: &Air) -> Html {
    let units = state.units;
    let stall = speeds(a, air).stall_m_s;
    let row = |(name, v): (&'static str, f64)| {
        let below = if stall.is_some_and(|stall| v < stall) { " (below the stall here)" } else { "" };
        let asked = Asked::at(a, air, v)?;
        let cells = [
            figure(units, Quantity::Speed, Some(v)),
            figure(units, Quantity::Force, Some(asked.drag_n)),
            figure(units, Quantity::Power, Some(asked.power_w)),
        ];
        Some(
            html! { <tr><th scope="row">{ words(name) }{ below }</th>{ for cells.map(|c| html! { <td>{ c }</td> }) }</tr> },
        )
    };
    let place = state.job().flight_points.get(state.point).map_or_else(String::new, |p| air_words(units, p));
    let head = [Quantity::Speed, Quantity::Force, Quantity::Power].map(|q| units.symbol(q));
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Speeds of the aircraft">
            <table class="sheet-table">
                <caption>
                    { format!(
                        "Level flight{place}; best glide {} to 1",
                        fixed(speeds(a, air).greatest_lift_to_drag, 1)
                    ) }
                </caption>
                <thead><tr>
                    <th scope="col">{ "Speed" }</th>
                    <th scope="col">{ "Airspeed" }<small>{ head[0] }</small></th>
                    <th scope="col">{ "Drag" }<small>{ head[1] }</small></th>
                    <th scope="col">{ "Power" }<small>{ head[2] }</small></th>
                </tr></thead>
                <tbody>{ for named_speeds(a, air).into_iter().filter_map(row) }</tbody>
            </table>
        </div>
    }
}

/// What a speed is good for.
fn words(name: &str) -> &str {
    match name {
        "stall" => "Stall",
        "least power" => "Least power, longest aloft where above the stall",
        "least drag" => "Least drag, farthest",
        "fast cruise" => "Fast cruise, farthest for energy and time together",
        other => other,
    }
}

/// Units in which the charts are drawn.
pub(super) fn axis_units(units: Units) -> [crate::chart::unit::Unit; 3] {
    [Quantity::Speed, Quantity::Force, Quantity::Power].map(|q| units.unit(q))
}
