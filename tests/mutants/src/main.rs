//! Mutation testing of the core: small changes of its source, of which its tests should notice each.
//!
//! A build for each change would take days. So all changes are put into one build of a copy of the workspace
//! (`rewrite`, `copy`), which asks at run time which of them acts (`chosen`); then the tests that come by a
//! change are run on it until one fails (`run`).

mod copy;
mod rewrite;
mod run;

use std::collections::HashMap;
use std::collections::hash_map::Entry;
use std::fs::OpenOptions;
use std::num::ParseIntError;
use std::path::{Path, PathBuf};
use std::str::FromStr;
use std::sync::Mutex;

use anyhow::{Context, Result};
use clap::Parser;

use crate::copy::Copy;
use crate::rewrite::Mutant;
use crate::run::{Fate, Outcome, explore, judge};

/// Changes the core's source in many small ways, one at a time, and tells which of them no test notices.
#[derive(Parser)]
struct Args {
    /// Rooms of the core to change, one after the other: folders or files below `core/src`, without their
    /// ending; `section/solver:150` runs on no more than 150 mutants, spread over the room
    #[arg(required = true)]
    rooms: Vec<Room>,
    /// Folder for the copy of the workspace, what was built and `results.csv`; what is there is gone on with
    #[arg(long, default_value = "target/mutants")]
    folder: PathBuf,
    /// Only where the mutant's file, column, change and line of source contain this
    #[arg(long, default_value = "")]
    only: String,
    /// Run again on those that had survived
    #[arg(long)]
    again: bool,
    /// Run the checks against published values too: a longer build
    #[arg(long)]
    outside: bool,
    /// Only tests with this in their name; those they leave alive another run can go on with
    #[arg(long, default_value = "")]
    by: String,
    /// Seconds of tests on each mutant, as they take without one; a test that takes longer is left out
    #[arg(long, default_value_t = 20.0)]
    seconds: f64,
    /// Mutants run at the same time
    #[arg(long, default_value_t = 1)]
    jobs: usize,
}

/// A part of the core, with how many of its mutants to run.
#[derive(Clone)]
struct Room {
    name: String,
    most: usize,
}

impl FromStr for Room {
    type Err = ParseIntError;

    fn from_str(text: &str) -> Result<Self, ParseIntError> {
        let (name, most) = text.split_once(':').unwrap_or((text, ""));
        let most = if most.is_empty() { usize::MAX } else { most.parse()? };
        Ok(Self { name: name.to_owned(), most })
    }
}

fn main() -> Result<()> {
    let args = Args::parse();
    let workspace = Path::new(env!("CARGO_MANIFEST_DIR")).join("../..").canonicalize()?;
    let folder = workspace.join(&args.folder);
    std::fs::create_dir_all(&folder)?;
    let rooms: Vec<&str> = args.rooms.iter().map(|room| room.name.as_str()).collect();
    let (copy, mutants) = Copy::make(&workspace, &folder.join("copy"), &rooms)?;
    let results = folder.join("results.csv");
    let mut known = read(&results)?;
    if args.again {
        known.retain(|_, o| o.fate != Fate::Survived && o.fate != Fate::Unreached);
    }
    let wanted = wanted(&args, &mutants, &known);
    eprintln!("{} mutants, {} to run; building the tests", mutants.len(), wanted.len());
    let programs = copy.tests(args.outside)?;
    let tests = explore(&programs, &args.by, &folder, (args.jobs, args.seconds))?;
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

/// The results so far by mutant: of each what most is known of, that it died, else that some tests let it live.
fn read(results: &Path) -> Result<HashMap<String, Outcome>> {
    let mut known: HashMap<String, Outcome> = HashMap::new();
    if !results.exists() {
        return Ok(known);
    }
    for row in csv::Reader::from_path(results)?.into_deserialize() {
        let row: Outcome = row.context("results.csv")?;
        match known.entry(row.mutant.clone()) {
            Entry::Vacant(place) => drop(place.insert(row)),
            Entry::Occupied(mut place) if row.fate <= place.get().fate => drop(place.insert(row)),
            Entry::Occupied(_) => {}
        }
    }
    Ok(known)
}

/// The room a mutant belongs to: the one with the longest name that fits.
fn room(mutant: &Mutant, rooms: &[Room]) -> usize {
    let path = mutant.key.trim_start_matches("core/src/");
    let fits = |i: &usize| path.starts_with(&rooms[*i].name);
    (0..rooms.len()).filter(fits).max_by_key(|i| rooms[*i].name.len()).unwrap_or(0)
}

/// What is to be run: room by room, in each the first so many in an order that has nothing to do with the
/// source's.
fn wanted(args: &Args, mutants: &[Mutant], known: &HashMap<String, Outcome>) -> Vec<Mutant> {
    let scrambled = |m: &Mutant| m.number.wrapping_mul(2_654_435_761).rotate_left(16);
    let mut order: Vec<&Mutant> = mutants.iter().filter(|m| m.key.contains(&args.only)).collect();
    order.sort_by_key(|m| (room(m, &args.rooms), scrambled(m)));
    let mut taken = vec![0; args.rooms.len()];
    order.retain(|m| {
        let i = room(m, &args.rooms);
        taken[i] += 1;
        taken[i] <= args.rooms[i].most
    });
    order.into_iter().filter(|m| !known.contains_key(&m.key)).cloned().collect()
}

/// Counts by room, and every mutant that no test noticed.
fn tell(known: &HashMap<String, Outcome>, mutants: &[Mutant], rooms: &[Room]) {
    let mut counts = vec![[0; 5]; rooms.len()];
    for mutant in mutants {
        let count = &mut counts[room(mutant, rooms)];
        count[0] += 1;
        let Some(outcome) = known.get(&mutant.key) else { continue };
        count[1 + outcome.fate as usize] += 1;
        if matches!(outcome.fate, Fate::Survived | Fate::Unreached) {
            let Outcome { fate, tried, reach, mutant: key, .. } = outcome;
            println!("{fate:?} ({tried} of {reach} tests) line {} of {key}", mutant.line);
        }
    }
    for (room, [all, killed, hung, survived, unreached]) in rooms.iter().zip(counts) {
        let fates = format!("{killed} killed, {hung} hung, {survived} survived, {unreached} unreached");
        println!("{}: {all} mutants, {fates}", room.name);
    }
}
