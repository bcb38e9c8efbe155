//! The fit over the speed range: its figures hold together, its curves do not jump, and limits are told.

use spokeshave::fit::envelope;
use spokeshave::job::{Aircraft, DEMOS, Engine, FlightPoint, Job, Setting};
use spokeshave::result::{Envelope, Note, State};
use spokeshave::rig::Rig;

fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

fn full(airspeed_m_s: Option<f64>) -> FlightPoint {
    let setting = Setting::FullThrottle {};
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }
}

fn range(job: &Job, count: u32) -> Envelope {
    envelope(&Rig::new(job).unwrap(), &full(None), count, &[0.5, 0.75]).unwrap()
}

/// The demo aeroplane with its blades so fine that full throttle passes the limit rpm in flight.
fn fine() -> Job {
    let mut job = demo(0);
    job.propeller.stations.iter_mut().for_each(|s| s.angle_deg = s.angle_deg.map(|a| a - 8.0));
    job
}

#[test]
fn each_speed_is_the_answer_of_a_flight_point() {
    let mut job = demo(0);
    let found = range(&job, 40);
    for p in found.points.iter().step_by(3).filter(|p| p.level_state == State::Ok) {
        job.flight_points = vec![full(Some(p.airspeed_m_s)), full(Some(p.airspeed_m_s))];
        job.flight_points[1].setting = Setting::Level {};
        let rig = Rig::new(&job).unwrap();
        let (throttled, level) = (rig.point(0).unwrap(), rig.point(1).unwrap());
        let near = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 1e-5, "{}: {a} {b}", p.airspeed_m_s);
        let f = p.full.as_ref().unwrap();
        near(f.rpm, throttled.rpm.unwrap());
        near(f.thrust_n, throttled.meeting.total_thrust_n.unwrap());
        near(f.power_w, throttled.figures.power_w.unwrap());
        let l = p.level.as_ref().unwrap();
        near(l.rpm, level.rpm.unwrap());
        near(l.power_w, level.figures.power_w.unwrap());
        assert_eq!(
            l.power_share.is_some(),
            level.meeting.power_share.is_some(),
            "below the curve there is none"
        );
        near(l.power_share.unwrap_or(1.0), level.meeting.power_share.unwrap_or(1.0));
        near(l.fuel_kg_per_h.unwrap(), level.meeting.fuel_kg_per_h.unwrap());
    }
}

#[test]
fn no_curve_jumps() {
    for job in [demo(0), demo(1), demo(2), fine()] {
        let found = range(&job, 120);
        let rpm: Vec<f64> = found.points.iter().filter_map(|p| Some(p.full.as_ref()?.rpm)).collect();
        let thrust: Vec<f64> = found.points.iter().filter_map(|p| Some(p.full.as_ref()?.thrust_n)).collect();
        assert!(rpm.len() > 100, "{}: {} answers", job.title, rpm.len());
        for (name, curve) in [("rpm", &rpm), ("thrust", &thrust)] {
            let most = curve.iter().fold(0.0_f64, |m, v| m.max(v.abs()));
            for w in curve.windows(2) {
                assert!((w[1] - w[0]).abs() < 0.03 * most, "{}: {name} {w:?}", job.title);
            }
        }
    }
}

#[test]
fn the_marks_are_the_best_of_the_range() {
    let found = range(&demo(0), 60);
    let marks = &found.marks;
    let speeds = found.speeds.unwrap();
    let best = |of: &dyn Fn(usize) -> Option<f64>| (0..60).filter_map(of).fold(f64::MIN, f64::max);
    let climb = marks.best_rate_of_climb.unwrap();
    let of = |i: usize| found.points[i].full.as_ref()?.rate_of_climb_m_s;
    assert!(climb.value >= best(&of) && climb.value < 1.01 * best(&of));
    let far = marks.best_range.unwrap();
    let of = |i: usize| found.points[i].level.as_ref()?.range_m;
    assert!(far.value >= (1.0 - 1e-6) * best(&of) && far.value < 1.01 * best(&of));
    // A propeller's efficiency moves both only somewhat from the speeds of the polar alone.
    assert!((far.airspeed_m_s / speeds.least_drag_m_s - 1.0).abs() < 0.2);
    let long = marks.best_endurance.unwrap();
    assert!((long.airspeed_m_s / speeds.least_power_m_s - 1.0).abs() < 0.2);
    assert!(long.airspeed_m_s < far.airspeed_m_s);
    assert!(marks.best_angle_of_climb.unwrap().airspeed_m_s < climb.airspeed_m_s);
}

#[test]
fn past_the_limit_rpm_the_figure_held_at_it_is_given_beside_the_state() {
    let mut job = fine();
    job.flight_points = vec![full(None), full(Some(50.0))];
    let rig = Rig::new(&job).unwrap();
    for i in 0..2 {
        let p = rig.point(i).unwrap();
        assert_eq!(p.state, State::OverLimitRpm, "the setting asked for has no answer");
        assert!(p.rpm.is_none() && p.figures.thrust_n.is_none());
        assert!(p.notes.contains(&Note::HeldAtLimitRpm));
        let held = p.held.unwrap();
        assert!((held.rpm - 3300.0).abs() < 1e-9);
        assert!(held.meeting.power_share.unwrap() < 1.0);
        if i == 0 {
            let thrust = held.meeting.total_thrust_n.unwrap();
            assert!((thrust / held.meeting.asked_n.unwrap() - 1.0).abs() < 1e-3);
        }
    }
    let marks = range(&job, 60).marks;
    assert!(marks.top_speed.unwrap().held_at_limit);
    assert!(marks.limit_rpm_from_m_s.unwrap() < marks.top_speed.unwrap().airspeed_m_s);
}

#[test]
fn what_cannot_be_is_told_and_gives_no_figures() {
    let mut weak = demo(0);
    let Some(Engine::Piston(piston)) = &mut weak.engine else { panic!("a piston engine") };
    piston.full_throttle.iter_mut().for_each(|p| p.power_w /= 20.0);
    assert!(envelope(&Rig::new(&weak).unwrap(), &full(None), 60, &[]).is_none());
    let mut stalls = demo(0);
    let Some(Aircraft::Aeroplane(a)) = &mut stalls.aircraft else { panic!("an aeroplane") };
    (a.mass_kg, a.cl_max) = (4_000.0, Some(0.2));
    let found = range(&stalls, 30);
    assert!(found.marks.top_speed.is_none() && found.marks.best_range.is_none());
    let climbs = found.points.iter().filter_map(|p| p.full.as_ref()?.rate_of_climb_m_s);
    assert!(climbs.into_iter().all(|c| c < 0.0));
}
