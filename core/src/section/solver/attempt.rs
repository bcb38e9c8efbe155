//! The attempts at one angle of attack, and which solutions are believed.

use super::couple::{Progress, TOLERANCE, iterate};
use super::forces::forces;
use super::layer::{Course, Layer};
use super::march::Drive;
use super::point::{Solved, State};
use super::potential::{Potential, Strip};
use super::wake::Flow;

/// Most iterations of one attempt.
const ITERATIONS: usize = 30;
/// Least drag that is believed, over that of a laminar plate of two sides, `2.656/sqrt(Re)`.
const LEAST_DRAG: f64 = 0.7;
/// Least speed at the end of the wake: a second solution exists in which the wake widens again and stands
/// still.
const LEAST_WAKE_SPEED: f64 = 0.7;
/// Levels of halving of a step in angle.
pub(super) const HALVINGS: u32 = 2;
/// Rise of the pressure coefficient from the suction peak to the trailing edge at which the flow leaves from
/// the nose. The solver finds 13.9 and 14.7 at the measured stall of NACA 0006 and 0009 (Re 9e6, NACA Report
/// 824); the form of the rule and about this value at high Reynolds number: Valarezo, Chin, J. Aircraft
/// 31(1), 1994, from memory.
const NOSE_STALL_RISE: f64 = 14.0;

/// How far an attempt may go in one iteration.
#[derive(Debug, Clone, Copy)]
pub(super) struct Pace {
    /// Part of the coupled step.
    step: f64,
    /// Largest relative change of a thickness in the march; a station that would change more keeps what it
    /// has.
    leap: f64,
}

impl Pace {
    pub(super) const FULL: Self = Self { step: 1.0, leap: f64::INFINITY };
    const SHORT: Self = Self { step: 0.35, leap: f64::INFINITY };
    pub(super) const STEADY: Self = Self { step: 1.0, leap: 0.2 };
}

/// A converged flow, as much of it as a neighbour starts from.
#[derive(Debug, Clone)]
pub(super) struct Solution {
    pub(super) layer: Layer,
    alpha_rad: f64,
    /// Speeds without boundary layer.
    still: Vec<f64>,
    pub(super) cl: f64,
}

impl Solution {
    /// Nodes on the outline.
    pub(super) fn nodes(&self) -> usize {
        self.layer.course.body
    }

    /// Whether lift steps from here to another point as no attached section does.
    fn jumps_to(&self, alpha_rad: f64, cl: f64) -> bool {
        let turn_deg = (alpha_rad - self.alpha_rad).to_degrees().abs();
        (cl - self.cl).abs() > 0.15 + 0.2 * turn_deg
    }
}

/// The attempts at one angle.
pub(super) struct Attempts<'a> {
    /// The usual nodes, and others for the last try.
    pub(super) potentials: [&'a Potential; 2],
    pub(super) course: &'a Course,
    pub(super) last: Option<&'a Solution>,
    /// A solution on the far side, that must not lie a jump away either.
    pub(super) beyond: Option<&'a Solution>,
    pub(super) iterations: usize,
    pub(super) residual: f64,
}

pub(super) type Found = Option<(Solution, Solved)>;

impl<'a> Attempts<'a> {
    pub(super) fn new(
        potentials: [&'a Potential; 2],
        course: &'a Course,
        last: Option<&'a Solution>,
    ) -> Self {
        Self { potentials, course, last, beyond: None, iterations: 0, residual: f64::INFINITY }
    }

    /// Tries from the neighbour, from nothing, with short steps, by half-way angles, and on other nodes.
    pub(super) fn find(&mut self, alpha_rad: f64) -> Found {
        let ([usual, other], last) = (self.potentials, self.last);
        let flow = Flow::new(usual, alpha_rad);
        let found = last.and_then(|last| self.warm(last, &flow, Pace::FULL));
        found
            .or_else(|| self.cold(usual, &flow))
            .or_else(|| last.and_then(|last| self.warm(last, &flow, Pace::SHORT)))
            .or_else(|| last.and_then(|last| self.halved(last, &flow, HALVINGS, Pace::FULL)))
            .or_else(|| self.cold(other, &Flow::new(other, alpha_rad)))
    }

    /// The neighbour's layer at another angle, its speeds moved by what potential flow says of the change.
    pub(super) fn moved(last: &Solution, flow: &Flow) -> Layer {
        let mut layer = last.layer.clone();
        for i in 0..layer.total() {
            layer.state[i][3] += layer.sign(i) * (flow.still[i] - last.still[i]);
        }
        layer.follow_stagnation();
        place_wake(&mut layer, &flow.wake);
        layer
    }

    /// From the neighbour.
    pub(super) fn warm(&mut self, last: &Solution, flow: &Flow, pace: Pace) -> Found {
        let layer = self.relax(Self::moved(last, flow), flow, pace)?;
        self.judge(layer, self.potentials[0], flow)
    }

    /// From potential flow alone.
    fn cold(&mut self, potential: &Potential, flow: &Flow) -> Found {
        let (x, arc) = stations(&potential.body, &flow.wake);
        let course = Course { body: potential.count(), ..self.course.clone() };
        let mut layer = Layer::new(course, x, arc, &flow.still);
        layer.march(&Drive::Cold);
        let layer = self.relax(layer, flow, Pace::FULL)?;
        self.judge(layer, potential, flow)
    }

    /// By way of the angle half-way.
    pub(super) fn halved(&mut self, last: &Solution, flow: &Flow, levels: u32, pace: Pace) -> Found {
        let middle = Flow::new(self.potentials[0], 0.5 * (last.alpha_rad + flow.alpha_rad));
        let half = match self.warm(last, &middle, pace) {
            Some(found) => found.0,
            None if levels > 1 => self.halved(last, &middle, levels - 1, pace)?.0,
            None => return None,
        };
        match self.warm(&half, flow, pace) {
            None if levels > 1 => self.halved(&half, flow, levels - 1, pace),
            found => found,
        }
    }

    /// Iterates until the coupled equations hold.
    pub(super) fn relax(&mut self, mut layer: Layer, flow: &Flow, pace: Pace) -> Option<Layer> {
        layer.leap = pace.leap;
        let mut settled = f64::INFINITY;
        for _ in 0..ITERATIONS {
            self.iterations += 1;
            let Progress { speed, layer: worst, change, part } =
                iterate(&mut layer, flow, settled, pace.step)?;
            self.residual = speed;
            if speed < TOLERANCE && worst < TOLERANCE && part >= 1.0 && change == settled {
                return Some(layer);
            }
            settled = if part >= pace.step { change } else { f64::INFINITY };
        }
        None
    }

    /// Forces of a converged flow, if they can be believed.
    pub(super) fn judge(&self, layer: Layer, potential: &Potential, flow: &Flow) -> Found {
        let f = forces(&potential.body, &layer, flow.alpha_rad);
        let least = LEAST_DRAG * 2.656 / layer.course.gas.reynolds.sqrt();
        let runs_out = layer.state[layer.total() - 1][3] > LEAST_WAKE_SPEED;
        let fair = runs_out && f.cl.abs() < 4.0 && f.cd > least && f.cd < 0.6 && f.cm.is_finite();
        let jump = [self.last, self.beyond].into_iter().flatten().any(|n| n.jumps_to(flow.alpha_rad, f.cl));
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
        let solution = Solution { layer, alpha_rad: flow.alpha_rad, still: flow.still.clone(), cl: f.cl };
        Some((solution, point))
    }
}

/// Whether the pressure rises more from the peak to the trailing edge than the flow about the nose
/// withstands.
fn nose_stalled(layer: &Layer) -> bool {
    let peak = (0..layer.course.body).map(|i| layer.state[i][3]).fold(0.0, f64::max);
    let edge = layer.state[0][3];
    peak * peak - edge * edge > NOSE_STALL_RISE
}

/// Abscissa and arc length of all nodes.
pub(super) fn stations(body: &Strip, wake: &Strip) -> (Vec<f64>, Vec<f64>) {
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
