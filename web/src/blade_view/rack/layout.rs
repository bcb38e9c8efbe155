//! Where things stand on the rack, pixels from its left.

use crate::blade_view::planform::{AHEAD, Planform};
use crate::blade_view::radius_axis::RadiusAxis;
use crate::chart::linear::Linear;
use crate::chart::spread::{every, spread};

/// The radius axis.
pub(super) const AXIS: f64 = 46.0;
/// Centres of the numbered balloons.
pub(super) const BALLOON: f64 = 64.0;
/// Radius of a balloon.
pub(super) const BALLOON_R: f64 = 10.0;
/// The column of the blade.
pub(super) const BLADE: (f64, f64) = (82.0, 156.0);
/// Left end of the departure profile.
pub(super) const PROFILE: f64 = 170.0;
/// Width of a tag.
pub(super) const TAG_WIDTH: f64 = 46.0;
/// Height of a tag.
pub(super) const TAG_HEIGHT: f64 = 20.0;
/// Room between the profile and the tags, and to the right of them.
pub(super) const GAP: f64 = 9.0;
/// The profile shows so many degrees either way.
pub(super) const REACH_DEG: f64 = 7.0;

/// The rack's places for one blade.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Layout {
    pub(super) width: f64,
    pub(super) axis: RadiusAxis,
    /// The blade axis.
    pub(super) blade_x: f64,
    /// Pixels per metre across the blade.
    pub(super) across_px_per_m: f64,
    /// +1 when the leading edge is on the right, else −1.
    pub(super) leading: f64,
}

impl Layout {
    pub(super) fn new(axis: RadiusAxis, shape: &Planform, width: f64, leading_right: bool) -> Self {
        let room = BLADE.1 - BLADE.0;
        let across_px_per_m = axis.px_per_m().min(room / shape.widest_m().max(1e-9));
        let leading = if leading_right { 1.0 } else { -1.0 };
        let off = leading * (0.5 - AHEAD) * shape.widest_m() * across_px_per_m;
        Self { width, axis, blade_x: 0.5 * (BLADE.0 + BLADE.1) + off, across_px_per_m, leading }
    }

    /// A radius and an offset towards the leading edge, both m, on the screen.
    pub(super) fn place(&self, radius_m: f64, offset_m: f64) -> [f64; 2] {
        [self.blade_x + self.leading * offset_m * self.across_px_per_m, self.axis.y(radius_m)]
    }

    /// Chord drawn over chord to scale.
    pub(super) fn chord_share(&self) -> f64 {
        self.across_px_per_m / self.axis.px_per_m()
    }

    pub(super) fn tag_x(&self) -> f64 {
        self.width - GAP - TAG_WIDTH
    }

    /// Departure, degrees, across the profile.
    pub(super) fn departure(&self) -> Linear {
        Linear::new((-REACH_DEG, REACH_DEG), (PROFILE, self.tag_x() - GAP))
    }

    /// Heights at which the stations' labels stand; `None` for those that are left out for want of room.
    pub(super) fn label_heights(&self, radii_m: &[f64], selected: usize) -> Vec<Option<f64>> {
        let room = (self.axis.top_px - 6.0, self.axis.hub_px + 8.0);
        let size = TAG_HEIGHT + 2.0;
        let step = every(radii_m.len(), size, room.1 - room.0);
        let shown: Vec<usize> = (0..radii_m.len()).filter(|i| i % step == selected % step).collect();
        let wanted: Vec<f64> = shown.iter().rev().map(|&i| self.axis.y(radii_m[i])).collect();
        let placed = spread(&wanted, &vec![size; wanted.len()], room.0, room.1);
        let mut heights = vec![None; radii_m.len()];
        for (&i, y) in shown.iter().rev().zip(placed) {
            heights[i] = Some(y);
        }
        heights
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn layout(chord_m: f64) -> Layout {
        let shape = Planform::from_chord(0.09, 0.76, 0.72, |_| chord_m);
        Layout::new(RadiusAxis::new(0.09, 0.76, 440.0), &shape, 372.0, true)
    }

    #[test]
    fn the_blade_is_drawn_to_scale_while_it_fits() {
        assert_eq!(layout(0.09).chord_share(), 1.0);
        let wide = layout(0.3);
        assert!(wide.chord_share() < 1.0);
        let [leading, trailing] = [0.3 * AHEAD, 0.3 * (AHEAD - 1.0)].map(|o| wide.place(0.4, o)[0]);
        assert!((trailing - BLADE.0).abs() < 1e-6 && (leading - BLADE.1).abs() < 1e-6);
    }

    #[test]
    fn labels_keep_apart_and_the_chosen_one_stays() {
        let radii: Vec<f64> = (0..60).map(|i| 0.1 + 0.011 * f64::from(i)).collect();
        for selected in [0, 31, 59] {
            let heights = layout(0.09).label_heights(&radii, selected);
            assert!(heights[selected].is_some());
            let shown: Vec<f64> = heights.iter().rev().flatten().copied().collect();
            assert!(shown.len() > 15 && shown.windows(2).all(|w| w[1] - w[0] >= TAG_HEIGHT), "{shown:?}");
        }
    }
}
