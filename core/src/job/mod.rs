//! The job file: reading, checking, writing. Every error names its path, the value and what is allowed.

mod altitude_law;
mod by_kind;
mod check;
mod demo;
mod document;
mod drag;
mod error;
mod found;
mod once;
mod own;

pub use check::{most_governed_rpm, section_name_known};
pub use demo::{DEMOS, Demo};
pub use document::{
    Aeroplane, Aim, Aircraft, AltitudeLaw, AngleReference, Battery, BladeReading, Carved, CarvedBlade, Drag,
    Electric, Engine, Factors, Figure, Flange, FlightPoint, Held, HeldTo, HeldToKind, Hub, Interpolation,
    Job, Limits, LinePoint, LoadPoint, LogReading, Logbook, Making, Method, Multirotor, OwnMaterial, Piston,
    PitchControl, PowerPoint, Propeller, Rotation, RpmLimit, Section, Setting, Species, Station,
    StressLimits, TipLoss, USUAL_SPECIES, Widths, Wishes, Wood,
};
pub use error::{JobError, MOST_BYTES, Problem, VERSION};

use once::Once;
use serde_json::Value;

impl Job {
    /// Reads and checks a job file.
    ///
    /// # Errors
    /// The first thing wrong with its size, syntax, version or shape; else every value that is not allowed.
    ///
    /// ```
    /// use spokeshave::job::{DEMOS, Job};
    /// let job = Job::from_json(DEMOS[0].json).unwrap();
    /// assert!(job.propeller.blades > 0);
    /// ```
    pub fn from_json(text: &str) -> Result<Self, JobError> {
        if text.len() > MOST_BYTES {
            return Err(JobError::TooLarge { found_bytes: text.len() });
        }
        let Once(value) =
            serde_json::from_str(text.trim_start_matches('\u{feff}')).map_err(|e| syntax_error(text, &e))?;
        check_version(&value)?;
        let job: Self = serde_path_to_error::deserialize(value).map_err(|e| shape_error(&e))?;
        match job.check() {
            problems if problems.is_empty() => Ok(job),
            problems => Err(JobError::Values(problems)),
        }
    }

    /// The job as a file's text. Reading it back gives the same job.
    #[must_use]
    pub fn to_json(&self) -> String {
        // Plain structs of numbers and text always serialise.
        serde_json::to_string_pretty(self).unwrap_or_default()
    }

    /// Every value that is not allowed.
    #[must_use]
    pub fn check(&self) -> Vec<Problem> {
        check::problems(self)
    }

    /// Every value of the propeller alone that is not allowed.
    #[must_use]
    pub fn check_propeller(&self) -> Vec<Problem> {
        check::propeller_problems(self)
    }
}

fn check_version(value: &Value) -> Result<(), JobError> {
    match value.get("spokeshave") {
        Some(v) if v.as_u64() == Some(u64::from(VERSION)) => Ok(()),
        Some(other) => Err(JobError::Version { found: other.to_string() }),
        None => Err(JobError::NoVersion),
    }
}

fn syntax_error(file: &str, e: &serde_json::Error) -> JobError {
    let text = e.to_string();
    let message = match text.rsplit_once(" at line ") {
        _ if file.trim_start().starts_with('<') => {
            "this is a page; a page with a job inside opens in the browser itself"
        }
        _ if !file.trim_start_matches('\u{feff}').trim_start().starts_with('{') => {
            "a job file is text that begins with {; this is something else"
        }
        _ if e.is_eof() => "the text ends in the middle; part of the file is missing",
        Some((what, _)) => what,
        None => &text,
    };
    // What is JSON and refused all the same has a key twice (`once`).
    let message = if e.is_data() { message.into() } else { format!("not JSON: {message}") };
    JobError::Syntax { line: e.line(), column: e.column(), message }
}

fn shape_error(e: &serde_path_to_error::Error<serde_json::Error>) -> JobError {
    let (outer, text) = (e.path().to_string(), e.inner().to_string());
    let (inner, message) = text.rsplit_once(by_kind::PATH_MARK).unwrap_or(("", &text));
    // A kind inside a kind leaves a mark between each part of the path.
    let inner = inner.replace(by_kind::PATH_MARK, ".");
    let path = [outer.as_str(), &inner]
        .into_iter()
        .filter(|p| !p.is_empty() && *p != ".")
        .collect::<Vec<_>>()
        .join(".");
    JobError::Shape {
        path: if path.is_empty() { "the file".into() } else { path },
        message: in_words(message),
    }
}

/// The reader's own words in plain ones: names of types, unknown words, missing keys.
fn in_words(message: &str) -> String {
    let unknown = message.strip_prefix("unknown variant ").and_then(|rest| rest.split_once(", expected "));
    if let Some((found, allowed)) = unknown {
        return format!("{found}; allowed is {allowed}");
    }
    if let Some(key) = message.strip_prefix("missing field ") {
        return format!("the key {key} is missing");
    }
    let plain = [
        ("expected f64", "a number is asked"),
        ("expected u32", "a whole number is asked"),
        ("expected a boolean", "true or false is asked"),
    ];
    plain.iter().fold(message.to_string(), |text, (name, words)| text.replace(name, words))
}

/// The JSON Schema of the job file.
#[cfg(feature = "cli")]
#[must_use]
pub fn schema() -> Value {
    schemars::schema_for!(Job).to_value()
}
