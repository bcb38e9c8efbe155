//! The dive with closed throttle: the speed at which the air alone drives the propeller to the engine's limit
//! rpm.
//!
//! Assumed: the engine at closed throttle neither drives nor brakes, so that the torque is nothing. A real
//! engine brakes by its friction, for which no figure is asked; the propeller then turns slower at the same
//! speed, so that the speed given lies on the safe side.

use std::cell::RefCell;

use super::Solver;
use super::full::{Full, run_up};
use super::root::{Search, Wanted};
use crate::rig::Rig;
use crate::rotor::{Condition, Neighbour};

/// Fastest airspeed considered, as a Mach number.
const FASTEST_MACH: f64 = 0.7;
/// Largest advance ratio considered, and the step of the look over it.
const LARGEST_J: f64 = 6.0;
const STEP_J: f64 = 0.1;

/// The freewheeling propeller at the limit rpm, in the air of `at`; the thrust is its drag, below zero.
/// `None` without a limit rpm, and where that needs more than Mach 0.7 or an advance ratio above 6.
#[must_use]
pub(super) fn dive(rig: &Rig, at: &Condition) -> Option<Full> {
    let limit = rig.shaft.as_ref()?.limit_rpm()?;
    let still = run_up(rig, at, limit);
    let unit = still.turns_per_s() * 2.0 * rig.rotor.blade.radius_m;
    let end = (FASTEST_MACH * at.air.sound_speed_m_s).min(LARGEST_J * unit);
    let here = |airspeed_m_s: f64| Condition { airspeed_m_s, ..still };
    let (solver, near) = (Solver::new(rig), RefCell::new(Neighbour::default()));
    let search = Search {
        range: 0.0..=end,
        steps: (end / (STEP_J * unit)).ceil().max(1.0) as u32,
        wanted: Wanted::Lowest,
        rough: &|v| -rig.rotor.rough_loads_near(&here(v), &mut near.borrow_mut()).torque_n_m,
        exact: &|v| -rig.rotor.loads_near(&here(v), &mut near.borrow_mut()).torque_n_m,
    };
    let condition = here(search.root().ok()?.0.x);
    Some(Full { condition, loads: solver.loads(&condition), held: false })
}
