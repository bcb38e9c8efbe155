//! Potential flow about a section and its wake: vortices of linear strength on the outline, sources for the
//! displacement of the boundary layer on outline and wake.
//!
//! The stream function is constant on the outline, seen from inside. The strength of the vortices is then the
//! speed of the surface, clockwise positive; the signed speed along the list of nodes is its negative.
//! Sources are the growth of the signed mass defect along the arc, so that the influence of the mass defect
//! does not depend on the stagnation point.
//!
//! # References
//! Drela, Lecture Notes in Engineering 54, 1989, pp. 1-12: stream-function formulation, open trailing edge,
//! Kutta condition.

use super::dense::{Factors, Matrix};
use super::singularity::{Cut, Element};

/// Trailing edges open by less than this, in chords, count as sharp.
const SHARP: f64 = 1e-4;

/// A chain of nodes with the elements between them, and the law that turns mass defects into sources.
#[derive(Debug, Clone)]
pub(super) struct Strip {
    pub(super) nodes: Vec<[f64; 2]>,
    pub(super) elements: Vec<Element>,
    halves: Vec<[Element; 2]>,
}

impl Strip {
    pub(super) fn new(nodes: Vec<[f64; 2]>) -> Self {
        let elements: Vec<Element> = nodes.windows(2).map(|p| Element::new(p[0], p[1])).collect();
        let halves = nodes.windows(2).map(|p| {
            let middle = [0.5 * (p[0][0] + p[1][0]), 0.5 * (p[0][1] + p[1][1])];
            [Element::new(p[0], middle), Element::new(middle, p[1])]
        });
        Self { halves: halves.collect(), nodes, elements }
    }

    pub(super) fn length(&self, j: usize) -> f64 {
        self.elements[j].length()
    }

    /// Weights of the sources of the neighbouring elements in the source at node `i`.
    fn node_source(&self, i: usize) -> [(usize, f64); 2] {
        let last = self.elements.len() - 1;
        if i == 0 {
            [(0, 1.0), (0, 0.0)]
        } else if i > last {
            [(last, 1.0), (last, 0.0)]
        } else {
            let (before, behind) = (self.length(i - 1), self.length(i));
            let weight = behind / (before + behind);
            [(i - 1, weight), (i, 1.0 - weight)]
        }
    }

    /// Adds to `row` the effect of the mass defects of this strip; `effect` gives that of a half element for
    /// both its ends.
    pub(super) fn mass_row(&self, row: &mut [f64], effect: impl Fn(&Element) -> [f64; 2]) {
        let mut middles = vec![0.0; self.elements.len()];
        for (j, halves) in self.halves.iter().enumerate() {
            let (first, second) = (effect(&halves[0]), effect(&halves[1]));
            middles[j] += first[1] + second[0];
            for (node, value) in [(j, first[0]), (j + 1, second[1])] {
                for (element, weight) in self.node_source(node) {
                    middles[element] += weight * value;
                }
            }
        }
        for (j, middle) in middles.iter().enumerate() {
            row[j + 1] += middle / self.length(j);
            row[j] -= middle / self.length(j);
        }
    }
}

/// The outline with its influence matrix factored once.
#[derive(Debug, Clone)]
pub(super) struct Potential {
    pub(super) body: Strip,
    base: Option<Base>,
    pub(super) factors: Factors,
    pub(super) sharp: bool,
    still: [Vec<f64>; 2],
    pub(super) by_mass: Matrix,
    pub(super) bisector: [f64; 2],
}

/// The open trailing edge, whose strengths follow those of the two end nodes.
#[derive(Debug, Clone, Copy)]
struct Base {
    element: Element,
    source: f64,
    vortex: f64,
}

impl Base {
    /// Stream function for a unit of `gamma_first - gamma_last`.
    fn stream(&self, p: [f64; 2]) -> f64 {
        let (s, v) = (self.element.source_stream(p, Cut::Right), self.element.vortex_stream(p));
        self.source * (s[0] + s[1]) + self.vortex * (v[0] + v[1])
    }

    fn velocity(&self, p: [f64; 2]) -> [f64; 2] {
        let (s, v) = (self.element.source_velocity(p), self.element.vortex_velocity(p));
        let sum = |k: usize| self.source * (s[0][k] + s[1][k]) + self.vortex * (v[0][k] + v[1][k]);
        [sum(0), sum(1)]
    }
}

impl Potential {
    /// Sets up and factors the system. None if the outline gives a singular one.
    pub(super) fn new(nodes: Vec<[f64; 2]>) -> Option<Self> {
        let body = Strip::new(nodes);
        let n = body.nodes.len();
        let (first, last) = (body.elements[0].along(), body.elements[n - 2].along());
        let bisector = unit([last[0] - first[0], last[1] - first[1]]);
        let gap = Element::new(body.nodes[n - 1], body.nodes[0]);
        let sharp = gap.length() < SHARP;
        let base = (!sharp).then(|| {
            let t = gap.along();
            let across = (bisector[0] * t[1] - bisector[1] * t[0]).abs();
            let inline = bisector[0] * t[0] + bisector[1] * t[1];
            Base { element: gap, source: 0.5 * across, vortex: -0.5 * inline }
        });
        let factors = Factors::new(system(&body, base.as_ref(), sharp))?;
        let mut flow = Self {
            base,
            factors,
            sharp,
            still: [Vec::new(), Vec::new()],
            by_mass: Matrix::zeros(n, n),
            bisector,
            body,
        };
        flow.still = [flow.solve(|p| -p[1]), flow.solve(|p| p[0])];
        flow.by_mass = flow.mass_response(&flow.body, Cut::Right);
        Some(flow)
    }

    /// Nodes on the outline.
    pub(super) fn count(&self) -> usize {
        self.body.nodes.len()
    }

    /// Gap of the trailing edge, in chords, 0 if it counts as sharp.
    pub(super) fn gap(&self) -> f64 {
        self.base.map_or(0.0, |base| base.element.length())
    }

    fn solve(&self, right: impl Fn([f64; 2]) -> f64) -> Vec<f64> {
        let n = self.count();
        let mut b: Vec<f64> = self.body.nodes.iter().map(|&p| right(p)).collect();
        if self.sharp {
            b[n - 1] = 0.0;
        }
        b.push(0.0);
        let mut gamma = self.factors.solve(&b);
        gamma.truncate(n);
        gamma
    }

    /// Strength of the vortices for a unit of each mass defect of a strip: nodes of the outline by nodes of
    /// the strip.
    pub(super) fn mass_response(&self, strip: &Strip, cut: Cut) -> Matrix {
        let (n, m) = (self.count(), strip.nodes.len());
        let mut effect = Matrix::zeros(n, m);
        for (i, &p) in self.body.nodes.iter().enumerate() {
            strip.mass_row(effect.row_mut(i), |half| half.source_stream(p, cut));
        }
        let mut response = Matrix::zeros(n, m);
        let mut right = vec![0.0; n + 1];
        for j in 0..m {
            for (i, value) in right.iter_mut().enumerate().take(n) {
                *value = -effect.row(i)[j];
            }
            if self.sharp {
                right[n - 1] = 0.0;
            }
            for (i, gamma) in self.factors.solve(&right).into_iter().take(n).enumerate() {
                response.row_mut(i)[j] = gamma;
            }
        }
        response
    }

    /// Strength of the vortices without boundary layer at an angle of attack.
    pub(super) fn strengths(&self, alpha_rad: f64) -> Vec<f64> {
        let (sin, cos) = alpha_rad.sin_cos();
        self.still[0].iter().zip(&self.still[1]).map(|(c, s)| cos * c + sin * s).collect()
    }

    /// Velocity at a point off the outline for given strengths.
    pub(super) fn velocity(&self, p: [f64; 2], gamma: &[f64], alpha_rad: f64) -> [f64; 2] {
        let (sin, cos) = alpha_rad.sin_cos();
        let mut v = [cos, sin];
        for (j, element) in self.body.elements.iter().enumerate() {
            let effect = element.vortex_velocity(p);
            for (axis, v) in v.iter_mut().enumerate() {
                *v += gamma[j] * effect[0][axis] + gamma[j + 1] * effect[1][axis];
            }
        }
        if let Some(base) = &self.base {
            let effect = base.velocity(p);
            let strength = gamma[0] - gamma[gamma.len() - 1];
            v = [v[0] + strength * effect[0], v[1] + strength * effect[1]];
        }
        v
    }

    /// Velocity along `t` at a point for a unit of each vortex node.
    pub(super) fn vortex_row(&self, p: [f64; 2], t: [f64; 2]) -> Vec<f64> {
        let n = self.count();
        let mut row = vec![0.0; n];
        let along = |v: [f64; 2]| v[0] * t[0] + v[1] * t[1];
        for (j, element) in self.body.elements.iter().enumerate() {
            let effect = element.vortex_velocity(p);
            row[j] += along(effect[0]);
            row[j + 1] += along(effect[1]);
        }
        if let Some(base) = &self.base {
            let effect = along(base.velocity(p));
            row[0] += effect;
            row[n - 1] -= effect;
        }
        row
    }
}

/// The influence matrix: a row of the stream function for each node, then the Kutta condition.
fn system(body: &Strip, base: Option<&Base>, sharp: bool) -> Matrix {
    let n = body.nodes.len();
    let mut a = Matrix::zeros(n + 1, n + 1);
    for (i, &p) in body.nodes.iter().enumerate() {
        let row = a.row_mut(i);
        for (j, element) in body.elements.iter().enumerate() {
            let effect = element.vortex_stream(p);
            row[j] += effect[0];
            row[j + 1] += effect[1];
        }
        if let Some(base) = base {
            let effect = base.stream(p);
            row[0] += effect;
            row[n - 1] -= effect;
        }
        row[n] = -1.0;
    }
    if sharp {
        // The two end nodes coincide: the mean strength of the two sides runs out straight instead.
        let row = a.row_mut(n - 1);
        row.fill(0.0);
        for (j, weight) in [1.0, -2.0, 1.0].into_iter().enumerate() {
            row[j] += weight;
            row[n - 1 - j] -= weight;
        }
    }
    a.row_mut(n)[0] = 1.0;
    a.row_mut(n)[n - 1] = 1.0;
    a
}

impl Strip {
    /// Arc length and direction at the middles of the elements.
    pub(super) fn course(&self) -> Vec<[f64; 2]> {
        let (mut run, first) = (0.0, self.elements[0].along());
        let middle = |e: &Element| {
            let along = e.along();
            let turn =
                (first[0] * along[1] - first[1] * along[0]).atan2(first[0] * along[0] + first[1] * along[1]);
            run += e.length();
            [run - 0.5 * e.length(), turn]
        };
        self.elements.iter().map(middle).collect()
    }

    /// Direction at a node: the mean of its two elements.
    pub(super) fn tangent(&self, i: usize) -> [f64; 2] {
        let last = self.elements.len() - 1;
        let (a, b) = (self.elements[i.saturating_sub(1)].along(), self.elements[i.min(last)].along());
        unit([a[0] + b[0], a[1] + b[1]])
    }
}

pub(super) fn unit(v: [f64; 2]) -> [f64; 2] {
    let size = v[0].hypot(v[1]).max(f64::MIN_POSITIVE);
    [v[0] / size, v[1] / size]
}
