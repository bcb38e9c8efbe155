//! One blade at one radius under the plane: how far its face can be turned, what is worth a cut, and what a cut
//! leaves.
//!
//! Planing at a thin trailing edge costs chord: where less than the drawn chord would be left, the turn stops
//! where the angle that is still wrong weighs as much as the chord that is lost.

use super::plane::{Cuts, Profile, Slab};
use crate::result::PlannedStation;
use crate::rig::Rig;

/// Widest turn of a face that is looked at, rad.
const WIDEST_RAD: f64 = 0.2;
/// Halvings of the turn: to less than a millionth of a degree.
const HALVINGS: u32 = 40;
/// What is not worth a cut: angle, rad; depth, m.
const LEAST_TURN_RAD: f64 = 0.02 * std::f64::consts::PI / 180.0;
const LEAST_CUT_M: f64 = 0.1e-3;
/// What a lost share of chord weighs as an angle, rad: load goes with chord as `Δc/c` and with angle as `a
/// Δα/cl`, for a lift slope of 5.7 a radian and a lift coefficient of 0.7.
const CHORD_WEIGHT_RAD: f64 = 0.7 / 5.7;
/// Steps in which the turn is weighed, each leaving two thirds.
const THIRDS: u32 = 40;

/// One blade at one radius.
pub(super) struct Piece<'a> {
    pub(super) rig: &'a Rig,
    pub(super) radius_m: f64,
    pub(super) profile: Option<&'a Profile>,
    pub(super) slab: Slab,
    pub(super) least: (f64, f64),
    /// Whether angle, chord and thickness were read here or on both sides of here, on every blade.
    pub(super) read: [bool; 3],
}

impl Piece<'_> {
    pub(super) fn face_to_chord(&self, slab: &Slab) -> f64 {
        let ratio = slab.thickness_m / slab.chord_m;
        self.profile.and_then(|_| self.rig.rotor.blade.face_to_chord_of(self.radius_m, ratio)).unwrap_or(0.0)
    }

    pub(super) fn turned(&self, turn_rad: f64) -> Slab {
        self.cut(&Cuts::turning(self.slab.chord_m, turn_rad))
    }

    fn cut(&self, cuts: &Cuts) -> Slab {
        match self.profile {
            Some(profile) => profile.cut(self.slab, cuts),
            None => Slab {
                chord_m: self.slab.chord_m - cuts.trailing_edge_m,
                thickness_m: self.slab.thickness_m - cuts.back_m,
                ..self.slab
            },
        }
    }

    /// The cuts of a turn with the chord and thickness aimed at, and what they leave.
    fn finished(&self, turn_rad: f64, (chord_m, thickness_m): (f64, f64)) -> (Cuts, Slab) {
        let mut cuts = Cuts::turning(self.slab.chord_m, turn_rad);
        let wedged = self.cut(&cuts);
        let worth = |depth: f64| if depth < LEAST_CUT_M { 0.0 } else { depth };
        let known = |k: usize, depth: f64| if self.read[k] { worth(depth) } else { 0.0 };
        cuts.trailing_edge_m = known(1, wedged.chord_m - chord_m);
        cuts.back_m = known(2, wedged.thickness_m - thickness_m);
        (cuts, self.cut(&cuts))
    }

    /// Angle to the chord line after a turn, rad.
    pub(super) fn angle(&self, turn_rad: f64, goal: (f64, f64)) -> f64 {
        let slab = self.finished(turn_rad, goal).1;
        slab.face_rad + self.face_to_chord(&slab)
    }

    /// The farthest turn in a direction within the least chord and thickness.
    fn farthest(&self, sign: f64) -> f64 {
        let within = |turn: f64| {
            let left = self.turned(sign * turn);
            left.chord_m >= self.least.0 && left.thickness_m >= self.least.1
        };
        if self.profile.is_none() || !self.read[0] || !within(0.0) {
            return 0.0;
        }
        let (mut good, mut bad) = (0.0, WIDEST_RAD);
        for _ in 0..HALVINGS {
            let middle = 0.5 * (good + bad);
            if within(middle) { good = middle } else { bad = middle }
        }
        sign * good
    }

    /// A turn as far as it goes.
    pub(super) fn within_reach(&self, turn_rad: f64) -> f64 {
        turn_rad.clamp(self.farthest(-1.0), self.farthest(1.0))
    }

    /// Least and greatest angle to the chord line that can be had, rad.
    pub(super) fn reach(&self, goal: (f64, f64)) -> (f64, f64) {
        (self.angle(self.farthest(-1.0), goal), self.angle(self.farthest(1.0), goal))
    }

    /// The turn that gives an angle to the chord line, rad.
    fn turn_to(&self, angle_rad: f64, goal: (f64, f64)) -> f64 {
        let off = (self.angle(0.0, goal) - angle_rad).abs();
        if off < LEAST_TURN_RAD || off.tan() * self.slab.chord_m < LEAST_CUT_M {
            return 0.0;
        }
        let (mut low, mut high) = (self.farthest(-1.0), self.farthest(1.0));
        for _ in 0..HALVINGS {
            let middle = 0.5 * (low + high);
            if self.angle(middle, goal) < angle_rad { low = middle } else { high = middle }
        }
        0.5 * (low + high)
    }

    /// The turn towards an angle (rad) at which what is left of its error and what is lost of the drawn chord
    /// weigh least.
    pub(super) fn weighed(&self, angle_rad: f64, goal: (f64, f64), drawn_chord_m: f64) -> f64 {
        let turn = self.turn_to(angle_rad, goal);
        let whole = drawn_chord_m.min(self.slab.chord_m);
        let lost = |turn: f64| (whole - self.turned(turn).chord_m).max(0.0) / drawn_chord_m;
        if lost(turn) == 0.0 {
            return turn;
        }
        let cost = |share: f64| {
            let here = share * turn;
            (self.angle(here, goal) - angle_rad).powi(2) + (CHORD_WEIGHT_RAD * lost(here)).powi(2)
        };
        let (mut low, mut high) = (0.0, 1.0);
        for _ in 0..THIRDS {
            let third = (high - low) / 3.0;
            if cost(low + third) < cost(high - third) { high -= third } else { low += third }
        }
        0.5 * (low + high) * turn
    }

    pub(super) fn told(&self, turn_rad: f64, goal: (f64, f64), wanted_rad: f64) -> PlannedStation {
        let (cuts, after) = self.finished(turn_rad, goal);
        let (low, high) = self.reach(goal);
        PlannedStation {
            radius_m: self.radius_m,
            face_leading_m: cuts.face_leading_m,
            face_trailing_m: cuts.face_trailing_m,
            back_m: cuts.back_m,
            trailing_edge_m: cuts.trailing_edge_m,
            chord_lost_m: (self.slab.chord_m - after.chord_m - cuts.trailing_edge_m).max(0.0),
            reachable_deg: (low.to_degrees(), high.to_degrees()),
            wanted_deg: wanted_rad.to_degrees(),
            angle_deg: (after.face_rad + self.face_to_chord(&after)).to_degrees(),
            face_angle_deg: self.profile.map(|_| after.face_rad.to_degrees()),
            chord_m: after.chord_m,
            thickness_m: after.thickness_m,
            has_face: self.profile.is_some(),
            read: self.read[0],
        }
    }
}
