//! The equations over an interval against the differential equations they stand for.

use crate::section::solver::closure::{Gas, Kind, Point, Props, at_transition, props, wall_shape};
use crate::section::solver::dual::Dual;
use crate::section::solver::interval::{Interval, critical_part, similar, transition};

fn point(theta: f64, shape: f64, third: f64, u: f64) -> Point<0> {
    let constant = Dual::constant;
    Point { theta: constant(theta), dstar: constant(theta * shape), c: constant(third), u: constant(u) }
}

fn equations(gas: &Gas, kind: Kind, ends: [&Point<0>; 2], dx: f64) -> [f64; 3] {
    let [q1, q2] = ends.map(|p| props(gas, p, kind));
    let interval = Interval { first: (ends[0], &q1), last: (ends[1], &q2), dx };
    let rows = if kind == Kind::Laminar { interval.laminar() } else { interval.turbulent(kind) };
    rows.map(|r| r.v)
}

/// In a speed that grows from nothing in proportion to x a layer of one thickness and shape keeps its friction and
/// its dissipation times u: the equations over any interval are those of similar flow times `ln(x2/x1)`.
#[test]
fn an_interval_of_similar_flow_holds_the_similar_equations() {
    let (gas, a) = (Gas::new(1e6, 0.0), 2.0);
    for (u1, u2) in [(0.2, 0.5), (0.2, 0.201), (0.2, 0.206)] {
        let [p1, p2] = [u1, u2].map(|u| point(3e-4, 2.3, 0.0, u));
        let found = equations(&gas, Kind::Laminar, [&p1, &p2], (u2 - u1) / a);
        let expected = similar(&p1, &props(&gas, &p1, Kind::Laminar), Dual::constant(a));
        for k in 0..2 {
            let expected = f64::ln(u2 / u1) * expected[k].v;
            assert!((found[k] - expected).abs() < 1e-8 * expected.abs(), "{u2} {k}: {} {expected}", found[k]);
        }
    }
}

/// Along a smooth course of a layer the equations over a short interval are the differential equations in its
/// middle (Drela, Giles, AIAA J. 25(10), 1987, as the module writes them).
#[test]
fn a_short_interval_holds_the_differential_equations() {
    for (kind, mach, theta, shape, third, dx) in [
        (Kind::Laminar, 0.0, 3e-4, 3.4, 2.0, 1e-4),
        (Kind::Laminar, 0.4, 3e-4, 3.6, 2.0, 1e-4),
        (Kind::Turbulent, 0.0, 3e-3, 1.6, 0.06, 1e-3),
        (Kind::Turbulent, 0.4, 3e-3, 2.4, 0.09, 1e-3),
        (Kind::Wake, 0.4, 3e-3, 1.5, 0.06, 1e-3),
    ] {
        let gas = Gas::new(1e6, mach);
        let laminar = kind == Kind::Laminar;
        let course = |x: f64| {
            let third = if laminar { third + 9.0 * x } else { third * (0.5 * x).exp() };
            point(theta * (0.4 * x).exp(), shape - 0.7 * x, third, 1.1 * (-0.3 * x).exp())
        };
        let at = |x: f64| props(&gas, &course(x), kind);
        let (p, q) = (course(0.0), at(0.0));
        let hs_rise = ((at(1e-4).hs.v / at(-1e-4).hs.v).ln()) / 2e-4;
        let u_rise = -0.3;
        let half = 0.5 * q.cf.v;
        let third = if laminar {
            [9.0, -q.growth.v, 0.0]
        } else {
            let a = if kind == Kind::Wake { 0.9 } else { 1.0 };
            let wall = wall_shape(q.hk, q.re_theta, kind).v / (6.7 * a * q.hk.v);
            let pull = 5.6 / (1.0 + q.us.v) * 4.0 / 3.0 * (q.seq.v - a * p.c.v);
            [0.5 + u_rise, -pull / (2.0 * q.delta.v), -(half - wall * wall) / (0.75 * p.dstar.v)]
        };
        let expected = [
            [0.4, (2.0 + q.h.v - q.m2.v) * u_rise, -half / p.theta.v],
            [hs_rise, (2.0 * q.hss.v / q.hs.v + 1.0 - q.h.v) * u_rise, -(q.di.v - half) / p.theta.v],
            third,
        ];
        let found = equations(&gas, kind, [&course(-0.5 * dx), &course(0.5 * dx)], dx);
        for (found, terms) in found.into_iter().zip(expected) {
            let (sum, size) = (terms.iter().sum::<f64>(), terms.iter().map(|t| t.abs()).sum::<f64>());
            // The mean over the interval differs from its middle by the square of its length.
            assert!((found / dx - sum).abs() < 3e-5 * size, "{kind:?} {mach}: {} {terms:?}", found / dx);
        }
    }
}

/// The more the shape changes the more the downstream end counts: `1 - exp(-5 l^2/Hk^2)/2` with
/// `l = ln((Hk2 - 1)/(Hk1 - 1))`, 1 in place of 5 in the wake. Read back from the energy equation.
#[test]
fn the_downstream_end_counts_more_where_the_shape_changes() {
    let gas = Gas::new(1e6, 0.0);
    for (kind, scale) in [(Kind::Turbulent, 5.0), (Kind::Wake, 1.0)] {
        let (p1, p2, dx) = (point(3e-3, 1.6, 0.06, 1.0), point(3.2e-3, 2.9, 0.08, 0.97), 0.02);
        let [q1, q2]: [Props<0>; 2] = [&p1, &p2].map(|p| props(&gas, p, kind));
        let spent = |p: &Point<0>, q: &Props<0>| (q.di.v - 0.5 * q.cf.v) / p.theta.v;
        let left = (q2.hs.v / q1.hs.v).ln() + (1.0 - 0.5 * (q1.h.v + q2.h.v)) * (0.97_f64).ln();
        let work = (left - equations(&gas, kind, [&p1, &p2], dx)[1]) / dx;
        let found = (work - spent(&p1, &q1)) / (spent(&p2, &q2) - spent(&p1, &q1));
        let l = (1.9_f64 / 0.6).ln();
        let expected = 1.0 - 0.5 * (-scale * l * l / (2.9 * 2.9)).exp();
        assert!((found - expected).abs() < 1e-9, "{kind:?} {found} {expected}");
    }
}

/// Turbulent from the place of transition on: the same as an interval of its own that begins there.
#[test]
fn a_transition_interval_is_a_turbulent_one_from_its_place_on() {
    let gas = Gas::new(1e6, 0.0);
    let (first, trial) = (point(3e-4, 2.7, 7.0, 1.2), point(3.4e-4, 3.1, 9.6, 1.17));
    let (last, dx, w) = (point(3.8e-4, 2.0, 0.04, 1.16), 0.03, 0.7);
    let q = props(&gas, &last, Kind::Turbulent);
    let (found, at) = transition(&gas, &first, &trial, Dual::constant(w), (&last, &q), dx);
    let place = point(3.28e-4, (0.3 * 8.1e-4 + 0.7 * 1.054e-3) / 3.28e-4, 0.0, 1.179);
    for (a, b) in [(at.theta, place.theta), (at.dstar, place.dstar), (at.u, place.u)] {
        assert!((a.v / b.v - 1.0).abs() < 1e-12);
    }
    assert_eq!(at.c, at_transition(&gas, &at));
    let expected = equations(&gas, Kind::Turbulent, [&at, &last], (1.0 - w) * dx);
    for (found, expected) in found.into_iter().zip(expected) {
        assert!((found.v - expected).abs() < 1e-9, "{} {expected}", found.v);
    }
}

/// With a growth linear over the interval n is critical there, and at the end where it is not reached.
#[test]
fn transition_lies_where_n_is_critical() {
    let c = Dual::<0>::constant;
    for (n1, g1, g2) in [(7.0, 20.0, 90.0), (8.5, 60.0, 10.0), (7.0, 50.0, 50.0), (5.0, 0.0, 200.0)] {
        let dx = 0.05;
        let w = critical_part(9.0, c(n1), c(g1), c(g2), dx).v;
        let n = n1 + dx * w * (g1 + 0.5 * w * (g2 - g1));
        assert!((n - 9.0).abs() < 1e-9 && w > 0.0 && w < 1.0, "{n} {w}");
    }
    assert_eq!(critical_part(9.0, c(5.0), c(10.0), c(20.0), 0.05).v, 1.0);
}
