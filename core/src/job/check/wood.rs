//! Checks of what the blade is made of and how it is held.

use super::text;
use crate::job::document::{Hub, OwnMaterial, Propeller, Species, Wood};
use crate::job::found::Found;

/// Stresses and moduli a material may have, Pa.
const STRENGTH_PA: std::ops::RangeInclusive<f64> = 1e5..=5e9;
const MODULUS_PA: std::ops::RangeInclusive<f64> = 1e7..=1e12;

pub(super) fn check_wood(found: &mut Found, wood: &Wood, propeller: &Propeller) {
    let at = |name: &str| format!("wood.{name}");
    match &wood.species {
        Species::Named(name) => text(found, "wood.species", name, 1),
        Species::Own(own) => check_own(found, own),
    }
    found.optional(at("laminations"), wood.laminations.map(f64::from), 1.0..=60.0, "");
    found.range(at("moisture_percent"), wood.moisture_percent, 4.0..=60.0, "percent");
    found.range(at("safety_factor"), wood.safety_factor, 1.0..=20.0, "");
    found.range(at("overspeed"), wood.overspeed, 1.0..=2.0, "times the highest rpm");
    found.range(at("rake_deg"), wood.rake_deg, -15.0..=15.0, "degrees");
    found.optional(at("limits.tension_pa"), wood.limits.tension_pa, STRENGTH_PA, "Pa");
    found.optional(at("limits.compression_pa"), wood.limits.compression_pa, STRENGTH_PA, "Pa");
    found.optional(at("limits.shear_pa"), wood.limits.shear_pa, STRENGTH_PA, "Pa");
    if let Some(hub) = &wood.hub {
        check_hub(found, hub, propeller.diameter_m);
    }
}

fn check_own(found: &mut Found, own: &OwnMaterial) {
    let at = |name: &str| format!("wood.species.{name}");
    text(found, &at("name"), &own.name, 1);
    found.range(at("density_kg_m3"), own.density_kg_m3, 20.0..=20_000.0, "kg/m³");
    found.range(at("modulus_pa"), own.modulus_pa, MODULUS_PA, "Pa");
    found.range(at("bending_strength_pa"), own.bending_strength_pa, STRENGTH_PA, "Pa");
    found.optional(at("compression_strength_pa"), own.compression_strength_pa, STRENGTH_PA, "Pa");
    found.optional(at("shear_strength_pa"), own.shear_strength_pa, STRENGTH_PA, "Pa");
    found.optional(at("crushing_strength_pa"), own.crushing_strength_pa, STRENGTH_PA, "Pa");
    found.optional(at("shear_modulus_pa"), own.shear_modulus_pa, MODULUS_PA, "Pa");
    found.optional(at("scatter"), own.scatter, 0.0..=0.5, "");
    found.optional(at("lasting_share"), own.lasting_share, 0.05..=1.0, "");
}

/// Holes lie inside the plates and do not run into one another.
fn check_hub(found: &mut Found, hub: &Hub, diameter_m: f64) {
    let at = |name: &str| format!("wood.hub.{name}");
    let most = if diameter_m.is_finite() { 0.5 * diameter_m.max(0.0) } else { f64::MAX };
    found.range(at("thickness_m"), hub.thickness_m, 0.001..=1.0, "m");
    found.range(at("flange_diameter_m"), hub.flange_diameter_m, 0.002..=most, "m");
    found.range(at("bolts"), f64::from(hub.bolts), 1.0..=24.0, "");
    found.range(at("bolt_diameter_m"), hub.bolt_diameter_m, 0.001..=0.05, "m");
    found.range(at("bore_m"), hub.bore_m, 0.0..=0.9 * hub.flange_diameter_m.max(0.0), "m");
    found.optional(at("bolt_torque_n_m"), hub.bolt_torque_n_m, 0.01..=1_000.0, "N m");
    if !found.0.is_empty() {
        return;
    }
    let least = (hub.bore_m + hub.bolt_diameter_m).max(apart_m(hub));
    let largest = hub.flange_diameter_m - hub.bolt_diameter_m;
    if !(least..=largest).contains(&hub.bolt_circle_m) {
        let allowed = format!(
            "{least:.4} to {largest:.4} m, so that {} bolts clear one another, the bore and the plates' edge",
            hub.bolts
        );
        found.refuse(at("bolt_circle_m"), hub.bolt_circle_m, allowed);
        if least <= largest {
            found.within(least, largest);
        }
    }
}

/// The bolt circle on which neighbouring bolts touch, m.
fn apart_m(hub: &Hub) -> f64 {
    if hub.bolts < 2 {
        0.0
    } else {
        hub.bolt_diameter_m / (std::f64::consts::PI / f64::from(hub.bolts)).sin()
    }
}
