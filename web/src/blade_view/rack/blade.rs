//! The blade itself: bands, outline, hub, radius axis.

use super::BladeRackProps;
use super::layout::{AXIS, BLADE, Layout, PROFILE};
use crate::blade_view::planform::Planform;
use crate::chart::axis::{left, placed, px};
use crate::chart::departure;
use crate::chart::path::Path;
use crate::chart::ticks::MOST;
use yew::prelude::*;

/// The hub reaches no further than this from the blade axis, pixels.
const HUB_HALF_WIDTH: f64 = 52.0;

/// The headings of the columns.
pub(super) fn headings(layout: &Layout, props: &BladeRackProps) -> Html {
    let middle = px(layout.departure().px(0.0));
    html! {
        <g class="headings" aria-hidden="true">
            <text x="0" y="12">{ format!("Radius, {}", props.length.name) }</text>
            <text x={px(0.5 * (BLADE.0 + BLADE.1))} y="12" text-anchor="middle">{ "Blade" }</text>
            <text x={middle} y="12" text-anchor="middle">{ "Departure, degrees" }</text>
        </g>
    }
}

/// Radius axis, bands, outline and hub.
pub(super) fn drawing(layout: &Layout, props: &BladeRackProps) -> Html {
    let axis = &layout.axis;
    let ticks = placed(&axis.scale(), &props.length, MOST);
    html! {
        <g aria-hidden="true">
            <line class="axis" x1={px(AXIS)} x2={px(AXIS)} y1={px(axis.top_px)} y2={px(axis.hub_px)} />
            { left(&ticks, AXIS) }
            { tip_figure(layout, props, ticks.last().map(|t| t.0)) }
            <path class="hub" d={hub(layout, &props.shape)} />
            { bands(layout, props) }
            <path class="outline" d={props.shape.outline(|r, o| layout.place(r, o))} />
            { ghost(layout, props) }
            { centre_lines(layout) }
            { chord_scale(layout) }
        </g>
    }
}

/// The outline of the blade compared.
fn ghost(layout: &Layout, props: &BladeRackProps) -> Option<Html> {
    let shape = props.ghost.as_ref()?.shape.as_ref()?;
    Some(html! { <path class="ghost" d={shape.outline(|r, o| layout.place(r, o))} /> })
}

/// The radius at the tip, where no tick stands in its way.
fn tip_figure(layout: &Layout, props: &BladeRackProps, last_tick: Option<f64>) -> Html {
    let y = layout.axis.top_px;
    if last_tick.is_some_and(|tick| tick - y < 14.0) {
        return Html::default();
    }
    html! {
        <g class="tick">
            <line x1={px(AXIS - 4.0)} x2={px(AXIS)} y1={px(y)} y2={px(y)} />
            <text x={px(AXIS - 7.0)} y={px(y + 4.0)} text-anchor="end">
                { props.length.short_figure(layout.axis.tip_m) }
            </text>
        </g>
    }
}

fn bands(layout: &Layout, props: &BladeRackProps) -> Html {
    let radii: Vec<f64> = props.stations.iter().map(|s| s.radius_m).collect();
    let bands = props.shape.bands_m(&radii);
    let piece = |[from, to]: [f64; 2]| props.shape.piece(from, to, |r, o| layout.place(r, o));
    props
        .stations
        .iter()
        .zip(bands)
        .map(|(s, band)| {
            html! {
                <path class={classes!("band", departure::style(s.departure_deg))} d={piece(band)} />
            }
        })
        .collect()
}

/// The wood from the blade's root to the centre.
fn hub(layout: &Layout, shape: &Planform) -> String {
    let axis = &layout.axis;
    let (top, low) = (axis.hub_px, axis.centre_px() + 8.0);
    let wide = (axis.hub_m * layout.across_px_per_m).clamp(10.0, HUB_HALF_WIDTH);
    let [a, b] = shape.edges_m(axis.hub_m).map(|o| layout.place(axis.hub_m, o));
    let (l, r) = if a[0] < b[0] { (a, b) } else { (b, a) };
    let bend = 0.55 * (low - top);
    let mut path = Path::default();
    path.move_to(l);
    path.curve_to([[l[0], top + bend], [layout.blade_x - wide, low - bend]], [layout.blade_x - wide, low]);
    path.line_to([layout.blade_x + wide, low]);
    path.curve_to([[layout.blade_x + wide, low - bend], [r[0], top + bend]], r);
    path.close();
    path.into_string()
}

/// Says so where a wide blade is drawn narrower than to the scale of radius.
fn chord_scale(layout: &Layout) -> Html {
    let share = layout.chord_share();
    if share > 0.995 {
        return Html::default();
    }
    let y = layout.axis.hub_px;
    html! {
        <>
            <text class="axis-figure" x="0" y={px(y + 18.0)}>{ "chord at" }</text>
            <text class="axis-figure" x="0" y={px(y + 32.0)}>{ format!("{share:.2} scale") }</text>
        </>
    }
}

fn centre_lines(layout: &Layout) -> Html {
    let (x, y) = (layout.blade_x, layout.axis.centre_px());
    let half = HUB_HALF_WIDTH + 6.0;
    let right = (x + half).min(PROFILE);
    html! {
        <>
            <line class="centre-line" x1={px(x)} x2={px(x)} y1={px(layout.axis.top_px - 8.0)} y2={px(y + 12.0)} />
            <line class="centre-line" x1={px(x - half)} x2={px(right)} y1={px(y)} y2={px(y)} />
        </>
    }
}
