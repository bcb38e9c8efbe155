//! A trailing edge left thicker than drawn.

use super::Outline;
use super::error::OutlineError;
use super::measure::sides;

/// Largest thickness of the trailing edge, chords.
pub const MAX_EDGE: f64 = 0.05;

/// See [`Outline::with_edge_thickness`].
pub(crate) fn with_edge_thickness(outline: &Outline, thickness: f64) -> Result<Outline, OutlineError> {
    let least = outline.measures().edge_thickness;
    if !(least..=MAX_EDGE).contains(&thickness) {
        return Err(OutlineError::Figure {
            what: "trailing edge thickness",
            found: thickness,
            least,
            most: MAX_EDGE,
        });
    }
    let nose = sides(outline.points()).0.len() - 1;
    let mut points = outline.points().to_vec();
    thicken(&mut points, nose, outline.measures().thickness_at, thickness - least, outline.face().is_some());
    let mut thick = Outline::from_points(outline.name(), &points)?;
    thick.rotation_rad += outline.rotation_rad();
    Ok(thick)
}

/// Adds to the edge of points that run from the upper edge round `nose` to the lower edge, with the square of
/// the distance behind `from`. A face stays flat: all goes on the back; without one each side takes half.
pub(crate) fn thicken(points: &mut [[f64; 2]], nose: usize, from: f64, added: f64, has_face: bool) {
    let shares = if has_face { [1.0, 0.0] } else { [0.5, -0.5] };
    for (k, p) in points.iter_mut().enumerate() {
        let part = ((p[0] - from) / (1.0 - from)).max(0.0);
        p[1] += shares[usize::from(k > nose)] * added * part * part;
    }
}
