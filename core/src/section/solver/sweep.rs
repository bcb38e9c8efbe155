//! A polar: one angle after another, each started from its neighbour.

use std::ops::ControlFlow;

use serde::{Deserialize, Serialize};

use super::attempt::{Attempts, Solution};
use super::closure::Gas;
use super::layer::Course;
use super::potential::Potential;
use super::settings::{Settings, SolverError};
use super::spacing;
use crate::section::outline::Outline;

/// Whether a point can be relied on.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum State {
    /// The coupled equations hold to the tolerance.
    Converged,
    /// They do not, or the solution is not believable: the figures of the point are void.
    Failed,
    /// They do, but the suction at the nose is more than a laminar bubble there survives: the section has stalled from the nose
    /// and the figures are void.
    Stalled,
}

/// One point of a polar.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
pub struct Solved {
    /// Angle of attack from the chord line, degrees.
    pub alpha_deg: f64,
    /// Lift coefficient; NaN where it failed.
    pub cl: f64,
    /// Drag coefficient.
    pub cd: f64,
    /// Moment coefficient about the quarter chord, nose up positive.
    pub cm: f64,
    /// Transition on the upper side, in chords from the nose along the chord; 1 if it stays laminar.
    pub xtr_upper: f64,
    /// Transition on the lower side.
    pub xtr_lower: f64,
    /// Newton iterations, all attempts together.
    pub iterations: usize,
    /// Root mean square of what the speeds lack at the end.
    pub residual: f64,
    /// Whether the point converged.
    pub state: State,
}

/// Failures in a row after which a direction of the sweep is given up: past the largest lift, and before it.
const GIVE_UP: [usize; 2] = [3, 10];
/// Nodes added for the second try at an angle that failed: what fails is often a transition point just at a node.
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
    anchor: Option<Solution>,
    last: Option<Solution>,
    failures: usize,
    points: Vec<Solved>,
    /// Largest size of lift in the present direction.
    peak: f64,
}

impl Sweep {
    /// Sets up the flow about an outline.
    ///
    /// # Errors
    /// [`SolverError`] for settings or angles out of range, and for an outline about which no flow can be found.
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
            n_crit: settings.n_crit,
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
            points: Vec::new(),
            peak: 0.0,
        })
    }

    /// Computes the next angle; nothing when the sweep is over.
    pub fn advance(&mut self) -> Option<Solved> {
        let count = self.angles_deg.len();
        let upward = count - self.start;
        if self.gives_up() && self.next < upward {
            self.next = upward;
        }
        if self.next == upward {
            self.last.clone_from(&self.anchor);
            (self.failures, self.peak) = (0, 0.0);
        }
        if self.next >= count || self.gives_up() {
            return None;
        }
        let index = if self.next < upward { self.start + self.next } else { count - 1 - self.next };
        self.next += 1;
        let point = self.solve(self.angles_deg[index]);
        self.failures = if point.state == State::Converged { 0 } else { self.failures + 1 };
        self.points.push(point);
        Some(point)
    }

    /// Whether the present direction is not worth going on with.
    fn gives_up(&self) -> bool {
        let lift = self.last.as_ref().map_or(0.0, |last| last.cl.abs());
        let stalled = self.points.last().is_some_and(|p| p.state == State::Stalled);
        let past = stalled || lift > 0.7 && lift < 0.98 * self.peak;
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
        let mut points = self.points.clone();
        points.sort_by(|a, b| a.alpha_deg.total_cmp(&b.alpha_deg));
        points
    }

    fn solve(&mut self, alpha_deg: f64) -> Solved {
        let mut attempts = Attempts::new([&self.potential, &self.other], &self.course, self.last.as_ref());
        let found = attempts.find(alpha_deg.to_radians());
        let (iterations, residual) = (attempts.iterations, attempts.residual);
        let failed = Solved {
            alpha_deg,
            cl: f64::NAN,
            cd: f64::NAN,
            cm: f64::NAN,
            xtr_upper: f64::NAN,
            xtr_lower: f64::NAN,
            iterations,
            residual,
            state: State::Failed,
        };
        let Some((solution, point)) = found else { return failed };
        if point.state == State::Stalled {
            return Solved { state: State::Stalled, ..failed };
        }
        self.peak = self.peak.max(solution.cl.abs());
        if solution.nodes() == self.course.body {
            if self.anchor.is_none() {
                self.anchor = Some(solution.clone());
            }
            self.last = Some(solution);
        }
        Solved { alpha_deg, iterations, residual, ..point }
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

/// Computes a whole polar. `watch` hears of every point with the counts of angles done and asked for, and may stop the sweep.
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
