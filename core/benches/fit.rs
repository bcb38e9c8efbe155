//! What matching costs: one flight point, the line of the map, the whole speed range, a map over speed and
//! height.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use spokeshave::fit;
use spokeshave::job::{DEMOS, FlightPoint, Job, Setting};
use spokeshave::rig::{Rig, air_of};

fn rig() -> Rig {
    Rig::new(&Job::from_json(DEMOS[0].json).expect("a valid demo")).expect("a valid demo")
}

fn point(airspeed_m_s: Option<f64>, setting: Setting) -> FlightPoint {
    FlightPoint { name: "here".into(), altitude_m: 0.0, isa_offset_k: 0.0, airspeed_m_s, setting }
}

fn flight_points(c: &mut Criterion) {
    let rig = rig();
    let settings = [
        ("full throttle at 30 m/s", point(Some(30.0), Setting::FullThrottle {})),
        ("level flight at 45 m/s", point(Some(45.0), Setting::Level {})),
        ("a power of 25 kW at 40 m/s", point(Some(40.0), Setting::Power { power_w: 25_000.0 })),
        ("top speed", point(None, Setting::FullThrottle {})),
    ];
    for (name, point) in &settings {
        let air = air_of(point).expect("a standard air");
        c.bench_function(name, |b| b.iter(|| fit::condition(&rig, black_box(point), air)));
    }
}

fn line(c: &mut Criterion) {
    let rig = rig();
    let at = rig.condition(2).expect("cruise has an answer");
    c.bench_function("full-throttle line of the map, 60 speeds", |b| {
        b.iter(|| fit::line(&rig, black_box(&at), 60));
    });
}

fn ranges(c: &mut Criterion) {
    let rig = rig();
    let point = point(None, Setting::FullThrottle {});
    c.bench_function("envelope, 60 speeds, departures at 4 radii", |b| {
        b.iter(|| fit::envelope(&rig, black_box(&point), 60, &[0.35, 0.5, 0.75, 0.9]));
    });
    for speeds in [15, 30, 120] {
        c.bench_function(&format!("growth: envelope, {speeds} speeds"), |b| {
            b.iter(|| fit::envelope(&rig, black_box(&point), speeds, &[0.35, 0.5, 0.75, 0.9]));
        });
    }
    let speeds: Vec<f64> = (0..40).map(|i| 1.5 * f64::from(i)).collect();
    let heights: Vec<f64> = (0..40).map(|i| 100.0 * f64::from(i)).collect();
    let mut group = c.benchmark_group("maps");
    group.sample_size(10);
    group.bench_function("matched points, 40 heights x 40 speeds", |b| {
        b.iter(|| fit::matched(&rig, black_box(&heights), &speeds, 0.0));
    });
}

criterion_group!(benches, flight_points, line, ranges);
criterion_main!(benches);
