//! Station templates: for each station a card for the back (the cambered, forward side) and one for the face
//! (the flat, rear side).
//!
//! Seen from the tip towards the hub, standing as in the propeller while the rear of the blank lies on the
//! bench. The cards meet along the chord line, drawn out past both edges: laid back to back they leave the
//! section's outline between them, and the line on which they meet is the angle line. Their outer edges are
//! the datum: square to the axis and at the same distance from the blank at every station, so that a
//! straight-edge over several cards shows a twist that is out.

use crate::bench::draw::{Anchor, Drawing, Item, Layer, Text, breadth_mm, wrapped};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::{Bench, Carved};

use super::guides;
use super::table::lines;

/// Which side of the section a card lies on.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Side {
    /// The back: the cambered, forward side.
    Upper,
    /// The face: the flat, rear side.
    Lower,
}

/// One card.
#[derive(Clone, Debug, PartialEq)]
pub struct Card {
    /// Its outline, mm, closed: see the module for the frame.
    pub outline: Vec<[f64; 2]>,
    /// The part of it that lies on the wood, from trailing to leading edge or back, mm.
    pub on_wood: Vec<[f64; 2]>,
    /// Its datum edge, mm.
    pub datum: [[f64; 2]; 2],
}

/// How far the joint of the cards runs on past an edge, mm.
fn past_mm(bench: &Bench) -> f64 {
    (12.0 * bench.form.blade.radius_m).clamp(3.0, 8.0)
}

/// How far datum edges stand off the blank, mm.
pub(super) fn datum_mm(bench: &Bench) -> f64 {
    (past_mm(bench) + 6.0).round()
}

/// One card of a station.
#[must_use]
pub fn card(bench: &Bench, station: &Carved, side: Side) -> Card {
    let paper = |p: &[f64; 2]| bench.on_paper(*p);
    let (lead, trail) =
        (bench.on_paper(station.ring.leading_edge()), bench.on_paper(station.ring.trailing_edge()));
    let far = (lead[0] - trail[0]).hypot(lead[1] - trail[1]).max(1e-9);
    let along = [(lead[0] - trail[0]) / far, (lead[1] - trail[1]) / far];
    let past = past_mm(bench);
    let lead_past = [lead[0] + past * along[0], lead[1] + past * along[1]];
    let trail_past = [trail[0] - past * along[0], trail[1] - past * along[1]];
    let all: Vec<[f64; 2]> = station.ring.points.iter().map(paper).collect();
    let xs = || all.iter().chain([&lead_past, &trail_past]).map(|p| p[0]).chain([0.0]);
    let edge = 0.4 * past + 2.0;
    let (left, right) =
        (xs().fold(f64::INFINITY, f64::min) - edge, xs().fold(f64::NEG_INFINITY, f64::max) + edge);
    let (lead_x, trail_x) = if bench.hand() > 0.0 { (right, left) } else { (left, right) };
    let (on_wood, height) = match side {
        Side::Upper => (
            station.ring.upper().iter().map(paper).collect::<Vec<_>>(),
            1e3 * bench.blank.thickness_m + datum_mm(bench),
        ),
        Side::Lower => {
            let mut face: Vec<[f64; 2]> = station.ring.lower().iter().map(paper).collect();
            face.reverse();
            (face, -datum_mm(bench))
        }
    };
    let mut outline = vec![[trail_x, height], [trail_x, trail_past[1]], trail_past];
    outline.extend(&on_wood);
    outline.extend([lead_past, [lead_x, lead_past[1]], [lead_x, height]]);
    Card { outline, on_wood, datum: [[trail_x, height], [lead_x, height]] }
}

/// A card as drawn: its lines and its words.
fn drawn(bench: &Bench, station: &Carved, side: Side, unit: Unit) -> Drawing {
    let card = card(bench, station, side);
    let mut drawing = Drawing::default();
    drawing.shape(Layer::Cut, card.outline.clone());
    drawing.line(Layer::Datum, card.datum);
    let y = card.datum[0][1];
    let inward = if side == Side::Upper { -1.0 } else { 1.0 };
    let words = words(station, side, unit);
    // Behind the blade on the upper card, ahead of it on the lower one: there the card is tall.
    let [trail_x, lead_x] = card.datum.map(|p| p[0]);
    let at = if side == Side::Upper { trail_x } else { lead_x };
    let to_middle = if at < trail_x.max(lead_x) { 1.5 } else { -1.5 };
    let anchor = if to_middle > 0.0 { Anchor::Start } else { Anchor::End };
    let widest = words.iter().map(|w| breadth_mm(w, 1.08)).fold(0.1, f64::max);
    let largest = (0.62 * (trail_x - lead_x).abs() / widest).clamp(SMALLEST_MM, LARGEST_MM);
    let block = |size: f64, lines: usize| {
        written(&words[..lines], [at + to_middle, y + inward * (MARK_MM + 0.5)], inward, anchor, size)
    };
    let sizes = (0..20).map(|k| largest - 0.1 * f64::from(k)).take_while(|size| *size >= SMALLEST_MM);
    // Fewer words rather than smaller ones: angles stand in the table as well.
    let all = (1..=words.len()).rev().flat_map(|lines| sizes.clone().map(move |size| (size, lines)));
    let clear = all.into_iter().find(|(size, lines)| clear_of_wood(&block(*size, *lines), &card, side));
    let (size, lines) = clear.unwrap_or((SMALLEST_MM, 1));
    drawing.items.extend(block(size, lines).into_iter().map(Item::Text));
    guides::draw(&mut drawing, bench, station, side, &card);
    drawing
}

/// Sizes of the letters on a card, mm.
const LARGEST_MM: f64 = 3.0;
pub(super) const SMALLEST_MM: f64 = 2.2;

/// Lines of words from a datum edge inward, the first one on top and bold.
fn written(words: &[String], [x, y]: [f64; 2], inward: f64, anchor: Anchor, size_mm: f64) -> Vec<Text> {
    let last = words.len() as f64 - 1.0;
    let line = |(k, words): (usize, &String)| {
        let down = if inward < 0.0 { k as f64 + 1.0 } else { last - k as f64 };
        let at = [x, y + inward * 1.25 * size_mm * down];
        Text { at, size_mm, anchor, bold: k == 0, words: words.clone() }
    };
    words.iter().enumerate().map(line).collect()
}

/// Whether no word comes near the part of a card that lies on the wood.
fn clear_of_wood(words: &[Text], card: &Card, side: Side) -> bool {
    let clear = |text: &Text, p: &[f64; 2]| {
        let (left, [_, foot]) = (text.at[0] + text.left_mm(), text.at);
        let beside = p[0] < left - 1.0 || p[0] > left + text.breadth_mm() + 1.0;
        beside || if side == Side::Upper { p[1] < foot - 0.8 } else { p[1] > foot + text.size_mm + 0.3 }
    };
    words.iter().all(|text| card.on_wood.iter().all(|p| clear(text, p)))
}

/// Between a datum edge and the words, mm.
const MARK_MM: f64 = 2.5;

/// What stands on a card.
fn words(station: &Carved, side: Side, unit: Unit) -> Vec<String> {
    let degrees = |rad: f64| format!("{:.1}°", rad.to_degrees());
    let side = if side == Side::Upper { "back" } else { "face" };
    let mut words = vec![
        format!("{} {side}", station.number),
        format!("r {}", unit.say(station.heights.radius_m)),
        format!("chord line {}", degrees(station.angle_rad)),
    ];
    words.extend(station.face_rad.map(|face| format!("face {}", degrees(face))));
    words
}

/// What the sheet of templates says on top.
fn note(bench: &Bench, unit: Unit, room: [f64; 2]) -> Vec<String> {
    let words = format!(
        "Seen from the tip towards the hub. Back cards lie on the back of the blade (cambered, forward), \
         face cards on its face (flat, rear); a pair meets along the chord line, here drawn apart. Thick \
         edges are the datum: square to the axis, {} ahead of the front and behind the rear of the blank. \
         Dash-dotted: the middle line of the blank (pitch axis). Dashed: a line at the blade angle, \
         parallel to the chord line, on the face card of a flat face to that face. Cut on the line, glue to \
         card or ply.",
        unit.say(1e-3 * datum_mm(bench))
    );
    wrapped(&words, NOTE_MM, room[0])
}

/// Size of its letters, mm.
const NOTE_MM: f64 = 2.9;

/// Room between pairs, and between the cards of a pair beside the wood itself, mm.
const GAP_MM: f64 = 3.0;
const LIFT_MM: f64 = 4.0;

/// Templates laid out on leaves that fit `room`; a card larger than that has a leaf of its own.
pub(super) fn leaves(bench: &Bench, unit: Unit, room: [f64; 2]) -> Vec<Leaf> {
    let note = note(bench, unit, room);
    let head = 1.5 * NOTE_MM * note.len() as f64 + 3.0;
    let mut shelves: Vec<Shelf> = Vec::new();
    for station in &bench.stations {
        for side in [Side::Upper, Side::Lower] {
            place(&mut shelves, &drawn(bench, station, side, unit), room[0]);
        }
    }
    let mut pages: Vec<(f64, Vec<Shelf>)> = Vec::new();
    for shelf in shelves {
        match pages.iter_mut().find(|(used, _)| *used + shelf.height + GAP_MM <= room[1]) {
            Some((used, on)) => {
                *used += shelf.height + GAP_MM;
                on.push(shelf);
            }
            None => pages.push((head + shelf.height, vec![shelf])),
        }
    }
    let of = pages.len();
    let leaf = |(i, (_, shelves)): (usize, (f64, Vec<Shelf>))| {
        let mut drawing = Drawing::default();
        lines(&mut drawing, [0.0, 0.0], NOTE_MM, &note);
        let mut y = -head;
        for shelf in shelves {
            drawing.add(&shelf.drawing, [0.0, y]);
            y -= shelf.height + GAP_MM;
        }
        Leaf { name: format!("Templates {} of {of}", i + 1), drawing }
    };
    pages.into_iter().enumerate().map(leaf).collect()
}

/// Cards side by side, hanging from height 0.
struct Shelf {
    drawing: Drawing,
    width: f64,
    height: f64,
}

fn place(shelves: &mut Vec<Shelf>, card: &Drawing, room: f64) {
    let Some([low, high]) = card.bounds() else { return };
    let (wide, tall) = (high[0] - low[0], high[1] - low[1]);
    if shelves.last().is_none_or(|shelf| shelf.width + GAP_MM + wide > room) {
        shelves.push(Shelf { drawing: Drawing::default(), width: -GAP_MM, height: 0.0 });
    }
    if let Some(shelf) = shelves.last_mut() {
        shelf.drawing.add(card, [shelf.width + GAP_MM - low[0], -high[1]]);
        shelf.width += GAP_MM + wide;
        shelf.height = shelf.height.max(tall);
    }
}

/// Both cards of a station, the upper one lifted off the lower one.
fn pair(bench: &Bench, station: &Carved, unit: Unit) -> Drawing {
    let mut both = drawn(bench, station, Side::Lower, unit);
    both.add(&drawn(bench, station, Side::Upper, unit), [0.0, LIFT_MM]);
    both
}

/// All cards in one row, for a machine.
pub(super) fn all(bench: &Bench, unit: Unit) -> Drawing {
    let mut shelves = Vec::new();
    for station in &bench.stations {
        place(&mut shelves, &pair(bench, station, unit), f64::INFINITY);
    }
    shelves.pop().map(|shelf| shelf.drawing).unwrap_or_default()
}
