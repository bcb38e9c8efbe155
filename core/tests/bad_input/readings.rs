//! Readings of carved blades and of the logbook.

use serde_json::json;

use super::refused;

#[test]
fn each_wrong_reading_is_named_by_its_path_with_its_likely_cause() {
    let cases = [
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 540}]}]}),
            "carved.blades[0].readings[0].radius_m: 540; allowed is above 0, up to the tip, 0.76 m; perhaps it is in mm",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "angle_deg": 160}]}]}),
            "carved.blades[0].readings[0].angle_deg: 160; allowed is -90 to 90 degrees; perhaps read from the other side",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "chord_m": 75}]}]}),
            "carved.blades[0].readings[0].chord_m: 75; allowed is above 0, up to the diameter, 1.52 m; perhaps it is in mm",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "chord_m": 0.01, "thickness_m": 0.08}]}]}),
            "at most the chord, 0.01 m; perhaps chord and thickness are swapped",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5, "angle_deg": "steep"}]}]}),
            "carved.blades[0].readings[0].angle_deg: invalid type",
        ),
        (
            "/carved",
            json!({"blades": [{"readings": [{"radius_m": 0.5}, {"radius_m": 0.4}]}]}),
            "carved.blades[0].readings[1].radius_m: 0.4; allowed is above 0.5",
        ),
        ("/carved", json!({"blades": [{}, {}, {}]}), "carved.blades: 3"),
        ("/carved", json!({"blades": []}), "carved.blades: 0"),
        ("/carved", json!({"blades": [{}], "density_kg_m3": 5}), "carved.density_kg_m3: 5"),
        ("/carved", json!({"blades": [{}], "least_chord_share": 2}), "carved.least_chord_share: 2"),
        ("/carved", json!({"blades": [{}], "least_thickness_share": 0}), "carved.least_thickness_share: 0"),
        ("/logbook", json!({"readings": [{"rpm": 2900}]}), "logbook.readings[0].rpm: unknown field"),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "throttle": 100}]}),
            "logbook.readings[0].throttle: 100; allowed is 0 to 1; perhaps it is in %",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "pressure_pa": 1013}]}),
            "logbook.readings[0].pressure_pa: 1013; allowed is 5000 to 115000 Pa; perhaps it is in hPa",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "pressure_pa": 1e5, "altitude_m": 0}]}),
            "logbook.readings[0].pressure_pa: given beside altitude_m",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "temperature_c": 288}]}),
            "logbook.readings[0].temperature_c: 288; allowed is -45 to 75 °C; perhaps it is in kelvin",
        ),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "temperature_c": 80}]}),
            "allowed is -45 to 75 °C; perhaps it is in degrees Fahrenheit",
        ),
        ("/logbook", json!({"readings": [{"engine_rpm": 0}]}), "logbook.readings[0].engine_rpm: 0"),
        ("/logbook", json!({"readings": [{"engine_rpm": 2900, "level": true}]}), "above 0 in level flight"),
        (
            "/logbook",
            json!({"readings": [{"engine_rpm": 2900, "airspeed_m_s": 400}]}),
            "readings[0].airspeed_m_s: 400",
        ),
        ("/logbook", json!({"widths": {"drag_area": 0}}), "logbook.widths.drag_area: 0"),
        ("/logbook", json!({"factors": {"engine_power": 9}}), "logbook.factors.engine_power: 9"),
        ("/logbook", json!({"use": "yes"}), "logbook.use: invalid type"),
    ];
    refused(&cases);
}
