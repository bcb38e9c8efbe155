//! What the curves say under the pointer. Only this pane is drawn again when the pointer moves.

use super::layout::Layout;
use super::table::read;
use super::{Axis, Series};
use crate::chart::axis::px;
use crate::chart::linear::Linear;
use crate::chart::pointer::place;
use yew::prelude::*;

/// Properties of [`Reading`].
#[derive(Clone, Properties, PartialEq)]
pub(super) struct ReadingProps {
    pub(super) series: Vec<Series>,
    pub(super) axes: [Axis; 2],
    pub(super) x: Linear,
    pub(super) y: Linear,
    /// Left, top, width, height.
    pub(super) pane: [f64; 4],
}

impl ReadingProps {
    pub(super) fn new(layout: &Layout, series: Vec<Series>, axes: [Axis; 2]) -> Self {
        let pane = [layout.left, layout.top, layout.width(), layout.height()];
        Self { series, axes, x: layout.x, y: layout.y, pane }
    }
}

/// A pane over the chart.
#[component]
pub(super) fn Reading(props: &ReadingProps) -> Html {
    let pointer = use_state_eq(|| None::<f64>);
    let onmousemove = {
        let (pointer, pane) = (pointer.clone(), props.pane);
        Callback::from(move |event: MouseEvent| pointer.set(place(&event, pane).map(|at| at[0])))
    };
    let onmouseleave = {
        let pointer = pointer.clone();
        Callback::from(move |_: MouseEvent| pointer.set(None))
    };
    let [x, y, w, h] = props.pane.map(px);
    html! {
        <g class="reading" aria-hidden="true">
            { pointer.map(|x| shown(props, x)) }
            <rect class="reach" {x} {y} width={w} height={h} {onmousemove} {onmouseleave} />
        </g>
    }
}

/// A line at the pointer, a dot on every curve, the place along in the foot and each figure beside its dot.
fn shown(props: &ReadingProps, x: f64) -> Html {
    let [left, top, width, height] = props.pane;
    let at = props.x.value(x);
    let (side, anchor) = if x > left + 0.6 * width { (-8.0, "end") } else { (8.0, "start") };
    let dot = |series: &Series| {
        let value = read(&series.points, at)?;
        let y = props.y.px(value);
        let figure = props.axes[1].unit.figure(value);
        Some(html! {
            <>
                <circle class="reading-dot" cx={px(x)} cy={px(y)} r="3" />
                <text class="haloed strong" x={px(x + side)} y={px((y - 6.0).max(top + 11.0))} text-anchor={anchor}>
                    { figure }
                </text>
            </>
        })
    };
    let at_words = props.axes[0].unit.figure(at);
    html! {
        <>
            <line class="cross" x1={px(x)} x2={px(x)} y1={px(top)} y2={px(top + height)} />
            <text class="haloed" x={px(x)} y={px(top + height + 16.0)} text-anchor="middle">{ at_words }</text>
            { for props.series.iter().filter_map(dot) }
        </>
    }
}
