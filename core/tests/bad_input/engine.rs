//! Engine, battery and what governs them.

use spokeshave::job::{DEMOS, Engine, Job, PitchControl};

/// A governor holds the propeller's rpm; the limit is the engine's, or the end of its curve where none is
/// given.
#[test]
fn a_governor_stays_within_the_engine_through_its_gear() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    (piston.gear_ratio, piston.max_rpm) = (2.0, Some(3200.0));
    let governed = |rpm: f64| PitchControl::ConstantSpeed { rpm, turn_min_deg: -5.0, turn_max_deg: 20.0 };
    job.propeller.pitch_control = governed(1600.0);
    assert_eq!(job.check(), []);
    job.propeller.pitch_control = governed(1601.0);
    let problem = &job.check()[0];
    assert_eq!((problem.path.as_str(), problem.span), ("propeller.pitch_control.rpm", Some((10.0, 1600.0))));
    assert!(problem.allowed.contains("engine.max_rpm"), "{problem}");
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = None;
    assert_eq!(job.check(), []);
    job.propeller.pitch_control = governed(1651.0);
    assert!(job.check()[0].allowed.contains("the end of engine.full_throttle"));
}

/// Without load the motor of the second example turns 6 cells × 3.8 V × 470 rpm/V = 10,716 rpm.
#[test]
fn a_governor_stays_within_what_a_motor_turns_without_load() {
    let mut job = Job::from_json(DEMOS[1].json).unwrap();
    let governed = |rpm: f64| PitchControl::ConstantSpeed { rpm, turn_min_deg: -5.0, turn_max_deg: 20.0 };
    job.propeller.pitch_control = governed(10_716.0);
    assert_eq!(job.check(), []);
    job.propeller.pitch_control = governed(10_717.0);
    assert_eq!(
        job.check()[0].to_string(),
        "propeller.pitch_control.rpm: 10717 rpm, times gear_ratio 1 10717 rpm of the engine; allowed is up to \
         10716.0 rpm, with 10716 rpm of the engine as the motor turns without load: engine.kv_rpm_per_v times \
         the battery's voltage"
    );
    let Some(Engine::Electric(electric)) = &mut job.engine else { panic!("an electric motor") };
    electric.gear_ratio = 2.0;
    let (_, most) = job.check()[0].span.unwrap();
    assert!((most - 5358.0).abs() < 1e-6, "{most}, but for the rounding of a product");
}

#[test]
fn an_empty_battery_is_refused() {
    let mut job = Job::from_json(DEMOS[1].json).unwrap();
    let Some(Engine::Electric(electric)) = &mut job.engine else { panic!("an electric motor") };
    electric.battery.capacity_ah = 0.0;
    assert_eq!(job.check()[0].path, "engine.battery.capacity_ah");
}
