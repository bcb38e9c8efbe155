//! What must hold of the fit for any valid job: no panic, every figure finite, no jump but where a limit or a
//! stop is met.

use crate::any_job::{cases, jobs};
use proptest::prelude::*;
use serde_json::Value;
use spokeshave::fit::{envelope, pitch_worth};
use spokeshave::job::{Aircraft, DEMOS, FlightPoint, Job, PitchControl, Setting};
use spokeshave::result::{Envelope, FullThrottle};
use spokeshave::rig::Rig;

fn full() -> FlightPoint {
    FlightPoint {
        name: "here".into(),
        altitude_m: 0.0,
        isa_offset_k: 0.0,
        airspeed_m_s: None,
        setting: Setting::FullThrottle {},
    }
}

/// JSON writes what is not finite as null; figures that must be there are then missing.
fn without_figure(value: &Value) -> Vec<String> {
    const MUST: [&str; 9] = [
        "airspeed_m_s",
        "rpm",
        "thrust_n",
        "power_w",
        "tip_mach",
        "turn_deg",
        "value",
        "ground_roll_m",
        "distance_to_15_m",
    ];
    match value {
        Value::Object(fields) => fields
            .iter()
            .flat_map(|(k, v)| {
                if v.is_null() && MUST.contains(&k.as_str()) { vec![k.clone()] } else { without_figure(v) }
            })
            .collect(),
        Value::Array(all) => all.iter().flat_map(without_figure).collect(),
        _ => Vec::new(),
    }
}

proptest! {
    #![proptest_config(cases(10))]

    #[test]
    fn any_valid_job_has_a_fit_without_panic_or_a_figure_that_is_not_finite(job in jobs()) {
        let rig = Rig::new(&job).unwrap();
        for worth in rig.pitch_worth() {
            prop_assert!(worth.gain.is_none_or(|g| g.is_finite() && g >= 0.0), "{:?}", worth);
            prop_assert_eq!(worth.best.is_some(), worth.turn_deg.is_some());
        }
        for index in 0..2 {
            let Some(fit) = rig.fit(index, 9) else { continue };
            let told = serde_json::to_value(&fit).unwrap();
            prop_assert_eq!(without_figure(&told), Vec::<String>::new());
            let dive = fit.envelope.marks.closed_throttle_dive;
            prop_assert!(dive.is_none_or(|d| d.airspeed_m_s >= 0.0 && d.rpm > 0.0));
            if let Some(t) = fit.take_off {
                prop_assert!(t.ground_roll_m > 0.0 && t.distance_to_15_m > t.ground_roll_m);
            }
        }
    }
}

prop_compose! {
    /// A demo changed as a person would change it.
    fn likely_jobs()(
        demo in 0usize..3, turn in -6.0..8.0f64, governed: bool, chord in 0.6..1.6f64, diameter in 0.8..1.15f64,
        mass in 0.7..1.3f64, friction in 0.0..0.12f64, blockage in 0.0..0.15f64,
    ) -> Job {
        let mut job = Job::from_json(DEMOS[demo].json).expect("a valid demo");
        job.propeller.diameter_m *= diameter;
        job.propeller.blockage = Some(blockage);
        job.propeller.stations.iter_mut().for_each(|s| s.chord_m *= chord);
        job.propeller.pitch_control = if governed && demo == 0 {
            PitchControl::ConstantSpeed { rpm: 2700.0, turn_min_deg: -6.0, turn_max_deg: turn.max(-5.0) }
        } else {
            PitchControl::GroundAdjustable { turn_deg: turn }
        };
        match &mut job.aircraft {
            Some(Aircraft::Aeroplane(a)) => (a.mass_kg, a.rolling_friction) = (a.mass_kg * mass, Some(friction)),
            Some(Aircraft::Multirotor(m)) => m.mass_kg *= mass,
            None => {}
        }
        job
    }
}

/// Steps of a curve that stand out from the two before and the two after; a bend, as where a limit is met,
/// does not. Where the curve has a gap, as at speeds where the engine cannot turn the propeller, each side
/// counts by itself.
fn jumps(name: &str, curve: &[Option<f64>]) -> Vec<String> {
    let most = curve.iter().flatten().fold(0.0_f64, |m, v| m.max(v.abs()));
    curve.split(Option::is_none).flat_map(|part| jumps_of_part(name, part, most)).collect()
}

fn jumps_of_part(name: &str, part: &[Option<f64>], most: f64) -> Vec<String> {
    let curve: Vec<f64> = part.iter().flatten().copied().collect();
    let steps: Vec<f64> = curve.windows(2).map(|w| (w[1] - w[0]).abs()).collect();
    let out = steps.windows(5).enumerate().filter(|(_, s)| {
        let beside = s[0].max(s[1]).max(s[3]).max(s[4]);
        s[2] > 4.0 * beside + 0.005 * most
    });
    out.map(|(i, s)| format!("{name}: a step of {} at {} of {most}", s[2], curve[i + 2])).collect()
}

fn curve(range: &Envelope, of: fn(&FullThrottle) -> Option<f64>) -> Vec<Option<f64>> {
    range.points.iter().map(|p| p.full.as_ref().and_then(of)).collect()
}

proptest! {
    #![proptest_config(cases(32))]

    #[test]
    fn no_curve_of_a_likely_job_jumps(job in likely_jobs()) {
        prop_assert_eq!(job.check(), vec![]);
        let Some(range) = envelope(&Rig::new(&job).unwrap(), &full(), 160, &[]) else { return Ok(()) };
        let mut found = jumps("thrust", &curve(&range, |f| Some(f.thrust_n)));
        found.extend(jumps("rpm", &curve(&range, |f| Some(f.rpm))));
        found.extend(jumps("turn", &curve(&range, |f| Some(f.turn_deg))));
        // Below a fifth of the range induced drag runs off to infinity.
        found.extend(jumps("climb", &curve(&range, |f| f.rate_of_climb_m_s)[32..]));
        prop_assert_eq!(found, Vec::<String>::new());
    }

    #[test]
    fn a_better_pitch_is_never_worse(job in likely_jobs()) {
        let rig = Rig::new(&job).unwrap();
        for worth in job.flight_points.iter().filter_map(|p| pitch_worth(&rig, p)) {
            prop_assert!(worth.gain.is_none_or(|g| g.is_finite() && g >= 0.0), "{:?}", worth);
        }
    }
}
