//! Roots of a demand that rises with one free quantity.
//!
//! A look over equal steps with the rotor's few elements finds where the root lies; secant steps with all its
//! elements refine it. Where the two do not agree (a root at the end of the range, or one that hardly touches
//! zero) the look is repeated with all elements and the root bracketed.

use std::ops::RangeInclusive;

/// Of a bracketed root, as a share of its range.
const CONVERGED: f64 = 1e-9;
/// Of a rough root, as a share of its range.
const ROUGHLY: f64 = 1e-4;
/// Last step of the secant, as a share of the range; what it leaves is a hundred times less or better.
pub(super) const LAST_STEP: f64 = 3e-5;
const MOST_STEPS: u32 = 8;
/// How far the secant may go from where it starts, as a share of the range.
const FARTHEST: f64 = 0.1;
/// A rough look that comes this near to zero, as a share of its largest value, does not rule a root out.
pub(super) const DOUBTFUL: f64 = 0.05;

/// Why a search found nothing: the demand is met only beyond this end.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Missed {
    BelowRange,
    AboveRange,
}

/// A root and how steeply the demand rises through it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Root {
    pub(super) x: f64,
    pub(super) slope: f64,
}

/// Which of several roots counts.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Wanted {
    Highest,
    Lowest,
}

/// What is searched.
pub(super) struct Search<'f> {
    /// Lowest and highest value of the free quantity.
    pub(super) range: RangeInclusive<f64>,
    /// Steps of the look.
    pub(super) steps: u32,
    pub(super) wanted: Wanted,
    /// The demand by few elements.
    pub(super) rough: &'f dyn Fn(f64) -> f64,
    /// The demand by all elements.
    pub(super) exact: &'f dyn Fn(f64) -> f64,
}

/// Two neighbouring places of a look with the demand there.
type Bracket = ((f64, f64), (f64, f64));

impl Search<'_> {
    /// The wanted root at which the demand rises from below to above zero, and how far it lies above that by
    /// few elements.
    pub(super) fn root(&self) -> Result<(Root, Option<f64>), Missed> {
        let bracketed = || self.exact_root().map(|root| (root, None));
        match self.look(self.rough) {
            Ok(bracket) => {
                let rough = self.rough_within(bracket);
                self.refined(rough).map_or_else(bracketed, |root| Ok((root, Some(root.x - rough.x))))
            }
            Err((missed, false)) => Err(missed),
            Err((_, true)) => bracketed(),
        }
    }

    /// The root by few elements alone.
    pub(super) fn rough_root(&self) -> Result<Root, Missed> {
        self.look(self.rough).map(|bracket| self.rough_within(bracket)).map_err(|(missed, _)| missed)
    }

    fn rough_within(&self, (a, b): Bracket) -> Root {
        let line = Root { x: a.0 - a.1 * (b.0 - a.0) / (b.1 - a.1), slope: (b.1 - a.1) / (b.0 - a.0) };
        let met = self.rough_refined(line).filter(|root| (a.0..=b.0).contains(&root.x));
        met.unwrap_or_else(|| Root { x: bracketed((a, b), self.rough, ROUGHLY * self.width()), ..line })
    }

    /// Secant steps with all elements from a root known nearly; `None` when they leave the range or the
    /// demand does not rise.
    pub(super) fn refined(&self, near: Root) -> Option<Root> {
        self.secant(near, LAST_STEP, false, self.exact)
    }

    /// The same from a root whose slope is known too, so that a first step that is small enough is the last.
    pub(super) fn refined_at_once(&self, near: Root) -> Option<Root> {
        self.secant(near, LAST_STEP, true, self.exact)
    }

    /// Secant steps with few elements.
    pub(super) fn rough_refined(&self, near: Root) -> Option<Root> {
        self.secant(near, ROUGHLY, false, self.rough)
    }

    /// Secant steps from a place with a slope that the first two looks replace by the measured one.
    fn secant(&self, near: Root, last_step: f64, at_once: bool, demand: &dyn Fn(f64) -> f64) -> Option<Root> {
        let last_step = last_step * self.width();
        let (mut x, mut slope) = (near.x, near.slope);
        let mut value = demand(x);
        for step in 0..MOST_STEPS {
            let next = x - value / slope;
            let within = self.range.contains(&next) && (next - near.x).abs() <= FARTHEST * self.width();
            if !(slope > 0.0 && within) {
                return None;
            }
            if (step > 0 || at_once) && (next - x).abs() <= last_step {
                return Some(Root { x: next, slope });
            }
            let there = demand(next);
            if (next - x).abs() > 1e-3 * last_step {
                slope = (there - value) / (next - x);
            }
            (x, value) = (next, there);
        }
        None
    }

    /// The width of the range.
    pub(super) fn width(&self) -> f64 {
        self.range.end() - self.range.start()
    }

    fn exact_root(&self) -> Result<Root, Missed> {
        let (a, b) = self.look(self.exact).map_err(|(missed, _)| missed)?;
        let x = bracketed((a, b), self.exact, CONVERGED * self.width());
        Ok(Root { x, slope: (b.1 - a.1) / (b.0 - a.0) })
    }

    /// The wanted step over which the demand rises through zero; else where it would, and whether that is in
    /// doubt.
    fn look(&self, demand: &dyn Fn(f64) -> f64) -> Result<Bracket, (Missed, bool)> {
        let low = *self.range.start();
        let node = |i: u32| low + self.width() * f64::from(i) / f64::from(self.steps);
        let mut known = vec![None; self.steps as usize + 1];
        let mut value = |i: u32| *known[i as usize].get_or_insert_with(|| demand(node(i)));
        let mut rises = |i: &u32| value(*i) < 0.0 && value(i + 1) >= 0.0;
        let found = match self.wanted {
            Wanted::Highest => (0..self.steps).rev().find(&mut rises),
            Wanted::Lowest => (0..self.steps).find(&mut rises),
        };
        if let Some(i) = found {
            return Ok(((node(i), value(i)), (node(i + 1), value(i + 1))));
        }
        let missed = if value(self.steps) < 0.0 { Missed::AboveRange } else { Missed::BelowRange };
        let sizes = known.iter().flatten().map(|v: &f64| v.abs());
        let (least, most) = sizes.fold((f64::INFINITY, 0.0_f64), |(l, m), v| (l.min(v), m.max(v)));
        Err((missed, least < DOUBTFUL * most))
    }
}

fn bracketed((a, b): Bracket, demand: &dyn Fn(f64) -> f64, eps: f64) -> f64 {
    let ends = |x: f64| match x {
        x if x == a.0 => a.1,
        x if x == b.0 => b.1,
        x => demand(x),
    };
    let mut rule = roots::SimpleConvergency { eps, max_iter: 60 };
    roots::find_root_brent(a.0, b.0, ends, &mut rule).unwrap_or(b.0)
}

#[cfg(test)]
mod tests;
