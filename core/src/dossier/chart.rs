//! A chart as lines: two axes with round figures and their units, curves told apart by their strokes, a key
//! under it.

use crate::bench::draw::{Anchor, Drawing, Layer, breadth_mm, fitted};

use super::scale::{Scale, fixed};

/// Strokes of the curves, in the order in which they are taken.
const STROKES: [Layer; 6] = [Layer::Cut, Layer::Guide, Layer::Centre, Layer::Join, Layer::Datum, Layer::Glue];
/// Most curves of one chart.
pub(super) const MOST_CURVES: usize = STROKES.len();
/// Most ticks of an axis.
const MOST_TICKS: f64 = 6.0;
/// Room left, right, above and below the plot, mm.
const LEFT_MM: f64 = 13.0;
const RIGHT_MM: f64 = 5.0;
const ABOVE_MM: f64 = 10.0;
const BELOW_MM: f64 = 10.0;
/// Size of the figures, mm, and height of a line of the key.
const SIZE_MM: f64 = 2.4;
const KEY_MM: f64 = 3.6;
/// Length of a sample in the key, mm.
const SAMPLE_MM: f64 = 10.0;

/// An axis.
#[derive(Clone, Debug)]
pub(super) struct Axis {
    /// What it measures.
    pub(super) words: &'static str,
    /// Its unit.
    pub(super) scale: Scale,
}

/// A curve by its points in SI; it is broken where one is not a number.
#[derive(Clone, Debug)]
pub(super) struct Curve {
    /// What it is.
    pub(super) name: String,
    /// Points.
    pub(super) points: Vec<[f64; 2]>,
}

/// A chart.
#[derive(Clone, Debug)]
pub(super) struct Chart {
    /// What it shows.
    pub(super) title: String,
    /// Across.
    pub(super) x: Axis,
    /// Upward.
    pub(super) y: Axis,
    /// At most [`MOST_CURVES`].
    pub(super) curves: Vec<Curve>,
    /// Lines right across at a value, with their names, at most as many as [`LIMITS`].
    pub(super) limits: Vec<(String, f64)>,
}

impl Curve {
    pub(super) fn new(name: impl Into<String>, points: impl Iterator<Item = (f64, Option<f64>)>) -> Self {
        Self { name: name.into(), points: points.map(|(x, y)| [x, y.unwrap_or(f64::NAN)]).collect() }
    }

    fn known(&self) -> impl Iterator<Item = &[f64; 2]> {
        self.points.iter().filter(|p| p.iter().all(|v| v.is_finite()))
    }
}

impl Chart {
    /// Whether there is anything to draw.
    pub(super) fn shows(&self) -> bool {
        self.curves.iter().any(|c| c.known().count() > 1)
    }

    /// The chart in a box of a size, mm, its upper left corner at the origin.
    pub(super) fn drawn(&self, [wide, tall]: [f64; 2]) -> Drawing {
        let mut drawing = Drawing::default();
        let known: Vec<&Curve> = self.curves.iter().filter(|c| c.known().count() > 1).collect();
        let names: Vec<&str> =
            known.iter().map(|c| c.name.as_str()).chain(self.limits.iter().map(|l| l.0.as_str())).collect();
        let key = places(&names, wide);
        let key_mm = KEY_MM * key.last().map_or(0.0, |k| 1.0 + k[1]);
        let low = [LEFT_MM, -(tall - BELOW_MM - key_mm)];
        let high = [wide - RIGHT_MM, -ABOVE_MM];
        drawing.bold([0.0, -3.5], 2.9, Anchor::Start, fitted(&self.title, 2.9 * 1.08, wide));
        let of = |k: usize, scale: &Scale| {
            let limit = self.limits.iter().filter(|_| k == 1).map(|l| l.1);
            let all = known.iter().flat_map(|c| c.known()).map(|p| p[k]).chain(limit);
            Ticks::over(all.map(|v| v * scale.per_si))
        };
        let ticks = [of(0, &self.x.scale), of(1, &self.y.scale)];
        let place = |p: [f64; 2]| {
            let at = |k: usize, v: f64| low[k] + ticks[k].share(v) * (high[k] - low[k]);
            [at(0, p[0] * self.x.scale.per_si), at(1, p[1] * self.y.scale.per_si)]
        };
        self.axes(&mut drawing, &ticks, low, high);
        for (curve, layer) in known.iter().zip(STROKES) {
            let runs = curve.points.split(|p| p.iter().any(|v| !v.is_finite()));
            runs.filter(|run| run.len() > 1)
                .for_each(|run| drawing.line(layer, run.iter().map(|p| place(*p)).collect::<Vec<_>>()));
        }
        for ((name, value), layer) in self.limits.iter().zip(LIMITS) {
            let y = place([0.0, *value])[1];
            drawing.line(layer, [[low[0], y], [high[0], y]]);
            if self.limits.len() > 1 {
                drawing.text([high[0], y + 0.6], SIZE_MM, Anchor::End, name.as_str());
            }
        }
        for (i, (name, at)) in names.iter().zip(&key).enumerate() {
            let layer = if i < known.len() { STROKES[i] } else { LIMITS[i - known.len()] };
            let at = [at[0], low[1] - BELOW_MM - KEY_MM * (at[1] + 0.5)];
            drawing.line(layer, [at, [at[0] + SAMPLE_MM, at[1]]]);
            let room = wide - at[0] - SAMPLE_MM - 1.5;
            drawing.text(
                [at[0] + SAMPLE_MM + 1.5, at[1] - 0.8],
                SIZE_MM,
                Anchor::Start,
                fitted(name, SIZE_MM, room),
            );
        }
        drawing
    }

    fn axes(&self, drawing: &mut Drawing, ticks: &[Ticks; 2], low: [f64; 2], high: [f64; 2]) {
        drawing.line(Layer::Thin, [[low[0], high[1]], low, [high[0], low[1]]]);
        for v in ticks[0].values() {
            let x = low[0] + ticks[0].share(v) * (high[0] - low[0]);
            drawing.line(Layer::Thin, [[x, low[1]], [x, low[1] + 1.2]]);
            drawing.text([x, low[1] - 3.2], SIZE_MM, Anchor::Middle, ticks[0].figure(v));
        }
        for v in ticks[1].values() {
            let y = low[1] + ticks[1].share(v) * (high[1] - low[1]);
            drawing.line(Layer::Thin, [[low[0], y], [low[0] + 1.2, y]]);
            drawing.text([low[0] - 1.0, y - 0.8], SIZE_MM, Anchor::End, ticks[1].figure(v));
        }
        if let Some(y) = Some(ticks[1].share(0.0)).filter(|y| (0.01..0.99).contains(y)) {
            let y = low[1] + y * (high[1] - low[1]);
            drawing.line(Layer::Thin, [[low[0], y], [high[0], y]]);
        }
        drawing.text([high[0], low[1] - 7.0], SIZE_MM, Anchor::End, named(&self.x));
        drawing.text([0.0, high[1] + 2.4], SIZE_MM, Anchor::Start, named(&self.y));
    }
}

/// How limits are drawn.
const LIMITS: [Layer; 2] = [Layer::Datum, Layer::Ruler];

fn named(axis: &Axis) -> String {
    if axis.scale.sign.is_empty() {
        axis.words.into()
    } else {
        format!("{}, {}", axis.words, axis.scale.sign)
    }
}

/// Where the samples of a key begin, mm, and on which line: beside one another as far as they go.
fn places(names: &[&str], wide: f64) -> Vec<[f64; 2]> {
    let (mut x, mut line) = (0.0, 0.0);
    let mut place = |name: &&str| {
        let long = SAMPLE_MM + 4.5 + breadth_mm(name, SIZE_MM);
        if x > 0.0 && x + long > wide {
            (x, line) = (0.0, line + 1.0);
        }
        let at = [x, line];
        x += long;
        at
    };
    names.iter().map(&mut place).collect()
}

/// Round figures over a span.
#[derive(Clone, Copy, Debug)]
struct Ticks {
    first: f64,
    step: f64,
    count: u32,
}

impl Ticks {
    /// Round figures that hold all values between the first and the last.
    fn over(values: impl Iterator<Item = f64>) -> Self {
        let (mut low, mut high) =
            values.fold((f64::INFINITY, f64::NEG_INFINITY), |(l, h), v| (l.min(v), h.max(v)));
        if low > high {
            (low, high) = (0.0, 1.0);
        }
        // What nearly reaches down to nothing begins there.
        if low > 0.0 && low < 0.5 * high {
            low = 0.0;
        }
        let span = (high - low).max(1e-3 * high.abs()).max(1e-9);
        let ten = 10f64.powf((span / MOST_TICKS).log10().floor());
        let step = [1.0, 2.0, 5.0, 10.0].map(|m| m * ten);
        let step = step.into_iter().find(|s| span / s <= MOST_TICKS - 1.0).unwrap_or(10.0 * ten);
        let first = (low / step + 1e-9).floor() * step;
        let count = ((high - first) / step - 1e-9).ceil().max(1.0) as u32;
        Self { first, step, count }
    }

    fn values(self) -> impl Iterator<Item = f64> {
        (0..=self.count).map(move |i| self.first + f64::from(i) * self.step)
    }

    fn share(self, v: f64) -> f64 {
        (v - self.first) / (f64::from(self.count) * self.step)
    }

    fn figure(self, v: f64) -> String {
        fixed(v, (-(self.step * 1.000_001).log10().floor()).max(0.0) as usize)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::bench::Item;

    fn chart(points: Vec<[f64; 2]>) -> Chart {
        let axis = |words, sign| Axis { words, scale: Scale::fixed(sign, 1.0, 0) };
        let curves = vec![Curve { name: "one".into(), points }];
        Chart {
            title: "Of".into(),
            x: axis("speed", "m/s"),
            y: axis("force", "N"),
            curves,
            limits: Vec::new(),
        }
    }

    #[test]
    fn figures_at_the_axes_are_round_few_and_hold_the_values() {
        for (low, high) in
            [(0.0, 1.0), (-0.37, 7.2), (1980.0, 3300.0), (3.0, 3.0), (0.011, 0.012), (-5.0, -1.0)]
        {
            let ticks = Ticks::over([low, high].into_iter());
            let all: Vec<f64> = ticks.values().collect();
            assert!(all[0] <= low + 1e-9 && all[all.len() - 1] >= high - 1e-9, "{all:?}");
            assert!((2..=8).contains(&all.len()), "{all:?}");
            let lead = all[1] - all[0];
            let lead = lead / 10f64.powf((lead * 1.000_001).log10().floor());
            assert!([1.0, 2.0, 5.0].iter().any(|r| (lead - r).abs() < 1e-6), "{all:?}");
        }
    }

    #[test]
    fn a_curve_stays_in_its_box_and_breaks_where_it_is_not_known() {
        let points = (0..50).map(|i| [f64::from(i), if i == 20 { f64::NAN } else { f64::from(i * i) }]);
        let drawn = chart(points.collect()).drawn([90.0, 60.0]);
        let [low, high] = drawn.bounds().unwrap();
        assert!(low[0] >= -1e-9 && high[0] <= 90.0 && high[1] <= 0.0 && low[1] >= -60.0, "{low:?} {high:?}");
        let lines = drawn.items.iter().filter(|i| matches!(i, Item::Line { layer: Layer::Cut, .. }));
        assert_eq!(lines.count(), 3, "two runs and the key");
        let said = |w: &str| drawn.items.iter().any(|i| matches!(i, Item::Text(t) if t.words == w));
        assert!(said("speed, m/s") && said("force, N") && said("one") && said("Of"));
        assert!(!chart(vec![[0.0, 1.0]]).shows());
    }
}
