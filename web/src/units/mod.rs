//! The units the page shows and takes. Inside everything is SI (angles in degrees, as in the job file).

mod choice;
mod worth;

pub use choice::{ForceUnit, HeightUnit, LengthUnit, PowerUnit, SpeedUnit, TorqueUnit};
use worth::{force_n, height_m, length_m, power_w, speed_m_s, torque_n_m};

use crate::chart::unit::Unit;
use serde::{Deserialize, Serialize};

/// What a figure measures.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Quantity {
    /// Length on the propeller, m.
    Length,
    /// Height above the sea, m.
    Height,
    /// Speed, m/s.
    Speed,
    /// Rate of climb, m/s.
    Climb,
    /// Force, N.
    Force,
    /// Force for each metre of radius, N/m.
    Grading,
    /// Torque, N m.
    Torque,
    /// Power, W.
    Power,
    /// Angle, degrees.
    Angle,
    /// Difference of temperature, K.
    Temperature,
    /// Turns in a minute.
    Rpm,
    /// A share, shown in percent.
    Share,
    /// A number without unit.
    Number,
    /// A whole number.
    Count,
}

/// The units picked.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Units {
    /// Of lengths on the propeller.
    pub length: LengthUnit,
    /// Of speed.
    pub speed: SpeedUnit,
    /// Of force.
    pub force: ForceUnit,
    /// Of power.
    pub power: PowerUnit,
    /// Of height.
    pub height: HeightUnit,
    /// Of torque.
    pub torque: TorqueUnit,
}

impl Default for Units {
    fn default() -> Self {
        Self {
            length: LengthUnit::Millimetre,
            speed: SpeedUnit::KilometrePerHour,
            force: ForceUnit::Newton,
            power: PowerUnit::Kilowatt,
            height: HeightUnit::Metre,
            torque: TorqueUnit::NewtonMetre,
        }
    }
}

/// Diameter (m) below which a propeller's power is better read in watts.
const SMALL_DIAMETER_M: f64 = 0.7;

impl Units {
    /// Units that suit a propeller of this diameter (m), until the user picks others.
    #[must_use]
    pub fn suiting(diameter_m: f64) -> Self {
        if diameter_m < SMALL_DIAMETER_M {
            Self { speed: SpeedUnit::MetrePerSecond, power: PowerUnit::Watt, ..Self::default() }
        } else {
            Self::default()
        }
    }

    /// The unit as written behind a figure; empty where there is none.
    #[must_use]
    pub fn symbol(self, quantity: Quantity) -> &'static str {
        match quantity {
            Quantity::Length => self.length.symbol(),
            Quantity::Height => self.height.symbol(),
            Quantity::Speed => self.speed.symbol(),
            Quantity::Climb if self.height == HeightUnit::Foot => "ft/min",
            Quantity::Climb => "m/s",
            Quantity::Force => self.force.symbol(),
            Quantity::Grading if self.force == ForceUnit::PoundForce => "lbf/ft",
            Quantity::Grading if self.force == ForceUnit::KilogramForce => "kgf/m",
            Quantity::Grading => "N/m",
            Quantity::Torque => self.torque.symbol(),
            Quantity::Power => self.power.symbol(),
            Quantity::Angle => "°",
            Quantity::Temperature => "K",
            Quantity::Rpm => "rpm",
            Quantity::Share => "%",
            Quantity::Number | Quantity::Count => "",
        }
    }

    /// The unit of a quantity for a chart.
    #[must_use]
    pub fn unit(self, quantity: Quantity) -> Unit {
        Unit {
            name: self.symbol(quantity),
            per_si: 1.0 / self.worth(quantity),
            decimals: self.decimals(quantity),
        }
    }

    /// An SI value in the unit shown.
    #[must_use]
    pub fn shown(self, quantity: Quantity, si: f64) -> f64 {
        si / self.worth(quantity)
    }

    /// A value typed in the unit shown, in SI.
    #[must_use]
    pub fn si(self, quantity: Quantity, shown: f64) -> f64 {
        shown * self.worth(quantity)
    }

    /// Decimals a figure of this quantity carries in running text.
    #[must_use]
    pub fn decimals(self, quantity: Quantity) -> usize {
        match quantity {
            Quantity::Length if self.length == LengthUnit::Inch => 2,
            Quantity::Speed if self.speed == SpeedUnit::MetrePerSecond => 1,
            Quantity::Power if self.power != PowerUnit::Watt => 1,
            Quantity::Climb if self.height == HeightUnit::Metre => 1,
            Quantity::Angle | Quantity::Temperature => 1,
            Quantity::Number => 3,
            _ => 0,
        }
    }

    /// Decimals a figure carries at least in a box to type in.
    #[must_use]
    pub fn box_decimals(self, quantity: Quantity) -> usize {
        match quantity {
            Quantity::Length if self.length == LengthUnit::Millimetre => 1,
            Quantity::Length => 3,
            Quantity::Number | Quantity::Temperature => 0,
            _ => self.decimals(quantity),
        }
    }

    /// One of the unit shown, in SI.
    fn worth(self, quantity: Quantity) -> f64 {
        match quantity {
            Quantity::Length => length_m(self.length),
            Quantity::Height => height_m(self.height),
            Quantity::Speed => speed_m_s(self.speed),
            Quantity::Climb if self.height == HeightUnit::Foot => height_m(HeightUnit::Foot) / 60.0,
            Quantity::Grading if self.force == ForceUnit::PoundForce => {
                force_n(self.force) / height_m(HeightUnit::Foot)
            }
            Quantity::Force | Quantity::Grading => force_n(self.force),
            Quantity::Torque => torque_n_m(self.torque),
            Quantity::Power => power_w(self.power),
            Quantity::Share => 0.01,
            Quantity::Climb
            | Quantity::Angle
            | Quantity::Temperature
            | Quantity::Rpm
            | Quantity::Number
            | Quantity::Count => 1.0,
        }
    }
}

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
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn close(a: f64, b: f64) {
        assert!((a - b).abs() <= 1e-9 * b.abs().max(1.0), "{a} is not {b}");
    }

    /// The library keeps the pound-force and the horsepower to seven digits.
    fn seven_digits(a: f64, b: f64) {
        assert!((a - b).abs() <= 1e-7 * b, "{a} is not {b}");
    }

    /// Defined values: inch 25.4 mm, knot 1852 m/h, mile 1609.344 m, pound-force 4.448 221 615 260 5 N.
    #[test]
    fn units_are_worth_what_they_are_defined_as() {
        close(length_m(LengthUnit::Inch), 0.0254);
        close(speed_m_s(SpeedUnit::Knot), 1852.0 / 3600.0);
        close(speed_m_s(SpeedUnit::MilePerHour), 1609.344 / 3600.0);
        seven_digits(force_n(ForceUnit::PoundForce), 4.448_221_615_260_5);
        close(force_n(ForceUnit::KilogramForce), 9.806_65);
        seven_digits(torque_n_m(TorqueUnit::PoundFoot), 4.448_221_615_260_5 * 0.3048);
        seven_digits(power_w(PowerUnit::Horsepower), 550.0 * 0.3048 * 4.448_221_615_260_5);
    }

    #[test]
    fn shown_and_back_is_the_same() {
        let units = Units { length: LengthUnit::Inch, speed: SpeedUnit::Knot, ..Units::default() };
        for q in [Quantity::Length, Quantity::Speed, Quantity::Share, Quantity::Grading, Quantity::Angle] {
            close(units.si(q, units.shown(q, 12.34)), 12.34);
        }
    }

    #[test]
    fn a_typed_unit_is_known_only_for_its_quantity() {
        close(typed_unit_si(Quantity::Length, "in").unwrap(), 0.0254);
        assert!(typed_unit_si(Quantity::Speed, "in").is_none());
        close(typed_unit_si(Quantity::Power, "kW").unwrap(), 1000.0);
    }

    #[test]
    fn a_small_propeller_is_read_in_watts() {
        assert_eq!(Units::suiting(0.3).power, PowerUnit::Watt);
        assert_eq!(Units::suiting(1.5).power, PowerUnit::Kilowatt);
    }
}
