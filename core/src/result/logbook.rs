//! What the logbook tells, and what to change.

use serde::Serialize;

use super::{Compared, RemovalPlan, State};
use crate::job::{Factors, Widths};

/// What the readings tell.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Logged {
    /// Version of the contract.
    pub spokeshave: u32,
    /// The job's title.
    pub title: String,
    /// Whether the propeller is the carved one, by its readings, or the drawn one.
    pub as_carved: bool,
    /// The factors, their uncertainty, and what can be told apart.
    pub estimate: Estimate,
    /// Each reading.
    pub readings: Vec<LogLine>,
    /// Every flight point without (`drawn`) and with the factors (`shaped`).
    pub flight_points: Vec<Compared>,
}

/// The factors as found.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Estimate {
    /// The factors.
    pub factors: Factors,
    /// What was thought of them before.
    pub widths: Widths,
    /// Each with its uncertainty: engine power, drag area, propeller power, consumption.
    pub found: Vec<FactorFound>,
    /// Pairs that the readings do not tell apart.
    pub pairs: Vec<Pair>,
    /// What is worth saying, in plain words.
    pub remarks: Vec<String>,
}

/// One factor.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct FactorFound {
    /// Its key in the job file.
    pub name: &'static str,
    /// What it is, in words.
    pub title: &'static str,
    /// The factor.
    pub value: f64,
    /// Standard deviation, as a share.
    pub deviation: f64,
    /// Standard deviation before anything was read, as a share.
    pub width: f64,
    /// Whether the readings tell it: they have narrowed it to less than six tenths of what was thought
    /// before.
    pub told: bool,
}

/// So many times as far from the job's figure as was thought likely before, a factor tells of readings that disagree.
const FAR: f64 = 2.0;

impl FactorFound {
    /// Whether it lies far from what was thought before.
    #[must_use]
    pub fn is_far(&self) -> bool {
        (self.value - 1.0).abs() > FAR * self.width
    }

    /// What the readings say of it, in a few words.
    #[must_use]
    pub fn says(&self) -> &'static str {
        match (self.told, self.is_far()) {
            (true, false) => "told by the readings",
            (true, true) => "told by the readings, far from what was thought before: check them",
            (false, true) => "far from what was thought before: the readings disagree, check them",
            (false, false) => "not told: mostly what was thought before",
        }
    }
}

/// Two factors of which the readings tell the quotient or the product better than either.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Pair {
    /// One.
    pub first: &'static str,
    /// The other.
    pub second: &'static str,
    /// Correlation of their logarithms.
    pub correlation: f64,
    /// First over second, or first times second where the correlation is below zero.
    pub value: f64,
    /// Its standard deviation, as a share.
    pub deviation: f64,
}

/// One reading beside what is expected.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LogLine {
    /// Engine rpm as read, where it was.
    pub engine_rpm: Option<f64>,
    /// Engine rpm expected without the factors.
    pub before_rpm: Option<f64>,
    /// Engine rpm expected with the factors.
    pub after_rpm: Option<f64>,
    /// Fuel flow (kg/h) or current (A) as read.
    pub consumption: Option<f64>,
    /// The same expected at the rpm as read, without the factors.
    pub before_consumption: Option<f64>,
    /// The same with the factors.
    pub after_consumption: Option<f64>,
    /// How far off it is with the factors, in standard deviations of its own errors; `None` where it tells
    /// nothing.
    pub off: Option<f64>,
    /// Whether it is so far off that it was left out.
    pub outlier: bool,
    /// What is worth saying of it: why it tells nothing, or what may have happened.
    pub remark: String,
}

/// How a propeller can be changed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Means {
    /// The whole blade is turned.
    Pitch,
    /// The outer half is turned, from nothing at half the radius to the whole at the tip.
    Twist,
    /// The tips are trimmed or, where there is no wood yet, drawn longer.
    Diameter,
}

/// One way to what is wanted.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Change {
    /// The way.
    pub means: Means,
    /// How much: degrees, or metres of diameter; the most that can be had where it is not reached.
    pub amount: f64,
    /// Whether what is wanted is reached.
    pub reached: bool,
    /// What is had.
    pub had: Option<f64>,
    /// Whether the flight point has an answer.
    pub state: State,
    /// Whether it is done by taking wood off the carved blade.
    pub by_removal: bool,
    /// How far the blade then has turned, degrees: at three quarters of the radius, or at the tip where only
    /// the outer half turns; less than `amount` where wood sets a bound.
    pub had_deg: Option<f64>,
    /// What to take off carved blades, and what comes of it.
    pub plan: Option<RemovalPlan>,
    /// Why it cannot be told what to take off, in a sentence, where it is by removal and cannot.
    pub no_plan: Option<String>,
    /// Diameter after the change, m.
    pub diameter_m: f64,
    /// Geometric pitch at 0.75 R after the change, m.
    pub pitch_m: f64,
    /// Every flight point before (`drawn`) and after (`shaped`).
    pub flight_points: Vec<Compared>,
}

/// What is nothing of a change: degrees, or metres of diameter.
const NOTHING: f64 = 1e-6;

impl Change {
    /// The change in a sentence, a length said by `length`.
    #[must_use]
    pub fn says(&self, length: &dyn Fn(f64) -> String) -> String {
        let name = match self.means {
            Means::Pitch => "Turning the whole blade",
            Means::Twist => "Turning the outer half",
            Means::Diameter if self.by_removal => "Trimming the tips",
            Means::Diameter => "Another diameter",
        };
        if self.is_in_vain() {
            return format!("{name} brings it no nearer.");
        }
        let degrees = |d: f64| format!("{d:+.2}°").replace('-', "\u{2212}");
        let amount = match self.means {
            Means::Diameter => length(self.amount),
            Means::Pitch | Means::Twist => degrees(self.had_deg.unwrap_or(self.amount)),
        };
        let planing = if self.plan.is_some() { ", by planing the face" } else { "" };
        let no_plan = self.no_plan.as_ref().map_or_else(String::new, |why| format!(" {why}"));
        let change = match self.means {
            Means::Pitch => {
                format!("The whole blade turned, by {amount} at three quarters of the radius{planing}.")
            }
            Means::Twist => format!(
                "The outer half turned, from nothing at half the radius to {amount} at the tip{planing}."
            ),
            Means::Diameter => format!("{name}: {amount} of diameter."),
        };
        change + &no_plan
    }

    /// Whether there is nothing to be had of it.
    #[must_use]
    pub fn is_in_vain(&self) -> bool {
        !self.reached && self.amount.abs() < NOTHING
    }

    /// A sentence on the flight points at which the change would pass the limit rpm where nothing did before.
    #[must_use]
    pub fn says_limit(&self) -> Option<String> {
        let passes = |p: &&Compared| p.shaped.held_at_limit && !p.drawn.held_at_limit;
        let names: Vec<&str> =
            self.flight_points.iter().filter(passes).map(|p| p.shaped.name.as_str()).collect();
        let says = || {
            format!(
                "Full throttle would then pass the limit rpm at {}: throttle back there.",
                names.join(", ")
            )
        };
        (!names.is_empty()).then(says)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_plan_that_fails_says_why() {
        let mut change = Change {
            means: Means::Pitch,
            amount: -1.0,
            reached: true,
            had: Some(2_600.0),
            state: State::Ok,
            by_removal: true,
            had_deg: Some(-1.0),
            plan: None,
            no_plan: None,
            diameter_m: 1.52,
            pitch_m: 1.1,
            flight_points: Vec::new(),
        };
        let says = change.says(&|m| m.to_string());
        change.no_plan = Some("What to take off cannot be told: the wood is not known.".into());
        let told = change.says(&|m| m.to_string());
        assert_eq!(told, says + " What to take off cannot be told: the wood is not known.");
    }
}
