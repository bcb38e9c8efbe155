//! A sheet as SVG 1.1, in millimetres.

use std::fmt::Write;

use crate::bench::draw::{Anchor, Drawing, Item, Layer, Text};
use crate::bench::page::Sheet;

/// The sheet as one SVG document, as large as its paper.
#[must_use]
pub fn svg(sheet: &Sheet) -> String {
    let h = sheet.size_mm[1];
    let mut out = opening(sheet.size_mm, &sheet.name);
    drawing(&mut out, &sheet.frame, [0.0, h]);
    for view in &sheet.views {
        // A nested drawing shows nothing beyond its own edges.
        let [[x0, y0], [x1, y1]] = view.window_mm;
        let (wide, tall) = (x1 - x0, y1 - y0);
        let _ = write!(
            out,
            "<svg x=\"{}\" y=\"{}\" width=\"{}\" height=\"{}\" viewBox=\"0 0 {} {}\">",
            mm(x0 - EDGE_MM),
            mm(h - y1 - EDGE_MM),
            mm(wide + 2.0 * EDGE_MM),
            mm(tall + 2.0 * EDGE_MM),
            mm(wide + 2.0 * EDGE_MM),
            mm(tall + 2.0 * EDGE_MM)
        );
        drawing(&mut out, &view.drawing, [x0 - EDGE_MM, y1 + EDGE_MM]);
        out.push_str("</svg>");
    }
    out.push_str("</svg>");
    out
}

/// A drawing as one SVG document as large as itself, in millimetres; nothing for an empty one.
#[must_use]
pub fn picture(name: &str, shown: &Drawing) -> String {
    let Some([low, high]) = shown.bounds() else { return String::new() };
    let (wide, tall) = (high[0] - low[0] + 2.0 * EDGE_MM, high[1] - low[1] + 2.0 * EDGE_MM);
    let mut out = opening([wide, tall], name);
    drawing(&mut out, shown, [low[0] - EDGE_MM, high[1] + EDGE_MM]);
    out.push_str("</svg>");
    out
}

fn opening([w, h]: [f64; 2], name: &str) -> String {
    let [w, h] = [mm(w), mm(h)];
    format!(
        "<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"{w}mm\" height=\"{h}mm\" viewBox=\"0 0 {w} {h}\" \
         role=\"img\" font-family=\"Helvetica, Arial, sans-serif\"><title>{}</title>",
        escaped(name)
    )
}

/// Room for half of a line's width outside a window, mm.
pub(super) const EDGE_MM: f64 = 0.5;

/// Items grouped by layer, so that each line says only where it runs.
fn drawing(out: &mut String, drawing: &Drawing, origin: [f64; 2]) {
    let place = |p: [f64; 2]| format!("{} {}", mm(p[0] - origin[0]), mm(origin[1] - p[1]));
    for layer in Layer::ALL {
        let mut path = String::new();
        for item in &drawing.items {
            match item {
                Item::Line { layer: of, points, closed } if *of == layer => {
                    for (k, p) in points.iter().enumerate() {
                        path.push(if k == 0 { 'M' } else { 'L' });
                        path.push_str(&place(*p));
                    }
                    if *closed {
                        path.push('Z');
                    }
                }
                Item::Circle { layer: of, centre, radius_mm: r } if *of == layer => {
                    let (left, r) = (place([centre[0] - r, centre[1]]), mm(*r));
                    let right = place([centre[0] + radius(item), centre[1]]);
                    let _ = write!(path, "M{left}A{r} {r} 0 1 0 {right}A{r} {r} 0 1 0 {left}Z");
                }
                _ => {}
            }
        }
        if !path.is_empty() {
            let stroke = layer.stroke();
            let grey = (255.0 * stroke.grey).round();
            let dashes: Vec<String> = stroke.dashes_mm.iter().map(|d| mm(*d)).collect();
            let dashes = if dashes.is_empty() {
                String::new()
            } else {
                format!(" stroke-dasharray=\"{}\"", dashes.join(" "))
            };
            let _ = write!(
                out,
                "<path class=\"{}\" fill=\"none\" stroke=\"rgb({grey},{grey},{grey})\" stroke-width=\"{}\"{dashes} \
                 stroke-linejoin=\"round\" d=\"{path}\"/>",
                layer.name().to_lowercase(),
                stroke.width_mm
            );
        }
    }
    for item in &drawing.items {
        if let Item::Text(text) = item {
            words(out, text, [text.at[0] - origin[0], origin[1] - text.at[1]]);
        }
    }
}

fn radius(item: &Item) -> f64 {
    if let Item::Circle { radius_mm, .. } = item { *radius_mm } else { 0.0 }
}

/// As wide as was reckoned with, whatever font the reader has.
fn words(out: &mut String, text: &Text, [x, y]: [f64; 2]) {
    let anchor = match text.anchor {
        Anchor::Start => "start",
        Anchor::Middle => "middle",
        Anchor::End => "end",
    };
    let weight = if text.bold { " font-weight=\"bold\"" } else { "" };
    let _ = write!(
        out,
        "<text x=\"{}\" y=\"{}\" font-size=\"{}\" text-anchor=\"{anchor}\"{weight} textLength=\"{}\" \
         lengthAdjust=\"spacingAndGlyphs\">{}</text>",
        mm(x),
        mm(y),
        mm(text.size_mm),
        mm(text.breadth_mm()),
        escaped(&text.words)
    );
}

/// To a tenth of a micrometre, without empty decimals.
pub(super) fn mm(value: f64) -> String {
    let text = format!("{value:.4}");
    let text = text.trim_end_matches('0').trim_end_matches('.');
    if text == "-0" { "0".into() } else { text.into() }
}

fn escaped(words: &str) -> String {
    words.replace('&', "&amp;").replace('<', "&lt;").replace('>', "&gt;").replace('"', "&quot;")
}
