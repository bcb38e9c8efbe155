//! The report of a job: its parts are there, its words apart, and what a job lacks is left out.

use crate::paper::words_apart;
use spokeshave::bench::{Item, Paper, Sheet, pdf};
use spokeshave::carved;
use spokeshave::dossier::{Scales, dossier};
use spokeshave::job::{DEMOS, FlightPoint, Hub, Job, LogReading, Logbook, Setting, Wood};
use spokeshave::rig::Rig;

fn demo(index: usize) -> Job {
    Job::from_json(DEMOS[index].json).unwrap()
}

/// A job with everything: wood with a hub, readings of two blades, a logbook.
fn full() -> Job {
    let mut job = demo(0);
    let hub = Hub {
        thickness_m: 0.1,
        flange_diameter_m: 0.15,
        bore_m: 0.03,
        bolts: 6,
        bolt_circle_m: 0.1,
        bolt_diameter_m: 0.01,
        bolt_torque_n_m: Some(25.0),
    };
    job.wood = Some(Wood { hub: Some(hub), ..Wood::default() });
    let text = "blade,radius_mm,face angle,chord_mm,thickness_mm\n1,300,30.2,112,27.5\n1,540,19.5,89.5,15.6\n2,300,29.1,111.5,27.2\n2,720,15,49.5,6.9\n";
    job.carved = Some(carved::import::read(text, &job.propeller, None).unwrap().0);
    let reading = |engine_rpm, airspeed_m_s, level: bool| LogReading {
        engine_rpm: Some(engine_rpm),
        airspeed_m_s,
        throttle: (!level).then_some(1.0),
        level,
        note: "second morning, wind calm".into(),
        ..LogReading::default()
    };
    let readings =
        vec![reading(2950.0, 0.0, false), reading(2710.0, 31.0, false), reading(2530.0, 47.0, true)];
    job.logbook = Some(Logbook { readings, ..Logbook::default() });
    assert_eq!(job.check(), []);
    job
}

fn pages(job: &Job) -> Vec<Sheet> {
    dossier(&Rig::new(job).unwrap(), &Scales::METRIC, Paper::A4, None)
}

fn words(pages: &[Sheet]) -> Vec<String> {
    let items =
        pages.iter().flat_map(|p| p.views.iter().flat_map(|v| &v.drawing.items).chain(&p.frame.items));
    let text = |item: &Item| match item {
        Item::Text(text) => Some(text.words.clone()),
        _ => None,
    };
    items.filter_map(text).collect()
}

fn says(job: &Job, what: &str) -> bool {
    words(&pages(job)).iter().any(|w| w.contains(what))
}

#[test]
fn every_part_of_a_full_job_is_there_with_its_figures() {
    let job = full();
    let all = words(&pages(&job));
    let said = |what: &str| all.iter().any(|w| w.contains(what));
    for part in [
        "Verdict",
        "Before you act",
        "Inputs",
        "Method and validity",
        "Charts",
        "Stations",
        "Strength",
        "In this order",
        "Bench heights, mm",
        "As carved",
        "What to take off for the departure as drawn at Climb",
        "What shakes once per turn",
        "Logbook",
    ] {
        assert!(said(part), "{part}");
    }
    // Sources are named.
    for source in [
        "ISO 2533:1975",
        "Glauert 1935",
        "Gagg and Ferrar",
        "Wood Handbook",
        "Clark Y",
        "Viterna and Corrigan",
    ] {
        assert!(said(source), "{source}");
    }
    // Figures are those of the job and of the core.
    let rig = Rig::new(&job).unwrap();
    let climb = rig.point(1).unwrap();
    let thrust = format!("{:.0}", climb.figures.thrust_n.unwrap());
    let plan = carved::plan(&rig, 1).unwrap();
    let cut =
        plan.blades[0].stations.iter().map(|s| s.face_leading_m.max(s.face_trailing_m)).fold(0.0, f64::max);
    for figure in
        ["430 kg", "1520.0 mm", "2950", "second morning, wind calm", &thrust, &format!("{:.2}", 1e3 * cut)]
    {
        assert!(said(figure), "{figure}");
    }
    assert!(!said("NaN") && !said("inf "));
}

#[test]
fn words_stay_on_the_page_and_apart() {
    let mut many = full();
    many.title = "A very long title of a propeller for an aeroplane of many words, drawn twice and carved once, for the long page".into();
    many.flight_points = (0..8)
        .map(|i| FlightPoint {
            name: format!("Flight point {i} of a long list with a long name that goes on and on"),
            altitude_m: 100.0 * f64::from(i),
            isa_offset_k: -12.5,
            airspeed_m_s: Some(20.0 + f64::from(i)),
            setting: Setting::Rpm { rpm: 2400.0 },
        })
        .collect();
    for job in [demo(0), demo(1), demo(2), full(), many] {
        for (paper, scales) in [(Paper::A4, Scales::METRIC), (Paper::Letter, Scales::INCHES)] {
            for page in dossier(&Rig::new(&job).unwrap(), &scales, paper, None) {
                words_apart(&page);
                let [low, high] = page.views[0].window_mm;
                for item in &page.views[0].drawing.items {
                    let points = match item {
                        Item::Text(t) => {
                            let left = t.at[0] + t.left_mm();
                            vec![[left, t.at[1]], [left + t.breadth_mm(), t.at[1] + 0.7 * t.size_mm]]
                        }
                        Item::Line { points, .. } => points.clone(),
                        Item::Circle { centre, .. } => vec![*centre],
                    };
                    let inside =
                        |p: &[f64; 2]| (0..2).all(|k| (low[k] - 0.01..=high[k] + 0.01).contains(&p[k]));
                    assert!(
                        points.iter().all(inside),
                        "{}: {item:?} is not within {low:?} {high:?}",
                        page.name
                    );
                }
            }
        }
    }
}

#[test]
fn what_a_job_lacks_is_left_out() {
    let whole = full();
    let mut bare = whole.clone();
    (bare.aircraft, bare.engine, bare.wood, bare.carved, bare.logbook) = (None, None, None, None, None);
    for point in &mut bare.flight_points {
        (point.airspeed_m_s, point.setting) = (Some(30.0), Setting::Rpm { rpm: 2500.0 });
    }
    for part in ["Aircraft", "Engine", "As carved", "Logbook", "Hub", "Rate of climb"] {
        assert!(says(&whole, part) && !words(&pages(&bare)).iter().any(|w| w == part), "{part}");
    }
    // A setting that needs an engine has no answer without one: the rest stands, and the reason with it.
    bare.flight_points[0].setting = Setting::FullThrottle {};
    assert!(says(&bare, "This setting needs an engine, and the job has none."));
    // A blade that cannot be made as drawn says why in place of the tables for the bench.
    let mut crowded = demo(0);
    crowded.propeller.hub_diameter_m = 0.3;
    assert!(
        says(&crowded, "This blade cannot be made as it is drawn") && !says(&crowded, "Bench heights, mm")
    );
    // Readings that tell nothing are shown, and why.
    let mut idle = demo(0);
    let reading = LogReading { engine_rpm: Some(1000.0), throttle: Some(0.2), ..LogReading::default() };
    idle.logbook = Some(Logbook { readings: vec![reading], ..Logbook::default() });
    assert!(says(&idle, "Nothing is told"));
}

/// The fonts every viewer has know the letters of Windows' Western set; what the program says itself is
/// written with these.
#[test]
fn every_letter_is_one_the_fonts_have() {
    for job in [demo(0), demo(1), demo(2), full()] {
        let known =
            |c: char| matches!(c, ' '..='~' | '\u{a0}'..='\u{ff}' | '–' | '…' | '“' | '”' | '’' | '−');
        for word in words(&pages(&job)) {
            assert!(word.chars().all(known), "{word:?}");
        }
    }
}

#[test]
fn the_same_job_gives_the_same_file() {
    let job = full();
    let file = || pdf(&job.title, &pages(&job));
    assert!(file() == file() && file().starts_with(b"%PDF-"));
}
