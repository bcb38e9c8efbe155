//! The blade as a form: the section at any radius, standing where it belongs.

use crate::blade::{Blade, StackingLine};
use crate::job::{Job, Making, PitchControl, Rotation};

use super::error::{BenchError, Fault};
use super::ring::Ring;
use super::shape::Shape;

/// Points on each side of a section, from edge to edge.
pub const SIDE_POINTS: usize = 64;
/// Thickest trailing edge that is drawn, in chords: where the tip is rounded, and everywhere if the job names
/// none, the least thickness gives way to it.
const THICKEST_EDGE: f64 = 0.05;
/// Stations closer to the tip than this share of the radius take part in its rounding.
const AT_TIP: f64 = 0.995;

/// A blade whose section can be drawn at any radius between hub and tip.
#[derive(Clone, Debug)]
pub struct Form {
    /// The blade it is the form of.
    pub blade: Blade,
    /// How it is made.
    pub making: Making,
    /// Sense of turning.
    pub rotation: Rotation,
    /// Whether blades and hub are one piece.
    pub one_piece: bool,
    /// Radius from which the tip is rounded, m.
    pub tip_from_m: f64,
    stations: Vec<(f64, Shape)>,
    line: StackingLine,
}

impl Form {
    /// The form of a job's blade.
    ///
    /// # Errors
    /// A section that cannot be drawn, a station inside the hub, or one too narrow for the trailing edge that
    /// the job names.
    pub fn new(job: &Job, blade: &Blade) -> Result<Self, BenchError> {
        let making = job.bench.clone().unwrap_or_default();
        let mut faults = Vec::new();
        let mut stations = Vec::new();
        for (i, (station, radius_m)) in job.propeller.stations.iter().zip(blade.station_radii_m()).enumerate()
        {
            let radius_mm = 1e3 * radius_m;
            if radius_m < blade.hub_radius_m {
                let hub_mm = 1e3 * blade.hub_radius_m;
                let by_mm = hub_mm - radius_mm;
                faults.push(Fault::InsideHub { station: i + 1, radius_mm, hub_mm, by_mm });
            }
            let least_radius = making.leading_edge_radius_m.unwrap_or(0.0) / station.chord_m;
            match job.section_outline(&station.section, station.thickness_ratio) {
                Some(outline) => {
                    let shape = Shape::new(&outline, SIDE_POINTS, least_radius);
                    let named_m = making.trailing_edge_m.filter(|_| radius_m < AT_TIP * blade.radius_m);
                    faults.extend(
                        named_m.and_then(|m| edge_too_thick(m, &shape, (i + 1, radius_m, station.chord_m))),
                    );
                    stations.push((radius_m, shape));
                }
                None => faults.push(Fault::NoOutline {
                    station: i + 1,
                    radius_mm,
                    section: station.section.clone(),
                    percent: 100.0 * station.thickness_ratio,
                }),
            }
        }
        if !faults.is_empty() {
            return Err(BenchError(faults));
        }
        Ok(Self {
            line: StackingLine::new(job, blade.radius_m),
            tip_from_m: tip_from_m(&making, blade),
            rotation: job.propeller.rotation,
            one_piece: matches!(job.propeller.pitch_control, PitchControl::Fixed {}),
            blade: blade.clone(),
            making,
            stations,
        })
    }

    /// Least thickness of the trailing edge, m.
    #[must_use]
    pub fn trailing_edge_m(&self) -> f64 {
        self.making.trailing_edge_m.unwrap_or(0.002 * self.blade.radius_m)
    }

    /// Whether some station is so narrow that its trailing edge is thinner than that: only where the job
    /// names none.
    #[must_use]
    pub fn edge_gives_way(&self) -> bool {
        let drawn = self.station_radii_m().filter(|r| *r < AT_TIP * self.blade.radius_m);
        drawn
            .map(|r| self.blade.cut(r).chord_m)
            .any(|chord_m| self.trailing_edge_m() > THICKEST_EDGE * chord_m)
    }

    /// Radii of the stations that are drawn, m.
    pub fn station_radii_m(&self) -> impl Iterator<Item = f64> {
        self.blade.station_radii_m()
    }

    /// Chord at a radius with the tip rounded, m.
    #[must_use]
    pub fn chord_m(&self, radius_m: f64) -> f64 {
        let past = (radius_m - self.tip_from_m) / (self.blade.radius_m - self.tip_from_m);
        self.blade.cut(radius_m).chord_m * (1.0 - past.clamp(0.0, 1.0).powi(2)).sqrt()
    }

    /// Where the stacking line runs at a radius, `[y, z]`, m.
    #[must_use]
    pub fn axis_m(&self, radius_m: f64) -> [f64; 2] {
        let [y, z] = self.line.at(radius_m);
        [y, z + self.line.lean * radius_m]
    }

    /// The section at a radius, standing where it belongs.
    #[must_use]
    pub fn ring(&self, radius_m: f64) -> Ring {
        let chord_m = self.chord_m(radius_m);
        let shape = self.shape(radius_m, chord_m);
        let stands_on = match self.line.fraction {
            Some(share) => [share, 0.0],
            None => shape.centroid(),
        };
        let (sin, cos) = self.blade.cut(radius_m).angle_rad.sin_cos();
        let [y0, z0] = self.axis_m(radius_m);
        let place = |p: [f64; 2]| {
            let (ahead, up) = (chord_m * (stands_on[0] - p[0]), chord_m * (p[1] - stands_on[1]));
            [y0 + ahead * cos - up * sin, z0 + ahead * sin + up * cos]
        };
        let (first, last) = (shape.points[0], shape.points[shape.points.len() - 1]);
        let edge = [0.5 * (first[0] + last[0]), 0.5 * (first[1] + last[1])];
        Ring { radius_m, points: std::iter::once(edge).chain(shape.points).map(place).collect() }
    }

    /// Shape of the section at a radius, in chords.
    fn shape(&self, radius_m: f64, chord_m: f64) -> Shape {
        let above = self.stations.partition_point(|s| s.0 <= radius_m);
        let shape = if above == 0 || above == self.stations.len() {
            self.stations[above.saturating_sub(1)].1.clone()
        } else {
            let ((r0, inner), (r1, outer)) = (&self.stations[above - 1], &self.stations[above]);
            let share = (radius_m - r0) / (r1 - r0);
            let ratio = |r: f64| self.blade.cut(r).thickness_ratio;
            let straight = ratio(*r0) + share * (ratio(*r1) - ratio(*r0));
            inner.towards(outer, share).thicker(ratio(radius_m) / straight)
        };
        let edge = self.trailing_edge_m() / chord_m.max(f64::MIN_POSITIVE);
        shape.with_edge(edge.min(THICKEST_EDGE))
    }
}

/// The fault of a trailing edge (m) that a section, with its number, radius and chord (m), has not by itself
/// and cannot be given.
fn edge_too_thick(
    wanted_m: f64,
    shape: &Shape,
    (station, radius_m, chord_m): (usize, f64, f64),
) -> Option<Fault> {
    let most_m = THICKEST_EDGE.max(shape.edge()) * chord_m;
    let [radius_mm, wanted_mm, most_mm] = [radius_m, wanted_m, most_m].map(|m| 1e3 * m);
    (wanted_m > most_m * (1.0 + 1e-9)).then_some(Fault::TrailingEdgeTooThick {
        station,
        radius_mm,
        wanted_mm,
        most_mm,
    })
}

/// Where the rounding of the tip begins: not inboard of the last station that is not at the tip itself.
fn tip_from_m(making: &Making, blade: &Blade) -> f64 {
    let last = blade.station_radii_m().filter(|r| *r < AT_TIP * blade.radius_m).last().unwrap_or(0.0);
    let length = making.tip_length_m.unwrap_or(0.5 * blade.cut(last).chord_m);
    // A tip cut square still needs a length to close over.
    (blade.radius_m - length).max(last).min(0.999 * blade.radius_m)
}
