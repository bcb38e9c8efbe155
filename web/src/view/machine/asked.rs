//! Drag and power asked for in level flight, over airspeed, with the speeds that matter marked.

use spokeshave::air::Air;
use spokeshave::aircraft::{Asked, asked};
use spokeshave::job::Aeroplane;
use yew::prelude::*;

use super::aircraft::{axis_units, named_speeds};
use crate::chart::line::{Axis, LineChart, Point, Series, Span, SpanKind, Stroke, Upright};
use crate::number::figure;
use crate::units::{Quantity, Units};

/// Speeds on a curve.
const SPEEDS: u32 = 60;

/// Properties of [`AskedCharts`].
#[derive(Properties, PartialEq)]
pub(super) struct AskedChartsProps {
    pub(super) aircraft: Aeroplane,
    pub(super) air: Air,
    pub(super) units: Units,
}

/// Two charts over one airspeed axis.
#[component]
pub(super) fn AskedCharts(props: &AskedChartsProps) -> Html {
    html! {
        <div class="duo">
            { chart(props, "Drag", "drag", |p| p.drag_n) }
            { chart(props, "Power asked for", "power", |p| p.power_w) }
        </div>
    }
}

fn chart(props: &AskedChartsProps, title: &'static str, what: &'static str, of: fn(&Asked) -> f64) -> Html {
    let (a, air, units) = (&props.aircraft, &props.air, props.units);
    let curve = asked(a, air, SPEEDS);
    let [speed, force, power] = axis_units(units);
    let last = curve.last().map_or(1.0, |p| p.airspeed_m_s);
    let named = named_speeds(a, air);
    let stall = named.iter().find(|n| n.0 == "stall").map(|n| n.1);
    let flown = || named.iter().filter(|n| n.0 != "stall");
    // Each mark in the chart whose least it is; the fast cruise beside the power it takes.
    let marked = |name: &str| (name == "least drag") == (what == "drag");
    let words = |name: &str, v: f64| format!("{name} {}", figure(units, Quantity::Speed, Some(v)));
    let points: Vec<Point> = flown()
        .filter(|n| marked(n.0))
        .filter_map(|(name, v)| {
            let at = [*v, of(&Asked::at(a, air, *v)?)];
            Some(Point { at, words: words(name, *v).into(), class: None, strong: false })
        })
        .collect();
    let uprights: Vec<Upright> =
        flown().map(|(name, v)| Upright { x: *v, name: words(name, *v).into(), chosen: false }).collect();
    let spans: Vec<Span> = stall
        .map(|v| Span { x: (0.0, v), kind: SpanKind::Stalled, words: words("stall", v).into() })
        .into_iter()
        .collect();
    let points_of = curve.iter().map(|p| [p.airspeed_m_s, of(p)]).collect();
    let series = vec![Series { name: AttrValue::default(), points: points_of, stroke: Stroke::Dashed }];
    let x = Axis { words: "airspeed".into(), unit: speed, span: Some((0.0, last)) };
    let unit = if what == "drag" { force } else { power };
    let y = Axis { words: AttrValue::default(), unit, span: None };
    html! { <LineChart {title} {x} {y} {series} {points} {uprights} {spans} height={230.0} /> }
}
