//! A polar beyond its own angles: from the last row to ±180°.
//!
//! Method: L. A. Viterna and R. D. Corrigan, *Fixed Pitch Rotor Performance of Large Horizontal Axis Wind
//! Turbines*, 1981, from the last row of the table to 90°. Choice beyond (the paper leaves it open): 90° to
//! 180° mirrors it with lift times −0.7, negative angles take −0.7 of the lift of the positive ones, drag is
//! even, and the last stretch to ±180° joins lift to zero linearly with the drag of its beginning. Rows of
//! the table always take precedence and are joined by the interpolation itself.

use std::f64::consts::{FRAC_PI_2, PI};

/// Aspect ratio put into the flat-plate drag: that of a propeller blade. Drag broadside follows as 1.11 +
/// 0.018 AR.
pub const BLADE_ASPECT_RATIO: f64 = 8.0;
/// Share of the lift kept where the section is met from behind or from its upper side.
const BACKWARD_LIFT: f64 = 0.7;
/// Least drag coefficient given.
const LEAST_DRAG: f64 = 1e-4;
/// Angles at which the extension is tabulated, degrees apart.
const STEP_DEG: f64 = 2.5;

/// Lift and drag coefficient.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Coefficients {
    /// Lift coefficient.
    pub cl: f64,
    /// Drag coefficient.
    pub cd: f64,
}

/// The extension anchored at one row of a polar.
#[derive(Clone, Copy, Debug)]
pub struct Extension {
    anchor_rad: f64,
    a1: f64,
    a2: f64,
    b1: f64,
    b2: f64,
}

impl Extension {
    /// An extension through the coefficients at `anchor_rad`, kept between 3° and 80°.
    ///
    /// # References
    /// Viterna and Corrigan 1981: `A2 = (cls − cdm sin as cos as) sin as/cos² as`,
    /// `B2 = (cds − cdm sin² as)/cos as`, `cdm = 1.11 + 0.018 AR`.
    #[must_use]
    pub fn new(anchor_rad: f64, at_anchor: Coefficients, aspect_ratio: f64) -> Self {
        let a = anchor_rad.clamp(3f64.to_radians(), 80f64.to_radians());
        let (s, c) = a.sin_cos();
        let cdm = 1.11 + 0.018 * aspect_ratio;
        Self {
            anchor_rad: a,
            a1: cdm / 2.0,
            a2: (at_anchor.cl - cdm * s * c) * s / (c * c),
            b1: cdm,
            b2: (at_anchor.cd - cdm * s * s) / c,
        }
    }

    /// Coefficients at an angle of attack (rad, −π to π), for `|alpha|` from the anchor up.
    #[must_use]
    pub fn at(&self, alpha_rad: f64) -> Coefficients {
        let x = alpha_rad.abs();
        let sign = if alpha_rad < 0.0 { -1.0 } else { 1.0 };
        let (cl, cd) = if x <= FRAC_PI_2 {
            let front = if alpha_rad < 0.0 { BACKWARD_LIFT } else { 1.0 };
            let c = self.front(x);
            (front * c.cl, c.cd)
        } else {
            let c = self.front((PI - x).max(self.anchor_rad));
            let fade = ((PI - x) / self.anchor_rad).min(1.0);
            (-BACKWARD_LIFT * c.cl * fade, c.cd)
        };
        Coefficients { cl: sign * cl, cd: cd.max(LEAST_DRAG) }
    }

    fn front(&self, x: f64) -> Coefficients {
        let (s, c) = x.max(self.anchor_rad).sin_cos();
        Coefficients { cl: self.a1 * (2.0 * s * c) + self.a2 * c * c / s, cd: self.b1 * s * s + self.b2 * c }
    }
}

/// Rows (rad, coefficients) that carry a polar's own rows on to ±π.
#[must_use]
pub(super) fn extended(rows: &[(f64, Coefficients)]) -> Vec<(f64, Coefficients)> {
    let (Some(&first), Some(&last)) = (rows.first(), rows.last()) else { return Vec::new() };
    let extension = Extension::new(last.0, last.1, BLADE_ASPECT_RATIO);
    let gap = 0.8 * STEP_DEG.to_radians();
    let nodes = || (-72..=72).map(|k| (f64::from(k) * STEP_DEG).to_radians());
    let made = |a: f64| (a, extension.at(a));
    let mut all: Vec<_> = nodes().filter(|&a| a < first.0 - gap).map(made).collect();
    if all.is_empty() && first.0 > -PI {
        all.push((-PI, first.1));
    }
    all.extend_from_slice(rows);
    let before = all.len();
    all.extend(nodes().filter(|&a| a > last.0 + gap).map(made));
    if all.len() == before && last.0 < PI {
        all.push((PI, last.1));
    }
    all
}

#[cfg(test)]
mod tests {
    use super::*;

    fn sample() -> Extension {
        Extension::new(15f64.to_radians(), Coefficients { cl: 1.3, cd: 0.05 }, 10.0)
    }

    #[test]
    fn meets_the_table_at_the_anchor() {
        let c = sample().at(15f64.to_radians());
        assert!((c.cl - 1.3).abs() < 1e-12 && (c.cd - 0.05).abs() < 1e-12);
    }

    #[test]
    fn broadside_drag_is_the_flat_plate_value_and_lift_is_nothing() {
        let c = sample().at(FRAC_PI_2);
        assert!((c.cd - 1.29).abs() < 1e-12, "1.11 + 0.018 × 10 (Viterna and Corrigan 1981)");
        assert!(c.cl.abs() < 1e-12);
    }

    #[test]
    fn follows_the_choices_beyond_ninety_degrees_and_below_zero() {
        let e = sample();
        let (f, b) = (e.at(50f64.to_radians()), e.at(130f64.to_radians()));
        assert!((b.cl + 0.7 * f.cl).abs() < 1e-12 && (b.cd - f.cd).abs() < 1e-12);
        let n = e.at(-50f64.to_radians());
        assert!((n.cl + 0.7 * f.cl).abs() < 1e-12 && (n.cd - f.cd).abs() < 1e-12);
        assert!(e.at(PI).cl.abs() < 1e-12);
    }

    #[test]
    fn covers_every_angle_without_touching_the_rows() {
        let rows: Vec<_> = (-5..=15)
            .map(|d| (f64::from(d).to_radians(), Coefficients { cl: 0.1 * f64::from(d), cd: 0.02 }))
            .collect();
        let all = extended(&rows);
        assert!((all[0].0 + PI).abs() < 1e-12 && (all[all.len() - 1].0 - PI).abs() < 1e-12);
        assert!(all.windows(2).all(|w| w[0].0 < w[1].0));
        assert!(rows.iter().all(|r| all.contains(r)));
    }

    /// A table that covers nearly the whole turn is carried to its two ends and gets no row between.
    #[test]
    fn a_table_of_nearly_the_whole_turn_is_closed_at_both_ends() {
        let rows: Vec<_> = (-179..=179)
            .map(|d| f64::from(d).to_radians())
            .map(|a| (a, Coefficients { cl: (2.0 * a).sin(), cd: 1.0 - 0.9 * a.cos() }))
            .collect();
        let all = extended(&rows);
        assert_eq!(all.len(), rows.len() + 2);
        assert_eq!((all[0].0, all[0].1), (-PI, rows[0].1));
        assert_eq!((all[all.len() - 1].0, all[all.len() - 1].1), (PI, rows[rows.len() - 1].1));
    }
}
