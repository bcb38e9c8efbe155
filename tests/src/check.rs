//! One outside check: what the program says beside what a source outside it says, and how far apart they
//! may lie.

use std::fmt;

/// How a source's values were had.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Mark {
    /// Read in the source, or in a copy of its figures.
    Read,
    /// Worked out from the source's formulas, or by an independent program.
    Computed,
    /// Recalled, not looked up.
    FromMemory,
    /// What people of the trade do or say; no one source.
    CommonPractice,
}

impl fmt::Display for Mark {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::Read => "read",
            Self::Computed => "computed",
            Self::FromMemory => "from memory",
            Self::CommonPractice => "common practice",
        })
    }
}

/// What checks rest on: where the expected values come from, and why the tolerance is what it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Basis {
    /// Author, title, year; or how the values were computed.
    pub source: &'static str,
    /// How the values were had.
    pub mark: Mark,
    /// Why the tolerance is what it is.
    pub why: &'static str,
}

impl Basis {
    /// A check that may be off by `tolerance`, in the unit of the values.
    #[must_use]
    pub fn within(self, what: impl Into<String>, got: f64, expected: f64, tolerance: f64) -> Check {
        let what = what.into();
        Check { what, expected, got, unit: "", tolerance, basis: self, of: 1, known_miss: None }
    }

    /// A check that may be off by a share of what is expected.
    #[must_use]
    pub fn relative(self, what: impl Into<String>, got: f64, expected: f64, share: f64) -> Check {
        self.within(what, got, expected, share * expected.abs())
    }

    /// A check against a span.
    #[must_use]
    pub fn between(self, what: impl Into<String>, got: f64, low: f64, high: f64) -> Check {
        self.within(what, got, 0.5 * (low + high), 0.5 * (high - low))
    }
}

/// One check, or the worst of several.
#[derive(Clone, Debug)]
pub struct Check {
    /// What is compared.
    pub what: String,
    /// What the source says.
    pub expected: f64,
    /// What the program says.
    pub got: f64,
    /// Unit of both; nothing for plain numbers.
    pub unit: &'static str,
    /// How far apart they may lie, in the same unit.
    pub tolerance: f64,
    /// Source, mark, reason of the tolerance.
    pub basis: Basis,
    /// Of how many checks this is the one that comes nearest to its tolerance.
    pub of: usize,
    /// Why it misses, where that is known.
    pub known_miss: Option<&'static str>,
}

impl Check {
    /// The same with a unit.
    #[must_use]
    pub fn unit(self, unit: &'static str) -> Self {
        Self { unit, ..self }
    }

    /// The same, known to miss for a reason.
    #[must_use]
    pub fn misses(self, reason: &'static str) -> Self {
        Self { known_miss: Some(reason), ..self }
    }

    /// Whether the values lie within the tolerance; without an answer they do not.
    #[must_use]
    pub fn holds(&self) -> bool {
        (self.got - self.expected).abs() <= self.tolerance
    }

    /// How much of the tolerance is used up; without end where there is no answer.
    fn strain(&self) -> f64 {
        let share = (self.got - self.expected).abs() / self.tolerance.max(f64::MIN_POSITIVE);
        if share.is_nan() { f64::INFINITY } else { share }
    }

    /// What is wrong: a miss that is not known, or a known one that holds.
    #[must_use]
    pub fn wrong(&self) -> Option<String> {
        let said = match (self.holds(), self.known_miss) {
            (true, None) | (false, Some(_)) => return None,
            (true, Some(_)) => "holds, but is told as a miss",
            (false, None) => "MISSES",
        };
        let Self { what, got, expected, tolerance, unit, .. } = self;
        Some(format!("{what}: got {got}, expected {expected} ± {tolerance} {unit}: {said}"))
    }
}

/// The check of several that uses up most of its tolerance, told for all of them: when it holds, all do.
///
/// # Panics
/// When there is none: a check of nothing proves nothing.
#[must_use]
pub fn worst(what: &str, checks: Vec<Check>) -> Check {
    let of = checks.len();
    // The first one that misses, else the first of those that are alike to three places: the same on every
    // machine.
    let rank = |c: &Check| (u8::from(!c.holds()), (1e3 * c.strain()).round());
    let above = |a: Check, b: Check| if rank(&b) > rank(&a) { b } else { a };
    let worst = checks.into_iter().reduce(above).expect("checks");
    assert!(worst.known_miss.is_none(), "a known miss is told alone");
    let what = if of == 1 { what.into() } else { format!("{what}, worst of {of}: {}", worst.what) };
    Check { what, of, ..worst }
}

#[cfg(test)]
mod tests {
    use super::*;

    const BASIS: Basis = Basis { source: "none", mark: Mark::Computed, why: "none" };

    #[test]
    fn a_miss_is_wrong_unless_known_and_a_known_one_must_miss() {
        let (near, far) = (BASIS.within("a", 1.0, 1.1, 0.2), BASIS.within("a", 1.0, 1.3, 0.2));
        assert!(near.wrong().is_none() && far.wrong().is_some());
        assert!(near.misses("why").wrong().is_some() && far.misses("why").wrong().is_none());
        assert!(BASIS.within("nothing", f64::NAN, 1.0, 1.0).wrong().is_some());
    }

    #[test]
    fn the_worst_of_several_stands_for_all() {
        let one = |got| BASIS.within(format!("{got}"), got, 1.0, 0.5);
        let told = worst("all", vec![one(1.0), one(1.4), one(0.9)]);
        assert_eq!((told.what.as_str(), told.of), ("all, worst of 3: 1.4", 3));
        assert!(worst("all", vec![one(1.0), one(f64::NAN), one(1.6)]).wrong().is_some());
    }
}
