//! The blades as measured, and what to take off.

use crate::bench::sheet::table::{figures, words};
use crate::result::{
    Brief, Carved, CarvedBlade, CarvedPoint, CarvedStation, CarvedStrength, Known, PlannedBlade,
    PlannedStation, RemovalPlan,
};

use super::Told;
use super::chart::{Chart, Curve, MOST_CURVES};
use super::curves::axis;
use super::flow::Flow;
use super::scale::{Scale, Scales};
use super::verdict;

/// An angle as it is read, of degrees.
const READ: Scale = Scale::fixed("°", 1.0, 2);

pub(super) fn write(flow: &mut Flow, told: &Told) {
    let (Some(found), Some(plan)) = (&told.carved, &told.plan) else { return };
    flow.part("As carved");
    let carved = match found {
        Ok(carved) => carved,
        Err(why) => return flow.text(&format!("Nothing yet: {why}.")),
    };
    let length = told.scales.length();
    if !carved.doubts.is_empty() {
        flow.heading("Hard to believe");
        let said = |d: &crate::result::Doubt| {
            let counts = if d.counted { "counted, as confirmed" } else { "left out" };
            format!("Blade {}, {}: {}; {counts}.", d.blade, length.say(d.radius_m), d.message)
        };
        flow.list(&carved.doubts.iter().map(said).collect::<Vec<_>>());
    }
    for blade in &carved.blades {
        flow.heading(&format!("Blade {}, readings: {}", blade.blade, blade.readings));
        differences(flow, blade, &length);
    }
    flow.text(
        "Angles to the chord line. A star marks what was not read there but taken from between the \
         readings, from beyond them, or as drawn.",
    );
    let chart = off(carved, length);
    if chart.shows() {
        flow.charts(&[chart]);
    }
    does(flow, carved, plan.as_ref().ok(), told.scales);
    balance(flow, carved, told.scales);
    let after = plan.as_ref().ok().and_then(|plan| plan.after.strength.as_ref());
    flow.list(&strength(carved.strength.as_ref(), after));
    match plan {
        Ok(plan) => {
            if plan.after.balance.read {
                flow.text(&format!("After the cuts: {}.", plan.after.balance.says()));
            }
            planned(flow, plan, &length);
            flow.list(&plan.warns(carved));
        }
        Err(why) => flow.text(&format!("No plan of what to take off: {why}.")),
    }
}

fn differences(flow: &mut Flow, blade: &CarvedBlade, length: &Scale) {
    let lengths =
        ["radius", "chord", "from drawn", "thickness", "from drawn"].map(|w| format!("{w}\n{}", length.sign));
    let columns = [
        figures(&lengths[0], 20.0),
        figures("angle\n°", 20.0),
        figures("from drawn\n°", 22.0),
        figures("from mean\n°", 22.0),
        figures(&lengths[1], 20.0),
        figures(&lengths[2], 22.0),
        figures(&lengths[3], 22.0),
        figures(&lengths[4], 22.0),
    ];
    let star = |text: String, known: Known| if known == Known::Measured { text } else { format!("{text} *") };
    let row = |s: &CarvedStation| {
        vec![
            length.figure(s.radius_m),
            star(READ.figure(s.angle_deg.carved), s.angle_deg.known),
            READ.signed(s.angle_deg.from_drawn),
            READ.signed(s.angle_deg.from_mean),
            star(length.figure(s.chord_m.carved), s.chord_m.known),
            length.signed(s.chord_m.from_drawn),
            star(length.figure(s.thickness_m.carved), s.thickness_m.known),
            length.signed(s.thickness_m.from_drawn),
        ]
    };
    flow.table(&columns, &blade.stations.iter().map(row).collect::<Vec<_>>());
}

/// How far each blade's angles are from the drawing.
fn off(carved: &Carved, length: Scale) -> Chart {
    let curve = |b: &CarvedBlade| {
        let points = b.stations.iter().map(|s| (s.radius_m, Some(s.angle_deg.from_drawn)));
        Curve::new(format!("blade {}", b.blade), points)
    };
    Chart {
        title: "Angle as carved less angle as drawn".into(),
        x: axis("radius", length),
        y: axis("difference", READ),
        curves: carved.blades.iter().take(MOST_CURVES).map(curve).collect(),
        limits: Vec::new(),
    }
}

fn does(flow: &mut Flow, carved: &Carved, plan: Option<&RemovalPlan>, scales: &Scales) {
    flow.heading("What it does");
    let names: &[&str] =
        if plan.is_some() { &["drawn", "carved", "after the cuts"] } else { &["drawn", "carved"] };
    let rows = carved.flight_points.iter().enumerate().flat_map(|(i, p)| {
        let after = plan.and_then(|plan| plan.after.flight_points.get(i)).map(|p| p.carved.clone());
        [Some(p.drawn.clone()), Some(p.carved.clone()), after]
    });
    verdict::points(flow, &rows.flatten().collect::<Vec<Brief>>(), scales, Some(names));
    flow.heading("What shakes once per turn");
    let moments = ["of the thrusts", "of the track"].map(|w| format!("moment\n{w}, {}", scales.torque.sign));
    let forces = ["of the air", "of the masses"].map(|w| format!("force\n{w}, {}", scales.force.sign));
    let columns = [
        words("flight point", 40.0),
        words("blades", 28.0),
        figures(&moments[0], 28.0),
        figures(&moments[1], 26.0),
        figures(&forces[0], 26.0),
        figures(&forces[1], 28.0),
    ];
    let row = |(p, blades): (&CarvedPoint, &str)| {
        let once = p.once_per_turn;
        vec![
            p.drawn.name.clone(),
            blades.into(),
            scales.torque.figure(once.map(|o| o.moment_n_m)),
            scales.torque.figure(once.and_then(|o| o.track_moment_n_m)),
            scales.force.figure(once.map(|o| o.air_force_n)),
            scales.force.figure(once.and_then(|o| o.mass_force_n)),
        ]
    };
    let after =
        |i: usize| plan.and_then(|plan| plan.after.flight_points.get(i)).map(|p| (p, "after the cuts"));
    let shaken = carved.flight_points.iter().enumerate().flat_map(|(i, p)| [Some((p, "carved")), after(i)]);
    flow.table(&columns, &shaken.flatten().map(row).collect::<Vec<_>>());
    let each = |p: &CarvedPoint| {
        let thrusts: Vec<String> = p.blades.iter().map(|b| scales.force.figure(b.thrust_n)).collect();
        format!("{}: thrust of each blade {} {}.", p.drawn.name, thrusts.join(", "), scales.force.sign)
    };
    let known = carved.flight_points.iter().filter(|p| !p.blades.is_empty());
    flow.list(&known.map(each).collect::<Vec<_>>());
}

fn balance(flow: &mut Flow, carved: &Carved, scales: &Scales) {
    let b = &carved.balance;
    let masses: Vec<String> = b.blades.iter().map(|m| scales.mass.say(m.mass_kg)).collect();
    let usual = if b.density_given { "" } else { ", a usual one" };
    flow.text(&format!(
        "Static balance by shape at {:.0} kg/m³{usual}: blades outside the hub {}; {}.",
        b.density_kg_m3,
        masses.join(", "),
        b.says()
    ));
}

/// Whether the blades hold as carved, and after the cuts.
fn strength(carved: Option<&CarvedStrength>, after: Option<&CarvedStrength>) -> Vec<String> {
    let then = after.map(|s| format!("After the cuts below: {}", s.says()));
    carved.map(CarvedStrength::says).into_iter().chain(then).collect()
}

fn planned(flow: &mut Flow, plan: &RemovalPlan, length: &Scale) {
    let cuts = |p: &PlannedStation| p.face_leading_m + p.face_trailing_m + p.back_m + p.trailing_edge_m > 0.0;
    let any = |b: &&PlannedBlade| b.stations.iter().any(cuts);
    if !plan.blades.iter().any(|b| any(&b)) {
        return flow
            .text(&format!("Nothing to take off for the departure as drawn at {}.", plan.flight_point));
    }
    flow.heading(&format!("What to take off for the departure as drawn at {}", plan.flight_point));
    let of = |w: &str| format!("{w}\n{}", length.sign);
    let heads = [
        "radius",
        "face, lead.\nedge",
        "face, trail.\nedge",
        "back",
        "off trail.\nedge",
        "then\nchord",
        "then\nthick",
    ]
    .map(of);
    let columns = [
        figures("blade", 13.0),
        figures(&heads[0], 18.0),
        figures(&heads[1], 20.0),
        figures(&heads[2], 20.0),
        figures(&heads[3], 16.0),
        figures(&heads[4], 18.0),
        figures("then\nface °", 18.0),
        figures(&heads[5], 18.0),
        figures(&heads[6], 18.0),
        figures("left off\nby °", 18.0),
    ];
    let fine = Scale { decimals: length.decimals.map(|d| d.max(2)), ..*length };
    let depth = |v: f64| if v > 0.0 { fine.figure(v) } else { super::scale::NONE.into() };
    let row = |blade: usize, p: &PlannedStation| {
        vec![
            blade.to_string(),
            length.figure(p.radius_m),
            depth(p.face_leading_m),
            depth(p.face_trailing_m),
            depth(p.back_m),
            depth(p.trailing_edge_m),
            READ.figure(p.face_angle_deg),
            length.figure(p.chord_m),
            length.figure(p.thickness_m),
            if p.read { READ.signed(p.angle_deg - p.wanted_deg) } else { "not read".into() },
        ]
    };
    let rows =
        plan.blades.iter().flat_map(|b| b.stations.iter().map(|s| row(b.blade, s)).collect::<Vec<_>>());
    flow.table(&columns, &rows.collect::<Vec<_>>());
}
