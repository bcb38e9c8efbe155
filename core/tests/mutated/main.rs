//! Everything that reads a text, with texts that are wrong: no panic, no hang, and what is taken holds together.
//!
//! `SPOKESHAVE_MUTATE_SECONDS=300 cargo test --release -p spokeshave --test mutated` goes on with new texts for that long, each.

mod job;
mod mutation;
mod outline;
mod readings;
mod table;

use serde_json::Value;

/// Whether a text says something to a person: not empty, and no number that is none.
fn said(words: &str) {
    assert!(!words.trim().is_empty(), "an error without words");
}

/// Every number of a result is written, or left out where there is none.
fn written(value: impl serde::Serialize) -> Value {
    serde_json::to_value(value).expect("plain data")
}
