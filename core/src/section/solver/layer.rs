//! The boundary layer on both sides and in the wake: its state at every node, and which node lies where.

use super::closure::{Gas, Kind, Point, Props, at_transition, props};
use super::dual::Dual;

/// State at a node: momentum thickness, displacement thickness, n or root of shear stress coefficient, edge
/// speed.
pub(super) type State = [f64; 4];

/// Where a side becomes turbulent.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Transition {
    /// Station along the side at the end of the interval.
    pub(super) station: usize,
    /// Part of the interval that is laminar.
    pub(super) part: f64,
    /// Whether a trip and not growth fixed it.
    pub(super) forced: bool,
    /// Laminar state at the station had there been no transition.
    pub(super) trial: State,
}

/// One side, from the stagnation point to the trailing edge.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Side {
    pub(super) nodes: Vec<usize>,
    pub(super) transition: Option<Transition>,
    /// Interval and part of it where a trip is wanted.
    pub(super) trip: Option<(usize, f64)>,
}

impl Side {
    /// Whether the layer at a station is laminar.
    pub(super) fn laminar(&self, station: usize) -> bool {
        self.transition.is_none_or(|t| station < t.station)
    }
}

/// What does not change while one polar is computed.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Course {
    pub(super) gas: Gas,
    /// Amplification exponent at transition, by side.
    pub(super) n_crit: [f64; 2],
    /// Trips of the upper and lower side, in chords from the nose.
    pub(super) trips: [Option<f64>; 2],
    /// Nodes on the outline.
    pub(super) body: usize,
    /// Gap of the trailing edge.
    pub(super) gap: f64,
}

/// The whole boundary layer.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Layer {
    pub(super) course: Course,
    /// Abscissa of every node, outline then wake.
    pub(super) x: Vec<f64>,
    /// Arc length of every node; it begins anew at the wake.
    pub(super) arc: Vec<f64>,
    /// Last node of the upper side: the stagnation point lies between it and the next.
    pub(super) stagnation: usize,
    pub(super) state: Vec<State>,
    pub(super) sides: [Side; 2],
    /// Stations whose own equations could not be solved in the last march.
    pub(super) failed: Vec<bool>,
    /// Largest relative change of the displacement thickness that a march may make at a station.
    pub(super) leap: f64,
}

/// Amplification exponent that no layer reaches.
const NEVER: f64 = 1e3;

/// Least Reynolds number on momentum thickness at which a trip takes hold.
pub(super) const TRIP_RE_THETA: f64 = 100.0;

impl Layer {
    pub(super) fn new(course: Course, x: Vec<f64>, arc: Vec<f64>, speeds: &[f64]) -> Self {
        let side = Side { nodes: Vec::new(), transition: None, trip: None };
        let mut layer = Self {
            course,
            stagnation: 0,
            state: speeds.iter().map(|q| [1e-4, 2.2e-4, 0.0, q.abs().max(1e-6)]).collect(),
            sides: [side.clone(), side],
            failed: vec![false; x.len()],
            leap: f64::INFINITY,
            x,
            arc,
        };
        let middle = layer.course.body / 2;
        let change = (1..layer.course.body - 2).filter(|&k| speeds[k] <= 0.0 && speeds[k + 1] > 0.0);
        layer.set_stagnation(change.min_by_key(|k| k.abs_diff(middle)).unwrap_or(middle));
        layer
    }

    pub(super) fn total(&self) -> usize {
        self.x.len()
    }

    /// Sign of the flow along the list of nodes.
    pub(super) fn sign(&self, node: usize) -> f64 {
        if node <= self.stagnation { -1.0 } else { 1.0 }
    }

    /// Signed speeds along the list of nodes.
    pub(super) fn signed_speed(&self, node: usize) -> f64 {
        self.sign(node) * self.state[node][3]
    }

    /// Mass defect, positive.
    pub(super) fn mass(&self, node: usize) -> f64 {
        self.state[node][1] * self.state[node][3]
    }

    /// Length of the interval between two nodes of one chain.
    pub(super) fn dx(&self, a: usize, b: usize) -> f64 {
        (self.arc[a] - self.arc[b]).abs()
    }

    /// Gradient of the speed at the stagnation point.
    pub(super) fn gradient(&self) -> f64 {
        let k = self.stagnation;
        (self.state[k][3] + self.state[k + 1][3]) / self.dx(k, k + 1)
    }

    /// Puts the stagnation point between `k` and the next node.
    pub(super) fn set_stagnation(&mut self, k: usize) {
        self.stagnation = k;
        let body = self.course.body;
        for (side, nodes) in
            [(0..=k).rev().collect::<Vec<_>>(), (k + 1..body).collect()].into_iter().enumerate()
        {
            let old = std::mem::take(&mut self.sides[side].nodes);
            let shift = nodes.len().cast_signed() - old.len().cast_signed();
            let trip = self.course.trips[side].and_then(|x| self.trip(&nodes, x));
            let side = &mut self.sides[side];
            side.trip = trip;
            if let Some(t) = &mut side.transition {
                t.station = t.station.saturating_add_signed(shift).clamp(1, nodes.len() - 1);
            }
            side.nodes = nodes;
        }
    }

    /// Interval in which a side passes the abscissa `x` running aft.
    fn trip(&self, nodes: &[usize], x: f64) -> Option<(usize, f64)> {
        let found = (1..nodes.len()).find(|&i| self.x[nodes[i - 1]] < x && x <= self.x[nodes[i]]);
        let part = |i: usize| (x - self.x[nodes[i - 1]]) / (self.x[nodes[i]] - self.x[nodes[i - 1]]);
        found.map(|i| (i, part(i)))
    }

    /// After a change of the speeds: nodes beside the stagnation point whose speed has turned change side.
    pub(super) fn follow_stagnation(&mut self) {
        let (low, high) = (2, self.course.body - 4);
        while self.stagnation > low && self.state[self.stagnation][3] <= 0.0 {
            self.flip(self.stagnation);
            self.set_stagnation(self.stagnation - 1);
        }
        while self.stagnation < high && self.state[self.stagnation + 1][3] <= 0.0 {
            self.flip(self.stagnation + 1);
            self.set_stagnation(self.stagnation + 1);
        }
        for state in &mut self.state {
            state[3] = state[3].max(1e-6);
        }
    }

    fn flip(&mut self, node: usize) {
        self.state[node][3] = (-self.state[node][3]).max(1e-6);
        self.state[node][2] = 0.0;
    }

    /// Kind of layer at a station of a side.
    pub(super) fn kind(&self, side: usize, station: usize) -> Kind {
        if self.sides[side].laminar(station) { Kind::Laminar } else { Kind::Turbulent }
    }

    /// State at the trailing edge of a side, as the wake takes it over: turbulent.
    pub(super) fn edge<const K: usize>(&self, side: usize, state: &Point<K>) -> Point<K> {
        let last = self.sides[side].nodes.len() - 1;
        let mut edge = *state;
        if self.sides[side].laminar(last) {
            edge.c = at_transition(&self.course.gas, state);
        }
        edge
    }

    /// Abscissa of transition of a side; 1 when it stays laminar.
    pub(super) fn transition_x(&self, side: usize) -> f64 {
        let side = &self.sides[side];
        side.transition.map_or(1.0, |t| {
            let (a, b) = (self.x[side.nodes[t.station - 1]], self.x[side.nodes[t.station]]);
            a + t.part * (b - a)
        })
    }

    /// Amplification exponent at the trip of a side, where the layer turns there.
    pub(super) fn growth_at_trip(&self, side: usize) -> Option<f64> {
        let nodes = &self.sides[side].nodes;
        let t = self.sides[side].transition.filter(|t| t.forced)?;
        let first = &self.state[nodes[t.station - 1]];
        let growth = |state: &State| props(&self.course.gas, &fixed::<0>(state), Kind::Laminar).growth.v;
        let (g1, g2) = (growth(first), growth(&t.trial));
        let dx = self.dx(nodes[t.station - 1], nodes[t.station]);
        Some(first[2] + dx * t.part * (g1 + 0.5 * t.part * (g2 - g1)))
    }

    /// Trips a side at an abscissa and nowhere else.
    pub(super) fn trip_at(&mut self, side: usize, x: f64) {
        self.course.trips[side] = Some(x);
        self.course.n_crit[side] = NEVER;
        self.set_stagnation(self.stagnation);
    }

    /// Takes trips and exponents of a course again.
    pub(super) fn let_go(&mut self, course: &Course) {
        (self.course.trips, self.course.n_crit) = (course.trips, course.n_crit);
        self.set_stagnation(self.stagnation);
    }

    /// Shape parameter at a node.
    pub(super) fn shape(&self, node: usize) -> f64 {
        self.state[node][1] / self.state[node][0]
    }
}

/// A state that depends on nothing.
pub(super) fn fixed<const K: usize>(state: &State) -> Point<K> {
    let [theta, dstar, c, u] = state.map(Dual::constant);
    Point { theta, dstar, c, u }
}

/// A state whose four numbers are the variables from `offset`.
pub(super) fn varying<const K: usize>(state: &State, offset: usize) -> Point<K> {
    let at = |k: usize| Dual::variable(state[k], offset + k);
    Point { theta: at(0), dstar: at(1), c: at(2), u: at(3) }
}

/// Closures of a state that depends on nothing.
pub(super) fn fixed_props<const K: usize>(gas: &Gas, state: &State, kind: Kind) -> (Point<K>, Props<K>) {
    let point = fixed::<0>(state);
    let plain = props(gas, &point, kind);
    let lift = |v: Dual<0>| Dual::constant(v.v);
    let Props { h, hk, m2, re_theta, hs, hss, cf, di, us, seq, delta, growth } = plain;
    let lifted = Props {
        h: lift(h),
        hk: lift(hk),
        m2: lift(m2),
        re_theta: lift(re_theta),
        hs: lift(hs),
        hss: lift(hss),
        cf: lift(cf),
        di: lift(di),
        us: lift(us),
        seq: lift(seq),
        delta: lift(delta),
        growth: lift(growth),
    };
    (fixed(state), lifted)
}
