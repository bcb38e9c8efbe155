//! How it was worked out, from what sources, and where that does not hold.

use crate::job::{Engine, TipLoss};
use crate::result::{Note, PointResult};
use crate::section::Family;

use super::Told;
use super::flow::Flow;

pub(super) fn write(flow: &mut Flow, told: &Told) {
    flow.part("Method and validity");
    flow.facts(&methods(told));
    flow.text(
        "It leaves out yawed and oblique flow, the fuselage beyond the numbers given, wake contraction, ice \
         and dirt. Bending and twist under load are told under Strength and are not in the other figures.",
    );
    flow.heading("Tables of the sections");
    for family in &told.rig.rotor.blade.families {
        flow.text(&tables(family));
    }
    flow.heading("Worth knowing");
    let said: Vec<String> = told.points.iter().flat_map(notes).collect();
    if said.is_empty() {
        flow.text("At every flight point every station works inside its tables.");
    }
    flow.list(&said);
}

fn methods(told: &Told) -> Vec<(&'static str, String)> {
    let job = &told.rig.job;
    let m = &job.method;
    let mut bits = vec!["blade-element momentum (Glauert 1935) in axial flow".to_string()];
    let tip = match m.tip_loss {
        TipLoss::Prandtl => "Prandtl's loss at the tip",
        TipLoss::Goldstein => "Goldstein's loss at the tip (1929)",
    };
    let hub = match (m.hub_loss, m.tip_loss) {
        (false, _) => "",
        (true, TipLoss::Prandtl) => " and the hub",
        (true, TipLoss::Goldstein) => ", Prandtl's at the hub",
    };
    bits.push(format!("{tip}{hub}"));
    bits.push(format!("Buhl (2005) in the windmill brake state, {} elements a blade", m.elements));
    let mut section =
        vec!["tables by thickness and Reynolds number, beyond them Viterna and Corrigan (1981)".to_string()];
    if m.compressibility {
        section.push("Prandtl-Glauert, Korn and Lock for Mach number".into());
    }
    if m.stall_delay {
        section.push("Snel's delay of stall inboard".into());
    }
    let engine = match &job.engine {
        Some(Engine::Piston(_)) => "full-throttle curve; Gagg and Ferrar's law with height (1934)",
        Some(Engine::Electric(_)) => "first-order motor on a battery that sags",
        None => "",
    };
    let aircraft =
        job.aircraft.as_ref().map_or("", |_| "parabolic drag polar or weight; lift equal to weight");
    let strength = told.strength.as_ref().map_or_else(String::new, |s| {
        format!(
            "slender beam on the outlines' own sections, steady loads of every flight point, a standing \
             start and an overspeed; material: {}",
            s.material.source
        )
    });
    let carved = if job.carved.is_some() {
        "differences from the drawing interpolated between readings; each blade in the flow of the mean propeller"
    } else {
        ""
    };
    let logbook = if job.logbook.is_some() {
        "least squares with prior widths, errors of rpm and airspeed allowed for"
    } else {
        ""
    };
    vec![
        ("air", "ISO 2533:1975, viscosity by Sutherland".into()),
        ("propeller", bits.join("; ")),
        ("sections", section.join("; ")),
        ("engine", engine.into()),
        ("aircraft", aircraft.into()),
        ("strength", strength),
        ("as carved", carved.into()),
        ("logbook", logbook.into()),
    ]
}

fn tables(family: &Family) -> String {
    let about = &family.about;
    let (low, high) = family.reynolds_range();
    let thickness = family.thickness_range().map_or_else(
        || "one thickness".to_string(),
        |(low, high)| format!("{:.1} to {:.1} % thick", 100.0 * low, 100.0 * high),
    );
    let origin =
        if about.origin.is_empty() { "The job does not say where they come from." } else { &about.origin };
    format!(
        "{}: {} tables, Reynolds numbers {low:.0} to {high:.0}, {thickness}. {origin}",
        about.title,
        family.polar_count()
    )
}

fn notes(point: &PointResult) -> Vec<String> {
    let told = |note: &Note| {
        let at: Vec<String> = (0..point.stations.len())
            .filter(|i| point.stations[*i].notes.contains(note))
            .map(|i| (i + 1).to_string())
            .collect();
        let place = if at.is_empty() { String::new() } else { format!(" (station {})", at.join(", ")) };
        format!("{}: {}{place}.", point.name, note.words())
    };
    point.notes.iter().map(told).collect()
}
