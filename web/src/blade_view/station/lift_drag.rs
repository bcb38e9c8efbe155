//! Lift-to-drag over the angle of attack, with the working band, now and best.

use crate::chart::departure;
use crate::chart::line::{Axis, LineChart, Point, Series, Span, SpanKind};
use crate::chart::number::fixed;
use crate::chart::unit::Unit;
use spokeshave::result::StationResult;
use std::rc::Rc;
use yew::prelude::*;

/// The angles always shown, degrees.
const USUAL_DEG: (f64, f64) = (-6.0, 16.0);

/// Properties of [`LiftDrag`].
#[derive(Properties, PartialEq)]
pub(super) struct LiftDragProps {
    pub(super) station: StationResult,
    /// Angle of attack, degrees, and lift-to-drag.
    pub(super) curve: Rc<Vec<[f64; 2]>>,
}

/// The curve; nothing where there is none.
#[component]
pub(super) fn LiftDrag(props: &LiftDragProps) -> Html {
    if props.curve.len() < 2 {
        return Html::default();
    }
    let s = &props.station;
    let span = shown(s, &props.curve);
    let inside = |p: &&[f64; 2]| (span.0..=span.1).contains(&p[0]);
    let points: Vec<[f64; 2]> = props.curve.iter().filter(inside).copied().collect();
    let x = Axis { words: "angle of attack".into(), unit: Unit::DEGREE, span: Some(span) };
    let y = Axis { words: AttrValue::default(), unit: Unit::ratio(1), span: None };
    let series = vec![Series { name: AttrValue::default(), points, ..Default::default() }];
    html! {
        <LineChart title="Lift to drag" {x} {y} {series} points={marks(s)} spans={spans(s, span.1)} height={182.0} />
    }
}

/// From well before no lift to well past stall, and always with the angle there is now.
fn shown(s: &StationResult, curve: &[[f64; 2]]) -> (f64, f64) {
    let now = s.angle_of_attack_deg.unwrap_or(0.0);
    let stall = s.stall_angle_deg.unwrap_or(USUAL_DEG.1);
    let (first, last) = (curve[0][0], curve[curve.len() - 1][0]);
    let low = USUAL_DEG.0.min(now - 2.0).max(first);
    let high = USUAL_DEG.1.max(stall + 4.0).max(now + 2.0).min(last);
    (low, high)
}

fn marks(s: &StationResult) -> Vec<Point> {
    /// Nearer than this, degrees, now and best are one point on the drawing.
    const ONE_DEG: f64 = 0.25;
    let together = s.departure_deg.is_some_and(|d| d.abs() < ONE_DEG);
    let now =
        s.angle_of_attack_deg.zip(s.cl.zip(s.cd)).filter(|(_, (_, cd))| *cd > 0.0).map(|(at, (cl, cd))| {
            Point {
                at: [at, cl / cd],
                words: format!("{} {}", if together { "now, near best" } else { "now" }, fixed(cl / cd, 1))
                    .into(),
                class: Some(departure::style(s.departure_deg)),
                strong: true,
            }
        });
    let best = s.best_angle_deg.zip(s.best_lift_to_drag).map(|(at, ratio)| Point {
        at: [at, ratio],
        words: format!("best {}", fixed(ratio, 1)).into(),
        class: None,
        strong: false,
    });
    now.into_iter().chain(best.filter(|_| !together)).collect()
}

fn spans(s: &StationResult, end: f64) -> Vec<Span> {
    let working = s.best_angle_deg.zip(s.band_low_deg.zip(s.band_high_deg)).map(|(best, (low, high))| Span {
        x: (best + low, best + high),
        kind: SpanKind::Working,
        words: AttrValue::default(),
    });
    let stalled = s.stall_angle_deg.map(|from| Span {
        x: (from, end),
        kind: SpanKind::Stalled,
        words: "stalled".into(),
    });
    working.into_iter().chain(stalled).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_angle_there_is_now_is_always_shown() {
        let curve: Vec<[f64; 2]> = (-180..=180).map(|a| [f64::from(a), 1.0]).collect();
        let at = |now| StationResult {
            angle_of_attack_deg: Some(now),
            stall_angle_deg: Some(13.0),
            ..Default::default()
        };
        assert_eq!(shown(&at(1.0), &curve), (-6.0, 17.0));
        assert_eq!(shown(&at(44.0), &curve), (-6.0, 46.0));
        assert_eq!(shown(&at(-20.0), &curve), (-22.0, 17.0));
    }
}
