//! The thin lines on a template card: the pitch axis, and a line at the blade angle with its name.
//!
//! The section's own chord line lies in the wood, so the line on a card is drawn beside it, parallel: at the
//! angle to the chord line, or on the face card of a flat face at the angle of that face. It stays inside the
//! card, clear of its words; where no length of it that is worth laying a protractor on is free, there is
//! none.

use crate::bench::draw::{Drawing, HALF_SMALL, Item, Layer, Text};
use crate::bench::work::{Bench, Carved};

use super::template::{Card, SMALLEST_MM, Side};

/// Nearest to the wood, and how much farther off each time until there is room, mm.
const NEAREST_MM: f64 = 1.5;
const STEP_OFF_MM: f64 = 1.0;
const STEPS_OFF: u32 = 12;
/// Shortest line that is drawn, mm.
const SHORTEST_MM: f64 = 10.0;
/// From point to point where a line is looked at, mm.
const LOOK_MM: f64 = 0.5;
/// What stays free round words, mm.
const FREE_MM: f64 = 0.7;

/// Draws both on a card that has its words already.
pub(super) fn draw(drawing: &mut Drawing, bench: &Bench, station: &Carved, side: Side, card: &Card) {
    let mut words: Vec<Text> = drawing.items.iter().filter_map(text).cloned().collect();
    let flat = station.face_rad.filter(|_| side == Side::Lower);
    let (angle, name) = flat.map_or((station.angle_rad, "chord line"), |face| (face, "face"));
    let along = [bench.hand() * angle.cos(), angle.sin()];
    // Away from the wood.
    let sign = if side == Side::Upper { bench.hand() } else { -bench.hand() };
    let out = [-sign * along[1], sign * along[0]];
    let found = (0..STEPS_OFF).find_map(|k| {
        let off = card.on_wood.iter().map(|p| dot(*p, out)).fold(f64::NEG_INFINITY, f64::max);
        named(card, &words, [along, out], off + NEAREST_MM + STEP_OFF_MM * f64::from(k), name)
    });
    if let Some((line, label)) = found {
        drawing.line(Layer::Guide, line);
        words.push(label.clone());
        drawing.items.push(Item::Text(label));
    }
    let datum = card.datum[0][1];
    let ends = axis_ends(card);
    let axis = points([0.0, datum], [0.0, (ends - datum).signum()], (ends - datum).abs());
    for line in free(axis, |p| clear(p, &words)) {
        drawing.line(Layer::Centre, line);
    }
}

/// The longest free part of a line at a distance from the origin, and its name beside it.
fn named(
    card: &Card,
    words: &[Text],
    [along, out]: [[f64; 2]; 2],
    off: f64,
    name: &str,
) -> Option<([[f64; 2]; 2], Text)> {
    let reach = card.outline.iter().map(|p| dot(*p, along));
    let (low, high) =
        reach.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), t| (low.min(t), high.max(t)));
    let foot = [off * out[0] + low * along[0], off * out[1] + low * along[1]];
    let lines = free(points(foot, along, high - low), |p| inside(&card.outline, p) && clear(p, words));
    let longest = lines.into_iter().max_by(|a, b| long(a).total_cmp(&long(b)))?;
    if long(&longest) < SHORTEST_MM {
        return None;
    }
    let half = [0.5 * Text::plain(name, SMALLEST_MM).breadth_mm(), 0.5 * SMALLEST_MM];
    let beside = half[0] * out[0].abs() + half[1] * out[1].abs() + FREE_MM;
    let middle = [0, 1].map(|a| 0.5 * (longest[0][a] + longest[1][a]));
    let shifts = (0..).map(|k| LOOK_MM * f64::from(k)).take_while(|t| *t < 0.5 * long(&longest));
    let places = shifts.flat_map(|t| [[t, 1.0], [-t, 1.0], [t, -1.0], [-t, -1.0]]);
    let labels = places.map(|[t, side]| {
        let at = [0, 1].map(|a| middle[a] + t * along[a] + side * beside * out[a]);
        Text { at: [at[0], at[1] - HALF_SMALL * SMALLEST_MM], ..Text::plain(name, SMALLEST_MM) }
    });
    let fits = |label: &Text| {
        let [low, high] = label.corners();
        let rim = [low, [high[0], low[1]], high, [low[0], high[1]]];
        let off_axis = low[0] > FREE_MM || high[0] < -FREE_MM;
        let in_box = |p: &[f64; 2]| (0..2).all(|a| p[a] > low[a] - FREE_MM && p[a] < high[a] + FREE_MM);
        let apart = words.iter().all(|w| !overlap(w.corners(), [low, high]));
        off_axis && apart && rim.iter().all(|p| inside(&card.outline, p)) && !card.outline.iter().any(in_box)
    };
    labels.into_iter().find(fits).map(|label| (longest, label))
}

fn text(item: &Item) -> Option<&Text> {
    if let Item::Text(text) = item { Some(text) } else { None }
}

fn dot(p: [f64; 2], q: [f64; 2]) -> f64 {
    p[0] * q[0] + p[1] * q[1]
}

fn long([a, b]: &[[f64; 2]; 2]) -> f64 {
    (b[0] - a[0]).hypot(b[1] - a[1])
}

/// Where the pitch axis leaves the card, beginning at the datum edge.
fn axis_ends(card: &Card) -> f64 {
    let datum = card.datum[0][1];
    let n = card.outline.len();
    let crossing = |k: usize| {
        let (a, b) = (card.outline[k], card.outline[(k + 1) % n]);
        ((a[0] < 0.0) != (b[0] < 0.0)).then(|| a[1] - a[0] * (b[1] - a[1]) / (b[0] - a[0]))
    };
    let inner = (0..n).filter_map(crossing).filter(|y| (y - datum).abs() > 1e-9);
    inner.min_by(|a, b| (a - datum).abs().total_cmp(&(b - datum).abs())).unwrap_or(datum)
}

/// Points along a direction, the first and the last among them.
fn points(from: [f64; 2], along: [f64; 2], long_mm: f64) -> Vec<[f64; 2]> {
    let steps = (long_mm / LOOK_MM).ceil().max(1.0);
    let at = |k: u32| long_mm * f64::from(k) / steps;
    (0..=steps as u32).map(|k| [0, 1].map(|a| from[a] + at(k) * along[a])).collect()
}

/// The stretches of points that are free, each from its first to its last.
fn free(points: Vec<[f64; 2]>, is_free: impl Fn(&[f64; 2]) -> bool) -> Vec<[[f64; 2]; 2]> {
    let marked: Vec<([f64; 2], bool)> = points.into_iter().map(|p| (p, is_free(&p))).collect();
    let runs = marked.chunk_by(|a, b| a.1 == b.1).filter(|run| run[0].1 && run.len() > 1);
    runs.map(|run| [run[0].0, run[run.len() - 1].0]).collect()
}

/// Whether a point is clear of all words.
fn clear(p: &[f64; 2], words: &[Text]) -> bool {
    words.iter().all(|w| {
        let [low, high] = w.corners();
        (0..2).any(|a| p[a] < low[a] - FREE_MM || p[a] > high[a] + FREE_MM)
    })
}

fn overlap([a, b]: [[f64; 2]; 2], [c, d]: [[f64; 2]; 2]) -> bool {
    (0..2).all(|k| a[k] < d[k] + FREE_MM && c[k] < b[k] + FREE_MM)
}

/// Whether a point lies inside a closed outline.
fn inside(outline: &[[f64; 2]], p: &[f64; 2]) -> bool {
    let n = outline.len();
    let crossed = (0..n).filter(|&k| {
        let (a, b) = (outline[k], outline[(k + 1) % n]);
        (a[1] > p[1]) != (b[1] > p[1]) && p[0] < a[0] + (p[1] - a[1]) * (b[0] - a[0]) / (b[1] - a[1])
    });
    crossed.count() % 2 == 1
}
