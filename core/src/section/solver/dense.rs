//! A square dense system: factors by rows with partial pivoting, kept for several right-hand sides.

/// A matrix by rows.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Matrix {
    pub(super) rows: usize,
    pub(super) cols: usize,
    data: Vec<f64>,
}

impl Matrix {
    pub(super) fn zeros(rows: usize, cols: usize) -> Self {
        Self { rows, cols, data: vec![0.0; rows * cols] }
    }

    pub(super) fn row(&self, i: usize) -> &[f64] {
        &self.data[i * self.cols..(i + 1) * self.cols]
    }

    pub(super) fn row_mut(&mut self, i: usize) -> &mut [f64] {
        &mut self.data[i * self.cols..(i + 1) * self.cols]
    }

    /// Product with a vector.
    #[cfg(test)]
    pub(super) fn times(&self, x: &[f64]) -> Vec<f64> {
        (0..self.rows).map(|i| dot(self.row(i), x)).collect()
    }
}

/// Sum of products.
pub(super) fn dot(a: &[f64], b: &[f64]) -> f64 {
    a.iter().zip(b).map(|(a, b)| a * b).sum()
}

/// `y += factor x`.
pub(super) fn add_scaled(y: &mut [f64], factor: f64, x: &[f64]) {
    for (y, x) in y.iter_mut().zip(x) {
        *y += factor * x;
    }
}

/// The factors of a matrix.
#[derive(Debug, Clone)]
pub(super) struct Factors {
    lu: Matrix,
    order: Vec<usize>,
}

impl Factors {
    /// Factors a square matrix; none when it is singular or not finite.
    pub(super) fn new(mut lu: Matrix) -> Option<Self> {
        let n = lu.rows;
        let mut order: Vec<usize> = (0..n).collect();
        for k in 0..n {
            let size = |i: &usize| lu.row(*i)[k].abs();
            let pivot = (k..n).max_by(|i, j| size(i).total_cmp(&size(j)))?;
            if !(size(&pivot) > 1e-300 && size(&pivot).is_finite()) {
                return None;
            }
            if pivot != k {
                order.swap(pivot, k);
                let (head, tail) = lu.data.split_at_mut(pivot * n);
                head[k * n..(k + 1) * n].swap_with_slice(&mut tail[..n]);
            }
            let (head, tail) = lu.data.split_at_mut((k + 1) * n);
            let top = &head[k * n..];
            for row in tail.chunks_exact_mut(n) {
                let factor = row[k] / top[k];
                row[k] = factor;
                if factor != 0.0 {
                    add_scaled(&mut row[k + 1..], -factor, &top[k + 1..]);
                }
            }
        }
        Some(Self { lu, order })
    }

    /// Solves for one right-hand side.
    pub(super) fn solve(&self, right: &[f64]) -> Vec<f64> {
        let n = self.lu.rows;
        let mut x: Vec<f64> = self.order.iter().map(|&i| right[i]).collect();
        for i in 1..n {
            x[i] -= dot(&self.lu.row(i)[..i], &x[..i]);
        }
        for i in (0..n).rev() {
            let rest = dot(&self.lu.row(i)[i + 1..], &x[i + 1..]);
            x[i] = (x[i] - rest) / self.lu.row(i)[i];
        }
        x
    }
}

/// Solves a system of a few unknowns by elimination with partial pivoting; `right` holds several columns.
/// None if singular.
pub(super) fn solve_small<const N: usize, const C: usize>(
    mut a: [[f64; N]; N],
    mut right: [[f64; C]; N],
) -> Option<[[f64; C]; N]> {
    for k in 0..N {
        let pivot = (k..N).max_by(|&i, &j| a[i][k].abs().total_cmp(&a[j][k].abs()))?;
        if !(a[pivot][k].abs() > 1e-300 && a[pivot][k].is_finite()) {
            return None;
        }
        a.swap(k, pivot);
        right.swap(k, pivot);
        let (top, top_right) = (a[k], right[k]);
        for (row, row_right) in a[k + 1..].iter_mut().zip(&mut right[k + 1..]) {
            let factor = row[k] / top[k];
            add_scaled(&mut row[k..], -factor, &top[k..]);
            add_scaled(row_right, -factor, &top_right);
        }
    }
    for k in (0..N).rev() {
        let (head, tail) = right.split_at_mut(k + 1);
        for (weight, solved) in a[k][k + 1..].iter().zip(tail.iter()) {
            add_scaled(&mut head[k], -weight, solved);
        }
        head[k] = head[k].map(|value| value / a[k][k]);
    }
    Some(right)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_system_is_solved() {
        let n = 7;
        let mut a = Matrix::zeros(n, n);
        for i in 0..n {
            for j in 0..n {
                a.row_mut(i)[j] = ((i * 7 + j * j * 3 + i * j + 1) as f64).sin();
            }
        }
        let x: Vec<f64> = (0..n).map(|i| i as f64 - 2.5).collect();
        let solved = Factors::new(a.clone()).expect("regular").solve(&a.times(&x));
        assert!(x.iter().zip(&solved).all(|(a, b)| (a - b).abs() < 1e-10));
        assert!(Factors::new(Matrix::zeros(3, 3)).is_none());
        let small = solve_small([[0.0, 2.0], [4.0, 1.0]], [[2.0], [9.0]]).expect("regular");
        assert!((small[0][0] - 2.0).abs() < 1e-15 && (small[1][0] - 1.0).abs() < 1e-15);
    }
}
