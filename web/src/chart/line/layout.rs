//! Where a line chart stands and what its pixels mean.

use super::{Axis, LineChartProps};
use crate::chart::axis::{most_on, placed};
use crate::chart::linear::Linear;
use crate::chart::ticks::widened;

/// Room above a limit for what is hatched beyond it.
const HEADROOM: f64 = 1.03;

/// Room above the frame for the upper axis's words, and under it for figures and words.
const HEAD: f64 = 22.0;
const FOOT: f64 = 36.0;
/// Width of a figure's letter.
const LETTER: f64 = 6.3;

/// Frame and projections of a chart.
pub(super) struct Layout {
    pub(super) left: f64,
    pub(super) right: f64,
    pub(super) top: f64,
    pub(super) low: f64,
    pub(super) x: Linear,
    pub(super) y: Linear,
    /// Most ticks up.
    pub(super) rows: usize,
}

impl Layout {
    pub(super) fn new(props: &LineChartProps, width: f64) -> Self {
        let (top, low) = (HEAD, (props.height - FOOT).max(HEAD + 20.0));
        let rows = most_on(low - top, 26.0);
        let along = || props.series.iter().flat_map(|s| s.points.iter().map(|p| p[0]));
        let up = || {
            let series = props.series.iter().flat_map(|s| s.points.iter().map(|p| p[1]));
            series
                .chain(props.limits.iter().map(|l| if l.hatched { HEADROOM * l.y } else { l.y }))
                .chain(props.points.iter().map(|p| p.at[1]))
        };
        let x_span = span(&props.x, along(), false);
        let y = Linear::new(span(&props.y, up(), true), (low, top));
        let figures = placed(&y, &props.y.unit, rows);
        let longest = figures.iter().map(|(_, t)| t.label.chars().count()).max().unwrap_or(1);
        let left = LETTER * longest as f64 + 12.0;
        let right = (width - 8.0).max(left + 40.0);
        Self { left, right, top, low, x: Linear::new(x_span, (left, right)), y, rows }
    }

    pub(super) fn place(&self, [x, y]: [f64; 2]) -> [f64; 2] {
        [self.x.px(x), self.y.px(y)]
    }

    pub(super) fn width(&self) -> f64 {
        self.right - self.left
    }

    pub(super) fn height(&self) -> f64 {
        self.low - self.top
    }
}

/// The axis's own span, or that of the data, widened to round figures where asked.
fn span(axis: &Axis, data: impl Iterator<Item = f64>, round: bool) -> (f64, f64) {
    if let Some(span) = axis.span {
        return span;
    }
    let ends = data.filter(|v| v.is_finite()).fold(None, |ends: Option<(f64, f64)>, v| {
        Some(ends.map_or((v, v), |(low, high)| (low.min(v), high.max(v))))
    });
    let Some((low, high)) = ends else { return (0.0, 1.0) };
    if !round {
        return (low, high);
    }
    // From zero, unless the data keep far from it.
    let (low, high) = if low > 0.0 && low < 0.6 * high { (0.0, high) } else { (low, high) };
    // What a root leaves below zero is not worth a step of the axis.
    let low = if low < 0.0 && low > -1e-3 * high { 0.0 } else { low };
    let (low, high) = widened(axis.unit.of(low), axis.unit.of(high));
    (axis.unit.si(low), axis.unit.si(high))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chart::unit::Unit;

    fn axis(unit: Unit) -> Axis {
        Axis { words: "thrust".into(), unit, span: None }
    }

    #[test]
    fn spans_come_from_the_data_and_are_round_in_the_unit_shown() {
        let data = [0.02, f64::NAN, 0.117];
        assert_eq!(span(&axis(Unit::ratio(2)), data.into_iter(), true), (0.0, 0.12));
        assert_eq!(span(&axis(Unit::ratio(2)), [-1e-7, 0.117].into_iter(), true), (0.0, 0.12));
        let (low, high) = span(&axis(Unit::INCH), [0.1, 0.7].into_iter(), true);
        assert!((low - 0.0).abs() < 1e-12 && (high - 30.0 * 0.0254).abs() < 1e-12, "{low} {high}");
    }

    #[test]
    fn a_chart_without_data_has_a_span() {
        assert_eq!(span(&axis(Unit::ratio(2)), std::iter::empty(), true), (0.0, 1.0));
    }
}
