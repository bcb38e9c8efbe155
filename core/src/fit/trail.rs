//! Answers at neighbouring speeds, from which the next is guessed.

use std::ops::RangeInclusive;

use super::root::{Root, Search};
use super::settle::{Free, Met};

/// Answers a guess is made of.
const MOST: usize = 3;
/// How far the last guess may have been off for the next to be taken as it is, as a share of the range.
const TRUSTED: f64 = 1e-3;

/// The last answers along a line of speeds, the newest first. An empty trail guesses nothing.
#[derive(Clone, Debug, Default)]
pub(super) struct Trail {
    past: Vec<(f64, Met)>,
    /// Whether the last guess was good.
    trusted: bool,
}

impl Trail {
    /// Adds an answer; one with another quantity free begins a new trail.
    pub(super) fn push(&mut self, met: &Met) {
        if self.past.first().is_some_and(|(_, p)| p.free != met.free) {
            self.past.clear();
        }
        let guessed = self.guess(met.free, met.condition.airspeed_m_s, &(f64::NEG_INFINITY..=f64::INFINITY));
        self.trusted = guessed.is_some_and(|g| (g.x - met.root.x).abs() <= TRUSTED * met.width);
        self.past.insert(0, (met.condition.airspeed_m_s, *met));
        self.past.truncate(MOST);
    }

    /// Where the next root should be: on the parabola, line or point through the last answers (Newton's divided differences).
    pub(super) fn guess(&self, free: Free, airspeed_m_s: f64, range: &RangeInclusive<f64>) -> Option<Root> {
        let slope = self.past.first().filter(|(_, p)| p.free == free)?.1.root.slope;
        let known: Vec<(f64, f64)> = self.past.iter().map(|(v, met)| (*v, met.root.x)).collect();
        let between = |a: (f64, f64), b: (f64, f64)| (b.1 - a.1) / (b.0 - a.0);
        let x = match *known.as_slice() {
            [a] => a.1,
            [a, b] => a.1 + between(a, b) * (airspeed_m_s - a.0),
            [a, b, c] => {
                let curving = (between(b, c) - between(a, b)) / (c.0 - a.0);
                let from_a = airspeed_m_s - a.0;
                a.1 + from_a * (between(a, b) + (airspeed_m_s - b.0) * curving)
            }
            _ => return None,
        };
        x.is_finite().then(|| Root { x: x.clamp(*range.start(), *range.end()), slope })
    }

    /// The root near a guess, and how far it lies above that by few elements; a guess that is not to be trusted is bettered by few
    /// elements first.
    pub(super) fn followed(&self, guess: Root, search: &Search) -> Option<(Root, Option<f64>)> {
        let above = self.past.first().and_then(|(_, met)| met.above_rough);
        if self.trusted {
            return Some((search.refined(guess)?, above));
        }
        let rough = search.rough_refined(Root { x: guess.x - above.unwrap_or(0.0), ..guess })?;
        let root = search.refined(Root { x: rough.x + above.unwrap_or(0.0), ..rough })?;
        Some((root, Some(root.x - rough.x)))
    }
}
