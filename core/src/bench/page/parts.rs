//! Large drawings laid over several sheets: where they are cut, and how the sheets are joined.

use super::{Leaf, Paper, Sheet, View};
use crate::bench::draw::{Drawing, Layer};

/// By how much neighbouring sheets show the same, mm.
const OVERLAP_MM: f64 = 12.0;
/// Between parts side by side, mm.
const GAP_MM: f64 = 6.0;

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
pub(super) fn laid(leaf: &Leaf, paper: Paper) -> Vec<Sheet> {
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
