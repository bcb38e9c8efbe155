//! Search for the blade of greatest weighted gain over flight points, within limits.
//!
//! Free figures are few and smooth: diameter, pitch, and two or three terms of twist and of chord along the
//! blade, each on top of the drawn blade. Method: M. J. D. Powell's COBYLA, 1994 (linear models of aim and
//! limits over a simplex, no derivatives), begun again from its best until that gains nothing. A motor's
//! current limit puts a corner into every figure at full throttle, on which linear models come to rest too
//! early: first rounds go with that corner rounded off, the last with the limit itself. Same input, same
//! output. Strength is not judged: the spans keep chords near the drawn ones.

mod free;
mod ground;
mod possible;
mod run;

use std::ops::ControlFlow;

use super::brief::compared;
use super::{ShapeError, Shaped};
use crate::job::{Aim, Held, Limits, Propeller};
use crate::result::Search;
use crate::rig::Rig;
use free::{free, shaped, told};
use ground::Ground;
use run::Run;

pub use free::FREE;
pub use ground::usual_aims;

/// A search.
#[derive(Clone, Debug, PartialEq)]
pub struct Wish {
    /// What counts.
    pub aims: Vec<Aim>,
    /// Limits.
    pub limits: Limits,
    /// What stays as drawn.
    pub held: Vec<Held>,
    /// Most blades tried.
    pub most_trials: usize,
    /// Where the free figures start, each from −1 to 1 of its span; 0 is the drawn blade.
    pub start: [f64; FREE],
}

/// Most blades tried where nothing else is asked.
const MOST_TRIALS: usize = 1500;

impl Wish {
    /// What the job wishes for; each flight point by what it is for where it says nothing.
    #[must_use]
    pub fn of(rig: &Rig) -> Self {
        let wishes = rig.job.wishes.clone().unwrap_or_default();
        let aims = if wishes.aims.is_empty() { usual_aims(rig) } else { wishes.aims };
        let start = [0.0; FREE];
        Self { aims, limits: wishes.limits, held: wishes.held, most_trials: MOST_TRIALS, start }
    }
}

/// How a search stands.
#[derive(Clone, Debug, PartialEq)]
pub struct Progress<'p> {
    /// Blades tried.
    pub trials: u32,
    /// Gain of the best blade within limits so far, as a share.
    pub best_gain: Option<f64>,
    /// That blade, where this trial is it.
    pub better: Option<&'p Propeller>,
}

/// Hears of every trial, and may call the search off.
pub type Listener<'l> = dyn FnMut(&Progress) -> ControlFlow<()> + 'l;

/// Looks for the blade of greatest gain; `progress` is told after every trial and may call the search off.
///
/// # Errors
/// No aim, one that its flight point does not have, or a weight that is not above 0; no blade found within
/// limits, with the limit that is most in the way.
pub fn search(rig: &Rig, wish: &Wish, progress: &mut Listener) -> Result<Shaped<Search>, ShapeError> {
    let ground = Ground::new(rig, wish)?;
    let free = free(&wish.held);
    if free.is_empty() {
        return Err(ShapeError::AllHeld);
    }
    let run = Run::new(&ground, wish, free, progress);
    let stopped = run.stages();
    let trials = run.trials.get();
    let best = run.best.into_inner().ok_or(ShapeError::NotConverged)?;
    let found = shaped(rig, &best.x)?;
    let looks = ground.looks(&found);
    let margins = ground.margins(&found, &looks);
    if let Some(nearest) = ground::in_the_way(&margins, &looks) {
        return Err(ShapeError::NoneWithinLimits { nearest });
    }
    let result = Search {
        gain: best.gain.exp_m1(),
        aims: ground.aims(&found, &looks),
        free: told(&best.x, &wish.held),
        trials,
        stopped,
        margins,
        flight_points: compared(rig, &found),
    };
    Ok(Shaped { job: found.job, result })
}
