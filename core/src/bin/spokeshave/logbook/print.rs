//! Tables of the logbook and of what to change.

use spokeshave::change::Wanted;
use spokeshave::result::{Change, FactorFound, Figure, LogLine, Logged};
use spokeshave::rig::Rig;

use crate::briefs::briefs;
use crate::table::{csv_figure, figure, signed, table};

pub(super) const CSV_HEADER: [&str; 9] = [
    "engine_rpm",
    "before_rpm",
    "after_rpm",
    "consumption",
    "before_consumption",
    "after_consumption",
    "off",
    "outlier",
    "remark",
];

pub(super) fn csv_rows(logged: &Logged) -> Vec<Vec<String>> {
    let row = |l: &LogLine| {
        let figures = [
            l.engine_rpm,
            l.before_rpm,
            l.after_rpm,
            l.consumption,
            l.before_consumption,
            l.after_consumption,
            l.off,
        ];
        let words = [l.outlier.to_string(), l.remark.clone()];
        figures.into_iter().map(csv_figure).chain(words).collect()
    };
    logged.readings.iter().map(row).collect()
}

const CAUTION: &str = "Before you act: tie the aircraft down for ground runs, keep everybody out of the \
    disc plane, and stay within the limits of engine and airframe.";

pub(super) fn text(logged: &Logged) -> String {
    let blade = if logged.as_carved { "carved propeller, as measured" } else { "propeller as drawn" };
    let mut parts = vec![format!("{}: logbook, {blade}", logged.title), factors(&logged.estimate.found)];
    if !logged.estimate.remarks.is_empty() {
        parts.push(logged.estimate.remarks.join("\n"));
    }
    parts.push(readings(logged));
    parts
        .push(briefs(logged.flight_points.iter().flat_map(|c| [(&c.drawn, "before"), (&c.shaped, "after")])));
    parts.push(CAUTION.into());
    parts.join("\n\n")
}

fn factors(found: &[FactorFound]) -> String {
    let header = ["factor", "found", "±", "± before", ""];
    let row = |f: &FactorFound| {
        vec![
            f.title.into(),
            figure(Some(f.value), 3),
            figure(Some(f.value * f.deviation), 3),
            figure(Some(f.width), 3),
            f.says().into(),
        ]
    };
    table(&header, found.iter().map(row).collect())
}

fn readings(logged: &Logged) -> String {
    let header = ["reading", "rpm", "before", "after", "fuel or A", "before", "after", "off σ", ""];
    let row = |(i, l): (usize, &LogLine)| {
        vec![
            (i + 1).to_string(),
            figure(l.engine_rpm, 0),
            figure(l.before_rpm, 0),
            figure(l.after_rpm, 0),
            figure(l.consumption, 2),
            figure(l.before_consumption, 2),
            figure(l.after_consumption, 2),
            figure(l.off, 1),
            l.remark.clone(),
        ]
    };
    table(&header, logged.readings.iter().enumerate().map(row).collect())
}

pub(super) fn changes(rig: &Rig, wanted: &Wanted, changes: &[Change]) -> String {
    let name = rig.job.flight_points.get(wanted.point).map_or("", |p| p.name.as_str());
    let value = |v: f64| match wanted.figure {
        Figure::AirspeedMS => format!("{} km/h", figure(Some(3.6 * v), 1)),
        _ => format!("{} rpm", figure(Some(v), 0)),
    };
    let wood = changes.iter().any(|c| c.by_removal);
    let before = spokeshave::carved::analyse(rig).ok();
    let before = before.as_ref();
    let how = if wood { ", by taking wood off the carved blade" } else { "" };
    let mut parts = vec![format!("Wanted at {name}: {}{how}", value(wanted.value))];
    for c in changes {
        let amount = c.says(&|m| format!("{} mm", signed(Some(1e3 * m), 0)));
        if c.is_in_vain() {
            parts.push(amount);
            continue;
        }
        let reached = match (c.reached, c.had) {
            (true, _) => String::new(),
            (false, Some(had)) => format!(" Not reached: {} is the nearest.", value(had)),
            (false, None) => format!(" Not reached: {}", c.state.sentence()),
        };
        let rows = c.flight_points.iter().flat_map(|p| [(&p.drawn, "now"), (&p.shaped, "changed")]);
        parts.push(format!(
            "{amount}{reached} Then {} mm across, pitch {} mm.{}\n{}",
            figure(Some(1e3 * c.diameter_m), 0),
            figure(Some(1e3 * c.pitch_m), 0),
            c.says_limit().map_or_else(String::new, |says| format!(" {says}")),
            briefs(rows)
        ));
        if let (Some(plan), Some(before)) = (&c.plan, before) {
            parts.push(crate::carved::take_off(plan));
            parts.extend(Some(plan.warns(before).join("\n")).filter(|warns| !warns.is_empty()));
        }
    }
    parts.join("\n\n")
}
