//! How much room a text takes, and how it is cut and led over lines to fit one. Widths are those of
//! Helvetica's own metrics, which every PDF viewer has and which the sans serif faces of browsers follow
//! closely.

use super::{Anchor, Text};

/// Widths of the characters from space to tilde, in thousandths of the size (Adobe's font metrics of
/// Helvetica).
const HELVETICA: [u16; 95] = [
    278, 278, 355, 556, 556, 889, 667, 191, 333, 333, 389, 584, 278, 333, 278, 278, 556, 556, 556, 556, 556,
    556, 556, 556, 556, 556, 278, 278, 584, 584, 584, 556, 1015, 667, 667, 722, 722, 667, 611, 778, 722, 278,
    500, 667, 556, 833, 722, 778, 667, 778, 722, 667, 611, 722, 667, 944, 667, 667, 611, 278, 278, 278, 469,
    556, 333, 556, 556, 500, 556, 556, 278, 556, 556, 222, 222, 500, 222, 833, 556, 556, 556, 556, 333, 500,
    278, 556, 500, 722, 500, 500, 500, 334, 260, 334, 584,
];
/// Bold letters are wider by about so much: by the metrics of Helvetica-Bold 4.8 % over all characters, 9.2 %
/// over English prose.
pub(crate) const BOLD: f64 = 1.08;
/// How far letters reach above the line they stand on and below it, of the size: f and g of Helvetica (728
/// and 220 thousandths, Adobe's font metrics).
const ABOVE: f64 = 0.73;
const BELOW: f64 = 0.22;
/// Height of capitals, of the size (718 thousandths).
pub(crate) const CAPITALS: f64 = 0.72;
/// Half the height of small letters without ascenders, of the size (523 thousandths): a line of text stands
/// so far below what it is to be level with.
pub(crate) const HALF_SMALL: f64 = 0.26;

/// Width of a text of size 1.
fn advance_mm(words: &str) -> f64 {
    let of = |c: char| match c {
        ' '..='~' => f64::from(HELVETICA[c as usize - 32]),
        '°' => 400.0,
        '·' => 333.0,
        _ => 600.0,
    };
    words.chars().map(of).sum::<f64>() / 1000.0
}

/// Width of a text, mm.
pub(crate) fn breadth_mm(words: &str, size_mm: f64) -> f64 {
    advance_mm(words) * size_mm
}

impl Text {
    /// A plain text about the origin.
    pub(crate) fn plain(words: &str, size_mm: f64) -> Self {
        Self { at: [0.0; 2], size_mm, anchor: Anchor::Middle, bold: false, words: words.into() }
    }

    /// Lower left and upper right corner of its box, mm.
    pub(crate) fn corners(&self) -> [[f64; 2]; 2] {
        let [left, foot] = [self.at[0] + self.left_mm(), self.at[1]];
        [[left, foot - BELOW * self.size_mm], [left + self.breadth_mm(), foot + ABOVE * self.size_mm]]
    }

    /// Its width, mm.
    #[must_use]
    pub fn breadth_mm(&self) -> f64 {
        breadth_mm(&self.words, self.size_mm) * if self.bold { BOLD } else { 1.0 }
    }

    /// From its point to its left end, mm.
    #[must_use]
    pub fn left_mm(&self) -> f64 {
        match self.anchor {
            Anchor::Start => 0.0,
            Anchor::Middle => -0.5 * self.breadth_mm(),
            Anchor::End => -self.breadth_mm(),
        }
    }
}

/// A text cut to a room.
pub(crate) fn fitted(words: &str, size_mm: f64, room_mm: f64) -> String {
    if breadth_mm(words, size_mm) <= room_mm {
        return words.to_string();
    }
    let mut cut: String = words.to_string();
    while !cut.is_empty() && breadth_mm(&cut, size_mm) + size_mm > room_mm {
        cut.pop();
    }
    format!("{}…", cut.trim_end())
}

/// A text in lines of a width; a word that is too long is cut.
pub(crate) fn wrapped(words: &str, size_mm: f64, room_mm: f64) -> Vec<String> {
    let mut all: Vec<String> = Vec::new();
    let mut line = String::new();
    for word in words.split_whitespace() {
        let longer = if line.is_empty() { word.to_string() } else { format!("{line} {word}") };
        if breadth_mm(&longer, size_mm) <= room_mm {
            line = longer;
        } else {
            if !line.is_empty() {
                all.push(line);
            }
            line = fitted(word, size_mm, room_mm);
        }
    }
    all.push(line);
    all
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_are_as_wide_as_their_room_and_keep_every_word() {
        let words = "A table; on the next page its headings stand again, and nothing of the text is lost.";
        let all = wrapped(words, 3.0, 40.0);
        assert_eq!(all.join(" "), words);
        assert!(all.iter().all(|line| breadth_mm(line, 3.0) <= 40.0) && all.len() > 2);
        assert!(wrapped(&"x".repeat(200), 3.0, 40.0)[0].ends_with('…'));
        assert_eq!(wrapped("", 3.0, 40.0), [""]);
    }
}
