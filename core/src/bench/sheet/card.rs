//! The job card: one page with all that the bench must know.

use crate::bench::draw::{Anchor, BOLD, Drawing, Layer, fitted, wrapped};
use crate::bench::page::Leaf;
use crate::bench::stock::{Stock, name};
use crate::bench::unit::Unit;
use crate::bench::work::Bench;
use crate::drilling::Pattern;
use crate::job::Rotation;

use super::hub::pattern_words;
use super::table::lines;
use super::template::datum_mm;

/// Size of a warning's letters, mm.
const WARNING_MM: f64 = 3.4;
/// Least and most that is left until both cards meet, m, and the share of the thinnest station that is.
const LEFT_M: [f64; 2] = [1e-4, 1e-3];
const LEFT_SHARE: f64 = 0.25;

pub(super) fn leaf(bench: &Bench, unit: Unit, room: [f64; 2]) -> Leaf {
    let mut drawing = Drawing::default();
    drawing.bold([0.0, -6.0], 6.0, Anchor::Start, fitted(&bench.job.title, 6.5, room[0]));
    drawing.line(Layer::Thin, [[0.0, -9.0], [room[0], -9.0]]);
    let mut y = -12.0;
    if let Some(warning) = bench.warning() {
        for line in wrapped(&warning, BOLD * WARNING_MM, room[0]) {
            drawing.bold([0.0, y - WARNING_MM], WARNING_MM, Anchor::Start, line);
            y -= 1.4 * WARNING_MM;
        }
    }
    y -= 2.0;
    for (heading, facts) in groups(bench, unit) {
        drawing.bold([0.0, y - 4.0], 3.6, Anchor::Start, heading);
        y -= 7.0;
        for (name, value) in facts {
            drawing.text([0.0, y - 3.4], 3.2, Anchor::Start, name);
            drawing.text([62.0, y - 3.4], 3.2, Anchor::Start, fitted(&value, 3.2, room[0] - 62.0));
            y -= 5.2;
        }
        y -= 3.0;
    }
    drawing.bold([0.0, y - 4.0], 3.6, Anchor::Start, "In this order");
    y -= 8.0;
    for (i, step) in order(bench, unit).into_iter().enumerate() {
        drawing.text([0.0, y - 3.3], 3.0, Anchor::Start, (i + 1).to_string());
        y -= lines(&mut drawing, [5.0, y], 3.0, &wrapped(&step, 3.0, room[0] - 5.0));
    }
    Leaf { name: "Job card".into(), drawing }
}

type Facts = Vec<(&'static str, String)>;

fn groups(bench: &Bench, unit: Unit) -> Vec<(&'static str, Facts)> {
    vec![
        ("Propeller", propeller(bench, unit)),
        ("Boss and drilling", hub(bench, unit)),
        ("Blank", blank(bench, unit)),
    ]
}

fn propeller(bench: &Bench, unit: Unit) -> Facts {
    let (form, blade) = (&bench.form, &bench.form.blade);
    let (angle, pitch_m) = bench.nominal();
    let turning = match form.rotation {
        Rotation::ClockwiseFromBehind => "clockwise seen from behind",
        Rotation::AnticlockwiseFromBehind => "anticlockwise seen from behind",
    };
    let nose = form.making.leading_edge_radius_m.map_or_else(|| "as the section".into(), |r| unit.say(r));
    let mut facts = vec![
        ("blades", blade.count.to_string()),
        ("diameter", unit.say(2.0 * blade.radius_m)),
        ("turns", turning.into()),
        ("angle at 0.75 of the radius", format!("{:.1}° to the chord line", angle.to_degrees())),
        ("pitch of that angle", unit.say(pitch_m)),
        ("least trailing edge", edge(bench, unit)),
        ("least leading edge radius", nose),
        ("tip rounded over the last", unit.say(blade.radius_m - form.tip_from_m)),
    ];
    if blade.count == 1 {
        let weight =
            "a counterweight of the blade's own static moment, opposite to it, held by the hub; not drawn";
        facts.insert(1, ("balanced by", weight.into()));
    }
    facts
}

/// The trailing edge, and where it is thinner.
fn edge(bench: &Bench, unit: Unit) -> String {
    let least = unit.say(bench.form.trailing_edge_m());
    if bench.form.edge_gives_way() {
        format!("{least}, or 5 % of the chord where that is less")
    } else {
        least
    }
}

fn hub(bench: &Bench, unit: Unit) -> Facts {
    let across = ("diameter", unit.say(2.0 * bench.form.blade.hub_radius_m));
    let Some(boss) = bench.blank.boss else {
        return vec![across, ("root and drilling", ROOT.into())];
    };
    let above = |z: f64| z - bench.blank.back_m;
    let mut facts = vec![
        across,
        ("thickness", unit.say(boss.faces_m[1] - boss.faces_m[0])),
        (
            "its faces above the rear",
            format!("{} and {}", unit.say(above(boss.faces_m[0])), unit.say(above(boss.faces_m[1]))),
        ),
        ("drilling", pattern_words(bench, unit)),
    ];
    let Some(pattern) = Pattern::of(&bench.job) else { return facts };
    if let Some(plates_m) = pattern.flange_m {
        facts.push(("plates", format!("{} across", unit.say(plates_m))));
    }
    let torque = bench.job.wood.as_ref().and_then(|w| w.hub.as_ref()?.bolt_torque_n_m);
    let torque = torque.map_or_else(|| "not in the job: the maker's".into(), |t| unit.torque(t));
    facts.push(("torque of a bolt", torque));
    facts
}

/// What is said of blades that the maker's hub holds.
const ROOT: &str = "as the maker of the hub says: neither is drawn here";

fn blank(bench: &Bench, unit: Unit) -> Facts {
    let (blank, stock) = (&bench.blank, Stock::of(&bench.job));
    let layers = &blank.layers;
    let piece = match (blank.boss.is_some(), bench.form.blade.count) {
        (true, 1) => "the blade and its hub in one piece",
        (true, 2) => "both blades in one piece",
        (true, _) => "one for each blade, joined at the hub",
        (false, 1) => "one",
        (false, _) => "one for each blade",
    };
    let made_of = name(&bench.job).unwrap_or_else(|| "not named in the job".into());
    let each = unit.say(blank.thickness_m / layers.planks.len() as f64);
    let mut facts = vec![
        ("piece", piece.into()),
        ("length", unit.say(blank.length_m)),
        ("width", unit.say(blank.width_m)),
        ("thickness along the axis", unit.say(blank.thickness_m)),
        ("made of", made_of),
    ];
    let making = &bench.form.making;
    if making.blank_thickness_m.is_none() && making.blank_width_m.is_none() {
        let by = format!(
            "{} on every side; the outline on the plan is the blade's own",
            unit.say(blank.allowance_m)
        );
        facts.insert(4, ("larger than the blade by", by));
    }
    if stock.is_wood() {
        facts.push(("laminations", format!("{} of {each}", layers.planks.len())));
        facts.push(("wood to buy", unit.volume(layers.volume_m3)));
    } else {
        facts.push(("volume of the block", unit.bulk(blank.length_m * blank.width_m * blank.thickness_m)));
    }
    let finished_m3 = bench.solid().volume_m3();
    facts.push((
        "volume of the finished piece",
        if stock.is_wood() { unit.volume(finished_m3) } else { unit.bulk(finished_m3) },
    ));
    facts
}

fn order(bench: &Bench, unit: Unit) -> Vec<String> {
    let (stock, count) = (Stock::of(&bench.job), bench.form.blade.count);
    let other = match (bench.blank.boss.is_some(), count) {
        (_, 1) => "",
        (true, 2) => "; for the second blade turn the plan half a turn about the axis",
        _ => "; each blade has a blank of its own",
    };
    let balanced = match count {
        1 => "balance it with its counterweight, measure it",
        2 => "balance, measure both blades",
        _ => "balance, measure all blades",
    };
    let finish = if stock.is_wood() { "seal" } else { "smooth" };
    vec![
        format!(
            "{}; mark its middle line, its axis, its front (looks ahead) and its rear (looks aft).",
            stock.making()
        ),
        drilling(bench).into(),
        format!("Lay the plan on the front and saw square, leaving the line{other}."),
        "Lay the rear on the bench. At every station mark the face line on both sawn sides, from the bench \
         heights."
            .into(),
        format!(
            "Face (the flat, rear side): cut down to the marks at every station, then plane straight from \
             mark to mark. No {} of the blade lies below that line; what is hollow or round in the face is \
             left to the face cards.",
            stock.word()
        ),
        format!(
            "Back (the cambered, forward side): cut it to the back cards; their datum edges stand {} off \
             the blank all along.",
            unit.say(1e-3 * datum_mm(bench))
        ),
        format!(
            "Leave the last {} until face card and back card meet along the chord line at every station.",
            unit.say(left_m(bench))
        ),
        format!("Round the leading edge, leave the trailing edge its thickness, {finish}, {balanced}."),
    ]
}

/// What is drilled when.
fn drilling(bench: &Bench) -> &'static str {
    match (bench.blank.boss, Pattern::of(&bench.job)) {
        (Some(_), Some(_)) => "Drill the hub square to the rear while the blank is still a block.",
        (Some(_), None) => {
            "Drill the hub, square to the rear, while the blank is still a block: the job names no pattern."
        }
        (None, _) => "Shape and drill the root as the maker of the hub says, square to the rear.",
    }
}

/// How much is left for the cards, m: less on a blade that is thin.
fn left_m(bench: &Bench) -> f64 {
    let thinnest = bench.stations.iter().map(|s| s.thickness_m).fold(f64::INFINITY, f64::min);
    (LEFT_SHARE * thinnest).clamp(LEFT_M[0], LEFT_M[1])
}
