//! The few figures that tell polars apart.

use serde::{Deserialize, Serialize};

use crate::section::family::{About, Family};
use crate::section::local::{Local, Situation};
use crate::section::polar::{Polar, TableError};
use crate::section::{best, working_band};

/// Best lift-to-drag and the ends of one polar.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
pub struct Summary {
    /// Angle of best lift-to-drag to the chord line, degrees; none when the section nowhere lifts.
    pub best_angle_deg: Option<f64>,
    /// Greatest lift-to-drag.
    pub best_lift_to_drag: Option<f64>,
    /// Span of angles that keeps 95 % of it, degrees.
    pub working_band_deg: Option<(f64, f64)>,
    /// Angle of zero lift, degrees; none when it lies outside the table.
    pub zero_lift_deg: Option<f64>,
    /// Greatest lift coefficient in the table.
    pub cl_max: f64,
    /// Least drag coefficient in the table.
    pub cd_min: f64,
}

impl Summary {
    /// The figures of a polar, found as a blade finds them: by the same cubics and the same search.
    ///
    /// # Errors
    /// What is wrong with the polar.
    pub fn of(polar: &Polar) -> Result<Self, TableError> {
        let family = Family::new(About::default(), std::slice::from_ref(polar))?;
        let situation = Situation {
            thickness_ratio: polar.thickness_ratio.unwrap_or(0.12),
            reynolds: polar.reynolds.unwrap_or(1e6),
            mach: 0.0,
            stall_delay: 0.0,
        };
        let local = Local::new(&family, situation);
        let found = best(|a| local.at(a), local.landmarks().stall);
        let band = found.map(|b| working_band(|a| local.at(a), b));
        let figures = polar.points.iter();
        let crosses = polar.points.windows(2).any(|w| w[0].cl <= 0.0 && w[1].cl > 0.0);
        Ok(Self {
            best_angle_deg: found.map(|b| b.alpha_rad.to_degrees()),
            best_lift_to_drag: found.map(|b| b.lift_to_drag),
            working_band_deg: band.map(|(a, b)| (a.to_degrees(), b.to_degrees())),
            zero_lift_deg: crosses.then(|| local.landmarks().zero_lift.to_degrees()),
            cl_max: figures.clone().map(|p| p.cl).fold(f64::NEG_INFINITY, f64::max),
            cd_min: figures.map(|p| p.cd).fold(f64::INFINITY, f64::min),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::section::polar::PolarPoint;

    /// cl = 2π(α − `zero`), cd = 0.01 + 0.01 cl²: best at cl = 1, where cl/cd = 50.
    fn polar(zero_deg: f64, angles_deg: std::ops::RangeInclusive<i32>) -> Polar {
        let point = |k: i32| {
            let alpha_deg = f64::from(k);
            let cl = std::f64::consts::TAU * (alpha_deg - zero_deg).to_radians();
            PolarPoint { alpha_deg, cl, cd: 0.01 + 0.01 * cl * cl, cm: None }
        };
        Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points: angles_deg.map(point).collect() }
    }

    #[test]
    fn the_figures_are_those_of_the_polar() {
        let found = Summary::of(&polar(-2.0, -6..=13)).unwrap();
        assert!((found.zero_lift_deg.unwrap() + 2.0).abs() < 1e-9);
        // Between rows a degree apart cl/cd is met to 0.2 %, and its top is flat.
        assert!((found.best_lift_to_drag.unwrap() - 50.0).abs() < 0.1);
        let expected = (1.0 / std::f64::consts::TAU).to_degrees() - 2.0;
        assert!((found.best_angle_deg.unwrap() - expected).abs() < 0.5);
        assert!((found.cl_max - std::f64::consts::TAU * 15f64.to_radians()).abs() < 1e-9);
        assert!((found.cd_min - 0.01).abs() < 1e-9);
    }

    #[test]
    fn a_polar_without_a_crossing_tells_no_angle_of_zero_lift() {
        for angles_deg in [0..=8, -12..=-3] {
            assert_eq!(Summary::of(&polar(-2.0, angles_deg)).unwrap().zero_lift_deg, None);
        }
    }
}
