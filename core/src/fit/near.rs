//! The answer of a flight point from that of a propeller a little different, which saves looking over the
//! whole range.

use super::full::Full;
use super::top_near::TopNear;
use super::trail::Trail;
use super::{Solver, condition, top_speed};
use crate::air::Air;
use crate::job::{FlightPoint, Setting};
use crate::result::State;
use crate::rig::Rig;
use crate::rotor::{Condition, Loads};

/// What is kept of the last answer of one flight point.
#[derive(Clone, Debug, Default)]
pub struct Near {
    trail: Trail,
    top: Option<TopNear>,
}

/// An answer.
#[derive(Clone, Copy, Debug)]
pub struct Answer {
    /// Where it is met.
    pub condition: Condition,
    /// What the propeller gives and takes there.
    pub loads: Loads,
    /// Whether full throttle would pass the limit rpm and is drawn back to it.
    pub held: bool,
}

impl From<Full> for Answer {
    fn from(full: Full) -> Self {
        Self { condition: full.condition, loads: full.loads, held: full.held }
    }
}

/// The answer of a flight point, full throttle drawn back where it would pass the limit rpm, level flight
/// whether or not the engine gives what it takes. Where a near answer leads to none, the whole range is
/// looked over.
///
/// # Errors
/// Why there is none.
pub fn answer(rig: &Rig, point: &FlightPoint, air: Air, near: &mut Near) -> Result<Answer, State> {
    let solver = Solver::new(rig);
    let at = rig.unsolved(air, point.airspeed_m_s.unwrap_or(0.0));
    match point.setting {
        Setting::FullThrottle {} if point.airspeed_m_s.is_none() => {
            let led = near.top.take().and_then(|top| top.on(rig, &at));
            let top = led.map_or_else(|| top_speed::fastest(rig, &at).map(TopNear::from), Ok)?;
            Ok((*near.top.insert(top).full()).into())
        }
        Setting::FullThrottle {} => {
            let mut trail = std::mem::take(&mut near.trail);
            let full = solver.full(&at, &mut trail);
            near.trail = trail.newest();
            full.map(Answer::from)
        }
        Setting::Level {} => {
            let met = solver.level_by_thrust(&at, &near.trail)?;
            near.trail.push(&met);
            near.trail = std::mem::take(&mut near.trail).newest();
            Ok(Answer { condition: met.condition, loads: met.loads, held: false })
        }
        Setting::Rpm { .. } | Setting::Power { .. } | Setting::Throttle { .. } => {
            let condition = condition(rig, point, air)?;
            Ok(Answer { condition, loads: rig.rotor.loads(&condition), held: false })
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{DEMOS, Job, PitchControl};

    fn rig(turn_deg: f64) -> Rig {
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg };
        Rig::new(&job).unwrap()
    }

    /// An answer that another one leads to is the answer that none leads to, whatever is asked.
    #[test]
    fn what_is_near_leads_to_the_answer_and_does_not_change_it() {
        let point = |airspeed_m_s, setting| FlightPoint {
            name: "here".into(),
            altitude_m: 1000.0,
            isa_offset_k: 0.0,
            airspeed_m_s,
            setting,
        };
        for p in [
            point(None, Setting::FullThrottle {}),
            point(Some(35.0), Setting::FullThrottle {}),
            point(Some(40.0), Setting::Level {}),
            point(Some(35.0), Setting::Power { power_w: 30_000.0 }),
        ] {
            let air = crate::rig::air_of(&p).unwrap();
            let mut near = Near::default();
            let mut held = 0;
            // To where the limit rpm is passed, and back.
            for turn_deg in [0.0, 0.3, -2.0, -4.0, -6.0, -8.0, -8.2, -5.0, 1.0] {
                let rig = rig(turn_deg);
                let led = answer(&rig, &p, air, &mut near).unwrap();
                let alone = answer(&rig, &p, air, &mut Near::default()).unwrap();
                // Two roads to one root, as along a range: 2e-6 comes out there.
                let same = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 5e-6, "{p:?} {turn_deg}: {a} {b}");
                same(led.condition.airspeed_m_s, alone.condition.airspeed_m_s);
                same(led.condition.rotation_rad_s, alone.condition.rotation_rad_s);
                same(led.loads.thrust_n, alone.loads.thrust_n);
                same(led.loads.torque_n_m, alone.loads.torque_n_m);
                assert_eq!(led.held, alone.held, "{p:?} {turn_deg}");
                held += u32::from(led.held);
            }
            assert!(held > 0 || p.setting != Setting::FullThrottle {});
        }
    }
}
