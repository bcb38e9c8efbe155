//! The hub's drilling: the job's own pattern or a standard flange.

use crate::job::{Flange, Job};

/// Holes to drill, lengths in m.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Pattern {
    /// Number of bolts.
    pub bolts: u32,
    /// Diameter of the circle they stand on.
    pub circle_m: f64,
    /// Diameter of their holes.
    pub bolt_m: f64,
    /// Diameter of the hole in the middle; 0 where none is given.
    pub bore_m: f64,
    /// Diameter of the plates, where the pattern is the job's own.
    pub flange_m: Option<f64>,
    /// What the pattern is called.
    pub name: &'static str,
}

/// A hole along the axis.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Hole {
    /// Its middle, m, the first blade along the first coordinate.
    pub at_m: [f64; 2],
    /// Its radius, m.
    pub radius_m: f64,
}

/// An inch, m, as it is defined.
const INCH_M: f64 = 0.0254;
/// Least wood beside a hole, as a share of the boss's radius: 1 mm in a boss of 100 mm. A choice, so that
/// none breaks out; whether the boss holds is asked of its strength.
const LEAST_WALL: f64 = 0.02;

impl Pattern {
    /// The pattern of a job: a standard flange where it names one, else its own.
    #[must_use]
    pub fn of(job: &Job) -> Option<Self> {
        match job.bench.as_ref().and_then(|b| b.flange) {
            // SAE No. 2 (AS127, 1947): six studs on a 4 3/4 in circle, 1/2 in; No. 1: six of 3/8 in on 4 3/8
            // in, from memory.
            Some(Flange::Sae2) => Some(Self::standard(4.75, 0.5, "SAE No. 2 flange")),
            Some(Flange::Sae1) => Some(Self::standard(4.375, 0.375, "SAE No. 1 flange (from memory)")),
            None => Self::own(job),
        }
    }

    fn standard(circle_in: f64, bolt_in: f64, name: &'static str) -> Self {
        let (circle_m, bolt_m) = (circle_in * INCH_M, bolt_in * INCH_M);
        Self { bolts: 6, circle_m, bolt_m, bore_m: 0.0, flange_m: None, name }
    }

    fn own(job: &Job) -> Option<Self> {
        let hub = job.wood.as_ref()?.hub.as_ref()?;
        Some(Self {
            bolts: hub.bolts,
            circle_m: hub.bolt_circle_m,
            bolt_m: hub.bolt_diameter_m,
            bore_m: hub.bore_m,
            flange_m: Some(hub.flange_diameter_m),
            name: "own pattern",
        })
    }

    /// The bolts' holes: the blade's own line passes between two of them.
    pub fn bolt_holes(&self) -> impl Iterator<Item = Hole> {
        let (n, r, radius_m) = (self.bolts, 0.5 * self.circle_m, 0.5 * self.bolt_m);
        (0..n).map(move |k| {
            let turn = std::f64::consts::TAU * (f64::from(k) + 0.5) / f64::from(n);
            Hole { at_m: [r * turn.cos(), r * turn.sin()], radius_m }
        })
    }

    /// All holes.
    #[must_use]
    pub fn holes(&self) -> Vec<Hole> {
        let bore = (self.bore_m > 0.0).then_some(Hole { at_m: [0.0, 0.0], radius_m: 0.5 * self.bore_m });
        bore.into_iter().chain(self.bolt_holes()).collect()
    }

    /// How far the holes reach from the axis, m.
    #[must_use]
    pub fn reach_m(&self) -> f64 {
        let far = |h: &Hole| h.at_m[0].hypot(h.at_m[1]) + h.radius_m;
        self.holes().iter().map(far).fold(0.0, f64::max)
    }

    /// How much farther the holes reach than a boss of that radius can hold, m; `None` where they fit.
    #[must_use]
    pub fn past_boss_m(&self, boss_radius_m: f64) -> Option<f64> {
        Some(self.reach_m() - (1.0 - LEAST_WALL) * boss_radius_m).filter(|past| *past > 0.0)
    }
}
