//! Carved blades: what readings say, what unequal blades do, what wood off can put right.

use std::f64::consts::TAU;

use crate::any_job::cases;
use proptest::prelude::*;
use spokeshave::carved::{self, Measured, import};
use spokeshave::job::{AngleReference, BladeReading, Carved, CarvedBlade, DEMOS, Job};
use spokeshave::result::Known;
use spokeshave::rig::Rig;
use spokeshave::rotor::Rotor;

fn demo() -> Rig {
    Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap()
}

/// The demo with readings of every blade at every station, off by what is told for blade and station: degrees, mm, mm.
fn carved_by(off: impl Fn(usize, usize) -> [f64; 3]) -> Rig {
    let rig = demo();
    let blade = |b: usize| CarvedBlade {
        readings: (rig.rotor.blade.station_radii_m().enumerate())
            .map(|(s, r)| {
                let cut = rig.rotor.blade.cut(r);
                let [degrees, chord, thickness] = off(b, s);
                BladeReading {
                    radius_m: r,
                    angle_deg: Some(cut.angle_rad.to_degrees() + degrees),
                    chord_m: Some(cut.chord_m + 1e-3 * chord),
                    thickness_m: Some(cut.thickness_ratio * cut.chord_m + 1e-3 * thickness),
                    track_m: None,
                    confirmed: false,
                }
            })
            .collect(),
    };
    let carved = Carved { blades: (0..2).map(blade).collect(), ..Carved::default() };
    let job = Job { carved: Some(carved), ..rig.job.clone() };
    assert_eq!(job.check(), []);
    assert_eq!(Job::from_json(&job.to_json()).unwrap(), job);
    Rig::new(&job).unwrap()
}

#[test]
fn blades_as_drawn_do_what_the_drawing_does() {
    let rig = carved_by(|_, _| [0.0; 3]);
    let found = carved::analyse(&rig).unwrap();
    assert_eq!(found.doubts, []);
    for (i, p) in found.flight_points.iter().enumerate() {
        let (drawn, carved) = (p.drawn.rpm.unwrap(), p.carved.rpm.unwrap());
        assert!((drawn - carved).abs() < 1e-3, "{drawn} {carved}");
        let thrust: f64 = p.blades.iter().map(|b| b.thrust_n).sum();
        let torque: f64 = p.blades.iter().map(|b| b.torque_n_m).sum();
        let whole = rig.rotor.loads(&rig.condition(i).unwrap());
        assert!((thrust - whole.thrust_n).abs() < 1e-3 && (torque - whole.torque_n_m).abs() < 1e-3);
        let once = p.once_per_turn.unwrap();
        assert!(once.moment_n_m < 1e-6 && once.air_force_n < 1e-6 && once.mass_force_n.unwrap() < 1e-6);
    }
    assert_eq!(found.balance.heavy_blade, None);
    let plan = carved::plan(&rig, 2).unwrap();
    for s in plan.blades.iter().flat_map(|b| &b.stations) {
        assert_eq!([s.face_leading_m, s.face_trailing_m, s.back_m, s.trailing_edge_m], [0.0; 4], "{s:?}");
    }
}

#[test]
fn angles_between_readings_are_recovered_and_said_to_be_interpolated() {
    // Off by a smooth twist; read on the face at every other station of one blade, at all of the other.
    let twist = |s: usize| 1.0 - 0.06 * s as f64;
    let truth = carved_by(|b, s| if b == 0 { [twist(s), 0.5, 0.3] } else { [-0.4, 0.0, 0.0] });
    let mut job = truth.job.clone();
    let carved = job.carved.as_mut().unwrap();
    carved.angle_reference = AngleReference::FlatFace;
    for (b, blade) in carved.blades.iter_mut().enumerate() {
        for reading in &mut blade.readings {
            let ratio = reading.thickness_m.unwrap() / reading.chord_m.unwrap();
            let face = truth.rotor.blade.face_to_chord_of(reading.radius_m, ratio).unwrap();
            *reading.angle_deg.as_mut().unwrap() -= face.to_degrees();
        }
        let keep = |s: &usize| b == 1 || s.is_multiple_of(2);
        blade.readings = (0..11).filter(keep).map(|s| blade.readings[s]).collect();
    }
    let found = carved::analyse(&Rig::new(&job).unwrap()).unwrap();
    for (s, station) in found.blades[0].stations.iter().enumerate() {
        let drawn = truth.rotor.blade.cut(station.radius_m).angle_rad.to_degrees();
        assert!((station.angle_deg.carved - drawn - twist(s)).abs() < 0.05, "{station:?}");
        let known = if s.is_multiple_of(2) { Known::Measured } else { Known::Interpolated };
        assert_eq!(station.angle_deg.known, known);
    }
    assert!(found.blades[1].stations.iter().all(|s| s.angle_deg.known == Known::Measured));
}

#[test]
fn what_was_not_read_is_said() {
    let mut job = carved_by(|_, _| [1.0, 0.0, 0.0]).job;
    let carved = job.carved.as_mut().unwrap();
    carved.blades.truncate(1);
    carved.blades[0].readings = carved.blades[0].readings[3..5].to_vec();
    carved.blades[0].readings[0].thickness_m = None;
    carved.blades[0].readings[1].thickness_m = None;
    let found = carved::analyse(&Rig::new(&job).unwrap()).unwrap();
    let first = &found.blades[0].stations;
    assert_eq!((first[0].angle_deg.known, first[3].angle_deg.known), (Known::Held, Known::Measured));
    assert_eq!(first[3].thickness_m.known, Known::AsDrawn);
    assert!(found.blades[1].stations.iter().all(|s| s.chord_m.known == Known::OtherBlades));
    assert!(found.flight_points[0].once_per_turn.unwrap().moment_n_m < 1e-9);
    job.carved = None;
    assert!(carved::analyse(&Rig::new(&job).unwrap()).unwrap_err().to_string().contains("no readings"));
}

/// Two blades of one shape, one of them wider and thicker everywhere by 1 % so that its sections are 2.01 % heavier: the unbalance is that share of the mass
/// moment, and turning it gives m r ω² (any text of mechanics; common practice).
#[test]
fn unequal_masses_shake_by_their_moment_times_the_square_of_the_speed() {
    let rig = carved_by(|_, _| [0.0; 3]);
    let mut job = rig.job.clone();
    for reading in &mut job.carved.as_mut().unwrap().blades[0].readings {
        reading.chord_m = reading.chord_m.map(|c| 1.01 * c);
        reading.thickness_m = reading.thickness_m.map(|t| 1.01 * t);
    }
    let found = carved::analyse(&Rig::new(&job).unwrap()).unwrap();
    let even = found.balance.blades[1].moment_kg_m;
    assert!((found.balance.unbalance_kg_m / even - 0.0201).abs() < 1e-4, "{:?}", found.balance);
    assert_eq!(found.balance.heavy_blade, Some(1));
    for p in &found.flight_points {
        let omega = p.carved.rpm.unwrap() * TAU / 60.0;
        let force = p.once_per_turn.unwrap().mass_force_n.unwrap();
        assert!((force / (found.balance.unbalance_kg_m * omega * omega) - 1.0).abs() < 1e-9);
    }
    let at_tip = 1e-3 * found.balance.grams_at_tip * rig.rotor.blade.radius_m;
    assert!((at_tip - found.balance.unbalance_kg_m).abs() < 1e-12);
}

/// A blade whose masses lie ahead by a (r − h), as a straight lean from the hub at h does, turns with the moment ω² a (I − h S) across the shaft, I and S its
/// moments of inertia and of mass (any text of mechanics; common practice).
#[test]
fn a_blade_out_of_track_turns_its_moment_with_the_shaft() {
    let mut rig = carved_by(|_, _| [0.0; 3]);
    let none = carved::analyse(&rig).unwrap();
    assert!(none.flight_points.iter().all(|p| p.once_per_turn.unwrap().track_moment_n_m.is_none()));
    let (hub, slope) = (rig.rotor.blade.hub_radius_m, 0.004);
    for reading in &mut rig.job.carved.as_mut().unwrap().blades[0].readings {
        reading.track_m = Some(slope * (reading.radius_m - hub));
    }
    // The outermost reading is held over the last of the blade.
    let last = rig.rotor.blade.station_radii_m().last().unwrap();
    let mass = spokeshave::wood::mass(&spokeshave::wood::BladeBeam::new(&rig).unwrap());
    let lean = slope * (mass.blade_inertia_kg_m2 - hub * mass.static_moment_kg_m);
    let found = carved::analyse(&rig).unwrap();
    for p in &found.flight_points {
        let omega = p.carved.rpm.unwrap() * TAU / 60.0;
        let moment = p.once_per_turn.unwrap().track_moment_n_m.unwrap();
        let share = moment / (omega * omega * lean);
        assert!((0.97..=1.0).contains(&share), "{share} with the last reading at {last}");
    }
    // Both blades ahead alike: nothing turns.
    let carved = rig.job.carved.as_mut().unwrap();
    carved.blades[1] = carved.blades[0].clone();
    let even = carved::analyse(&rig).unwrap();
    assert!(even.flight_points[0].once_per_turn.unwrap().track_moment_n_m.unwrap() < 1e-9);
}

/// Loads of unequal blades lie between those of propellers all of one blade and of the other, and add up to the mean to first order.
#[test]
fn a_blade_of_larger_angle_carries_more_and_the_sum_is_that_of_the_mean() {
    let found =
        carved::analyse(&carved_by(|b, _| if b == 0 { [0.5, 0.0, 0.0] } else { [-0.5, 0.0, 0.0] })).unwrap();
    let p = &found.flight_points[2];
    assert!(p.blades[0].thrust_n > p.blades[1].thrust_n + 1.0);
    let sum: f64 = p.blades.iter().map(|b| b.thrust_n).sum();
    assert!((sum / p.carved.thrust_n.unwrap() - 1.0).abs() < 0.01, "{sum} {:?}", p.carved);
    let once = p.once_per_turn.unwrap();
    let moment = p.blades[0].bending_n_m - p.blades[1].bending_n_m;
    assert!((once.moment_n_m - moment).abs() < 1e-9 && once.mass_force_n.unwrap() < 1e-6);
}

/// The sizes that a plan leaves, as readings of another measurement.
fn measured_again(rig: &Rig, plan: &spokeshave::result::RemovalPlan) -> Rig {
    let mut job = rig.job.clone();
    for (blade, planned) in job.carved.as_mut().unwrap().blades.iter_mut().zip(&plan.blades) {
        for (reading, p) in blade.readings.iter_mut().zip(&planned.stations) {
            reading.angle_deg = Some(p.angle_deg);
            reading.chord_m = Some(p.chord_m);
            reading.thickness_m = Some(p.thickness_m);
        }
    }
    Rig::new(&job).unwrap()
}

#[test]
fn a_blade_left_full_is_brought_to_the_drawing() {
    // Thick and wide enough everywhere: off by half a degree either way, 2 mm in chord, 1.5 mm in thickness.
    let rig = carved_by(|b, s| [if b == 0 { 0.5 } else { -0.6 } * (1.0 - 0.05 * s as f64), 2.0, 1.5]);
    let plan = carved::plan(&rig, carved::usual_point(&rig)).unwrap();
    assert_eq!(plan.flight_point, "Climb");
    for s in plan.blades.iter().flat_map(|b| &b.stations).filter(|s| s.radius_m > 0.2) {
        // Less than a tenth of a millimetre over the chord is not worth a cut.
        let off_mm = 1e3 * s.chord_m * (s.angle_deg - s.wanted_deg).to_radians().abs();
        assert!(off_mm < 0.11, "{off_mm} {s:?}");
    }
    let (before, after) = (carved::analyse(&rig).unwrap(), &plan.after);
    let worst = |c: &spokeshave::result::Carved| {
        let points = &c.flight_points[1].stations;
        let off = points
            .iter()
            .flat_map(|s| s.blades_deg.iter().map(move |d| (d.unwrap() - s.drawn_deg.unwrap()).abs()));
        off.fold(0.0, f64::max)
    };
    assert!(worst(&before) > 0.5 && worst(after) < 0.25, "{} {}", worst(&before), worst(after));
    let once = |c: &spokeshave::result::Carved| c.flight_points[1].once_per_turn.unwrap().moment_n_m;
    assert!(once(after) < 0.1 * once(&before), "{} {}", once(&before), once(after));
    // Measured once more and analysed from the start, the planned blade has the departures that were predicted.
    let again = carved::analyse(&measured_again(&rig, &plan)).unwrap();
    for (a, b) in again.flight_points.iter().zip(&after.flight_points) {
        for (s, t) in a.stations.iter().zip(&b.stations) {
            for (x, y) in s.blades_deg.iter().zip(&t.blades_deg) {
                assert!((x.unwrap() - y.unwrap()).abs() < 1e-6);
            }
        }
    }
}

/// A blade too coarse with no chord to spare: turning it down planes the thin trailing edge away. With one blade's own angle `a(t)` and lost share of chord `s(t)` after
/// a turn t, the plan's turn has the least `(a − wanted)² + (0.123 s)²`, so that neither less nor more of it is better.
#[test]
fn chord_that_would_be_lost_is_weighed_against_the_angle() {
    let mut rig = carved_by(|_, _| [0.8, 0.0, 1.5]);
    rig.job.carved.as_mut().unwrap().least_chord_share = 0.6;
    let plan = carved::plan(&rig, 1).unwrap();
    let mut weighed = 0;
    for s in plan.blades[0].stations.iter().filter(|s| s.radius_m > 0.3 && s.face_trailing_m > 0.0) {
        let cut = rig.rotor.blade.cut(s.radius_m);
        let outline = spokeshave::section::library().outline("clark-y", cut.thickness_ratio).unwrap();
        let profile = carved::Profile::new(&outline).unwrap();
        let slab = carved::Slab {
            face_rad: 0.0,
            chord_m: cut.chord_m,
            thickness_m: cut.thickness_ratio * cut.chord_m + 1.5e-3,
        };
        let lost = |turn: f64| {
            1.0 - profile.cut(slab, &carved::Cuts::turning(slab.chord_m, turn)).chord_m / cut.chord_m
        };
        let turn = -(s.face_trailing_m / slab.chord_m).atan();
        let left = s.angle_deg - s.wanted_deg;
        assert!(left > 0.0 && left < 0.8, "part of the way: {s:?}");
        // Turning further takes an angle off what is left and chord besides.
        let cost = |more: f64| (left.to_radians() + more).powi(2) + (0.7 / 5.7 * lost(turn + more)).powi(2);
        let step = 5e-4;
        assert!(cost(0.0) <= cost(step) + 1e-7 && cost(0.0) <= cost(-step) + 1e-7, "{s:?}");
        weighed += 1;
    }
    assert!(weighed > 3, "{weighed}");
}

#[test]
fn what_cannot_be_reached_evens_the_blades() {
    // Thin blades may not be planed: the limit holds, the blade that stands too flat stays so, the other comes to meet it only as far as the limit.
    let mut rig = carved_by(|b, _| [if b == 0 { -1.0 } else { 0.0 }, 0.0, 0.0]);
    rig.job.carved.as_mut().unwrap().least_thickness_share = 1.0;
    let plan = carved::plan(&rig, 1).unwrap();
    let station = |b: usize| &plan.blades[b].stations[7];
    assert_eq!(station(0).face_leading_m, 0.0);
    assert!(station(0).wanted_deg - station(0).angle_deg > 0.8);
    assert!(plan.blades.iter().flat_map(|b| &b.stations).all(|s| s.back_m == 0.0));
}

#[test]
fn doubts_name_the_likely_cause() {
    type Spoil = fn(&mut BladeReading);
    let cases: [(Spoil, &str); 7] = [
        (|r| r.angle_deg = r.angle_deg.map(|a| 90.0 - a), "from the shaft"),
        (|r| r.angle_deg = r.angle_deg.map(|a| -a), "sign"),
        (|r| r.angle_deg = r.angle_deg.map(f64::to_radians), "radians"),
        (|r| r.chord_m = r.chord_m.map(|c| c / 25.4), "inches"),
        (|r| r.chord_m = r.chord_m.map(|c| 0.1 * c), "centimetres"),
        (|r| r.thickness_m = r.chord_m, "swapped"),
        (|r| r.angle_deg = r.angle_deg.map(|a| a + 9.0), "another station"),
    ];
    for (spoil, cause) in cases {
        let mut rig = carved_by(|_, _| [0.0; 3]);
        spoil(&mut rig.job.carved.as_mut().unwrap().blades[1].readings[6]);
        let doubts = carved::doubts(&rig);
        assert_eq!((doubts.len(), doubts[0].blade), (1, 2), "{doubts:?}");
        assert!(doubts[0].message.contains(cause), "{doubts:?}");
    }
}

#[test]
fn what_is_hard_to_believe_is_left_out_until_it_is_confirmed() {
    // One angle of blade 2 read from the shaft, and nothing else wrong: the neighbours and the other blade stay as they are.
    let mut rig = carved_by(|_, _| [0.0; 3]);
    let at = |rig: &mut Rig, change: &dyn Fn(&mut BladeReading)| {
        change(&mut rig.job.carved.as_mut().unwrap().blades[1].readings[6]);
    };
    at(&mut rig, &|r| r.angle_deg = r.angle_deg.map(|a| 90.0 - a));
    let found = carved::analyse(&rig).unwrap();
    assert!(!found.doubts[0].counted && (found.doubts[0].blade, found.doubts[0].reading) == (2, 7));
    let off = |c: &spokeshave::result::Carved| {
        let all = c.blades.iter().flat_map(|b| &b.stations).map(|s| s.angle_deg.from_drawn.abs());
        all.fold(0.0, f64::max)
    };
    assert!(off(&found) < 1e-6, "{}", off(&found));
    let station = &found.blades[1].stations[6];
    assert_eq!((station.angle_deg.known, station.chord_m.known), (Known::Interpolated, Known::Measured));
    // Confirmed it counts, and is still told.
    at(&mut rig, &|r| r.confirmed = true);
    let found = carved::analyse(&rig).unwrap();
    assert!(found.doubts[0].counted && off(&found) > 20.0);
    // A blade that nobody measured is not turned by it.
    rig.job.carved.as_mut().unwrap().blades.remove(0);
    rig.job.carved.as_mut().unwrap().blades[0].readings[6].confirmed = false;
    let found = carved::analyse(&rig).unwrap();
    assert!(off(&found) < 1e-6 && found.blades[1].readings == 0);
    // Nothing left: it is said why.
    let all = &mut rig.job.carved.as_mut().unwrap().blades[0].readings;
    all.retain(|r| (r.radius_m - 0.48).abs() < 1e-3);
    (all[0].chord_m, all[0].thickness_m) = (None, None);
    assert!(carved::analyse(&rig).unwrap_err().to_string().contains("none is confirmed"));
}

#[test]
fn sheets_are_read_with_units_and_faults_have_line_and_column() {
    let p = demo().job.propeller;
    let good = "blade;radius [mm];face angle;chord (mm);thickness_mm\n1;540;18°30';75,5;\n2;540;18:30;75;10,8\n2;480;20,25;;\n";
    let (carved, unused) = import::read(good, &p, None).unwrap();
    assert_eq!((carved.angle_reference, unused.len()), (AngleReference::FlatFace, 0));
    assert_eq!(carved.blades[1].readings[0].radius_m, 0.48);
    assert_eq!(carved.blades[0].readings[0].chord_m, Some(0.0755));
    assert!(carved.blades.iter().all(|b| b.readings.last().unwrap().angle_deg == Some(18.5)));
    let cases = [
        ("", "empty"),
        ("blade,radius,angle\n1,540,18", "line 1, column 2: \"radius\" needs its unit"),
        ("blade,angle\n1,18", "line 1: no column radius_mm"),
        ("blade,radius_mm,angle\n1,540,steep", "line 2, column 3: angle: \"steep\"; allowed is a number"),
        ("blade,radius_mm,angle\n1,540,118", "line 2, column 3: angle: \"118\"; allowed is -90 to 90"),
        (
            "blade,radius_m,angle\n1,540,18",
            "line 2, column 2: radius: \"540\"; allowed is 0.0001 to 6 m; perhaps it is in mm",
        ),
        (
            "blade,radius_mm,angle\n1,840,18",
            "line 2, column 2: radius: \"840\"; allowed is 90.0 to 760.0 mm, from the hub to the tip",
        ),
        (
            "blade,radius_mm,angle\n1,80,18",
            "line 2, column 2: radius: \"80\"; allowed is 90.0 to 760.0 mm, from the hub to the tip",
        ),
        (
            "blade,radius_mm,angle\n1,0.54,18",
            "\"0.54\"; allowed is 90.0 to 760.0 mm, from the hub to the tip; perhaps it is in m",
        ),
        (
            "blade;radius_cm;angle\n1;540,5;18",
            "\"540,5\"; allowed is 90.0 to 760.0 mm, from the hub to the tip; perhaps it is in mm",
        ),
        (
            "blade,station_%,angle\n1,0.7,18",
            "line 2, column 2: station: \"0.7\"; allowed is 90.0 to 760.0 mm",
        ),
        (
            "blade,radius_mm\n1,540\n1,600",
            "line 1: no line holds an angle, a chord, a thickness or a track; there is no column angle, chord_mm, thickness_mm, track_mm",
        ),
        ("blade,radius_mm,face angle,chord_mm\n1,540,,", "there is no column thickness_mm, track_mm"),
        ("radius_mm,angle,chord_mm,thickness_mm,track_mm\n540,,,,", "no line holds an angle"),
        ("blade,radius_mm,angle\n3,540,18", "1 to 2, the blades of the job"),
        ("blade,radius_mm,angle\n1.5,540,18", "a whole number"),
        ("blade,radius_mm,angle\n1,540,18\n1,540,19", "line 3, column 2: radius: \"540\""),
        ("blade,radius_mm,angle,face angle\n1,540,18,18", "one of them is enough"),
        ("blade,radius_mm,chord_mm,thickness_mm\n1,540,10,75", "swapped"),
        ("blade,radius_mm,angle\n1,540,18 75", "75 minutes behind 18 degrees; minutes are 0 to 59"),
        ("blade,station,angle\n1,4,18", "perhaps it is the number of a station"),
        ("blade,radius_mm\n1,540,18", "line 2: 3 columns; the headings have 2"),
    ];
    for (text, expected) in cases {
        let message = import::read(text, &p, None).unwrap_err().to_string();
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
}

#[test]
fn a_reading_between_stations_counts() {
    let mut job = carved_by(|_, _| [0.0; 3]).job;
    let more = BladeReading { radius_m: 0.575, angle_deg: Some(21.0), ..BladeReading::default() };
    let readings = &mut job.carved.as_mut().unwrap().blades[0].readings;
    readings.insert(readings.partition_point(|r| r.radius_m < 0.575), more);
    let rig = Rig::new(&job).unwrap();
    let measured = Measured::new(&rig).unwrap();
    let at = measured.radii_m.iter().position(|r| *r == 0.575).unwrap();
    assert!((measured.blades[0][at].angle_rad.to_degrees() - 21.0).abs() < 1e-9);
    assert_eq!(carved::analyse(&rig).unwrap().blades[0].stations.len(), 12);
}

proptest! {
    #![proptest_config(cases(12))]
    /// Wood only comes off, limits hold, and every departure is at most what it was or as wanted.
    #[test]
    fn no_plan_asks_for_adding(off in prop::collection::vec([-1.5..1.5f64, -3.0..3.0f64, -1.0..1.5f64], 22)) {
        let rig = carved_by(|b, s| off[11 * b + s]);
        let plan = carved::plan(&rig, 2).unwrap();
        let before = Measured::new(&rig).unwrap();
        for (b, blade) in plan.blades.iter().enumerate() {
            for (s, p) in blade.stations.iter().enumerate() {
                for depth in [p.face_leading_m, p.face_trailing_m, p.back_m, p.trailing_edge_m, p.chord_lost_m] {
                    prop_assert!(depth >= 0.0, "{:?}", p);
                }
                let (size, cut) = (before.blades[b][s], rig.rotor.blade.cut(p.radius_m));
                prop_assert!(p.chord_m <= size.chord_m + 1e-12 && p.thickness_m <= size.thickness_m + 1e-12);
                let least = (0.95 * cut.chord_m).min(size.chord_m);
                prop_assert!(p.chord_m >= least - 1e-9, "{:?}", p);
                prop_assert!(p.thickness_m >= (0.95 * cut.thickness_ratio * cut.chord_m).min(size.thickness_m) - 1e-9);
            }
        }
    }

    #[test]
    fn no_sheet_panics(text in "\\PC{0,120}") {
        let _: Result<_, _> = import::read(&text, &demo().job.propeller, None);
        let _: Option<f64> = carved::angle_of(&text);
        let _: &Rotor = &demo().rotor;
    }
}

#[test]
fn nothing_is_cut_where_a_blade_was_not_read() {
    // Both blades 1.5 degrees coarse: the first read up to station 8, the second up to station 6.
    let mut job = carved_by(|_, _| [1.5, 0.0, 0.0]).job.clone();
    let cut_short = |job: &mut Job, blade: usize, count: usize| {
        job.carved.as_mut().unwrap().blades[blade].readings.truncate(count);
    };
    cut_short(&mut job, 0, 8);
    cut_short(&mut job, 1, 6);
    let plan = carved::plan(&Rig::new(&job).unwrap(), 2).unwrap();
    for blade in &plan.blades {
        for (s, p) in blade.stations.iter().enumerate() {
            let cut = p.face_leading_m + p.face_trailing_m + p.back_m + p.trailing_edge_m;
            assert_eq!((cut > 0.0, p.read), (s < 6, s < 6), "{} {s} {p:?}", blade.blade);
        }
    }
    // A blade without any reading: none is cut.
    cut_short(&mut job, 1, 0);
    let why = carved::plan(&Rig::new(&job).unwrap(), 2).unwrap_err();
    assert_eq!(why, carved::CarvedError::Unread(2));
}

#[test]
fn what_the_cuts_do_to_balance_is_said() {
    // The coarse blade is cut, and is the lighter one then.
    let rig = carved_by(|b, _| if b == 0 { [1.2, 0.0, 0.0] } else { [0.0; 3] });
    let (before, plan) = (carved::analyse(&rig).unwrap(), carved::plan(&rig, 2).unwrap());
    let grams = plan.after.balance.grams_at_tip;
    assert!(before.balance.grams_at_tip < 0.1 && grams > 0.5, "{grams}");
    let warns = plan.warns(&before).join(" ");
    assert!(warns.contains("balance worse") && warns.contains("back of blade 2"), "{warns}");
    assert!(warns.contains(&format!("{:.1} g", grams / 0.75)), "{warns}");
}

#[test]
fn balance_is_not_known_from_angles_alone() {
    let mut job = carved_by(|_, _| [0.0; 3]).job.clone();
    for reading in job.carved.as_mut().unwrap().blades.iter_mut().flat_map(|b| &mut b.readings) {
        (reading.chord_m, reading.thickness_m) = (None, None);
    }
    let found = carved::analyse(&Rig::new(&job).unwrap()).unwrap();
    assert!(found.flight_points.iter().all(|p| p.once_per_turn.unwrap().mass_force_n.is_none()));
    let balance = found.balance;
    assert!(!balance.read && balance.says().starts_with("not known"), "{}", balance.says());
}

#[test]
fn a_blade_carved_thin_is_held_to_its_own_strength() {
    let least =
        |off: f64| carved::analyse(&carved_by(|b, _| [0.0, 0.0, b as f64 * off])).unwrap().strength.unwrap();
    let (drawn, thin) = (least(0.0), least(-2.5));
    assert!((drawn.margin - drawn.drawn_margin.unwrap()).abs() < 1e-3, "{drawn:?}");
    assert!(thin.blade == 2 && thin.margin < 0.0 && thin.says().starts_with("Not strong enough"), "{thin:?}");
}
