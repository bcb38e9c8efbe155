//! The solid of the blade: closed, handed, drilled, of the volume of its sections.

use crate::bench::{bench, demo};
use spokeshave::bench::{Bench, Solid};
use spokeshave::job::{DEMOS, Flange, Job, Making, PitchControl, Rotation};
use std::collections::{HashMap, HashSet};
use std::f64::consts::PI;

/// How often each directed edge is used, less how often its opposite is: all zero on a closed surface.
fn open_edges(solid: &Solid) -> usize {
    let mut edges: HashMap<(u32, u32), i32> = HashMap::new();
    for [a, b, c] in &solid.triangles {
        for (from, to) in [(*a, *b), (*b, *c), (*c, *a)] {
            *edges.entry((from.min(to), from.max(to))).or_default() += if from < to { 1 } else { -1 };
        }
    }
    edges.values().filter(|count| **count != 0).count()
}

/// Corners less edges plus faces: 2 for a body without a hole through it, 2 less for every hole.
fn euler(solid: &Solid) -> i32 {
    let edges: HashSet<(u32, u32)> = solid
        .triangles
        .iter()
        .flat_map(|[a, b, c]| [(*a, *b), (*b, *c), (*c, *a)])
        .map(|(a, b)| (a.min(b), a.max(b)))
        .collect();
    let [corners, edges, faces] =
        [solid.vertices.len(), edges.len(), solid.triangles.len()].map(|n| i32::try_from(n).unwrap());
    corners - edges + faces
}

/// Wood that a job's drilling takes out of a boss, m³: round holes.
fn drilled_m3(job: &Job) -> f64 {
    let Some(hub) = job.wood.as_ref().and_then(|w| w.hub.as_ref()) else { return 0.0 };
    let disc = |d: f64| std::f64::consts::FRAC_PI_4 * d * d;
    hub.thickness_m * (disc(hub.bore_m) + f64::from(hub.bolts) * disc(hub.bolt_diameter_m))
}

/// Volume by the trapezoid rule over the areas of the rings, m³: one blade, from the axis or the hub.
fn ring_volume_m3(bench: &Bench) -> f64 {
    let tip = (bench.form.blade.radius_m, 0.0);
    let areas: Vec<(f64, f64)> = bench.rings.iter().map(|r| (r.radius_m, r.area_m2())).chain([tip]).collect();
    areas.windows(2).map(|w| 0.5 * (w[1].0 - w[0].0) * (w[0].1 + w[1].1)).sum()
}

#[test]
fn every_demo_is_a_closed_solid_of_the_volume_of_its_sections() {
    for (index, demo_job) in DEMOS.iter().enumerate() {
        for one_piece in [true, false] {
            let mut job = demo(index);
            if !one_piece {
                job.propeller.pitch_control = PitchControl::GroundAdjustable { turn_deg: 0.0 };
            }
            let bench = bench(&job).unwrap();
            let solid = bench.solid();
            assert_eq!(open_edges(&solid), 0, "{}", demo_job.name);
            let pieces = if one_piece { f64::from(job.propeller.blades) } else { 1.0 };
            let drilled_m3 = if one_piece { drilled_m3(&job) } else { 0.0 };
            let (found, sections) = (solid.volume_m3(), pieces * ring_volume_m3(&bench) - drilled_m3);
            // Bending the plan into a blade's share of the turn changes the hub of other than two blades.
            let allowed = if one_piece && job.propeller.blades != 2 { 0.15 } else { 0.005 };
            assert!((found / sections - 1.0).abs() < allowed, "{}: {found} {sections}", demo_job.name);
        }
    }
}

#[test]
fn propellers_of_one_to_six_blades_are_closed_and_drilled() {
    for blades in 1..=6 {
        let mut job = demo(0);
        job.propeller.blades = blades;
        let drilled = bench(&job).unwrap().solid();
        assert_eq!(open_edges(&drilled), 0, "{blades} blades");
        // A bore and six bolts.
        assert_eq!(euler(&drilled), 2 - 2 * 7, "{blades} blades");
        // The same boss, without a hub that tells of holes.
        job.wood = None;
        job.bench = Some(Making { blank_thickness_m: Some(0.09), ..Making::default() });
        let whole = bench(&job).unwrap().solid();
        assert_eq!((open_edges(&whole), euler(&whole)), (0, 2), "{blades} blades");
        let (out, closed) = (whole.volume_m3() - drilled.volume_m3(), drilled_m3(&demo(0)));
        // A polygon of 48 sides in a circle; what is left is rounding of many small volumes.
        let polygon = (PI / 24.0).sin() / (PI / 24.0);
        assert!((out / closed / polygon - 1.0).abs() < 1e-9, "{blades} blades: {out} {closed}");
    }
}

#[test]
fn every_pattern_that_the_boss_can_hold_is_drilled() {
    for (flange, bolts) in [(Some(Flange::Sae1), 6), (Some(Flange::Sae2), 6), (None, 1), (None, 2), (None, 9)]
    {
        for (rotation, wide) in
            [(Rotation::ClockwiseFromBehind, 0.06), (Rotation::AnticlockwiseFromBehind, 0.16)]
        {
            let mut job = demo(0);
            job.propeller.rotation = rotation;
            job.bench = Some(Making { flange, ..Making::default() });
            let hub = job.wood.as_mut().and_then(|w| w.hub.as_mut()).unwrap();
            (hub.bolts, hub.bolt_circle_m, hub.flange_diameter_m) =
                (u32::try_from(bolts).unwrap(), wide, 0.17);
            let holes = if flange.is_some() { 6 } else { bolts + 1 };
            let solid = bench(&job).unwrap().solid();
            assert_eq!((open_edges(&solid), euler(&solid)), (0, 2 - 2 * holes), "{flange:?} {bolts} {wide}");
        }
    }
}

#[test]
fn the_other_sense_of_turning_is_the_mirror_image() {
    let job = demo(0);
    let mut other = job.clone();
    other.propeller.rotation = Rotation::AnticlockwiseFromBehind;
    let (a, b) = (bench(&job).unwrap(), bench(&other).unwrap());
    let (right, left) = (a.solid(), b.solid());
    assert!((right.volume_m3() - left.volume_m3()).abs() < 1e-12 && left.volume_m3() > 0.0);
    assert_eq!(open_edges(&left), 0);
    for (p, q) in right.vertices.iter().zip(&left.vertices) {
        assert_eq!([p[0], -p[1], p[2]], *q);
    }
    // Turning clockwise seen from behind, a blade that points up has its leading edge on the right of a
    // person behind it: with the tip towards the eye and the front up, on the right as well.
    let lead = |b: &Bench| b.on_paper(b.stations[5].ring.leading_edge())[0];
    assert!(lead(&a) > 0.0 && lead(&b) < 0.0);
}
