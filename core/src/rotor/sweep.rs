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
    use crate::rotor::tests::{at_speed, rotor};

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

    const DIAMETER_M: f64 = 1.52;

    /// The formulas as every text has them (common practice): `J = V/(n D)`, `CT = T/(ρ n² D⁴)`, `CQ = Q/(ρ n²
    /// D⁵)`, `CP = P/(ρ n³ D⁵)`, and the efficiency `J CT/CP`.
    #[test]
    fn coefficients_are_made_of_the_loads() {
        let at = at_speed(37.0);
        let (n, density) = (250.0 / TAU, at.air.density_kg_m3);
        let loads = Loads { thrust_n: 830.0, torque_n_m: 190.0, ..Loads::default() };
        let c = Coefficients::new(&loads, &at, DIAMETER_M);
        let power = 190.0 * 250.0;
        for (found, wanted) in [
            (c.advance_ratio, 37.0 / (n * DIAMETER_M)),
            (c.ct, 830.0 / (density * n.powi(2) * DIAMETER_M.powi(4))),
            (c.cq, 190.0 / (density * n.powi(2) * DIAMETER_M.powi(5))),
            (c.cp, power / (density * n.powi(3) * DIAMETER_M.powi(5))),
            (c.efficiency.unwrap(), 830.0 * 37.0 / power),
            (c.efficiency.unwrap(), c.advance_ratio * c.ct / c.cp),
        ] {
            assert!((found / wanted - 1.0).abs() < 1e-12, "{found} {wanted}");
        }
    }

    #[test]
    fn there_is_no_efficiency_at_rest_nor_without_thrust_nor_without_power() {
        for (thrust_n, torque_n_m, v, is) in [
            (830.0, 190.0, 37.0, true),
            (0.0, 190.0, 37.0, false),
            (-830.0, 190.0, 37.0, false),
            (830.0, 190.0, 0.0, false),
            (830.0, 0.0, 37.0, false),
            (830.0, -190.0, 37.0, false),
            (-830.0, -190.0, 37.0, false),
            (-830.0, 190.0, 0.0, false),
        ] {
            let loads = Loads { thrust_n, torque_n_m, ..Loads::default() };
            let c = Coefficients::new(&loads, &at_speed(v), DIAMETER_M);
            assert_eq!(c.efficiency.is_some(), is, "{thrust_n} {torque_n_m} {v}");
            assert_eq!(c.ideal_efficiency().is_some(), thrust_n > 0.0 && v > 0.0, "{thrust_n} {v}");
        }
    }

    #[test]
    fn the_curves_run_in_equal_steps_from_rest_to_where_the_thrust_is_gone() {
        let (rotor, at) = (rotor(|_| ()), at_speed(20.0));
        let end = thrustless_speed_m_s(&rotor, &at);
        let curve = coefficient_curves(&rotor, &at, 5);
        assert_eq!(curve.len(), 6);
        for (i, point) in curve.iter().enumerate() {
            let v = end * i as f64 / 5.0;
            let loads = rotor.loads(&at_speed(v));
            assert!((point.airspeed_m_s - v).abs() < 1e-9);
            assert!((point.thrust_n - loads.thrust_n).abs() < 1e-6);
            assert!((point.power_w / (loads.torque_n_m * 250.0) - 1.0).abs() < 1e-9);
            assert!((point.coefficients.advance_ratio - v / (250.0 / TAU * DIAMETER_M)).abs() < 1e-12);
            let head = at.air.density_kg_m3 * (250.0 / TAU).powi(2) * DIAMETER_M.powi(4);
            assert!((point.coefficients.ct - point.thrust_n / head).abs() < 1e-12);
        }
    }

    /// With the blades turned from a little less to much more than drawn; the least and the most of J are kept
    /// where they brake at every speed or pull at every speed.
    #[test]
    fn thrust_is_gone_at_the_speed_found() {
        let rotor = rotor(|job| job.method.compressibility = false);
        let unit = 250.0 / TAU * DIAMETER_M;
        let turned = |turn_deg: f64| Condition { turn_rad: turn_deg.to_radians(), ..at_speed(0.0) };
        let ct = |at: &Condition, j: f64| curve_point(&rotor, at, j * unit).coefficients.ct;
        let mut last = 0.0;
        for turn_deg in [-5.0, 0.0, 10.0, 20.0, 30.0, 40.0] {
            let at = turned(turn_deg);
            let j = thrustless_speed_m_s(&rotor, &at) / unit;
            // CT falls by about 0.1 for each 1 of J, and J is found to some 1e-7.
            assert!(ct(&at, j).abs() < 1e-6, "{turn_deg} {j} {}", ct(&at, j));
            assert!(ct(&at, 0.98 * j) > 0.0 && ct(&at, 1.02 * j) < 0.0, "{turn_deg} {j}");
            assert!(j > last + 0.1, "{turn_deg} {j}");
            last = j;
        }
        let braking = turned(-50.0);
        assert!((1..=60).all(|i| ct(&braking, 0.1 * f64::from(i)) < 0.0));
        assert!((thrustless_speed_m_s(&rotor, &braking) / unit - 0.1).abs() < 1e-12);
        let pulling = turned(57.0);
        assert!((1..=60).all(|i| ct(&pulling, 0.1 * f64::from(i)) > 0.0));
        assert!((thrustless_speed_m_s(&rotor, &pulling) / unit - 6.0).abs() < 1e-12);
    }

    /// Blades turned far back or far on, whose thrust does not fall evenly: secant steps do not come to an end.
    #[test]
    fn where_secant_steps_fail_the_thrust_is_gone_all_the_same() {
        let rotor = rotor(|_| ());
        let unit = 250.0 / TAU * DIAMETER_M;
        for turn_deg in [-24.0f64, -23.0, 69.0] {
            let at = Condition { turn_rad: turn_deg.to_radians(), ..at_speed(0.0) };
            let j = thrustless_speed_m_s(&rotor, &at) / unit;
            let ct = |j: f64| curve_point(&rotor, &at, j * unit).coefficients.ct;
            assert!(ct(j - 1e-5) > 0.0 && ct(j + 1e-5) < 0.0, "{turn_deg} {j}");
        }
    }
}
