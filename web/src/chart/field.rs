//! One figure as a grid for contours: gaps filled, padded by a cell all round.
//!
//! Contours of a grid close half a cell outside its outermost points, and points may stand half a cell inside
//! their frame. The padding goes on as the last two points do, so that lines run straight to the frame, which
//! cuts off where they close.

use super::path::Path;
use contour::ContourBuilder;
use ndarray::Array2;

/// A ring of a contour, pixels.
pub type Ring = Vec<[f64; 2]>;

/// A padded grid without gaps.
pub struct Field {
    columns: usize,
    rows: usize,
    values: Vec<f64>,
    /// Pixels of the columns and rows.
    xs: Vec<f64>,
    ys: Vec<f64>,
}

impl Field {
    /// A figure by row and column, its columns and rows at these pixels. `None` with fewer than two rows or
    /// columns, and where the figure is nowhere.
    #[must_use]
    pub fn new(known: &Array2<Option<f64>>, xs: Vec<f64>, ys: Vec<f64>) -> Option<Self> {
        let (rows, columns) = known.dim();
        if rows < 2 || columns < 2 {
            return None;
        }
        let full = filled(&known.map(|v| v.filter(|v| v.is_finite())))?;
        Some(Self { columns: columns + 2, rows: rows + 2, values: padded(&full), xs, ys })
    }

    /// Rings about all that is at or above a level.
    #[must_use]
    pub fn rings(&self, level: f64) -> Vec<Ring> {
        let builder = ContourBuilder::new(self.columns, self.rows, true);
        let Ok(lines) = builder.lines(&self.values, &[level]) else { return Vec::new() };
        let rings = lines.iter().flat_map(|line| &line.geometry().0);
        rings.map(|ring| ring.0.iter().map(|at| self.pixel(at.x, at.y)).collect()).collect()
    }

    /// From the grid, where point `k` of the padded grid stands at `k + 0.5`, to pixels.
    fn pixel(&self, x: f64, y: f64) -> [f64; 2] {
        [between(&self.xs, x - 1.5), between(&self.ys, y - 1.5)]
    }
}

/// Rings as path data.
#[must_use]
pub fn data(rings: &[Ring]) -> String {
    let mut path = Path::default();
    for ring in rings {
        path.run(ring.iter().take(ring.len().saturating_sub(1)).copied());
        path.close();
    }
    path.into_string()
}

/// The value at a fractional index, continued beyond the ends.
fn between(values: &[f64], index: f64) -> f64 {
    let i = (index.floor().max(0.0) as usize).min(values.len() - 2);
    let w = index - i as f64;
    values[i] + w * (values[i + 1] - values[i])
}

/// A cell more all round, gone on straight.
fn padded(grid: &Array2<f64>) -> Vec<f64> {
    let (rows, columns) = grid.dim();
    let at = |r: usize, c: usize| {
        let ((r0, r1), (c0, c1)) = (sources(r, rows), sources(c, columns));
        let on = |near: f64, far: f64, outside: bool| if outside { 2.0 * near - far } else { near };
        let row = |r: usize| on(grid[[r, c0]], grid[[r, c1]], c0 + 1 != c);
        on(row(r0), row(r1), r0 + 1 != r)
    };
    (0..rows + 2).flat_map(|r| (0..columns + 2).map(move |c| at(r, c))).collect()
}

/// For a place in the padded grid: the nearest place in the grid itself and the one behind it.
fn sources(padded: usize, count: usize) -> (usize, usize) {
    match padded {
        0 => (0, 1),
        p if p > count => (count - 1, count - 2),
        p => (p - 1, p - 1),
    }
}

/// Gaps filled from the nearest figure in the row, and empty rows from the nearest row.
fn filled(known: &Array2<Option<f64>>) -> Option<Array2<f64>> {
    let rows: Vec<Option<Vec<f64>>> = known.rows().into_iter().map(|row| nearest(&row.to_vec())).collect();
    let rows = nearest(&rows)?;
    Some(Array2::from_shape_fn(known.dim(), |(r, c)| rows[r][c]))
}

/// Each item, or the nearest one there is; `None` when there is none at all.
fn nearest<T: Clone>(items: &[Option<T>]) -> Option<Vec<T>> {
    let around = |i: usize| {
        (0..items.len()).find_map(|d| {
            let before = i.checked_sub(d).and_then(|k| items[k].clone());
            before.or_else(|| items.get(i + d).cloned().flatten())
        })
    };
    (0..items.len()).map(around).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn padding_goes_on_straight() {
        let grid = Array2::from_shape_fn((2, 3), |(r, c)| 10.0 * r as f64 + c as f64);
        let expected = Array2::from_shape_fn((4, 5), |(r, c)| 10.0 * (r as f64 - 1.0) + c as f64 - 1.0);
        assert_eq!(padded(&grid), expected.into_raw_vec_and_offset().0);
    }

    #[test]
    fn gaps_take_the_nearest_figure() {
        assert_eq!(nearest(&[None, Some(3), None, None, Some(5)]), Some(vec![3, 3, 3, 5, 5]));
        assert_eq!(nearest::<i32>(&[None, None]), None);
        let empty = Array2::from_elem((2, 2), None);
        assert!(filled(&empty).is_none());
    }
}
