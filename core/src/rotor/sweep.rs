//! Coefficients of a propeller, and how they run with advance ratio.

use std::f64::consts::TAU;

use roots::{SimpleConvergency, find_root_brent, find_root_secant};
use serde::Serialize;

use super::{Condition, Loads, Rotor};

/// Coefficients of one propeller at one condition.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Coefficients {
    /// `J = V/(n D)`.
    pub advance_ratio: f64,
    /// `CT = T/(ρ n² D⁴)`.
    pub ct: f64,
    /// `CP = 2π n Q/(ρ n³ D⁵)`.
    pub cp: f64,
    /// `CQ = CP/2π`.
    pub cq: f64,
    /// `T V/P` where thrust, speed and power are positive.
    pub efficiency: Option<f64>,
}

impl Coefficients {
    /// From the loads at a condition, for a diameter in m.
    #[must_use]
    pub fn new(loads: &Loads, at: &Condition, diameter_m: f64) -> Self {
        let (n, d) = (at.turns_per_s(), diameter_m);
        let head = at.air.density_kg_m3 * n * n * d.powi(4);
        let cq = loads.torque_n_m / (head * d);
        let power = loads.torque_n_m * at.rotation_rad_s;
        let useful = loads.thrust_n > 0.0 && at.airspeed_m_s > 0.0 && power > 0.0;
        Self {
            advance_ratio: at.airspeed_m_s / (n * d),
            ct: loads.thrust_n / head,
            cp: TAU * cq,
            cq,
            efficiency: useful.then(|| loads.thrust_n * at.airspeed_m_s / power),
        }
    }
}

impl Coefficients {
    /// Efficiency of an actuator disc at this thrust and speed: `2/(1 + sqrt(1 + Tc))`, `Tc = 8 CT/(π J²)`.
    /// `None` at rest or without thrust.
    ///
    /// # References
    /// W. J. M. Rankine 1865 and R. E. Froude 1889; H. Glauert, *Airplane Propellers*, 1935.
    #[must_use]
    pub fn ideal_efficiency(&self) -> Option<f64> {
        let tc = 8.0 * self.ct / (std::f64::consts::PI * self.advance_ratio * self.advance_ratio);
        (self.advance_ratio > 0.0 && self.ct > 0.0).then(|| 2.0 / (1.0 + (1.0 + tc).sqrt()))
    }
}

/// One point of the coefficient curves.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct CurvePoint {
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
    /// Thrust, N.
    pub thrust_n: f64,
    /// Shaft power, W.
    pub power_w: f64,
    /// The coefficients.
    #[serde(flatten)]
    pub coefficients: Coefficients,
}

/// The curves at constant rpm and air, at rest and then at `steps` equal steps of speed up to where the
/// thrust is gone.
#[must_use]
pub fn coefficient_curves(rotor: &Rotor, at: &Condition, steps: u32) -> Vec<CurvePoint> {
    let end = thrustless_speed_m_s(rotor, at);
    (0..=steps).map(|i| curve_point(rotor, at, end * f64::from(i) / f64::from(steps))).collect()
}

/// The curve point at a speed, m/s, with everything else of the condition kept.
#[must_use]
pub fn curve_point(rotor: &Rotor, at: &Condition, airspeed_m_s: f64) -> CurvePoint {
    let here = Condition { airspeed_m_s, ..*at };
    let loads = rotor.loads(&here);
    CurvePoint {
        airspeed_m_s,
        thrust_n: loads.thrust_n,
        power_w: loads.torque_n_m * here.rotation_rad_s,
        coefficients: Coefficients::new(&loads, &here, 2.0 * rotor.blade.radius_m),
    }
}

/// The speed (m/s) at which thrust is gone, by steps of a tenth in J with few elements, secant steps and,
/// where these fail, Brent's method with all of them; at least J = 0.1, at most 6.
#[must_use]
pub fn thrustless_speed_m_s(rotor: &Rotor, at: &Condition) -> f64 {
    const STEP: f64 = 0.1;
    let unit = at.turns_per_s() * 2.0 * rotor.blade.radius_m;
    let here = |j: f64| Condition { airspeed_m_s: j * unit, ..*at };
    let thrust = |j: f64| rotor.loads(&here(j)).thrust_n;
    let over = |gone: &dyn Fn(f64) -> bool| (1..=60).map(|i| STEP * f64::from(i)).find(|&j| gone(j));
    let rough = over(&|j| rotor.rough_loads(&here(j)).thrust_n < 0.0);
    let mut rule = SimpleConvergency { eps: 1e-7, max_iter: 8 };
    if let Some(j) = rough.and_then(|j| find_root_secant(j - STEP, j, thrust, &mut rule).ok())
        && rough.is_some_and(|end| (end - 1.5 * STEP..end + 0.5 * STEP).contains(&j))
    {
        return j.max(STEP) * unit;
    }
    let Some(over) = over(&|j| thrust(j) < 0.0) else { return 6.0 * unit };
    let mut rule = SimpleConvergency { eps: 1e-7, max_iter: 40 };
    find_root_brent(over - STEP, over, thrust, &mut rule).unwrap_or(over).max(STEP) * unit
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Actuator disc, computed from the formula: (J 0.5, CT 0.05) 0.89745; (0.5, 0.10) 0.82618; (0.8, 0.10)
    /// 0.91645.
    #[test]
    fn the_actuator_disc_sets_the_limit() {
        for (advance_ratio, ct, expected) in
            [(0.5, 0.05, 0.89745), (0.5, 0.10, 0.82618), (0.8, 0.10, 0.91645)]
        {
            let c = Coefficients { advance_ratio, ct, cp: 0.1, cq: 0.016, efficiency: None };
            assert!((c.ideal_efficiency().unwrap() - expected).abs() < 5e-6);
        }
    }
}
