//! The stations as options: balloon, cut, mark on the profile, tag with the signed figure.

use super::BladeRackProps;
use super::layout::{BALLOON, BALLOON_R, Layout, REACH_DEG, TAG_HEIGHT, TAG_WIDTH};
use crate::blade_view::stations::{StationOption, read_out, spoken};
use crate::chart::axis::px;
use crate::chart::departure;
use crate::chart::number::signed_or_none;
use spokeshave::result::StationResult;
use yew::prelude::*;

/// All stations; the chosen one last, so that it lies on top.
pub(super) fn options(layout: &Layout, props: &BladeRackProps) -> Html {
    let radii: Vec<f64> = props.stations.iter().map(|s| s.radius_m).collect();
    let heights = layout.label_heights(&radii, props.selected);
    let (top, low) = (layout.axis.top_px, layout.axis.hub_px);
    let middle = |a: usize, b: usize| 0.5 * (layout.axis.y(radii[a]) + layout.axis.y(radii[b]));
    let option = |i: usize| {
        let from = if i + 1 < radii.len() { middle(i, i + 1) } else { top - 8.0 };
        let to = if i > 0 { middle(i - 1, i) } else { low + 8.0 };
        let station = &props.stations[i];
        let chosen = i == props.selected;
        let drawing = html! {
            <>
                <rect class="reach" x="0" y={px(from)} width={px(layout.width)} height={px((to - from).max(0.0))}>
                    <title>{ read_out(station, &props.length) }</title>
                </rect>
                { cut(layout, props, station, heights[i], chosen) }
                { mark(layout, station) }
                { heights[i].map(|y| label(layout, i, station, y)) }
            </>
        };
        let option =
            StationOption { list: "rack", index: i, chosen, name: spoken(i, station, &props.length) };
        option.around(&props.on_select, drawing)
    };
    let others = (0..radii.len()).filter(|&i| i != props.selected);
    others.chain((props.selected < radii.len()).then_some(props.selected)).map(option).collect()
}

/// From the balloon over the blade to the tag; for the chosen station on to the edge, where the map takes it
/// up.
fn cut(
    layout: &Layout,
    props: &BladeRackProps,
    station: &StationResult,
    label: Option<f64>,
    chosen: bool,
) -> Html {
    let y = layout.axis.y(station.radius_m);
    let [a, b] = props.shape.edges_m(station.radius_m).map(|o| layout.place(station.radius_m, o)[0]);
    let (left, right) = (px(a.min(b)), px(a.max(b)));
    let lead = label.map(|l| {
        let (from, to) = (px(BALLOON + BALLOON_R), px(layout.tag_x()));
        let bend = px(BALLOON + BALLOON_R + 8.0);
        let out = px(layout.departure().px(REACH_DEG));
        html! {
            <>
                <path class="lead" d={format!("M{from} {}L{bend} {}H{left}", px(l), px(y))} />
                <path class="lead is-faint" d={format!("M{right} {}H{out}L{to} {}", px(y), px(l))} />
            </>
        }
    });
    html! {
        <>
            { lead }
            <line class="cut" x1={left} x2={right} y1={px(y)} y2={px(y)} />
            if chosen {
                <line class="ink-line" x1={px(BALLOON + BALLOON_R + 8.0)} x2={px(layout.width)} y1={px(y)}
                    y2={px(y)} />
            }
        </>
    }
}

/// The station on the profile: a dot, or at the edge a triangle that points to where it would be.
fn mark(layout: &Layout, station: &StationResult) -> Html {
    let Some(d) = station.departure_deg else { return Html::default() };
    let (x, y) = (layout.departure(), layout.axis.y(station.radius_m));
    let class = classes!("dot", departure::style(Some(d)));
    if d.abs() <= REACH_DEG {
        return html! { <circle {class} cx={px(x.px(d))} cy={px(y)} r="4.5" /> };
    }
    let side = d.signum();
    let (tip, base) = (x.px(side * REACH_DEG) - side, x.px(side * REACH_DEG) - 8.0 * side);
    html! { <path {class} d={format!("M{} {}L{} {}V{}Z", px(tip), px(y), px(base), px(y - 5.0), px(y + 5.0))} /> }
}

fn label(layout: &Layout, index: usize, station: &StationResult, y: f64) -> Html {
    let x = layout.tag_x();
    let tag = classes!("tag", departure::style(station.departure_deg));
    html! {
        <>
            <circle class="balloon" cx={px(BALLOON)} cy={px(y)} r={px(BALLOON_R)} />
            <text class="balloon-figure" x={px(BALLOON)} y={px(y + 4.0)} text-anchor="middle">{ index + 1 }</text>
            <g class={tag}>
                <rect x={px(x)} y={px(y - TAG_HEIGHT / 2.0)} width={px(TAG_WIDTH)} height={px(TAG_HEIGHT)} rx="2" />
                <text x={px(x + TAG_WIDTH / 2.0)} y={px(y + 4.5)} text-anchor="middle">
                    { signed_or_none(station.departure_deg, 1) }
                </text>
            </g>
        </>
    }
}
