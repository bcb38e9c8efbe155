//! The wake: where it runs at an angle of attack, and how mass defects and its own curvature change the
//! speeds.
//!
//! The wake follows the streamline of potential flow from the trailing edge; it is laid anew for each angle
//! and then held.
//!
//! # References
//! Lock, Williams, "Viscous-inviscid interactions in external aerodynamics", Prog. Aerospace Sci. 24, 1987:
//! curvature of the wake.

use super::dense::{Matrix, add_scaled, dot};
use super::potential::{Potential, Strip, unit};
use super::singularity::Cut;

/// The flow at one angle of attack: signed speeds without boundary layer, and their change with the signed
/// mass defects.
#[derive(Debug, Clone)]
pub(super) struct Flow {
    pub(super) alpha_rad: f64,
    /// Speed along the list of nodes, outline then wake.
    pub(super) still: Vec<f64>,
    /// Change of speed with mass defect.
    pub(super) by_mass: Matrix,
    /// The wake, its first node in the middle of the trailing edge.
    pub(super) wake: Strip,
    /// Change of speed with the strength of vortices on the nodes of the wake.
    pub(super) by_swirl: Matrix,
    /// Arc length and direction of the wake, positive upwards, at the middles of its elements.
    course: Vec<[f64; 2]>,
}

impl Flow {
    /// Builds the wake along the streamline that leaves the trailing edge, and the influence matrix.
    pub(super) fn new(potential: &Potential, alpha_rad: f64) -> Self {
        let gamma = potential.strengths(alpha_rad);
        let wake = Strip::new(wake_nodes(potential, &gamma, alpha_rad));
        let (n, w) = (potential.count(), wake.nodes.len());
        let from_wake = potential.mass_response(&wake, Cut::Ahead);
        let mut by_mass = Matrix::zeros(n + w, n + w);
        for i in 0..n {
            let (body, behind) = by_mass.row_mut(i).split_at_mut(n);
            add_scaled(body, -1.0, potential.by_mass.row(i));
            add_scaled(behind, -1.0, from_wake.row(i));
        }
        let mut still: Vec<f64> = gamma.iter().map(|g| -g).collect();
        // The wake begins with the speed of the lower side at the trailing edge.
        still.push(still[n - 1]);
        let edge = by_mass.row(n - 1).to_vec();
        by_mass.row_mut(n).copy_from_slice(&edge);
        for i in 1..w {
            let (speed, row) = wake_row(potential, &wake, i, &gamma, alpha_rad, &from_wake);
            still.push(speed);
            by_mass.row_mut(n + i).copy_from_slice(&row);
        }
        let by_swirl = swirl(potential, &wake);
        let course = wake.course();
        Self { alpha_rad, still, by_mass, wake, by_swirl, course }
    }

    /// Change of speed with mass defect, the curvature of the wake included: a curved wake carries less
    /// momentum than the flow it stands for, which vortices of strength `-curvature (m + u theta)` make good.
    /// `shape` is the shape parameter of the wake at its nodes, from which `u theta = m/H`.
    pub(super) fn influence(&self, shape: &[f64], reach: f64) -> Matrix {
        let mut influence = self.by_mass.clone();
        let body = influence.rows - shape.len();
        let mut run = 0.0;
        let weights: Vec<f64> = (0..shape.len())
            .map(|j| {
                if j > 0 {
                    run += self.wake.length(j - 1);
                }
                self.curvature(run, reach) * (1.0 + 1.0 / shape[j])
            })
            .collect();
        for i in 0..influence.rows {
            let row = &mut influence.row_mut(i)[body..];
            for ((entry, weight), effect) in row.iter_mut().zip(&weights).zip(self.by_swirl.row(i)) {
                *entry -= effect * weight;
            }
        }
        influence
    }

    /// Curvature of the wake at an arc length, the mean over `reach` to both sides as far as the wake goes.
    fn curvature(&self, s: f64, reach: f64) -> f64 {
        let last = self.course[self.course.len() - 1][0];
        let (from, to) = ((s - reach).max(0.0), (s + reach).min(last));
        if to - from < 1e-9 {
            0.0
        } else {
            (interpolate(&self.course, to) - interpolate(&self.course, from)) / (to - from)
        }
    }
}

/// Linear between the points of a table, held outside.
fn interpolate(table: &[[f64; 2]], x: f64) -> f64 {
    let k = table.partition_point(|row| row[0] <= x).clamp(1, table.len() - 1);
    let ([x0, y0], [x1, y1]) = (table[k - 1], table[k]);
    y0 + (y1 - y0) * ((x - x0) / (x1 - x0)).clamp(0.0, 1.0)
}

/// Speeds for a unit of vortex strength at each node of the wake, the outline answering.
fn swirl(potential: &Potential, wake: &Strip) -> Matrix {
    let (n, w) = (potential.count(), wake.nodes.len());
    let response = swirl_response(potential, wake);
    let mut speeds = Matrix::zeros(n + w, w);
    for i in 0..n {
        add_scaled(speeds.row_mut(i), -1.0, response.row(i));
    }
    // Half the jump at the trailing edge belongs to each side of the wake.
    let edge = speeds.row(n - 1).to_vec();
    speeds.row_mut(n).copy_from_slice(&edge);
    speeds.row_mut(n)[0] += 0.5;
    for i in 1..w {
        let (p, t) = (wake.nodes[i], wake.tangent(i));
        let along = |v: [f64; 2]| v[0] * t[0] + v[1] * t[1];
        let by_vortex = potential.vortex_row(p, t);
        let row = speeds.row_mut(n + i);
        for (j, element) in wake.elements.iter().enumerate() {
            let effect = element.vortex_velocity(p);
            row[j] += along(effect[0]);
            row[j + 1] += along(effect[1]);
        }
        for (j, weight) in by_vortex.iter().enumerate() {
            add_scaled(row, *weight, response.row(j));
        }
    }
    speeds
}

/// Strength of the vortices on the outline for a unit of vortex strength at each node of the wake.
fn swirl_response(potential: &Potential, wake: &Strip) -> Matrix {
    let (n, w) = (potential.count(), wake.nodes.len());
    let mut effect = Matrix::zeros(n, w);
    for (i, &p) in potential.body.nodes.iter().enumerate() {
        let row = effect.row_mut(i);
        for (j, element) in wake.elements.iter().enumerate() {
            let stream = element.vortex_stream(p);
            row[j] += stream[0];
            row[j + 1] += stream[1];
        }
    }
    let mut response = Matrix::zeros(n, w);
    for j in 0..w {
        let mut right: Vec<f64> = (0..n).map(|i| -effect.row(i)[j]).collect();
        if potential.sharp {
            right[n - 1] = 0.0;
        }
        // The vorticity of both sides runs on into that of the wake.
        right.push(if j == 0 { 1.0 } else { 0.0 });
        for (i, gamma) in potential.factors.solve(&right).into_iter().take(n).enumerate() {
            response.row_mut(i)[j] = gamma;
        }
    }
    response
}

/// Speed along the wake at its node `i`, and the effect on it of every mass defect.
fn wake_row(
    potential: &Potential,
    wake: &Strip,
    i: usize,
    gamma: &[f64],
    alpha_rad: f64,
    from_wake: &Matrix,
) -> (f64, Vec<f64>) {
    let (n, w, p) = (potential.count(), wake.nodes.len(), wake.nodes[i]);
    let t = wake.tangent(i);
    let by_vortex = potential.vortex_row(p, t);
    let (sin, cos) = alpha_rad.sin_cos();
    let speed = cos * t[0] + sin * t[1] + dot(&by_vortex, gamma);
    let mut row = vec![0.0; n + w];
    let (body, behind) = row.split_at_mut(n);
    let along = |v: [[f64; 2]; 2]| v.map(|v| v[0] * t[0] + v[1] * t[1]);
    potential.body.mass_row(body, |half| along(half.source_velocity(p)));
    wake.mass_row(behind, |half| along(half.source_velocity(p)));
    for (j, weight) in by_vortex.iter().enumerate() {
        add_scaled(body, *weight, potential.by_mass.row(j));
        add_scaled(behind, *weight, from_wake.row(j));
    }
    (speed, row)
}

/// Length of the wake, chords.
const WAKE_LENGTH: f64 = 1.2;

/// Marches the wake along the streamline by the midpoint rule, its first step along the bisector of the
/// trailing edge.
fn wake_nodes(potential: &Potential, gamma: &[f64], alpha_rad: f64) -> Vec<[f64; 2]> {
    let n = potential.count();
    let (a, b) = (potential.body.nodes[0], potential.body.nodes[n - 1]);
    let mut nodes = vec![[0.5 * (a[0] + b[0]), 0.5 * (a[1] + b[1])]];
    let count = n / 8 + 4;
    let first = 0.5 * (potential.body.length(0) + potential.body.length(n - 2));
    let ratio = growth(WAKE_LENGTH / first, count - 1);
    let (mut step, mut direction) = (first, potential.bisector);
    for k in 1..count {
        let at = nodes[k - 1];
        let move_by = |d: [f64; 2], part: f64| [at[0] + part * step * d[0], at[1] + part * step * d[1]];
        if k > 1 {
            direction = unit(potential.velocity(move_by(direction, 0.5), gamma, alpha_rad));
        }
        nodes.push(move_by(direction, 1.0));
        step *= ratio;
    }
    nodes
}

/// Ratio of a geometric series of `count` terms with sum `sum`, first term 1.
fn growth(sum: f64, count: usize) -> f64 {
    let (mut low, mut high) = (1.0_f64, 3.0_f64);
    for _ in 0..60 {
        let ratio = 0.5 * (low + high);
        let total: f64 = (0..count).fold((0.0, 1.0), |(total, term), _| (total + term, term * ratio)).0;
        if total < sum { low = ratio } else { high = ratio }
    }
    0.5 * (low + high)
}
