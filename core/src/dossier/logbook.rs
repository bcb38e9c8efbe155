//! Readings of ground runs and flights, and what they tell.

use crate::bench::sheet::table::{figures, words};
use crate::job::LogReading;
use crate::logbook::estimate;
use crate::result::{FactorFound, LogLine, Logged};

use super::Told;
use super::chart::{Chart, Curve};
use super::curves::axis;
use super::flow::Flow;
use super::scale::{DEGREES, PERCENT, PLAIN, RPM, Scale, Scales};
use super::verdict;

pub(super) fn write(flow: &mut Flow, told: &Told) {
    let Some(logbook) = told.rig.job.logbook.as_ref().filter(|l| !l.readings.is_empty()) else { return };
    flow.part("Logbook");
    readings(flow, &logbook.readings, told.scales);
    match estimate(told.rig) {
        Err(why) => flow.text(&format!("Nothing is told: {why}.")),
        Ok(logged) => tells(flow, &logged, told.scales),
    }
}

fn readings(flow: &mut Flow, all: &[LogReading], scales: &Scales) {
    let speed = format!("true speed\n{}", scales.speed.sign);
    let height = format!("height\n{}", scales.height.sign);
    let fuel = format!("fuel {}\nor A", scales.fuel.sign);
    let columns = [
        figures("reading", 15.0),
        figures("engine\nrpm", 18.0),
        figures("throttle\n%", 17.0),
        figures(&speed, 20.0),
        figures(&height, 20.0),
        figures("°C", 14.0),
        figures(&fuel, 20.0),
        words("level", 16.0),
        words("note", 50.0),
    ];
    let row = |(i, r): (usize, &LogReading)| {
        let height = r
            .pressure_pa
            .map_or_else(|| scales.height.figure(r.altitude_m), |pa| format!("{:.0} hPa", 0.01 * pa));
        vec![
            (i + 1).to_string(),
            RPM.figure(r.engine_rpm),
            PERCENT.figure(r.throttle),
            scales.speed.figure(r.airspeed_m_s),
            height,
            DEGREES.figure(r.temperature_c),
            r.current_a.map_or_else(|| scales.fuel.figure(r.fuel_kg_per_h), |a| PLAIN.figure(a)),
            if r.level { "yes".into() } else { String::new() },
            if r.left_out { format!("left out. {}", r.note) } else { r.note.clone() },
        ]
    };
    flow.table(&columns, &all.iter().enumerate().map(row).collect::<Vec<_>>());
}

/// Rpm read less expected, reading by reading.
fn residuals(logged: &Logged) -> Chart {
    let curve = |name: &str, of: fn(&LogLine) -> Option<f64>| {
        let points = logged.readings.iter().enumerate();
        Curve::new(
            name,
            points.map(|(i, l)| {
                (i as f64 + 1.0, of(l).zip(l.engine_rpm).map(|(expected, read)| read - expected))
            }),
        )
    };
    Chart {
        title: "Engine rpm read less rpm expected".into(),
        x: axis("reading", Scale::fixed("", 1.0, 0)),
        y: axis("rpm", Scale { sign: "", ..RPM }),
        curves: vec![curve("without the factors", |l| l.before_rpm), curve("with them", |l| l.after_rpm)],
        limits: Vec::new(),
    }
}

fn tells(flow: &mut Flow, logged: &Logged, scales: &Scales) {
    let blade = if logged.as_carved { "the carved propeller" } else { "the propeller as drawn" };
    flow.heading(&format!("What they tell of {blade}"));
    let columns = [
        words("factor", 50.0),
        figures("found", 22.0),
        figures("plus or minus", 26.0),
        figures("thought before", 28.0),
        words("", 60.0),
    ];
    let row = |f: &FactorFound| {
        vec![
            f.title.into(),
            PLAIN.figure(f.value),
            PLAIN.figure(f.value * f.deviation),
            PLAIN.figure(f.width),
            f.says().into(),
        ]
    };
    flow.table(&columns, &logged.estimate.found.iter().map(row).collect::<Vec<_>>());
    flow.list(&logged.estimate.remarks);
    flow.heading("Readings against what is expected, without and with these factors");
    let columns = [
        figures("reading", 16.0),
        figures("rpm read", 22.0),
        figures("expected\nwithout", 24.0),
        figures("expected\nwith", 24.0),
        figures("off in standard\ndeviations", 28.0),
        words("", 70.0),
    ];
    let row = |(i, l): (usize, &LogLine)| {
        vec![
            (i + 1).to_string(),
            RPM.figure(l.engine_rpm),
            RPM.figure(l.before_rpm),
            RPM.figure(l.after_rpm),
            DEGREES.figure(l.off),
            l.remark.clone(),
        ]
    };
    flow.table(&columns, &logged.readings.iter().enumerate().map(row).collect::<Vec<_>>());
    let chart = residuals(logged);
    if chart.shows() {
        flow.charts(&[chart]);
    }
    let rows = logged.flight_points.iter().flat_map(|c| [c.drawn.clone(), c.shaped.clone()]);
    flow.heading("Flight points without and with them");
    verdict::points(flow, &rows.collect::<Vec<_>>(), scales, Some(&["without", "with"]));
}
