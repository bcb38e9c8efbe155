//! A constant-speed propeller over the speed range: governed, at its stops, held at the limit rpm.

use spokeshave::fit::{envelope, line};
use spokeshave::job::{DEMOS, Engine, FlightPoint, Job, PitchControl, Setting};
use spokeshave::result::{Envelope, State};
use spokeshave::rig::Rig;

fn full(airspeed_m_s: Option<f64>) -> FlightPoint {
    let setting = Setting::FullThrottle {};
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }
}

fn with(pitch_control: PitchControl) -> Job {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    job.propeller.pitch_control = pitch_control;
    job
}

fn governed(rpm: f64, turn_min_deg: f64, turn_max_deg: f64) -> Job {
    with(PitchControl::ConstantSpeed { rpm, turn_min_deg, turn_max_deg })
}

fn turned(turn_deg: f64) -> Job {
    with(PitchControl::GroundAdjustable { turn_deg })
}

fn range(job: &Job) -> Envelope {
    envelope(&Rig::new(job).unwrap(), &full(None), 60, &[]).unwrap()
}

fn held(job: &Job, airspeed_m_s: f64) -> (f64, f64, f64) {
    let mut job = job.clone();
    job.flight_points = vec![full(Some(airspeed_m_s))];
    let p = Rig::new(&job).unwrap().point(0).unwrap();
    assert_eq!(p.state, State::OverLimitRpm);
    let held = p.held.unwrap();
    (held.rpm, held.turn_deg, held.figures.thrust_n.unwrap())
}

#[test]
fn each_speed_is_the_answer_of_a_flight_point_at_stops_and_between() {
    let mut job = governed(2850.0, 0.0, 1.0);
    let found = range(&job);
    let turns: Vec<f64> = found.points.iter().filter_map(|p| Some(p.full.as_ref()?.turn_deg)).collect();
    let between = turns.iter().filter(|t| **t > 0.01 && **t < 0.99).count();
    let (fine, coarse) =
        (turns.iter().filter(|t| **t == 0.0).count(), turns.iter().filter(|t| **t > 0.999).count());
    assert!(between > 3 && fine > 3 && coarse > 3, "{fine} {between} {coarse}");
    for p in found.points.iter().filter(|p| p.full.is_some()) {
        job.flight_points = vec![full(Some(p.airspeed_m_s))];
        let (f, alone) = (p.full.as_ref().unwrap(), Rig::new(&job).unwrap().point(0).unwrap());
        // Two roads to one root, each left where its last step is small: 8e-7 comes out.
        let near = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 2e-6, "{}: {a} {b}", p.airspeed_m_s);
        if !f.held_at_limit {
            near(f.rpm, alone.rpm.unwrap());
            near(f.thrust_n, alone.meeting.total_thrust_n.unwrap());
        }
    }
}

#[test]
fn at_a_stop_it_is_the_propeller_turned_to_that_stop() {
    let at_30 = |mut job: Job| {
        job.flight_points = vec![full(Some(30.0))];
        let p = Rig::new(&job).unwrap().point(0).unwrap();
        (p.rpm.unwrap(), p.figures.thrust_n.unwrap())
    };
    let ((rpm, thrust), (of_rpm, of_thrust)) = (at_30(governed(2850.0, 0.0, 1.0)), at_30(turned(0.0)));
    assert!(rpm < 2850.0 && (rpm / of_rpm - 1.0).abs() < 1e-12 && (thrust / of_thrust - 1.0).abs() < 1e-12);
}

#[test]
fn past_its_coarse_stop_it_is_held_at_the_limit_rpm_there() {
    let (rpm, turn, thrust) = held(&governed(2800.0, -10.0, -8.0), 50.0);
    assert!((rpm - 3300.0).abs() < 1e-9 && (turn + 8.0).abs() < 1e-9);
    let (_, _, same) = held(&turned(-8.0), 50.0);
    assert!((thrust / same - 1.0).abs() < 1e-9);
}

/// A governor set above the limit rpm does not keep the engine from passing it: its blades wait at the fine
/// stop.
#[test]
fn a_governor_set_past_the_limit_rpm_is_not_trusted() {
    let mut job = governed(3100.0, -8.0, 10.0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = Some(2600.0);
    let (rpm, turn, _) = held(&job, 30.0);
    assert!((rpm - 2600.0).abs() < 1e-9 && (turn + 8.0).abs() < 1e-9);
    let found = range(&job);
    assert!(found.points.iter().filter_map(|p| p.full.as_ref()).all(|f| f.rpm <= 2600.0 + 1e-6));
}

/// A limit that is not quite itself once it is turned into radians per second and back (2950 and 3250 rpm come
/// out above, 3300 does not) is still no limit passed.
#[test]
fn a_governor_at_the_limit_rpm_holds_it() {
    for limit in [2950.0, 3250.0, 3300.0] {
        let mut job = governed(limit, -10.0, 12.0);
        let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
        piston.max_rpm = Some(limit);
        let settings = [Setting::FullThrottle {}, Setting::Throttle { fraction: 0.7 }];
        let named =
            |setting: Setting| FlightPoint { name: format!("{setting:?}"), setting, ..full(Some(40.0)) };
        job.flight_points = settings.map(named).to_vec();
        assert_eq!(job.check(), vec![]);
        let rig = Rig::new(&job).unwrap();
        for i in 0..2 {
            let p = rig.point(i).unwrap();
            assert_eq!(p.state, State::Ok, "{limit}: {p:?}");
            assert!((p.rpm.unwrap() - limit).abs() < 1e-9 && p.held.is_none(), "{limit}: {p:?}");
            assert!(p.notes.iter().all(|note| !note.of_the_whole()), "{limit}: {:?}", p.notes);
            assert!(p.meeting.fuel_kg_per_h.is_some(), "{limit}: {p:?}");
        }
        let range = range(&job);
        let flown = range.points.iter().filter(|p| (30.0..50.0).contains(&p.airspeed_m_s));
        flown.for_each(|p| assert_eq!(p.full_state, State::Ok, "{limit}: {p:?}"));
    }
}

/// A governor a twentieth above the limit, which no checked job has, is not held.
#[test]
fn a_governor_a_little_past_the_limit_rpm_is_not_trusted_either() {
    let mut job = governed(2730.0, -8.0, 10.0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = Some(2600.0);
    let (rpm, ..) = held(&job, 30.0);
    assert!((rpm - 2600.0).abs() < 1e-9, "{rpm}");
}

#[test]
fn the_line_of_the_map_stays_at_the_coarse_stop_past_the_limit_rpm() {
    let mut job = governed(2800.0, -5.0, 1.0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = Some(3010.0);
    job.flight_points = vec![full(Some(30.0))];
    let rig = Rig::new(&job).unwrap();
    let at = rig.condition(0).unwrap();
    let last = *line(&rig, &at, 30).last().unwrap();
    assert!(at.turn_rad < 0.0, "between its stops at the flight point");
    assert!((60.0 * last.turns_per_s() - 3010.0).abs() < 1e-6, "held at the end");
    assert!((last.turn_rad.to_degrees() - 1.0).abs() < 1e-6, "{}", last.turn_rad.to_degrees());
}
