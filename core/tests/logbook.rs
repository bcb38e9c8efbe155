//! The logbook: factors recovered from readings of a known engine, aircraft and blade; what cannot be told is
//! said.

use spokeshave::change::{Wanted, changes};
use spokeshave::fit;
use spokeshave::job::{
    Aircraft, BladeReading, Carved, CarvedBlade, DEMOS, Engine, Factors, Job, LogReading, Logbook,
    PitchControl,
};
use spokeshave::logbook::{estimate, import};
use spokeshave::result::{Figure, Logged, Means};
use spokeshave::rig::Rig;

fn demo(i: usize) -> Job {
    Job::from_json(DEMOS[i].json).unwrap()
}

/// Numbers of a normal distribution from a fixed seed: sums of twelve of a linear congruential generator (D.
/// E. Knuth, *The Art of Computer Programming* 2, its multiplier for 64 bits; from memory).
struct Noise(u64);

impl Noise {
    fn one(&mut self) -> f64 {
        let mut even = || {
            self.0 = self.0.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
            (self.0 >> 11) as f64 / (1u64 << 53) as f64
        };
        (0..12).map(|_| even()).sum::<f64>() - 6.0
    }
}

/// What the true job gives at a height, speed and throttle, each with noise of a share.
fn read(truth: &Rig, altitude_m: f64, speed: f64, full: bool, noise: &mut dyn FnMut() -> f64) -> LogReading {
    let setting = if full { r#"{"kind":"full-throttle"}"# } else { r#"{"kind":"level"}"# };
    let mut job = truth.job.clone();
    job.flight_points.truncate(1);
    job.flight_points[0].altitude_m = altitude_m;
    job.flight_points[0].airspeed_m_s = Some(speed);
    job.flight_points[0].setting = serde_json::from_str(setting).unwrap();
    let mut rig = truth.clone();
    rig.job = job;
    let point = rig.point(0).unwrap();
    let electric = matches!(truth.job.engine, Some(Engine::Electric(_)));
    let rpm = point.meeting.engine_rpm.unwrap();
    LogReading {
        altitude_m: Some(altitude_m),
        airspeed_m_s: speed * (1.0 + noise()),
        engine_rpm: Some(rpm * (1.0 + noise())),
        throttle: if full { Some(1.0) } else { None },
        level: !full,
        fuel_kg_per_h: point.meeting.fuel_kg_per_h.map(|f| f * (1.0 + noise())),
        current_a: point.meeting.battery_current_a.filter(|_| electric).map(|a| a * (1.0 + noise())),
        ..LogReading::default()
    }
}

/// The light aeroplane as it truly is: the blade a degree and more off, engine weak, drag high. Built by
/// hand, not by the factors that are sought.
fn truth() -> (Job, Rig) {
    let job = demo(0);
    let mut altered = job.clone();
    for (s, station) in altered.propeller.stations.iter_mut().enumerate() {
        *station.angle_deg.as_mut().unwrap() += 0.9 - 0.1 * s as f64;
        station.chord_m -= 0.001;
    }
    let Some(Engine::Piston(piston)) = &mut altered.engine else { panic!("a piston engine") };
    piston.full_throttle.iter_mut().for_each(|p| p.power_w *= 0.93);
    piston.max_rpm = None;
    let Some(Aircraft::Aeroplane(a)) = &mut altered.aircraft else { panic!("an aeroplane") };
    a.drag.cd0 *= 1.12;
    let true_rig = Rig::new(&altered).unwrap();
    let readings = (true_rig.rotor.blade.station_radii_m())
        .map(|r| {
            let cut = true_rig.rotor.blade.cut(r);
            BladeReading {
                radius_m: r,
                angle_deg: Some(cut.angle_rad.to_degrees()),
                chord_m: Some(cut.chord_m),
                thickness_m: Some(cut.chord_m * cut.thickness_ratio),
                track_m: None,
                confirmed: false,
            }
        })
        .collect();
    let blades = vec![CarvedBlade { readings }];
    (Job { carved: Some(Carved { blades, ..Carved::default() }), ..job }, true_rig)
}

fn with_readings(job: &Job, readings: Vec<LogReading>) -> Job {
    let logbook = Logbook { readings, ..job.logbook.clone().unwrap_or_default() };
    let job = Job { logbook: Some(logbook), ..job.clone() };
    assert_eq!(job.check(), []);
    assert_eq!(Job::from_json(&job.to_json()).unwrap(), job);
    job
}

fn logged(job: &Job) -> Logged {
    estimate(&Rig::new(job).unwrap()).unwrap()
}

#[test]
fn factors_are_recovered_through_one_per_cent_of_noise() {
    let (mut job, true_rig) = truth();
    job.logbook = Some(Logbook::default());
    // The consumption per power is taken as known, so that fuel tells the propeller's power.
    job.logbook.as_mut().unwrap().widths.consumption = 0.002;
    let mut noise = Noise(20_260_301);
    let mut one = || 0.01 * noise.one();
    let mut readings = Vec::new();
    for i in 0..48 {
        let h = 150.0 * f64::from(i % 8);
        let i = i / 2;
        readings.push(read(&true_rig, h, 0.0, true, &mut || 0.0));
        *readings.last_mut().unwrap().engine_rpm.as_mut().unwrap() *= 1.0 + one();
        *readings.last_mut().unwrap().fuel_kg_per_h.as_mut().unwrap() *= 1.0 + one();
        readings.push(read(&true_rig, h, 26.0 + f64::from(i), true, &mut one));
        readings.push(read(&true_rig, h, 34.0 + 0.6 * f64::from(i), false, &mut one));
        readings.push(read(&true_rig, h, 48.0 - 0.6 * f64::from(i), false, &mut one));
    }
    let found = logged(&with_readings(&job, readings));
    assert!(found.as_carved);
    let of = |name: &str| found.estimate.found.iter().find(|f| f.name == name).unwrap();
    for (name, value) in [("engine_power", 0.93), ("drag_area", 1.12), ("propeller_power", 1.0)] {
        let f = of(name);
        assert!((f.value / value - 1.0).abs() < 0.01, "{name}: {f:?}");
        assert!((f.value / value).ln().abs() < 3.0 * f.deviation && f.told, "{name}: {f:?}");
    }
    // With the factors the expected rpm comes to the read one; without them it does not.
    let miss = |of: fn(&spokeshave::result::LogLine) -> Option<f64>| {
        let all: Vec<f64> =
            found.readings.iter().filter_map(|l| Some((of(l)? / l.engine_rpm? - 1.0).abs())).collect();
        all.iter().sum::<f64>() / all.len() as f64
    };
    assert!(miss(|l| l.after_rpm) < 0.011 && miss(|l| l.before_rpm) > 0.015);
}

#[test]
fn without_noise_a_known_propeller_factor_is_found_exactly() {
    let job = demo(0);
    let factors = Factors { engine_power: 0.95, drag_area: 1.08, propeller_power: 1.04, consumption: 1.0 };
    let mut true_rig = Rig::with_factors(&job, &factors).unwrap();
    true_rig.job.engine.clone_from(&job.engine);
    let mut readings = Vec::new();
    for i in 0..12 {
        let v = 30.0 + f64::from(i);
        readings.push(read(&true_rig, 500.0, v, true, &mut || 0.0));
        readings.push(read(&true_rig, 500.0, v, false, &mut || 0.0));
    }
    let mut known = with_readings(&job, readings);
    let widths = &mut known.logbook.as_mut().unwrap().widths;
    (widths.engine_power, widths.drag_area, widths.propeller_power, widths.consumption) =
        (1.0, 1.0, 1.0, 1e-4);
    let found = logged(&known).estimate;
    // Read without error; what was believed before, so wide, holds them back by 3e-5.
    assert!((found.factors.engine_power / 0.95 - 1.0).abs() < 1e-4, "{found:?}");
    assert!((found.factors.drag_area / 1.08 - 1.0).abs() < 1e-4, "{found:?}");
    assert!((found.factors.propeller_power / 1.04 - 1.0).abs() < 1e-4, "{found:?}");
}

#[test]
fn ground_runs_alone_do_not_tell_drag_nor_engine_from_propeller() {
    let (job, true_rig) = truth();
    let readings = (0..6)
        .map(|_| LogReading { fuel_kg_per_h: None, ..read(&true_rig, 0.0, 0.0, true, &mut || 0.0) })
        .collect();
    let found = logged(&with_readings(&job, readings)).estimate;
    let drag = &found.found[1];
    assert!(!drag.told && (drag.value - 1.0).abs() < 1e-9 && (drag.deviation - drag.width).abs() < 1e-9);
    assert!(found.remarks.iter().any(|r| r.contains("Drag cannot be told")), "{found:?}");
    // Linear least squares in closed form: with equal prior widths the quotient's mismatch is shared half and
    // half.
    let product = found.factors.engine_power * found.factors.propeller_power;
    assert!((product - 1.0).abs() < 1e-6, "{found:?}");
    let quotient = found.factors.engine_power / found.factors.propeller_power;
    assert!((quotient / 0.93 - 1.0).abs() < 0.01, "{quotient}");
    let pair = &found.pairs[0];
    assert_eq!((pair.first, pair.second), ("engine_power", "propeller_power"));
    assert!((pair.value - quotient).abs() < 1e-9 && pair.correlation > 0.9);
}

#[test]
fn a_wrong_reading_is_flagged_with_a_likely_cause_and_left_out() {
    let (job, true_rig) = truth();
    let mut readings: Vec<LogReading> =
        (0..10).map(|i| read(&true_rig, 300.0, 30.0 + f64::from(i), true, &mut || 0.0)).collect();
    let clean = logged(&with_readings(&job, readings.clone())).estimate.factors;
    *readings[4].engine_rpm.as_mut().unwrap() *= 0.5;
    readings[7].left_out = true;
    let found = logged(&with_readings(&job, readings));
    let flagged: Vec<usize> =
        found.readings.iter().enumerate().filter(|(_, l)| l.outlier).map(|(i, _)| i).collect();
    assert_eq!(flagged, [4], "{:?}", found.readings);
    assert!(found.readings[4].remark.contains("number of blades or pulses"), "{:?}", found.readings[4]);
    assert_eq!(found.readings[7].remark, "left out");
    // Two of ten readings less: 4e-5 comes out.
    assert!((found.estimate.factors.engine_power / clean.engine_power - 1.0).abs() < 2e-4);
}

#[test]
fn factors_kept_in_the_job_change_every_prediction_and_can_be_switched_off() {
    let mut job = demo(0);
    let plain = Rig::new(&job).unwrap().point(1).unwrap().rpm.unwrap();
    let factors = Factors { engine_power: 0.9, ..Factors::default() };
    job.logbook = Some(Logbook { factors: Some(factors), in_use: true, ..Logbook::default() });
    let used = Rig::new(&job).unwrap();
    assert!(used.point(1).unwrap().rpm.unwrap() < plain - 50.0);
    // Another propeller keeps them.
    let same = used.with_propeller(job.propeller.clone()).unwrap();
    assert_eq!(same.point(1).unwrap().rpm, used.point(1).unwrap().rpm);
    job.logbook.as_mut().unwrap().in_use = false;
    assert_eq!(Rig::new(&job).unwrap().point(1).unwrap().rpm.unwrap(), plain);
    let drag = Factors { drag_area: 1.2, ..Factors::default() };
    let top = |f: &Factors| Rig::with_factors(&job, f).unwrap().point(3).unwrap().airspeed_m_s.unwrap();
    assert!(top(&drag) < top(&Factors::default()) - 1.0);
}

#[test]
fn a_motor_s_current_tells_the_propeller_s_power() {
    let job = demo(1);
    let factors = Factors { propeller_power: 1.06, engine_power: 0.97, ..Factors::default() };
    let true_rig = Rig::with_factors(&job, &factors).unwrap();
    let readings = (0..8).map(|i| read(&true_rig, 100.0, 12.0 + f64::from(i), true, &mut || 0.0)).collect();
    let mut job = with_readings(&job, readings);
    job.logbook.as_mut().unwrap().widths.consumption = 1e-3;
    let found = logged(&job).estimate;
    // Read without error; what was believed before holds them back by 0.3 %.
    assert!((found.factors.propeller_power / 1.06 - 1.0).abs() < 0.005, "{found:?}");
    assert!((found.factors.engine_power / 0.97 - 1.0).abs() < 0.005, "{found:?}");
}

/// A run below the governed rpm has the blades on the fine stop, so that it tells as much as one of a fixed
/// pitch; one at the governed rpm does not.
#[test]
fn a_governed_propeller_tells_on_its_fine_stop() {
    let mut fixed = demo(0);
    fixed.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: -1.0 };
    let weak = Rig::with_factors(&fixed, &Factors { engine_power: 0.95, ..Factors::default() }).unwrap();
    let mut readings: Vec<LogReading> =
        (0..6).map(|i| read(&weak, 100.0, 2.0 * f64::from(i), true, &mut || 0.0)).collect();
    let mut job = fixed;
    job.propeller.pitch_control =
        PitchControl::ConstantSpeed { rpm: 3250.0, turn_min_deg: -1.0, turn_max_deg: 9.0 };
    let at_the_governor = LogReading {
        engine_rpm: Some(3250.0),
        throttle: Some(1.0),
        airspeed_m_s: 45.0,
        ..LogReading::default()
    };
    let only = with_readings(&job, vec![at_the_governor.clone()]);
    let why = estimate(&Rig::new(&only).unwrap()).unwrap_err().to_string();
    assert!(why.contains("governor") && why.contains("fine stop"), "{why}");
    readings.push(at_the_governor);
    let mut job = with_readings(&job, readings);
    job.logbook.as_mut().unwrap().widths.propeller_power = 1e-3;
    let found = logged(&job);
    // As above; 0.2 %.
    assert!((found.estimate.factors.engine_power / 0.95 - 1.0).abs() < 0.005, "{:?}", found.estimate);
    assert!(found.readings[6].remark.contains("governed rpm") && found.readings[6].off.is_none());
    assert!(found.readings[..6].iter().all(|l| l.off.is_some()), "{:?}", found.readings);
}

#[test]
fn a_reading_without_an_rpm_waits_for_it() {
    let (job, true_rig) = truth();
    let whole = read(&true_rig, 0.0, 30.0, true, &mut || 0.0);
    let found = logged(&with_readings(&job, vec![whole, LogReading::default()]));
    assert_eq!((found.readings[1].engine_rpm, found.readings[1].off), (None, None));
    assert!(found.readings[1].remark.contains("no rpm"), "{:?}", found.readings[1]);
}

#[test]
fn what_has_no_answer_says_why() {
    let (job, _) = truth();
    let why = |job: &Job| estimate(&Rig::new(job).unwrap()).unwrap_err().to_string();
    assert!(why(&job).contains("no readings"));
    let idle = LogReading { engine_rpm: Some(2000.0), throttle: Some(0.5), ..LogReading::default() };
    assert!(why(&with_readings(&job, vec![idle])).contains("no reading tells anything"));
    let mut none =
        with_readings(&job, vec![LogReading { engine_rpm: Some(2000.0), ..LogReading::default() }]);
    none.engine = None;
    assert!(why(&none).contains("no engine"));
}

#[test]
fn sheets_are_read_with_units_and_faults_have_line_and_column() {
    let text = "RPM;Throttle [%];Airspeed (kn);Altitude [ft];Temperature [°F];level;fuel_kg_h;note;pilot\n2900;100;0;1500;59;;15,2;first run;x\n2500;;92,5;1500;50;yes;;;\n";
    let (book, unused) = import::read(text, None).unwrap();
    assert_eq!(unused, ["pilot"]);
    let [ground, level] = &book.readings[..] else { panic!("{book:?}") };
    assert_eq!((ground.throttle, ground.fuel_kg_per_h), (Some(1.0), Some(15.2)));
    assert!(
        (ground.temperature_c.unwrap() - 15.0).abs() < 1e-6
            && (ground.altitude_m.unwrap() - 457.2).abs() < 1e-6
    );
    // Written here with three decimals.
    assert!(level.level && (level.airspeed_m_s - 47.586).abs() < 5e-4);
    let cases = [
        ("throttle\nfull", "line 1: no column rpm"),
        ("rpm,airspeed\n2900,40", "line 1, column 2: \"airspeed\" needs its unit"),
        ("rpm\nfast", "line 2, column 1: rpm: \"fast\"; allowed is a number"),
        (
            "rpm,throttle\n2900,80",
            "line 2, column 2: throttle: \"80\"; allowed is 0 to 1; perhaps it is in %",
        ),
        ("rpm,throttle\n2900,most", "throttle: \"most\"; allowed is 0 to 1, a percentage, or full"),
        ("rpm,throttle\n2900,180 %", "throttle: \"180 %\"; allowed is 0 to 1, a percentage, or full"),
        ("rpm,pressure_pa\n2900,1013", "allowed is 5000 to 115000 Pa; perhaps it is in hPa"),
        ("rpm,pressure_hpa\n2900,29.92", "allowed is 50 to 1150 hPa; perhaps it is in inHg"),
        ("rpm,temperature_c\n2900,288", "allowed is -90 to 75 °C; perhaps it is in K"),
        ("rpm,temperature\n2900,15", "\"temperature\" needs its unit in the heading, one of °C, C, °F, F, K"),
        ("rpm,level,airspeed_m_s\n2500,yes,", "above 0 in level flight"),
        ("rpm,level\n2500,maybe", "yes, no or nothing"),
        ("rpm,altitude_m,pressure_hpa\n2500,0,1013", "either an altitude or a pressure"),
    ];
    for (text, expected) in cases {
        let message = import::read(text, None).unwrap_err().to_string();
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}

#[test]
fn units_of_headings_may_be_in_small_or_capital_letters() {
    for (heading, cell, celsius) in [
        ("temperature_c", "15", 15.0),
        ("Temperature [°C]", "15", 15.0),
        ("temperature (°c)", "15", 15.0),
        ("OAT_K", "288.15", 15.0),
        ("oat_f", "59", 15.0),
    ] {
        let (book, _) = import::read(&format!("rpm,{heading}\n2900,{cell}\n"), None).unwrap();
        assert_eq!(book.readings[0].temperature_c, Some(celsius), "{heading}");
    }
    // 29.92 inches of mercury are 1013.2 hPa.
    for (heading, cell) in [
        ("pressure_pa", "101325"),
        ("Pressure [hPa]", "1013.25"),
        ("pressure_hpa", "1013.25"),
        ("pressure_inhg", "29.92"),
        ("Pressure (inHg)", "29.92"),
    ] {
        let (book, _) = import::read(&format!("rpm,{heading}\n2900,{cell}\n"), None).unwrap();
        assert!((book.readings[0].pressure_pa.unwrap() - 101_325.0).abs() < 10.0, "{heading}");
    }
}

#[test]
fn a_throttle_may_be_a_share_a_percentage_or_full() {
    for (heading, cell, share) in [
        ("throttle", "0.8", 0.8),
        ("throttle_%", "80", 0.8),
        ("throttle", "80 %", 0.8),
        ("throttle_%", "80%", 0.8),
        ("throttle", "FULL", 1.0),
        ("throttle", "−0", 0.0),
    ] {
        let (book, _) = import::read(&format!("rpm,{heading}\n2900,{cell}\n"), None).unwrap();
        assert!((book.readings[0].throttle.unwrap() - share).abs() < 1e-12, "{heading} {cell}");
    }
    let (book, _) = import::read("rpm,throttle\n2900,\n", None).unwrap();
    assert_eq!(book.readings[0].throttle, None);
}

#[test]
fn changes_reach_what_is_wanted_and_tell_the_rest() {
    let rig = Rig::new(&demo(0)).unwrap();
    let now = rig.point(0).unwrap().rpm.unwrap();
    let wanted = Wanted { point: 0, figure: Figure::Rpm, value: now - 60.0 };
    let found = changes(&rig, &wanted).unwrap();
    for c in &found {
        assert!(c.reached, "{c:?}");
        // Met by a root, which leaves 1e-6 rpm.
        assert!((c.had.unwrap() - wanted.value).abs() < 1e-4, "{c:?}");
        assert_eq!((c.flight_points.len(), c.by_removal), (4, false));
    }
    let of = |m: Means| found.iter().find(|c| c.means == m).unwrap();
    assert!(of(Means::Pitch).amount > 0.0 && of(Means::Twist).amount > of(Means::Pitch).amount);
    assert!(of(Means::Diameter).amount > 0.0, "a slower standing start asks for a larger propeller");
    let top = Wanted { point: 3, figure: Figure::AirspeedMS, value: 90.0 };
    assert!(changes(&rig, &top).unwrap().iter().all(|c| !c.reached), "no blade makes it that fast");
    let given = Wanted { point: 1, figure: Figure::AirspeedMS, value: 40.0 };
    assert!(changes(&rig, &given).unwrap_err().to_string().contains("the airspeed is set there"));
    assert!(changes(&rig, &Wanted { value: f64::NAN, ..wanted }).is_err());
    assert!(changes(&rig, &Wanted { point: 9, ..wanted }).is_err());
}

#[test]
fn wood_is_only_taken_off() {
    let (mut job, _) = truth();
    job.carved.as_mut().unwrap().least_thickness_share = 0.9;
    let rig = Rig::new(&job).unwrap();
    let carved = spokeshave::carved::Measured::new(&rig).unwrap();
    let mean = spokeshave::carved::mean_rig(&rig, &carved).unwrap();
    let now = mean.point(1).unwrap().rpm.unwrap();
    for by in [-20.0, 20.0] {
        for c in changes(&rig, &Wanted { point: 1, figure: Figure::Rpm, value: now + by }).unwrap() {
            assert!(c.by_removal);
            match c.means {
                Means::Diameter => assert!(c.amount <= 0.0 && c.reached == (by > 0.0), "{c:?}"),
                Means::Pitch | Means::Twist => {
                    let after = spokeshave::change::changed(&rig, c.means, c.amount).unwrap();
                    for r in carved.radii_m.iter().copied() {
                        let (a, b) = (after.rotor.blade.cut(r), mean.rotor.blade.cut(r));
                        assert!(a.chord_m <= b.chord_m + 1e-9);
                        let thick = |cut: spokeshave::blade::Cut| cut.chord_m * cut.thickness_ratio;
                        assert!(thick(a) <= thick(b) + 1e-9);
                    }
                    assert!(!c.reached || (c.had.unwrap() - now - by).abs() < 0.1, "{c:?}");
                }
            }
        }
    }
    // Trimmed tips leave the blade inboard as it is.
    let short = spokeshave::change::changed(&rig, Means::Diameter, -0.1).unwrap();
    assert!((short.job.propeller.diameter_m - 1.42).abs() < 1e-12);
    for r in [0.2, 0.4, 0.6, 0.69] {
        let (a, b) = (short.rotor.blade.cut(r), mean.rotor.blade.cut(r));
        // Cubics through other places at the tip; 1e-6 comes out.
        assert!((a.angle_rad - b.angle_rad).abs() < 1e-5 && (a.chord_m - b.chord_m).abs() < 1e-5, "{r}");
    }
    let _: fn(&spokeshave::rotor::Condition) -> f64 = fit::rpm_of;
}
