//! What the checks need beside Rust. The program of this crate runs them all; it stays free of the core and
//! the page, so that it is there at once and what it builds afterwards is built only once.

#![forbid(unsafe_code)]

pub mod tools;
