//! Round places for the ticks of an axis, in the unit shown.

use super::number::fixed;

/// One tick of an axis.
#[derive(Clone, Debug, PartialEq)]
pub struct Tick {
    /// Where, in the unit shown.
    pub at: f64,
    /// Its figure.
    pub label: String,
}

/// Most ticks on any axis.
pub const MOST: usize = 6;

/// At most `most` ticks on round numbers between `low` and `high`, both in the unit shown.
#[must_use]
pub fn ticks(low: f64, high: f64, most: usize) -> Vec<Tick> {
    let Some(step) = step(low, high, most) else { return Vec::new() };
    let decimals = decimals(step);
    let (first, last) = ends(low, high, step);
    (first..=last).map(|i| i as f64 * step).map(|at| Tick { at, label: fixed(at, decimals) }).collect()
}

/// The span widened to the next round numbers, so that the curve keeps off the frame.
#[must_use]
pub fn widened(low: f64, high: f64) -> (f64, f64) {
    let Some(step) = step(low, high, MOST) else { return (low, high) };
    ((low / step).floor() * step, (high / step).ceil() * step)
}

/// The smallest round step that gives no more than `most` ticks.
fn step(low: f64, high: f64, most: usize) -> Option<f64> {
    if !(low.is_finite() && high.is_finite() && high > low && most > 0) {
        return None;
    }
    let power = ((high - low) / most as f64).log10().floor() as i32;
    (power..=power + 2).flat_map(round_steps).find(|&step| {
        let (first, last) = ends(low, high, step);
        usize::try_from(last - first + 1).is_ok_and(|count| count <= most)
    })
}

/// 1, 2, 5 and their tenfolds; 25 and its tenfolds too, where no decimal is needed for it.
fn round_steps(power: i32) -> impl Iterator<Item = f64> {
    let of_ten = move |m: f64| if power < 0 { m / 10_f64.powi(-power) } else { m * 10_f64.powi(power) };
    [1.0, 2.0, 2.5, 5.0].into_iter().filter(move |m| *m != 2.5 || power > 0).map(of_ten)
}

fn ends(low: f64, high: f64, step: f64) -> (i64, i64) {
    const HAIR: f64 = 1e-9;
    ((low / step - HAIR).ceil() as i64, (high / step + HAIR).floor() as i64)
}

fn decimals(step: f64) -> usize {
    (0..8).find(|&d| (step * 10_f64.powi(d)).fract() < 1e-9).unwrap_or(8) as usize
}

#[cfg(test)]
mod tests {
    use super::*;

    fn labels(low: f64, high: f64) -> Vec<String> {
        ticks(low, high, MOST).into_iter().map(|t| t.label).collect()
    }

    #[test]
    fn are_round_in_the_unit_shown() {
        assert_eq!(labels(90.0, 760.0), ["200", "400", "600"]);
        assert_eq!(labels(3.54, 29.9), ["5", "10", "15", "20", "25"], "inches");
        assert_eq!(labels(0.0, 230.0), ["0", "50", "100", "150", "200"]);
        assert_eq!(labels(0.0, 0.9), ["0.0", "0.2", "0.4", "0.6", "0.8"]);
        assert_eq!(labels(-5.0, 1.0), ["−4", "−2", "0"]);
    }

    #[test]
    fn are_never_more_than_asked_and_never_none_on_a_real_span() {
        for i in 0..400 {
            let low = -3.7 * f64::from(i);
            let high = low + 1.37_f64.powi(i % 60 - 30);
            for most in 2..=6 {
                let count = ticks(low, high, most).len();
                assert!((1..=most).contains(&count), "{low} {high} {most}: {count}");
            }
        }
    }

    #[test]
    fn are_left_out_where_there_is_no_span() {
        assert!(ticks(1.0, 1.0, 6).is_empty());
        assert!(ticks(f64::NAN, 1.0, 6).is_empty());
        assert!(ticks(0.0, f64::INFINITY, 6).is_empty());
    }

    #[test]
    fn widen_a_span_to_round_numbers() {
        assert_eq!(widened(-3.0, 38.7), (-10.0, 40.0));
    }
}
