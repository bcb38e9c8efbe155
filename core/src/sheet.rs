//! Readings as comma-separated text: a line of headings with units, then a line for each reading.
//!
//! Columns are divided by commas, semicolons or tabs; with semicolons or tabs decimals may have a comma.
//! Lines that begin with `#` and empty lines are skipped. Every fault is told with line and column, and with
//! its likely cause.

use std::ops::RangeInclusive;

use thiserror::Error;

/// Largest sheet read, bytes.
pub const MOST_BYTES: usize = 1_000_000;

/// What a column may hold.
#[derive(Debug)]
pub struct Quantity {
    /// Its name.
    pub name: &'static str,
    /// Names it may have in a heading, in small letters, words joined by underscores.
    pub names: &'static [&'static str],
    /// Units of a heading, each with its worth and its zero in the first: `value * worth + zero`. In a
    /// heading they may be in small or capital letters. One that is empty stands for no unit.
    pub units: &'static [(&'static str, f64, f64)],
    /// What is allowed, in the first unit.
    pub allowed: RangeInclusive<f64>,
}

/// Why a sheet was refused.
#[derive(Clone, Debug, Error, PartialEq)]
#[error("line {line}{}: {message}", column.map_or_else(String::new, |c| format!(", column {c}")))]
pub struct SheetError {
    /// Line, from 1.
    pub line: u64,
    /// Column, from 1, where there is one.
    pub column: Option<usize>,
    /// What is wrong and what is allowed.
    pub message: String,
}

/// A sheet with its headings understood.
#[derive(Debug)]
pub struct Sheet<'q> {
    quantities: &'q [Quantity],
    /// Index of the column, worth and zero of its unit, for each quantity.
    columns: Vec<Option<(usize, f64, f64)>>,
    width: usize,
    decimal_comma: bool,
    rows: Vec<Row>,
    /// Line of the headings.
    pub header_line: u64,
    /// Headings that mean nothing here.
    pub unused: Vec<String>,
}

/// One line.
#[derive(Debug)]
pub struct Row {
    /// Its number, from 1.
    pub line: u64,
    cells: csv::StringRecord,
}

impl<'q> Sheet<'q> {
    /// Reads a sheet for some quantities.
    ///
    /// # Errors
    /// Too long or empty a text, a heading without its unit, two columns for one quantity, a line that is too
    /// wide.
    pub fn read(text: &str, quantities: &'q [Quantity]) -> Result<Self, SheetError> {
        let whole = |message: String| SheetError { line: 1, column: None, message };
        if text.len() > MOST_BYTES {
            return Err(whole(format!("the sheet has {} bytes; at most {MOST_BYTES} are read", text.len())));
        }
        let names: Vec<&str> = quantities.iter().map(|q| q.name).collect();
        let empty =
            || whole(format!("the sheet is empty; it begins with headings such as {}", names.join(", ")));
        let text = text.trim_start_matches('\u{feff}');
        let first = text.lines().find(|l| !l.trim().is_empty() && !l.starts_with('#')).ok_or_else(empty)?;
        let separator = separator(first);
        let mut rows = rows(text, separator)?.into_iter();
        let head = rows.next().ok_or_else(empty)?;
        let mut sheet = Self {
            quantities,
            columns: vec![None; quantities.len()],
            width: head.cells.len(),
            decimal_comma: separator != b',',
            rows: rows.collect(),
            header_line: head.line,
            unused: Vec::new(),
        };
        for (index, heading) in head.cells.iter().enumerate() {
            sheet.join(head.line, index, heading)?;
        }
        sheet.rows.iter().try_for_each(|row| sheet.fits(row))?;
        Ok(sheet)
    }

    /// The lines below the headings.
    pub fn rows(&self) -> impl Iterator<Item = &Row> {
        self.rows.iter()
    }

    /// Whether there is a column of a quantity.
    #[must_use]
    pub fn has(&self, name: &str) -> bool {
        self.quantity(name).is_some_and(|i| self.columns[i].is_some())
    }

    /// What stands in a row for a quantity: empty where there is no such column.
    #[must_use]
    pub fn word<'r>(&self, row: &'r Row, name: &str) -> &'r str {
        let column = self.quantity(name).and_then(|i| self.columns[i]);
        column.and_then(|(index, ..)| row.cells.get(index)).unwrap_or_default()
    }

    /// A figure in the first unit of its quantity; `None` for an empty cell or no such column.
    ///
    /// # Errors
    /// No number, or one that is not allowed.
    pub fn figure(&self, row: &Row, name: &str) -> Result<Option<f64>, SheetError> {
        self.figure_by(row, name, |text| text.parse().ok())
    }

    /// The same with a way of reading the text of one's own.
    ///
    /// # Errors
    /// No number, or one that is not allowed.
    pub fn figure_by(
        &self,
        row: &Row,
        name: &str,
        read: impl Fn(&str) -> Option<f64>,
    ) -> Result<Option<f64>, SheetError> {
        let Some(i) = self.quantity(name) else { return Ok(None) };
        let (Some((_, worth, zero)), quantity) = (self.columns[i], &self.quantities[i]) else {
            return Ok(None);
        };
        let cell = self.word(row, name);
        if cell.is_empty() {
            return Ok(None);
        }
        let text = if self.decimal_comma { cell.replace(',', ".") } else { cell.to_string() };
        // A typeset minus is a minus.
        let Some(value) = read(&text.replace('−', "-")) else {
            return Err(self.refused(row, name, "a number"));
        };
        let unit = |scale: &str| if scale.is_empty() { String::new() } else { format!(" {scale}") };
        let (low, high) = (quantity.allowed.start(), quantity.allowed.end());
        let told = |v: f64| ((v - zero) / worth * 1e6).round() / 1e6;
        let here = quantity.units.iter().find(|u| (u.1 - worth).abs() < 1e-12 && (u.2 - zero).abs() < 1e-9);
        if quantity.allowed.contains(&(value * worth + zero)) {
            return Ok(Some(value * worth + zero));
        }
        let fits = |u: &&(&str, f64, f64)| !u.0.is_empty() && quantity.allowed.contains(&(value * u.1 + u.2));
        let hint = perhaps(quantity.units.iter().find(fits).map(|u| u.0));
        let unit = unit(here.map_or("", |u| u.0));
        Err(self.refused(row, name, &format!("{} to {}{unit}{hint}", told(*low), told(*high))))
    }

    /// The refusal of a cell.
    #[must_use]
    pub fn refused(&self, row: &Row, name: &str, allowed: &str) -> SheetError {
        let column = self.quantity(name).and_then(|i| self.columns[i]).map(|(index, ..)| index + 1);
        let found: String = self.word(row, name).chars().take(40).collect();
        SheetError { line: row.line, column, message: format!("{name}: {found:?}; allowed is {allowed}") }
    }

    /// The refusal of a sheet without a column.
    #[must_use]
    pub fn without(&self, needed: &str) -> SheetError {
        let message = format!("no column {needed}");
        SheetError { line: self.header_line, column: None, message }
    }

    fn quantity(&self, name: &str) -> Option<usize> {
        self.quantities.iter().position(|q| q.name == name)
    }

    fn join(&mut self, line: u64, index: usize, heading: &str) -> Result<(), SheetError> {
        let fault = |message: String| Err(SheetError { line, column: Some(index + 1), message });
        let of = |name: &str| self.quantities.iter().position(|q| q.names.contains(&name));
        let (found, unit) = heading_parts(heading, of);
        let Some(i) = found else {
            if heading.replace(',', ".").parse::<f64>().is_ok() {
                return fault(format!("{heading:?} is a figure where a heading is needed"));
            }
            if !heading.is_empty() {
                self.unused.push(heading.chars().take(40).collect());
            }
            return Ok(());
        };
        let quantity = &self.quantities[i];
        if let Some((first, ..)) = self.columns[i] {
            return fault(format!(
                "a second column for {}, the first is column {}",
                quantity.name,
                first + 1
            ));
        }
        let Some(unit) = quantity.units.iter().find(|u| u.0.to_lowercase() == unit) else {
            let units: Vec<&str> = quantity.units.iter().map(|u| u.0).filter(|u| !u.is_empty()).collect();
            let heading: String = heading.chars().take(40).collect();
            return fault(format!("{heading:?} needs its unit in the heading, one of {}", units.join(", ")));
        };
        self.columns[i] = Some((index, unit.1, unit.2));
        Ok(())
    }

    /// Spreadsheets leave empty cells behind the last one.
    fn fits(&self, row: &Row) -> Result<(), SheetError> {
        let found = row
            .cells
            .iter()
            .collect::<Vec<_>>()
            .iter()
            .rposition(|c| !c.is_empty())
            .map_or(0, |last| last + 1);
        if found <= self.width {
            return Ok(());
        }
        let message = format!("{found} columns; the headings have {}", self.width);
        Err(SheetError { line: row.line, column: None, message })
    }
}

/// What a value out of range most likely is: the unit whose worth brings it into what is usual, in words to
/// append.
#[must_use]
pub fn likely(value: f64, usual: RangeInclusive<f64>, units: &[(f64, &str)]) -> String {
    perhaps(units.iter().find(|(worth, _)| usual.contains(&(value * worth))).map(|(_, unit)| *unit))
}

fn perhaps(unit: Option<&str>) -> String {
    unit.map_or_else(String::new, |unit| format!("; perhaps it is in {unit}"))
}

/// What a heading names and its unit, which stands behind it in brackets or after an underscore or a blank.
pub(crate) fn heading_parts<Q>(heading: &str, of: impl Fn(&str) -> Option<Q>) -> (Option<Q>, String) {
    let plain = heading.trim().to_lowercase();
    let (name, unit) = match plain.split_once(['[', '(']) {
        Some((name, unit)) => (name.trim(), unit.trim_end_matches([']', ')']).trim()),
        None => (plain.as_str(), ""),
    };
    let joined = name.replace([' ', '-'], "_");
    if let Some(quantity) = of(&joined) {
        return (Some(quantity), unit.to_string());
    }
    let ends = joined.match_indices('_').map(|(i, _)| i);
    let split = |i: usize| of(&joined[..i]).map(|quantity| (quantity, joined[i + 1..].to_string()));
    match ends.rev().find_map(split) {
        Some((quantity, tail)) if unit.is_empty() => (Some(quantity), tail),
        _ => (None, String::new()),
    }
}

/// The separator of the headings: semicolon, else tab, else comma.
pub(crate) fn separator(headings: &str) -> u8 {
    [b';', b'\t'].into_iter().find(|s| headings.as_bytes().contains(s)).unwrap_or(b',')
}

/// The cells of every line that has any.
fn rows(text: &str, separator: u8) -> Result<Vec<Row>, SheetError> {
    let records = records(text, separator);
    let filled = |(_, cells): &(u64, csv::StringRecord)| cells.iter().any(|c| !c.is_empty());
    let records = records.map_err(|(line, message)| SheetError { line, column: None, message })?;
    Ok(records.into_iter().filter(filled).map(|(line, cells)| Row { line, cells }).collect())
}

/// The cells of every line with its number, or the line of a fault and what the reader says.
pub(crate) fn records(text: &str, separator: u8) -> Result<Vec<(u64, csv::StringRecord)>, (u64, String)> {
    let mut reader = csv::ReaderBuilder::new()
        .delimiter(separator)
        .comment(Some(b'#'))
        .flexible(true)
        .has_headers(false)
        .trim(csv::Trim::All)
        .from_reader(text.as_bytes());
    let line = |position: Option<&csv::Position>| position.map_or(1, csv::Position::line);
    let told = |record: Result<csv::StringRecord, csv::Error>| match record {
        Ok(record) => Ok((line(record.position()), record)),
        Err(e) => Err((line(e.position()), e.to_string())),
    };
    reader.records().map(told).collect()
}
