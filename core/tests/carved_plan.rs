//! What wood off can put right.

use crate::any_job::cases;
use crate::carved::carved_by;
use proptest::prelude::*;
use spokeshave::carved;
use spokeshave::carved::Measured;
use spokeshave::job::Job;
use spokeshave::rig::Rig;

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
        assert!(off_mm < 0.1, "{off_mm} {s:?}");
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
    // Measured once more and analysed from the start, the planned blade has the departures that were
    // predicted.
    let again = carved::analyse(&measured_again(&rig, &plan)).unwrap();
    for (a, b) in again.flight_points.iter().zip(&after.flight_points) {
        for (s, t) in a.stations.iter().zip(&b.stations) {
            for (x, y) in s.blades_deg.iter().zip(&t.blades_deg) {
                assert!((x.unwrap() - y.unwrap()).abs() < 1e-6);
            }
        }
    }
}

/// A blade too coarse with no chord to spare: turning it down planes the thin trailing edge away. With one
/// blade's own angle `a(t)` and lost share of chord `s(t)` after a turn t, the plan's turn has the least `(a
/// − wanted)² + (0.123 s)²`, so that neither less nor more of it is better.
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
    // Thin blades may not be planed: the limit holds, the blade that stands too flat stays so, the other
    // comes to meet it only as far as the limit.
    let mut rig = carved_by(|b, _| [if b == 0 { -1.0 } else { 0.0 }, 0.0, 0.0]);
    rig.job.carved.as_mut().unwrap().least_thickness_share = 1.0;
    let plan = carved::plan(&rig, 1).unwrap();
    let station = |b: usize| &plan.blades[b].stations[7];
    assert_eq!(station(0).face_leading_m, 0.0);
    assert!(station(0).wanted_deg - station(0).angle_deg > 0.8);
    assert!(plan.blades.iter().flat_map(|b| &b.stations).all(|s| s.back_m == 0.0));
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
}
