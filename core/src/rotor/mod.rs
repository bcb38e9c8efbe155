//! Blade-element momentum: the propeller at one condition, by elements and at its stations.
//!
//! Method: annuli independent of one another (steady axial flow), each in the balance of [`element`];
//! integration by the midpoint rule on cosine-spaced elements between hub and tip, which never touches the
//! ends, where the load is nothing by definition. A body behind slows the air at the disc: the blades meet
//! `(1 − h) V` (H. Glauert, *Airplane Propellers*, 1935, on body interference, as an effective advance ratio;
//! from memory), h being the job's blockage, the same over the disc. Choice: Reynolds and Mach number of an
//! element are those of `hypot(V, Ω r)`, fixed during the solve.

pub mod element;
pub mod loss;
mod map;
mod sweep;
mod unequal;

pub use map::{DepartureMap, MapCell, departure_map};
pub use sweep::{Coefficients, CurvePoint, coefficient_curves, curve_point, thrustless_speed_m_s};
pub use unequal::BladeLoad;

use std::f64::consts::PI;

use crate::air::Air;
use crate::blade::{Blade, Cut};
use crate::job::{Method, TipLoss};
use crate::section::{Local, Situation};
use element::{Balance, Blend, Element, Near};
use loss::Ends;

/// One steady condition of a propeller.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Condition {
    /// The air.
    pub air: Air,
    /// Axial true airspeed, m/s, not below zero.
    pub airspeed_m_s: f64,
    /// Speed of rotation Ω, rad/s, above zero.
    pub rotation_rad_s: f64,
    /// Angle the blades are turned in the hub, rad.
    pub turn_rad: f64,
}

impl Condition {
    /// Revolutions per second.
    #[must_use]
    pub fn turns_per_s(&self) -> f64 {
        self.rotation_rad_s / (2.0 * PI)
    }
}

/// Thrust and torque of one propeller.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Loads {
    /// Thrust, N, positive forward.
    pub thrust_n: f64,
    /// Torque, N m, positive when the engine supplies it.
    pub torque_n_m: f64,
    /// How often sections were looked up.
    pub lookups: u32,
    /// Elements for which no balance was found; they carry no load.
    pub unbalanced: u32,
}

/// An element's geometry with what does not change from condition to condition.
#[derive(Clone, Copy, Debug)]
pub struct Ring {
    /// The blade here.
    pub cut: Cut,
    ends: Ends,
    solidity: f64,
    /// Width for the integral, m.
    width_m: f64,
    /// Snel's factor `3.1 (c/r)²`, at most 1, faded out towards the tip; 0 when switched off.
    stall_delay: f64,
}

/// Load of an element per metre of radius, all blades.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Graded {
    /// Radius, m.
    pub radius_m: f64,
    /// Thrust, N/m.
    pub thrust_n_m: f64,
    /// Torque, N m/m.
    pub torque_n: f64,
    /// Dynamic pressure `½ ρ W²` of the air that meets the blade, Pa.
    pub pressure_pa: f64,
    /// Angle of attack, rad.
    pub alpha_rad: f64,
    /// Angle of greatest lift, rad, up and down.
    pub stall_rad: [f64; 2],
}

/// A propeller ready for any condition.
#[derive(Clone, Debug)]
pub struct Rotor {
    /// The blade.
    pub blade: Blade,
    method: Method,
    /// What the torque of the elements is multiplied by.
    power_factor: f64,
    rings: Vec<Ring>,
    /// Few elements, for a first look.
    rough_rings: Vec<Ring>,
}

/// What is known of every element of a propeller at a neighbouring condition.
#[derive(Clone, Debug, Default)]
pub struct Neighbour {
    all: Vec<Near>,
    few: Vec<Near>,
}

/// Elements of a first look.
const ROUGH_ELEMENTS: u32 = 12;

impl Rotor {
    /// A propeller by its blade and the method's settings.
    #[must_use]
    pub fn new(blade: Blade, method: &Method) -> Self {
        let (rings, rough_rings) = (Vec::new(), Vec::new());
        let mut rotor = Self { blade, method: method.clone(), power_factor: 1.0, rings, rough_rings };
        rotor.rings = rotor.elements(method.elements);
        rotor.rough_rings = rotor.elements(method.elements.min(ROUGH_ELEMENTS));
        rotor
    }

    /// The same propeller taking a multiple of its torque, as a logbook may have found.
    #[must_use]
    pub fn taking(mut self, power_factor: f64) -> Self {
        self.power_factor = power_factor;
        self
    }

    /// What the torque of the elements is multiplied by.
    #[must_use]
    pub fn power_factor(&self) -> f64 {
        self.power_factor
    }

    /// Cosine-spaced elements between hub and tip.
    fn elements(&self, count: u32) -> Vec<Ring> {
        let (rh, span) = (self.blade.hub_radius_m, self.blade.radius_m - self.blade.hub_radius_m);
        let step = PI / f64::from(count);
        let element = |i: u32| {
            let t = (f64::from(i) + 0.5) * step;
            let mut ring = self.ring(rh + 0.5 * span * (1.0 - t.cos()));
            ring.width_m = 0.5 * span * t.sin() * step;
            ring
        };
        (0..count).map(element).collect()
    }

    /// The element at a radius, m.
    #[must_use]
    pub fn ring(&self, radius_m: f64) -> Ring {
        let (blade, b) = (&self.blade, f64::from(self.blade.count));
        let cut = blade.cut(radius_m);
        // Next to a wide root the factor would pass one, and lift the potential flow's: it cannot.
        let snel = (3.1 * (cut.chord_m / radius_m).powi(2)).min(1.0);
        let delay = snel * delay_fade(radius_m / blade.radius_m);
        let ends = Ends::new(b, radius_m, blade.radius_m, blade.hub_radius_m, self.method.hub_loss);
        let exact = self.method.tip_loss == TipLoss::Goldstein;
        Ring {
            cut,
            ends: if exact { ends.exact_at_tip(blade.count, radius_m / blade.radius_m) } else { ends },
            solidity: b * cut.chord_m / (2.0 * PI * radius_m),
            width_m: 0.0,
            stall_delay: if self.method.stall_delay { delay } else { 0.0 },
        }
    }

    /// The element of a ring at a condition, with its section's Reynolds and Mach number.
    #[must_use]
    pub fn element(&self, ring: &Ring, at: &Condition) -> (Element<'_>, Situation) {
        let turning = at.rotation_rad_s * ring.cut.radius_m;
        let axial = at.airspeed_m_s * self.blade.axial_share;
        let speed = axial.hypot(turning);
        let situation = Situation {
            thickness_ratio: ring.cut.thickness_ratio,
            reynolds: at.air.density_kg_m3 * speed * ring.cut.chord_m / at.air.viscosity_pa_s,
            mach: if self.method.compressibility { speed / at.air.sound_speed_m_s } else { 0.0 },
            stall_delay: (ring.stall_delay * (turning / speed).powi(2)).min(1.0),
        };
        let mix = ring.cut.section;
        let local = |i: usize| Local::new(&self.blade.families[i], situation);
        let outer = (mix.share > 0.0).then(|| (local(mix.outer), mix.share));
        let element = Element {
            axial_m_s: axial,
            turning_m_s: turning,
            angle_rad: ring.cut.angle_rad + at.turn_rad,
            solidity: ring.solidity,
            ends: ring.ends,
            section: Blend::new(local(mix.inner), outer),
        };
        (element, situation)
    }

    /// Thrust and torque per metre of radius, all blades: `ρ/2 W² c B cn` and `ρ/2 W² c B ct r`.
    #[must_use]
    pub fn grading(&self, ring: &Ring, at: &Condition, balance: &Balance) -> (f64, f64) {
        let (cn, ct) = balance.normal_and_tangential();
        let w = balance.speed_m_s;
        let head = 0.5 * at.air.density_kg_m3 * w * w * ring.cut.chord_m * f64::from(self.blade.count);
        (head * cn, self.power_factor * head * ct * ring.cut.radius_m)
    }

    /// Thrust and torque at a condition.
    #[must_use]
    pub fn loads(&self, at: &Condition) -> Loads {
        self.sum(&self.rings, at, |_, element| element.balance())
    }

    /// How thrust and torque are spread over the elements, from hub to tip; elements without a balance are
    /// left out.
    #[must_use]
    pub fn spread(&self, at: &Condition) -> Vec<Graded> {
        let graded = |ring: &Ring| {
            let element = self.element(ring, at).0;
            let balance = element.balance()?;
            let (thrust_n_m, torque_n) = self.grading(ring, at, &balance);
            let pressure_pa = 0.5 * at.air.density_kg_m3 * balance.speed_m_s.powi(2);
            Some(Graded {
                radius_m: ring.cut.radius_m,
                thrust_n_m,
                torque_n,
                pressure_pa,
                alpha_rad: balance.alpha_rad,
                stall_rad: [element.section.stall_rad(), element.section.negative_stall_rad()],
            })
        };
        self.rings.iter().filter_map(graded).collect()
    }

    /// The same by few elements: within some per cent, for a first look.
    #[must_use]
    pub fn rough_loads(&self, at: &Condition) -> Loads {
        self.sum(&self.rough_rings, at, |_, element| element.balance())
    }

    /// The loads, equal to within rounding, found from those of a neighbouring condition, with less work;
    /// keeps what the next may need.
    #[must_use]
    pub fn loads_near(&self, at: &Condition, near: &mut Neighbour) -> Loads {
        self.sum_near(&self.rings, at, &mut near.all)
    }

    /// The same by few elements.
    #[must_use]
    pub fn rough_loads_near(&self, at: &Condition, near: &mut Neighbour) -> Loads {
        self.sum_near(&self.rough_rings, at, &mut near.few)
    }

    fn sum_near(&self, rings: &[Ring], at: &Condition, near: &mut Vec<Near>) -> Loads {
        near.resize(rings.len(), Near::default());
        self.sum(rings, at, |i, element| element.balance_near(&mut near[i]))
    }

    fn sum(
        &self,
        rings: &[Ring],
        at: &Condition,
        mut balance: impl FnMut(usize, &Element) -> Option<Balance>,
    ) -> Loads {
        let mut sum = Loads::default();
        for (i, ring) in rings.iter().enumerate() {
            match balance(i, &self.element(ring, at).0) {
                Some(balance) => {
                    let (thrust, torque) = self.grading(ring, at, &balance);
                    sum.thrust_n += thrust * ring.width_m;
                    sum.torque_n_m += torque * ring.width_m;
                    sum.lookups += balance.lookups;
                }
                None => sum.unbalanced += 1,
            }
        }
        sum
    }
}

/// Stall delay is full up to 0.7 R and gone from 0.8 R on.
fn delay_fade(radius_fraction: f64) -> f64 {
    ((0.8 - radius_fraction) / 0.1).clamp(0.0, 1.0)
}

#[cfg(test)]
mod tests;
