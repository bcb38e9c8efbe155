//! The whole job as pages to hand in or to keep with the propeller: verdict, inputs, method and validity,
//! charts, stations, strength, what to carve, readings as carved and of the logbook, cautions. What a job
//! does not have is left out.
//!
//! Pages are plain drawings ([`crate::bench::Sheet`]): the writers of the bench make SVG or one PDF of them,
//! with charts as lines.

mod blade;
mod carved;
mod chart;
mod curves;
mod flow;
mod inputs;
mod logbook;
mod method;
mod paper;
mod scale;
mod strength;
mod verdict;

pub use scale::{Scale, Scales};

use crate::bench::{Paper, Sheet, bind};
use crate::carved::{self as carved_blades, CarvedError, usual_point};
use crate::caution::cautions;
use crate::fit::{self, FIT_RADIUS_FRACTIONS};
use crate::result::{Carved, Envelope, PointResult, RemovalPlan};
use crate::rig::Rig;
use crate::wood;
use flow::Flow;

/// Speeds of the curves over airspeed.
const SPEEDS: u32 = 60;

/// What the parts are written from.
struct Told<'r> {
    rig: &'r Rig,
    scales: &'r Scales,
    /// Every flight point worked out.
    points: Vec<PointResult>,
    /// The flight point whose air the speed range has, and for which wood is taken off.
    usual: usize,
    carved: Option<Result<Carved, CarvedError>>,
    plan: Option<Result<RemovalPlan, CarvedError>>,
    envelope: Option<Envelope>,
    strength: Option<crate::result::Strength>,
}

/// The pages of a job's dossier, with the units its figures are written in. `point` is the flight point whose
/// air the speed range has and for which wood is taken off; without it the usual one.
///
/// ```
/// use spokeshave::{bench::Paper, dossier::{Scales, dossier}, job::{DEMOS, Job}, rig::Rig};
/// let rig = Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap();
/// let pages = dossier(&rig, &Scales::METRIC, Paper::A4, None);
/// assert!(pages.len() > 4 && pages[0].name == "Verdict");
/// ```
#[must_use]
pub fn dossier(rig: &Rig, scales: &Scales, paper: Paper, point: Option<usize>) -> Vec<Sheet> {
    let usual = point.unwrap_or_else(|| usual_point(rig));
    let told = Told {
        rig,
        scales,
        points: (0..rig.job.flight_points.len()).filter_map(|i| rig.point(i)).collect(),
        usual,
        envelope: rig
            .job
            .flight_points
            .get(usual)
            .and_then(|point| fit::envelope(rig, point, SPEEDS, &FIT_RADIUS_FRACTIONS)),
        strength: wood::strength(rig).ok(),
        carved: rig.job.carved.as_ref().map(|_| carved_blades::analyse(rig)),
        plan: rig.job.carved.as_ref().map(|_| carved_blades::plan(rig, usual)),
    };
    let mut flow = Flow::new(paper, "Verdict");
    verdict::write(&mut flow, &told);
    flow.part("Before you act");
    flow.list(&cautions(&rig.job));
    inputs::write(&mut flow, &told);
    method::write(&mut flow, &told);
    curves::write(&mut flow, &told);
    blade::write(&mut flow, &told);
    strength::write(&mut flow, &told);
    paper::write(&mut flow, &told, paper);
    carved::write(&mut flow, &told);
    logbook::write(&mut flow, &told);
    let title = if rig.job.title.is_empty() { "Propeller" } else { &rig.job.title };
    bind(title, flow.pages(), paper, &cautions(&rig.job))
}
