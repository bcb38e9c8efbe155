//! One figure of the map as a grid for contours: gaps filled, padded by a cell all round.
//!
//! Contours of a grid end half a cell inside its outermost points. Padding with copies of the edge moves
//! their ends out of the frame, which then cuts them clean.

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
        let inside = |i: usize, count: usize| i.saturating_sub(1).min(count - 1);
        let values = (0..rows + 2).flat_map(|r| (0..columns + 2).map(move |c| (r, c)));
        Some(Self {
            columns: columns + 2,
            rows: rows + 2,
            values: values.map(|(r, c)| full[[inside(r, rows), inside(c, columns)]]).collect(),
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
    fn gaps_take_the_nearest_figure() {
        assert_eq!(nearest(&[None, Some(3), None, None, Some(5)]), Some(vec![3, 3, 3, 5, 5]));
        assert_eq!(nearest::<i32>(&[None, None]), None);
        let empty = Array2::from_elem((2, 2), None);
        assert!(filled(&empty).is_none());
    }
}
