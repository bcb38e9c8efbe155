//! The outline of a section: reading, checking, measuring and scaling it.
//!
//! An [`Outline`] always stands in the frame of its chord line: chord 1, nose at (0, 0), middle of the
//! trailing edge at (1, 0), points from the upper trailing edge round the nose to the lower trailing edge.
//! The chord line is the line from the middle of the trailing edge to the point of the outline farthest from
//! it; section angles in this crate are measured from it. [`Outline::face_angle_rad`] gives the way to the
//! flat face that carvers measure from.
//!
//! Limits: the outline is single, closed but for the trailing edge (at most 6 % of the chord open), 1 % to 60
//! % thick.

mod check;
mod edge;
mod error;
mod face;
mod families;
mod measure;
mod ordinates;
mod read;
mod sample;
mod scale;
mod spline;

pub(crate) use check::crossings;
pub use check::{MAX_POINTS, MIN_POINTS};
pub use edge::MAX_EDGE;
pub(crate) use edge::thicken;
pub(crate) use error::short;
pub use error::{OutlineError, Place};
pub use face::Face;
pub use families::{arc_back, clark_y, naca_16_series, naca_four_digit, raf_6};
pub use measure::Measures;
pub(crate) use measure::{interpolate, sides};
pub use read::MAX_BYTES;
pub(crate) use spline::Curve;

/// A checked outline in its chord-line frame.
///
/// ```
/// use spokeshave::section::outline::naca_four_digit;
/// let section = naca_four_digit(4, 4, 0.12)?;
/// assert!((section.thickness_ratio() - 0.12).abs() < 0.002);
/// # Ok::<(), spokeshave::section::outline::OutlineError>(())
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct Outline {
    name: String,
    points: Vec<[f64; 2]>,
    rotation_rad: f64,
    curve: Curve,
    measures: Measures,
    face: Option<Face>,
}

impl Outline {
    /// Reads a list of coordinates: see the formats in DEVELOPERS.md, one `x y` pair on a line.
    ///
    /// # Errors
    /// An [`OutlineError`] with the line, the value and what is allowed.
    pub fn read(text: &str) -> Result<Self, OutlineError> {
        let listing = read::read(text)?;
        Self::build(listing.name, &listing.points, &listing.places)
    }

    /// An outline from points running round the section from one side of the trailing edge to the other.
    ///
    /// # Errors
    /// An [`OutlineError`] with the point, the value and what is allowed.
    pub fn from_points(name: &str, points: &[[f64; 2]]) -> Result<Self, OutlineError> {
        let places: Vec<Place> = (1..=points.len()).map(|point| Place { point, line: None }).collect();
        Self::build(name.to_string(), points, &places)
    }

    fn build(name: String, points: &[[f64; 2]], places: &[Place]) -> Result<Self, OutlineError> {
        let framed = check::frame(points, places)?;
        let curve = Curve::new(&framed.points);
        let nose_s = measure::nose(&curve);
        let (points, turn_rad) = check::reframe(&framed.points, curve.at(nose_s).at);
        let curve = Curve::new(&points);
        let nose_s = measure::nose(&curve);
        let measures = measure::measure(&points, &curve, nose_s);
        let [least, most] = check::THICKNESS;
        let found = measures.thickness_ratio;
        if !(least..=most).contains(&found) {
            return Err(OutlineError::Thickness { found, least, most });
        }
        let face = face::find(&points);
        Ok(Self { name, points, rotation_rad: framed.rotation_rad + turn_rad, curve, measures, face })
    }

    /// The name from the first line of the list, or nothing.
    #[must_use]
    pub fn name(&self) -> &str {
        &self.name
    }

    /// The points, in chords: upper trailing edge, nose, lower trailing edge.
    #[must_use]
    pub fn points(&self) -> &[[f64; 2]] {
        &self.points
    }

    /// The upper side from the nose to the trailing edge, in chords.
    #[must_use]
    pub fn upper_side(&self) -> Vec<[f64; 2]> {
        measure::sides(&self.points).0
    }

    /// Angle by which the chord line is nose up from the axis the list was drawn on, radians.
    #[must_use]
    pub fn rotation_rad(&self) -> f64 {
        self.rotation_rad
    }

    /// Largest thickness square to the chord line, in chords.
    #[must_use]
    pub fn thickness_ratio(&self) -> f64 {
        self.measures.thickness_ratio
    }

    /// Thickness, camber, area, moments and nose radius.
    #[must_use]
    pub fn measures(&self) -> &Measures {
        &self.measures
    }

    /// The flat face, if the lower side has one.
    #[must_use]
    pub fn face(&self) -> Option<Face> {
        self.face
    }

    /// Angle by which the chord line is nose up from the flat face, radians; none without a flat face.
    ///
    /// An angle of attack from the chord line is the angle from the face plus this angle.
    #[must_use]
    pub fn face_angle_rad(&self) -> Option<f64> {
        self.face.map(|face| face.angle_rad)
    }

    /// The same section at another thickness ratio.
    ///
    /// A section with a flat face keeps the face and has its ordinates from the face multiplied, as propeller
    /// sections are drawn; any other keeps its camber line and has its ordinates from that line multiplied.
    ///
    /// # Errors
    /// [`OutlineError::Thickness`] outside 1 % to 60 %, [`OutlineError::Undercut`] if the sides are not
    /// single-valued, and the checks of the new outline.
    pub fn scaled_to(&self, thickness_ratio: f64) -> Result<Self, OutlineError> {
        scale::scaled_to(self, thickness_ratio)
    }

    /// The same section with its trailing edge left `thickness` chords thick, as carved edges are.
    ///
    /// The thickness is added behind the thickest place, with the square of the distance from it: on the back
    /// alone where the section has a flat face, on both sides otherwise.
    ///
    /// # Errors
    /// [`OutlineError::Figure`] for less than the outline has or more than 5 % of the chord.
    pub fn with_edge_thickness(&self, thickness: f64) -> Result<Self, OutlineError> {
        edge::with_edge_thickness(self, thickness)
    }

    /// Points of the outline, in chords, at shares of the arc that are the same for every section: `per_side`
    /// from the upper trailing edge to the nose and as many from the nose, counted in both, to the lower
    /// trailing edge.
    #[must_use]
    pub fn sampled(&self, per_side: usize) -> Vec<[f64; 2]> {
        sample::sampled(self, per_side)
    }

    pub(crate) fn curve(&self) -> &Curve {
        &self.curve
    }
}

#[cfg(test)]
mod tests;
