//! A figure over pitch and diameter: its lines, the limits as edges, the drawn propeller; a click tries one.

use std::rc::Rc;

use spokeshave::job::{Figure, Job};
use spokeshave::shape::{PitchBy, sized};
use yew::prelude::*;

use super::figures::{ALL, name, told, unit};
use super::lines::{Layers, Place};
use crate::act::{Seen, use_act};
use crate::background::shape::{Chart, Task};
use crate::chart::axis::{bottom, left, most_on, placed, px, rows};
use crate::chart::figure::{Figure as Framed, Table};
use crate::chart::pointer::place;
use crate::chart::width::use_width;
use crate::form::{Pick, capital};
use crate::number::with_unit;
use crate::results::RigRef;
use crate::state::{Action, Beside, Variant};
use crate::units::{Quantity, Units};

/// Steps of the chart each way.
const STEPS: usize = 40;

/// Properties of [`PitchDiameter`].
#[derive(Properties, PartialEq)]
pub(super) struct PitchDiameterProps {
    pub(super) state: Seen,
    pub(super) rig: RigRef,
    pub(super) chart: Option<(Rc<Job>, Rc<Chart>)>,
    pub(super) busy: bool,
    pub(super) on_draw: Callback<Task>,
}

/// What is to be drawn, and the drawing.
#[component]
pub(super) fn PitchDiameter(props: &PitchDiameterProps) -> Html {
    let figure = use_state_eq(|| Figure::Efficiency);
    let state = &props.state;
    let figures: Vec<Figure> = ALL.into_iter().filter(|f| *f != Figure::TakeOffM).collect();
    let options: Vec<AttrValue> = figures.iter().map(|f| AttrValue::from(name(*f))).collect();
    let picked = figures.iter().position(|f| f == &*figure);
    let onpick = {
        let (figure, figures) = (figure.clone(), figures.clone());
        Callback::from(move |i: usize| figure.set(figures[i.min(figures.len() - 1)]))
    };
    let onclick = {
        let (on, task) = (props.on_draw.clone(), Task::Chart(state.point, *figure, STEPS));
        Callback::from(move |_: MouseEvent| on.emit(task.clone()))
    };
    let chart = props.chart.as_ref().filter(|(job, _)| **job == **state.job());
    html! {
        <section class="pitch-diameter">
            <h3>{ "Pitch and diameter" }</h3>
            <div class="buttons unprinted">
                <Pick label="Figure" {options} {picked} {onpick} />
                <button type="button" class="act" aria-disabled={props.busy.then_some("true")} {onclick}>
                    { format!("Draw it at {}", point_name(state)) }
                </button>
            </div>
            if let Some((_, chart)) = chart {
                <Drawing chart={chart.clone()} rig={props.rig.clone()} units={state.units} />
            } else if props.chart.is_some() {
                <p class="note">{ "The job has changed since the chart was drawn." }</p>
            }
        </section>
    }
}

fn point_name(state: &Seen) -> String {
    state.job().flight_points.get(state.point).map_or_else(String::new, |p| p.name.clone())
}

/// Properties of [`Drawing`].
#[derive(Properties, PartialEq)]
pub struct DrawingProps {
    /// The chart.
    pub chart: Rc<Chart>,
    /// The drawn blade.
    pub rig: RigRef,
    /// Units shown.
    pub units: Units,
}

/// The chart, as wide as its place, with its table.
#[component]
pub fn Drawing(props: &DrawingProps) -> Html {
    let (node, width) = use_width(560.0);
    let (chart, units) = (&props.chart, props.units);
    let at = Place::new(chart, width);
    let unit = unit(units, chart.figure);
    let layers =
        use_memo((chart.clone(), width.to_bits(), units), |(chart, ..)| Layers::new(chart, &at, &unit));
    let table = {
        let chart = chart.clone();
        Callback::from(move |()| tabled(&chart, units))
    };
    let title = format!("{} over pitch and diameter", capital(name(chart.figure)));
    let note = format!(
        "at {}; hatched: a limit is broken, of rpm and tip at this flight point alone. A click keeps that \
         blade beside the drawn one.",
        chart.flight_point
    );
    html! {
        <Framed {title} note={html! { note }} {table} class="chart-figure">
            <div ref={node}>
                <svg width={px(width)} height={px(Place::HEIGHT)}
                    viewBox={format!("0 0 {} {}", px(width), px(Place::HEIGHT))} role="img"
                    aria-label="A figure over pitch and diameter; its table has the figures">
                    { axes(&at, units) }
                    { painted(&at, &layers) }
                    { drawn(&at, chart) }
                    <Pane chart={chart.clone()} rig={props.rig.clone()} {units} {width} />
                </svg>
            </div>
        </Framed>
    }
}

fn axes(at: &Place, units: Units) -> Html {
    let length = units.unit(Quantity::Length);
    let along = placed(&at.x, &length, most_on(at.width(), 56.0));
    let up = placed(&at.y, &length, most_on(at.height(), 30.0));
    html! {
        <g aria-hidden="true">
            { rows(&up, at.left, at.right) }
            <rect class="frame" x={px(at.left)} y={px(at.top)} width={px(at.width())} height={px(at.height())} />
            { left(&up, at.left) }
            { bottom(&along, at.low) }
            <text class="axis-figure" x={px(at.right)} y={px(at.low + 31.0)} text-anchor="end">
                { format!("diameter, {}", length.name) }
            </text>
            <text class="axis-figure" x={px(at.left)} y={px(at.top - 8.0)}>
                { format!("pitch at 0.75 R, {}", length.name) }
            </text>
        </g>
    }
}

/// Width of a letter of the words in the chart, px.
const LETTER: f64 = 7.0;

fn painted(at: &Place, layers: &Layers) -> Html {
    let [x, y, w, h] = at.pane().map(px);
    let lines = layers.lines.iter().map(|line| html! { <path class="contour" d={line.data.clone()} /> });
    let edges = layers.edges.iter().map(|edge| {
        html! { <><path class="broken" d={edge.data.clone()} /><path class="edge" d={edge.data.clone()} /></> }
    });
    let words = layers.lines.iter().chain(&layers.edges).filter_map(|line| {
        let spot = line.at?;
        let class = if line.limit { "haloed strong" } else { "haloed" };
        // Long words of an edge near the rim stay inside.
        let half = 0.5 * LETTER * line.words.chars().count() as f64;
        let x = spot[0].min(at.right - half).max(at.left + half);
        Some(html! { <text {class} x={px(x)} y={px(spot[1] + 4.0)} text-anchor="middle">{ &line.words }</text> })
    });
    html! {
        <g aria-hidden="true">
            <svg x={x.clone()} y={y.clone()} width={w.clone()} height={h.clone()}
                viewBox={format!("{x} {y} {w} {h}")}>
                <path class="missing" d={layers.missing.clone()} />{ for lines }{ for edges }
            </svg>
            { for words }
        </g>
    }
}

fn drawn(at: &Place, chart: &Chart) -> Html {
    let (pitch, diameter) = chart.drawn_m;
    let [x, y] = [at.x.px(diameter), at.y.px(pitch)];
    html! {
        <g aria-hidden="true">
            <circle class="drawn-mark" cx={px(x)} cy={px(y)} r="5" />
            <text class="haloed strong" x={px(x + 9.0)} y={px(y - 8.0)}>{ "drawn" }</text>
        </g>
    }
}

#[derive(Properties, PartialEq)]
struct PaneProps {
    chart: Rc<Chart>,
    rig: RigRef,
    units: Units,
    width: f64,
}

/// Says what is under the pointer; a click keeps that blade.
#[component]
fn Pane(props: &PaneProps) -> Html {
    let act = use_act();
    let under = use_state_eq(|| None::<[f64; 2]>);
    let at = Place::new(&props.chart, props.width);
    let pane = at.pane();
    let onmousemove = {
        let under = under.clone();
        Callback::from(move |e: MouseEvent| under.set(place(&e, pane)))
    };
    let onmouseleave = {
        let under = under.clone();
        Callback::from(move |_: MouseEvent| under.set(None))
    };
    let onclick = {
        let (chart, rig, units) = (props.chart.clone(), props.rig.clone(), props.units);
        Callback::from(move |e: MouseEvent| {
            let at =
                place(&e, pane).and_then(|[x, y]| tried(&chart, &rig, units, at.nearest(&chart, [x, y])));
            if let Some(variant) = at {
                act.send(Action::Beside(Beside::Keep(variant)));
            }
        })
    };
    let [x, y, w, h] = pane.map(px);
    html! {
        <g class="reading">
            { under.map(|p| read(props, &at, p)) }
            <rect class="reach" {x} {y} width={w} height={h} {onmousemove} {onmouseleave} {onclick} />
        </g>
    }
}

/// The blade of a place of the chart.
fn tried(chart: &Chart, rig: &RigRef, units: Units, (p, d): (usize, usize)) -> Option<Variant> {
    let (pitch_m, diameter_m) = (chart.pitches_m[p], chart.diameters_m[d]);
    let propeller = sized(&rig.0, pitch_m, diameter_m, PitchBy::Scale).ok()?.job.propeller;
    let length = |m| with_unit(units, Quantity::Length, Some(m));
    Some(Variant {
        name: format!("pitch {}, diameter {}", length(pitch_m), length(diameter_m)),
        propeller,
        said: Vec::new(),
    })
}

fn read(props: &PaneProps, at: &Place, under: [f64; 2]) -> Html {
    let (chart, units) = (&props.chart, props.units);
    let (p, d) = at.nearest(chart, under);
    let i = p * chart.diameters_m.len() + d;
    let length = |m| with_unit(units, Quantity::Length, Some(m));
    let first = format!("pitch {}, diameter {}", length(chart.pitches_m[p]), length(chart.diameters_m[d]));
    let broken: Vec<&str> = chart.broken[i].iter().map(|k| chart.limits[usize::from(*k)].as_str()).collect();
    let mut second = told(units, chart.figure, chart.values[i]);
    if !broken.is_empty() {
        second = format!("{second}; breaks: {}", broken.join(", "));
    }
    let longest = first.chars().count().max(second.chars().count()) as f64;
    let (wide, x, y) = (6.3 * longest + 14.0, at.x.px(chart.diameters_m[d]), at.y.px(chart.pitches_m[p]));
    let plate_x = (x + 10.0).min(at.right - wide).max(at.left);
    let plate_y = if y - 50.0 < at.top { y + 10.0 } else { y - 50.0 };
    html! {
        <>
            <circle class="cross" cx={px(x)} cy={px(y)} r="4" />
            <rect class="plate" x={px(plate_x)} y={px(plate_y)} width={px(wide)} height="40" rx="3" />
            <text x={px(plate_x + 7.0)} y={px(plate_y + 16.0)}>{ first }</text>
            <text class="strong" x={px(plate_x + 7.0)} y={px(plate_y + 32.0)}>{ second }</text>
        </>
    }
}

/// Every fourth step, for reading and for those who do not see the drawing.
fn tabled(chart: &Chart, units: Units) -> Table {
    const EVERY: usize = 4;
    let length = |m: &f64| AttrValue::from(with_unit(units, Quantity::Length, Some(*m)));
    let mut columns = vec![AttrValue::from("pitch \\ diameter")];
    columns.extend(chart.diameters_m.iter().step_by(EVERY).map(length));
    let row = |p: usize| {
        let cell = |d: usize| {
            let i = p * chart.diameters_m.len() + d;
            let mark = if chart.broken[i].is_empty() { "" } else { " *" };
            AttrValue::from(told(units, chart.figure, chart.values[i]) + mark)
        };
        std::iter::once(length(&chart.pitches_m[p]))
            .chain((0..chart.diameters_m.len()).step_by(EVERY).map(cell))
            .collect()
    };
    Table { columns, rows: (0..chart.pitches_m.len()).step_by(EVERY).map(row).collect() }
}
