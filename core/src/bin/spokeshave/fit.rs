//! `spokeshave fit`: where propeller, engine and aircraft meet over the whole speed range.

use spokeshave::result::{EnvelopePoint, Fit, FullThrottle, Level, Mark, State};
use spokeshave::rig::Rig;

use crate::input::{Format, JobSource, Outcome, point_index, print, print_csv, print_json};
use crate::table::{csv_figure, figure, signed, table, word};
use crate::vary::VaryArgs;

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    /// The flight point whose air is kept; the first without it
    #[arg(long)]
    point: Option<String>,
    /// Number of speeds
    #[arg(long, default_value_t = 60, value_parser = clap::value_parser!(u32).range(3..=2000))]
    speeds: u32,
    #[command(flatten)]
    format: Format,
    #[command(flatten)]
    vary: VaryArgs,
}

pub(crate) fn run(args: &Args) -> Outcome {
    if args.vary.any() {
        return vary(args);
    }
    let rig = args.source.rig()?;
    let Some(fit) = rig.fit(point_index(&rig, args.point.as_deref())?, args.speeds) else {
        let why = if rig.shaft.is_some() { State::EngineCannotTurnIt } else { State::NeedsEngine };
        print(&format!("No answer. {}", why.sentence()))?;
        return Ok(false);
    };
    if args.format.json {
        print_json(&fit)?;
    } else if args.format.csv {
        print_csv(&CSV, fit.envelope.points.iter().map(csv_row))?;
    } else {
        print(&text(&fit))?;
    }
    Ok(true)
}

/// Headings of the figures that decide, one row a job.
const VERDICT: [&str; 14] = [
    "standing_rpm",
    "standing_thrust_n",
    "best_rate_of_climb_m_s",
    "best_rate_of_climb_airspeed_m_s",
    "top_speed_m_s",
    "top_speed_rpm",
    "top_speed_held_at_limit",
    "best_range_m",
    "best_range_airspeed_m_s",
    "best_endurance_s",
    "best_endurance_airspeed_m_s",
    "ground_roll_m",
    "distance_to_15_m",
    "service_ceiling_m",
];

fn vary(args: &Args) -> Outcome {
    let mut answered = true;
    let rows = args.vary.rows(&args.source, |rig: &Rig| {
        let fit = rig.fit(point_index(rig, args.point.as_deref())?, args.speeds);
        answered &= fit.is_some();
        Ok(vec![fit.map_or_else(|| vec![String::new(); VERDICT.len()], |fit| verdict(&fit))])
    })?;
    let header: Vec<&str> = args.vary.paths().chain(VERDICT).collect();
    print_csv(&header, rows.into_iter())?;
    Ok(answered)
}

fn verdict(fit: &Fit) -> Vec<String> {
    let m = &fit.envelope.marks;
    let value = |mark: Option<Mark>| csv_figure(mark.map(|m| m.value));
    let speed = |mark: Option<Mark>| csv_figure(mark.map(|m| m.airspeed_m_s));
    vec![
        csv_figure(fit.envelope.standing.as_ref().map(|s| s.rpm)),
        csv_figure(fit.envelope.standing.as_ref().map(|s| s.thrust_n)),
        value(m.best_rate_of_climb),
        speed(m.best_rate_of_climb),
        speed(m.top_speed),
        csv_figure(m.top_speed.map(|t| t.rpm)),
        m.top_speed.map_or_else(String::new, |t| t.held_at_limit.to_string()),
        value(m.best_range),
        speed(m.best_range),
        value(m.best_endurance),
        speed(m.best_endurance),
        csv_figure(fit.take_off.map(|t| t.ground_roll_m)),
        csv_figure(fit.take_off.map(|t| t.distance_to_15_m)),
        csv_figure(fit.ceilings.and_then(|c| c.service_m)),
    ]
}

fn text(fit: &Fit) -> String {
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
        "drag N",
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
    air + &verdict_table(fit) + "\n\n" + &limits(fit).join("\n") + "\n\n" + &table(&header, rows)
}

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
    let rows = vec![
        vec![
            "Standing start, thrust N".into(),
            figure(standing.map(|s| s.thrust_n), 0),
            "0".into(),
            figure(standing.map(|s| s.rpm), 0),
        ],
        plain("Ground roll, m", figure(roll.map(|r| r.0), 0)),
        plain("Distance to 15 m, m", figure(roll.map(|r| r.1), 0)),
        of("Best angle of climb, °", m.best_angle_of_climb, value(m.best_angle_of_climb, 1.0, 1)),
        of("Best rate of climb, m/s", m.best_rate_of_climb, value(m.best_rate_of_climb, 1.0, 2)),
        of("Longest aloft, h", m.best_endurance, value(m.best_endurance, 3600.0, 2)),
        of("Longest range, km", m.best_range, value(m.best_range, 1000.0, 0)),
        of("Top speed, thrust N", m.top_speed, value(m.top_speed, 1.0, 0)),
        plain("Service ceiling, m", figure(fit.ceilings.and_then(|c| c.service_m), 0)),
    ];
    table(&["", "value", "km/h", "rpm"], rows)
}

/// A plain sentence for each limit.
fn limits(fit: &Fit) -> Vec<String> {
    let m = &fit.envelope.marks;
    let mut said = Vec::new();
    if let Some(stall) = fit.envelope.speeds.and_then(|s| s.stall_m_s) {
        said.push(format!(
            "The stall is at {:.0} km/h; level flight and climb count from there on.",
            3.6 * stall
        ));
    }
    if let Some(v) = m.limit_rpm_from_m_s {
        said.push(format!(
            "From {:.0} km/h on full throttle would pass the engine's limit rpm, or the end of its power curve: figures there are throttled back to it.",
            3.6 * v
        ));
    }
    if m.top_speed.is_some_and(|t| t.held_at_limit) {
        said.push(
            "Top speed is held at the limit rpm: the engine could give more than the propeller may take."
                .into(),
        );
    }
    if m.top_speed.is_none() {
        said.push("No level flight at full throttle is as fast as the stall.".into());
    }
    for t in &m.tip_mach_from {
        said.push(format!("From {:.0} km/h on the tip passes Mach {:.2}.", 3.6 * t.airspeed_m_s, t.tip_mach));
    }
    if fit.standing_crossings.len() > 1 {
        said.push(format!(
            "At rest engine and propeller agree at {} rpm; the highest stable one counts.",
            fit.standing_crossings.iter().map(|c| format!("{:.0}", c.rpm)).collect::<Vec<_>>().join(", ")
        ));
    }
    if m.limit_rpm_from_m_s.is_none() && m.tip_mach_from.is_empty() {
        said.push("Neither the limit rpm nor a tip Mach number of note is passed in this range.".into());
    }
    said.push(
        "Estimates at this mass, without reserve, wind or slope; keep to the handbook and to local rules."
            .into(),
    );
    said
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

const CSV: [&str; 23] = [
    "airspeed_m_s",
    "asked_n",
    "full_state",
    "full_rpm",
    "full_held_at_limit",
    "full_turn_deg",
    "full_thrust_n",
    "full_power_w",
    "full_efficiency",
    "full_tip_mach",
    "full_rate_of_climb_m_s",
    "full_climb_angle_deg",
    "level_state",
    "level_rpm",
    "level_turn_deg",
    "level_power_w",
    "level_power_share",
    "level_efficiency",
    "level_tip_mach",
    "level_fuel_kg_per_h",
    "level_battery_current_a",
    "level_endurance_s",
    "level_range_m",
];

fn csv_row(p: &EnvelopePoint) -> Vec<String> {
    let full = |of: fn(&FullThrottle) -> Option<f64>| csv_figure(p.full.as_ref().and_then(of));
    let level = |of: fn(&Level) -> Option<f64>| csv_figure(p.level.as_ref().and_then(of));
    vec![
        csv_figure(Some(p.airspeed_m_s)),
        csv_figure(p.asked_n),
        word(&p.full_state),
        full(|f| Some(f.rpm)),
        p.full.as_ref().map_or_else(String::new, |f| f.held_at_limit.to_string()),
        full(|f| Some(f.turn_deg)),
        full(|f| Some(f.thrust_n)),
        full(|f| Some(f.power_w)),
        full(|f| f.efficiency),
        full(|f| Some(f.tip_mach)),
        full(|f| f.rate_of_climb_m_s),
        full(|f| f.climb_angle_deg),
        word(&p.level_state),
        level(|l| Some(l.rpm)),
        level(|l| Some(l.turn_deg)),
        level(|l| Some(l.power_w)),
        level(|l| l.power_share),
        level(|l| l.efficiency),
        level(|l| Some(l.tip_mach)),
        level(|l| l.fuel_kg_per_h),
        level(|l| l.battery_current_a),
        level(|l| l.endurance_s),
        level(|l| l.range_m),
    ]
}
