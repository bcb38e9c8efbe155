//! One element of the blade in balance: the inflow angle at which blade forces and momentum agree.
//!
//! With `W sin φ = V + u`, `W cos φ = Ω r − v`, `α = β − φ`, `cn = cl cos φ − cd sin φ`, `ct = cl sin φ + cd
//! cos φ` and `σ = B c/(2π r)`, momentum with the factor F of tip and hub and drag included in both equations
//! is `dT/dr = 4π r ρ F |V + u| u`, `dQ/dr = 4π r² ρ F |V + u| v`. Eliminating W leaves one residual in φ
//! without a singular denominator (the idea of S. A. Ning, Wind Energy 17(9), 2014, and of his 2021 form for
//! the static case):
//!
//! `R(φ) = Ω r N − V M` (here over `hypot(V, Ω r)`), `M = 4 F |sin φ| cos φ + σ ct`, `N = 4 F sin φ |sin φ| −
//! σ cn`, or in the windmill brake state (M. L. Buhl, NREL/TP-500-36834, 2005) `N = 4 F sin φ [(5/3 − F) sin
//! φ + sqrt(−σ cn/2 − F (4/3 − F) sin² φ)]`.
//!
//! Where the residual has several roots, the one of least `|α|` counts: it is found by marching outward from
//! α = 0 and needs no history.

mod near;

pub use near::Near;

use std::f64::consts::{FRAC_PI_2, FRAC_PI_4, PI};

use roots::{SimpleConvergency, find_root_brent};

use super::loss::Ends;
use crate::section::{Best, Coefficients, Local, best};

/// The section at an element: one family, or two blended.
#[derive(Clone, Copy, Debug)]
pub struct Blend<'f> {
    inner: Local<'f>,
    outer: Option<(Local<'f>, f64)>,
}

impl<'f> Blend<'f> {
    /// One family, or two with the share of the second.
    #[must_use]
    pub fn new(inner: Local<'f>, outer: Option<(Local<'f>, f64)>) -> Self {
        Self { inner, outer }
    }

    /// Lift and drag coefficients at an angle of attack, rad.
    #[must_use]
    pub fn at(&self, alpha_rad: f64) -> Coefficients {
        let a = self.inner.at(alpha_rad);
        match &self.outer {
            None => a,
            Some((outer, w)) => {
                let b = outer.at(alpha_rad);
                Coefficients { cl: a.cl + w * (b.cl - a.cl), cd: a.cd + w * (b.cd - a.cd) }
            }
        }
    }

    /// The parts with their shares.
    pub fn parts(&self) -> impl Iterator<Item = (&Local<'f>, f64)> {
        let share = self.outer.as_ref().map_or(0.0, |o| o.1);
        std::iter::once((&self.inner, 1.0 - share)).chain(self.outer.iter().map(|(l, w)| (l, *w)))
    }

    /// Angle of greatest lift, rad.
    #[must_use]
    pub fn stall_rad(&self) -> f64 {
        self.parts().map(|(l, w)| w * l.landmarks().stall).sum()
    }

    /// The best angle; `None` where it nowhere lifts.
    #[must_use]
    pub fn best(&self) -> Option<Best> {
        best(|a| self.at(a), self.stall_rad())
    }

    /// The most that its coefficients rise with the angle of attack; see [`Local::steepest`].
    #[must_use]
    pub fn steepest(&self) -> f64 {
        self.parts().map(|(l, w)| w * l.steepest()).sum()
    }

    /// Angle of greatest lift downward, rad.
    #[must_use]
    pub fn negative_stall_rad(&self) -> f64 {
        self.parts().map(|(l, w)| w * l.landmarks().negative_stall).sum()
    }
}

/// One element before its balance is found.
#[derive(Clone, Copy, Debug)]
pub struct Element<'f> {
    /// Axial speed V into the disc, m/s, not below zero.
    pub axial_m_s: f64,
    /// Speed of turning Ω r, m/s, above zero.
    pub turning_m_s: f64,
    /// Blade angle to the chord line, rad.
    pub angle_rad: f64,
    /// Local solidity `B c/(2π r)`.
    pub solidity: f64,
    /// Geometry of the loss at tip and hub.
    pub ends: Ends,
    /// The section.
    pub section: Blend<'f>,
}

/// An element in balance.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Balance {
    /// Inflow angle φ, rad.
    pub inflow_rad: f64,
    /// Angle of attack, rad.
    pub alpha_rad: f64,
    /// Coefficients there.
    pub section: Coefficients,
    /// The factor F of tip and hub.
    pub loss: f64,
    /// Speed W at which the air meets the blade, m/s.
    pub speed_m_s: f64,
    /// Induced axial velocity u at the disc, m/s.
    pub induced_axial_m_s: f64,
    /// Induced swirl v at the disc, m/s.
    pub induced_swirl_m_s: f64,
    /// Whether Buhl's relation for high induction was used.
    pub windmill_brake: bool,
    /// How often the section was looked up.
    pub lookups: u32,
}

impl Balance {
    /// Force coefficients along the axis, `cn`, and against the turning, `ct`.
    #[must_use]
    pub fn normal_and_tangential(&self) -> (f64, f64) {
        let (s, c) = self.inflow_rad.sin_cos();
        let k = self.section;
        (k.cl * c - k.cd * s, k.cl * s + k.cd * c)
    }
}

/// Nearest approach to φ = 0, where the residual may jump, rad.
const NEAR_ZERO_RAD: f64 = 1e-7;
/// Below this angle the march halves its distance to zero instead of stepping, rad.
const HALVING_RAD: f64 = 0.02;
/// March step, rad.
const STEP_RAD: f64 = 0.5 * PI / 180.0;
/// The most that the momentum terms of N (times sin 2φ) and of M rise or fall with φ, 1/rad: `4 F` and `4 F
/// cos 2φ`, and what Prandtl's factor adds where it changes fastest, at `f = 0.8` of both ends; with
/// Goldstein's the tests hold it to the fine scan too.
///
/// With the most that the section's part can rise they bound the march's steps. The windmill brake state may
/// break that bound: a pair of roots that close together is then passed over, as by a fixed step. The tests
/// count how often against a fine scan.
const STEEPEST_MOMENTUM: (f64, f64) = (5.1, 6.1);
/// From this blade angle on lift without inflow is not below zero, rad; below it is looked up.
const SURELY_POSITIVE_RAD: f64 = 0.15;
/// Up to this share of the stall angle lift rises steeply.
const STEEP: f64 = 0.75;
/// Of the inflow angle (rad) and of the residual over `hypot(V, Ω r)`.
const CONVERGED: f64 = 1e-12;
const MOST_PASSES: usize = 100;

/// V and Ω r over `hypot(V, Ω r)`, and the most that the section's coefficients rise, 1/rad.
struct Flow {
    turning: f64,
    axial: f64,
    section_steepest: f64,
}

impl Flow {
    /// The residual R(φ) over `hypot(V, Ω r)`.
    fn residual(&self, t: &Terms) -> f64 {
        self.turning * t.n - self.axial * t.m
    }
}

struct Terms {
    sin: f64,
    cos: f64,
    loss: f64,
    section: Coefficients,
    m: f64,
    n: f64,
    windmill_brake: bool,
}

impl Element<'_> {
    /// Finds the balance; `None` at the ends of the blade or where no root exists.
    #[must_use]
    pub fn balance(&self) -> Option<Balance> {
        if self.ends.bare() {
            return None;
        }
        let (lookups, flow) = (std::cell::Cell::new(1), self.flow());
        let residual = |phi: f64| {
            lookups.set(lookups.get() + 1);
            flow.residual(&self.terms(phi))
        };
        let (brackets, count) = self.brackets();
        let phi =
            brackets[..count].iter().find_map(|&(lo, hi)| self.nearest_root(lo, hi, &flow, &residual))?;
        Some(self.balanced(phi, lookups.get() + 1))
    }

    /// The balance with the angle of attack (rad) kept, whatever blade angle that asks for: one root in (0,
    /// π/2), for the coefficients do not change with the inflow. `None` at the ends of the blade and
    /// where so much lift cannot be carried.
    #[must_use]
    pub fn balance_at(&self, alpha_rad: f64) -> Option<Balance> {
        if self.ends.bare() {
            return None;
        }
        let section = self.section.at(alpha_rad);
        let flow = self.flow();
        let residual = |phi: f64| flow.residual(&self.terms_with(phi, section));
        if !(residual(NEAR_ZERO_RAD) < 0.0 && residual(FRAC_PI_2) > 0.0) {
            return None;
        }
        let mut rule = SimpleConvergency { eps: CONVERGED, max_iter: MOST_PASSES };
        let phi = find_root_brent(NEAR_ZERO_RAD, FRAC_PI_2, residual, &mut rule).ok()?;
        Some(Self { angle_rad: phi + alpha_rad, ..*self }.balanced(phi, 1))
    }

    fn flow(&self) -> Flow {
        let speed = self.axial_m_s.hypot(self.turning_m_s);
        Flow {
            turning: self.turning_m_s / speed,
            axial: self.axial_m_s / speed,
            section_steepest: self.section.steepest(),
        }
    }

    fn terms(&self, phi: f64) -> Terms {
        self.terms_with(phi, self.section.at(self.angle_rad - phi))
    }

    fn terms_with(&self, phi: f64, section: Coefficients) -> Terms {
        let (sin, cos) = phi.sin_cos();
        let loss = self.ends.factor(sin.abs());
        let sigma_cn = self.solidity * (section.cl * cos - section.cd * sin);
        let sigma_ct = self.solidity * (section.cl * sin + section.cd * cos);
        let windmill_brake = self.axial_m_s > 0.0 && sin > 0.0 && -sigma_cn > 8.0 / 3.0 * loss * sin * sin;
        let n = if windmill_brake {
            let root = (-0.5 * sigma_cn - loss * (4.0 / 3.0 - loss) * sin * sin).max(0.0).sqrt();
            4.0 * loss * sin * ((5.0 / 3.0 - loss) * sin + root)
        } else {
            4.0 * loss * sin * sin.abs() - sigma_cn
        };
        let m = 4.0 * loss * sin.abs() * cos + sigma_ct;
        Terms { sin, cos, loss, section, m, n, windmill_brake }
    }

    /// Where to look, in order. Below the limit in the last case the only root above zero is a spurious one
    /// held by drag swirl, and above it the flow is reversed.
    fn brackets(&self) -> ([(f64, f64); 3], usize) {
        const AHEAD: (f64, f64) = (NEAR_ZERO_RAD, FRAC_PI_2);
        const REVERSED: (f64, f64) = (-FRAC_PI_2, -NEAR_ZERO_RAD);
        const BEHIND: (f64, f64) = (FRAC_PI_2, PI - NEAR_ZERO_RAD);
        let (v, u) = (self.axial_m_s, self.turning_m_s);
        let cl0 = if self.surely_ahead() { 0.0 } else { self.section.at(self.angle_rad).cl };
        if v == 0.0 {
            return if cl0 >= 0.0 { ([AHEAD, REVERSED, BEHIND], 2) } else { ([REVERSED, AHEAD, BEHIND], 2) };
        }
        if cl0 < 0.0 && self.solidity * cl0.abs() * u * u >= 2.0 * v * v {
            ([REVERSED, AHEAD, BEHIND], 3)
        } else {
            ([AHEAD, BEHIND, REVERSED], 3)
        }
    }

    /// Whether lift without inflow is not below zero, so that the first place to look is the flow from ahead,
    /// without a look.
    fn surely_ahead(&self) -> bool {
        (SURELY_POSITIVE_RAD..FRAC_PI_2).contains(&self.angle_rad)
    }

    /// The root of least `|α|` between two inflow angles.
    ///
    /// Well between the stall angles lift rises steeply with α, so that at most one root lies on either side
    /// of α = 0 and two looks tell. Towards stall, where drag rises faster than lift, roots may come in
    /// pairs: from there on the march takes small steps.
    fn nearest_root(&self, lo: f64, hi: f64, flow: &Flow, residual: &impl Fn(f64) -> f64) -> Option<f64> {
        let start = self.angle_rad.clamp(lo, hi);
        let at_start = residual(start);
        let (steep_down, steep_up) = self.steep_rad();
        let (down, up) =
            ((self.angle_rad - steep_up).clamp(lo, start), (self.angle_rad - steep_down).clamp(start, hi));
        // The residual rises through the wanted root: look where it should be first.
        let sides = if at_start > 0.0 { [(down, lo), (up, hi)] } else { [(up, hi), (down, lo)] };
        let mut best: Option<f64> = None;
        for (window, end) in sides {
            let reach = best.map_or(f64::INFINITY, |phi| (self.angle_rad - phi).abs());
            if (self.angle_rad - window).abs() >= reach {
                continue;
            }
            let onward = |(phi, value): (f64, f64)| stepped(phi, end, self.clear_rad(phi, value, end, flow));
            let first = if window == start { onward((start, at_start)) } else { window };
            let found = self.first_root((start, at_start), first, (end, reach), &onward, residual);
            let nearer = |phi: &f64| (self.angle_rad - phi).abs() < reach;
            best = found.filter(nearer).or(best);
        }
        best
    }

    /// The angles of attack, one not above and one not below zero, between which lift rises steeply, rad.
    fn steep_rad(&self) -> (f64, f64) {
        let (down, up) = (self.section.negative_stall_rad(), self.section.stall_rad());
        (STEEP * down.min(0.0), STEEP * up.max(0.0))
    }

    /// The first root going from `start` to `next` and on to `end` or past `reach` from α = 0.
    fn first_root(
        &self,
        start: (f64, f64),
        mut next: f64,
        (end, reach): (f64, f64),
        onward: &impl Fn((f64, f64)) -> f64,
        residual: &impl Fn(f64) -> f64,
    ) -> Option<f64> {
        let mut here = start;
        while here.0 != end && (self.angle_rad - here.0).abs() < reach {
            let there = (next, residual(next));
            if there.1 == 0.0 {
                return Some(there.0);
            }
            if here.1.is_sign_negative() != there.1.is_sign_negative() {
                let known = |phi: f64| match phi {
                    p if p == here.0 => here.1,
                    p if p == there.0 => there.1,
                    p => residual(p),
                };
                let mut rule = SimpleConvergency { eps: CONVERGED, max_iter: MOST_PASSES };
                return find_root_brent(here.0, there.0, known, &mut rule).ok();
            }
            here = there;
            next = onward(here);
        }
        None
    }

    /// How far towards `end` the residual cannot come to zero, from its value at an inflow angle, rad.
    fn clear_rad(&self, phi: f64, value: f64, end: f64, flow: &Flow) -> f64 {
        value.abs() / self.steepest(phi, end, flow)
    }

    /// The most that the residual over `hypot(V, Ω r)` rises or falls with φ between two inflow angles,
    /// 1/rad.
    fn steepest(&self, a: f64, b: f64, flow: &Flow) -> f64 {
        let most = a.abs().max(b.abs());
        let sin_2phi = if most < FRAC_PI_4 { (2.0 * most).sin() } else { 1.0 };
        let (n, m) = STEEPEST_MOMENTUM;
        flow.turning * n * sin_2phi + flow.axial.abs() * m + self.solidity * flow.section_steepest
    }

    fn balanced(&self, phi: f64, lookups: u32) -> Balance {
        self.balanced_by(phi, &self.terms(phi), lookups)
    }

    fn balanced_by(&self, phi: f64, t: &Terms, lookups: u32) -> Balance {
        let four_fs = 4.0 * t.loss * t.sin.abs();
        let (a, c) = (t.n / four_fs, t.m / four_fs);
        let speed = (self.axial_m_s * a + self.turning_m_s * c) / (a * a + c * c);
        Balance {
            inflow_rad: phi,
            alpha_rad: self.angle_rad - phi,
            section: t.section,
            loss: t.loss,
            speed_m_s: speed,
            induced_axial_m_s: speed * t.sin - self.axial_m_s,
            induced_swirl_m_s: self.turning_m_s - speed * t.cos,
            windmill_brake: t.windmill_brake,
            lookups,
        }
    }
}

/// One step from `phi` towards `end`; steps halve towards φ = 0.
///
/// Where the residual cannot come to zero within `clear` (rad), the step is as long.
fn stepped(phi: f64, end: f64, clear: f64) -> f64 {
    let towards_zero = end.abs() < phi.abs() && end.abs() <= NEAR_ZERO_RAD;
    if towards_zero && phi.abs() <= HALVING_RAD {
        let half = 0.5 * phi;
        return if half.abs() <= NEAR_ZERO_RAD { end } else { half };
    }
    let step = clear.max(STEP_RAD);
    if (end - phi).abs() <= step { end } else { phi + step.copysign(end - phi) }
}

#[cfg(test)]
mod tests;
