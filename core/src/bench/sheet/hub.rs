//! The hub's drilling, full size.

use crate::bench::draw::{Anchor, Drawing, Layer};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::Bench;
use crate::drilling::Pattern;

use super::table::lines;

/// Draws the holes about (0, 0), the blade up.
pub(super) fn drill(drawing: &mut Drawing, bench: &Bench) {
    let Some(pattern) = Pattern::of(&bench.job) else {
        drawing.cross(Layer::Centre, [0.0, 0.0], 6.0);
        return;
    };
    if pattern.bore_m > 0.0 {
        drawing.circle(Layer::Cut, [0.0, 0.0], 500.0 * pattern.bore_m);
    }
    drawing.cross(Layer::Centre, [0.0, 0.0], 6.0);
    drawing.circle(Layer::Centre, [0.0, 0.0], 500.0 * pattern.circle_m);
    for hole in pattern.bolt_holes() {
        let at = [1e3 * hole.at_m[1], 1e3 * hole.at_m[0]];
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
    Pattern::of(&bench.job).map_or_else(
        || "none in the job: choose a flange or describe the hub".into(),
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
    let thick = bench.blank.boss.map_or(0.0, |b| b.faces_m[1] - b.faces_m[0]);
    let mut words = vec![
        format!("boss {boss} across, {} thick, seen from ahead", unit.say(thick)),
        format!("{}; dash-dotted: that circle", pattern_words(bench, unit)),
    ];
    let Some(p) = Pattern::of(&bench.job) else { return words };
    words.push(if p.bore_m > 0.0 {
        format!("centre hole {}", unit.say(p.bore_m))
    } else {
        "centre hole to suit your own hub".into()
    });
    if let Some(plates_m) = p.flange_m {
        words.push(format!("dashed: the plates, {} across", unit.say(plates_m)));
    }
    words.push(
        "Lay this sheet on your own flange before you drill; turn the pattern as your engine needs.".into(),
    );
    words
}
