//! Mutation testing of the core: small changes of its source, of which its tests should notice each.
//!
//! A build for each change would take days. So all changes are put into one build of a copy of the workspace
//! (`rewrite`, `copy`), which asks at run time which of them acts (`chosen`); then the tests that come by a
//! change are run on it until one fails (`run`).

mod copy;
mod rewrite;
mod run;

use std::collections::{BTreeMap, HashMap};
use std::fs::OpenOptions;
use std::path::{Path, PathBuf};
use std::sync::Mutex;

use anyhow::{Context, Result};
use clap::Parser;

use crate::copy::Copy;
use crate::rewrite::Mutant;
use crate::run::{Fate, Outcome, explore, judge};

/// Changes the core's source in many small ways, one at a time, and tells which of them no test notices.
#[derive(Parser)]
struct Args {
    /// Rooms of the core to change: folders or files below `core/src`, without their ending
    #[arg(required = true)]
    rooms: Vec<String>,
    /// Folder for the copy of the workspace, what was built and `results.csv`; what is there is gone on with
    #[arg(long, default_value = "target/mutants")]
    folder: PathBuf,
    /// Run on no more than so many mutants of each room, spread over it
    #[arg(long)]
    most: Option<usize>,
    /// Only where the mutant's file, line, column and change contain this
    #[arg(long, default_value = "")]
    only: String,
    /// Run again on those that had survived
    #[arg(long)]
    again: bool,
    /// Run the checks against published values too: a longer build
    #[arg(long)]
    outside: bool,
    /// Seconds of tests on each mutant, as they take without one; a test that takes longer is left out
    #[arg(long, default_value_t = 20.0)]
    seconds: f64,
    /// Mutants run at the same time
    #[arg(long, default_value_t = 1)]
    jobs: usize,
}

fn main() -> Result<()> {
    let args = Args::parse();
    let workspace = Path::new(env!("CARGO_MANIFEST_DIR")).join("../..").canonicalize()?;
    let folder = workspace.join(&args.folder);
    std::fs::create_dir_all(&folder)?;
    let (copy, mutants) = Copy::make(&workspace, &folder.join("copy"), &args.rooms)?;
    let results = folder.join("results.csv");
    let mut known = read(&results)?;
    if args.again {
        known.retain(|_, o| o.fate != Fate::Survived && o.fate != Fate::Unreached);
    }
    let wanted = wanted(&args, &mutants, &known);
    eprintln!("{} mutants, {} to run; building the tests", mutants.len(), wanted.len());
    let programs = copy.tests(args.outside)?;
    let tests = explore(&programs, &folder, (args.jobs, args.seconds))?;
    eprintln!("{} tests end within {} s", tests.len(), args.seconds);
    let file = OpenOptions::new().append(true).create(true).open(&results)?;
    let headed = file.metadata()?.len() == 0;
    let writer = Mutex::new(csv::WriterBuilder::new().has_headers(headed).from_writer(file));
    judge(&tests, &wanted, (args.jobs, args.seconds), |outcome| {
        let mut writer = writer.lock().expect("no panic");
        writer.serialize(outcome)?;
        Ok(writer.flush()?)
    })?;
    tell(&read(&results)?, &mutants, &args.rooms);
    Ok(())
}

/// The results so far by mutant; the last of each counts.
fn read(results: &Path) -> Result<HashMap<String, Outcome>> {
    if !results.exists() {
        return Ok(HashMap::new());
    }
    let rows = csv::Reader::from_path(results)?.into_deserialize();
    rows.map(|row| row.map(|o: Outcome| (o.mutant.clone(), o)).context("results.csv")).collect()
}

/// The room a mutant belongs to: the longest that fits.
fn room<'r>(mutant: &str, rooms: &'r [String]) -> &'r str {
    let fits =
        |room: &&String| mutant.strip_prefix("core/src/").is_some_and(|m| m.starts_with(room.as_str()));
    rooms.iter().filter(fits).max_by_key(|room| room.len()).map_or("", String::as_str)
}

/// What is to be run: of each room the first so many in an order that has nothing to do with the source's.
fn wanted(args: &Args, mutants: &[Mutant], known: &HashMap<String, Outcome>) -> Vec<Mutant> {
    let scrambled = |m: &Mutant| m.number.wrapping_mul(2_654_435_761).rotate_left(16);
    let mut order: Vec<&Mutant> = mutants.iter().filter(|m| m.key.contains(&args.only)).collect();
    order.sort_by_key(|m| scrambled(m));
    let mut taken: BTreeMap<&str, usize> = BTreeMap::new();
    order.retain(|m| {
        let count = taken.entry(room(&m.key, &args.rooms)).or_default();
        *count += 1;
        args.most.is_none_or(|most| *count <= most)
    });
    order.into_iter().filter(|m| !known.contains_key(&m.key)).cloned().collect()
}

/// Counts by room, and every mutant that no test noticed.
fn tell(known: &HashMap<String, Outcome>, mutants: &[Mutant], rooms: &[String]) {
    let mut counts: BTreeMap<&str, [usize; 5]> = BTreeMap::new();
    for mutant in mutants {
        let count = counts.entry(room(&mutant.key, rooms)).or_default();
        count[0] += 1;
        let Some(outcome) = known.get(&mutant.key) else { continue };
        count[1 + outcome.fate as usize] += 1;
        if matches!(outcome.fate, Fate::Survived | Fate::Unreached) {
            println!("{:?} ({} of {} tests) {}", outcome.fate, outcome.tried, outcome.reach, outcome.mutant);
        }
    }
    for (room, [all, killed, hung, survived, unreached]) in counts {
        println!(
            "{room}: {all} mutants, {killed} killed, {hung} hung, {survived} survived, {unreached} unreached"
        );
    }
}
