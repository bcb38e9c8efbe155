//! Sheets of paper: their size, what stands on every one of them, and large drawings laid over several.

use crate::caution::CAUTION_COUNT;

use super::draw::{Anchor, Drawing, Layer, breadth_mm};

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
/// By how much neighbouring sheets show the same, mm.
const OVERLAP_MM: f64 = 12.0;
/// Between parts side by side, mm.
const GAP_MM: f64 = 6.0;

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
            sheet.frame.bold(at, WARNING_MM, Anchor::Start, fitted(words, 1.08 * WARNING_MM, room));
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

/// How a leaf is cut into parts that fit the room: their size, how many across and down.
struct Cut {
    low: [f64; 2],
    high: [f64; 2],
    part: [f64; 2],
    count: [u32; 2],
}

impl Cut {
    /// Lower left and upper right corner, in the leaf's millimetres, of what a part shows less half of what
    /// it shares with its neighbours.
    fn own(&self, place: [u32; 2]) -> [[f64; 2]; 2] {
        let step = [0, 1].map(|a| self.part[a] - OVERLAP_MM);
        let left = self.low[0] + f64::from(place[0]) * step[0];
        let top = self.high[1] - f64::from(place[1]) * step[1];
        let shared = |a: usize, later: bool| {
            let neighbour = if later { place[a] + 1 < self.count[a] } else { place[a] > 0 };
            if neighbour { 0.5 * OVERLAP_MM } else { 0.0 }
        };
        [
            [left + shared(0, false), top - self.part[1] + shared(1, true)],
            [left + self.part[0] - shared(0, true), top - shared(1, false)],
        ]
    }
}

fn cut(leaf: &Leaf, room: [f64; 2]) -> Option<Cut> {
    let [low, high] = leaf.drawing.bounds()?;
    let size = [high[0] - low[0], high[1] - low[1]];
    let count = [0, 1].map(|a| {
        let past = size[a] - room[a];
        1 + (past / (room[a] - OVERLAP_MM) - 1e-9).ceil().max(0.0) as u32
    });
    Some(Cut { low, high, part: [0, 1].map(|a| size[a].min(room[a])), count })
}

/// Sheets that show a leaf, in rows from the top, less those on which only a guide line would stand; narrow
/// parts of a long one stand side by side.
fn laid(leaf: &Leaf, paper: Paper) -> Vec<Sheet> {
    let (room, at) = (paper.room_mm(), paper.room_at_mm());
    let Some(cut) = cut(leaf, room) else { return Vec::new() };
    let [columns, rows] = cut.count;
    let parts: Vec<[u32; 2]> =
        (0..rows).flat_map(|row| (0..columns).map(move |column| [column, row])).collect();
    let parts: Vec<[u32; 2]> = parts.into_iter().filter(|part| leaf.drawing.tells(cut.own(*part))).collect();
    let abreast =
        if columns == 1 { ((room[0] + GAP_MM) / (cut.part[0] + GAP_MM)).max(1.0) as usize } else { 1 };
    let chunks: Vec<&[[u32; 2]]> = parts.chunks(abreast).collect();
    chunks.iter().map(|chunk| sheet(leaf, &cut, chunk, paper.size_mm(), room, at)).collect()
}

fn sheet(
    leaf: &Leaf,
    cut: &Cut,
    parts: &[[u32; 2]],
    size_mm: [f64; 2],
    room: [f64; 2],
    at: [f64; 2],
) -> Sheet {
    let mut frame = Drawing::default();
    let wide = parts.len() as f64 * (cut.part[0] + GAP_MM) - GAP_MM;
    let mut x = at[0] + 0.5 * (room[0] - wide);
    let mut views = Vec::new();
    for &[column, row] in parts {
        let step = [0, 1].map(|a| cut.part[a] - OVERLAP_MM);
        let by = [
            x - cut.low[0] - f64::from(column) * step[0],
            at[1] + room[1] - cut.high[1] + f64::from(row) * step[1],
        ];
        let window_mm = [[x, at[1] + room[1] - cut.part[1]], [x + cut.part[0], at[1] + room[1]]];
        joins(&mut frame, window_mm, [column, row], cut.count);
        let mut drawing = Drawing::default();
        drawing.add(&leaf.drawing, by);
        views.push(View { drawing, window_mm });
        x += cut.part[0] + GAP_MM;
    }
    let [columns, rows] = cut.count;
    let [column, row] = [parts[0][0] + 1, parts[0][1] + 1];
    let name = match (columns, rows, parts.len()) {
        (1, 1, _) => leaf.name.clone(),
        (1, _, 1) => format!("{}, part {row} of {rows} from the top", leaf.name),
        (1, ..) => {
            format!("{}, parts {row} to {} of {rows} from the top", leaf.name, parts[parts.len() - 1][1] + 1)
        }
        _ => format!("{}, row {row} of {rows}, column {column} of {columns}", leaf.name),
    };
    Sheet { name, size_mm, frame, views }
}

/// Joining lines in the middle of what two sheets share, with crosses: cut one sheet on the line, lay it on
/// the other's.
fn joins(frame: &mut Drawing, window: [[f64; 2]; 2], place: [u32; 2], count: [u32; 2]) {
    let half = 0.5 * OVERLAP_MM;
    let [low, high] = window;
    let mut across = |axis: usize, v: f64| {
        let point = |t: f64| if axis == 0 { [v, t] } else { [t, v] };
        let (from, to) = (low[1 - axis], high[1 - axis]);
        frame.line(Layer::Join, [point(from), point(to)]);
        for share in [0.1, 0.5, 0.9] {
            frame.cross(Layer::Ruler, point(from + share * (to - from)), 2.5);
        }
    };
    if place[0] > 0 {
        across(0, low[0] + half);
    }
    if place[0] + 1 < count[0] {
        across(0, high[0] - half);
    }
    if place[1] > 0 {
        across(1, high[1] - half);
    }
    if place[1] + 1 < count[1] {
        across(1, low[1] + half);
    }
}

fn furniture(sheet: &mut Sheet, title: &str, number: &str, cautions: &Cautions) {
    let [w, h] = sheet.size_mm;
    let (left, right, top) = (MARGIN_MM, w - MARGIN_MM, h - MARGIN_MM);
    let frame = &mut sheet.frame;
    frame.text([right, top - 3.5], 3.0, Anchor::End, number);
    let room = right - left - breadth_mm(number, 3.0) - 6.0;
    frame.bold([left, top - 3.5], 3.6, Anchor::Start, fitted(&format!("{}  ", sheet.name), 3.6 * 1.08, room));
    let named = breadth_mm(&sheet.name, 3.6) * 1.08 + 4.0;
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
