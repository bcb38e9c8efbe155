//! What to take off the carved blades: one leaf for each, in figures that are read at arm's length.

use crate::bench::draw::{Anchor, Drawing, wrapped};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::Bench;
use crate::result::{CarvedStrength, PlannedBlade, PlannedStation, RemovalPlan};

use super::table::{Column, ROW_MM, figures, head_mm, lines, table_of};

/// How much larger the table is than others.
const LARGER: f64 = 1.3;
/// Size of letters, mm.
const WORDS_MM: f64 = 3.6;
/// Room for what is said below the table, mm.
const BELOW_MM: f64 = 14.0;

/// What the columns mean.
const MEANING: &str = "Face: the flat, rear side. Off the face at an edge: so deep there, falling to \
    nothing at the other edge. Off the back (cambered, forward): at the thickest place, fading to both \
    edges. Off the trailing edge: from the chord, after the face. Then: what the blade measures afterwards. \
    –: nothing.";
/// How it is cut.
const CUTTING: &str = "Wood only comes off. Cut less than it says, and measure again.";

const COLUMNS: [Column; 8] = [
    figures("radius", 25.0),
    figures("off face,\nleading\nedge", 24.0),
    figures("off face,\ntrailing\nedge", 24.0),
    figures("off\nback", 22.0),
    figures("off\ntrailing\nedge", 24.0),
    figures("then\nface\nangle", 24.0),
    figures("then\nchord", 23.0),
    figures("then\nthick", 23.0),
];

/// Nothing where there are no readings, or no plan.
pub(super) fn leaves(bench: &Bench, unit: Unit, room: [f64; 2]) -> Vec<Leaf> {
    let Some(plan) = bench.take_off() else { return Vec::new() };
    plan.blades.iter().flat_map(|blade| of_blade(plan, blade, unit, room)).collect()
}

fn of_blade(plan: &RemovalPlan, blade: &PlannedBlade, unit: Unit, room: [f64; 2]) -> Vec<Leaf> {
    let (head, down) = heading(plan, blade, unit, room[0]);
    let high = room[1] - down - LARGER * head_mm(&COLUMNS) - BELOW_MM;
    let per_leaf = ((high / (LARGER * ROW_MM)) as usize).max(4);
    let parts: Vec<&[PlannedStation]> = blade.stations.chunks(per_leaf).collect();
    let of = parts.len();
    let leaf = |(i, part): (usize, &&[PlannedStation])| {
        let mut drawing = head.clone();
        let rows: Vec<Vec<String>> = part.iter().map(|s| row(s, unit)).collect();
        let y = down + table_of(&mut drawing, [0.0, -down], &COLUMNS, &rows, LARGER) + 2.0;
        below(&mut drawing, -y, part, room[0]);
        let part = if of == 1 { String::new() } else { format!(", part {} of {of}", i + 1) };
        Leaf { name: format!("Take off, blade {}{part}", blade.blade), drawing }
    };
    parts.iter().enumerate().map(leaf).collect()
}

/// What stands above the table, and the height it takes, mm.
fn heading(plan: &RemovalPlan, blade: &PlannedBlade, unit: Unit, wide: f64) -> (Drawing, f64) {
    let mut drawing = Drawing::default();
    drawing.bold([0.0, -6.0], 6.0, Anchor::Start, format!("Take off blade {}", blade.blade));
    let mut y = 9.0;
    let mut said =
        |words: &str| y += lines(&mut drawing, [0.0, -y], WORDS_MM, &wrapped(words, WORDS_MM, wide)) + 1.0;
    said(&format!(
        "For the departure as drawn at {}, by the readings of the job. Lengths in {}.",
        plan.flight_point,
        unit.plural()
    ));
    if !blade.stations.iter().any(cut) {
        said("Nothing is to be taken off this blade.");
    }
    said(MEANING);
    if let Some(strength) = plan.after.strength.as_ref().map(CarvedStrength::says) {
        said(&format!("After the cuts of all blades: {strength}"));
    }
    drawing.bold([0.0, -y - 4.5], 4.0, Anchor::Start, CUTTING);
    (drawing, y + 8.0)
}

fn cut(s: &PlannedStation) -> bool {
    [s.face_leading_m, s.face_trailing_m, s.back_m, s.trailing_edge_m].iter().any(|depth| *depth > 0.0)
}

fn row(s: &PlannedStation, unit: Unit) -> Vec<String> {
    let depth = |m: f64| if m > 0.0 { unit.fine(m) } else { "–".into() };
    let star = if s.note().is_empty() { "" } else { " *" };
    vec![
        format!("{}{star}", unit.figure(s.radius_m)),
        depth(s.face_leading_m),
        depth(s.face_trailing_m),
        depth(s.back_m),
        depth(s.trailing_edge_m),
        s.face_angle_deg.map_or_else(|| "–".into(), |angle| format!("{angle:.1}°")),
        unit.figure(s.chord_m),
        unit.figure(s.thickness_m),
    ]
}

/// What the stars mean.
fn below(drawing: &mut Drawing, y: f64, part: &[PlannedStation], wide: f64) {
    let mut notes: Vec<&str> = part.iter().map(PlannedStation::note).filter(|n| !n.is_empty()).collect();
    notes.sort_unstable();
    notes.dedup();
    if !notes.is_empty() {
        lines(drawing, [0.0, y], WORDS_MM, &wrapped(&format!("* {}", notes.join("; or ")), WORDS_MM, wide));
    }
}
