//! What keeps a blade from being made is said with its place and its amount.

use crate::bench::{bench, demo};
use spokeshave::bench::Fault;
use spokeshave::job::{Flange, Hub, Job, Limits, LinePoint, Making, Wishes, Wood};
use spokeshave::result::Limit;
use spokeshave::rig::Rig;
use spokeshave::shape::kept;

#[test]
fn what_cannot_be_made_is_said_with_its_place_and_its_amount() {
    let with = |change: fn(&mut Job)| {
        let mut job = demo(0);
        change(&mut job);
        bench(&job).err().map(|e| e.0).unwrap_or_default()
    };
    let thin = with(|job| {
        job.wood = None;
        job.bench = Some(Making { blank_thickness_m: Some(0.06), ..Making::default() });
    });
    assert!(
        matches!(thin[..], [Fault::ThickerThanBlank { by_mm, radius_mm, .. }] if (10.0..20.0).contains(&by_mm) && radius_mm > 0.0),
        "{thin:?}"
    );
    let below_boss =
        with(|job| job.bench = Some(Making { blank_thickness_m: Some(0.08), ..Making::default() }));
    assert!(
        matches!(below_boss[..], [Fault::ThickerThanBlank { by_mm, radius_mm: 0.0, .. }] if (by_mm - 10.0).abs() < 1e-6),
        "{below_boss:?}"
    );
    let said = below_boss[0].to_string();
    assert_eq!(
        said,
        "boss of the hub: the blank must be 90.0 mm thick, 10.0 mm more than the 80.0 mm it has"
    );
    let narrow = with(|job| job.bench = Some(Making { blank_width_m: Some(0.15), ..Making::default() }));
    assert!(
        matches!(narrow[..], [Fault::WiderThanBlank { by_mm, radius_mm: 0.0, .. }] if (by_mm - 30.0).abs() < 1e-6),
        "{narrow:?}"
    );
    let inside = with(|job| job.propeller.hub_diameter_m = 0.3);
    assert!(
        matches!(inside[..], [Fault::InsideHub { station: 1, by_mm, .. }] if (by_mm - 30.0).abs() < 0.1),
        "{inside:?}"
    );
    let thick = with(|job| job.propeller.stations[0].thickness_ratio = 0.9);
    assert!(matches!(thick[..], [Fault::NoOutline { station: 1, .. }]), "{thick:?}");
    let low_boss = with(|job| {
        let hub = Hub {
            thickness_m: 0.04,
            flange_diameter_m: 0.15,
            bore_m: 0.0,
            bolts: 6,
            bolt_circle_m: 0.12,
            bolt_diameter_m: 0.01,
            bolt_torque_n_m: None,
        };
        job.wood = Some(Wood { hub: Some(hub), ..Wood::default() });
    });
    assert!(
        matches!(low_boss[..], [Fault::CrossesHub { given_mm, by_mm, radius_mm, .. }]
            if (given_mm - 40.0).abs() < 1e-6 && (1.0..20.0).contains(&by_mm) && radius_mm <= 90.0),
        "{low_boss:?}"
    );
    let wide_flange = with(|job| {
        job.propeller.hub_diameter_m = 0.11;
        job.bench = Some(Making { flange: Some(Flange::Sae1), ..Making::default() });
    });
    // 4 3/8 in and 3/8 in: the holes reach 60.325 mm; of a radius of 55 mm 2 % stay as a wall.
    assert!(
        wide_flange.iter().any(|f| matches!(f, Fault::DrilledPastBoss { reach_mm, by_mm, .. }
            if (reach_mm - 60.325).abs() < 1e-6 && (by_mm - 6.425).abs() < 1e-6)),
        "{wide_flange:?}"
    );
    // Two stations half a millimetre apart, the chord turned by half a turn between them: the surface turns
    // through itself.
    let wrung = with(|job| {
        let mut next = job.propeller.stations[0].clone();
        next.radius_fraction += 0.0006;
        next.angle_deg = Some(-90.0);
        job.propeller.stations[0].angle_deg = Some(90.0);
        job.propeller.stations.insert(1, next);
        job.wood = None;
    });
    assert!(
        matches!(wrung[..], [Fault::CrossesItself { radius_mm, by_mm }] if (120.0..120.5).contains(&radius_mm) && by_mm > 0.1),
        "{wrung:?}"
    );
    let crowded = with(|job| {
        job.propeller.blades = 12;
        job.propeller.stations.iter_mut().for_each(|s| s.chord_m *= 2.0);
    });
    assert!(
        crowded.iter().any(|f| matches!(f, Fault::BladesOverlap { by_mm, .. } if *by_mm > 0.0)),
        "{crowded:?}"
    );
}

#[test]
fn a_trailing_edge_too_thick_for_its_chord_is_refused_at_every_such_station() {
    let with_edge = |edge_m: f64| {
        let mut job = demo(0);
        job.bench = Some(Making { trailing_edge_m: Some(edge_m), ..Making::default() });
        bench(&job).err().map(|e| e.0).unwrap_or_default()
    };
    let chords_m: Vec<f64> = demo(0).propeller.stations.iter().map(|s| s.chord_m).collect();
    let narrowest_m = chords_m.iter().copied().fold(f64::INFINITY, f64::min);
    // Up to 5 % of the chord can be made, and no more.
    assert_eq!(with_edge(0.049 * narrowest_m), []);
    let wanted_m = 0.09 * narrowest_m;
    let faults = with_edge(wanted_m);
    assert_eq!(faults.len(), 3, "{faults:?}");
    for fault in &faults {
        let Fault::TrailingEdgeTooThick { station, radius_mm, wanted_mm, most_mm } = fault else {
            panic!("{fault:?}")
        };
        let chord_mm = 1e3 * chords_m[station - 1];
        assert!((most_mm - 0.05 * chord_mm).abs() < 1e-9 && wanted_mm > most_mm, "{fault:?}");
        assert!((wanted_mm - 1e3 * wanted_m).abs() < 1e-9 && *radius_mm > 100.0, "{fault:?}");
        assert!(fault.to_string().contains("least trailing edge"), "{fault}");
    }
}

/// A blank of the size that a limit on it tells is thick and wide enough, one a little smaller is not; edges
/// and tip are rounded in one of the two alone, which takes a millimetre.
#[test]
fn the_blank_that_a_limit_speaks_of_is_the_one_the_blades_are_cut_from() {
    let swept = |job: &mut Job| {
        let line = [(0.2, 0.0, 0.0), (1.0, 0.02, 0.01)];
        let line =
            line.map(|(radius_fraction, sweep_m, rake_m)| LinePoint { radius_fraction, sweep_m, rake_m });
        job.bench = Some(Making { stacking_line: line.to_vec(), ..Making::default() });
    };
    let ahead = |job: &mut Job| {
        job.bench = Some(Making { stacking_fraction: Some(0.25), ..Making::default() });
    };
    let bare = |job: &mut Job| job.wood = None;
    let small_hub = |job: &mut Job| {
        (job.wood, job.propeller.hub_diameter_m) = (None, 0.04);
    };
    let leaning = |job: &mut Job| job.wood = Some(Wood { rake_deg: 2.0, ..Wood::default() });
    let changes: [&dyn Fn(&mut Job); 6] = [&|_| (), &swept, &ahead, &bare, &small_hub, &leaning];
    for (i, change) in changes.into_iter().enumerate() {
        let mut job = demo(0);
        change(&mut job);
        let limits =
            Limits { blank_width_most_m: Some(1.0), blank_depth_most_m: Some(1.0), ..Limits::default() };
        job.wishes = Some(Wishes { limits, ..Wishes::default() });
        let margins = kept(&Rig::new(&job).unwrap());
        let told = |limit| margins.iter().find(|m| m.limit == limit).and_then(|m| m.found).unwrap();
        let (width, depth) = (told(Limit::BlankWidthMost), told(Limit::BlankDepthMost));
        let mut cut = |width: f64, depth: f64| {
            let making = job.bench.get_or_insert_default();
            (making.blank_width_m, making.blank_thickness_m) = (Some(width), Some(depth));
            bench(&job).err().map(|e| e.0).unwrap_or_default()
        };
        let enough = cut(width + 1e-3, depth + 1e-3);
        assert!(enough.is_empty(), "{i}: {width} {depth} {enough:?}");
        let narrow = cut(width - 1e-3, depth + 1e-3);
        assert!(matches!(narrow[..], [Fault::WiderThanBlank { .. }]), "{i}: {width} {narrow:?}");
        let thin = cut(width + 1e-3, depth - 1e-3);
        assert!(matches!(thin[..], [Fault::ThickerThanBlank { .. }]), "{i}: {depth} {thin:?}");
    }
}
