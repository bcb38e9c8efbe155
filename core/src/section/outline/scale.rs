//! The same section drawn thicker or thinner.

use super::check::THICKNESS;
use super::error::{OutlineError, Place};
use super::measure::{interpolate, sides};
use super::{Face, Outline};

/// Passes of the correction that brings the thickness square to the (moved) chord line to the ratio asked
/// for.
const PASSES: usize = 4;

/// See [`Outline::scaled_to`].
pub(crate) fn scaled_to(outline: &Outline, ratio: f64) -> Result<Outline, OutlineError> {
    let [least, most] = THICKNESS;
    if !(least..=most).contains(&ratio) {
        return Err(OutlineError::Thickness { found: ratio, least, most });
    }
    let mut factor = ratio / outline.thickness_ratio();
    let mut scaled = scaled_by(outline, factor)?;
    for _ in 0..PASSES {
        factor *= ratio / scaled.thickness_ratio();
        scaled = scaled_by(outline, factor)?;
    }
    Ok(scaled)
}

fn scaled_by(outline: &Outline, factor: f64) -> Result<Outline, OutlineError> {
    let points = match outline.face() {
        Some(face) => from_face(outline.points(), face, factor),
        None => about_camber(outline.points(), factor)?,
    };
    let mut scaled = Outline::from_points(outline.name(), &points)?;
    if outline.face().is_some() {
        // The list axis is still the one of the drawing: the face itself turns with nothing.
        scaled.rotation_rad += outline.rotation_rad();
    }
    Ok(scaled)
}

/// Multiplies the heights over the face line.
fn from_face(points: &[[f64; 2]], face: Face, factor: f64) -> Vec<[f64; 2]> {
    let (sin, cos) = face.angle_rad.sin_cos();
    let in_face = |p: &[f64; 2]| {
        let y = p[1] - face.height_at_nose;
        [p[0] * cos + y * sin, factor * (y * cos - p[0] * sin)]
    };
    points.iter().map(in_face).collect()
}

/// Multiplies the heights over the mean line, square to the chord line.
fn about_camber(points: &[[f64; 2]], factor: f64) -> Result<Vec<[f64; 2]>, OutlineError> {
    let (upper, lower) = sides(points);
    for (side, first) in [(&upper, upper.len()), (&lower, upper.len())] {
        if let Some(k) = (1..side.len()).find(|&k| side[k][0] <= side[k - 1][0] && side[k][0] < 0.99) {
            let point = if std::ptr::eq(side, &raw const upper) { first - k } else { first + k };
            return Err(OutlineError::Undercut { place: Place { point, line: None } });
        }
    }
    let scaled = points.iter().map(|p| {
        let mean = 0.5 * (interpolate(&upper, p[0]) + interpolate(&lower, p[0]));
        [p[0], mean + factor * (p[1] - mean)]
    });
    Ok(scaled.collect())
}
