//! Take-off: the ground roll and the distance to 15 m, from the thrust of an envelope.
//!
//! Common practice: the aeroplane rolls without lift (full friction, no induced drag), lifts off at 1.2 and
//! passes 15 m at 1.3 of the stall speed; level hard ground, no wind. The roll is `∫ V dV/a`, `a = (T − q S
//! cd0 − μ W)/m`; from there to 15 m it is by energy: the height and the gain of speed over the mean of `(T −
//! D)/W`.

use super::Solver;
use super::slipstream::kept_share;
use super::trail::Trail;
use crate::air::{Air, G0_M_S2};
use crate::aircraft::{drag_n, speeds};
use crate::curve::Curve;
use crate::job::{Aeroplane, Aircraft};
use crate::result::{Envelope, TakeOff};
use crate::rig::Rig;

/// Rolling friction over weight where the job gives none: short grass or firm ground; common practice gives
/// 0.02 (hard runway) to 0.1 (long grass).
const ROLLING_FRICTION: f64 = 0.04;
/// Speeds over that of the stall at which the wheels leave the ground and the screen is passed, and the
/// height of the screen, m: common practice, as above.
const LIFT_OFF: f64 = 1.2;
const SCREEN: f64 = 1.3;
const SCREEN_M: f64 = 15.0;
/// Steps of the integral over speed, by the midpoint rule.
const STEPS: u32 = 200;
/// Speeds of a quick look.
const FEW: u32 = 6;

/// Take-off at the air of an envelope. `None` without an aeroplane with a greatest lift coefficient, and
/// where thrust does not suffice to get there.
#[must_use]
pub fn take_off(rig: &Rig, envelope: &Envelope) -> Option<TakeOff> {
    let air = Air::standard(envelope.altitude_m, envelope.isa_offset_k).ok()?;
    let kept = kept_share(rig);
    let known =
        envelope.points.iter().filter_map(|p| Some((p.airspeed_m_s, kept * p.full.as_ref()?.thrust_n)));
    along(rig, &air, known.unzip())
}

/// The same without an envelope, from full throttle at few speeds.
#[must_use]
pub fn take_off_in(rig: &Rig, air: &Air) -> Option<TakeOff> {
    let Some(Aircraft::Aeroplane(a)) = &rig.aircraft else { return None };
    let (solver, mut trail) = (Solver::new(rig), Trail::default());
    let (kept, engines) = (kept_share(rig), f64::from(a.engines));
    let fastest = SCREEN * speeds(a, air).stall_m_s?;
    let thrust = |i: u32| {
        let airspeed_m_s = fastest * (f64::from(i) / f64::from(FEW));
        let at = rig.unsolved(*air, airspeed_m_s);
        Some((airspeed_m_s, kept * engines * solver.full(&at, &mut trail).ok()?.loads.thrust_n))
    };
    along(rig, air, (0..=FEW).filter_map(thrust).unzip())
}

/// Take-off by all propellers' thrust over speed.
fn along(rig: &Rig, air: &Air, (speed, thrust): (Vec<f64>, Vec<f64>)) -> Option<TakeOff> {
    let Some(Aircraft::Aeroplane(a)) = &rig.aircraft else { return None };
    let stall = speeds(a, air).stall_m_s?;
    let starts_at_rest = speed.first() == Some(&0.0);
    let reaches = speed.last().is_some_and(|&v| v >= SCREEN * stall);
    let thrust = Curve::new(speed, thrust).filter(|_| starts_at_rest && reaches)?;
    let (lift_off, screen) = (LIFT_OFF * stall, SCREEN * stall);
    let (ground_roll_m, time_s) = roll(a, air.density_kg_m3, &thrust, lift_off)?;
    let weight = a.mass_kg * G0_M_S2;
    let slope = |v: f64| Some((thrust.at(v) - drag_n(a, air, v)?) / weight);
    let mean = 0.5 * (slope(lift_off)? + slope(screen)?);
    let gain = SCREEN_M + (screen * screen - lift_off * lift_off) / (2.0 * G0_M_S2);
    (mean > 0.0).then(|| TakeOff {
        rolling_friction: friction(a),
        lift_off_m_s: lift_off,
        ground_roll_m,
        ground_roll_s: time_s,
        screen_m_s: screen,
        distance_to_15_m: ground_roll_m + gain / mean,
    })
}

fn friction(a: &Aeroplane) -> f64 {
    a.rolling_friction.unwrap_or(ROLLING_FRICTION)
}

/// Distance and time of the roll; `None` where the aeroplane does not gather speed.
fn roll(a: &Aeroplane, density_kg_m3: f64, thrust: &Curve, lift_off: f64) -> Option<(f64, f64)> {
    let step = lift_off / f64::from(STEPS);
    let (mut distance, mut time) = (0.0, 0.0);
    for i in 0..STEPS {
        let v = (f64::from(i) + 0.5) * step;
        let drag = 0.5 * density_kg_m3 * v * v * a.wing_area_m2 * a.drag.cd0;
        let gain = (thrust.at(v) - drag) / a.mass_kg - friction(a) * G0_M_S2;
        if gain <= 0.0 {
            return None;
        }
        distance += v * step / gain;
        time += step / gain;
    }
    Some((distance, time))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{DEMOS, Job};

    /// Constant thrust without drag rolls `V²/2a`, in `V/a`; and by energy the rest.
    #[test]
    fn constant_thrust_without_drag_is_the_closed_form() {
        let mut job = Job::from_json(DEMOS[0].json).unwrap();
        let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else { panic!("an aeroplane") };
        (a.drag.cd0, a.drag.k) = (1e-9, Some(1e-9));
        let (m, stall) = (a.mass_kg, (2.0 * a.mass_kg * G0_M_S2 / (1.225 * a.wing_area_m2 * 1.6)).sqrt());
        let (rig, air) = (Rig::new(&job).unwrap(), Air::standard(0.0, 0.0).unwrap());
        let told =
            |speeds: &[f64], thrust: f64| along(&rig, &air, (speeds.to_vec(), vec![thrust; speeds.len()]));
        let t = told(&[0.0, 20.0, 40.0], 1200.0).unwrap();
        let v = 1.2 * stall;
        let gain = 1200.0 / m - 0.04 * G0_M_S2;
        // The table's density at sea level is 1.5e-8 above 1.225.
        let near = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 1e-6, "{a} {b}");
        near(t.lift_off_m_s, v);
        near(t.screen_m_s, 1.3 * stall);
        near(t.ground_roll_m, v * v / (2.0 * gain));
        near(t.ground_roll_s, v / gain);
        let height = 15.0 + ((1.3 * stall).powi(2) - v * v) / (2.0 * G0_M_S2);
        near(t.distance_to_15_m - t.ground_roll_m, height * m * G0_M_S2 / 1200.0);
        near(t.rolling_friction, 0.04);
        // Friction is 169 N: with less nothing rolls.
        assert!(told(&[0.0, 20.0, 40.0], 168.0).is_none());
        // Thrust must be known from rest to 1.3 of the stall, 25.1 m/s.
        assert!(told(&[0.0, 20.0, 25.2], 1200.0).is_some());
        assert!(told(&[0.0, 20.0, 25.0], 1200.0).is_none());
        assert!(told(&[1.0, 20.0, 40.0], 1200.0).is_none());
        assert!(told(&[], 1200.0).is_none());
    }
}
