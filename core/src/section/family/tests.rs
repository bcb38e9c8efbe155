//! Lookup between polars, at their edges and all the way round.

use super::super::polar::PolarPoint;
use super::*;

/// A polar whose lift is `slope` per degree and whose drag is `cd`, −10° to 12°.
fn flat(thickness: Option<f64>, reynolds: Option<f64>, slope: f64, cd: f64) -> Polar {
    let points = (-20..=24)
        .map(|i| {
            let alpha_deg = f64::from(i) * 0.5;
            PolarPoint { alpha_deg, cl: slope * alpha_deg, cd, cm: None }
        })
        .collect();
    Polar { reynolds, mach: 0.0, thickness_ratio: thickness, points }
}

fn four() -> Family {
    let polars = [
        flat(Some(0.10), Some(1e5), 0.10, 0.010),
        flat(Some(0.10), Some(1e6), 0.11, 0.008),
        flat(Some(0.20), Some(1e5), 0.08, 0.020),
        flat(Some(0.20), Some(1e6), 0.09, 0.016),
    ];
    Family::new(About::default(), &polars).unwrap()
}

fn at(family: &Family, t: f64, re: f64, alpha_deg: f64) -> Coefficients {
    family.at(&family.mix(t, re), alpha_deg.to_radians())
}

#[test]
fn rows_are_met_exactly() {
    let f = four();
    for (t, re, slope, cd) in [(0.1, 1e5, 0.10, 0.010), (0.2, 1e6, 0.09, 0.016)] {
        let c = at(&f, t, re, 3.5);
        assert!((c.cl - 3.5 * slope).abs() < 1e-12 && (c.cd - cd).abs() < 1e-12);
    }
}

#[test]
fn between_polars_it_is_linear_in_ln_reynolds_and_in_thickness() {
    let f = four();
    let middle = at(&f, 0.10, 1e5 * 10f64.sqrt(), 4.0);
    assert!((middle.cl - 4.0 * 0.105).abs() < 1e-12 && (middle.cd - 0.009).abs() < 1e-12);
    let thick = at(&f, 0.125, 1e5, 4.0);
    assert!((thick.cl - 4.0 * 0.095).abs() < 1e-12 && (thick.cd - 0.0125).abs() < 1e-12);
}

#[test]
fn outside_the_polars_it_holds_and_says_so() {
    let f = four();
    assert_eq!(at(&f, 0.05, 1e4, 4.0), at(&f, 0.10, 1e5, 4.0));
    let out = f.mix(0.05, 1e7).outside;
    assert!(out.thickness && out.reynolds);
    assert_eq!(f.mix(0.15, 3e5).outside, Outside::default());
    let one = Family::new(About::default(), &[flat(None, None, 0.1, 0.01)]).unwrap();
    assert_eq!(one.mix(0.3, 1e9).outside, Outside::default(), "a single polar holds for all");
}

#[test]
fn angles_wrap_and_no_step_appears_where_rows_end() {
    let f = four();
    let turned = at(&f, 0.1, 1e5, 3.5 + 360.0);
    assert!((turned.cl - 0.35).abs() < 1e-9);
    for edge in [-10.0, 12.0] {
        let (a, b) = (at(&f, 0.1, 1e5, edge - 1e-7), at(&f, 0.1, 1e5, edge + 1e-7));
        assert!((a.cl - b.cl).abs() < 1e-6 && (a.cd - b.cd).abs() < 1e-6);
    }
    for i in -1800..=1800 {
        let c = at(&f, 0.13, 2e5, f64::from(i) * 0.1);
        assert!(c.cl.is_finite() && c.cd > 0.0, "{i}");
    }
}

#[test]
fn a_common_grid_changes_nothing_of_a_polar() {
    // The second polar's angles lie between the first one's.
    let mut odd = flat(None, Some(1e6), 0.1, 0.01);
    odd.points
        .iter_mut()
        .for_each(|p| (p.alpha_deg, p.cd) = (p.alpha_deg + 0.17, 0.01 + 1e-4 * p.alpha_deg.powi(2)));
    let even = flat(None, Some(1e5), 0.1, 0.01);
    let alone = Family::new(About::default(), std::slice::from_ref(&odd)).unwrap();
    let both = Family::new(About::default(), &[even, odd]).unwrap();
    for i in -900..=1100 {
        let a = f64::from(i) * 0.01;
        let (x, y) = (at(&alone, 0.0, 1e6, a), at(&both, 0.0, 1e6, a));
        assert!((x.cl - y.cl).abs() < 1e-12 && (x.cd - y.cd).abs() < 1e-12, "{a}");
    }
}

#[test]
fn landmarks_are_found() {
    let f = Family::new(About::default(), &[flat(None, None, 0.1, 0.01)]).unwrap();
    let l = f.blend(&f.mix(0.0, 1e5), |l, _| *l);
    assert!(l.zero_lift.abs() < 1e-12);
    assert!(
        (l.stall.to_degrees() - 12.0).abs() < 1e-9 && (l.negative_stall.to_degrees() + 10.0).abs() < 1e-9
    );
}
