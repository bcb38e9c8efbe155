//! Writes Goldstein's factor as a share of Prandtl's, the table of the core's `rotor::loss::goldstein`.

use std::fmt::Write;
use std::path::Path;

use anyhow::{Context, Result};
use spokeshave::rotor::loss::goldstein::{FINEST, MOST_BLADES, PITCHES, PLACES};
use spokeshave_tests::goldstein::Goldstein;
use spokeshave_tests::validation::tip_loss::prandtl;

/// Nodes of the coarse grid: what is left of the error is below half of the last decimal, but for the
/// outermost row.
const NODES: usize = 128;
const HEAD: &str = "//! Goldstein's factor over Prandtl's times 10,000: for 1, 2, … blades, at `r/R` = 1, 0.9, …, at each pitch of the wake.
//! Written by `cargo run --release -p spokeshave-tests --bin goldstein`.

use super::{MOST_BLADES, PITCHES, PLACES};

#[rustfmt::skip]
pub(super) static SHARES: [[[u16; PITCHES]; PLACES]; MOST_BLADES] = [
";

fn main() -> Result<()> {
    let mut text = HEAD.to_string();
    for blades in 1..=u32::try_from(MOST_BLADES)? {
        let pitches: Vec<f64> = (0..PITCHES).map(|k| FINEST * (0.5 * k as f64).exp2()).collect();
        let columns: Vec<[f64; PLACES]> = pitches.iter().map(|pitch| shares(blades, *pitch)).collect();
        text.push_str("    [\n");
        for place in 0..PLACES {
            let row: Vec<String> =
                columns.iter().map(|column| format!("{:.0}", 1e4 * column[place])).collect();
            writeln!(text, "        [{}],", row.join(", "))?;
        }
        text.push_str("    ],\n");
    }
    text.push_str("];\n");
    let file = Path::new(env!("CARGO_MANIFEST_DIR")).join("../core/src/rotor/loss/goldstein/table.rs");
    std::fs::write(&file, text).with_context(|| file.display().to_string())
}

/// At `r/R` = 1, 0.9, …; at the very tip both factors are nothing, and their share is nearly a straight line
/// of `r/R`.
fn shares(blades: u32, pitch: f64) -> [f64; PLACES] {
    let exact = Goldstein::on_grid(blades, pitch, NODES);
    let share = |fraction: f64| exact.factor(fraction) / prandtl(blades, pitch, fraction);
    std::array::from_fn(|place| match place {
        0 => 2.0 * share(0.98) - share(0.96),
        _ => share(1.0 - 0.1 * place as f64),
    })
}
