//! An electric motor with its controller on the aircraft's battery.

use std::f64::consts::PI;

use crate::job::Electric;

/// An electric motor ready to be asked.
#[derive(Clone, Debug)]
pub struct ElectricShaft {
    pub(super) data: Electric,
    /// Equal motors on the battery, which sags under the current of all.
    pub(super) motors: f64,
    /// By how much the current limit is rounded off, A; 0 is the limit itself.
    pub(super) rounding_a: f64,
}

/// The electric side at one shaft load.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Electrics {
    /// Motor current, A.
    pub motor_current_a: f64,
    /// Battery current of this motor, A.
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
    fn open_circuit_v(&self) -> f64 {
        f64::from(self.data.battery.cells) * self.data.battery.open_circuit_v_per_cell
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

    /// Propeller rpm at full duty without current.
    pub(super) fn no_load_rpm(&self) -> f64 {
        self.open_circuit_v() * self.data.kv_rpm_per_v / self.data.gear_ratio
    }

    pub(super) fn power_w(&self, rpm: f64, duty: f64) -> f64 {
        let motor_rpm = rpm * self.data.gear_ratio;
        let back_v = motor_rpm / self.data.kv_rpm_per_v;
        let current =
            (duty * self.open_circuit_v() - back_v) / (self.motor_ohm() + duty * duty * self.battery_ohm());
        let held =
            self.data.max_current_a.map_or(current, |most| rounded_least(current, most, self.rounding_a));
        self.torque_per_a() * (held - self.data.no_load_current_a) * motor_rpm * PI / 30.0
    }

    pub(super) fn electrics(&self, rpm: f64, power_w: f64) -> Option<Electrics> {
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
