//! The balance of an element that lies near one already known: at a neighbouring rpm, speed or blade angle.
//!
//! Where lift rises steeply the residual rises through one root only, so secant steps from the angle of attack of the neighbour
//! lead to the root that the march from α = 0 would find. Whatever casts doubt on that is left to the march: an angle of attack out
//! of that range, a residual that does not rise, a blade angle at which the flow may be reversed, steps that do not come to an end.

use std::f64::consts::FRAC_PI_2;

use super::{Balance, Element, Flow, NEAR_ZERO_RAD, STEP_RAD};

/// A step that is the last, rad; what it leaves is far less.
const LAST_STEP_RAD: f64 = 1e-10;
/// Steps after which the march takes over.
const MOST_STEPS: u32 = 8;
/// Below this blade angle the sign of the lift at φ = 0 is looked up, rad.
const SURELY_POSITIVE_RAD: f64 = 0.15;
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

/// Inflow angles of the flow from ahead, rad.
const AHEAD: std::ops::Range<f64> = NEAR_ZERO_RAD..FRAC_PI_2;

impl Element<'_> {
    /// The balance, as [`Element::balance`] gives it to within rounding, found from what `near` tells and kept there for the next.
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
        let (down, up) = self.steep_rad();
        let within = |phi: f64| (down..up).contains(&(self.angle_rad - phi)) && AHEAD.contains(&phi);
        let mut phi = self.angle_rad - near.alpha_rad?;
        if self.ends.bare() || !within(phi) || !self.surely_ahead() {
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
            if !(slope > 0.0 && within(next)) {
                return None;
            }
            if (next - phi).abs() <= LAST_STEP_RAD {
                let nearest = self.nothing_opposite(phi, &flow, &mut lookups);
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

    /// Whether no root of less `|α|` lies on the other side of α = 0, where lift may not be steep that far; looks in the march's own steps.
    fn nothing_opposite(&self, phi: f64, flow: &Flow, lookups: &mut u32) -> bool {
        let ((down, up), alpha) = (self.steep_rad(), self.angle_rad - phi);
        let (steep, side) = if alpha > 0.0 { (-down, 1.0) } else { (up, -1.0) };
        let beyond = alpha.abs() - steep;
        let looks = if beyond > 0.0 { (beyond / STEP_RAD).ceil() as u32 + 1 } else { 0 };
        (0..looks).all(|i| {
            let there = self.angle_rad + side * (steep + STEP_RAD * f64::from(i));
            if !AHEAD.contains(&there) {
                return true;
            }
            *lookups += 1;
            (flow.residual(&self.terms(there)) > 0.0) == (side > 0.0)
        })
    }

    /// Whether the first place to look is the flow from ahead, without doubt.
    fn surely_ahead(&self) -> bool {
        let angle = self.angle_rad;
        (SURELY_POSITIVE_RAD..FRAC_PI_2).contains(&angle) || self.section.at(angle).cl >= 0.0
    }
}
