//! Where a curve to drag stands: its axes and what its pixels mean.

use spokeshave::drawn::DrawnStation;

use super::lines::Best;
use crate::chart::linear::Linear;
use crate::chart::ticks::widened;
use crate::chart::unit::Unit;
use crate::state::Measure;

/// Room left of the frame, above and below it.
const LEFT: f64 = 38.0;
const RIGHT: f64 = 8.0;
const TOP: f64 = 8.0;
const FOOT: f64 = 34.0;
/// How far past the drawn angles the best ones may stretch the axis, degrees.
const MOST_BEST_DEG: f64 = 25.0;

/// What the axes have to hold; it stands still while a ring is held.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Spans {
    /// Radius of the first and the last station, m.
    pub radius_m: (f64, f64),
    /// Lowest and highest figure, SI or degrees.
    pub figure: (f64, f64),
}

impl Spans {
    /// Room for stations and their best angles.
    #[must_use]
    pub fn of(still: &[DrawnStation], measures: &[Measure], best: &Best) -> Self {
        let radius_m = ends(still.iter().map(|d| d.radius_m));
        Self { radius_m, figure: span(still, measures, best) }
    }
}

/// The frame of a curve.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Frame {
    /// Radius to pixels.
    pub x: Linear,
    /// Figure to pixels.
    pub y: Linear,
    /// Left edge.
    pub left: f64,
    /// Right edge.
    pub right: f64,
    /// Upper edge.
    pub top: f64,
    /// Lower edge.
    pub low: f64,
}

impl Frame {
    /// A frame in a width and height, with round figures of the unit at its ends.
    #[must_use]
    pub fn new(spans: Spans, unit: Unit, (width, height): (f64, f64)) -> Self {
        let (inner, outer) = spans.radius_m;
        let margin = 0.06 * (outer - inner);
        let (left, right) = (LEFT, (width - RIGHT).max(LEFT + 60.0));
        let (low, high) = widened(unit.of(spans.figure.0), unit.of(spans.figure.1));
        Self {
            x: Linear::new((inner - margin, outer + margin), (left, right)),
            y: Linear::new((unit.si(low), unit.si(high)), (height - FOOT, TOP)),
            left,
            right,
            top: TOP,
            low: height - FOOT,
        }
    }
}

fn ends(values: impl Iterator<Item = f64>) -> (f64, f64) {
    values.fold((f64::INFINITY, f64::NEG_INFINITY), |(a, b), v| (a.min(v), b.max(v)))
}

/// From nothing for lengths; for angles from the least, with room to drag and for the best ones, if they are
/// near.
fn span(still: &[DrawnStation], measures: &[Measure], best: &Best) -> (f64, f64) {
    let drawn = || still.iter().flat_map(|d| measures.iter().filter_map(|m| m.of(d)));
    let (low, high) = ends(drawn());
    if !measures.contains(&Measure::Angle) {
        return (0.0, 1.15 * high);
    }
    let near = best.points.iter().map(|b| b.angle_deg.clamp(low - MOST_BEST_DEG, high + MOST_BEST_DEG));
    let (low, high) = ends(drawn().chain(near));
    ((low - 3.0).floor(), (high + 4.0).ceil())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::state::{State, drawn};

    #[test]
    fn every_station_stands_inside_and_pixels_run_upward() {
        let still = drawn(State::started(None, None).job());
        let frame =
            Frame::new(Spans::of(&still, &[Measure::Angle], &Best::default()), Unit::DEGREE, (380.0, 200.0));
        for d in &still {
            assert!((frame.left..=frame.right).contains(&frame.x.px(d.radius_m)));
            assert!((frame.top..=frame.low).contains(&frame.y.px(d.angle_deg)));
        }
        assert!(frame.y.slope() < 0.0);
    }
}
