//! What can be wrong with an outline, said with its place and with what is allowed.

use std::fmt;

use thiserror::Error;

use super::check::{MAX_POINTS, MIN_POINTS};
use super::read::MAX_BYTES;

/// Where in a list a fault lies: the point counted from 1, and the line of the text when there is one.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Place {
    /// Number of the point, counted from 1.
    pub point: usize,
    /// Line of the text, counted from 1; none for points that did not come from a text.
    pub line: Option<usize>,
}

impl fmt::Display for Place {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self.line {
            Some(line) => write!(f, "line {line} (point {})", self.point),
            None => write!(f, "point {}", self.point),
        }
    }
}

/// Why an outline was refused.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum OutlineError {
    /// The text is larger than an outline can be.
    #[error("the outline text has {bytes} bytes: at most {MAX_BYTES} are read")]
    TooLarge {
        /// Size of the text.
        bytes: usize,
    },
    /// A line after the name is not a pair of numbers.
    #[error(
        "line {line}: `{text}` is not a pair of numbers x y with decimal points; one line for a name may stand before the \
         first pair"
    )]
    NotAPair {
        /// Line counted from 1.
        line: usize,
        /// The start of that line.
        text: String,
    },
    /// The counts that head a list in two blocks do not agree with the list.
    #[error("line {line}: the list announces {announced} points and holds {found}")]
    WrongCount {
        /// Line of the counts.
        line: usize,
        /// Sum of the two counts.
        announced: usize,
        /// Points found.
        found: usize,
    },
    /// Too few points.
    #[error("{}: at least {MIN_POINTS} are needed to draw a section", counted(*found))]
    TooFew {
        /// Points found.
        found: usize,
    },
    /// Too many points.
    #[error("{found} points: at most {MAX_POINTS} are allowed")]
    TooMany {
        /// Points found.
        found: usize,
    },
    /// A coordinate that is not finite, or absurdly large.
    #[error("{place}: ({}, {}) is outside the allowed range -1e6 to 1e6", short(*x), short(*y))]
    OutOfRange {
        /// Where.
        place: Place,
        /// Abscissa as read.
        x: f64,
        /// Ordinate as read.
        y: f64,
    },
    /// Two neighbouring points coincide.
    #[error("{place}: repeats the point before it; neighbouring points must differ")]
    Repeated {
        /// The second of the two.
        place: Place,
    },
    /// The outline doubles back on itself away from the nose.
    #[error(
        "{place}: the outline turns by {turn_deg:.0} degrees; at most {allowed_deg:.0} away from the nose"
    )]
    Spike {
        /// Where.
        place: Place,
        /// Turn, degrees.
        turn_deg: f64,
        /// Largest turn allowed, degrees.
        allowed_deg: f64,
    },
    /// Two pieces of the outline cross or touch.
    #[error("the outline crosses itself between {first} and {second}")]
    Crossing {
        /// First point of the one piece.
        first: Place,
        /// First point of the other.
        second: Place,
    },
    /// The chord line stands upright, as where the columns are exchanged.
    #[error(
        "the chord line stands at {} degrees to the x axis: at most {allowed_deg} is allowed; are x and y \
         exchanged?",
        found_deg.round()
    )]
    Upright {
        /// Angle of the chord line to the x axis, degrees.
        found_deg: f64,
        /// Largest angle allowed, degrees.
        allowed_deg: f64,
    },
    /// The two ends do not meet near enough at the trailing edge.
    #[error("the ends are {gap:.4} chord apart: the trailing edge may be open by at most {allowed:.2} chord")]
    NotClosed {
        /// Gap, in chords.
        gap: f64,
        /// Largest gap allowed, in chords.
        allowed: f64,
    },
    /// A thickness ratio outside what can be drawn or scaled to.
    #[error("thickness ratio {found:.4}: {least} to {most} is allowed")]
    Thickness {
        /// The ratio found or asked for.
        found: f64,
        /// Least ratio.
        least: f64,
        /// Largest ratio.
        most: f64,
    },
    /// The two sides are not single-valued along the chord, so that they cannot be scaled.
    #[error("{place}: the surface runs backwards along the chord, so that thickness cannot be scaled")]
    Undercut {
        /// Where.
        place: Place,
    },
    /// A design figure of a family outside its range.
    #[error("{what} {}: {least} to {most} is allowed", short(*found))]
    Figure {
        /// Which figure.
        what: &'static str,
        /// The value.
        found: f64,
        /// Least value.
        least: f64,
        /// Largest value.
        most: f64,
    },
}

fn counted(points: usize) -> String {
    if points == 0 { "no pair of coordinates x y was found".into() } else { format!("{points} points") }
}

/// A figure as it was typed, an absurd one in few signs.
pub(crate) fn short(figure: f64) -> String {
    if figure.is_nan() {
        "not a number".into()
    } else if figure.abs() < 1e12 {
        figure.to_string()
    } else {
        format!("{figure:e}")
    }
}
