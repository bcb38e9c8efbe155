//! Departure over radius and airspeed, on the radius axis of the blade beside it.

mod frame;
mod key;
mod labels;
mod layers;
mod marks;
mod paint;
mod reading;
mod table;

pub use key::DepartureKey;

use super::radius_axis::RadiusAxis;
use crate::chart::axis::{bottom, left, most_on, placed, px};
use crate::chart::figure::Figure;
use crate::chart::linear::Linear;
use crate::chart::ticks::MOST;
use crate::chart::unit::Unit;
use crate::chart::width::use_width;
use frame::Frame;
use layers::Layers;
use paint::Paint;
use reading::Reading;
use spokeshave::rotor::DepartureMap;
use std::rc::Rc;
use yew::prelude::*;

/// A flight point on the map.
#[derive(Clone, Debug, PartialEq)]
pub struct FlightMark {
    /// Its name.
    pub name: AttrValue,
    /// The advance per turn it makes, m; `None` when it has no answer.
    pub advance_m: Option<f64>,
    /// Whether it is the one shown.
    pub selected: bool,
}

/// Properties of [`DepartureChart`].
#[derive(Properties, PartialEq)]
pub struct DepartureChartProps {
    /// The map.
    pub map: Rc<DepartureMap>,
    /// The radius axis, in common with the blade.
    pub axis: RadiusAxis,
    /// The flight points, in their order.
    pub marks: Vec<FlightMark>,
    /// Radius (m) and departure (degrees) of each station at the flight point shown.
    pub stations: Vec<(f64, Option<f64>)>,
    /// Index of the chosen station.
    pub selected: usize,
    /// Unit of length.
    pub length: Unit,
    /// Unit of speed.
    pub speed: Unit,
    /// What the map was worked out for, one line.
    #[prop_or_default]
    pub note: AttrValue,
    /// What the map follows, to pick from.
    #[prop_or_default]
    pub along: Html,
    /// Whether the radius axis has its figures here, for want of a blade beside it.
    #[prop_or(false)]
    pub radius_figures: bool,
    /// Told when a station is chosen.
    pub on_station: Callback<usize>,
    /// Told when a flight point is chosen.
    pub on_mark: Callback<usize>,
}

/// The departure map as wide as its place, with key and table.
#[component]
pub fn DepartureChart(props: &DepartureChartProps) -> Html {
    let (node, width) = use_width(560.0);
    let from: f64 = if props.radius_figures { 46.0 } else { 8.0 };
    let frame =
        use_memo((props.map.clone(), props.axis, width.to_bits(), from.to_bits()), |(map, axis, ..)| {
            Frame::new(map, *axis, from, width - 12.0)
        });
    let places = marks::places(&frame, &props.marks);
    let levels = props.stations.iter().map(|s| props.axis.y(s.0)).collect::<Vec<f64>>();
    let layers =
        use_memo((props.map.clone(), frame.clone(), places, levels), |(map, frame, places, levels)| {
            Layers::new(map, frame, places, levels)
        });
    let table = {
        let (map, length, speed) = (props.map.clone(), props.length, props.speed);
        Callback::from(move |()| table::table(&map, &length, &speed))
    };
    let on_radius = nearest_station(&props.stations, &props.on_station);
    let height = props.axis.map_height_px();
    let words = &props.note;
    let note = html! {
        <><span class="map-note" title={words.clone()}>{ props.along.clone() }{ words }</span><DepartureKey /></>
    };
    html! {
        <Figure title="Departure over the whole speed range" {note} {table} class="map-figure">
            <div class="map" ref={node}>
                <svg width={px(width)} height={px(height)}
                    viewBox={format!("0 0 {} {}", px(width), px(height))} role="img"
                    aria-label="Departure by airspeed and radius; its table has the figures">
                    <Paint {layers} frame={frame.clone()} />
                    { station_lines(&frame, props) }
                    { axes(&frame, props) }
                    { marks::lines(&frame, props) }
                    { marks::dots(&frame, props) }
                    <Reading map={props.map.clone()} {frame} length={props.length} speed={props.speed} {on_radius} />
                </svg>
            </div>
        </Figure>
    }
}

fn nearest_station(stations: &[(f64, Option<f64>)], tell: &Callback<usize>) -> Callback<f64> {
    let (radii, tell): (Vec<f64>, _) = (stations.iter().map(|s| s.0).collect(), tell.clone());
    Callback::from(move |radius: f64| {
        let away = |i: &usize| (radii[*i] - radius).abs();
        if let Some(index) = (0..radii.len()).min_by(|a, b| away(a).total_cmp(&away(b))) {
            tell.emit(index);
        }
    })
}

/// A faint line through every station, and the ink line of the chosen one, which comes from the blade.
fn station_lines(frame: &Frame, props: &DepartureChartProps) -> Html {
    let line = |(i, s): (usize, &(f64, Option<f64>))| {
        let (class, from) =
            if i == props.selected { ("ink-line", 0.0) } else { ("station-line", frame.left) };
        let from: f64 = if props.radius_figures { frame.left } else { from };
        let y = px(frame.axis.y(s.0));
        html! { <line {class} x1={px(from)} x2={px(frame.right)} y1={y.clone()} y2={y} /> }
    };
    props.stations.iter().enumerate().map(line).collect()
}

/// Airspeed under the frame, advance per turn under that, and the frame itself.
fn axes(frame: &Frame, props: &DepartureChartProps) -> Html {
    let (y, right) = (frame.axis.hub_px, px(frame.right));
    let most = most_on(frame.width(), 62.0);
    let clear = |ticks: Vec<_>, words: f64| -> Vec<_> {
        ticks.into_iter().filter(|(x, _): &(f64, _)| *x < frame.right - words).collect()
    };
    let speeds = clear(placed(&frame.speed(), &props.speed, most), 46.0);
    html! {
        <g aria-hidden="true">
            <rect class="frame" x={px(frame.left)} y={px(frame.axis.top_px)} width={px(frame.width())}
                height={px(frame.height())} />
            { bottom(&speeds, y) }
            <text class="axis-figure" x={right.clone()} y={px(y + 16.0)} text-anchor="end">{ props.speed.name }</text>
            { advance_axis(frame, props, most) }
            if props.radius_figures {
                { left(&placed(&frame.axis.scale(), &props.length, MOST), frame.left) }
                <text class="axis-figure" x={px(frame.left - 7.0)} y={px(frame.axis.top_px - 6.0)} text-anchor="end">
                    { props.length.name }
                </text>
            }
        </g>
    }
}

fn advance_axis(frame: &Frame, props: &DepartureChartProps, most: usize) -> Html {
    let Some(greatest) = frame.greatest_advance_m() else { return Html::default() };
    let y = frame.axis.hub_px + 26.0;
    let ticks = placed(&Linear::new((0.0, greatest), (0.0, 1.0)), &props.length, most);
    let at = |(_, tick): (f64, crate::chart::ticks::Tick)| {
        Some((frame.x_of_advance(props.length.si(tick.at))?, tick)).filter(|(x, _)| *x < frame.right - 94.0)
    };
    let ticks: Vec<_> = ticks.into_iter().filter_map(at).collect();
    let name = format!("{} per turn", props.length.name);
    html! {
        <>
            <line class="axis" x1={px(frame.left)} x2={px(frame.right)} y1={px(y)} y2={px(y)} />
            { bottom(&ticks, y) }
            <text class="axis-figure" x={px(frame.right)} y={px(y + 16.0)} text-anchor="end">{ name }</text>
        </>
    }
}
