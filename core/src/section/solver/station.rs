//! One station: its three equations and a fourth that ties speed and mass defect, solved by Newton's method.

use super::closure::{Gas, Kind, Point, Props, props};
use super::dense::solve_small;
use super::dual::Dual;
use super::interval::{Interval, similar, transition};
use super::layer::{State, fixed, fixed_props, varying};

/// The fourth equation.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Closing {
    /// Local law of interaction: `u - c m = v`.
    Law {
        /// Change of the speed with the mass defect of the same node.
        c: f64,
        /// Speed from everything else.
        v: f64,
    },
    /// The shape parameter is given and the speed found.
    Shape(f64),
}

/// What lies upstream of a station.
#[derive(Debug, Clone, Copy)]
pub(super) enum Upstream<'a> {
    /// The stagnation point, with the gradient of the speed there.
    Stagnation(f64),
    /// A station in the same kind of layer, at a distance.
    Station(&'a State, f64),
    /// A laminar station, with transition in the interval: the state there, the laminar trial, the part, the
    /// length.
    Transition(&'a State, &'a State, f64, f64),
}

/// Largest relative change in one step.
const STEP: f64 = 0.3;
/// Relative change at which a station is solved.
const TOLERANCE: f64 = 1e-9;
/// Most steps.
const STEPS: usize = 40;
/// Largest shape parameter of a solution; real bubbles reach 30.
const LARGEST_SHAPE: f64 = 60.0;

/// Solves a station from the first guess that leads to a solution.
pub(super) fn solve(
    gas: &Gas,
    kind: Kind,
    upstream: Upstream<'_>,
    closing: Closing,
    guesses: &[State],
) -> Option<State> {
    let before = Before::new(gas, kind, upstream);
    guesses.iter().find_map(|guess| newton(gas, kind, &before, closing, *guess))
}

/// Upstream closures, computed once for all steps.
enum Before {
    Stagnation(f64),
    Station(Box<(Point<4>, Props<4>)>, f64),
    Transition(Box<[Point<4>; 2]>, f64, f64),
}

impl Before {
    fn new(gas: &Gas, kind: Kind, upstream: Upstream<'_>) -> Self {
        match upstream {
            Upstream::Stagnation(a) => Self::Stagnation(a),
            Upstream::Station(state, dx) => Self::Station(Box::new(fixed_props(gas, state, kind)), dx),
            Upstream::Transition(state, trial, part, dx) => {
                Self::Transition(Box::new([fixed(state), fixed(trial)]), part, dx)
            }
        }
    }

    fn equations(&self, gas: &Gas, kind: Kind, p: &Point<4>, q: &Props<4>) -> [Dual<4>; 3] {
        match self {
            Self::Stagnation(a) => similar(p, q, Dual::constant(*a)),
            Self::Station(before, dx) => {
                let interval = Interval { first: (&before.0, &before.1), last: (p, q), dx: *dx };
                if kind == Kind::Laminar { interval.laminar() } else { interval.turbulent(kind) }
            }
            Self::Transition(ends, part, dx) => {
                transition(gas, &ends[0], &ends[1], Dual::constant(*part), (p, q), *dx).0
            }
        }
    }
}

fn newton(gas: &Gas, kind: Kind, before: &Before, closing: Closing, guess: State) -> Option<State> {
    let mut state = guess;
    for _ in 0..STEPS {
        let p = varying::<4>(&state, 0);
        let q = props(gas, &p, kind);
        let [r0, r1, r2] = before.equations(gas, kind, &p, &q);
        let r3 = match closing {
            Closing::Law { c, v } => p.u - c * p.u * p.dstar - v,
            Closing::Shape(hk) => q.hk - hk,
        };
        let rows = [r0, r1, r2, r3];
        let step = solve_small(rows.map(|r| r.d), rows.map(|r| [-r.v]))?;
        let step = step.map(|s| s[0]);
        let change = apply(&mut state, step, kind)?;
        if change < TOLERANCE {
            let fair =
                state[1] / state[0] < LARGEST_SHAPE && state[3] > 0.0 && state.iter().all(|v| v.is_finite());
            return fair.then_some(state);
        }
    }
    None
}

/// Takes a limited step; the largest relative change wanted, none if it is not finite.
fn apply(state: &mut State, step: State, kind: Kind) -> Option<f64> {
    let laminar = kind == Kind::Laminar;
    let relative = |k: usize| if k == 2 && laminar { 0.0 } else { (step[k] / state[k]).abs() };
    let largest = (0..4).map(relative).fold(0.0, f64::max);
    if !(largest.is_finite() && step[2].is_finite()) {
        return None;
    }
    let part = (STEP / largest.max(STEP)).min(1.0);
    for k in 0..4 {
        state[k] += part * step[k];
    }
    keep_in_bounds(state, kind);
    let n_change = if laminar { (part * step[2]).abs() * 1e-2 } else { 0.0 };
    Some(largest.max(n_change))
}

/// Bounds of what a layer can be.
pub(super) fn keep_in_bounds(state: &mut State, kind: Kind) {
    let least = if kind == Kind::Wake { 1.000_05 } else { 1.02 };
    state[0] = state[0].max(1e-9);
    state[1] = state[1].max(least * state[0]);
    state[2] = if kind == Kind::Laminar { state[2].max(-1e-9) } else { state[2].clamp(1e-5, 0.3) };
}
