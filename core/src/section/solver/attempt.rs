//! The attempts at one angle of attack, and which solutions are believed.

use super::couple::{Progress, TOLERANCE, iterate};
use super::forces::forces;
use super::layer::{Course, Layer};
use super::march::Drive;
use super::potential::{Potential, Strip};
use super::sweep::{Solved, State};
use super::wake::Flow;

/// Most iterations of one attempt.
const ITERATIONS: usize = 30;
/// Least drag that is believed, over that of a laminar plate of two sides, `2.656/sqrt(Re)`.
const LEAST_DRAG: f64 = 0.7;
/// Least speed at the end of the wake: a second solution exists in which the wake widens again and stands still.
const LEAST_WAKE_SPEED: f64 = 0.7;
/// Levels of halving of a step in angle.
const HALVINGS: u32 = 2;
/// Rise of the pressure coefficient from the suction peak to the trailing edge at which the flow leaves from the nose. The
/// solver finds 13.9 and 14.7 at the measured stall of NACA 0006 and 0009 (Re 9e6, NACA Report 824); the form of the rule
/// and about this value at high Reynolds number: Valarezo, Chin, J. Aircraft 31(1), 1994, from memory.
const NOSE_STALL_RISE: f64 = 14.0;

/// A converged flow.
#[derive(Debug, Clone)]
pub(super) struct Solution {
    layer: Layer,
    flow: Flow,
    pub(super) cl: f64,
}

impl Solution {
    /// Nodes on the outline.
    pub(super) fn nodes(&self) -> usize {
        self.layer.course.body
    }
}

/// The attempts at one angle.
pub(super) struct Attempts<'a> {
    /// The usual nodes, and others for the last try.
    potentials: [&'a Potential; 2],
    course: &'a Course,
    last: Option<&'a Solution>,
    pub(super) iterations: usize,
    pub(super) residual: f64,
}

impl<'a> Attempts<'a> {
    pub(super) fn new(
        potentials: [&'a Potential; 2],
        course: &'a Course,
        last: Option<&'a Solution>,
    ) -> Self {
        Self { potentials, course, last, iterations: 0, residual: f64::INFINITY }
    }

    /// Tries from the neighbour, from nothing, with short steps, by half-way angles, and on other nodes.
    pub(super) fn find(&mut self, alpha_rad: f64) -> Option<(Solution, Solved)> {
        let ([usual, other], last) = (self.potentials, self.last);
        let flow = Flow::new(usual, alpha_rad);
        let found = last.and_then(|last| self.warm(last, &flow, 1.0));
        found
            .or_else(|| self.cold(usual, &flow))
            .or_else(|| last.and_then(|last| self.warm(last, &flow, 0.35)))
            .or_else(|| last.and_then(|last| self.halved(last, &flow, HALVINGS)))
            .or_else(|| self.cold(other, &Flow::new(other, alpha_rad)))
    }

    /// From the neighbour, its speeds moved by what potential flow says of the change of angle.
    fn warm(&mut self, last: &Solution, flow: &Flow, limit: f64) -> Option<(Solution, Solved)> {
        let mut layer = last.layer.clone();
        for i in 0..layer.total() {
            layer.state[i][3] += layer.sign(i) * (flow.still[i] - last.flow.still[i]);
        }
        layer.follow_stagnation();
        place_wake(&mut layer, &flow.wake);
        self.converge(layer, self.potentials[0], flow, limit)
    }

    /// From potential flow alone.
    fn cold(&mut self, potential: &Potential, flow: &Flow) -> Option<(Solution, Solved)> {
        let (x, arc) = stations(&potential.body, &flow.wake);
        let course = Course { body: potential.count(), ..self.course.clone() };
        let mut layer = Layer::new(course, x, arc, &flow.still);
        layer.march(&Drive::Cold);
        self.converge(layer, potential, flow, 1.0)
    }

    /// By way of the angle half-way.
    fn halved(&mut self, last: &Solution, flow: &Flow, levels: u32) -> Option<(Solution, Solved)> {
        let middle = Flow::new(self.potentials[0], 0.5 * (last.flow.alpha_rad + flow.alpha_rad));
        let half = match self.warm(last, &middle, 1.0) {
            Some(found) => found.0,
            None if levels > 1 => self.halved(last, &middle, levels - 1)?.0,
            None => return None,
        };
        match self.warm(&half, flow, 1.0) {
            None if levels > 1 => self.halved(&half, flow, levels - 1),
            found => found,
        }
    }

    fn converge(
        &mut self,
        mut layer: Layer,
        potential: &Potential,
        flow: &Flow,
        limit: f64,
    ) -> Option<(Solution, Solved)> {
        let mut settled = f64::INFINITY;
        for _ in 0..ITERATIONS {
            self.iterations += 1;
            let Progress { speed, layer: worst, change, part } = iterate(&mut layer, flow, settled, limit)?;
            self.residual = speed;
            if speed < TOLERANCE && worst < TOLERANCE && part >= 1.0 && change == settled {
                return self.judge(layer, potential, flow);
            }
            settled = if part >= limit { change } else { f64::INFINITY };
        }
        None
    }

    /// Forces of a converged flow, if they can be believed.
    fn judge(&self, layer: Layer, potential: &Potential, flow: &Flow) -> Option<(Solution, Solved)> {
        let f = forces(&potential.body, &layer, flow.alpha_rad);
        let least = LEAST_DRAG * 2.656 / layer.course.gas.reynolds.sqrt();
        let runs_out = layer.state[layer.total() - 1][3] > LEAST_WAKE_SPEED;
        let fair = runs_out && f.cl.abs() < 4.0 && f.cd > least && f.cd < 0.6 && f.cm.is_finite();
        let jump = self.last.is_some_and(|n| {
            let turn_deg = (flow.alpha_rad - n.flow.alpha_rad).to_degrees().abs();
            (f.cl - n.cl).abs() > 0.15 + 0.2 * turn_deg
        });
        if !fair || jump {
            return None;
        }
        let point = Solved {
            alpha_deg: flow.alpha_rad.to_degrees(),
            cl: f.cl,
            cd: f.cd,
            cm: f.cm,
            xtr_upper: layer.transition_x(0),
            xtr_lower: layer.transition_x(1),
            iterations: 0,
            residual: 0.0,
            state: if nose_stalled(&layer) { State::Stalled } else { State::Converged },
        };
        Some((Solution { layer, flow: flow.clone(), cl: f.cl }, point))
    }
}

/// Whether the pressure rises more from the peak to the trailing edge than the flow about the nose withstands.
fn nose_stalled(layer: &Layer) -> bool {
    let peak = (0..layer.course.body).map(|i| layer.state[i][3]).fold(0.0, f64::max);
    let edge = layer.state[0][3];
    peak * peak - edge * edge > NOSE_STALL_RISE
}

/// Abscissa and arc length of all nodes.
fn stations(body: &Strip, wake: &Strip) -> (Vec<f64>, Vec<f64>) {
    let (mut x, mut arc) = (Vec::new(), Vec::new());
    for strip in [body, wake] {
        let mut run = 0.0;
        for (i, node) in strip.nodes.iter().enumerate() {
            if i > 0 {
                run += strip.elements[i - 1].length();
            }
            x.push(node[0]);
            arc.push(run);
        }
    }
    (x, arc)
}

/// The wake of another angle has other abscissae; its lengths are the same.
fn place_wake(layer: &mut Layer, wake: &Strip) {
    let body = layer.course.body;
    for (x, node) in layer.x[body..].iter_mut().zip(&wake.nodes) {
        *x = node[0];
    }
}
