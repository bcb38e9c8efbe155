//! `spokeshave carved`: the blades as measured, and what can be put right.

mod print;

pub(crate) use print::take_off;

use std::path::PathBuf;

use serde::Serialize;
use spokeshave::carved::{self, CarvedError, import};
use spokeshave::job::Job;
use spokeshave::result::{Carved, RemovalPlan};
use spokeshave::rig::Rig;
use spokeshave::sheet::SheetError;

use crate::input::{Format, JobSource, Outcome, Stop, point_index, print, print_csv, print_json, with_sheet};

#[derive(clap::Args)]
#[command(
    after_help = "READINGS is a sheet with headings: blade, radius_mm (or station, the share of the tip radius), face angle or
chord-line angle or angle (degrees, or degrees and minutes as in 18 30), chord_mm, thickness_mm, track_mm. Anything but the
place may be missing; between readings the difference from the drawing is interpolated. What is hard to believe is told and left
out; --confirm counts it. Wood only comes off: the plan never asks for adding any.

Example:
  spokeshave carved JOB.json --readings READINGS.csv --point Cruise"
)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    /// Readings in place of those of the job file; - reads standard input
    #[arg(long, value_name = "READINGS")]
    readings: Option<PathBuf>,
    /// The flight point at which departure is to be restored; without it the first in flight
    #[arg(long)]
    point: Option<String>,
    /// Count what is hard to believe as well: the readings were looked at again and are right
    #[arg(long)]
    confirm: bool,
    #[command(flatten)]
    format: Format,
    /// The whole job with the readings in it, as a job file
    #[arg(id = "as_job", long = "job", conflicts_with_all = ["json", "csv"])]
    job: bool,
}

#[derive(Serialize)]
struct Both<'a> {
    carved: &'a Carved,
    plan: Option<&'a RemovalPlan>,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let mut rig = with_sheet(args.source.rig()?, args.readings.as_ref(), put)?;
    if args.confirm {
        confirm(&mut rig);
    }
    if args.job {
        print(&rig.job.to_json())?;
        return Ok(true);
    }
    let point = match &args.point {
        Some(name) => point_index(&rig, Some(name))?,
        None => carved::usual_point(&rig),
    };
    let found = carved::analyse(&rig).map_err(Stop::bad)?;
    let plan = match carved::plan(&rig, point) {
        Ok(plan) => Some(plan),
        Err(e @ (CarvedError::NoAnswer(_) | CarvedError::Unread(_))) => {
            eprintln!("spokeshave: no plan: {e}");
            None
        }
        Err(e) => return Err(Stop::bad(e)),
    };
    if args.format.json {
        print_json(&Both { carved: &found, plan: plan.as_ref() })?;
    } else if args.format.csv {
        print_csv(&print::CSV_HEADER, print::csv_rows(&found, plan.as_ref()).into_iter())?;
    } else {
        print(&print::text(&found, plan.as_ref()))?;
    }
    Ok(plan.is_some())
}

/// What is hard to believe was looked at again.
fn confirm(rig: &mut Rig) {
    let doubts = carved::doubts(rig);
    let Some(carved) = &mut rig.job.carved else { return };
    for doubt in doubts {
        carved.blades[doubt.blade - 1].readings[doubt.reading - 1].confirmed = true;
    }
}

/// The readings of a sheet, put into a job.
fn put(text: &str, job: &mut Job) -> Result<Vec<String>, SheetError> {
    let (carved, unused) = import::read(text, &job.propeller, job.carved.as_ref())?;
    job.carved = Some(carved);
    Ok(unused)
}
