//! What the map says under the pointer.

use super::frame::Frame;
use crate::chart::axis::px;
use crate::chart::number::{fixed, signed};
use crate::chart::pointer::place;
use crate::chart::unit::Unit;
use spokeshave::rotor::{DepartureMap, MapCell};
use std::rc::Rc;
use yew::prelude::*;

/// Properties of [`Reading`].
#[derive(Properties, PartialEq)]
pub(super) struct ReadingProps {
    pub(super) map: Rc<DepartureMap>,
    pub(super) frame: Rc<Frame>,
    pub(super) length: Unit,
    pub(super) speed: Unit,
    /// Told the radius, m, that is clicked.
    pub(super) on_radius: Callback<f64>,
}

/// A pane over the map: shows the figures under the pointer, and a click chooses a radius. Only the pane
/// itself is drawn again when the pointer moves.
#[component]
pub(super) fn Reading(props: &ReadingProps) -> Html {
    let pointer = use_state_eq(|| None::<[f64; 2]>);
    let frame = props.frame.clone();
    let onmousemove = {
        let (pointer, frame) = (pointer.clone(), frame.clone());
        Callback::from(move |event: MouseEvent| pointer.set(place(&event, frame.pane())))
    };
    let onmouseleave = {
        let pointer = pointer.clone();
        Callback::from(move |_: MouseEvent| pointer.set(None))
    };
    let onclick = {
        let (tell, frame) = (props.on_radius.clone(), frame.clone());
        Callback::from(move |event: MouseEvent| {
            if let Some([_, y]) = place(&event, frame.pane()) {
                tell.emit(frame.axis.scale().value(y));
            }
        })
    };
    html! {
        <g class="reading" aria-hidden="true">
            { pointer.map(|at| shown(props, at)) }
            <rect class="reach" x={px(frame.left)} y={px(frame.axis.top_px)} width={px(frame.width())}
                height={px(frame.height())} {onmousemove} {onmouseleave} {onclick} />
        </g>
    }
}

fn shown(props: &ReadingProps, [x, y]: [f64; 2]) -> Html {
    let frame = &props.frame;
    let [first, second] = words(props, [x, y]);
    let longest = first.chars().count().max(second.chars().count()) as f64;
    let plate = [6.3 * longest + 14.0, 40.0];
    let [px0, py0] = plate_at(frame, [x, y], plate);
    let (top, low) = (px(frame.axis.top_px), px(frame.axis.hub_px));
    html! {
        <>
            <line class="cross" x1={px(x)} x2={px(x)} y1={top} y2={low} />
            <line class="cross" x1={px(frame.left)} x2={px(frame.right)} y1={px(y)} y2={px(y)} />
            <rect class="plate" x={px(px0)} y={px(py0)} width={px(plate[0])} height={px(plate[1])} rx="3" />
            <text x={px(px0 + 7.0)} y={px(py0 + 16.0)}>{ first }</text>
            <text class="strong" x={px(px0 + 7.0)} y={px(py0 + 32.0)}>{ second }</text>
        </>
    }
}

/// Upper left corner of the plate: to the side and above the pointer that have room for it.
fn plate_at(frame: &Frame, [x, y]: [f64; 2], [width, height]: [f64; 2]) -> [f64; 2] {
    const OFF: f64 = 10.0;
    let left = if x + OFF + width > frame.right { x - OFF - width } else { x + OFF };
    let top = if y - OFF - height < frame.axis.top_px { y + OFF } else { y - OFF - height };
    [left.max(frame.left), top]
}

fn words(props: &ReadingProps, [x, y]: [f64; 2]) -> [String; 2] {
    let frame = &props.frame;
    let (speed, radius) = (frame.speed().value(x), frame.axis.scale().value(y));
    let advance =
        frame.advance_at(x).map_or_else(String::new, |a| format!(", {} per turn", props.length.short(a)));
    let place = format!("{} at {}{advance}", props.length.short(radius), props.speed.text(speed));
    [place, cell(&props.map, radius, speed).map_or_else(|| "no figure".to_owned(), figures)]
}

/// The cell nearest to a radius (m) and airspeed (m/s).
fn cell(map: &DepartureMap, radius_m: f64, airspeed_m_s: f64) -> Option<&MapCell> {
    let nearest = |values: &[f64], at: f64| {
        let away = |i: &usize| (values[*i] - at).abs();
        (0..values.len()).min_by(|a, b| away(a).total_cmp(&away(b)))
    };
    map.cells.get([nearest(&map.radii_m, radius_m)?, nearest(&map.airspeeds_m_s, airspeed_m_s)?])
}

fn figures(cell: &MapCell) -> String {
    let Some(departure) = cell.departure_deg else { return "no figure".to_owned() };
    let stalled = if cell.past_stall_deg.is_some_and(|p| p > 0.0) { ", stalled" } else { "" };
    let share =
        cell.share_of_best.map_or_else(String::new, |s| format!(", {} % of best", fixed(100.0 * s, 0)));
    format!("{}°{stalled}{share}", signed(departure, 1))
}

#[cfg(test)]
mod tests {
    use super::super::frame::tests::sample;
    use super::*;

    #[test]
    fn the_plate_stays_on_the_map() {
        let frame = super::super::frame::tests::frame();
        for (x, y) in [(10.0, 62.0), (410.0, 62.0), (410.0, 462.0), (200.0, 300.0)] {
            let [left, top] = plate_at(&frame, [x, y], [180.0, 40.0]);
            assert!(left >= 10.0 && left + 180.0 <= 410.0, "{x} {y}: {left}");
            assert!(top >= 62.0 && top + 40.0 <= 462.0, "{x} {y}: {top}");
        }
    }

    #[test]
    fn the_nearest_cell_speaks() {
        let map = sample();
        let cell = cell(&map, 0.126, 9.0).unwrap();
        assert_eq!(figures(cell), "+9.2°, 15 % of best");
        assert_eq!(figures(&MapCell::default()), "no figure");
    }
}
