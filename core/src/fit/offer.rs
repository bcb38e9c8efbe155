//! What the shaft offers and what the propeller takes over rpm: where the two cross, they meet.

use serde::Serialize;

use super::{condition, crossings, power_w};
use crate::air::Air;
use crate::result::Crossing;
use crate::rig::{Rig, air_of, rotation_rad_s};
use crate::rotor::Condition;

/// Offer and demand at one rpm.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Offer {
    /// Propeller rpm.
    pub propeller_rpm: f64,
    /// Engine or motor rpm.
    pub engine_rpm: f64,
    /// Shaft power at full throttle in the flight point's air, W.
    pub offered_w: f64,
    /// The same in the standard air of sea level, W.
    pub at_sea_level_w: f64,
    /// Shaft power the propeller takes at the flight point's airspeed, W.
    pub taken_w: f64,
}

/// Offer and demand at `count` rpm over the engine's range, at a flight point's air, airspeed and blade
/// setting (at rest where it has no airspeed); empty without an engine or such a point.
#[must_use]
pub fn offer(rig: &Rig, index: usize, count: u32) -> Vec<Offer> {
    let (Some(shaft), Some(met)) = (&rig.shaft, looked_at(rig, index)) else { return Vec::new() };
    let Ok(sea_level) = Air::standard(0.0, 0.0) else { return Vec::new() };
    let air = met.air;
    let (low, high) = shaft.rpm_range();
    let last = count.max(2) - 1;
    let at = |rpm: f64| {
        let here = Condition { rotation_rad_s: rotation_rad_s(rpm), ..met };
        Offer {
            propeller_rpm: rpm,
            engine_rpm: rpm * shaft.gear_ratio(),
            offered_w: shaft.power_w(rpm, &air, 1.0),
            at_sea_level_w: shaft.power_w(rpm, &sea_level, 1.0),
            taken_w: power_w(&rig.rotor.loads(&here), &here),
        }
    };
    (0..=last).map(|i| at(low + (high - low) * f64::from(i) / f64::from(last))).collect()
}

/// The airspeed, air and blade setting of a flight point; at rest where it has no airspeed and no answer.
fn looked_at(rig: &Rig, index: usize) -> Option<Condition> {
    let point = rig.job.flight_points.get(index)?;
    let air = air_of(point).ok()?;
    Some(condition(rig, point, air).unwrap_or_else(|_| rig.unsolved(air, point.airspeed_m_s.unwrap_or(0.0))))
}

/// Every rpm at which offer and demand agree there; see [`crossings()`].
#[must_use]
pub fn offer_crossings(rig: &Rig, index: usize) -> Vec<Crossing> {
    looked_at(rig, index).map_or_else(Vec::new, |at| crossings(rig, &at))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{DEMOS, Job};

    #[test]
    fn offer_and_demand_cross_where_the_full_throttle_point_is_met() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        let rig = Rig::new(&job).unwrap();
        let rpm = rig.point(1).unwrap().rpm.unwrap();
        let curve = offer(&rig, 1, 200);
        let crossing =
            curve.windows(2).find(|w| w[0].taken_w < w[0].offered_w && w[1].taken_w >= w[1].offered_w);
        let crossing = crossing.unwrap();
        assert!((crossing[0].engine_rpm..=crossing[1].engine_rpm).contains(&rpm), "{rpm}");
        assert!(offer(&rig, 99, 10).is_empty());
    }
}
