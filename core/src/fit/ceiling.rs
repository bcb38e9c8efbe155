//! Ceilings: the heights at which the best rate of climb at full throttle falls to 0.5 m/s and to nothing.

use roots::{SimpleConvergency, find_root_brent};

use super::Solver;
use super::slipstream::kept_share;
use super::trail::Trail;
use crate::air::{Air, HIGHEST_M};
use crate::aircraft::{drag_n, propellers, speeds, weight_n};
use crate::job::{Aeroplane, Aircraft};
use crate::result::Ceilings;
use crate::rig::Rig;
use crate::rotor::Condition;

/// Rate of climb at the service ceiling, m/s: common practice.
const SERVICE_M_S: f64 = 0.5;
/// Speeds looked at, over the speed of least power.
const SLOWEST: f64 = 0.8;
const STEP: f64 = 0.1;
const SPEEDS: u32 = 14;
const CONVERGED_M: f64 = 0.5;

/// The ceilings of an aeroplane at a temperature offset, as pressure altitudes between sea level and the end of the
/// atmosphere's table. `None` for other jobs.
#[must_use]
pub fn ceilings(rig: &Rig, isa_offset_k: f64) -> Option<Ceilings> {
    let Some(Aircraft::Aeroplane(a)) = &rig.aircraft else { return None };
    rig.shaft.as_ref()?;
    let best = |h: f64| best_climb_m_s(rig, a, h, isa_offset_k);
    let (lowest, highest) = (best(0.0), best(HIGHEST_M));
    let spare = |above: f64| {
        let over = |climb: Option<f64>| climb.map_or(-1.0, |c| c - above);
        let climb = |h: f64| over(best(h));
        let (low, high) = (over(lowest), over(highest));
        if low <= 0.0 || high >= 0.0 {
            return None;
        }
        let mut rule = SimpleConvergency { eps: CONVERGED_M, max_iter: 40 };
        let mut rest = |h: f64| if h == 0.0 { 1e3 * low } else { 1e3 * climb(h) };
        find_root_brent(0.0, HIGHEST_M, &mut rest, &mut rule).ok()
    };
    Some(Ceilings { service_m: spare(SERVICE_M_S), absolute_m: spare(0.0), sea_level_climb_m_s: lowest })
}

/// The best rate of climb at full throttle at a height, held to the limit rpm; `None` where there is no answer at any
/// speed.
fn best_climb_m_s(rig: &Rig, a: &Aeroplane, altitude_m: f64, isa_offset_k: f64) -> Option<f64> {
    let air = Air::standard(altitude_m, isa_offset_k).ok()?;
    let solver = Solver::new(rig);
    let aircraft = Aircraft::Aeroplane(a.clone());
    let slow = speeds(a, &air).least_power_m_s;
    let kept = kept_share(rig);
    let mut trail = Trail::default();
    let mut climb = |v: f64| {
        let at = Condition { air, airspeed_m_s: v, rotation_rad_s: 1.0, turn_rad: rig.turn_rad() };
        let full = solver.full(&at, &mut trail).ok()?;
        let thrust = full.loads.thrust_n * propellers(&aircraft) * kept;
        Some((v, (thrust - drag_n(a, &air, v)?) * v / weight_n(&aircraft)))
    };
    let mut before: [Option<(f64, f64)>; 2] = [None, None];
    for i in 0..SPEEDS {
        let here = climb(slow * (SLOWEST + STEP * f64::from(i)));
        if let (Some(b), Some(c)) = (before[1], here)
            && c.1 < b.1
        {
            return Some(before[0].map_or(b.1, |a| top_of(a, b, c)));
        }
        before = if here.is_some() { [before[1], here] } else { before };
    }
    before[1].map(|b| b.1)
}

/// The value at the top of the parabola through three points.
fn top_of(a: (f64, f64), b: (f64, f64), c: (f64, f64)) -> f64 {
    let v = super::marks::vertex(a, b, c);
    let (left, right) = ((b.1 - a.1) / (b.0 - a.0), (c.1 - b.1) / (c.0 - b.0));
    let bend = (right - left) / (c.0 - a.0);
    a.1 + (v - a.0) * (left + (v - b.0) * bend)
}
