//! Why a table was refused: where it is wrong, what stands there, what is allowed.

use thiserror::Error;

/// Largest table read, bytes.
pub const MOST_BYTES: usize = 2_000_000;

/// Why a table was refused. Lines and columns are counted from 1.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum ImportError {
    /// Too long a text.
    #[error("the table has {found_bytes} bytes; at most {MOST_BYTES} are read")]
    TooLarge {
        /// Its size.
        found_bytes: usize,
    },
    /// Nothing but empty lines.
    #[error("the table is empty; a line of column headings and a line for each angle are needed")]
    Empty,
    /// Text that is no table: a quotation mark left open, say.
    #[error("line {line}: {message}")]
    Text {
        /// Line.
        line: u64,
        /// What the reader says.
        message: String,
    },
    /// The first line is numbers.
    #[error("line {line}: {found:?} is a figure where a column heading is needed, such as alpha_deg, cl, cd")]
    NoHeader {
        /// Line.
        line: u64,
        /// What stands there.
        found: String,
    },
    /// A column that is needed is missing.
    #[error("line {line}: no column {missing}; the headings are {found}")]
    MissingColumn {
        /// Line of the headings.
        line: u64,
        /// What is needed.
        missing: &'static str,
        /// The headings found.
        found: String,
    },
    /// Two columns for one quantity.
    #[error("line {line}, column {column}: a second column for {what}, the first is column {first}")]
    RepeatedColumn {
        /// Line of the headings.
        line: u64,
        /// The second column.
        column: usize,
        /// The quantity.
        what: &'static str,
        /// The first column.
        first: usize,
    },
    /// A heading without its unit, or with one that is not known.
    #[error("line {line}, column {column}: {heading:?} needs its unit in the heading: {allowed}")]
    Unit {
        /// Line of the headings.
        line: u64,
        /// Column.
        column: usize,
        /// The heading.
        heading: String,
        /// Headings that would do.
        allowed: &'static str,
    },
    /// A cell that is empty, no number, or out of range.
    #[error("line {line}, column {column} ({what}): {found:?}; allowed is {allowed}")]
    Value {
        /// Line.
        line: u64,
        /// Column.
        column: usize,
        /// The quantity.
        what: &'static str,
        /// What stands there.
        found: String,
        /// What is allowed.
        allowed: String,
    },
    /// A line with more or fewer cells than headings.
    #[error("line {line}: {found} columns; the headings have {expected}")]
    Width {
        /// Line.
        line: u64,
        /// Cells found.
        found: usize,
        /// Headings.
        expected: usize,
    },
    /// Angles of one polar out of order.
    #[error(
        "line {line}, column {column} (alpha): {found} degrees follows {before} degrees of line \
         {before_line}; within a polar each angle is above the one before"
    )]
    Unordered {
        /// Line.
        line: u64,
        /// Column of the angle.
        column: usize,
        /// The angle, degrees.
        found: f64,
        /// The one before it.
        before: f64,
        /// Its line.
        before_line: u64,
    },
    /// An angle twice in one polar.
    #[error(
        "line {line}, column {column} (alpha): {found} degrees again, as on line {before_line}; an angle \
         stands once in a polar"
    )]
    RepeatedAngle {
        /// Line.
        line: u64,
        /// Column of the angle.
        column: usize,
        /// The angle, degrees.
        found: f64,
        /// The line where it stood first.
        before_line: u64,
    },
    /// Polars that do not make a section together.
    #[error("the polar that begins on line {line}: {found}; allowed is {allowed}")]
    Polar {
        /// Line of its first row.
        line: u64,
        /// What was found.
        found: String,
        /// What is allowed.
        allowed: String,
    },
}
