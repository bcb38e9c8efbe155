//! Where the map stands and what its pixels mean.

use crate::blade_view::radius_axis::RadiusAxis;
use crate::chart::linear::Linear;
use spokeshave::rotor::DepartureMap;

/// The map's frame on the screen.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Frame {
    /// Left and right end, pixels.
    pub(super) left: f64,
    pub(super) right: f64,
    pub(super) axis: RadiusAxis,
    /// Airspeed, m/s, of each column, rising.
    airspeeds_m_s: Vec<f64>,
    /// Advance per turn, m, of each column.
    advances_m: Vec<f64>,
}

impl Frame {
    pub(super) fn new(map: &DepartureMap, axis: RadiusAxis, left: f64, right: f64) -> Self {
        let turn = |(v, rpm): (&f64, &f64)| if *rpm > 0.0 { v / (rpm / 60.0) } else { f64::NAN };
        Self {
            left,
            right: right.max(left + 40.0),
            axis,
            airspeeds_m_s: map.airspeeds_m_s.clone(),
            advances_m: map.airspeeds_m_s.iter().zip(&map.rpm).map(turn).collect(),
        }
    }

    /// Airspeed, m/s, along the frame.
    pub(super) fn speed(&self) -> Linear {
        let ends = (self.airspeeds_m_s.first(), self.airspeeds_m_s.last());
        Linear::new((ends.0.copied().unwrap_or(0.0), ends.1.copied().unwrap_or(1.0)), (self.left, self.right))
    }

    /// Left, top, width, height.
    pub(super) fn pane(&self) -> [f64; 4] {
        [self.left, self.axis.top_px, self.width(), self.height()]
    }

    pub(super) fn width(&self) -> f64 {
        self.right - self.left
    }

    pub(super) fn height(&self) -> f64 {
        self.axis.hub_px - self.axis.top_px
    }

    /// The greatest advance per turn on the map, m.
    pub(super) fn greatest_advance_m(&self) -> Option<f64> {
        self.advances_m.last().copied().filter(|a| a.is_finite() && *a > 0.0)
    }

    /// Pixel at which the blade makes an advance per turn (m); `None` beyond the ends of the map.
    pub(super) fn x_of_advance(&self, advance_m: f64) -> Option<f64> {
        let (speeds, advances) = (&self.airspeeds_m_s, &self.advances_m);
        let after = advances.iter().position(|a| *a >= advance_m - 1e-9)?;
        let Some(before) = after.checked_sub(1) else {
            return (advance_m > advances[0] - 1e-6).then(|| self.speed().px(speeds[0]));
        };
        let share = (advance_m - advances[before]) / (advances[after] - advances[before]);
        Some(self.speed().px(speeds[before] + share * (speeds[after] - speeds[before])))
    }

    /// Whether the map starts at a greater advance per turn (m) than this.
    pub(super) fn starts_past(&self, advance_m: f64) -> bool {
        self.advances_m.first().is_some_and(|first| advance_m < *first)
    }

    /// Advance per turn, m, at a pixel.
    pub(super) fn advance_at(&self, x: f64) -> Option<f64> {
        let place =
            ((x - self.left) / self.width()).clamp(0.0, 1.0) * self.advances_m.len().checked_sub(1)? as f64;
        let (i, w) = (place as usize, place.fract());
        let (a, b) = (self.advances_m[i], *self.advances_m.get(i + 1).unwrap_or(&self.advances_m[i]));
        Some(a + w * (b - a)).filter(|a| a.is_finite())
    }
}

#[cfg(test)]
pub(super) mod tests {
    use super::*;
    use ndarray::Array2;
    use spokeshave::rotor::MapCell;

    /// A map of 12 radii by 9 speeds to 40 m/s whose departure falls with speed and rises with radius.
    pub(in crate::blade_view::map) fn sample() -> DepartureMap {
        let airspeeds_m_s: Vec<f64> = (0..9).map(|i| 5.0 * f64::from(i)).collect();
        let radii_m: Vec<f64> = (0..12).map(|i| 0.1 + 0.05 * (f64::from(i) + 0.5)).collect();
        let cells = Array2::from_shape_fn((12, 9), |(r, c)| {
            let departure = 14.0 - 2.4 * c as f64 + 0.3 * r as f64;
            MapCell {
                departure_deg: (r != 3 || c != 4).then_some(departure),
                share_of_best: Some(1.0 - (departure / 10.0).powi(2)),
                past_stall_deg: Some(departure - 10.0),
            }
        });
        DepartureMap { radii_m, rpm: vec![2400.0; 9], airspeeds_m_s, cells }
    }

    pub(in crate::blade_view::map) fn frame() -> Frame {
        Frame::new(&sample(), RadiusAxis::new(0.1, 0.7, 400.0), 10.0, 410.0)
    }

    #[test]
    fn a_mark_stands_where_the_blade_makes_its_advance() {
        let frame = frame();
        assert_eq!(frame.x_of_advance(0.0), Some(10.0));
        assert!((frame.x_of_advance(0.5).unwrap() - 210.0).abs() < 1e-9, "20 m/s at 40 turns a second");
        assert_eq!(frame.x_of_advance(1.01), None);
        assert!((frame.advance_at(210.0).unwrap() - 0.5).abs() < 1e-9);
    }
}
