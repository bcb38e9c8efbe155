//! Sheets as one PDF, at exact scale, with the fonts every viewer has.

use pdf_writer::types::LineJoinStyle;
use pdf_writer::{Content, Finish, Name, Pdf, Rect, Ref, Str, TextStr};

use crate::bench::draw::{Anchor, Drawing, Item, Layer, Text};
use crate::bench::page::Sheet;

use super::svg::EDGE_MM;

/// Points of a millimetre.
const POINT: f64 = 72.0 / 25.4;
/// A circle as four cubics: length of the tangents over the radius.
const KAPPA: f64 = 0.552_284_75;

const CATALOG: i32 = 1;
const PAGES: i32 = 2;
const FONT: i32 = 3;
const BOLD: i32 = 4;
const INFO: i32 = 5;
const FIRST: i32 = 6;

/// All sheets as one PDF.
#[must_use]
pub fn pdf(title: &str, sheets: &[Sheet]) -> Vec<u8> {
    let mut pdf = Pdf::new();
    // No job has so many sheets that their count would not fit.
    let count = |i: usize| i32::try_from(i).unwrap_or(i32::MAX / 4);
    let page = |i: usize| Ref::new(FIRST + 2 * count(i));
    let content = |i: usize| Ref::new(FIRST + 1 + 2 * count(i));
    pdf.catalog(Ref::new(CATALOG)).pages(Ref::new(PAGES));
    pdf.document_info(Ref::new(INFO)).title(TextStr(title)).creator(TextStr("Spokeshave"));
    pdf.pages(Ref::new(PAGES)).kids((0..sheets.len()).map(page)).count(count(sheets.len()));
    for (id, name) in [(FONT, "Helvetica"), (BOLD, "Helvetica-Bold")] {
        let mut font = pdf.type1_font(Ref::new(id));
        font.base_font(Name(name.as_bytes())).encoding_predefined(Name(b"WinAnsiEncoding"));
    }
    for (i, sheet) in sheets.iter().enumerate() {
        let [w, h] = sheet.size_mm.map(points);
        let mut one = pdf.page(page(i));
        one.parent(Ref::new(PAGES)).media_box(Rect::new(0.0, 0.0, w, h)).contents(content(i));
        let mut resources = one.resources();
        let mut fonts = resources.fonts();
        fonts.pair(Name(b"F"), Ref::new(FONT)).pair(Name(b"B"), Ref::new(BOLD));
        fonts.finish();
        resources.finish();
        one.finish();
        pdf.stream(content(i), &drawn(sheet));
    }
    pdf.finish()
}

fn points(mm: f64) -> f32 {
    (mm * POINT) as f32
}

fn drawn(sheet: &Sheet) -> pdf_writer::Buf {
    let mut content = Content::new();
    drawing(&mut content, &sheet.frame);
    for view in &sheet.views {
        let [[x0, y0], [x1, y1]] = view.window_mm;
        content.save_state();
        content.rect(
            points(x0 - EDGE_MM),
            points(y0 - EDGE_MM),
            points(x1 - x0 + 2.0 * EDGE_MM),
            points(y1 - y0 + 2.0 * EDGE_MM),
        );
        content.clip_nonzero().end_path();
        drawing(&mut content, &view.drawing);
        content.restore_state();
    }
    content.finish()
}

fn drawing(content: &mut Content, drawing: &Drawing) {
    content.set_line_join(LineJoinStyle::RoundJoin);
    for layer in Layer::ALL {
        let mut any = false;
        for item in &drawing.items {
            any |= trace(content, item, layer, !any);
        }
        if any {
            content.stroke();
        }
    }
    content.set_fill_gray(0.0);
    for item in &drawing.items {
        if let Item::Text(text) = item {
            words(content, text);
        }
    }
}

/// Adds an item of a layer to the path; the first one sets how it is drawn.
fn trace(content: &mut Content, item: &Item, layer: Layer, first: bool) -> bool {
    let of = match item {
        Item::Line { layer, .. } | Item::Circle { layer, .. } => *layer,
        Item::Text(_) => return false,
    };
    if of != layer {
        return false;
    }
    if first {
        let stroke = layer.stroke();
        content.set_line_width(points(stroke.width_mm)).set_stroke_gray(stroke.grey as f32);
        content.set_dash_pattern(stroke.dashes_mm.iter().map(|d| points(*d)), 0.0);
    }
    match item {
        Item::Line { points: line, closed, .. } => {
            for (k, p) in line.iter().enumerate() {
                let [x, y] = p.map(points);
                if k == 0 {
                    content.move_to(x, y)
                } else {
                    content.line_to(x, y)
                };
            }
            if *closed {
                content.close_path();
            }
        }
        Item::Circle { centre, radius_mm, .. } => circle(content, *centre, *radius_mm),
        Item::Text(_) => {}
    }
    true
}

fn circle(content: &mut Content, [x, y]: [f64; 2], r: f64) {
    let k = KAPPA * r;
    content.move_to(points(x + r), points(y));
    // Quarter by quarter: the tangent at the start, the one at the end, the end.
    for (c, s) in [(1.0, 0.0), (0.0, 1.0), (-1.0, 0.0), (0.0, -1.0)] {
        let (a, b) = ([x + r * c - k * s, y + r * s + k * c], [x - r * s + k * c, y + r * c + k * s]);
        let end = [x - r * s, y + r * c];
        content.cubic_to(
            points(a[0]),
            points(a[1]),
            points(b[0]),
            points(b[1]),
            points(end[0]),
            points(end[1]),
        );
    }
    content.close_path();
}

fn words(content: &mut Content, text: &Text) {
    let x = text.at[0] + if text.anchor == Anchor::Start { 0.0 } else { text.left_mm() };
    content.begin_text();
    content.set_font(Name(if text.bold { b"B" } else { b"F" }), points(text.size_mm));
    content.next_line(points(x), points(text.at[1]));
    content.show(Str(&win_ansi(&text.words)));
    content.end_text();
}

/// Letters as the fonts' own encoding has them; a question mark for those it lacks.
fn win_ansi(words: &str) -> Vec<u8> {
    let of = |c: char| match c {
        ' '..='~' | '\u{a0}'..='\u{ff}' => c as u32 as u8,
        '…' => 0x85,
        '‘' => 0x91,
        '’' => 0x92,
        '“' => 0x93,
        '”' => 0x94,
        '–' => 0x96,
        '—' => 0x97,
        '−' => b'-',
        '€' => 0x80,
        _ => b'?',
    };
    words.chars().map(of).collect()
}
