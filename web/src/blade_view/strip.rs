//! The blade lying down, for narrow screens: hub left, signed figures under it.

use super::Ghost;
use super::planform::{AHEAD, Planform};
use super::stations::{StationOption, list, on_keys, read_out, spoken};
use crate::chart::axis::px;
use crate::chart::departure;
use crate::chart::number::{NONE, signed};
use crate::chart::spread::{every, spread};
use crate::chart::unit::Unit;
use crate::chart::width::use_width;
use spokeshave::result::StationResult;
use std::rc::Rc;
use yew::prelude::*;

/// Height of the blade's part.
const BLADE_HEIGHT: f64 = 50.0;
/// Height of the balloons.
const BALLOON_Y: f64 = BLADE_HEIGHT + 13.0;
/// Upper edge of the tags.
const TAG_Y: f64 = BALLOON_Y + 12.0;
const HEIGHT: f64 = TAG_Y + 19.0;
/// Widths between which a tag may be.
const TAG: (f64, f64) = (29.0, 40.0);

/// Properties of [`BladeStrip`].
#[derive(Properties, PartialEq)]
pub struct BladeStripProps {
    /// The blade's outline.
    pub shape: Rc<Planform>,
    /// The stations at the flight point shown, hub first.
    pub stations: Rc<Vec<StationResult>>,
    /// Unit of length.
    pub length: Unit,
    /// Index of the chosen station.
    pub selected: usize,
    /// Told when a station is chosen.
    pub on_select: Callback<usize>,
    /// Another variant's outline and departure.
    #[prop_or_default]
    pub ghost: Option<Ghost>,
}

/// The lying blade, as wide as its place.
#[component]
pub fn BladeStrip(props: &BladeStripProps) -> Html {
    let (node, width) = use_width(366.0);
    let lie = Lie::new(&props.shape, width);
    let keys = on_keys(props.selected, props.stations.len(), &props.on_select);
    html! {
        <div class="strip" ref={node}>
            <svg width={px(width)} height={px(HEIGHT)} viewBox={format!("0 0 {} {}", px(width), px(HEIGHT))}
                role="group" aria-label="Blade and departure by station, lying">
                { blade(&lie, props) }
                { list("strip", props.selected, keys, options(&lie, props)) }
            </svg>
        </div>
    }
}

/// Where things are on the lying blade.
struct Lie {
    width: f64,
    px_per_m: f64,
    across_px_per_m: f64,
    axis_y: f64,
}

impl Lie {
    fn new(shape: &Planform, width: f64) -> Self {
        let px_per_m = (width - 4.0) / shape.tip_m;
        let widest = shape.widest_m().max(1e-9);
        let across_px_per_m = px_per_m.min((BLADE_HEIGHT - 6.0) / widest);
        // Middle of the chord in the middle of the height; the leading edge is up.
        let axis_y = BLADE_HEIGHT / 2.0 - (0.5 - AHEAD) * widest * across_px_per_m;
        Self { width, px_per_m, across_px_per_m, axis_y }
    }

    fn place(&self, radius_m: f64, offset_m: f64) -> [f64; 2] {
        [radius_m * self.px_per_m, self.axis_y - offset_m * self.across_px_per_m]
    }
}

fn blade(lie: &Lie, props: &BladeStripProps) -> Html {
    let shape = &props.shape;
    let radii: Vec<f64> = props.stations.iter().map(|s| s.radius_m).collect();
    let bands = shape.bands_m(&radii).into_iter().zip(props.stations.iter()).map(|([from, to], s)| {
        let class = classes!("band", departure::style(s.departure_deg));
        html! { <path {class} d={shape.piece(from, to, |r, o| lie.place(r, o))} /> }
    });
    html! {
        <g aria-hidden="true">
            <path class="hub" d={hub(lie, shape)} />
            { for bands }
            <path class="outline" d={shape.outline(|r, o| lie.place(r, o))} />
            { ghost(lie, props) }
            <line class="centre-line" x1="0" x2={px(lie.width)} y1={px(lie.axis_y)} y2={px(lie.axis_y)} />
        </g>
    }
}

/// The outline of the blade compared.
fn ghost(lie: &Lie, props: &BladeStripProps) -> Option<Html> {
    let shape = props.ghost.as_ref()?.shape.as_ref()?;
    Some(html! { <path class="ghost" d={shape.outline(|r, o| lie.place(r, o))} /> })
}

fn hub(lie: &Lie, shape: &Planform) -> String {
    let [top, low] = shape.edges_m(shape.hub_m).map(|o| lie.place(shape.hub_m, o));
    let half = (shape.hub_m * lie.across_px_per_m).clamp(10.0, BLADE_HEIGHT / 2.0 - 2.0);
    let (mid, x) = (BLADE_HEIGHT / 2.0, top[0]);
    let (up, down) = (px(mid - half), px(mid + half));
    let (bend_in, bend_out) = (px(0.4 * x), px(0.6 * x));
    format!(
        "M0 {up}C{bend_in} {up} {bend_out} {t} {x} {t}V{l}C{bend_out} {l} {bend_in} {down} 0 {down}Z",
        t = px(top[1]),
        l = px(low[1]),
        x = px(x),
    )
}

fn options(lie: &Lie, props: &BladeStripProps) -> Html {
    let count = props.stations.len();
    let from = props.shape.hub_m * lie.px_per_m * 0.5;
    let step = every(count, TAG.0, lie.width - from);
    let shown: Vec<usize> = (0..count).filter(|i| i % step == props.selected % step).collect();
    let size = ((lie.width - from) / shown.len().max(1) as f64).clamp(TAG.0, TAG.1);
    let wanted: Vec<f64> = shown.iter().map(|&i| props.stations[i].radius_m * lie.px_per_m).collect();
    let places = spread(&wanted, &vec![size; shown.len()], from, lie.width);
    shown
        .iter()
        .zip(places)
        .map(|(&index, x)| {
            let station = &props.stations[index];
            let chosen = index == props.selected;
            let option =
                StationOption { list: "strip", index, chosen, name: spoken(index, station, &props.length) };
            option.around(&props.on_select, label(lie, props, index, x, size))
        })
        .collect()
}

fn label(lie: &Lie, props: &BladeStripProps, index: usize, x: f64, size: f64) -> Html {
    let station = &props.stations[index];
    let at = station.radius_m * lie.px_per_m;
    let [top, low] = props.shape.edges_m(station.radius_m).map(|o| px(lie.place(station.radius_m, o)[1]));
    let tag = classes!("tag", departure::style(station.departure_deg));
    let lead = format!("M{} {low}L{} {}", px(at), px(x), px(BALLOON_Y - 9.0));
    html! {
        <>
            <rect class="reach" x={px(x - size / 2.0)} y="0" width={px(size)} height={px(HEIGHT)}>
                <title>{ read_out(station, &props.length) }</title>
            </rect>
            <line class="cut" x1={px(at)} x2={px(at)} y1={top} y2={low.clone()} />
            <path class="lead is-faint" d={lead} />
            <circle class="balloon" cx={px(x)} cy={px(BALLOON_Y)} r="9" />
            <text class="balloon-figure" x={px(x)} y={px(BALLOON_Y + 4.0)} text-anchor="middle">{ index + 1 }</text>
            <g class={tag}>
                <rect x={px(x - size / 2.0 + 0.5)} y={px(TAG_Y)} width={px(size - 1.0)} height="18" rx="2" />
                <text x={px(x)} y={px(TAG_Y + 13.0)} text-anchor="middle">{ short(station.departure_deg) }</text>
            </g>
        </>
    }
}

/// The signed figure, without decimals where it would not fit.
fn short(departure_deg: Option<f64>) -> String {
    departure_deg.map_or_else(|| NONE.to_owned(), |d| signed(d, usize::from(d.abs() < 9.95)))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn large_departures_are_written_short() {
        assert_eq!(
            (short(Some(29.8)), short(Some(-9.94)), short(None)),
            ("+30".into(), "−9.9".into(), "–".into())
        );
    }
}
