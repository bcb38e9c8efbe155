//! Runs every check.
fn main() {}
