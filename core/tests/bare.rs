//! An engine with a propeller and nothing else, and a propeller alone: each figure is that of one propeller.

use spokeshave::air::Air;
use spokeshave::fit::{Along, envelope, line, pitch_worth, take_off_in};
use spokeshave::job::{DEMOS, Engine, FlightPoint, Job, Setting};
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::rotor::{Condition, thrustless_speed_m_s};

fn near(got: f64, expected: f64, share: f64) {
    assert!((got - expected).abs() <= share * expected.abs(), "{got} for {expected}");
}

fn point(setting: Setting) -> FlightPoint {
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s: Some(20.0), setting }
}

/// The demo aeroplane's engine on a stand.
fn on_a_stand(setting: Setting) -> Job {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    job.aircraft = None;
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.idle_rpm = Some(900.0);
    job.flight_points = vec![point(setting)];
    job
}

fn at(airspeed_m_s: f64, rpm: f64) -> Condition {
    let air = Air::standard(0.0, 0.0).unwrap();
    Condition { air, airspeed_m_s, rotation_rad_s: rotation_rad_s(rpm), turn_rad: 0.0 }
}

#[test]
fn without_an_aircraft_a_range_tells_of_one_propeller() {
    let job = on_a_stand(Setting::FullThrottle {});
    let rig = Rig::new(&job).unwrap();
    let found = envelope(&rig, &job.flight_points[0], 9, &[]).unwrap();
    for p in &found.points {
        assert!(p.level.is_none() && p.asked_n.is_none());
        let f = p.full.as_ref().unwrap();
        assert!(f.rate_of_climb_m_s.is_none() && f.climb_angle_deg.is_none());
        let there = rig.rotor.loads(&at(p.airspeed_m_s, f.rpm));
        // Along a line the loads of the last step are led on: 2e-6 of those at rest comes out at most.
        let standing = found.standing.as_ref().unwrap().thrust_n;
        assert!((f.thrust_n - there.thrust_n).abs() < 5e-6 * standing, "{f:?} {there:?}");
    }
    // To where the thrust at the rpm of standing full throttle is gone.
    let still = at(0.0, found.standing.as_ref().unwrap().rpm);
    near(found.points[8].airspeed_m_s, thrustless_speed_m_s(&rig.rotor, &still), 1e-6);
    let idle = found.marks.idle.unwrap();
    near(idle.value, rig.rotor.loads(&at(0.0, 900.0)).thrust_n, 1e-9);
    let dive = found.marks.closed_throttle_dive.unwrap();
    near(dive.value, rig.rotor.loads(&at(dive.airspeed_m_s, 3300.0)).thrust_n, 1e-9);
    assert!(found.marks.top_speed.is_none() && found.marks.best_range.is_none());
    assert!(take_off_in(&rig, &still.air).is_none());
}

#[test]
fn without_an_aircraft_an_engine_burns_fuel_for_itself_alone() {
    let job = on_a_stand(Setting::Throttle { fraction: 0.8 });
    let rig = Rig::new(&job).unwrap();
    let p = rig.point(0).unwrap();
    // 0.31 kg/kWh.
    near(p.meeting.fuel_kg_per_h.unwrap(), 0.31 * p.figures.power_w.unwrap() / 1000.0, 1e-9);
    let worth = pitch_worth(&rig, &job.flight_points[0]).unwrap();
    near(worth.as_set.unwrap(), p.figures.thrust_n.unwrap(), 1e-6);
}

/// Equal steps from rest to where the thrust is gone, at the rpm that is asked.
#[test]
fn without_an_engine_a_line_stays_at_its_rpm() {
    let mut job = on_a_stand(Setting::Rpm { rpm: 2500.0 });
    job.engine = None;
    let rig = Rig::new(&job).unwrap();
    let here = rig.condition(0).unwrap();
    let end = thrustless_speed_m_s(&rig.rotor, &here);
    for count in [2, 12] {
        let found = line(&rig, &here, count);
        assert_eq!(found.len(), count as usize);
        for (i, c) in found.iter().enumerate() {
            assert!((c.airspeed_m_s - end * i as f64 / f64::from(count - 1)).abs() < 1e-9, "{c:?}");
            assert!((c.rotation_rad_s - here.rotation_rad_s).abs() < 1e-9, "{c:?}");
        }
    }
}

/// Rings of the map stand in the middle of equal parts between hub and tip: 0.09 m and 0.76 m.
#[test]
fn the_rings_of_the_map_lie_evenly_between_hub_and_tip() {
    let job = on_a_stand(Setting::FullThrottle {});
    let map = Rig::new(&job).unwrap().map(0, Along::FullThrottle, 3, 5).unwrap();
    assert_eq!(map.radii_m.len(), 5);
    for (i, radius) in map.radii_m.iter().enumerate() {
        near(*radius, 0.09 + 0.67 * (0.1 + 0.2 * i as f64), 1e-9);
    }
}
