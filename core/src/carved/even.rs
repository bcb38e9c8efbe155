//! Values near a wanted one and near one another, each within its own bounds.

/// Passes of the descent; each halves what is left or better.
const PASSES: u32 = 200;
/// Weight of evenness beside nearness to what is wanted: blades that match count as much as blades that are
/// right.
const EVENNESS: f64 = 1.0;

/// The values of least `Σ (x − wanted)² + Σ (x − mean)²` within bounds, by descent along each in turn: the
/// sum is convex and the bounds are those of each alone, so that it comes to the least.
pub(super) fn evened(wanted: f64, bounds: &[(f64, f64)]) -> Vec<f64> {
    let n = bounds.len() as f64;
    let mut x: Vec<f64> = bounds.iter().map(|b| wanted.max(b.0).min(b.1)).collect();
    for _ in 0..PASSES {
        for i in 0..x.len() {
            let others = x.iter().sum::<f64>() - x[i];
            let free = (wanted + EVENNESS * others / n) / (1.0 + EVENNESS * (1.0 - 1.0 / n));
            x[i] = free.max(bounds[i].0).min(bounds[i].1);
        }
    }
    x
}

#[cfg(test)]
mod tests {
    use super::evened;

    /// Closed form: with one value held at h, the least of (x − w)² + (x − h)²/2 is at (2 w + h)/3.
    #[test]
    fn one_goes_part_of_the_way_to_another_that_cannot_move() {
        let x = evened(10.0, &[(0.0, 20.0), (7.0, 7.0)]);
        assert!((x[0] - 9.0).abs() < 1e-9 && x[1] == 7.0, "{x:?}");
        assert_eq!(evened(10.0, &[(0.0, 20.0), (0.0, 30.0)]), [10.0, 10.0]);
        assert_eq!(evened(10.0, &[(0.0, 8.0)]), [8.0]);
    }
}
