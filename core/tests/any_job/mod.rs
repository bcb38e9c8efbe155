//! Any valid job.

use proptest::prelude::*;
use spokeshave::job::{DEMOS, FlightPoint, Job, PitchControl, Setting, Station, TipLoss, most_governed_rpm};
use spokeshave::section::library;

/// How many random jobs a property is tried on: few each time, `SPOKESHAVE_CASES` times as many where that is
/// set.
pub(crate) fn cases(few: u32) -> ProptestConfig {
    let times = std::env::var("SPOKESHAVE_CASES").ok().and_then(|n| n.parse().ok()).unwrap_or(1);
    ProptestConfig::with_cases(few * times)
}

/// Stations at rising radii with any chord, angle, thickness and shipped section.
fn stations() -> impl Strategy<Value = Vec<Station>> {
    let names: Vec<String> = library().names().map(String::from).collect();
    let one = (0.01..1.0f64, 0.01..0.4f64, -90.0..90.0f64, 0.01..0.6f64, prop::sample::select(names));
    prop::collection::vec(one, 2..14).prop_map(|rows| {
        let total: f64 = rows.iter().map(|r| r.0).sum();
        let mut x = 0.0;
        rows.into_iter()
            .map(|(step, chord, angle, thickness_ratio, section)| {
                x += step / total;
                let angle_deg = Some(angle);
                Station {
                    radius_fraction: x.min(1.0),
                    chord_m: chord,
                    angle_deg,
                    pitch_m: None,
                    thickness_ratio,
                    section,
                }
            })
            .collect()
    })
}

fn settings() -> impl Strategy<Value = Setting> {
    prop_oneof![
        (1.0..20_000.0f64).prop_map(|rpm| Setting::Rpm { rpm }),
        (1.0..200_000.0f64).prop_map(|power_w| Setting::Power { power_w }),
        (0.01..1.0f64).prop_map(|fraction| Setting::Throttle { fraction }),
        Just(Setting::FullThrottle {}),
        Just(Setting::Level {}),
    ]
}

fn pitch_controls() -> impl Strategy<Value = PitchControl> {
    prop_oneof![
        Just(PitchControl::Fixed {}),
        (-40.0..40.0f64).prop_map(|turn_deg| PitchControl::GroundAdjustable { turn_deg }),
        (500.0..5_000.0f64, -20.0..5.0f64, 5.0..40.0f64).prop_map(|(rpm, turn_min_deg, turn_max_deg)| {
            PitchControl::ConstantSpeed { rpm, turn_min_deg, turn_max_deg }
        }),
    ]
}

prop_compose! {
    /// Any valid job made of a demo.
    pub fn jobs()(
        demo in 0usize..3, stations in stations(), setting in settings(), pitch_control in pitch_controls(),
        airspeed in 0.0..340.0f64, altitude_m in -1000.0..20_000.0f64, isa_offset_k in -60.0..60.0f64,
        blades in 1u32..=12, hub in 0.0..0.9f64, compressibility: bool, stall_delay: bool, hub_loss: bool, exact: bool,
    ) -> Job {
        let mut job = Job::from_json(DEMOS[demo].json).expect("a valid demo");
        job.propeller.stations = stations;
        job.propeller.blades = blades;
        job.propeller.diameter_m = job.propeller.diameter_m.max(0.5);
        job.propeller.hub_diameter_m = hub * job.propeller.diameter_m;
        job.propeller.pitch_control = pitch_control;
        if let (PitchControl::ConstantSpeed { rpm, .. }, Some(most)) =
            (&mut job.propeller.pitch_control, most_governed_rpm(job.engine.as_ref()))
        {
            *rpm = rpm.min(most);
        }
        (job.method.compressibility, job.method.stall_delay, job.method.hub_loss) = (compressibility, stall_delay, hub_loss);
        job.method.tip_loss = if exact { TipLoss::Goldstein } else { TipLoss::Prandtl };
        let top = FlightPoint { name: "top".into(), altitude_m, isa_offset_k, airspeed_m_s: None, setting: Setting::FullThrottle {} };
        let asked = FlightPoint { name: "asked".into(), airspeed_m_s: Some(airspeed), setting, ..top.clone() };
        job.flight_points = vec![asked, top];
        job
    }
}
