//! Weight and balance.

use super::BladeBeam;
use super::beam::{first_moment, second_moment, total};
use crate::result::Mass;

/// Mass, centre of gravity, static moment and inertia of the blades, from the edge of the hub to the tip.
#[must_use]
pub fn mass(beam: &BladeBeam) -> Mass {
    let (r, m) = (&beam.radii_m, &beam.mass_kg_m);
    let blades = f64::from(beam.blades);
    let blade_kg = total(r, m);
    let static_moment_kg_m = first_moment(r, m);
    let blade_inertia_kg_m2 = second_moment(r, m);
    Mass {
        blade_kg,
        blades_kg: blades * blade_kg,
        centre_m: static_moment_kg_m / blade_kg,
        static_moment_kg_m,
        blade_inertia_kg_m2,
        inertia_kg_m2: blades * blade_inertia_kg_m2,
        volume_m3: blade_kg / beam.material.density_kg_m3,
    }
}
