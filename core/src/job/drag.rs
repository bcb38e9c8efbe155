//! One drag due to lift, written in either of the two ways a job knows.

use std::f64::consts::PI;

use super::Drag;

/// Oswald factor that an aspect ratio is worked out with: common practice for a plain wing on a small
/// aircraft.
const USUAL_OSWALD: f64 = 0.8;

impl Drag {
    /// `k` as given, or `1/(π e AR)`.
    #[must_use]
    pub fn induced_factor(&self) -> f64 {
        match (self.k, self.aspect_ratio, self.oswald) {
            (Some(k), _, _) => k,
            (None, Some(ar), Some(e)) => 1.0 / (PI * e * ar),
            _ => 0.0,
        }
    }

    /// The same drag by its induced-drag factor.
    #[must_use]
    pub fn by_factor(&self) -> Self {
        Self { cd0: self.cd0, k: Some(self.induced_factor()), aspect_ratio: None, oswald: None }
    }

    /// The same drag by aspect ratio and Oswald factor: as given, else the ratio that makes it so with the
    /// usual factor, `AR = 1/(π e k)`.
    #[must_use]
    pub fn by_aspect_ratio(&self) -> Self {
        let oswald = self.oswald.unwrap_or(USUAL_OSWALD);
        let ratio = 1.0 / (PI * oswald * self.induced_factor());
        Self {
            cd0: self.cd0,
            k: None,
            aspect_ratio: Some(if self.k.is_none() { self.aspect_ratio.unwrap_or(ratio) } else { ratio }),
            oswald: Some(oswald),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn either_way_is_the_same_drag() {
        let by_factor = Drag { cd0: 0.03, k: Some(0.058), aspect_ratio: None, oswald: None };
        let by_ratio = by_factor.by_aspect_ratio();
        assert!((by_ratio.aspect_ratio.unwrap() - 6.860).abs() < 1e-3 && by_ratio.k.is_none());
        let again = by_ratio.by_factor();
        assert!((again.k.unwrap() - 0.058).abs() < 1e-12 && again.oswald.is_none());
        assert_eq!(by_ratio.by_aspect_ratio(), by_ratio);
        assert_eq!(by_factor.by_factor(), by_factor);
    }
}
