//! Where the chord lies in the velocity triangle, and where it would be best.

use super::triangle::HEIGHT;
use crate::chart::axis::px;
use crate::chart::departure;
use crate::chart::path::polygon;
use spokeshave::result::StationResult;
use yew::prelude::*;

/// The chord as it lies and as it would lie at its best, from the start of the triangle.
pub(super) struct Rays {
    pub(super) from: [f64; 2],
    pub(super) chord: [f64; 2],
    pub(super) best: Option<[f64; 2]>,
    class: &'static str,
}

impl Rays {
    pub(super) fn new(station: &StationResult, from: [f64; 2], length: f64, up: bool) -> Option<Self> {
        let air = station.inflow_angle_deg?;
        let angles = [station.blade_angle_deg, air + station.best_angle_deg.unwrap_or(0.0)];
        let room = if up { from[1] - 18.0 } else { HEIGHT - 24.0 - from[1] };
        let deepest = angles.map(|a| a.to_radians().sin().abs()).into_iter().fold(1e-9, f64::max);
        let length = length.min(room / deepest);
        let end = |deg: f64| {
            let (sin, cos) = deg.to_radians().sin_cos();
            [from[0] + length * cos, from[1] + length * sin]
        };
        Some(Self {
            from,
            chord: end(angles[0]),
            best: station.best_angle_deg.map(|_| end(angles[1])),
            class: departure::style(station.departure_deg),
        })
    }

    pub(super) fn right(&self) -> f64 {
        self.chord[0].max(self.best.map_or(0.0, |b| b[0]))
    }

    /// Between the two: the departure.
    pub(super) fn wedge(&self) -> Html {
        let Some(best) = self.best else { return Html::default() };
        html! { <path class={classes!("band", self.class)} d={polygon([self.from, self.chord, best])} /> }
    }

    pub(super) fn lines(&self) -> Html {
        let line = |to: [f64; 2], class: &'static str| {
            html! { <line {class} x1={px(self.from[0])} y1={px(self.from[1])} x2={px(to[0])} y2={px(to[1])} /> }
        };
        html! { <>{ self.best.map(|b| line(b, "best-ray")) }{ line(self.chord, "chord-ray") }</> }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn rays_stay_on_the_drawing() {
        for (angle, air, up) in [(51.0, 4.0, false), (-80.0, -85.0, true), (88.0, 70.0, false)] {
            let station = StationResult {
                blade_angle_deg: angle,
                inflow_angle_deg: Some(air),
                best_angle_deg: Some(3.0),
                ..Default::default()
            };
            let rays = Rays::new(&station, [10.0, if up { HEIGHT - 30.0 } else { 24.0 }], 400.0, up).unwrap();
            for end in [rays.chord, rays.best.unwrap()] {
                assert!((0.0..=HEIGHT).contains(&end[1]), "{angle}: {end:?}");
            }
        }
    }
}
