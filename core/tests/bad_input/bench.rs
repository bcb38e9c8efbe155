//! Wood, hub, boss and how the blade is made.

use serde_json::json;
use spokeshave::job::{Flange, Job};

use super::{demo, refusal, refused};

#[test]
fn each_wrong_value_of_the_bench_is_named_by_its_path() {
    refused(&[
        ("/bench", json!({"trailing_edge_m": 1}), "bench.trailing_edge_m: 1"),
        ("/bench", json!({"leading_edge_radius_m": -0.001}), "bench.leading_edge_radius_m: -0.001"),
        ("/bench", json!({"stacking_fraction": 1.5}), "bench.stacking_fraction: 1.5"),
        ("/bench", json!({"tip_length_m": 2}), "bench.tip_length_m: 2"),
        ("/bench", json!({"blank_thickness_m": 0}), "bench.blank_thickness_m: 0"),
        ("/bench", json!({"blank_width_m": "wide"}), "bench.blank_width_m: invalid type"),
        ("/bench", json!({"allowance_m": -1}), "bench.allowance_m: -1"),
        ("/bench", json!({"fan_step_deg": 90}), "bench.fan_step_deg: 90"),
        ("/bench", json!({"flange": "sae-9"}), "bench.flange: `sae-9`; allowed is one of `sae-1`"),
        ("/bench", json!({"paper": "a4"}), "bench.paper: unknown field"),
        (
            "/bench",
            json!({"stacking_line": [{"radius_fraction": 0.5}, {"radius_fraction": 0.5}]}),
            "bench.stacking_line[1].radius_fraction: 0.5; allowed is above 0.5",
        ),
        (
            "/bench",
            json!({"stacking_line": [{"radius_fraction": 0.5, "rake_m": 9}]}),
            "bench.stacking_line[0].rake_m: 9",
        ),
    ]);
}

#[test]
fn a_flange_is_written_with_a_hyphen_and_read_without_as_well() {
    for (written, flange) in
        [("sae-1", Flange::Sae1), ("sae1", Flange::Sae1), ("sae-2", Flange::Sae2), ("sae2", Flange::Sae2)]
    {
        let mut document = demo();
        document["bench"] = json!({ "flange": written });
        let job = Job::from_json(&document.to_string()).unwrap();
        assert_eq!(job.bench.as_ref().unwrap().flange, Some(flange), "{written}");
        let hyphened = format!("\"flange\": \"sae-{}\"", &written[written.len() - 1..]);
        assert!(job.to_json().contains(&hyphened), "{written}");
    }
}

#[test]
fn wrong_materials_and_hubs_are_named() {
    let own = |key: &str, value: f64| {
        let mut species =
            json!({"name": "own", "density_kg_m3": 700, "modulus_pa": 1.2e10, "bending_strength_pa": 1e8});
        species[key] = json!(value);
        json!({"species": species})
    };
    let hub = |key: &str, value: f64| {
        let mut hub = json!({"thickness_m": 0.1, "flange_diameter_m": 0.15, "bolt_circle_m": 0.1, "bolt_diameter_m": 0.008});
        hub[key] = json!(value);
        json!({"species": "white ash", "hub": hub})
    };
    let cases = [
        (own("density_kg_m3", 0.0), "wood.species.density_kg_m3: 0"),
        (own("modulus_pa", -1.0), "wood.species.modulus_pa: -1"),
        (own("bending_strength_pa", 1.0), "wood.species.bending_strength_pa: 1"),
        (own("compression_strength_pa", 1.0), "wood.species.compression_strength_pa: 1"),
        (own("shear_strength_pa", 1.0), "wood.species.shear_strength_pa: 1"),
        (own("crushing_strength_pa", 1.0), "wood.species.crushing_strength_pa: 1"),
        (own("shear_modulus_pa", 1.0), "wood.species.shear_modulus_pa: 1"),
        (own("scatter", 0.9), "wood.species.scatter: 0.9"),
        (own("lasting_share", 0.0), "wood.species.lasting_share: 0"),
        (own("colour", 0.0), "wood.species.colour: unknown field"),
        (hub("thickness_m", 0.0), "wood.hub.thickness_m: 0"),
        (hub("flange_diameter_m", 5.0), "wood.hub.flange_diameter_m: 5"),
        (hub("bore_m", 0.15), "wood.hub.bore_m: 0.15"),
        (hub("bolt_diameter_m", 0.2), "wood.hub.bolt_diameter_m: 0.2"),
        (hub("bolt_circle_m", 0.148), "wood.hub.bolt_circle_m: 0.148; allowed is 0.0160 to 0.1420 m"),
        (hub("bolt_torque_n_m", 0.0), "wood.hub.bolt_torque_n_m: 0"),
    ];
    for (wood, expected) in cases {
        let message = refusal("/wood", wood);
        assert!(message.contains(expected), "{message:?} has no {expected:?}");
    }
    let mut bolts = hub("bore_m", 0.02);
    bolts["hub"]["bolts"] = json!(0);
    assert!(refusal("/wood", bolts).contains("wood.hub.bolts: 0"));
}
