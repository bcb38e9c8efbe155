//! What one reading says of the factors.

use super::normal::{factor, whitened};
use crate::air::Air;
use crate::aircraft::{propellers, thrust_asked_n, with_drag};
use crate::engine::Shaft;
use crate::fit::kept_share;
use crate::job::{Factors, LogReading};
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::Condition;

/// How far a reading may be off, as shares, standard deviations: of the rpm, of the airspeed, of the fuel
/// flow or current. A choice: what careful reading of ordinary instruments gives.
pub const READING_WIDTHS: [f64; 3] = [0.01, 0.02, 0.02];
/// Step of the slopes, as a share.
const STEP: f64 = 0.01;
/// Most that rpm or airspeed are believed to be off, as a share.
const MOST_MOVED: f64 = 0.08;

/// The air of a reading.
pub(super) fn air(reading: &LogReading) -> Option<Air> {
    let at = Air::standard(reading.altitude_m.unwrap_or(0.0), 0.0).ok()?;
    let temperature_k = reading.temperature_c.map(|c| c + 273.15);
    Some(Air::of(reading.pressure_pa.unwrap_or(at.pressure_pa), temperature_k.unwrap_or(at.temperature_k)))
}

/// The logarithms of the factors, by which the estimate goes: engine power, drag area, propeller power,
/// consumption.
pub(super) const COUNT: usize = 4;

/// The factors of their logarithms.
pub(super) fn factors(x: &[f64]) -> Factors {
    Factors {
        engine_power: x[0].exp(),
        drag_area: x[1].exp(),
        propeller_power: x[2].exp(),
        consumption: x[3].exp(),
    }
}

/// What a reading is compared with.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Told {
    /// The engine gives what the propeller takes.
    Power,
    /// Thrust is drag.
    Thrust,
    /// Fuel flow or current is that of the power.
    Consumption,
}

/// One reading made ready.
pub(super) struct Equation<'r> {
    rig: &'r Rig,
    shaft: &'r Shaft,
    air: Air,
    throttle: f64,
    measured: Option<f64>,
    /// Propeller rpm and airspeed, m/s, as read.
    read: (f64, f64),
    /// What it tells.
    pub(super) told: Vec<Told>,
    /// Where the mismatches are linearised: rpm and airspeed that are believed, over those that were read.
    at: (f64, f64),
    /// What the mismatches at the rpm and airspeed read have over those where they are linearised.
    shift: Vec<f64>,
    /// Mismatches that an error of the width of rpm or airspeed makes.
    by_width: [Vec<f64>; 2],
    /// Cholesky's factor of the covariance of the mismatches by the errors of the reading.
    factor: Vec<Vec<f64>>,
}

/// What the propeller does at an rpm and airspeed.
#[derive(Clone, Copy)]
struct Here {
    rpm: f64,
    airspeed_m_s: f64,
    thrust_n: f64,
    power_w: f64,
}

impl<'r> Equation<'r> {
    /// `None` where the reading tells nothing: no engine, no rpm, an air or a load that has no answer,
    /// neither full throttle nor level flight nor a consumption.
    pub(super) fn new(rig: &'r Rig, reading: &LogReading) -> Option<Self> {
        let shaft = rig.shaft.as_ref()?;
        let measured = reading.fuel_kg_per_h.or(reading.current_a).filter(|m| *m > 0.0);
        let mut equation = Self {
            rig,
            shaft,
            air: air(reading)?,
            throttle: reading.throttle.unwrap_or(0.0),
            measured,
            read: (reading.engine_rpm? / shaft.gear_ratio(), reading.airspeed_m_s),
            told: Vec::new(),
            at: (1.0, 1.0),
            shift: Vec::new(),
            by_width: [Vec::new(), Vec::new()],
            factor: Vec::new(),
        };
        let here = equation.here((1.0, 1.0))?;
        // The share of full power at part throttle is not known of a piston engine; a motor's duty is.
        let power_known = match shaft {
            Shaft::Piston(_) => reading.throttle == Some(1.0),
            Shaft::Electric(_) => reading.throttle.is_some_and(|t| t > 0.0),
        };
        let usable = [
            (Told::Power, power_known),
            (Told::Thrust, reading.level),
            (Told::Consumption, measured.is_some()),
        ];
        let tells = |(told, stated): &(Told, bool)| {
            (*stated && equation.mismatch(*told, &here, &[0.0; COUNT]).is_some_and(f64::is_finite))
                .then_some(*told)
        };
        equation.told = usable.iter().filter_map(tells).collect();
        if equation.told.is_empty() {
            return None;
        }
        equation.linearise(&[0.0; COUNT])?;
        Some(equation)
    }

    fn here(&self, (of_rpm, of_airspeed): (f64, f64)) -> Option<Here> {
        let (rpm, airspeed_m_s) = (self.read.0 * of_rpm, self.read.1 * of_airspeed);
        let (air, turn_rad) = (self.air, self.rig.turn_rad());
        let at = Condition { air, airspeed_m_s, rotation_rad_s: rotation_rad_s(rpm), turn_rad };
        let loads = self.rig.rotor.loads(&at);
        let power_w = loads.torque_n_m * at.rotation_rad_s;
        (power_w > 0.0).then_some(Here { rpm, airspeed_m_s, thrust_n: loads.thrust_n, power_w })
    }

    /// The logarithm of one side over the other; `None` where one has none.
    fn mismatch(&self, told: Told, here: &Here, x: &[f64]) -> Option<f64> {
        let of = factors(x);
        let taken_w = here.power_w * of.propeller_power;
        let shaft = || self.shaft.clone().with_factors(&of);
        let value = match told {
            Told::Power => (taken_w / shaft().power_w(here.rpm, &self.air, self.throttle)).ln(),
            Told::Thrust => {
                let aircraft = with_drag(self.rig.aircraft.as_ref()?, of.drag_area);
                let asked = thrust_asked_n(&aircraft, &self.air, here.airspeed_m_s)?;
                (here.thrust_n * kept_share(self.rig) / asked).ln()
            }
            Told::Consumption => {
                let engines = self.rig.aircraft.as_ref().map_or(1.0, propellers);
                (self.measured? / consumption(&shaft(), (here.rpm, taken_w), &self.air, engines)?).ln()
            }
        };
        value.is_finite().then_some(value)
    }

    fn mismatches(&self, here: &Here, x: &[f64]) -> Option<Vec<f64>> {
        self.told.iter().map(|told| self.mismatch(*told, here, x)).collect()
    }

    /// Mismatches of the reading over its errors, each of variance 1, by the logarithms of the factors.
    pub(super) fn residual(&self, x: &[f64]) -> Option<Vec<f64>> {
        let here = self.mismatches(&self.here(self.at)?, x)?;
        Some(whitened(&self.factor, &sum(&here, &self.shift)))
    }

    /// Residuals at a place and their slopes with each logarithm.
    pub(super) fn linear(&self, x: &[f64]) -> Option<(Vec<f64>, Vec<Vec<f64>>)> {
        // Half of a difference of logarithms: its square, 1e-8, is what the curvature leaves of a slope.
        const H: f64 = 1e-4;
        let here = self.here(self.at)?;
        let at = |k: usize, by: f64| {
            let mut beside = x.to_vec();
            beside[k] += by;
            self.mismatches(&here, &beside)
        };
        let slope = |k: usize| {
            let (less, more) = (at(k, -H)?, at(k, H)?);
            let slopes: Vec<f64> = more.iter().zip(&less).map(|(m, l)| (m - l) / (2.0 * H)).collect();
            Some(whitened(&self.factor, &slopes))
        };
        let slopes: Option<Vec<Vec<f64>>> = (0..COUNT).map(slope).collect();
        Some((whitened(&self.factor, &sum(&self.mismatches(&here, x)?, &self.shift)), slopes?))
    }

    /// Moves to the rpm and airspeed that, with these factors, are the most likely for what was read, so that
    /// the slopes do not follow the errors of the reading.
    pub(super) fn believe(&mut self, x: &[f64]) -> Option<()> {
        let residual = self.residual(x)?;
        let moved = |k: usize| -> f64 {
            let along = whitened(&self.factor, &self.by_width[k]);
            let by: f64 = along.iter().zip(&residual).map(|(a, r)| a * r).sum();
            (1.0 - READING_WIDTHS[k] * by).clamp(1.0 - MOST_MOVED, 1.0 + MOST_MOVED)
        };
        self.at = (moved(0), moved(1));
        self.linearise(x)
    }

    /// Slopes with rpm and airspeed where it stands; the covariance of the mismatches, which share these
    /// errors.
    fn linearise(&mut self, x: &[f64]) -> Option<()> {
        let at = |rpm: f64, airspeed: f64| {
            self.mismatches(&self.here((self.at.0 + rpm, self.at.1 + airspeed))?, x)
        };
        let slope = |more: Vec<f64>, less: Vec<f64>, width: f64| -> Vec<f64> {
            more.iter().zip(&less).map(|(m, l)| width * (m - l) / (2.0 * STEP)).collect()
        };
        let by_rpm = slope(at(STEP, 0.0)?, at(-STEP, 0.0)?, READING_WIDTHS[0]);
        let by_airspeed = slope(at(0.0, STEP)?, at(0.0, -STEP)?, READING_WIDTHS[1]);
        let widths = ((1.0 - self.at.0) / READING_WIDTHS[0], (1.0 - self.at.1) / READING_WIDTHS[1]);
        let shift = by_rpm.iter().zip(&by_airspeed).map(|(n, v)| n * widths.0 + v * widths.1).collect();
        let consumed = |i: usize| if self.told[i] == Told::Consumption { READING_WIDTHS[2] } else { 0.0 };
        let entry = |i: usize, j: usize| {
            // Mismatches that shared two errors alone would leave none to their sum.
            let own = if i == j { consumed(i).powi(2) + 1e-8 } else { 0.0 };
            by_rpm[i] * by_rpm[j] + by_airspeed[i] * by_airspeed[j] + own
        };
        let n = self.told.len();
        let covariance: Vec<Vec<f64>> = (0..n).map(|i| (0..n).map(|j| entry(i, j)).collect()).collect();
        self.factor = factor(&covariance)?;
        (self.shift, self.by_width) = (shift, [by_rpm, by_airspeed]);
        Some(())
    }
}

fn sum(a: &[f64], b: &[f64]) -> Vec<f64> {
    a.iter().zip(b).map(|(a, b)| a + b).collect()
}

/// Fuel flow (kg/h) or battery current (A) of all engines at an rpm and shaft power of each.
pub(super) fn consumption(shaft: &Shaft, (rpm, power_w): (f64, f64), air: &Air, engines: f64) -> Option<f64> {
    let each = match shaft {
        Shaft::Piston(_) => 3600.0 * shaft.fuel_kg_s(rpm, power_w, air)?,
        Shaft::Electric(e) => e.battery_current_a(rpm, power_w),
    };
    Some(each * engines)
}
