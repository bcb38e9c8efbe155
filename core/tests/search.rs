//! The search for the best blade: it does not depend on where it starts, keeps its limits, and says what is
//! in the way.

use std::ops::ControlFlow;

use spokeshave::job::{Aim, DEMOS, Figure, Held, Job, Limits, RpmLimit, Wishes};
use spokeshave::result::{Limit, Search, Stopped};
use spokeshave::rig::Rig;
use spokeshave::shape::{FREE, ShapeError, Shaped, Wish, brief, search};
use spokeshave::wood::least_margin;

fn demo(index: usize) -> Rig {
    Rig::new(&Job::from_json(DEMOS[index].json).unwrap()).unwrap()
}

fn found(rig: &Rig, wish: &Wish) -> Result<Shaped<Search>, ShapeError> {
    search(rig, wish, &mut |_| ControlFlow::Continue(()))
}

fn aim(flight_point: &str, figure: Figure) -> Aim {
    Aim { flight_point: flight_point.into(), figure, weight: 1.0 }
}

const STARTS: [[f64; FREE]; 3] =
    [[0.0; FREE], [0.5, -0.4, 0.3, -0.3, 0.2, 0.4, -0.4, 0.3], [-0.5, 0.4, -0.3, 0.4, -0.4, -0.5, 0.5, -0.4]];

/// The gain is a mean of logarithms of ratios, so that the results of two searches differ by the ratio of
/// theirs.
#[test]
fn three_starts_come_to_the_same_result_within_three_parts_in_a_thousand() {
    for (d, demo_job) in DEMOS.iter().enumerate() {
        let rig = demo(d);
        let mut wish = Wish::of(&rig);
        if d == 0 {
            wish.limits =
                Limits { standing_rpm_least: Some(2600.0), tip_mach_most: Some(0.75), ..Limits::default() };
        }
        let mut ratios = Vec::new();
        for start in STARTS {
            wish.start = start;
            let result = found(&rig, &wish).unwrap().result;
            assert_eq!(result.stopped, Stopped::AtRest, "{}", demo_job.name);
            assert!(result.margins.iter().all(|m| m.share > -1e-5), "{:?}", result.margins);
            ratios.push(1.0 + result.gain);
        }
        let (low, high) = ratios.iter().fold((f64::INFINITY, 0.0f64), |(l, h), r| (l.min(*r), h.max(*r)));
        assert!(low > 1.0 && high / low < 1.003, "{}: {ratios:?}", demo_job.name);
    }
}

/// The figures told are those of the blade, read back from its own file and analysed by itself.
#[test]
fn what_is_found_is_there_when_the_blade_is_analysed_anew() {
    let rig = demo(0);
    let aims = vec![aim("Cruise", Figure::Efficiency), aim("Climb", Figure::RateOfClimbMS)];
    let shaped = found(&rig, &Wish { aims, ..Wish::of(&rig) }).unwrap();
    let read_back = Rig::new(&Job::from_json(&shaped.job.to_json()).unwrap()).unwrap();
    for told in &shaped.result.aims {
        let point = read_back.job.flight_points.iter().find(|p| p.name == told.flight_point).unwrap();
        let anew = told.figure.of(&brief(&read_back, point)).unwrap();
        // The file keeps every figure; roots leave 6e-10.
        assert!((anew / told.shaped.unwrap() - 1.0).abs() < 1e-8, "{anew} {told:?}");
    }
    assert_eq!(shaped.job.flight_points, rig.job.flight_points);
    assert_eq!(rig.job, demo(0).job, "the drawn blade stays");
}

#[test]
fn limits_are_kept_and_cost_something() {
    let rig = demo(0);
    let aims = vec![aim("Standing start", Figure::ThrustN)];
    let free = Wish { aims, ..Wish::of(&rig) };
    let limits = Limits {
        shaft_height_m: Some(1.0),
        ground_clearance_m: Some(0.23),
        rpm: vec![RpmLimit { flight_point: "Cruise".into(), least: None, most: Some(2500.0) }],
        // That of the boss.
        blank_depth_most_m: Some(0.09),
        ..Limits::default()
    };
    let bound = Wish { limits, ..free.clone() };
    let (free, bound) = (found(&rig, &free).unwrap(), found(&rig, &bound).unwrap());
    assert!(bound.result.gain < free.result.gain - 1e-3);
    assert!(bound.job.propeller.diameter_m <= 1.54 + 1e-5, "{}", bound.job.propeller.diameter_m);
    let limits: Vec<Limit> = bound.result.margins.iter().map(|m| m.limit).collect();
    for limit in [Limit::DiameterMost, Limit::RpmMost, Limit::BlankDepthMost, Limit::EnginePower] {
        assert!(limits.contains(&limit), "{limits:?}");
    }
    let cruise = bound.result.flight_points[2].shaped.rpm.unwrap();
    assert!(cruise <= 2500.1, "{cruise}");
}

/// A margin above that of the drawn blade is reached by another blade; without wood in the job nothing is
/// judged.
#[test]
fn a_stress_margin_is_kept_where_the_job_names_its_wood() {
    let mut job = demo(0).job;
    let limits = |least| Limits { stress_margin_least: Some(least), ..Limits::default() };
    job.wood = None;
    let bare = Rig::new(&job).unwrap();
    let few = Wish { most_trials: 30, ..Wish::of(&bare) };
    let result = found(&bare, &Wish { limits: limits(99.0), ..few.clone() }).unwrap().result;
    assert!(result.margins.iter().all(|m| m.limit != Limit::StressMarginLeast));
    job.wood = Some(spokeshave::job::Wood::default());
    let rig = Rig::new(&job).unwrap();
    let (_, drawn) = least_margin(&rig).unwrap().unwrap();
    let wish = Wish {
        limits: limits(drawn + 0.05),
        most_trials: 120,
        held: vec![Held::Diameter, Held::Pitch, Held::Twist],
        ..few.clone()
    };
    let shaped = found(&rig, &wish).unwrap();
    let (_, kept) = least_margin(&Rig::new(&shaped.job).unwrap()).unwrap().unwrap();
    assert!(kept >= drawn + 0.05 - 1e-4, "{kept} {drawn}");
    let message = found(&rig, &Wish { limits: limits(90.0), ..few }).unwrap_err().to_string();
    assert!(message.contains("stress margin") && message.contains("past the limit"), "{message}");
}

#[test]
fn what_is_held_stays_as_drawn() {
    let rig = demo(0);
    let held = vec![Held::Diameter, Held::Chord, Held::Twist];
    let shaped = found(&rig, &Wish { held, ..Wish::of(&rig) }).unwrap();
    let (old, new) = (&rig.job.propeller, &shaped.job.propeller);
    assert!((old.diameter_m - new.diameter_m).abs() < 1e-12);
    let turned: Vec<f64> = old
        .stations
        .iter()
        .zip(&new.stations)
        .map(|(a, b)| b.angle_deg.unwrap() - a.angle_deg.unwrap())
        .collect();
    assert!(turned.iter().all(|t| (t - turned[0]).abs() < 1e-6), "{turned:?}");
    let all = vec![Held::Diameter, Held::Chord, Held::Twist, Held::Pitch];
    assert_eq!(found(&rig, &Wish { held: all, ..Wish::of(&rig) }).unwrap_err(), ShapeError::AllHeld);
}

#[test]
fn impossible_wishes_say_which_limit_is_in_the_way_and_by_how_much() {
    let rig = demo(0);
    let wish = Wish::of(&rig);
    let cases = [
        (Limits { diameter_most_m: Some(0.9), ..Limits::default() }, "diameter"),
        (Limits { standing_rpm_least: Some(4000.0), ..Limits::default() }, "least rpm standing"),
        (Limits { tip_mach_most: Some(0.3), ..Limits::default() }, "tip Mach number"),
    ];
    for (limits, words) in cases {
        let message = found(&rig, &Wish { limits, ..wish.clone() }).unwrap_err().to_string();
        assert!(message.contains(words) && message.contains("past the limit"), "{message}");
    }
    let mut heavy = rig.job.clone();
    let Some(spokeshave::job::Aircraft::Aeroplane(a)) = &mut heavy.aircraft else { panic!() };
    a.drag.cd0 = 0.2;
    let heavy = Rig::new(&heavy).unwrap();
    let aims = vec![aim("Cruise", Figure::Efficiency)];
    let message = found(&heavy, &Wish { aims, ..wish.clone() }).unwrap_err().to_string();
    assert!(message.contains("Cruise") && message.contains("the engine's power"), "{message}");
    let senseless = vec![aim("Cruise", Figure::AirspeedMS)];
    let message = found(&rig, &Wish { aims: senseless, ..wish }).unwrap_err().to_string();
    assert!(message.starts_with("Cruise: its airspeed is given"), "{message}");
}

#[test]
fn a_search_tells_how_far_it_is_and_keeps_its_best_when_called_off() {
    let rig = demo(0);
    let (mut last, mut better) = (0, 0);
    let shaped = search(&rig, &Wish::of(&rig), &mut |now| {
        assert_eq!(now.trials, last + 1);
        last = now.trials;
        better += u32::from(now.better.is_some());
        if now.trials < 60 { ControlFlow::Continue(()) } else { ControlFlow::Break(()) }
    })
    .unwrap();
    assert_eq!((shaped.result.stopped, shaped.result.trials), (Stopped::CalledOff, 60));
    assert!(shaped.result.gain > 0.0 && better > 1);
    let few = Wish { most_trials: 40, ..Wish::of(&rig) };
    let result = found(&rig, &few).unwrap().result;
    assert_eq!((result.stopped, result.trials), (Stopped::MostTrials, 40));
}

#[test]
fn wishes_of_the_job_file_are_those_of_the_search() {
    let mut job = demo(0).job;
    let wishes = Wishes {
        aims: vec![aim("Standing start", Figure::TakeOffM), aim("Top speed", Figure::TipMach)],
        limits: Limits { tip_mach_most: Some(0.8), ..Limits::default() },
        held: vec![Held::Diameter],
    };
    job.wishes = Some(wishes.clone());
    let job = Job::from_json(&job.to_json()).unwrap();
    let rig = Rig::new(&job).unwrap();
    let wish = Wish::of(&rig);
    assert_eq!((&wish.aims, &wish.limits, &wish.held), (&wishes.aims, &wishes.limits, &wishes.held));
    let result = found(&rig, &wish).unwrap().result;
    let take_off = &result.aims[0];
    assert!(
        take_off.shaped.unwrap() < take_off.drawn.unwrap() || result.aims[1].shaped < result.aims[1].drawn
    );
}

/// The demo's power curve begins at 2000 rpm and its engine's limit is 3300: no blade turns slower or faster
/// at full throttle.
#[test]
fn limits_that_no_blade_can_keep_are_told_before_one_is_tried() {
    let rig = demo(0);
    let refused = |limits: Limits| {
        let mut tried = 0;
        let wish = Wish { limits, ..Wish::of(&rig) };
        let end = search(&rig, &wish, &mut |now| {
            tried = now.trials;
            ControlFlow::Continue(())
        });
        (end.unwrap_err().to_string(), tried)
    };
    let (message, tried) = refused(Limits { rpm_most: Some(1000.0), ..Limits::default() });
    assert!(
        message.contains("Standing start: greatest rpm: 2000 rpm where 1000 rpm is the limit"),
        "{message}"
    );
    assert!(
        message.contains("1000 rpm past the limit") && message.contains("curve begins there"),
        "{message}"
    );
    assert_eq!(tried, 0);
    let (message, tried) = refused(Limits { standing_rpm_least: Some(3400.0), ..Limits::default() });
    assert!(message.contains("least rpm standing: 3300 rpm where 3400 rpm is the limit"), "{message}");
    assert_eq!(tried, 0);
    let rpm = vec![RpmLimit { flight_point: "Cruise".into(), least: Some(3500.0), most: None }];
    let (message, _) = refused(Limits { rpm, ..Limits::default() });
    assert!(message.contains("Cruise: least rpm: 3300 rpm where 3500 rpm"), "{message}");
}
