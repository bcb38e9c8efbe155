//! The sheet for people.

use spokeshave::job::Job;
use spokeshave::result::{
    CaseResult, HubResult, MaterialUsed, RunningStation, RunningTwist, Strength, StressStation, Vibration,
};

use crate::table::{figure, signed, table};

/// The whole sheet: what decides first, then stations, cases, vibration, weight, hub, what was taken for
/// granted, cautions.
pub(super) fn sheet(job: &Job, s: &Strength) -> String {
    let decides = s.governing.as_ref().map_or_else(
        || "No flight point has an answer: no load is known.".into(),
        |g| format!("{}\nThat limit is {}.", g.sentence, g.reason),
    );
    let decides = format!("{}\n{decides}", s.verdict.sentence);
    let mut parts = vec![material(&s.material), decides, stations(&s.stations), cases(&s.cases)];
    parts.push(vibration(&s.vibration));
    if !s.running.is_empty() {
        parts.push(running(&s.running));
    }
    parts.push(mass(s));
    parts.extend(s.hub.as_ref().map(hub));
    parts.push(list("Taken for granted", &s.assumptions));
    parts.push(list("Before you act", &spokeshave::cautions(job)));
    parts.join("\n\n")
}

fn list(head: &str, lines: &[impl AsRef<str>]) -> String {
    let lines: Vec<String> = lines.iter().map(|l| format!("- {}", l.as_ref())).collect();
    format!("{head}\n{}", lines.join("\n"))
}

fn mega(pa: Option<f64>) -> String {
    figure(pa.map(|pa| pa / 1e6), 1)
}

fn percent(share: Option<f64>) -> String {
    signed(share.map(|m| 100.0 * m), 0)
}

fn material(m: &MaterialUsed) -> String {
    let moisture = if m.is_wood { format!(", at {} % moisture", m.moisture_percent) } else { String::new() };
    let assumed = if m.assumed { " (taken: the job names none)" } else { "" };
    format!(
        "{}{assumed}, {} kg/m³, E {} GPa, G {} GPa{moisture}",
        m.name,
        figure(Some(m.density_kg_m3), 0),
        figure(Some(m.modulus_pa / 1e9), 2),
        figure(Some(m.shear_modulus_pa / 1e9), 2)
    )
}

fn stations(all: &[StressStation]) -> String {
    let header = [
        "station",
        "r mm",
        "chord mm",
        "thick mm",
        "pull MPa",
        "tension MPa",
        "compression MPa",
        "shear MPa",
        "margin %",
        "mm missing",
        "",
    ];
    let row = |s: &StressStation| {
        vec![
            s.station.map_or_else(|| "hub".into(), |n| n.to_string()),
            figure(Some(1e3 * s.radius_m), 0),
            figure(Some(1e3 * s.chord_m), 1),
            figure(Some(1e3 * s.thickness_m), 1),
            mega(s.axial_pa),
            mega(s.tension_pa),
            mega(s.compression_pa),
            mega(s.shear_pa),
            percent(s.margin),
            if s.thicker_m.is_some() { figure(s.thicker_m.map(|m| 1e3 * m), 1) } else { String::new() },
            s.kind.zip(s.case.as_ref()).map(|(k, case)| format!("{}, {case}", k.word())).unwrap_or_default(),
        ]
    };
    let said =
        "Margin: limit over stress, less 1. Missing: thickness that would bring every margin to nothing.";
    format!("{}\n{said}", table(&header, all.iter().map(row).collect()))
}

fn cases(all: &[CaseResult]) -> String {
    let header = [
        "case",
        "rpm",
        "km/h",
        "thrust N",
        "torque N m",
        "pull N",
        "bend fwd N m",
        "bend back N m",
        "tip fwd mm",
        "tip twist °",
        "margin %",
        "",
    ];
    let row = |c: &CaseResult| {
        let f = c.figures.as_ref();
        let words = if f.is_none() {
            c.state.sentence()
        } else if c.held {
            "throttled back to the limit rpm"
        } else {
            ""
        };
        vec![
            c.name.clone(),
            figure(f.map(|f| f.rpm), 0),
            figure(f.map(|f| 3.6 * f.airspeed_m_s), 0),
            figure(f.map(|f| f.thrust_n), 1),
            figure(f.map(|f| f.torque_n_m), 2),
            figure(f.map(|f| f.root_tension_n), 0),
            figure(f.map(|f| f.root_forward_n_m), 1),
            figure(f.map(|f| f.root_against_n_m), 1),
            figure(f.and_then(|f| f.tip_forward_m).map(|m| 1e3 * m), 1),
            signed(f.and_then(|f| f.tip_twist_deg), 2),
            percent(f.map(|f| f.margin)),
            words.into(),
        ]
    };
    table(&header, all.iter().map(row).collect())
}

fn vibration(v: &Vibration) -> String {
    let Some(first) = v.lines.first() else {
        return "The blade has no natural frequencies: it does not stand against its own twisting moment."
            .into();
    };
    let rpm: Vec<String> = first.rpm.iter().map(|r| format!("Hz at {r:.0} rpm")).collect();
    let mut header = vec!["mode"];
    header.extend(rpm.iter().map(String::as_str));
    let rows = v.lines.iter().map(|l| {
        let name = format!("{} {}", l.number, l.mode.words());
        std::iter::once(name).chain(l.hz.iter().map(|hz| figure(Some(*hz), 1))).collect()
    });
    if v.near.is_empty() {
        return format!(
            "{}\nNone lies within 10 % of 1 to 4 times a turn in any case.",
            table(&header, rows.collect())
        );
    }
    let close = ["near a whole number of times a turn", "mode", "Hz", "times a turn", "away %"];
    let near = v.near.iter().map(|n| {
        vec![
            n.case.clone(),
            format!("{} {}", n.number, n.mode.words()),
            figure(Some(n.hz), 1),
            format!("{}{}", n.order, if n.of_engine { " of the engine" } else { "" }),
            signed(Some(100.0 * n.away), 0),
        ]
    });
    format!("{}\n\n{}", table(&header, rows.collect()), table(&close, near.collect()))
}

/// One row a station, twist and departure of each flight point.
fn running(all: &[RunningTwist]) -> String {
    let names: Vec<[String; 2]> = all
        .iter()
        .map(|t| [format!("{}: twist °", t.flight_point), "departure ° drawn → running".into()])
        .collect();
    let mut header = vec!["running, r mm"];
    header.extend(names.iter().flatten().map(String::as_str));
    let departure = |s: &RunningStation| {
        format!("{} → {}", signed(s.drawn_departure_deg, 1), signed(s.running_departure_deg, 1))
    };
    let row = |i: usize| {
        let mut row = vec![figure(Some(1e3 * all[0].stations[i].radius_m), 0)];
        row.extend(
            all.iter().flat_map(|t| [signed(Some(t.stations[i].twist_deg), 2), departure(&t.stations[i])]),
        );
        row
    };
    let rpm = all.iter().map(|t| {
        let doubt = if t.settled { "" } else { "; load and twist do not settle" };
        format!(
            "{}: {} rpm drawn, {} running ({} passes of load and twist{doubt})",
            t.flight_point,
            figure(Some(t.drawn_rpm), 0),
            figure(t.running_rpm, 0),
            t.passes
        )
    });
    let rpm: Vec<String> = rpm.collect();
    format!("{}\n{}", table(&header, (0..all[0].stations.len()).map(row).collect()), rpm.join("\n"))
}

fn mass(s: &Strength) -> String {
    let m = &s.mass;
    let rows = [
        ("one blade, kg", m.blade_kg, 4),
        ("all blades without the boss, kg", m.blades_kg, 4),
        ("centre of gravity from the axis, mm", 1e3 * m.centre_m, 1),
        ("static moment of one blade, kg mm", 1e3 * m.static_moment_kg_m, 2),
        ("moment of inertia of all blades, kg m²", m.inertia_kg_m2, 5),
    ];
    let rows = rows.map(|(what, value, decimals)| vec![what.into(), figure(Some(value), decimals)]);
    table(&["weight and balance", ""], rows.to_vec())
}

fn hub(h: &HubResult) -> String {
    let rows = [
        ("greatest torque, N m", figure(Some(h.torque_n_m), 1), String::new()),
        ("one bolt without friction, N", figure(Some(h.bolt_force_n), 0), String::new()),
        ("its pressure on the wood, MPa", mega(Some(h.bearing_pa)), mega(Some(h.bearing_limit_pa))),
        ("pull of a blade, N", figure(Some(h.pull_n), 0), String::new()),
        ("tension through the boss, MPa", mega(h.boss_tension_pa), mega(Some(h.boss_limit_pa))),
        ("pressure under the plates, MPa", mega(h.clamp_pa), mega(Some(h.clamp_limit_pa))),
        (
            "torque per nut that reaches that limit, N m",
            figure(Some(h.most_bolt_torque_n_m), 1),
            String::new(),
        ),
        ("friction of one plate over the greatest torque", figure(h.friction_share, 2), String::new()),
        ("holes past what the boss can hold, mm", figure(h.past_boss_m.map(|m| 1e3 * m), 1), String::new()),
        ("least margin, %", percent(Some(h.margin)), String::new()),
    ];
    let rows = rows.map(|(what, value, limit)| vec![what.into(), value, limit]);
    table(&["hub", "found", "limit"], rows.to_vec())
}
