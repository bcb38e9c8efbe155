//! What the slipstream's drag leaves of the thrust.
//!
//! By momentum theory the dynamic pressure in the developed slipstream is above that of the free air by the
//! thrust over the disc area, `qs − q = T/A` (H. Glauert, *Airplane Propellers*, 1935, there as `qs/q = 1 +
//! Tc`; from memory). Parts of drag area f in the slipstreams of N propellers then have the more drag `f
//! T/A`, T of one propeller, which is the share `f/(N A)` of the thrust of all, at any speed.

use std::f64::consts::PI;

use crate::aircraft::propellers;
use crate::job::Aircraft;
use crate::rig::Rig;

/// The share of the thrust that is left; 1 where the job names no parts in the slipstream.
pub(crate) fn kept_share(rig: &Rig) -> f64 {
    let Some(aircraft @ Aircraft::Aeroplane(a)) = &rig.aircraft else { return 1.0 };
    let discs_m2 = propellers(aircraft) * PI * rig.rotor.blade.radius_m.powi(2);
    1.0 - a.slipstream_drag_area_m2.unwrap_or(0.0) / discs_m2
}
