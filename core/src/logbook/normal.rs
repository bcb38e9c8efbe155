//! Small symmetric systems: Cholesky's factor of a positive definite matrix and what it solves.

/// The lower factor L of `A = L Lᵀ`; `None` unless A is positive definite.
pub(super) fn factor(a: &[Vec<f64>]) -> Option<Vec<Vec<f64>>> {
    let n = a.len();
    let mut l = vec![vec![0.0; n]; n];
    for i in 0..n {
        for j in 0..=i {
            let sum: f64 = (0..j).map(|k| l[i][k] * l[j][k]).sum();
            if i == j {
                let square = a[i][i] - sum;
                if !(square.is_finite() && square > 0.0) {
                    return None;
                }
                l[i][i] = square.sqrt();
            } else {
                l[i][j] = (a[i][j] - sum) / l[j][j];
            }
        }
    }
    Some(l)
}

/// `L⁻¹ b`.
pub(super) fn whitened(l: &[Vec<f64>], b: &[f64]) -> Vec<f64> {
    let mut x: Vec<f64> = Vec::with_capacity(b.len());
    for (i, value) in b.iter().enumerate() {
        let sum: f64 = x.iter().zip(&l[i]).map(|(x, l)| x * l).sum();
        x.push((value - sum) / l[i][i]);
    }
    x
}

/// The inverse of the matrix of a factor.
pub(super) fn inverse(l: &[Vec<f64>]) -> Vec<Vec<f64>> {
    let n = l.len();
    let columns: Vec<Vec<f64>> = (0..n)
        .map(|k| whitened(l, &(0..n).map(|i| f64::from(u8::from(i == k))).collect::<Vec<_>>()))
        .collect();
    let dot = |a: &[f64], b: &[f64]| a.iter().zip(b).map(|(a, b)| a * b).sum::<f64>();
    (0..n).map(|i| (0..n).map(|j| dot(&columns[i], &columns[j])).collect()).collect()
}

/// A matrix times a vector.
pub(super) fn times(a: &[Vec<f64>], x: &[f64]) -> Vec<f64> {
    a.iter().map(|row| row.iter().zip(x).map(|(a, x)| a * x).sum()).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The matrix of ones with 2 on its diagonal: its inverse in closed form has n/(n + 1) on the diagonal
    /// and −1/(n + 1) beside it.
    #[test]
    fn a_known_matrix_is_inverted() {
        let a: Vec<Vec<f64>> =
            (0..3).map(|i| (0..3).map(|j| if i == j { 2.0 } else { 1.0 }).collect()).collect();
        let inverse = inverse(&factor(&a).unwrap());
        for (i, row) in inverse.iter().enumerate() {
            for (j, v) in row.iter().enumerate() {
                let closed = if i == j { 0.75 } else { -0.25 };
                assert!((v - closed).abs() < 1e-12, "{inverse:?}");
            }
        }
        assert!(factor(&[vec![1.0, 2.0], vec![2.0, 1.0]]).is_none());
        assert!(factor(&[vec![f64::NAN]]).is_none());
    }
}
