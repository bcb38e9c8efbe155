//! The blade in wood: the solid is closed, the paper tells what the solid has, and what cannot be made is said.

use std::collections::{HashMap, HashSet};

use crate::paper::words_apart;
use spokeshave::bench::{
    Bench, BenchError, Fault, Item, Layer, Paper, Sheet, Side, Solid, Text, Unit, files, sheet_files,
    template_card,
};
use spokeshave::carved;
use spokeshave::job::{
    AngleReference, BladeReading, Carved, CarvedBlade, DEMOS, Flange, Hub, Job, Making, PitchControl,
    Rotation, Wood,
};
use spokeshave::result::PlannedStation;
use spokeshave::rig::Rig;

fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

fn bench(job: &Job) -> Result<Bench, BenchError> {
    Bench::new(&Rig::new(job).unwrap())
}

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
        // A polygon of 48 sides in a circle has 0.29 % less.
        assert!((out / closed - 0.9971).abs() < 2e-4, "{blades} blades: {out} {closed}");
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
    // Turning clockwise seen from behind, a blade that points up has its leading edge on the right of a person behind
    // it: with the tip towards the eye and the front up, on the right as well.
    let lead = |b: &Bench| b.on_paper(b.stations[5].ring.leading_edge())[0];
    assert!(lead(&a) > 0.0 && lead(&b) < 0.0);
}

#[test]
fn two_cards_back_to_back_leave_the_section() {
    for index in 0..DEMOS.len() {
        let bench = bench(&demo(index)).unwrap();
        for station in &bench.stations {
            let (upper, lower) =
                (template_card(&bench, station, Side::Upper), template_card(&bench, station, Side::Lower));
            // The joint is the same line on both, and the wood between them is the section.
            assert_eq!(upper.on_wood.first(), lower.on_wood.first());
            assert_eq!(upper.on_wood.last(), lower.on_wood.last());
            let between: Vec<[f64; 2]> =
                upper.on_wood.iter().chain(lower.on_wood.iter().rev()).copied().collect();
            let area = area(&between);
            let section = 1e6 * station.ring.area_m2();
            assert!((area / section - 1.0).abs() < 1e-9, "station {}", station.number);
        }
    }
}

/// Jobs with faces of several kinds: flat, round on both sides, cambered; turning either way.
fn faces() -> Vec<Job> {
    let mut all: Vec<Job> = (0..DEMOS.len()).map(demo).collect();
    for section in ["naca-00xx", "naca-44xx", "naca-16"] {
        let mut job = demo(0);
        job.propeller.stations.iter_mut().for_each(|s| s.section = section.into());
        job.propeller.angle_reference = AngleReference::ChordLine;
        job.wood = None;
        all.push(job);
    }
    let mut other = demo(0);
    other.propeller.rotation = Rotation::AnticlockwiseFromBehind;
    all.push(other);
    all
}

/// Who planes straight from mark to mark takes nothing of the blade, and leaves nothing on a flat face.
#[test]
fn the_face_line_touches_the_section_and_never_cuts_into_it() {
    for job in faces() {
        let bench = bench(&job).unwrap();
        for station in &bench.stations {
            let h = &station.heights;
            let [lead, trail] = h.face_m.unwrap();
            let [y_lead, y_trail] = [h.outline_m[0], -h.outline_m[1]];
            let line = |y: f64| trail + (lead - trail) * (y - y_trail) / (y_lead - y_trail);
            let over = |p: &[f64; 2]| p[1] - bench.blank.back_m - line(p[0]);
            let least = station.ring.points.iter().map(over).fold(f64::INFINITY, f64::min);
            assert!((-1e-9..5e-5).contains(&least), "station {}: {least}", station.number);
            // The marks stand on the outline of the plan, outside the section.
            let [low, high] = station.ring.span(0);
            assert!(y_lead >= high && y_trail <= low, "station {}", station.number);
            // The slope is what the protractor reads on a flat face, and that of the section's table, where it has one of this thickness.
            let Some(face_rad) = station.face_rad else { continue };
            let slope = (lead - trail).atan2(y_lead - y_trail);
            assert!((slope - face_rad).abs() < 1e-9, "station {}: {slope} {face_rad}", station.number);
            let tabled = bench.form.blade.face_to_chord_rad(station.ring.radius_m).unwrap();
            let thin = station.thickness_m < 0.2 * station.chord_m;
            assert!(
                !thin || (station.angle_rad - tabled - face_rad).abs() < 3e-3,
                "station {}",
                station.number
            );
        }
    }
}

/// The plan is sawn to the surface's own outline: the heights are those of the marks on it.
#[test]
fn the_heights_stand_on_the_outline_of_the_plan() {
    for index in 0..DEMOS.len() {
        let bench = bench(&demo(index)).unwrap();
        let stations = bench.stations.iter().filter(|s| s.ring.radius_m < bench.form.tip_from_m);
        for station in stations {
            let near = |a: f64, b: f64| (a - b).abs() < 1e-9;
            let ring = bench.rings.iter().find(|r| near(r.radius_m, station.ring.radius_m));
            let Some(ring) = ring else { continue };
            let [low, high] = ring.span(0);
            assert!(near(station.heights.outline_m[0], high) && near(station.heights.outline_m[1], -low));
        }
        assert!(bench.rings.iter().any(|r| (r.radius_m - bench.stations[0].ring.radius_m).abs() < 1e-9));
    }
}

fn area(points: &[[f64; 2]]) -> f64 {
    let n = points.len();
    let cross = |k: usize| points[k][0] * points[(k + 1) % n][1] - points[(k + 1) % n][0] * points[k][1];
    0.5 * (0..n).map(cross).sum::<f64>().abs()
}

#[test]
fn the_edges_keep_their_thickness_and_the_chord_its_angle() {
    let mut job = demo(0);
    job.bench = Some(Making { trailing_edge_m: Some(0.002), ..Making::default() });
    let bench = bench(&job).unwrap();
    for station in &bench.stations {
        let p = &station.ring.points;
        let (a, b) = (p[1], p[p.len() - 1]);
        let thick = (a[0] - b[0]).hypot(a[1] - b[1]);
        assert!((thick - 0.002).abs() < 2e-5, "{thick}");
        let (lead, trail) = (station.ring.leading_edge(), station.ring.trailing_edge());
        let angle = (lead[1] - trail[1]).atan2(lead[0] - trail[0]);
        // Thickening on one side moves the middle of the edge by half of what is added.
        assert!((angle - station.angle_rad).abs() < 0.03, "{angle}");
        let long = (lead[1] - trail[1]).hypot(lead[0] - trail[0]);
        assert!((long / station.chord_m - 1.0).abs() < 1e-3, "{long}");
    }
}

#[test]
fn a_blunter_nose_holds_the_circle_asked_for() {
    let mut job = demo(0);
    job.bench = Some(Making { leading_edge_radius_m: Some(0.0012), ..Making::default() });
    let bench = bench(&job).unwrap();
    let last = &bench.stations[bench.stations.len() - 1].ring;
    let lead = last.points.len() / 2;
    // Radius of the circle through three points at the nose.
    let [a, b, c] = [lead - 2, lead, lead + 2].map(|k| last.points[k]);
    let side = |p: [f64; 2], q: [f64; 2]| (p[0] - q[0]).hypot(p[1] - q[1]);
    let twice = ((b[0] - a[0]) * (c[1] - a[1]) - (c[0] - a[0]) * (b[1] - a[1])).abs();
    let radius = side(a, b) * side(b, c) * side(c, a) / (2.0 * twice);
    assert!((radius / 0.0012 - 1.0).abs() < 0.05, "{radius}");
}

#[test]
fn what_cannot_be_made_is_said_with_its_place_and_its_amount() {
    let with = |change: fn(&mut Job)| {
        let mut job = demo(0);
        change(&mut job);
        bench(&job).err().map(|e| e.0).unwrap_or_default()
    };
    let thin = with(|job| {
        job.wood = None;
        job.bench = Some(Making { blank_thickness_m: Some(0.06), ..Making::default() });
    });
    assert!(
        matches!(thin[..], [Fault::ThickerThanBlank { by_mm, radius_mm, .. }] if (10.0..20.0).contains(&by_mm) && radius_mm > 0.0),
        "{thin:?}"
    );
    let below_boss =
        with(|job| job.bench = Some(Making { blank_thickness_m: Some(0.08), ..Making::default() }));
    assert!(
        matches!(below_boss[..], [Fault::ThickerThanBlank { by_mm, radius_mm: 0.0, .. }] if (by_mm - 10.0).abs() < 1e-6),
        "{below_boss:?}"
    );
    let said = below_boss[0].to_string();
    assert_eq!(
        said,
        "boss of the hub: the blank must be 90.0 mm thick, 10.0 mm more than the 80.0 mm it has"
    );
    let narrow = with(|job| job.bench = Some(Making { blank_width_m: Some(0.15), ..Making::default() }));
    assert!(
        matches!(narrow[..], [Fault::WiderThanBlank { by_mm, radius_mm: 0.0, .. }] if (by_mm - 30.0).abs() < 1e-6),
        "{narrow:?}"
    );
    let inside = with(|job| job.propeller.hub_diameter_m = 0.3);
    assert!(
        matches!(inside[..], [Fault::InsideHub { station: 1, by_mm, .. }] if (by_mm - 30.0).abs() < 0.1),
        "{inside:?}"
    );
    let thick = with(|job| job.propeller.stations[0].thickness_ratio = 0.9);
    assert!(matches!(thick[..], [Fault::NoOutline { station: 1, .. }]), "{thick:?}");
    let low_boss = with(|job| {
        let hub = Hub {
            thickness_m: 0.04,
            flange_diameter_m: 0.15,
            bore_m: 0.0,
            bolts: 6,
            bolt_circle_m: 0.12,
            bolt_diameter_m: 0.01,
            bolt_torque_n_m: None,
        };
        job.wood = Some(Wood { hub: Some(hub), ..Wood::default() });
    });
    assert!(
        matches!(low_boss[..], [Fault::CrossesHub { given_mm, by_mm, radius_mm, .. }]
            if (given_mm - 40.0).abs() < 1e-6 && (1.0..20.0).contains(&by_mm) && radius_mm <= 90.0),
        "{low_boss:?}"
    );
    let wide_flange = with(|job| {
        job.propeller.hub_diameter_m = 0.11;
        job.bench = Some(Making { flange: Some(Flange::Sae1), ..Making::default() });
    });
    // 4 3/8 in and 3/8 in: the holes reach 60.325 mm; of a radius of 55 mm 2 % stay as a wall.
    assert!(
        wide_flange.iter().any(|f| matches!(f, Fault::DrilledPastBoss { reach_mm, by_mm, .. }
            if (reach_mm - 60.325).abs() < 1e-6 && (by_mm - 6.425).abs() < 1e-6)),
        "{wide_flange:?}"
    );
    // Two stations half a millimetre apart, the chord turned by half a turn between them: the surface turns through itself.
    let wrung = with(|job| {
        let mut next = job.propeller.stations[0].clone();
        next.radius_fraction += 0.0006;
        next.angle_deg = Some(-90.0);
        job.propeller.stations[0].angle_deg = Some(90.0);
        job.propeller.stations.insert(1, next);
        job.wood = None;
    });
    assert!(
        matches!(wrung[..], [Fault::CrossesItself { radius_mm, by_mm }] if (120.0..120.5).contains(&radius_mm) && by_mm > 0.1),
        "{wrung:?}"
    );
    let crowded = with(|job| {
        job.propeller.blades = 12;
        job.propeller.stations.iter_mut().for_each(|s| s.chord_m *= 2.0);
    });
    assert!(
        crowded.iter().any(|f| matches!(f, Fault::BladesOverlap { by_mm, .. } if *by_mm > 0.0)),
        "{crowded:?}"
    );
}

#[test]
fn a_trailing_edge_too_thick_for_its_chord_is_refused_at_every_such_station() {
    let with_edge = |edge_m: f64| {
        let mut job = demo(0);
        job.bench = Some(Making { trailing_edge_m: Some(edge_m), ..Making::default() });
        bench(&job).err().map(|e| e.0).unwrap_or_default()
    };
    let chords_m: Vec<f64> = demo(0).propeller.stations.iter().map(|s| s.chord_m).collect();
    let narrowest_m = chords_m.iter().copied().fold(f64::INFINITY, f64::min);
    // Up to 5 % of the chord can be made, and no more.
    assert_eq!(with_edge(0.049 * narrowest_m), []);
    let wanted_m = 0.09 * narrowest_m;
    let faults = with_edge(wanted_m);
    assert_eq!(faults.len(), 3, "{faults:?}");
    for fault in &faults {
        let Fault::TrailingEdgeTooThick { station, radius_mm, wanted_mm, most_mm } = fault else {
            panic!("{fault:?}")
        };
        let chord_mm = 1e3 * chords_m[station - 1];
        assert!((most_mm - 0.05 * chord_mm).abs() < 1e-9 && wanted_mm > most_mm, "{fault:?}");
        assert!((wanted_mm - 1e3 * wanted_m).abs() < 1e-9 && *radius_mm > 100.0, "{fault:?}");
        assert!(fault.to_string().contains("bench.trailing_edge_m"), "{fault}");
    }
}

#[test]
fn all_text_stays_on_its_sheet_and_apart() {
    let mut inches = demo(0);
    inches.bench = Some(Making { fan_step_deg: Some(1.5), ..Making::default() });
    let mut wide = demo(0);
    wide.wood = None;
    wide.propeller.stations.iter_mut().for_each(|s| s.chord_m *= 3.0);
    wide.propeller.stations.iter_mut().for_each(|s| s.thickness_ratio /= 3.0);
    let blades = [3, 4].map(|blades| {
        let mut job = demo(0);
        job.propeller.blades = blades;
        job
    });
    for job in [demo(0), demo(1), demo(2), inches, wide].into_iter().chain(blades) {
        let bench = bench(&job).unwrap();
        for (paper, unit) in [(Paper::A4, Unit::Millimetre), (Paper::Letter, Unit::Inch)] {
            let sheets = bench.sheets(paper, unit);
            sheets.iter().for_each(words_apart);
            let items = sheets.iter().flat_map(|s| s.views.iter().flat_map(|v| &v.drawing.items));
            let sizes = items.filter_map(|i| if let Item::Text(t) = i { Some(t.size_mm) } else { None });
            assert!(sizes.fold(f64::INFINITY, f64::min) >= 2.2, "letters that cannot be read in a shop");
        }
    }
}

/// Every line at the blade angle on the cards is at that angle, and carries its name; the pitch axis runs down to the wood.
#[test]
fn cards_show_the_blade_angle_and_the_pitch_axis() {
    for job in faces() {
        let bench = bench(&job).unwrap();
        let sheets = bench.sheets(Paper::A4, Unit::Millimetre);
        let cards = sheets.iter().filter(|s| s.name.starts_with("Templates")).flat_map(|s| &s.views);
        let items: Vec<&Item> = cards.flat_map(|v| &v.drawing.items).collect();
        let lines = |wanted: Layer| {
            items.iter().filter_map(move |i| match i {
                Item::Line { layer, points, .. } if *layer == wanted => Some([points[0], points[1]]),
                _ => None,
            })
        };
        let slopes: Vec<f64> = (bench.stations.iter())
            .flat_map(|s| [Some(s.angle_rad), s.face_rad])
            .flatten()
            .map(|angle| bench.hand() * angle.tan())
            .collect();
        for [a, b] in lines(Layer::Guide) {
            let slope = (b[1] - a[1]) / (b[0] - a[0]);
            assert!(slopes.iter().any(|s| (s.atan() - slope.atan()).abs() < 1e-9), "{slope}");
            assert!((b[0] - a[0]).hypot(b[1] - a[1]) >= 10.0);
        }
        let said =
            |words: &str| items.iter().filter(|i| matches!(i, Item::Text(t) if t.words == words)).count();
        let guides = lines(Layer::Guide).count();
        assert_eq!(said("chord line") + said("face"), guides);
        assert!(lines(Layer::Centre).all(|[a, b]| (a[0] - b[0]).abs() < 1e-9));
        assert!(lines(Layer::Centre).count() >= 2 * bench.stations.len(), "one on every card");
        // Cards of the smallest blades have no room for one.
        let large = bench.form.blade.radius_m > 0.5;
        assert!(
            !large || guides >= 2 * bench.stations.len(),
            "{guides} on {} stations",
            bench.stations.len()
        );
    }
}

/// Texts of a sheet in rows, each from left to right.
fn rows_of(sheet: &Sheet) -> Vec<Vec<String>> {
    let items = sheet.views.iter().flat_map(|v| &v.drawing.items);
    let mut texts: Vec<&Text> =
        items.filter_map(|i| if let Item::Text(t) = i { Some(t) } else { None }).collect();
    texts.sort_by(|a, b| b.at[1].total_cmp(&a.at[1]).then(a.at[0].total_cmp(&b.at[0])));
    let rows = texts.chunk_by(|a, b| (a.at[1] - b.at[1]).abs() < 1e-6);
    rows.map(|row| row.iter().map(|t| t.words.clone()).collect()).collect()
}

/// The demo with readings at all but the last two stations: the first blade 0.6 degrees coarse and left full, the second as drawn.
fn carved() -> Job {
    let mut job = demo(0);
    let rig = Rig::new(&job).unwrap();
    let reading = |radius_m: f64, full: f64| {
        let cut = rig.rotor.blade.cut(radius_m);
        BladeReading {
            radius_m,
            angle_deg: Some(cut.angle_rad.to_degrees() + 0.6 * full),
            chord_m: Some(cut.chord_m + 0.002 * full),
            thickness_m: Some(cut.thickness_ratio * cut.chord_m + 0.0015 * full),
            ..BladeReading::default()
        }
    };
    let blade = |full: f64| CarvedBlade {
        readings: rig.rotor.blade.station_radii_m().take(9).map(|r| reading(r, full)).collect(),
    };
    job.carved = Some(Carved { blades: vec![blade(1.0), blade(0.0)], ..Carved::default() });
    job
}

#[test]
fn the_sheets_of_what_to_take_off_have_the_figures_of_the_plan() {
    let job = carved();
    let rig = Rig::new(&job).unwrap();
    let plan = carved::plan(&rig, carved::usual_point(&rig)).unwrap();
    let bench = bench(&job).unwrap();
    for (paper, unit, per_m, digits) in
        [(Paper::A4, Unit::Millimetre, 1e3, [1, 2]), (Paper::Letter, Unit::Inch, 1e3 / 25.4, [3, 3])]
    {
        let all = bench.sheets(paper, unit);
        all.iter().for_each(words_apart);
        let sheets: Vec<&Sheet> = all.iter().filter(|s| s.name.starts_with("Take off")).collect();
        let names: Vec<&str> = sheets.iter().map(|s| s.name.as_str()).collect();
        assert_eq!(names, ["Take off, blade 1", "Take off, blade 2"]);
        let (size, depth) = (
            |m: f64| format!("{:.*}", digits[0], per_m * m),
            |m: f64| {
                if m > 0.0 { format!("{:.*}", digits[1], per_m * m) } else { "–".into() }
            },
        );
        for (sheet, blade) in sheets.iter().zip(&plan.blades) {
            let rows = rows_of(sheet);
            for s in &blade.stations {
                let star = if s.read { "" } else { " *" };
                let expected = vec![
                    format!("{}{star}", size(s.radius_m)),
                    depth(s.face_leading_m),
                    depth(s.face_trailing_m),
                    depth(s.back_m),
                    depth(s.trailing_edge_m),
                    format!("{:.1}°", s.face_angle_deg.unwrap()),
                    size(s.chord_m),
                    size(s.thickness_m),
                ];
                assert!(rows.contains(&expected), "{expected:?} is not among {rows:#?}");
            }
            let says = |words: &str| rows.iter().flatten().any(|t| t.contains(words));
            assert!(says("Wood only comes off. Cut less than it says, and measure again."));
            assert!(says("not read, so not turned") && says(&plan.flight_point) && says("After the cuts"));
            assert_eq!(says("Nothing is to be taken off this blade"), blade.blade == 2);
            let texts = sheet.views.iter().flat_map(|v| &v.drawing.items);
            let sizes = texts.filter_map(|i| if let Item::Text(t) = i { Some(t.size_mm) } else { None });
            assert!(sizes.fold(f64::INFINITY, f64::min) >= 3.5, "large letters");
        }
    }
    let cuts = |s: &PlannedStation| s.face_trailing_m.max(s.face_leading_m).max(s.back_m) > 0.0;
    assert!(plan.blades[0].stations.iter().filter(|s| cuts(s)).count() > 5, "something is cut");
    let none = self::bench(&demo(0)).unwrap();
    let sheets = none.sheets(Paper::A4, Unit::Millimetre);
    assert!(none.take_off().is_none() && !sheets.iter().any(|s| s.name.starts_with("Take off")));
}

#[test]
fn a_long_plan_is_laid_over_several_sheets() {
    let mut job = carved();
    let readings = &mut job.carved.as_mut().unwrap().blades[0].readings;
    let more = (0..30).map(|k| BladeReading { radius_m: 0.135 + 0.015 * f64::from(k), ..readings[0] });
    let chord_alone = |r: BladeReading| BladeReading { angle_deg: None, thickness_m: None, ..r };
    let apart = |r: &BladeReading| readings.iter().all(|o| (o.radius_m - r.radius_m).abs() > 0.002);
    let all: Vec<BladeReading> = more.filter(apart).map(chord_alone).collect();
    readings.extend(all);
    readings.sort_by(|a, b| a.radius_m.total_cmp(&b.radius_m));
    let sheets = bench(&job).unwrap().sheets(Paper::Letter, Unit::Millimetre);
    sheets.iter().for_each(words_apart);
    assert!(sheets.iter().any(|s| s.name == "Take off, blade 1, part 2 of 2"));
}

/// A blade that does not hold is not made by mistake: every sheet says so, and the card in full.
#[test]
fn every_sheet_of_a_blade_that_does_not_hold_says_so() {
    let said = |job: &Job| {
        let sheets = bench(job).unwrap().sheets(Paper::A4, Unit::Millimetre);
        let warns = |item: &Item| matches!(item, Item::Text(t) if t.words.starts_with("NOT STRONG ENOUGH as drawn: margin −"));
        sheets.iter().map(|s| s.frame.items.iter().any(warns)).collect::<Vec<bool>>()
    };
    let mut thin = demo(0);
    thin.propeller.stations.iter_mut().for_each(|s| s.thickness_ratio *= 0.75);
    assert!(said(&thin).iter().all(|s| *s));
    assert!(said(&demo(0)).iter().all(|s| !s));
    assert_eq!(bench(&demo(0)).unwrap().warning(), None);
    bench(&thin).unwrap().sheets(Paper::Letter, Unit::Inch).iter().for_each(words_apart);
}

#[test]
fn a_template_larger_than_the_page_is_laid_over_several() {
    let mut job = demo(0);
    job.wood = None;
    job.propeller.diameter_m = 4.0;
    job.propeller.hub_diameter_m = 0.4;
    job.propeller.stations.iter_mut().for_each(|s| s.chord_m *= 3.2);
    let bench = bench(&job).unwrap();
    let sheets = bench.sheets(Paper::A4, Unit::Millimetre);
    assert!(sheets.iter().any(|s| s.name.starts_with("Templates") && s.name.contains("column 2 of 2")));
}

#[test]
fn every_file_of_a_demo_is_made() {
    let bench = bench(&demo(0)).unwrap();
    let names: Vec<String> = files(&bench, Unit::Millimetre).unwrap().into_iter().map(|f| f.name).collect();
    let expected =
        ["propeller.stl", "surface.csv", "templates.dxf", "blank-plan.dxf", "blank-side.dxf", "hub.dxf"];
    assert_eq!(names, expected);
    let sheets = sheet_files(&bench, Paper::Letter, Unit::Inch);
    assert!(sheets.iter().all(|f| f.bytes.len() > 1_000));
    assert!(sheets.last().is_some_and(|f| f.name == "sheets.pdf" && f.bytes.starts_with(b"%PDF-")));
}
