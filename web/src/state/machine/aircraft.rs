//! The aircraft of a job.

use spokeshave::job::{Aircraft, Job};

use super::example_of;
use super::place::{Place, places};
use crate::units::Quantity;

/// A figure of the aircraft.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum AircraftFigure {
    /// Mass in flight.
    Mass,
    /// Wing area.
    WingArea,
    /// Drag coefficient without lift.
    ZeroLiftDrag,
    /// Induced-drag factor.
    InducedFactor,
    /// Wing aspect ratio.
    AspectRatio,
    /// Oswald factor.
    Oswald,
    /// Greatest lift coefficient.
    GreatestLift,
    /// Number of engines.
    Engines,
    /// Number of rotors.
    Rotors,
    /// Rolling friction over weight.
    RollingFriction,
    /// Drag area of the parts in the slipstreams.
    SlipstreamArea,
}

places! { AircraftFigure, Aircraft, |self, aircraft|
    (Self::Mass, Aircraft::Aeroplane(a)) => Figure(a.mass_kg),
    (Self::Mass, Aircraft::Multirotor(m)) => Figure(m.mass_kg),
    (Self::WingArea, Aircraft::Aeroplane(a)) => Figure(a.wing_area_m2),
    (Self::ZeroLiftDrag, Aircraft::Aeroplane(a)) => Figure(a.drag.cd0),
    (Self::InducedFactor, Aircraft::Aeroplane(a)) => Maybe(a.drag.k),
    (Self::AspectRatio, Aircraft::Aeroplane(a)) => Maybe(a.drag.aspect_ratio),
    (Self::Oswald, Aircraft::Aeroplane(a)) => Maybe(a.drag.oswald),
    (Self::GreatestLift, Aircraft::Aeroplane(a)) => Maybe(a.cl_max),
    (Self::Engines, Aircraft::Aeroplane(a)) => Count(a.engines),
    (Self::RollingFriction, Aircraft::Aeroplane(a)) => Maybe(a.rolling_friction),
    (Self::SlipstreamArea, Aircraft::Aeroplane(a)) => Maybe(a.slipstream_drag_area_m2),
    (Self::Rotors, Aircraft::Multirotor(m)) => Count(m.rotors),
}

impl AircraftFigure {
    /// What it is called, its name in the job file, and what it measures.
    const fn about(self) -> (&'static str, &'static str, Quantity) {
        match self {
            Self::Mass => ("mass in flight", "mass_kg", Quantity::Mass),
            Self::WingArea => ("wing area", "wing_area_m2", Quantity::Area),
            Self::ZeroLiftDrag => ("drag coefficient without lift", "drag.cd0", Quantity::Coefficient),
            Self::InducedFactor => ("induced-drag factor k", "drag.k", Quantity::Coefficient),
            Self::AspectRatio => ("wing aspect ratio", "drag.aspect_ratio", Quantity::Ratio),
            Self::Oswald => ("Oswald factor", "drag.oswald", Quantity::Coefficient),
            Self::GreatestLift => ("greatest lift coefficient", "cl_max", Quantity::Coefficient),
            Self::Engines => ("number of engines", "engines", Quantity::Count),
            Self::Rotors => ("number of rotors", "rotors", Quantity::Count),
            Self::RollingFriction => {
                ("rolling friction over weight", "rolling_friction", Quantity::Coefficient)
            }
            Self::SlipstreamArea => {
                ("drag area in the slipstream", "slipstream_drag_area_m2", Quantity::Area)
            }
        }
    }

    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        self.about().0
    }

    /// What it measures.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        self.about().2
    }

    /// Its path in the job file.
    pub(in crate::state) fn path(self) -> String {
        format!("aircraft.{}", self.about().1)
    }

    /// The figure, SI.
    #[must_use]
    pub fn value(self, job: &Job) -> Option<f64> {
        self.read(job.aircraft.as_ref()?)?.value()
    }

    /// Writes the figure, SI; whether there was a place for it.
    pub(in crate::state) fn write(self, job: &mut Job, value: f64) -> bool {
        let place = job.aircraft.as_mut().and_then(|a| self.place(a));
        place.map(|place| place.put(value)).is_some()
    }

    /// Takes the figure out; whether the job may go without it.
    pub(in crate::state) fn clear(self, job: &mut Job) -> bool {
        job.aircraft.as_mut().and_then(|a| self.place(a)).is_some_and(Place::clear)
    }
}

/// Kinds of aircraft.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum AircraftKind {
    /// None: only the propeller is looked at.
    None,
    /// An aeroplane with a drag polar.
    Aeroplane,
    /// A multirotor that hovers.
    Multirotor,
}

impl AircraftKind {
    /// Every kind, in the order shown.
    pub const ALL: [Self; 3] = [Self::Aeroplane, Self::Multirotor, Self::None];

    /// The kind a job has.
    #[must_use]
    pub fn of(aircraft: Option<&Aircraft>) -> Self {
        match aircraft {
            None => Self::None,
            Some(Aircraft::Aeroplane(_)) => Self::Aeroplane,
            Some(Aircraft::Multirotor(_)) => Self::Multirotor,
        }
    }

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::None => "none",
            Self::Aeroplane => "aeroplane",
            Self::Multirotor => "multirotor",
        }
    }

    /// An aircraft of this kind to start from, an example's; the mass stays.
    fn started(self, job: &Job) -> Option<Aircraft> {
        let found = example_of(job, |example| example.aircraft.clone().filter(|a| Self::of(Some(a)) == self));
        let mass_kg = AircraftFigure::Mass.value(job);
        found.map(|mut aircraft| {
            if let (Some(place), Some(mass_kg)) = (AircraftFigure::Mass.place(&mut aircraft), mass_kg) {
                place.put(mass_kg);
            }
            aircraft
        })
    }
}

/// How the drag due to lift is given.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum DragBy {
    /// By the induced-drag factor.
    Factor,
    /// By aspect ratio and Oswald factor.
    AspectRatio,
}

impl DragBy {
    /// Every way, in the order shown.
    pub const ALL: [Self; 2] = [Self::Factor, Self::AspectRatio];

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Factor => "factor k",
            Self::AspectRatio => "aspect ratio and Oswald factor",
        }
    }
}

/// What is picked of the aircraft.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum AircraftChoice {
    /// Its kind.
    Kind(AircraftKind),
    /// How the drag due to lift is given; the drag stays as it is.
    DragBy(DragBy),
}

impl AircraftChoice {
    /// What the step is called.
    pub(in crate::state) fn name(self) -> String {
        match self {
            Self::Kind(_) => "kind of aircraft".into(),
            Self::DragBy(_) => "how drag due to lift is given".into(),
        }
    }

    /// Makes the change.
    pub(in crate::state) fn apply(self, job: &mut Job) {
        match self {
            Self::Kind(kind) if kind == AircraftKind::of(job.aircraft.as_ref()) => {}
            Self::Kind(kind) => job.aircraft = kind.started(job),
            Self::DragBy(by) => {
                if let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft {
                    a.drag = match by {
                        DragBy::Factor => a.drag.by_factor(),
                        DragBy::AspectRatio => a.drag.by_aspect_ratio(),
                    };
                }
            }
        }
    }
}
