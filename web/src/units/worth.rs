//! What one of each unit is worth in SI, by the factors of the `uom` crate.

use uom::si::f64::{Force, Length, Power, Torque, Velocity};
use uom::si::{force, length, power, torque, velocity};

use super::{ForceUnit, HeightUnit, LengthUnit, PowerUnit, SpeedUnit, TorqueUnit};

pub(super) fn length_m(unit: LengthUnit) -> f64 {
    match unit {
        LengthUnit::Millimetre => Length::new::<length::millimeter>(1.0),
        LengthUnit::Inch => Length::new::<length::inch>(1.0),
    }
    .get::<length::meter>()
}

pub(super) fn height_m(unit: HeightUnit) -> f64 {
    match unit {
        HeightUnit::Metre => Length::new::<length::meter>(1.0),
        HeightUnit::Foot => Length::new::<length::foot>(1.0),
    }
    .get::<length::meter>()
}

pub(super) fn speed_m_s(unit: SpeedUnit) -> f64 {
    match unit {
        SpeedUnit::KilometrePerHour => Velocity::new::<velocity::kilometer_per_hour>(1.0),
        SpeedUnit::Knot => Velocity::new::<velocity::knot>(1.0),
        SpeedUnit::MilePerHour => Velocity::new::<velocity::mile_per_hour>(1.0),
        SpeedUnit::MetrePerSecond => Velocity::new::<velocity::meter_per_second>(1.0),
    }
    .get::<velocity::meter_per_second>()
}

pub(super) fn force_n(unit: ForceUnit) -> f64 {
    match unit {
        ForceUnit::Newton => Force::new::<force::newton>(1.0),
        ForceUnit::PoundForce => Force::new::<force::pound_force>(1.0),
        ForceUnit::KilogramForce => Force::new::<force::kilogram_force>(1.0),
    }
    .get::<force::newton>()
}

pub(super) fn power_w(unit: PowerUnit) -> f64 {
    match unit {
        PowerUnit::Kilowatt => Power::new::<power::kilowatt>(1.0),
        PowerUnit::Watt => Power::new::<power::watt>(1.0),
        PowerUnit::Horsepower => Power::new::<power::horsepower>(1.0),
    }
    .get::<power::watt>()
}

pub(super) fn torque_n_m(unit: TorqueUnit) -> f64 {
    match unit {
        TorqueUnit::NewtonMetre => Torque::new::<torque::newton_meter>(1.0),
        TorqueUnit::PoundFoot => Torque::new::<torque::pound_force_foot>(1.0),
    }
    .get::<torque::newton_meter>()
}
