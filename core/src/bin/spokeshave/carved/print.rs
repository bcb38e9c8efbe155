//! Tables of the carved blades and of what to take off.

use spokeshave::result::{
    Carved, CarvedBlade, CarvedPoint, CarvedStation, CarvedStrength, Known, PlannedStation, RemovalPlan,
};

use crate::briefs::briefs;
use crate::table::{csv_figure, figure, signed, table, word};

pub(super) const CSV_HEADER: [&str; 21] = [
    "blade",
    "radius_m",
    "angle_deg",
    "angle_from_drawn_deg",
    "angle_from_mean_deg",
    "angle_known",
    "face_angle_deg",
    "chord_m",
    "chord_from_drawn_m",
    "chord_known",
    "thickness_m",
    "thickness_from_drawn_m",
    "thickness_known",
    "face_leading_m",
    "face_trailing_m",
    "back_m",
    "trailing_edge_m",
    "planned_angle_deg",
    "planned_face_angle_deg",
    "planned_chord_m",
    "planned_thickness_m",
];

pub(super) fn csv_rows(carved: &Carved, plan: Option<&RemovalPlan>) -> Vec<Vec<String>> {
    let planned = |b: usize, s: usize| plan.and_then(|plan| plan.blades.get(b)?.stations.get(s));
    let rows = carved.blades.iter().enumerate().flat_map(|(b, blade)| {
        blade.stations.iter().enumerate().map(move |(s, station)| csv_row(blade, station, planned(b, s)))
    });
    rows.collect()
}

fn csv_row(blade: &CarvedBlade, s: &CarvedStation, p: Option<&PlannedStation>) -> Vec<String> {
    let f = |v: f64| csv_figure(Some(v));
    let of = |value: fn(&PlannedStation) -> f64| csv_figure(p.map(value));
    vec![
        blade.blade.to_string(),
        f(s.radius_m),
        f(s.angle_deg.carved),
        f(s.angle_deg.from_drawn),
        f(s.angle_deg.from_mean),
        word(&s.angle_deg.known),
        csv_figure(s.face_angle_deg),
        f(s.chord_m.carved),
        f(s.chord_m.from_drawn),
        word(&s.chord_m.known),
        f(s.thickness_m.carved),
        f(s.thickness_m.from_drawn),
        word(&s.thickness_m.known),
        of(|p| p.face_leading_m),
        of(|p| p.face_trailing_m),
        of(|p| p.back_m),
        of(|p| p.trailing_edge_m),
        of(|p| p.angle_deg),
        csv_figure(p.and_then(|p| p.face_angle_deg)),
        of(|p| p.chord_m),
        of(|p| p.thickness_m),
    ]
}

pub(super) fn text(carved: &Carved, plan: Option<&RemovalPlan>) -> String {
    let mut parts = vec![format!("{}: as carved", carved.title)];
    parts.extend(carved.doubts.iter().map(|d| {
        let counts = if d.counted { "counted, as confirmed" } else { "left out" };
        let place = figure(Some(1e3 * d.radius_m), 1);
        format!("Hard to believe, {counts}: blade {}, {place} mm: {}", d.blade, d.message)
    }));
    parts.extend(carved.blades.iter().map(blade));
    parts.push(points(carved, plan));
    parts.push(shaking(carved, plan));
    parts.push(balance(carved, plan));
    parts.extend(carved.strength.as_ref().map(CarvedStrength::says));
    let after = plan.and_then(|plan| plan.after.strength.as_ref());
    parts.extend(after.map(|s| format!("After the plan: {}", s.says())));
    parts.extend(plan.map(|plan| plan.warns(carved).join("\n")).filter(|warns| !warns.is_empty()));
    parts.extend(plan.map(sheet));
    parts.join("\n\n")
}

fn blade(blade: &CarvedBlade) -> String {
    let header =
        ["r mm", "angle °", "± drawn", "± mean", "face °", "chord mm", "± drawn", "thick mm", "± drawn", ""];
    let row = |s: &CarvedStation| {
        vec![
            figure(Some(1e3 * s.radius_m), 1),
            figure(Some(s.angle_deg.carved), 2),
            signed(Some(s.angle_deg.from_drawn), 2),
            signed(Some(s.angle_deg.from_mean), 2),
            figure(s.face_angle_deg, 2),
            figure(Some(1e3 * s.chord_m.carved), 1),
            signed(Some(1e3 * s.chord_m.from_drawn), 1),
            figure(Some(1e3 * s.thickness_m.carved), 1),
            signed(Some(1e3 * s.thickness_m.from_drawn), 1),
            how_known(s),
        ]
    };
    let table = table(&header, blade.stations.iter().map(row).collect());
    format!("Blade {}, {} readings\n{table}", blade.blade, blade.readings)
}

/// Which figures were not read there, and what stands for them.
fn how_known(s: &CarvedStation) -> String {
    let parts =
        [("angle", s.angle_deg.known), ("chord", s.chord_m.known), ("thickness", s.thickness_m.known)];
    if parts.iter().all(|p| p.1 == parts[0].1) {
        return if parts[0].1 == Known::Measured { String::new() } else { parts[0].1.words().into() };
    }
    let told = |(name, known): &(&str, Known)| {
        (*known != Known::Measured).then(|| format!("{name} {}", known.words()))
    };
    parts.iter().filter_map(told).collect::<Vec<_>>().join("; ")
}

fn points(carved: &Carved, plan: Option<&RemovalPlan>) -> String {
    let after = |i: usize| plan.and_then(|plan| plan.after.flight_points.get(i));
    let rows = carved.flight_points.iter().enumerate().flat_map(|(i, p)| {
        [Some((&p.drawn, "drawn")), Some((&p.carved, "carved")), after(i).map(|p| (&p.carved, "planned"))]
    });
    briefs(rows.flatten())
}

fn shaking(carved: &Carved, plan: Option<&RemovalPlan>) -> String {
    let header =
        ["once per turn", "blades", "thrust by blade N", "thrust N m", "track N m", "air N", "masses N"];
    let row = |(p, blades): (&CarvedPoint, &str)| {
        let thrusts: Vec<String> = p.blades.iter().map(|b| figure(Some(b.thrust_n), 1)).collect();
        let once = p.once_per_turn;
        vec![
            p.drawn.name.clone(),
            blades.into(),
            thrusts.join(" "),
            figure(once.map(|o| o.moment_n_m), 2),
            figure(once.and_then(|o| o.track_moment_n_m), 2),
            figure(once.map(|o| o.air_force_n), 2),
            figure(once.and_then(|o| o.mass_force_n), 1),
        ]
    };
    let after = |i: usize| plan.and_then(|plan| plan.after.flight_points.get(i)).map(|p| (p, "planned"));
    let rows = carved.flight_points.iter().enumerate().flat_map(|(i, p)| [Some((p, "carved")), after(i)]);
    table(&header, rows.flatten().map(row).collect())
}

fn balance(carved: &Carved, plan: Option<&RemovalPlan>) -> String {
    let b = &carved.balance;
    let grams: Vec<String> = b.blades.iter().map(|m| figure(Some(1e3 * m.mass_kg), 1)).collect();
    let given = if b.density_given { "" } else { ", a usual one: none is given" };
    let then = plan.map_or_else(String::new, |p| format!("; after the plan {}", p.after.balance.says()));
    format!(
        "Static balance by shape at {} kg/m³{given}: blades outside the hub {} g; {}{then}",
        figure(Some(b.density_kg_m3), 0),
        grams.join(", "),
        b.says()
    )
}

fn sheet(plan: &RemovalPlan) -> String {
    format!(
        "What can be put right, departure as drawn at {} (reach and off by: to the chord line)\n{}",
        plan.flight_point,
        take_off(plan)
    )
}

/// What to take off, by blade and radius.
pub(crate) fn take_off(plan: &RemovalPlan) -> String {
    let header = [
        "take off, mm",
        "face at LE",
        "face at TE",
        "back",
        "TE edge",
        "then face °",
        "chord",
        "thick",
        "can reach °",
        "off by °",
        "",
    ];
    let row = |blade: usize, p: &PlannedStation| {
        let depth = |v: f64| if v > 0.0 { figure(Some(1e3 * v), 2) } else { "–".into() };
        vec![
            format!("blade {blade}, r {}", figure(Some(1e3 * p.radius_m), 0)),
            depth(p.face_leading_m),
            depth(p.face_trailing_m),
            depth(p.back_m),
            depth(p.trailing_edge_m),
            figure(p.face_angle_deg, 2),
            figure(Some(1e3 * p.chord_m), 1),
            figure(Some(1e3 * p.thickness_m), 1),
            format!("{} to {}", figure(Some(p.reachable_deg.0), 1), figure(Some(p.reachable_deg.1), 1)),
            signed(Some(p.angle_deg - p.wanted_deg), 2),
            p.note().into(),
        ]
    };
    let rows =
        plan.blades.iter().flat_map(|b| b.stations.iter().map(|s| row(b.blade, s)).collect::<Vec<_>>());
    table(&header, rows.collect())
}
