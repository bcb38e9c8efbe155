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

/// A row that stands exactly at the edge of the tables is within them.
#[test]
fn the_edges_of_the_tables_are_inside() {
    let f = four();
    for (t, re) in [(0.10, 1e5), (0.20, 1e6)] {
        assert_eq!(f.mix(t, re).outside, Outside::default(), "{t} {re}");
    }
    let one = Family::new(About::default(), &[flat(Some(0.12), Some(1e5), 0.1, 0.01)]).unwrap();
    assert_eq!(one.mix(0.12, 1e5).outside, Outside::default());
    assert!(one.mix(0.121, 1e5).outside.thickness && one.mix(0.119, 1e5).outside.thickness);
}

/// Lift that also rises through zero far below the negative stall, and is bent where it does so in the attached
/// range: nothing at −3° exactly, a row of the table.
#[test]
fn zero_lift_is_the_crossing_between_the_stalls() {
    let points = (-20..=24)
        .map(|i| {
            let alpha_deg = f64::from(i);
            let lift = |a: f64| 0.1 * (a + 3.0) + 0.004 * (a + 3.0).powi(2);
            let cl =
                if alpha_deg < -12.0 { -0.9 + 0.25 * (-12.0 - alpha_deg) - 0.001 } else { lift(alpha_deg) };
            let cl = if alpha_deg < -17.0 { -0.3 } else { cl };
            PolarPoint { alpha_deg, cl: if alpha_deg > 12.0 { 1.5 } else { cl }, cd: 0.01, cm: None }
        })
        .collect();
    let polar = Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points };
    let l = landmarks(&polar);
    assert!((l.zero_lift.to_degrees() + 3.0).abs() < 1e-9, "{}", l.zero_lift.to_degrees());
}

/// Factors 0.5 and 3: of every coefficient between the rows too, and the bound of the rise covers both.
#[test]
fn scaled_tables_have_scaled_coefficients_everywhere() {
    let mut polar = flat(None, None, 0.1, 0.01);
    polar.points.iter_mut().for_each(|p| p.cd = 0.01 + 2e-4 * p.alpha_deg.powi(2));
    let plain = Family::new(About::default(), &[polar]).unwrap();
    let scaled = plain.scaled(0.5, 3.0);
    for i in -1790..=1790 {
        let a = f64::from(i) * 0.1 + 0.03;
        let (p, s) = (at(&plain, 0.1, 1e5, a), at(&scaled, 0.1, 1e5, a));
        assert!((s.cl - 0.5 * p.cl).abs() < 1e-12 && (s.cd - 3.0 * p.cd).abs() < 1e-12, "{a}");
    }
    let bound = |f: &Family| f.blend(&f.mix(0.1, 1e5), |l, _| *l).steepest;
    assert_eq!(bound(&scaled), 3.0 * bound(&plain));
}

/// The bound of one interval is what its two cubics reach, looked at in 20,000 steps: with the slopes of both
/// greatest at one end, in the middle, and of either sign.
#[test]
fn the_bound_of_the_rise_is_what_the_cubics_reach() {
    for ends in [
        [[0.1, 5.0, 0.02, 0.1], [0.4, 2.0, 0.03, 0.4]],
        [[0.1, 0.5, 0.02, -0.1], [0.6, 0.3, 0.015, 0.0]],
        [[0.9, 1.0, 0.02, 0.1], [0.3, -1.0, 0.09, 0.2]],
        [[-0.9, -1.0, 0.09, 0.0], [-0.3, -7.0, 0.02, 0.0]],
    ] {
        let (a, h): (f64, f64) = (0.3, 0.12);
        let curve = |k: usize, x: f64| {
            let t = (x - a) / h;
            let ([p, m], [q, n]) = ([ends[0][k], ends[0][k + 1]], [ends[1][k], ends[1][k + 1]]);
            let up = t * t * (3.0 - 2.0 * t);
            p * (1.0 - up) + q * up + h * (m * t * (1.0 - t).powi(2) - n * t * t * (1.0 - t))
        };
        let step = h / 20_000.0;
        let most =
            |of: &dyn Fn(f64) -> f64| (0..20_000).map(|i| of(a + step * f64::from(i))).fold(0.0, f64::max);
        let rise = |k: usize| most(&|x| ((curve(k, x + step) - curve(k, x)) / step).abs());
        let size = |k: usize| ends[0][k].abs().max(ends[1][k].abs());
        let expected = rise(0) + rise(2) + size(0) + size(2);
        let found = steepest(&ends, &[a, a + h]);
        // A difference over one step misses the greatest slope by its change over half a step.
        assert!((found / expected - 1.0).abs() < 1e-3, "{found} {expected}");
    }
}

/// A plate's lift, which goes on rising past 25°, is not the stall of the section that faded into it.
#[test]
fn stall_is_where_lift_falls_on_either_side() {
    let landmarks_of = |lifts: [f64; 7]| {
        let points = (-3..=3).zip(lifts).map(|(i, cl)| PolarPoint {
            alpha_deg: 10.0 * f64::from(i),
            cl,
            cd: 0.01,
            cm: None,
        });
        let polar = Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points: points.collect() };
        let l = landmarks(&polar);
        [l.negative_stall, l.stall].map(|a| a.to_degrees().round())
    };
    assert_eq!(landmarks_of([-0.9, -0.7, -0.6, 0.0, 1.2, 0.9, 1.0]), [-20.0, 10.0]);
    assert_eq!(landmarks_of([-0.9, -0.5, -0.6, 0.0, 0.6, 0.5, 0.9]), [-10.0, 10.0]);
    // Where it falls nowhere within 25° the most there counts.
    assert_eq!(landmarks_of([-0.9, -0.7, -0.5, 0.0, 0.5, 0.7, 0.9]), [-20.0, 20.0]);
}
