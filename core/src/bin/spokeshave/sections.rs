//! `spokeshave sections`: the families that come with the program.

use spokeshave::section::library;

use crate::input::{Outcome, print};
use crate::table::table;

#[derive(clap::Args)]
pub(crate) struct Args {}

pub(crate) fn run(_: &Args) -> Outcome {
    let mut rows = Vec::new();
    let mut origins = String::new();
    for name in library().names() {
        let sets = library().n_crits(name);
        let Some(family) = sets.first().and_then(|n| library().family(name, *n)) else { continue };
        let (low, high) = family.reynolds_range();
        let thickness = family
            .thickness_range()
            .map_or_else(String::new, |(a, b)| format!("{:.0} to {:.0}", 100.0 * a, 100.0 * b));
        let ns: Vec<String> = sets.iter().map(ToString::to_string).collect();
        rows.push(vec![
            name.to_string(),
            thickness,
            format!("{:.0} to {:.0}", low / 1000.0, high / 1000.0),
            ns.join(", "),
            if family.about.face_angle_deg.is_empty() { "no" } else { "yes" }.to_string(),
        ]);
        origins += &["\n\n", &family.about.title, ": ", &family.about.origin].concat();
    }
    print(&(table(&["family", "thickness %", "Re/1000", "n at transition", "flat face"], rows) + &origins))?;
    Ok(true)
}
