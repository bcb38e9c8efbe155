//! What is done with a text of each kind. Only panics, hangs and figures that are none are faults: a text may
//! be refused, in words.

pub(crate) mod job;
pub(crate) mod outline;
pub(crate) mod readings;
pub(crate) mod table;

use serde_json::Value;

/// Whether a text says something to a person: not empty.
fn said(words: &str) {
    assert!(!words.trim().is_empty(), "an error without words");
}

/// Every number of a result is written, or left out where there is none.
fn written(value: impl serde::Serialize) -> Value {
    serde_json::to_value(value).expect("plain data")
}
