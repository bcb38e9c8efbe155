//! Where things stand on the chart of pitch and diameter, and its lines as path data.

use ndarray::Array2;

use crate::background::shape::Chart;
use crate::chart::field::{Field, data};
use crate::chart::linear::Linear;
use crate::chart::ticks::ticks;
use crate::chart::unit::Unit;

/// The frame of the chart.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Place {
    pub(super) x: Linear,
    pub(super) y: Linear,
    pub(super) left: f64,
    pub(super) right: f64,
    pub(super) top: f64,
    pub(super) low: f64,
}

impl Place {
    pub(super) const HEIGHT: f64 = 380.0;

    pub(super) fn new(chart: &Chart, width: f64) -> Self {
        let (left, right, top, low) = (56.0, (width - 12.0).max(120.0), 26.0, Self::HEIGHT - 38.0);
        let ends = |v: &[f64]| (v.first().copied().unwrap_or(0.0), v.last().copied().unwrap_or(1.0));
        let x = Linear::new(ends(&chart.diameters_m), (left, right));
        let y = Linear::new(ends(&chart.pitches_m), (low, top));
        Self { x, y, left, right, top, low }
    }

    pub(super) fn width(&self) -> f64 {
        self.right - self.left
    }

    pub(super) fn height(&self) -> f64 {
        self.low - self.top
    }

    pub(super) fn pane(&self) -> [f64; 4] {
        [self.left, self.top, self.width(), self.height()]
    }

    /// Numbers of the pitch and the diameter nearest to a pixel.
    pub(super) fn nearest(&self, chart: &Chart, [x, y]: [f64; 2]) -> (usize, usize) {
        let near = |all: &[f64], at: f64| {
            let away = |i: &usize| (all[*i] - at).abs();
            (0..all.len()).min_by(|a, b| away(a).total_cmp(&away(b))).unwrap_or(0)
        };
        (near(&chart.pitches_m, self.y.value(y)), near(&chart.diameters_m, self.x.value(x)))
    }
}

/// A line with its words.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Line {
    pub(super) data: String,
    pub(super) words: String,
    /// Middle of the words.
    pub(super) at: Option<[f64; 2]>,
    /// Whether it is a limit's edge.
    pub(super) limit: bool,
}

/// All lines of a chart.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Layers {
    pub(super) lines: Vec<Line>,
    pub(super) edges: Vec<Line>,
    /// Where there is no figure.
    pub(super) missing: String,
}

/// Most lines of the figure.
const MOST_LINES: usize = 10;

impl Layers {
    pub(super) fn new(chart: &Chart, at: &Place, unit: &Unit) -> Self {
        let size = (chart.pitches_m.len(), chart.diameters_m.len());
        let grid = |of: &dyn Fn(usize) -> Option<f64>| {
            let cells = Array2::from_shape_fn(size, |(p, d)| of(p * size.1 + d));
            let xs = chart.diameters_m.iter().map(|d| at.x.px(*d)).collect();
            Field::new(&cells, xs, chart.pitches_m.iter().map(|p| at.y.px(*p)).collect())
        };
        let known = || chart.values.iter().flatten().copied();
        let (low, high) = known().fold((f64::INFINITY, f64::NEG_INFINITY), |(l, h), v| (l.min(v), h.max(v)));
        let levels = if low < high { ticks(unit.of(low), unit.of(high), MOST_LINES) } else { Vec::new() };
        let mut taken: Vec<[f64; 2]> = Vec::new();
        let mut line = |field: &Field, level: f64, words: String, limit: bool, share: f64| {
            let rings = field.rings(level);
            let inside: Vec<[f64; 2]> = rings.concat().into_iter().filter(|p| at.holds(*p)).collect();
            let free = |p: &&[f64; 2]| {
                taken.iter().all(|t| (t[0] - p[0]).abs() > 70.0 || (t[1] - p[1]).abs() > 16.0)
            };
            let start = (inside.len() as f64 * share) as usize;
            let place = inside.iter().skip(start).chain(inside.iter().take(start)).find(free).copied();
            taken.extend(place);
            Line { data: data(&rings), words, at: place, limit }
        };
        let edges = chart.limits.iter().enumerate().filter_map(|(k, words)| {
            let broken = |i: usize| Some(f64::from(u8::from(chart.broken[i].contains(&(k as u8)))));
            Some(line(&grid(&broken)?, 0.5, words.clone(), true, 0.35))
        });
        let edges = edges.collect();
        let values = grid(&|i| chart.values[i]);
        let lines = levels.iter().filter_map(|tick| {
            Some(line(values.as_ref()?, unit.si(tick.at), tick.label.clone(), false, 0.6))
        });
        let lines = lines.collect();
        let missing = |i: usize| Some(f64::from(u8::from(chart.values[i].is_none())));
        let gaps = chart.values.iter().any(Option::is_none).then(|| grid(&missing)).flatten();
        Self { lines, edges, missing: gaps.map_or_else(String::new, |field| data(&field.rings(0.5))) }
    }
}

impl Place {
    /// Whether words fit about a pixel.
    fn holds(&self, [x, y]: [f64; 2]) -> bool {
        (self.left + 70.0..=self.right - 70.0).contains(&x)
            && (self.top + 10.0..=self.low - 10.0).contains(&y)
    }
}
