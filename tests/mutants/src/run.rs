//! Runs tests on mutants: first each test alone without a mutant, for its time and for which mutants it
//! reaches; then on each mutant those that reach it, until one fails.

use std::collections::{HashMap, HashSet};
use std::fs;
use std::path::Path;
use std::process::{Command, Stdio};
use std::sync::Mutex;
use std::sync::atomic::{AtomicUsize, Ordering::Relaxed};
use std::time::Instant;

use anyhow::{Result, ensure};
use serde::{Deserialize, Serialize};

use crate::copy::Program;
use crate::rewrite::Mutant;

/// A test may take so many times as long as without a mutant, and so many seconds more.
const PATIENCE: (f64, f64) = (5.0, 2.0);
/// Memory of a test, KiB.
const MOST_MEMORY: u32 = 6_000_000;

/// One test, as it is without a mutant.
pub struct Test<'a> {
    program: &'a Program,
    name: String,
    seconds: f64,
    reached: HashSet<u32>,
}

/// What became of a mutant, in the order of what is known then.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Fate {
    /// A test failed.
    Killed,
    /// A test did not come to an end.
    Hung,
    /// Every test that was tried passed.
    Survived,
    /// No test comes there.
    Unreached,
}

/// A line of the results.
#[derive(Debug, Clone, Serialize, Deserialize)]
pub struct Outcome {
    /// Its key.
    pub mutant: String,
    /// What became of it.
    pub fate: Fate,
    /// The test that found it.
    pub by: String,
    /// How many tests were tried on it, of how many that reach it.
    pub tried: usize,
    /// How many tests reach it.
    pub reach: usize,
}

/// What a test came to.
enum End {
    Passed,
    Failed,
    TooLong,
}

/// One test by its name, with a variable of the environment.
fn run(program: &Program, name: &str, most_seconds: f64, (key, value): (&str, &str)) -> Result<End> {
    // `timeout` ends what a test has started too.
    let limited = format!("ulimit -v {MOST_MEMORY}; exec timeout -k 1 {most_seconds:.1} \"$0\" \"$@\"");
    let status = Command::new("sh")
        .args(["-c", &limited])
        .arg(&program.file)
        .args(["--exact", name, "--test-threads", "1"])
        .env(key, value)
        .current_dir(&program.folder)
        .stdin(Stdio::null())
        .stdout(Stdio::null())
        .stderr(Stdio::null())
        .status()?;
    Ok(match status.code() {
        Some(0) => End::Passed,
        Some(124 | 137) => End::TooLong,
        _ => End::Failed,
    })
}

/// Every test of the programs with `by` in its name that ends within `most_seconds`, with its time and the
/// mutants it reaches.
///
/// # Errors
/// Where a program cannot be run or a test fails without a mutant.
pub fn explore<'a>(
    programs: &'a [Program],
    by: &str,
    scratch: &Path,
    (jobs, most_seconds): (usize, f64),
) -> Result<Vec<Test<'a>>> {
    let mut all = Vec::new();
    for program in programs {
        let listed = Command::new(&program.file).args(["--list", "--format", "terse"]).output()?;
        let listed = String::from_utf8(listed.stdout)?;
        let names = listed.lines().filter_map(|l| l.strip_suffix(": test")).filter(|name| name.contains(by));
        all.extend(names.map(|name| (program, name.to_owned())));
    }
    let tests = Mutex::new(Vec::new());
    side_by_side(jobs, &all, |(program, name)| {
        // Two programs can have a test of the same name.
        let of = program.file.file_stem().unwrap_or_default().to_string_lossy();
        let list = scratch.join(format!("{of}.{}.reached", name.replace("::", ".")));
        fs::write(&list, "")?;
        let started = Instant::now();
        let end = run(program, name, most_seconds, ("SPOKESHAVE_REACHED", &list.to_string_lossy()))?;
        ensure!(!matches!(end, End::Failed), "{name} fails without a mutant");
        if matches!(end, End::Passed) {
            let reached = fs::read_to_string(&list)?.lines().filter_map(|n| n.parse().ok()).collect();
            let seconds = started.elapsed().as_secs_f64();
            let test = Test { program, name: name.clone(), seconds, reached };
            tests.lock().expect("no panic").push(test);
        }
        Ok(fs::remove_file(list)?)
    })?;
    Ok(tests.into_inner().expect("no panic"))
}

/// Work on each of some things, so many at a time.
fn side_by_side<T: Sync>(jobs: usize, things: &[T], work: impl Fn(&T) -> Result<()> + Sync) -> Result<()> {
    let next = AtomicUsize::new(0);
    let worker = || {
        let taken = || things.get(next.fetch_add(1, Relaxed));
        std::iter::from_fn(taken).try_for_each(&work)
    };
    std::thread::scope(|scope| {
        let workers: Vec<_> = (0..jobs).map(|_| scope.spawn(worker)).collect();
        workers.into_iter().try_for_each(|w| w.join().expect("no panic"))
    })
}

/// Runs tests on mutants, `jobs` at a time, for at most about `budget` seconds each, and tells of each as it
/// is done.
///
/// # Errors
/// Where a program cannot be run.
pub fn judge(
    tests: &[Test],
    mutants: &[Mutant],
    (jobs, budget): (usize, f64),
    told: impl Fn(&Outcome) -> Result<()> + Sync,
) -> Result<()> {
    let kills: Mutex<HashMap<String, u32>> = Mutex::new(HashMap::new());
    side_by_side(jobs, mutants, |mutant| {
        let order = ordered(tests, mutant.number, &kills.lock().expect("no panic"));
        let outcome = fate(&order, mutant, budget)?;
        *kills.lock().expect("no panic").entry(outcome.by.clone()).or_default() += 1;
        told(&outcome)
    })
}

/// The tests that reach a mutant: quick ones and those that have found many first.
fn ordered<'a, 't>(tests: &'t [Test<'a>], mutant: u32, kills: &HashMap<String, u32>) -> Vec<&'t Test<'a>> {
    let cost = |t: &Test| t.seconds / f64::from(1 + kills.get(&t.name).copied().unwrap_or(0));
    let mut order: Vec<&Test> = tests.iter().filter(|t| t.reached.contains(&mutant)).collect();
    order.sort_by(|a, b| cost(a).total_cmp(&cost(b)));
    order
}

fn fate(order: &[&Test], mutant: &Mutant, budget: f64) -> Result<Outcome> {
    let mut spent = 0.0;
    let told = |fate, by: &str, tried| Outcome {
        mutant: mutant.key.clone(),
        fate,
        by: by.to_owned(),
        tried,
        reach: order.len(),
    };
    let mut tried = 0;
    for test in order {
        if spent + test.seconds > budget {
            continue;
        }
        (spent, tried) = (spent + test.seconds, tried + 1);
        let most = PATIENCE.0 * test.seconds + PATIENCE.1;
        match run(test.program, &test.name, most, ("SPOKESHAVE_MUTANT", &mutant.number.to_string()))? {
            End::Passed => {}
            End::Failed => return Ok(told(Fate::Killed, &test.name, tried)),
            End::TooLong => return Ok(told(Fate::Hung, &test.name, tried)),
        }
    }
    Ok(told(if tried > 0 { Fate::Survived } else { Fate::Unreached }, "", tried))
}
