//! What shaping costs: a twist, a chart over pitch and diameter, a search.

use std::hint::black_box;
use std::ops::ControlFlow;

use criterion::{Criterion, criterion_group, criterion_main};
use spokeshave::job::{DEMOS, Job, Limits};
use spokeshave::rig::Rig;
use spokeshave::shape::{PitchBy, Wish, pitch_diameter, search, twist};

fn demo(index: usize) -> Rig {
    Rig::new(&Job::from_json(DEMOS[index].json).expect("a valid demo")).expect("a valid demo")
}

/// Equal steps of so much either way.
fn around(middle: f64, share: f64) -> Vec<f64> {
    (0..40).map(|i| middle * (1.0 + share * (f64::from(i) / 19.5 - 1.0))).collect()
}

fn charts(c: &mut Criterion) {
    let mut group = c.benchmark_group("pitch-diameter chart, 40 x 40");
    group.sample_size(10);
    for (d, p) in [(0, 2), (0, 3), (1, 2), (2, 0)] {
        let rig = demo(d);
        let pitches = around(rig.rotor.blade.pitch_075_m(0.0), 0.2);
        let diameters = around(rig.job.propeller.diameter_m, 0.15);
        let limits = Limits { standing_rpm_least: (d == 0).then_some(2900.0), ..Limits::default() };
        group.bench_function(format!("{}, {}", DEMOS[d].name, rig.job.flight_points[p].name), |b| {
            b.iter(|| pitch_diameter(&rig, p, black_box(&pitches), &diameters, PitchBy::Scale, &limits));
        });
    }
}

fn searches(c: &mut Criterion) {
    let mut group = c.benchmark_group("searches");
    group.sample_size(10);
    for (d, demo_job) in DEMOS.iter().enumerate() {
        let rig = demo(d);
        group.bench_function(demo_job.name, |b| {
            b.iter(|| search(&rig, black_box(&Wish::of(&rig)), &mut |_| ControlFlow::Continue(())));
        });
    }
}

fn twists(c: &mut Criterion) {
    let rig = demo(0);
    c.bench_function("best-incidence twist", |b| b.iter(|| twist(&rig, black_box(&[0.0, 0.0, 1.0, 0.0]))));
}

criterion_group!(benches, twists, charts, searches);
criterion_main!(benches);
