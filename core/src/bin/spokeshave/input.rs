//! Reading jobs and writing output; why a command stopped.

use std::io::{Read, Write};
use std::path::{Path, PathBuf};

use spokeshave::job::{DEMOS, Demo, Job, MOST_BYTES};
use spokeshave::rig::Rig;
use spokeshave::sheet::{MOST_BYTES as MOST_SHEET_BYTES, SheetError};

/// Whether every flight point asked for has an answer, or why the command stopped.
pub(crate) type Outcome = Result<bool, Stop>;

/// Why a command stopped.
#[derive(Debug)]
pub(crate) enum Stop {
    /// Bad input, with its message.
    BadInput(String),
    /// The reader of the output went away.
    ClosedPipe,
}

impl Stop {
    pub(crate) fn bad(message: impl std::fmt::Display) -> Self {
        Self::BadInput(message.to_string())
    }
}

/// Where the job comes from.
#[derive(clap::Args)]
pub(crate) struct JobSource {
    /// Job file; - reads standard input
    #[arg(required_unless_present = "demo")]
    job: Option<PathBuf>,
    /// An invented job instead of a file: light-aeroplane, unmanned, multirotor
    #[arg(
        long,
        value_name = "NAME",
        conflicts_with = "job",
        num_args = 0..=1,
        default_missing_value = "light-aeroplane"
    )]
    demo: Option<String>,
}

/// Which flight point gives the air.
#[derive(clap::Args)]
pub(crate) struct PointOf {
    /// The flight point whose air is kept (and, where no engine is asked, its rpm); the first without it
    #[arg(long)]
    point: Option<String>,
}

impl PointOf {
    /// Its index in the job.
    pub(crate) fn index(&self, rig: &Rig) -> Result<usize, Stop> {
        point_index(rig, self.point.as_deref())
    }
}

/// How to print.
#[derive(clap::Args)]
pub(crate) struct Format {
    /// One JSON document, SI units
    #[arg(long, conflicts_with = "csv")]
    pub(crate) json: bool,
    /// CSV, SI units and degrees
    #[arg(long)]
    pub(crate) csv: bool,
}

impl JobSource {
    /// Where the job comes from, and its text.
    pub(crate) fn text(&self) -> Result<(String, String), Stop> {
        Ok(match (&self.demo, &self.job) {
            (Some(name), _) => (name.clone(), demo(name)?.json.to_string()),
            (None, Some(path)) => (path.display().to_string(), read(path, MOST_BYTES, "a job")?),
            (None, None) => return Err(Stop::bad("a job file or --demo is needed")),
        })
    }

    /// Reads and checks the job.
    pub(crate) fn rig(&self) -> Result<Rig, Stop> {
        let (place, text) = self.text()?;
        let job = Job::from_json(&text).map_err(|e| Stop::BadInput(format!("{place}: {e}")))?;
        Rig::new(&job).map_err(|e| Stop::BadInput(format!("{place}: {e}")))
    }
}

/// The index of a flight point by name (any case), or of the first.
pub(crate) fn point_index(rig: &Rig, name: Option<&str>) -> Result<usize, Stop> {
    let Some(name) = name else { return Ok(0) };
    let points = &rig.job.flight_points;
    points.iter().position(|p| p.name.eq_ignore_ascii_case(name)).ok_or_else(|| {
        let names: Vec<&str> = points.iter().map(|p| p.name.as_str()).collect();
        Stop::BadInput(format!("no flight point \"{name}\"; the job has {}", names.join(", ")))
    })
}

/// Reads at most one byte more than `what` may have, so that a huge file is refused without being loaded.
pub(crate) fn read(path: &Path, most_bytes: usize, what: &str) -> Result<String, Stop> {
    let fail = |e: std::io::Error| Stop::BadInput(format!("{}: {e}", path.display()));
    let source: Box<dyn Read> = if path == Path::new("-") {
        Box::new(std::io::stdin())
    } else {
        Box::new(std::fs::File::open(path).map_err(fail)?)
    };
    let mut bytes = Vec::new();
    source.take(most_bytes as u64 + 1).read_to_end(&mut bytes).map_err(fail)?;
    if bytes.len() > most_bytes {
        return Err(Stop::BadInput(format!(
            "{}: larger than {most_bytes} bytes, the most {what} has",
            path.display()
        )));
    }
    String::from_utf8(bytes).map_err(|e| Stop::BadInput(format!("{}: not UTF-8 text: {e}", path.display())))
}

fn demo(name: &str) -> Result<&'static Demo, Stop> {
    DEMOS.iter().find(|d| d.name == name).ok_or_else(|| {
        let names: Vec<&str> = DEMOS.iter().map(|d| d.name).collect();
        Stop::BadInput(format!("no demo \"{name}\"; there are {}", names.join(", ")))
    })
}

/// Which demo to print.
#[derive(clap::Args)]
pub(crate) struct DemoArgs {
    /// light-aeroplane, unmanned or multirotor; without it they are listed
    name: Option<String>,
}

pub(crate) fn run_demo(args: &DemoArgs) -> Outcome {
    match &args.name {
        Some(name) => print(demo(name)?.json)?,
        None => DEMOS.iter().try_for_each(|d| print(&format!("{:<18}{}", d.name, d.about)))?,
    }
    Ok(true)
}

pub(crate) fn run_schema() -> Outcome {
    print_json(&spokeshave::job::schema())?;
    Ok(true)
}

/// The job with what a sheet of readings says put in; without a sheet as it is.
pub(crate) fn with_sheet(
    rig: Rig,
    path: Option<&PathBuf>,
    put: impl Fn(&str, &mut Job) -> Result<Vec<String>, SheetError>,
) -> Result<Rig, Stop> {
    let Some(path) = path else { return Ok(rig) };
    let text = read(path, MOST_SHEET_BYTES, "a sheet of readings")?;
    let bad = |e: &dyn std::fmt::Display| Stop::BadInput(format!("{}: {e}", path.display()));
    let mut job = rig.job;
    for column in put(&text, &mut job).map_err(|e| bad(&e))? {
        eprintln!("spokeshave: column {column:?} is not used");
    }
    match job.check().as_slice() {
        [] => Rig::new(&job).map_err(Stop::bad),
        [problem, ..] => Err(bad(problem)),
    }
}

/// Prints a text and ends its line.
pub(crate) fn print(text: &str) -> Result<(), Stop> {
    let mut out = std::io::stdout().lock();
    writeln!(out, "{}", text.trim_end()).map_err(|_| Stop::ClosedPipe)
}

/// Prints a value as JSON.
pub(crate) fn print_json(value: &impl serde::Serialize) -> Result<(), Stop> {
    print(&serde_json::to_string_pretty(value).map_err(Stop::bad)?)
}

/// Prints rows as CSV.
pub(crate) fn print_csv(header: &[&str], rows: impl Iterator<Item = Vec<String>>) -> Result<(), Stop> {
    let mut out = csv::Writer::from_writer(std::io::stdout().lock());
    let mut put = |row: Vec<String>| out.write_record(&row).map_err(|_| Stop::ClosedPipe);
    put(header.iter().map(ToString::to_string).collect())?;
    rows.into_iter().try_for_each(&mut put)?;
    out.flush().map_err(|_| Stop::ClosedPipe)
}
