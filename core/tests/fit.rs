//! Where propeller, engine and aircraft meet: balances hold, and what has no answer says why.

use spokeshave::air::Air;
use spokeshave::aircraft::drag_n;
use spokeshave::job::{Aircraft, DEMOS, Engine, FlightPoint, Job, PitchControl, Setting};
use spokeshave::result::{PointResult, State};
use spokeshave::rig::Rig;

fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

fn at(job: &Job, airspeed_m_s: Option<f64>, setting: Setting) -> PointResult {
    let mut job = job.clone();
    job.flight_points =
        vec![FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }];
    assert_eq!(job.check(), vec![]);
    Rig::new(&job).unwrap().point(0).unwrap()
}

fn near(got: Option<f64>, expected: f64, share: f64) {
    let got = got.unwrap();
    assert!((got - expected).abs() <= share * expected.abs(), "{got} for {expected}");
}

#[test]
fn every_demo_has_an_answer_at_every_flight_point() {
    for (index, d) in DEMOS.iter().enumerate() {
        for point in Rig::new(&demo(index)).unwrap().analysis().flight_points {
            assert_eq!(point.state, State::Ok, "{}: {}", d.name, point.name);
        }
    }
}

#[test]
fn at_full_throttle_the_propeller_takes_what_the_engine_gives() {
    for (index, v) in [(0, 0.0), (0, 30.0), (0, 50.0), (1, 0.0), (1, 15.0), (2, 0.0)] {
        let p = at(&demo(index), Some(v), Setting::FullThrottle {});
        near(p.figures.power_w, p.meeting.available_power_w.unwrap(), 1e-6);
    }
}

#[test]
fn part_throttle_takes_its_share() {
    let p = at(&demo(0), Some(30.0), Setting::Throttle { fraction: 0.6 });
    near(p.meeting.power_share, 0.6, 1e-6);
    let slower = at(&demo(1), Some(10.0), Setting::Throttle { fraction: 0.5 });
    near(slower.meeting.duty, 0.5, 1e-3);
}

#[test]
fn in_level_flight_thrust_is_drag_and_in_hover_it_is_weight() {
    let p = at(&demo(0), Some(45.0), Setting::Level {});
    let Some(Aircraft::Aeroplane(a)) = demo(0).aircraft else { panic!("an aeroplane") };
    near(p.figures.thrust_n, drag_n(&a, &Air::standard(0.0, 0.0).unwrap(), 45.0).unwrap(), 1e-6);
    let hover = at(&demo(2), Some(0.0), Setting::Level {});
    near(hover.figures.thrust_n, 3.6 * 9.806_65 / 4.0, 1e-6);
}

#[test]
fn at_top_speed_both_hold() {
    let p = at(&demo(0), None, Setting::FullThrottle {});
    near(p.figures.power_w, p.meeting.available_power_w.unwrap(), 1e-6);
    near(p.meeting.asked_n, p.meeting.total_thrust_n.unwrap(), 1e-3);
    let slower = at(&demo(0), p.airspeed_m_s.map(|v| v - 2.0), Setting::FullThrottle {});
    assert!(slower.meeting.rate_of_climb_m_s.unwrap() > 0.05);
}

#[test]
fn a_power_setting_is_met() {
    let p = at(&demo(0), Some(40.0), Setting::Power { power_w: 25_000.0 });
    near(p.figures.power_w, 25_000.0, 1e-6);
}

#[test]
fn what_has_no_answer_says_why() {
    let mut weak = demo(0);
    let Some(Engine::Piston(piston)) = &mut weak.engine else { panic!("a piston engine") };
    piston.full_throttle.iter_mut().for_each(|p| p.power_w /= 20.0);
    assert_eq!(at(&weak, Some(0.0), Setting::FullThrottle {}).state, State::EngineCannotTurnIt);
    assert_eq!(at(&weak, Some(45.0), Setting::Level {}).state, State::EngineTooWeak);

    let mut fine = demo(0);
    fine.propeller.stations.iter_mut().for_each(|s| s.angle_deg = s.angle_deg.map(|a| a - 9.0));
    assert_eq!(at(&fine, Some(50.0), Setting::FullThrottle {}).state, State::OverLimitRpm);
    assert_eq!(at(&fine, None, Setting::FullThrottle {}).state, State::OverLimitRpm);

    let mut bare = demo(0);
    bare.engine = None;
    assert_eq!(at(&bare, Some(0.0), Setting::FullThrottle {}).state, State::NeedsEngine);
    assert_eq!(at(&bare, Some(45.0), Setting::Level {}).state, State::Ok, "level flight needs no engine");
    bare.aircraft = None;
    assert_eq!(at(&bare, Some(45.0), Setting::Level {}).state, State::NeedsAircraft);
    assert_eq!(
        at(&demo(0), Some(0.0), Setting::Level {}).state,
        State::BelowStall,
        "nothing holds it up at rest"
    );
}

#[test]
fn a_constant_speed_propeller_holds_its_rpm_between_its_stops() {
    let mut job = demo(0);
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2700.0, turn_min_deg: -8.0, turn_max_deg: 12.0 };
    let (slow, fast) =
        (at(&job, Some(25.0), Setting::FullThrottle {}), at(&job, Some(50.0), Setting::FullThrottle {}));
    for p in [&slow, &fast] {
        near(p.rpm, 2700.0, 1e-9);
        near(p.figures.power_w, p.meeting.available_power_w.unwrap(), 1e-6);
    }
    assert!(fast.turn_deg > slow.turn_deg, "{} {}", fast.turn_deg, slow.turn_deg);
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2700.0, turn_min_deg: 0.0, turn_max_deg: 1.0 };
    let stopped = at(&job, Some(55.0), Setting::FullThrottle {});
    assert!(stopped.rpm.unwrap() > 2700.0, "at the coarse stop it runs away from its governor");
    near(Some(stopped.turn_deg), 1.0, 1e-9);
}

#[test]
fn turned_blades_are_a_coarser_propeller() {
    let mut job = demo(0);
    let drawn = at(&job, Some(30.0), Setting::FullThrottle {});
    job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: 2.0 };
    let turned = at(&job, Some(30.0), Setting::FullThrottle {});
    assert!(turned.rpm < drawn.rpm);
    near(turned.figures.blade_angle_075_deg, drawn.figures.blade_angle_075_deg.unwrap() + 2.0, 1e-9);
}
