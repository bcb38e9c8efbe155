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
    let added = thickness - least;
    let from = outline.measures().thickness_at;
    // The face stays flat: all goes on the back. Without a face each side takes half.
    let shares = if outline.face().is_some() { [1.0, 0.0] } else { [0.5, -0.5] };
    let nose = sides(outline.points()).0.len() - 1;
    let points: Vec<[f64; 2]> = outline
        .points()
        .iter()
        .enumerate()
        .map(|(k, p)| {
            let part = ((p[0] - from) / (1.0 - from)).max(0.0);
            [p[0], p[1] + shares[usize::from(k > nose)] * added * part * part]
        })
        .collect();
    let mut thick = Outline::from_points(outline.name(), &points)?;
    thick.rotation_rad += outline.rotation_rad();
    Ok(thick)
}
