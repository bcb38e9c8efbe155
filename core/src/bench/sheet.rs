//! What the sheets show: one module per drawing, each in millimetres at full size.

mod card;
mod guides;
mod hub;
mod joint;
mod layers;
mod plan;
mod side;
mod station;
pub(crate) mod table;
mod take_off;
mod template;

pub use layers::stack_drawing;
pub use template::{Card, Side, card as template_card};

use super::draw::Drawing;
use super::page::{Leaf, Paper};
use super::stock::Stock;
use super::unit::Unit;
use super::work::Bench;

/// Every drawing of the bench, in the order in which it is used.
#[must_use]
pub fn leaves(bench: &Bench, paper: Paper, unit: Unit) -> Vec<Leaf> {
    let room = paper.room_mm();
    let mut leaves = tables(bench, paper, unit);
    if Stock::of(&bench.job).is_wood() || bench.blank.layers.planks.len() > 1 {
        leaves.push(layers::leaf(bench, unit, room));
    }
    let mut blank = vec![plan::leaf(bench, unit, room), side::leaf(bench)];
    if bench.blank.boss.is_some() {
        blank.push(hub::leaf(bench, unit));
    }
    leaves.extend(abreast("Blank and hub", blank, room));
    if bench.blank.boss.is_some() && bench.form.blade.count > 2 {
        leaves.push(joint::leaf(bench, unit, room));
    }
    leaves.extend(template::leaves(bench, unit, room));
    leaves.extend(take_off::leaves(bench, unit, room));
    leaves
}

/// The leaves that say what to carve without a drawing at full size: the job card, bench heights and angles.
pub(crate) fn tables(bench: &Bench, paper: Paper, unit: Unit) -> Vec<Leaf> {
    let room = paper.room_mm();
    std::iter::once(card::leaf(bench, unit, room)).chain(station::leaves(bench, unit, room)).collect()
}

/// Small drawings side by side on one leaf, where all of them fit its room; else each on its own.
fn abreast(name: &str, leaves: Vec<Leaf>, room: [f64; 2]) -> Vec<Leaf> {
    let mut all = Drawing::default();
    let mut x = 0.0;
    for leaf in &leaves {
        let Some([low, high]) = leaf.drawing.bounds() else { continue };
        if high[1] - low[1] > room[1] {
            return leaves;
        }
        all.add(&leaf.drawing, [x - low[0], -high[1]]);
        x += high[0] - low[0] + BETWEEN_MM;
    }
    if x - BETWEEN_MM > room[0] {
        return leaves;
    }
    vec![Leaf { name: name.into(), drawing: all }]
}

/// Between drawings side by side, mm.
const BETWEEN_MM: f64 = 8.0;

/// The drawings for a machine: name and drawing, without tables.
#[must_use]
pub fn machine_drawings(bench: &Bench, unit: Unit) -> Vec<Leaf> {
    let mut drawings = vec![
        Leaf { name: "templates".into(), drawing: template::all(bench, unit) },
        Leaf { name: "blank-plan".into(), drawing: plan::leaf(bench, unit, [f64::INFINITY; 2]).drawing },
        Leaf { name: "blank-side".into(), drawing: side::leaf(bench).drawing },
    ];
    if bench.blank.boss.is_some() {
        drawings.push(Leaf { name: "hub".into(), drawing: hub::leaf(bench, unit).drawing });
    }
    drawings
}
