use super::*;
use crate::fit::rpm_of;
use crate::job::{DEMOS, Job};

fn loads(thrust_n: f64, torque_n_m: f64) -> Loads {
    Loads { thrust_n, torque_n_m, ..Loads::default() }
}

#[test]
fn two_looks_tell_how_the_loads_change() {
    let seen = Seen::default();
    assert!(seen.steepness().is_none());
    seen.add(10.0, loads(100.0, 7.0));
    assert!(seen.steepness().is_none());
    seen.add(12.0, loads(130.0, 6.0));
    let along = seen.steepness().unwrap();
    assert!((along.thrust_n - 15.0).abs() < 1e-12 && (along.torque_n_m + 0.5).abs() < 1e-12, "{along:?}");
    // The same place twice tells nothing.
    seen.add(12.0, loads(130.0, 6.0));
    assert!(seen.steepness().is_none());
}

/// A tenth of the last two looks' distance, or as far as a secant's last step goes, either way; no farther.
#[test]
fn loads_are_led_on_only_from_near() {
    let along = Steepness { thrust_n: 15.0, torque_n_m: -0.5 };
    let seen = Seen::default();
    seen.add(12.0, loads(130.0, 6.0));
    assert!(seen.loads_at(12.001, along, 1e-4).is_none(), "one look alone");
    assert!((seen.loads_at(11.9, along, 0.2).unwrap().thrust_n - 128.5).abs() < 1e-9);
    for before in [8.0, 16.0] {
        seen.add(before, loads(70.0, 8.0));
        seen.add(12.0, loads(130.0, 6.0));
        for step in [-0.3, -0.1, 0.1, 0.3] {
            let led = seen.loads_at(12.0 + step, along, 0.0).unwrap();
            assert!((led.thrust_n - 130.0 - 15.0 * step).abs() < 1e-9, "{led:?}");
            assert!((led.torque_n_m - 6.0 + 0.5 * step).abs() < 1e-9, "{led:?}");
        }
        assert!(seen.loads_at(12.5, along, 0.4).is_none() && seen.loads_at(11.5, along, 0.4).is_none());
        assert!(seen.loads_at(12.5, along, 0.6).is_some() && seen.loads_at(11.5, along, 0.6).is_some());
    }
}

fn still(rig: &Rig) -> Condition {
    let job = Job::from_json(DEMOS[0].json).unwrap();
    let air = crate::rig::air_of(&job.flight_points[0]).unwrap();
    Condition { air, airspeed_m_s: 20.0, rotation_rad_s: 250.0, turn_rad: rig.turn_rad() }
}

/// Rpm at which a demand of the rpm alone is met between 1000 and 3400.
fn met_rpm(spare: &dyn Fn(f64) -> f64) -> Result<f64, Missed> {
    let rig = Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap();
    let by_rpm = |_: &Loads, c: &Condition| spare(rpm_of(c));
    let demand = Demand { rig: &rig, at: still(&rig), spare: &by_rpm, rough: false };
    let met = demand.settle(Free::Rpm, 1000.0..=3400.0, STEPS, &Trail::default())?;
    // What is told of the loads is what they are there, but for the line through the last two looks.
    let there = rig.rotor.loads(&met.condition);
    assert!((met.loads.thrust_n / there.thrust_n - 1.0).abs() < 1e-5, "{met:?} {there:?}");
    assert!((met.loads.torque_n_m / there.torque_n_m - 1.0).abs() < 1e-5, "{met:?} {there:?}");
    assert!((rpm_of(&met.condition) - met.root.x).abs() < 1e-9 && met.width == 2400.0);
    Ok(met.root.x)
}

#[test]
fn a_demand_of_the_rpm_alone_is_met_at_its_rpm() {
    for rpm in [1005.0, 2100.0, 3390.0] {
        assert!((met_rpm(&|x| 0.01 * (x - rpm)).unwrap() - rpm).abs() < 1e-6);
    }
    assert_eq!(met_rpm(&|x| x - 3700.0), Err(Missed::AboveRange));
    assert_eq!(met_rpm(&|x| x - 700.0), Err(Missed::BelowRange));
}

/// The few looks that ask whether a search is in vain, every 400 rpm, come near to zero and do not reach it:
/// the finer ones decide.
#[test]
fn what_few_looks_come_near_to_is_looked_at_more_closely() {
    // Above zero from 2000 − 205 to 2000 + 205, where looks stand at 1800 and 2200; then a little less.
    let hump = |half: f64| move |x: f64| half - (x - 2000.0).abs();
    assert!((met_rpm(&hump(205.0)).unwrap() - 1795.0).abs() < 1e-6);
    assert!((met_rpm(&hump(190.0)).unwrap() - 1810.0).abs() < 1e-6);
    let hollow = |x: f64| (x - 2000.0).abs() - 190.0;
    assert!((met_rpm(&hollow).unwrap() - 2190.0).abs() < 1e-6);
    // Far from zero at each of the few looks: nothing there, and nothing is looked for.
    assert_eq!(met_rpm(&|x: f64| (x - 2000.0).abs() + 500.0), Err(Missed::BelowRange));
}

#[test]
fn blades_turn_until_a_demand_of_their_angle_is_met_or_to_a_stop() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 2600.0, turn_min_deg: -6.0, turn_max_deg: 9.0 };
    let rig = Rig::new(&job).unwrap();
    for (asked_deg, met_deg, held) in [(3.0, 3.0, true), (-9.0, -6.0, false), (12.0, 9.0, false)] {
        let spare = |_: &Loads, c: &Condition| c.turn_rad.to_degrees() - asked_deg;
        let demand = Demand { rig: &rig, at: still(&rig), spare: &spare, rough: false };
        let (found, between) = match demand.governed(&Trail::default()).unwrap() {
            Governed::Held(met) => (met.condition, true),
            Governed::AtStop(stop) => (stop, false),
        };
        assert_eq!(between, held);
        assert!((found.turn_rad.to_degrees() - met_deg).abs() < 1e-9, "{found:?}");
        assert!((rpm_of(&found) - 2600.0).abs() < 1e-9);
    }
    job.propeller.pitch_control = PitchControl::Fixed {};
    let rig = Rig::new(&job).unwrap();
    let demand = Demand { rig: &rig, at: still(&rig), spare: &|_, _| 0.0, rough: false };
    assert!(demand.governed(&Trail::default()).is_none());
}
