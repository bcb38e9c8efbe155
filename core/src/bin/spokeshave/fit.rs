//! `spokeshave fit`: where propeller, engine and aircraft meet over the whole speed range.

mod limits;
mod rows;
mod text;

use serde::Serialize;
use spokeshave::result::{Fit, Margin, Mark, State};
use spokeshave::rig::Rig;
use spokeshave::shape;

use crate::input::{Format, JobSource, Outcome, PointOf, print, print_csv, print_json};
use crate::table::csv_figure;
use crate::vary::VaryArgs;
use rows::{CSV, csv_row};
use text::text;

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    #[command(flatten)]
    point: PointOf,
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
    let Some(mut fit) = rig.fit(args.point.index(&rig)?, args.speeds) else {
        let why = if rig.shaft.is_some() { State::EngineCannotTurnIt } else { State::NeedsEngine };
        print(&format!("No answer. {}", why.sentence()))?;
        return Ok(false);
    };
    if !args.format.csv {
        fit.pitch_worth = rig.pitch_worth();
    }
    let limits = shape::kept(&rig);
    if args.format.json {
        print_json(&Told { fit, limits })?;
    } else if args.format.csv {
        print_csv(&CSV, fit.envelope.points.iter().map(csv_row))?;
    } else {
        print(&text(&fit, &limits))?;
    }
    Ok(true)
}

/// The fit with the limits of the job's wishes and of its engine.
#[derive(Serialize)]
struct Told {
    #[serde(flatten)]
    fit: Fit,
    limits: Vec<Margin>,
}

/// Headings of the figures that decide, one row a job.
const VERDICT: [&str; 15] = [
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
    "closed_throttle_dive_m_s",
];

fn vary(args: &Args) -> Outcome {
    let mut answered = true;
    let rows = args.vary.rows(&args.source, |rig: &Rig| {
        let fit = rig.fit(args.point.index(rig)?, args.speeds);
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
        speed(m.closed_throttle_dive),
    ]
}
