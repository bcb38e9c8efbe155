//! The radius axis that the blade, its departure profile and the departure map have in common.

use crate::chart::linear::Linear;

/// Radius upwards, hub down, by the same pixels in every drawing that is given it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct RadiusAxis {
    /// Hub radius, m.
    pub hub_m: f64,
    /// Tip radius, m.
    pub tip_m: f64,
    /// Pixel of the tip, from the top of the drawing; the headings stand above.
    pub top_px: f64,
    /// Pixel of the hub radius.
    pub hub_px: f64,
}

impl RadiusAxis {
    /// Room above the tip for headings.
    pub const HEAD_PX: f64 = 62.0;
    /// Room under the hub radius for the axes of the map.
    const FOOT_PX: f64 = 64.0;

    /// An axis from hub to tip (m) on a length in pixels.
    #[must_use]
    pub fn new(hub_m: f64, tip_m: f64, length_px: f64) -> Self {
        Self { hub_m, tip_m, top_px: Self::HEAD_PX, hub_px: Self::HEAD_PX + length_px }
    }

    /// The projection.
    #[must_use]
    pub fn scale(&self) -> Linear {
        Linear::new((self.hub_m, self.tip_m), (self.hub_px, self.top_px))
    }

    /// Pixel of a radius, m.
    #[must_use]
    pub fn y(&self, radius_m: f64) -> f64 {
        self.scale().px(radius_m)
    }

    /// Pixels per metre.
    #[must_use]
    pub fn px_per_m(&self) -> f64 {
        -self.scale().slope()
    }

    /// Pixel of the centre of rotation.
    #[must_use]
    pub fn centre_px(&self) -> f64 {
        self.y(0.0)
    }

    /// Height of the blade's drawing: down to the centre.
    #[must_use]
    pub fn rack_height_px(&self) -> f64 {
        (self.centre_px() + 14.0).max(self.map_height_px())
    }

    /// Height of the map's drawing.
    #[must_use]
    pub fn map_height_px(&self) -> f64 {
        self.hub_px + Self::FOOT_PX
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn stands_on_the_hub() {
        let axis = RadiusAxis::new(0.09, 0.76, 440.0);
        assert_eq!((axis.y(0.76), axis.y(0.09)), (axis.top_px, axis.hub_px));
        assert!((axis.centre_px() - axis.hub_px - 0.09 * axis.px_per_m()).abs() < 1e-9);
        assert!(axis.rack_height_px() >= axis.centre_px());
    }
}
