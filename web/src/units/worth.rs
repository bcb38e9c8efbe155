//! What one of each unit is worth in SI, by the factors of the `uom` crate.

use uom::si::f64::{Area, Force, Length, Mass, Power, Torque, Velocity};
use uom::si::{area, force, length, mass, power, torque, velocity};

use super::{
    AreaUnit, ForceUnit, HeightUnit, LengthUnit, MassUnit, PowerUnit, Quantity, SpeedUnit, TorqueUnit, Units,
};

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

pub(super) fn mass_kg(unit: MassUnit) -> f64 {
    match unit {
        MassUnit::Kilogram => Mass::new::<mass::kilogram>(1.0),
        MassUnit::Pound => Mass::new::<mass::pound>(1.0),
    }
    .get::<mass::kilogram>()
}

pub(super) fn area_m2(unit: AreaUnit) -> f64 {
    match unit {
        AreaUnit::SquareMetre => Area::new::<area::square_meter>(1.0),
        AreaUnit::SquareFoot => Area::new::<area::square_foot>(1.0),
    }
    .get::<area::square_meter>()
}

/// Fuel for an hour of a unit of power, kg per kWh: pounds go with horsepower.
fn consumption_kg_per_kwh(unit: MassUnit) -> f64 {
    match unit {
        MassUnit::Kilogram => 1.0,
        MassUnit::Pound => mass_kg(unit) / (power_w(PowerUnit::Horsepower) / 1000.0),
    }
}

/// One of the unit shown, in SI or in the unit of the job file.
pub(super) fn worth(units: Units, quantity: Quantity) -> f64 {
    let foot_m = || height_m(HeightUnit::Foot);
    match quantity {
        Quantity::Length => length_m(units.length),
        Quantity::Height => height_m(units.height),
        Quantity::Speed => speed_m_s(units.speed),
        Quantity::Climb if units.height == HeightUnit::Foot => foot_m() / 60.0,
        Quantity::Grading if units.force == ForceUnit::PoundForce => force_n(units.force) / foot_m(),
        Quantity::Force | Quantity::Grading => force_n(units.force),
        Quantity::TorqueGrading if units.torque == TorqueUnit::PoundFoot => {
            torque_n_m(units.torque) / foot_m()
        }
        Quantity::Torque | Quantity::TorqueGrading => torque_n_m(units.torque),
        Quantity::Power => power_w(units.power),
        Quantity::Mass | Quantity::FuelFlow => mass_kg(units.mass),
        Quantity::Area => area_m2(units.area),
        Quantity::Consumption => consumption_kg_per_kwh(units.mass),
        // As far as the unit of speed goes in an hour; metres a second go with kilometres.
        Quantity::Distance if units.speed == SpeedUnit::MetrePerSecond => 1_000.0,
        Quantity::Distance => 3_600.0 * speed_m_s(units.speed),
        Quantity::Share => 0.01,
        Quantity::Stress if units.force == ForceUnit::PoundForce => {
            force_n(units.force) / length_m(LengthUnit::Inch).powi(2)
        }
        Quantity::Stress => 1e6,
        Quantity::Resistance => 0.001,
        _ => 1.0,
    }
}
