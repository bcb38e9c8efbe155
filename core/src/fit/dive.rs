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

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{DEMOS, Engine, Job, PitchControl};

    fn turned(turn_deg: f64, limit_rpm: f64) -> (Rig, Condition) {
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg };
        let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
        piston.max_rpm = Some(limit_rpm);
        ready(&job)
    }

    fn ready(job: &Job) -> (Rig, Condition) {
        let rig = Rig::new(job).unwrap();
        let air = crate::air::Air::standard(0.0, 0.0).unwrap();
        let at = rig.unsolved(air, 0.0);
        (rig, at)
    }

    /// The slowest speed, by steps of 1 m/s, at which the air drives the propeller at its limit rpm.
    fn scanned(rig: &Rig, at: &Condition, limit_rpm: f64) -> f64 {
        let still = run_up(rig, at, limit_rpm);
        let driven = |v: f64| rig.rotor.loads(&Condition { airspeed_m_s: v, ..still }).torque_n_m < 0.0;
        (0..900).map(f64::from).find(|v| driven(*v)).unwrap_or(900.0)
    }

    /// Told up to an advance ratio of 6 and to Mach 0.7, 238 m/s, and not beyond either.
    #[test]
    fn a_dive_is_told_as_far_as_it_is_looked_for() {
        let (mut told, mut slow, mut fast) = (0, 0, 0);
        for (turn_deg, limit_rpm) in
            [(-4.0, 3300.0), (30.0, 2000.0), (40.0, 3300.0), (41.5, 1100.0), (42.5, 1100.0), (43.5, 1100.0)]
        {
            let (rig, at) = turned(turn_deg, limit_rpm);
            let v = scanned(&rig, &at, limit_rpm);
            let ratio = v / (limit_rpm / 60.0 * 1.52);
            let found = dive(&rig, &at).map(|f| f.condition.airspeed_m_s);
            let (within, subsonic) = (ratio < 6.0, v < 0.7 * at.air.sound_speed_m_s);
            assert_eq!(found.is_some(), within && subsonic, "{turn_deg}: {found:?} {v} {ratio}");
            assert!(found.is_none_or(|f| f <= v && f > v - 1.0), "{turn_deg}: {found:?} {v}");
            told += u32::from(found.is_some());
            slow += u32::from(!within && subsonic);
            fast += u32::from(within && !subsonic);
        }
        assert!(told > 2 && slow > 0 && fast > 0, "{told} {slow} {fast}");
    }

    /// Flat blades, as those of an autogyro, turn by the air from ahead as long as it does not stall them, and
    /// are braked by more of it: the slowest speed at which it holds their rpm counts.
    #[test]
    fn of_two_speeds_at_which_the_torque_is_nothing_the_slower_counts() {
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        job.propeller.stations.iter_mut().for_each(|s| s.angle_deg = Some(-3.0));
        let (rig, at) = ready(&job);
        let still = run_up(&rig, &at, 3300.0);
        let v = scanned(&rig, &at, 3300.0);
        let fast = Condition { airspeed_m_s: 230.0, ..still };
        assert!(rig.rotor.loads(&fast).torque_n_m > 0.0, "braked again");
        let found = dive(&rig, &at).unwrap().condition.airspeed_m_s;
        assert!(found <= v && found > v - 1.0, "{found} {v}");
    }
}
