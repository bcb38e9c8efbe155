//! A curve with rings: dragging, keys, and what a reader of the screen hears.

use yew::prelude::*;

use super::frame::{Frame, Spans};
use super::lines::{Best, BestAt, Line};
use super::ring::{Hand, Ring};
use crate::chart::axis::{bottom, left, most_on, placed, px, rows};
use crate::chart::path::{polygon, polyline};
use crate::chart::unit::Unit;
use crate::chart::width::use_width;
use crate::number::fixed;
use crate::state::Measure;

/// Properties of [`DragCurve`].
#[derive(Properties, PartialEq)]
pub struct DragCurveProps {
    /// Heading.
    pub title: AttrValue,
    /// What is measured, in which unit.
    pub what: AttrValue,
    /// What the rings move, one set of rings each.
    pub measures: &'static [Measure],
    /// The curves, one for each measure.
    pub lines: Vec<Line>,
    /// The best angles.
    #[prop_or_default]
    pub best: Best,
    /// The same curves of the blade compared.
    #[prop_or_default]
    pub ghosts: Vec<Line>,
    /// Radius (m) and figure (SI, or degrees) of each station, for each measure.
    pub rings: Vec<Vec<[f64; 2]>>,
    /// What the axes are made for.
    pub spans: Spans,
    /// Unit of length.
    pub length: Unit,
    /// The station selected.
    pub selected: usize,
    /// Height, pixels.
    pub height: f64,
}

/// A curve over radius with a ring at each station.
#[component]
pub fn DragCurve(props: &DragCurveProps) -> Html {
    let (node, width) = use_width(360.0);
    let pull = use_mut_ref(|| None::<super::pull::Pull>);
    let unit = if props.measures.contains(&Measure::Angle) { Unit::DEGREE } else { props.length };
    let frame = Frame::new(props.spans, unit, (width, props.height));
    let selected_m = props.rings.first().and_then(|r| r.get(props.selected)).map_or(0.0, |at| at[0]);
    let hand = Hand { pull, slope: frame.y.slope() };
    let rings = props.measures.iter().zip(&props.rings).map(|(&m, at)| rings(props, &frame, &hand, m, at));
    html! {
        <figure class="drag-curve">
            <figcaption><b>{ &props.title }</b><span>{ format!(", {}", props.what) }</span></figcaption>
            <div ref={node}>
                <svg width={px(width)} height={px(props.height)}
                    viewBox={format!("0 0 {} {}", px(width), px(props.height))}
                    role="group" aria-label={format!("{} over radius; each ring can be moved", props.title)}>
                    { axes(&frame, unit, props.length) }
                    { best(&frame, &props.best) }
                    { for props.ghosts.iter().map(|line| html! { <path class="ghost" d={path(&frame, line)} /> }) }
                    { for props.lines.iter().enumerate().map(|(i, line)| curve(&frame, line, i, selected_m)) }
                    { for rings }
                </svg>
            </div>
        </figure>
    }
}

fn axes(frame: &Frame, unit: Unit, length: Unit) -> Html {
    let up = placed(&frame.y, &unit, most_on(frame.low - frame.top, 26.0));
    let along = placed(&frame.x, &length, most_on(frame.right - frame.left, 52.0));
    html! {
        <g aria-hidden="true">
            { rows(&up, frame.left, frame.right) }
            <rect class="frame" x={px(frame.left)} y={px(frame.top)} width={px(frame.right - frame.left)}
                height={px(frame.low - frame.top)} />
            { left(&up, frame.left) }
            { bottom(&along, frame.low) }
            <text class="axis-figure" x={px(frame.right)} y={px(frame.low + 31.0)} text-anchor="end">
                { format!("radius, {}", length.name) }
            </text>
        </g>
    }
}

fn best(frame: &Frame, best: &Best) -> Html {
    if best.points.len() < 2 {
        return html! {};
    }
    let place = |b: &BestAt, y: f64| [frame.x.px(b.radius_m), frame.y.px(frame.y.held(y))];
    let band = best.points.iter().map(|b| place(b, b.high_deg));
    let band = band.chain(best.points.iter().rev().map(|b| place(b, b.low_deg)));
    let line = best.points.iter().map(|b| place(b, b.angle_deg));
    html! {
        <g aria-hidden="true">
            <path class="working-band" d={polygon(band)} />
            <path class="curve is-dashed" d={polyline(line)} />
            <text class="haloed quiet" x={px(frame.right - 6.0)} y={px(frame.top + 16.0)} text-anchor="end">
                { &best.name }
            </text>
        </g>
    }
}

fn path(frame: &Frame, line: &Line) -> String {
    let inside = |p: &&[f64; 2]| frame.x.holds(p[0]);
    polyline(line.points.iter().filter(inside).map(|p| [frame.x.px(p[0]), frame.y.px(frame.y.held(p[1]))]))
}

fn curve(frame: &Frame, line: &Line, i: usize, selected_m: f64) -> Html {
    let path = path(frame, line);
    // The first curve has its name below it, the second above.
    // It keeps away from the figure of the ring selected.
    let places = [2, 5].map(|ninths| line.points[line.points.len() * ninths / 9]);
    let away = |p: &[f64; 2]| (p[0] - selected_m).abs();
    let at = if away(&places[0]) > away(&places[1]) { places[0] } else { places[1] };
    // A falling curve leaves room on the left under it.
    let falls = line.points.first().zip(line.points.last()).is_some_and(|(a, b)| a[1] > 2.0 * b[1]);
    let (off, anchor) = match (i, falls) {
        (0, true) => ([-10.0, 20.0], "end"),
        (0, false) => ([0.0, 24.0], "middle"),
        _ => ([0.0, -10.0], "middle"),
    };
    html! {
        <g aria-hidden="true">
            <path class="curve" d={path} />
            <text class="haloed strong" x={px(frame.x.px(at[0]) + off[0])} y={px(frame.y.px(at[1]) + off[1])}
                text-anchor={anchor}>
                { line.name }
            </text>
        </g>
    }
}

fn rings(props: &DragCurveProps, frame: &Frame, hand: &Hand, measure: Measure, at: &[[f64; 2]]) -> Html {
    let unit = if measure == Measure::Angle { Unit::DEGREE } else { props.length };
    let ring = |(i, &[radius, value]): (usize, &[f64; 2])| {
        let place = [frame.x.px(radius), frame.y.px(frame.y.held(value))];
        let figure = fixed(unit.of(value), unit.decimals.max(1));
        html! {
            <Ring key={i} station={i} count={at.len()} {measure} {value} {place} chosen={i == props.selected}
                hand={hand.clone()}
                shown={unit.of(value)} {figure} unit={unit.name} />
        }
    };
    html! { <g>{ for at.iter().enumerate().map(ring) }</g> }
}
