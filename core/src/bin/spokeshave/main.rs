//! The command line, thin over the library.
fn main() {}
