//! Readings beside what is expected, and the flight points before and after.

use std::rc::Rc;

use spokeshave::result::{Brief, LogLine, Logged};
use yew::prelude::*;

use crate::chart::line::{Axis, LineChart, Series, Stroke};
use crate::chart::unit::Unit;
use crate::number::{figure, fixed_or_none, signed_or_none};
use crate::units::{Quantity, Units};

/// Properties of the tables.
#[derive(Clone, Properties, PartialEq)]
pub(super) struct LinesProps {
    pub(super) logged: Rc<Logged>,
    pub(super) units: Units,
    /// Whether the engine is a motor.
    pub(super) electric: bool,
}

/// Every reading with its residual.
#[component]
pub(super) fn Lines(props: &LinesProps) -> Html {
    let rows = props.logged.readings.iter().enumerate().map(|(i, line)| row(i, line, props));
    let (flow, of) = consumed(props.electric);
    html! {
        <>
        <Residuals ..props.clone() />
        <div class="scroll" tabindex="0" role="region" aria-label="Readings against what is expected">
            <table class="sheet-table">
                <caption>{ "Readings against what is expected without and with the factors" }</caption>
                <thead><tr>
                    <th scope="col">{ "Reading" }</th><th scope="col">{ "Rpm read" }</th>
                    <th scope="col">{ "less expected, before" }</th>
                    <th scope="col">{ "with the factors" }</th>
                    <th scope="col">{ flow }<small>{ props.units.symbol(of) }</small></th>
                    <th scope="col">{ "expected, before" }</th>
                    <th scope="col">{ "with the factors" }</th>
                    <th scope="col">{ "Off" }<small>{ "times its likely error" }</small></th>
                    <th scope="col">{ "Remark" }</th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
        </>
    }
}

/// Rpm read less expected, reading by reading.
#[component]
fn Residuals(props: &LinesProps) -> Html {
    let all = &props.logged.readings;
    let series = |name: &'static str, stroke, of: fn(&LogLine) -> Option<f64>| Series {
        name: name.into(),
        points: all
            .iter()
            .enumerate()
            .map(|(i, l)| [i as f64 + 1.0, less(l, of(l)).unwrap_or(f64::NAN)])
            .collect(),
        stroke,
    };
    let series = vec![
        series("without the factors", Stroke::Dashed, |l| l.before_rpm),
        series("with them", Stroke::Solid, |l| l.after_rpm),
    ];
    let known = series.iter().flat_map(|s| &s.points).filter(|p| p[1].is_finite()).count();
    if known < 4 {
        return html! {};
    }
    let number = |name| Unit { name, per_si: 1.0, decimals: 0 };
    let span = Some((1.0, all.len() as f64));
    let x = Axis { words: "reading".into(), unit: number(""), span };
    let y = Axis { words: "rpm read less expected".into(), unit: number("rpm"), span: None };
    html! { <LineChart title="Engine rpm read less rpm expected" {x} {y} {series} height={200.0} /> }
}

fn less(l: &LogLine, expected: Option<f64>) -> Option<f64> {
    Some(l.engine_rpm? - expected?)
}

/// What an engine takes, and what measures it.
fn consumed(electric: bool) -> (&'static str, Quantity) {
    if electric { ("Current", Quantity::Current) } else { ("Fuel", Quantity::FuelFlow) }
}

fn row(i: usize, l: &LogLine, props: &LinesProps) -> Html {
    let units = props.units;
    let (_, of) = consumed(props.electric);
    let flow = |value: Option<f64>| fixed_or_none(value.map(|v| units.shown(of, v)), 2);
    let less = |expected: Option<f64>| signed_or_none(less(l, expected), 0);
    html! {
        <tr class={classes!(l.outlier.then_some("outlier"))}>
            <th scope="row">{ i + 1 }</th>
            <td>{ figure(units, Quantity::Rpm, l.engine_rpm) }</td>
            <td>{ less(l.before_rpm) }</td>
            <td>{ less(l.after_rpm) }</td>
            <td>{ flow(l.consumption) }</td>
            <td>{ flow(l.before_consumption) }</td>
            <td>{ flow(l.after_consumption) }</td>
            <td>{ fixed_or_none(l.off, 1) }</td>
            <td class="state">{ &l.remark }</td>
        </tr>
    }
}

/// Every flight point before and after.
#[component]
pub(super) fn BeforeAfter(props: &LinesProps) -> Html {
    let pairs = props.logged.flight_points.iter().map(|c| (&c.drawn, &c.shaped));
    html! { { points("Every flight point without and with the factors", ["without", "with"], pairs, props.units) } }
}

/// Flight points in pairs of rows.
pub(super) fn points<'b>(
    caption: &str,
    names: [&'static str; 2],
    pairs: impl Iterator<Item = (&'b Brief, &'b Brief)>,
    units: Units,
) -> Html {
    let rows = pairs
        .map(|(a, b)| html! { <>{ brief(a, names[0], true, units) }{ brief(b, names[1], false, units) }</> });
    let heading = |words: &'static str, quantity| {
        html! {
            <th scope="col">{ words }<small>{ units.symbol(quantity) }</small></th>
        }
    };
    html! {
        <div class="scroll" tabindex="0" role="region" aria-label={caption.to_string()}>
            <table class="sheet-table">
                <caption>{ caption }</caption>
                <thead><tr>
                    <th scope="col">{ "Flight point" }</th><th scope="col">{ "Which" }</th>
                    { heading("Speed", Quantity::Speed) }{ heading("Rpm", Quantity::Number) }
                    { heading("Thrust", Quantity::Force) }
                    { heading("Power", Quantity::Power) }{ heading("Efficiency", Quantity::Number) }
                    { heading("Climb", Quantity::Climb) }
                    <th scope="col">{ "Remark" }</th>
                </tr></thead>
                <tbody>{ for rows }</tbody>
            </table>
        </div>
    }
}

fn brief(b: &Brief, name: &'static str, first: bool, units: Units) -> Html {
    let words = match (b.held_at_limit, b.rpm) {
        (true, _) => "throttled back to the limit rpm",
        (false, None) => b.state.sentence(),
        (false, Some(_)) => "",
    };
    html! {
        <tr>
            if first { <th scope="row">{ &b.name }</th> } else { <td></td> }
            <td>{ name }</td>
            <td>{ figure(units, Quantity::Speed, b.airspeed_m_s) }</td>
            <td>{ figure(units, Quantity::Rpm, b.rpm) }</td>
            <td>{ figure(units, Quantity::Force, b.thrust_n) }</td>
            <td>{ figure(units, Quantity::Power, b.power_w) }</td>
            <td>{ fixed_or_none(b.efficiency, 3) }</td>
            <td>{ figure(units, Quantity::Climb, b.rate_of_climb_m_s) }</td>
            <td class="state">{ words }</td>
        </tr>
    }
}
