//! What the job was given.

use crate::bench::sheet::table::{figures, words};
use crate::job::{
    Aircraft, AngleReference, Engine, FlightPoint, Piston, PitchControl, Propeller, Rotation, Setting,
    Species,
};

use crate::wood::is_wood;

use super::Told;
use super::flow::Flow;
use super::scale::{DEGREES, NONE, PERCENT, PLAIN, RPM, Scales};

pub(super) fn write(flow: &mut Flow, told: &Told) {
    let job = &told.rig.job;
    flow.part("Inputs");
    flow.heading("Propeller");
    flow.facts(&propeller(told));
    if let Some(aircraft) = &job.aircraft {
        flow.heading("Aircraft");
        flow.facts(&of_aircraft(aircraft, told.scales));
    }
    if let Some(engine) = &job.engine {
        flow.heading("Engine");
        match engine {
            Engine::Piston(p) => piston(flow, p, told.scales),
            Engine::Electric(_) => flow.facts(&of_electric(engine)),
        }
    }
    flow.heading("Flight points");
    points(flow, told);
    if let Some(factors) = job.logbook.as_ref().filter(|l| l.in_use).and_then(|l| l.factors) {
        flow.text(&format!(
            "Every figure uses what the logbook told: engine power times {:.3}, drag area times {:.3}, \
             power the propeller takes times {:.3}.",
            factors.engine_power, factors.drag_area, factors.propeller_power
        ));
    }
}

fn propeller(told: &Told) -> Vec<(&'static str, String)> {
    let (p, length) = (&told.rig.job.propeller, told.scales.length());
    let found = told.rig.propeller_figures();
    let turns = match p.rotation {
        Rotation::ClockwiseFromBehind => "clockwise seen from behind",
        Rotation::AnticlockwiseFromBehind => "anticlockwise seen from behind",
    };
    let read = match p.angle_reference {
        AngleReference::ChordLine => "to the chord line",
        AngleReference::FlatFace => "on the flat face",
    };
    let mut facts = vec![
        ("blades", p.blades.to_string()),
        ("diameter", length.say(p.diameter_m)),
        ("hub", length.say(p.hub_diameter_m)),
        ("turns", turns.into()),
        ("pitch", pitch_control(p)),
        (
            "at 0.75 of the radius",
            format!(
                "{} to the chord line, pitch {}",
                DEGREES.say(found.blade_angle_075_deg),
                length.say(found.geometric_pitch_m)
            ),
        ),
        ("activity factor, solidity", format!("{:.0}, {:.3}", found.activity_factor, found.solidity)),
        ("angles are given", read.into()),
    ];
    if let Some(share) = p.blockage {
        facts.push(("air slowed by the body behind", PERCENT.say(share)));
    }
    if let Some(wood) = &told.rig.job.wood {
        let name = match &wood.species {
            Species::Named(name) => name.replace('-', " "),
            Species::Own(own) => own.name.clone(),
        };
        let moisture = format!(", {} % moisture", wood.moisture_percent);
        facts.push(("made of", if is_wood(wood) { name + &moisture } else { name }));
    }
    facts
}

fn pitch_control(p: &Propeller) -> String {
    match p.pitch_control {
        PitchControl::Fixed {} => "fixed".into(),
        PitchControl::GroundAdjustable { turn_deg } => {
            format!("set on the ground, turned {} from the drawing", DEGREES.say(turn_deg))
        }
        PitchControl::ConstantSpeed { rpm, turn_min_deg, turn_max_deg } => format!(
            "governed at {}, from {} to {} from the drawing",
            RPM.say(rpm),
            DEGREES.say(turn_min_deg),
            DEGREES.say(turn_max_deg)
        ),
    }
}

fn of_aircraft(aircraft: &Aircraft, scales: &Scales) -> Vec<(&'static str, String)> {
    match aircraft {
        Aircraft::Multirotor(m) => vec![
            ("kind", format!("multirotor with {} rotors", m.rotors)),
            ("mass in flight", scales.mass.say(m.mass_kg)),
        ],
        Aircraft::Aeroplane(a) => {
            let induced = match (a.drag.k, a.drag.aspect_ratio, a.drag.oswald) {
                (Some(k), ..) => format!("{k}"),
                (None, Some(ratio), oswald) => {
                    format!("from aspect ratio {ratio}, Oswald factor {}", oswald.unwrap_or(1.0))
                }
                _ => NONE.into(),
            };
            let given = |v: Option<f64>| v.map_or_else(String::new, |v| v.to_string());
            vec![
                ("kind", format!("aeroplane, engines: {}", a.engines)),
                ("mass in flight", scales.mass.say(a.mass_kg)),
                ("wing area", scales.area.say(a.wing_area_m2)),
                ("drag coefficient without lift", a.drag.cd0.to_string()),
                ("induced-drag factor", induced),
                ("greatest lift coefficient", given(a.cl_max)),
                ("rolling friction", given(a.rolling_friction)),
                (
                    "drag area in the slipstream",
                    a.slipstream_drag_area_m2.map_or_else(String::new, |v| scales.area.say(v)),
                ),
            ]
        }
    }
}

fn piston(flow: &mut Flow, p: &Piston, scales: &Scales) {
    let law = match &p.altitude_law {
        crate::job::AltitudeLaw::NaturallyAspirated => "naturally aspirated: Gagg and Ferrar's law".into(),
        crate::job::AltitudeLaw::HeldTo(held) => format!("held up to {}", scales.height.say(held.altitude_m)),
    };
    let fuel = p.bsfc_kg_per_kwh.map_or_else(String::new, |b| scales.consumption(b));
    flow.facts(&[
        ("kind", "piston engine by its full-throttle curve".into()),
        ("engine rpm over propeller rpm", p.gear_ratio.to_string()),
        ("limit of engine rpm", p.max_rpm.map_or_else(String::new, |v| RPM.say(v))),
        ("power with height", law),
        ("fuel for the work done", fuel),
        ("fuel on board", p.fuel_kg.map_or_else(String::new, |v| scales.mass.say(v))),
    ]);
    let power = format!("full throttle\n{}", scales.power.sign);
    let columns = [figures("engine rpm", 24.0), figures(&power, 28.0)];
    let row =
        |point: &crate::job::PowerPoint| vec![RPM.figure(point.rpm), scales.power.figure(point.power_w)];
    flow.table(&columns, &p.full_throttle.iter().map(row).collect::<Vec<_>>());
}

fn of_electric(engine: &Engine) -> Vec<(&'static str, String)> {
    let Engine::Electric(e) = engine else { return Vec::new() };
    let b = &e.battery;
    vec![
        ("kind", "electric motor, controller and battery".into()),
        ("speed constant", format!("{} rpm/V", e.kv_rpm_per_v)),
        (
            "winding, controller and leads",
            format!("{} ohm, {} ohm", e.resistance_ohm, e.controller_resistance_ohm),
        ),
        ("no-load current", format!("{} A", e.no_load_current_a)),
        ("limit of motor current", e.max_current_a.map_or_else(String::new, |a| format!("{a} A"))),
        ("motor rpm over propeller rpm", e.gear_ratio.to_string()),
        (
            "battery",
            format!(
                "{} cells in series, {} V and {} ohm each, {} Ah, of which {} may be used",
                b.cells,
                b.open_circuit_v_per_cell,
                b.resistance_ohm_per_cell,
                b.capacity_ah,
                PERCENT.say(b.usable_fraction)
            ),
        ),
    ]
}

fn points(flow: &mut Flow, told: &Told) {
    let scales = told.scales;
    let (height, speed) =
        (format!("height\n{}", scales.height.sign), format!("speed\n{}", scales.speed.sign));
    let columns = [
        words("flight point", 58.0),
        figures(&height, 20.0),
        figures("from\nstandard, K", 24.0),
        figures(&speed, 20.0),
        words("setting", 62.0),
    ];
    let row = |p: &FlightPoint| {
        let speed = p.airspeed_m_s.map_or_else(|| "found".into(), |v| scales.speed.figure(v));
        vec![
            p.name.clone(),
            scales.height.figure(p.altitude_m),
            DEGREES.signed(p.isa_offset_k),
            speed,
            setting(&p.setting, told),
        ]
    };
    flow.table(&columns, &told.rig.job.flight_points.iter().map(row).collect::<Vec<_>>());
}

fn setting(setting: &Setting, told: &Told) -> String {
    let scales = told.scales;
    match setting {
        Setting::FullThrottle {} => "full throttle".into(),
        Setting::Level {} => match told.rig.job.aircraft {
            Some(Aircraft::Multirotor(_)) => "thrust carries the weight and the drag".into(),
            _ => "level flight, thrust equals drag".into(),
        },
        Setting::Rpm { rpm } => RPM.say(*rpm),
        Setting::Power { power_w } => format!("{} of shaft power", scales.power.say(*power_w)),
        Setting::Throttle { fraction } => format!("{} of full throttle", PLAIN.figure(*fraction)),
    }
}
