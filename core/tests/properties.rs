//! What must hold for any valid job: no panic, every figure finite, and the laws that no propeller escapes.

use crate::any_job::{cases, jobs};
use proptest::prelude::*;
use serde_json::Value;
use spokeshave::fit::Along;
use spokeshave::job::{AngleReference, DEMOS, Job, Setting};
use spokeshave::rig::Rig;
use spokeshave::rotor::Condition;
use spokeshave::shape::{Lift, LossTask, least_loss, twist};

/// Every null of an answered flight point that is not one of those that may be.
fn unexpected_nulls(point: &Value) -> Vec<String> {
    const MAY: [&str; 16] = [
        "efficiency",
        "ideal_efficiency",
        "figure_of_merit",
        "slip",
        "ct_over_cq",
        "angle_of_attack_075_deg",
        "engine_rpm",
        "available_power_w",
        "power_share",
        "asked_n",
        "rate_of_climb_m_s",
        "fuel_kg_per_h",
        "motor_current_a",
        "battery_current_a",
        "battery_voltage_v",
        "duty",
    ];
    let fields = point.as_object().into_iter().flatten();
    fields.filter(|(k, v)| v.is_null() && !MAY.contains(&k.as_str())).map(|(k, _)| k.clone()).collect()
}

proptest! {
    #![proptest_config(cases(40))]

    #[test]
    fn any_valid_job_is_shaped_or_refused_in_words(job in jobs(), cl in prop::option::of(0.1..1.5f64), weight in 0.0..2.0f64) {
        let rig = Rig::new(&job).unwrap();
        match twist(&rig, &[1.0, weight]) {
            Ok(shaped) => {
                prop_assert_eq!(shaped.job.check(), vec![]);
                prop_assert!(shaped.result.stations.iter().all(|s| s.angle_deg.is_finite()));
            }
            Err(e) => prop_assert!(!e.to_string().contains("NaN"), "{}", e),
        }
        match least_loss(&rig, &LossTask { lift: cl.map_or(Lift::default(), Lift::Coefficient), ..LossTask::default() }) {
            Ok(shaped) => {
                prop_assert_eq!(shaped.job.check(), vec![]);
                prop_assert!(shaped.result.thrust_n.is_finite() && shaped.result.efficiency.is_finite());
            }
            Err(e) => prop_assert!(!e.to_string().contains("NaN"), "{}", e),
        }
    }

    #[test]
    fn any_valid_job_is_answered_without_panic_or_a_figure_that_is_not_finite(job in jobs()) {
        prop_assert_eq!(job.check(), vec![]);
        let rig = Rig::new(&job).unwrap();
        let analysis = serde_json::to_value(rig.analysis()).unwrap();
        for point in analysis["flight_points"].as_array().unwrap() {
            if point["state"] == "ok" {
                prop_assert_eq!(unexpected_nulls(point), Vec::<String>::new(), "{}", point["name"]);
                let eta = point["efficiency"].as_f64().unwrap_or(0.0);
                prop_assert!(eta < 1.0, "efficiency {}", eta);
            }
        }
        for index in 0..2 {
            if let Some(map) = rig.map(index, Along::FullThrottle, 7, 5) {
                prop_assert!(map.cells.iter().all(|c| c.departure_deg.is_none_or(f64::is_finite)));
                prop_assert!(map.cells.iter().all(|c| c.share_of_best.is_none_or(f64::is_finite)));
            }
        }
    }

    #[test]
    fn a_job_survives_its_own_file(job in jobs()) {
        prop_assert_eq!(Job::from_json(&job.to_json()).unwrap(), job);
    }

    #[test]
    fn any_text_is_read_or_refused(text in "\\PC*") {
        let _ = Job::from_json(&text);
    }

    #[test]
    fn any_cut_or_changed_job_is_read_or_refused(cut in 0usize..4000, at in 0usize..4000, with in "[0-9a-z{}\\[\\],:\"-]") {
        let text = DEMOS[0].json;
        let cut = text.get(..cut.min(text.len())).unwrap_or(text);
        let _ = Job::from_json(cut);
        let mut changed = text.to_string();
        if changed.is_char_boundary(at) && changed.is_char_boundary(at + 1) && at + 1 < changed.len() {
            changed.replace_range(at..=at, &with);
        }
        if let Ok(job) = Job::from_json(&changed) {
            let _ = Rig::new(&job).unwrap().analysis();
        }
    }
}

fn demo_at(airspeed_m_s: f64, rpm: f64) -> (Rig, Condition) {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    job.flight_points[0].airspeed_m_s = Some(airspeed_m_s);
    job.flight_points[0].setting = Setting::Rpm { rpm };
    let rig = Rig::new(&job).unwrap();
    let at = rig.condition(0).unwrap();
    (rig, at)
}

/// `Ω dQ = dT (V + u) + (dQ/r) v + ρ/2 W³ B c cd dr`: the work put in is the work done on the air and the
/// drag's.
#[test]
fn energy_is_kept_at_every_station() {
    for (v, rpm) in [(0.0, 2600.0), (30.0, 2700.0), (50.0, 2700.0), (75.0, 2700.0), (110.0, 2700.0)] {
        let (rig, at) = demo_at(v, rpm);
        for r in rig.rotor.blade.station_radii_m() {
            let ring = rig.rotor.ring(r);
            let b = rig.rotor.element(&ring, &at).0.balance().unwrap();
            let (thrust, torque) = rig.rotor.grading(&ring, &at, &b);
            let drag =
                0.5 * at.air.density_kg_m3 * b.speed_m_s.powi(3) * 2.0 * ring.cut.chord_m * b.section.cd;
            let work = thrust * (v + b.induced_axial_m_s) + torque / r * b.induced_swirl_m_s + drag;
            let put_in = torque * at.rotation_rad_s;
            assert!((work - put_in).abs() < 1e-9 * (put_in.abs() + drag), "{v} m/s, {r} m: {work} {put_in}");
        }
    }
}

/// R. E. Froude's actuator disc is never beaten, nor a figure of merit of 1 at rest.
#[test]
fn no_propeller_beats_the_actuator_disc() {
    for v in [5.0, 15.0, 30.0, 45.0, 55.0] {
        let figures = demo_at(v, 2700.0).0.point(0).unwrap().figures;
        assert!(figures.efficiency.unwrap() < figures.ideal_efficiency.unwrap(), "{v}");
    }
    let rest = demo_at(0.0, 2700.0).0.point(0).unwrap().figures;
    assert!(rest.figure_of_merit.unwrap() < 1.0 && rest.ideal_efficiency.is_none());
}

#[test]
fn thrust_is_gone_before_power_is() {
    let (rig, at) = demo_at(0.0, 2700.0);
    let curve = rig.curves(0, 40);
    let last = curve.last().unwrap();
    // The curve ends where a root has the thrust gone.
    assert!(last.coefficients.ct.abs() < 1e-9 && last.coefficients.cp > 0.0, "{last:?}");
    assert!(at.airspeed_m_s == 0.0);
}

#[test]
fn more_elements_change_little() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    // The same condition for both: level flight would ask the same thrust of any.
    let at = Rig::new(&job).unwrap().condition(2).unwrap();
    let mut thrust = |elements: u32| {
        job.method.elements = elements;
        Rig::new(&job).unwrap().rotor.loads(&at).thrust_n
    };
    let (coarse, fine) = (thrust(40), thrust(320));
    // 1.6e-5 comes out.
    assert!((coarse / fine - 1.0).abs() < 5e-5, "{coarse} {fine}");
}

/// A protractor on the flat face reads less than the chord line by the section's own angle.
#[test]
fn the_same_blade_by_its_flat_face_gives_the_same_answer() {
    let job = Job::from_json(DEMOS[0].json).unwrap();
    let chord = Rig::new(&job).unwrap();
    let mut by_face = job.clone();
    by_face.propeller.angle_reference = AngleReference::FlatFace;
    for (s, r) in by_face.propeller.stations.iter_mut().zip(chord.rotor.blade.station_radii_m()) {
        let off = chord.rotor.blade.face_to_chord_rad(r).unwrap().to_degrees();
        // The root is half as thick as it is wide: its outline stands 11.5 degrees over its face.
        assert!(off > 0.5 && off < 12.0);
        s.angle_deg = s.angle_deg.map(|a| a - off);
    }
    let (a, b) = (chord.point(2).unwrap(), Rig::new(&by_face).unwrap().point(2).unwrap());
    assert!((a.figures.thrust_n.unwrap() - b.figures.thrust_n.unwrap()).abs() < 1e-6);
}

#[test]
fn pitch_and_angle_say_the_same() {
    let mut job = Job::from_json(DEMOS[0].json).unwrap();
    let before = Rig::new(&job).unwrap().point(0).unwrap();
    let radius = job.propeller.diameter_m / 2.0;
    for s in &mut job.propeller.stations {
        let tan = s.angle_deg.take().unwrap().to_radians().tan();
        s.pitch_m = Some(std::f64::consts::TAU * s.radius_fraction * radius * tan);
    }
    let after = Rig::new(&job).unwrap().point(0).unwrap();
    assert!((before.figures.thrust_n.unwrap() - after.figures.thrust_n.unwrap()).abs() < 1e-6);
}
