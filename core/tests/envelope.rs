//! The fit over the speed range: its figures hold together, its curves do not jump, and limits are told.

use spokeshave::air::Air;
use spokeshave::aircraft::drag_n;
use spokeshave::fit::{ceilings, crossings, envelope, matched, take_off};
use spokeshave::job::{Aircraft, DEMOS, Engine, FlightPoint, Job, PitchControl, PowerPoint, Setting};
use spokeshave::result::{Envelope, Note, State};
use spokeshave::rig::{Rig, air_of};
use spokeshave::rotor::Condition;

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
        // Two roads to one root, each left where its last step is small: 2e-6 comes out.
        let near = |a: f64, b: f64| assert!((a / b - 1.0).abs() < 5e-6, "{}: {a} {b}", p.airspeed_m_s);
        let f = p.full.as_ref().unwrap();
        near(f.rpm, throttled.rpm.unwrap());
        near(f.thrust_n, throttled.meeting.total_thrust_n.unwrap());
        near(f.power_w, throttled.figures.power_w.unwrap());
        let efficiency = |a: Option<f64>, b: &spokeshave::result::Figures| {
            assert_eq!(a.is_some(), b.efficiency.is_some(), "{}", p.airspeed_m_s);
            near(a.unwrap_or(1.0), b.efficiency.unwrap_or(1.0));
        };
        efficiency(f.efficiency, &throttled.figures);
        near(f.tip_mach, throttled.figures.tip_mach.unwrap());
        let l = p.level.as_ref().unwrap();
        near(l.rpm, level.rpm.unwrap());
        near(l.power_w, level.figures.power_w.unwrap());
        efficiency(l.efficiency, &level.figures);
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
            // A curve that fell evenly to nothing over 120 speeds would lose 0.8 % from one to the next.
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
            assert!((thrust / held.meeting.asked_n.unwrap() - 1.0).abs() < 1e-6);
        }
    }
    let marks = range(&job, 60).marks;
    assert!(marks.top_speed.unwrap().held_at_limit);
    assert!(marks.limit_rpm_from_m_s.unwrap() < marks.top_speed.unwrap().airspeed_m_s);
}

/// The range tells between which two speeds the limit rpm is reached; told is halfway, or its first speed where it
/// is reached there already.
#[test]
fn the_limit_rpm_is_reached_halfway_to_the_first_speed_held_at_it() {
    let mut partway = 0;
    for turn_deg in [0.0, -1.0, -2.0, -4.0, -8.0] {
        let mut job = demo(0);
        job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg };
        let Envelope { marks, points, .. } = range(&job, 60);
        let held = points.iter().position(|p| p.full.as_ref().is_some_and(|f| f.held_at_limit));
        let expected = held.map(|first| {
            partway += u32::from(first > 0);
            0.5 * (points[first.saturating_sub(1)].airspeed_m_s + points[first].airspeed_m_s)
        });
        let from = marks.limit_rpm_from_m_s;
        assert_eq!(from.is_some(), expected.is_some(), "{turn_deg}");
        let off = from.unwrap_or(1.0) - expected.unwrap_or(1.0);
        assert!(off.abs() < 1e-9, "{turn_deg}: {from:?} {expected:?}");
    }
    assert!(partway > 1);
}

/// At rest a multirotor flies: nothing there is slower than a stall that it does not have.
#[test]
fn a_multirotor_hovers_at_the_first_speed_of_its_range() {
    let job = demo(2);
    let hover = &range(&job, 12).points[0];
    assert_eq!((hover.airspeed_m_s, hover.level_state), (0.0, State::Ok));
    // 8 A h, of which four fifths are used, feed four motors.
    let drawn = Rig::new(&job).unwrap().point(0).unwrap().meeting.battery_current_a.unwrap();
    let expected = 3600.0 * 8.0 * 0.8 / (4.0 * drawn);
    let told = hover.level.as_ref().unwrap().endurance_s.unwrap();
    // Two roads to one root, as above.
    assert!((told / expected - 1.0).abs() < 5e-6, "{told} {expected}");
}

/// A propeller that passes the limit rpm at rest may take more with speed, and less again: held, matched and
/// held once more, and nowhere more power than the engine has.
#[test]
fn what_is_past_the_limit_at_rest_need_not_be_in_flight() {
    let mut job = demo(0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = Some(2800.0);
    let rig = Rig::new(&job).unwrap();
    let shaft = rig.shaft.as_ref().unwrap();
    let air = air_of(&full(None)).unwrap();
    let found = range(&job, 60);
    let told: Vec<_> = found.points.iter().filter_map(|p| p.full.as_ref()).collect();
    for f in &told {
        let most = shaft.available_w(f.rpm, &air).unwrap();
        assert!(f.power_w <= most * (1.0 + 1e-6), "{} of {most} W at {} rpm", f.power_w, f.rpm);
        // Met by a root, which leaves 1e-7.
        assert!(f.held_at_limit || (f.power_w / most - 1.0).abs() < 1e-6, "{f:?}");
    }
    let held: Vec<bool> = told.iter().map(|f| f.held_at_limit).collect();
    let first_matched = held.iter().position(|h| !h).unwrap();
    let last_matched = held.iter().rposition(|h| !h).unwrap();
    assert!(first_matched > 0 && last_matched + 1 < held.len(), "{held:?}");
    assert!(held[first_matched..=last_matched].iter().all(|h| !h), "{held:?}");
    // The line of the departure map is the same.
    let at = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: 280.0, turn_rad: 0.0 };
    let line = spokeshave::fit::line(&rig, &at, 60);
    let least = line.iter().map(|c| c.rotation_rad_s).fold(f64::INFINITY, f64::min);
    assert!(least < 0.98 * line[0].rotation_rad_s, "{least} {}", line[0].rotation_rad_s);
}

/// What is longest or steepest does not depend on where the points happen to lie.
#[test]
fn marks_do_not_depend_on_the_count_of_speeds() {
    let mut compared = 0;
    for index in 0..3 {
        let [few, many] = [20, 90].map(|count| range(&demo(index), count).marks);
        let pairs = [
            (few.best_endurance, many.best_endurance),
            (few.best_angle_of_climb, many.best_angle_of_climb),
            (few.best_rate_of_climb, many.best_rate_of_climb),
            (few.best_range, many.best_range),
        ];
        for (few, many) in pairs {
            assert_eq!(few.is_some(), many.is_some(), "{index}: {few:?} {many:?}");
            if let (Some(few), Some(many)) = (few, many) {
                compared += 1;
                // What a parabola through three of twenty speeds leaves of a flat top: 7e-4 comes out.
                assert!((few.value / many.value - 1.0).abs() < 1e-3, "{index}: {few:?} {many:?}");
            }
        }
    }
    assert!(compared >= 6, "{compared}");
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
    // Light enough to climb, but with a fast stall: what lies below it is marked.
    let Some(Aircraft::Aeroplane(a)) = &mut stalls.aircraft else { panic!("an aeroplane") };
    (a.mass_kg, a.cl_max) = (430.0, Some(0.2));
    let hasty = range(&stalls, 30);
    assert!(hasty.speeds.unwrap().stall_m_s.unwrap() < 57.0 && hasty.marks.top_speed.is_some());
    let slow = hasty.points.iter().filter(|p| p.airspeed_m_s < 50.0 && p.level.is_some());
    assert!(slow.into_iter().all(|p| p.level_state == State::BelowStall));
    let climbs = found.points.iter().filter_map(|p| p.full.as_ref()?.rate_of_climb_m_s);
    assert!(climbs.into_iter().all(|c| c < 0.0));
}

#[test]
fn take_off_lies_between_closed_forms() {
    let job = demo(0);
    let rig = Rig::new(&job).unwrap();
    let found = range(&job, 60);
    let t = take_off(&rig, &found).unwrap();
    // With constant net thrust the roll is m V²/2F: the greatest net thrust is at rest, the least at
    // lift-off.
    let thrust = |v: f64| {
        let p = found
            .points
            .iter()
            .min_by(|a, b| (a.airspeed_m_s - v).abs().total_cmp(&(b.airspeed_m_s - v).abs()));
        p.unwrap().full.as_ref().unwrap().thrust_n
    };
    let v = t.lift_off_m_s;
    let friction = t.rolling_friction * 430.0 * 9.806_65;
    let drag = 0.5 * 1.225 * v * v * 11.5 * 0.034;
    let roll = |net: f64| 430.0 * v * v / (2.0 * net);
    let (shortest, longest) = (roll(thrust(0.0) - friction), roll(thrust(v) - friction - drag));
    assert!(shortest < t.ground_roll_m && t.ground_roll_m < 1.02 * longest, "{t:?} {shortest} {longest}");
    assert!(t.distance_to_15_m > t.ground_roll_m + 15.0);
    let mut heavy = job.clone();
    let Some(Aircraft::Aeroplane(a)) = &mut heavy.aircraft else { panic!("an aeroplane") };
    a.mass_kg *= 1.2;
    let heavier = take_off(&Rig::new(&heavy).unwrap(), &range(&heavy, 60)).unwrap();
    assert!(heavier.ground_roll_m > 1.3 * t.ground_roll_m, "mass counts more than once");
}

#[test]
fn at_the_service_ceiling_the_best_climb_is_half_a_metre_per_second() {
    let job = demo(0);
    let rig = Rig::new(&job).unwrap();
    let found = ceilings(&rig, 0.0).unwrap();
    let (service, absolute) = (found.service_m.unwrap(), found.absolute_m.unwrap());
    assert!(service < absolute && absolute < 12_000.0, "{service} {absolute}");
    let mut there = full(None);
    for (height, climb) in [(service, 0.5), (absolute, 0.0)] {
        there.altitude_m = height;
        let got = envelope(&rig, &there, 80, &[]).unwrap();
        let best =
            got.points.iter().filter_map(|p| p.full.as_ref()?.rate_of_climb_m_s).fold(f64::MIN, f64::max);
        // A ceiling is sought to half a metre, in which the climb falls by 3e-4 m/s.
        assert!((best - climb).abs() < 5e-4, "{best} at {height}");
    }
}

/// Slower than the stall nothing climbs: a ceiling comes from the speeds that the wing carries, as fast as
/// they may be.
#[test]
fn ceilings_are_those_of_the_speeds_that_are_flown() {
    let mut stalls = demo(0);
    let Some(Aircraft::Aeroplane(a)) = &mut stalls.aircraft else { panic!("an aeroplane") };
    a.cl_max = Some(0.25);
    for job in [demo(0), demo(1), stalls] {
        let rig = Rig::new(&job).unwrap();
        let found = ceilings(&rig, 0.0).unwrap();
        let best = |altitude_m: f64| {
            let range = envelope(&rig, &FlightPoint { altitude_m, ..full(None) }, 160, &[]).unwrap();
            let stall = range.speeds.unwrap().stall_m_s.unwrap_or(0.0);
            let flown = range.points.iter().filter(|p| p.airspeed_m_s >= stall);
            let climb = flown.filter_map(|p| p.full.as_ref()?.rate_of_climb_m_s).fold(f64::MIN, f64::max);
            // The range's first speed may lie somewhat above the stall.
            let slowest = FlightPoint { altitude_m, ..full(Some(stall)) };
            let slowest = Job { flight_points: vec![slowest], ..job.clone() };
            let there = Rig::new(&slowest).unwrap().point(0).unwrap().meeting.rate_of_climb_m_s;
            climb.max(there.unwrap_or(f64::MIN))
        };
        let (got, expected) = (found.sea_level_climb_m_s.unwrap(), best(0.0));
        // Tops of parabolas through speeds of a different spacing: 1e-3 m/s comes out.
        assert!((got - expected).abs() < 2e-3, "{}: {got} {expected}", job.title);
        if let Some(service) = found.service_m {
            // As above, half a metre.
            assert!((best(service) - 0.5).abs() < 5e-4, "{}: {} at {service}", job.title, best(service));
        }
    }
}

#[test]
fn the_map_of_matched_points_is_the_envelope_at_each_height() {
    let rig = Rig::new(&demo(0)).unwrap();
    let speeds: Vec<f64> = (0..12).map(|i| 5.0 * f64::from(i)).collect();
    let map = matched(&rig, &[0.0, 1500.0, 3000.0], &speeds, 0.0).unwrap();
    for ((row, column), cell) in map.indexed_iter() {
        let mut job = demo(0);
        job.flight_points = vec![full(Some(speeds[column]))];
        job.flight_points[0].altitude_m = 1500.0 * row as f64;
        let expected = Rig::new(&job).unwrap().point(0).unwrap().rpm.unwrap();
        assert!((cell.as_ref().unwrap().rpm / expected - 1.0).abs() < 1e-6, "{row} {column}");
    }
    assert!(matched(&rig, &[30_000.0], &speeds, 0.0).is_err());
}

#[test]
fn where_engine_and_propeller_agree_more_than_once_the_highest_stable_rpm_counts() {
    let mut job = demo(0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    // A curve with a hollow: the demand, which rises with the cube of the rpm, meets it three times.
    let demand = |rpm: f64| 52_463.0 * (rpm / 3011.5).powi(3);
    for (p, share) in piston.full_throttle.iter_mut().zip([1.3, 0.9, 1.2, 0.8, 0.7]) {
        p.power_w = share * demand(p.rpm);
    }
    job.flight_points = vec![full(Some(0.0))];
    let rig = Rig::new(&job).unwrap();
    let air = air_of(&job.flight_points[0]).unwrap();
    let still = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: 1.0, turn_rad: 0.0 };
    let found = crossings(&rig, &still);
    let stable: Vec<bool> = found.iter().map(|c| c.stable).collect();
    assert_eq!(stable, [true, false, true], "{found:?}");
    let chosen: Vec<f64> = found.iter().filter(|c| c.chosen).map(|c| c.rpm).collect();
    let [chosen] = chosen[..] else { panic!("one is chosen: {found:?}") };
    assert!((chosen / rig.point(0).unwrap().rpm.unwrap() - 1.0).abs() < 1e-6);
}

#[test]
fn the_roll_is_that_of_thrust_less_drag_and_friction_step_by_step_in_time() {
    let job = demo(0);
    let rig = Rig::new(&job).unwrap();
    let found = range(&job, 60);
    let t = take_off(&rig, &found).unwrap();
    let known: Vec<(f64, f64)> =
        found.points.iter().filter_map(|p| Some((p.airspeed_m_s, p.full.as_ref()?.thrust_n))).collect();
    let thrust = |v: f64| {
        let i = known.partition_point(|p| p.0 <= v).clamp(1, known.len() - 1);
        let (a, b) = (known[i - 1], known[i]);
        a.1 + (b.1 - a.1) * (v - a.0) / (b.0 - a.0)
    };
    let (mut v, mut way, mut time) = (0.0, 0.0, 0.0);
    let step = 1e-3;
    while v < t.lift_off_m_s {
        let net = thrust(v) - 0.5 * 1.225 * v * v * 11.5 * 0.034 - t.rolling_friction * 430.0 * 9.806_65;
        let faster = v + step * net / 430.0;
        way += 0.5 * (v + faster) * step;
        time += step;
        v = faster;
    }
    // Here straight lines between sixty speeds for the curve through them: 5e-5 comes out.
    assert!((t.ground_roll_m / way - 1.0).abs() < 1e-4, "{t:?} {way}");
    assert!((t.ground_roll_s / time - 1.0).abs() < 1e-4, "{t:?} {time}");
    // From there energy: 15 m and the gain of speed, over what thrust and drag leave of the weight at both
    // ends.
    let Some(Aircraft::Aeroplane(a)) = &job.aircraft else { panic!("an aeroplane") };
    let air = Air::standard(0.0, 0.0).unwrap();
    let slope = |v: f64| (thrust(v) - drag_n(a, &air, v).unwrap()) / (430.0 * 9.806_65);
    let height = 15.0 + (t.screen_m_s.powi(2) - t.lift_off_m_s.powi(2)) / (2.0 * 9.806_65);
    let airborne = height / (0.5 * (slope(t.lift_off_m_s) + slope(t.screen_m_s)));
    assert!(((t.distance_to_15_m - t.ground_roll_m) / airborne - 1.0).abs() < 1e-4, "{t:?} {airborne}");
}

/// A blade whose tip passes the Mach numbers of note within the range.
#[test]
fn where_the_tip_passes_a_mach_number_it_has_it() {
    let mut job = fine();
    if let Some(Engine::Piston(engine)) = &mut job.engine {
        engine.max_rpm = None;
        engine.full_throttle.push(PowerPoint { rpm: 4200.0, power_w: 60_000.0 });
    }
    let passed = range(&job, 60).marks.tip_mach_from;
    assert!(!passed.is_empty());
    for mark in passed {
        job.flight_points = vec![full(Some(mark.airspeed_m_s))];
        let found = Rig::new(&job).unwrap().point(0).unwrap().figures.tip_mach.unwrap();
        // A straight line between two of sixty speeds: 2e-6 comes out.
        assert!((found / mark.tip_mach - 1.0).abs() < 1e-5, "{mark:?} {found}");
    }
}
