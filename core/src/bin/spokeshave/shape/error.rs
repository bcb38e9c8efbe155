//! `spokeshave shape JOB error`.

use spokeshave::result::{Cost, ErrorCosts, Tolerance};
use spokeshave::rig::Rig;
use spokeshave::shape;

use super::figures::{Words, words};
use super::refused;
use crate::input::{Outcome, print, print_json};
use crate::table::{figure, signed, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// Tolerance of the blade angle, degrees either way
    #[arg(long, default_value_t = 0.25)]
    angle_deg: f64,
    /// Tolerance of the chord, mm either way
    #[arg(long, default_value_t = 0.5)]
    chord_mm: f64,
    /// Tolerance of the thickness, mm either way
    #[arg(long, default_value_t = 0.3)]
    thickness_mm: f64,
    /// Doubt of the polars' lift coefficients, percent either way
    #[arg(long, default_value_t = 3.0)]
    lift_percent: f64,
    /// Doubt of the polars' drag coefficients, percent either way
    #[arg(long, default_value_t = 10.0)]
    drag_percent: f64,
    /// One JSON document, SI units
    #[arg(long)]
    json: bool,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let tolerance = Tolerance {
        angle_deg: args.angle_deg,
        chord_mm: args.chord_mm,
        thickness_mm: args.thickness_mm,
        lift_percent: args.lift_percent,
        drag_percent: args.drag_percent,
    };
    match shape::error_costs(rig, tolerance) {
        Ok(costs) if args.json => print_json(&costs)?,
        Ok(costs) => print(&text(&costs))?,
        Err(e) => return refused(&e),
    }
    Ok(true)
}

fn text(e: &ErrorCosts) -> String {
    let radii: Vec<String> = e.radii_m.iter().map(|r| figure(Some(1e3 * r), 0)).collect();
    let mut header = vec!["per degree at r mm", "figure", "drawn"];
    header.extend(radii.iter().map(String::as_str));
    header.extend(["independent ±", "worst ±", "polars ±"]);
    let t = &e.tolerance;
    format!(
        "What an error of the blade angle costs, and the band of ±{}°, ±{} mm chord, ±{} mm thickness,\n\
         and of polars with ±{} % of lift, ±{} % of drag\n\
         (linear; chord and thickness by station in the JSON)\n\n{}",
        t.angle_deg,
        t.chord_mm,
        t.thickness_mm,
        t.lift_percent,
        t.drag_percent,
        table(&header, e.costs.iter().map(row).collect())
    )
}

fn row(c: &Cost) -> Vec<String> {
    let Words { name, per, decimals } = words(c.figure);
    let digits = decimals + 1;
    let mut row = vec![c.flight_point.clone(), name.into(), figure(Some(per * c.drawn), digits)];
    row.extend(c.per_degree.iter().map(|s| signed(s.map(|s| per * s), digits)));
    row.extend([c.band_independent, c.band_worst, c.band_polars].map(|b| figure(Some(per * b), digits)));
    row
}
