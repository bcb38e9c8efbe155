//! Answers at neighbouring speeds, from which the next is guessed.

use std::cell::RefCell;
use std::ops::RangeInclusive;

use super::root::{Root, Search};
use super::settle::{Free, Met, Steepness};
use crate::rotor::Neighbour;

/// Answers a guess is made of.
const MOST: usize = 4;
/// Answers found at once, with the slope of one before, until it is measured again.
const MOST_UNMEASURED: u32 = 3;
/// How far the last guess may have been off for the next to be taken as it is, as a share of the range.
const TRUSTED: f64 = 1e-3;

/// The last answers along a line of speeds, the newest first. An empty trail guesses nothing.
#[derive(Clone, Debug, Default)]
pub(super) struct Trail {
    past: Vec<(f64, Met)>,
    /// What is known of the elements where they were last looked at.
    pub(super) elements: RefCell<Neighbour>,
    /// Whether the last guess was good.
    trusted: bool,
    /// How many answers were found at once since the slope was last measured.
    unmeasured: u32,
}

impl Trail {
    /// The answers nearest to a speed, of a line of them that has been followed.
    pub(super) fn beside(line: &[Met], airspeed_m_s: f64) -> Self {
        let mut past: Vec<(f64, Met)> = line.iter().map(|met| (met.condition.airspeed_m_s, *met)).collect();
        past.sort_by(|a, b| (a.0 - airspeed_m_s).abs().total_cmp(&(b.0 - airspeed_m_s).abs()));
        let free = past.first().map(|(_, met)| met.free);
        past.retain(|(_, met)| Some(met.free) == free);
        past.truncate(MOST);
        Self { trusted: past.len() == MOST, past, ..Self::default() }
    }

    /// The last answer alone with what is known of the elements: a guess for another propeller at the same
    /// speed.
    pub(super) fn newest(self) -> Self {
        Self { past: self.past.into_iter().take(1).collect(), elements: self.elements, ..Self::default() }
    }

    /// The last answer.
    pub(super) fn last(&self) -> Option<&Met> {
        self.past.first().map(|(_, met)| met)
    }

    /// How thrust and torque of the last answer change with the free quantity.
    pub(super) fn steepness(&self, free: Free) -> Option<Steepness> {
        self.last().filter(|met| met.free == free)?.steepness
    }

    /// Adds an answer; one with another quantity free begins a new trail.
    pub(super) fn push(&mut self, met: &Met) {
        if self.past.first().is_some_and(|(_, p)| p.free != met.free) {
            self.past.clear();
        }
        let guessed = self.guess(met.free, met.condition.airspeed_m_s, &(f64::NEG_INFINITY..=f64::INFINITY));
        self.unmeasured = if met.measured { 0 } else { self.unmeasured + 1 };
        self.trusted = guessed.is_some_and(|g| (g.x - met.root.x).abs() <= TRUSTED * met.width);
        self.past.insert(0, (met.condition.airspeed_m_s, *met));
        self.past.truncate(MOST);
    }

    /// The roots of the last answers, followed on to a speed by the polynomial through them (Neville's
    /// scheme).
    fn on_the_curve(&self, airspeed_m_s: f64) -> f64 {
        let mut x: Vec<f64> = self.past.iter().map(|(_, met)| met.root.x).collect();
        for order in 1..x.len() {
            for i in 0..x.len() - order {
                let (a, b) = (airspeed_m_s - self.past[i].0, airspeed_m_s - self.past[i + order].0);
                x[i] = (b * x[i] - a * x[i + 1]) / (b - a);
            }
        }
        x.first().copied().unwrap_or(f64::NAN)
    }

    /// Where the next root should be.
    pub(super) fn guess(&self, free: Free, airspeed_m_s: f64, range: &RangeInclusive<f64>) -> Option<Root> {
        let slope = self.past.first().filter(|(_, p)| p.free == free)?.1.root.slope;
        let x = self.on_the_curve(airspeed_m_s);
        x.is_finite().then(|| Root { x: x.clamp(*range.start(), *range.end()), slope })
    }

    /// The root near a guess, and how far it lies above that by few elements; a guess that is not to be
    /// trusted is bettered by few elements first.
    pub(super) fn followed(&self, guess: Root, search: &Search) -> Option<(Root, Option<f64>)> {
        let above = self.past.first().and_then(|(_, met)| met.above_rough);
        if self.trusted {
            let known =
                self.unmeasured < MOST_UNMEASURED && self.last().is_some_and(|m| m.steepness.is_some());
            let root = if known { search.refined_at_once(guess) } else { search.refined(guess) };
            return Some((root?, above));
        }
        let rough = search.rough_refined(Root { x: guess.x - above.unwrap_or(0.0), ..guess })?;
        let root = search.refined(Root { x: rough.x + above.unwrap_or(0.0), ..rough })?;
        Some((root, Some(root.x - rough.x)))
    }
}

#[cfg(test)]
mod tests;
