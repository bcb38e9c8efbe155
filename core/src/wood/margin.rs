//! The least margin alone, for those that ask it of many blades.

use super::cases::cases;
use super::judged::Loaded;
use super::{BladeBeam, WoodError};
use crate::rig::Rig;

/// The least margin anywhere on a job's blade over all cases, limit over stress less 1, with the case; `None`
/// where no case has an answer.
///
/// # Errors
/// A species that is not known.
pub fn least_margin(rig: &Rig) -> Result<Option<(String, f64)>, WoodError> {
    BladeBeam::new(rig).map(|beam| least(rig, &beam))
}

/// The same for a rig of the same wood, sections and thickness ratios as those of a blade already measured.
///
/// # Errors
/// Stations that [`Job::check`](crate::job::Job::check) refuses.
pub fn least_margin_like(like: &BladeBeam, rig: &Rig) -> Result<Option<(String, f64)>, WoodError> {
    like.like(rig).map(|beam| least(rig, &beam))
}

fn least(rig: &Rig, beam: &BladeBeam) -> Option<(String, f64)> {
    let overspeed = rig.job.wood.clone().unwrap_or_default().overspeed;
    let all = cases(rig, overspeed);
    let loaded = all.iter().filter_map(|case| Loaded::new(rig, beam, case));
    let least = loaded.map(|case| {
        let margin = beam.places.iter().map(|p| case.margin(beam, p)).fold(f64::INFINITY, f64::min);
        (case.name, margin)
    });
    least.min_by(|a, b| a.1.total_cmp(&b.1))
}
