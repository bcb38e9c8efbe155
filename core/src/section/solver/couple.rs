//! The coupled step: boundary layer and potential flow together, by Newton's method.
//!
//! The elimination gives every change of mass defect as `dm = m0 + P W`; with `W = (D - c) dm + r` one dense
//! system is left. `D` is the change of speed with mass defect in the direction of the flow, `c` its diagonal
//! as far as the local law of interaction uses it, `r` what the speeds lack of the potential flow.

use super::chains::Chains;
use super::closure::Kind;
use super::dense::{Matrix, add_scaled, dot};
use super::layer::Layer;
use super::march::Drive;
use super::station::keep_in_bounds;
use super::wake::Flow;

/// Convergence limit on the changes, the speeds and the equations.
pub(super) const TOLERANCE: f64 = 1e-5;
/// Change in the step before, below which a small residual is believed.
const SETTLED: f64 = 2e-3;

/// Length over which the curvature of the wake is averaged to each side, over the thickness `theta + dstar`
/// of the wake at the trailing edge: potential flow turns without bound there, a real wake not within its own
/// thickness.
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

/// Coefficients of the local law: the diagonal of the influence, faded in behind the stagnation point, none
/// at the trailing edge node of the wake.
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

/// Speeds from potential flow with the present mass defects, less the present speeds, in the direction of the
/// flow.
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

/// One iteration: march, then the coupled step. `settled` is the change of the step before. None when the
/// system is singular or the numbers are not finite.
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
