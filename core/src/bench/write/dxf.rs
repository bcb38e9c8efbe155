//! A drawing as DXF R12 in millimetres, with a layer for each kind of line: the plainest form of that open
//! format, which every machine's program reads.

use std::fmt::Write;

use crate::bench::draw::{Anchor, CAPITALS, Drawing, Item, Layer};

/// Layer of texts.
const TEXT_LAYER: &str = "TEXT";

/// The drawing as DXF.
#[must_use]
pub fn dxf(drawing: &Drawing) -> String {
    let mut out = String::new();
    header(&mut out, drawing);
    tables(&mut out);
    section(&mut out, "ENTITIES");
    drawing.items.iter().for_each(|item| entity(&mut out, item));
    group(&mut out, 0, "ENDSEC");
    group(&mut out, 0, "EOF");
    out
}

fn group(out: &mut String, code: u32, value: impl std::fmt::Display) {
    let _ = write!(out, "{code}\n{value}\n");
}

fn section(out: &mut String, name: &str) {
    group(out, 0, "SECTION");
    group(out, 2, name);
}

fn point(out: &mut String, code: u32, [x, y]: [f64; 2]) {
    group(out, code, format!("{x:.5}"));
    group(out, code + 10, format!("{y:.5}"));
    group(out, code + 20, "0.0");
}

fn header(out: &mut String, drawing: &Drawing) {
    section(out, "HEADER");
    let mut flag = |name: &str, code: u32, value: i32| {
        group(out, 9, name);
        group(out, code, value);
    };
    // Units of a drawing placed into another: 4 is millimetres. Metric line types and hatches: 1.
    flag("$INSUNITS", 70, 4);
    flag("$MEASUREMENT", 70, 1);
    group(out, 9, "$ACADVER");
    group(out, 1, "AC1009");
    let [low, high] = drawing.bounds().unwrap_or_default();
    group(out, 9, "$EXTMIN");
    point(out, 10, low);
    group(out, 9, "$EXTMAX");
    point(out, 10, high);
    group(out, 0, "ENDSEC");
}

fn tables(out: &mut String) {
    section(out, "TABLES");
    group(out, 0, "TABLE");
    group(out, 2, "LTYPE");
    group(out, 70, 1);
    group(out, 0, "LTYPE");
    group(out, 2, "CONTINUOUS");
    group(out, 70, 0);
    group(out, 3, "Solid line");
    group(out, 72, 65);
    group(out, 73, 0);
    group(out, 40, "0.0");
    group(out, 0, "ENDTAB");
    let names: Vec<&str> = ["0", TEXT_LAYER].into_iter().chain(Layer::ALL.map(Layer::name)).collect();
    group(out, 0, "TABLE");
    group(out, 2, "LAYER");
    group(out, 70, names.len());
    for (i, name) in names.iter().enumerate() {
        group(out, 0, "LAYER");
        group(out, 2, name);
        group(out, 70, 0);
        // Colours 1 to 7 in turn, so that layers can be told apart.
        group(out, 62, 1 + i % 7);
        group(out, 6, "CONTINUOUS");
    }
    group(out, 0, "ENDTAB");
    group(out, 0, "ENDSEC");
}

fn entity(out: &mut String, item: &Item) {
    match item {
        Item::Line { layer, points, closed: false } if points.len() == 2 => {
            group(out, 0, "LINE");
            group(out, 8, layer.name());
            point(out, 10, points[0]);
            point(out, 11, points[1]);
        }
        Item::Line { layer, points, closed } => {
            group(out, 0, "POLYLINE");
            group(out, 8, layer.name());
            group(out, 66, 1);
            point(out, 10, [0.0, 0.0]);
            group(out, 70, i32::from(*closed));
            for p in points {
                group(out, 0, "VERTEX");
                group(out, 8, layer.name());
                point(out, 10, *p);
            }
            group(out, 0, "SEQEND");
            group(out, 8, layer.name());
        }
        Item::Circle { layer, centre, radius_mm } => {
            group(out, 0, "CIRCLE");
            group(out, 8, layer.name());
            point(out, 10, *centre);
            group(out, 40, format!("{radius_mm:.5}"));
        }
        Item::Text(text) => {
            group(out, 0, "TEXT");
            group(out, 8, TEXT_LAYER);
            point(out, 10, text.at);
            // The format gives the height of capitals.
            group(out, 40, format!("{:.4}", CAPITALS * text.size_mm));
            group(out, 1, plain(&text.words));
            let across = match text.anchor {
                Anchor::Start => 0,
                Anchor::Middle => 1,
                Anchor::End => 2,
            };
            if across > 0 {
                group(out, 72, across);
                point(out, 11, text.at);
            }
        }
    }
}

/// The format is of the days before Unicode: degrees have their own sign, others are written by number.
fn plain(words: &str) -> String {
    let mut out = String::new();
    for c in words.chars() {
        match c {
            '°' => out.push_str("%%d"),
            '%' => out.push_str("%%%"),
            ' '..='~' => out.push(c),
            c if c.is_control() => out.push(' '),
            c => {
                let _ = write!(out, "\\U+{:04X}", c as u32);
            }
        }
    }
    out
}
