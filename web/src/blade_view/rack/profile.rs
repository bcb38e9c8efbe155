//! Departure over radius, beside the blade.

use super::layout::{Layout, REACH_DEG};
use super::{BladeRackProps, Ghost};
use crate::chart::axis::{placed, px};
use crate::chart::number::signed;
use crate::chart::path::{polygon, polyline};
use crate::chart::ticks::MOST;
use spokeshave::result::StationResult;
use yew::prelude::*;

/// The frame with working band, best line, ghost and profile; all that leaves the frame is cut off.
pub(super) fn drawing(layout: &Layout, props: &BladeRackProps) -> Html {
    let (x, axis) = (layout.departure(), &layout.axis);
    let (left, right) = (x.px(-REACH_DEG), x.px(REACH_DEG));
    let (w, h) = (right - left, axis.hub_px - axis.top_px);
    html! {
        <g class="profile" aria-hidden="true">
            { heading(layout) }
            <svg x={px(left)} y={px(axis.top_px)} width={px(w)} height={px(h)}
                viewBox={format!("{} {} {} {}", px(left), px(axis.top_px), px(w), px(h))}>
                <path class="working-band" d={band(layout, &props.stations)} />
                { grid(layout, props) }
                <line class="best-line" x1={px(x.px(0.0))} x2={px(x.px(0.0))} y1={px(axis.top_px)}
                    y2={px(axis.hub_px)} />
                { props.ghost.as_ref().map(|g| html! { <path class="ghost" d={ghost_line(layout, g)} /> }) }
                <path class="profile-line" d={line(layout, &props.stations)} />
            </svg>
            { props.ghost.as_ref().map(|g| ghost_name(layout, g, &props.stations)) }
            <rect class="frame" x={px(left)} y={px(axis.top_px)} width={px(w)} height={px(h)} />
            { band_name(layout, &props.stations) }
        </g>
    }
}

fn heading(layout: &Layout) -> Html {
    let (x, top) = (layout.departure(), layout.axis.top_px);
    let figures = [-6.0, -4.0, -2.0, 0.0, 2.0, 4.0, 6.0].into_iter().map(|d| {
        html! {
            <text class="axis-figure" x={px(x.px(d))} y={px(top - 7.0)} text-anchor="middle">{ signed(d, 0) }</text>
        }
    });
    html! {
        <>
            <text class="quiet" x={px(x.px(-REACH_DEG))} y={px(top - 24.0)}>{ "slack" }</text>
            <text class="strong" x={px(x.px(0.0))} y={px(top - 24.0)} text-anchor="middle">{ "best" }</text>
            <text class="quiet" x={px(x.px(REACH_DEG))} y={px(top - 24.0)} text-anchor="end">{ "hard" }</text>
            { for figures }
        </>
    }
}

fn grid(layout: &Layout, props: &BladeRackProps) -> Html {
    let (x, axis) = (layout.departure(), &layout.axis);
    let across = placed(&axis.scale(), &props.length, MOST).into_iter().map(|(y, _)| {
        html! { <line class="hair" x1={px(x.px(-REACH_DEG))} x2={px(x.px(REACH_DEG))} y1={px(y)} y2={px(y)} /> }
    });
    let upright = [-6.0, -4.0, -2.0, 2.0, 4.0, 6.0].into_iter().map(|d| {
        html! { <line class="hair" x1={px(x.px(d))} x2={px(x.px(d))} y1={px(axis.top_px)} y2={px(axis.hub_px)} /> }
    });
    html! { <>{ for across }{ for upright }</> }
}

fn point(layout: &Layout, radius_m: f64, departure_deg: Option<f64>) -> [f64; 2] {
    // Far off the scale is as good as just off it, and keeps the pixels small.
    let held = departure_deg.map_or(f64::NAN, |d| d.clamp(-60.0, 60.0));
    [layout.departure().px(held), layout.axis.y(radius_m)]
}

fn line(layout: &Layout, stations: &[StationResult]) -> String {
    polyline(stations.iter().map(|s| point(layout, s.radius_m, s.departure_deg)))
}

fn ghost_line(layout: &Layout, ghost: &Ghost) -> String {
    polyline(ghost.points.iter().map(|&(r, d)| point(layout, r, Some(d))))
}

fn band(layout: &Layout, stations: &[StationResult]) -> String {
    let edge = |s: &StationResult, of: fn(&StationResult) -> Option<f64>| point(layout, s.radius_m, of(s));
    let known = || stations.iter().filter(|s| s.band_low_deg.is_some() && s.band_high_deg.is_some());
    let low = known().map(|s| edge(s, |s| s.band_low_deg));
    let high = known().rev().map(|s| edge(s, |s| s.band_high_deg));
    if known().next().is_none() { String::new() } else { polygon(low.chain(high)) }
}

fn band_name(layout: &Layout, stations: &[StationResult]) -> Html {
    let Some((low, high)) = stations.iter().find_map(|s| Some((s.band_low_deg?, s.band_high_deg?))) else {
        return Html::default();
    };
    let (x, y) = (layout.departure(), layout.axis.hub_px + 4.0);
    let [l, r] = [low, high].map(|d| px(x.px(d.clamp(-REACH_DEG, REACH_DEG))));
    html! {
        <>
            <path class="bracket" d={format!("M{l} {y}v3H{r}v-3")} />
            <text class="quiet" x={px(x.px(0.0))} y={px(y + 16.0)} text-anchor="middle">{ "working band" }</text>
        </>
    }
}

/// The ghost's name, at the station where it is furthest from the profile and still in the frame.
fn ghost_name(layout: &Layout, ghost: &Ghost, stations: &[StationResult]) -> Html {
    let gap = |&(r, d): &(f64, f64)| {
        let near = stations.iter().min_by(|a, b| (a.radius_m - r).abs().total_cmp(&(b.radius_m - r).abs()));
        near.and_then(|s| s.departure_deg).map_or(0.0, |own| (own - d).abs())
    };
    let shown = ghost.points.iter().filter(|(_, d)| d.abs() < REACH_DEG - 1.0);
    let Some(&(r, d)) = shown.max_by(|a, b| gap(a).total_cmp(&gap(b))) else { return Html::default() };
    let [x, y] = point(layout, r, Some(d));
    let own = stations.iter().find(|s| (s.radius_m - r).abs() < 1e-9).and_then(|s| s.departure_deg);
    let (x, anchor) = if own.is_some_and(|own| own < d) { (x + 6.0, "start") } else { (x - 6.0, "end") };
    html! { <text class="ghost-name" x={px(x)} y={px(y + 4.0)} text-anchor={anchor}>{ &ghost.name }</text> }
}
