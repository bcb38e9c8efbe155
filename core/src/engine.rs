//! What the shaft offers: piston engines by their full-throttle curve, electric motors by their constants.
//!
//! Piston: full-throttle power by a monotone cubic (or straight lines) in engine rpm, never extrapolated; at height by A. W. Gagg and E. V. Ferrar, SAE Trans.
//! 29, 1934: `P/P0 = σ − (1 − σ)/7.55`, or held up to a height and by the same law from there.
//! Electric: the first-order motor, `Q = Kt (I − I0)`, `Kt = 30/(π Kv)`, `I = (d Voc − n/Kv)/(Rm + Rc + d² Rb)` at duty d, with the
//! battery's sag; the current limit holds the current. All rpm are of the propeller unless they say otherwise.

use std::f64::consts::PI;

use crate::air::{Air, RHO0_KG_M3};
use crate::curve::Curve;
use crate::job::{AltitudeLaw, Electric, Engine, Interpolation, Piston};

/// An engine ready to be asked.
#[derive(Clone, Debug)]
pub enum Shaft {
    /// A piston engine.
    Piston(PistonShaft),
    /// An electric motor.
    Electric(ElectricShaft),
}

/// A piston engine ready to be asked.
#[derive(Clone, Debug)]
pub struct PistonShaft {
    curve: Curve,
    data: Piston,
}

/// An electric motor ready to be asked.
#[derive(Clone, Debug)]
pub struct ElectricShaft {
    data: Electric,
}

/// The electric side at one shaft load.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Electrics {
    /// Motor current, A.
    pub motor_current_a: f64,
    /// Battery current, A.
    pub battery_current_a: f64,
    /// Battery voltage under load, V.
    pub battery_voltage_v: f64,
    /// Duty of the controller, 0 to 1.
    pub duty: f64,
}

impl Shaft {
    /// An engine of a job; `None` only for a curve that [`crate::job::Job::check`] refuses.
    #[must_use]
    pub fn new(engine: &Engine) -> Option<Self> {
        match engine {
            Engine::Piston(p) => {
                let (rpm, power) = p.full_throttle.iter().map(|f| (f.rpm, f.power_w)).unzip();
                let curve = match p.interpolation {
                    Interpolation::MonotoneCubic => Curve::new(rpm, power),
                    Interpolation::Linear => Curve::polyline(rpm, power),
                };
                Some(Self::Piston(PistonShaft { curve: curve?, data: p.clone() }))
            }
            Engine::Electric(e) => Some(Self::Electric(ElectricShaft { data: e.clone() })),
        }
    }

    /// Lowest and highest propeller rpm for which there is a full-throttle power.
    #[must_use]
    pub fn rpm_range(&self) -> (f64, f64) {
        match self {
            Self::Piston(p) => {
                let (low, high) = p.curve.range();
                (low / p.data.gear_ratio, high / p.data.gear_ratio)
            }
            Self::Electric(e) => (1e-3 * e.no_load_rpm(), e.no_load_rpm()),
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

    /// Engine rpm over propeller rpm.
    #[must_use]
    pub fn gear_ratio(&self) -> f64 {
        match self {
            Self::Piston(p) => p.data.gear_ratio,
            Self::Electric(e) => e.data.gear_ratio,
        }
    }

    /// Shaft power at a propeller rpm and a throttle setting (0 to 1), W. Below or above the curve its end power is held; ask
    /// [`Shaft::rpm_range`]. For a piston engine the setting is the share of full-throttle power, for a motor the duty.
    #[must_use]
    pub fn power_w(&self, rpm: f64, air: &Air, throttle: f64) -> f64 {
        match self {
            Self::Piston(p) => throttle * p.power_w(rpm, air),
            Self::Electric(e) => e.power_w(rpm, throttle),
        }
    }

    /// Full-throttle shaft power at a propeller rpm, W; `None` outside the curve, where nothing is known, and where there is none.
    #[must_use]
    pub fn available_w(&self, rpm: f64, air: &Air) -> Option<f64> {
        let (low, high) = self.rpm_range();
        let within = (low..=high * (1.0 + 1e-9)).contains(&rpm);
        within.then(|| self.power_w(rpm, air, 1.0)).filter(|power| *power > 0.0)
    }

    /// Fuel mass flow at a shaft power, kg/s, where the consumption is given.
    #[must_use]
    pub fn fuel_kg_s(&self, power_w: f64) -> Option<f64> {
        match self {
            Self::Piston(p) => p.data.bsfc_kg_per_kwh.map(|b| b * power_w.max(0.0) / 3.6e6),
            Self::Electric(_) => None,
        }
    }

    /// How long the fuel, or the usable charge, feeds all engines at a propeller rpm and shaft power of each, s. Fuel and battery are the
    /// aircraft's. `None` where they are not given, the load cannot be met or nothing is drawn.
    #[must_use]
    pub fn endurance_s(&self, rpm: f64, power_w: f64, engines: f64) -> Option<f64> {
        let (store, drain) = match self {
            Self::Piston(p) => (p.data.fuel_kg?, self.fuel_kg_s(power_w)?),
            Self::Electric(e) => {
                let battery = &e.data.battery;
                (
                    3600.0 * battery.capacity_ah * battery.usable_fraction,
                    e.electrics(rpm, power_w)?.battery_current_a,
                )
            }
        };
        (drain > 0.0).then(|| store / (drain * engines))
    }

    /// The electric side at a propeller rpm and shaft power; `None` for a piston engine or where no duty up to 1 gives it.
    #[must_use]
    pub fn electrics(&self, rpm: f64, power_w: f64) -> Option<Electrics> {
        match self {
            Self::Piston(_) => None,
            Self::Electric(e) => e.electrics(rpm, power_w),
        }
    }
}

impl PistonShaft {
    fn power_w(&self, rpm: f64, air: &Air) -> f64 {
        self.curve.at(rpm * self.data.gear_ratio) * self.altitude_factor(air)
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

impl ElectricShaft {
    fn open_circuit_v(&self) -> f64 {
        f64::from(self.data.battery.cells) * self.data.battery.open_circuit_v_per_cell
    }

    fn battery_ohm(&self) -> f64 {
        f64::from(self.data.battery.cells) * self.data.battery.resistance_ohm_per_cell
    }

    fn motor_ohm(&self) -> f64 {
        self.data.resistance_ohm + self.data.controller_resistance_ohm
    }

    fn torque_per_a(&self) -> f64 {
        30.0 / (PI * self.data.kv_rpm_per_v)
    }

    /// Propeller rpm at full duty without current.
    fn no_load_rpm(&self) -> f64 {
        self.open_circuit_v() * self.data.kv_rpm_per_v / self.data.gear_ratio
    }

    fn power_w(&self, rpm: f64, duty: f64) -> f64 {
        let motor_rpm = rpm * self.data.gear_ratio;
        let back_v = motor_rpm / self.data.kv_rpm_per_v;
        let current =
            (duty * self.open_circuit_v() - back_v) / (self.motor_ohm() + duty * duty * self.battery_ohm());
        let held = current.min(self.data.max_current_a.unwrap_or(f64::INFINITY));
        self.torque_per_a() * (held - self.data.no_load_current_a) * motor_rpm * PI / 30.0
    }

    fn electrics(&self, rpm: f64, power_w: f64) -> Option<Electrics> {
        let motor_rpm = rpm * self.data.gear_ratio;
        let torque = power_w / (motor_rpm * PI / 30.0);
        let current = torque / self.torque_per_a() + self.data.no_load_current_a;
        let motor_v = current * self.motor_ohm() + motor_rpm / self.data.kv_rpm_per_v;
        let (voc, rb) = (self.open_circuit_v(), self.battery_ohm());
        // d Voc − d² Rb I = motor voltage; the smaller root, written without a division by Rb I.
        let under_root = voc * voc - 4.0 * rb * current * motor_v;
        let duty = 2.0 * motor_v / (voc + under_root.max(0.0).sqrt());
        let within_current = current <= self.data.max_current_a.unwrap_or(f64::INFINITY) * (1.0 + 1e-9);
        let reachable = under_root >= 0.0 && duty <= 1.0 + 1e-9 && within_current;
        reachable.then(|| Electrics {
            motor_current_a: current,
            battery_current_a: duty * current,
            battery_voltage_v: voc - rb * duty * current,
            duty: duty.min(1.0),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{Battery, PowerPoint};

    fn electric(kv: f64) -> Shaft {
        let battery = Battery {
            cells: 3,
            open_circuit_v_per_cell: 3.7,
            resistance_ohm_per_cell: 0.0,
            capacity_ah: 2.0,
            usable_fraction: 0.8,
        };
        let data = Electric {
            kv_rpm_per_v: kv,
            resistance_ohm: 0.05,
            no_load_current_a: 1.0,
            no_load_voltage_v: None,
            max_current_a: None,
            gear_ratio: 1.0,
            controller_resistance_ohm: 0.0,
            battery,
        };
        Shaft::new(&Engine::Electric(data)).unwrap()
    }

    /// First-order motor in closed form: Kv 1000 rpm/V, 0.05 Ω, 1.0 A at no load, 11.1 V; at 20 A 10 100 rpm and 191.90 W.
    #[test]
    fn an_electric_motor_gives_the_closed_form() {
        let air = Air::standard(0.0, 0.0).unwrap();
        let shaft = electric(1000.0);
        assert!((shaft.power_w(10_100.0, &air, 1.0) - 191.90).abs() < 0.01);
        let e = shaft.electrics(10_100.0, 191.90).unwrap();
        assert!((e.motor_current_a - 20.0).abs() < 1e-3 && (e.duty - 1.0).abs() < 1e-4);
        assert!(shaft.electrics(10_500.0, 400.0).is_none(), "beyond full duty there is no answer");
    }

    fn piston(law: AltitudeLaw) -> Shaft {
        let point = |rpm: f64, power_w: f64| PowerPoint { rpm, power_w };
        let data = Piston {
            full_throttle: vec![point(2000.0, 30_000.0), point(3000.0, 45_000.0)],
            interpolation: Interpolation::default(),
            gear_ratio: 1.0,
            max_rpm: None,
            idle_rpm: None,
            altitude_law: law,
            bsfc_kg_per_kwh: None,
            fuel_kg: None,
        };
        Shaft::new(&Engine::Piston(data)).unwrap()
    }

    /// Gagg and Ferrar, SAE Trans. 29, 1934, with ISA density: 0.8433 at 5 000 ft and 0.7038 at 10 000 ft (computed).
    #[test]
    fn a_piston_engine_loses_power_with_height() {
        let shaft = piston(AltitudeLaw::NaturallyAspirated);
        for (feet, factor) in [(5_000.0, 0.8433), (10_000.0, 0.7038), (20_000.0, 0.4709)] {
            let air = Air::standard(feet * 0.3048, 0.0).unwrap();
            assert!((shaft.power_w(3000.0, &air, 1.0) / 45_000.0 - factor).abs() < 2e-4);
        }
    }

    #[test]
    fn held_power_is_held_and_then_falls() {
        let held = crate::job::HeldTo { kind: crate::job::HeldToKind::HeldTo, altitude_m: 3000.0 };
        let shaft = piston(AltitudeLaw::HeldTo(held));
        let at = |h: f64| shaft.power_w(3000.0, &Air::standard(h, 0.0).unwrap(), 1.0);
        assert_eq!(at(1000.0), 45_000.0);
        assert!((at(3000.0) - 45_000.0).abs() < 1e-6 && at(5000.0) < 40_000.0);
    }
}
