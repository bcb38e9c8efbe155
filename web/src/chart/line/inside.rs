//! What is cut off at the frame of a line chart: spans, grid, limits, uprights and curves.

use super::layout::Layout;
use super::{Limit, LineChartProps, Series, Span, SpanKind, Stroke, Upright};
use crate::chart::axis::{placed, px, rows};
use crate::chart::path::polyline;
use yew::prelude::*;

/// What is cut off at the frame.
pub(super) fn inside(layout: &Layout, props: &LineChartProps) -> Html {
    let [x, y, w, h] = [layout.left, layout.top, layout.width(), layout.height()].map(px);
    let upright = |u: &Upright| {
        let class = classes!("upright", u.chosen.then_some("is-chosen"));
        let at = px(layout.x.px(u.x));
        html! {
            <line {class} x1={at.clone()} x2={at} y1={px(layout.top)} y2={px(layout.low)}>
                <title>{ &u.name }</title>
            </line>
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
        <svg x={x.clone()} y={y.clone()} width={w.clone()} height={h.clone()}
            viewBox={format!("{x} {y} {w} {h}")} aria-hidden="true">
            { rows(&placed(&layout.y, &props.y.unit, layout.rows), layout.left, layout.right) }
            { for props.spans.iter().map(|s| span(layout, s)) }
            if layout.y.holds(0.0) {
                <line class="zero" x1={px(layout.left)} x2={px(layout.right)} y1={px(layout.y.px(0.0))}
                    y2={px(layout.y.px(0.0))} />
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
        SpanKind::Past => "past-limit",
    };
    let edge = span.kind == SpanKind::Past && layout.x.holds(span.x.0);
    html! {
        <>
            <rect {class} x={px(from)} y={px(layout.top)} width={px((to - from).max(0.0))}
                height={px(layout.height())} />
            if edge { <line class="limit" x1={px(from)} x2={px(from)} y1={px(layout.top)} y2={px(layout.low)} /> }
        </>
    }
}

fn limit(layout: &Layout, limit: &Limit) -> Html {
    let at = layout.y.px(layout.y.held(limit.y));
    let (left, right) = (px(layout.left), px(layout.right));
    html! {
        <>
            if limit.hatched {
                <rect class="past-limit" x={left.clone()} y={px(layout.top)} width={px(layout.width())}
                    height={px((at - layout.top).max(0.0))} />
            }
            <line class="limit" x1={left} x2={right} y1={px(at)} y2={px(at)} />
        </>
    }
}
