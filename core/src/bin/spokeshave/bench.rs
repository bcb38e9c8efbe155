//! `spokeshave bench`: from the blade to the bench.

mod strength;

use clap::Subcommand;

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
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    match &args.what {
        What::Strength(what) => strength::run(&rig, what),
    }
}
