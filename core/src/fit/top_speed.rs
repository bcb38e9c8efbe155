//! Top speed: the fastest level flight at full throttle.

use std::cell::RefCell;

use super::Solver;
use super::full::Full;
use super::root::{Search, Wanted};
use super::slipstream::kept_share;
use super::trail::Trail;
use crate::aircraft::{speeds, thrust_asked_n};
use crate::job::Aircraft;
use crate::result::State;
use crate::rig::Rig;
use crate::rotor::Condition;

/// How far a step goes, as a share of the speed.
const STEP: f64 = 0.15;
/// Where an aeroplane's steps begin, as a share of the speed of least power: below it the drag's power rises
/// and the propeller's falls.
const FIRST: f64 = 0.7;
/// Where a multirotor's steps begin, m/s.
const FIRST_CLIMBING_M_S: f64 = 1.0;
/// Fastest speed considered, as a Mach number.
pub(super) const FASTEST_MACH: f64 = 0.7;
/// Halvings of a step in which the engine begins to turn the propeller.
const BISECTIONS: u32 = 10;
/// Thrust that may be left over, as a share of it.
const MET_SHARE: f64 = 1e-3;

/// The largest speed at which thrust still equals drag at full throttle, at the air of `at`.
///
/// # Errors
/// No aircraft or engine, thrust below drag at every speed, or the engine's limit rpm passed.
pub(super) fn condition(rig: &Rig, at: &Condition) -> Result<Condition, State> {
    let full = fastest(rig, at)?;
    if full.held { Err(State::OverLimitRpm) } else { Ok(full.condition) }
}

/// The same or, where the engine's limit rpm comes first, the fastest level flight throttled back to it.
pub(super) fn fastest(rig: &Rig, at: &Condition) -> Result<Full, State> {
    let exact = Chase::new(Solver { rig, rough: false }, at)?;
    let rough = Chase::new(Solver { rig, rough: true }, at)?;
    let found = rough.step_by_step().ok().and_then(|(low, high, _)| exact.met(&rough, low, high));
    if let Some(full) = found {
        return Ok(full);
    }
    // Where few elements do not lead there, all of them look again.
    let (low, high, limit) = exact.step_by_step()?;
    exact.met(&exact, low, high).ok_or(limit)
}

struct Chase<'r> {
    solver: Solver<'r>,
    aircraft: &'r Aircraft,
    at: Condition,
}

impl<'r> Chase<'r> {
    fn new(solver: Solver<'r>, at: &Condition) -> Result<Self, State> {
        let aircraft = solver.rig.aircraft.as_ref().ok_or(State::NeedsAircraft)?;
        solver.rig.shaft.as_ref().ok_or(State::NeedsEngine)?;
        Ok(Self { solver, aircraft, at: *at })
    }

    fn full(&self, airspeed_m_s: f64, trail: &mut Trail) -> Result<Full, State> {
        self.solver.full(&Condition { airspeed_m_s, ..self.at }, trail)
    }

    /// Thrust above what is asked.
    fn spare_n(&self, met: &Full) -> Option<f64> {
        let asked = thrust_asked_n(self.aircraft, &self.at.air, met.condition.airspeed_m_s)?;
        Some(met.loads.thrust_n * kept_share(self.solver.rig) - asked)
    }

    fn first_m_s(&self) -> f64 {
        match self.aircraft {
            Aircraft::Aeroplane(a) => FIRST * speeds(a, &self.at.air).least_power_m_s,
            Aircraft::Multirotor(_) => FIRST_CLIMBING_M_S,
        }
    }

    /// The step over which thrust ceases to suffice, and what ends it.
    fn step_by_step(&self) -> Result<(f64, f64, State), State> {
        let fastest = FASTEST_MACH * self.at.air.sound_speed_m_s;
        let (mut trail, mut last, mut limit) = (Trail::default(), None, State::OverLimitRpm);
        let mut v = self.first_m_s();
        while v < fastest {
            match self.full(v, &mut trail) {
                Ok(met) => match self.spare_n(&met) {
                    Some(s) if s >= 0.0 => last = Some(v),
                    _ if last.is_some() => break,
                    _ if limit == State::EngineCannotTurnIt => {
                        last = Some(self.first_turned(v / (1.0 + STEP), v)).filter(|low| self.spares(*low));
                        break;
                    }
                    _ => limit = State::OutOfReach,
                },
                // Too slow for the engine to turn it, from rest or after the propeller has come to take more;
                // the wind of more speed may help.
                Err(State::EngineCannotTurnIt) => (last, limit) = (None, State::EngineCannotTurnIt),
                // Past the engine's range before thrust falls to drag: that is what stops the aircraft.
                Err(state) => {
                    limit = state;
                    break;
                }
            }
            v *= 1.0 + STEP;
        }
        last.map(|low| (low, low * (1.0 + STEP), limit)).ok_or(limit)
    }

    /// The slowest speed at which the engine turns the propeller, between one at which it does not and one at
    /// which it does.
    fn first_turned(&self, mut slow: f64, mut fast: f64) -> f64 {
        for _ in 0..BISECTIONS {
            let middle = 0.5 * (slow + fast);
            let turned = self.full(middle, &mut Trail::default()).is_ok();
            (slow, fast) = if turned { (slow, middle) } else { (middle, fast) };
        }
        fast
    }

    /// Whether there is thrust to spare at a speed.
    fn spares(&self, airspeed_m_s: f64) -> bool {
        let full = self.full(airspeed_m_s, &mut Trail::default()).ok();
        full.and_then(|full| self.spare_n(&full)).is_some_and(|spare| spare >= 0.0)
    }

    /// How much thrust is short at a speed; where there is no full-throttle condition, some is.
    fn short_n(&self, airspeed_m_s: f64, trail: &RefCell<Trail>) -> f64 {
        let full = self.full(airspeed_m_s, &mut trail.borrow_mut()).ok();
        let spare = full.and_then(|full| self.spare_n(&full));
        spare.map_or(1.0, |spare| -spare)
    }

    /// The condition at which thrust meets what is asked between two speeds; `None` where the engine's range
    /// ends first.
    fn met(&self, rough: &Self, low: f64, high: f64) -> Option<Full> {
        let (trail, rough_trail) = <(RefCell<Trail>, RefCell<Trail>)>::default();
        let search = Search {
            range: low..=high,
            steps: 1,
            wanted: Wanted::Highest,
            rough: &|v| rough.short_n(v, &rough_trail),
            exact: &|v| self.short_n(v, &trail),
        };
        let top = search.root().ok()?.0.x;
        let full = self.full(top, &mut trail.borrow_mut()).ok()?;
        let spare = self.spare_n(&full)?.abs();
        (spare < MET_SHARE * full.loads.thrust_n).then_some(full)
    }
}
