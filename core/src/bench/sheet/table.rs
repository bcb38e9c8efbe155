//! Tables on paper.

use crate::bench::draw::{Anchor, Drawing, Layer};

/// Height of a row, mm.
pub(super) const ROW_MM: f64 = 5.6;
/// Size of letters, mm.
pub(super) const SIZE_MM: f64 = 3.0;

/// Draws a table with its upper left corner at `at`: headings in as many lines as they need, figures to the right; gives the
/// height it takes, mm.
pub(super) fn table(
    drawing: &mut Drawing,
    at: [f64; 2],
    columns: &[(&str, f64)],
    rows: &[Vec<String>],
) -> f64 {
    let lines = columns.iter().map(|(head, _)| head.lines().count()).max().unwrap_or(1);
    let wide: f64 = columns.iter().map(|c| c.1).sum();
    let head = 3.6 * lines as f64 + 1.8;
    let mut right = at[0];
    for (i, (heading, width)) in columns.iter().enumerate() {
        right += width;
        let text: Vec<&str> = heading.lines().collect();
        for (k, line) in text.iter().enumerate() {
            let y = at[1] - 3.6 * (lines - text.len() + k + 1) as f64;
            drawing.bold([right - 1.5, y], 2.7, Anchor::End, *line);
        }
        for (k, row) in rows.iter().enumerate() {
            let y = at[1] - head - ROW_MM * (k as f64 + 1.0) + 1.8;
            drawing.text([right - 1.5, y], SIZE_MM, Anchor::End, row.get(i).cloned().unwrap_or_default());
        }
    }
    for k in 0..=rows.len() {
        let y = at[1] - head - ROW_MM * k as f64;
        drawing.line(Layer::Thin, [[at[0], y], [at[0] + wide, y]]);
    }
    head + ROW_MM * rows.len() as f64
}

/// Lines of text under one another from the upper left corner `at`; gives the height they take, mm.
pub(super) fn lines(drawing: &mut Drawing, at: [f64; 2], size_mm: f64, words: &[String]) -> f64 {
    let step = 1.5 * size_mm;
    for (k, line) in words.iter().enumerate() {
        drawing.text(
            [at[0], at[1] - step * (k as f64 + 1.0) + 0.4 * size_mm],
            size_mm,
            Anchor::Start,
            line.clone(),
        );
    }
    step * words.len() as f64
}
