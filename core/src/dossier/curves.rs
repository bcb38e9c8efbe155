//! What the job does, as charts.

use crate::drawn::{DrawnStation, stations};
use crate::result::{Envelope, EnvelopePoint, PointResult, StationResult};

use super::Told;
use super::chart::{Axis, Chart, Curve, MOST_CURVES};
use super::flow::Flow;
use super::scale::{DEGREES, PLAIN, RPM, Scale};
use super::verdict::air;

/// Steps of the curves over advance ratio.
const STEPS: u32 = 40;

pub(super) fn write(flow: &mut Flow, told: &Told) {
    let mut charts = as_drawn(told);
    charts.extend(departures(told));
    charts.extend(over_speed(told));
    charts.extend(coefficients(told));
    charts.extend(grading(told));
    charts.retain(Chart::shows);
    if charts.is_empty() {
        return;
    }
    flow.part("Charts");
    if told.envelope.is_some() {
        flow.text(&format!(
            "Over airspeed and advance ratio in the air of {}.",
            air(told.rig, told.usual, told.scales)
        ));
    }
    flow.charts(&charts);
}

pub(super) fn axis(words: &'static str, scale: Scale) -> Axis {
    Axis { words, scale }
}

fn as_drawn(told: &Told) -> Vec<Chart> {
    let length = told.scales.length();
    let all = stations(&told.rig.rotor.blade, told.rig.job.propeller.angle_reference);
    let curve = |name: &str, of: fn(&DrawnStation) -> Option<f64>| {
        Curve::new(name, all.iter().map(|s| (s.radius_m, of(s))))
    };
    let chart = |title: &str, y, curves| Chart {
        title: title.into(),
        x: axis("radius", length),
        y,
        curves,
        limits: Vec::new(),
    };
    vec![
        chart(
            "Chord and thickness as drawn",
            axis("length", length),
            vec![curve("chord", |s| Some(s.chord_m)), curve("thickness", |s| Some(s.thickness_m))],
        ),
        chart(
            "Blade angle as drawn",
            axis("angle", DEGREES),
            vec![
                curve("to the chord line", |s| Some(s.angle_deg)),
                curve("on the flat face", |s| s.face_angle_deg),
            ],
        ),
    ]
}

/// A chart of curves over the radius for each flight point, over several charts where they are many.
fn by_point(told: &Told, title: &str, y: &Axis, of: fn(&StationResult) -> Option<f64>) -> Vec<Chart> {
    let curve = |p: &PointResult| Curve::new(&p.name, p.stations.iter().map(|s| (s.radius_m, of(s))));
    let curves: Vec<Curve> = told.points.iter().map(curve).collect();
    let chart = |curves: &[Curve]| Chart {
        title: title.into(),
        x: axis("radius", told.scales.length()),
        y: y.clone(),
        curves: curves.to_vec(),
        limits: Vec::new(),
    };
    curves.chunks(MOST_CURVES - 1).map(chart).collect()
}

fn departures(told: &Told) -> Vec<Chart> {
    by_point(told, "Departure of each station: above 0 hard, below slack", &axis("departure", DEGREES), |s| {
        s.departure_deg
    })
}

fn grading(told: &Told) -> Vec<Chart> {
    let force = told.scales.force;
    let per_metre = if force.sign == "lbf" {
        Scale::three("lbf/ft", force.per_si * 0.3048)
    } else {
        Scale::three(if force.sign == "kgf" { "kgf/m" } else { "N/m" }, force.per_si)
    };
    by_point(told, "Thrust along the radius, all blades", &axis("thrust", per_metre), |s| {
        Some(s.thrust_n_per_m)
    })
}

type Of = fn(&EnvelopePoint) -> Option<f64>;

/// Curves over the speed range; level flight and climb where the wing carries the aeroplane.
fn over_speed(told: &Told) -> Vec<Chart> {
    let Some(envelope) = &told.envelope else { return Vec::new() };
    let scales = told.scales;
    let flies = flies(envelope);
    let curve = |(name, from, of): (&str, f64, Of)| {
        let known = move |p: &EnvelopePoint| of(p).filter(|_| p.airspeed_m_s >= from);
        Curve::new(name, envelope.points.iter().map(|p| (p.airspeed_m_s, known(p))))
    };
    let chart = |title: &str, y: Axis, curves: Vec<(&str, f64, Of)>| Chart {
        title: title.into(),
        x: axis("true airspeed", scales.speed),
        y,
        curves: curves.into_iter().map(curve).collect(),
        limits: Vec::new(),
    };
    let limit = told.rig.shaft.as_ref().and_then(crate::engine::Shaft::limit_rpm);
    let full = |of: Of| ("full throttle", 0.0, of);
    let level = |of: Of| ("level flight", flies, of);
    let mut rpm = chart(
        "Propeller rpm",
        axis("rpm", Scale { sign: "", ..RPM }),
        vec![full(|p| Some(p.full.as_ref()?.rpm)), level(|p| Some(p.level.as_ref()?.rpm))],
    );
    rpm.limits = limit.map(|rpm| ("limit".into(), rpm)).into_iter().collect();
    vec![
        chart(
            "Thrust of all propellers and what level flight asks",
            axis("force", scales.force),
            vec![full(|p| Some(p.full.as_ref()?.thrust_n)), level(|p| p.asked_n)],
        ),
        rpm,
        chart(
            "Shaft power of one engine",
            axis("power", scales.power),
            vec![full(|p| Some(p.full.as_ref()?.power_w)), level(|p| Some(p.level.as_ref()?.power_w))],
        ),
        chart(
            "Rate of climb",
            axis("climb", scales.climb),
            vec![("full throttle", flies, |p| p.full.as_ref()?.rate_of_climb_m_s)],
        ),
    ]
}

/// The speed from which level flight is drawn, m/s: the stall, else where the thrust of full throttle at rest
/// would do, else rest.
fn flies(envelope: &Envelope) -> f64 {
    let stall = envelope.speeds.and_then(|s| s.stall_m_s);
    let thrust = envelope.standing.as_ref().map_or(f64::INFINITY, |s| s.thrust_n);
    let enough = |p: &&EnvelopePoint| p.asked_n.is_some_and(|asked| asked <= thrust);
    stall.or_else(|| Some(envelope.points.iter().find(enough)?.airspeed_m_s)).unwrap_or(0.0)
}

fn coefficients(told: &Told) -> Vec<Chart> {
    let points = told.rig.curves(told.usual, STEPS);
    let curve = |name: &str, of: fn(&crate::rotor::CurvePoint) -> Option<f64>| {
        Curve::new(name, points.iter().map(|p| (p.coefficients.advance_ratio, of(p))))
    };
    let chart = |title: &str, y, curves| Chart {
        title: title.into(),
        x: axis("advance ratio", Scale { decimals: Some(2), ..PLAIN }),
        y: axis(y, PLAIN),
        curves,
        limits: Vec::new(),
    };
    vec![
        chart("Efficiency", "efficiency", vec![curve("efficiency", |p| p.coefficients.efficiency)]),
        chart(
            "Coefficients of thrust and power",
            "coefficient",
            vec![curve("CT", |p| Some(p.coefficients.ct)), curve("CP", |p| Some(p.coefficients.cp))],
        ),
    ]
}
