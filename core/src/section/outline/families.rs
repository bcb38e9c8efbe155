//! Families of sections drawn from formulas or from published ordinates.
//!
//! # References
//! Jacobs, Ward, Pinkerton, NACA Report 460 (1933): four-digit sections. Lindsey, Stevenson, Daley, NACA TN
//! 1546 (1948): 16-series thickness. Abbott, von Doenhoff, Stivers, NACA Report 824 (1945): mean line a = 1.
//! Coefficients from memory.

use std::f64::consts::PI;

use super::Outline;
use super::error::OutlineError;
use super::ordinates::{CLARK_Y, RAF_6};
use super::spline::{Cubic, End};

/// Points on each side of a section that is drawn here.
const PER_SIDE: u32 = 80;
/// Thickness ratios that the formulas are drawn for.
const THICKNESS: [f64; 2] = [0.02, 0.4];

/// A figure within its range.
fn figure(what: &'static str, found: f64, [least, most]: [f64; 2]) -> Result<f64, OutlineError> {
    if (least..=most).contains(&found) {
        Ok(found)
    } else {
        Err(OutlineError::Figure { what, found, least, most })
    }
}

/// Stations from nose to edge, close together at both.
fn stations() -> impl DoubleEndedIterator<Item = f64> {
    (0..=PER_SIDE).map(|k| 0.5 * (1.0 - (PI * f64::from(k) / f64::from(PER_SIDE)).cos()))
}

/// Lays a thickness square to a mean line; `mean` gives height and slope, `half` half the thickness.
fn around(
    name: &str,
    mean: impl Fn(f64) -> [f64; 2],
    half: impl Fn(f64) -> f64,
) -> Result<Outline, OutlineError> {
    let point = |x: f64, side: f64| {
        let [height, slope] = mean(x);
        let (sin, cos) = slope.atan().sin_cos();
        [x - side * half(x) * sin, height + side * half(x) * cos]
    };
    let mut points: Vec<[f64; 2]> = stations().rev().map(|x| point(x, 1.0)).collect();
    points.extend(stations().skip(1).map(|x| point(x, -1.0)));
    Outline::from_points(name, &points)
}

/// A NACA four-digit section: camber in hundredths of the chord, its place in tenths, thickness ratio.
///
/// The trailing edge is open, as published (0.0021 chord for each 0.01 of thickness, halved on each side).
///
/// # Errors
/// [`OutlineError::Figure`] outside camber 0 to 9, place 1 to 9, thickness 2 % to 40 %.
///
/// # References
/// NACA Report 460, equations of the thickness and of the two parabolas.
pub fn naca_four_digit(camber: u8, place: u8, thickness_ratio: f64) -> Result<Outline, OutlineError> {
    let m = figure("camber digit", f64::from(camber), [0.0, 9.0])? / 100.0;
    let p =
        if camber == 0 { 0.4 } else { figure("camber place digit", f64::from(place), [1.0, 9.0])? / 10.0 };
    let t = figure("thickness ratio", thickness_ratio, THICKNESS)?;
    let name = format!("NACA {camber}{place}{:02.0}", 100.0 * t);
    // yt = 5 t (0.2969 sqrt x - 0.1260 x - 0.3516 x^2 + 0.2843 x^3 - 0.1015 x^4)
    let half =
        |x: f64| 5.0 * t * (0.2969 * x.sqrt() + x * (-0.1260 + x * (-0.3516 + x * (0.2843 - 0.1015 * x))));
    // yc = m/p^2 (2 p x - x^2) before p, m/(1-p)^2 (1 - 2 p + 2 p x - x^2) behind
    let mean = |x: f64| {
        let (span, start) = if x < p { (p * p, 0.0) } else { ((1.0 - p).powi(2), 1.0 - 2.0 * p) };
        [m / span * (start + 2.0 * p * x - x * x), m / span * 2.0 * (p - x)]
    };
    around(&name, mean, half)
}

/// A NACA 16-series section: design lift coefficient and thickness ratio, mean line a = 1.
///
/// The slope of the mean line, without bound at the ends, is held within 0.5 % of the chord from them.
///
/// # Errors
/// [`OutlineError::Figure`] outside design lift 0 to 1, thickness 2 % to 40 %.
///
/// # References
/// NACA TN 1546 (thickness), NACA Report 824 (mean line).
pub fn naca_16_series(design_cl: f64, thickness_ratio: f64) -> Result<Outline, OutlineError> {
    let cl = figure("design lift coefficient", design_cl, [0.0, 1.0])?;
    let t = figure("thickness ratio", thickness_ratio, THICKNESS)?;
    let name = format!("NACA 16-{:.0}{:02.0}", 10.0 * cl, 100.0 * t);
    let half = |x: f64| {
        let aft = 1.0 - x;
        if x < 0.5 {
            t * (0.989_665 * x.sqrt() - x * (0.239_250 + x * (0.041_000 + 0.559_400 * x)))
        } else {
            t * (0.01 + aft * (2.325 + aft * (-3.42 + 1.46 * aft)))
        }
    };
    // y = -cl/(4 pi) [(1-x) ln(1-x) + x ln x], slope = cl/(4 pi) [ln(1-x) - ln x]
    let x_ln_x = |x: f64| if x > 0.0 { x * x.ln() } else { 0.0 };
    let mean = |x: f64| {
        let held = x.clamp(0.005, 0.995);
        let height = -cl / (4.0 * PI) * (x_ln_x(1.0 - x) + x_ln_x(x));
        [height, cl / (4.0 * PI) * ((1.0 - held).ln() - held.ln())]
    };
    around(&name, mean, half)
}

/// A flat face with a circular-arc back, its nose rounded by a circle that touches face and back.
///
/// The trailing edge is sharp. `nose_part` is the radius of the nose over the thickness; 0 leaves the nose
/// sharp.
///
/// # Errors
/// [`OutlineError::Figure`] outside thickness 2 % to 40 %, nose part 0 to 0.2.
pub fn arc_back(thickness_ratio: f64, nose_part: f64) -> Result<Outline, OutlineError> {
    let t = figure("thickness ratio", thickness_ratio, THICKNESS)?;
    let part = figure("nose radius over thickness", nose_part, [0.0, 0.2])?;
    // Circle through (0, 0), (0.5, t), (1, 0): radius R, centre (0.5, t - R).
    let big = (0.25 + t * t) / (2.0 * t);
    let r = part * t;
    let back = |x: f64| t - big + (big * big - (x - 0.5).powi(2)).sqrt();
    // The nose circle, centre (c, r), touches the back from inside: distance of centres R - r.
    let c = 0.5 - ((big - r).powi(2) - (r - t + big).powi(2)).max(0.0).sqrt();
    let touch = 0.5 + (c - 0.5) * big / (big - r);
    let mut points: Vec<[f64; 2]> =
        stations().rev().map(|u| touch + (1.0 - touch) * u).map(|x| [x, back(x)]).collect();
    if r > 0.0 {
        let top = (back(touch) - r).atan2(touch - c);
        let turns = (1..24).map(|k| top + (1.5 * PI - top) * f64::from(k) / 24.0);
        points.extend(turns.map(|a| [c + r * a.cos(), r + r * a.sin()]));
    }
    let skip = usize::from(r == 0.0);
    points.extend(stations().skip(skip).map(|u| c + (1.0 - c) * u).map(|x| [x, 0.0]));
    Outline::from_points("Flat face, circular-arc back", &points)
}

/// Clark Y as published, 11.7 % thick.
///
/// # Errors
/// None in practice: the ordinates are fixed.
pub fn clark_y() -> Result<Outline, OutlineError> {
    from_table("Clark Y", CLARK_Y, 0.30)
}

/// RAF 6 at 10 % thickness, the propeller section with a flat face.
///
/// # Errors
/// None in practice: the ordinates are fixed.
pub fn raf_6() -> Result<Outline, OutlineError> {
    from_table("RAF 6", RAF_6, 0.025)
}

/// Draws a table of ordinates (station, upper, lower, in hundredths), flat behind `flat_from`.
///
/// The nose is round, so that ordinates run smoothly against the signed square root of the station: one cubic
/// spline runs through the upper side and round the nose to where the flat face begins.
fn from_table(name: &str, rows: &[[f64; 3]], flat_from: f64) -> Result<Outline, OutlineError> {
    let lower = rows.iter().rev().filter(|row| row[0] > 0.0 && row[0] / 100.0 <= flat_from + 1e-9);
    let mut knots: Vec<[f64; 2]> = lower.map(|row| [-(row[0] / 100.0).sqrt(), row[2] / 100.0]).collect();
    knots.extend(rows.iter().map(|row| [(row[0] / 100.0).sqrt(), row[1] / 100.0]));
    let (t, y): (Vec<f64>, Vec<f64>) = knots.iter().map(|knot| (knot[0], knot[1])).unzip();
    let spline = Cubic::new(&t, &y, End::Slope(0.0), End::Parabolic);
    let mut points: Vec<[f64; 2]> = stations().rev().map(|x| [x, spline.at(x.sqrt())[0]]).collect();
    points.extend(stations().skip(1).map(|x| {
        let height = if x < flat_from { spline.at(-x.sqrt())[0].max(0.0) } else { 0.0 };
        [x, height]
    }));
    Outline::from_points(name, &points)
}

#[cfg(test)]
mod tests {
    use super::super::{interpolate, sides};
    use super::*;

    /// Compares a section with points laid out by the report's rule, `x ∓ yt sin θ`, `yc ± yt cos θ`, with the
    /// slope of the mean line taken from its own heights.
    fn same_as_laid_out(section: &Outline, mean: impl Fn(f64) -> f64, half: impl Fn(f64) -> f64, held: f64) {
        let lay = |x: f64, side: f64| {
            let (at, d) = (x.clamp(held, 1.0 - held), 1e-6);
            let run = [(at - d).max(0.0), (at + d).min(1.0)];
            let theta = ((mean(run[1]) - mean(run[0])) / (run[1] - run[0])).atan();
            [x - side * half(x) * theta.sin(), mean(x) + side * half(x) * theta.cos()]
        };
        let places: Vec<f64> = stations().collect();
        let upper = places.iter().rev().map(|&x| lay(x, 1.0));
        let points: Vec<[f64; 2]> = upper.chain(places.iter().skip(1).map(|&x| lay(x, -1.0))).collect();
        let expected = Outline::from_points("", &points).unwrap();
        for (a, b) in section.points().iter().zip(expected.points()) {
            // The slope by differences is good to 1e-6 where the mean line has no kink.
            assert!((a[0] - b[0]).hypot(a[1] - b[1]) < 2e-6, "{} {a:?} {b:?}", section.name());
        }
    }

    /// NACA Report 460: parabolas that meet at the place of the camber; NACA Report 824: the mean line a = 1.
    #[test]
    fn thickness_is_laid_square_to_the_mean_line() {
        let four = naca_four_digit(4, 4, 0.12).unwrap();
        let parabolas = |x: f64| {
            if x < 0.4 { 0.04 / 0.16 * (0.8 * x - x * x) } else { 0.04 / 0.36 * (0.2 + 0.8 * x - x * x) }
        };
        let half = |x: f64| {
            let series =
                0.2969 * x.sqrt() - 0.1260 * x - 0.3516 * x.powi(2) + 0.2843 * x.powi(3) - 0.1015 * x.powi(4);
            0.6 * series
        };
        same_as_laid_out(&four, parabolas, half, 0.0);
        let sixteen = naca_16_series(1.0, 0.12).unwrap();
        let log = |x: f64| if x > 0.0 { x * x.ln() } else { 0.0 };
        let line = |x: f64| -(log(1.0 - x) + log(x)) / (4.0 * PI);
        let half = |x: f64| {
            let aft = 1.0 - x;
            let front = 0.989_665 * x.sqrt() - 0.239_25 * x - 0.041 * x.powi(2) - 0.5594 * x.powi(3);
            0.12 * if x < 0.5 { front } else { 0.01 + 2.325 * aft - 3.42 * aft.powi(2) + 1.46 * aft.powi(3) }
        };
        same_as_laid_out(&sixteen, line, half, 0.005);
    }

    /// The ordinates themselves stand in the list of outside checks (`tests/src/validation/formulas.rs`).
    #[test]
    fn a_sixteen_series_without_camber_is_the_same_below_as_above() {
        let (upper, lower) = sides(naca_16_series(0.0, 0.09).unwrap().points());
        for x in [0.0125, 0.025, 0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 0.95] {
            // The nose is found to the root of the rounding error.
            assert!((interpolate(&upper, x) + interpolate(&lower, x)).abs() < 1e-6, "{x}");
        }
    }
}
