//! The speed range of a fit as rows.

use spokeshave::result::{EnvelopePoint, FullThrottle, Level};

use crate::table::{csv_figure, word};

pub(super) const CSV: [&str; 23] = [
    "airspeed_m_s",
    "asked_n",
    "full_state",
    "full_rpm",
    "full_held_at_limit",
    "full_turn_deg",
    "full_thrust_n",
    "full_power_w",
    "full_efficiency",
    "full_tip_mach",
    "full_rate_of_climb_m_s",
    "full_climb_angle_deg",
    "level_state",
    "level_rpm",
    "level_turn_deg",
    "level_power_w",
    "level_power_share",
    "level_efficiency",
    "level_tip_mach",
    "level_fuel_kg_per_h",
    "level_battery_current_a",
    "level_endurance_s",
    "level_range_m",
];

pub(super) fn csv_row(p: &EnvelopePoint) -> Vec<String> {
    let full = |of: fn(&FullThrottle) -> Option<f64>| csv_figure(p.full.as_ref().and_then(of));
    let level = |of: fn(&Level) -> Option<f64>| csv_figure(p.level.as_ref().and_then(of));
    vec![
        csv_figure(Some(p.airspeed_m_s)),
        csv_figure(p.asked_n),
        word(&p.full_state),
        full(|f| Some(f.rpm)),
        p.full.as_ref().map_or_else(String::new, |f| f.held_at_limit.to_string()),
        full(|f| Some(f.turn_deg)),
        full(|f| Some(f.thrust_n)),
        full(|f| Some(f.power_w)),
        full(|f| f.efficiency),
        full(|f| Some(f.tip_mach)),
        full(|f| f.rate_of_climb_m_s),
        full(|f| f.climb_angle_deg),
        word(&p.level_state),
        level(|l| Some(l.rpm)),
        level(|l| Some(l.turn_deg)),
        level(|l| Some(l.power_w)),
        level(|l| l.power_share),
        level(|l| l.efficiency),
        level(|l| Some(l.tip_mach)),
        level(|l| l.fuel_kg_per_h),
        level(|l| l.battery_current_a),
        level(|l| l.endurance_s),
        level(|l| l.range_m),
    ]
}
