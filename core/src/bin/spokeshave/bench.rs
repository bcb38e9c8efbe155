//! `spokeshave bench`: from the blade to the bench.

mod files;
mod sheets;
mod strength;

use clap::Subcommand;
pub(crate) use sheets::{PaperName, UnitName};

use crate::input::{JobSource, Outcome};

/// Will it hold, and how to make it. What is printed is an estimate that needs margin and test.
#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    #[command(subcommand)]
    what: What,
}

#[derive(Subcommand)]
enum What {
    /// Stress and margin by station, deflection, vibration, weight and balance, hub
    Strength(strength::Args),
    /// Templates, blank, bench heights, hub, job card, what to take off carved blades: full-size SVG sheets,
    /// one PDF
    Sheets(sheets::Args),
    /// The blade for machines: STL, CSV of the surface, DXF drawings
    Files(files::Args),
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    match &args.what {
        What::Strength(what) => strength::run(&rig, what),
        What::Sheets(what) => sheets::run(&rig, what),
        What::Files(what) => files::run(&rig, what),
    }
}
