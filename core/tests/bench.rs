//! Sections, cards and sheets of paper: they tell what the blade has.

use crate::paper::words_apart;
use spokeshave::bench::{
    Bench, BenchError, Item, Layer, Paper, Side, Unit, files, sheet_files, template_card,
};
use spokeshave::job::{AngleReference, DEMOS, Job, Making, Rotation};
use spokeshave::rig::Rig;

pub(crate) fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

pub(crate) fn bench(job: &Job) -> Result<Bench, BenchError> {
    Bench::new(&Rig::new(job).unwrap())
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
            // The slope is what the protractor reads on a flat face, and that of the section's table, where
            // it has one of this thickness.
            let Some(face_rad) = station.face_rad else { continue };
            let slope = (lead - trail).atan2(y_lead - y_trail);
            assert!((slope - face_rad).abs() < 1e-9, "station {}: {slope} {face_rad}", station.number);
            let tabled = bench.form.blade.face_to_chord_rad(station.ring.radius_m).unwrap();
            let thin = station.thickness_m < 0.2 * station.chord_m;
            assert!(
                // What leading over between the tabled thicknesses leaves is 1e-5.
                !thin || (station.angle_rad - tabled - face_rad).abs() < 3e-5,
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
        // A micrometre, which no tool cuts; half of one comes out.
        assert!((thick - 0.002).abs() < 1e-6, "{thick}");
        let (lead, trail) = (station.ring.leading_edge(), station.ring.trailing_edge());
        let angle = (lead[1] - trail[1]).atan2(lead[0] - trail[0]);
        // Thickening on one side moves the middle of the edge by half of what is added.
        assert!((angle - station.angle_rad).abs() < 0.03, "{angle}");
        let long = (lead[1] - trail[1]).hypot(lead[0] - trail[0]);
        // It runs between the middles of the edges, one of which thickening has moved: 2e-4 comes out.
        assert!((long / station.chord_m - 1.0).abs() < 3e-4, "{long}");
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
    // Three points of a circle give its radius; 2e-5 comes out.
    assert!((radius / 0.0012 - 1.0).abs() < 1e-4, "{radius}");
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

/// Every line at the blade angle on the cards is at that angle, and carries its name; the pitch axis runs
/// down to the wood.
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
