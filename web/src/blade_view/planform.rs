//! The outline of a blade from its chord.
//!
//! A job says how wide the blade is, not where its axis lies across the chord, so the drawing puts it
//! [`AHEAD`] of the chord behind the leading edge. Outside the outermost station the tip is rounded for the
//! eye: the computation holds the last chord to the tip.

use crate::chart::path::polygon;
use spokeshave::blade::Blade;

/// Share of the chord drawn ahead of the blade axis.
pub const AHEAD: f64 = 0.35;
/// Steps along a piece of the blade.
const STEPS: u32 = 24;
/// Samples of the chord from hub to tip.
const SAMPLES: u32 = 96;

/// Chord over radius, ready for drawing.
#[derive(Clone, Debug, PartialEq)]
pub struct Planform {
    /// Hub radius, m.
    pub hub_m: f64,
    /// Tip radius, m.
    pub tip_m: f64,
    /// Length of the rounding, m.
    round_m: f64,
    /// Chord (m) at even steps from hub to tip.
    chords_m: Vec<f64>,
}

impl Planform {
    /// The planform of a blade.
    #[must_use]
    pub fn of(blade: &Blade) -> Self {
        let last = blade.station_radii_m().last().unwrap_or(blade.radius_m);
        Self::from_chord(blade.hub_radius_m, blade.radius_m, last, |r| blade.cut(r).chord_m)
    }

    /// The planform of a chord (m) given over radius (m), whose outermost station is at `last_m`.
    #[must_use]
    pub fn from_chord(hub_m: f64, tip_m: f64, last_m: f64, chord_m: impl Fn(f64) -> f64) -> Self {
        let at = |i: u32| hub_m + (tip_m - hub_m) * f64::from(i) / f64::from(SAMPLES);
        let half_chord = 0.5 * chord_m(tip_m).max(0.0);
        let round_m = (tip_m - last_m).clamp(0.2 * half_chord, 2.0 * half_chord.max(1e-9));
        Self { hub_m, tip_m, round_m, chords_m: (0..=SAMPLES).map(|i| chord_m(at(i)).max(0.0)).collect() }
    }

    /// The greatest chord, m.
    #[must_use]
    pub fn widest_m(&self) -> f64 {
        self.chords_m.iter().copied().fold(0.0, f64::max)
    }

    /// How far the leading and the trailing edge lie from the axis at a radius, m, leading positive.
    #[must_use]
    pub fn edges_m(&self, radius_m: f64) -> [f64; 2] {
        let chord = self.chord_m(radius_m) * self.rounding(radius_m);
        [AHEAD * chord, (AHEAD - 1.0) * chord]
    }

    /// The blade between two radii as path data; `place` puts a radius and an offset from the axis (both m)
    /// on the screen.
    #[must_use]
    pub fn piece(&self, from_m: f64, to_m: f64, place: impl Fn(f64, f64) -> [f64; 2]) -> String {
        // Steps gather at the outer end, where the tip is round.
        let at = |i: u32| {
            let share = f64::from(i) / f64::from(STEPS);
            from_m + (to_m - from_m) * (1.0 - (1.0 - share).powi(2))
        };
        let leading = (0..=STEPS).map(|i| place(at(i), self.edges_m(at(i))[0]));
        let trailing = (0..=STEPS).rev().map(|i| place(at(i), self.edges_m(at(i))[1]));
        polygon(leading.chain(trailing))
    }

    /// The whole blade as path data.
    #[must_use]
    pub fn outline(&self, place: impl Fn(f64, f64) -> [f64; 2]) -> String {
        let points = |edge: usize| {
            let place = &place;
            (0..=SAMPLES).map(move |i| {
                let share = f64::from(i) / f64::from(SAMPLES);
                let r = self.hub_m + (self.tip_m - self.hub_m) * (1.0 - (1.0 - share).powf(1.6));
                place(r, self.edges_m(r)[edge])
            })
        };
        polygon(points(0).chain(points(1).rev()))
    }

    /// The radii between which each station's colour stands: halfway to its neighbours, hub and tip at the
    /// ends.
    #[must_use]
    pub fn bands_m(&self, stations_m: &[f64]) -> Vec<[f64; 2]> {
        let middle = |i: usize| 0.5 * (stations_m[i] + stations_m[i + 1]);
        (0..stations_m.len())
            .map(|i| {
                let from = if i == 0 { self.hub_m } else { middle(i - 1) };
                let to = if i + 1 == stations_m.len() { self.tip_m } else { middle(i) };
                [from.clamp(self.hub_m, self.tip_m), to.clamp(self.hub_m, self.tip_m)]
            })
            .collect()
    }

    fn chord_m(&self, radius_m: f64) -> f64 {
        let share = (radius_m - self.hub_m) / (self.tip_m - self.hub_m);
        let place = share.clamp(0.0, 1.0) * f64::from(SAMPLES);
        let i = (place as usize).min(SAMPLES as usize - 1);
        let w = place - i as f64;
        self.chords_m[i] * (1.0 - w) + self.chords_m[i + 1] * w
    }

    /// 1, falling to 0 over the rounding as a quarter of an ellipse.
    fn rounding(&self, radius_m: f64) -> f64 {
        let into = ((radius_m - self.tip_m + self.round_m) / self.round_m).clamp(0.0, 1.0);
        (1.0 - into * into).sqrt()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn blade() -> Planform {
        Planform::from_chord(0.1, 0.8, 0.77, |r| 0.12 - 0.1 * r)
    }

    #[test]
    fn share_the_chord_about_the_axis() {
        let [leading, trailing] = blade().edges_m(0.4);
        assert!((leading - trailing - 0.08).abs() < 1e-9);
        assert!((leading - AHEAD * 0.08).abs() < 1e-9);
    }

    #[test]
    fn round_the_tip_only() {
        assert_eq!(blade().edges_m(0.8), [0.0, 0.0].map(|z: f64| z));
        let [leading, trailing] = blade().edges_m(0.77);
        assert!((leading - trailing - 0.043).abs() < 1e-9, "as drawn up to the outermost station");
    }

    #[test]
    fn bands_cover_the_blade_without_a_gap() {
        let bands = blade().bands_m(&[0.2, 0.4, 0.7]);
        assert_eq!((bands[0][0], bands[2][1]), (0.1, 0.8));
        assert!(bands.windows(2).all(|w| w[0][1] == w[1][0]));
        assert_eq!(blade().bands_m(&[0.5]), [[0.1, 0.8]]);
    }

    #[test]
    fn drawings_hold_finite_figures_only() {
        for chord in [0.0, 0.05] {
            let shape = Planform::from_chord(0.1, 0.8, 0.8, |_| chord);
            let data = shape.outline(|r, o| [100.0 * o, 100.0 * r]) + &shape.piece(0.7, 0.8, |r, o| [o, r]);
            assert!(!data.contains("NaN") && !data.contains("inf"), "{data}");
        }
    }
}
