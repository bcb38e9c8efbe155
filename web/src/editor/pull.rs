//! What moving a ring means: the step of each measure and how a pull of the pointer becomes a figure.

use crate::state::Measure;

/// A ring held by the pointer. The figure is kept unrounded so that small movements add up.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Pull {
    /// The station.
    pub station: usize,
    /// What is moved.
    pub measure: Measure,
    /// Where the pointer was, pixels down.
    pub y_px: f64,
    /// The figure there, SI, unrounded.
    pub value: f64,
}

/// Finer by so much while Shift is held.
const FINER: f64 = 10.0;

/// The smallest step of a measure, SI: 0.1° or 0.5 mm.
#[must_use]
pub fn step(measure: Measure, fine: bool) -> f64 {
    let coarse = match measure {
        Measure::Angle | Measure::FaceAngle => 0.1,
        _ => 0.000_5,
    };
    if fine { coarse / FINER } else { coarse }
}

/// A figure on the nearest step.
#[must_use]
pub fn on_step(measure: Measure, value: f64, fine: bool) -> f64 {
    // Whole steps per unit divide exactly where the step itself has no exact binary form.
    let steps_per_unit = (1.0 / step(measure, fine)).round();
    (value * steps_per_unit).round() / steps_per_unit
}

/// The figure one press of a key away, on a step.
#[must_use]
pub fn pressed(measure: Measure, value: f64, upward: bool, fine: bool) -> f64 {
    let by = step(measure, fine);
    on_step(measure, if upward { value + by } else { value - by }, fine)
}

impl Pull {
    /// The ring after the pointer has moved to `y_px`; `px_per_unit` is how far down one unit goes (below
    /// zero: up).
    #[must_use]
    pub fn moved(self, y_px: f64, px_per_unit: f64, fine: bool) -> Self {
        let by = (y_px - self.y_px) / px_per_unit;
        Self { y_px, value: self.value + if fine { by / FINER } else { by }, ..self }
    }

    /// The figure to show, on a step.
    #[must_use]
    pub fn shown(self, fine: bool) -> f64 {
        on_step(self.measure, self.value, fine)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn steps_are_a_tenth_of_a_degree_and_half_a_millimetre() {
        assert_eq!(on_step(Measure::Angle, 19.537, false), 19.5);
        assert_eq!(on_step(Measure::Angle, 19.537, true), 19.54);
        assert_eq!(on_step(Measure::Chord, 0.075_74, false), 0.075_5);
        assert_eq!(on_step(Measure::Chord, 0.075_74, true), 0.075_75);
    }

    #[test]
    fn a_press_goes_one_step() {
        assert_eq!(pressed(Measure::Angle, 19.5, true, false), 19.6);
        assert_eq!(pressed(Measure::Angle, 19.5, false, true), 19.49);
        assert_eq!(pressed(Measure::Thickness, 0.010_9, true, false), 0.011_5);
    }

    #[test]
    fn small_movements_add_up_and_shift_makes_them_finer() {
        let start = Pull { station: 7, measure: Measure::Angle, y_px: 100.0, value: 19.5 };
        // Two pixels a degree, upward.
        let pulled = (1..=10).fold(start, |p, i| p.moved(100.0 - f64::from(i) * 0.1, -2.0, false));
        assert_eq!(pulled.shown(false), 20.0);
        assert_eq!(start.moved(99.0, -2.0, true).shown(true), 19.55);
    }
}
