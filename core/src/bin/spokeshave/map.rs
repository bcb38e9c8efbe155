//! `spokeshave map`: departure over speed and radius.

use serde::Serialize;
use spokeshave::fit::Along;
use spokeshave::rotor::{DepartureMap, MapCell};

use crate::input::{Format, JobSource, Outcome, PointOf, print, print_csv, print_json};
use crate::table::{csv_figure, signed, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    #[command(flatten)]
    point: PointOf,
    /// Number of speeds
    #[arg(long, default_value_t = 12, value_parser = clap::value_parser!(u32).range(2..=1000))]
    speeds: u32,
    /// Number of radii
    #[arg(long, default_value_t = 12, value_parser = clap::value_parser!(u32).range(1..=1000))]
    radii: u32,
    /// What the speeds follow
    #[arg(long, value_enum, default_value_t = Line::FullThrottle)]
    along: Line,
    #[command(flatten)]
    format: Format,
}

/// What the speeds follow.
#[derive(Clone, Copy, Debug, clap::ValueEnum)]
enum Line {
    /// Full throttle, or the limit rpm where that is less
    FullThrottle,
    /// Level flight at part throttle
    Level,
}

impl From<Line> for Along {
    fn from(line: Line) -> Self {
        match line {
            Line::FullThrottle => Self::FullThrottle,
            Line::Level => Self::Level,
        }
    }
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    let index = args.point.index(&rig)?;
    let Some(map) = rig.map(index, args.along.into(), args.speeds, args.radii) else { return Ok(false) };
    if args.format.json {
        print_json(&Told::new(&rig.job.flight_points[index].name, &map))?;
    } else if args.format.csv {
        let header = ["airspeed_m_s", "rpm", "radius_m", "departure_deg", "share_of_best", "past_stall_deg"];
        print_csv(&header, cells(&map))?;
    } else {
        print(&text(&map))?;
    }
    Ok(true)
}

/// The map for programs; cells by radius, then by speed.
#[derive(Serialize)]
struct Told<'a> {
    flight_point: &'a str,
    radii_m: &'a [f64],
    airspeeds_m_s: &'a [f64],
    rpm: &'a [f64],
    departure_deg: Vec<Vec<Option<f64>>>,
    share_of_best: Vec<Vec<Option<f64>>>,
    past_stall_deg: Vec<Vec<Option<f64>>>,
}

impl<'a> Told<'a> {
    fn new(flight_point: &'a str, map: &'a DepartureMap) -> Self {
        let every = |of: fn(&MapCell) -> Option<f64>| {
            map.cells.rows().into_iter().map(|row| row.iter().map(of).collect()).collect()
        };
        Self {
            flight_point,
            radii_m: &map.radii_m,
            airspeeds_m_s: &map.airspeeds_m_s,
            rpm: &map.rpm,
            departure_deg: every(|c| c.departure_deg),
            share_of_best: every(|c| c.share_of_best),
            past_stall_deg: every(|c| c.past_stall_deg),
        }
    }
}

fn cells(map: &DepartureMap) -> impl Iterator<Item = Vec<String>> {
    map.cells.indexed_iter().map(|((r, v), cell)| {
        [
            Some(map.airspeeds_m_s[v]),
            Some(map.rpm[v]),
            Some(map.radii_m[r]),
            cell.departure_deg,
            cell.share_of_best,
            cell.past_stall_deg,
        ]
        .into_iter()
        .map(csv_figure)
        .collect()
    })
}

fn text(map: &DepartureMap) -> String {
    let speeds = map.airspeeds_m_s.iter().map(|v| format!("{:.0}", 3.6 * v));
    let header: Vec<String> = std::iter::once("r mm \\ km/h".to_string()).chain(speeds).collect();
    let header: Vec<&str> = header.iter().map(String::as_str).collect();
    let rows = map.cells.rows().into_iter().zip(&map.radii_m).rev().map(|(row, r)| {
        let figures = row.iter().map(|c| signed(c.departure_deg, 1));
        std::iter::once(format!("{:.0}", 1000.0 * r)).chain(figures).collect()
    });
    format!("Departure from the best angle, degrees\n{}", table(&header, rows.collect()))
}
