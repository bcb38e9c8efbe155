//! Where figures and words stand on the map without hiding one another.

use super::frame::Frame;
use crate::chart::clear::Clear;
use crate::chart::field::Ring;
use crate::chart::number::signed;
use ndarray::Array2;
use spokeshave::rotor::{DepartureMap, MapCell};

/// A figure on a line.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Label {
    /// Its middle, pixels.
    pub(super) at: [f64; 2],
    /// What it says.
    pub(super) text: String,
}

/// Half the width and height of a figure with some air about it.
const FIGURE: [f64; 2] = [17.0, 11.0];

/// As much room as a label can use, pixels.
const ENOUGH: f64 = 40.0;

/// The map's frame with its flight points, which labels keep clear of.
pub(super) fn open_space(frame: &Frame, marks: &[f64]) -> Clear {
    let mut clear = Clear::new([frame.left, frame.right, frame.axis.top_px, frame.axis.hub_px]);
    clear.keep_off_uprights(marks.iter().copied());
    clear
}

/// Room about a label, 0 when it touches something, at most 1.
fn room(space: &Clear, at: [f64; 2], half: [f64; 2]) -> f64 {
    (space.room(at, half, ENOUGH) / ENOUGH).max(0.0)
}

/// One figure for each line that has room for it, as near the middle height as the others allow.
pub(super) fn label_levels(
    lines: &[(f64, &[Ring])],
    frame: &Frame,
    levels: &[f64],
    space: &mut Clear,
) -> Vec<Label> {
    let middle = 0.5 * (frame.axis.top_px + frame.axis.hub_px);
    let between = |y: f64| levels.iter().map(|l| (y - l).abs()).fold(FIGURE[1], f64::min) / FIGURE[1];
    let mut labels = Vec::new();
    for (level, rings) in lines {
        let score = |at: &[f64; 2]| {
            room(space, *at, FIGURE) + 0.3 * between(at[1]) - 0.8 * (at[1] - middle).abs() / frame.height()
        };
        let open = rings.iter().flatten().filter(|at| room(space, **at, FIGURE) > 0.05);
        let Some(&at) = open.max_by(|a, b| score(a).total_cmp(&score(b))) else { continue };
        space.take(at, FIGURE);
        labels.push(Label { at, text: signed(*level, 0) });
    }
    labels
}

/// The middle of the largest open place inside a part of the map for a word of half width `half_px`, and
/// takes it.
pub(super) fn roomiest(
    map: &DepartureMap,
    frame: &Frame,
    space: &mut Clear,
    half_px: f64,
    inside: impl Fn(&MapCell) -> bool,
) -> Option<[f64; 2]> {
    let (rows, columns) = map.cells.dim();
    let [dx, dy] = [frame.width() / columns.max(2) as f64, frame.height() / rows.max(2) as f64];
    let half = [half_px, 9.0];
    let run = Runs::new(&map.cells.map(inside));
    let score = |r: usize, c: usize| {
        let tall = dy * run.vertical[[r, c]] as f64;
        let wide = dx * run.horizontal_about(r, c) as f64;
        (wide >= half_px && tall >= 10.0).then(|| (wide / half_px).min(tall / 10.0).min(4.0))
    };
    let speed = frame.speed();
    let at = |r: usize, c: usize| [speed.px(map.airspeeds_m_s[c]), frame.axis.y(map.radii_m[r])];
    let cells = (0..rows).flat_map(|r| (0..columns).map(move |c| (r, c)));
    let scored = cells.filter_map(|(r, c)| Some((at(r, c), score(r, c)? * room(space, at(r, c), half))));
    let (best, _) = scored.filter(|(_, s)| *s > 0.0).max_by(|a, b| a.1.total_cmp(&b.1))?;
    space.take(best, half);
    Some(best)
}

/// How many cells each cell is from the edge of a part, along its row and along its column.
struct Runs {
    horizontal: Array2<usize>,
    vertical: Array2<usize>,
}

impl Runs {
    fn new(mask: &Array2<bool>) -> Self {
        let mut horizontal = Array2::zeros(mask.dim());
        for (mut to, of) in horizontal.rows_mut().into_iter().zip(mask.rows()) {
            to.iter_mut().zip(from_edges(&of.to_vec())).for_each(|(t, d)| *t = d);
        }
        let mut vertical = Array2::zeros(mask.dim());
        for (mut to, of) in vertical.columns_mut().into_iter().zip(mask.columns()) {
            to.iter_mut().zip(from_edges(&of.to_vec())).for_each(|(t, d)| *t = d);
        }
        Self { horizontal, vertical }
    }

    /// The least run in a row and its neighbours, which a word covers.
    fn horizontal_about(&self, row: usize, column: usize) -> usize {
        let rows = row.saturating_sub(1)..=(row + 1).min(self.horizontal.nrows() - 1);
        rows.map(|r| self.horizontal[[r, column]]).min().unwrap_or(0)
    }
}

/// Distance of each place to the nearest place outside, in places; the ends count as outside.
fn from_edges(inside: &[bool]) -> Vec<usize> {
    let count = |run: &mut usize, i: bool| {
        *run = if i { *run + 1 } else { 0 };
        Some(*run)
    };
    let forward: Vec<usize> = inside.iter().copied().scan(0, count).collect();
    let mut backward: Vec<usize> = inside.iter().rev().copied().scan(0, count).collect();
    backward.reverse();
    forward.into_iter().zip(backward).map(|(a, b)| a.min(b)).collect()
}

#[cfg(test)]
mod tests {
    use super::super::frame::tests::{frame, sample};
    use super::*;

    #[test]
    fn runs_count_from_the_edge() {
        assert_eq!(from_edges(&[true, true, true, false, true, true]), [1, 2, 1, 0, 1, 1]);
    }

    #[test]
    fn words_keep_out_of_each_other_and_of_the_marks() {
        let (map, frame) = (sample(), frame());
        let mut space = open_space(&frame, &[60.0]);
        let first = roomiest(&map, &frame, &mut space, 30.0, |_| true).unwrap();
        let second = roomiest(&map, &frame, &mut space, 30.0, |_| true).unwrap();
        assert!((first[0] - second[0]).abs() > 60.0 || (first[1] - second[1]).abs() > 18.0);
        assert!((first[0] - 60.0).abs() > 30.0 && (second[0] - 60.0).abs() > 30.0);
    }

    #[test]
    fn a_line_without_room_has_no_figure() {
        let frame = frame();
        let mut space = open_space(&frame, &[]);
        let at_edge: Vec<Ring> = vec![vec![[11.0, 70.0], [11.0, 300.0]]];
        assert!(label_levels(&[(2.0, &at_edge)], &frame, &[], &mut space).is_empty());
    }
}
