//! Headings, text, tables and charts under one another, page after page.

use crate::bench::draw::{Anchor, Drawing, Layer, fitted, wrapped};
use crate::bench::sheet::table::{Column, ROW_MM, head_mm, lines, table};
use crate::bench::{Leaf, Paper};

use super::chart::Chart;

/// Size of the text, mm.
const SIZE_MM: f64 = 3.0;
/// Height of a line of text, mm.
const LINE_MM: f64 = 1.5 * SIZE_MM;
/// Where the values of facts begin, mm.
const VALUES_MM: f64 = 56.0;
/// Between charts side by side, mm.
const GAP_MM: f64 = 8.0;
/// Height of a chart, mm.
const CHART_MM: f64 = 66.0;

/// Rows up to which a table is not divided, and the least of a part.
const WHOLE_ROWS: usize = 14;
const LEAST_ROWS: usize = 3;

/// Pages being filled.
pub(super) struct Flow {
    room: [f64; 2],
    done: Vec<Leaf>,
    /// The part that is being written.
    part: String,
    /// The part with which the page began.
    name: String,
    page: Drawing,
    /// Where the next thing begins, mm, below zero.
    y: f64,
}

impl Flow {
    pub(super) fn new(paper: Paper, part: &str) -> Self {
        Self {
            room: paper.room_mm(),
            done: Vec::new(),
            part: part.into(),
            name: part.into(),
            page: Drawing::default(),
            y: 0.0,
        }
    }

    /// All pages.
    pub(super) fn pages(mut self) -> Vec<Leaf> {
        self.turn();
        self.done
    }

    /// Begins a part; a page is named after the part with which it begins.
    pub(super) fn part(&mut self, name: &str) {
        self.need(45.0);
        self.part = name.into();
        if self.page.items.is_empty() {
            self.name.clone_from(&self.part);
        } else {
            self.y -= 4.0;
        }
        self.page.bold([0.0, self.y - 5.0], 4.6, Anchor::Start, name);
        self.page.line(Layer::Cut, [[0.0, self.y - 7.0], [self.room[0], self.y - 7.0]]);
        self.y -= 11.0;
    }

    /// A heading within a part.
    pub(super) fn heading(&mut self, words: &str) {
        self.need(30.0);
        self.page.bold([0.0, self.y - 4.5], 3.4, Anchor::Start, fitted(words, 3.4 * 1.08, self.room[0]));
        self.y -= 7.0;
    }

    /// A large line across the page.
    pub(super) fn title(&mut self, words: &str) {
        self.page.bold([0.0, self.y - 7.0], 7.0, Anchor::Start, fitted(words, 7.0 * 1.08, self.room[0]));
        self.y -= 11.0;
    }

    /// A paragraph.
    pub(super) fn text(&mut self, words: &str) {
        for line in wrapped(words, SIZE_MM, self.room[0]) {
            self.need(LINE_MM);
            self.y -= lines(&mut self.page, [0.0, self.y], SIZE_MM, &[line]);
        }
        self.y -= 1.5;
    }

    /// Sentences, each with a dash before it.
    pub(super) fn list(&mut self, sentences: &[impl AsRef<str>]) {
        for sentence in sentences {
            let all = wrapped(sentence.as_ref(), SIZE_MM, self.room[0] - 5.0);
            for (i, line) in all.into_iter().enumerate() {
                self.need(LINE_MM);
                if i == 0 {
                    lines(&mut self.page, [0.0, self.y], SIZE_MM, &["–".into()]);
                }
                self.y -= lines(&mut self.page, [5.0, self.y], SIZE_MM, &[line]);
            }
        }
        self.y -= 1.5;
    }

    /// Names with their values.
    pub(super) fn facts(&mut self, facts: &[(&str, String)]) {
        for (name, value) in facts.iter().filter(|f| !f.1.is_empty()) {
            let all = wrapped(value, SIZE_MM, self.room[0] - VALUES_MM);
            self.need(LINE_MM * all.len().min(8) as f64);
            lines(&mut self.page, [0.0, self.y], SIZE_MM, &[fitted(name, SIZE_MM, VALUES_MM - 2.0)]);
            for line in all {
                self.need(LINE_MM);
                self.y -= lines(&mut self.page, [VALUES_MM, self.y], SIZE_MM, &[line]);
            }
        }
        self.y -= 2.0;
    }

    /// Lines to be filled in by hand.
    pub(super) fn blanks(&mut self, names: &[&str]) {
        let wide = (self.room[0] + GAP_MM) / names.len() as f64;
        for (i, name) in names.iter().enumerate() {
            let x = wide * i as f64;
            self.page.line(Layer::Thin, [[x, self.y - 8.0], [x + wide - GAP_MM, self.y - 8.0]]);
            self.page.text([x, self.y - 11.5], 2.6, Anchor::Start, *name);
        }
        self.y -= 15.0;
    }

    /// A table; on the next page its headings stand again.
    pub(super) fn table(&mut self, columns: &[Column], rows: &[Vec<String>]) {
        let head = head_mm(columns);
        let mut rest = rows;
        while !rest.is_empty() {
            // A short table stays whole.
            let together = if rest.len() <= WHOLE_ROWS { rest.len() } else { LEAST_ROWS };
            self.need(head + ROW_MM * together as f64);
            let fit = (((self.left_mm() - head) / ROW_MM) as usize).clamp(1, rest.len());
            // No stray row on the next page.
            let over = rest.len() - fit;
            let fit =
                if over > 0 && over < LEAST_ROWS && fit > LEAST_ROWS { fit + over - LEAST_ROWS } else { fit };
            let (now, then) = rest.split_at(fit);
            self.y -= table(&mut self.page, [0.0, self.y], columns, now) + 3.0;
            rest = then;
        }
    }

    /// Charts, two side by side.
    pub(super) fn charts(&mut self, charts: &[Chart]) {
        let wide = 0.5 * (self.room[0] - GAP_MM);
        for pair in charts.chunks(2) {
            self.need(CHART_MM);
            for (i, chart) in pair.iter().enumerate() {
                let drawn = chart.drawn([wide, CHART_MM - 4.0]);
                self.page.add(&drawn, [(wide + GAP_MM) * i as f64, self.y]);
            }
            self.y -= CHART_MM;
        }
    }

    /// A drawing on a page of its own.
    pub(super) fn leaf(&mut self, leaf: &Leaf) {
        self.turn();
        let Some([low, high]) = leaf.drawing.bounds() else { return };
        self.page.add(&leaf.drawing, [-low[0], -high[1]]);
        self.name.clone_from(&leaf.name);
        self.turn();
    }

    /// What is left of the page, mm.
    fn left_mm(&self) -> f64 {
        self.room[1] + self.y
    }

    /// Turns the page where less is left.
    fn need(&mut self, mm: f64) {
        if self.left_mm() < mm {
            self.turn();
        }
    }

    /// Ends the page, if there is anything on it.
    pub(super) fn turn(&mut self) {
        if !self.page.items.is_empty() {
            let drawing = std::mem::take(&mut self.page);
            self.done.push(Leaf { name: std::mem::take(&mut self.name), drawing });
        }
        self.name.clone_from(&self.part);
        self.y = 0.0;
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_long_table_goes_over_pages_with_all_its_rows() {
        let mut flow = Flow::new(Paper::A4, "Numbers");
        let rows: Vec<Vec<String>> = (0..100).map(|i| vec![format!("row {i}")]).collect();
        flow.table(&[crate::bench::sheet::table::figures("number", 30.0)], &rows);
        let pages = flow.pages();
        let words = |leaf: &Leaf| {
            let text = |item: &crate::bench::Item| match item {
                crate::bench::Item::Text(text) => Some(text.words.clone()),
                _ => None,
            };
            leaf.drawing.items.iter().filter_map(text).collect::<Vec<_>>()
        };
        let all: Vec<String> = pages.iter().flat_map(words).collect();
        assert_eq!(pages.len(), all.iter().filter(|w| *w == "number").count());
        assert!(pages.len() > 1 && rows.iter().all(|row| all.contains(&row[0])));
    }
}
