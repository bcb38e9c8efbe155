//! `spokeshave logbook`: what readings of ground runs and flights tell, and what to change.

mod print;

use std::path::PathBuf;

use serde::Serialize;
use spokeshave::change::{Wanted, changes};
use spokeshave::job::{Job, Logbook};
use spokeshave::logbook::{self, import};
use spokeshave::result::{Change, Figure, Logged};
use spokeshave::rig::Rig;
use spokeshave::sheet::SheetError;

use crate::input::{Format, JobSource, Outcome, Stop, point_index, print, print_csv, print_json, with_sheet};

#[derive(clap::Args)]
#[command(
    after_help = "READINGS is a sheet with headings: rpm (of the engine) and any of altitude_m (or _ft) or pressure_hpa,
temperature_c, airspeed_m_s (or _km_h, _kn, _mph; true airspeed), throttle (full, a share or [%]), level (yes), fuel_kg_h,
current_a, note. Standing runs go without an airspeed.

Examples:
  spokeshave logbook JOB.json --readings READINGS.csv
  spokeshave logbook JOB.json --readings READINGS.csv --job > WITH.json      factors kept in the job and used
  spokeshave logbook JOB.json --want-rpm 2900 --point \"Standing start\"       what to change"
)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    /// Readings in place of those of the job file; - reads standard input
    #[arg(long, value_name = "READINGS")]
    readings: Option<PathBuf>,
    /// The flight point at which something is wanted; the first without it
    #[arg(long)]
    point: Option<String>,
    /// Wanted rpm of the propeller at that flight point
    #[arg(long, value_name = "RPM", conflicts_with = "want_km_h")]
    want_rpm: Option<f64>,
    /// Wanted airspeed at that flight point, km/h, where the speed follows from the propeller
    #[arg(long, value_name = "KM/H")]
    want_km_h: Option<f64>,
    #[command(flatten)]
    format: Format,
    /// The whole job with the readings and the factors found, in use, as a job file
    #[arg(id = "as_job", long = "job", conflicts_with_all = ["json", "csv"])]
    job: bool,
}

#[derive(Serialize)]
struct Both<'a> {
    logbook: Option<&'a Logged>,
    changes: &'a [Change],
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = with_sheet(args.source.rig()?, args.readings.as_ref(), put)?;
    let wanted = wanted(&rig, args)?;
    let logged = match (rig.job.logbook.as_ref().is_none_or(|l| l.readings.is_empty()), wanted) {
        (true, Some(_)) => None,
        _ => Some(logbook::estimate(&rig).map_err(Stop::bad)?),
    };
    if let (true, Some(logged)) = (args.job, &logged) {
        print(&with_factors(rig.job, logged).to_json())?;
        return Ok(true);
    }
    // What to change is asked of the propeller as the logbook knows it.
    let known = match &logged {
        Some(logged) => Rig::with_factors(&rig.job, &logged.estimate.factors).map_err(Stop::bad)?,
        None => rig,
    };
    let changes = wanted.map_or(Ok(Vec::new()), |w| changes(&known, &w)).map_err(Stop::bad)?;
    if args.format.json {
        print_json(&Both { logbook: logged.as_ref(), changes: &changes })?;
    } else if args.format.csv {
        let rows = logged.iter().flat_map(print::csv_rows);
        print_csv(&print::CSV_HEADER, rows)?;
    } else {
        let parts = logged.as_ref().map(print::text).into_iter();
        let parts: Vec<String> = parts.chain(wanted.map(|w| print::changes(&known, &w, &changes))).collect();
        print(&parts.join("\n\n"))?;
    }
    Ok(changes.is_empty() || changes.iter().any(|c| c.reached))
}

fn wanted(rig: &Rig, args: &Args) -> Result<Option<Wanted>, Stop> {
    let point = point_index(rig, args.point.as_deref())?;
    let rpm = args.want_rpm.map(|value| Wanted { point, figure: Figure::Rpm, value });
    let speed = args.want_km_h.map(|v| Wanted { point, figure: Figure::AirspeedMS, value: v / 3.6 });
    Ok(rpm.or(speed))
}

fn with_factors(job: Job, logged: &Logged) -> Job {
    let logbook = job.logbook.clone().unwrap_or_default();
    let logbook = Logbook { factors: Some(logged.estimate.factors), in_use: true, ..logbook };
    Job { logbook: Some(logbook), ..job }
}

/// The readings of a sheet, put into a job.
fn put(text: &str, job: &mut Job) -> Result<Vec<String>, SheetError> {
    let (logbook, unused) = import::read(text, job.logbook.as_ref())?;
    job.logbook = Some(logbook);
    Ok(unused)
}
