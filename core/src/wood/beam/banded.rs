//! A symmetric positive definite matrix that is nothing but near its diagonal.

/// The lower band of a symmetric matrix, row by row: entry `(i, i − k)` for k up to the half width.
#[derive(Clone, Debug)]
pub(super) struct Banded {
    half: usize,
    rows: Vec<Vec<f64>>,
}

impl Banded {
    /// A matrix of zeros.
    pub(super) fn new(size: usize, half: usize) -> Self {
        Self { half, rows: vec![vec![0.0; half + 1]; size] }
    }

    /// Adds to the entry `(i, j)` and its mirror image.
    pub(super) fn add(&mut self, i: usize, j: usize, value: f64) {
        let (low, high) = (i.min(j), i.max(j));
        self.rows[high][high - low] += value;
    }

    /// The product with a vector.
    pub(super) fn times(&self, x: &[f64]) -> Vec<f64> {
        let mut y = vec![0.0; x.len()];
        for (i, row) in self.rows.iter().enumerate() {
            y[i] += row[0] * x[i];
            for k in 1..=self.half.min(i) {
                y[i] += row[k] * x[i - k];
                y[i - k] += row[k] * x[i];
            }
        }
        y
    }

    /// Cholesky's factor; `None` where the matrix is not positive definite.
    pub(super) fn factored(mut self) -> Option<Factor> {
        for i in 0..self.rows.len() {
            for k in (0..=self.half.min(i)).rev() {
                let j = i - k;
                let shared = k + 1..=self.half.min(i);
                let sum: f64 = shared
                    .filter(|m| *m - k <= self.half)
                    .map(|m| self.rows[i][m] * self.rows[j][m - k])
                    .sum();
                let rest = self.rows[i][k] - sum;
                self.rows[i][k] = if k > 0 {
                    rest / self.rows[j][0]
                } else if rest > 0.0 && rest.is_finite() {
                    rest.sqrt()
                } else {
                    return None;
                };
            }
        }
        Some(Factor(self))
    }
}

/// Cholesky's factor of a [`Banded`] matrix.
#[derive(Clone, Debug)]
pub(super) struct Factor(Banded);

impl Factor {
    /// Solves for a right side.
    pub(super) fn solve(&self, right: &[f64]) -> Vec<f64> {
        let (rows, half) = (&self.0.rows, self.0.half);
        let mut x = right.to_vec();
        for i in 0..x.len() {
            let known: f64 = (1..=half.min(i)).map(|k| rows[i][k] * x[i - k]).sum();
            x[i] = (x[i] - known) / rows[i][0];
        }
        for i in (0..x.len()).rev() {
            x[i] /= rows[i][0];
            for k in 1..=half.min(i) {
                x[i - k] -= rows[i][k] * x[i];
            }
        }
        x
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn solves_what_it_multiplies() {
        let mut m = Banded::new(6, 2);
        for i in 0..6 {
            m.add(i, i, 5.0 + i as f64);
            for k in 1..=2_usize.min(i) {
                m.add(i, i - k, -1.0 / k as f64);
            }
        }
        let x = [1.0, -2.0, 3.0, 0.5, 7.0, -1.0];
        let solved = m.clone().factored().unwrap().solve(&m.times(&x));
        assert!(solved.iter().zip(x).all(|(a, b)| (a - b).abs() < 1e-12), "{solved:?}");
        m.add(3, 3, -40.0);
        assert!(m.factored().is_none());
    }
}
