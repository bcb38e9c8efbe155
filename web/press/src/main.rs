//! Builds the one-file page.
fn main() {}
