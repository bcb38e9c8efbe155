//! Blades that differ from one another, in the flow that they share.
//!
//! The induced flow is that of the propeller of mean blades; each blade's forces are those of its own angle,
//! chord and thickness in it. This is right to first order in the differences, and leaves out that a blade
//! works a little in its own wake: the differences between the blades' loads come out rather too large than
//! too small.

use super::{Condition, Rotor};
use crate::report::best_of;

/// What the air does to one blade.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct BladeLoad {
    /// Thrust, N.
    pub thrust_n: f64,
    /// Torque about the axis, N m.
    pub torque_n_m: f64,
    /// Moment of the thrust about the hub, N m: `∫ r dT`.
    pub bending_n_m: f64,
    /// Force in the plane of rotation against the turning, N: `∫ dQ/r`.
    pub drag_n: f64,
}

impl Rotor {
    /// The load of each of the blades (each given as a propeller of its own kind with this one's hub and
    /// diameter) in the flow of this propeller. Elements without a balance carry none.
    #[must_use]
    pub fn blade_loads(&self, blades: &[Self], at: &Condition) -> Vec<BladeLoad> {
        let mut loads = vec![BladeLoad::default(); blades.len()];
        for ring in &self.rings {
            let Some(flow) = self.element(ring, at).0.balance() else { continue };
            let (sin, cos) = flow.inflow_rad.sin_cos();
            let head = 0.5 * at.air.density_kg_m3 * flow.speed_m_s.powi(2) * ring.width_m;
            let r = ring.cut.radius_m;
            for (load, blade) in loads.iter_mut().zip(blades) {
                let own = blade.ring(r);
                let element = blade.element(&own, at).0;
                let c = element.section.at(element.angle_rad - flow.inflow_rad);
                let force = head * own.cut.chord_m;
                let thrust = force * (c.cl * cos - c.cd * sin);
                let drag = self.power_factor * force * (c.cl * sin + c.cd * cos);
                load.thrust_n += thrust;
                load.bending_n_m += thrust * r;
                load.drag_n += drag;
                load.torque_n_m += drag * r;
            }
        }
        loads
    }

    /// Departure (degrees) of one of such blades at a radius, m; `None` where there is no balance or no best
    /// angle.
    #[must_use]
    pub fn departure_deg(&self, blade: &Self, radius_m: f64, at: &Condition) -> Option<f64> {
        let flow = self.element(&self.ring(radius_m), at).0.balance()?;
        let element = blade.element(&blade.ring(radius_m), at).0;
        let best = best_of(&element)?;
        Some((element.angle_rad - flow.inflow_rad - best.alpha_rad).to_degrees())
    }
}
