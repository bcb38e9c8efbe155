//! Where propeller, engine and aircraft meet: from a flight point's setting to a condition of the propeller.
//!
//! At full throttle the propeller takes what the shaft gives: the rpm is sought over the engine's range, and
//! where the two meet more than once the highest rpm counts at which the propeller's demand rises through the
//! offer, for that one is stable. In level flight thrust equals drag, that of the slipstream included. A
//! constant-speed propeller holds its rpm and turns its blades between its stops instead; at a stop it is a
//! fixed one.

use crate::air::Air;
use crate::aircraft::{speeds, thrust_asked_n};
use crate::engine::Shaft;
use crate::job::{Aircraft, FlightPoint, Setting};
use crate::result::State;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, Loads};
use root::Missed;
use settle::{Demand, Free, Governed, Met, STEPS};
pub(crate) use slipstream::kept_share;
use trail::Trail;

mod answers;
mod ceiling;
mod crossings;
mod dive;
mod envelope;
mod figures;
mod full;
mod held;
mod idle;
mod line;
mod marks;
mod matched;
mod meeting;
mod near;
mod offer;
mod root;
mod settle;
mod slipstream;
mod take_off;
mod top_near;
mod top_speed;
mod trail;
mod worth;

pub use answers::FIT_RADIUS_FRACTIONS;
pub use ceiling::ceilings;
pub use crossings::crossings;
pub use envelope::envelope;
pub use held::held;
pub use line::{Along, level_line, line};
pub use matched::matched;
pub use meeting::{beyond_engine, meeting};
pub use near::{Answer, Near, answer};
pub use offer::{Offer, offer, offer_crossings};
pub use take_off::{take_off, take_off_in};
pub use worth::pitch_worth;

/// Fastest tip considered where no engine sets a limit, as a Mach number.
const FASTEST_TIP_MACH: f64 = 1.2;
/// Steps over the engine's range in search of its greatest power.
const POWER_STEPS: u32 = 64;
/// Slowest rotation considered over the fastest.
const SLOWEST: f64 = 0.01;
/// By what share an rpm may seem past a limit that it holds: more than what turning it into radians per second
/// and back adds, less than anybody reads.
const ROUNDED: f64 = 1e-9;

/// The condition at which a flight point's setting is met.
///
/// # Errors
/// The state that says why there is none.
pub fn condition(rig: &Rig, point: &FlightPoint, air: Air) -> Result<Condition, State> {
    let at = rig.unsolved(air, point.airspeed_m_s.unwrap_or(0.0));
    match point.setting {
        Setting::Rpm { rpm } => Ok(Condition { rotation_rad_s: rotation_rad_s(rpm), ..at }),
        Setting::Power { power_w } => Solver::new(rig).power(&at, power_w).map(|met| met.condition),
        Setting::FullThrottle {} if point.airspeed_m_s.is_none() => top_speed::condition(rig, &at),
        Setting::FullThrottle {} => throttle_condition(rig, &at, 1.0),
        Setting::Throttle { fraction } => throttle_condition(rig, &at, fraction),
        Setting::Level {} => {
            let met = Solver::new(rig).level(&at, &Trail::default());
            met.map(|met| met.condition)
                .map_err(|state| if slower_than_stall(rig, point, &air) { State::BelowStall } else { state })
        }
    }
}

/// Whether a flight point has an aeroplane fly slower than its stall, whatever the setting; standing still is
/// no flight but where it is to be level.
#[must_use]
pub fn slower_than_stall(rig: &Rig, point: &FlightPoint, air: &Air) -> bool {
    let Some(Aircraft::Aeroplane(a)) = &rig.aircraft else { return false };
    let speed_m_s = point.airspeed_m_s.unwrap_or(0.0);
    let flies = speed_m_s > 0.0 || point.setting == Setting::Level {};
    flies && speeds(a, air).stall_m_s.is_some_and(|stall| speed_m_s < stall)
}

/// The condition at which the engine at a throttle setting turns the propeller, at the speed and air of `at`.
///
/// # Errors
/// No engine; the engine too weak; the rpm past its limit or curve.
pub fn throttle_condition(rig: &Rig, at: &Condition, throttle: f64) -> Result<Condition, State> {
    Solver::new(rig).throttle(at, throttle, &Trail::default()).map(|met| met.condition)
}

/// What the engine has to spare.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Spare {
    /// Of its rpm limit, as a share of it; below zero is past it.
    pub rpm_share: f64,
    /// Of the power it gives, as a share of what is taken; below zero is short.
    pub power_share: f64,
    /// Greatest propeller rpm.
    pub highest_rpm: f64,
    /// What it gives at this rpm, past its limit the most it gives at any rpm, W.
    pub given_w: f64,
}

/// What the engine has to spare at a condition at which the propeller takes a power, W; `None` without an
/// engine.
#[must_use]
pub fn spare(rig: &Rig, at: &Condition, taken_w: f64) -> Option<Spare> {
    let shaft = rig.shaft.as_ref()?;
    let (rpm, highest_rpm) = (rpm_of(at), highest_rpm(shaft));
    let here_w = || shaft.power_w(rpm, &at.air, 1.0).max(0.0);
    let given_w = if past_limit(shaft, rpm) { greatest_w(shaft, at, highest_rpm) } else { here_w() };
    let power_share = (given_w - taken_w) / taken_w.max(1e-9);
    Some(Spare { rpm_share: 1.0 - rpm / highest_rpm, power_share, highest_rpm, given_w })
}

/// The most power an engine gives up to an rpm, by equal steps, W.
fn greatest_w(shaft: &Shaft, at: &Condition, highest_rpm: f64) -> f64 {
    let low = shaft.rpm_range().0;
    let rpm = |i: u32| low + (highest_rpm - low) * f64::from(i) / f64::from(POWER_STEPS);
    (0..=POWER_STEPS).map(|i| shaft.power_w(rpm(i), &at.air, 1.0)).fold(0.0, f64::max)
}

/// What the propeller takes at a condition, W.
fn power_w(loads: &Loads, at: &Condition) -> f64 {
    loads.torque_n_m * at.rotation_rad_s
}

/// Propeller rpm of a condition.
#[must_use]
pub fn rpm_of(at: &Condition) -> f64 {
    60.0 * at.turns_per_s()
}

/// The highest propeller rpm the engine allows: its limit or the end of its curve.
#[must_use]
pub fn highest_rpm(shaft: &Shaft) -> f64 {
    shaft.limit_rpm().unwrap_or(f64::INFINITY).min(shaft.rpm_range().1)
}

/// Whether a propeller rpm is more than the engine allows.
fn past_limit(shaft: &Shaft, rpm: f64) -> bool {
    rpm > highest_rpm(shaft) * (1.0 + ROUNDED)
}

/// Meets the settings of a job, by all elements or, for a look, by few.
#[derive(Clone, Copy)]
struct Solver<'r> {
    rig: &'r Rig,
    rough: bool,
}

impl<'r> Solver<'r> {
    fn new(rig: &'r Rig) -> Self {
        Self { rig, rough: false }
    }

    fn demand<'a>(&self, at: &Condition, spare: &'a dyn Fn(&Loads, &Condition) -> f64) -> Demand<'a>
    where
        'r: 'a,
    {
        Demand { rig: self.rig, at: *at, spare, rough: self.rough }
    }

    /// The engine at a throttle setting, 0 to 1.
    fn throttle(&self, at: &Condition, throttle: f64, trail: &Trail) -> Result<Met, State> {
        let shaft = self.rig.shaft.as_ref().ok_or(State::NeedsEngine)?;
        let spare =
            |loads: &Loads, c: &Condition| power_w(loads, c) - shaft.power_w(rpm_of(c), &at.air, throttle);
        let at = match self.demand(at, &spare).governed(trail) {
            Some(Governed::Held(met)) if past_limit(shaft, rpm_of(&met.condition)) => {
                return Err(State::OverLimitRpm);
            }
            Some(Governed::Held(met)) => return Ok(met),
            Some(Governed::AtStop(stop)) => stop,
            None => *at,
        };
        let (low, high) = shaft.rpm_range();
        let met = self.demand(&at, &spare).settle(Free::Rpm, low..=high, STEPS, trail);
        let met = met.map_err(|missed| match missed {
            Missed::AboveRange => State::OverLimitRpm,
            Missed::BelowRange => State::EngineCannotTurnIt,
        })?;
        if past_limit(shaft, rpm_of(&met.condition)) { Err(State::OverLimitRpm) } else { Ok(met) }
    }

    /// The propeller takes a power.
    fn power(&self, at: &Condition, asked_w: f64) -> Result<Met, State> {
        self.demanded(at, &|loads, c| power_w(loads, c) - asked_w, &Trail::default())
    }

    /// Level flight, or hover.
    fn level(&self, at: &Condition, trail: &Trail) -> Result<Met, State> {
        let met = self.level_by_thrust(at, trail)?;
        self.within_engine(&met).map(|()| met)
    }

    /// Level flight, or hover, whether or not the engine gives what it takes.
    fn level_by_thrust(&self, at: &Condition, trail: &Trail) -> Result<Met, State> {
        let aircraft = self.rig.aircraft.as_ref().ok_or(State::NeedsAircraft)?;
        let asked = thrust_asked_n(aircraft, &at.air, at.airspeed_m_s).ok_or(State::OutOfReach)?;
        let kept = kept_share(self.rig);
        self.demanded(at, &|loads, _| loads.thrust_n * kept - asked, trail)
    }

    /// Where a demand that rises with rpm (or with the blade angle of a governed propeller) is met.
    fn demanded(
        &self,
        at: &Condition,
        spare: &dyn Fn(&Loads, &Condition) -> f64,
        trail: &Trail,
    ) -> Result<Met, State> {
        let at = match self.demand(at, spare).governed(trail) {
            Some(Governed::Held(met)) => return Ok(met),
            Some(Governed::AtStop(stop)) => stop,
            None => *at,
        };
        let fastest = FASTEST_TIP_MACH * at.air.sound_speed_m_s / self.rig.rotor.blade.radius_m;
        let fastest_rpm = rpm_of(&Condition { rotation_rad_s: fastest, ..at });
        self.demand(&at, spare)
            .settle(Free::Rpm, SLOWEST * fastest_rpm..=fastest_rpm, STEPS, trail)
            .map_err(|_| State::OutOfReach)
    }

    /// Whether the engine, where there is one, gives what the condition takes.
    fn within_engine(&self, met: &Met) -> Result<(), State> {
        let Some(shaft) = &self.rig.shaft else { return Ok(()) };
        let rpm = rpm_of(&met.condition);
        if past_limit(shaft, rpm) {
            return Err(State::OverLimitRpm);
        }
        let taken = power_w(&met.loads, &met.condition);
        let given = shaft.power_w(rpm, &met.condition.air, 1.0);
        if taken > given { Err(State::EngineTooWeak) } else { Ok(()) }
    }
}
