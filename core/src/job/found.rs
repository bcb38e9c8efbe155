//! Problems of a job as they are found.

use std::fmt::Display;
use std::ops::RangeInclusive;

use super::error::Problem;

/// Collects problems as they are found.
#[derive(Default)]
pub(super) struct Found(pub(super) Vec<Problem>);

impl Found {
    pub(super) fn refuse(&mut self, path: String, found: impl Display, allowed: impl Into<String>) {
        let (found, allowed) = (found.to_string(), allowed.into());
        self.0.push(Problem { path, found, allowed, span: None, above_lowest: false });
    }

    /// The same, where the lowest value itself is not allowed.
    pub(super) fn above(&mut self, lowest: f64, highest: f64) {
        self.within(lowest, highest);
        self.0.iter_mut().last().into_iter().for_each(|problem| problem.above_lowest = true);
    }

    /// Says of the latest problem what span of values is allowed.
    pub(super) fn within(&mut self, lowest: f64, highest: f64) {
        if let Some(problem) = self.0.last_mut() {
            problem.span = Some((lowest, highest));
        }
    }

    /// A NaN is in no range, so it is refused.
    pub(super) fn range(&mut self, path: String, value: f64, range: RangeInclusive<f64>, unit: &str) {
        if !range.contains(&value) {
            let unit = if unit.is_empty() { String::new() } else { format!(" {unit}") };
            self.refuse(
                path,
                told(value),
                format!("{} to {}{unit}", short(*range.start(), &range), short(*range.end(), &range)),
            );
            self.within(*range.start(), *range.end());
        }
    }

    pub(super) fn optional(
        &mut self,
        path: String,
        value: Option<f64>,
        range: RangeInclusive<f64>,
        unit: &str,
    ) {
        if let Some(value) = value {
            self.range(path, value, range, unit);
        }
    }

    pub(super) fn count(&mut self, path: &str, found: usize, range: RangeInclusive<usize>) {
        if !range.contains(&found) {
            self.refuse(path.into(), found, format!("{} to {}", range.start(), range.end()));
        }
    }
}

/// A value as it stands in a job file; in powers of ten where nobody would count its digits.
fn told(value: f64) -> String {
    if value != 0.0 && !(1e-9..1e15).contains(&value.abs()) {
        format!("{value:e}")
    } else {
        value.to_string()
    }
}

/// A bound to six figures, as people read it; all of it where that would lie outside what is allowed.
fn short(bound: f64, range: &RangeInclusive<f64>) -> f64 {
    let size = bound.abs();
    if !(1e-9..1e9).contains(&size) {
        return bound;
    }
    let unit = 10_f64.powi(5 - size.log10().floor() as i32);
    let short = (bound * unit).round() / unit;
    if range.contains(&short) { short } else { bound }
}
