//! `spokeshave import`: a measured table as an entry for a job's sections.

use std::path::{Path, PathBuf};

use spokeshave::job::Section;
use spokeshave::section::import;

use crate::input::{Outcome, Stop, print_json, read};

#[derive(clap::Args)]
#[command(
    after_help = "The first line names the columns, units in the headings: alpha_deg or alpha_rad, cl and cd are needed;
reynolds, mach, thickness_ratio (or thickness [%]) and cm may be there. Commas, semicolons or tabs divide the
columns; with semicolons or tabs decimals may have a comma.

Example:
  spokeshave import TABLE.csv --name my-section    printed as JSON, to be put among `sections` of a job file"
)]
pub(crate) struct Args {
    /// Table with a line of headings; - reads standard input
    table: PathBuf,
    /// The name stations call the section by
    #[arg(long)]
    name: String,
    /// Angle from the flat face up to the chord line, degrees, for blades measured on the face
    #[arg(long, value_name = "DEG", allow_hyphen_values = true)]
    face_angle: Option<f64>,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let text = read(&args.table, import::MOST_BYTES, "a table")?;
    let from = if args.table == Path::new("-") { String::new() } else { file_name(&args.table) };
    let read =
        import::read(&text, &from).map_err(|e| Stop::BadInput(format!("{}: {e}", args.table.display())))?;
    for column in &read.unused {
        eprintln!("spokeshave: column {column:?} is not used");
    }
    let section = Section { face_angle_deg: args.face_angle, ..Section::of(&args.name, read.table) };
    match section.problems().as_slice() {
        [] => print_json(&section).map(|()| true),
        [problem, ..] => Err(Stop::bad(problem)),
    }
}

fn file_name(path: &Path) -> String {
    path.file_name().map_or_else(String::new, |name| name.to_string_lossy().into_owned())
}
