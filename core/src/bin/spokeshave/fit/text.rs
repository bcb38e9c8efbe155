//! The fit told for people.

use spokeshave::result::{EnvelopePoint, Fit, Margin, Mark, PitchWorth, WorthOf};

use super::limits::limits;
use crate::table::{figure, signed, table};

pub(super) fn text(fit: &Fit, limits_kept: &[Margin]) -> String {
    let air = format!(
        "{}\nat the air of {}: {:.0} m, {} K from standard, {:.3} kg/m³\n\n",
        fit.title,
        fit.envelope.flight_point,
        fit.envelope.altitude_m,
        signed(Some(fit.envelope.isa_offset_k), 0),
        fit.envelope.density_kg_m3
    );
    let every = fit.envelope.points.len().div_ceil(16).max(1);
    let header = [
        "km/h",
        if fit.envelope.hover_n().is_some() { "weight N" } else { "drag N" },
        "full: rpm",
        "thrust N",
        "power kW",
        "climb m/s",
        "level: rpm",
        "power kW",
        "share %",
        "range km",
    ];
    let rows = fit.envelope.points.iter().step_by(every).map(row).collect();
    air + &verdict_table(fit)
        + "\n\n"
        + &worth_table(&fit.pitch_worth)
        + &limits(fit, limits_kept).join("\n")
        + "\n\n"
        + &table(&header, rows)
}

const VERDICT: [&str; 4] = ["", "value", "km/h", "rpm"];

fn verdict_table(fit: &Fit) -> String {
    let m = &fit.envelope.marks;
    let kmh = |mark: Option<Mark>| figure(mark.map(|m| 3.6 * m.airspeed_m_s), 0);
    let rpm = |mark: Option<Mark>| figure(mark.map(|m| m.rpm), 0);
    let of =
        |what: &str, mark: Option<Mark>, value: String| vec![what.to_string(), value, kmh(mark), rpm(mark)];
    let value = |mark: Option<Mark>, unit: f64, digits: usize| figure(mark.map(|m| m.value / unit), digits);
    let roll = fit.take_off.map(|t| (t.ground_roll_m, t.distance_to_15_m));
    let plain = |what: &str, value: String| vec![what.to_string(), value, String::new(), String::new()];
    let standing = fit.envelope.standing.as_ref();
    let standing = vec![
        "Standing start, thrust N".into(),
        figure(standing.map(|s| s.thrust_n), 0),
        "0".into(),
        figure(standing.map(|s| s.rpm), 0),
    ];
    let aloft = of("Longest aloft, h", m.best_endurance, value(m.best_endurance, 3600.0, 2));
    if fit.envelope.hover_n().is_some() {
        let climb = of("Fastest climb straight up, thrust N", m.top_speed, value(m.top_speed, 1.0, 0));
        return table(&VERDICT, vec![standing, climb, aloft]);
    }
    let rows = vec![
        standing,
        plain("Ground roll, m", figure(roll.map(|r| r.0), 0)),
        plain("Distance to 15 m, m", figure(roll.map(|r| r.1), 0)),
        of("Best angle of climb, °", m.best_angle_of_climb, value(m.best_angle_of_climb, 1.0, 1)),
        of("Best rate of climb, m/s", m.best_rate_of_climb, value(m.best_rate_of_climb, 1.0, 2)),
        aloft,
        of("Longest range, km", m.best_range, value(m.best_range, 1000.0, 0)),
        of("Top speed, thrust N", m.top_speed, value(m.top_speed, 1.0, 0)),
        plain("Service ceiling, m", figure(fit.ceilings.and_then(|c| c.service_m), 0)),
    ];
    table(&VERDICT, rows)
}

fn row(p: &EnvelopePoint) -> Vec<String> {
    let (full, level) = (p.full.as_ref(), p.level.as_ref());
    vec![
        figure(Some(3.6 * p.airspeed_m_s), 0),
        figure(p.asked_n, 0),
        figure(full.map(|f| f.rpm), 0),
        figure(full.map(|f| f.thrust_n), 0),
        figure(full.map(|f| f.power_w / 1000.0), 2),
        signed(full.and_then(|f| f.rate_of_climb_m_s), 2),
        figure(level.map(|l| l.rpm), 0),
        figure(level.map(|l| l.power_w / 1000.0), 2),
        figure(level.and_then(|l| l.power_share).map(|s| 100.0 * s), 0),
        figure(level.and_then(|l| l.range_m).map(|r| r / 1000.0), 0),
    ]
}

/// What a variable pitch is worth, for the flight points that have a figure.
fn worth_table(worth: &[PitchWorth]) -> String {
    let rows: Vec<Vec<String>> = worth.iter().map(worth_row).collect();
    if rows.is_empty() {
        return String::new();
    }
    let header = ["A variable pitch would give", "of", "as set", "best", "gain %", "blades turned °", ""];
    let said = table(&header, rows);
    format!("{said}\n\n")
}

fn worth_row(w: &PitchWorth) -> Vec<String> {
    let (of, unit, digits) = match w.of {
        WorthOf::Thrust => ("thrust N", 1.0, 1),
        WorthOf::TopSpeed => ("top speed km/h", 1.0 / 3.6, 1),
        WorthOf::ShaftPower => ("shaft power kW", 1000.0, 2),
    };
    vec![
        w.flight_point.clone(),
        of.into(),
        figure(w.as_set.map(|v| v / unit), digits),
        figure(w.best.map(|v| v / unit), digits),
        signed(w.gain.map(|g| 100.0 * g), 1),
        signed(w.turn_deg, 1),
        if w.at_end_of_search { "at the end of the search".into() } else { String::new() },
    ]
}
