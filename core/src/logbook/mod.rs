//! From readings of ground runs and flights to what engine, aircraft and propeller really do.
//!
//! Three factors are sought: engine power, drag area (drag without lift), power taken by the propeller; and a
//! fourth by which fuel flow or current goes wrong. A reading at full throttle says that the engine gives
//! what the propeller takes at the rpm read; one of level flight that thrust is drag; a fuel flow or current
//! what power was taken. The logarithms of these quotients are the mismatches; the errors of rpm, airspeed
//! and consumption ([`READING_WIDTHS`]), which mismatches of one reading share, give their covariance, taken
//! where the reading most likely was. Least squares with the prior widths of the job ([`crate::job::Widths`])
//! by Gauss and Newton; uncertainties from the inverse of the normal matrix. Readings that stay far off are
//! flagged and left out.
//!
//! The propeller is the carved one where the job has readings of it. At the governed rpm a governor hides
//! what a constant-speed propeller takes; below it the blades are on the fine stop, and the reading tells as
//! much as that of a fixed pitch.

mod equation;
pub mod import;
mod normal;
mod remark;
mod solve;

pub use equation::READING_WIDTHS;

use thiserror::Error;

use crate::aircraft::propellers;
use crate::carved::{Measured, mean_rig};
use crate::engine::Shaft;
use crate::fit;
use crate::job::{Factors, FlightPoint, Job, LogReading, PitchControl, Setting};
use crate::result::{Compared, Estimate, FactorFound, LogLine, Logged, Pair};
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::Condition;
use crate::shape::briefs;
use equation::{COUNT, Equation, consumption, factors};
use solve::{Found, OUTLIER, solve};

/// Names of the factors in the order of the estimate.
const NAMES: [&str; COUNT] = ["engine_power", "drag_area", "propeller_power", "consumption"];
/// A factor is told when its deviation is below this share of its width. A choice: the readings then say 1.8
/// times as much of it as was believed before them (1/0.6² less 1).
const TOLD: f64 = 0.6;
/// Two factors are not told apart from this correlation on. A choice: 0.72, its square, of what is not known
/// of the one is then what is not known of the other.
const TIED: f64 = 0.85;

/// Why the logbook has no answer.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum LogbookError {
    /// No readings.
    #[error("the job has no readings of ground runs or flights: key logbook")]
    NoReadings,
    /// No engine.
    #[error("the job has no engine, so that its readings cannot be judged")]
    NoEngine,
    /// A governor.
    #[error(
        "a governor holds the rpm of this propeller and no reading is below it, so that the angle of the \
         blades is not known; log a run at full throttle, or level flight, that stays below the governed \
         rpm with the blades on the fine stop"
    )]
    Governed,
    /// No reading tells anything.
    #[error(
        "no reading tells anything: one is needed at full throttle, in steady level flight, or with a fuel \
         flow or current"
    )]
    NothingTold,
}

/// What the readings of a job tell.
///
/// # Errors
/// No readings, no engine, only readings at the governed rpm, no reading that tells anything.
pub fn estimate(rig: &Rig) -> Result<Logged, LogbookError> {
    let logbook =
        rig.job.logbook.as_ref().filter(|l| !l.readings.is_empty()).ok_or(LogbookError::NoReadings)?;
    if rig.shaft.is_none() {
        return Err(LogbookError::NoEngine);
    }
    let governed = Governed::of(&rig.job);
    let read = governed.as_ref().map_or(&rig.job, |g| &g.on_stop);
    let (before, as_carved) = flown(read, &Factors::default()).ok_or(LogbookError::NothingTold)?;
    let hidden = |r: &LogReading| governed.as_ref().is_some_and(|g| g.hides(&before, r));
    let equation = |r: &LogReading| if r.left_out || hidden(r) { None } else { Equation::new(&before, r) };
    let mut equations: Vec<Option<Equation>> = logbook.readings.iter().map(equation).collect();
    if equations.iter().all(Option::is_none) {
        return Err(if logbook.readings.iter().any(hidden) {
            LogbookError::Governed
        } else {
            LogbookError::NothingTold
        });
    }
    let w = &logbook.widths;
    let widths = [w.engine_power, w.drag_area, w.propeller_power, w.consumption];
    let found = solve(&mut equations, &widths).ok_or(LogbookError::NothingTold)?;
    let factors = factors(&found.x);
    let (after, _) = flown(read, &factors).ok_or(LogbookError::NothingTold)?;
    let pairs = pairs(&found, &widths);
    let electric = matches!(rig.shaft, Some(Shaft::Electric(_)));
    let all = factors_found(&found, &widths, titles(electric));
    let remarks = remark::of_all(&equations, &all, &pairs, electric);
    let line = |(i, r): (usize, &LogReading)| {
        let line = line(&before, &after, r, equations[i].as_ref(), found.off[i]);
        if hidden(r) && !r.left_out { LogLine { remark: HIDDEN.into(), ..line } } else { line }
    };
    let points = |factors: &Factors| flown(&rig.job, factors).map_or_else(Vec::new, |(rig, _)| briefs(&rig));
    Ok(Logged {
        spokeshave: crate::job::VERSION,
        title: rig.job.title.clone(),
        as_carved,
        readings: logbook.readings.iter().enumerate().map(line).collect(),
        flight_points: points(&Factors::default())
            .into_iter()
            .zip(points(&factors))
            .map(|(drawn, shaped)| Compared { drawn, shaped })
            .collect(),
        estimate: Estimate { factors, widths: *w, found: all, pairs, remarks },
    })
}

/// What is said of a reading at the governed rpm.
const HIDDEN: &str = "tells nothing: at the governed rpm the angle of the blades is not known; one below \
    it, on the fine stop, would tell";
/// Share of the governed rpm below which the blades are on the fine stop.
const BELOW: f64 = 0.985;

/// A propeller whose rpm a governor holds.
struct Governed {
    /// Governed propeller rpm.
    rpm: f64,
    /// The job with the blades set on the fine stop.
    on_stop: Job,
}

impl Governed {
    fn of(job: &Job) -> Option<Self> {
        let PitchControl::ConstantSpeed { rpm, turn_min_deg, .. } = job.propeller.pitch_control else {
            return None;
        };
        let mut on_stop = job.clone();
        on_stop.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: turn_min_deg };
        Some(Self { rpm, on_stop })
    }

    /// Whether the governor may have turned the blades.
    fn hides(&self, rig: &Rig, r: &LogReading) -> bool {
        let gear = rig.shaft.as_ref().map_or(1.0, Shaft::gear_ratio);
        r.engine_rpm.is_some_and(|rpm| rpm / gear > BELOW * self.rpm)
    }
}

/// The job as flown, with factors: with the carved propeller, where it was measured.
fn flown(job: &Job, factors: &Factors) -> Option<(Rig, bool)> {
    let drawn = Rig::with_factors(job, factors).ok()?;
    match Measured::new(&drawn).and_then(|measured| mean_rig(&drawn, &measured)) {
        Ok(carved) => Some((carved, true)),
        Err(_) => Some((drawn, false)),
    }
}

/// The factors in words, in the order of [`NAMES`].
fn titles(electric: bool) -> [&'static str; COUNT] {
    let (power, consumption) =
        if electric { ("Motor power", "Current for a power") } else { ("Engine power", "Fuel for a power") };
    [power, "Drag area without lift", "Power to turn the propeller", consumption]
}

fn factors_found(found: &Found, widths: &[f64; COUNT], titles: [&'static str; COUNT]) -> Vec<FactorFound> {
    let one = |k: usize| {
        let deviation = found.covariance[k][k].sqrt();
        let told = deviation < TOLD * widths[k];
        FactorFound {
            name: NAMES[k],
            title: titles[k],
            value: found.x[k].exp(),
            deviation,
            width: widths[k],
            told,
        }
    };
    (0..COUNT).map(one).collect()
}

/// Factors that are tied to one another by the readings: with the same width before, neither is known as well
/// as their quotient.
fn pairs(found: &Found, widths: &[f64; COUNT]) -> Vec<Pair> {
    let c = &found.covariance;
    let pair = |(i, j): (usize, usize)| {
        let correlation = c[i][j] / (c[i][i] * c[j][j]).sqrt();
        let sign = correlation.signum();
        let deviation = (c[i][i] + c[j][j] - 2.0 * sign * c[i][j]).max(0.0).sqrt();
        let tied = correlation.abs() > TIED && deviation < TOLD * widths[i].hypot(widths[j]);
        let value = (found.x[i] - sign * found.x[j]).exp();
        tied.then_some(Pair { first: NAMES[i], second: NAMES[j], correlation, value, deviation })
    };
    let all = (0..COUNT).flat_map(|i| (i + 1..COUNT).map(move |j| (i, j)));
    all.filter_map(pair).collect()
}

fn line(before: &Rig, after: &Rig, r: &LogReading, equation: Option<&Equation>, off: Option<f64>) -> LogLine {
    let gear = before.shaft.as_ref().map_or(1.0, Shaft::gear_ratio);
    let expected = |rig: &Rig| Some(gear * fit::rpm_of(&expected(rig, r)?));
    let consumed = |rig: &Rig| {
        let (shaft, air) = (rig.shaft.as_ref()?, equation::air(r)?);
        let rpm = r.engine_rpm? / gear;
        let (rotation_rad_s, turn_rad) = (rotation_rad_s(rpm), rig.turn_rad());
        let at = Condition { air, airspeed_m_s: r.airspeed_m_s, rotation_rad_s, turn_rad };
        let power_w = rig.rotor.loads(&at).torque_n_m * rotation_rad_s;
        let engines = rig.aircraft.as_ref().map_or(1.0, propellers);
        consumption(shaft, (rpm, power_w), &air, engines).filter(|c| c.is_finite())
    };
    let measured = r.fuel_kg_per_h.or(r.current_a);
    let after_rpm = expected(after);
    let outlier = off.is_some_and(|off| off > OUTLIER);
    LogLine {
        engine_rpm: r.engine_rpm,
        before_rpm: expected(before),
        after_rpm,
        consumption: measured,
        before_consumption: measured.and_then(|_| consumed(before)),
        after_consumption: measured.and_then(|_| consumed(after)),
        off,
        outlier,
        remark: remark::of_reading(after, r, equation.is_some(), outlier, after_rpm),
    }
}

/// The condition expected at a reading's air and speed: at its throttle where that tells, else in level
/// flight.
fn expected(rig: &Rig, r: &LogReading) -> Option<Condition> {
    let piston = matches!(rig.shaft, Some(crate::engine::Shaft::Piston(_)));
    let setting = match r.throttle {
        Some(t) if t >= 1.0 => Setting::FullThrottle {},
        Some(fraction) if fraction > 0.0 && !piston => Setting::Throttle { fraction },
        _ if r.level => Setting::Level {},
        _ => return None,
    };
    let point = FlightPoint {
        name: String::new(),
        altitude_m: 0.0,
        isa_offset_k: 0.0,
        airspeed_m_s: Some(r.airspeed_m_s),
        setting,
    };
    fit::condition(rig, &point, equation::air(r)?).ok()
}
