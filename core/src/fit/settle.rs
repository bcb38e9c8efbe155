//! Settles a demand on a propeller: by its rpm, or by the blade angle where a governor holds the rpm.

use std::cell::Cell;
use std::ops::RangeInclusive;

use super::root::{DOUBTFUL, LAST_STEP, Missed, Root, Search, Wanted};
use super::trail::Trail;
use crate::job::PitchControl;
use crate::rig::{Rig, rotation_rad_s};
use crate::rotor::{Condition, Loads};

/// What moves until a demand is met.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Free {
    /// Propeller rpm.
    Rpm,
    /// The angle the blades are turned in the hub, rad.
    Turn,
}

/// A demand that is met.
#[derive(Clone, Copy, Debug)]
pub(super) struct Met {
    pub(super) condition: Condition,
    pub(super) loads: Loads,
    pub(super) free: Free,
    pub(super) root: Root,
    /// How far the root lies above that by few elements, where both are known.
    pub(super) above_rough: Option<f64>,
    /// Width of the range that was searched.
    pub(super) width: f64,
    /// How its loads change with the free quantity, where that is known.
    pub(super) steepness: Option<Steepness>,
    /// Whether that and the root's slope were measured here, not at a neighbour.
    pub(super) measured: bool,
}

/// Change of the loads with the free quantity.
#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Steepness {
    thrust_n: f64,
    torque_n_m: f64,
}

/// How far beyond its last two looks a search's loads are taken on the line through them, in their distance.
const FARTHEST_ON: f64 = 0.1;
/// Steps of a look over the rpm of an engine, or over the blade angle.
pub(super) const STEPS: u32 = 24;
/// Steps of a look that only asks whether a search is in vain.
const FEW: u32 = 6;

/// A demand at the speed and air of a condition; above zero when the propeller takes, or gives, more than is
/// asked.
pub(super) struct Demand<'a> {
    pub(super) rig: &'a Rig,
    pub(super) at: Condition,
    pub(super) spare: &'a dyn Fn(&Loads, &Condition) -> f64,
    /// Whether few elements will do.
    pub(super) rough: bool,
}

/// The last two looks of a search.
#[derive(Default)]
struct Seen(Cell<[Option<(f64, Loads)>; 2]>);

impl Seen {
    fn add(&self, x: f64, loads: Loads) {
        let [last, _] = self.0.get();
        self.0.set([Some((x, loads)), last]);
    }

    /// The change of the loads between the last two looks.
    fn steepness(&self) -> Option<Steepness> {
        let [Some((b, at_b)), Some((a, at_a))] = self.0.get() else { return None };
        let per = |from: f64, to: f64| (to - from) / (b - a);
        (b != a).then(|| Steepness {
            thrust_n: per(at_a.thrust_n, at_b.thrust_n),
            torque_n_m: per(at_a.torque_n_m, at_b.torque_n_m),
        })
    }

    /// The loads on from the last look, where the last step of a secant leads to.
    fn loads_at(&self, x: f64, along: Steepness, farthest: f64) -> Option<Loads> {
        let [Some((b, at_b)), before] = self.0.get() else { return None };
        let step = x - b;
        let near = before.is_some_and(|(a, _)| step.abs() < FARTHEST_ON * (b - a).abs());
        (near || step.abs() <= farthest).then_some(Loads {
            thrust_n: at_b.thrust_n + along.thrust_n * step,
            torque_n_m: at_b.torque_n_m + along.torque_n_m * step,
            ..at_b
        })
    }
}

/// What a constant-speed propeller makes of a demand.
pub(super) enum Governed {
    /// The governor holds its rpm.
    Held(Met),
    /// The blades rest at a stop.
    AtStop(Condition),
}

impl Demand<'_> {
    /// The condition with the free quantity at a value.
    fn with(&self, free: Free, x: f64) -> Condition {
        match free {
            Free::Rpm => Condition { rotation_rad_s: rotation_rad_s(x), ..self.at },
            Free::Turn => Condition { turn_rad: x, ..self.at },
        }
    }

    /// Meets the demand by the free quantity within its range; a trail of neighbouring answers saves the look
    /// over all of it.
    pub(super) fn settle(
        &self,
        free: Free,
        range: RangeInclusive<f64>,
        steps: u32,
        trail: &Trail,
    ) -> Result<Met, Missed> {
        let rotor = &self.rig.rotor;
        let seen = Seen::default();
        let look = |x: f64, loads: &dyn Fn(&Condition) -> Loads| {
            let at = self.with(free, x);
            let loads = loads(&at);
            seen.add(x, loads);
            (self.spare)(&loads, &at)
        };
        let search = Search {
            wanted: if free == Free::Rpm { Wanted::Highest } else { Wanted::Lowest },
            steps,
            rough: &|x| look(x, &|at| rotor.rough_loads_near(at, &mut trail.elements.borrow_mut())),
            exact: &|x| look(x, &|at| rotor.loads_near(at, &mut trail.elements.borrow_mut())),
            range,
        };
        let guess = trail.guess(free, self.at.airspeed_m_s, &search.range);
        if guess.is_none()
            && let Some(missed) = self.surely_missed(free, &search.range, trail)
        {
            return Err(missed);
        }
        let (root, above_rough) = if self.rough {
            (guess.and_then(|g| search.rough_refined(g)).map_or_else(|| search.rough_root(), Ok)?, None)
        } else {
            guess.and_then(|g| trail.followed(g, &search)).map_or_else(|| search.root(), Ok)?
        };
        let condition = self.with(free, root.x);
        let width = search.width();
        let here = seen.steepness();
        let steepness = here.or_else(|| trail.steepness(free));
        let led = steepness.and_then(|along| seen.loads_at(root.x, along, LAST_STEP * width));
        let loads = led.unwrap_or_else(|| rotor.loads_near(&condition, &mut trail.elements.borrow_mut()));
        Ok(Met { condition, loads, free, root, above_rough, width, steepness, measured: here.is_some() })
    }

    /// Why nothing in a range meets the demand, where a few looks by few elements leave no doubt of it.
    fn surely_missed(&self, free: Free, range: &RangeInclusive<f64>, trail: &Trail) -> Option<Missed> {
        let width = range.end() - range.start();
        let value = |i: u32| {
            let at = self.with(free, range.start() + width * f64::from(i) / f64::from(FEW));
            (self.spare)(&self.rig.rotor.rough_loads_near(&at, &mut trail.elements.borrow_mut()), &at)
        };
        let first = value(0);
        let values = (0..=FEW).map(|i| if i == 0 { first } else { value(i) });
        let looked: Vec<f64> = values.take_while(|v| (*v < 0.0) == (first < 0.0)).collect();
        let most = looked.iter().fold(0.0_f64, |m, v| m.max(v.abs()));
        let sure = looked.len() > FEW as usize && looked.iter().all(|v| v.abs() > DOUBTFUL * most);
        sure.then_some(if first < 0.0 { Missed::AboveRange } else { Missed::BelowRange })
    }

    /// What a constant-speed propeller makes of it; `None` for other propellers.
    pub(super) fn governed(&self, trail: &Trail) -> Option<Governed> {
        let PitchControl::ConstantSpeed { rpm, turn_min_deg, turn_max_deg } =
            self.rig.job.propeller.pitch_control
        else {
            return None;
        };
        let (fine, coarse) = (turn_min_deg.to_radians(), turn_max_deg.to_radians());
        let at = Condition { rotation_rad_s: rotation_rad_s(rpm), ..self.at };
        let stop = |turn_rad: f64| Governed::AtStop(Condition { turn_rad, ..at });
        if fine == coarse {
            return Some(stop(fine));
        }
        let governed = Demand { at, ..*self };
        Some(match governed.settle(Free::Turn, fine..=coarse, STEPS, trail) {
            Ok(met) => Governed::Held(met),
            Err(Missed::BelowRange) => stop(fine),
            Err(Missed::AboveRange) => stop(coarse),
        })
    }
}

#[cfg(test)]
mod tests;
