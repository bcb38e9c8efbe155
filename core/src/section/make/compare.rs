//! What the carver's departures from the drawing cost: the same section as carved and as drawn.

use serde::{Deserialize, Serialize};

use super::{Made, Plan, Summary};
use crate::section::outline::Outline;

/// Best lift-to-drag and its angle to the chord line of the drawing.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
pub struct Peak {
    /// Angle of best lift-to-drag to the chord line of the drawing, degrees.
    pub angle_deg: f64,
    /// Greatest lift-to-drag.
    pub lift_to_drag: f64,
}

/// One polar as drawn and as carved.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
pub struct Comparison {
    /// Thickness ratio.
    pub thickness_ratio: f64,
    /// Reynolds number.
    pub reynolds: f64,
    /// As drawn; none where too few points converged or it nowhere lifts.
    pub drawn: Option<Peak>,
    /// As carved.
    pub carved: Option<Peak>,
}

impl Comparison {
    /// How the best angle moves, degrees, and what share of the best lift-to-drag is left.
    #[must_use]
    pub fn change(&self) -> Option<(f64, f64)> {
        let (drawn, carved) = (self.drawn?, self.carved?);
        Some((carved.angle_deg - drawn.angle_deg, carved.lift_to_drag / drawn.lift_to_drag))
    }
}

/// Compares two plans of the same outline, thicknesses and Reynolds numbers, task by task. Both angles are to
/// the chord line of the drawing, so that their difference is one of the blade angle.
#[must_use]
pub fn compare(carved: (&Plan, &[Made]), drawn: (&Plan, &[Made])) -> Vec<Comparison> {
    let turn_rad = |plan: &Plan, task: usize| plan.outline(task).map_or(0.0, Outline::rotation_rad);
    let pairs = carved.1.iter().zip(drawn.1).enumerate();
    pairs
        .map(|(task, (c, d))| Comparison {
            thickness_ratio: d.thickness_ratio,
            reynolds: d.reynolds,
            drawn: peak(d, 0.0),
            carved: peak(c, (turn_rad(carved.0, task) - turn_rad(drawn.0, task)).to_degrees()),
        })
        .collect()
}

/// The peak of a polar whose chord line is `turn_deg` nose up from that of the drawing.
fn peak(made: &Made, turn_deg: f64) -> Option<Peak> {
    let summary = Summary::of(&made.polar()?).ok()?;
    Some(Peak { angle_deg: summary.best_angle_deg? - turn_deg, lift_to_drag: summary.best_lift_to_drag? })
}
