//! Further attempts at an angle that failed, from solved neighbours on both sides.
//!
//! What fails between angles that converge is mostly transition: caught at a node, or running along a side
//! within a fraction of a degree. Nothing is filled in: a point found here holds the same equations to the
//! same tolerance.

use super::attempt::{Attempts, Found, HALVINGS, Pace, Solution};
use super::layer::Layer;
use super::wake::Flow;

/// Factors on the amplification exponent by way of which a failed angle is tried.
const EASES: [f64; 3] = [0.85, 1.15, 0.6];

/// Places of a trip on the way between those of transition at two neighbours, and most tries between two of
/// them.
const TRACES: u32 = 12;
/// Least way that is traced, chords.
const LEAST_TRACE: f64 = 0.05;
/// Place of the last trip, chords.
const LAST_TRIP: f64 = 0.995;
/// Difference in amplification exponent at which a place held is the free one.
const HELD: f64 = 1e-3;

impl<'a> Attempts<'a> {
    /// Tries an angle that failed once more, from the neighbour on either side: with a march that may not
    /// leap, and by way of another amplification exponent.
    pub(super) fn mend(&mut self, alpha_rad: f64, beyond: Option<&'a Solution>) -> Found {
        let last = self.last?;
        self.beyond = beyond;
        let flow = Flow::new(self.potentials[0], alpha_rad);
        let found = self.warm(last, &flow, Pace::FULL);
        found
            .or_else(|| self.warm(last, &flow, Pace::STEADY))
            .or_else(|| self.halved(last, &flow, HALVINGS, Pace::STEADY))
            .or_else(|| [0, 1].into_iter().find_map(|side| self.traced(last, &flow, side)))
            .or_else(|| EASES.iter().find_map(|ease| self.eased(last, &flow, *ease)))
    }

    /// By way of `ease` times the amplification exponent, which moves transition off the node it is caught
    /// at.
    fn eased(&mut self, last: &Solution, flow: &Flow, ease: f64) -> Found {
        let mut layer = Self::moved(last, flow);
        layer.course.n_crit = self.course.n_crit.map(|n| n * ease);
        let mut layer = self.relax(layer, flow, Pace::STEADY)?;
        layer.course.n_crit = self.course.n_crit;
        let layer = self.relax(layer, flow, Pace::STEADY)?;
        self.judge(layer, self.potentials[0], flow)
    }

    /// By way of a trip. Where waves neither grow nor fade over much of a side, transition runs from one end
    /// of that stretch to the other within a fraction of a degree, and no step of Newton's method finds it.
    /// With transition held at a place the equations are tame; the place is moved until waves have grown
    /// there by just the exponent, which makes it the free one.
    fn traced(&mut self, last: &Solution, flow: &Flow, side: usize) -> Found {
        let far = self.beyond?.layer.transition_x(side).min(LAST_TRIP);
        let near = last.layer.transition_x(side).min(LAST_TRIP);
        if (far - near).abs() < LEAST_TRACE {
            return None;
        }
        let mut held = Self::moved(last, flow);
        let mut ends = [(near, self.held(&mut held, flow, side, near)?); 2];
        // On from the near end until the growth passes the exponent.
        for step in 1..=TRACES {
            let on = near + (far - near) * f64::from(step) / f64::from(TRACES);
            ends = [ends[1], (on, self.held(&mut held, flow, side, on)?)];
            if ends[0].1 * ends[1].1 <= 0.0 {
                return self.between(held, flow, side, ends);
            }
        }
        None
    }

    /// The place between two where waves have grown by just the exponent, by false position.
    fn between(&mut self, mut held: Layer, flow: &Flow, side: usize, mut ends: [(f64, f64); 2]) -> Found {
        for _ in 0..TRACES {
            let [(a, f), (b, g)] = ends;
            let middle = if (f - g).abs() > 1e-12 { (a * g - b * f) / (g - f) } else { 0.5 * (a + b) };
            let lack = self.held(&mut held, flow, side, middle)?;
            if lack.abs() < HELD {
                held.let_go(self.course);
                return self.judge(held, self.potentials[0], flow);
            }
            // The end that stays counts half: no end is kept for ever.
            ends =
                if lack * f > 0.0 { [(middle, lack), (b, 0.5 * g)] } else { [(a, 0.5 * f), (middle, lack)] };
        }
        None
    }

    /// Relaxes with transition of a side held at a place; the growth of waves there beyond the exponent.
    fn held(&mut self, layer: &mut Layer, flow: &Flow, side: usize, place: f64) -> Option<f64> {
        layer.trip_at(side, place);
        *layer = self.relax(layer.clone(), flow, Pace::STEADY)?;
        Some(layer.growth_at_trip(side)? - self.course.n_crit[side])
    }
}
