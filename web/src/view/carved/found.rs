//! What the readings say: differences, what the propeller does, what shakes, balance.

use std::rc::Rc;

use spokeshave::result::{
    Brief, CarvedBlade, CarvedPoint, CarvedStation, CarvedStrength, Known, OncePerTurn, Read,
};
use yew::prelude::*;

use crate::number::{figure, fixed, fixed_or_none, signed, with_unit};
use crate::results::CarvedFound;
use crate::units::{Quantity, Units};

/// Properties of the tables.
#[derive(Properties, PartialEq)]
pub(super) struct FoundProps {
    pub(super) found: Rc<CarvedFound>,
    pub(super) units: Units,
}

/// Every blade against the drawing and against the mean.
#[component]
pub(super) fn Differences(props: &FoundProps) -> Html {
    let blades = props.found.carved.blades.iter().map(|blade| differences(blade, props.units));
    html! { <div class="duo">{ for blades }</div> }
}

fn differences(blade: &CarvedBlade, units: Units) -> Html {
    let mm = units.symbol(Quantity::Length);
    let name = format!("Blade {} against the drawing", blade.blade);
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label={name.clone()}>
            <table class="sheet-table">
                <caption>{ name }</caption>
                <thead><tr>
                    <th scope="col">{ "r" }<small>{ mm }</small></th>
                    <th scope="col">{ "Angle" }<small>{ "deg" }</small></th>
                    <th scope="col">{ "from drawn" }<small>{ "deg" }</small></th>
                    <th scope="col">{ "from mean" }<small>{ "deg" }</small></th>
                    <th scope="col">{ "Chord" }<small>{ mm }</small></th>
                    <th scope="col">{ "from drawn" }<small>{ mm }</small></th>
                    <th scope="col">{ "Thick" }<small>{ mm }</small></th>
                    <th scope="col">{ "from drawn" }<small>{ mm }</small></th>
                </tr></thead>
                <tbody>{ for blade.stations.iter().map(|s| difference(s, units)) }</tbody>
            </table>
            <p class="note">
                { "In grey: not read there, but taken from between the readings, from beyond them, or as \
                   drawn. Angles to the chord line." }
            </p>
        </div>
    }
}

fn difference(s: &CarvedStation, units: Units) -> Html {
    let length = |v: f64| fine(units, v);
    let by = |v: f64| signed(units.shown(Quantity::Length, v), units.decimals(Quantity::Length).max(1));
    let class = |r: &Read| (r.known != Known::Measured).then_some("guessed");
    let title = |r: &Read| r.known.words();
    let cell =
        |r: &Read, text: String| html! { <td class={classes!(class(r))} title={title(r)}>{ text }</td> };
    html! {
        <tr>
            <th scope="row">{ length(s.radius_m) }</th>
            { cell(&s.angle_deg, fixed(s.angle_deg.carved, 1)) }
            { cell(&s.angle_deg, signed(s.angle_deg.from_drawn, 2)) }
            { cell(&s.angle_deg, signed(s.angle_deg.from_mean, 2)) }
            { cell(&s.chord_m, length(s.chord_m.carved)) }
            { cell(&s.chord_m, by(s.chord_m.from_drawn)) }
            { cell(&s.thickness_m, length(s.thickness_m.carved)) }
            { cell(&s.thickness_m, by(s.thickness_m.from_drawn)) }
        </tr>
    }
}

/// A length as a calliper reads it.
pub(super) fn fine(units: Units, si: f64) -> String {
    fixed(units.shown(Quantity::Length, si), units.decimals(Quantity::Length).max(1))
}

/// The flight points as drawn, as carved and after the plan.
#[component]
pub(super) fn Points(props: &FoundProps) -> Html {
    let (found, units) = (&props.found, props.units);
    let after = |i: usize| found.plan.as_ref().ok().and_then(|plan| plan.after.flight_points.get(i));
    let rows = found.carved.flight_points.iter().enumerate().map(|(i, p)| {
        let planned = after(i);
        html! {
            <>
                { brief_row(&p.drawn, "drawn", None, None, units) }
                { brief_row(&p.carved, "carved", Some(p), p.once_per_turn, units) }
                if let Some(p) = planned {
                    { brief_row(&p.carved, "after the cuts below", Some(p), p.once_per_turn, units) }
                }
            </>
        }
    });
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label="Flight points as carved">
            <table class="sheet-table">
                <caption>
                    { "What it does, and what shakes the shaft once per turn: moments across it by unequal \
                       thrusts and by blades out of track, forces by unequal drag and unequal masses" }
                </caption>
                <thead><tr>
                    <th scope="col">{ "Flight point" }</th><th scope="col">{ "Blades" }</th>
                    <th scope="col">{ "Speed" }<small>{ units.symbol(Quantity::Speed) }</small></th>
                    <th scope="col">{ "rpm" }</th>
                    <th scope="col">{ "Thrust" }<small>{ units.symbol(Quantity::Force) }</small></th>
                    <th scope="col">{ "Efficiency" }</th>
                    <th scope="col">{ "Thrust by blade" }<small>{ units.symbol(Quantity::Force) }</small></th>
                    <th scope="col">{ "Moment, thrust" }<small>{ units.symbol(Quantity::Torque) }</small></th>
                    <th scope="col">{ "Moment, track" }<small>{ units.symbol(Quantity::Torque) }</small></th>
                    <th scope="col">{ "Force, air" }<small>{ units.symbol(Quantity::Force) }</small></th>
                    <th scope="col">{ "Force, masses" }<small>{ units.symbol(Quantity::Force) }</small></th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}

fn brief_row(
    b: &Brief,
    blades: &'static str,
    point: Option<&CarvedPoint>,
    once: Option<OncePerTurn>,
    units: Units,
) -> Html {
    let of = |quantity, value| figure(units, quantity, value);
    let each = |p: &CarvedPoint| {
        p.blades.iter().map(|l| of(Quantity::Force, Some(l.thrust_n))).collect::<Vec<_>>().join(" · ")
    };
    html! {
        <tr>
            if point.is_none() { <th scope="row">{ &b.name }</th> } else { <td></td> }
            <td>{ blades }</td>
            <td>{ of(Quantity::Speed, b.airspeed_m_s) }</td>
            <td>{ of(Quantity::Rpm, b.rpm) }</td>
            <td>{ of(Quantity::Force, b.thrust_n) }</td>
            <td>{ fixed_or_none(b.efficiency, 3) }</td>
            <td>{ point.map(each) }</td>
            <td>{ once.map(|o| of(Quantity::Torque, Some(o.moment_n_m))) }</td>
            <td>{ once.map(|o| of(Quantity::Torque, o.track_moment_n_m)) }</td>
            <td>{ once.map(|o| of(Quantity::Force, Some(o.air_force_n))) }</td>
            <td>{ once.map(|o| of(Quantity::Force, o.mass_force_n)) }</td>
        </tr>
    }
}

/// Which blade sinks.
#[component]
pub(super) fn Balance(props: &FoundProps) -> Html {
    let b = &props.found.carved.balance;
    let masses: Vec<String> =
        b.blades.iter().map(|m| with_unit(props.units, Quantity::Mass, Some(m.mass_kg))).collect();
    let density = if b.density_given { "" } else { ", the usual wood's, for the job names none" };
    let then = props.found.plan.as_ref().map_or_else(
        |_| String::new(),
        |plan| {
            if b.read {
                format!(" After the cuts below: {}.", plan.after.balance.says())
            } else {
                String::new()
            }
        },
    );
    html! {
        <p>
            <b>{ "Static balance " }</b>
            { format!(
                "by shape at {}\u{a0}kg/m³{density}: {} outside the hub; {}.{then}",
                fixed(b.density_kg_m3, 0),
                masses.join(" and "),
                b.says()
            ) }
        </p>
    }
}

/// Whether the blades hold as carved and after the cuts.
#[component]
pub(super) fn Holds(props: &FoundProps) -> Html {
    let after = props.found.plan.as_ref().ok().and_then(|plan| plan.after.strength.as_ref());
    let line = |before: &'static str, s: &CarvedStrength| {
        html! { <p class={(s.margin < 0.0).then_some("warning")}>{ before }{ s.says() }</p> }
    };
    html! {
        <>
            { for props.found.carved.strength.iter().map(|s| line("", s)) }
            { for after.iter().map(|s| line("After the cuts below. ", s)) }
        </>
    }
}
