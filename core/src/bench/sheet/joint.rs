//! How the boards of three and more blades meet in the hub: lapped, as is common practice.
//!
//! In every lamination one blade's board runs through the hub (two boards that face one another, where the
//! number of blades is even); the others butt against its sides, and against one another half way between
//! them. The next lamination is turned on by one blade, so that no joint lies over the one below it.

use std::f64::consts::TAU;

use crate::bench::draw::{Anchor, Drawing, Layer};
use crate::bench::page::Leaf;
use crate::bench::unit::Unit;
use crate::bench::work::Bench;

use super::table::lines;

/// How far boards are drawn, in hub radii.
const DRAWN_TO: f64 = 2.0;
/// Between the two drawings, mm.
const GAP_MM: f64 = 10.0;

pub(super) fn leaf(bench: &Bench, unit: Unit, room: [f64; 2]) -> Leaf {
    let mut drawing = Drawing::default();
    let hub = 1e3 * bench.form.blade.hub_radius_m;
    let reach = DRAWN_TO * hub;
    // Corners lie farther out than the ends.
    let far = reach.hypot(0.5e3 * bench.blank.width_m);
    let share = (4.0 * far / (room[0] - GAP_MM)).ceil().max(1.0);
    let size = if share == 1.0 { "full size".to_string() } else { format!("drawn 1 to {share}") };
    let mut y = -lines(&mut drawing, [0.0, 0.0], 3.0, &words(bench, unit)) - 8.0;
    for (k, through) in [0, 1].into_iter().enumerate() {
        let middle = [far / share + (2.0 * far / share + GAP_MM) * k as f64, y - far / share - 4.0];
        let title = format!("lamination {} ({size}): {} through", k + 1, runs_through(bench, through));
        drawing.text([middle[0], y], 2.6, Anchor::Middle, title);
        for board in boards(bench, through, reach) {
            let place = |p: [f64; 2]| [middle[0] + p[0] / share, middle[1] + p[1] / share];
            drawing.shape(Layer::Cut, board.into_iter().map(place).collect::<Vec<_>>());
        }
        drawing.circle(Layer::Guide, middle, hub / share);
        drawing.cross(Layer::Centre, middle, 4.0);
        let count = bench.form.blade.count;
        for j in 0..count {
            let (s, c) = direction(bench, j);
            let at = [middle[0] + 1.6 * hub / share * s, middle[1] + 1.6 * hub / share * c - 1.0];
            drawing.bold(at, 3.0, Anchor::Middle, (j + 1).to_string());
        }
    }
    y -= 2.0 * far / share + 8.0;
    let foot = ["Seen from ahead, blade 1 up; dashed: the boss.".to_string()];
    lines(&mut drawing, [0.0, y], 2.6, &foot);
    Leaf { name: "Hub joint".into(), drawing }
}

/// Sine and cosine of a blade's direction on the sheet, blade 1 up.
fn direction(bench: &Bench, blade: u32) -> (f64, f64) {
    (TAU * f64::from(blade) / f64::from(bench.form.blade.count)).sin_cos()
}

fn facing(bench: &Bench, through: u32) -> Option<u32> {
    let n = bench.form.blade.count;
    n.is_multiple_of(2).then_some((through + n / 2) % n)
}

fn runs_through(bench: &Bench, through: u32) -> String {
    match facing(bench, through) {
        Some(other) => format!("blades {} and {} run", through + 1, other + 1),
        None => format!("blade {} runs", through + 1),
    }
}

/// Outlines of all boards of a lamination about the axis, mm: the part that lies within `reach` along each.
fn boards(bench: &Bench, through: u32, reach: f64) -> Vec<Vec<[f64; 2]>> {
    let (n, hub) = (bench.form.blade.count, 1e3 * bench.form.blade.hub_radius_m);
    let half = 0.5e3 * bench.blank.width_m;
    let other = facing(bench, through);
    let board = |j: u32| {
        let (s, c) = direction(bench, j);
        let runs = j == through || Some(j) == other;
        let back = if runs && other.is_some() { 0.0 } else { -hub };
        let corner = |across: f64, along: f64| [along * s + across * c, along * c - across * s];
        let mut outline =
            vec![corner(-half, back), corner(half, back), corner(half, reach), corner(-half, reach)];
        if runs {
            return outline;
        }
        // Off the sides of the board that runs through.
        let (ts, tc) = direction(bench, through);
        let side = (s * tc - c * ts).signum();
        outline = cut(&outline, [side * tc, -side * ts], half);
        for k in [(j + 1) % n, (j + n - 1) % n].into_iter().filter(|k| *k != through && Some(*k) != other) {
            let (ks, kc) = direction(bench, k);
            outline = cut(&outline, [s - ks, c - kc], 0.0);
        }
        outline
    };
    (0..n).map(board).collect()
}

/// The part of a convex outline where `normal · p` is at least `least`.
fn cut(outline: &[[f64; 2]], normal: [f64; 2], least: f64) -> Vec<[f64; 2]> {
    let over = |p: &[f64; 2]| normal[0] * p[0] + normal[1] * p[1] - least;
    let mut kept = Vec::new();
    for (k, a) in outline.iter().enumerate() {
        let b = &outline[(k + 1) % outline.len()];
        let (from, to) = (over(a), over(b));
        if from >= 0.0 {
            kept.push(*a);
        }
        if from * to < 0.0 {
            let t = from / (from - to);
            kept.push([0, 1].map(|i| a[i] + t * (b[i] - a[i])));
        }
    }
    kept
}

/// How the other boards meet the side of the one that runs through: the acute angle between their middle
/// lines, degrees, and how far from the axis the middle line ends, m. Each angle once.
fn butts(bench: &Bench) -> Vec<(f64, f64)> {
    let (n, half_m) = (bench.form.blade.count, 0.5 * bench.blank.width_m);
    let mut all: Vec<(f64, f64)> = Vec::new();
    for j in (1..n).filter(|j| Some(*j) != facing(bench, 0)) {
        let (s, c) = direction(bench, j);
        let angle_deg = s.abs().atan2(c.abs()).to_degrees();
        if all.iter().all(|(a, _)| (a - angle_deg).abs() > 0.01) {
            all.push((angle_deg, half_m / s.abs()));
        }
    }
    all
}

fn words(bench: &Bench, unit: Unit) -> Vec<String> {
    let (n, layers) = (bench.form.blade.count, bench.blank.layers.planks.len());
    let mut words = vec![
        format!(
            "The boards of {n} blades, each {} wide, are lapped in the hub, lamination over lamination \
             (common practice).",
            unit.say(bench.blank.width_m)
        ),
        format!("In lamination 1 {} through; the others butt against the sides.", runs_through(bench, 0)),
    ];
    words.extend(butts(bench).into_iter().map(|(angle_deg, from_m)| {
        format!(
            "A board that stands at {angle_deg:.1}° to the one that runs through is cut at that angle to \
             its own middle line, {} from the axis along it.",
            unit.say(from_m)
        )
    }));
    if n > 4 {
        words.push(format!(
            "Neighbours among those meet half way between them, cut at {:.1}° to their own middle lines.",
            180.0 / f64::from(n)
        ));
    }
    words.push(
        "Every lamination is turned on by one blade against the one below it, so that no joint lies over \
         the one below it."
            .into(),
    );
    words.push("Glue both faces of every board, and clamp them between plates while the glue sets.".into());
    let least = if n.is_multiple_of(2) { n / 2 } else { n };
    if (layers as u32) < least {
        words.push(format!(
            "Only {layers} laminations: {least} are needed for every blade to run through once (the \
             laminations of the job's wood)."
        ));
    }
    words.push(
        "The strength of this joint is not judged. Separate blades in a metal hub are another job: a \
         ground-adjustable propeller."
            .into(),
    );
    words
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{DEMOS, Job};
    use crate::rig::Rig;

    fn area(points: &[[f64; 2]]) -> f64 {
        let cross = |k: usize| {
            let (a, b) = (points[k], points[(k + 1) % points.len()]);
            a[0] * b[1] - b[0] * a[1]
        };
        0.5 * (0..points.len()).map(cross).sum::<f64>().abs()
    }

    fn inside(board: &[[f64; 2]], p: [f64; 2]) -> bool {
        let turn = |k: usize| {
            let (a, b) = (board[k], board[(k + 1) % board.len()]);
            (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0])
        };
        let turns: Vec<f64> = (0..board.len()).map(turn).collect();
        turns.iter().all(|t| *t < -1e-6) || turns.iter().all(|t| *t > 1e-6)
    }

    /// No two boards of a lamination share wood, and together they leave no gap where the bolts stand.
    #[test]
    fn the_boards_of_a_lamination_fill_the_hub_and_do_not_overlap() {
        for blades in 3..=6 {
            let mut job = Job::from_json(DEMOS[0].json).unwrap();
            job.propeller.blades = blades;
            let bench = Bench::new(&Rig::new(&job).unwrap()).unwrap();
            for through in 0..blades {
                let boards = boards(&bench, through, 200.0);
                assert!(boards.iter().all(|b| b.len() >= 3 && area(b) > 1_000.0), "{blades} {through}");
                for k in 0..720 {
                    let (s, c) = (TAU * (f64::from(k) + 0.3) / 720.0).sin_cos();
                    for r in [5.0, 30.0, 50.0, 85.0] {
                        let p = [r * s, r * c];
                        let over = boards.iter().filter(|b| inside(b, p)).count();
                        assert!(over <= 1, "{blades} {through}: {over} boards at {p:?}");
                        assert!(over == 1 || r > 54.0, "{blades} {through}: a gap at {p:?}");
                    }
                }
            }
        }
    }
}
