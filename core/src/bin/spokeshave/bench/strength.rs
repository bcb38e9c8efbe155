//! `spokeshave bench JOB strength`.

mod text;

use spokeshave::result::{Strength, StressStation};
use spokeshave::rig::Rig;
use spokeshave::wood;

use crate::input::{Format, Outcome, Stop, print, print_csv, print_json};
use crate::table::{csv_figure, word};

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    format: Format,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let strength = wood::strength(rig).map_err(Stop::bad)?;
    if args.format.json {
        print_json(&strength)?;
    } else if args.format.csv {
        print_csv(&HEADER, strength.stations.iter().map(row))?;
    } else {
        print(&text::sheet(&rig.job, &strength))?;
    }
    Ok(answered(&strength))
}

fn answered(strength: &Strength) -> bool {
    if strength.governing.is_none() {
        eprintln!(
            "spokeshave: no answer: no flight point has one, so that no load is known; the list of cases says why"
        );
    }
    strength.governing.is_some()
}

const HEADER: [&str; 20] = [
    "station",
    "radius_m",
    "chord_m",
    "thickness_m",
    "area_m2",
    "flat_m4",
    "edge_m4",
    "torsion_m4",
    "case",
    "tension_n",
    "flat_n_m",
    "edge_n_m",
    "twisting_n_m",
    "axial_pa",
    "tension_pa",
    "compression_pa",
    "shear_pa",
    "kind",
    "margin",
    "thicker_m",
];

fn row(s: &StressStation) -> Vec<String> {
    let figures = |of: &[Option<f64>]| of.iter().map(|v| csv_figure(*v)).collect::<Vec<_>>();
    let mut row = vec![s.station.map_or_else(|| "hub".into(), |n| n.to_string())];
    row.extend(figures(&[
        Some(s.radius_m),
        Some(s.chord_m),
        Some(s.thickness_m),
        Some(s.area_m2),
        Some(s.flat_m4),
        Some(s.edge_m4),
        Some(s.torsion_m4),
    ]));
    row.push(s.case.clone().unwrap_or_default());
    row.extend(figures(&[
        s.tension_n,
        s.flat_n_m,
        s.edge_n_m,
        s.twisting_n_m,
        s.axial_pa,
        s.tension_pa,
        s.compression_pa,
        s.shear_pa,
    ]));
    row.push(s.kind.map(|k| word(&k)).unwrap_or_default());
    row.extend(figures(&[s.margin, s.thicker_m]));
    row
}
