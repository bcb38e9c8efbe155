//! `spokeshave polar`: polars of an outline.

mod print;

use std::ops::ControlFlow;
use std::path::{Path, PathBuf};
use std::str::FromStr;

use indicatif::{ProgressBar, ProgressStyle};
use spokeshave::job::Section;
use spokeshave::section::make::{Angles, Made, Plan, Request};
use spokeshave::section::outline::{MAX_BYTES, Outline};

use crate::input::{Outcome, Stop, print_json, read};

#[expect(clippy::struct_excessive_bools, reason = "each is an option of the command line")]
#[derive(clap::Args)]
#[command(after_help = "Examples:
  spokeshave polar OUTLINE.dat --re 1e5,3e5
  spokeshave polar OUTLINE.dat --re 5e5 --blunt 0.01 --rough --compare    what a blunt edge and a rough nose cost
  spokeshave polar OUTLINE.dat --re 2e5,5e5 --thickness 0.10,0.15 --section my-section    for a job's sections

The outline is a list of points x y, one on a line, from the trailing edge round the nose and back, or from
nose to trailing edge along one side and then along the other; a name may stand on the first line.
Points that do not converge are marked and have no figures.")]
pub(crate) struct Args {
    /// List of points of the outline; - reads standard input
    outline: PathBuf,
    /// Reynolds numbers, rising
    #[arg(long, value_name = "RE,...", value_delimiter = ',', required = true)]
    re: Vec<f64>,
    /// Thickness over chord to draw the section at; as it is when left out
    #[arg(long, value_name = "T,...", value_delimiter = ',')]
    thickness: Vec<f64>,
    /// Amplification exponent at transition: 9 quiet air, 4 disturbed air
    #[arg(long = "amplification", value_name = "N", default_value_t = 9.0)]
    n_crit: f64,
    /// Angles of attack to the chord line, degrees: FIRST..LAST:STEP
    #[arg(long, value_name = "A..B:STEP", default_value = "-6..14:0.5", allow_hyphen_values = true)]
    alpha: Span,
    /// Thickness the trailing edge is left with, over the chord
    #[arg(long, value_name = "T")]
    blunt: Option<f64>,
    /// Trip the flow at these places on the upper and the lower side, over the chord; "free" leaves a side
    /// alone
    #[arg(long, value_name = "UPPER,LOWER")]
    trip: Option<Trips>,
    /// A rough or taped leading edge: the flow is tripped at 5 % of the chord above and 10 % below
    #[arg(long, conflicts_with = "trip")]
    rough: bool,
    /// Compute the section as drawn beside it, and print what the departures cost
    #[arg(long, conflicts_with_all = ["csv", "section"])]
    compare: bool,
    /// Print JSON
    #[arg(long, conflicts_with = "csv")]
    json: bool,
    /// Print CSV
    #[arg(long)]
    csv: bool,
    /// Print the table as an entry for `sections` of a job file, under this name
    #[arg(long, value_name = "NAME", conflicts_with_all = ["json", "csv"])]
    section: Option<String>,
}

/// `FIRST..LAST:STEP`.
#[derive(Clone, Copy)]
struct Span(Angles);

impl FromStr for Span {
    type Err = String;

    fn from_str(text: &str) -> Result<Self, String> {
        let figures = || {
            let (first, rest) = text.split_once("..")?;
            let (last, step) = rest.split_once(':').unwrap_or((rest, "0.5"));
            let read = |t: &str| t.trim().replace('−', "-").parse::<f64>().ok();
            Some(Angles { first_deg: read(first)?, last_deg: read(last)?, step_deg: read(step)? })
        };
        let angles = figures().ok_or("allowed is FIRST..LAST:STEP in degrees, such as -6..14:0.5")?;
        angles.list().map_err(|e| e.to_string())?;
        Ok(Self(angles))
    }
}

/// `UPPER,LOWER`, each a place or `free`.
#[derive(Clone, Copy)]
struct Trips([Option<f64>; 2]);

impl FromStr for Trips {
    type Err = String;

    fn from_str(text: &str) -> Result<Self, String> {
        let place = |t: &str| match t.trim() {
            "free" => Some(None),
            t => t.parse::<f64>().ok().map(Some),
        };
        let places = text.split_once(',').and_then(|(u, l)| Some([place(u)?, place(l)?]));
        places
            .map(Self)
            .ok_or_else(|| "allowed are two places over the chord, such as 0.05,0.1 or 0.05,free".into())
    }
}

impl Args {
    fn request(&self) -> Request {
        let rough = if self.rough { spokeshave::section::make::ROUGH_NOSE.map(Some) } else { [None; 2] };
        let [trip_upper, trip_lower] = self.trip.map_or(rough, |t| t.0);
        Request {
            thickness_ratios: self.thickness.clone(),
            angles: self.alpha.0,
            edge_thickness: self.blunt,
            trip_upper,
            trip_lower,
            ..Request::free(&self.re, self.n_crit)
        }
    }
}

pub(crate) fn run(args: &Args) -> Outcome {
    let outline = outline(&args.outline)?;
    let request = args.request();
    if args.compare && !request.departs() {
        return Err(Stop::bad(
            "--compare needs --blunt, --trip or --rough: a departure to compare with the drawing",
        ));
    }
    let plan = Plan::new(&outline, &request).map_err(Stop::bad)?;
    let drawn = Plan::new(&outline, &request.as_drawn()).map_err(Stop::bad)?;
    let bar = progress(plan.count() + if args.compare { drawn.count() } else { 0 }, plan.angles_deg().len());
    let made = compute(&plan, &bar)?;
    let clean = if args.compare { compute(&drawn, &bar)? } else { Vec::new() };
    bar.finish_and_clear();
    let table = plan.table(&made);
    if let Some(name) = &args.section {
        return match table {
            Ok(table) => print_json(&Section::of(name, table)).map(|()| true),
            Err(e) => {
                eprintln!("spokeshave: {e}");
                Ok(false)
            }
        };
    }
    match (args.json, args.csv) {
        (true, _) => print::json(&plan, &made, &drawn, &clean)?,
        (_, true) => print::csv(&request, &made)?,
        _ if args.compare => print::comparison(&plan, &drawn, &made, &clean)?,
        _ => print::people(&plan, &made)?,
    }
    Ok(table.is_ok())
}

fn outline(path: &Path) -> Result<Outline, Stop> {
    let text = read(path, MAX_BYTES, "an outline")?;
    Outline::read(&text).map_err(|e| Stop::BadInput(format!("{}: {e}", path.display())))
}

/// A bar on standard error, drawn only when that is a terminal.
fn progress(polars: usize, angles: usize) -> ProgressBar {
    let bar = ProgressBar::new((polars * angles) as u64);
    let style = ProgressStyle::with_template("{msg} {bar:30} {percent} %, {eta} to go");
    bar.with_style(style.unwrap_or_else(|_| ProgressStyle::default_bar()))
}

fn compute(plan: &Plan, bar: &ProgressBar) -> Result<Vec<Made>, Stop> {
    let angles = plan.angles_deg().len() as u64;
    let one = |task: usize| {
        if let Some((thickness, reynolds)) = plan.conditions(task) {
            bar.set_message(format!("{:.1} % thick, Re {reynolds}", 100.0 * thickness));
        }
        let start = bar.position();
        let made = plan.run(task, |step| {
            bar.set_position(start + step.done as u64);
            ControlFlow::Continue(())
        });
        bar.set_position(start + angles);
        made.map_err(Stop::bad)
    };
    (0..plan.count()).map(one).collect()
}
