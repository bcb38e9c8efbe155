//! The verdict on blade and hub: what is over its limit, and what was not judged.

use super::WoodError;
use super::strength::Judged;
use crate::drilling::Pattern;
use crate::job::PitchControl;
use crate::result::{CaseResult, Finding, Governing, HubResult, Verdict};
use crate::rig::Rig;

/// Whether a job's blade and hub hold: the verdict of [`strength`](super::strength()) without the rest of the
/// sheet.
///
/// # Errors
/// A species that is not known.
pub fn verdict(rig: &Rig) -> Result<Verdict, WoodError> {
    Judged::new(rig).map(|judged| judged.verdict(rig))
}

/// The verdict of what was judged.
pub(super) fn of(
    rig: &Rig,
    cases: &[CaseResult],
    decides: Option<&Governing>,
    hub: Option<&HubResult>,
) -> Verdict {
    let missing = missing(rig, cases, hub);
    let broken: Vec<String> =
        decides.and_then(of_blade).into_iter().chain(hub.into_iter().flat_map(of_hub)).collect();
    let finding = match (decides, broken.is_empty(), missing.is_empty()) {
        (_, false, _) => Finding::OverTheLimit,
        (None, ..) => Finding::NotJudged,
        (_, _, false) => Finding::HeldAsFarAsJudged,
        _ => Finding::Held,
    };
    let margins = decides.map(|g| g.margin).into_iter().chain(hub.map(|h| h.margin));
    let margin = margins.reduce(f64::min);
    let sentence = sentence(finding, margin, &broken, &missing);
    Verdict { finding, margin, broken, missing, sentence }
}

/// A margin as it is said: limit over stress, less 1.
pub(super) fn percent(margin: f64) -> String {
    format!("{} %", format!("{:+.0}", 100.0 * margin).replace('-', "−").replace("+0", "0").replace("−0", "0"))
}

fn sentence(finding: Finding, margin: Option<f64>, broken: &[String], missing: &[String]) -> String {
    let least = margin.map_or_else(String::new, |m| format!("least margin {}", percent(m)));
    let said = match finding {
        Finding::Held => format!("Blade and hub are within their limits: {least}."),
        Finding::HeldAsFarAsJudged => format!("Within the limits as far as judged: {least}."),
        Finding::OverTheLimit => format!("Over the limit: {}.", broken.join("; ")),
        Finding::NotJudged => "Not judged: no load is known.".into(),
    };
    if missing.is_empty() { said } else { format!("{said} Not judged: {}.", missing.join("; ")) }
}

/// Where a stress of the blade decides.
pub(super) fn place(g: &Governing) -> String {
    g.station.map_or_else(|| "the edge of the hub".into(), |n| format!("station {n}"))
}

fn of_blade(g: &Governing) -> Option<String> {
    (g.margin < 0.0)
        .then(|| format!("margin {} at {}, {} in “{}”", percent(g.margin), place(g), g.kind.word(), g.case))
}

fn of_hub(h: &HubResult) -> Vec<String> {
    let judged = [
        ("bolts on the wood of the hub", Some(h.bearing_pa), h.bearing_limit_pa),
        ("pull through the boss", h.boss_tension_pa, h.boss_limit_pa),
        ("pressure under the plates", h.clamp_pa, h.clamp_limit_pa),
    ];
    let over = judged.into_iter().filter_map(|(what, found, limit)| {
        let margin = limit / found?.max(1.0) - 1.0;
        (margin < 0.0).then(|| format!("margin {} for the {what}", percent(margin)))
    });
    let past = h.past_boss_m.map(|_| "the hub's holes reach past what its boss can hold".to_string());
    past.into_iter().chain(over).collect()
}

/// What was not judged, and why.
fn missing(rig: &Rig, cases: &[CaseResult], hub: Option<&HubResult>) -> Vec<String> {
    let job = &rig.job;
    let silent = cases.iter().filter(|c| c.figures.is_none());
    let mut all: Vec<String> =
        silent.map(|c| format!("“{}” ({})", c.name, c.state.sentence().trim_end_matches('.'))).collect();
    if rig.shaft.is_none() {
        all.push(
            "a standing start and an overspeed by the engine's limit rpm (the job has no engine)".into(),
        );
    }
    if job.wood.is_none() {
        all.push("the material (the job names none; the usual one is taken)".into());
    }
    if !matches!(job.propeller.pitch_control, PitchControl::Fixed {}) {
        all.push("the root in its hub (that is its maker's)".into());
        return all;
    }
    match hub {
        None if Pattern::of(job).is_none() => all.push("bolts and boss (the job describes no hub)".into()),
        None => all.push("bolts and boss".into()),
        Some(h) => {
            if h.clamp_pa.is_none() {
                all.push("the pressure under the plates (the torque of the hub's bolts is not given)".into());
            }
            if h.boss_tension_pa.is_none() {
                all.push("the pull of the blades in the boss".into());
            }
        }
    }
    all
}
