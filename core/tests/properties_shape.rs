//! What must hold of shaping for any valid job: an answer in finite figures within its limits, or a refusal
//! in words.

use std::ops::ControlFlow;

use crate::any_job::{cases, jobs};
use proptest::prelude::*;
use serde_json::Value;
use spokeshave::job::Limits;
use spokeshave::result::Tolerance;
use spokeshave::rig::Rig;
use spokeshave::shape::{PitchBy, TwistBy, Wish, error_costs, pitch_diameter, search, twist_by};

/// Every number in a document; JSON has none that is not finite, and serde writes those as null.
fn plain(value: &impl serde::Serialize) -> Value {
    serde_json::to_value(value).expect("plain data")
}

proptest! {
    #![proptest_config(cases(7))]

    #[test]
    fn what_errors_cost_is_finite_and_its_bands_hold_one_another(job in jobs(), angle_deg in 0.0..2.0f64) {
        let rig = Rig::new(&job).unwrap();
        let tolerance = Tolerance { angle_deg, chord_mm: 0.5, thickness_mm: 0.3, lift_percent: 3.0, drag_percent: 10.0 };
        match error_costs(&rig, tolerance) {
            Ok(costs) => {
                for c in &costs.costs {
                    let slopes = c.per_degree.iter().chain(&c.per_mm_chord).chain(&c.per_mm_thickness);
                    prop_assert!(slopes.flatten().all(|s| s.is_finite()), "{:?}", c);
                    prop_assert_eq!(c.per_degree.len(), job.propeller.stations.len());
                    prop_assert!(c.band_worst.is_finite() && c.band_polars.is_finite());
                    prop_assert!(c.band_worst >= c.band_independent * (1.0 - 1e-12));
                }
            }
            Err(e) => prop_assert!(!e.to_string().contains("NaN"), "{}", e),
        }
    }

    #[test]
    fn a_chart_has_a_cell_for_every_blade_that_may_be(job in jobs(), share in 0.01..0.5f64) {
        let rig = Rig::new(&job).unwrap();
        let (pitch, diameter) = (rig.rotor.blade.pitch_075_m(0.0), job.propeller.diameter_m);
        let around = |middle: f64| [middle * (1.0 - share), middle, middle * (1.0 + share)];
        let limits = Limits { tip_mach_most: Some(0.5), standing_rpm_least: Some(1000.0), ..Limits::default() };
        for by in [PitchBy::Scale, PitchBy::Turn] {
            let chart = pitch_diameter(&rig, 0, &around(pitch), &around(diameter), by, &limits).unwrap();
            prop_assert_eq!(chart.cells.dim(), (3, 3));
            for cell in chart.cells.iter().flatten() {
                let b = &cell.figures;
                let figures = [b.rpm, b.thrust_n, b.power_w, b.efficiency, b.tip_mach, b.endurance_s];
                prop_assert!(figures.iter().flatten().all(|f| f.is_finite()), "{:?}", b);
            }
            prop_assert!(plain(&chart)["cells"].is_array());
        }
    }

    #[test]
    fn a_search_ends_in_a_valid_blade_within_limits_or_in_words(job in jobs(), most_mach in 0.3..1.2f64) {
        let rig = Rig::new(&job).unwrap();
        let mut wish = Wish { most_trials: 25, ..Wish::of(&rig) };
        wish.limits.tip_mach_most = Some(most_mach);
        match search(&rig, &wish, &mut |_| ControlFlow::Continue(())) {
            Ok(shaped) => {
                prop_assert_eq!(shaped.job.check(), vec![]);
                prop_assert!(shaped.result.gain.is_finite() && shaped.result.trials <= 25);
                prop_assert!(shaped.result.margins.iter().all(|m| m.share > -1e-4), "{:?}", shaped.result.margins);
            }
            Err(e) => prop_assert!(!e.to_string().contains("NaN") && !e.to_string().contains("inf"), "{}", e),
        }
    }

    #[test]
    fn a_twist_by_loss_is_valid_or_refused_in_words(job in jobs(), weight in 0.0..2.0f64) {
        match twist_by(&Rig::new(&job).unwrap(), &[1.0, weight], TwistBy::Loss) {
            Ok(shaped) => prop_assert_eq!(shaped.job.check(), vec![]),
            Err(e) => prop_assert!(!e.to_string().contains("NaN"), "{}", e),
        }
    }
}
