//! Whether a blade holds, and what of it was not judged: names are those of the JSON.

use serde::Serialize;

/// What came of judging a blade and its hub.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Finding {
    /// Everything was judged, and nothing is over its limit.
    Held,
    /// Nothing is over its limit, but not everything was judged.
    HeldAsFarAsJudged,
    /// Something is over its limit.
    OverTheLimit,
    /// No case has an answer.
    NotJudged,
}

/// Whether a blade and its hub hold in every case.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Verdict {
    /// In a word.
    pub finding: Finding,
    /// Least margin of blade and hub, limit over stress less 1; none where no case has an answer.
    pub margin: Option<f64>,
    /// What is over its limit, a clause each.
    pub broken: Vec<String>,
    /// What was not judged and why, a clause each.
    pub missing: Vec<String>,
    /// All of this in a sentence or two.
    pub sentence: String,
}

impl Verdict {
    /// What must be said on every sheet that the blade is made from; `None` for one that holds with
    /// everything judged.
    #[must_use]
    pub fn warning(&self) -> Option<String> {
        match self.finding {
            Finding::Held => None,
            Finding::OverTheLimit => Some(format!("NOT STRONG ENOUGH as drawn: {}.", self.broken.join("; "))),
            Finding::HeldAsFarAsJudged => {
                Some(format!("STRENGTH NOT WHOLLY JUDGED. Missing: {}.", self.missing.join("; ")))
            }
            Finding::NotJudged => Some(format!("STRENGTH NOT JUDGED: {}.", self.missing.join("; "))),
        }
    }
}
