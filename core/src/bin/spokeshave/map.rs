//! `spokeshave map`: departure over speed and radius.

use spokeshave::rotor::DepartureMap;

use crate::input::{JobSource, Outcome, point_index, print, print_csv};
use crate::table::{csv_figure, signed, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    /// The flight point whose air is kept; the first without it
    #[arg(long)]
    point: Option<String>,
    /// Number of speeds
    #[arg(long, default_value_t = 12, value_parser = clap::value_parser!(u32).range(2..=1000))]
    speeds: u32,
    /// Number of radii
    #[arg(long, default_value_t = 12, value_parser = clap::value_parser!(u32).range(1..=1000))]
    radii: u32,
    /// CSV, SI units and degrees, one row a cell
    #[arg(long)]
    csv: bool,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    let index = point_index(&rig, args.point.as_deref())?;
    let Some(map) = rig.map(index, args.speeds, args.radii) else { return Ok(false) };
    if args.csv {
        let header = ["airspeed_m_s", "rpm", "radius_m", "departure_deg", "share_of_best", "past_stall_deg"];
        print_csv(&header, cells(&map))?;
    } else {
        print(&text(&map))?;
    }
    Ok(true)
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
