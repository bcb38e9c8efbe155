//! Coefficients over the advance ratio, at the rpm and air of the flight point selected.

use std::rc::Rc;

use spokeshave::result::PointResult;
use spokeshave::rotor::CurvePoint;
use yew::prelude::*;

use crate::chart::line::{Axis, LineChart, Point, Series, Stroke, Upright};
use crate::chart::unit::Unit;
use crate::number::fixed_or_none;
use crate::units::{Quantity, Units};

/// Properties of [`Coefficients`].
#[derive(Properties, PartialEq)]
pub struct CoefficientsProps {
    /// The curves; empty where the flight point has no answer.
    pub curves: Rc<Vec<CurvePoint>>,
    /// The flight point selected.
    pub point: Rc<Option<PointResult>>,
    /// Units shown.
    pub units: Units,
}

/// Three charts side by side.
#[component]
pub fn Coefficients(props: &CoefficientsProps) -> Html {
    let Some(point) = props.point.as_ref().as_ref().filter(|p| p.rpm.is_some()) else {
        return html! { <p class="note">{ "No answer at this flight point, so no rpm to draw curves at." }</p> };
    };
    html! {
        <div class="trio">
            { thrust_and_power(props, point) }
            { efficiency(props, point) }
            { thrust(props, point) }
        </div>
    }
}

/// The coefficients at the flight point, in a line.
#[must_use]
pub fn in_a_line(point: Option<&PointResult>) -> String {
    let answered = point.filter(|p| p.rpm.is_some());
    let Some(f) = answered.map(|p| &p.figures) else { return "no answer at this flight point".into() };
    let text = |v, d| fixed_or_none(v, d);
    format!(
        "J {}, CT {}, CP {}, CQ {}, CT/CQ {}",
        text(f.advance_ratio, 3),
        text(f.ct, 4),
        text(f.cp, 4),
        text(f.cq, 5),
        text(f.ct_over_cq, 2)
    )
}

fn advance() -> Axis {
    Axis { words: "advance ratio J".into(), unit: Unit::ratio(2), span: None }
}

fn over_j(props: &CoefficientsProps, y: impl Fn(&CurvePoint) -> Option<f64>) -> Vec<[f64; 2]> {
    let at = |p: &CurvePoint| y(p).map(|y| [p.coefficients.advance_ratio, y]);
    props.curves.iter().filter_map(at).collect()
}

fn upright(point: &PointResult, x: Option<f64>) -> Vec<Upright> {
    x.map(|x| Upright { x, name: point.name.clone().into(), chosen: true }).into_iter().collect()
}

fn mark(x: Option<f64>, y: Option<f64>, decimals: usize) -> Vec<Point> {
    let at = x.zip(y).map(|(x, y)| Point {
        at: [x, y],
        words: fixed_or_none(Some(y), decimals).into(),
        class: None,
        strong: true,
    });
    at.into_iter().collect()
}

fn thrust_and_power(props: &CoefficientsProps, point: &PointResult) -> Html {
    let f = &point.figures;
    let series = vec![
        Series {
            name: "CT".into(),
            points: over_j(props, |p| Some(p.coefficients.ct)),
            stroke: Stroke::Solid,
        },
        Series {
            name: "CP".into(),
            points: over_j(props, |p| Some(p.coefficients.cp)),
            stroke: Stroke::Dashed,
        },
    ];
    let mut points = mark(f.advance_ratio, f.ct, 4);
    points.extend(mark(f.advance_ratio, f.cp, 4));
    let y = Axis { words: "coefficient".into(), unit: Unit::ratio(4), span: None };
    html! {
        <LineChart title="Thrust and power coefficients" x={advance()} {y} {series} {points}
            uprights={upright(point, f.advance_ratio)} />
    }
}

fn efficiency(props: &CoefficientsProps, point: &PointResult) -> Html {
    let f = &point.figures;
    let points = over_j(props, |p| p.coefficients.efficiency);
    let series = vec![Series { name: "efficiency".into(), points, stroke: Stroke::Solid }];
    let y = Axis {
        words: "thrust × speed over shaft power".into(),
        unit: Unit::ratio(3),
        span: Some((0.0, 1.0)),
    };
    html! {
        <LineChart title="Efficiency" x={advance()} {y} {series} points={mark(f.advance_ratio, f.efficiency, 3)}
            uprights={upright(point, f.advance_ratio)} />
    }
}

fn thrust(props: &CoefficientsProps, point: &PointResult) -> Html {
    let units = props.units;
    let points = props.curves.iter().map(|p| [p.airspeed_m_s, p.thrust_n]).collect();
    let series = vec![Series { name: "thrust".into(), points, stroke: Stroke::Solid }];
    let x = Axis { words: "airspeed".into(), unit: units.unit(Quantity::Speed), span: None };
    let y = Axis { words: "thrust".into(), unit: units.unit(Quantity::Force), span: None };
    let mark = point.airspeed_m_s.zip(point.figures.thrust_n).map(|(v, t)| Point {
        at: [v, t],
        words: crate::number::figure(units, Quantity::Force, Some(t)).into(),
        class: None,
        strong: true,
    });
    let title = format!("Thrust at {}", crate::number::with_unit(units, Quantity::Rpm, point.rpm));
    html! {
        <LineChart {title} {x} {y} {series} points={mark.into_iter().collect::<Vec<_>>()}
            uprights={upright(point, point.airspeed_m_s)} />
    }
}
