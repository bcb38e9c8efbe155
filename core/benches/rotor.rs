//! What an analysis, a departure map and an edit cost, and how near the solve is to the cost of its section
//! lookups alone.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use spokeshave::fit::Along;
use spokeshave::job::{DEMOS, Job};
use spokeshave::report::station;
use spokeshave::rig::Rig;
use spokeshave::rotor::{Condition, Rotor};

fn rig(elements: u32) -> (Rig, Condition) {
    let mut job = Job::from_json(DEMOS[0].json).expect("a valid demo");
    job.method.elements = elements;
    let rig = Rig::new(&job).expect("a valid demo");
    let at = rig.condition(2).expect("cruise has an answer");
    (rig, at)
}

fn analysis(c: &mut Criterion) {
    let (rig, at) = rig(30);
    let lookups = rig.rotor.loads(&at).lookups;
    c.bench_function(&format!("analysis, 30 elements ({lookups} section lookups)"), |b| {
        b.iter(|| rig.rotor.loads(black_box(&at)));
    });
    let static_at = Condition { airspeed_m_s: 0.0, ..at };
    let lookups = rig.rotor.loads(&static_at).lookups;
    c.bench_function(&format!("analysis at rest, 30 elements ({lookups} section lookups)"), |b| {
        b.iter(|| rig.rotor.loads(black_box(&static_at)));
    });
}

/// The floor: as many lookups as the analysis takes, spread over the same elements, and nothing else.
fn lookups_alone(c: &mut Criterion) {
    let (rig, at) = rig(30);
    let each = rig.rotor.loads(&at).lookups.div_ceil(30);
    let r = |i: u32| 0.09 + 0.67 * (f64::from(i) + 0.5) / 30.0;
    let elements: Vec<_> = (0..30).map(|i| rig.rotor.element(&rig.rotor.ring(r(i)), &at).0).collect();
    c.bench_function("the section lookups of that analysis alone", |b| {
        b.iter(|| {
            let mut sum = 0.0;
            for e in &elements {
                for k in 0..each {
                    let c = e.section.at(black_box(0.02 * f64::from(k)));
                    sum += c.cl + c.cd;
                }
            }
            sum
        });
    });
}

/// How the analysis grows with the elements, and the map with its size.
fn growth(c: &mut Criterion) {
    let mut group = c.benchmark_group("growth");
    for elements in [15, 30, 60, 120, 240] {
        let (rig, at) = rig(elements);
        group.bench_function(format!("analysis, {elements} elements"), |b| {
            b.iter(|| rig.rotor.loads(black_box(&at)));
        });
    }
    let (rig, _) = rig(40);
    for (speeds, radii) in [(15, 40), (30, 40), (120, 40), (60, 80)] {
        group.bench_function(format!("departure map, {speeds} speeds x {radii} radii"), |b| {
            b.iter(|| rig.map(black_box(2), Along::FullThrottle, speeds, radii));
        });
    }
}

fn map(c: &mut Criterion) {
    let (rig, _) = rig(40);
    c.bench_function("departure map, 60 speeds x 40 radii", |b| {
        b.iter(|| rig.map(black_box(2), Along::FullThrottle, 60, 40));
    });
}

fn edit(c: &mut Criterion) {
    let (rig, at) = rig(40);
    c.bench_function("edit: blade rebuilt, 11 stations and integrals", |b| {
        b.iter(|| {
            let rig = Rig::new(black_box(&rig.job)).expect("a valid demo");
            rig.point(2)
        });
    });
    c.bench_function("the 11 stations with best angle and working band", |b| {
        b.iter(|| stations(&rig.rotor, black_box(&at)));
    });
}

fn stations(rotor: &Rotor, at: &Condition) -> Vec<spokeshave::result::StationResult> {
    rotor.blade.station_radii_m().map(|r| station(rotor, &rotor.ring(r), at)).collect()
}

criterion_group!(benches, analysis, lookups_alone, growth, map, edit);
criterion_main!(benches);
