//! Rows of figures, and their order into polars.

use super::error::ImportError;
use super::header::{Header, Quantity};
use crate::section::polar::{Polar, PolarPoint};

/// A row with its line.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Row {
    pub(super) line: u64,
    point: PolarPoint,
    /// Thickness ratio, Reynolds number, Mach number.
    of: [Option<f64>; 3],
}

/// Reads cells of one line.
pub(super) struct Reader<'a> {
    pub(super) header: &'a Header,
    /// Whether a comma divides whole numbers from decimals.
    pub(super) decimal_comma: bool,
}

impl Reader<'_> {
    pub(super) fn row(&self, line: u64, cells: &[&str]) -> Result<Row, ImportError> {
        let expected = self.header.width;
        // Spreadsheets leave empty cells behind the last one.
        let found = cells.iter().rposition(|c| !c.is_empty()).map_or(0, |last| last + 1);
        if found > expected {
            return Err(ImportError::Width { line, found, expected });
        }
        let at = |quantity| self.figure(line, cells, quantity);
        let need = |quantity: Quantity| match at(quantity)? {
            Some(value) => Ok(value),
            None => Err(self.refused(line, quantity, "", "a number")),
        };
        let point = PolarPoint {
            alpha_deg: need(Quantity::Alpha)?,
            cl: need(Quantity::Cl)?,
            cd: need(Quantity::Cd)?,
            cm: at(Quantity::Cm)?,
        };
        let of = [at(Quantity::Thickness)?, at(Quantity::Reynolds)?, at(Quantity::Mach)?];
        Ok(Row { line, point, of })
    }

    /// A figure in the unit of the tables, in its range; `None` without such a column.
    fn figure(&self, line: u64, cells: &[&str], quantity: Quantity) -> Result<Option<f64>, ImportError> {
        let Some(column) = self.header.column(quantity) else { return Ok(None) };
        let cell = cells.get(column.index).copied().unwrap_or_default();
        let refuse = |allowed: &str| Err(self.refused(line, quantity, cell, allowed));
        if cell.ends_with('%') {
            return refuse("a plain number; a percentage says so in its heading, thickness [%]");
        }
        let text = if self.decimal_comma { cell.replace(',', ".") } else { cell.to_string() };
        // A typeset minus is a minus.
        let Ok(value) = text.replace('−', "-").parse::<f64>() else {
            return refuse("a number");
        };
        let value = value * column.scale;
        match allowed(quantity, value) {
            None => Ok(Some(if quantity == Quantity::Alpha { (value * 1e9).round() / 1e9 } else { value })),
            Some(allowed) => refuse(allowed),
        }
    }

    fn refused(&self, line: u64, quantity: Quantity, found: &str, allowed: &str) -> ImportError {
        ImportError::Value {
            line,
            column: self.header.column(quantity).map_or(0, |c| c.index + 1),
            what: quantity.name(),
            found: found.chars().take(40).collect(),
            allowed: allowed.to_string(),
        }
    }
}

/// What is allowed of a quantity, if the value is not. NaN is in no range.
fn allowed(quantity: Quantity, value: f64) -> Option<&'static str> {
    let (fits, allowed) = match quantity {
        Quantity::Alpha => ((-180.0..=180.0).contains(&value), "−180 to 180 degrees"),
        Quantity::Cd => (value > 0.0 && value <= 10.0, "above 0, up to 10"),
        Quantity::Cl | Quantity::Cm => (value.abs() <= 10.0, "−10 to 10"),
        Quantity::Reynolds => ((100.0..=1e9).contains(&value), "100 to 1e9"),
        Quantity::Mach => ((0.0..0.95).contains(&value), "0 to below 0.95"),
        Quantity::Thickness => (
            (0.005..=1.0).contains(&value),
            "0.005 to 1, thickness over chord; a percentage says so in its heading, thickness [%]",
        ),
    };
    (!fits).then_some(allowed)
}

/// A polar with the line of each of its rows.
pub(super) struct Gathered {
    pub(super) polar: Polar,
    lines: Vec<u64>,
}

impl Gathered {
    pub(super) fn first_line(&self) -> u64 {
        self.lines.first().copied().unwrap_or(1)
    }
}

/// Gathers rows of the same thickness, Reynolds and Mach number, wherever they stand, by first appearance.
pub(super) fn gather(rows: &[Row], alpha_column: usize) -> Result<Vec<Gathered>, ImportError> {
    let mut polars: Vec<([Option<f64>; 3], Gathered)> = Vec::new();
    for row in rows {
        let at = polars.iter().position(|(of, _)| *of == row.of).unwrap_or_else(|| {
            let [thickness_ratio, reynolds, mach] = row.of;
            let polar = Polar { reynolds, mach: mach.unwrap_or(0.0), thickness_ratio, points: Vec::new() };
            polars.push((row.of, Gathered { polar, lines: Vec::new() }));
            polars.len() - 1
        });
        let gathered = &mut polars[at].1;
        check_order(gathered, row, alpha_column)?;
        gathered.polar.points.push(row.point);
        gathered.lines.push(row.line);
    }
    Ok(polars.into_iter().map(|(_, gathered)| gathered).collect())
}

fn check_order(gathered: &Gathered, row: &Row, column: usize) -> Result<(), ImportError> {
    let (points, found, line) = (&gathered.polar.points, row.point.alpha_deg, row.line);
    let Some(before) = points.last().map(|p| p.alpha_deg) else { return Ok(()) };
    if found - before >= 1e-6 {
        return Ok(());
    }
    let same = points.iter().position(|p| (p.alpha_deg - found).abs() < 1e-6);
    if let Some(at) = same {
        return Err(ImportError::RepeatedAngle { line, column, found, before_line: gathered.lines[at] });
    }
    let before_line = gathered.lines[points.len() - 1];
    Err(ImportError::Unordered { line, column, found, before, before_line })
}
