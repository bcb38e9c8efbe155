//! A polar: one angle after another, each started from its neighbour.

use std::ops::ControlFlow;

use super::attempt::{Attempts, Solution};
use super::closure::Gas;
use super::layer::Course;
use super::point::{Solved, State};
use super::potential::Potential;
use super::settings::{Settings, SolverError};
use super::spacing;
use crate::section::outline::Outline;

/// Failures in a row after which a direction of the sweep is given up: past the largest lift, and before it.
const GIVE_UP: [usize; 2] = [3, 10];
/// Lift that falls below this angle, degrees, is transition running forward and not the stall.
const STALL_DEG: f64 = 10.0;
/// Nodes added for the second try at an angle that failed: what fails is often a transition point just at a
/// node.
const OTHER_NODES: usize = 9;
/// A sweep in progress: call [`Sweep::advance`] until it gives nothing.
#[derive(Debug, Clone)]
pub struct Sweep {
    potential: Potential,
    other: Potential,
    course: Course,
    angles_deg: Vec<f64>,
    start: usize,
    /// Position in the order: up from the start, then down from it.
    next: usize,
    /// Index of the first angle that converged on the usual nodes.
    anchor: Option<usize>,
    /// Index of the latest.
    last: Option<usize>,
    failures: usize,
    /// Index of the angle just tried in the present direction.
    latest: Option<usize>,
    /// Points and flows on the usual nodes, by index of the angle.
    points: Vec<Option<Solved>>,
    solutions: Vec<Option<Solution>>,
    /// Whether a failed angle was tried once more from the angle below and above.
    mended: Vec<[bool; 2]>,
    /// Largest size of lift in the present direction.
    peak: f64,
}

impl Sweep {
    /// Sets up the flow about an outline.
    ///
    /// # Errors
    /// [`SolverError`] for settings or angles out of range, and for an outline about which no flow can be
    /// found.
    pub fn new(outline: &Outline, settings: &Settings, angles_deg: &[f64]) -> Result<Self, SolverError> {
        settings.check()?;
        check_angles(angles_deg)?;
        let flow = |nodes: usize| {
            let singular = || SolverError::Singular { name: outline.name().to_string() };
            Potential::new(spacing::nodes(outline, nodes)).ok_or_else(singular)
        };
        let (potential, other) = (flow(settings.nodes)?, flow(settings.nodes + OTHER_NODES)?);
        let course = Course {
            gas: Gas::new(settings.reynolds, settings.mach),
            n_crit: [settings.n_crit; 2],
            trips: [settings.trip_upper, settings.trip_lower],
            body: potential.count(),
            gap: potential.gap(),
        };
        let nearest = |a: &f64, b: &f64| a.abs().total_cmp(&b.abs());
        let start =
            (0..angles_deg.len()).min_by(|&i, &j| nearest(&angles_deg[i], &angles_deg[j])).unwrap_or(0);
        Ok(Self {
            potential,
            other,
            course,
            angles_deg: angles_deg.to_vec(),
            start,
            next: 0,
            anchor: None,
            last: None,
            failures: 0,
            latest: None,
            points: vec![None; angles_deg.len()],
            solutions: vec![None; angles_deg.len()],
            mended: vec![[false; 2]; angles_deg.len()],
            peak: 0.0,
        })
    }

    /// Computes the next angle; nothing when the sweep is over. An angle that failed comes again when it is
    /// tried once more.
    pub fn advance(&mut self) -> Option<Solved> {
        let count = self.angles_deg.len();
        let upward = count - self.start;
        if self.gives_up() && self.next < upward {
            self.next = upward;
        }
        if self.next == upward {
            self.last = self.anchor;
            (self.failures, self.peak, self.latest) = (0, 0.0, None);
        }
        if self.next >= count || self.gives_up() {
            self.next = count;
            return self.mend();
        }
        let index = if self.next < upward { self.start + self.next } else { count - 1 - self.next };
        self.next += 1;
        let point = self.solve(index);
        self.failures = if point.state == State::Converged { 0 } else { self.failures + 1 };
        self.latest = Some(index);
        self.points[index] = Some(point);
        Some(point)
    }

    /// Whether the present direction is not worth going on with.
    fn gives_up(&self) -> bool {
        let lift = self.last.and_then(|i| self.solutions[i].as_ref()).map_or(0.0, |last| last.cl.abs());
        let latest = self.latest.and_then(|i| self.points[i]);
        let stalled = latest.is_some_and(|p| p.state == State::Stalled);
        let steep = latest.is_some_and(|p| p.alpha_deg.abs() > STALL_DEG);
        let past = stalled || steep && lift > 0.7 && lift < 0.98 * self.peak;
        self.failures >= GIVE_UP[usize::from(!past)]
    }

    /// Angles done and angles asked for; a direction that was given up counts as done.
    #[must_use]
    pub fn progress(&self) -> (usize, usize) {
        (self.next.min(self.angles_deg.len()), self.angles_deg.len())
    }

    /// The points so far, by rising angle.
    #[must_use]
    pub fn points(&self) -> Vec<Solved> {
        self.points.iter().flatten().copied().collect()
    }

    fn solve(&mut self, index: usize) -> Solved {
        let alpha_deg = self.angles_deg[index];
        let last = self.last.and_then(|i| self.solutions[i].as_ref());
        let mut attempts = Attempts::new([&self.potential, &self.other], &self.course, last);
        let found = attempts.find(alpha_deg.to_radians());
        let (iterations, residual) = (attempts.iterations, attempts.residual);
        let Some((solution, point)) = found else {
            return Solved::void(alpha_deg, State::Failed, iterations, residual);
        };
        if point.state == State::Stalled {
            return Solved::void(alpha_deg, State::Stalled, iterations, residual);
        }
        self.peak = self.peak.max(solution.cl.abs());
        if solution.nodes() == self.course.body {
            self.anchor.get_or_insert(index);
            self.last = Some(index);
            self.solutions[index] = Some(solution);
        }
        Solved { alpha_deg, iterations, residual, ..point }
    }

    /// Tries the next failed angle once more from a neighbour that has since converged; nothing when all are
    /// tried.
    fn mend(&mut self) -> Option<Solved> {
        let (index, from) = self.to_mend()?;
        self.mended[index][from] = true;
        let alpha_deg = self.angles_deg[index];
        let (below, above) = (&self.solutions[..index], &self.solutions[index + 1..]);
        let (below, above) = (below.iter().rev(), above.iter());
        let (last, beyond) = if from == 0 {
            (below.flatten().next(), above.flatten().next())
        } else {
            (above.flatten().next(), below.flatten().next())
        };
        let mut attempts = Attempts::new([&self.potential, &self.other], &self.course, last);
        let found = attempts.mend(alpha_deg.to_radians(), beyond);
        let (iterations, residual) = (attempts.iterations, attempts.residual);
        let point = match found {
            Some((solution, point)) if point.state == State::Converged => {
                self.solutions[index] = Some(solution);
                Solved { alpha_deg, iterations, residual, ..point }
            }
            Some((_, point)) => Solved::void(alpha_deg, point.state, iterations, residual),
            None => Solved::void(alpha_deg, State::Failed, iterations, residual),
        };
        self.points[index] = Some(point);
        Some(point)
    }

    /// An angle that failed and the side (0 below, 1 above) of a neighbour not tried yet; neighbours towards
    /// the start first.
    fn to_mend(&self) -> Option<(usize, usize)> {
        let count = self.angles_deg.len();
        let failed = |i: usize| match self.points[i] {
            Some(point) => point.state == State::Failed,
            // Without a first flow nothing was found out about the angles beyond.
            None => self.anchor.is_none_or(|at| at < self.start),
        };
        let open = |i: usize, from: usize| {
            let at = if from == 0 { i.checked_sub(1) } else { Some(i + 1) };
            let solved = at.and_then(|at| self.solutions.get(at)).is_some_and(Option::is_some);
            (failed(i) && solved && !self.mended[i][from]).then_some((i, from))
        };
        let (above, below) = (self.start..count, (0..self.start).rev());
        let inward = above.clone().map(|i| (i, 0)).chain(below.clone().map(|i| (i, 1)));
        let outward = above.rev().map(|i| (i, 1)).chain(below.rev().map(|i| (i, 0)));
        inward.chain(outward).find_map(|(i, from)| open(i, from))
    }
}

fn check_angles(angles_deg: &[f64]) -> Result<(), SolverError> {
    let rising = angles_deg.windows(2).all(|pair| pair[0] < pair[1]);
    let within = angles_deg.iter().all(|a| a.abs() <= 30.0);
    if rising && within && (1..=400).contains(&angles_deg.len()) {
        return Ok(());
    }
    let edge = |a: Option<&f64>| a.copied().unwrap_or(f64::NAN);
    Err(SolverError::Angles {
        count: angles_deg.len(),
        first_deg: edge(angles_deg.first()),
        last_deg: edge(angles_deg.last()),
    })
}

/// Computes a whole polar. `watch` hears of every point with the counts of angles done and asked for, and may
/// stop the sweep.
///
/// Points are in rising order of angle. Angles beyond three failures in a row are not in the result.
///
/// # Errors
/// As [`Sweep::new`]; [`SolverError::Stopped`] when `watch` breaks off.
///
/// ```no_run
/// use std::ops::ControlFlow;
/// use spokeshave::section::{outline::clark_y, solver::{Settings, sweep}};
/// let section = clark_y()?;
/// let angles: Vec<f64> = (-8..30).map(|k| 0.5 * f64::from(k)).collect();
/// let points = sweep(&section, &Settings::free(3e5, 9.0), &angles, |_, _, _| ControlFlow::Continue(()))?;
/// # Ok::<(), Box<dyn std::error::Error>>(())
/// ```
pub fn sweep(
    outline: &Outline,
    settings: &Settings,
    angles_deg: &[f64],
    mut watch: impl FnMut(&Solved, usize, usize) -> ControlFlow<()>,
) -> Result<Vec<Solved>, SolverError> {
    let mut sweep = Sweep::new(outline, settings, angles_deg)?;
    while let Some(point) = sweep.advance() {
        let (done, total) = sweep.progress();
        if watch(&point, done, total).is_break() {
            return Err(SolverError::Stopped { done, total });
        }
    }
    Ok(sweep.points())
}
