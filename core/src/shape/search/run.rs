//! One search as it goes: rounds of COBYLA, each from the best so far.

use std::cell::{Cell, RefCell};
use std::ops::ControlFlow;

use cobyla::{RhoBeg, StopTols, SuccessStatus, minimize};

use super::free::{FREE, shaped};
use super::ground::{Ground, Trial};
use super::{Listener, Progress, Wish};
use crate::result::Stopped;

/// Shares over which a current limit is rounded off, one stage after the other, all by few elements. The last
/// stage goes by the job as it is.
const ROUNDED: [f64; 2] = [0.1, 0.02];
/// First steps of the rounds of a stage, by turns, in spans; those of the last stage.
const FIRST_STEPS: [f64; 2] = [0.25, 0.08];
const LAST_STEPS: [f64; 2] = [0.08, 0.03];
/// Steps at which a round rests, in spans.
const LEAST_STEP: f64 = 1e-3;
const MOST_ROUNDS: usize = 6;
/// A round that gains less is idle, and ends its stage.
const WORTH_GOING_ON: f64 = 3e-4;
/// A round ends when so many trials for each free figure have gained no more than a quarter of that.
const PATIENCE: u32 = 9;

pub(super) struct Run<'g> {
    ground: &'g Ground,
    wish: &'g Wish,
    /// Which figures are free.
    free: Vec<usize>,
    /// The best of all, by the job as it is.
    pub(super) best: RefCell<Option<Trial>>,
    /// Blades tried.
    pub(super) trials: Cell<u32>,
    off: Cell<bool>,
    progress: RefCell<&'g mut Listener<'g>>,
}

/// A stage of the search: its ground, and the best and the last trial there.
struct Stage {
    ground: Ground,
    /// Whether the ground is that of the job as it is.
    real: bool,
    best: RefCell<Option<Trial>>,
    last: RefCell<Option<Trial>>,
    /// Value and number of the last trial that was worth it; whether the round is over.
    worth: Cell<(f64, u32)>,
    over: Cell<bool>,
}

impl Stage {
    fn new(ground: Ground, real: bool) -> Self {
        let (best, last) = (RefCell::default(), RefCell::default());
        Self { ground, real, best, last, worth: Cell::new((f64::NEG_INFINITY, 0)), over: Cell::new(false) }
    }

    /// Whether a trial is the best here.
    fn is_best(&self, trial: &Trial) -> bool {
        let better = self.best.borrow().as_ref().is_none_or(|best| trial.beats(best));
        if better {
            self.best.replace(Some(trial.clone()));
        }
        better
    }

    /// Ends the round once too many trials have gained too little.
    fn judge(&self, trials: u32, patience: u32) {
        let value = self.best.borrow().as_ref().map_or(f64::NEG_INFINITY, Trial::value);
        let (worth, at) = self.worth.get();
        if value > worth + 0.25 * WORTH_GOING_ON {
            self.worth.set((value, trials));
        } else if trials - at > patience {
            self.over.set(true);
        }
    }
}

impl<'g> Run<'g> {
    pub(super) fn new(
        ground: &'g Ground,
        wish: &'g Wish,
        free: Vec<usize>,
        progress: &'g mut Listener<'g>,
    ) -> Self {
        let (best, trials, off) = (RefCell::new(None), Cell::new(0), Cell::new(false));
        Self { ground, wish, free, best, trials, off, progress: RefCell::new(progress) }
    }

    pub(super) fn stages(&self) -> Stopped {
        let corner = self.ground.has_corner();
        let stages = ROUNDED.iter().filter(|share| corner || **share == ROUNDED[0]);
        let stages = stages.map(|share| Stage::new(self.ground.rough(*share), false));
        let mut start = self.wish.start.map(|x| x.clamp(-1.0, 1.0));
        for i in (0..FREE).filter(|i| !self.free.contains(i)) {
            start[i] = 0.0;
        }
        let mut stopped = Stopped::AtRest;
        for stage in stages.chain([Stage::new(self.ground.clone(), true)]) {
            stopped = self.rounds(&stage, start);
            start = stage.best.into_inner().map_or(start, |best| best.x);
            if stopped != Stopped::AtRest {
                break;
            }
        }
        stopped
    }

    fn rounds(&self, stage: &Stage, start: [f64; FREE]) -> Stopped {
        let (mut start, mut before) = (start, f64::NEG_INFINITY);
        let steps = if stage.real { LAST_STEPS } else { FIRST_STEPS };
        for round in 0..MOST_ROUNDS {
            let left = self.wish.most_trials.saturating_sub(self.trials.get() as usize);
            if left == 0 {
                return Stopped::MostTrials;
            }
            // The first steps of a method that steps one way only go either way in turn.
            let side = if round / 2 % 2 == 0 { 1.0 } else { -1.0 };
            stage.over.set(false);
            stage.worth.set((before, self.trials.get()));
            let end = self.round(stage, &start, (side, steps[round % 2]), left);
            if self.off.get() {
                return Stopped::CalledOff;
            }
            if matches!(end, Some(SuccessStatus::MaxEvalReached)) && !stage.over.get() {
                return Stopped::MostTrials;
            }
            let Some(best) = stage.best.borrow().clone() else { return Stopped::AtRest };
            let value = best.value();
            if round > 0 && value - before < WORTH_GOING_ON {
                break;
            }
            (start, before) = (best.x, value);
        }
        Stopped::AtRest
    }

    /// One run of the method in the free figures, its first steps to one side.
    fn round(
        &self,
        stage: &Stage,
        start: &[f64; FREE],
        (side, first): (f64, f64),
        most: usize,
    ) -> Option<SuccessStatus> {
        let start: Vec<f64> = self.free.iter().map(|i| side * start[*i]).collect();
        let all = |x: &[f64]| {
            let mut all = [0.0; FREE];
            for (i, x) in self.free.iter().zip(x) {
                all[*i] = side * x;
            }
            all
        };
        let aim = |x: &[f64], (): &mut ()| -self.look(stage, all(x)).gain;
        let limit = |i: usize| move |x: &[f64], (): &mut ()| self.look(stage, all(x)).shares[i];
        let limits: Vec<_> = (0..self.ground.count).map(limit).collect();
        let bounds = vec![(-1.0, 1.0); start.len()];
        let rest = StopTols { xtol_abs: vec![LEAST_STEP; start.len()], ..StopTols::default() };
        let end = minimize(aim, &start, &bounds, &limits, (), most, RhoBeg::All(first), Some(rest));
        end.ok().map(|(status, ..)| status)
    }

    /// The blade at `x`; the same again costs nothing, and when the round is over all are as the last.
    fn look(&self, stage: &Stage, x: [f64; FREE]) -> Trial {
        let known = |t: &Trial| self.off.get() || stage.over.get() || t.x == x;
        if let Some(last) = stage.last.borrow().as_ref().filter(|t| known(t)) {
            return last.clone();
        }
        let trial = stage.ground.trial(&x);
        self.trials.set(self.trials.get() + 1);
        stage.last.replace(Some(trial.clone()));
        let better = stage.is_best(&trial) && self.is_best_of_all(stage, &trial);
        stage.judge(self.trials.get(), PATIENCE * self.free.len() as u32);
        if self.tell(better).is_break() {
            self.off.set(true);
        }
        trial
    }

    /// Whether a trial is the best by the job as it is.
    fn is_best_of_all(&self, stage: &Stage, trial: &Trial) -> bool {
        let real = if stage.real { trial.clone() } else { self.ground.trial(&trial.x) };
        let better = self.best.borrow().as_ref().is_none_or(|best| real.beats(best));
        if better {
            self.best.replace(Some(real));
        }
        better
    }

    fn tell(&self, better: bool) -> ControlFlow<()> {
        let best = self.best.borrow();
        let kept = best.as_ref().filter(|b| b.kept());
        let found = kept.filter(|_| better).and_then(|b| shaped(&self.ground.rig, &b.x).ok());
        let now = Progress {
            trials: self.trials.get(),
            best_gain: kept.map(|b| b.gain.exp_m1()),
            better: found.as_ref().map(|rig| &rig.job.propeller),
        };
        (self.progress.borrow_mut())(&now)
    }
}
