//! One figure of the map as a grid for contours: gaps filled, padded by a cell all round.
//!
//! Contours of a grid close half a cell outside its outermost points, and the radii of the map stand half a cell
//! inside its frame. The padding goes on as the last two points do, so that lines run straight to the frame,
//! which cuts off where they close.

use super::frame::Frame;
use contour::ContourBuilder;
use ndarray::Array2;
use spokeshave::rotor::{DepartureMap, MapCell};

/// A ring of a contour, pixels.
pub(super) type Ring = Vec<[f64; 2]>;

/// A padded grid without gaps.
pub(super) struct Field {
    columns: usize,
    rows: usize,
    values: Vec<f64>,
    /// Pixels of the columns and rows.
    xs: Vec<f64>,
    ys: Vec<f64>,
}

impl Field {
    /// `None` where the map has fewer than two rows or columns, or the figure nowhere.
    pub(super) fn new(
        map: &DepartureMap,
        frame: &Frame,
        of: impl Fn(&MapCell) -> Option<f64>,
    ) -> Option<Self> {
        let (rows, columns) = map.cells.dim();
        let known = map.cells.map(|cell| of(cell).filter(|v| v.is_finite()));
        if rows < 2 || columns < 2 {
            return None;
        }
        let full = filled(&known)?;
        let speed = frame.speed();
        Some(Self {
            columns: columns + 2,
            rows: rows + 2,
            values: padded(&full),
            xs: map.airspeeds_m_s.iter().map(|v| speed.px(*v)).collect(),
            ys: map.radii_m.iter().map(|r| frame.axis.y(*r)).collect(),
        })
    }

    /// Rings about all that is at or above a level.
    pub(super) fn rings(&self, level: f64) -> Vec<Ring> {
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
    use super::super::frame::tests::{frame, sample};
    use super::*;

    #[test]
    fn a_contour_lies_where_the_figure_has_its_level() {
        let (map, frame) = (sample(), frame());
        let field = Field::new(&map, &frame, |c| c.departure_deg).unwrap();
        let mut seen = 0;
        for [x, y] in field.rings(2.0).concat() {
            let inside = (15.0..405.0).contains(&x) && frame.axis.y(0.66) < y && y < frame.axis.y(0.14);
            // Row 3 has a gap, filled from beside.
            if inside && (y - frame.axis.y(map.radii_m[3])).abs() > 34.0 {
                let departure = 14.0 - 2.4 * frame.speed().value(x) / 5.0
                    + 0.3 * ((frame.axis.scale().value(y) - 0.1) / 0.05 - 0.5);
                assert!((departure - 2.0).abs() < 0.02, "{x} {y}: {departure}");
                seen += 1;
            }
        }
        assert!(seen >= 6, "{seen}");
    }

    #[test]
    fn contours_end_outside_the_frame() {
        let field = Field::new(&sample(), &frame(), |c| c.departure_deg).unwrap();
        let all = field.rings(2.0).concat();
        let least = |i: usize| all.iter().map(|at| at[i]).fold(f64::MAX, f64::min);
        let most = |i: usize| all.iter().map(|at| at[i]).fold(f64::MIN, f64::max);
        let axis = frame().axis;
        assert!(
            least(0) < 10.0 && least(1) < axis.top_px && most(1) > axis.hub_px,
            "all but the fast side is hard"
        );
        assert!(most(0) < 410.0);
    }

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
