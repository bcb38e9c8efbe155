//! `spokeshave report`: the whole job as pages to hand in or to keep with the propeller.

use std::path::PathBuf;

use spokeshave::bench::pdf;
use spokeshave::cautions;
use spokeshave::dossier::{Scales, dossier};

use crate::bench::{PaperName, UnitName};
use crate::input::{JobSource, Outcome, Stop, point_index, print};

#[derive(clap::Args)]
#[command(
    after_help = "Verdict, inputs, method and validity, charts, stations, strength, what to carve, readings as carved and of the logbook;
what the job does not have is left out.

Examples:
  spokeshave report JOB.json --pdf REPORT.pdf
  spokeshave report JOB.json --paper letter --units inch --pdf REPORT.pdf"
)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    /// Where the pages go, one PDF; a file of this name is replaced
    #[arg(long, value_name = "FILE")]
    pdf: PathBuf,
    /// Flight point whose air the speed range has and for which wood is taken off; the first in flight
    /// without it
    #[arg(long, value_name = "NAME")]
    point: Option<String>,
    /// Size of the paper
    #[arg(long, default_value = "a4")]
    paper: PaperName,
    /// Units: mm with km/h, N and kW, or inch with mph, lbf and hp
    #[arg(long, default_value = "mm")]
    units: UnitName,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    let point = args.point.as_deref().map(|name| point_index(&rig, Some(name))).transpose()?;
    let scales = match args.units {
        UnitName::Mm => Scales::METRIC,
        UnitName::Inch => Scales::INCHES,
    };
    let pages = dossier(&rig, &scales, args.paper.into(), point);
    let fail = |e: std::io::Error| Stop::BadInput(format!("{}: {e}", args.pdf.display()));
    std::fs::write(&args.pdf, pdf(&rig.job.title, &pages)).map_err(fail)?;
    print(&format!(
        "{}  {} pages\n\nBefore you act: {}",
        args.pdf.display(),
        pages.len(),
        cautions(&rig.job).join(" ")
    ))?;
    Ok((0..rig.job.flight_points.len()).all(|i| rig.condition(i).is_some()))
}
