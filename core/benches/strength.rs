//! What the strength of a blade costs: the sections, the whole sheet, one set of natural modes.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::wood::beam::Bending;
use spokeshave::wood::{BladeBeam, strength};

fn sheet(c: &mut Criterion) {
    let rig = Rig::new(&Job::from_json(DEMOS[0].json).expect("a valid demo")).expect("a valid demo");
    c.bench_function("the blade as a beam, 11 stations", |b| b.iter(|| BladeBeam::new(black_box(&rig))));
    c.bench_function("the whole strength sheet, 4 flight points", |b| b.iter(|| strength(black_box(&rig))));
}

fn modes(c: &mut Criterion) {
    let radii: Vec<f64> = (0..100).map(|i| 0.1 + 0.7 * f64::from(i) / 99.0).collect();
    let (one, none, hard) = (vec![1.0; 100], vec![0.0; 100], vec![9.0; 100]);
    let beam = Bending {
        radii_m: &radii,
        mass_kg_m: &one,
        out_n_m2: &one,
        in_n_m2: Some([&hard, &none]),
        rotation_rad_s: 10.0,
    };
    c.bench_function("three modes of bending in two planes", |b| b.iter(|| black_box(&beam).modes(3)));
}

criterion_group!(benches, sheet, modes);
criterion_main!(benches);
