//! Paper and files of a blade: everything that is made of it at the bench.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use spokeshave::bench::{Bench, Paper, Unit, files, sheet_files};
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;

fn paper(c: &mut Criterion) {
    let job = Job::from_json(DEMOS[0].json).expect("an example");
    let rig = Rig::new(&job).expect("an example");
    c.bench_function("a blade made ready for the bench", |b| b.iter(|| Bench::new(black_box(&rig))));
    let bench = Bench::new(&rig).expect("an example");
    c.bench_function("every sheet as SVG and PDF", |b| {
        b.iter(|| sheet_files(black_box(&bench), Paper::A4, Unit::Millimetre));
    });
    c.bench_function("STL, CSV and DXF", |b| b.iter(|| files(black_box(&bench), Unit::Millimetre)));
}

criterion_group!(benches, paper);
criterion_main!(benches);
