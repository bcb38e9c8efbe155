//! Tables on paper.

use crate::bench::draw::{Anchor, Drawing, Layer, fitted};

/// Height of a row, mm.
pub(crate) const ROW_MM: f64 = 5.6;
/// Height of a line of a heading, mm.
const LINE_MM: f64 = 3.6;
/// Size of letters, mm.
pub(crate) const SIZE_MM: f64 = 3.0;

/// A column of a table.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Column<'h> {
    /// Its heading, in lines.
    pub(crate) head: &'h str,
    /// Its width, mm.
    pub(crate) mm: f64,
    /// Whether it holds words, which begin at its left edge, and not figures, which end at its right.
    pub(crate) words: bool,
}

/// A column of figures.
pub(crate) const fn figures(head: &str, mm: f64) -> Column<'_> {
    Column { head, mm, words: false }
}

/// A column of words.
pub(crate) const fn words(head: &str, mm: f64) -> Column<'_> {
    Column { head, mm, words: true }
}

/// Draws a table with its upper left corner at `at`: headings in as many lines as they need, words to the
/// left, figures to the right; gives the height it takes, mm.
pub(crate) fn table(drawing: &mut Drawing, at: [f64; 2], columns: &[Column], rows: &[Vec<String>]) -> f64 {
    table_of(drawing, at, columns, rows, 1.0)
}

/// The same with letters and rows, but not columns, as many times as large.
pub(crate) fn table_of(
    drawing: &mut Drawing,
    at: [f64; 2],
    columns: &[Column],
    rows: &[Vec<String>],
    larger: f64,
) -> f64 {
    let lines = columns.iter().map(|c| c.head.lines().count()).max().unwrap_or(1);
    let wide: f64 = columns.iter().map(|c| c.mm).sum();
    let (head, row_mm, size_mm) = (larger * head_mm(columns), larger * ROW_MM, larger * SIZE_MM);
    let mut left = at[0];
    for (i, column) in columns.iter().enumerate() {
        let indent = if i > 0 { 2.0 } else { 0.0 };
        let (x, anchor) =
            if column.words { (left + indent, Anchor::Start) } else { (left + column.mm - 1.5, Anchor::End) };
        left += column.mm;
        let text: Vec<&str> = column.head.lines().collect();
        for (k, line) in text.iter().enumerate() {
            let y = at[1] - larger * LINE_MM * (lines - text.len() + k + 1) as f64;
            drawing.bold([x, y], larger * 2.7, anchor, *line);
        }
        for (k, row) in rows.iter().enumerate() {
            let y = at[1] - head - row_mm * (k as f64 + 1.0) + larger * 1.8;
            let cell = row.get(i).map_or("", String::as_str);
            let room = if column.words { column.mm - 1.5 - indent } else { f64::INFINITY };
            drawing.text([x, y], size_mm, anchor, fitted(cell, size_mm, room));
        }
    }
    for k in 0..=rows.len() {
        let y = at[1] - head - row_mm * k as f64;
        drawing.line(Layer::Thin, [[at[0], y], [at[0] + wide, y]]);
    }
    head + row_mm * rows.len() as f64
}

/// Height of a table's headings, mm.
pub(crate) fn head_mm(columns: &[Column]) -> f64 {
    LINE_MM * columns.iter().map(|c| c.head.lines().count()).max().unwrap_or(1) as f64 + 1.8
}

/// Lines of text under one another from the upper left corner `at`; gives the height they take, mm.
pub(crate) fn lines(drawing: &mut Drawing, at: [f64; 2], size_mm: f64, words: &[String]) -> f64 {
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
