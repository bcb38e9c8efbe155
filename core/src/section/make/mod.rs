//! Polars of an outline, made into the tables of a section.
//!
//! A [`Plan`] is an outline drawn at each thickness ratio asked for, with the carver's departures from the
//! drawing (a blunt trailing edge, a rough or taped leading edge), and one task for each thickness and
//! Reynolds number at Mach 0. Tasks are independent. Only points that converged go into the table; how many
//! did not is said in its origin. A polar with fewer than five such points is left out, and said.

mod compare;
mod error;
mod origin;
mod propose;
mod request;
mod summary;

pub use compare::{Comparison, Peak, compare};
pub use error::MakeError;
pub use propose::{proposed_reynolds, proposed_thickness};
pub use request::{Angles, MOST_TASKS, REYNOLDS, ROUGH_NOSE, Request};
pub use summary::Summary;

use std::ops::ControlFlow;

use super::outline::Outline;
use super::polar::{FEWEST_POINTS, Polar, PolarPoint};
use super::solver::{Settings, Solved, State, sweep};
use super::table::{FaceAngle, Table};

/// One polar to compute.
#[derive(Clone, Debug, PartialEq)]
struct Task {
    /// Index of the outline as drawn.
    outline: usize,
    settings: Settings,
}

/// Everything decided before the first angle is computed.
#[derive(Clone, Debug)]
pub struct Plan {
    request: Request,
    base: Outline,
    drawn: Vec<Outline>,
    angles_deg: Vec<f64>,
    tasks: Vec<Task>,
}

/// How far one task has come.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Step {
    /// Angles done.
    pub done: usize,
    /// Angles asked for.
    pub total: usize,
}

/// One polar as computed, with the points that failed.
#[derive(Clone, Debug, PartialEq)]
pub struct Made {
    /// Thickness ratio of the outline.
    pub thickness_ratio: f64,
    /// Reynolds number.
    pub reynolds: f64,
    /// All points tried, by rising angle.
    pub points: Vec<Solved>,
}

impl Made {
    /// Points that converged.
    pub fn converged(&self) -> impl Iterator<Item = &Solved> {
        self.points.iter().filter(|p| p.state == State::Converged)
    }

    /// The polar of the points that converged; `None` when they are fewer than a polar needs.
    #[must_use]
    pub fn polar(&self) -> Option<Polar> {
        let points: Vec<PolarPoint> = self
            .converged()
            .map(|p| PolarPoint {
                alpha_deg: p.alpha_deg,
                cl: rounded(p.cl, 1e5),
                cd: rounded(p.cd, 1e6),
                cm: Some(rounded(p.cm, 1e4)),
            })
            .collect();
        (points.len() >= FEWEST_POINTS).then_some(Polar {
            reynolds: Some(self.reynolds),
            mach: 0.0,
            thickness_ratio: Some(rounded(self.thickness_ratio, 1e4)),
            points,
        })
    }
}

/// Angles near zero come out of sweeps with rounding noise, and a table wants short figures.
fn rounded(value: f64, per_unit: f64) -> f64 {
    (value * per_unit).round() / per_unit
}

/// A figure within its range; NaN is in none.
fn within(what: &'static str, found: f64, [least, most]: [f64; 2]) -> Result<(), MakeError> {
    if (least..=most).contains(&found) {
        Ok(())
    } else {
        Err(MakeError::Request { what, found, least, most })
    }
}

impl Plan {
    /// Draws the outline as asked and lays out the tasks: thickness by thickness, each by rising Reynolds
    /// number.
    ///
    /// # Errors
    /// [`MakeError`] for a request out of range and an outline that cannot be drawn so.
    ///
    /// ```
    /// use spokeshave::section::{make::{Plan, Request}, outline::clark_y};
    /// let plan = Plan::new(&clark_y()?, &Request::free(&[1e5, 3e5], 9.0))?;
    /// assert_eq!(plan.count(), 2);
    /// # Ok::<(), Box<dyn std::error::Error>>(())
    /// ```
    pub fn new(outline: &Outline, request: &Request) -> Result<Self, MakeError> {
        request.check()?;
        let scaled: Vec<Outline> = match request.thickness_ratios.as_slice() {
            [] => vec![outline.clone()],
            ratios => ratios.iter().map(|&t| outline.scaled_to(t)).collect::<Result<_, _>>()?,
        };
        let drawn = match request.edge_thickness {
            Some(edge) => scaled.iter().map(|o| o.with_edge_thickness(edge)).collect::<Result<_, _>>()?,
            None => scaled,
        };
        let tasks = (0..drawn.len())
            .flat_map(|outline| request.reynolds.iter().map(move |&reynolds| (outline, reynolds)))
            .map(|(outline, reynolds)| Task { outline, settings: settings(request, reynolds) })
            .collect();
        let angles_deg = request.angles.list()?;
        Ok(Self { request: request.clone(), base: outline.clone(), drawn, angles_deg, tasks })
    }

    /// Number of polars.
    #[must_use]
    pub fn count(&self) -> usize {
        self.tasks.len()
    }

    /// Angles of each polar.
    #[must_use]
    pub fn angles_deg(&self) -> &[f64] {
        &self.angles_deg
    }

    /// The outline that a task computes; `None` when there is no such task.
    #[must_use]
    pub fn outline(&self, task: usize) -> Option<&Outline> {
        Some(&self.drawn[self.tasks.get(task)?.outline])
    }

    /// Thickness ratio and Reynolds number of a task; `None` when there is no such task.
    #[must_use]
    pub fn conditions(&self, task: usize) -> Option<(f64, f64)> {
        let task = self.tasks.get(task)?;
        Some((self.thickness_ratio(task.outline), task.settings.reynolds))
    }

    /// The ratio asked for, or that of the drawing.
    fn thickness_ratio(&self, outline: usize) -> f64 {
        let asked = self.request.thickness_ratios.get(outline);
        asked.copied().unwrap_or_else(|| self.drawn[outline].thickness_ratio())
    }

    /// Computes one polar. `watch` hears of every angle and may stop it.
    ///
    /// # Errors
    /// [`MakeError::Solver`] when no flow can be found about the outline or `watch` breaks off,
    /// [`MakeError::Request`] for a task that is not below [`Plan::count`].
    pub fn run(
        &self,
        task: usize,
        mut watch: impl FnMut(Step) -> ControlFlow<()>,
    ) -> Result<Made, MakeError> {
        let Some(at) = self.tasks.get(task) else {
            return Err(MakeError::Request {
                what: "polar",
                found: task as f64,
                least: 0.0,
                most: self.tasks.len() as f64 - 1.0,
            });
        };
        let outline = &self.drawn[at.outline];
        let hear = |_: &Solved, done: usize, total: usize| watch(Step { done, total });
        let points = sweep(outline, &at.settings, &self.angles_deg, hear)?;
        Ok(Made { thickness_ratio: self.thickness_ratio(at.outline), reynolds: at.settings.reynolds, points })
    }

    /// The table of what was made.
    ///
    /// # Errors
    /// [`MakeError::NoTable`] when no polar has enough points that converged.
    pub fn table(&self, made: &[Made]) -> Result<Table, MakeError> {
        let polars: Vec<Polar> = made.iter().filter_map(Made::polar).collect();
        if polars.is_empty() {
            let converged = made.iter().map(|m| m.converged().count()).sum();
            return Err(MakeError::NoTable { converged, tried: made.iter().map(|m| m.points.len()).sum() });
        }
        let face = |(k, o): (usize, &Outline)| {
            let angle_deg = rounded(o.face_angle_rad()?.to_degrees(), 1e4);
            Some(FaceAngle { thickness_ratio: rounded(self.thickness_ratio(k), 1e4), angle_deg })
        };
        let faces: Option<Vec<FaceAngle>> = self.drawn.iter().enumerate().map(face).collect();
        // One outline stands for all thicknesses: the one that was given, with its edge as computed.
        let shown = self.request.edge_thickness.and_then(|edge| self.base.with_edge_thickness(edge).ok());
        let points = shown.as_ref().unwrap_or(&self.base).points();
        Ok(Table {
            origin: origin::origin(self, made),
            face_angles: faces.unwrap_or_default(),
            outline: points.iter().map(|p| p.map(|v| rounded(v, 1e6))).collect(),
            polars,
        })
    }
}

fn settings(request: &Request, reynolds: f64) -> Settings {
    Settings {
        reynolds,
        mach: 0.0,
        n_crit: request.n_crit,
        trip_upper: request.trip_upper,
        trip_lower: request.trip_lower,
        nodes: request.nodes,
    }
}

/// Makes all polars of a request one after the other. `watch` hears of every angle with the number of the
/// task.
///
/// # Errors
/// As [`Plan::new`], [`Plan::run`] and [`Plan::table`].
pub fn make(
    outline: &Outline,
    request: &Request,
    mut watch: impl FnMut(usize, Step) -> ControlFlow<()>,
) -> Result<Table, MakeError> {
    let plan = Plan::new(outline, request)?;
    let made: Result<Vec<Made>, MakeError> =
        (0..plan.count()).map(|task| plan.run(task, |step| watch(task, step))).collect();
    plan.table(&made?)
}

#[cfg(test)]
mod tests;
