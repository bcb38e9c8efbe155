//! A line chart: curves with their names on them, points, limits, spans and upright flight points.

pub mod grip;
mod inside;
mod labels;
mod layout;
mod reading;
mod table;

use super::axis::{bottom, left, most_on, placed, px};
use super::figure::Figure;
use super::unit::Unit;
use super::width::use_width;
use grip::{Grip, GripProps, Holder};
use layout::Layout;
use reading::{Reading, ReadingProps};
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
    /// Whether the far side, which is above, is hatched.
    pub hatched: bool,
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
    /// Past a limit at its start.
    Past,
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
    /// An upright line that can be moved along.
    #[prop_or_default]
    pub grip: Option<Grip>,
    /// Height, pixels.
    #[prop_or(220.0)]
    pub height: f64,
}

/// A line chart as wide as its place.
#[component]
pub fn LineChart(props: &LineChartProps) -> Html {
    let (node, width) = use_width(340.0);
    let layout = Layout::new(props, width);
    let reading = ReadingProps::new(&layout, props.series.clone(), [props.x.clone(), props.y.clone()]);
    let table = {
        let (title, x, y, series) =
            (props.title.clone(), props.x.clone(), props.y.clone(), props.series.clone());
        Callback::from(move |()| table::table(&title, &x, &y, &series))
    };
    html! {
        <Figure title={props.title.clone()} {table} class="line-figure">
            <div class="line-chart" ref={node}>
                <svg width={px(width)} height={px(props.height)}
                    viewBox={format!("0 0 {} {}", px(width), px(props.height))}
                    role="img" aria-label={description(props)}>
                    { inside::inside(&layout, props) }
                    { axes(&layout, props) }
                    { labels::points(&layout, props) }
                    { labels::names(&layout, props) }
                    <Reading ..reading />
                </svg>
                { props.grip.clone().map(|grip| html! { <Holder ..GripProps::new(&layout, grip, props.x.unit) /> }) }
            </div>
        </Figure>
    }
}

fn description(props: &LineChartProps) -> String {
    let names: Vec<&str> = props.series.iter().map(|s| s.name.as_str()).filter(|n| !n.is_empty()).collect();
    let of = if names.is_empty() { String::new() } else { format!(": {}", names.join(", ")) };
    format!("{}{of}; {} over {}", props.title, props.y.words, props.x.words)
}

fn axes(layout: &Layout, props: &LineChartProps) -> Html {
    let along = placed(&layout.x, &props.x.unit, most_on(layout.width(), 52.0));
    let up = placed(&layout.y, &props.y.unit, layout.rows);
    html! {
        <g aria-hidden="true">
            <rect class="frame" x={px(layout.left)} y={px(layout.top)} width={px(layout.width())}
                height={px(layout.height())} />
            { bottom(&along, layout.low) }
            { left(&up, layout.left) }
            <text class="axis-figure" x="0" y="11">{ heading(&props.y) }</text>
            <text class="axis-figure" x={px(layout.right)} y={px(layout.low + 31.0)} text-anchor="end">
                { heading(&props.x) }
            </text>
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
