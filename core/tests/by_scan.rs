//! Answers of the fit against plain scans and bisections over the same propeller, engine and aircraft, which
//! know nothing of trails, few elements, secants or steps given up.

use std::f64::consts::PI;

use spokeshave::air::Air;
use spokeshave::aircraft::{drag_n, propellers, speeds, weight_n};
use spokeshave::fit::{ceilings, crossings, envelope, highest_rpm, pitch_worth};
use spokeshave::job::{Aeroplane, Aircraft, DEMOS, Engine, FlightPoint, Job, PitchControl, Setting};
use spokeshave::result::{Envelope, Mark, State, WorthOf};
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::rotor::{Condition, Loads, departure_map};

fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

fn aeroplane(job: &mut Job) -> &mut Aeroplane {
    let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else { panic!("an aeroplane") };
    a
}

/// The demo aeroplane with its blades turned.
fn turned(turn_deg: f64) -> Job {
    let mut job = demo(0);
    job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg };
    job
}

/// Two engines, parts in the slipstream, and a weight between that of one and of two.
fn twin() -> Job {
    let mut job = demo(0);
    let a = aeroplane(&mut job);
    (a.engines, a.mass_kg, a.wing_area_m2, a.slipstream_drag_area_m2) = (2, 800.0, 20.0, Some(0.25));
    job
}

/// As heavy as its engine can carry: the top speed is not far from that of least power.
fn laden() -> Job {
    let mut job = demo(0);
    aeroplane(&mut job).mass_kg = 860.0;
    job
}

/// Four times as large at a quarter of the rpm, for which speeds and angles stay the same and forces are sixteen
/// times as great.
fn large() -> Job {
    let mut job = demo(0);
    let a = aeroplane(&mut job);
    (a.mass_kg, a.wing_area_m2) = (16.0 * a.mass_kg, 16.0 * a.wing_area_m2);
    let propeller = &mut job.propeller;
    (propeller.diameter_m, propeller.hub_diameter_m) =
        (4.0 * propeller.diameter_m, 4.0 * propeller.hub_diameter_m);
    propeller.stations.iter_mut().for_each(|s| s.chord_m *= 4.0);
    let Some(Engine::Piston(piston)) = &mut job.engine else { panic!("a piston engine") };
    piston.max_rpm = piston.max_rpm.map(|rpm| rpm / 4.0);
    piston.full_throttle.iter_mut().for_each(|p| (p.rpm, p.power_w) = (p.rpm / 4.0, 16.0 * p.power_w));
    job
}

/// So little lift that the stall is fast.
fn hasty() -> Job {
    let mut job = demo(0);
    aeroplane(&mut job).cl_max = Some(0.3);
    job
}

fn point(airspeed_m_s: Option<f64>, setting: Setting) -> FlightPoint {
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }
}

fn range(job: &Job, count: u32) -> Envelope {
    envelope(&Rig::new(job).unwrap(), &point(None, Setting::FullThrottle {}), count, &[0.5, 0.75]).unwrap()
}

/// The zero between two places where a value has different signs, to 4e-9 of their distance.
fn bisected(mut low: f64, mut high: f64, value: impl Fn(f64) -> f64) -> f64 {
    let below = value(low) < 0.0;
    for _ in 0..28 {
        let middle = 0.5 * (low + high);
        if (value(middle) < 0.0) == below { low = middle } else { high = middle }
    }
    0.5 * (low + high)
}

/// Full throttle by a scan.
#[derive(Clone, Copy, Debug)]
struct Scanned {
    rpm: f64,
    loads: Loads,
    held: bool,
}

/// One job at one air.
struct Plain {
    rig: Rig,
    air: Air,
}

impl Plain {
    fn new(job: &Job, altitude_m: f64) -> Self {
        Self { rig: Rig::new(job).unwrap(), air: Air::standard(altitude_m, 0.0).unwrap() }
    }

    fn at(&self, airspeed_m_s: f64, rpm: f64) -> Condition {
        let rotation_rad_s = rotation_rad_s(rpm);
        Condition { air: self.air, airspeed_m_s, rotation_rad_s, turn_rad: self.rig.turn_rad() }
    }

    fn loads(&self, airspeed_m_s: f64, rpm: f64) -> Loads {
        self.rig.rotor.loads(&self.at(airspeed_m_s, rpm))
    }

    /// What the propeller takes above what full throttle gives, W.
    fn lacking_w(&self, v: f64, rpm: f64) -> f64 {
        let offered = self.rig.shaft.as_ref().unwrap().power_w(rpm, &self.air, 1.0);
        self.loads(v, rpm).torque_n_m * rotation_rad_s(rpm) - offered
    }

    /// The highest rpm at which the demand rises through the offer, or the limit rpm where that comes first, or
    /// the end of the engine's curve where it takes less than the offer there.
    fn full(&self, v: f64) -> Option<Scanned> {
        let shaft = self.rig.shaft.as_ref().unwrap();
        let (low, high) = shaft.rpm_range();
        let limit = highest_rpm(shaft);
        let held = || {
            let loads = self.loads(v, limit);
            (loads.torque_n_m > 0.0).then_some(Scanned { rpm: limit, loads, held: true })
        };
        let rpm = |i: u32| low + (high - low) * f64::from(i) / 20.0;
        let mut above = self.lacking_w(v, high);
        if above < 0.0 {
            return held();
        }
        for i in (0..20).rev() {
            let here = self.lacking_w(v, rpm(i));
            if here < 0.0 && above >= 0.0 {
                let rpm = bisected(rpm(i), rpm(i + 1), |rpm| self.lacking_w(v, rpm));
                let met = || Scanned { rpm, loads: self.loads(v, rpm), held: false };
                return if rpm > limit { held() } else { Some(met()) };
            }
            above = here;
        }
        None
    }

    /// What the slipstream's drag leaves of the thrust, by hand.
    fn all_kept(&self) -> f64 {
        let aircraft = self.rig.aircraft.as_ref().unwrap();
        let Aircraft::Aeroplane(a) = aircraft else { return propellers(aircraft) };
        let disc = PI * self.rig.rotor.blade.radius_m.powi(2);
        propellers(aircraft) - a.slipstream_drag_area_m2.unwrap_or(0.0) / disc
    }

    fn asked_n(&self, v: f64) -> f64 {
        match self.rig.aircraft.as_ref().unwrap() {
            Aircraft::Aeroplane(a) => drag_n(a, &self.air, v).unwrap(),
            other @ Aircraft::Multirotor(_) => weight_n(other),
        }
    }

    /// Thrust above what is asked at full throttle.
    fn spare_n(&self, v: f64) -> Option<f64> {
        Some(self.full(v)?.loads.thrust_n * self.all_kept() - self.asked_n(v))
    }

    /// Sine of the climb at full throttle.
    fn sine(&self, v: f64) -> Option<f64> {
        Some(self.spare_n(v)? / weight_n(self.rig.aircraft.as_ref().unwrap()))
    }

    fn stall_m_s(&self) -> f64 {
        let Some(Aircraft::Aeroplane(a)) = &self.rig.aircraft else { panic!("an aeroplane") };
        speeds(a, &self.air).stall_m_s.unwrap()
    }

    /// The fastest speed at which thrust suffices.
    fn top_m_s(&self, from: f64) -> f64 {
        let suffices = |v: f64| self.spare_n(v).is_some_and(|s| s >= 0.0);
        let slower = (0..400).map(|i| 150.0 / 1.04_f64.powi(i)).take_while(|v| *v > from);
        let last = slower.into_iter().find(|v| suffices(*v)).expect("it flies");
        bisected(last, 1.04 * last, |v| if suffices(v) { 1.0 } else { -1.0 })
    }

    /// Rpm of level flight: the least at which the thrust suffices.
    fn level_rpm(&self, v: f64) -> f64 {
        let short = |rpm: f64| self.loads(v, rpm).thrust_n * self.all_kept() - self.asked_n(v);
        bisected(100.0, 4500.0, short)
    }
}

/// A fine scan's highest value from a speed to another, with its speed.
fn highest(from: f64, to: f64, value: impl Fn(f64) -> Option<f64>) -> Option<(f64, f64)> {
    let looked = (0..=40).map(|i| from + (to - from) * f64::from(i) / 40.0);
    looked.filter_map(|v| Some((v, value(v)?))).max_by(|a, b| a.1.total_cmp(&b.1))
}

#[test]
fn top_speed_is_the_last_at_which_thrust_suffices() {
    let jobs = [turned(-8.0), twin(), laden(), large(), demo(1), demo(2)];
    let mut held = 0;
    for mut job in jobs {
        job.flight_points = vec![point(None, Setting::FullThrottle {})];
        let plain = Plain::new(&job, 0.0);
        let p = plain.rig.point(0).unwrap();
        let (found, rpm) = match &p.held {
            Some(h) => (h.airspeed_m_s, h.rpm),
            None => (p.airspeed_m_s.unwrap(), p.rpm.unwrap()),
        };
        let from = if matches!(job.aircraft, Some(Aircraft::Aeroplane(_))) { 12.0 } else { 0.5 };
        let top = plain.top_m_s(from);
        let there = plain.full(top).unwrap();
        held += u32::from(there.held);
        assert_eq!(p.held.is_some(), there.held, "{}", job.title);
        // A root's last step is small: 1e-7 comes out.
        assert!((found / top - 1.0).abs() < 1e-6, "{}: {found} {top}", job.title);
        assert!((rpm / there.rpm - 1.0).abs() < 1e-6, "{}: {rpm} {there:?}", job.title);
    }
    assert!(held > 0);
}

/// Where the air comes to be so thin that an unblown engine gives nothing, the propeller runs past its limit:
/// no answer at all is no climb.
#[test]
fn at_the_ceilings_the_best_climb_by_a_scan_is_what_they_say() {
    let mut slow = turned(-10.0);
    let Some(Engine::Piston(piston)) = &mut slow.engine else { panic!("a piston engine") };
    piston.max_rpm = Some(2600.0);
    for (job, has_one_at_the_end) in [(slow, false), (twin(), true)] {
        let rig = Rig::new(&job).unwrap();
        let best = |altitude_m: f64| {
            let plain = Plain::new(&job, altitude_m);
            let stall = plain.stall_m_s();
            let (v, _) = highest(stall, 3.0 * stall, |v| Some(plain.sine(v)? * v))?;
            // Round the best of the scan a finer one.
            Some(highest(stall.max(0.97 * v), 1.03 * v, |v| Some(plain.sine(v)? * v))?.1)
        };
        let found = ceilings(&rig, 0.0).unwrap();
        // The parabola of the ceilings, through steps of a tenth, misses by up to 1e-3 m/s.
        assert!((found.sea_level_climb_m_s.unwrap() - best(0.0).unwrap()).abs() < 2e-3, "{found:?}");
        for (height, climb) in [(found.service_m.unwrap(), 0.5), (found.absolute_m.unwrap(), 0.0)] {
            // As above, and half a metre of height, in which the climb falls by less.
            assert!((best(height).unwrap() - climb).abs() < 2e-3, "{found:?}: {:?}", best(height));
        }
        assert_eq!(best(20_000.0).is_some(), has_one_at_the_end, "{}", job.title);
    }
}

/// Where no stall is known, by the speeds from 0.8 times that of least power on; so laden that the best is not
/// far from there.
#[test]
fn without_a_stall_the_best_climb_is_that_of_a_scan_from_below_least_power() {
    let mut job = laden();
    (aeroplane(&mut job).cl_max, aeroplane(&mut job).mass_kg) = (None, 1000.0);
    let plain = Plain::new(&job, 0.0);
    let least = speeds(aeroplane(&mut job), &plain.air).least_power_m_s;
    let best = highest(0.8 * least, 2.0 * least, |v| Some(plain.sine(v)? * v)).unwrap();
    assert!(best.0 < 1.2 * least, "{best:?} {least}");
    // A quarter above the speed of least power it is less than that.
    assert!(1.25 * least * plain.sine(1.25 * least).unwrap() < best.1 - 5e-3);
    let found = ceilings(&plain.rig, 0.0).unwrap().sea_level_climb_m_s.unwrap();
    // As above.
    assert!((found - best.1).abs() < 2e-3, "{found} {best:?}");
}

#[test]
fn an_aeroplane_that_cannot_climb_has_no_ceiling() {
    let mut job = demo(0);
    aeroplane(&mut job).mass_kg = 1300.0;
    let found = ceilings(&Rig::new(&job).unwrap(), 0.0).unwrap();
    assert!(found.sea_level_climb_m_s.unwrap() < 0.0, "{found:?}");
    assert!(found.service_m.is_none() && found.absolute_m.is_none(), "{found:?}");
}

/// Every change of sign of a finer scan over the engine's curve, and none beyond it.
#[test]
fn crossings_are_the_changes_of_sign_of_a_scan() {
    for (job, speeds) in [(demo(0), [0.0, 40.0]), (turned(-8.0), [10.0, 50.0])] {
        let plain = Plain::new(&job, 0.0);
        let (low, high) = plain.rig.shaft.as_ref().unwrap().rpm_range();
        for v in speeds {
            let rpm = |i: u32| low + (high - low) * f64::from(i) / 90.0;
            let lacking = |rpm: f64| plain.lacking_w(v, rpm);
            let looks: Vec<f64> = (0..=90).map(|i| lacking(rpm(i))).collect();
            let expected: Vec<f64> = (0..90)
                .filter(|i| (looks[*i as usize] < 0.0) != (looks[*i as usize + 1] < 0.0))
                .map(|i| bisected(rpm(i), rpm(i + 1), lacking))
                .collect();
            let found: Vec<f64> = crossings(&plain.rig, &plain.at(v, 1.0)).iter().map(|c| c.rpm).collect();
            assert_eq!(found.len(), expected.len(), "{v}: {found:?} {expected:?}");
            // Sought to a millionth of the range, 1.3e-3 rpm.
            found.iter().zip(&expected).for_each(|(a, b)| assert!((a - b).abs() < 2e-3, "{v}: {a} {b}"));
        }
    }
}

/// Figures and states of full throttle at every speed of a range: matched below the limit, held at it, then
/// driven past it by the air alone.
#[test]
fn each_speed_of_a_range_is_that_of_a_scan() {
    let job = Job { propeller: turned(-5.0).propeller, ..twin() };
    let plain = Plain::new(&job, 0.0);
    let found = range(&job, 16);
    let (mut matched, mut held) = (0, 0);
    for p in &found.points {
        let v = p.airspeed_m_s;
        let expected = plain.full(v);
        assert_eq!(p.full.is_some(), expected.is_some(), "{v}");
        let Some((f, e)) = p.full.as_ref().zip(expected) else {
            assert_eq!(p.full_state, State::OverLimitRpm, "{v}");
            continue;
        };
        assert_eq!(f.held_at_limit, e.held, "{v}");
        assert_eq!(p.full_state, if e.held { State::OverLimitRpm } else { State::Ok }, "{v}");
        (matched, held) = (matched + u32::from(!e.held), held + u32::from(e.held));
        // Two roads to one root, as in `envelope`: 2e-6 comes out there; of thrust as a share of the greatest.
        let near = |a: f64, b: f64, of: f64| assert!((a - b).abs() < 5e-6 * of, "{v}: {a} {b}");
        near(f.rpm, e.rpm, e.rpm);
        let thrust = 2.0 * e.loads.thrust_n;
        let power = e.loads.torque_n_m * rotation_rad_s(e.rpm);
        near(f.thrust_n, thrust, 4000.0);
        near(f.power_w, power, 60_000.0);
        assert_eq!(f.efficiency.is_some(), thrust > 0.0 && v > 0.0 && power > 0.0, "{v}");
        let useful = f.efficiency.map(|share| 2.0 * share * power / v);
        assert!(useful.is_none_or(|t| (t - thrust).abs() < 0.01), "{v}: {useful:?} {thrust}");
        if v > 0.0 {
            let sine = plain.sine(v).unwrap();
            near(f.rate_of_climb_m_s.unwrap(), v * sine, 10.0);
            near(p.asked_n.unwrap(), 2.0 * plain.asked_n(v) / plain.all_kept(), 4000.0);
            assert_eq!(f.climb_angle_deg.is_some(), sine.abs() <= 1.0, "{v}: {sine}");
            f.climb_angle_deg.into_iter().for_each(|a| near(a.to_radians().sin(), sine, 1.0));
        }
    }
    assert!(matched > 2 && held > 2, "{matched} {held}");
    let line: Vec<Condition> = found
        .points
        .iter()
        .filter_map(|p| Some(plain.at(p.airspeed_m_s, plain.full(p.airspeed_m_s)?.rpm)))
        .collect();
    let map =
        departure_map(&plain.rig.rotor, &line, &[0.5, 0.75].map(|x| x * plain.rig.rotor.blade.radius_m));
    let told = found.points.iter().filter_map(|p| p.full.as_ref()).map(|f| &f.departure_deg);
    for (told, cells) in told.zip(map.cells.columns()) {
        assert_eq!(told.len(), 2);
        for (told, cell) in told.iter().zip(cells) {
            // Far less than is read from it; the rpm are the same to a few millionths.
            assert!((told.unwrap() - cell.departure_deg.unwrap()).abs() < 1e-3, "{told:?} {cell:?}");
        }
    }
    let first = found.points.iter().position(|p| p.full.as_ref().unwrap().held_at_limit).unwrap();
    let from = found.marks.limit_rpm_from_m_s.unwrap();
    let between = found.points[first - 1].airspeed_m_s..=found.points[first].airspeed_m_s;
    assert!(between.contains(&from), "{from} {between:?}");
}

/// More thrust than weight climbs straight up, at an angle for which there is no sine.
#[test]
fn what_has_more_thrust_than_weight_has_no_angle_of_climb() {
    let mut job = demo(0);
    // 1.3 kN at rest, 98 kg: a little more than the weight where it is flown slowly.
    aeroplane(&mut job).mass_kg = 98.0;
    let found = range(&job, 60);
    let weight = weight_n(job.aircraft.as_ref().unwrap());
    let mut over = 0;
    for (f, asked) in found.points.iter().filter_map(|p| p.full.as_ref().zip(p.asked_n)) {
        let sine = (f.thrust_n - asked) / weight;
        assert_eq!(f.climb_angle_deg.is_some(), sine.abs() <= 1.0, "{sine} {f:?}");
        assert!(f.climb_angle_deg.is_none_or(f64::is_finite), "{f:?}");
        over += u32::from(sine > 1.0 && sine < 1.1);
    }
    assert!(over > 0);
}

/// Only what is flown from the stall on counts, and the stall itself.
#[test]
fn marks_are_the_best_of_a_scan_from_the_stall_on() {
    for job in [hasty(), twin()] {
        let plain = Plain::new(&job, 0.0);
        let marks = range(&job, 40).marks;
        let (stall, top) = (plain.stall_m_s(), marks.top_speed.unwrap().airspeed_m_s);
        let near = |told: Option<Mark>, best: (f64, f64)| {
            let told = told.unwrap();
            assert!(told.airspeed_m_s >= stall * (1.0 - 1e-9), "{told:?} {stall}");
            // What a parabola through three of forty speeds leaves of a flat top, and what the scan does.
            assert!((told.value / best.1 - 1.0).abs() < 1e-3, "{}: {told:?} {best:?}", job.title);
            assert!((told.airspeed_m_s - best.0).abs() < 0.05 * top, "{told:?} {best:?}");
        };
        near(marks.best_rate_of_climb, highest(stall, top, |v| Some(plain.sine(v)? * v)).unwrap());
        let angle = |v: f64| Some(plain.sine(v)?.asin().to_degrees());
        near(marks.best_angle_of_climb, highest(stall, top, angle).unwrap());
        // 50 kg of fuel at 0.31 kg/kWh.
        let power = |v: f64| {
            let rpm = plain.level_rpm(v);
            plain.loads(v, rpm).torque_n_m * rotation_rad_s(rpm) * propellers(job.aircraft.as_ref().unwrap())
        };
        let endurance = |v: f64| Some(50.0 / (0.31 * power(v) / 3.6e6));
        near(marks.best_endurance, highest(stall, top, endurance).unwrap());
        near(marks.best_range, highest(stall, top, |v| Some(v * endurance(v)?)).unwrap());
    }
}

/// Thrust with all blades turned, at a part of the throttle and at a power, of all propellers.
#[test]
fn the_best_turn_is_that_of_a_scan() {
    let level = (point(Some(40.0), Setting::Level {}), WorthOf::ShaftPower);
    let part = (point(Some(35.0), Setting::Throttle { fraction: 0.6 }), WorthOf::Thrust);
    let power = (point(Some(35.0), Setting::Power { power_w: 25_000.0 }), WorthOf::Thrust);
    let fast = (point(Some(45.0), Setting::FullThrottle {}), WorthOf::Thrust);
    for (p, of) in [level, part, power, fast] {
        let figure = |turn_deg: f64| {
            let mut job = Job { propeller: turned(turn_deg).propeller, ..twin() };
            job.flight_points = vec![p.clone()];
            let r = Rig::new(&job).unwrap().point(0).unwrap();
            let (figures, meeting) = match r.held {
                Some(h) => (h.figures, h.meeting),
                None if r.state == State::Ok && !r.notes.iter().any(|n| n.of_the_whole()) => {
                    (r.figures, r.meeting)
                }
                None => return None,
            };
            if of == WorthOf::ShaftPower { figures.power_w } else { meeting.total_thrust_n }
        };
        let sign = if of == WorthOf::ShaftPower { -1.0 } else { 1.0 };
        let scan = (-30..=50).map(|i| 0.5 * f64::from(i));
        let best =
            scan.filter_map(|t| Some((t, sign * figure(t)?))).max_by(|a, b| a.1.total_cmp(&b.1)).unwrap();
        let (as_set, value) = (figure(0.0).unwrap(), sign * best.1);
        let worth = pitch_worth(&Rig::new(&twin()).unwrap(), &p).unwrap();
        assert_eq!(worth.of, of);
        assert!((worth.as_set.unwrap() / as_set - 1.0).abs() < 1e-6, "{worth:?} {as_set}");
        // A scan by half degrees misses a flat top by little: 1e-3 of it is more than comes out.
        assert!((worth.best.unwrap() / value - 1.0).abs() < 1e-3, "{worth:?} {best:?}");
        assert!((worth.turn_deg.unwrap() - best.0).abs() < 0.6, "{worth:?} {best:?}");
        let gain = sign * (worth.best.unwrap() - as_set) / as_set;
        assert!((worth.gain.unwrap() - gain).abs() < 1e-6, "{worth:?} {gain}");
        assert!(!worth.at_end_of_search);
    }
}
