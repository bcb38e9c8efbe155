//! The equations of the layer linearised at every station, and eliminated in favour of the speeds from
//! outside.
//!
//! Unknowns at a node are the changes of momentum thickness, mass defect and third variable, `z`; the change
//! of the speed is `c dm + W`, where `W` is the part that comes from everything else. Down a chain every `z`
//! follows from the one before and from the `W` of both.

use super::closure::{Gas, Kind, Point, props};
use super::dense::solve_small;
use super::dual::Dual;
use super::interval::{Interval, critical_part, similar, transition};
use super::layer::{Layer, State, fixed, varying};

/// Residuals of a station and their derivatives with respect to the upstream and the own state.
pub(super) struct Residual {
    pub(super) value: [f64; 3],
    pub(super) before: [[f64; 4]; 3],
    pub(super) own: [[f64; 4]; 3],
}

impl Residual {
    fn new(r: [Dual<8>; 3]) -> Self {
        let pick = |offset: usize| r.map(|r| [0, 1, 2, 3].map(|k| r.d[offset + k]));
        Self { value: r.map(|r| r.v), before: pick(0), own: pick(4) }
    }
}

impl Layer {
    /// Residual of a station of a side. At the first the upstream "speed" is the gradient at the stagnation
    /// point.
    pub(super) fn side_residual(&self, side: usize, station: usize, law: &[f64]) -> Residual {
        let nodes = &self.sides[side].nodes;
        let (node, gas) = (nodes[station], &self.course.gas);
        let own = varying::<8>(&self.state[node], 4);
        let kind = self.kind(side, station);
        let own_props = props(gas, &own, kind);
        if station == 0 {
            return Residual::new(similar(&own, &own_props, Dual::variable(self.gradient(), 3)));
        }
        let (before, dx) = (nodes[station - 1], self.dx(nodes[station - 1], node));
        let first = varying::<8>(&self.state[before], 0);
        match self.sides[side].transition.filter(|t| t.station == station) {
            None => {
                let first_props = props(gas, &first, kind);
                let interval = Interval { first: (&first, &first_props), last: (&own, &own_props), dx };
                Residual::new(if kind == Kind::Laminar {
                    interval.laminar()
                } else {
                    interval.turbulent(kind)
                })
            }
            Some(t) => {
                let c = law[node];
                let outside = own.u - c * own.u * own.dstar;
                let lost = t.forced && t.part == 0.0;
                let trial =
                    if lost { first } else { vary_trial(gas, &self.state[before], &t.trial, dx, c, outside) };
                let w = if t.forced { Dual::constant(t.part) } else { self.part(side, &first, &trial, dx) };
                Residual::new(transition(gas, &first, &trial, w, (&own, &own_props), dx).0)
            }
        }
    }

    fn part(&self, side: usize, first: &Point<8>, trial: &Point<8>, dx: f64) -> Dual<8> {
        let gas = &self.course.gas;
        let (q1, q2) = (props(gas, first, Kind::Laminar), props(gas, trial, Kind::Laminar));
        critical_part(self.course.n_crit[side], first.c, q1.growth, q2.growth, dx)
    }

    /// Residual of a node of the wake after its first.
    pub(super) fn wake_residual(&self, node: usize) -> Residual {
        let gas = &self.course.gas;
        let (first, own) = (varying::<8>(&self.state[node - 1], 0), varying::<8>(&self.state[node], 4));
        let (q1, q2) = (props(gas, &first, Kind::Wake), props(gas, &own, Kind::Wake));
        let interval = Interval { first: (&first, &q1), last: (&own, &q2), dx: self.dx(node - 1, node) };
        Residual::new(interval.turbulent(Kind::Wake))
    }
}

/// The laminar trial state with its derivatives, from its own four equations.
fn vary_trial(gas: &Gas, before: &State, trial: &State, dx: f64, c: f64, outside: Dual<8>) -> Point<8> {
    let (first, last) = (varying::<8>(before, 0), varying::<8>(trial, 4));
    let (q1, q2) = (props(gas, &first, Kind::Laminar), props(gas, &last, Kind::Laminar));
    let rows = Interval { first: (&first, &q1), last: (&last, &q2), dx }.laminar();
    let law = last.u - c * last.u * last.dstar;
    let own = [rows[0], rows[1], rows[2], law].map(|r| [4, 5, 6, 7].map(|k| r.d[k]));
    let mut right = [[0.0; 5]; 4];
    for (right, row) in right.iter_mut().zip(&rows) {
        for (right, slope) in right.iter_mut().zip(&row.d[..4]) {
            *right = -slope;
        }
    }
    right[3][4] = 1.0;
    let Some(slopes) = solve_small(own, right) else {
        return fixed(trial);
    };
    let vary = |k: usize| {
        let mut d = outside.d.map(|d| slopes[k][4] * d);
        for (d, slope) in d.iter_mut().zip(&slopes[k][..4]) {
            *d += slope;
        }
        Dual { v: trial[k], d }
    };
    Point { theta: vary(0), dstar: vary(1), c: vary(2), u: vary(3) }
}

/// `z = constant + by_before z_before + by_before_w W_before + by_own_w W_own`.
#[derive(Debug, Clone, Copy)]
pub(super) struct Step {
    pub(super) constant: [f64; 3],
    pub(super) by_before: [[f64; 3]; 3],
    pub(super) by_before_w: [f64; 3],
    pub(super) by_own_w: [f64; 3],
}

/// Derivatives with respect to (theta, mass, third) and to W, from those with respect to (theta, dstar,
/// third, u).
pub(super) fn to_mass(row: [f64; 4], state: &State, c: f64) -> ([f64; 3], f64) {
    let [_, dstar, _, u] = *state;
    // dstar = m/u, u changes by c dm + W
    let by_u = row[3] - row[1] * dstar / u;
    ([row[0], row[1] / u + by_u * c, row[2]], by_u)
}

/// Turns the residual of a station into the step of the elimination. None if it is singular.
pub(super) fn eliminate(r: &Residual, before: (&State, f64), own: (&State, f64)) -> Option<Step> {
    let mut a = [[0.0; 3]; 3];
    let mut right = [[0.0; 6]; 3];
    for k in 0..3 {
        let (own_z, own_w) = to_mass(r.own[k], own.0, own.1);
        let (before_z, before_w) = to_mass(r.before[k], before.0, before.1);
        a[k] = own_z;
        right[k] = [-r.value[k], -before_z[0], -before_z[1], -before_z[2], -before_w, -own_w];
    }
    let x = solve_small(a, right)?;
    Some(Step {
        constant: x.map(|x| x[0]),
        by_before: x.map(|x| [x[1], x[2], x[3]]),
        by_before_w: x.map(|x| x[4]),
        by_own_w: x.map(|x| x[5]),
    })
}
