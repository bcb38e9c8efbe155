//! Top speed from that of a propeller a little different: airspeed and rpm at once.
//!
//! Two remainders, the thrust left over and the power left over (or what is left to the limit rpm, where the
//! throttle holds that), are brought to nothing by C. G. Broyden's method (Mathematics of Computation 19,
//! 1965), whose matrix is kept from one propeller to the next. Whatever casts doubt on the answer is left to
//! the look over all speeds.

use super::full::Full;
use super::slipstream::kept_share;
use super::top_speed::FASTEST_MACH;
use super::{highest_rpm, power_w, rpm_of};
use crate::aircraft::thrust_asked_n;
use crate::job::PitchControl;
use crate::rig::Rig;
use crate::rotor::{Condition, Loads, Neighbour};

/// Steps after which the look over all speeds takes over.
const MOST_STEPS: u32 = 8;
/// Farthest step, and the last one, as shares of airspeed and rpm.
const FARTHEST: f64 = 0.1;
const LAST_STEP: f64 = 1e-6;
/// How far apart two places are that measure the rises, as a share.
const APART: f64 = 1e-3;
/// What may be left over, as a share.
const LEFT_OVER: f64 = 1e-5;

/// Rises of the two remainders with the logarithms of airspeed and rpm.
type Rises = [[f64; 2]; 2];

/// What is kept of the last answer.
#[derive(Clone, Debug)]
pub(super) struct TopNear {
    full: Full,
    rises: Option<Rises>,
    elements: Neighbour,
}

impl From<Full> for TopNear {
    fn from(full: Full) -> Self {
        Self { full, rises: None, elements: Neighbour::default() }
    }
}

impl TopNear {
    /// The answer.
    pub(super) fn full(&self) -> &Full {
        &self.full
    }

    /// The answer of a propeller a little different, with fixed blades, at the air of `at`; `None` where this
    /// one does not lead there.
    pub(super) fn on(mut self, rig: &Rig, at: &Condition) -> Option<Self> {
        if matches!(rig.job.propeller.pitch_control, PitchControl::ConstantSpeed { .. }) {
            return None;
        }
        let held = self.full.held;
        let before = self.full.condition;
        let mut here =
            Condition { airspeed_m_s: before.airspeed_m_s, rotation_rad_s: before.rotation_rad_s, ..*at };
        let (mut left, _) = left_over(rig, &here, held, &mut self.elements)?;
        let mut rises = match self.rises {
            Some(rises) => rises,
            None => measured(rig, &here, held, left, &mut self.elements)?,
        };
        for _ in 0..MOST_STEPS {
            let step = to_nothing(&rises, left)?;
            here = moved(&here, step);
            let (there, loads) = left_over(rig, &here, held, &mut self.elements)?;
            if step.iter().all(|s| s.abs() <= LAST_STEP) {
                let good =
                    there.iter().all(|l| l.abs() <= LEFT_OVER) && sound(rig, &here, &loads, held, &rises);
                let full = Full { condition: here, loads, held };
                return good.then_some(Self { full, rises: Some(rises), ..self });
            }
            let squared: f64 = step.iter().map(|s| s * s).sum();
            for (row, rest) in rises.iter_mut().zip(there) {
                row.iter_mut().zip(step).for_each(|(rise, s)| *rise += rest * s / squared);
            }
            left = there;
        }
        None
    }
}

/// What is left over of thrust, as a share of what is asked, and of power or rpm, as a share of what is
/// offered.
fn left_over(rig: &Rig, at: &Condition, held: bool, elements: &mut Neighbour) -> Option<([f64; 2], Loads)> {
    let (aircraft, shaft) = (rig.aircraft.as_ref()?, rig.shaft.as_ref()?);
    let loads = rig.rotor.loads_near(at, elements);
    let asked = thrust_asked_n(aircraft, &at.air, at.airspeed_m_s)?;
    let thrust = loads.thrust_n * kept_share(rig) / asked - 1.0;
    let second = if held {
        highest_rpm(shaft) / rpm_of(at) - 1.0
    } else {
        1.0 - power_w(&loads, at) / shaft.power_w(rpm_of(at), &at.air, 1.0)
    };
    (thrust.is_finite() && second.is_finite()).then_some(([thrust, second], loads))
}

/// A condition with airspeed and rpm moved by shares.
fn moved(at: &Condition, [airspeed, rpm]: [f64; 2]) -> Condition {
    Condition {
        airspeed_m_s: at.airspeed_m_s * airspeed.exp(),
        rotation_rad_s: at.rotation_rad_s * rpm.exp(),
        ..*at
    }
}

fn measured(
    rig: &Rig,
    at: &Condition,
    held: bool,
    left: [f64; 2],
    elements: &mut Neighbour,
) -> Option<Rises> {
    let by_speed = left_over(rig, &moved(at, [APART, 0.0]), held, elements)?.0;
    let by_rpm = left_over(rig, &moved(at, [0.0, APART]), held, elements)?.0;
    let rise = |i: usize| [(by_speed[i] - left[i]) / APART, (by_rpm[i] - left[i]) / APART];
    Some([rise(0), rise(1)])
}

/// The step after which nothing is left over, were the rises true; `None` where it is long or they tell
/// nothing.
fn to_nothing(&[[a, b], [c, d]]: &Rises, [p, q]: [f64; 2]) -> Option<[f64; 2]> {
    let determinant = a * d - b * c;
    let step = [(b * q - d * p) / determinant, (c * p - a * q) / determinant];
    step.iter().all(|s| s.abs() <= FARTHEST).then_some(step)
}

/// Whether a faster flight lacks thrust, the rpm is stable and within the limits, and the engine gives what a
/// held one takes.
fn sound(rig: &Rig, at: &Condition, loads: &Loads, held: bool, &[[a, b], [c, d]]: &Rises) -> bool {
    let Some(shaft) = &rig.shaft else { return false };
    let (rpm, taken) = (rpm_of(at), power_w(loads, at));
    let within = at.airspeed_m_s < FASTEST_MACH * at.air.sound_speed_m_s;
    let falls = d < 0.0 && a - b * c / d < 0.0;
    let met = if held {
        taken > 0.0 && taken <= shaft.power_w(rpm, &at.air, 1.0)
    } else {
        rpm <= highest_rpm(shaft) && rpm >= shaft.rpm_range().0
    };
    within && falls && met
}

#[cfg(test)]
mod tests;
