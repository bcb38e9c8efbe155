//! Least squares with prior widths, by Gauss and Newton, robust against a few wrong readings.

use super::equation::{COUNT, Equation};
use super::normal::{factor, inverse, times};

/// A residual of more than this many standard deviations counts less (P. J. Huber, Annals of Mathematical
/// Statistics 35(1), 1964: about 1.345 to 1.5).
const HUBER: f64 = 1.5;
/// A reading this many standard deviations off is left out of the last fit.
pub(super) const OUTLIER: f64 = 3.5;
const PASSES: u32 = 30;
/// How often the readings move to what they most likely were.
const TURNS: u32 = 4;

/// What was found.
pub(super) struct Found {
    /// Logarithms of the factors.
    pub(super) x: Vec<f64>,
    /// Their covariance.
    pub(super) covariance: Vec<Vec<f64>>,
    /// How far off each reading is, in standard deviations; `None` where it tells nothing.
    pub(super) off: Vec<Option<f64>>,
}

/// The logarithms of least `Σ (residuals)² + Σ (x/width)²`: first with far readings counting less, then
/// without those that stay far. Rpm and airspeed have errors too, so that between fits each reading moves to
/// what it most likely was.
pub(super) fn solve(equations: &mut [Option<Equation>], widths: &[f64; COUNT]) -> Option<Found> {
    let all: Vec<bool> = equations.iter().map(Option::is_some).collect();
    let mut found = fitted(equations, widths, &all, true)?;
    for _ in 0..TURNS {
        for equation in equations.iter_mut() {
            // One that cannot be believed anywhere tells nothing.
            if equation.as_mut().is_some_and(|e| e.believe(&found.x).is_none()) {
                *equation = None;
            }
        }
        let near: Vec<bool> =
            all_off(equations, &found.x).iter().map(|off| off.is_some_and(|o| o <= OUTLIER)).collect();
        found = fitted(equations, widths, &near, false)?;
    }
    Some(Found { off: all_off(equations, &found.x), ..found })
}

fn all_off(equations: &[Option<Equation>], x: &[f64]) -> Vec<Option<f64>> {
    equations.iter().map(|e| e.as_ref().and_then(|e| Some(off(&e.residual(x)?)))).collect()
}

/// Root of the mean square.
fn off(residual: &[f64]) -> f64 {
    (residual.iter().map(|r| r * r).sum::<f64>() / residual.len() as f64).sqrt()
}

fn fitted(
    equations: &[Option<Equation>],
    widths: &[f64; COUNT],
    used: &[bool],
    robust: bool,
) -> Option<Found> {
    let mut x = vec![0.0; COUNT];
    let mut covariance = Vec::new();
    for _ in 0..PASSES {
        let mut normal: Vec<Vec<f64>> = (0..COUNT)
            .map(|i| (0..COUNT).map(|j| if i == j { widths[i].powi(-2) } else { 0.0 }).collect())
            .collect();
        let mut right: Vec<f64> = x.iter().zip(widths).map(|(x, w)| -x / (w * w)).collect();
        for equation in equations.iter().zip(used).filter(|(_, used)| **used).filter_map(|(e, _)| e.as_ref())
        {
            let (residual, slopes) = equation.linear(&x)?;
            let far = off(&residual);
            let weight = if robust && far > HUBER { HUBER / far } else { 1.0 };
            let dot = |a: &[f64], b: &[f64]| weight * a.iter().zip(b).map(|(a, b)| a * b).sum::<f64>();
            for i in 0..COUNT {
                right[i] -= dot(&slopes[i], &residual);
                for j in 0..COUNT {
                    normal[i][j] += dot(&slopes[i], &slopes[j]);
                }
            }
        }
        covariance = inverse(&factor(&normal)?);
        let step = times(&covariance, &right);
        x.iter_mut().zip(&step).for_each(|(x, s)| *x = (*x + s).clamp(-1.2, 1.2));
        if step.iter().all(|s| s.abs() < 1e-10) {
            break;
        }
    }
    Some(Found { off: all_off(equations, &x), x, covariance })
}
