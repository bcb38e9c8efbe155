//! A line chart: curves with their names on them, points, limits, spans and upright flight points.

mod labels;
mod layout;
mod table;

use super::axis::{bottom, left, most_on, placed, px, rows};
use super::figure::Figure;
use super::path::polyline;
use super::unit::Unit;
use super::width::use_width;
use layout::Layout;
use yew::prelude::*;

/// How a curve is drawn.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Stroke {
    /// The blade, or full throttle.
    #[default]
    Solid,
    /// What is asked, or the best.
    Dashed,
    /// Derived from another curve.
    Dotted,
}

/// A curve.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Series {
    /// Its name, written on it; none is written when empty.
    pub name: AttrValue,
    /// Points in SI; one that is not finite breaks the curve.
    pub points: Vec<[f64; 2]>,
    /// How it is drawn.
    pub stroke: Stroke,
}

/// A point with words.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Point {
    /// Where, SI.
    pub at: [f64; 2],
    /// What it says.
    pub words: AttrValue,
    /// Style class: its fill, as from [`super::departure::style`].
    pub class: Option<&'static str>,
    /// Whether the words are set bold.
    pub strong: bool,
}

/// A limit: a line, hatched on the far side.
#[derive(Clone, Debug, PartialEq)]
pub struct Limit {
    /// Where, SI.
    pub y: f64,
    /// What it is.
    pub words: AttrValue,
    /// Whether the far side is above.
    pub above: bool,
}

/// An upright line, such as a flight point.
#[derive(Clone, Debug, PartialEq)]
pub struct Upright {
    /// Where, SI.
    pub x: f64,
    /// Its name, shown when the pointer rests on it.
    pub name: AttrValue,
    /// Whether it is the one shown.
    pub chosen: bool,
}

/// What a span along x means.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SpanKind {
    /// The working band.
    Working,
    /// Stalled.
    Stalled,
}

/// A span along x over the whole height.
#[derive(Clone, Debug, PartialEq)]
pub struct Span {
    /// From and to, SI; what leaves the frame is cut off.
    pub x: (f64, f64),
    /// What it means.
    pub kind: SpanKind,
    /// Words at its top; none when empty.
    pub words: AttrValue,
}

/// An axis.
#[derive(Clone, Debug, PartialEq)]
pub struct Axis {
    /// What it measures.
    pub words: AttrValue,
    /// In which unit.
    pub unit: Unit,
    /// Its span, SI; from the data when `None`.
    pub span: Option<(f64, f64)>,
}

/// Properties of [`LineChart`].
#[derive(Properties, PartialEq)]
pub struct LineChartProps {
    /// Heading.
    pub title: AttrValue,
    /// Along.
    pub x: Axis,
    /// Up.
    pub y: Axis,
    /// The curves.
    pub series: Vec<Series>,
    /// Points with words.
    #[prop_or_default]
    pub points: Vec<Point>,
    /// Limits.
    #[prop_or_default]
    pub limits: Vec<Limit>,
    /// Upright lines.
    #[prop_or_default]
    pub uprights: Vec<Upright>,
    /// Spans.
    #[prop_or_default]
    pub spans: Vec<Span>,
    /// Height, pixels.
    #[prop_or(220.0)]
    pub height: f64,
}

/// A line chart as wide as its place.
#[component]
pub fn LineChart(props: &LineChartProps) -> Html {
    let (node, width) = use_width(340.0);
    let layout = Layout::new(props, width);
    let table = {
        let (title, x, y, series) =
            (props.title.clone(), props.x.clone(), props.y.clone(), props.series.clone());
        Callback::from(move |()| table::table(&title, &x, &y, &series))
    };
    html! {
        <Figure title={props.title.clone()} {table} class="line-figure">
            <div class="line-chart" ref={node}>
                <svg width={px(width)} height={px(props.height)} viewBox={format!("0 0 {} {}", px(width), px(props.height))}
                    role="img" aria-label={description(props)}>
                    { inside(&layout, props) }
                    { axes(&layout, props) }
                    { labels::points(&layout, props) }
                    { labels::names(&layout, props) }
                </svg>
            </div>
        </Figure>
    }
}

fn description(props: &LineChartProps) -> String {
    let names: Vec<&str> = props.series.iter().map(|s| s.name.as_str()).filter(|n| !n.is_empty()).collect();
    let of = if names.is_empty() { String::new() } else { format!(": {}", names.join(", ")) };
    format!("{}{of}; {} over {}", props.title, props.y.words, props.x.words)
}

/// What is cut off at the frame.
fn inside(layout: &Layout, props: &LineChartProps) -> Html {
    let [x, y, w, h] = [layout.left, layout.top, layout.width(), layout.height()].map(px);
    let upright = |u: &Upright| {
        let class = classes!("upright", u.chosen.then_some("is-chosen"));
        let at = px(layout.x.px(u.x));
        html! {
            <line {class} x1={at.clone()} x2={at} y1={px(layout.top)} y2={px(layout.low)}><title>{ &u.name }</title></line>
        }
    };
    let curve = |s: &Series| {
        let class = match s.stroke {
            Stroke::Solid => "curve",
            Stroke::Dashed => "curve is-dashed",
            Stroke::Dotted => "curve is-dotted",
        };
        html! { <path {class} d={polyline(s.points.iter().map(|p| layout.place(*p)))} /> }
    };
    html! {
        <svg x={x.clone()} y={y.clone()} width={w.clone()} height={h.clone()} viewBox={format!("{x} {y} {w} {h}")} aria-hidden="true">
            { for props.spans.iter().map(|s| span(layout, s)) }
            { rows(&placed(&layout.y, &props.y.unit, layout.rows), layout.left, layout.right) }
            if layout.y.holds(0.0) {
                <line class="zero" x1={px(layout.left)} x2={px(layout.right)} y1={px(layout.y.px(0.0))} y2={px(layout.y.px(0.0))} />
            }
            { for props.limits.iter().map(|l| limit(layout, l)) }
            { for props.uprights.iter().map(upright) }
            { for props.series.iter().map(curve) }
        </svg>
    }
}

fn span(layout: &Layout, span: &Span) -> Html {
    let (from, to) = (layout.x.px(layout.x.held(span.x.0)), layout.x.px(layout.x.held(span.x.1)));
    let class = match span.kind {
        SpanKind::Working => "working-band is-edged",
        SpanKind::Stalled => "stalled is-quiet",
    };
    html! { <rect {class} x={px(from)} y={px(layout.top)} width={px((to - from).max(0.0))} height={px(layout.height())} /> }
}

fn limit(layout: &Layout, limit: &Limit) -> Html {
    let at = layout.y.px(layout.y.held(limit.y));
    let (from, to) = if limit.above { (layout.top, at) } else { (at, layout.low) };
    let (left, right) = (px(layout.left), px(layout.right));
    html! {
        <>
            <rect class="past-limit" x={left.clone()} y={px(from)} width={px(layout.width())} height={px((to - from).max(0.0))} />
            <line class="limit" x1={left} x2={right} y1={px(at)} y2={px(at)} />
        </>
    }
}

fn axes(layout: &Layout, props: &LineChartProps) -> Html {
    let along = placed(&layout.x, &props.x.unit, most_on(layout.width(), 52.0));
    let up = placed(&layout.y, &props.y.unit, layout.rows);
    html! {
        <g aria-hidden="true">
            <rect class="frame" x={px(layout.left)} y={px(layout.top)} width={px(layout.width())} height={px(layout.height())} />
            { bottom(&along, layout.low) }
            { left(&up, layout.left) }
            <text class="axis-figure" x="0" y="11">{ heading(&props.y) }</text>
            <text class="axis-figure" x={px(layout.right)} y={px(layout.low + 31.0)} text-anchor="end">{ heading(&props.x) }</text>
        </g>
    }
}

/// What an axis measures and in what, once.
pub(super) fn heading(axis: &Axis) -> String {
    match (axis.words.is_empty(), axis.unit.name.is_empty()) {
        (_, true) => axis.words.to_string(),
        (true, false) => axis.unit.name.to_owned(),
        (false, false) => format!("{}, {}", axis.words, axis.unit.name),
    }
}
