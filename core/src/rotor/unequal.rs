//! Blades that differ from one another, in the flow that they share.
//!
//! The induced flow is that of the propeller of mean blades; each blade's forces are those of its own angle,
//! chord and thickness in it. This is right to first order in the differences, and leaves out that a blade
//! works a little in its own wake: the differences between the blades' loads come out rather too large than
//! too small.

use super::{Condition, Rotor};

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
        let best = element.section.best()?;
        Some((element.angle_rad - flow.inflow_rad - best.alpha_rad).to_degrees())
    }
}

#[cfg(test)]
mod tests {
    use crate::rotor::tests::{at_speed, rotor};

    /// What equal blades carry adds up to the whole, and each one's moments to those of the load by radius.
    #[test]
    fn equal_blades_share_the_whole_evenly() {
        let rotor = rotor(|_| ()).taking(1.07);
        for v in [0.0, 30.0, 50.0] {
            let at = at_speed(v);
            let whole = rotor.loads(&at);
            let (mut bending, mut drag) = (0.0, 0.0);
            for (graded, ring) in rotor.spread(&at).iter().zip(&rotor.rings) {
                bending += graded.thrust_n_m * graded.radius_m * ring.width_m / 2.0;
                drag += graded.torque_n / graded.radius_m * ring.width_m / 2.0;
            }
            for load in rotor.blade_loads(&[rotor.clone(), rotor.clone()], &at) {
                for (found, wanted) in [
                    (load.thrust_n, whole.thrust_n / 2.0),
                    (load.torque_n_m, whole.torque_n_m / 2.0),
                    (load.bending_n_m, bending),
                    (load.drag_n, drag),
                ] {
                    assert!((found / wanted - 1.0).abs() < 1e-9, "{v} {found} {wanted}");
                }
            }
        }
    }

    /// The flow is shared: a blade at a steeper angle is off by as much more, and only its own load grows.
    #[test]
    fn a_steeper_blade_departs_by_as_much_more() {
        let mean = rotor(|_| ());
        let steeper = rotor(|job| {
            for station in &mut job.propeller.stations {
                station.angle_deg = station.angle_deg.map(|deg| deg + 1.5);
            }
        });
        let (at, r) = (at_speed(40.0), 0.7 * mean.blade.radius_m);
        let element = mean.element(&mean.ring(r), &at).0;
        let own =
            (element.balance().unwrap().alpha_rad - element.section.best().unwrap().alpha_rad).to_degrees();
        let departures = [&mean, &steeper].map(|blade| mean.departure_deg(blade, r, &at).unwrap());
        assert!((departures[0] - own).abs() < 1e-9, "{departures:?} {own}");
        assert!((departures[1] - own - 1.5).abs() < 1e-9, "{departures:?} {own}");
        let loads = mean.blade_loads(&[mean.clone(), steeper], &at);
        assert!((loads[0].thrust_n / (0.5 * mean.loads(&at).thrust_n) - 1.0).abs() < 1e-9);
        assert!(loads[1].thrust_n > 1.05 * loads[0].thrust_n && loads[1].drag_n > 1.05 * loads[0].drag_n);
    }
}
