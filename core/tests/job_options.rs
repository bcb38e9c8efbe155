//! Optional numbers of the job file against their closed forms: rolling friction, drag in the slipstream,
//! blockage by the body.

use std::f64::consts::PI;

use spokeshave::air::G0_M_S2;
use spokeshave::aircraft::drag_n;
use spokeshave::fit::{envelope, take_off};
use spokeshave::job::{Aeroplane, Aircraft, DEMOS, FlightPoint, Job, Setting};
use spokeshave::result::{PointResult, TakeOff};
use spokeshave::rig::{Rig, air_of};
use spokeshave::rotor::Condition;

fn demo() -> Job {
    Job::from_json(DEMOS[0].json).unwrap()
}

fn point(airspeed_m_s: Option<f64>, setting: Setting) -> FlightPoint {
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }
}

fn aeroplane(job: &mut Job) -> &mut Aeroplane {
    let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else { panic!("an aeroplane") };
    a
}

fn answer(job: &Job, point: FlightPoint) -> PointResult {
    let mut job = job.clone();
    job.flight_points = vec![point];
    assert_eq!(job.check(), vec![]);
    Rig::new(&job).unwrap().point(0).unwrap()
}

fn roll(job: &Job) -> TakeOff {
    let rig = Rig::new(job).unwrap();
    take_off(&rig, &envelope(&rig, &point(None, Setting::FullThrottle {}), 60, &[]).unwrap()).unwrap()
}

/// What friction takes of the mean acceleration: `V²/2s` falls by `Δμ g`, but for how the thrust is spread
/// over the roll.
#[test]
fn rolling_friction_takes_its_share_of_the_acceleration() {
    let job = demo();
    let common = roll(&job);
    assert_eq!(common.rolling_friction, 0.04);
    let mut grass = job.clone();
    aeroplane(&mut grass).rolling_friction = Some(0.10);
    let long = roll(&grass);
    assert_eq!((long.rolling_friction, long.lift_off_m_s), (0.10, common.lift_off_m_s));
    let mean = |t: &TakeOff| t.lift_off_m_s.powi(2) / (2.0 * t.ground_roll_m);
    let less = mean(&common) - mean(&long);
    assert!((less / (0.06 * G0_M_S2) - 1.0).abs() < 0.1, "{less}");
}

/// `qs − q = T/A`: parts of drag area f ask `f T/A` more, so that level flight takes `D/(1 − f/A)`.
#[test]
fn parts_in_the_slipstream_take_their_share_of_the_thrust() {
    let free = demo();
    let disc_m2 = PI * (0.5 * free.propeller.diameter_m).powi(2);
    let mut job = free.clone();
    aeroplane(&mut job).slipstream_drag_area_m2 = Some(0.06);
    let kept = 1.0 - 0.06 / disc_m2;
    let level = point(Some(45.0), Setting::Level {});
    let air = air_of(&level).unwrap();
    let drag = drag_n(aeroplane(&mut job), &air, 45.0).unwrap();
    let flown = answer(&job, level).meeting;
    // Met by a root, which leaves 2e-9 of the thrust, and of the climb as little.
    assert!((flown.total_thrust_n.unwrap() / (drag / kept) - 1.0).abs() < 1e-7);
    assert!((flown.asked_n.unwrap() / (drag / kept) - 1.0).abs() < 1e-12);
    assert!(flown.rate_of_climb_m_s.unwrap().abs() < 1e-6);
    let climbing = point(Some(28.0), Setting::FullThrottle {});
    let (with, without) = (answer(&job, climbing.clone()).meeting, answer(&free, climbing).meeting);
    let thrust = with.total_thrust_n.unwrap();
    assert!((thrust - without.total_thrust_n.unwrap()).abs() < 1e-9, "the propeller does not feel it");
    let lost = without.rate_of_climb_m_s.unwrap() - with.rate_of_climb_m_s.unwrap();
    let expected = thrust * (1.0 - kept) * 28.0 / (aeroplane(&mut job).mass_kg * G0_M_S2);
    assert!((lost / expected - 1.0).abs() < 1e-6);
    let top = |job: &Job| answer(job, point(None, Setting::FullThrottle {}));
    assert!(top(&job).airspeed_m_s.unwrap() < top(&free).airspeed_m_s.unwrap() - 0.1);
    assert!(roll(&job).ground_roll_m > roll(&free).ground_roll_m);
}

/// A propeller before a body that slows the air by a share h works as one in the free air at `(1 − h) V`.
#[test]
fn a_body_behind_slows_the_air_that_the_blades_meet() {
    let free = Rig::new(&demo()).unwrap();
    let mut job = demo();
    job.propeller.blockage = Some(0.05);
    assert_eq!(job.check(), vec![]);
    let rig = Rig::new(&job).unwrap();
    let air = air_of(&point(None, Setting::FullThrottle {})).unwrap();
    for v in [0.0, 20.0, 50.0] {
        let at = |airspeed_m_s| Condition { air, airspeed_m_s, rotation_rad_s: 280.0, turn_rad: 0.0 };
        let (slowed, same) = (rig.rotor.loads(&at(v)), free.rotor.loads(&at(0.95 * v)));
        assert!(
            (slowed.thrust_n - same.thrust_n).abs() < 1e-9
                && (slowed.torque_n_m - same.torque_n_m).abs() < 1e-9
        );
    }
}
