//! The coupled step: boundary layer and potential flow together, by Newton's method.
//!
//! The elimination gives every change of mass defect as `dm = m0 + P W`; with `W = (D - c) dm + r` one dense system is left.
//! `D` is the change of speed with mass defect in the direction of the flow, `c` its diagonal as far as the local
//! law of interaction uses it, `r` what the speeds lack of the potential flow.

use super::closure::Kind;
use super::dense::{Factors, Matrix, add_scaled, dot};
use super::layer::{Layer, State, varying};
use super::linear::{Step, eliminate, to_mass};
use super::march::Drive;
use super::potential::Flow;
use super::station::keep_in_bounds;

/// Convergence limit on the changes, the speeds and the equations.
pub(super) const TOLERANCE: f64 = 1e-5;
/// Change in the step before, below which a small residual is believed.
const SETTLED: f64 = 2e-3;

/// Length over which the curvature of the wake is averaged to each side, over the thickness `theta + dstar` of the wake at the
/// trailing edge: potential flow turns without bound there, a real wake not within its own thickness.
const CURVE_REACH: f64 = 1.5;

/// What one iteration found and did.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Progress {
    /// Root mean square of what the speeds lack.
    pub(super) speed: f64,
    /// Largest residual of the equations of the layer.
    pub(super) layer: f64,
    /// Root mean square of the relative changes taken.
    pub(super) change: f64,
    /// Part of the full step that was taken.
    pub(super) part: f64,
}

/// Coefficients of the local law: the diagonal of the influence, faded in behind the stagnation point, none at the trailing
/// edge node of the wake.
pub(super) fn law(layer: &Layer, flow: &Flow) -> Vec<f64> {
    let body = layer.course.body;
    let mut c: Vec<f64> = (0..layer.total()).map(|i| flow.by_mass.row(i)[i].max(0.0)).collect();
    c[body] = 0.0;
    for side in &layer.sides {
        for (station, &node) in side.nodes.iter().enumerate().take(6) {
            c[node] *= if station < 2 { 0.0 } else { (station - 1) as f64 / 5.0 };
        }
    }
    c
}

/// Speeds from potential flow with the present mass defects, less the present speeds, in the direction of the flow.
pub(super) fn speed_defect(layer: &Layer, flow: &Flow, influence: &Matrix) -> Vec<f64> {
    let mass: Vec<f64> = (0..layer.total()).map(|i| layer.sign(i) * layer.mass(i)).collect();
    (0..layer.total())
        .map(|i| layer.sign(i) * (flow.still[i] + dot(influence.row(i), &mass)) - layer.state[i][3])
        .collect()
}

fn rms(values: &[f64]) -> f64 {
    (values.iter().map(|v| v * v).sum::<f64>() / values.len() as f64).sqrt()
}

/// Marches the layer with the local law for the present speeds.
pub(super) fn re_march(layer: &mut Layer, flow: &Flow) -> Vec<f64> {
    let c = law(layer, flow);
    let v: Vec<f64> = (0..layer.total()).map(|i| layer.state[i][3] - c[i] * layer.mass(i)).collect();
    layer.march(&Drive::Law(&c, &v));
    c
}

/// One iteration: march, then the coupled step. `settled` is the change of the step before. None when the system is singular or
/// the numbers are not finite.
pub(super) fn iterate(layer: &mut Layer, flow: &Flow, settled: f64, limit: f64) -> Option<Progress> {
    let c = re_march(layer, flow);
    let shape: Vec<f64> = (layer.course.body..layer.total()).map(|i| layer.shape(i)).collect();
    let edge = &layer.state[layer.course.body];
    let influence = flow.influence(&shape, CURVE_REACH * (edge[0] + edge[1]));
    let r = speed_defect(layer, flow, &influence);
    let speed = rms(&r);
    let system = Chains::new(layer, &c)?;
    if speed < TOLERANCE && system.worst < TOLERANCE && settled < SETTLED {
        return Some(Progress { speed, layer: system.worst, change: settled, part: 1.0 });
    }
    if !speed.is_finite() {
        return None;
    }
    let outside = system.solve(layer, &influence, &c, &r)?;
    let changes = system.changes(layer, &outside);
    let (part, change) = take(layer, &changes, &c, &outside, limit);
    change.is_finite().then_some(Progress { speed, layer: system.worst, change, part })
}

/// The eliminated chains.
struct Chains {
    steps: Vec<Step>,
    /// Both ends at the trailing edge feed the first node of the wake: node, step.
    edge: [(usize, Step); 2],
    /// `dm = constant + P W`: a row for each node, the constant last.
    mass: Matrix,
    worst: f64,
}

/// Rows of the three changes of a node in terms of all W and a constant.
type Rows = [Vec<f64>; 3];

impl Chains {
    fn new(layer: &Layer, c: &[f64]) -> Option<Self> {
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
    fn solve(&self, layer: &Layer, influence: &Matrix, c: &[f64], r: &[f64]) -> Option<Vec<f64>> {
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
    fn changes(&self, layer: &Layer, outside: &[f64]) -> Vec<[f64; 3]> {
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

/// What one side contributes to the first node of the wake: sums of the thicknesses, mean of the shear weighted by theta.
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

/// Takes the step, limited by what any node may change; the part taken and the size of the change.
fn take(layer: &mut Layer, changes: &[[f64; 3]], c: &[f64], outside: &[f64], limit: f64) -> (f64, f64) {
    let total = layer.total();
    let mut part = limit;
    let mut deltas = Vec::with_capacity(total);
    let mut sum = 0.0;
    for i in 0..total {
        let [theta, dstar, third, u] = layer.state[i];
        let du = c[i] * changes[i][1] + outside[i];
        let dd = (changes[i][1] - dstar * du) / u;
        let turbulent = third_is_shear(layer, i);
        let relative = [changes[i][0] / theta, dd / dstar, du / u.max(0.2)];
        let shear = if turbulent { changes[i][2] / third } else { 0.0 };
        for (value, low, high) in
            [(relative[0], -0.5, 1.0), (relative[1], -0.5, 1.0), (relative[2], -0.4, 0.4), (shear, -0.7, 2.0)]
        {
            let bound = if value < 0.0 { low } else { high };
            part = if value / bound * part > 1.0 { bound / value } else { part };
        }
        let third_change = if turbulent { shear } else { changes[i][2] / 10.0 };
        sum += relative.iter().map(|v| v * v).sum::<f64>() + third_change * third_change;
        deltas.push([changes[i][0], dd, changes[i][2], du]);
    }
    for (i, delta) in deltas.iter().enumerate() {
        let kind = kind_at(layer, i);
        let u = layer.state[i][3] + part * delta[3];
        add_scaled(&mut layer.state[i], part, delta);
        keep_in_bounds(&mut layer.state[i], kind);
        layer.state[i][3] = u;
    }
    layer.follow_stagnation();
    (part, (sum / (4 * total) as f64).sqrt())
}

fn kind_at(layer: &Layer, node: usize) -> Kind {
    if node >= layer.course.body {
        return Kind::Wake;
    }
    let side = usize::from(node > layer.stagnation);
    let station = layer.stagnation.abs_diff(node) - side;
    layer.kind(side, station)
}

fn third_is_shear(layer: &Layer, node: usize) -> bool {
    kind_at(layer, node) != Kind::Laminar
}
