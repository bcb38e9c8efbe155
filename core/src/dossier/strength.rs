//! Stress and margins, vibration, weight, hub.

use crate::bench::sheet::table::{figures, words};
use crate::result::{CaseResult, FrequencyLine, HubResult, Strength, StressStation};

use crate::wood::{Say, sentence};

use super::Told;
use super::chart::{Chart, Curve, MOST_CURVES};
use super::curves::axis;
use super::flow::Flow;
use super::scale::{DEGREES, PERCENT, RPM, Scale, Scales};

pub(super) fn write(flow: &mut Flow, told: &Told) {
    let Some(s) = &told.strength else { return };
    // Without a wood named and without a load there is nothing to judge.
    if s.material.assumed && s.governing.is_none() {
        return;
    }
    let scales = told.scales;
    flow.part("Strength");
    flow.facts(&material(s, scales));
    flow.text(&s.verdict.sentence);
    if let Some(g) = &s.governing {
        let (stress, length) = (|pa: f64| scales.stress.say(pa), |m: f64| scales.length().say(m));
        let missing = |m: f64| format!("{} {}", scales.length().no_less(m), scales.length().sign);
        let say = Say { stress: &stress, length: &length, missing: &missing };
        let limit = limit(scales, g.limit_pa, &g.reason);
        flow.text(&format!("{} That limit is {limit}.", sentence(g, &s.stations, &s.verdict, &say)));
    }
    stations(flow, s, scales);
    let charts: Vec<Chart> = [stress(s, scales), frequencies(s)].into_iter().filter(Chart::shows).collect();
    flow.charts(&charts);
    flow.heading("Cases");
    cases(flow, s, scales);
    let near = s.vibration.near.iter().map(|n| {
        format!(
            "{}: {} {} at {:.0} Hz is {} {} {} a turn{}.",
            n.case,
            n.number,
            n.mode.words(),
            n.hz,
            PERCENT.say(n.away.abs()),
            if n.away < 0.0 { "below" } else { "above" },
            n.order,
            if n.of_engine { " of the engine" } else { "" }
        )
    });
    let near: Vec<String> = near.collect();
    if near.is_empty() {
        flow.text("No natural frequency lies within 10 % of 1 to 4 times a turn in any case.");
    } else {
        flow.heading("Near a whole number of times a turn");
        flow.list(&near);
    }
    if let Some(hub) = &s.hub {
        flow.heading("Hub");
        flow.facts(&of_hub(hub, scales));
    }
    flow.heading("Taken for granted");
    flow.list(&s.assumptions);
}

fn material(s: &Strength, scales: &Scales) -> Vec<(&'static str, String)> {
    let (m, mass) = (&s.material, &s.mass);
    let moisture = if m.is_wood { format!(", {} % moisture", m.moisture_percent) } else { String::new() };
    let assumed = if m.assumed { ", a usual one, for the job names none" } else { "" };
    let limit = |pa: f64, reason: &str| limit(scales, pa, reason);
    vec![
        ("material", format!("{}{assumed}; {:.0} kg/m³{}", m.name, m.density_kg_m3, moisture)),
        ("values from", m.source.clone()),
        ("most tension", limit(m.tension_limit_pa, &m.tension_reason)),
        ("most compression", limit(m.compression_limit_pa, &m.compression_reason)),
        ("most shear", limit(m.shear_limit_pa, &m.shear_reason)),
        (
            "weight",
            format!(
                "{} a blade outside the hub, centre {} from the axis; all blades {:.4} kg m² about the axis",
                scales.mass.say(mass.blade_kg),
                scales.length().say(mass.centre_m),
                mass.inertia_kg_m2
            ),
        ),
    ]
}

/// How a limit came about: a reason begins with the limit in megapascals.
fn limit(scales: &Scales, pa: f64, reason: &str) -> String {
    match scales.stress.sign {
        "MPa" => reason.to_string(),
        _ => format!("{}; {reason}", scales.stress.say(pa)),
    }
}

fn stations(flow: &mut Flow, s: &Strength, scales: &Scales) {
    let length = scales.length();
    let lengths = ["radius", "chord", "thick", "missing"].map(|w| format!("{w}\n{}", length.sign));
    let stresses =
        ["by turning", "tension", "compr.", "shear"].map(|w| format!("{w}\n{}", scales.stress.sign));
    let columns = [
        figures("station", 13.0),
        figures(&lengths[0], 15.0),
        figures(&lengths[1], 14.0),
        figures(&lengths[2], 14.0),
        figures(&stresses[0], 18.0),
        figures(&stresses[1], 15.0),
        figures(&stresses[2], 14.0),
        figures(&stresses[3], 13.0),
        figures("margin\n%", 14.0),
        figures(&lengths[3], 14.0),
        words("worst", 46.0),
    ];
    let row = |s: &StressStation| {
        let stress = |pa: Option<f64>| scales.stress.figure(pa);
        let worst =
            s.kind.zip(s.case.as_ref()).map_or_else(String::new, |(k, case)| format!("{}, {case}", k.word()));
        vec![
            s.station.map_or_else(|| "hub".into(), |n| n.to_string()),
            length.figure(s.radius_m),
            length.figure(s.chord_m),
            length.figure(s.thickness_m),
            stress(s.axial_pa),
            stress(s.tension_pa),
            stress(s.compression_pa),
            stress(s.shear_pa),
            PERCENT.signed(s.margin),
            s.thicker_m.map_or_else(String::new, |m| length.no_less(m)),
            worst,
        ]
    };
    flow.table(&columns, &s.stations.iter().map(row).collect::<Vec<_>>());
    flow.text(
        "Margin: limit over stress, less 1. Missing: thickness that would bring every margin to nothing.",
    );
}

fn cases(flow: &mut Flow, s: &Strength, scales: &Scales) {
    let length = scales.length();
    let (thrust, pull) =
        (format!("thrust\n{}", scales.force.sign), format!("pull at hub\n{}", scales.force.sign));
    let (bend, tip) = (format!("bending fwd\n{}", scales.torque.sign), format!("tip fwd\n{}", length.sign));
    let speed = format!("speed\n{}", scales.speed.sign);
    let columns = [
        words("case", 46.0),
        figures("rpm", 16.0),
        figures(&speed, 16.0),
        figures(&thrust, 18.0),
        figures(&pull, 22.0),
        figures(&bend, 22.0),
        figures(&tip, 16.0),
        figures("tip\ntwist °", 16.0),
        figures("margin\n%", 16.0),
    ];
    let row = |c: &CaseResult| {
        let f = c.figures.as_ref();
        vec![
            c.name.clone(),
            RPM.figure(f.map(|f| f.rpm)),
            scales.speed.figure(f.map(|f| f.airspeed_m_s)),
            scales.force.figure(f.map(|f| f.thrust_n)),
            scales.force.figure(f.map(|f| f.root_tension_n)),
            scales.torque.figure(f.map(|f| f.root_forward_n_m)),
            length.figure(f.and_then(|f| f.tip_forward_m)),
            DEGREES.signed(f.and_then(|f| f.tip_twist_deg)),
            PERCENT.signed(f.map(|f| f.margin)),
        ]
    };
    flow.table(&columns, &s.cases.iter().map(row).collect::<Vec<_>>());
}

fn stress(s: &Strength, scales: &Scales) -> Chart {
    let curve = |name: &str, of: fn(&StressStation) -> Option<f64>| {
        Curve::new(name, s.stations.iter().map(|s| (s.radius_m, of(s))))
    };
    Chart {
        title: "Stress in the worst case of each station".into(),
        x: axis("radius", scales.length()),
        y: axis("stress", scales.stress),
        curves: vec![
            curve("tension", |s| s.tension_pa),
            curve("compression", |s| s.compression_pa),
            curve("by turning alone", |s| s.axial_pa),
        ],
        limits: vec![
            ("most tension".into(), s.material.tension_limit_pa),
            ("most compression".into(), s.material.compression_limit_pa),
        ],
    }
}

fn frequencies(s: &Strength) -> Chart {
    let curve =
        |l: &FrequencyLine| Curve::new(l.words(), l.rpm.iter().zip(&l.hz).map(|(rpm, hz)| (*rpm, Some(*hz))));
    Chart {
        title: "Natural frequencies of a blade".into(),
        x: axis("propeller rpm", Scale { sign: "", ..RPM }),
        y: axis("frequency", Scale::fixed("Hz", 1.0, 0)),
        curves: s.vibration.lines.iter().take(MOST_CURVES).map(curve).collect(),
        limits: Vec::new(),
    }
}

fn of_hub(h: &HubResult, scales: &Scales) -> Vec<(&'static str, String)> {
    let against = |found: Option<f64>, limit: f64| {
        found.map_or_else(String::new, |f| {
            format!("{} where {} is the limit", scales.stress.say(f), scales.stress.say(limit))
        })
    };
    vec![
        ("greatest torque", scales.torque.say(h.torque_n_m)),
        ("one bolt without friction", scales.force.say(h.bolt_force_n)),
        ("its pressure on the wood", against(Some(h.bearing_pa), h.bearing_limit_pa)),
        ("pull of a blade", scales.force.say(h.pull_n)),
        ("tension through the boss", against(h.boss_tension_pa, h.boss_limit_pa)),
        ("pressure under the plates", against(h.clamp_pa, h.clamp_limit_pa)),
        (
            "holes past what the boss can hold",
            h.past_boss_m.map_or_else(String::new, |m| scales.length().say(m)),
        ),
        ("torque of a bolt that reaches it", scales.torque.say(h.most_bolt_torque_n_m)),
        ("least margin", format!("{} (limit over stress, less 1)", PERCENT.say(h.margin))),
    ]
}
