//! The dive with closed throttle, and what a variable pitch is worth.

use spokeshave::fit::{envelope, pitch_worth};
use spokeshave::job::{Aircraft, DEMOS, Engine, FlightPoint, Job, PitchControl, Setting};
use spokeshave::result::WorthOf;
use spokeshave::rig::{Rig, air_of, rotation_rad_s};
use spokeshave::rotor::Condition;

fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

fn point(airspeed_m_s: Option<f64>, setting: Setting) -> FlightPoint {
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }
}

fn dive_m_s(job: &Job) -> Option<f64> {
    let rig = Rig::new(job).unwrap();
    let range = envelope(&rig, &point(None, Setting::FullThrottle {}), 12, &[])?;
    range.marks.closed_throttle_dive.map(|d| d.airspeed_m_s)
}

#[test]
fn in_the_dive_the_propeller_freewheels_at_the_limit_rpm() {
    let job = demo(0);
    let rig = Rig::new(&job).unwrap();
    let full = point(None, Setting::FullThrottle {});
    let marks = envelope(&rig, &full, 20, &[]).unwrap().marks;
    let dive = marks.closed_throttle_dive.unwrap();
    assert!((dive.rpm - 3300.0).abs() < 1e-9 && dive.value < 0.0, "{dive:?}");
    assert!(dive.airspeed_m_s > marks.top_speed.unwrap().airspeed_m_s);
    let air = air_of(&full).unwrap();
    let torque = |v: f64, rpm: f64| {
        let at = Condition { air, airspeed_m_s: v, rotation_rad_s: rotation_rad_s(rpm), turn_rad: 0.0 };
        rig.rotor.loads(&at).torque_n_m
    };
    let v = dive.airspeed_m_s;
    // What the root leaves: 1.4e-6 N m.
    assert!(torque(v, 3300.0).abs() < 1e-7 * torque(0.0, 3300.0));
    assert!(torque(0.99 * v, 3300.0) > 0.0 && torque(1.01 * v, 3300.0) < 0.0);
}

#[test]
fn standing_at_idle_is_the_propeller_at_that_rpm_of_the_engine() {
    let mut job = demo(0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    (piston.idle_rpm, piston.gear_ratio) = (Some(1500.0), 1.5);
    let thrust_n = |job: &Job, turn_deg: f64| {
        let rig = Rig::new(job).unwrap();
        let full = point(None, Setting::FullThrottle {});
        let idle = envelope(&rig, &full, 12, &[]).unwrap().marks.idle.unwrap();
        assert!(idle.airspeed_m_s == 0.0 && (idle.rpm - 1000.0).abs() < 1e-9, "{idle:?}");
        let rotation_rad_s = rotation_rad_s(1000.0);
        let turn_rad = f64::to_radians(turn_deg);
        let at = Condition { air: air_of(&full).unwrap(), airspeed_m_s: 0.0, rotation_rad_s, turn_rad };
        assert!((idle.value / rig.rotor.loads(&at).thrust_n - 1.0).abs() < 1e-9);
        idle.value
    };
    let fixed = thrust_n(&job, 0.0);
    // The governor holds nothing so slow: the blades are at the fine stop.
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2000.0, turn_min_deg: -4.0, turn_max_deg: 8.0 };
    assert!(thrust_n(&job, -4.0) < fixed);
}

/// A freewheeling propeller turns at one advance ratio but for Reynolds and Mach numbers, so that the speed
/// follows the limit rpm.
#[test]
fn the_dive_follows_limit_rpm_and_pitch() {
    let job = demo(0);
    let at_3300 = dive_m_s(&job).unwrap();
    let mut slower = job.clone();
    let Some(Engine::Piston(piston)) = &mut slower.engine else { panic!("a piston engine") };
    piston.max_rpm = Some(2900.0);
    let ratio = dive_m_s(&slower).unwrap() / at_3300;
    // At the same advance ratio only the Reynolds and Mach numbers differ: 0.3 % comes out.
    assert!((ratio / (2900.0 / 3300.0) - 1.0).abs() < 0.005, "{ratio}");
    let mut coarser = job.clone();
    coarser.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: 4.0 };
    assert!(dive_m_s(&coarser).unwrap() > 1.1 * at_3300);
    // The governor goes to its coarse stop first.
    let mut governed = job.clone();
    governed.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2800.0, turn_min_deg: -5.0, turn_max_deg: 4.0 };
    let (coarse, stop) = (dive_m_s(&coarser).unwrap(), dive_m_s(&governed).unwrap());
    assert!((coarse / stop - 1.0).abs() < 1e-9);
    // So does one that holds just the limit rpm.
    governed.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 3300.0, turn_min_deg: -5.0, turn_max_deg: 4.0 };
    assert!((dive_m_s(&governed).unwrap() / coarse - 1.0).abs() < 1e-9);
    assert!(dive_m_s(&demo(1)).is_none(), "the motor names no limit rpm");
}

#[test]
fn the_best_turn_is_better_than_its_neighbours() {
    let job = demo(0);
    let answer = |turn_deg: f64, p: &FlightPoint, of: WorthOf| {
        let mut job = job.clone();
        job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg };
        job.flight_points = vec![p.clone()];
        let r = Rig::new(&job).unwrap().point(0).unwrap();
        let (figures, meeting, v) = match &r.held {
            Some(h) => (h.figures.clone(), h.meeting.clone(), Some(h.airspeed_m_s)),
            None => (r.figures, r.meeting, r.airspeed_m_s),
        };
        match of {
            WorthOf::Thrust => meeting.total_thrust_n,
            WorthOf::TopSpeed => v,
            WorthOf::ShaftPower => figures.power_w.map(|p| -p),
        }
        .unwrap_or(f64::MIN)
    };
    let rig = Rig::new(&job).unwrap();
    for (p, of) in [
        (point(Some(0.0), Setting::FullThrottle {}), WorthOf::Thrust),
        (point(Some(28.0), Setting::FullThrottle {}), WorthOf::Thrust),
        (point(Some(45.0), Setting::Level {}), WorthOf::ShaftPower),
        (point(None, Setting::FullThrottle {}), WorthOf::TopSpeed),
    ] {
        let worth = pitch_worth(&rig, &p).unwrap();
        assert_eq!(worth.of, of);
        let best = worth.turn_deg.unwrap();
        let here = answer(best, &p, of);
        assert!((here.abs() / worth.best.unwrap() - 1.0).abs() < 1e-6, "{worth:?} {here}");
        assert!(worth.gain.unwrap() >= 0.0, "{worth:?}");
        for turn in [best - 2.0, best - 0.2, best + 0.2, best + 2.0, 0.0] {
            assert!(answer(turn, &p, of) <= here + 1e-6 * here.abs(), "{worth:?} at {turn}");
        }
    }
}

/// Turned to its best, a propeller has nothing more to gain; at rest it wants less pitch than at top speed.
#[test]
fn a_blade_turned_to_its_best_gains_nothing_more() {
    let job = demo(0);
    let climb = point(Some(28.0), Setting::FullThrottle {});
    let first = pitch_worth(&Rig::new(&job).unwrap(), &climb).unwrap();
    let mut turned = job.clone();
    turned.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: first.turn_deg.unwrap() };
    let again = pitch_worth(&Rig::new(&turned).unwrap(), &climb).unwrap();
    // None is found: the steps round a top end on it.
    assert!(again.gain.unwrap() < 1e-9, "{again:?}");
    let worth = |p| pitch_worth(&Rig::new(&job).unwrap(), &p).unwrap().turn_deg.unwrap();
    let (rest, fast) =
        (worth(point(Some(0.0), Setting::FullThrottle {})), worth(point(None, Setting::FullThrottle {})));
    assert!(rest < fast, "{rest} {fast}");
}

#[test]
fn where_nothing_is_to_be_gained_none_is_told() {
    let mut job = demo(0);
    let rpm = point(Some(30.0), Setting::Rpm { rpm: 2500.0 });
    assert!(pitch_worth(&Rig::new(&job).unwrap(), &rpm).is_none());
    // Beyond its power nothing is told but that there is no answer.
    let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else { panic!("an aeroplane") };
    a.mass_kg = 20_000.0;
    let level = pitch_worth(&Rig::new(&job).unwrap(), &point(Some(40.0), Setting::Level {})).unwrap();
    assert!(level.best.is_none() && level.turn_deg.is_none() && level.gain.is_none());
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2800.0, turn_min_deg: -5.0, turn_max_deg: 4.0 };
    let full = point(Some(30.0), Setting::FullThrottle {});
    assert!(pitch_worth(&Rig::new(&job).unwrap(), &full).is_none());
}

/// Blades that stand so far off that the best lies beyond 15° finer or 25° coarser: the best is that end, and
/// said to be; a best between is not.
#[test]
fn a_best_turn_at_the_end_of_the_search_is_said_to_be() {
    let fast = point(Some(45.0), Setting::FullThrottle {});
    let still = point(Some(0.0), Setting::FullThrottle {});
    for (stands, p, end) in
        [(30.0, &still, Some(15.0)), (-30.0, &fast, Some(-5.0)), (3.0, &still, None), (3.0, &fast, None)]
    {
        let mut job = demo(0);
        job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: stands };
        let worth = pitch_worth(&Rig::new(&job).unwrap(), p).unwrap();
        assert_eq!(worth.at_end_of_search, end.is_some(), "{worth:?}");
        assert!(end.is_none_or(|end| (worth.turn_deg.unwrap() - end).abs() < 1e-9), "{worth:?}");
    }
}
