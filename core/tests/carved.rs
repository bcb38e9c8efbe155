//! Carved blades: what unequal blades do, their balance and strength.

use spokeshave::carved;
use spokeshave::job::{BladeReading, Carved, CarvedBlade, DEMOS, Job};
use spokeshave::rig::Rig;

pub(crate) fn demo() -> Rig {
    Rig::new(&Job::from_json(DEMOS[0].json).unwrap()).unwrap()
}

/// The demo with readings of every blade at every station, off by what is told for blade and station:
/// degrees, mm, mm.
pub(crate) fn carved_by(off: impl Fn(usize, usize) -> [f64; 3]) -> Rig {
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
        // The same blade by another road: but for rounding the same figures.
        assert!((drawn - carved).abs() < 1e-9, "{drawn} {carved}");
        let thrust: f64 = p.blades.iter().map(|b| b.thrust_n).sum();
        let torque: f64 = p.blades.iter().map(|b| b.torque_n_m).sum();
        let whole = rig.rotor.loads(&rig.condition(i).unwrap());
        assert!((thrust - whole.thrust_n).abs() < 1e-9 && (torque - whole.torque_n_m).abs() < 1e-9);
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
fn the_heavier_blade_is_named() {
    let found = carved::analyse(&carved_by(|b, _| [0.0, if b == 0 { 1.0 } else { 0.0 }, 0.0])).unwrap();
    assert_eq!(found.balance.heavy_blade, Some(1));
}

#[test]
fn blades_ahead_alike_turn_no_couple_with_the_shaft() {
    let mut rig = carved_by(|_, _| [0.0; 3]);
    let none = carved::analyse(&rig).unwrap();
    assert!(none.flight_points.iter().all(|p| p.once_per_turn.unwrap().track_moment_n_m.is_none()));
    let hub = rig.rotor.blade.hub_radius_m;
    let carved = rig.job.carved.as_mut().unwrap();
    for reading in &mut carved.blades[0].readings {
        reading.track_m = Some(0.004 * (reading.radius_m - hub));
    }
    carved.blades[1] = carved.blades[0].clone();
    let even = carved::analyse(&rig).unwrap();
    assert!(even.flight_points[0].once_per_turn.unwrap().track_moment_n_m.unwrap() < 1e-9);
}

/// Loads of unequal blades lie between those of propellers all of one blade and of the other, and add up to
/// the mean to first order.
#[test]
fn a_blade_of_larger_angle_carries_more_and_the_sum_is_that_of_the_mean() {
    let found =
        carved::analyse(&carved_by(|b, _| if b == 0 { [0.5, 0.0, 0.0] } else { [-0.5, 0.0, 0.0] })).unwrap();
    let p = &found.flight_points[2];
    assert!(p.blades[0].thrust_n > p.blades[1].thrust_n + 1.0);
    let sum: f64 = p.blades.iter().map(|b| b.thrust_n).sum();
    // Half a degree either way, to second order: 4e-4 comes out.
    assert!((sum / p.carved.thrust_n.unwrap() - 1.0).abs() < 1e-3, "{sum} {:?}", p.carved);
    let once = p.once_per_turn.unwrap();
    let moment = p.blades[0].bending_n_m - p.blades[1].bending_n_m;
    assert!((once.moment_n_m - moment).abs() < 1e-9 && once.mass_force_n.unwrap() < 1e-6);
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
    assert!((drawn.margin - drawn.drawn_margin.unwrap()).abs() < 1e-9, "{drawn:?}");
    assert!(thin.blade == 2 && thin.margin < 0.0 && thin.says().starts_with("Not strong enough"), "{thin:?}");
}
