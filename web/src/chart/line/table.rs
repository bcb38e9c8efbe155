//! The curves' figures as a table.

use super::{Axis, Series, heading};
use crate::chart::figure::Table;
use crate::chart::number::fixed_or_none;
use yew::AttrValue;

/// Most rows of a table.
const MOST: usize = 25;

/// One row for each place along, a curve without a name under the chart's title; curves given at other places
/// are read between their points.
pub(super) fn table(title: &str, x: &Axis, y: &Axis, series: &[Series]) -> Table {
    let places: Vec<f64> = series.first().map_or_else(Vec::new, |s| s.points.iter().map(|p| p[0]).collect());
    let step = places.len().div_ceil(MOST).max(1);
    let columns = series.iter().map(|s| match s.name.as_str() {
        "" => title.to_owned(),
        name if y.unit.name.is_empty() => name.to_owned(),
        name => format!("{name}, {}", y.unit.name),
    });
    let row = |at: &f64| {
        let cells =
            series.iter().map(|s| fixed_or_none(read(&s.points, *at).map(|v| y.unit.of(v)), y.unit.decimals));
        std::iter::once(x.unit.figure(*at)).chain(cells).map(AttrValue::from).collect()
    };
    Table {
        columns: std::iter::once(heading(x)).chain(columns).map(AttrValue::from).collect(),
        rows: places.iter().step_by(step).map(row).collect(),
    }
}

/// A curve's value at a place; `None` outside it and where it is broken.
pub(super) fn read(points: &[[f64; 2]], at: f64) -> Option<f64> {
    let inside = |w: &&[[f64; 2]]| w[0][0] <= at && at <= w[1][0];
    let value = match points.windows(2).find(inside) {
        Some(w) if w[1][0] > w[0][0] => w[0][1] + (at - w[0][0]) / (w[1][0] - w[0][0]) * (w[1][1] - w[0][1]),
        _ => points.iter().find(|p| p[0] == at)?[1],
    };
    value.is_finite().then_some(value)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chart::unit::Unit;

    #[test]
    fn tables_read_between_points_and_show_gaps() {
        let axis = |words: &'static str, unit| Axis { words: words.into(), unit, span: None };
        let series = [
            Series { name: "CT".into(), points: vec![[0.0, 0.1], [0.5, 0.05]], ..Default::default() },
            Series { name: "CP".into(), points: vec![[0.0, 0.06], [1.0, f64::NAN]], ..Default::default() },
        ];
        let table = table("Coefficients", &axis("J", Unit::ratio(2)), &axis("", Unit::ratio(3)), &series);
        assert_eq!(table.columns, ["J", "CT", "CP"]);
        assert_eq!(table.rows, [["0.00", "0.100", "–"], ["0.50", "0.050", "–"]]);
        assert_eq!(read(&[[0.0, 1.0], [2.0, 3.0]], 1.0), Some(2.0));
        assert_eq!(read(&[[0.0, 1.0]], 1.0), None);
    }
}
