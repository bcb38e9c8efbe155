//! The line on which the sections stand.

use crate::curve::Curve;
use crate::job::{Job, LinePoint};

/// The stacking line of a job: how far it runs beside the radius through the axis.
#[derive(Clone, Debug, PartialEq)]
pub struct StackingLine {
    sweep: Option<Curve>,
    rake: Option<Curve>,
    /// Tangent of the lean ahead of the plane of rotation.
    pub lean: f64,
    /// Point of the chord line that stands on it, in chords from the leading edge; `None` for the centroid.
    pub fraction: Option<f64>,
}

impl StackingLine {
    /// The line of a job whose blade has a tip radius, m.
    #[must_use]
    pub fn new(job: &Job, radius_m: f64) -> Self {
        let making = job.bench.clone().unwrap_or_default();
        let line = |of: fn(&LinePoint) -> f64| {
            let x = making.stacking_line.iter().map(|p| p.radius_fraction * radius_m).collect();
            Curve::new(x, making.stacking_line.iter().map(of).collect())
        };
        Self {
            sweep: line(|p| p.sweep_m),
            rake: line(|p| p.rake_m),
            lean: job.wood.as_ref().map_or(0.0, |wood| wood.rake_deg.to_radians().tan()),
            fraction: making.stacking_fraction,
        }
    }

    /// Where it runs at a radius, the lean left out: `[along the turning, along the flight]`, m.
    #[must_use]
    pub fn at(&self, radius_m: f64) -> [f64; 2] {
        let at = |curve: &Option<Curve>| curve.as_ref().map_or(0.0, |c| c.at(radius_m));
        [-at(&self.sweep), at(&self.rake)]
    }
}
