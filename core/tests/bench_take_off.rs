//! The sheets of what to take off carved blades have the figures of the plan.

use crate::bench::{bench, demo};
use crate::paper::words_apart;
use spokeshave::bench::{Item, Paper, Sheet, Text, Unit};
use spokeshave::carved;
use spokeshave::job::{BladeReading, Carved, CarvedBlade, Job};
use spokeshave::result::PlannedStation;
use spokeshave::rig::Rig;

/// Texts of a sheet in rows, each from left to right.
fn rows_of(sheet: &Sheet) -> Vec<Vec<String>> {
    let items = sheet.views.iter().flat_map(|v| &v.drawing.items);
    let mut texts: Vec<&Text> =
        items.filter_map(|i| if let Item::Text(t) = i { Some(t) } else { None }).collect();
    texts.sort_by(|a, b| b.at[1].total_cmp(&a.at[1]).then(a.at[0].total_cmp(&b.at[0])));
    let rows = texts.chunk_by(|a, b| (a.at[1] - b.at[1]).abs() < 1e-6);
    rows.map(|row| row.iter().map(|t| t.words.clone()).collect()).collect()
}

/// The demo with readings at all but the last two stations: the first blade 0.6 degrees coarse and left full,
/// the second as drawn.
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
    // Planned for another flight point, another plan.
    let other = carved::plan(&rig, 0).unwrap();
    let of_other = crate::bench::bench(&job).unwrap().planned_for(Some(0));
    assert!(other != plan && of_other.take_off() == Some(&other));
    let cuts = |s: &PlannedStation| s.face_trailing_m.max(s.face_leading_m).max(s.back_m) > 0.0;
    assert!(plan.blades[0].stations.iter().filter(|s| cuts(s)).count() > 5, "something is cut");
    let none = crate::bench::bench(&demo(0)).unwrap();
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
