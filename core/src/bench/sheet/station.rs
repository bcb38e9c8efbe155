//! Bench heights of the edges, and the protractor table.

use crate::bench::draw::Drawing;
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::{Bench, Carved};

use super::table::{Column, ROW_MM, figures, lines, table};

pub(super) fn leaves(bench: &Bench, unit: Unit, room: [f64; 2]) -> Vec<Leaf> {
    let per_leaf = ((0.5 * (room[1] - 70.0) / ROW_MM) as usize).max(4);
    let chunks: Vec<&[Carved]> = bench.stations.chunks(per_leaf).collect();
    let of = chunks.len();
    let name = |i: usize| {
        if of == 1 {
            "Bench heights and angles".into()
        } else {
            format!("Bench heights and angles {} of {of}", i + 1)
        }
    };
    let leaf = |(i, chunk): (usize, &&[Carved])| Leaf { name: name(i), drawing: tables(bench, chunk, unit) };
    chunks.iter().enumerate().map(leaf).collect()
}

fn tables(bench: &Bench, stations: &[Carved], unit: Unit) -> Drawing {
    let mut drawing = Drawing::default();
    let heading = [
        format!(
            "Bench heights, {}: the blank lies on its back (the face that looks aft is down) on a flat bench.",
            unit.sign()
        ),
        "Down from front: the same edge measured from a straight-edge over the front of the blank.".into(),
    ];
    let mut y = -lines(&mut drawing, [0.0, 0.0], 3.0, &heading) - 2.0;
    y -= table(
        &mut drawing,
        [0.0, y],
        &HEIGHTS,
        &stations.iter().map(|s| heights(bench, s, unit)).collect::<Vec<_>>(),
    );
    y -= 8.0;
    let heading = [
        "Protractor: angle from the back of the blank. Lay it on the flat face, square to the blade, where the section has one;".into(),
        format!("else along the chord line of the template. Lengths in {}.", unit.sign()),
    ];
    y -= lines(&mut drawing, [0.0, y], 3.0, &heading) + 2.0;
    table(&mut drawing, [0.0, y], &ANGLES, &stations.iter().map(|s| angles(s, unit)).collect::<Vec<_>>());
    drawing
}

const HEIGHTS: [Column; 10] = [
    figures("station", 14.0),
    figures("radius", 18.0),
    figures("leading\nedge", 18.0),
    figures("trailing\nedge", 18.0),
    figures("lowest\nwood", 18.0),
    figures("highest\nwood", 18.0),
    figures("lead. edge\ndown from\nfront", 20.0),
    figures("trail. edge\ndown from\nfront", 20.0),
    figures("lead. edge\nfrom the\nmiddle line", 22.0),
    figures("trail. edge\nfrom the\nmiddle line", 22.0),
];

fn heights(bench: &Bench, station: &Carved, unit: Unit) -> Vec<String> {
    let h = &station.heights;
    let down = |z: f64| bench.blank.thickness_m - z;
    let read = [
        h.radius_m,
        h.leading_m,
        h.trailing_m,
        h.wood_m[0],
        h.wood_m[1],
        down(h.leading_m),
        down(h.trailing_m),
        h.plan_m[0],
        h.plan_m[1],
    ];
    std::iter::once(station.number.to_string()).chain(read.map(|v| unit.figure(v))).collect()
}

const ANGLES: [Column; 6] = [
    figures("station", 14.0),
    figures("radius", 20.0),
    figures("on the\nflat face", 24.0),
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
