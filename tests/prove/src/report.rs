//! What came of the checks.

use anyhow::Result;
use std::fmt;
use std::time::{Duration, Instant};

/// Count of tests by outcome.
#[derive(Debug, Clone, Copy, Default, PartialEq, Eq)]
pub(crate) struct Tests {
    pub(crate) passed: u64,
    pub(crate) failed: u64,
    pub(crate) ignored: u64,
}

/// What came of the checks.
#[derive(Debug, Default)]
pub(crate) struct Report {
    steps: Vec<Step>,
    tests: Option<Tests>,
    remarks: String,
}

#[derive(Debug)]
struct Step {
    name: &'static str,
    took: Duration,
    error: Option<String>,
}

impl Report {
    /// Runs one check, notes what came of it and gives its result if it passed.
    pub(crate) fn check<T>(&mut self, name: &'static str, check: impl FnOnce() -> Result<T>) -> Option<T> {
        println!("\n== {name}");
        let begun = Instant::now();
        let result = check();
        self.done(name, (result, begun.elapsed()))
    }

    /// Notes what came of a check that has been run and gives its result if it passed.
    pub(crate) fn done<T>(&mut self, name: &'static str, (result, took): (Result<T>, Duration)) -> Option<T> {
        let error = result.as_ref().err().map(|error| format!("{error:#}"));
        if let Some(error) = &error {
            println!("{name}: {error}");
        }
        self.steps.push(Step { name, took, error });
        result.ok()
    }

    /// Notes how many tests ran; a run without any proves nothing and is not clean.
    pub(crate) fn tests(&mut self, tests: Option<Tests>) {
        self.tests = tests;
    }

    /// Notes what is worth knowing of a run that is clean nevertheless; ends with a line's end.
    pub(crate) fn remark(&mut self, remark: String) {
        self.remarks = remark;
    }

    /// Whether everything passed.
    pub(crate) fn is_clean(&self) -> bool {
        let tests = self.tests.is_some_and(|tests| tests.passed > 0 && tests.failed == 0);
        tests && self.steps.iter().all(|step| step.error.is_none())
    }
}

impl fmt::Display for Report {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        writeln!(f, "\n== summary")?;
        for Step { name, took, error } in &self.steps {
            let outcome = if error.is_some() { "FAILED" } else { "ok" };
            writeln!(f, "{outcome:6}  {:4} s  {name}", took.as_secs())?;
        }
        for step in &self.steps {
            if let Some(error) = &step.error {
                writeln!(f, "{}: {error}", step.name)?;
            }
        }
        write!(f, "{}", self.remarks)?;
        let Tests { passed, failed, ignored } = self.tests.unwrap_or_default();
        writeln!(f, "{passed} passed, {failed} failed, {ignored} skipped")
    }
}
