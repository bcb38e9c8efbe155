//! Measured tables as comma-separated text.
//!
//! A line of headings names the columns, in any order: `alpha_deg` or `alpha_rad`, `cl`, `cd` are needed;
//! `cm`, `reynolds`, `mach` and `thickness_ratio` may be there. A unit stands in the heading (`alpha [deg]`,
//! `thickness [%]`, `reynolds [thousand]`). Columns are divided by commas, semicolons or tabs; with
//! semicolons or tabs decimals may have a comma. Lines that begin with `#` and empty lines are skipped. Rows
//! of the same thickness, Reynolds and Mach number make a polar, by rising angle.
//!
//! Moments are kept with the points; nothing here is computed from them.

mod error;
mod header;
mod rows;

pub use error::{ImportError, MOST_BYTES};

use super::polar::{TableError, check_polars};
use super::table::Table;
use crate::sheet::{records, separator};
use header::{Header, Quantity};
use rows::{Gathered, Reader, gather};

/// A table as read.
#[derive(Clone, Debug, PartialEq)]
pub struct Imported {
    /// The tables.
    pub table: Table,
    /// Rows read.
    pub rows: usize,
    /// Headings of columns that were not used.
    pub unused: Vec<String>,
}

/// Reads a table; `from` says where it comes from, such as a file's name, or is empty.
///
/// # Errors
/// [`ImportError`] with line, column, what stands there and what is allowed.
///
/// ```
/// let text = "alpha [deg];cl;cd\n-2;0,1;0,010\n0;0,3;0,009\n2;0,5;0,009\n4;0,7;0,010\n6;0,9;0,013\n";
/// let read = spokeshave::section::import::read(text, "wind tunnel, May")?;
/// assert_eq!(read.table.polars[0].points[1].cl, 0.3);
/// # Ok::<(), spokeshave::section::import::ImportError>(())
/// ```
pub fn read(text: &str, from: &str) -> Result<Imported, ImportError> {
    if text.len() > MOST_BYTES {
        return Err(ImportError::TooLarge { found_bytes: text.len() });
    }
    let text = text.trim_start_matches('\u{feff}');
    let first = text.lines().find(|l| !l.trim().is_empty() && !l.starts_with('#'));
    let separator = separator(first.ok_or(ImportError::Empty)?);
    let records = records(text, separator).map_err(|(line, message)| ImportError::Text { line, message })?;
    let mut lines = records.iter().filter(|(_, cells)| cells.iter().any(|c| !c.is_empty()));
    let (line, headings) = lines.next().ok_or(ImportError::Empty)?;
    let header = Header::read(*line, &headings.iter().collect::<Vec<_>>())?;
    let reader = Reader { header: &header, decimal_comma: separator != b',' };
    let rows: Result<Vec<_>, _> =
        lines.map(|(line, cells)| reader.row(*line, &cells.iter().collect::<Vec<_>>())).collect();
    let rows = rows?;
    let alpha = header.column(Quantity::Alpha).map_or(0, |c| c.index + 1);
    let gathered = gather(&rows, alpha)?;
    let polars = checked(gathered, *line)?;
    let table = Table {
        origin: origin(&header, rows.len(), polars.len(), from),
        face_angles: vec![],
        outline: vec![],
        polars,
    };
    Ok(Imported { table, rows: rows.len(), unused: header.unused })
}

/// The polars of a section, once they hold together.
fn checked(gathered: Vec<Gathered>, header_line: u64) -> Result<Vec<super::Polar>, ImportError> {
    let lines: Vec<u64> = gathered.iter().map(Gathered::first_line).collect();
    let polars: Vec<super::Polar> = gathered.into_iter().map(|g| g.polar).collect();
    match check_polars(&polars) {
        Ok(()) => Ok(polars),
        Err(TableError { place, found, allowed }) => {
            let index =
                place.trim_start_matches("polars[").split(']').next().and_then(|i| i.parse::<usize>().ok());
            let line = index.and_then(|i| lines.get(i).copied()).unwrap_or(header_line);
            Err(ImportError::Polar { line, found, allowed })
        }
    }
}

fn origin(header: &Header, rows: usize, polars: usize, from: &str) -> String {
    let from: String = from.trim().chars().filter(|c| !c.is_control()).take(120).collect();
    let source = if from.is_empty() { String::new() } else { format!(" from {from:?}") };
    let unused = if header.unused.is_empty() {
        String::new()
    } else {
        format!(" Columns not used: {}.", header.unused.join(", "))
    };
    let polars = if polars == 1 { "1 polar".to_string() } else { format!("{polars} polars") };
    format!("Measured or entered by the user{source}, not computed here: {rows} rows, {polars}.{unused}")
}

#[cfg(test)]
mod tests;
