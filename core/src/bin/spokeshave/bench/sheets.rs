//! `spokeshave bench JOB sheets`: paper for the bench, full size.

use clap::ValueEnum;
use spokeshave::bench::{Paper, Unit, sheet_files};
use spokeshave::cautions;
use spokeshave::rig::Rig;

use super::files::{Folder, made_ready};
use crate::input::{Outcome, point_index, print};

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    out: Folder,
    /// Size of the paper
    #[arg(long, default_value = "a4")]
    paper: PaperName,
    /// Flight point for whose departure wood is taken off carved blades; the first in flight without it
    #[arg(long, value_name = "NAME")]
    point: Option<String>,
}

/// Size of the paper.
#[derive(Clone, Copy, ValueEnum)]
pub(crate) enum PaperName {
    A4,
    Letter,
}

impl From<PaperName> for Paper {
    fn from(name: PaperName) -> Self {
        match name {
            PaperName::A4 => Self::A4,
            PaperName::Letter => Self::Letter,
        }
    }
}

/// Unit of the lengths written on paper; drawings are full size in either.
#[derive(Clone, Copy, ValueEnum)]
pub(crate) enum UnitName {
    Mm,
    Inch,
}

impl From<UnitName> for Unit {
    fn from(name: UnitName) -> Self {
        match name {
            UnitName::Mm => Self::Millimetre,
            UnitName::Inch => Self::Inch,
        }
    }
}

pub(crate) fn run(rig: &Rig, args: &Args) -> Outcome {
    let point = args.point.as_deref().map(|name| point_index(rig, Some(name))).transpose()?;
    let bench = made_ready(rig)?.planned_for(point);
    args.out.write(&sheet_files(&bench, args.paper.into(), args.out.unit()))?;
    if let Some(why) = bench.without_plan() {
        print(&format!("\nNo sheet of what to take off: {why}"))?;
    }
    if let Some(warning) = bench.warning() {
        print(&format!("\n{warning}"))?;
    }
    print(&format!(
        "\nPrint at 100 %, never fitted to the page; measure the 100 mm bar on every sheet.\nBefore you act: {}",
        cautions(&rig.job).join(" ")
    ))?;
    Ok(true)
}
