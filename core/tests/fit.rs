//! Where propeller, engine and aircraft meet: balances hold, and what has no answer says why.

use spokeshave::air::Air;
use spokeshave::aircraft::drag_n;
use spokeshave::fit::{condition, highest_rpm, offer, slower_than_stall, spare};
use spokeshave::job::{Aircraft, DEMOS, Engine, FlightPoint, Job, PitchControl, PowerPoint, Setting};
use spokeshave::result::{Limit, Note, PointResult, State};
use spokeshave::rig::{Rig, air_of, rotation_rad_s};
use spokeshave::rotor::Condition;
use spokeshave::shape::{brief, kept};

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

/// The demo's engine may turn at 3300 rpm and gives less than 60 kW anywhere: what is asked beyond that is
/// told, and burns no fuel.
#[test]
fn a_setting_beyond_the_engine_is_noted_and_tells_no_fuel() {
    let beyond = |p: &PointResult, note| p.state == State::Ok && p.notes.contains(&note);
    let fast = at(&demo(0), Some(40.0), Setting::Rpm { rpm: 3600.0 });
    assert!(beyond(&fast, Note::PastLimitRpm) && beyond(&fast, Note::MoreThanEngine), "{:?}", fast.notes);
    assert!(fast.meeting.fuel_kg_per_h.is_none() && fast.figures.power_w.unwrap() > 60_000.0);
    let strong = at(&demo(0), Some(40.0), Setting::Power { power_w: 62_000.0 });
    assert!(beyond(&strong, Note::MoreThanEngine) && strong.meeting.fuel_kg_per_h.is_none());
    let mild = at(&demo(0), Some(40.0), Setting::Rpm { rpm: 2600.0 });
    assert!(mild.notes.iter().all(|note| !note.of_the_whole()) && mild.meeting.fuel_kg_per_h.unwrap() > 0.0);
    let full = at(&demo(0), Some(40.0), Setting::FullThrottle {});
    assert!(full.notes.iter().all(|note| !note.of_the_whole()) && full.meeting.fuel_kg_per_h.unwrap() > 0.0);
    let mut job = demo(0);
    job.flight_points[2].setting = Setting::Rpm { rpm: 3600.0 };
    let rig = Rig::new(&job).unwrap();
    assert!(brief(&rig, &rig.job.flight_points[2]).endurance_s.is_none());
}

#[test]
fn an_empty_tank_lasts_for_no_time_that_is_told() {
    let mut job = demo(0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.fuel_kg = Some(0.0);
    let marks = Rig::new(&job).unwrap().fit(0, 20).unwrap().envelope.marks;
    assert!(marks.best_endurance.is_none() && marks.best_range.is_none());
}

/// Weight by hand: 40 kg at 9.80665 m/s².
#[test]
fn a_multirotor_too_heavy_to_hover_is_told_by_how_much() {
    let mut job = demo(2);
    let Some(Aircraft::Multirotor(m)) = &mut job.aircraft else { panic!("a multirotor") };
    m.mass_kg = 40.0;
    let rig = Rig::new(&job).unwrap();
    let range = rig.fit(0, 20).unwrap().envelope;
    let (short, thrust) = (range.hover_short_n().unwrap(), range.standing.as_ref().unwrap().thrust_n);
    assert!((short + thrust - 40.0 * 9.806_65).abs() < 1e-6, "{short} {thrust}");
    let power = kept(&rig).into_iter().find(|m| m.limit == Limit::EnginePower).unwrap();
    let full = range.standing.unwrap().power_w;
    assert!(power.allowed.unwrap() >= full && power.allowed < power.found, "{power:?} {full}");
    assert!(power.share < 0.0);
    assert!(Rig::new(&demo(2)).unwrap().fit(0, 20).unwrap().envelope.hover_short_n().is_none());
    assert!(Rig::new(&demo(0)).unwrap().fit(0, 20).unwrap().envelope.hover_n().is_none());
}

/// An engine whose power falls before its limit: past the limit, and at the end of its power, each figure is
/// told on its own side of what bounds it.
#[test]
fn a_limit_is_broken_exactly_where_its_figures_say_so() {
    let mut job = demo(0);
    let Some(Engine::Piston(engine)) = &mut job.engine else { panic!("a piston engine") };
    engine.full_throttle.push(PowerPoint { rpm: 3400.0, power_w: 20_000.0 });
    engine.max_rpm = Some(3350.0);
    for rpm in [2600.0, 3300.0, 3350.0, 3360.0, 3600.0] {
        job.flight_points[2].setting = Setting::Rpm { rpm };
        let rig = Rig::new(&job).unwrap();
        let told =
            kept(&rig).into_iter().filter(|m| matches!(m.limit, Limit::EnginePower | Limit::EngineRpm));
        for m in told {
            let (found, allowed) = (m.found.unwrap(), m.allowed.unwrap());
            assert_eq!(m.share < 0.0, found > allowed, "{rpm}: {m:?}");
        }
    }
    let spared = |rpm: f64, taken_w: f64| {
        let rig = Rig::new(&job).unwrap();
        let air = air_of(&job.flight_points[2]).unwrap();
        let turning = rpm * std::f64::consts::TAU / 60.0;
        let at = Condition { air, airspeed_m_s: 40.0, rotation_rad_s: turning, turn_rad: 0.0 };
        let given = rig.shaft.as_ref().unwrap().power_w(rpm, &air, 1.0);
        (spare(&rig, &at, taken_w).unwrap(), given)
    };
    let (here, given) = spared(2600.0, 30_000.0);
    assert!(
        (here.power_share - (given / 30_000.0 - 1.0)).abs() < 1e-12 && (here.given_w - given).abs() < 1e-9
    );
    assert!((here.rpm_share - (1.0 - 2600.0 / 3350.0)).abs() < 1e-12, "{here:?}");
}

/// Past the limit only full throttle is drawn back; what is asked otherwise has no figure held at the limit.
#[test]
fn only_full_throttle_is_told_held_at_the_limit_rpm() {
    let mut fine = demo(0);
    fine.propeller.stations.iter_mut().for_each(|s| s.angle_deg = s.angle_deg.map(|a| a - 8.0));
    let held = at(&fine, Some(50.0), Setting::FullThrottle {}).held.unwrap();
    // Held at the limit it is not past it: the engine gives it, and burns fuel for it.
    let power = held.figures.power_w.unwrap();
    near(held.meeting.fuel_kg_per_h, 0.31 * power / 1000.0, 1e-9);
    let part = at(&fine, Some(50.0), Setting::Throttle { fraction: 0.95 });
    assert_eq!((part.state, part.held.is_none()), (State::OverLimitRpm, true));
    let level = at(&fine, Some(58.0), Setting::Level {});
    assert_eq!((level.state, level.held.is_none()), (State::OverLimitRpm, true), "{level:?}");
}

/// Standing still is slower than the stall only where it is to be level.
#[test]
fn at_rest_an_aeroplane_is_slower_than_its_stall_only_where_it_is_to_be_level() {
    let slow = |airspeed_m_s, setting| {
        let point =
            FlightPoint { name: String::new(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting };
        slower_than_stall(&Rig::new(&demo(0)).unwrap(), &point, &air_of(&point).unwrap())
    };
    assert!(slow(Some(0.0), Setting::Level {}));
    // The stall: sqrt(2 · 430 · 9.80665/(1.225 · 11.5 · 1.6)) = 19.34 m/s.
    for (v, slower) in [(0.0, false), (0.1, true), (19.3, true), (19.4, false)] {
        assert_eq!(slow(Some(v), Setting::FullThrottle {}), slower, "{v}");
        assert_eq!(slow(Some(v), Setting::Rpm { rpm: 2500.0 }), slower, "{v}");
    }
}

/// A twentieth more than the engine gives, or than it may turn, is as much beyond it as twice as much.
#[test]
fn a_little_beyond_the_engine_is_noted_too() {
    let note = |rpm: f64, taken: f64| {
        let rig = Rig::new(&demo(0)).unwrap();
        let air = Air::standard(0.0, 0.0).unwrap();
        let at = Condition { air, airspeed_m_s: 40.0, rotation_rad_s: rotation_rad_s(rpm), turn_rad: 0.0 };
        let given = rig.shaft.as_ref().unwrap().power_w(rpm, &air, 1.0);
        spokeshave::fit::beyond_engine(&rig, &at, taken * given)
    };
    assert_eq!(note(2800.0, 1.0), []);
    assert_eq!(note(2800.0, 1.05), [Note::MoreThanEngine]);
    assert_eq!(note(3300.0, 1.0), []);
    assert_eq!(note(3300.0 * 1.05, 0.99), [Note::PastLimitRpm]);
    assert_eq!(note(3300.0 * 1.05, 1.05), [Note::PastLimitRpm, Note::MoreThanEngine]);
}

/// At its limit an engine gives what it gives there, though it may give more at fewer rpm; a limit that is not
/// quite itself in radians per second (3350 rpm is, 3250 comes out above) is no limit passed.
#[test]
fn at_the_limit_rpm_an_engine_gives_what_it_gives_there() {
    let mut job = demo(0);
    let Some(Engine::Piston(engine)) = &mut job.engine else { panic!("a piston engine") };
    engine.full_throttle.push(PowerPoint { rpm: 3400.0, power_w: 20_000.0 });
    engine.full_throttle[4].power_w = 40_000.0;
    let air = Air::standard(0.0, 0.0).unwrap();
    for limit in [3250.0, 3350.0] {
        let Some(Engine::Piston(engine)) = &mut job.engine else { panic!("a piston engine") };
        engine.max_rpm = Some(limit);
        let rig = Rig::new(&job).unwrap();
        let at = Condition { air, airspeed_m_s: 40.0, rotation_rad_s: rotation_rad_s(limit), turn_rad: 0.0 };
        let given = rig.shaft.as_ref().unwrap().power_w(limit, &air, 1.0);
        assert!(given < 55_000.0, "less than at 3200 rpm");
        let spared = spare(&rig, &at, 30_000.0).unwrap();
        near(Some(spared.given_w), given, 1e-9);
        near(Some(spared.power_share), given / 30_000.0 - 1.0, 1e-9);
    }
}

/// Past its limit, where the curve goes on, an engine is taken for no more than it gives up to the limit.
#[test]
fn past_the_limit_rpm_an_engine_is_taken_for_the_most_it_gives_up_to_it() {
    let mut job = demo(0);
    let Some(Engine::Piston(engine)) = &mut job.engine else { panic!("a piston engine") };
    engine.max_rpm = Some(2800.0);
    let rig = Rig::new(&job).unwrap();
    let air = Air::standard(0.0, 0.0).unwrap();
    let at = Condition { air, airspeed_m_s: 40.0, rotation_rad_s: rotation_rad_s(2900.0), turn_rad: 0.0 };
    // The curve has 53 kW at 2800 rpm and rises; the density at sea level is 1.5e-8 above the nominal one.
    near(Some(spare(&rig, &at, 30_000.0).unwrap().given_w), 53_000.0, 1e-7);
}

/// Offer and demand over rpm of a geared engine at height, each by its own law.
#[test]
fn the_offer_is_the_engines_at_each_rpm_in_both_airs() {
    let mut job = demo(0);
    let Some(Engine::Piston(engine)) = &mut job.engine else { panic!("a piston engine") };
    engine.gear_ratio = 1.25;
    job.flight_points = vec![FlightPoint {
        name: "high".into(),
        altitude_m: 2500.0,
        isa_offset_k: 0.0,
        airspeed_m_s: Some(35.0),
        setting: Setting::FullThrottle {},
    }];
    let rig = Rig::new(&job).unwrap();
    let found = offer(&rig, 0, 14);
    assert_eq!(found.len(), 14);
    let air = Air::standard(2500.0, 0.0).unwrap();
    let sigma = air.density_ratio();
    for (i, o) in found.iter().enumerate() {
        // The curve is given from 2000 to 3300 rpm of the engine.
        near(Some(o.engine_rpm), 2000.0 + 100.0 * i as f64, 1e-12);
        near(Some(o.propeller_rpm), o.engine_rpm / 1.25, 1e-12);
        // A. W. Gagg and E. V. Ferrar, 1934: σ − (1 − σ)/7.55; at sea level σ is 1.5e-8 above 1.
        near(Some(o.offered_w), o.at_sea_level_w * (sigma - (1.0 - sigma) / 7.55), 1e-7);
        let known = [(2000.0, 36_000.0), (2400.0, 45_000.0), (2800.0, 53_000.0), (3200.0, 58_000.0)];
        let at_a_point = known.iter().find(|k| (o.engine_rpm - k.0).abs() < 1e-6);
        if let Some(k) = at_a_point {
            near(Some(o.at_sea_level_w), k.1, 1e-7);
        }
        let rotation_rad_s = rotation_rad_s(o.propeller_rpm);
        let at = Condition { air, airspeed_m_s: 35.0, rotation_rad_s, turn_rad: 0.0 };
        // An element's balance is sought, so that the last digits of the rpm count: 2e-8 comes out.
        near(Some(o.taken_w), rig.rotor.loads(&at).torque_n_m * rotation_rad_s, 1e-7);
    }
    // 2000 of the propeller are 2500 of the engine.
    near(at(&job, Some(35.0), Setting::Rpm { rpm: 2000.0 }).meeting.engine_rpm, 2500.0, 1e-12);
    // Two are the least that make a line: the ends.
    let ends: Vec<f64> = offer(&rig, 0, 0).iter().map(|o| o.engine_rpm.round()).collect();
    assert_eq!(ends, [2000.0, 3300.0]);
    near(Some(highest_rpm(rig.shaft.as_ref().unwrap())), 3300.0 / 1.25, 1e-12);
}

/// Rotation is looked for from a hundredth of a tip at Mach 1.2 on: power that is taken there is met by that rpm,
/// power that is taken by less is out of reach.
#[test]
fn what_hardly_turns_the_propeller_is_out_of_reach() {
    let mut job = demo(0);
    let rig = Rig::new(&job).unwrap();
    let air = Air::standard(0.0, 0.0).unwrap();
    let fastest = 1.2 * air.sound_speed_m_s / rig.rotor.blade.radius_m;
    for (share, met) in [(0.008, false), (0.0095, false), (0.0105, true), (0.02, true)] {
        let still = Condition { air, airspeed_m_s: 0.0, rotation_rad_s: share * fastest, turn_rad: 0.0 };
        let power_w = rig.rotor.loads(&still).torque_n_m * still.rotation_rad_s;
        job.flight_points[0].setting = Setting::Power { power_w };
        let found = condition(&rig, &job.flight_points[0], air);
        let turns = found.map(|c| c.rotation_rad_s / still.rotation_rad_s - 1.0);
        // A last step of 3e-5 of the range, of which a hundredth is left: 3e-5 of a hundredth of the range.
        assert_eq!(
            turns.map(|off| off.abs() < 3e-5),
            if met { Ok(true) } else { Err(State::OutOfReach) },
            "{share}"
        );
    }
}
