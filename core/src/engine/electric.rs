//! An electric motor with its controller on the aircraft's battery.

use std::f64::consts::PI;

use crate::job::{Electric, Factors};

/// An electric motor ready to be asked.
#[derive(Clone, Debug)]
pub struct ElectricShaft {
    pub(super) data: Electric,
    /// Equal motors on the battery, which sags under the current of all.
    pub(super) motors: f64,
    /// By how much the current limit is rounded off, A; 0 is the limit itself.
    pub(super) rounding_a: f64,
    pub(super) factors: Factors,
}

/// The electric side at one shaft load.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Electrics {
    /// Current through the motor's windings, A: what the torque asks and the no-load current; below zero where
    /// the propeller drives the motor by more than that.
    pub motor_current_a: f64,
    /// Battery current of this motor, duty times the motor's, A; signed as that.
    pub battery_current_a: f64,
    /// Battery voltage under the load of all motors, V.
    pub battery_voltage_v: f64,
    /// Duty of the controller, 0 to 1.
    pub duty: f64,
}

/// The lesser of two, the corner between them rounded off over a width.
fn rounded_least(a: f64, b: f64, width: f64) -> f64 {
    let least = a.min(b);
    if width > 0.0 { least - width * (-(a - b).abs() / width).exp().ln_1p() } else { least }
}

impl ElectricShaft {
    pub(super) fn new(data: &Electric, motors: f64) -> Self {
        Self { data: data.clone(), motors, rounding_a: 0.0, factors: Factors::default() }
    }

    /// The battery's resistance as one motor meets it: the current of all flows through it.
    fn battery_ohm(&self) -> f64 {
        self.motors * f64::from(self.data.battery.cells) * self.data.battery.resistance_ohm_per_cell
    }

    fn motor_ohm(&self) -> f64 {
        self.data.resistance_ohm + self.data.controller_resistance_ohm
    }

    fn torque_per_a(&self) -> f64 {
        30.0 / (PI * self.data.kv_rpm_per_v)
    }

    pub(super) fn power_w(&self, rpm: f64, duty: f64) -> f64 {
        let motor_rpm = rpm * self.data.gear_ratio;
        let back_v = motor_rpm / self.data.kv_rpm_per_v;
        let current = (duty * self.data.battery.open_circuit_v() - back_v)
            / (self.motor_ohm() + duty * duty * self.battery_ohm());
        let held =
            self.data.max_current_a.map_or(current, |most| rounded_least(current, most, self.rounding_a));
        let power_w = self.torque_per_a() * (held - self.data.no_load_current_a) * motor_rpm * PI / 30.0;
        self.factors.engine_power * power_w
    }

    /// The electric side at a propeller rpm and shaft power; `None` where no duty up to 1 gives it.
    pub(super) fn electrics(&self, rpm: f64, power_w: f64) -> Option<Electrics> {
        let (electrics, reachable) = self.drawn(rpm, power_w);
        reachable.then_some(electrics)
    }

    /// Battery current of this motor at a propeller rpm and shaft power, A; at full duty also where that
    /// falls short.
    pub(crate) fn battery_current_a(&self, rpm: f64, power_w: f64) -> f64 {
        self.drawn(rpm, power_w).0.battery_current_a
    }

    /// The electric side, duty at most 1, and whether it gives the power. The factor of power stands for what
    /// battery and controller give short or over: the duty follows it, the current the torque.
    fn drawn(&self, rpm: f64, power_w: f64) -> (Electrics, bool) {
        let motor_rpm = rpm * self.data.gear_ratio;
        let per_a = self.torque_per_a();
        let torque = power_w / (motor_rpm * PI / 30.0);
        let current = torque / per_a + self.data.no_load_current_a;
        let nominal = torque / self.factors.engine_power / per_a + self.data.no_load_current_a;
        let motor_v = nominal * self.motor_ohm() + motor_rpm / self.data.kv_rpm_per_v;
        let (voc, rb) = (self.data.battery.open_circuit_v(), self.battery_ohm());
        // d Voc − d² Rb I = motor voltage; the smaller root, written without a division by Rb I.
        let under_root = voc * voc - 4.0 * rb * nominal * motor_v;
        let duty = 2.0 * motor_v / (voc + under_root.max(0.0).sqrt());
        let within_current = nominal <= self.data.max_current_a.unwrap_or(f64::INFINITY) * (1.0 + 1e-9);
        let reachable = under_root >= 0.0 && duty <= 1.0 + 1e-9 && within_current;
        let duty = duty.min(1.0);
        let electrics = Electrics {
            motor_current_a: current,
            battery_current_a: self.factors.consumption * duty * current,
            battery_voltage_v: voc - rb * duty * current,
            duty,
        };
        (electrics, reachable)
    }
}
