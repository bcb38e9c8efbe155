//! What is added to the tables: compressibility and the delay of stall. The published figures of both stand in the
//! list of outside checks (`tests/src/validation/formulas.rs`).

use super::super::family::About;
use super::super::polar::{Polar, PolarPoint};
use super::*;

/// Lift 0.1 per degree up to 10°, flat beyond; drag 0.01.
fn family() -> Family {
    let point = |i: i32| {
        let alpha_deg = f64::from(i) * 0.5;
        PolarPoint { alpha_deg, cl: 0.1 * alpha_deg.clamp(-8.0, 10.0), cd: 0.01, cm: None }
    };
    let points = (-20..=60).map(point).collect();
    let about = About { korn_factor: 0.87, ..About::default() };
    Family::new(about, &[Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points }]).unwrap()
}

fn local(family: &Family, mach: f64, stall_delay: f64) -> Local<'_> {
    Local::new(family, Situation { thickness_ratio: 0.12, reynolds: 1e6, mach, stall_delay })
}

#[test]
fn nothing_is_added_when_switched_off() {
    let f = family();
    let c = local(&f, 0.0, 0.0).at(0.05);
    assert!((c.cl - 0.1 * 0.05f64.to_degrees()).abs() < 1e-12 && (c.cd - 0.01).abs() < 1e-12);
}

#[test]
fn growth_stops_at_drag_divergence_and_stays_finite_beyond_mach_1() {
    let f = family();
    let lift = |m: f64| local(&f, m, 0.0).at(2f64.to_radians()).cl;
    assert_eq!(lift(0.8), lift(0.95));
    assert!(local(&f, 1.3, 0.0).at(0.1).cd < 0.4);
}

#[test]
fn rotation_gives_back_lift_past_stall_and_none_before() {
    let f = family();
    let gain =
        |deg: f64| local(&f, 0.0, 0.5).at(deg.to_radians()).cl - local(&f, 0.0, 0.0).at(deg.to_radians()).cl;
    assert_eq!(gain(3.0), 0.0);
    let potential = std::f64::consts::TAU * 20f64.to_radians().sin();
    assert!((gain(20.0) - 0.5 * (potential - 1.0)).abs() < 1e-9);
    assert_eq!(gain(50.0), 0.0);
    assert_eq!(gain(-15.0), 0.0);
}

/// Looked at in steps of 0.1 degrees over 400 stations of every shipped section, with and without Mach number
/// and delay of stall.
#[test]
fn coefficients_nowhere_rise_more_than_the_bound_says() {
    const STEP: f64 = 0.1 * DEG;
    let library = crate::section::library();
    for name in library.names() {
        let family = library.family(name, 9.0).unwrap();
        for i in 0..400 {
            let of = |k: u32, parts: u32| f64::from(i / k % parts) / f64::from(parts - 1);
            let local = Local::new(
                family,
                Situation {
                    thickness_ratio: 0.05 + 0.2 * of(1, 10),
                    reynolds: 3e4 * 200f64.powf(of(10, 10)),
                    mach: 0.9 * of(100, 4),
                    stall_delay: of(1, 2) * of(10, 3),
                },
            );
            let bound = local.steepest();
            for j in -600..900 {
                let (a, b) = (local.at(f64::from(j) * STEP), local.at(f64::from(j + 1) * STEP));
                let rise = ((b.cl - a.cl).abs() + (b.cd - a.cd).abs()) / STEP + b.cl.abs() + b.cd;
                assert!(
                    rise <= bound,
                    "{name} {:?} at {} degrees: {rise} past {bound}",
                    local.mix,
                    0.1 * f64::from(j)
                );
            }
        }
    }
}

/// Lift 1.9 from 10° on against a drag of 0.01, at half the speed of sound: what the growth of lift adds fades
/// out over 20°, and the bound stands close over the rise this makes.
#[test]
fn the_bound_is_close_where_the_growth_of_lift_fades_out() {
    let point = |i: i32| {
        let alpha_deg = f64::from(i) * 0.5;
        PolarPoint { alpha_deg, cl: 1.9, cd: 0.01, cm: None }
    };
    let points = (-40..=40).map(point).collect();
    let table = Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points };
    let about = About { korn_factor: 0.95, ..About::default() };
    let family = Family::new(about, &[table]).unwrap();
    let mut local = local(&family, 0.5, 0.0);
    // The plateau alone: the rows' own bound, and a stall where the fading lies within them.
    (local.landmarks.stall, local.landmarks.steepest) = (-5.0 * DEG, 1.91);
    let rise = |deg: f64| {
        let (a, b) = (local.at(deg * DEG), local.at((deg + 0.01) * DEG));
        ((b.cl - a.cl).abs() + (b.cd - a.cd).abs()) / (0.01 * DEG) + a.cl.abs() + a.cd
    };
    let most = (-40..120).map(|i| rise(0.125 * f64::from(i))).fold(0.0, f64::max);
    let bound = local.steepest();
    assert!(most <= bound && bound < 1.05 * most, "{most} {bound}");
}

/// Two tables that are the same but for their Reynolds number: between them every landmark is theirs.
#[test]
fn landmarks_between_equal_tables_are_theirs() {
    let point = |i: i32| {
        let alpha_deg = f64::from(i);
        PolarPoint { alpha_deg, cl: 0.1 * alpha_deg.clamp(-8.0, 10.0) + 0.23, cd: 0.01, cm: None }
    };
    let table = |re: f64| Polar {
        reynolds: Some(re),
        mach: 0.0,
        thickness_ratio: None,
        points: (-15..=20).map(point).collect(),
    };
    let family = Family::new(About::default(), &[table(1e5), table(1e6)]).unwrap();
    let marks = |reynolds: f64| {
        *Local::new(&family, Situation { thickness_ratio: 0.1, reynolds, mach: 0.0, stall_delay: 0.0 })
            .landmarks()
    };
    let (own, between) = (marks(1e5), marks(3e5));
    // Lift of 0.1 per degree is 5.7 per radian.
    assert!(own.steepest > 5.7, "{own:?}");
    let all = |l: Landmarks| [l.zero_lift, l.stall, l.negative_stall, l.first, l.last, l.steepest];
    for (a, b) in all(own).into_iter().zip(all(between)) {
        assert!((a - b).abs() < 1e-12 && a != 0.0, "{own:?} {between:?}");
    }
}

/// Let in from half way between zero lift and stall, half of it at three quarters; faded out from 30° to 50°.
#[test]
fn the_delay_of_stall_is_let_in_and_faded_out_evenly() {
    let f = family();
    let gain =
        |deg: f64| local(&f, 0.0, 0.5).at(deg.to_radians()).cl - local(&f, 0.0, 0.0).at(deg.to_radians()).cl;
    let lost = |deg: f64, cl: f64| std::f64::consts::TAU * deg.to_radians().sin() - cl;
    assert!((gain(7.5) - 0.5 * 0.5 * lost(7.5, 0.75)).abs() < 1e-9);
    assert!((gain(6.0) - 0.5 * 0.2 * lost(6.0, 0.60)).abs() < 1e-9);
    let at_40 = local(&f, 0.0, 0.0).at(40f64.to_radians()).cl;
    assert!((gain(40.0) - 0.5 * 0.5 * lost(40.0, at_40)).abs() < 1e-9);
    assert!(gain(49.999) < 1e-3);
}

/// Korn: with ka 0.87, t/c 0.12 and a lift coefficient of 0.8 Mdd is 0.67, and lift grows no further beyond.
#[test]
fn growth_stops_sooner_where_there_is_more_lift() {
    let f = family();
    let c = local(&f, 0.74, 0.0).at(8f64.to_radians());
    assert!((c.cl / 0.8 - 1.0 / (1.0f64 - 0.67 * 0.67).sqrt()).abs() < 1e-9, "{}", c.cl);
}
