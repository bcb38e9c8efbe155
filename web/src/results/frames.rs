//! What the page's parts are given: what is shown within the frame of an edit, and what follows in a later one.

use std::rc::Rc;

use spokeshave::drawn::DrawnStation;
use spokeshave::fit::Along;
use spokeshave::job::Job;
use spokeshave::result::{Ceilings, Envelope, Logged, Margin, PitchWorth, PointResult, TakeOff};
use spokeshave::rig::Rig;
use spokeshave::rotor::{CurvePoint, DepartureMap};

use super::{CarvedFound, Offered, Sheet};

/// A job compared by identity: every change makes a new one.
#[derive(Clone, Debug)]
pub struct Same(pub Rc<Job>);

impl PartialEq for Same {
    fn eq(&self, other: &Self) -> bool {
        Rc::ptr_eq(&self.0, &other.0)
    }
}

/// A rig compared by identity.
#[derive(Clone, Debug)]
pub struct RigRef(pub Rc<Rig>);

impl PartialEq for RigRef {
    fn eq(&self, other: &Self) -> bool {
        Rc::ptr_eq(&self.0, &other.0)
    }
}

/// What is shown within the frame of an edit.
#[derive(Clone, Debug, PartialEq)]
pub struct Now {
    /// The job.
    pub job: Same,
    /// The job made ready.
    pub rig: Option<RigRef>,
    /// The stations as drawn.
    pub drawn: Rc<Vec<DrawnStation>>,
    /// The flight point selected, worked out.
    pub point: Rc<Option<PointResult>>,
    /// Lift-to-drag over the angle of attack, degrees, at the station selected.
    pub lift_to_drag: Rc<Vec<[f64; 2]>>,
    /// Whether this browser keeps the job.
    pub kept: bool,
    /// The blade compared, at the same flight point.
    pub beside: Option<Rc<Compared>>,
}

/// A blade beside the drawn one, worked out.
#[derive(Clone, Debug, PartialEq)]
pub struct Compared {
    /// What it is.
    pub name: String,
    /// The job with it, made ready.
    pub rig: RigRef,
    /// Its stations as drawn.
    pub drawn: Rc<Vec<DrawnStation>>,
    /// The flight point selected.
    pub point: Option<PointResult>,
}

/// What follows in a later frame.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Later {
    /// The job made ready, as it was when this was worked out.
    pub rig: Option<RigRef>,
    /// The flight point selected then.
    pub point: usize,
    /// Every flight point, in order.
    pub points: Vec<Rc<Option<PointResult>>>,
    /// What the map follows.
    pub along: Along,
    /// The departure map at the flight point selected.
    pub map: Rc<Option<DepartureMap>>,
    /// The coefficient curves there.
    pub curves: Rc<Vec<CurvePoint>>,
    /// What the shaft offers and the propeller takes there; empty while the Engine panel is closed.
    pub offer: Rc<Offered>,
    /// The speed range in its air; not there while the Fit panel is closed.
    pub envelope: Option<Rc<Option<Envelope>>>,
    /// How far every limit is kept.
    pub margins: Rc<Vec<Margin>>,
    /// Take-off there.
    pub take_off: Option<TakeOff>,
    /// Ceilings, which follow last.
    pub ceilings: Option<Ceilings>,
    /// What a variable pitch is worth; follows with the ceilings.
    pub worth: Rc<Vec<PitchWorth>>,
    /// The strength of the blade; follows last, while the Bench panel is open.
    pub strength: Option<Rc<Sheet>>,
    /// The carved blades, or why there is nothing of them; not there while their panel was never open.
    pub carved: Option<Rc<Result<CarvedFound, String>>>,
    /// The logbook, or why it tells nothing; not there while its panel was never open.
    pub logged: Option<Rc<Result<Logged, String>>>,
}

impl Later {
    /// The flight point selected, worked out.
    #[must_use]
    pub fn selected(&self) -> Rc<Option<PointResult>> {
        self.points.get(self.point).cloned().unwrap_or_default()
    }
}
