//! The units that may be typed behind a figure.

use super::worth::{area_m2, height_m, length_m, mass_kg, power_w, speed_m_s};
use super::{AreaUnit, HeightUnit, LengthUnit, MassUnit, PowerUnit, Quantity, SpeedUnit};

/// The unit a suffix typed behind a figure stands for, in SI; `None` where it is no unit of this quantity.
#[must_use]
pub fn typed_unit_si(quantity: Quantity, suffix: &str) -> Option<f64> {
    let of = |units: &[(&str, f64)]| units.iter().find(|u| u.0 == suffix).map(|u| u.1);
    match quantity {
        Quantity::Length => of(&[
            ("mm", 0.001),
            ("cm", 0.01),
            ("m", 1.0),
            ("in", length_m(LengthUnit::Inch)),
            ("\"", length_m(LengthUnit::Inch)),
            ("″", length_m(LengthUnit::Inch)),
            ("inch", length_m(LengthUnit::Inch)),
            ("ft", height_m(HeightUnit::Foot)),
            ("'", height_m(HeightUnit::Foot)),
            ("′", height_m(HeightUnit::Foot)),
        ]),
        Quantity::Height => {
            let foot = height_m(HeightUnit::Foot);
            of(&[("m", 1.0), ("km", 1000.0), ("ft", foot), ("feet", foot), ("'", foot), ("′", foot)])
        }
        Quantity::Speed => SpeedUnit::ALL.iter().find(|u| u.symbol() == suffix).map(|&u| speed_m_s(u)),
        Quantity::Power => PowerUnit::ALL.iter().find(|u| u.symbol() == suffix).map(|&u| power_w(u)),
        Quantity::Angle => of(&[("°", 1.0), ("deg", 1.0)]),
        Quantity::Temperature => of(&[("K", 1.0), ("°C", 1.0)]),
        Quantity::Rpm => of(&[("rpm", 1.0)]),
        Quantity::Share => of(&[("%", 0.01)]),
        Quantity::Mass => MassUnit::ALL.iter().find(|u| u.symbol() == suffix).map(|&u| mass_kg(u)),
        Quantity::Area => of(&[
            ("m²", 1.0),
            ("m2", 1.0),
            ("ft²", area_m2(AreaUnit::SquareFoot)),
            ("ft2", area_m2(AreaUnit::SquareFoot)),
        ]),
        Quantity::Resistance => of(&[("mΩ", 0.001), ("mohm", 0.001), ("Ω", 1.0), ("ohm", 1.0)]),
        Quantity::Current => of(&[("A", 1.0)]),
        Quantity::Voltage => of(&[("V", 1.0)]),
        Quantity::Charge => of(&[("Ah", 1.0), ("A h", 1.0), ("mAh", 0.001), ("mA h", 0.001)]),
        Quantity::SpeedConstant => of(&[("rpm/V", 1.0)]),
        _ => None,
    }
}
