//! Will the blade hold: names are those of the JSON.

use serde::Serialize;

/// Weight and balance of the blades, from the edge of the hub to the tip.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Mass {
    /// Mass of one blade, kg.
    pub blade_kg: f64,
    /// Mass of all blades, kg; the boss is not in it.
    pub blades_kg: f64,
    /// Distance of a blade's centre of gravity from the axis, m.
    pub centre_m: f64,
    /// Static moment of one blade about the axis, kg m: blades balance where theirs are the same.
    pub static_moment_kg_m: f64,
    /// Moment of inertia of one blade about the axis, kg m².
    pub blade_inertia_kg_m2: f64,
    /// Moment of inertia of all blades about the axis, kg m².
    pub inertia_kg_m2: f64,
    /// Volume of one blade, m³.
    pub volume_m3: f64,
}
