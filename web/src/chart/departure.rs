//! The departure scale: eleven classes, blue for slack, wood-brown for hard, paper for what works.

/// Breaks between the classes, degrees.
pub const BREAKS_DEG: [f64; 10] = [-6.0, -4.0, -3.0, -2.0, -1.0, 1.0, 2.0, 3.0, 4.0, 6.0];
/// How many classes there are.
pub const CLASSES: usize = BREAKS_DEG.len() + 1;

/// Class of a departure, 0 (most slack) to 10 (hardest); 5 holds the best. A break belongs to the class
/// nearer zero.
#[must_use]
pub fn class(departure_deg: f64) -> usize {
    BREAKS_DEG.iter().filter(|&&b| departure_deg > b || (b < 0.0 && departure_deg == b)).count()
}

/// Style class of a departure: it sets `--fill` and `--on-fill` for the element and what is in it.
#[must_use]
pub fn style(departure_deg: Option<f64>) -> &'static str {
    const NAMES: [&str; CLASSES] = [
        "departure-0",
        "departure-1",
        "departure-2",
        "departure-3",
        "departure-4",
        "departure-5",
        "departure-6",
        "departure-7",
        "departure-8",
        "departure-9",
        "departure-10",
    ];
    departure_deg.filter(|d| d.is_finite()).map_or("departure-none", |d| NAMES[class(d)])
}

/// Style class of a class of the scale, as [`style`].
#[must_use]
pub fn style_of_class(class: usize) -> &'static str {
    style(Some(representative_deg(class)))
}

/// A departure in the middle of a class, degrees.
fn representative_deg(class: usize) -> f64 {
    let low = class.checked_sub(1).and_then(|i| BREAKS_DEG.get(i)).copied().unwrap_or(-8.0);
    let high = BREAKS_DEG.get(class).copied().unwrap_or(8.0);
    0.5 * (low + high)
}

/// The word for a departure: what is slack, what is hard.
#[must_use]
pub fn word(departure_deg: f64) -> &'static str {
    if departure_deg < 0.0 { "slack" } else { "hard" }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn have_the_breaks_nearer_zero_inside() {
        assert_eq!(BREAKS_DEG.map(class), [1, 2, 3, 4, 5, 5, 6, 7, 8, 9]);
        assert_eq!([-99.0, -6.01, -1.01, 0.0, 1.01, 6.01, 99.0].map(class), [0, 0, 4, 5, 6, 10, 10]);
    }

    #[test]
    fn are_symmetric() {
        for i in 1..100 {
            let d = 0.13 * f64::from(i);
            assert_eq!(class(d) + class(-d), 10, "{d}");
        }
    }

    #[test]
    fn have_a_style_each() {
        for c in 0..CLASSES {
            assert_eq!(style_of_class(c), format!("departure-{c}"));
        }
        assert_eq!(style(None), "departure-none");
        assert_eq!(style(Some(f64::NAN)), "departure-none");
    }
}
