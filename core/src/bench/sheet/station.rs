//! Bench heights of the edges, and the protractor table.

use crate::bench::draw::{Drawing, wrapped};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::{Bench, Carved};

use super::table::{Column, ROW_MM, figures, lines, table};

pub(super) fn leaves(bench: &Bench, unit: Unit, room: [f64; 2]) -> Vec<Leaf> {
    let per_leaf = ((0.5 * (room[1] - 90.0) / ROW_MM) as usize).max(4);
    let chunks: Vec<&[Carved]> = bench.stations.chunks(per_leaf).collect();
    let of = chunks.len();
    let name = |i: usize| {
        if of == 1 {
            "Bench heights and angles".into()
        } else {
            format!("Bench heights and angles {} of {of}", i + 1)
        }
    };
    let leaf =
        |(i, chunk): (usize, &&[Carved])| Leaf { name: name(i), drawing: tables(bench, chunk, unit, room) };
    chunks.iter().enumerate().map(leaf).collect()
}

fn tables(bench: &Bench, stations: &[Carved], unit: Unit, room: [f64; 2]) -> Drawing {
    let mut drawing = Drawing::default();
    let said = |drawing: &mut Drawing, y: f64, words: &str| {
        lines(drawing, [0.0, y], 3.0, &wrapped(words, 3.0, room[0]))
    };
    let mut y = 0.0;
    y -= said(
        &mut drawing,
        y,
        &format!(
            "Bench heights, {}: the rear of the blank (it looks aft) lies on a flat bench. {HEADING}",
            unit.plural()
        ),
    ) + 2.0;
    let rows: Vec<_> = stations.iter().map(|s| heights(bench, s, unit)).collect();
    y -= table(&mut drawing, [0.0, y], &HEIGHTS, &rows) + 1.0;
    let past = |s: &Carved| {
        s.heights.face_m.is_none_or(|h| h.iter().any(|z| *z < 0.0 || *z > bench.blank.thickness_m))
    };
    if stations.iter().any(past) {
        y -= said(&mut drawing, y, PAST);
    }
    y -= 6.0;
    y -= said(&mut drawing, y, &format!("{PROTRACTOR} Lengths in {}.", unit.plural())) + 2.0;
    table(&mut drawing, [0.0, y], &ANGLES, &stations.iter().map(|s| angles(s, unit)).collect::<Vec<_>>());
    drawing
}

/// What the heights are of.
const HEADING: &str = "LE is the side of the leading edge, TE that of the trailing edge. Sawn sides: from \
    the middle line to the outline on the plan. Face line: the straight line from side to side to which the \
    face is planed; no part of the blade lies below it, and a flat face lies on it. Down: the same line \
    measured from a straight-edge over the front of the blank. The edges themselves lie higher, where both \
    cards meet.";
/// What is said where a mark cannot be made.
const PAST: &str = "Where a height is below 0, above the thickness of the blank or missing, the face line \
    comes out at the rear or the front of the blank before it reaches that side: there draw it by the angle \
    below.";
const PROTRACTOR: &str = "Protractor: angle from the rear of the blank. Lay it on the face, square to the \
    blade, where the face is flat; else along the chord line of the cards.";

const HEIGHTS: [Column; 11] = [
    figures("station", 13.0),
    figures("radius", 16.0),
    figures("sawn\nside LE", 17.0),
    figures("sawn\nside TE", 17.0),
    figures("face line\nLE", 17.0),
    figures("face line\nTE", 17.0),
    figures("down\nLE", 17.0),
    figures("down\nTE", 17.0),
    figures("edge\nLE", 17.0),
    figures("edge\nTE", 17.0),
    figures("highest\npoint", 17.0),
];

fn heights(bench: &Bench, station: &Carved, unit: Unit) -> Vec<String> {
    let h = &station.heights;
    let down = |z: f64| bench.blank.thickness_m - z;
    let face = h.face_m.map(|face| face.map(Some)).unwrap_or_default();
    let mut read = vec![Some(h.radius_m)];
    read.extend(h.outline_m.map(Some));
    read.extend(face);
    read.extend(face.map(|z| z.map(down)));
    read.extend(h.edges_m.map(Some));
    read.push(Some(h.wood_m[1]));
    let figure = |v: Option<f64>| v.map_or_else(|| "–".into(), |v| unit.figure(v));
    std::iter::once(station.number.to_string()).chain(read.into_iter().map(figure)).collect()
}

const ANGLES: [Column; 6] = [
    figures("station", 14.0),
    figures("radius", 20.0),
    figures("on the face,\nwhere flat", 26.0),
    figures("to the\nchord line", 24.0),
    figures("chord", 22.0),
    figures("greatest\nthickness", 24.0),
];

fn angles(station: &Carved, unit: Unit) -> Vec<String> {
    let degrees = |rad: f64| format!("{:.1}°", rad.to_degrees());
    vec![
        station.number.to_string(),
        unit.figure(station.heights.radius_m),
        station.face_rad.map_or_else(|| "none".into(), degrees),
        degrees(station.angle_rad),
        unit.figure(station.chord_m),
        unit.figure(station.thickness_m),
    ]
}
