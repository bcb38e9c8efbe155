//! The hub's drilling, full size: the job's own pattern or a standard flange.

use crate::bench::draw::{Anchor, Drawing, Layer};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::Bench;
use crate::job::Flange;

use super::table::lines;

/// Holes to drill, lengths in m.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Pattern {
    bolts: u32,
    circle_m: f64,
    bolt_m: f64,
    /// 0 where none is given.
    bore_m: f64,
    flange_m: Option<f64>,
    name: &'static str,
}

const INCH_M: f64 = 0.0254;

/// The pattern of a job: a standard flange where it names one, else its own.
pub(super) fn pattern(bench: &Bench) -> Option<Pattern> {
    match bench.form.making.flange {
        // SAE No. 2 (AS127, 1947): six studs on a 4 3/4 in circle, 1/2 in; No. 1: six of 3/8 in on 4 3/8 in, from memory.
        Some(Flange::Sae2) => Some(standard(4.75, 0.5, "SAE No. 2 flange")),
        Some(Flange::Sae1) => Some(standard(4.375, 0.375, "SAE No. 1 flange (from memory)")),
        None => own(bench),
    }
}

fn standard(circle_in: f64, bolt_in: f64, name: &'static str) -> Pattern {
    Pattern {
        bolts: 6,
        circle_m: circle_in * INCH_M,
        bolt_m: bolt_in * INCH_M,
        bore_m: 0.0,
        flange_m: None,
        name,
    }
}

fn own(bench: &Bench) -> Option<Pattern> {
    let hub = bench.job.wood.as_ref()?.hub.as_ref()?;
    Some(Pattern {
        bolts: hub.bolts,
        circle_m: hub.bolt_circle_m,
        bolt_m: hub.bolt_diameter_m,
        bore_m: hub.bore_m,
        flange_m: Some(hub.flange_diameter_m),
        name: "own pattern",
    })
}

/// Where the bolts stand, mm: the blade's own line passes between two of them.
fn bolts_mm(pattern: &Pattern) -> impl Iterator<Item = [f64; 2]> {
    let (n, r) = (pattern.bolts, 500.0 * pattern.circle_m);
    (0..n).map(move |k| {
        let turn = std::f64::consts::TAU * (f64::from(k) + 0.5) / f64::from(n);
        [r * turn.sin(), r * turn.cos()]
    })
}

/// Draws the holes about (0, 0), the blade up.
pub(super) fn drill(drawing: &mut Drawing, bench: &Bench) {
    let Some(pattern) = pattern(bench) else {
        drawing.cross(Layer::Centre, [0.0, 0.0], 6.0);
        return;
    };
    if pattern.bore_m > 0.0 {
        drawing.circle(Layer::Cut, [0.0, 0.0], 500.0 * pattern.bore_m);
    }
    drawing.cross(Layer::Centre, [0.0, 0.0], 6.0);
    drawing.circle(Layer::Centre, [0.0, 0.0], 500.0 * pattern.circle_m);
    for at in bolts_mm(&pattern) {
        drawing.circle(Layer::Cut, at, 500.0 * pattern.bolt_m);
        drawing.cross(Layer::Centre, at, 500.0 * pattern.bolt_m + 2.0);
    }
    if let Some(flange) = pattern.flange_m {
        drawing.circle(Layer::Guide, [0.0, 0.0], 500.0 * flange);
    }
}

pub(super) fn leaf(bench: &Bench, unit: Unit) -> Leaf {
    let mut drawing = Drawing::default();
    let hub = 1e3 * bench.form.blade.hub_radius_m;
    drawing.circle(Layer::Cut, [0.0, 0.0], hub);
    let reach = hub + 3.0;
    drawing.line(Layer::Centre, [[0.0, -reach], [0.0, reach]]);
    drawing.line(Layer::Centre, [[-reach, 0.0], [reach, 0.0]]);
    drill(&mut drawing, bench);
    drawing.text([0.0, reach + 1.5], 3.0, Anchor::Middle, "blade");
    lines(&mut drawing, [-reach.min(80.0), -reach - 2.0], 3.0, &words(bench, unit));
    Leaf { name: "Hub drilling".into(), drawing }
}

/// The drilling in words.
pub(super) fn pattern_words(bench: &Bench, unit: Unit) -> String {
    pattern(bench).map_or_else(
        || "none in the job: name bench.flange or wood.hub".into(),
        |p| {
            format!(
                "{}: {} holes of {} on a circle of {}",
                p.name,
                p.bolts,
                unit.say(p.bolt_m),
                unit.say(p.circle_m)
            )
        },
    )
}

fn words(bench: &Bench, unit: Unit) -> Vec<String> {
    let boss = unit.say(2.0 * bench.form.blade.hub_radius_m);
    let mut words = vec![format!("boss {boss} across, seen from ahead"), pattern_words(bench, unit)];
    let Some(p) = pattern(bench) else { return words };
    words.push(if p.bore_m > 0.0 {
        format!("centre hole {}", unit.say(p.bore_m))
    } else {
        "centre hole to suit your own hub".into()
    });
    words.push(
        "Lay this sheet on your own flange before you drill; turn the pattern as your engine needs.".into(),
    );
    words
}
