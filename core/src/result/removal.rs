//! What can be put right on carved blades: what to take off, and what comes of it.

use serde::Serialize;

use super::carved::{Carved, LEAST_GRAMS};

/// Where wood that is taken off for balance is thought to lie, as a share of the tip radius.
const BALANCE_AT: f64 = 0.75;
/// What is nothing to a blade's margin.
const LEAST_MARGIN: f64 = 0.01;

/// What to take off, and what comes of it.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct RemovalPlan {
    /// The flight point at which departure is restored.
    pub flight_point: String,
    /// By blade and radius.
    pub blades: Vec<PlannedBlade>,
    /// The propeller as the plan leaves it.
    pub after: Carved,
}

impl RemovalPlan {
    /// What the cuts do to balance and strength, and what to do about it, a sentence each.
    #[must_use]
    pub fn warns(&self, before: &Carved) -> Vec<String> {
        let mut all = Vec::new();
        let (was, is) = (&before.balance, &self.after.balance);
        if let (true, Some(heavy)) = (is.read && is.grams_at_tip >= LEAST_GRAMS, is.heavy_blade) {
            let worse = if is.grams_at_tip > was.grams_at_tip {
                format!(
                    "The cuts make the balance worse, from {:.2} to {:.2} g at the tip. ",
                    was.grams_at_tip, is.grams_at_tip
                )
            } else {
                String::new()
            };
            all.push(format!(
                "{worse}Then take about {:.1} g more off the back of blade {heavy} round three quarters of \
                 the radius, evenly and a little at a time, and hang it up again.",
                is.grams_at_tip / BALANCE_AT
            ));
        }
        if let (Some(was), Some(is)) = (&before.strength, &self.after.strength)
            && is.margin < was.margin - LEAST_MARGIN
        {
            all.push(format!(
                "The cuts take strength: the least margin falls from {:.0} to {:.0} %.",
                100.0 * was.margin,
                100.0 * is.margin
            ));
        }
        all
    }
}

/// What to take off one blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PlannedBlade {
    /// Its number, from 1.
    pub blade: usize,
    /// By radius.
    pub stations: Vec<PlannedStation>,
}

/// What to take off at one radius of one blade. Nothing is ever added.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct PlannedStation {
    /// Radius, m.
    pub radius_m: f64,
    /// Depth off the face at the leading edge, falling to nothing at the trailing edge, m.
    pub face_leading_m: f64,
    /// Depth off the face at the trailing edge, falling to nothing at the leading edge, m.
    pub face_trailing_m: f64,
    /// Depth off the back at the thickest place, fading to the edges, m.
    pub back_m: f64,
    /// Off the trailing edge, after the face, m.
    pub trailing_edge_m: f64,
    /// Chord that planing the face takes off the edges by itself, m.
    pub chord_lost_m: f64,
    /// Least and greatest angle to the chord line that planing reaches within the limits, degrees.
    pub reachable_deg: (f64, f64),
    /// The angle that would restore departure, degrees.
    pub wanted_deg: f64,
    /// The angle after the plan, degrees.
    pub angle_deg: f64,
    /// The same on the flat face, degrees.
    pub face_angle_deg: Option<f64>,
    /// Chord after the plan, m.
    pub chord_m: f64,
    /// Thickness after the plan, m.
    pub thickness_m: f64,
    /// Whether there is a flat face to plane.
    pub has_face: bool,
    /// Whether the blade's angle was read here or on both sides of here. Where it was not, the face is not
    /// turned.
    pub read: bool,
}

impl PlannedStation {
    /// What keeps it from being put right, in a few words; empty where nothing does.
    #[must_use]
    pub fn note(&self) -> &'static str {
        match (self.read, self.has_face) {
            (false, _) => "not read, so not turned",
            (true, false) => "no flat face, so not turned",
            (true, true) => "",
        }
    }
}
