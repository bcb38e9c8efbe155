//! Dragging one figure: of a station, while its neighbours follow, or the airspeed of a flight point.

use std::f64::consts::PI;
use std::rc::Rc;

use spokeshave::drawn::{DrawnStation, stations};
use spokeshave::job::Job;
use spokeshave::rig::Rig;

use super::{Field, Measure, PointFigure};

/// What is dragged.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Held {
    /// A measure of a station.
    Station(usize, Measure),
    /// The airspeed of a flight point.
    Airspeed(usize),
}

impl Held {
    /// The figure of the job that is dragged.
    #[must_use]
    pub fn field(self) -> Field {
        match self {
            Self::Station(station, measure) => Field::Station(station, measure),
            Self::Airspeed(point) => Field::Point(point, PointFigure::Airspeed),
        }
    }

    /// The job with what is held at a value (SI or degrees), `span` stations on either side drawn along;
    /// `None` where that is not allowed.
    #[must_use]
    pub fn moved(self, job: &Job, value: f64, span: usize) -> Option<Job> {
        match self {
            Self::Station(station, measure) => dragged(job, station, measure, value, span),
            Self::Airspeed(_) => {
                let mut next = job.clone();
                (self.field().write(&mut next, value) && next.check().is_empty()).then_some(next)
            }
        }
    }
}

/// A drag that has begun.
#[derive(Clone, Debug)]
pub struct Drag {
    /// What is dragged.
    pub held: Held,
    /// The job before it.
    pub start: Rc<Job>,
}

/// Share of the movement that a station so many places away takes, when `span` stations on either side
/// follow.
#[must_use]
pub fn follows(away: usize, span: usize) -> f64 {
    if away > span {
        return 0.0;
    }
    0.5 * (1.0 + (PI * away as f64 / (span + 1) as f64).cos())
}

/// The stations of a job as drawn; none for a job that cannot be built.
#[must_use]
pub fn drawn(job: &Job) -> Vec<DrawnStation> {
    Rig::new(job).map_or_else(|_| Vec::new(), |rig| stations(&rig.rotor.blade, job.propeller.angle_reference))
}

/// The job with a station's figure (SI) changed and its neighbours drawn along; `None` where that is not
/// allowed.
#[must_use]
pub fn dragged(job: &Job, station: usize, measure: Measure, value: f64, span: usize) -> Option<Job> {
    let before = drawn(job);
    let change = value - measure.of(before.get(station)?)?;
    let mut next = job.clone();
    for (i, neighbour) in before.iter().enumerate() {
        let share = follows(i.abs_diff(station), span);
        if share > 0.0 {
            let moved = measure.of(neighbour)? + share * change;
            // What is dragged stands exactly where it was put; what follows is rounded to what a rule can
            // read.
            let moved = if i == station { value } else { rounded(measure, moved) };
            Field::Station(i, measure).write(&mut next, moved);
        }
    }
    next.check().is_empty().then_some(next)
}

/// To a hundredth of a degree or of a millimetre.
fn rounded(measure: Measure, value: f64) -> f64 {
    let steps = match measure {
        Measure::Angle | Measure::FaceAngle => 1e2,
        _ => 1e5,
    };
    (value * steps).round() / steps
}
