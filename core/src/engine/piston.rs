//! A piston engine: full-throttle power over rpm and height, fuel by the load.

use crate::air::{Air, RHO0_KG_M3};
use crate::curve::Curve;
use crate::job::{AltitudeLaw, Factors, Interpolation, Piston};

/// A piston engine ready to be asked.
#[derive(Clone, Debug)]
pub struct PistonShaft {
    curve: Curve,
    /// Specific fuel consumption over load, kg/kWh, where it is given by the load.
    by_load: Option<Curve>,
    pub(super) data: Piston,
    pub(super) factors: Factors,
}

impl PistonShaft {
    /// `None` only for curves that [`crate::job::Job::check`] refuses.
    pub(super) fn new(data: &Piston) -> Option<Self> {
        let (rpm, power) = data.full_throttle.iter().map(|f| (f.rpm, f.power_w)).unzip();
        let curve = match data.interpolation {
            Interpolation::MonotoneCubic => Curve::new(rpm, power),
            Interpolation::Linear => Curve::polyline(rpm, power),
        };
        let (load, bsfc) = data.bsfc_by_load.iter().map(|b| (b.load, b.bsfc_kg_per_kwh)).unzip();
        let factors = Factors::default();
        Some(Self { curve: curve?, by_load: Curve::new(load, bsfc), data: data.clone(), factors })
    }

    /// Lowest and highest propeller rpm of the curve.
    pub(super) fn rpm_range(&self) -> (f64, f64) {
        let (low, high) = self.curve.range();
        (low / self.data.gear_ratio, high / self.data.gear_ratio)
    }

    pub(super) fn power_w(&self, rpm: f64, air: &Air) -> f64 {
        self.factors.engine_power * self.curve.at(rpm * self.data.gear_ratio) * self.altitude_factor(air)
    }

    /// Fuel mass flow, kg/s. By the load it needs the full-throttle power there, `None` without.
    pub(super) fn fuel_kg_s(&self, power_w: f64, available_w: Option<f64>) -> Option<f64> {
        let power_w = power_w.max(0.0);
        let bsfc = match &self.by_load {
            Some(by_load) => by_load.at(power_w / available_w?),
            None => self.data.bsfc_kg_per_kwh?,
        };
        Some(self.factors.consumption * bsfc * power_w / 3.6e6)
    }

    fn altitude_factor(&self, air: &Air) -> f64 {
        let law = |sigma: f64| (sigma - (1.0 - sigma) / 7.55).max(0.0);
        let here = law(air.density_ratio());
        match &self.data.altitude_law {
            AltitudeLaw::NaturallyAspirated => here,
            AltitudeLaw::HeldTo(held) => {
                let critical = Air::standard(held.altitude_m, 0.0).map_or(RHO0_KG_M3, |a| a.density_kg_m3);
                let at_critical = law(critical / RHO0_KG_M3);
                if at_critical > 0.0 { (here / at_critical).min(1.0) } else { 1.0 }
            }
        }
    }
}
