//! `spokeshave shape`: a better blade for the job, as a variant beside the drawn one.

mod chart;
mod error;
mod figures;
mod least_loss;
mod search;
mod twist;
mod wishes;

use clap::Subcommand;
use serde::Serialize;
use spokeshave::job::Job;
use spokeshave::result::Compared;
use spokeshave::shape::{ShapeError, Shaped};

use crate::briefs::briefs;
use crate::input::{JobSource, Outcome, Stop, print, print_json};

/// Strength is not judged by any of these commands; see to it by a proven practice or a calculation before
/// such a blade is run.
#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    #[command(subcommand)]
    how: How,
}

#[derive(Subcommand)]
enum How {
    /// Angles that put every station at its best lift-to-drag, chords as drawn
    Twist(twist::Args),
    /// Chord and angle of least induced loss at one flight point
    LeastLoss(least_loss::Args),
    /// Diameter, pitch, twist and chord for the best over several flight points, within limits
    Search(search::Args),
    /// Any figure over pitch and diameter, with the limits broken there; those of rpm and tip at that flight
    /// point alone
    Chart(chart::Args),
    /// What an error of angle, chord or thickness costs, station by station
    Error(error::Args),
}

/// How to print.
#[derive(clap::Args)]
struct Print {
    /// One JSON document, SI units
    #[arg(long)]
    json: bool,
    /// The whole shaped job, as a job file; the file that was read stays as it is
    #[arg(long, conflicts_with = "json")]
    job: bool,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    match &args.how {
        How::Twist(how) => twist::run(&rig, how),
        How::LeastLoss(how) => least_loss::run(&rig, how),
        How::Search(how) => search::run(&rig, how),
        How::Chart(how) => chart::run(&rig, how),
        How::Error(how) => error::run(&rig, how),
    }
}

const CAUTION: &str = "Strength is not judged here. Check the blade's strength before it is run.";

/// Prints a shaped blade, or why there is none.
fn told<T: Serialize>(
    shaped: Result<Shaped<T>, ShapeError>,
    how: &Print,
    suffix: &str,
    text: impl Fn(&T) -> String,
) -> Outcome {
    let shaped = match shaped {
        Ok(shaped) => shaped,
        Err(e) => return refused(&e),
    };
    if how.job {
        print(&variant(shaped.job, suffix).to_json())?;
    } else if how.json {
        print_json(&shaped.result)?;
    } else {
        print(&format!("{}\n\n{CAUTION}", text(&shaped.result)))?;
    }
    Ok(true)
}

/// A figure that is not allowed is bad input; what else cannot be has no answer, which goes to standard
/// error, so that what is piped on stays a document.
fn refused(e: &ShapeError) -> Outcome {
    if matches!(e, ShapeError::Figure { .. }) {
        return Err(Stop::bad(e));
    }
    eprintln!("spokeshave: no answer: {e}");
    Ok(false)
}

/// The shaped job by a title of its own.
fn variant(mut job: Job, suffix: &str) -> Job {
    let title = format!("{} ({suffix})", job.title);
    if title.chars().count() <= 200 {
        job.title = title;
    }
    job
}

/// Flight points with the drawn and with the shaped blade.
fn compared(points: &[Compared]) -> String {
    briefs(points.iter().flat_map(|c| [(&c.drawn, "drawn"), (&c.shaped, "shaped")]))
}
