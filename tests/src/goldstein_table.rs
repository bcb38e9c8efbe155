//! The table of the core's `rotor::loss::goldstein`, Goldstein's factor as a share of Prandtl's: made anew,
//! and as it is committed.

use std::fmt::Write;
use std::path::{Path, PathBuf};

use anyhow::{Context, Result, ensure};
use spokeshave::rotor::loss::goldstein::{FINEST, MOST_BLADES, PITCHES, PLACES};

use crate::goldstein::Goldstein;
use crate::validation::tip_loss::prandtl;

/// Nodes of the coarse grid: what is left of the error is below half of the last decimal, but for the
/// outermost row.
pub const NODES: usize = 128;
const HEAD: &str = "//! Goldstein's factor over Prandtl's times 10,000: for 1, 2, … blades, at `r/R` = 1, 0.9, …, at each pitch of
//! the wake. Written by `cargo run --release -p spokeshave-tests --bin goldstein`.

use super::{MOST_BLADES, PITCHES, PLACES};

#[rustfmt::skip]
pub(super) static SHARES: [[[u16; PITCHES]; PLACES]; MOST_BLADES] = [
";

/// The entries for a number of blades at one pitch of the wake, from the tip inward.
pub type Column = [u32; PLACES];

/// Where the table is committed.
#[must_use]
pub fn file() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("../core/src/rotor/loss/goldstein/table.rs")
}

/// The column for a number of blades at the pitch of that place in the table, on a grid of so many nodes, at
/// `r/R` = 1, 0.9, …; at the very tip both factors are nothing, and their share is nearly a straight line of
/// `r/R`.
#[must_use]
pub fn column(blades: u32, pitch: usize, nodes: usize) -> Column {
    let advance = FINEST * (0.5 * pitch as f64).exp2();
    let exact = Goldstein::on_grid(blades, advance, nodes);
    let share = |fraction: f64| exact.factor(fraction) / prandtl(blades, advance, fraction);
    let at = |place: usize| match place {
        0 => 2.0 * share(0.98) - share(0.96),
        _ => share(1.0 - 0.1 * place as f64),
    };
    std::array::from_fn(|place| (1e4 * at(place)).round() as u32)
}

/// The text of the table, from its columns over the pitches for 1, 2, … blades.
#[must_use]
pub fn text(of_blades: &[[Column; PITCHES]]) -> String {
    let mut text = HEAD.to_string();
    for columns in of_blades {
        text.push_str("    [\n");
        for place in 0..PLACES {
            let row = columns.map(|column| column[place].to_string()).join(", ");
            let _ = writeln!(text, "        [{row}],");
        }
        text.push_str("    ],\n");
    }
    text + "];\n"
}

/// The columns of a table's text.
///
/// # Errors
/// If it has other than one row of figures for each number of blades and place.
pub fn read(text: &str) -> Result<Vec<[Column; PITCHES]>> {
    let figures = |line: &str| line.trim().strip_prefix('[')?.strip_suffix("],").map(str::to_owned);
    let rows: Vec<Vec<u32>> = text
        .lines()
        .filter_map(figures)
        .map(|row| row.split(", ").map(|figure| Ok(figure.parse()?)).collect::<Result<_>>())
        .collect::<Result<_>>()
        .context("a figure of the table")?;
    ensure!(rows.len() == MOST_BLADES * PLACES, "{} rows", rows.len());
    ensure!(rows.iter().all(|row| row.len() == PITCHES), "a row of other than {PITCHES} figures");
    let column = |rows: &[Vec<u32>], pitch: usize| std::array::from_fn(|place| rows[place][pitch]);
    Ok(rows.chunks(PLACES).map(|rows| std::array::from_fn(|pitch| column(rows, pitch))).collect())
}
