//! A job made ready for computing; what it tells when it is asked stands in [`crate::fit`].

use std::f64::consts::PI;

use crate::air::{Air, AirError};
use crate::aircraft::{propellers, with_drag};
use crate::blade::{Blade, BladeError};
use crate::engine::Shaft;
use crate::job::{Aircraft, Factors, FlightPoint, Job, PitchControl, Propeller};
use crate::result::PropellerFigures;
use crate::rotor::{Condition, Rotor};

/// A job ready for computing.
#[derive(Clone, Debug)]
pub struct Rig {
    /// The job as checked.
    pub job: Job,
    /// Its propeller.
    pub rotor: Rotor,
    /// Its engine, where it has one.
    pub shaft: Option<Shaft>,
    /// Its aircraft, where it has one, with the drag that the logbook has found where that is used.
    pub aircraft: Option<Aircraft>,
}

impl Rig {
    /// Makes a job ready.
    ///
    /// # Errors
    /// Only for a job that [`Job::check`] refuses.
    ///
    /// ```
    /// use spokeshave::{job::{DEMOS, Job}, rig::Rig};
    /// let job = Job::from_json(DEMOS[0].json).unwrap();
    /// let analysis = Rig::new(&job).unwrap().analysis();
    /// assert_eq!(analysis.flight_points.len(), job.flight_points.len());
    /// ```
    pub fn new(job: &Job) -> Result<Self, BladeError> {
        let used = job.logbook.as_ref().filter(|logbook| logbook.in_use);
        Self::with_factors(job, &used.and_then(|logbook| logbook.factors).unwrap_or_default())
    }

    /// The same with factors in place of those of the job's logbook.
    ///
    /// # Errors
    /// Only for a job that [`Job::check`] refuses.
    pub fn with_factors(job: &Job, factors: &Factors) -> Result<Self, BladeError> {
        let engines = job.aircraft.as_ref().map_or(1.0, propellers);
        let shaft = job.engine.as_ref().and_then(|engine| Shaft::new(engine, engines));
        Ok(Self {
            rotor: Rotor::new(Blade::new(job)?, &job.method).taking(factors.propeller_power),
            shaft: shaft.map(|shaft| shaft.with_factors(factors)),
            aircraft: job.aircraft.as_ref().map(|aircraft| with_drag(aircraft, factors.drag_area)),
            job: job.clone(),
        })
    }

    /// The same job with another propeller of the same sections.
    ///
    /// # Errors
    /// Only for a propeller that [`Job::check`] refuses.
    pub fn with_propeller(&self, propeller: Propeller) -> Result<Self, BladeError> {
        let job = Job { propeller, ..self.job.clone() };
        let blade = Blade::with(&job, &self.rotor.blade.families)?;
        let rotor = Rotor::new(blade, &job.method).taking(self.rotor.power_factor());
        Ok(Self { rotor, shaft: self.shaft.clone(), aircraft: self.aircraft.clone(), job })
    }

    /// Figures that no flight point changes.
    #[must_use]
    pub fn propeller_figures(&self) -> PropellerFigures {
        let blade = &self.rotor.blade;
        PropellerFigures {
            blades: blade.count,
            diameter_m: 2.0 * blade.radius_m,
            activity_factor: blade.activity_factor(),
            solidity: blade.solidity(),
            blade_angle_075_deg: blade.cut(0.75 * blade.radius_m).angle_rad.to_degrees(),
            geometric_pitch_m: blade.pitch_075_m(0.0),
        }
    }

    /// How far the blades are turned in the hub, rad.
    #[must_use]
    pub fn turn_rad(&self) -> f64 {
        match self.job.propeller.pitch_control {
            PitchControl::GroundAdjustable { turn_deg } => turn_deg.to_radians(),
            PitchControl::Fixed {} | PitchControl::ConstantSpeed { .. } => 0.0,
        }
    }

    /// The propeller in this air at this airspeed (m/s), its rotation still to be found: 1 rad/s stands for it.
    #[must_use]
    pub fn unsolved(&self, air: Air, airspeed_m_s: f64) -> Condition {
        Condition { air, airspeed_m_s, rotation_rad_s: 1.0, turn_rad: self.turn_rad() }
    }
}

/// The air of a flight point.
///
/// # Errors
/// A height or temperature outside the standard atmosphere, which [`Job::check`] refuses.
pub fn air_of(point: &FlightPoint) -> Result<Air, AirError> {
    Air::standard(point.altitude_m, point.isa_offset_k)
}

/// Speed of rotation, rad/s, of a propeller rpm.
#[must_use]
pub fn rotation_rad_s(rpm: f64) -> f64 {
    rpm * PI / 30.0
}
