//! What the aircraft asks for: drag, weight, the speeds that follow from a parabolic polar.
//!
//! `CD = cd0 + k CL²`, lift equal to weight: `D = q S cd0 + k W²/(q S)`. A multirotor asks each rotor for its
//! share of the weight.

mod asked;

pub use asked::{Asked, asked};

use serde::Serialize;

use crate::air::{Air, G0_M_S2};
use crate::job::{Aeroplane, Aircraft};

/// Speeds of an aeroplane at one air, true airspeed in m/s.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Speeds {
    /// Stall, where a greatest lift coefficient is given.
    pub stall_m_s: Option<f64>,
    /// Least power in level flight.
    pub least_power_m_s: f64,
    /// Least drag; best range for a propeller aeroplane.
    pub least_drag_m_s: f64,
    /// Best range for a given time aloft: greatest `sqrt(CL)/CD`.
    pub fast_cruise_m_s: f64,
    /// Greatest lift over drag.
    pub greatest_lift_to_drag: f64,
}

/// Weight, N.
#[must_use]
pub fn weight_n(aircraft: &Aircraft) -> f64 {
    G0_M_S2
        * match aircraft {
            Aircraft::Aeroplane(a) => a.mass_kg,
            Aircraft::Multirotor(m) => m.mass_kg,
        }
}

/// Whether the weight hangs on the thrust, not on a wing.
#[must_use]
pub fn hovers(aircraft: Option<&Aircraft>) -> bool {
    matches!(aircraft, Some(Aircraft::Multirotor(_)))
}

/// How many propellers share the work.
#[must_use]
pub fn propellers(aircraft: &Aircraft) -> f64 {
    f64::from(match aircraft {
        Aircraft::Aeroplane(a) => a.engines,
        Aircraft::Multirotor(m) => m.rotors,
    })
}

/// Thrust asked of one propeller for level flight (aeroplane) or to hold the weight (multirotor), N. `None`
/// for an aeroplane at rest, which no thrust holds up.
#[must_use]
pub fn thrust_asked_n(aircraft: &Aircraft, air: &Air, airspeed_m_s: f64) -> Option<f64> {
    let all = match aircraft {
        Aircraft::Aeroplane(a) => drag_n(a, air, airspeed_m_s)?,
        Aircraft::Multirotor(_) => weight_n(aircraft),
    };
    Some(all / propellers(aircraft))
}

/// Drag in level flight, N; `None` at rest.
#[must_use]
pub fn drag_n(a: &Aeroplane, air: &Air, airspeed_m_s: f64) -> Option<f64> {
    let qs = 0.5 * air.density_kg_m3 * airspeed_m_s * airspeed_m_s * a.wing_area_m2;
    let w = a.mass_kg * G0_M_S2;
    (qs > 0.0).then(|| qs * a.drag.cd0 + a.drag.induced_factor() * w * w / qs)
}

/// The aircraft with its drag without lift multiplied.
#[must_use]
pub fn with_drag(aircraft: &Aircraft, factor: f64) -> Aircraft {
    let mut other = aircraft.clone();
    if let Aircraft::Aeroplane(a) = &mut other {
        a.drag.cd0 *= factor;
    }
    other
}

/// The speeds of an aeroplane in an air.
#[must_use]
pub fn speeds(a: &Aeroplane, air: &Air) -> Speeds {
    let (cd0, k) = (a.drag.cd0, a.drag.induced_factor());
    let speed_at = |cl: f64| (2.0 * a.mass_kg * G0_M_S2 / (air.density_kg_m3 * a.wing_area_m2 * cl)).sqrt();
    let least_drag_m_s = speed_at((cd0 / k).sqrt());
    Speeds {
        stall_m_s: a.cl_max.map(speed_at),
        least_power_m_s: least_drag_m_s / 3f64.powf(0.25),
        least_drag_m_s,
        fast_cruise_m_s: least_drag_m_s * 3f64.powf(0.25),
        greatest_lift_to_drag: 0.5 / (k * cd0).sqrt(),
    }
}
