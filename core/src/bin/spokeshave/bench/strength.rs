//! `spokeshave bench JOB strength`.

use serde::Serialize;
use spokeshave::result::Mass;
use spokeshave::rig::Rig;
use spokeshave::wood::{BladeBeam, mass};

use crate::input::{Outcome, Stop, print, print_json};
use crate::table::{figure, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// One JSON document, SI units
    #[arg(long)]
    json: bool,
}

#[derive(Serialize)]
struct Told {
    material: String,
    mass: Mass,
}

pub(super) fn run(rig: &Rig, args: &Args) -> Outcome {
    let beam = BladeBeam::new(rig).map_err(Stop::bad)?;
    let told = Told { material: beam.material.title.clone(), mass: mass(&beam) };
    if args.json {
        print_json(&told)?;
    } else {
        let m = &told.mass;
        let rows = [
            ("one blade, kg", m.blade_kg, 3),
            ("all blades, kg", m.blades_kg, 3),
            ("centre of gravity from the axis, mm", 1e3 * m.centre_m, 1),
            ("static moment of one blade, kg mm", 1e3 * m.static_moment_kg_m, 1),
            ("inertia of all blades, kg m²", m.inertia_kg_m2, 4),
        ];
        let rows = rows.map(|(what, value, decimals)| vec![what.into(), figure(Some(value), decimals)]);
        print(&table(&[&told.material, ""], rows.to_vec()))?;
    }
    Ok(true)
}
