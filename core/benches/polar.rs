//! Time of a polar of 30 points at one Reynolds number: at most 1.5 s on one core is promised.

use std::hint::black_box;
use std::ops::ControlFlow;

use criterion::{Criterion, criterion_group, criterion_main};
use spokeshave::section::outline::clark_y;
use spokeshave::section::solver::{Settings, sweep};

fn thirty_points(c: &mut Criterion) {
    let section = clark_y().expect("fixed ordinates");
    let angles: Vec<f64> = (-10..20).map(|k| 0.5 * f64::from(k)).collect();
    let mut group = c.benchmark_group("polar of 30 points");
    group.sample_size(10);
    for (name, reynolds, n_crit) in [("Re 60,000 n 9", 6e4, 9.0), ("Re 400,000 n 4", 4e5, 4.0)] {
        let settings = Settings::free(reynolds, n_crit);
        group.bench_function(name, |b| {
            b.iter(|| sweep(black_box(&section), &settings, &angles, |_, _, _| ControlFlow::Continue(())));
        });
    }
    group.finish();
}

criterion_group!(benches, thirty_points);
criterion_main!(benches);
