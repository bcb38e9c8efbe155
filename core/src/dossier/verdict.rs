//! What decides, first.

use crate::bench::sheet::table::{figures, words};
use crate::result::{Brief, CarvedStrength, Envelope, PointResult, State, StationResult};
use crate::rig::Rig;
use crate::shape::briefs;

use super::Told;
use super::flow::Flow;
use super::scale::{DEGREES, PLAIN, RPM, Scale, Scales};

/// A Mach number.
const MACH: Scale = Scale::fixed("", 1.0, 2);

pub(super) fn write(flow: &mut Flow, told: &Told) {
    let title = &told.rig.job.title;
    flow.title(if title.is_empty() { "Propeller" } else { title });
    flow.text(
        "Report of a propeller job by Spokeshave: what it is made for, what it does, how that was worked \
         out, how it is carved and what was measured. Every figure is an estimate that needs margin and \
         test.",
    );
    flow.blanks(&["Propeller number", "Made by", "Inspected by", "Date"]);
    flow.part("Verdict");
    points(flow, &briefs(told.rig), told.scales, None);
    let mut said: Vec<String> = told.points.iter().map(departure).collect();
    said.extend(told.strength.iter().map(|s| s.verdict.sentence.clone()));
    said.extend(told.envelope.iter().flat_map(|e| range(e, told)));
    flow.list(&said);
    as_carved(flow, told);
}

/// The blades as measured beside the drawn ones.
fn as_carved(flow: &mut Flow, told: &Told) {
    let Some(Ok(carved)) = &told.carved else { return };
    flow.heading("As carved");
    let rows = carved.flight_points.iter().flat_map(|p| [p.drawn.clone(), p.carved.clone()]);
    points(flow, &rows.collect::<Vec<_>>(), told.scales, Some(&["drawn", "carved"]));
    let mut said = vec![format!("Static balance: {}.", carved.balance.says())];
    said.extend(carved.strength.as_ref().map(CarvedStrength::says));
    flow.list(&said);
}

/// Flight points in a table; with names, each row has one before it.
pub(super) fn points(flow: &mut Flow, all: &[Brief], scales: &Scales, names: Option<&[&str]>) {
    let (speed, thrust) = (format!("speed\n{}", scales.speed.sign), format!("thrust\n{}", scales.force.sign));
    let (power, climb) = (format!("power\n{}", scales.power.sign), format!("climb\n{}", scales.climb.sign));
    let mut columns = vec![words("flight point", if names.is_some() { 34.0 } else { 58.0 })];
    if names.is_some() {
        columns.push(words("blades", 24.0));
    }
    columns.extend([
        figures(&speed, 16.0),
        figures("rpm", 16.0),
        figures(&thrust, 18.0),
        figures(&power, 18.0),
        figures("efficiency", 20.0),
        figures(&climb, 18.0),
        figures("tip\nMach", 16.0),
    ]);
    let row = |(i, b): (usize, &Brief)| {
        let figures = [
            scales.speed.figure(b.airspeed_m_s),
            RPM.figure(b.rpm),
            scales.force.figure(b.thrust_n),
            scales.power.figure(b.power_w),
            PLAIN.figure(b.efficiency.or(b.figure_of_merit)),
            scales.climb.figure(b.rate_of_climb_m_s),
            MACH.figure(b.tip_mach),
        ];
        let name = names.map(|n| n[i % n.len()].to_string());
        std::iter::once(b.name.clone()).chain(name).chain(figures).collect()
    };
    flow.table(&columns, &all.iter().enumerate().map(row).collect::<Vec<_>>());
    let mut said: Vec<String> = Vec::new();
    for b in all {
        let why = if b.held_at_limit {
            "full throttle would pass the limit rpm; figures are throttled back to it."
        } else if b.rpm.is_none() {
            b.state.sentence()
        } else {
            continue;
        };
        let sentence = format!("{}: {why}", b.name);
        if !said.contains(&sentence) {
            said.push(sentence);
        }
    }
    if all.iter().any(|b| b.efficiency.is_none() && b.figure_of_merit.is_some()) {
        said.push("At rest the figure of merit stands for the efficiency.".into());
    }
    flow.list(&said);
}

fn departure(p: &PointResult) -> String {
    let known = p.stations.iter().enumerate().filter_map(|(i, s)| Some((i + 1, s.departure_deg?)));
    let worst = known.max_by(|a, b| a.1.abs().total_cmp(&b.1.abs()));
    let (State::Ok, Some((station, worst))) = (p.state, worst) else {
        return format!("{}: no departure to tell. {}", p.name, p.state.sentence());
    };
    let inside = p.stations.iter().filter(|s| in_band(s)).count();
    let side = if worst < 0.0 { "slack" } else { "hard" };
    format!(
        "{}: worst departure {} at station {station}, {side}; {inside} of {} stations inside the working band.",
        p.name,
        DEGREES.say(worst).trim_start_matches('-'),
        p.stations.len()
    )
}

pub(super) fn in_band(s: &StationResult) -> bool {
    let of = || Some((s.band_low_deg?..=s.band_high_deg?).contains(&s.departure_deg?));
    of() == Some(true)
}

/// What the speed range says.
fn range(e: &Envelope, told: &Told) -> Vec<String> {
    let (m, s) = (&e.marks, told.scales);
    let mut said = Vec::new();
    let mut of = |words: &str, mark: Option<crate::result::Mark>, value: &dyn Fn(f64) -> String| {
        if let Some(mark) = mark {
            said.push(format!(
                "{words}: {} at {}, {}.",
                value(mark.value),
                s.speed.say(mark.airspeed_m_s),
                RPM.say(mark.rpm)
            ));
        }
    };
    of("Best rate of climb", m.best_rate_of_climb, &|v| s.climb.say(v));
    of("Best angle of climb", m.best_angle_of_climb, &|v| DEGREES.say(v));
    of("Longest range", m.best_range, &|v| s.distance.say(v));
    of("Longest aloft", m.best_endurance, &|v| format!("{:.2} h", v / 3600.0));
    if let Some(top) = m.top_speed {
        let what = if e.hover_n().is_some() { "Fastest climb straight up" } else { "Top speed" };
        said.push(format!("{what}: {} at {}.", s.speed.say(top.airspeed_m_s), RPM.say(top.rpm)));
    }
    said.extend(e.cannot_hover(|n| s.force.say(n)));
    if let Some(t) = crate::fit::take_off(told.rig, e) {
        said.push(format!(
            "Take-off on level hard ground without wind: {} of roll, {} to a height of {}.",
            s.height.say(t.ground_roll_m),
            s.height.say(t.distance_to_15_m),
            s.height.say(15.0)
        ));
    }
    if let Some(v) = m.limit_rpm_from_m_s {
        said.push(format!("From {} on full throttle would pass the engine's limit rpm.", s.speed.say(v)));
    }
    said.extend(
        m.tip_mach_from.iter().map(|t| {
            format!("From {} on the tip passes Mach {:.2}.", s.speed.say(t.airspeed_m_s), t.tip_mach)
        }),
    );
    if !said.is_empty() {
        said.push(format!(
            "These in the air of {}, at the mass given, without reserve.",
            air(told.rig, told.usual, s)
        ));
    }
    said
}

/// The air of a flight point in words.
pub(super) fn air(rig: &Rig, i: usize, scales: &Scales) -> String {
    rig.job.flight_points.get(i).map_or_else(String::new, |p| {
        format!(
            "{} ({}, {} K from the standard atmosphere)",
            p.name,
            scales.height.say(p.altitude_m),
            DEGREES.signed(p.isa_offset_k)
        )
    })
}
