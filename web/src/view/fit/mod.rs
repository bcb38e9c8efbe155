//! The Fit panel: where propeller, engine and aircraft meet over the whole speed range.

mod charts;
mod figures;
mod limits;
mod worth;

use std::rc::Rc;

use spokeshave::aircraft::{hovers, propellers};
use spokeshave::result::{Ceilings, Envelope, PitchWorth, PointResult, TakeOff};
use yew::prelude::*;

use super::caution;
use super::chips::{air_words, flown_line};
use crate::act::Seen;
use crate::number::with_unit;
use crate::state::State;
use crate::units::Quantity;
use charts::Charts;
use figures::Figures;
use limits::Limits;
use worth::Worth;

/// Properties of [`FitPanel`].
#[derive(Properties, PartialEq)]
pub struct FitPanelProps {
    /// The state.
    pub state: Seen,
    /// The speed range in the air of the flight point selected; may be a frame old, not there before it is
    /// worked out.
    pub envelope: Option<Rc<Option<Envelope>>>,
    /// Every flight point worked out; may be a frame old.
    pub points: Vec<Rc<Option<PointResult>>>,
    /// Limit of propeller rpm.
    pub limit_rpm: Option<f64>,
    /// Take-off.
    #[prop_or_default]
    pub take_off: Option<TakeOff>,
    /// Ceilings; they follow last.
    #[prop_or_default]
    pub ceilings: Option<Ceilings>,
    /// What a variable pitch is worth; follows last.
    #[prop_or_default]
    pub worth: Rc<Vec<PitchWorth>>,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_fit(a: &State, b: &State) -> bool {
    a.job().flight_points == b.job().flight_points
        && a.job().aircraft == b.job().aircraft
        && a.job().propeller.stations.len() == b.job().propeller.stations.len()
        && (a.point, a.station, a.units) == (b.point, b.station, b.units)
}

/// The fit in a line.
#[must_use]
pub fn in_a_line(state: &State, envelope: Option<&Envelope>) -> String {
    let Some(envelope) = envelope else { return "thrust and drag, rpm, power, climb over airspeed".into() };
    let speed = |v| with_unit(state.units, Quantity::Speed, Some(v));
    // What rises on its rotors has no wing to fly level on.
    let flown = if hovers(state.job().aircraft.as_ref()) { "climbing" } else { "level" };
    let top =
        envelope.marks.top_speed.map(|m| format!("{flown} at {} on full throttle", speed(m.airspeed_m_s)));
    let climb = envelope
        .marks
        .best_rate_of_climb
        .map(|m| format!("best climb {}", with_unit(state.units, Quantity::Climb, Some(m.value))));
    let standing = envelope
        .standing
        .as_ref()
        .map(|s| format!("{} standing still", with_unit(state.units, Quantity::Rpm, Some(s.rpm))));
    let air =
        state.job().flight_points.get(state.point).map_or_else(String::new, |p| air_words(state.units, p));
    let told = [top, climb, standing].into_iter().flatten().collect::<Vec<_>>().join("; ");
    if told.is_empty() { told } else { format!("{told}; all{air}") }
}

/// Figures that decide, charts over one airspeed axis, a sentence for each limit.
#[component]
pub fn FitPanel(props: &FitPanelProps) -> Html {
    let state = &props.state;
    let Some(known) = &props.envelope else {
        return html! {
            <p class="note" aria-busy="true">{ "The speed range is worked out while this panel is open." }</p>
        };
    };
    let Some(envelope) = known.as_ref() else {
        return html! { <p class="note">{ nothing(state) }</p> };
    };
    let air =
        state.job().flight_points.get(state.point).map_or_else(String::new, |p| air_words(state.units, p));
    let line = flown_line(state.job());
    let propellers = state.job().aircraft.as_ref().map_or(1.0, propellers);
    html! {
        <div class="fit">
            <p class="note">
                { format!("The speed range{air}, the air of the flight point selected. Solid: full \
                           throttle. Dashed: {line}.") }
            </p>
            <Figures envelope={envelope.clone()} {propellers} take_off={props.take_off} ceilings={props.ceilings}
                units={state.units} />
            <Charts state={state.clone()} envelope={known.clone()} points={props.points.clone()}
                limit_rpm={props.limit_rpm} />
            <Limits envelope={envelope.clone()} limit_rpm={props.limit_rpm} units={state.units} />
            <Worth worth={props.worth.clone()} units={state.units} several={propellers > 1.0} />
            { caution::fit() }
        </div>
    }
}

/// Why there is no speed range.
fn nothing(state: &State) -> &'static str {
    if state.job().engine.is_none() {
        return "There is no engine to turn the propeller. Give one in the Engine panel.";
    }
    "At full throttle the engine does not turn this propeller at rest. A finer pitch, a smaller diameter or \
     another gear ratio changes that."
}
