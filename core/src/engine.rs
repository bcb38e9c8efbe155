//! What the shaft offers: piston engines by their full-throttle curve, electric motors by their constants.
//!
//! Piston: full-throttle power by a monotone cubic (or straight lines) in engine rpm, never extrapolated; at
//! height by A. W. Gagg and E. V. Ferrar, SAE Trans. 29, 1934: `P/P0 = σ − (1 − σ)/7.55`, or held up to a
//! height and by the same law from there.
//!
//! Electric: the first-order motor, `Q = Kt (I − I0)` with the same no-load current `I0` at every voltage and
//! rpm, `Kt = 30/(π Kv)`, `I = (d Voc − n/Kv)/(Rm + Rc + N d² Rb)` at duty d, with the sag of the battery
//! that N motors share; the current limit holds the current. All rpm are of the propeller unless they say
//! otherwise.

use crate::air::Air;
use crate::job::{Engine, Factors};

mod electric;
mod piston;
#[cfg(test)]
mod tests;

pub use electric::{ElectricShaft, Electrics};
pub use piston::PistonShaft;

/// An engine ready to be asked.
#[derive(Clone, Debug)]
pub enum Shaft {
    /// A piston engine.
    Piston(PistonShaft),
    /// An electric motor.
    Electric(ElectricShaft),
}

impl Shaft {
    /// One of a number of equal engines of a job, which share fuel or battery; `None` only for a curve that
    /// [`crate::job::Job::check`] refuses.
    #[must_use]
    pub fn new(engine: &Engine, engines: f64) -> Option<Self> {
        match engine {
            Engine::Piston(p) => PistonShaft::new(p).map(Self::Piston),
            Engine::Electric(e) => Some(Self::Electric(ElectricShaft::new(e, engines))),
        }
    }

    /// The same engine with its power, and what it consumes for a power, multiplied.
    #[must_use]
    pub fn with_factors(mut self, factors: &Factors) -> Self {
        match &mut self {
            Self::Piston(p) => p.factors = *factors,
            Self::Electric(e) => e.factors = *factors,
        }
        self
    }

    /// The same with the corner at a motor's current limit rounded off over a share of it, on the safe side:
    /// what follows from it then changes smoothly with the propeller. `None` where there is no such
    /// corner.
    #[must_use]
    pub fn rounded(&self, share: f64) -> Option<Self> {
        let Self::Electric(e) = self else { return None };
        let rounding_a = share * e.data.max_current_a?;
        Some(Self::Electric(ElectricShaft { rounding_a, ..e.clone() }))
    }

    /// Lowest and highest propeller rpm for which there is a full-throttle power.
    #[must_use]
    pub fn rpm_range(&self) -> (f64, f64) {
        match self {
            Self::Piston(p) => p.rpm_range(),
            Self::Electric(e) => (1e-3 * e.data.no_load_rpm(), e.data.no_load_rpm()),
        }
    }

    /// The limit of propeller rpm, where one is given.
    #[must_use]
    pub fn limit_rpm(&self) -> Option<f64> {
        match self {
            Self::Piston(p) => p.data.max_rpm.map(|rpm| rpm / p.data.gear_ratio),
            Self::Electric(_) => None,
        }
    }

    /// Propeller rpm at idle, where one is given.
    #[must_use]
    pub fn idle_rpm(&self) -> Option<f64> {
        match self {
            Self::Piston(p) => p.data.idle_rpm.map(|rpm| rpm / p.data.gear_ratio),
            Self::Electric(_) => None,
        }
    }

    /// Engine rpm over propeller rpm.
    #[must_use]
    pub fn gear_ratio(&self) -> f64 {
        match self {
            Self::Piston(p) => p.data.gear_ratio,
            Self::Electric(e) => e.data.gear_ratio,
        }
    }

    /// Shaft power at a propeller rpm and a throttle setting (0 to 1), W. Below or above the curve its end
    /// power is held; ask [`Shaft::rpm_range`]. For a piston engine the setting is the share of
    /// full-throttle power, for a motor the duty.
    #[must_use]
    pub fn power_w(&self, rpm: f64, air: &Air, throttle: f64) -> f64 {
        match self {
            Self::Piston(p) => throttle * p.power_w(rpm, air),
            Self::Electric(e) => e.power_w(rpm, throttle),
        }
    }

    /// Full-throttle shaft power at a propeller rpm, W; `None` outside the curve, where nothing is known, and
    /// where there is none.
    #[must_use]
    pub fn available_w(&self, rpm: f64, air: &Air) -> Option<f64> {
        let (low, high) = self.rpm_range();
        let within = (low..=high * (1.0 + 1e-9)).contains(&rpm);
        within.then(|| self.power_w(rpm, air, 1.0)).filter(|power| *power > 0.0)
    }

    /// Fuel mass flow at a propeller rpm and shaft power, kg/s, where the consumption is given; by the load
    /// only where the full-throttle power is known. The ends of a consumption by the load are held.
    #[must_use]
    pub fn fuel_kg_s(&self, rpm: f64, power_w: f64, air: &Air) -> Option<f64> {
        match self {
            Self::Piston(p) => p.fuel_kg_s(power_w, self.available_w(rpm, air)),
            Self::Electric(_) => None,
        }
    }

    /// How long the fuel, or the usable charge, feeds all engines at a propeller rpm and shaft power of each,
    /// s. Fuel and battery are the aircraft's. `None` where they are not given or empty, the load cannot
    /// be met or nothing is drawn.
    #[must_use]
    pub fn endurance_s(&self, rpm: f64, power_w: f64, air: &Air, engines: f64) -> Option<f64> {
        let (store, drain) = match self {
            Self::Piston(p) => (p.data.fuel_kg?, self.fuel_kg_s(rpm, power_w, air)?),
            Self::Electric(e) => {
                let battery = &e.data.battery;
                (
                    3600.0 * battery.capacity_ah * battery.usable_fraction,
                    e.electrics(rpm, power_w)?.battery_current_a,
                )
            }
        };
        (drain > 0.0 && store > 0.0).then(|| store / (drain * engines))
    }

    /// The electric side at a propeller rpm and shaft power; `None` for a piston engine or where no duty up
    /// to 1 gives it.
    #[must_use]
    pub fn electrics(&self, rpm: f64, power_w: f64) -> Option<Electrics> {
        match self {
            Self::Piston(_) => None,
            Self::Electric(e) => e.electrics(rpm, power_w),
        }
    }
}
