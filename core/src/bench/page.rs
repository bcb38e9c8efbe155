//! Sheets of paper: their size and what stands on every one of them. Large drawings are laid over several
//! ([`parts`]).

mod parts;

use crate::caution::CAUTION_COUNT;

use super::draw::{Anchor, BOLD, Drawing, Layer, breadth_mm, fitted};
use parts::laid;

/// What every sheet says at its foot.
pub(crate) type Cautions = [&'static str; CAUTION_COUNT];

/// A size of paper, upright.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Paper {
    /// 210 mm by 297 mm.
    #[default]
    A4,
    /// 8 1/2 in by 11 in.
    Letter,
}

/// Margin that printers keep free, mm.
const MARGIN_MM: f64 = 10.0;
/// Room for the heading and for ruler and cautions, mm.
const HEAD_MM: f64 = 9.0;
const FOOT_MM: f64 = 28.0;
/// From line to line of the cautions, mm.
const CAUTION_MM: f64 = 3.1;
/// Size of a warning's letters, mm.
const WARNING_MM: f64 = 3.0;

impl Paper {
    /// Width and height, mm.
    #[must_use]
    pub fn size_mm(self) -> [f64; 2] {
        match self {
            Self::A4 => [210.0, 297.0],
            Self::Letter => [215.9, 279.4],
        }
    }

    /// Its usual name.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::A4 => "A4",
            Self::Letter => "Letter",
        }
    }

    /// Room for a drawing, mm.
    #[must_use]
    pub fn room_mm(self) -> [f64; 2] {
        let [w, h] = self.size_mm();
        [w - 2.0 * MARGIN_MM, h - 2.0 * MARGIN_MM - HEAD_MM - FOOT_MM]
    }

    /// Lower left corner of that room, mm.
    #[must_use]
    pub fn room_at_mm(self) -> [f64; 2] {
        [MARGIN_MM, MARGIN_MM + FOOT_MM]
    }
}

/// A drawing seen through a window.
#[derive(Clone, Debug, PartialEq)]
pub struct View {
    /// The drawing, in the sheet's millimetres from its lower left corner; only what lies within the window
    /// shows.
    pub drawing: Drawing,
    /// The window: lower left and upper right corner, mm.
    pub window_mm: [[f64; 2]; 2],
}

/// One sheet of paper.
#[derive(Clone, Debug, PartialEq)]
pub struct Sheet {
    /// What it is, such as `Blank from ahead, part 2 of 4`.
    pub name: String,
    /// Its size, mm.
    pub size_mm: [f64; 2],
    /// Heading, cautions, ruler and joining marks, in millimetres from the lower left corner.
    pub frame: Drawing,
    /// The drawings it carries.
    pub views: Vec<View>,
}

/// A drawing with its name, before it is laid on paper.
#[derive(Clone, Debug, PartialEq)]
pub struct Leaf {
    /// What it is.
    pub name: String,
    /// The drawing; its lower left corner may lie anywhere.
    pub drawing: Drawing,
}

/// Lays leaves on paper, one after the other, each over as many sheets as it needs; every sheet says `title`,
/// its name and its number, at its foot the cautions, and above them what must be warned of.
#[must_use]
pub fn lay(
    title: &str,
    leaves: &[Leaf],
    paper: Paper,
    cautions: &Cautions,
    warning: Option<&str>,
) -> Vec<Sheet> {
    let mut sheets: Vec<Sheet> = leaves.iter().flat_map(|leaf| laid(leaf, paper)).collect();
    let of = sheets.len();
    for (i, sheet) in sheets.iter_mut().enumerate() {
        furniture(sheet, title, &format!("sheet {} of {of}, {}", i + 1, paper.name()), cautions);
        let above = MARGIN_MM + CAUTION_MM * CAUTION_COUNT as f64;
        ruler(&mut sheet.frame, [MARGIN_MM, above + 1.0]);
        if let Some(words) = warning {
            let room = paper.size_mm()[0] - 2.0 * MARGIN_MM;
            let at = [MARGIN_MM, above + 6.4];
            sheet.frame.bold(at, WARNING_MM, Anchor::Start, fitted(words, BOLD * WARNING_MM, room));
        }
    }
    sheets
}

/// Binds pages that are read and not measured: each leaf is one page, its drawing's origin in the upper left
/// corner of the room; no ruler.
#[must_use]
pub fn bind(title: &str, pages: Vec<Leaf>, paper: Paper, cautions: &Cautions) -> Vec<Sheet> {
    let of = pages.len();
    let ([x, y], [w, h]) = (paper.room_at_mm(), paper.room_mm());
    let page = |(i, leaf): (usize, Leaf)| {
        let mut drawing = Drawing::default();
        drawing.add(&leaf.drawing, [x, y + h]);
        let views = vec![View { drawing, window_mm: [[x, y], [x + w, y + h]] }];
        let mut sheet = Sheet { name: leaf.name, size_mm: paper.size_mm(), frame: Drawing::default(), views };
        furniture(&mut sheet, title, &format!("page {} of {of}, {}", i + 1, paper.name()), cautions);
        sheet.frame.line(Layer::Thin, [[x, y - 8.0], [x + w, y - 8.0]]);
        sheet
    };
    pages.into_iter().enumerate().map(page).collect()
}

fn furniture(sheet: &mut Sheet, title: &str, number: &str, cautions: &Cautions) {
    let [w, h] = sheet.size_mm;
    let (left, right, top) = (MARGIN_MM, w - MARGIN_MM, h - MARGIN_MM);
    let frame = &mut sheet.frame;
    frame.text([right, top - 3.5], 3.0, Anchor::End, number);
    let room = right - left - breadth_mm(number, 3.0) - 6.0;
    frame.bold([left, top - 3.5], 3.6, Anchor::Start, fitted(&format!("{}  ", sheet.name), 3.6 * BOLD, room));
    let named = breadth_mm(&sheet.name, 3.6) * BOLD + 4.0;
    if room - named > 20.0 {
        frame.text([left + named, top - 3.5], 3.0, Anchor::Start, fitted(title, 3.0, room - named));
    }
    frame.line(Layer::Thin, [[left, top - 6.0], [right, top - 6.0]]);
    let high = CAUTION_MM * CAUTION_COUNT as f64;
    let widest = cautions.iter().map(|c| breadth_mm(c, 1.0)).fold(1.0, f64::max);
    let size = 2.8_f64.min((right - left) / widest);
    for (i, line) in cautions.iter().enumerate() {
        frame.text([left, MARGIN_MM + high - CAUTION_MM * (i as f64 + 1.0)], size, Anchor::Start, *line);
    }
}

/// The check ruler: 100 mm and 4 in, one over the other.
fn ruler(frame: &mut Drawing, [x, y]: [f64; 2]) {
    frame.line(Layer::Ruler, [[x, y], [x + 100.0, y]]);
    for mm in 0..=20 {
        let long = if mm % 10 == 0 {
            4.0
        } else if mm % 2 == 0 {
            2.6
        } else {
            1.4
        };
        let at = x + 5.0 * f64::from(mm);
        frame.line(Layer::Ruler, [[at, y], [at, y + long]]);
    }
    frame.text(
        [x + 104.0, y + 0.6],
        2.6,
        Anchor::Start,
        "This bar is 100 mm (3.937 in). Measure it before you cut.",
    );
    frame.text([x + 104.0, y + 2.9], 2.6, Anchor::Start, "Print at 100 %, never fitted to the page.");
}
