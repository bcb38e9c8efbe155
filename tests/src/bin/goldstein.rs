//! Writes Goldstein's factor as a share of Prandtl's, the table of the core's `rotor::loss::goldstein`.

use anyhow::{Context, Result};
use spokeshave::rotor::loss::goldstein::MOST_BLADES;
use spokeshave_tests::goldstein_table::{NODES, column, file, text};

fn main() -> Result<()> {
    let columns = |blades: u32| std::array::from_fn(|pitch| column(blades, pitch, NODES));
    let all: Vec<_> = (1..=u32::try_from(MOST_BLADES)?).map(columns).collect();
    std::fs::write(file(), text(&all)).with_context(|| file().display().to_string())
}
