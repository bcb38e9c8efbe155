//! `spokeshave sections`: the families that come with the program, and the tables of one.

use spokeshave::section::{Family, SectionCurve, library, section_curves};

use crate::input::{Outcome, Stop, print, print_csv};
use crate::table::{figure, table};

#[derive(clap::Args)]
pub(crate) struct Args {
    /// A family: its best angles by Reynolds number
    name: Option<String>,
    /// Thickness, percent of the chord
    #[arg(long, value_name = "PERCENT", default_value_t = 12.0, requires = "name")]
    thickness: f64,
    /// Which tables: 9 for quiet air, 4 for disturbed air; the nearest there are
    #[arg(long = "amplification", value_name = "N", default_value_t = 9.0, requires = "name")]
    n_crit: f64,
    /// Lift and drag over the angle of attack as CSV
    #[arg(long, requires = "name")]
    csv: bool,
}

pub(crate) fn run(args: &Args) -> Outcome {
    match &args.name {
        Some(name) => one(args, name)?,
        None => print(&all())?,
    }
    Ok(true)
}

fn all() -> String {
    let mut rows = Vec::new();
    let mut origins = String::new();
    for name in library().names() {
        let sets = library().n_crits(name);
        let Some(family) = sets.first().and_then(|n| library().family(name, *n)) else { continue };
        let (low, high) = family.reynolds_range();
        let ns: Vec<String> = sets.iter().map(ToString::to_string).collect();
        rows.push(vec![
            name.to_string(),
            thickness_words(family),
            format!("{:.0} to {:.0}", low / 1000.0, high / 1000.0),
            ns.join(", "),
            if library().has_face(name) { "yes" } else { "no" }.to_string(),
        ]);
        origins += &["\n\n", &family.about.title, ": ", &family.about.origin].concat();
    }
    table(&["family", "thickness %", "Re/1000", "n at transition", "flat face"], rows) + &origins
}

fn thickness_words(family: &Family) -> String {
    let range = family.thickness_range();
    range.map_or_else(String::new, |(a, b)| format!("{:.0} to {:.0}", 100.0 * a, 100.0 * b))
}

fn one(args: &Args, name: &str) -> Result<(), Stop> {
    let family = library().family(name, args.n_crit).ok_or_else(|| {
        let names: Vec<&str> = library().names().collect();
        Stop::BadInput(format!("no section \"{name}\"; there are {}", names.join(", ")))
    })?;
    let ratio = args.thickness / 100.0;
    if !family.thickness_range().is_none_or(|(low, high)| (low - 1e-9..=high + 1e-9).contains(&ratio)) {
        let allowed = thickness_words(family);
        return Err(Stop::BadInput(format!(
            "--thickness {}: {name} has tables for {allowed} percent",
            args.thickness
        )));
    }
    let curves = section_curves(family, ratio);
    if args.csv {
        return print_csv(&["reynolds", "alpha_deg", "cl", "cd"], curves.iter().flat_map(csv_rows));
    }
    let rows = curves.iter().map(row).collect();
    let head = format!("{}, {} % thick, angles to the chord line\n", family.about.title, args.thickness);
    print(&(head + &table(&["Re/1000", "best angle", "lift-to-drag", "greatest cl", "least cd"], rows)))
}

fn row(curve: &SectionCurve) -> Vec<String> {
    let of = |i: usize| curve.points.iter().map(move |p| p[i]);
    vec![
        figure(Some(curve.reynolds / 1000.0), 0),
        figure(curve.best.map(|b| b.0), 1),
        figure(curve.best.map(|b| b.1), 1),
        figure(of(1).reduce(f64::max), 2),
        figure(of(2).reduce(f64::min), 4),
    ]
}

fn csv_rows(curve: &SectionCurve) -> impl Iterator<Item = Vec<String>> {
    let reynolds = curve.reynolds;
    curve.points.iter().map(move |p| std::iter::once(&reynolds).chain(p).map(ToString::to_string).collect())
}
