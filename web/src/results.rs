//! What is computed for the page, kept by the part of the job it depends on, so that an edit works out again
//! only what it changed. The title, the wood and other flight points do not touch a point's results.

mod frames;

pub use frames::{Compared, Later, Now, RigRef, Same};

use std::rc::Rc;

use spokeshave::carved;
use spokeshave::drawn::{DrawnStation, stations};
use spokeshave::fit::{self, Along, Offer};
use spokeshave::job::{Carved, Factors, FlightPoint, Job, Logbook, Wishes, Wood};
use spokeshave::logbook;
use spokeshave::result::{
    Carved as CarvedResult, Ceilings, Crossing, Envelope, Logged, Margin, PitchWorth, PointResult,
    RemovalPlan, SectionPoint, Strength, TakeOff,
};
use spokeshave::rig::Rig;
use spokeshave::rotor::{CurvePoint, DepartureMap};
use spokeshave::shape;
use spokeshave::wood::{WoodError, strength};

/// Speeds and radii of the departure map.
const MAP_SPEEDS: u32 = 60;
const MAP_RADII: u32 = 40;
/// Steps of the coefficient curves.
const CURVE_STEPS: u32 = 40;
/// Speeds of rotation at which offer and demand of power are compared.
const OFFER_STEPS: u32 = 48;
/// Speeds of the fit's curves.
const ENVELOPE_SPEEDS: u32 = 60;
/// Results kept for each kind.
const KEPT: usize = 64;

/// The strength of a blade, or why it is not known.
pub type Sheet = Result<Strength, WoodError>;

/// Results by what they depend on, the latest last.
#[derive(Debug)]
struct Shelf<K, V>(Vec<(K, Rc<V>)>);

impl<K, V> Default for Shelf<K, V> {
    fn default() -> Self {
        Self(Vec::new())
    }
}

impl<K: PartialEq + Clone, V> Shelf<K, V> {
    fn known(&self, key: &K) -> Option<Rc<V>> {
        self.0.iter().find(|(k, _)| k == key).map(|(_, value)| value.clone())
    }

    fn get(&mut self, key: &K, make: impl FnOnce() -> V) -> Rc<V> {
        if let Some(value) = self.known(key) {
            return value;
        }
        if self.0.len() >= KEPT {
            self.0.remove(0);
        }
        let value = Rc::new(make());
        self.0.push((key.clone(), value.clone()));
        value
    }
}

/// What the shaft offers and the propeller takes over rpm at a flight point.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Offered {
    /// Both over rpm.
    pub curve: Vec<Offer>,
    /// Where they agree.
    pub crossings: Vec<Crossing>,
}

/// The carved blades, and what can be put right where a flight point tells.
#[derive(Clone, Debug, PartialEq)]
pub struct CarvedFound {
    /// As measured.
    pub carved: CarvedResult,
    /// What to take off, or why there is no plan.
    pub plan: Result<RemovalPlan, String>,
}

/// The limits, what stress asks, and all flight points.
type LimitsKey = (Option<Wishes>, Option<Wood>, Vec<FlightPoint>);
/// The readings of the blades with the flight points they are judged at.
type CarvedKey = (Vec<FlightPoint>, Option<Carved>, usize);
/// The readings of the logbook with those of the blades that were flown.
type LoggedKey = (Vec<FlightPoint>, Option<Carved>, Option<Logbook>);

/// The results of one propeller.
#[derive(Debug, Default)]
pub struct Results {
    rig: Option<Rc<Rig>>,
    drawn: Rc<Vec<DrawnStation>>,
    points: Shelf<FlightPoint, Option<PointResult>>,
    maps: Shelf<(FlightPoint, Along), Option<DepartureMap>>,
    curves: Shelf<FlightPoint, Vec<CurvePoint>>,
    offers: Shelf<FlightPoint, Offered>,
    /// By height and temperature offset.
    envelopes: Shelf<[f64; 2], Option<Envelope>>,
    /// By temperature offset.
    ceilings: Shelf<f64, Option<Ceilings>>,
    /// By all flight points.
    worth: Shelf<Vec<FlightPoint>, Vec<PitchWorth>>,
    /// By the wood and all flight points.
    strengths: Shelf<(Option<Wood>, Vec<FlightPoint>), Sheet>,
    margins: Shelf<LimitsKey, Vec<Margin>>,
    sections: Shelf<(FlightPoint, usize), Vec<SectionPoint>>,
    carved: Shelf<CarvedKey, Result<CarvedFound, String>>,
    logged: Shelf<LoggedKey, Result<Logged, String>>,
}

impl Results {
    /// Makes ready for a job; drops what the job no longer agrees with. Jobs that cannot be built leave
    /// nothing.
    pub fn of(&mut self, job: &Job) -> &mut Self {
        match &self.rig {
            Some(rig) if rig.job == *job => {}
            Some(rig) if same_machine(&rig.job, job) => {
                self.rig = Some(Rc::new(Rig { job: job.clone(), ..Rig::clone(rig) }));
            }
            _ => *self = Self::built(job),
        }
        self
    }

    fn built(job: &Job) -> Self {
        let rig = Rig::new(job).ok().map(Rc::new);
        let reference = job.propeller.angle_reference;
        let drawn = rig.as_ref().map_or_else(Vec::new, |rig| stations(&rig.rotor.blade, reference));
        Self { rig, drawn: Rc::new(drawn), ..Self::default() }
    }

    /// The job made ready.
    #[must_use]
    pub fn rig(&self) -> Option<Rc<Rig>> {
        self.rig.clone()
    }

    /// The stations as drawn.
    #[must_use]
    pub fn drawn(&self) -> Rc<Vec<DrawnStation>> {
        self.drawn.clone()
    }

    /// A flight point worked out.
    pub fn point(&mut self, i: usize) -> Rc<Option<PointResult>> {
        let Some((rig, key)) = self.at(i) else { return Rc::new(None) };
        self.points.get(&key, || rig.point(i))
    }

    /// The departure map at a flight point.
    pub fn map(&mut self, i: usize, along: Along) -> Rc<Option<DepartureMap>> {
        let Some((rig, key)) = self.at(i) else { return Rc::new(None) };
        self.maps.get(&(key, along), || rig.map(i, along, MAP_SPEEDS, MAP_RADII))
    }

    /// The coefficient curves at a flight point.
    pub fn curves(&mut self, i: usize) -> Rc<Vec<CurvePoint>> {
        let Some((rig, key)) = self.at(i) else { return Rc::default() };
        self.curves.get(&key, || rig.curves(i, CURVE_STEPS))
    }

    /// What the shaft offers and the propeller takes over rpm at a flight point.
    pub fn offer(&mut self, i: usize) -> Rc<Offered> {
        let Some((rig, key)) = self.at(i) else { return Rc::default() };
        let worked_out =
            || Offered { curve: fit::offer(&rig, i, OFFER_STEPS), crossings: fit::offer_crossings(&rig, i) };
        self.offers.get(&key, worked_out)
    }

    /// The speed range in a flight point's air, with the departure at every station.
    pub fn envelope(&mut self, i: usize) -> Rc<Option<Envelope>> {
        let Some((rig, point)) = self.at(i) else { return Rc::new(None) };
        let fractions: Vec<f64> = rig.job.propeller.stations.iter().map(|s| s.radius_fraction).collect();
        let air = [point.altitude_m, point.isa_offset_k];
        self.envelopes.get(&air, || fit::envelope(&rig, &point, ENVELOPE_SPEEDS, &fractions))
    }

    /// Take-off in a flight point's air.
    pub fn take_off(&mut self, i: usize) -> Option<TakeOff> {
        let envelope = self.envelope(i);
        fit::take_off(self.rig.as_ref()?, envelope.as_ref().as_ref()?)
    }

    /// Works out what a variable pitch is worth at every flight point.
    pub fn work_worth(&mut self) {
        if let Some(rig) = self.rig.clone() {
            self.worth.get(&rig.job.flight_points, || rig.pitch_worth());
        }
    }

    /// What a variable pitch is worth, once it has been worked out.
    #[must_use]
    pub fn worth(&self) -> Rc<Vec<PitchWorth>> {
        self.rig.as_ref().and_then(|rig| self.worth.known(&rig.job.flight_points)).unwrap_or_default()
    }

    /// How far every limit is kept.
    pub fn margins(&mut self) -> Rc<Vec<Margin>> {
        let Some(rig) = self.rig.clone() else { return Rc::default() };
        let job = &rig.job;
        let key = (job.wishes.clone(), job.wood.clone(), job.flight_points.clone());
        self.margins.get(&key, || shape::kept(&rig))
    }

    /// Works out the strength of the blade.
    pub fn work_strength(&mut self) {
        if let Some(rig) = self.rig.clone() {
            let key = (rig.job.wood.clone(), rig.job.flight_points.clone());
            self.strengths.get(&key, || strength(&rig));
        }
    }

    /// The strength of the blade, once it has been worked out.
    #[must_use]
    pub fn strength(&self) -> Option<Rc<Sheet>> {
        let job = &self.rig.as_ref()?.job;
        self.strengths.known(&(job.wood.clone(), job.flight_points.clone()))
    }

    /// Works out the ceilings at a flight point's temperature offset.
    pub fn work_ceilings(&mut self, i: usize) {
        if let Some((rig, point)) = self.at(i) {
            self.ceilings.get(&point.isa_offset_k, || fit::ceilings(&rig, point.isa_offset_k));
        }
    }

    /// The ceilings, once they have been worked out.
    #[must_use]
    pub fn ceilings(&self, i: usize) -> Option<Ceilings> {
        let (_, point) = self.at(i)?;
        self.ceilings.known(&point.isa_offset_k).and_then(|c| *c)
    }

    /// Lift and drag of a station's section over angle at a flight point.
    pub fn section(&mut self, i: usize, station: usize) -> Rc<Vec<SectionPoint>> {
        let Some((rig, key)) = self.at(i) else { return Rc::default() };
        self.sections.get(&(key, station), || rig.section_curve(i, station))
    }

    /// The carved blades, and what to take off them for the departure at a flight point.
    pub fn carved(&mut self, i: usize) -> Option<Rc<Result<CarvedFound, String>>> {
        let rig = self.rig.clone()?;
        let key = (rig.job.flight_points.clone(), rig.job.carved.clone(), i);
        Some(self.carved.get(&key, || {
            let carved = carved::analyse(&rig).map_err(|e| e.to_string())?;
            Ok(CarvedFound { carved, plan: carved::plan(&rig, i).map_err(|e| e.to_string()) })
        }))
    }

    /// What the logbook tells.
    pub fn logged(&mut self) -> Option<Rc<Result<Logged, String>>> {
        let rig = self.rig.clone()?;
        let job = &rig.job;
        let key = (job.flight_points.clone(), job.carved.clone(), job.logbook.clone());
        Some(self.logged.get(&key, || logbook::estimate(&rig).map_err(|e| e.to_string())))
    }

    fn at(&self, i: usize) -> Option<(Rc<Rig>, FlightPoint)> {
        let rig = self.rig.clone()?;
        let key = rig.job.flight_points.get(i)?.clone();
        Some((rig, key))
    }
}

/// Whether two jobs give the same answers at the same flight point.
fn same_machine(a: &Job, b: &Job) -> bool {
    a.propeller == b.propeller
        && a.method == b.method
        && a.engine == b.engine
        && a.aircraft == b.aircraft
        && a.sections == b.sections
        && factors_used(a) == factors_used(b)
}

/// What the logbook found, where it is used.
fn factors_used(job: &Job) -> Option<Factors> {
    job.logbook.as_ref().filter(|logbook| logbook.in_use)?.factors
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::DEMOS;

    fn demo() -> Job {
        Job::from_json(DEMOS[0].json).unwrap()
    }

    #[test]
    fn results_are_those_of_the_core() {
        let job = demo();
        let mut results = Results::default();
        assert_eq!(*results.of(&job).point(2), Rig::new(&job).unwrap().point(2));
        assert!(results.map(2, Along::FullThrottle).is_some());
        assert_eq!(results.drawn().len(), job.propeller.stations.len());
    }

    #[test]
    fn what_does_not_change_is_not_worked_out_again() {
        let mut job = demo();
        let mut results = Results::default();
        let (point, map) = (results.of(&job).point(2), results.map(2, Along::FullThrottle));
        job.title = "another".into();
        job.flight_points[0].altitude_m = 500.0;
        results.of(&job);
        assert!(Rc::ptr_eq(&point, &results.point(2)));
        assert!(Rc::ptr_eq(&map, &results.map(2, Along::FullThrottle)));
        assert!(!Rc::ptr_eq(&results.point(0), &results.point(1)));
    }

    #[test]
    fn what_changes_is_worked_out_again() {
        let mut job = demo();
        let mut results = Results::default();
        let before = results.of(&job).point(2);
        job.propeller.stations[5].angle_deg = Some(25.0);
        let after = results.of(&job).point(2);
        assert_ne!(before, after);
        assert_eq!(*after, Rig::new(&job).unwrap().point(2));
    }

    #[test]
    fn a_place_that_is_not_there_has_no_result() {
        let mut results = Results::default();
        assert!(results.of(&demo()).point(99).is_none());
        assert!(results.curves(99).is_empty());
    }
}
