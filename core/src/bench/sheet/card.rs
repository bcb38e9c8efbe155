//! The job card: one page with all that the bench must know.

use crate::bench::draw::{Anchor, Drawing, Layer};
use crate::bench::page::{Leaf, fitted};
use crate::bench::unit::Unit;
use crate::bench::work::Bench;
use crate::job::{Rotation, Species};

use super::hub::pattern_words;
use super::table::lines;
use super::template::datum_mm;

pub(super) fn leaf(bench: &Bench, unit: Unit, room: [f64; 2]) -> Leaf {
    let mut drawing = Drawing::default();
    drawing.bold([0.0, -6.0], 6.0, Anchor::Start, fitted(&bench.job.title, 6.5, room[0]));
    drawing.line(Layer::Thin, [[0.0, -9.0], [room[0], -9.0]]);
    let mut y = -14.0;
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
    let order = order(bench, unit);
    lines(&mut drawing, [0.0, y], 3.0, &order);
    Leaf { name: "Job card".into(), drawing }
}

type Group = (&'static str, Vec<(&'static str, String)>);

fn groups(bench: &Bench, unit: Unit) -> Vec<Group> {
    let blade = &bench.form.blade;
    let (angle, pitch_m) = bench.nominal();
    let turning = match bench.form.rotation {
        Rotation::ClockwiseFromBehind => "clockwise seen from behind",
        Rotation::AnticlockwiseFromBehind => "anticlockwise seen from behind",
    };
    let blank = &bench.blank;
    let layers = &blank.layers;
    let piece = match (blank.boss.is_some(), blade.count) {
        (true, 2) => "both blades in one piece",
        (true, _) => "one for each blade, joined at the hub",
        (false, _) => "one for each blade",
    };
    let wood = bench.job.wood.as_ref().map_or_else(|| "not named in the job".into(), wood_name);
    vec![
        (
            "Propeller",
            vec![
                ("blades", blade.count.to_string()),
                ("diameter", unit.say(2.0 * blade.radius_m)),
                ("turns", turning.into()),
                ("angle at 0.75 of the radius", format!("{:.1}° to the chord line", angle.to_degrees())),
                ("pitch of that angle", unit.say(pitch_m)),
                ("hub", unit.say(2.0 * blade.hub_radius_m)),
                ("hub drilling", pattern_words(bench, unit)),
                ("least trailing edge", unit.say(bench.form.trailing_edge_m())),
                (
                    "least leading edge radius",
                    bench
                        .form
                        .making
                        .leading_edge_radius_m
                        .map_or_else(|| "as the section".into(), |r| unit.say(r)),
                ),
                ("tip rounded over the last", unit.say(blade.radius_m - bench.form.tip_from_m)),
            ],
        ),
        (
            "Blank",
            vec![
                ("piece", piece.into()),
                ("length", unit.say(blank.length_m)),
                ("width", unit.say(blank.width_m)),
                ("thickness along the axis", unit.say(blank.thickness_m)),
                ("wood left round the blade", unit.say(blank.allowance_m)),
                ("wood", wood),
                (
                    "laminations",
                    format!(
                        "{} of {}",
                        layers.planks.len(),
                        unit.say(blank.thickness_m / layers.planks.len() as f64)
                    ),
                ),
                ("wood to buy", unit.volume(layers.volume_m3)),
                ("solid wood in the finished piece", unit.volume(bench.solid().volume_m3())),
            ],
        ),
    ]
}

fn wood_name(wood: &crate::job::Wood) -> String {
    match &wood.species {
        Species::Named(name) => name.replace('-', " "),
        Species::Own(own) => own.name.clone(),
    }
}

fn order(bench: &Bench, unit: Unit) -> Vec<String> {
    let mut steps: Vec<String> = vec![
        "Measure the 100 mm bar on every sheet. Glue up the blank; mark its middle line, its axis and its back.".into(),
        "Drill the hub square to the back while the blank is still a block.".into(),
        "Lay the plan on the front, saw the outline square; for a second blade turn the sheet about the axis.".into(),
        "Mark both edges at every station from the bench heights, the blank lying on its back.".into(),
        "Cut the face down to the line between the edges; try the lower card and the protractor at each station.".into(),
        format!("Cut the cambered side with the upper cards; datum edges stand {} off the blank all along.", unit.say(1e-3 * datum_mm(bench))),
        "Leave the last millimetre until both cards meet along the chord line at every station.".into(),
        "Round the leading edge, leave the trailing edge its thickness, seal, balance, measure both blades.".into(),
    ];
    for (i, step) in steps.iter_mut().enumerate() {
        *step = format!("{}  {step}", i + 1);
    }
    steps
}
