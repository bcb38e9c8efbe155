//! `spokeshave sweep`: coefficients over speed at a flight point's rpm and air.

use spokeshave::rotor::CurvePoint;

use crate::input::{Format, JobSource, Outcome, PointOf, print, print_csv, print_json};
use crate::table::{csv_figure, figure, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    source: JobSource,
    #[command(flatten)]
    point: PointOf,
    /// Steps from rest to where the thrust is gone
    #[arg(long, default_value_t = 20, value_parser = clap::value_parser!(u32).range(1..=2000))]
    steps: u32,
    #[command(flatten)]
    format: Format,
}

pub(crate) fn run(args: &Args) -> Outcome {
    let rig = args.source.rig()?;
    let index = args.point.index(&rig)?;
    let curve = rig.curves(index, args.steps);
    if args.format.json {
        print_json(&curve)?;
    } else if args.format.csv {
        let header = ["airspeed_m_s", "advance_ratio", "ct", "cp", "cq", "efficiency", "thrust_n", "power_w"];
        print_csv(&header, curve.iter().map(csv_row))?;
    } else {
        let header = ["km/h", "J", "CT", "CP", "efficiency", "thrust N", "power kW"];
        print(&table(&header, curve.iter().map(row).collect()))?;
    }
    Ok(!curve.is_empty())
}

fn row(p: &CurvePoint) -> Vec<String> {
    let c = &p.coefficients;
    vec![
        figure(Some(3.6 * p.airspeed_m_s), 0),
        figure(Some(c.advance_ratio), 3),
        figure(Some(c.ct), 4),
        figure(Some(c.cp), 4),
        figure(c.efficiency, 3),
        figure(Some(p.thrust_n), 1),
        figure(Some(p.power_w / 1000.0), 2),
    ]
}

fn csv_row(p: &CurvePoint) -> Vec<String> {
    let c = &p.coefficients;
    [
        Some(p.airspeed_m_s),
        Some(c.advance_ratio),
        Some(c.ct),
        Some(c.cp),
        Some(c.cq),
        c.efficiency,
        Some(p.thrust_n),
        Some(p.power_w),
    ]
    .into_iter()
    .map(csv_figure)
    .collect()
}
