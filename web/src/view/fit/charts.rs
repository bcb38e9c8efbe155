//! Charts that share the airspeed axis; every flight point is one line through all of them.

use std::rc::Rc;

use spokeshave::aircraft::{hovers, propellers};
use spokeshave::result::{Envelope, EnvelopePoint, PointResult};
use yew::prelude::*;

use crate::act::{Act, Seen, use_act};
use crate::chart::line::grip::{Grip, Pull};
use crate::chart::line::{Axis, Limit, LineChart, Point, Series, Stroke, Upright};
use crate::chart::unit::Unit;
use crate::number::{figure, with_unit};
use crate::state::{Action, Held};
use crate::units::Quantity;

/// Properties of [`Charts`].
#[derive(Properties, PartialEq)]
pub(super) struct ChartsProps {
    pub(super) state: Seen,
    pub(super) envelope: Rc<Option<Envelope>>,
    pub(super) points: Vec<Rc<Option<PointResult>>>,
    pub(super) limit_rpm: Option<f64>,
}

/// One chart: what it shows of the speed range and of a flight point.
struct Plot {
    title: &'static str,
    unit: Unit,
    series: Vec<Series>,
    limits: Vec<Limit>,
    points: Vec<Point>,
}

/// The charts.
#[component]
pub(super) fn Charts(props: &ChartsProps) -> Html {
    let act = use_act();
    let Some(envelope) = props.envelope.as_ref() else { return html! {} };
    let plots = [
        thrust(props, envelope),
        rpm(props, envelope),
        power(props, envelope),
        climb(props, envelope),
        efficiency(props, envelope),
        departure(props, envelope),
    ];
    let plots =
        plots.into_iter().filter(|p| p.series.iter().any(|s| s.points.iter().any(|at| at[1].is_finite())));
    let end = envelope.points.last().map_or(1.0, |p| p.airspeed_m_s);
    let one = |(i, plot): (usize, Plot)| {
        let x = Axis {
            words: "airspeed".into(),
            unit: props.state.units.unit(Quantity::Speed),
            span: Some((0.0, end)),
        };
        let y = Axis { words: AttrValue::default(), unit: plot.unit, span: None };
        html! {
            <LineChart title={plot.title} {x} {y} series={plot.series} limits={plot.limits} points={plot.points}
                uprights={uprights(props)} grip={grip(props, &act, i == 0)} height={220.0} />
        }
    };
    html! { <div class="trio fit-charts">{ for plots.enumerate().map(one) }</div> }
}

fn curve(
    envelope: &Envelope,
    name: impl Into<AttrValue>,
    stroke: Stroke,
    of: impl Fn(&EnvelopePoint) -> Option<f64>,
) -> Series {
    let at = |p: &EnvelopePoint| [p.airspeed_m_s, of(p).unwrap_or(f64::NAN)];
    Series { name: name.into(), points: envelope.points.iter().map(at).collect(), stroke }
}

/// What the curve of part throttle is called.
fn flown_word(props: &ChartsProps) -> &'static str {
    if hovers(props.state.job().aircraft.as_ref()) { "hover, climb" } else { "level" }
}

/// Level flight as far as the engine gives it.
fn flown(p: &EnvelopePoint) -> Option<&spokeshave::result::Level> {
    p.level.as_ref().filter(|_| p.level_state == spokeshave::result::State::Ok)
}

/// The flight point selected where it has this figure.
fn chosen(props: &ChartsProps, quantity: Quantity, of: impl Fn(&PointResult) -> Option<f64>) -> Vec<Point> {
    let result = props.points.get(props.state.point).and_then(|r| r.as_ref().as_ref());
    let at = result.and_then(|r| Some([r.airspeed_m_s?, of(r)?]));
    let words = |y| figure(props.state.units, quantity, Some(y)).into();
    at.map(|at| Point { at, words: words(at[1]), class: None, strong: true }).into_iter().collect()
}

fn thrust(props: &ChartsProps, envelope: &Envelope) -> Plot {
    let asked = if envelope.speeds.is_some() { "drag" } else { "weight" };
    let top = envelope.points.iter().filter_map(|p| Some(p.full.as_ref()?.thrust_n)).fold(0.0, f64::max);
    // Drag grows without end towards rest.
    let drag = |p: &EnvelopePoint| p.asked_n.filter(|d| *d <= 1.2 * top);
    let several = props.state.job().aircraft.as_ref().is_some_and(|a| propellers(a) > 1.5);
    Plot {
        title: match (asked, several) {
            ("drag", false) => "Thrust and drag",
            ("drag", true) => "Thrust of all and drag",
            (_, false) => "Thrust and weight",
            (_, true) => "Thrust of all and weight",
        },
        unit: props.state.units.unit(Quantity::Force),
        series: vec![
            curve(envelope, "thrust", Stroke::Solid, |p| Some(p.full.as_ref()?.thrust_n)),
            curve(envelope, asked, Stroke::Dashed, drag),
        ],
        limits: Vec::new(),
        points: chosen(props, Quantity::Force, |r| r.meeting.total_thrust_n.or(r.figures.thrust_n)),
    }
}

fn rpm(props: &ChartsProps, envelope: &Envelope) -> Plot {
    let words = |rpm| format!("limit {}", figure(props.state.units, Quantity::Rpm, Some(rpm)));
    let limit = |rpm: f64| Limit { y: rpm, words: words(rpm).into(), hatched: true };
    Plot {
        title: "Propeller rpm",
        unit: props.state.units.unit(Quantity::Rpm),
        series: vec![
            curve(envelope, "full throttle", Stroke::Solid, |p| Some(p.full.as_ref()?.rpm)),
            curve(envelope, flown_word(props), Stroke::Dashed, |p| Some(flown(p)?.rpm)),
        ],
        limits: props.limit_rpm.map(limit).into_iter().collect(),
        points: chosen(props, Quantity::Rpm, |r| r.rpm),
    }
}

fn power(props: &ChartsProps, envelope: &Envelope) -> Plot {
    Plot {
        title: "Shaft power of one engine",
        unit: props.state.units.unit(Quantity::Power),
        series: vec![
            curve(envelope, "full throttle", Stroke::Solid, |p| Some(p.full.as_ref()?.power_w)),
            curve(envelope, flown_word(props), Stroke::Dashed, |p| Some(flown(p)?.power_w)),
        ],
        limits: Vec::new(),
        points: chosen(props, Quantity::Power, |r| r.figures.power_w),
    }
}

fn climb(props: &ChartsProps, envelope: &Envelope) -> Plot {
    let any = |p: &EnvelopePoint| p.full.as_ref()?.rate_of_climb_m_s;
    let best = envelope.points.iter().filter_map(any).fold(0.0, f64::max);
    // Far below the stall the sums give a steep sink that nobody flies.
    let rate = |p: &EnvelopePoint| any(p).filter(|v| *v >= -best);
    Plot {
        title: "Rate of climb",
        unit: props.state.units.unit(Quantity::Climb),
        series: vec![curve(envelope, "climb", Stroke::Solid, rate)],
        limits: Vec::new(),
        points: chosen(props, Quantity::Climb, |r| r.meeting.rate_of_climb_m_s),
    }
}

fn efficiency(props: &ChartsProps, envelope: &Envelope) -> Plot {
    Plot {
        title: "Efficiency",
        unit: Unit::ratio(2),
        series: vec![
            curve(envelope, "full throttle", Stroke::Solid, |p| p.full.as_ref()?.efficiency),
            curve(envelope, flown_word(props), Stroke::Dashed, |p| flown(p)?.efficiency),
        ],
        limits: Vec::new(),
        points: chosen(props, Quantity::Number, |r| r.figures.efficiency),
    }
}

/// Departure at the station selected and at one nearer the hub and one nearer the tip, along full throttle.
fn departure(props: &ChartsProps, envelope: &Envelope) -> Plot {
    let station = |i: usize| {
        curve(envelope, format!("station {}", i + 1), Stroke::Solid, move |p: &EnvelopePoint| {
            p.full.as_ref()?.departure_deg.get(i).copied().flatten()
        })
    };
    let word = flown_word(props);
    let level = |i: usize| {
        curve(envelope, format!("{}, {word}", i + 1), Stroke::Dashed, move |p: &EnvelopePoint| {
            flown(p)?.departure_deg.get(i).copied().flatten()
        })
    };
    let mut series: Vec<Series> =
        beside(props.state.station, envelope.radius_fractions.len()).into_iter().map(station).collect();
    series.push(level(props.state.station));
    let own = |r: &PointResult| r.stations.get(props.state.station)?.departure_deg;
    Plot {
        title: "Departure",
        unit: Unit::DEGREE,
        series,
        limits: Vec::new(),
        points: chosen(props, Quantity::Angle, own),
    }
}

/// The station selected, one near the hub, one near the tip.
fn beside(selected: usize, count: usize) -> Vec<usize> {
    let mut all = vec![count / 5, selected, count.saturating_sub(2)];
    all.retain(|i| *i < count);
    all.sort_unstable();
    all.dedup();
    all
}

/// Every flight point whose airspeed is known.
fn uprights(props: &ChartsProps) -> Vec<Upright> {
    let points = props.state.job().flight_points.iter().enumerate();
    let upright = |(i, point): (usize, &spokeshave::job::FlightPoint)| {
        let result = props.points.get(i).and_then(|r| r.as_ref().as_ref());
        let x = point.airspeed_m_s.or(result.and_then(|r| r.airspeed_m_s))?;
        let speed = with_unit(props.state.units, Quantity::Speed, Some(x));
        Some(Upright { x, name: format!("{}, {speed}", point.name).into(), chosen: i == props.state.point })
    };
    points.filter_map(upright).collect()
}

/// The flight point selected, where its airspeed is set: what comes out, such as top speed, is not moved.
fn grip(props: &ChartsProps, act: &Act, keys: bool) -> Option<Grip> {
    let i = props.state.point;
    let point = props.state.job().flight_points.get(i)?;
    let onpull = act.on(move |pull| match pull {
        Pull::Take => Action::Take(Held::Airspeed(i)),
        Pull::To(v) => Action::DragTo(v),
        Pull::LetGo => Action::LetGo,
        Pull::PutBack => Action::PutBack,
        Pull::Nudge(v) => Action::Nudge(Held::Airspeed(i), v),
        Pull::EndRun => Action::EndRun,
    });
    Some(Grip { x: point.airspeed_m_s?, name: format!("Airspeed of {}", point.name).into(), keys, onpull })
}

#[cfg(test)]
mod tests {
    use super::beside;

    #[test]
    fn the_station_selected_is_shown_once_between_hub_and_tip() {
        assert_eq!(beside(7, 11), [2, 7, 9]);
        assert_eq!(beside(9, 11), [2, 9]);
        assert_eq!(beside(0, 2), [0]);
    }
}
