//! `--vary`: any number of a job file, or two, over a span.

use std::str::FromStr;

use serde_json::{Number, Value};
use spokeshave::job::Job;
use spokeshave::rig::Rig;

use crate::input::{JobSource, Stop};
use crate::table::csv_figure;

/// Most jobs of one run.
const MOST: u32 = 20_000;

#[derive(clap::Args)]
pub(crate) struct VaryArgs {
    /// Work out the job for n values from a to b of a number in the file, by its path, and print CSV; twice
    /// for two numbers
    #[arg(long, value_name = "PATH=A..B:N", conflicts_with_all = ["json"])]
    vary: Vec<Vary>,
}

/// A number of the job file and the values it takes.
#[derive(Clone, Debug, PartialEq)]
pub(crate) struct Vary {
    path: String,
    from: f64,
    to: f64,
    count: u32,
}

impl FromStr for Vary {
    type Err = String;

    fn from_str(text: &str) -> Result<Self, String> {
        let wrong = || "allowed is PATH=A..B:N, such as propeller.diameter_m=1.4..1.7:31".to_string();
        let (path, span) = text.split_once('=').ok_or_else(wrong)?;
        let (ends, count) = span.rsplit_once(':').ok_or_else(wrong)?;
        let (from, to) = ends.split_once("..").ok_or_else(wrong)?;
        let number = |s: &str| s.trim().parse().ok().filter(|x: &f64| x.is_finite()).ok_or_else(wrong);
        let count = count.trim().parse().ok().filter(|n| (1..=MOST).contains(n)).ok_or_else(wrong)?;
        Ok(Self { path: path.trim().into(), from: number(from)?, to: number(to)?, count })
    }
}

impl Vary {
    fn value(&self, i: u32) -> f64 {
        let share = f64::from(i) / f64::from(self.count.saturating_sub(1).max(1));
        self.from + (self.to - self.from) * share
    }
}

impl VaryArgs {
    /// Whether anything is varied.
    pub(crate) fn any(&self) -> bool {
        !self.vary.is_empty()
    }

    /// The paths, as headings.
    pub(crate) fn paths(&self) -> impl Iterator<Item = &str> {
        self.vary.iter().map(|v| v.path.as_str())
    }

    /// Works out every job: `told` gives the rows of one, which are put behind the varied values.
    pub(crate) fn rows(
        &self,
        source: &JobSource,
        mut told: impl FnMut(&Rig) -> Result<Vec<Vec<String>>, Stop>,
    ) -> Result<Vec<Vec<String>>, Stop> {
        if self.vary.len() > 2 {
            return Err(Stop::bad("--vary: at most two numbers may vary"));
        }
        let count: u32 = self.vary.iter().map(|v| v.count).try_fold(1, u32::checked_mul).unwrap_or(u32::MAX);
        if count > MOST {
            return Err(Stop::BadInput(format!("--vary: {count} jobs; at most {MOST}")));
        }
        let (place, text) = source.text()?;
        // What is wrong with the file itself is said first.
        Job::from_json(&text).map_err(|e| Stop::BadInput(format!("{place}: {e}")))?;
        let document: Value = serde_json::from_str(text.trim_start_matches('\u{feff}')).map_err(Stop::bad)?;
        let mut rows = Vec::new();
        for i in 0..count {
            let values = self.values(i);
            let mut changed = document.clone();
            for (vary, value) in self.vary.iter().zip(&values) {
                set(&mut changed, &vary.path, *value)?;
            }
            let job =
                Job::from_json(&changed.to_string()).map_err(|e| Stop::BadInput(format!("--vary: {e}")))?;
            let rig = Rig::new(&job).map_err(|e| Stop::BadInput(format!("--vary: {e}")))?;
            let lead: Vec<String> = values.iter().map(|v| csv_figure(Some(*v))).collect();
            rows.extend(told(&rig)?.into_iter().map(|row| [lead.clone(), row].concat()));
        }
        Ok(rows)
    }

    /// The values of one job; the last number varies fastest.
    fn values(&self, index: u32) -> Vec<f64> {
        match self.vary.as_slice() {
            [a, b] => vec![a.value(index / b.count), b.value(index % b.count)],
            all => all.iter().map(|v| v.value(index)).collect(),
        }
    }
}

/// Puts a number at a path such as `propeller.stations[3].chord_m`. A name that is not there yet is added to
/// its object, so that optional numbers can vary; the job's check refuses one that it does not know.
fn set(document: &mut Value, path: &str, value: f64) -> Result<(), Stop> {
    let missing = |at: &str| Stop::BadInput(format!("--vary: {path}: the job has no {at}"));
    let (parent, name) = path.rsplit_once('.').unwrap_or(("", path));
    let mut place = &mut *document;
    for step in parent.split('.').filter(|s| !s.is_empty()) {
        let (key, index) = indexed(step);
        place = place.get_mut(key).ok_or_else(|| missing(step))?;
        if let Some(i) = index {
            place = place.get_mut(i).ok_or_else(|| missing(step))?;
        }
    }
    let old = place.get(name);
    if old.is_some_and(|old| !old.is_number()) {
        return Err(Stop::BadInput(format!("--vary: {path}: not a number in the job")));
    }
    // A count stays a count.
    let whole = old.is_some_and(Value::is_u64) && value.fract() == 0.0 && (0.0..1e9).contains(&value);
    let number = if whole { Some(Number::from(value as u64)) } else { Number::from_f64(value) };
    let object = place.as_object_mut().ok_or_else(|| missing(name))?;
    object.insert(name.into(), number.map_or(Value::Null, Value::Number));
    Ok(())
}

/// A step of a path with the index it may carry.
fn indexed(step: &str) -> (&str, Option<usize>) {
    step.strip_suffix(']')
        .and_then(|s| s.split_once('['))
        .and_then(|(key, i)| i.parse().ok().map(|i| (key, Some(i))))
        .unwrap_or((step, None))
}
