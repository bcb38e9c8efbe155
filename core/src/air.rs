//! The standard atmosphere to 20 km, with a temperature offset.
//!
//! Method: ISO 2533:1975 (identical with the US Standard Atmosphere 1976 below 32 km): a temperature lapse of
//! 6.5 K/km up to 11 km of geopotential height, then 216.65 K. The offset changes the temperature and,
//! through the gas law, the density; the pressure stays that of the pressure altitude. Viscosity by
//! Sutherland's law with the coefficients of the US Standard Atmosphere 1976.

use serde::Serialize;
use thiserror::Error;

/// Standard gravity, m/s².
pub const G0_M_S2: f64 = 9.806_65;
/// Sea-level density of the standard atmosphere, kg/m³.
pub const RHO0_KG_M3: f64 = 1.225;
/// Specific gas constant of dry air, J/(kg K).
const GAS_CONSTANT: f64 = 287.052_87;
/// Ratio of the specific heats, and of the standard atmosphere of ISO 2533 temperature and pressure at sea
/// level, the lapse of temperature, and the tropopause: its geopotential height and its temperature.
const HEAT_RATIO: f64 = 1.4;
const T0_K: f64 = 288.15;
const P0_PA: f64 = 101_325.0;
const LAPSE_K_M: f64 = 0.0065;
const TROPOPAUSE_M: f64 = 11_000.0;
const T_TROPOPAUSE_K: f64 = 216.65;
/// Earth radius of ISO 2533 that turns geometric into geopotential height, m.
const EARTH_RADIUS_M: f64 = 6_356_766.0;

/// Lowest pressure altitude accepted, m.
pub const LOWEST_M: f64 = -1_000.0;
/// Highest pressure altitude accepted, m.
pub const HIGHEST_M: f64 = 20_000.0;
/// Largest temperature offset accepted either way, K.
pub const LARGEST_OFFSET_K: f64 = 60.0;

/// Why an atmosphere could not be given.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum AirError {
    /// The height is outside the standard.
    #[error("altitude {0} m is outside {LOWEST_M} to {HIGHEST_M} m")]
    Altitude(f64),
    /// The temperature offset is outside what makes sense.
    #[error("temperature offset {0} K is outside ±{LARGEST_OFFSET_K} K")]
    Offset(f64),
}

/// The state of the air a propeller works in.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Air {
    /// Temperature, K.
    pub temperature_k: f64,
    /// Pressure, Pa.
    pub pressure_pa: f64,
    /// Density, kg/m³.
    pub density_kg_m3: f64,
    /// Speed of sound, m/s.
    pub sound_speed_m_s: f64,
    /// Dynamic viscosity, Pa s.
    pub viscosity_pa_s: f64,
}

impl Air {
    /// The air at a pressure altitude (geopotential, m) with a temperature offset (K) from the standard.
    ///
    /// # Errors
    /// Outside −1 000 to 20 000 m, or an offset beyond ±60 K; NaN fails.
    ///
    /// # References
    /// ISO 2533:1975, equations 1 to 12; US Standard Atmosphere 1976, equation 51 (viscosity).
    ///
    /// ```
    /// let air = spokeshave::air::Air::standard(0.0, 0.0).unwrap();
    /// assert!((air.density_kg_m3 - 1.225).abs() < 1e-5);
    /// ```
    pub fn standard(altitude_m: f64, offset_k: f64) -> Result<Self, AirError> {
        if !(LOWEST_M..=HIGHEST_M).contains(&altitude_m) {
            return Err(AirError::Altitude(altitude_m));
        }
        if !(-LARGEST_OFFSET_K..=LARGEST_OFFSET_K).contains(&offset_k) {
            return Err(AirError::Offset(offset_k));
        }
        let (standard_k, pressure_pa) = standard_temperature_and_pressure(altitude_m);
        Ok(Self::of(pressure_pa, standard_k + offset_k))
    }

    /// The air of a pressure (Pa) and a temperature (K), both above zero.
    #[must_use]
    pub fn of(pressure_pa: f64, temperature_k: f64) -> Self {
        Self {
            temperature_k,
            pressure_pa,
            density_kg_m3: pressure_pa / (GAS_CONSTANT * temperature_k),
            sound_speed_m_s: (HEAT_RATIO * GAS_CONSTANT * temperature_k).sqrt(),
            viscosity_pa_s: sutherland_viscosity_pa_s(temperature_k),
        }
    }

    /// Density over sea-level standard density.
    #[must_use]
    pub fn density_ratio(&self) -> f64 {
        self.density_kg_m3 / RHO0_KG_M3
    }
}

fn standard_temperature_and_pressure(altitude_m: f64) -> (f64, f64) {
    let exponent = G0_M_S2 / (GAS_CONSTANT * LAPSE_K_M);
    let below = |h: f64| {
        let t = T0_K - LAPSE_K_M * h;
        (t, P0_PA * (t / T0_K).powf(exponent))
    };
    if altitude_m <= TROPOPAUSE_M {
        return below(altitude_m);
    }
    let (_, p11) = below(TROPOPAUSE_M);
    let fall = G0_M_S2 * (altitude_m - TROPOPAUSE_M) / (GAS_CONSTANT * T_TROPOPAUSE_K);
    (T_TROPOPAUSE_K, p11 * (-fall).exp())
}

fn sutherland_viscosity_pa_s(temperature_k: f64) -> f64 {
    1.458e-6 * temperature_k.powf(1.5) / (temperature_k + 110.4)
}

/// Geopotential height (m) of a geometric height (m): `h = r z / (r + z)`.
#[must_use]
pub fn geopotential_m(geometric_m: f64) -> f64 {
    EARTH_RADIUS_M * geometric_m / (EARTH_RADIUS_M + geometric_m)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn refuses_what_the_standard_does_not_cover() {
        assert_eq!(Air::standard(20_001.0, 0.0), Err(AirError::Altitude(20_001.0)));
        assert!(Air::standard(f64::NAN, 0.0).is_err());
        assert!(Air::standard(0.0, 61.0).is_err());
    }

    #[test]
    fn the_two_layers_meet_at_the_tropopause() {
        let below = Air::standard(TROPOPAUSE_M - 1e-6, 0.0).unwrap();
        let above = Air::standard(TROPOPAUSE_M + 1e-6, 0.0).unwrap();
        assert!((below.pressure_pa - above.pressure_pa).abs() < 1e-4);
    }

    #[test]
    fn an_offset_changes_density_but_not_pressure() {
        let (cold, warm) = (Air::standard(1000.0, 0.0).unwrap(), Air::standard(1000.0, 20.0).unwrap());
        assert_eq!(cold.pressure_pa, warm.pressure_pa);
        let ratio = cold.density_kg_m3 / warm.density_kg_m3;
        assert!((ratio - warm.temperature_k / cold.temperature_k).abs() < 1e-12);
    }
}
