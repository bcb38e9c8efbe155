//! Other judges, each a pinned Python package run by a script in `tests/judges`; `cargo prove` installs them
//! from what `judges/requirements.txt` lists.

mod bench;
mod engines;
mod solves;
