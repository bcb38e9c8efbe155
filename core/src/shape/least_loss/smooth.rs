//! A smooth run through figures along the blade.

/// The weighted least-squares polynomial of a degree through figures, at their own places, by discrete
/// orthogonal polynomials (G. E. Forsythe, J. SIAM 5, 1957; from memory). All lists are of one length;
/// weights are not below 0.
pub(super) fn smoothed(x: &[f64], y: &[f64], weight: &[f64], degree: u32) -> Vec<f64> {
    let dot =
        |a: &[f64], b: &[f64]| -> f64 { a.iter().zip(b).zip(weight).map(|((a, b), w)| w * a * b).sum() };
    let (mut before, mut now) = (vec![0.0; x.len()], vec![1.0; x.len()]);
    let (mut sum, mut norm_before) = (vec![0.0; x.len()], f64::INFINITY);
    for _ in 0..=degree {
        let norm = dot(&now, &now);
        // As many terms as there are places.
        if norm <= 1e-12 * weight.iter().sum::<f64>() {
            break;
        }
        let share = dot(y, &now) / norm;
        sum.iter_mut().zip(&now).for_each(|(s, p)| *s += share * p);
        let middle = x.iter().zip(&now).zip(weight).map(|((x, p), w)| w * x * p * p).sum::<f64>() / norm;
        let back = norm / norm_before;
        let next = x.iter().zip(now.iter().zip(&before)).map(|(x, (p, q))| (x - middle) * p - back * q);
        (before, now) = (now.clone(), next.collect());
        norm_before = norm;
    }
    sum
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_cubic_is_its_own_fit_and_noise_is_smoothed() {
        let x: Vec<f64> = (0..9).map(|i| 0.1 * f64::from(i)).collect();
        let cubic = |x: &f64| 1.0 - 2.0 * x + 3.0 * x * x - x * x * x;
        let y: Vec<f64> = x.iter().map(cubic).collect();
        let weight = [1.0, 2.0, 0.5, 1.0, 3.0, 1.0, 1.0, 0.1, 1.0];
        assert!(smoothed(&x, &y, &weight, 3).iter().zip(&y).all(|(a, b)| (a - b).abs() < 1e-12));
        let jumps: Vec<f64> = (0..9).map(|i| f64::from(i % 2)).collect();
        let smooth = smoothed(&x, &jumps, &[1.0; 9], 1);
        assert!(smooth.windows(2).all(|w| (w[1] - w[0]).abs() < 0.1), "{smooth:?}");
        assert_eq!(smoothed(&[0.5], &[7.0], &[2.0], 3), vec![7.0]);
    }
}
