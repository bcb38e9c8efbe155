//! `spokeshave airfoils`: computes the tables of the section families anew, by the section solver, to write
//! them or to compare them with the present ones.
//!
//! The files are the same bit for bit from run to run: the sweeps are independent, their order in the files
//! is fixed, and no figure depends on time or on the count of threads.

mod catalogue;
mod record;

use std::fs;
use std::ops::ControlFlow;
use std::path::{Path, PathBuf};
use std::sync::Mutex;
use std::sync::atomic::{AtomicUsize, Ordering};

use spokeshave::section::outline::Outline;
use spokeshave::section::solver::{Settings, Solved, sweep};

use crate::input::{Outcome, Stop};
use catalogue::{CATALOGUE, Entry};
use record::Share;

/// Reynolds numbers of the tables.
const REYNOLDS: [f64; 10] = [30e3, 50e3, 80e3, 130e3, 220e3, 400e3, 750e3, 1.5e6, 3e6, 6e6];
/// Amplification exponents: quiet air and disturbed air.
const N_CRIT: [f64; 2] = [9.0, 4.0];

#[derive(clap::Args)]
pub(crate) struct Args {
    /// Compute the tables and write them over the present ones
    #[arg(long)]
    rebuild: bool,
    /// Compute the tables and say where the present ones differ
    #[arg(long, conflicts_with = "rebuild")]
    check: bool,
    /// With --check: only this thickness ratio
    #[arg(long, value_name = "T", requires = "check")]
    thickness: Option<f64>,
    /// With --check: only this Reynolds number
    #[arg(long, value_name = "RE", requires = "check")]
    re: Option<f64>,
    /// Only this family, by name
    #[arg(long, value_name = "FAMILY")]
    only: Option<String>,
    /// Folder with one folder for each family
    #[arg(long, value_name = "FOLDER", default_value = "airfoils")]
    folder: PathBuf,
    /// Sweeps to run at a time
    #[arg(long, default_value_t = 2)]
    threads: usize,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let wanted: Vec<&Entry> =
        CATALOGUE.iter().filter(|e| args.only.as_deref().is_none_or(|name| name == e.name)).collect();
    if wanted.is_empty() {
        let names: Vec<&str> = CATALOGUE.iter().map(|e| e.name).collect();
        return Err(Stop::BadInput(format!("no family of that name: {} are known", names.join(", "))));
    }
    if args.check {
        let same: Result<Vec<bool>, Stop> = wanted.into_iter().map(|entry| check(entry, args)).collect();
        return Ok(same?.into_iter().all(|same| same));
    }
    if !args.rebuild {
        for entry in wanted {
            println!("{:<12} {}", entry.name, entry.title);
        }
        println!("\nAdd --rebuild to compute their tables anew, --check to compare: half an hour for all.");
        return Ok(true);
    }
    for entry in wanted {
        rebuild(entry, &args.folder.join(entry.name), args.threads)?;
    }
    Ok(true)
}

/// One polar of a family.
pub(crate) struct Task {
    pub(crate) thickness_ratio: f64,
    pub(crate) settings: Settings,
}

fn tasks(thickness: &[f64]) -> Vec<Task> {
    let mut tasks = Vec::new();
    for n_crit in N_CRIT {
        for &thickness_ratio in thickness {
            for reynolds in REYNOLDS {
                tasks.push(Task { thickness_ratio, settings: Settings::free(reynolds, n_crit) });
            }
        }
    }
    tasks
}

/// Angles of every sweep, degrees.
fn angles_deg() -> Vec<f64> {
    (-20..=40).map(|k| 0.5 * f64::from(k)).collect()
}

fn rebuild(entry: &Entry, folder: &Path, threads: usize) -> Result<(), Stop> {
    let (base, drawn) = draw(entry)?;
    let tasks = tasks(entry.thickness);
    let polars = compute(entry, &tasks, &drawn, threads)?;
    let share = Share::of(&tasks, &polars);
    let write = |name: &str, text: String| {
        let path = folder.join(name);
        fs::create_dir_all(folder)
            .and_then(|()| fs::write(&path, text))
            .map_err(|e| Stop::BadInput(format!("{}: {e}", path.display())))
    };
    write("outline.dat", record::outline(entry, &base))?;
    write("polars.csv", record::polars(&tasks, &polars))?;
    write("family.json", record::family(entry, &drawn, &share))?;
    println!("{}: {share}", entry.name);
    Ok(())
}

/// The outline of a family as defined, and at each thickness of its tables.
fn draw(entry: &Entry) -> Result<(Outline, Vec<Outline>), Stop> {
    let bad = |e| Stop::BadInput(format!("{}: {e}", entry.name));
    let base = (entry.draw)().map_err(bad)?;
    let drawn: Result<Vec<Outline>, _> = entry.thickness.iter().map(|&t| base.scaled_to(t)).collect();
    Ok((base, drawn.map_err(bad)?))
}

/// Computes tables and compares their rows with those of the files, byte for byte; whether all are the same.
fn check(entry: &Entry, args: &Args) -> Outcome {
    let path = args.folder.join(entry.name).join("polars.csv");
    let present =
        fs::read_to_string(&path).map_err(|e| Stop::BadInput(format!("{}: {e}", path.display())))?;
    let asked = |task: &Task| {
        args.thickness.is_none_or(|t| t == task.thickness_ratio)
            && args.re.is_none_or(|re| re == task.settings.reynolds)
    };
    let tasks: Vec<Task> = tasks(entry.thickness).into_iter().filter(asked).collect();
    if tasks.is_empty() {
        return Err(Stop::BadInput(format!(
            "{}: no table of that thickness and Reynolds number",
            entry.name
        )));
    }
    let polars = compute(entry, &tasks, &draw(entry)?.1, args.threads)?;
    let mut other = 0;
    for (task, points) in tasks.iter().zip(&polars) {
        let head = record::head(task);
        let rows = record::rows(task, points);
        if !present.lines().filter(|row| row.starts_with(&head)).eq(rows.lines()) {
            println!("{}: the polar {head} is another one", entry.name);
            other += 1;
        }
    }
    println!("{}: {} of {} polars are the same", entry.name, tasks.len() - other, tasks.len());
    Ok(other == 0)
}

/// Runs all sweeps, some at a time; the results stand in the order of the tasks.
fn compute(
    entry: &Entry,
    tasks: &[Task],
    drawn: &[Outline],
    threads: usize,
) -> Result<Vec<Vec<Solved>>, Stop> {
    let name = entry.name;
    let (next, done) = (AtomicUsize::new(0), AtomicUsize::new(0));
    let results: Mutex<Vec<Option<Vec<Solved>>>> = Mutex::new(vec![None; tasks.len()]);
    let angles = angles_deg();
    let worker = || -> Result<(), Stop> {
        loop {
            let index = next.fetch_add(1, Ordering::Relaxed);
            let Some(task) = tasks.get(index) else { return Ok(()) };
            let at = entry.thickness.iter().position(|&t| t == task.thickness_ratio).unwrap_or(0);
            let points = sweep(&drawn[at], &task.settings, &angles, |_, _, _| ControlFlow::Continue(()))
                .map_err(|e| Stop::BadInput(format!("{name}: {e}")))?;
            if let Ok(mut results) = results.lock() {
                results[index] = Some(points);
            }
            let count = done.fetch_add(1, Ordering::Relaxed) + 1;
            eprint!("\r{name}: {count} of {} polars ", tasks.len());
        }
    };
    std::thread::scope(|scope| {
        let running: Vec<_> = (0..threads.clamp(1, 64)).map(|_| scope.spawn(worker)).collect();
        running.into_iter().try_for_each(|thread| {
            thread.join().unwrap_or_else(|_| Err(Stop::BadInput(format!("{name}: a sweep broke off"))))
        })
    })?;
    eprintln!();
    let results = results.into_inner().unwrap_or_default();
    Ok(results.into_iter().map(Option::unwrap_or_default).collect())
}
