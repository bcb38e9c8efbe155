//! Polars of a section by the program's solver, and what is read off them.

use std::ops::ControlFlow;

use spokeshave::section::outline::Outline;
use spokeshave::section::solver::{Settings, Solved, State, sweep};

/// The angles that converged.
pub(super) fn polar(outline: &Outline, settings: &Settings, angles: &[f64]) -> Vec<Solved> {
    let points =
        sweep(outline, settings, angles, |_, _, _| ControlFlow::Continue(())).expect("fair settings");
    points.into_iter().filter(|p| p.state == State::Converged).collect()
}

pub(super) fn half_degrees(first: i32, last: i32) -> Vec<f64> {
    (2 * first..=2 * last).map(|k| 0.5 * f64::from(k)).collect()
}

/// Least-squares slope of lift from -4 to 6 degrees, per degree, and the angle of zero lift on that line.
pub(super) fn slope_and_zero(points: &[Solved]) -> (f64, f64) {
    let used: Vec<&Solved> = points.iter().filter(|p| (-4.0..=6.0).contains(&p.alpha_deg)).collect();
    let n = used.len() as f64;
    let (a, l) =
        (used.iter().map(|p| p.alpha_deg).sum::<f64>() / n, used.iter().map(|p| p.cl).sum::<f64>() / n);
    let above: f64 = used.iter().map(|p| (p.alpha_deg - a) * (p.cl - l)).sum();
    let slope = above / used.iter().map(|p| (p.alpha_deg - a).powi(2)).sum::<f64>();
    (slope, a - l / slope)
}

pub(super) fn lift_max(points: &[Solved]) -> f64 {
    points.iter().map(|p| p.cl).fold(f64::MIN, f64::max)
}

pub(super) fn drag_min(points: &[Solved]) -> f64 {
    points.iter().map(|p| p.cd).fold(f64::MAX, f64::min)
}

/// Drag at a lift coefficient, linear between points below the stall.
pub(super) fn drag_at(points: &[Solved], cl: f64) -> f64 {
    let pair = points.windows(2).find(|p| p[0].cl <= cl && cl < p[1].cl).expect("the lift is reached");
    pair[0].cd + (pair[1].cd - pair[0].cd) * (cl - pair[0].cl) / (pair[1].cl - pair[0].cl)
}
