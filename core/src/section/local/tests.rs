//! What is added to the tables: compressibility and the delay of stall.

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

/// H. Glauert 1928: `1/sqrt(1 − M²)` = 1.0911 at M 0.4 and 1.25 at M 0.6.
#[test]
fn lift_grows_by_prandtl_and_glauert_below_drag_divergence() {
    let f = family();
    for (mach, growth) in [(0.4, 1.091_089), (0.6, 1.25)] {
        let c = local(&f, mach, 0.0).at(2f64.to_radians());
        assert!((c.cl / 0.2 - growth).abs() < 1e-6, "{mach}: {}", c.cl / 0.2);
    }
}

/// Korn and Lock (as in W. H. Mason, *Configuration Aerodynamics*; from memory): with ka 0.87, t/c 0.12 and
/// no lift Mdd is 0.75, where by definition dCd/dM = 0.1 and the rise is 20 (0.1/80)^(4/3) = 0.00269.
#[test]
fn drag_rises_by_lock_s_law() {
    let f = family();
    let rise = |m: f64| local(&f, m, 0.0).at(0.0).cd - 0.01;
    assert!(rise(0.60).abs() < 1e-12);
    assert!((rise(0.75) - 20.0 * (0.1f64 / 80.0).powf(4.0 / 3.0)).abs() < 1e-9);
    let slope = (rise(0.75 + 1e-5) - rise(0.75 - 1e-5)) / 2e-5;
    assert!((slope - 0.1).abs() < 1e-4);
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
