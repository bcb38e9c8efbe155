//! The blank seen along its width, its rear to the left: both edges, the wood's lowest and highest line, the
//! glue lines.

use crate::bench::draw::{Anchor, Drawing, Layer};
use crate::bench::page::Leaf;
use crate::bench::work::Bench;

pub(super) fn leaf(bench: &Bench) -> Leaf {
    let mut drawing = Drawing::default();
    let thick = 1e3 * bench.blank.thickness_m;
    let top = 1e3 * (bench.form.blade.radius_m + bench.blank.allowance_m);
    let bottom = bench.rings.first().map_or(0.0, |r| 1e3 * r.radius_m);
    drawing.shape(Layer::Datum, [[0.0, bottom], [thick, bottom], [thick, top], [0.0, top]]);
    for plank in &bench.blank.layers.planks[1..] {
        let x = 1e3 * plank.faces_m[0];
        drawing.line(Layer::Glue, [[x, bottom], [x, top]]);
    }
    let line = |of: fn(&crate::bench::Ring) -> f64| -> Vec<[f64; 2]> {
        let up = |z: f64| 1e3 * (z - bench.blank.back_m);
        bench.rings.iter().map(|r| [up(of(r)), 1e3 * r.radius_m]).collect()
    };
    drawing.line(Layer::Cut, line(|r| r.span(1)[0]));
    drawing.line(Layer::Cut, line(|r| r.span(1)[1]));
    let from = bench.stations.first().map_or(0.0, |s| 1e3 * s.heights.radius_m) - 1e-6;
    let edge = |mut points: Vec<[f64; 2]>| {
        points.retain(|p| p[1] >= from);
        points
    };
    drawing.line(Layer::Guide, edge(line(|r| r.leading_edge()[1])));
    drawing.line(Layer::Guide, edge(line(|r| r.trailing_edge()[1])));
    for station in &bench.stations {
        let y = 1e3 * station.heights.radius_m;
        drawing.line(Layer::Thin, [[0.0, y], [thick, y]]);
        drawing.bold([thick + 1.0, y - 1.0], 3.0, Anchor::Start, station.number.to_string());
        let mark = |drawing: &mut Drawing, x: f64| drawing.circle(Layer::Thin, [1e3 * x, y], 0.8);
        station.heights.edges_m.into_iter().for_each(|x| mark(&mut drawing, x));
    }
    let foot = [
        "left: rear of the blank, right: front",
        "full lines: lowest and highest wood",
        "dashed, ringed: the two edges,",
        "the leading edge in front",
        "dotted: glue lines",
    ];
    for (k, text) in foot.iter().enumerate() {
        drawing.text([0.0, bottom - 4.0 - 3.4 * k as f64], 2.4, Anchor::Start, *text);
    }
    Leaf { name: "Blank from the side".into(), drawing }
}
