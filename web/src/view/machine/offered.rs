//! Power the shaft offers and power the propeller takes, over rpm: they meet where the curves cross.

use std::rc::Rc;

use spokeshave::fit::Offer;
use spokeshave::job::FlightPoint;
use spokeshave::result::{Crossing, PointResult};
use yew::prelude::*;

use crate::chart::line::{Axis, LineChart, Point, Series, Span, SpanKind, Stroke};
use crate::number::with_unit;
use crate::results::Offered;
use crate::units::{Quantity, Units};
use crate::view::chips::air_words;

/// Room over the highest offer, as a share of it; what the propeller takes beyond is cut off.
const ROOM: f64 = 1.15;
/// How far the axis runs past the highest rpm, as a share of it, so that a limit there is seen.
const PAST: f64 = 1.04;

/// Properties of [`OfferedChart`].
#[derive(Properties, PartialEq)]
pub(super) struct OfferedChartProps {
    pub(super) offer: Rc<Offered>,
    pub(super) result: Rc<Option<PointResult>>,
    pub(super) point: FlightPoint,
    pub(super) limit_rpm: Option<f64>,
    pub(super) units: Units,
}

/// The chart; nothing until the curves have been worked out.
#[component]
pub(super) fn OfferedChart(props: &OfferedChartProps) -> Html {
    let (offer, point) = (&props.offer.curve, &props.point);
    let (Some(first), Some(last)) = (offer.first(), offer.last()) else {
        return html! { <div class="chart-waiting" aria-busy="true"></div> };
    };
    let most = offer.iter().map(|o| o.offered_w.max(o.at_sea_level_w)).fold(0.0, f64::max);
    let highest = PAST * props.limit_rpm.map_or(last.engine_rpm, |limit| limit.max(last.engine_rpm));
    let x = Axis {
        words: "engine rpm".into(),
        unit: crate::chart::unit::Unit { name: "", ..props.units.unit(Quantity::Rpm) },
        span: Some((first.engine_rpm, highest)),
    };
    let y = Axis {
        words: AttrValue::default(),
        unit: props.units.unit(Quantity::Power),
        span: Some((0.0, ROOM * most.max(1.0))),
    };
    let title = format!("Full throttle and the propeller{}", air_words(props.units, point));
    let points: Vec<Point> = others(props).into_iter().chain(meeting(props)).collect();
    html! {
        <>
            <LineChart {title} {x} {y} series={series(props)} {points} spans={limit(props, highest)} height={260.0} />
            if let Some(words) = several(props) { <p class="note">{ words }</p> }
        </>
    }
}

/// Every place at which the curves cross, with its engine rpm, where they do so more than once.
fn crossings(props: &OfferedChartProps) -> Vec<(f64, &Crossing)> {
    let gear = props.offer.curve.first().map_or(1.0, |o| o.engine_rpm / o.propeller_rpm);
    let all = &props.offer.crossings;
    if all.len() < 2 { Vec::new() } else { all.iter().map(|c| (c.rpm * gear, c)).collect() }
}

/// Marks where the curves cross away from what counts.
fn others(props: &OfferedChartProps) -> Vec<Point> {
    let mark = |(rpm, c): (f64, &Crossing)| {
        let words = format!("{} {}", steadiness(c), with_unit(props.units, Quantity::Rpm, Some(rpm)));
        let offered_w = props.offer.curve.windows(2).find(|w| w[1].engine_rpm >= rpm).map(|w| {
            let share = (rpm - w[0].engine_rpm) / (w[1].engine_rpm - w[0].engine_rpm);
            w[0].offered_w + share * (w[1].offered_w - w[0].offered_w)
        })?;
        Some(Point { at: [rpm, offered_w], words: words.into(), class: None, strong: false })
    };
    crossings(props).into_iter().filter(|(_, c)| !c.chosen).filter_map(mark).collect()
}

fn steadiness(c: &Crossing) -> &'static str {
    if c.stable { "steady" } else { "not steady" }
}

/// What it means that the curves cross more than once.
fn several(props: &OfferedChartProps) -> Option<String> {
    let all = crossings(props);
    let rpm = |rpm| with_unit(props.units, Quantity::Rpm, Some(rpm));
    let places: Vec<String> = all.iter().map(|(at, c)| format!("{} ({})", rpm(*at), steadiness(c))).collect();
    let chosen = all.iter().find(|(_, c)| c.chosen).map_or_else(
        || "None of the steady ones lies within the limit.".to_string(),
        |(at, _)| format!("The highest steady one counts: {}.", rpm(*at)),
    );
    (!all.is_empty()).then(|| {
        format!(
            "At full throttle engine and propeller agree at {}. Where the propeller's demand rises through \
             the offer the rpm holds itself; elsewhere it runs away to a steady one. {chosen}",
            places.join(", ")
        )
    })
}

fn series(props: &OfferedChartProps) -> Vec<Series> {
    let (offer, point) = (&props.offer.curve, &props.point);
    let curve = |name: String, stroke, of: fn(&Offer) -> f64| Series {
        name: name.into(),
        points: offer.iter().map(|o| [o.engine_rpm, of(o)]).collect(),
        stroke,
    };
    let speed = point.airspeed_m_s.or(answered(props).and_then(|r| r.airspeed_m_s)).unwrap_or(0.0);
    let speed = with_unit(props.units, Quantity::Speed, Some(speed));
    let mut series = vec![
        curve("full throttle".into(), Stroke::Solid, |o| o.offered_w),
        curve(format!("propeller at {speed}"), Stroke::Dashed, |o| o.taken_w),
    ];
    if offer.iter().any(|o| (o.at_sea_level_w - o.offered_w).abs() > 1e-3 * o.offered_w.abs()) {
        series.push(curve("at sea level".into(), Stroke::Dotted, |o| o.at_sea_level_w));
    }
    series
}

fn answered(props: &OfferedChartProps) -> Option<&PointResult> {
    props.result.as_ref().as_ref().filter(|r| r.name == props.point.name)
}

/// Where the flight point runs.
fn meeting(props: &OfferedChartProps) -> Vec<Point> {
    let at = answered(props).and_then(|r| Some([r.meeting.engine_rpm?, r.figures.power_w?]));
    let words =
        |at: [f64; 2]| format!("{} {}", props.point.name, with_unit(props.units, Quantity::Rpm, Some(at[0])));
    at.map(|at| Point { at, words: words(at).into(), class: None, strong: true }).into_iter().collect()
}

fn limit(props: &OfferedChartProps, highest: f64) -> Vec<Span> {
    let words = |rpm| format!("limit {}", with_unit(props.units, Quantity::Rpm, Some(rpm)));
    let span = |rpm: f64| Span { x: (rpm, highest), kind: SpanKind::Past, words: words(rpm).into() };
    props.limit_rpm.map(span).into_iter().collect()
}
