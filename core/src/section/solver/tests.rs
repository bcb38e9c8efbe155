//! The potential flow against a closed form, the boundary layer against plates and similar flows, and whole polars.

use std::ops::ControlFlow;

use super::forces::lift_and_moment;
use super::potential::Potential;
use super::*;
use crate::section::outline::{Outline, clark_y, naca_four_digit};

/// Symmetric Joukowski section: circle of radius `1 + e` about `-e`, mapped by `z + 1/z`.
fn joukowski(e: f64, count: usize) -> Vec<[f64; 2]> {
    let turn = |k: usize| std::f64::consts::TAU * k as f64 / count as f64;
    let mapped = |a: f64| {
        let (x, y) = (-e + (1.0 + e) * a.cos(), (1.0 + e) * a.sin());
        let r2 = x * x + y * y;
        [x + x / r2, y - y / r2]
    };
    (0..=count).map(|k| mapped(turn(k))).collect()
}

/// Lift within 0.2 % of the closed form `8 pi (1 + e) sin alpha / chord`.
#[test]
fn joukowski_lift_is_exact() {
    let e = 0.1;
    let outline = Outline::from_points("Joukowski", &joukowski(e, 400)).expect("a fair outline");
    let potential = Potential::new(spacing::nodes(&outline, USUAL_NODES)).expect("regular");
    let nose = 1.0 + 2.0 * e;
    let chord = 2.0 + nose + 1.0 / nose;
    for alpha in [2.0_f64, 5.0, 10.0].map(f64::to_radians) {
        let speeds: Vec<f64> = potential.strengths(alpha).iter().map(|g| -g).collect();
        let (cl, _) = lift_and_moment(&potential.body, &speeds, alpha, 0.0);
        let exact = 8.0 * std::f64::consts::PI * (1.0 + e) * alpha.sin() / chord;
        assert!((cl / exact - 1.0).abs() < 0.002, "{cl} {exact}");
    }
}

/// Speed about the Joukowski section at a point of its surface in the chord-line frame, from the closed form.
fn joukowski_speed(e: f64, p: [f64; 2], alpha: f64) -> f64 {
    let nose = 1.0 + 2.0 * e;
    let chord = 2.0 + nose + 1.0 / nose;
    let z = [2.0 - chord * (1.0 - p[0]), chord * p[1]];
    // zeta = z/2 + sqrt(z^2/4 - 1), the root outside the circle
    let (re, im) = (0.25 * (z[0] * z[0] - z[1] * z[1]) - 1.0, 0.5 * z[0] * z[1]);
    let (size, half) = (re.hypot(im).sqrt(), 0.5 * im.atan2(re));
    let root = [size * half.cos(), size * half.sin()];
    let candidates = [1.0, -1.0].map(|sign| [0.5 * z[0] + sign * root[0], 0.5 * z[1] + sign * root[1]]);
    let far = |q: &[f64; 2]| (q[0] + e).hypot(q[1]);
    let zeta = if far(&candidates[0]) > far(&candidates[1]) { candidates[0] } else { candidates[1] };
    let phi = zeta[1].atan2(zeta[0] + e);
    // |1 - 1/zeta^2|
    let square = [zeta[0] * zeta[0] - zeta[1] * zeta[1], 2.0 * zeta[0] * zeta[1]];
    let size = square[0] * square[0] + square[1] * square[1];
    let slope = (1.0 - square[0] / size).hypot(square[1] / size);
    2.0 * ((phi - alpha).sin() + alpha.sin()).abs() / slope
}

/// Speed within 0.5 % of the largest speed at every node but those in the cusp.
#[test]
fn joukowski_speeds_are_exact() {
    let e = 0.1;
    let outline = Outline::from_points("Joukowski", &joukowski(e, 400)).expect("a fair outline");
    let potential = Potential::new(spacing::nodes(&outline, USUAL_NODES)).expect("regular");
    for alpha in [0.0_f64, 4.0, 10.0].map(f64::to_radians) {
        let strengths = potential.strengths(alpha);
        let nodes = potential.body.nodes.iter().zip(&strengths).filter(|(p, _)| p[0] < 0.98);
        let exact: Vec<(f64, f64)> = nodes.map(|(p, g)| (g.abs(), joukowski_speed(e, *p, alpha))).collect();
        let largest = exact.iter().fold(0.0, |most: f64, pair| most.max(pair.1));
        let worst = exact.iter().fold(0.0, |most: f64, pair| most.max((pair.0 - pair.1).abs()));
        assert!(worst < 0.005 * largest, "{worst} of {largest}");
    }
}

fn polar(outline: &Outline, settings: &Settings, angles: &[f64]) -> Vec<Solved> {
    sweep(outline, settings, angles, |_, _, _| ControlFlow::Continue(())).expect("fair settings")
}

#[test]
fn a_symmetrical_section_has_a_symmetrical_polar() {
    let section = naca_four_digit(0, 0, 0.12).expect("drawn");
    let points = polar(&section, &Settings::free(1e6, 9.0), &[-4.0, -2.0, 0.0, 2.0, 4.0]);
    assert!(points.iter().all(|p| p.state == State::Converged));
    assert!(points[2].cl.abs() < 1e-6);
    for (a, b) in [(0, 4), (1, 3)] {
        assert!((points[a].cl + points[b].cl).abs() < 1e-4 && (points[a].cd - points[b].cd).abs() < 1e-6);
        assert!((points[a].xtr_upper - points[b].xtr_lower).abs() < 1e-3);
    }
}

/// The count of iterations is part of what is promised: Newton's method converges in a few.
#[test]
fn a_polar_takes_few_iterations_and_is_the_same_again() {
    let section = clark_y().expect("drawn");
    let angles: Vec<f64> = (-8..=16).map(|k| 0.5 * f64::from(k)).collect();
    let first = polar(&section, &Settings::free(4e5, 9.0), &angles);
    assert!(first.iter().all(|p| p.state == State::Converged));
    let total: usize = first.iter().map(|p| p.iterations).sum();
    assert!(total <= 7 * first.len(), "{total} iterations for {} points", first.len());
    assert_eq!(first, polar(&section, &Settings::free(4e5, 9.0), &angles));
}

/// Nodes 120 and 200: lift within 0.5 %, drag within 2 %.
#[test]
fn the_usual_nodes_are_enough() {
    let section = naca_four_digit(4, 4, 0.12).expect("drawn");
    let [usual, fine] = [USUAL_NODES, 200].map(|nodes| {
        let settings = Settings { nodes, ..Settings::free(1e6, 9.0) };
        polar(&section, &settings, &[0.0, 2.0, 4.0, 6.0])
    });
    for (a, b) in usual.iter().zip(&fine) {
        assert!((a.cl / b.cl - 1.0).abs() < 0.005 && (a.cd / b.cd - 1.0).abs() < 0.02, "{a:?} {b:?}");
    }
}

#[test]
fn bad_settings_are_named() {
    let section = naca_four_digit(0, 0, 0.12).expect("drawn");
    let refuse = |settings: Settings, angles: &[f64]| {
        sweep(&section, &settings, angles, |_, _, _| ControlFlow::Continue(()))
            .expect_err("refused")
            .to_string()
    };
    assert_eq!(refuse(Settings::free(10.0, 9.0), &[0.0]), "reynolds 10: 10000 to 100000000 is allowed");
    assert_eq!(refuse(Settings::free(f64::NAN, 9.0), &[0.0]), "reynolds NaN: 10000 to 100000000 is allowed");
    assert!(refuse(Settings::free(1e6, 9.0), &[1.0, 0.0]).starts_with("2 angles from 1 to 0 degrees"));
    let stopped = sweep(&section, &Settings::free(1e6, 9.0), &[0.0, 1.0], |_, _, _| ControlFlow::Break(()));
    assert!(matches!(stopped, Err(SolverError::Stopped { done: 1, total: 2 })));
}

/// Any outline that passes the checks gives points or failures, and comes to an end.
#[test]
fn odd_outlines_come_to_an_end() {
    let mut waves: Vec<[f64; 2]> = joukowski(0.1, 60);
    for (k, p) in waves.iter_mut().enumerate() {
        p[1] += 0.02 * (k as f64 * 1.7).sin();
    }
    let square = [
        [1.0, 0.02],
        [0.8, 0.1],
        [0.6, 0.1],
        [0.4, 0.1],
        [0.2, 0.1],
        [0.01, 0.1],
        [0.0, 0.05],
        [0.0, 0.0],
        [0.0, -0.05],
        [0.01, -0.1],
        [0.2, -0.1],
        [0.4, -0.1],
        [0.6, -0.1],
        [0.8, -0.1],
        [1.0, -0.02],
    ];
    let sharp = crate::section::outline::arc_back(0.1, 0.0).expect("drawn");
    for outline in [Outline::from_points("", &waves), Outline::from_points("", &square), Ok(sharp)] {
        let Ok(outline) = outline else { continue };
        for point in polar(&outline, &Settings::free(1e5, 9.0), &[-2.0, 0.0, 2.0, 8.0]) {
            assert_eq!(point.cl.is_nan(), point.state != State::Converged);
        }
    }
}
#[test]
fn zz_slope() {
    let d = |c, p, t: f64| naca_four_digit(c, p, t).unwrap();
    let angles: Vec<f64> = (-8..42).map(|k| 0.5 * f64::from(k)).collect();
    for (name, o, slope, a0, cm, clm, acl) in [("0009", d(0, 0, 0.09), 0.109, 0.0, 0.0, 1.32, 13.4), ("1412", d(1, 4, 0.12), 0.108, -1.1, -0.025, 1.58, 15.2), ("2412", d(2, 4, 0.12), 0.105, -2.0, -0.047, 1.68, 16.8), ("2418", d(2, 4, 0.18), 0.103, -2.3, -0.050, 1.47, 14.0), ("4412", d(4, 4, 0.12), 0.105, -3.8, -0.093, 1.67, 14.0), ("4415", d(4, 4, 0.15), 0.105, -4.3, -0.093, 1.64, 15.0), ("0006", d(0, 0, 0.06), 0.108, 0.0, 0.0, 0.92, 9.0)] {
        let p = polar(&o, &Settings { mach: 0.0, ..Settings::free(9e6, 9.0) }, &angles);
        let at = |a: f64| p.iter().find(|p| p.alpha_deg == a).unwrap();
        let sl = (at(4.0).cl - at(-2.0).cl) / 6.0;
        let m = p.iter().filter(|p| p.state == State::Converged).max_by(|a, b| a.cl.total_cmp(&b.cl)).unwrap();
        let cd = p.iter().filter(|p| p.state == State::Converged).map(|p| p.cd).fold(1.0, f64::min);
        println!("{name} slope {sl:.4} {:+.1}% a0 {:.3} {a0} cm0 {:.4} {cm} clmax {:.3} ({:+.1}%) {clm} @ {} {acl} cdmin {cd:.5}", 100.0 * (sl / slope - 1.0), -at(0.0).cl / sl - o.rotation_rad().to_degrees(), at(0.0).cm, m.cl, 100.0 * (m.cl / clm - 1.0), m.alpha_deg);
    }
    let o = clark_y().unwrap();
    for n in [9.0, 4.0] {
    let p = polar(&o, &Settings::free(3e6, n), &angles);
    let m = p.iter().filter(|p| p.state == State::Converged).max_by(|a, b| a.cl.total_cmp(&b.cl)).unwrap();
    let cd = p.iter().filter(|p| p.state == State::Converged).map(|p| p.cd).fold(1.0, f64::min);
    println!("clark-y 3e6 n {n} clmax {:.3} @ {} cdmin {cd:.5}", m.cl, m.alpha_deg);
    }
    let o = naca_four_digit(0, 0, 0.12).unwrap();
    let p = polar(&o, &Settings { mach: 0.15, trip_upper: Some(0.05), trip_lower: Some(0.05), ..Settings::free(6e6, 9.0) }, &[0.0, 2.05, 4.04, 6.09, 8.3, 10.12, 12.12, 13.08, 14.22, 15.26, 16.3, 17.13]);
    for (p, (cl, cd)) in p.iter().zip([(0.0, 0.00809), (0.2125, 0.00816), (0.4316, 0.00823), (0.6546, 0.00885), (0.8873, 0.0105), (1.0707, 0.01201), (1.2605, 0.01332), (1.3455, 0.01503), (1.4365, 0.01625), (1.5129, 0.019), (1.5739, 0.02218), (1.6116, 0.0256)]) {
        println!("{:.2} cl {:.4} {:.4} ({:+.1}%) cd {:.5} {:.5} ({:+.1}%)", p.alpha_deg, p.cl, cl, 100.0 * (p.cl / cl - 1.0), p.cd, cd, 100.0 * (p.cd / cd - 1.0));
    }
    let p = polar(&o, &Settings { mach: 0.15, ..Settings::free(6e6, 9.0) }, &angles);
    let m = p.iter().filter(|p| p.state == State::Converged).max_by(|a, b| a.cl.total_cmp(&b.cl)).unwrap();
    let cd = p.iter().filter(|p| p.state == State::Converged).map(|p| p.cd).fold(1.0, f64::min);
    println!("0012 free cdmin {cd:.5} (.0058) clmax {:.3} @ {}  (1.596 @ 16.4), cl6 {:.4} (.6566)", m.cl, m.alpha_deg, p.iter().find(|p| p.alpha_deg == 6.0).unwrap().cl);
}
#[test]
fn zz_low() {
    let o = Outline::read(&std::fs::read_to_string("/tmp/af/e387.dat").unwrap()).unwrap();
    let angles: Vec<f64> = (-4..28).map(|k| 0.5 * f64::from(k)).collect();
    let (m, p, t) = (0.0178, 0.4, 0.0892);
    let mut pts = vec![];
    for side in [1.0, -1.0] {
        let mut h = vec![];
        for k in 0..=80 {
            let x: f64 = 0.5 * (1.0 - (std::f64::consts::PI * k as f64 / 80.0).cos());
            let half = 5.0 * t * (0.2969 * x.sqrt() - 0.1260 * x - 0.3516 * x * x + 0.2843 * x.powi(3) - 0.1036 * x.powi(4));
            let yc = if x < p { m / p / p * (2.0 * p * x - x * x) } else { m / (1.0 - p) / (1.0 - p) * (1.0 - 2.0 * p + 2.0 * p * x - x * x) };
            h.push([x, yc + side * half]);
        }
        if side > 0.0 { h.reverse(); pts = h; } else { pts.extend(&h[1..]); }
    }
    let r = Outline::from_points("", &pts).unwrap();
    for (name, o, re, n) in [("e387", &o, 60e3, 9.0), ("e387", &o, 1e5, 9.0), ("e387", &o, 2e5, 9.0), ("e387", &o, 460e3, 9.0), ("e387", &o, 60e3, 4.0), ("rg", &r, 60e3, 9.0), ("rg", &r, 60e3, 7.0)] {
        let p = polar(&o, &Settings::free(re, n), &angles);
        println!("{name} {re} n {n}");
        for p in p { print!("{}:{:.3}/{:.1} ", p.alpha_deg, p.cl, 1e4 * p.cd); }
        println!();
    }
}
