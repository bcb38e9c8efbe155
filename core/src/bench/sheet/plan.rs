//! The blank seen from ahead, one blade up from the axis: the first cut with the bandsaw.

use crate::bench::draw::{Anchor, Drawing, Layer, breadth_mm};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::{Bench, Carved, root_m};

use super::hub::drill;

/// Size of letters, mm.
const SIZE_MM: f64 = 3.0;

pub(super) fn leaf(bench: &Bench, unit: Unit, room: [f64; 2]) -> Leaf {
    let mut drawing = Drawing::default();
    let half = 0.5e3 * bench.blank.width_m;
    let top = 1e3 * (bench.form.blade.radius_m + bench.blank.allowance_m);
    let hub = 1e3 * bench.form.blade.hub_radius_m;
    let two = bench.blank.boss.is_some() && bench.form.blade.count == 2;
    let bottom = if bench.blank.boss.is_some() { -hub - 1e3 * bench.blank.allowance_m } else { 0.0 };
    drawing.line(Layer::Datum, [[-half, bottom], [-half, top], [half, top], [half, bottom]]);
    drawing.line(Layer::Centre, [[0.0, bottom], [0.0, top]]);
    drawing.line(Layer::Centre, [[-half, 0.0], [half, 0.0]]);
    outline(&mut drawing, bench, two);
    if bench.blank.boss.is_some() {
        drawing.circle(Layer::Guide, [0.0, 0.0], hub);
        drill(&mut drawing, bench);
    }
    let labels: Vec<String> = bench.stations.iter().map(|s| label(s, unit)).collect();
    let widest = labels.iter().map(|l| breadth_mm(l, SIZE_MM)).fold(0.0, f64::max) + 3.0;
    let beside = 2.0 * half + widest <= room[0];
    for (station, label) in bench.stations.iter().zip(&labels) {
        let y = 1e3 * station.heights.radius_m;
        drawing.line(Layer::Thin, [[-half, y], [half, y]]);
        if beside {
            drawing.text([half + 1.5, y - 1.0], SIZE_MM, Anchor::Start, label);
        } else {
            drawing.text([half - 1.5, y + 1.2], SIZE_MM, Anchor::End, label);
        }
    }
    words(&mut drawing, bench, half);
    Leaf { name: "Blank from ahead".into(), drawing }
}

fn label(station: &Carved, unit: Unit) -> String {
    format!("{}: r {}", station.number, unit.figure(station.heights.radius_m))
}

/// The blade in plan, from the axis where hub and two blades are one piece, else from where it stands free of
/// the hub.
fn outline(drawing: &mut Drawing, bench: &Bench, two: bool) {
    let hub = bench.form.blade.hub_radius_m;
    let from = if two {
        0.0
    } else if bench.blank.boss.is_some() {
        hub
    } else {
        root_m(bench)
    };
    let side = |axis_end: usize| {
        let rings = bench.rings.iter().filter(move |r| r.radius_m >= from);
        // Seen from ahead: the other way round than from the tip.
        rings.map(move |r| [-1e3 * bench.hand() * r.span(0)[axis_end], 1e3 * r.radius_m])
    };
    let tip = bench.rings.last().map(|r| {
        let middle = 0.5 * (r.leading_edge()[0] + r.trailing_edge()[0]);
        [-1e3 * bench.hand() * middle, 1e3 * bench.form.blade.radius_m]
    });
    let mut points: Vec<[f64; 2]> = side(1).chain(tip).collect();
    let back: Vec<[f64; 2]> = side(0).collect();
    points.extend(back.into_iter().rev());
    drawing.line(Layer::Cut, points);
}

fn words(drawing: &mut Drawing, bench: &Bench, half: f64) {
    let ahead = if bench.hand() > 0.0 { -1.0 } else { 1.0 };
    // Between two stations, clear of their lines.
    let middle = bench.stations.len() / 2;
    let radius =
        |i: usize| bench.stations.get(i).map_or(0.5 * bench.form.blade.radius_m, |s| s.heights.radius_m);
    let y = 500.0 * (radius(middle.saturating_sub(1)) + radius(middle)) - 1.0;
    for (side, text) in [(ahead, "LE: leading edge side"), (-ahead, "TE: trailing edge side")] {
        let anchor = if side < 0.0 { Anchor::Start } else { Anchor::End };
        if breadth_mm(text, 2.6) < 0.4 * half {
            drawing.text([side * (half - 1.5), y], 2.6, anchor, text);
        } else if breadth_mm(&text[..2], 2.6) < 0.9 * half {
            drawing.text([0.35 * side * half, y], 2.6, Anchor::Middle, &text[..2]);
        }
    }
    let below = match bench.form.blade.count {
        1 => "blade and hub in one piece",
        2 => "for the other blade turn the sheet half a turn about the axis",
        _ => "one for each blade; dashed: the boss",
    };
    if bench.blank.boss.is_some() && breadth_mm(below, 2.4) < 1.9 * half {
        let low = -1e3 * bench.form.blade.hub_radius_m - 1e3 * bench.blank.allowance_m;
        drawing.text([0.0, low - 3.0], 2.4, Anchor::Middle, below);
    }
}
