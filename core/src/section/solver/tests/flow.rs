//! Nodes, potential flow and wake: what holds of any flow, whatever the axes.

use crate::section::outline::{Outline, arc_back, clark_y, interpolate, naca_four_digit, raf_6};
use crate::section::solver::dense::{Matrix, dot};
use crate::section::solver::forces::lift_and_moment;
use crate::section::solver::potential::{Potential, Strip};
use crate::section::solver::spacing;
use crate::section::solver::wake::Flow;

fn far(p: [f64; 2], q: [f64; 2]) -> f64 {
    (p[0] - q[0]).hypot(p[1] - q[1])
}

/// Section and stream turned together by 50°: every speed and influence is as before, the wake turns too. With an
/// open edge square to the chord, an oblique one and a sharp one.
#[test]
fn the_flow_does_not_know_its_axes() {
    let (turn, alpha) = (50f64.to_radians(), 4f64.to_radians());
    let turned = |p: [f64; 2]| {
        let (sin, cos) = turn.sin_cos();
        [p[0] * cos - p[1] * sin, p[0] * sin + p[1] * cos]
    };
    let mut oblique = naca_four_digit(4, 4, 0.12).expect("drawn").points().to_vec();
    oblique[0] = [oblique[0][0] + 0.004, oblique[0][1] + 0.004];
    let oblique = Outline::from_points("", &oblique).expect("fair");
    for section in [raf_6().expect("drawn"), oblique, arc_back(0.12, 0.1).expect("drawn")] {
        let nodes = spacing::nodes(&section, 90);
        let other: Vec<[f64; 2]> = nodes.iter().map(|&p| turned(p)).collect();
        let plain = Flow::new(&Potential::new(nodes).expect("regular"), alpha);
        let other = Flow::new(&Potential::new(other).expect("regular"), alpha + turn);
        for (a, b) in plain.still.iter().zip(&other.still) {
            assert!((a - b).abs() < 1e-8, "{} {a} {b}", section.name());
        }
        for (a, b) in plain.wake.nodes.iter().zip(&other.wake.nodes) {
            assert!(far(turned(*a), *b) < 1e-9, "{a:?} {b:?}");
        }
        for (a, b) in plain.wake.course().iter().zip(&other.wake.course()) {
            assert!((a[0] - b[0]).abs() < 1e-9 && (a[1] - b[1]).abs() < 1e-9, "{a:?} {b:?}");
        }
        for (of, (a, b)) in
            [(&plain.by_mass, &other.by_mass), (&plain.by_swirl, &other.by_swirl)].into_iter().enumerate()
        {
            for i in 0..a.rows {
                let size = a.row(i).iter().fold(1.0, |most: f64, v| most.max(v.abs()));
                let same = |m: &Matrix, n: &Matrix| {
                    m.row(i).iter().zip(n.row(i)).all(|(a, b)| (a - b).abs() < 1e-7 * size)
                };
                assert!(same(a, b), "{} {of} {i}", section.name());
            }
        }
    }
}

/// The wake runs along the stream, and 1.2 chords far.
#[test]
fn the_wake_follows_the_stream() {
    let alpha = 6f64.to_radians();
    let potential = Potential::new(spacing::nodes(&clark_y().expect("drawn"), 120)).expect("regular");
    let (flow, gamma) = (Flow::new(&potential, alpha), potential.strengths(alpha));
    let nodes = &flow.wake.nodes;
    for pair in nodes.windows(2).skip(1) {
        let v = potential.velocity(
            [0.5 * (pair[0][0] + pair[1][0]), 0.5 * (pair[0][1] + pair[1][1])],
            &gamma,
            alpha,
        );
        let d = [pair[1][0] - pair[0][0], pair[1][1] - pair[0][1]];
        let off = (d[0] * v[1] - d[1] * v[0]).atan2(d[0] * v[0] + d[1] * v[1]);
        // The direction is that of a point half a step on along the piece before, which bends little.
        assert!(off.abs() < 2e-3, "{pair:?} {off}");
    }
    let length: f64 = nodes.windows(2).map(|p| far(p[0], p[1])).sum();
    assert!((length - 1.2).abs() < 1e-9, "{length}");
}

/// Vortices and sources put together at points just outside the outline run along it as fast as the influences
/// say, for a mass defect on the outline and for one in the wake.
#[test]
fn the_speed_by_a_mass_defect_is_that_of_its_sources() {
    let alpha = 2f64.to_radians();
    let potential =
        Potential::new(spacing::nodes(&naca_four_digit(0, 0, 0.12).expect("drawn"), 160)).expect("regular");
    let flow = Flow::new(&potential, alpha);
    let (n, total) = (potential.count(), flow.still.len());
    let along_arc = |i: usize| potential.body.nodes[i][0];
    let on_body = |i: usize| if i < n { 0.3 * along_arc(i) * (3.0 * along_arc(i)).sin() } else { 0.0 };
    let in_wake = |i: usize| if i < n { 0.0 } else { 0.3 * ((i - n) as f64 / (total - n) as f64) };
    for mass in [&on_body as &dyn Fn(usize) -> f64, &in_wake] {
        let mass: Vec<f64> = (0..total).map(mass).collect();
        let change: Vec<f64> = (0..total).map(|i| dot(flow.by_mass.row(i), &mass)).collect();
        let gamma: Vec<f64> = (0..n).map(|i| -(flow.still[i] + change[i])).collect();
        let mut most: f64 = 0.0;
        for j in (0..n - 1).filter(|&j| (0.15..0.85).contains(&along_arc(j))) {
            let (a, b) = (potential.body.nodes[j], potential.body.nodes[j + 1]);
            let (size, t) = (far(a, b), potential.body.elements[j].along());
            let off = 1e-4 * size;
            let p = [0.5 * (a[0] + b[0]) + off * t[1], 0.5 * (a[1] + b[1]) - off * t[0]];
            let along = |v: [f64; 2]| v[0] * t[0] + v[1] * t[1];
            let mut sources = vec![0.0; total];
            let (body, behind) = sources.split_at_mut(n);
            potential.body.mass_row(body, |half| half.source_velocity(p).map(along));
            flow.wake.mass_row(behind, |half| half.source_velocity(p).map(along));
            let found = along(potential.velocity(p, &gamma, alpha)) + dot(&sources, &mass);
            let of = |i: usize| flow.still[i] + change[i];
            // Between nodes the stream function is not quite constant.
            assert!((found - 0.5 * (of(j) + of(j + 1))).abs() < 4e-3, "{j} {found} {}", of(j));
            most = most.max(change[j].abs());
        }
        assert!(most > 0.1, "the defect tells: {most}");
    }
}

/// Over a reach beyond both ends the wake's curvature is its whole turn over its length; over a short one, the
/// turn within it.
#[test]
fn the_wake_s_curvature_is_its_turn_over_the_reach() {
    let potential = Potential::new(spacing::nodes(&clark_y().expect("drawn"), 120)).expect("regular");
    let flow = Flow::new(&potential, 8f64.to_radians());
    let (course, n) = (flow.wake.course(), potential.count());
    let last = course[course.len() - 1][0];
    let shape: Vec<f64> = (0..flow.wake.nodes.len()).map(|j| 1.5 + 0.01 * j as f64).collect();
    for reach in [10.0, 0.03] {
        let influence = flow.influence(&shape, reach);
        let mut run = 0.0;
        for (j, h) in shape.iter().enumerate() {
            let (from, to) = (f64::max(run - reach, 0.0), f64::min(run + reach, last));
            let turn = interpolate(&course, to) - interpolate(&course, from);
            let weight = if to - from < 1e-9 { 0.0 } else { turn / (to - from) * (1.0 + 1.0 / h) };
            for i in [0, n / 3, n + 4] {
                let expected = flow.by_mass.row(i)[n + j] - weight * flow.by_swirl.row(i)[j];
                assert!((influence.row(i)[n + j] - expected).abs() < 1e-9, "{reach} {j} {i}");
            }
            if j + 1 < shape.len() {
                run += flow.wake.length(j);
            }
        }
    }
}

/// A circle with circulation: `cl = 2 Gamma` for a stream of 1 and a chord of 1 (Kutta, Joukowski), through its
/// middle.
#[test]
fn lift_and_moment_of_a_circle_with_circulation() {
    let count = 720;
    let place = |k: usize| std::f64::consts::TAU * k as f64 / count as f64;
    let body = Strip::new((0..count).map(|k| [0.5 + 0.5 * place(k).cos(), 0.5 * place(k).sin()]).collect());
    for alpha in [0.0, 0.3] {
        let speeds: Vec<f64> =
            (0..count).map(|k| -2.0 * (place(k) - alpha).sin() - 0.8 / std::f64::consts::PI).collect();
        let (cl, cm) = lift_and_moment(&body, &speeds, alpha, 0.0);
        // The sums over 720 straight pieces are good to the square of one.
        assert!((cl - 1.6).abs() < 1e-3, "{cl}");
        assert!((cm + 0.25 * 1.6 * alpha.cos()).abs() < 1e-3, "{cm}");
    }
}

/// A panel's share of the mean one and its turn over 0.12 radians make one together, wherever the section curves;
/// at the trailing edge it is 0.35 of the mean, and longer again within 0.06 chords.
#[test]
fn nodes_are_close_where_the_section_curves_and_at_its_edge() {
    let nodes = spacing::nodes(&naca_four_digit(0, 0, 0.24).expect("drawn"), 121);
    let length = |i: usize| far(nodes[i], nodes[i + 1]);
    let along = |i: usize| (nodes[i + 1][1] - nodes[i][1]).atan2(nodes[i + 1][0] - nodes[i][0]);
    let turn = |i: usize| {
        let turn = along(i + 1) - along(i - 1);
        0.5 * turn.sin().atan2(turn.cos())
    };
    let mean = |i: usize| length(i) / (1.0 - turn(i) / 0.12);
    let curved: Vec<f64> = (1..119).filter(|&i| nodes[i][0].max(nodes[i + 1][0]) < 0.6).map(mean).collect();
    let middle = curved.iter().sum::<f64>() / curved.len() as f64;
    assert!(curved.iter().all(|m| (m / middle - 1.0).abs() < 0.05), "{curved:?}");
    // Over the first panel the closeness has faded by a fifteenth.
    assert!((length(0) / middle - 0.366).abs() < 0.02, "{}", length(0) / middle);
    assert!((length(119) / length(0) - 1.0).abs() < 1e-6);
}
