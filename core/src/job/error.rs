//! What can be wrong with a job file, said with the place, the value and what is allowed.

use std::fmt;

use thiserror::Error;

/// One wrong value.
#[derive(Clone, Debug, PartialEq)]
pub struct Problem {
    /// Path in the file, such as `propeller.stations[3].chord_m`.
    pub path: String,
    /// What was found.
    pub found: String,
    /// What is allowed.
    pub allowed: String,
    /// Lowest and highest value allowed, in the unit the path's name ends with, where a span says it all.
    pub span: Option<(f64, f64)>,
    /// Whether the lowest value itself is refused.
    pub above_lowest: bool,
}

impl fmt::Display for Problem {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}: {}; allowed is {}", self.path, self.found, self.allowed)
    }
}

/// Why a job file was refused.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum JobError {
    /// The file is larger than any job.
    #[error("the file has {:.1} MB; a job has at most {} MB", *found_bytes as f64 / 1e6, MOST_BYTES / 1_000_000)]
    TooLarge {
        /// Its size.
        found_bytes: usize,
    },
    /// The text is not JSON, or has a key twice in one place.
    #[error("line {line}, column {column}: {message}")]
    Syntax {
        /// Line, from 1.
        line: usize,
        /// Column, from 1.
        column: usize,
        /// What the reader says.
        message: String,
    },
    /// Not a job, or one of another version.
    #[error("spokeshave: {found}; allowed is {VERSION}, the version this program reads")]
    Version {
        /// What stands there.
        found: String,
    },
    /// Some other JSON.
    #[error("spokeshave: missing, so this is no job file; one says \"spokeshave\": {VERSION}")]
    NoVersion,
    /// A name is unknown or missing, or a value is of the wrong type.
    #[error("{path}: {message}")]
    Shape {
        /// Path in the file.
        path: String,
        /// What is wrong.
        message: String,
    },
    /// Values that are not allowed.
    #[error("{}", .0.iter().map(ToString::to_string).collect::<Vec<_>>().join("\n"))]
    Values(Vec<Problem>),
}

/// Largest job file read, bytes.
pub const MOST_BYTES: usize = 16_000_000;
/// Version of the file's contract.
pub const VERSION: u32 = 1;
