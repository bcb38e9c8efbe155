//! What a job made ready tells when it is asked: its flight points, curves, map and fit.

use super::{
    Along, beyond_engine, ceilings, condition, crossings, envelope, held, level_line, line, meeting,
    pitch_worth, slower_than_stall, take_off,
};
use crate::report;
use crate::result::{Analysis, Fit, Note, PitchWorth, PointResult, SectionPoint};
use crate::rig::{Rig, air_of};
use crate::rotor::{Condition, CurvePoint, DepartureMap, coefficient_curves, departure_map};

/// Radius fractions at which the fit tells the departure.
pub const FIT_RADIUS_FRACTIONS: [f64; 4] = [0.35, 0.5, 0.75, 0.9];

impl Rig {
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

    /// One flight point worked out; `None` when there is no such point.
    #[must_use]
    pub fn point(&self, index: usize) -> Option<PointResult> {
        let point = self.job.flight_points.get(index)?;
        let air = air_of(point).ok()?;
        Some(match condition(self, point, air) {
            Ok(at) => {
                let mut result = report::point(&self.rotor, point, &at);
                result.meeting = meeting(self, &at, &result.figures);
                let taken_w = result.figures.power_w.unwrap_or(0.0);
                result.notes.extend(beyond_engine(self, &at, taken_w));
                let slow = slower_than_stall(self, point, &air);
                result.notes.extend(slow.then_some(Note::BelowStall));
                result
            }
            Err(state) => {
                let mut result = report::unanswered(point, &air, state, self.turn_rad());
                result.held = held(self, point, air, state).map(Box::new);
                result.notes.extend(result.held.as_ref().map(|_| Note::HeldAtLimitRpm));
                result
            }
        })
    }

    /// The condition of a flight point; `None` when it has no answer.
    #[must_use]
    pub fn condition(&self, index: usize) -> Option<Condition> {
        let point = self.job.flight_points.get(index)?;
        condition(self, point, air_of(point).ok()?).ok()
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

    /// The departure map at a flight point's air, along [`line()`] or [`level_line`], from the hub to
    /// the tip. `None` where the flight point has no answer or nothing is flown level.
    #[must_use]
    pub fn map(&self, index: usize, along: Along, speeds: u32, radii: u32) -> Option<DepartureMap> {
        let at = self.condition(index)?;
        let line = match along {
            Along::FullThrottle => line(self, &at, speeds),
            Along::Level => level_line(self, &at, speeds),
        };
        (!line.is_empty()).then(|| departure_map(&self.rotor, &line, &self.map_radii_m(radii)))
    }

    /// The whole fit at a flight point's air: the speed range with `speeds` speeds, take-off, ceilings. What
    /// a variable pitch is worth is left to [`Rig::pitch_worth`]. `None` when there is no such point, no
    /// engine, or the engine cannot turn the propeller.
    #[must_use]
    pub fn fit(&self, index: usize, speeds: u32) -> Option<Fit> {
        let point = self.job.flight_points.get(index)?;
        let envelope = envelope(self, point, speeds, &FIT_RADIUS_FRACTIONS)?;
        let air = air_of(point).ok()?;
        let still = self.unsolved(air, 0.0);
        Some(Fit {
            spokeshave: crate::job::VERSION,
            title: self.job.title.clone(),
            take_off: take_off(self, &envelope),
            ceilings: ceilings(self, point.isa_offset_k),
            pitch_worth: Vec::new(),
            standing_crossings: crossings(self, &still),
            envelope,
        })
    }

    /// What a variable pitch is worth at each flight point at which it could gain anything.
    #[must_use]
    pub fn pitch_worth(&self) -> Vec<PitchWorth> {
        self.job.flight_points.iter().filter_map(|p| pitch_worth(self, p)).collect()
    }

    /// Radii strictly between hub and tip, evenly spaced.
    fn map_radii_m(&self, count: u32) -> Vec<f64> {
        let (rh, rt) = (self.rotor.blade.hub_radius_m, self.rotor.blade.radius_m);
        (0..count).map(|i| rh + (rt - rh) * (f64::from(i) + 0.5) / f64::from(count)).collect()
    }
}
