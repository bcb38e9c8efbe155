//! The laminations: the stack seen from the tip with the sections in it, and what to saw and buy.

use crate::bench::blank::Layers;
use crate::bench::draw::{Anchor, Drawing, Item, Layer};
use crate::bench::page::Leaf;
use crate::bench::stock::Stock;
use crate::bench::unit::Unit;
use crate::bench::work::Bench;

use super::table::{figures, lines, table};

pub(super) fn leaf(bench: &Bench, unit: Unit, room: [f64; 2]) -> Leaf {
    let mut drawing = Drawing::default();
    let layers = &bench.blank.layers;
    let mut y = -lines(&mut drawing, [0.0, 0.0], 3.0, &words(bench, unit)) - 4.0;
    let header = [
        figures("lamination\nfrom the rear", 30.0),
        figures("from", 20.0),
        figures("to", 20.0),
        figures("width", 24.0),
        figures("turned about\nthe axis", 28.0),
    ];
    let rows: Vec<Vec<String>> = layers
        .planks
        .iter()
        .enumerate()
        .map(|(i, plank)| {
            vec![
                format!("{}", i + 1),
                unit.figure(plank.faces_m[0]),
                unit.figure(plank.faces_m[1]),
                unit.figure(plank.width_m),
                turned(plank.turn_rad),
            ]
        })
        .collect();
    y -= table(&mut drawing, [0.0, y], &header, &rows) + 8.0;
    stack(&mut drawing, bench, room, y);
    Leaf { name: "Laminations".into(), drawing }
}

fn turned(rad: f64) -> String {
    if rad == 0.0 { "straight".into() } else { format!("{:.2}°", rad.to_degrees()) }
}

fn words(bench: &Bench, unit: Unit) -> Vec<String> {
    let (layers, fanned) = (&bench.blank.layers, &bench.blank.fanned);
    let thick = bench.blank.thickness_m / layers.planks.len() as f64;
    let stock = Stock::of(&bench.job);
    let boards = |layers: &Layers| {
        format!(
            "{} {} {} long, up to {} wide, {} thick when planed; {} to buy with {} each for planing",
            layers.boards,
            stock.board(),
            unit.say(layers.board_length_m),
            unit.say(layers.width_m()),
            unit.say(thick),
            unit.volume(layers.volume_m3),
            unit.say(0.003)
        )
    };
    let mut words = vec![boards(layers)];
    if layers.step_rad == 0.0 && layers.planks.len() > 1 && fanned.width_m() < layers.width_m() {
        words.push(format!(
            "Fanned by {:.2}° a lamination, along the pitch (bench.fan_step_deg):",
            fanned.step_rad.to_degrees()
        ));
        words.push(boards(fanned));
    }
    if layers.step_rad != 0.0 {
        words.push(
            "Each lamination is turned about the axis, a front one in the direction of turning; widths are \
             square to it."
                .into(),
        );
    }
    words.push(format!("Heights of the faces above the rear of the blank, in {}.", unit.plural()));
    words
}

/// The stack by itself, full size.
#[must_use]
pub fn stack_drawing(bench: &Bench) -> Drawing {
    let mut drawing = Drawing::default();
    stack(&mut drawing, bench, [1e3 * bench.blank.width_m, 0.0], 0.0);
    drawing.items.retain(|item| !matches!(item, Item::Text(_)));
    drawing
}

/// The stack from the tip at the hub, full size or a whole share of it, with every section where it lies.
fn stack(drawing: &mut Drawing, bench: &Bench, room: [f64; 2], top: f64) {
    let blank = &bench.blank;
    let share = (1e3 * blank.width_m / room[0]).ceil().max(1.0);
    let place =
        |[x, y]: [f64; 2]| [x / share + 0.5 * room[0], top - 8.0 + (y - 1e3 * blank.thickness_m) / share];
    for plank in &blank.layers.planks {
        let [low, high] = plank.faces_m.map(|z| 1e3 * z);
        let half = 500.0 * plank.width_m;
        drawing.shape(Layer::Thin, [[-half, low], [half, low], [half, high], [-half, high]].map(place));
    }
    for station in &bench.stations {
        let points: Vec<[f64; 2]> = station.ring.points.iter().map(|p| place(bench.on_paper(*p))).collect();
        drawing.shape(Layer::Guide, points);
    }
    let size = if share == 1.0 { "full size".to_string() } else { format!("1 to {share}") };
    drawing.text(
        [0.5 * room[0], top - 4.0],
        2.8,
        Anchor::Middle,
        format!(
            "The stack seen from the tip, front up, {size}; all stations where they lie (straight stack)"
        ),
    );
}
