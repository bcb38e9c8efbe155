//! Names on the curves and words at the points, each where it hides least.

use super::layout::Layout;
use super::{LineChartProps, Point, Series, SpanKind, heading};
use crate::chart::axis::px;
use crate::chart::clear::Clear;
use yew::prelude::*;

/// Rough width of a letter, pixels.
const LETTER: f64 = 6.2;
/// Half the height of a word.
const HALF_HEIGHT: f64 = 7.0;
/// Room that is enough for a name.
const ENOUGH: f64 = 16.0;

fn half_size(words: &str) -> [f64; 2] {
    [0.5 * LETTER * words.chars().count() as f64 + 2.0, HALF_HEIGHT]
}

/// What the curves and spans leave clear.
fn open_space(layout: &Layout, props: &LineChartProps) -> Clear {
    // Without words of the axis there, labels may stand over the frame.
    let top = if heading(&props.y).is_empty() { -6.0 } else { layout.top };
    let mut clear = Clear::new([layout.left, layout.right, top, layout.low]);
    let across = (0..=80).map(|i| layout.left + layout.width() * f64::from(i) / 80.0);
    clear.keep_off_points(across.map(|x| [x, layout.top]));
    for series in &props.series {
        clear.keep_off_points(dense(layout, series));
    }
    clear.keep_off_points(props.points.iter().map(|p| layout.place(p.at)));
    let past =
        props.spans.iter().filter(|s| s.kind == SpanKind::Past && layout.x.holds(s.x.0)).map(|s| s.x.0);
    let chosen = props.uprights.iter().filter(|u| u.chosen).map(|u| u.x);
    clear.keep_off_uprights(past.chain(chosen).map(|x| layout.x.px(x)));
    clear
}

/// Points along a curve no further apart than a few pixels, so that no label slips between.
fn dense(layout: &Layout, series: &Series) -> Vec<[f64; 2]> {
    let screen: Vec<[f64; 2]> = series.points.iter().map(|p| layout.place(*p)).collect();
    let mut dense = Vec::new();
    for pair in screen.windows(2) {
        let [a, b] = [pair[0], pair[1]];
        let length = (b[0] - a[0]).hypot(b[1] - a[1]);
        if !length.is_finite() {
            continue;
        }
        let steps = ((length / 6.0).ceil() as u32).clamp(1, 60);
        dense.extend((0..steps).map(|i| {
            let w = f64::from(i) / f64::from(steps);
            [a[0] + w * (b[0] - a[0]), a[1] + w * (b[1] - a[1])]
        }));
    }
    dense
}

/// The points with their words.
pub(super) fn points(layout: &Layout, props: &LineChartProps) -> Html {
    let places = point_places(layout, props, &mut open_space(layout, props));
    let one = |(point, place): (&Point, [f64; 2])| {
        let [x, y] = layout.place(point.at);
        let class = classes!("haloed", point.strong.then_some("strong"));
        html! {
            <>
                <circle class={classes!("dot", point.class)} cx={px(x)} cy={px(y)} r="4.5" />
                <text {class} x={px(place[0])} y={px(place[1] + 4.0)} text-anchor="middle">{ &point.words }</text>
            </>
        }
    };
    html! { <g aria-hidden="true">{ for shown(layout, props).zip(places).map(one) }</g> }
}

fn shown<'a>(layout: &'a Layout, props: &'a LineChartProps) -> impl Iterator<Item = &'a Point> {
    props.points.iter().filter(|p| layout.x.holds(p.at[0]) && layout.y.holds(p.at[1]))
}

/// Above, beside or under its point, where it touches least and in that order of liking; takes what it uses.
fn point_places(layout: &Layout, props: &LineChartProps, clear: &mut Clear) -> Vec<[f64; 2]> {
    // A label's own point is nearer than this, so that it does not count.
    const NEAR: f64 = 6.0;
    shown(layout, props)
        .map(|point| {
            let ([x, y], half) = (layout.place(point.at), half_size(&point.words));
            let (side, lift) = (half[0] + 9.0, half[1] + 6.0);
            let around = [
                ([x, y - lift], 0.0),
                ([x - side, y], 0.5),
                ([x + side, y], 1.0),
                ([x - side, y - lift], 1.5),
                ([x + side, y - lift], 2.0),
                ([x, y + lift], 2.5),
                ([x + side, y + lift], 3.0),
                ([x - side, y + lift], 3.5),
            ];
            let places = around.map(|(at, cost)| (at, clear.room(at, half, NEAR) - cost));
            let best =
                places.into_iter().max_by(|a, b| a.1.total_cmp(&b.1)).map_or([x, y - lift], |best| best.0);
            clear.take(best, half);
            best
        })
        .collect()
}

/// Names of curves, spans and limits.
pub(super) fn names(layout: &Layout, props: &LineChartProps) -> Html {
    let mut clear = open_space(layout, props);
    point_places(layout, props, &mut clear);
    let spans: Html = props.spans.iter().filter_map(|s| span_name(layout, s, &mut clear)).collect();
    let limits: Html = props.limits.iter().map(|l| limit_name(layout, l, &mut clear)).collect();
    let curves: Html = props.series.iter().filter_map(|s| curve_name(layout, s, &mut clear)).collect();
    html! { <g aria-hidden="true">{ spans }{ limits }{ curves }</g> }
}

fn span_name(layout: &Layout, span: &super::Span, clear: &mut Clear) -> Option<Html> {
    let half = half_size(&span.words);
    let (from, to) = (layout.x.px(layout.x.held(span.x.0)), layout.x.px(layout.x.held(span.x.1)));
    let past = span.kind == SpanKind::Past;
    if span.words.is_empty() || (!past && to - from < 2.0 * half[0]) || (past && !layout.x.holds(span.x.0)) {
        return None;
    }
    // The name of a limit stands on its near side, where there is room.
    let x = if past { from - half[0] - 4.0 } else { from + half[0] + 4.0 };
    let heights = [layout.low - 11.0, layout.top + 11.0];
    let room = |y: &f64| clear.room([x, *y], half, ENOUGH);
    let y = heights.into_iter().max_by(|a, b| room(a).total_cmp(&room(b)))?;
    clear.take([x, y], half);
    Some(text([x, y], span.words.clone()))
}

fn limit_name(layout: &Layout, limit: &super::Limit, clear: &mut Clear) -> Html {
    let half = half_size(&limit.words);
    let y = layout.y.px(layout.y.held(limit.y)) + 10.0;
    let steps = (0..12)
        .map(|i| layout.left + half[0] + 4.0 + f64::from(i) / 11.0 * (layout.width() - 2.0 * half[0] - 8.0));
    let room = |x: &f64| clear.room([*x, y], half, ENOUGH);
    let x = steps.max_by(|a, b| room(a).total_cmp(&room(b))).unwrap_or(layout.left + half[0]);
    clear.take([x, y], half);
    text([x, y], limit.words.clone())
}

/// Beside its curve, just above or under, where there is most room; none where the name would lie on another
/// curve.
fn curve_name(layout: &Layout, series: &Series, clear: &mut Clear) -> Option<Html> {
    if series.name.is_empty() {
        return None;
    }
    let half = half_size(&series.name);
    let places = dense(layout, series).into_iter().step_by(3).flat_map(|[x, y]| {
        let (side, lift) = (half[0] + 7.0, half[1] + 4.0);
        [[x, y - lift], [x, y + lift], [x + side, y], [x - side, y]]
    });
    // Towards the middle, as long as there is room.
    let middle = 0.5 * (layout.left + layout.right);
    let off = |at: [f64; 2]| 6.0 * (at[0] - middle).abs() / layout.width();
    let (best, room) = places
        .map(|at| (at, clear.room(at, half, ENOUGH)))
        .max_by(|a, b| (a.1 - off(a.0)).total_cmp(&(b.1 - off(b.0))))?;
    if room < -4.0 {
        return None;
    }
    clear.take(best, half);
    Some(text(best, series.name.clone()))
}

fn text(at: [f64; 2], words: AttrValue) -> Html {
    html! { <text class="haloed" x={px(at[0])} y={px(at[1] + 4.0)} text-anchor="middle">{ words }</text> }
}
