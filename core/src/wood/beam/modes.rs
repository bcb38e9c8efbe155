//! Natural modes: the lowest `ω² M x = K x`, by inverse iteration.

use super::banded::Banded;

/// Most steps of the iteration for one mode.
const STEPS: usize = 400;
/// Change of `ω²` at which a mode is taken as found.
const SETTLED: f64 = 1e-13;

/// The lowest modes: ω, rad/s, rising, and the shape with `xᵀ M x = 1`. `None` where the stiffness is not
/// positive definite.
///
/// Each mode is found square to those before it (inverse iteration with deflation: J. H. Wilkinson, *The
/// Algebraic Eigenvalue Problem*, 1965).
pub(super) fn lowest(
    stiffness: &Banded,
    mass: &Banded,
    size: usize,
    count: usize,
) -> Option<Vec<(f64, Vec<f64>)>> {
    let factor = stiffness.clone().factored()?;
    let mut found: Vec<(f64, Vec<f64>)> = Vec::new();
    for _ in 0..count.min(size) {
        // Any start that has a share of every mode.
        let mut x: Vec<f64> = (0..size).map(|i| 1.0 + ((i * 7 + 3) % 11) as f64 / 11.0).collect();
        let mut before = 0.0;
        for _ in 0..STEPS {
            x = factor.solve(&mass.times(&cleared(x, &found, mass)));
            x = cleared(x, &found, mass);
            let norm = dot(&x, &mass.times(&x)).sqrt();
            for v in &mut x {
                *v /= norm;
            }
            let square = dot(&x, &stiffness.times(&x));
            if (square - before).abs() <= SETTLED * square {
                break;
            }
            before = square;
        }
        let square = dot(&x, &stiffness.times(&x));
        if !square.is_finite() {
            return None;
        }
        found.push((square.max(0.0).sqrt(), x));
    }
    Some(found)
}

/// What is left of a vector when its share of the modes found is taken away.
fn cleared(mut x: Vec<f64>, found: &[(f64, Vec<f64>)], mass: &Banded) -> Vec<f64> {
    for (_, mode) in found {
        let share = dot(&mass.times(mode), &x);
        for (v, m) in x.iter_mut().zip(mode) {
            *v -= share * m;
        }
    }
    x
}

fn dot(a: &[f64], b: &[f64]) -> f64 {
    a.iter().zip(b).map(|(a, b)| a * b).sum()
}
