//! The linearised layer as three chains, both sides and the wake, eliminated down to one dense system for the
//! speeds from outside.

use super::dense::{Factors, Matrix, add_scaled, dot};
use super::layer::{Layer, State, varying};
use super::linear::{Step, eliminate, to_mass};

/// The eliminated chains.
pub(super) struct Chains {
    steps: Vec<Step>,
    /// Both ends at the trailing edge feed the first node of the wake: node, step.
    edge: [(usize, Step); 2],
    /// `dm = constant + P W`: a row for each node, the constant last.
    mass: Matrix,
    /// Largest residual of the equations of the layer.
    pub(super) worst: f64,
}

/// Rows of the three changes of a node in terms of all W and a constant.
type Rows = [Vec<f64>; 3];

impl Chains {
    pub(super) fn new(layer: &Layer, c: &[f64]) -> Option<Self> {
        let total = layer.total();
        let blank =
            Step { constant: [0.0; 3], by_before: [[0.0; 3]; 3], by_before_w: [0.0; 3], by_own_w: [0.0; 3] };
        let mut chains = Self {
            steps: vec![blank; total],
            edge: [(0, blank), (layer.course.body - 1, blank)],
            mass: Matrix::zeros(total, total + 1),
            worst: 0.0,
        };
        let mut ends = Vec::new();
        for side in 0..2 {
            ends.push(chains.run_side(layer, c, side)?);
        }
        chains.run_wake(layer, c, &ends)?;
        Some(chains)
    }

    fn note(&mut self, value: &[f64; 3]) {
        self.worst = value.iter().fold(self.worst, |worst, v| if v.abs() <= worst { worst } else { v.abs() });
    }

    fn run_side(&mut self, layer: &Layer, c: &[f64], side: usize) -> Option<Rows> {
        let (total, k) = (layer.total(), layer.stagnation);
        let mut rows: Rows = [(); 3].map(|()| vec![0.0; total + 1]);
        for (station, &node) in layer.sides[side].nodes.iter().enumerate() {
            let residual = layer.side_residual(side, station, c);
            self.note(&residual.value);
            let own = (&layer.state[node], c[node]);
            if station == 0 {
                // "Before" is the gradient alone, in the place of the speed.
                let gradient = [1.0, 0.0, 0.0, 1.0];
                let step = eliminate(&residual, (&gradient, 0.0), own)?;
                let per_w = 1.0 / layer.dx(k, k + 1);
                for (q, row) in rows.iter_mut().enumerate() {
                    row[k] += step.by_before_w[q] * per_w;
                    row[k + 1] += step.by_before_w[q] * per_w;
                    row[node] += step.by_own_w[q];
                    row[total] += step.constant[q];
                }
                self.steps[node] = step;
            } else {
                let before = layer.sides[side].nodes[station - 1];
                let step = eliminate(&residual, (&layer.state[before], c[before]), own)?;
                rows = advance(&rows, &step, before, node);
                self.steps[node] = step;
            }
            self.mass.row_mut(node).copy_from_slice(&rows[1]);
        }
        Some(rows)
    }

    fn run_wake(&mut self, layer: &Layer, c: &[f64], ends: &[Rows]) -> Option<()> {
        let (first, total) = (layer.course.body, layer.total());
        let mut rows: Rows = [(); 3].map(|()| vec![0.0; total + 1]);
        for (side, side_end) in ends.iter().enumerate() {
            let node = self.edge[side].0;
            let step = edge_step(layer, side, c);
            self.edge[side].1 = step;
            for (q, row) in rows.iter_mut().enumerate() {
                for (p, end) in side_end.iter().enumerate() {
                    add_scaled(row, step.by_before[q][p], end);
                }
                row[node] += step.by_before_w[q];
            }
        }
        // m = dstar u: the speed of the first node of the wake itself.
        rows[1][first] += layer.state[first][1];
        self.mass.row_mut(first).copy_from_slice(&rows[1]);
        for node in first + 1..total {
            let residual = layer.wake_residual(node);
            self.note(&residual.value);
            let before = (&layer.state[node - 1], c[node - 1]);
            let step = eliminate(&residual, before, (&layer.state[node], c[node]))?;
            rows = advance(&rows, &step, node - 1, node);
            self.steps[node] = step;
            self.mass.row_mut(node).copy_from_slice(&rows[1]);
        }
        Some(())
    }

    /// Solves for W.
    pub(super) fn solve(&self, layer: &Layer, influence: &Matrix, c: &[f64], r: &[f64]) -> Option<Vec<f64>> {
        let total = layer.total();
        let mut system = Matrix::zeros(total, total);
        let mut right = r.to_vec();
        let mut line = vec![0.0; total + 1];
        for i in 0..total {
            line.fill(0.0);
            for (j, effect) in influence.row(i).iter().enumerate() {
                let mut e = layer.sign(i) * effect * layer.sign(j);
                if i == j {
                    e -= c[i];
                }
                let reach = reach(layer, j);
                add_scaled(&mut line[reach.clone()], -e, &self.mass.row(j)[reach]);
                line[total] += e * self.mass.row(j)[total];
            }
            right[i] += line[total];
            system.row_mut(i).copy_from_slice(&line[..total]);
            system.row_mut(i)[i] += 1.0;
        }
        let outside = Factors::new(system)?.solve(&right);
        outside.iter().all(|w| w.is_finite()).then_some(outside)
    }

    /// Changes of all nodes from W, by running down the chains with numbers.
    pub(super) fn changes(&self, layer: &Layer, outside: &[f64]) -> Vec<[f64; 3]> {
        let total = layer.total();
        let mut z = vec![[0.0; 3]; total];
        let k = layer.stagnation;
        let gradient = (outside[k] + outside[k + 1]) / layer.dx(k, k + 1);
        for side in &layer.sides {
            let node = side.nodes[0];
            let step = &self.steps[node];
            z[node] = [0, 1, 2].map(|q| {
                step.constant[q] + step.by_before_w[q] * gradient + step.by_own_w[q] * outside[node]
            });
            for pair in side.nodes.windows(2) {
                z[pair[1]] = run(&self.steps[pair[1]], &z[pair[0]], outside[pair[0]], outside[pair[1]]);
            }
        }
        let first = layer.course.body;
        for (node, step) in &self.edge {
            let part = run(step, &z[*node], outside[*node], 0.0);
            for q in 0..3 {
                z[first][q] += part[q];
            }
        }
        z[first][1] += layer.state[first][1] * outside[first];
        for node in first + 1..total {
            z[node] = run(&self.steps[node], &z[node - 1], outside[node - 1], outside[node]);
        }
        z
    }
}

/// Columns in which the row of a node is not empty.
fn reach(layer: &Layer, node: usize) -> std::ops::Range<usize> {
    let k = layer.stagnation;
    if node <= k {
        node..k + 2
    } else if node < layer.course.body {
        k..node + 1
    } else {
        0..node + 1
    }
}

fn run(step: &Step, before: &[f64; 3], w_before: f64, w_own: f64) -> [f64; 3] {
    [0, 1, 2].map(|q| {
        step.constant[q]
            + dot(&step.by_before[q], before)
            + step.by_before_w[q] * w_before
            + step.by_own_w[q] * w_own
    })
}

fn advance(rows: &Rows, step: &Step, before: usize, own: usize) -> Rows {
    [0, 1, 2].map(|q| {
        let mut row = vec![0.0; rows[0].len()];
        for (weight, from) in step.by_before[q].iter().zip(rows) {
            add_scaled(&mut row, *weight, from);
        }
        let last = row.len() - 1;
        row[last] += step.constant[q];
        row[before] += step.by_before_w[q];
        row[own] += step.by_own_w[q];
        row
    })
}

/// What one side contributes to the first node of the wake: sums of the thicknesses, mean of the shear
/// weighted by theta.
fn edge_step(layer: &Layer, side: usize, c: &[f64]) -> Step {
    let first = &layer.state[layer.course.body];
    let node = if side == 0 { 0 } else { layer.course.body - 1 };
    let state: &State = &layer.state[node];
    let edge = layer.edge(side, &varying::<4>(state, 0));
    let mut step =
        Step { constant: [0.0; 3], by_before: [[0.0; 3]; 3], by_before_w: [0.0; 3], by_own_w: [0.0; 3] };
    // theta and dstar add; S = sum(S theta)/sum(theta), so dS = [theta_e dS_e + (S_e - S) dtheta_e]/theta
    let shear = [0, 1, 2, 3]
        .map(|k| (edge.theta.v * edge.c.d[k] + (edge.c.v - first[2]) * edge.theta.d[k]) / first[0]);
    let rows = [[1.0, 0.0, 0.0, 0.0], [0.0, first[3], 0.0, 0.0], shear];
    for (q, row) in rows.into_iter().enumerate() {
        let (by_z, by_w) = to_mass(row, state, c[node]);
        step.by_before[q] = by_z;
        step.by_before_w[q] = by_w;
    }
    step
}
