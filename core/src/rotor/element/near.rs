//! The balance of an element that lies near one already known: at a neighbouring rpm, speed or blade angle.
//!
//! Secant steps from the angle of attack of the neighbour lead to a root. Where lift rises steeply the
//! residual rises through one root only, which is the one that the march from α = 0 would find; farther out
//! the march's own steps see to it that none lies nearer. Whatever casts doubt on that is left to the march:
//! such a nearer one, a residual that does not rise, a blade angle at which the flow may be reversed, steps
//! that do not come to an end.

use std::f64::consts::FRAC_PI_2;

use super::{Balance, Element, Flow, NEAR_ZERO_RAD, stepped};

/// A step that is the last, rad; what it leaves is far less.
const LAST_STEP_RAD: f64 = 1e-10;
/// Steps after which the march takes over.
const MOST_STEPS: u32 = 8;
/// How far apart two looks are that measure the residual's rise, rad.
const APART_RAD: f64 = 1e-5;
/// Least step from which the rise is measured anew, rad.
const TELLING_RAD: f64 = 1e-9;

/// What is known of an element at a neighbouring condition.
#[derive(Clone, Copy, Debug, Default)]
pub struct Near {
    alpha_rad: Option<f64>,
    /// Rise of the residual with the inflow angle.
    slope: Option<f64>,
}

impl Near {
    /// An angle of attack nearby, rad.
    #[must_use]
    pub fn at(alpha_rad: f64) -> Self {
        Self { alpha_rad: Some(alpha_rad), slope: None }
    }
}

/// How far short of a root it is looked at last, rad.
const SHORT_RAD: f64 = 1e-7;

/// Inflow angles of the flow from ahead, rad.
const AHEAD: std::ops::Range<f64> = NEAR_ZERO_RAD..FRAC_PI_2;

impl Element<'_> {
    /// The balance, as [`Element::balance`] gives it to within rounding, found from what `near` tells and
    /// kept there for the next.
    #[must_use]
    pub fn balance_near(&self, near: &mut Near) -> Option<Balance> {
        if let Some((balance, slope)) = self.followed(*near) {
            *near = Near { alpha_rad: Some(balance.alpha_rad), slope: Some(slope) };
            return Some(balance);
        }
        let found = self.balance();
        *near = found.map_or_else(Near::default, |b| Near::at(b.alpha_rad));
        found
    }

    /// The balance by secant steps, with the rise of the residual there.
    fn followed(&self, near: Near) -> Option<(Balance, f64)> {
        let mut phi = self.angle_rad - near.alpha_rad?;
        if self.ends.bare() || !AHEAD.contains(&phi) || !self.lift_leads_ahead() {
            return None;
        }
        let (flow, mut lookups) = (self.flow(), 1);
        let mut terms = self.terms(phi);
        let mut value = flow.residual(&terms);
        let mut slope = near.slope.unwrap_or_else(|| {
            lookups += 1;
            (flow.residual(&self.terms(phi + APART_RAD)) - value) / APART_RAD
        });
        for _ in 0..MOST_STEPS {
            let next = phi - value / slope;
            if !(slope > 0.0 && AHEAD.contains(&next)) {
                return None;
            }
            if (next - phi).abs() <= LAST_STEP_RAD {
                let nearest = self.nothing_nearer(phi, &flow, &mut lookups);
                return nearest.then(|| (self.balanced_by(phi, &terms, lookups), slope));
            }
            terms = self.terms(next);
            lookups += 1;
            let there = flow.residual(&terms);
            if (next - phi).abs() > TELLING_RAD {
                slope = (there - value) / (next - phi);
            }
            (phi, value) = (next, there);
        }
        None
    }

    /// Whether the first place to look is the flow from ahead.
    fn lift_leads_ahead(&self) -> bool {
        self.surely_ahead() || (self.angle_rad < FRAC_PI_2 && self.section.at(self.angle_rad).cl >= 0.0)
    }

    /// Whether no root has less `|α|` than the one at `phi`: looks beyond where lift is steep, in the march's
    /// own steps.
    fn nothing_nearer(&self, phi: f64, flow: &Flow, lookups: &mut u32) -> bool {
        let ((down, up), alpha) = (self.steep_rad(), self.angle_rad - phi);
        let (own, opposite) = if alpha > 0.0 { (up, down) } else { (down, up) };
        let short_of_own = phi + SHORT_RAD.copysign(alpha);
        self.keeps_sign(alpha, self.angle_rad - own, short_of_own, flow, lookups)
            && self.keeps_sign(alpha, self.angle_rad - opposite, self.angle_rad + alpha, flow, lookups)
    }

    /// Whether the residual has the sign of `alpha` from one inflow angle away from α = 0 to another, as far
    /// as they are ahead.
    fn keeps_sign(&self, alpha: f64, from: f64, to: f64, flow: &Flow, lookups: &mut u32) -> bool {
        let away = |phi: f64| (self.angle_rad - phi).abs();
        let [mut there, to] = [from, to].map(|phi| phi.clamp(AHEAD.start, AHEAD.end));
        if away(there) >= away(to) {
            return true;
        }
        loop {
            *lookups += 1;
            let value = flow.residual(&self.terms(there));
            if (value > 0.0) != (alpha > 0.0) {
                return false;
            }
            let clear = self.clear_rad(there, value, to, flow);
            if (to - there).abs() <= clear {
                return true;
            }
            there = stepped(there, to, clear);
        }
    }
}
