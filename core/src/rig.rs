//! A job made ready for computing: what the page and the command line ask.

use std::f64::consts::PI;

use crate::air::{Air, AirError};
use crate::aircraft::{propellers, with_drag};
use crate::blade::{Blade, BladeError};
use crate::engine::Shaft;
use crate::fit::Along;
use crate::job::{Aircraft, Factors, FlightPoint, Job, PitchControl, Propeller};
use crate::result::{Analysis, Fit, Note, PitchWorth, PointResult, PropellerFigures, SectionPoint};
use crate::rotor::{Condition, CurvePoint, DepartureMap, Rotor, coefficient_curves, departure_map};
use crate::{fit, report};

/// Radius fractions at which the fit tells the departure.
pub const FIT_RADIUS_FRACTIONS: [f64; 4] = [0.35, 0.5, 0.75, 0.9];

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

    /// Every flight point worked out.
    #[must_use]
    pub fn analysis(&self) -> Analysis {
        Analysis {
            spokeshave: crate::job::VERSION,
            title: self.job.title.clone(),
            propeller: self.propeller_figures(),
            flight_points: (0..self.job.flight_points.len()).filter_map(|i| self.point(i)).collect(),
        }
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

    /// One flight point worked out; `None` when there is no such point.
    #[must_use]
    pub fn point(&self, index: usize) -> Option<PointResult> {
        let point = self.job.flight_points.get(index)?;
        let air = air_of(point).ok()?;
        Some(match fit::condition(self, point, air) {
            Ok(at) => {
                let mut result = report::point(&self.rotor, point, &at);
                result.meeting = fit::meeting(self, &at, &result.figures);
                let taken_w = result.figures.power_w.unwrap_or(0.0);
                result.notes.extend(fit::beyond_engine(self, &at, taken_w));
                let slow = fit::slower_than_stall(self, point, &air);
                result.notes.extend(slow.then_some(Note::BelowStall));
                result
            }
            Err(state) => {
                let mut result = report::unanswered(point, &air, state, self.turn_rad());
                result.held = fit::held(self, point, air, state).map(Box::new);
                result.notes.extend(result.held.as_ref().map(|_| Note::HeldAtLimitRpm));
                result
            }
        })
    }

    /// The condition of a flight point; `None` when it has no answer.
    #[must_use]
    pub fn condition(&self, index: usize) -> Option<Condition> {
        let point = self.job.flight_points.get(index)?;
        fit::condition(self, point, air_of(point).ok()?).ok()
    }

    /// Coefficient curves at a flight point's rpm and air.
    #[must_use]
    pub fn curves(&self, index: usize, steps: u32) -> Vec<CurvePoint> {
        self.condition(index).map_or_else(Vec::new, |at| coefficient_curves(&self.rotor, &at, steps))
    }

    /// Lift, drag and lift-to-drag of a station's section over the angle of attack, as it works at a flight
    /// point.
    #[must_use]
    pub fn section_curve(&self, point: usize, station: usize) -> Vec<SectionPoint> {
        let radius = self.rotor.blade.station_radii_m().nth(station);
        let (Some(at), Some(r)) = (self.condition(point), radius) else { return Vec::new() };
        report::section_curve(&self.rotor, &self.rotor.ring(r), &at)
    }

    /// The departure map at a flight point's air, along [`fit::line`] or [`fit::level_line`], from the hub to
    /// the tip. `None` where the flight point has no answer or nothing is flown level.
    #[must_use]
    pub fn map(&self, index: usize, along: Along, speeds: u32, radii: u32) -> Option<DepartureMap> {
        let at = self.condition(index)?;
        let line = match along {
            Along::FullThrottle => fit::line(self, &at, speeds),
            Along::Level => fit::level_line(self, &at, speeds),
        };
        (!line.is_empty()).then(|| departure_map(&self.rotor, &line, &self.map_radii_m(radii)))
    }

    /// The whole fit at a flight point's air: the speed range with `speeds` speeds, take-off, ceilings. What
    /// a variable pitch is worth is left to [`Rig::pitch_worth`]. `None` when there is no such point, no
    /// engine, or the engine cannot turn the propeller.
    #[must_use]
    pub fn fit(&self, index: usize, speeds: u32) -> Option<Fit> {
        let point = self.job.flight_points.get(index)?;
        let envelope = fit::envelope(self, point, speeds, &FIT_RADIUS_FRACTIONS)?;
        let air = air_of(point).ok()?;
        let still = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: 1.0, turn_rad: self.turn_rad() };
        Some(Fit {
            spokeshave: crate::job::VERSION,
            title: self.job.title.clone(),
            take_off: fit::take_off(self, &envelope),
            ceilings: fit::ceilings(self, point.isa_offset_k),
            pitch_worth: Vec::new(),
            standing_crossings: fit::crossings(self, &still),
            envelope,
        })
    }

    /// What a variable pitch is worth at each flight point at which it could gain anything.
    #[must_use]
    pub fn pitch_worth(&self) -> Vec<PitchWorth> {
        self.job.flight_points.iter().filter_map(|p| fit::pitch_worth(self, p)).collect()
    }

    /// How far the blades are turned in the hub, rad.
    #[must_use]
    pub fn turn_rad(&self) -> f64 {
        match self.job.propeller.pitch_control {
            PitchControl::GroundAdjustable { turn_deg } => turn_deg.to_radians(),
            PitchControl::Fixed {} | PitchControl::ConstantSpeed { .. } => 0.0,
        }
    }

    /// Radii strictly between hub and tip, evenly spaced.
    fn map_radii_m(&self, count: u32) -> Vec<f64> {
        let (rh, rt) = (self.rotor.blade.hub_radius_m, self.rotor.blade.radius_m);
        (0..count).map(|i| rh + (rt - rh) * (f64::from(i) + 0.5) / f64::from(count)).collect()
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
