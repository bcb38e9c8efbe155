//! Stations: the blade as drawn, and how each station works at each flight point.

use crate::bench::sheet::table::figures;
use crate::drawn::stations;
use crate::result::{PointResult, StationResult};

use super::Told;
use super::flow::Flow;
use super::scale::{DEGREES, NONE, PLAIN, Scale, fixed};
use super::verdict::in_band;

pub(super) fn write(flow: &mut Flow, told: &Told) {
    flow.part("Stations");
    drawn(flow, told);
    for point in told.points.iter().filter(|p| !p.stations.is_empty()) {
        flow.heading(&format!("At {}", point.name));
        worked_out(flow, told, point);
    }
    flow.text(
        "Departure: angle of attack less the angle of best lift-to-drag at that station's Reynolds and Mach \
         number. Band: the departures that keep 95 % of the best lift-to-drag; a star marks a station \
         outside it.",
    );
}

fn drawn(flow: &mut Flow, told: &Told) {
    let p = &told.rig.job.propeller;
    let length = told.scales.length();
    let heads = ["radius", "chord", "thickness", "pitch"].map(|name| format!("{name}\n{}", length.sign));
    let columns = [
        figures("station", 16.0),
        figures(&heads[0], 20.0),
        figures("share of\nradius", 18.0),
        figures(&heads[1], 20.0),
        figures(&heads[2], 20.0),
        figures("thickness\n% of chord", 20.0),
        figures("chord\nline °", 18.0),
        figures("flat\nface °", 18.0),
    ];
    flow.heading("As drawn");
    let all = stations(&told.rig.rotor.blade, p.angle_reference);
    let row = |(i, (s, drawn)): (usize, (&crate::job::Station, &crate::drawn::DrawnStation))| {
        vec![
            (i + 1).to_string(),
            length.figure(drawn.radius_m),
            PLAIN.figure(s.radius_fraction),
            length.figure(drawn.chord_m),
            length.figure(drawn.thickness_m),
            fixed(100.0 * s.thickness_ratio, 1),
            DEGREES.figure(drawn.angle_deg),
            DEGREES.figure(drawn.face_angle_deg),
        ]
    };
    flow.table(&columns, &p.stations.iter().zip(&all).enumerate().map(row).collect::<Vec<_>>());
    flow.text(&format!("Sections by station: {}.", sections(told)));
}

/// The title of every station's section, stations of the same one joined.
fn sections(told: &Told) -> String {
    let families = &told.rig.rotor.blade.families;
    let title = |name: &str| {
        let family = families.iter().find(|f| f.about.name == name);
        family.map_or_else(|| name.to_string(), |f| f.about.title.clone())
    };
    let stations = &told.rig.job.propeller.stations;
    let mut first = 1;
    let run = |same: &[crate::job::Station]| {
        let last = first + same.len() - 1;
        let numbers = if same.len() == 1 { first.to_string() } else { format!("{first} to {last}") };
        first = last + 1;
        format!("{numbers} {}", title(&same[0].section))
    };
    stations.chunk_by(|a, b| a.section == b.section).map(run).collect::<Vec<_>>().join("; ")
}

fn worked_out(flow: &mut Flow, told: &Told, point: &PointResult) {
    let length = told.scales.length();
    let radius = format!("radius\n{}", length.sign);
    let columns = [
        figures("station", 14.0),
        figures(&radius, 17.0),
        figures("inflow\n°", 16.0),
        figures("attack\n°", 16.0),
        figures("best\n°", 16.0),
        figures("departure\n°", 20.0),
        figures("band\n°", 26.0),
        figures("lift\ncoeff.", 16.0),
        figures("lift to\ndrag", 16.0),
        figures("Reynolds\nnumber", 19.0),
        figures("Mach", 14.0),
    ];
    flow.table(
        &columns,
        &point.stations.iter().enumerate().map(|(i, s)| row(i, s, &length)).collect::<Vec<_>>(),
    );
}

fn row(i: usize, s: &StationResult, length: &Scale) -> Vec<String> {
    let band = s.band_low_deg.zip(s.band_high_deg);
    let star = if s.departure_deg.is_some() && !in_band(s) { " *" } else { "" };
    let over = s.cl.zip(s.cd).filter(|c| c.1 > 0.0).map(|(cl, cd)| cl / cd);
    vec![
        (i + 1).to_string(),
        length.figure(s.radius_m),
        DEGREES.figure(s.inflow_angle_deg),
        DEGREES.figure(s.angle_of_attack_deg),
        DEGREES.figure(s.best_angle_deg),
        format!("{}{star}", DEGREES.signed(s.departure_deg)),
        band.map_or_else(
            || NONE.into(),
            |(low, high)| format!("{} to {}", DEGREES.signed(low), DEGREES.signed(high)),
        ),
        PLAIN.figure(s.cl),
        DEGREES.figure(over),
        format!("{:.0}", (s.reynolds / 100.0).round() * 100.0),
        PLAIN.figure(s.mach),
    ]
}
