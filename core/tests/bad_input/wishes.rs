//! Limits and aims of the search.

use serde_json::json;

use super::refused;

#[test]
fn wrong_wishes_are_named_by_their_path() {
    refused(&[
        ("/wishes", json!({"colour": 1}), "wishes.colour: unknown field"),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Cruise"}]}),
            "wishes.aims[0]: the key `figure` is missing",
        ),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Moon", "figure": "power_w"}]}),
            "wishes.aims[0].flight_point: \"Moon\"; allowed is a flight point: Standing start",
        ),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Cruise", "figure": "beauty"}]}),
            "wishes.aims[0].figure: `beauty`; allowed is one of `",
        ),
        (
            "/wishes",
            json!({"aims": [{"flight_point": "Cruise", "figure": "power_w", "weight": 0}]}),
            "wishes.aims[0].weight: 0",
        ),
        ("/wishes", json!({"held": ["hope"]}), "wishes.held[0]: `hope`; allowed is one of `"),
        ("/wishes", json!({"limits": {"tip_mach_most": 0}}), "wishes.limits.tip_mach_most: 0"),
        ("/wishes", json!({"limits": {"rpm_most": -1}}), "wishes.limits.rpm_most: -1"),
        ("/wishes", json!({"limits": {"stress_margin_least": -1}}), "wishes.limits.stress_margin_least: -1"),
        ("/wishes", json!({"limits": {"diameter_most_m": 0}}), "wishes.limits.diameter_most_m: 0"),
        ("/wishes", json!({"limits": {"ground_clearance_m": 0.2}}), "wishes.limits.ground_clearance_m: 0.2"),
        (
            "/wishes",
            json!({"limits": {"shaft_height_m": 0.9, "ground_clearance_m": 1}}),
            "wishes.limits.ground_clearance_m: 1",
        ),
        (
            "/wishes",
            json!({"limits": {"rpm": [{"flight_point": "Cruise", "least": 2500, "most": 2000}]}}),
            "wishes.limits.rpm[0].most: 2000; allowed is 2500",
        ),
    ]);
}
