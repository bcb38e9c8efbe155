//! Checks of how the blade is made.

use super::super::document::{Making, Propeller};
use super::super::found::Found;

const MOST_LINE_POINTS: usize = 200;

pub(super) fn check_making(found: &mut Found, making: &Making, propeller: &Propeller) {
    let at = |name: &str| format!("bench.{name}");
    // A size that is not a number is refused at its own place.
    let d = if propeller.diameter_m > 0.0 { propeller.diameter_m } else { 1.0 };
    found.optional(at("stacking_fraction"), making.stacking_fraction, 0.0..=1.0, "of the chord");
    found.optional(at("trailing_edge_m"), making.trailing_edge_m, 0.0..=0.02 * d, "m");
    found.optional(at("leading_edge_radius_m"), making.leading_edge_radius_m, 0.0..=0.02 * d, "m");
    found.optional(at("tip_length_m"), making.tip_length_m, 0.0..=0.25 * d, "m");
    found.optional(at("blank_thickness_m"), making.blank_thickness_m, 0.001..=d, "m");
    found.optional(at("blank_width_m"), making.blank_width_m, 0.001..=d, "m");
    found.optional(at("allowance_m"), making.allowance_m, 0.0..=0.1 * d, "m");
    found.optional(at("fan_step_deg"), making.fan_step_deg, -15.0..=15.0, "degrees");
    found.count("bench.stacking_line", making.stacking_line.len(), 0..=MOST_LINE_POINTS);
    for (i, point) in making.stacking_line.iter().enumerate() {
        let at = |name: &str| format!("bench.stacking_line[{i}].{name}");
        found.range(at("radius_fraction"), point.radius_fraction, 0.0..=1.0, "of the tip radius");
        found.range(at("sweep_m"), point.sweep_m, -0.5 * d..=0.5 * d, "m");
        found.range(at("rake_m"), point.rake_m, -0.5 * d..=0.5 * d, "m");
        if i > 0 && point.radius_fraction - making.stacking_line[i - 1].radius_fraction < 1e-9 {
            let before = making.stacking_line[i - 1].radius_fraction;
            found.refuse(
                at("radius_fraction"),
                point.radius_fraction,
                format!("above {before}, the point before"),
            );
        }
    }
}
