//! What to carve: the job card, bench heights and angles, as on the sheets for the bench.

use crate::bench::sheet::tables;
use crate::bench::{Bench, Paper};

use super::Told;
use super::flow::Flow;

pub(super) fn write(flow: &mut Flow, told: &Told, paper: Paper) {
    match Bench::new(told.rig) {
        Ok(bench) => tables(&bench, paper, told.scales.unit).iter().for_each(|leaf| flow.leaf(leaf)),
        Err(why) => {
            flow.part("To carve");
            flow.text("This blade cannot be made as it is drawn:");
            flow.list(&why.0.iter().map(ToString::to_string).collect::<Vec<_>>());
        }
    }
}
