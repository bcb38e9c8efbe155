//! What to compute for a blade: Reynolds numbers and thickness ratios that cover its stations.

/// Most values proposed.
const MOST: usize = 5;

/// Reynolds numbers from the least to the greatest of the stations', each at most about twice the one before
/// while five are enough, rounded to two figures.
///
/// ```
/// use spokeshave::section::make::proposed_reynolds;
/// assert_eq!(proposed_reynolds(&[210e3, 790e3]), [210e3, 410e3, 790e3]);
/// ```
#[must_use]
pub fn proposed_reynolds(stations: &[f64]) -> Vec<f64> {
    let [least, most] = super::REYNOLDS;
    let Some((low, high)) = span(stations, least, most) else { return Vec::new() };
    let count = ((high / low).log2().ceil() as usize + 1).clamp(2, MOST);
    let ratio = (high / low).powf(1.0 / (count - 1) as f64);
    let mut values: Vec<f64> = (0..count).map(|k| two_figures(low * ratio.powf(k as f64))).collect();
    values.dedup();
    values
}

/// Thickness ratios for the stations': the thinnest, the thickest and one between, in whole hundredths.
///
/// ```
/// use spokeshave::section::make::proposed_thickness;
/// assert_eq!(proposed_thickness(&[0.09, 0.21]), [0.09, 0.15, 0.21]);
/// ```
#[must_use]
pub fn proposed_thickness(stations: &[f64]) -> Vec<f64> {
    let Some((low, high)) = span(stations, 0.01, 0.6) else { return Vec::new() };
    let hundredths = |t: f64| (100.0 * t).round() / 100.0;
    let mut values = [low, 0.5 * (low + high), high].map(hundredths).to_vec();
    values.dedup();
    values
}

/// Least and greatest of the values within a range.
fn span(values: &[f64], least: f64, most: f64) -> Option<(f64, f64)> {
    let fair = values.iter().filter(|v| v.is_finite()).map(|v| v.clamp(least, most));
    let (low, high) = fair.fold((f64::INFINITY, 0.0_f64), |(a, b), v| (a.min(v), b.max(v)));
    low.is_finite().then_some((low, high))
}

fn two_figures(value: f64) -> f64 {
    let unit = 10f64.powi(value.log10().floor() as i32 - 1);
    (value / unit).round() * unit
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn thicknesses_are_the_ends_and_the_middle_in_hundredths() {
        assert_eq!(proposed_thickness(&[0.081, 0.302, 0.12]), [0.08, 0.19, 0.3]);
        assert_eq!(proposed_thickness(&[0.12]), [0.12]);
        // What can be asked for is 0.01 to 0.6.
        assert_eq!(proposed_thickness(&[0.001, 0.9]), [0.01, 0.31, 0.6]);
        assert!(proposed_thickness(&[f64::NAN]).is_empty());
    }
}
