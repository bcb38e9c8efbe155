//! The Engine panel: its figures, the full-throttle curve, what it offers against what the propeller takes.

use std::rc::Rc;

use spokeshave::job::{AltitudeLaw, Engine, Interpolation, Piston, PowerPoint};
use spokeshave::result::PointResult;
use yew::prelude::*;

use super::offered::OfferedChart;
use super::picks::kinds;
use super::rows::{Rows, RowsOf};
use super::{labelled, optional, still_invented};
use crate::act::{Act, Seen, use_act};
use crate::number::{fixed, with_unit};
use crate::results::Offered;
use crate::state::{
    AltitudeKind, Choice, EngineChoice, EngineFigure, EngineKind, Field, FuelBy, State, engine_untouched,
};
use crate::units::{Quantity, Units};

/// Properties of [`EnginePanel`].
#[derive(Properties, PartialEq)]
pub struct EnginePanelProps {
    /// The state.
    pub state: Seen,
    /// What the shaft offers and the propeller takes at the flight point selected; may be a frame old.
    pub offer: Rc<Offered>,
    /// The flight point selected, worked out; may be a frame old.
    pub point: Rc<Option<PointResult>>,
}

/// Whether the panel shows the same of two states.
#[must_use]
pub fn same_engine(a: &State, b: &State) -> bool {
    let points = |s: &State| (s.point, s.job().flight_points.get(s.point).cloned());
    a.job().engine == b.job().engine && points(a) == points(b) && a.drafts == b.drafts && a.units == b.units
}

/// The engine in a line.
#[must_use]
pub fn engine_in_a_line(state: &State) -> String {
    match &state.job().engine {
        None => "none, so flight points need an rpm or a power".into(),
        Some(Engine::Piston(p)) => piston_in_a_line(state.units, p),
        Some(Engine::Electric(e)) => format!(
            "{}, {}, {} cells of {}",
            EngineKind::Electric.words(),
            with_unit(state.units, Quantity::SpeedConstant, Some(e.kv_rpm_per_v)),
            e.battery.cells,
            with_unit(state.units, Quantity::Charge, Some(e.battery.capacity_ah))
        ),
    }
}

fn piston_in_a_line(units: Units, p: &Piston) -> String {
    let rpm = |rpm| with_unit(units, Quantity::Rpm, Some(rpm));
    let best = |row: &PowerPoint| {
        format!(", {} at {}", with_unit(units, Quantity::Power, Some(row.power_w)), rpm(row.rpm))
    };
    let most =
        p.full_throttle.iter().max_by(|a, b| a.power_w.total_cmp(&b.power_w)).map_or_else(String::new, best);
    let gear =
        if p.gear_ratio == 1.0 { String::new() } else { format!(", geared {} to 1", fixed(p.gear_ratio, 2)) };
    let limit = p.max_rpm.map_or_else(String::new, |limit| format!(", limit {}", rpm(limit)));
    format!("{}{most}{gear}{limit}", EngineKind::Piston.words())
}

/// Boxes and the curve's rows beside the chart.
#[component]
pub fn EnginePanel(props: &EnginePanelProps) -> Html {
    let act = use_act();
    let state = &props.state;
    let now = EngineKind::of(state.job().engine.as_ref());
    let kind = kinds(&act, "Engine", &EngineKind::ALL, EngineKind::words, now, |kind| {
        Choice::Engine(EngineChoice::Kind(kind))
    });
    html! {
        <div class="machine">
            <div class="machine-form">
                { kind }
                { still_invented(&engine_untouched(state.job())) }
                { figures(&act, state) }
            </div>
            <div class="machine-readings">
                { chart(props) }
                if now == EngineKind::Piston {
                    <Rows state={state.clone()} of={RowsOf::FullThrottle} />
                    <Rows state={state.clone()} of={RowsOf::FuelByLoad} />
                }
            </div>
        </div>
    }
}

fn figures(act: &Act, state: &Seen) -> Html {
    match &state.job().engine {
        None => html! {},
        Some(Engine::Piston(p)) => piston(act, state, p),
        Some(Engine::Electric(_)) => electric(state),
    }
}

fn piston(act: &Act, state: &Seen, p: &Piston) -> Html {
    const BETWEEN: [Interpolation; 2] = [Interpolation::MonotoneCubic, Interpolation::Linear];
    let between = |i| match i {
        Interpolation::MonotoneCubic => "a smooth curve",
        Interpolation::Linear => "straight lines",
    };
    let box_of = |figure| labelled(state, Field::Engine(figure));
    let maybe = |figure| optional(state, Field::Engine(figure));
    html! {
        <>
            { box_of(EngineFigure::GearRatio) }
            { maybe(EngineFigure::LimitRpm) }
            { maybe(EngineFigure::IdleRpm) }
            { kinds(act, "Power between rows", &BETWEEN, between, p.interpolation, |to| {
                Choice::Engine(EngineChoice::Interpolation(to))
            }) }
            { kinds(
                act,
                "Power at height",
                &AltitudeKind::ALL,
                AltitudeKind::words,
                AltitudeKind::of(&p.altitude_law),
                |to| Choice::Engine(EngineChoice::Altitude(to)),
            ) }
            if let AltitudeLaw::HeldTo(_) = p.altitude_law { { box_of(EngineFigure::HeldTo) } }
            { kinds(act, "Fuel consumption by", &FuelBy::ALL, FuelBy::words, FuelBy::of(p), |way| {
                Choice::Engine(EngineChoice::FuelBy(way))
            }) }
            if FuelBy::of(p) == FuelBy::OneFigure { { maybe(EngineFigure::Consumption) } }
            { maybe(EngineFigure::Fuel) }
        </>
    }
}

/// The motor's figures and those of its battery, as on a data sheet; whether the job may go without one.
const MOTOR: [(EngineFigure, bool); 12] = [
    (EngineFigure::SpeedConstant, false),
    (EngineFigure::Resistance, false),
    (EngineFigure::NoLoadCurrent, false),
    (EngineFigure::NoLoadVoltage, true),
    (EngineFigure::MostCurrent, true),
    (EngineFigure::GearRatio, false),
    (EngineFigure::ControllerResistance, false),
    (EngineFigure::Cells, false),
    (EngineFigure::CellVoltage, false),
    (EngineFigure::CellResistance, false),
    (EngineFigure::Capacity, false),
    (EngineFigure::UsableShare, false),
];

fn electric(state: &Seen) -> Html {
    let one = |&(figure, may_lack): &(EngineFigure, bool)| {
        let show = if may_lack { optional } else { labelled };
        show(state, Field::Engine(figure))
    };
    html! { { for MOTOR.iter().map(one) } }
}

fn chart(props: &EnginePanelProps) -> Html {
    let state = &props.state;
    let Some(point) = state.job().flight_points.get(state.point) else { return html! {} };
    match &state.job().engine {
        None => html! {
            <p class="note">{ "Without an engine a flight point runs at the rpm or the power it is given." }</p>
        },
        Some(_) => html! {
            <OfferedChart offer={props.offer.clone()} result={props.point.clone()} point={point.clone()}
                limit_rpm={EngineFigure::LimitRpm.value(state.job())} units={state.units} />
        },
    }
}
