//! Marching the boundary layer from the stagnation point down both sides and the wake, station by station.
//!
//! Each march solves every station for the speed that the rest of the flow gives it (`v`) and the local law
//! of interaction, so that the equations of the layer hold everywhere before the coupled step is taken. A
//! station that cannot be solved keeps what it had; its equations then stay in the coupled system.
//!
//! # References
//! Veldman, AIAA J. 19(1), 1981: quasi-simultaneous interaction.

use super::closure::{Kind, props};
use super::dual::Dual;
use super::interval::critical_part;
use super::layer::{Layer, State, TRIP_RE_THETA, Transition, fixed};
use super::station::{Closing, Upstream, solve};

/// How the fourth equation of a station is chosen.
pub(super) enum Drive<'a> {
    /// Law of interaction with these coefficients and speeds, by node.
    Law(&'a [f64], &'a [f64]),
    /// First start: given speeds, and a given growth of the shape parameter where that fails.
    Cold,
}

impl Layer {
    /// One march over everything.
    pub(super) fn march(&mut self, drive: &Drive<'_>) {
        self.failed.fill(false);
        for side in 0..2 {
            let old = self.sides[side].transition.take();
            for station in 0..self.sides[side].nodes.len() {
                self.march_station(side, station, drive, old);
            }
        }
        self.march_wake(drive);
    }

    /// Solves one station of a side, with the search for transition while the layer is laminar.
    fn march_station(&mut self, side: usize, station: usize, drive: &Drive<'_>, old: Option<Transition>) {
        let node = self.sides[side].nodes[station];
        if !self.sides[side].laminar(station) {
            let before = self.sides[side].nodes[station - 1];
            let (upstream, dx) = (self.state[before], self.dx(before, node));
            let guesses = self.guesses(node, &upstream, old.is_some_and(|t| station >= t.station));
            let found = self.close(Kind::Turbulent, Upstream::Station(&upstream, dx), drive, node, &guesses);
            return self.accept(node, found);
        }
        let was_laminar = old.is_none_or(|t| station < t.station);
        let Some(trial) = self.laminar_trial(side, station, drive, was_laminar, old) else {
            if was_laminar || station == 0 {
                self.failed[node] = true;
            } else {
                // The layer was turbulent here: let it turn at the start of the interval.
                let trial = self.state[self.sides[side].nodes[station - 1]];
                self.pass_transition(
                    side,
                    Transition { station, part: 0.0, forced: true, trial },
                    drive,
                    old,
                );
            }
            return;
        };
        match self.transition_part(side, station, &trial) {
            None => self.accept(node, Some(trial)),
            Some((part, forced)) => {
                self.pass_transition(side, Transition { station, part, forced, trial }, drive, old);
            }
        }
    }

    /// Laminar state at a station.
    fn laminar_trial(
        &self,
        side: usize,
        station: usize,
        drive: &Drive<'_>,
        was_laminar: bool,
        old: Option<Transition>,
    ) -> Option<State> {
        let nodes = &self.sides[side].nodes;
        let node = nodes[station];
        if station == 0 {
            let a = self.gradient();
            let theta = (0.075 / (self.course.gas.reynolds * a)).sqrt();
            let guesses = [[theta, 2.2 * theta, 0.0, self.state[node][3]]];
            return self.close(Kind::Laminar, Upstream::Stagnation(a), drive, node, &guesses);
        }
        let before = self.state[nodes[station - 1]];
        let mut guesses = self.guesses(node, &before, was_laminar);
        if let Some(t) = old.filter(|t| t.station == station) {
            guesses.insert(0, t.trial);
        }
        for guess in &mut guesses {
            guess[2] = guess[2].max(before[2]);
        }
        let dx = self.dx(nodes[station - 1], node);
        self.close(Kind::Laminar, Upstream::Station(&before, dx), drive, node, &guesses)
    }

    /// Part of the interval before a station that is laminar, and whether a trip ends it; none without
    /// transition.
    fn transition_part(&self, side: usize, station: usize, trial: &State) -> Option<(f64, bool)> {
        if station == 0 {
            return None;
        }
        let nodes = &self.sides[side].nodes;
        let (before, gas) = (&self.state[nodes[station - 1]], &self.course.gas);
        let first = props(gas, &fixed::<0>(before), Kind::Laminar);
        let n_crit = self.course.n_crit[side];
        let free = (trial[2] >= n_crit).then(|| {
            let last = props(gas, &fixed::<0>(trial), Kind::Laminar);
            let dx = self.dx(nodes[station - 1], nodes[station]);
            let n1 = Dual::constant(before[2]);
            critical_part(n_crit, n1, first.growth, last.growth, dx).v
        });
        let trip = self.sides[side].trip.filter(|&(at, _)| station >= at && first.re_theta.v > TRIP_RE_THETA);
        let trip = trip.map(|(at, part)| if station == at { part } else { 0.0 });
        match (free, trip) {
            (Some(free), Some(trip)) if trip < free => Some((trip, true)),
            (Some(free), _) => Some((free, false)),
            (None, Some(trip)) => Some((trip, true)),
            (None, None) => None,
        }
    }

    /// Solves the station at the end of the interval with transition.
    fn pass_transition(
        &mut self,
        side: usize,
        found: Transition,
        drive: &Drive<'_>,
        old: Option<Transition>,
    ) {
        let nodes = &self.sides[side].nodes;
        let (before, node) = (nodes[found.station - 1], nodes[found.station]);
        let (first, dx) = (self.state[before], self.dx(before, node));
        let mut guesses = Vec::new();
        if old.is_some_and(|t| found.station >= t.station) {
            guesses.push(self.state[node]);
        }
        let theta = first[0] + found.part * (found.trial[0] - first[0]);
        for shape in [0.6 * found.trial[1] / found.trial[0], 2.2, 1.6, found.trial[1] / found.trial[0]] {
            guesses.push([theta * 1.05, theta * 1.05 * shape.max(1.3), 0.05, self.state[node][3]]);
        }
        self.sides[side].transition = Some(found);
        let upstream = Upstream::Transition(&first, &found.trial, found.part, dx);
        let solved = self.close(Kind::Turbulent, upstream, drive, node, &guesses);
        if solved.is_none() && old.is_none_or(|t| found.station < t.station) {
            // It was laminar before: give the coupled step a turbulent state to work on.
            self.state[node] = [theta, theta * 2.0, 0.05, self.state[node][3]];
        }
        self.accept(node, solved);
    }

    /// The wake, from the sum of the two sides at the trailing edge.
    fn march_wake(&mut self, drive: &Drive<'_>) {
        let first = self.course.body;
        self.state[first] = self.wake_start();
        for node in first + 1..self.total() {
            let (before, dx) = (self.state[node - 1], self.dx(node - 1, node));
            let guesses = self.guesses(node, &before, true);
            let found = self.close(Kind::Wake, Upstream::Station(&before, dx), drive, node, &guesses);
            self.accept(node, found);
        }
    }

    /// First station of the wake; its speed is kept.
    fn wake_start(&self) -> State {
        let edge = |side: usize| {
            let state = &self.state[if side == 0 { 0 } else { self.course.body - 1 }];
            self.edge(side, &fixed::<0>(state))
        };
        let (up, low) = (edge(0), edge(1));
        let theta = up.theta.v + low.theta.v;
        let shear = (up.c.v * up.theta.v + low.c.v * low.theta.v) / theta;
        let dstar = up.dstar.v + low.dstar.v + self.course.gap;
        [theta, dstar, shear, self.state[self.course.body][3]]
    }

    fn guesses(&self, node: usize, upstream: &State, own: bool) -> Vec<State> {
        let mut from_upstream = *upstream;
        from_upstream[3] = self.state[node][3];
        if own { vec![self.state[node], from_upstream] } else { vec![from_upstream] }
    }

    /// Solves a station with its fourth equation.
    fn close(
        &self,
        kind: Kind,
        upstream: Upstream<'_>,
        drive: &Drive<'_>,
        node: usize,
        guesses: &[State],
    ) -> Option<State> {
        let gas = &self.course.gas;
        match drive {
            Drive::Law(c, v) => solve(gas, kind, upstream, Closing::Law { c: c[node], v: v[node] }, guesses),
            Drive::Cold => {
                let law = Closing::Law { c: 0.0, v: self.state[node][3] };
                let limit = match kind {
                    Kind::Laminar => 3.8,
                    Kind::Turbulent => 2.4,
                    Kind::Wake => 2.0,
                };
                let direct = solve(gas, kind, upstream, law, guesses).filter(|s| s[1] / s[0] <= limit);
                direct.or_else(|| {
                    let hk = prescribed_shape(kind, upstream);
                    let theta = guesses[guesses.len() - 1][0];
                    let mut guesses = guesses.to_vec();
                    guesses.push([theta, theta * hk, guesses[0][2], self.state[node][3]]);
                    solve(gas, kind, upstream, Closing::Shape(hk), &guesses)
                })
            }
        }
    }

    /// Whether a solution lies farther from what a station has than a march may go.
    fn leaps(&self, node: usize, state: &State) -> bool {
        let own = &self.state[node];
        (state[1] / own[1] - 1.0).abs() > self.leap || (state[0] / own[0] - 1.0).abs() > self.leap
    }

    fn accept(&mut self, node: usize, found: Option<State>) {
        match found {
            Some(state) if !self.leaps(node, &state) => self.state[node] = state,
            _ => self.failed[node] = true,
        }
    }
}

/// Shape parameter of a first start where given speeds have no solution.
fn prescribed_shape(kind: Kind, upstream: Upstream<'_>) -> f64 {
    match upstream {
        Upstream::Stagnation(_) => 2.22,
        Upstream::Transition(first, trial, part, dx) => {
            let [theta, dstar] = [0, 1].map(|k| first[k] + part * (trial[k] - first[k]));
            (dstar / theta - 0.15 * (1.0 - part) * dx / theta).max(2.4)
        }
        Upstream::Station(state, dx) => {
            let (h, length) = (state[1] / state[0], dx / state[0]);
            match kind {
                Kind::Laminar => (h + (0.03 * length).min(0.5)).min(8.0),
                Kind::Turbulent => (h - 0.15 * length).max(2.4),
                Kind::Wake => wake_shape(h, length),
            }
        }
    }
}

/// `H + 0.03 (dx/theta) (H - 1)^3 = H1`: decay of the shape parameter in the wake.
fn wake_shape(h1: f64, length: f64) -> f64 {
    let mut h = h1;
    for _ in 0..20 {
        let value = h + 0.03 * length * (h - 1.0).powi(3) - h1;
        h -= value / (1.0 + 0.09 * length * (h - 1.0).powi(2));
    }
    h.max(1.001)
}
