//! The tables of a family as curves, at Mach 0 and without stall delay, for whoever draws them.

use super::best::best;
use super::family::Family;
use super::local::{Local, Situation};

/// Lift and drag over the angle of attack at one Reynolds number.
#[derive(Clone, Debug, PartialEq)]
pub struct SectionCurve {
    /// Reynolds number.
    pub reynolds: f64,
    /// Angle of attack to the chord line in degrees, lift and drag coefficient, over the angles of the
    /// tables.
    pub points: Vec<[f64; 3]>,
    /// Angle of best lift-to-drag in degrees, and that lift-to-drag; none when the section nowhere lifts.
    pub best: Option<(f64, f64)>,
}

/// Step of the curves, degrees.
const STEP_DEG: f64 = 0.25;
/// Angles beyond this are the extension past stall in most tables and of no use in a drawing, degrees.
const WIDEST_DEG: f64 = 25.0;

/// The curves of a family at a thickness ratio, one for each of its Reynolds numbers.
///
/// ```
/// use spokeshave::section::{library, section_curves};
/// let family = library().family("clark-y", 9.0).expect("shipped");
/// let curves = section_curves(family, 0.12);
/// assert!(curves.len() >= 8 && curves.iter().all(|c| c.points.len() > 20));
/// ```
#[must_use]
pub fn section_curves(family: &Family, thickness_ratio: f64) -> Vec<SectionCurve> {
    family.reynolds_numbers().into_iter().map(|reynolds| curve(family, thickness_ratio, reynolds)).collect()
}

fn curve(family: &Family, thickness_ratio: f64, reynolds: f64) -> SectionCurve {
    let local = Local::new(family, Situation { thickness_ratio, reynolds, mach: 0.0, stall_delay: 0.0 });
    let marks = local.landmarks();
    let first = marks.first.to_degrees().max(-WIDEST_DEG);
    let last = marks.last.to_degrees().min(WIDEST_DEG);
    let steps = ((last - first) / STEP_DEG).floor().max(0.0) as usize;
    let point = |alpha_deg: f64| {
        let c = local.at(alpha_deg.to_radians());
        [alpha_deg, c.cl, c.cd]
    };
    let found = best(|a| local.at(a), marks.stall);
    SectionCurve {
        reynolds,
        points: (0..=steps).map(|k| point(first + STEP_DEG * k as f64)).collect(),
        best: found.map(|b| (b.alpha_rad.to_degrees(), b.lift_to_drag)),
    }
}

#[cfg(test)]
mod tests {
    use super::super::family::About;
    use super::super::polar::{Polar, PolarPoint};
    use super::*;

    /// Lift 0.1 per degree and constant drag, from −10.1° to 12.3°, at two Reynolds numbers.
    #[test]
    fn curves_run_in_quarter_degrees_over_the_angles_of_the_table_and_no_farther() {
        let polar = |reynolds: f64| {
            let point = |k: i32| {
                let alpha_deg = -10.1 + 1.4 * f64::from(k);
                PolarPoint { alpha_deg, cl: 0.1 * alpha_deg, cd: 0.01, cm: None }
            };
            let points = (0..=16).map(point).collect();
            Polar { reynolds: Some(reynolds), mach: 0.0, thickness_ratio: None, points }
        };
        let family = Family::new(About::default(), &[polar(1e5), polar(1e6)]).unwrap();
        let curves = section_curves(&family, 0.12);
        assert_eq!(curves.iter().map(|c| c.reynolds).collect::<Vec<_>>(), [1e5, 1e6]);
        for curve in curves {
            assert!((curve.points[0][0] + 10.1).abs() < 1e-9);
            let last = curve.points[curve.points.len() - 1][0];
            assert!(last <= 12.3 + 1e-9 && last > 12.3 - 0.25, "{last}");
            assert!(curve.points.windows(2).all(|p| (p[1][0] - p[0][0] - 0.25).abs() < 1e-9));
            // Beside the first and the last row the curve bends towards the extension of the table.
            let mut inner = curve.points.iter().filter(|p| p[0].abs() < 8.0);
            assert!(inner.clone().count() > 60);
            assert!(inner.all(|p| (p[1] - 0.1 * p[0]).abs() < 1e-9 && (p[2] - 0.01).abs() < 1e-12));
            let (angle_deg, lift_to_drag) = curve.best.unwrap();
            assert!((angle_deg - 12.3).abs() < 2e-3 && (lift_to_drag - 123.0).abs() < 0.03);
        }
    }
}
