//! The units the page shows and takes. Inside everything is SI (angles in degrees, as in the job file).

mod choice;
#[cfg(test)]
mod tests;
mod typed;
mod worth;

pub use choice::{AreaUnit, ForceUnit, HeightUnit, LengthUnit, MassUnit, PowerUnit, SpeedUnit, TorqueUnit};
pub use typed::typed_unit_si;

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
    /// Torque for each metre of radius, N m/m.
    TorqueGrading,
    /// Torque, N m.
    Torque,
    /// Power, W.
    Power,
    /// Stress, Pa.
    Stress,
    /// Angle, degrees.
    Angle,
    /// Difference of temperature, K.
    Temperature,
    /// Turns in a minute.
    Rpm,
    /// A share, shown in percent.
    Share,
    /// Mass, kg.
    Mass,
    /// Area of a wing, m².
    Area,
    /// Fuel for the work done, kg per kWh.
    Consumption,
    /// Fuel burnt in an hour, kg.
    FuelFlow,
    /// Electric resistance, Ω.
    Resistance,
    /// Electric current, A.
    Current,
    /// Voltage, V.
    Voltage,
    /// Electric charge, A h.
    Charge,
    /// Speed constant of a motor, rpm per volt.
    SpeedConstant,
    /// Distance flown, m.
    Distance,
    /// A coefficient, of three figures or more.
    Coefficient,
    /// A ratio of a few units, such as that of a gear.
    Ratio,
    /// A number without unit.
    Number,
    /// A whole number.
    Count,
}

/// The units picked.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(default)]
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
    /// Of mass and fuel.
    pub mass: MassUnit,
    /// Of wing area.
    pub area: AreaUnit,
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
            mass: MassUnit::Kilogram,
            area: AreaUnit::SquareMetre,
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
            Quantity::TorqueGrading if self.torque == TorqueUnit::PoundFoot => "lbf ft/ft",
            Quantity::TorqueGrading => "N m/m",
            Quantity::Torque => self.torque.symbol(),
            Quantity::Power => self.power.symbol(),
            Quantity::Stress if self.force == ForceUnit::PoundForce => "psi",
            Quantity::Stress => "MPa",
            Quantity::Angle => "°",
            Quantity::Temperature => "K",
            Quantity::Rpm => "rpm",
            Quantity::Share => "%",
            Quantity::Mass => self.mass.symbol(),
            Quantity::Area => self.area.symbol(),
            Quantity::Consumption if self.mass == MassUnit::Pound => "lb/hp h",
            Quantity::Consumption => "kg/kWh",
            Quantity::FuelFlow if self.mass == MassUnit::Pound => "lb/h",
            Quantity::FuelFlow => "kg/h",
            Quantity::Distance => match self.speed {
                SpeedUnit::Knot => "NM",
                SpeedUnit::MilePerHour => "mi",
                SpeedUnit::KilometrePerHour | SpeedUnit::MetrePerSecond => "km",
            },
            Quantity::Resistance => "mΩ",
            Quantity::Current => "A",
            Quantity::Voltage => "V",
            Quantity::Charge => "A h",
            Quantity::SpeedConstant => "rpm/V",
            Quantity::Coefficient | Quantity::Ratio | Quantity::Number | Quantity::Count => "",
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
            Quantity::Stress if self.force != ForceUnit::PoundForce => 1,
            Quantity::Angle
            | Quantity::Temperature
            | Quantity::Mass
            | Quantity::Area
            | Quantity::FuelFlow
            | Quantity::Current
            | Quantity::Charge => 1,
            Quantity::Voltage | Quantity::Ratio => 2,
            Quantity::Number | Quantity::Coefficient | Quantity::Consumption => 3,
            _ => 0,
        }
    }

    /// Fewest and most decimals a figure carries in a box to type in: enough to tell what is in the job.
    #[must_use]
    pub fn box_decimals(self, quantity: Quantity) -> (usize, usize) {
        match quantity {
            Quantity::Length if self.length == LengthUnit::Inch => (3, 3),
            Quantity::Length => (1, 2),
            Quantity::Number | Quantity::Temperature | Quantity::SpeedConstant => (0, 1),
            Quantity::Count => (0, 0),
            Quantity::Mass | Quantity::Charge | Quantity::Resistance => (0, 3),
            Quantity::Current => (0, 2),
            Quantity::Voltage | Quantity::Ratio | Quantity::Area => (1, 3),
            Quantity::Coefficient | Quantity::Consumption => (2, 5),
            _ => (self.decimals(quantity), self.decimals(quantity) + 1),
        }
    }

    /// One of the unit shown, in SI.
    fn worth(self, quantity: Quantity) -> f64 {
        worth::worth(self, quantity)
    }
}
