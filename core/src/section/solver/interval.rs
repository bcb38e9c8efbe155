//! The integral equations over one interval between two stations, in logarithms.
//!
//! ```text
//! d ln theta/dx + (2 + H - M^2) d ln u/dx = Cf/(2 theta)
//! d ln H*/dx + (2 H**/H* + 1 - H) d ln u/dx = [2 CD/H* - Cf/2]/theta
//! laminar:   dn/dx = growth
//! turbulent: 2 delta dln S/dx = Kc/(1+Us) 4/3 (Seq - a S)
//!              + 2 delta [ (Cf/2 - (Hw/(A a Hk))^2)/(B delta*) - dln u/dx ]
//! ```
//!
//! # References
//! Drela, Giles, AIAA J. 25(10), 1987, equations 4 to 27.

use super::closure::{Gas, Kind, LAG_A, LAG_B, LAG_RATE, Point, Props, wall_shape};
use super::dual::Dual;

/// The two ends of an interval and its length.
pub(super) struct Interval<'a, const K: usize> {
    pub(super) first: (&'a Point<K>, &'a Props<K>),
    pub(super) last: (&'a Point<K>, &'a Props<K>),
    pub(super) dx: f64,
}

/// `ln(b/a)` and the mean of `1/u` that makes it exact for a speed linear in x, `ln(b/a)/(b-a)`.
fn log_mean<const K: usize>(a: Dual<K>, b: Dual<K>) -> (Dual<K>, Dual<K>) {
    let (sum, difference) = (a + b, b - a);
    let t = difference / sum;
    if t.v.abs() < 0.02 {
        let t2 = t.square();
        let series = 1.0 + t2 * (1.0 / 3.0 + t2 * (0.2 + t2 / 7.0));
        (2.0 * t * series, 2.0 * series / sum)
    } else {
        let log = (b / a).ln();
        (log, log / difference)
    }
}

fn mean<const K: usize>(a: Dual<K>, b: Dual<K>) -> Dual<K> {
    0.5 * (a + b)
}

/// Weighted mean, `w` of the second.
fn blend<const K: usize>(a: Dual<K>, b: Dual<K>, w: Dual<K>) -> Dual<K> {
    a + w * (b - a)
}

impl<const K: usize> Interval<'_, K> {
    /// Weight of the downstream end, from the change of shape across the interval.
    fn shape_weight(&self, kind: Kind) -> Dual<K> {
        let (hk1, hk2) = (self.first.1.hk, self.last.1.hk);
        let l = ((hk2 - 1.0) / (hk1 - 1.0)).ln();
        let scale = if kind == Kind::Wake { 1.0 } else { 5.0 };
        scale * l.square() / hk2.square()
    }

    /// The three equations of a laminar interval.
    pub(super) fn laminar(&self) -> [Dual<K>; 3] {
        let ((p1, q1), (p2, q2)) = (self.first, self.last);
        let (log_u, mean_inverse) = log_mean(p1.u, p2.u);
        // Friction over the interval in the nose region, where the layer changes much from node to node.
        let rub = |p: &Point<K>, q: &Props<K>| 0.5 * q.cf / p.theta;
        let nose = (0.5 * self.dx * (rub(p1, q1) + rub(p2, q2))).floor_at(0.0);
        let w = 1.0 - 0.5 * (-nose).exp();
        let w_shape = 1.0 - 0.5 * (-nose - self.shape_weight(Kind::Laminar)).exp();
        let scale = self.dx * mean_inverse;
        let friction = blend(p1.u * rub(p1, q1), p2.u * rub(p2, q2), w) * scale;
        let spent = |p: &Point<K>, q: &Props<K>| p.u * (q.di - 0.5 * q.cf) / p.theta;
        let work = blend(spent(p1, q1), spent(p2, q2), w_shape) * scale;
        let grown = p2.c - p1.c - 0.5 * self.dx * (q1.growth + q2.growth);
        [self.momentum(log_u, friction), self.energy(log_u, work), grown]
    }

    fn momentum(&self, log_u: Dual<K>, friction: Dual<K>) -> Dual<K> {
        let ((p1, q1), (p2, q2)) = (self.first, self.last);
        (p2.theta / p1.theta).ln() + (2.0 + mean(q1.h, q2.h) - mean(q1.m2, q2.m2)) * log_u - friction
    }

    fn energy(&self, log_u: Dual<K>, work: Dual<K>) -> Dual<K> {
        let (q1, q2) = (self.first.1, self.last.1);
        let hs = mean(q1.hs, q2.hs);
        let factor = 2.0 * mean(q1.hss, q2.hss) / hs + 1.0 - mean(q1.h, q2.h);
        (q2.hs / q1.hs).ln() + factor * log_u - work
    }

    /// The three equations of a turbulent interval, at the wall or in the wake.
    pub(super) fn turbulent(&self, kind: Kind) -> [Dual<K>; 3] {
        let ((p1, q1), (p2, q2)) = (self.first, self.last);
        let log_u = (p2.u / p1.u).ln();
        let w = 1.0 - 0.5 * (-self.shape_weight(kind)).exp();
        let half = Dual::constant(0.5);
        let rub = |p: &Point<K>, q: &Props<K>| 0.5 * q.cf / p.theta;
        let friction = self.dx * blend(rub(p1, q1), rub(p2, q2), half);
        let spent = |p: &Point<K>, q: &Props<K>| (q.di - 0.5 * q.cf) / p.theta;
        let work = self.dx * blend(spent(p1, q1), spent(p2, q2), w);
        [self.momentum(log_u, friction), self.energy(log_u, work), self.lag(log_u, w, kind)]
    }

    /// The lag of the shear stress behind its equilibrium.
    fn lag(&self, log_u: Dual<K>, w: Dual<K>, kind: Kind) -> Dual<K> {
        let ((p1, q1), (p2, q2)) = (self.first, self.last);
        let a = if kind == Kind::Wake { 0.9 } else { 1.0 };
        let short = |p: &Point<K>, q: &Props<K>| q.seq - a * p.c;
        let pull =
            LAG_RATE / (1.0 + mean(q1.us, q2.us)) * (4.0 / 3.0) * blend(short(p1, q1), short(p2, q2), w);
        let locus = |q: &Props<K>| {
            let part = wall_shape(q.hk, q.re_theta, kind) / (LAG_A * a * q.hk);
            0.5 * q.cf - part.square()
        };
        let drive = blend(locus(q1), locus(q2), w) / (LAG_B * mean(p1.dstar, p2.dstar));
        let delta = mean(q1.delta, q2.delta);
        (p2.c / p1.c).ln() - self.dx * (pull / (2.0 * delta) + drive) + log_u
    }
}

/// The equations of the first station of a side: similar flow in the local gradient `a` of the speed.
pub(super) fn similar<const K: usize>(p: &Point<K>, q: &Props<K>, a: Dual<K>) -> [Dual<K>; 3] {
    let x_over_theta = p.u / (a * p.theta);
    [
        2.0 + q.h - 0.5 * q.cf * x_over_theta,
        1.0 - q.h + 2.0 * q.hss / q.hs + (0.5 * q.cf - q.di) * x_over_theta,
        p.c,
    ]
}

/// The three equations of a transition interval: laminar up to the part `w` of it, turbulent from there.
///
/// `trial` is the laminar state at the last station had there been no transition; it does not depend on the
/// turbulent state there, so that the place of transition is unique.
pub(super) fn transition<const K: usize>(
    gas: &Gas,
    first: &Point<K>,
    trial: &Point<K>,
    w: Dual<K>,
    last: (&Point<K>, &Props<K>),
    dx: f64,
) -> ([Dual<K>; 3], Point<K>) {
    let part = |a: Dual<K>, b: Dual<K>| a + w * (b - a);
    let mut at = Point {
        theta: part(first.theta, trial.theta),
        dstar: part(first.dstar, trial.dstar),
        c: Dual::constant(0.0),
        u: part(first.u, trial.u),
    };
    at.c = super::closure::at_transition(gas, &at);
    (turbulent_rest(gas, &at, w, last, dx), at)
}

/// The turbulent part of a transition interval, whose length depends on `w`.
fn turbulent_rest<const K: usize>(
    gas: &Gas,
    at: &Point<K>,
    w: Dual<K>,
    last: (&Point<K>, &Props<K>),
    dx: f64,
) -> [Dual<K>; 3] {
    let q = super::closure::props(gas, at, Kind::Turbulent);
    let full = Interval { first: (at, &q), last, dx };
    let none = Interval { first: (at, &q), last, dx: 0.0 };
    // Every term of the equations is constant or proportional to the length.
    let (long, short) = (full.turbulent(Kind::Turbulent), none.turbulent(Kind::Turbulent));
    let rest = 1.0 - w;
    [0, 1, 2].map(|k| short[k] + rest * (long[k] - short[k]))
}

/// Part of an interval at which n reaches its critical value, with the growth linear over it.
pub(super) fn critical_part<const K: usize>(
    n_crit: f64,
    n1: Dual<K>,
    growth1: Dual<K>,
    growth2: Dual<K>,
    dx: f64,
) -> Dual<K> {
    let (bend, slope) = (0.5 * dx * (growth2 - growth1), dx * growth1);
    let missing = (n_crit - n1).floor_at(0.0);
    // A w^2 + B w = C in the form without cancellation.
    let root = (slope.square() + 4.0 * bend * missing).floor_at(1e-30).sqrt();
    (2.0 * missing / (slope + root).floor_at(1e-30)).min(Dual::constant(1.0))
}
