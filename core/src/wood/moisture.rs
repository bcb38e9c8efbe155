//! How moisture changes the strength and stiffness of wood.

/// A property of clear wood at a moisture content (percent): `P = P12 (P12/Pg)^((12 − M)/(Mp − 12))`, from
/// its values at 12 % and green, `meets_percent` being the moisture at which drying begins to tell; above
/// that it is the green value.
///
/// Source: USDA Wood Handbook, FPL-GTR-190 (2010), chapter 5, equation 5-3; valid from oven-dry to green,
/// near 20 °C.
///
/// ```
/// use spokeshave::wood::at_moisture;
/// // The Handbook's own example: bending strength of white ash at 8 %, kPa.
/// assert!((at_moisture(103_000.0, 66_000.0, 24.0, 8.0) - 119_500.0).abs() < 50.0);
/// ```
#[must_use]
pub fn at_moisture(at_12: f64, green: f64, meets_percent: f64, moisture_percent: f64) -> f64 {
    if moisture_percent >= meets_percent {
        return green;
    }
    at_12 * (at_12 / green).powf((12.0 - moisture_percent) / (meets_percent - 12.0))
}
