//! A straight map between values and pixels.

/// A straight map from a span of values to a span of pixels; either span may run downwards.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Linear {
    values: (f64, f64),
    px: (f64, f64),
}

impl Linear {
    /// Maps `values.0` to `px.0` and `values.1` to `px.1`. A span of values without length, or not finite,
    /// is replaced by one of length 1 about its start, so that every pixel stays finite.
    #[must_use]
    pub fn new(values: (f64, f64), px: (f64, f64)) -> Self {
        let start = if values.0.is_finite() { values.0 } else { 0.0 };
        let usable = values.1.is_finite() && (values.1 - start).abs() > 1e-12;
        let values = if usable { (start, values.1) } else { (start - 0.5, start + 0.5) };
        Self { values, px }
    }

    /// The pixel of a value; beyond the span it is continued.
    #[must_use]
    pub fn px(&self, value: f64) -> f64 {
        self.px.0 + (value - self.values.0) / (self.values.1 - self.values.0) * (self.px.1 - self.px.0)
    }

    /// The value at a pixel.
    #[must_use]
    pub fn value(&self, px: f64) -> f64 {
        let share = (px - self.px.0) / (self.px.1 - self.px.0);
        self.values.0 + share * (self.values.1 - self.values.0)
    }

    /// The span of values, rising.
    #[must_use]
    pub fn span(&self) -> (f64, f64) {
        (self.values.0.min(self.values.1), self.values.0.max(self.values.1))
    }

    /// Whether a value is in the span, its ends included.
    #[must_use]
    pub fn holds(&self, value: f64) -> bool {
        let (low, high) = self.span();
        (low..=high).contains(&value)
    }

    /// A value moved to the nearer end of the span when it lies outside.
    #[must_use]
    pub fn held(&self, value: f64) -> f64 {
        let (low, high) = self.span();
        value.clamp(low, high)
    }

    /// Pixels per unit of value, signed.
    #[must_use]
    pub fn slope(&self) -> f64 {
        (self.px.1 - self.px.0) / (self.values.1 - self.values.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn goes_there_and_back() {
        let y = Linear::new((-2.0, 6.0), (400.0, 0.0));
        assert_eq!((y.px(-2.0), y.px(6.0), y.px(2.0)), (400.0, 0.0, 200.0));
        assert_eq!(y.value(y.px(3.25)), 3.25);
        assert_eq!(y.slope(), -50.0);
    }

    #[test]
    fn stays_finite_without_a_span() {
        for values in [(3.0, 3.0), (f64::NAN, 1.0), (0.0, f64::INFINITY)] {
            let x = Linear::new(values, (0.0, 100.0));
            assert!(x.px(1.0).is_finite() && x.value(40.0).is_finite(), "{values:?}");
        }
    }

    #[test]
    fn holds_values_at_its_ends() {
        let x = Linear::new((7.0, -7.0), (0.0, 1.0));
        assert_eq!((x.held(-9.0), x.held(9.0), x.held(1.0)), (-7.0, 7.0, 1.0));
        assert!(x.holds(7.0) && !x.holds(7.1));
    }
}
