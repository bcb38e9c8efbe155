//! Units are worth what they are defined as, there and back.

use super::worth::{area_m2, force_n, length_m, mass_kg, power_w, speed_m_s, torque_n_m};
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
    seven_digits(mass_kg(MassUnit::Pound), 0.453_592_37);
    seven_digits(area_m2(AreaUnit::SquareFoot), 0.3048 * 0.3048);
}

/// From the defined values: 1 lb/(hp h) is 0.453 592 37 kg over 0.745 699 872 kWh.
#[test]
fn consumption_goes_by_pounds_and_horsepower_together() {
    let pounds = Units { mass: MassUnit::Pound, ..Units::default() };
    seven_digits(pounds.si(Quantity::Consumption, 1.0), 0.453_592_37 / 0.745_699_872);
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
    close(typed_unit_si(Quantity::Charge, "mAh").unwrap(), 0.001);
    close(typed_unit_si(Quantity::Resistance, "Ω").unwrap(), 1.0);
}

#[test]
fn a_small_propeller_is_read_in_watts() {
    assert_eq!(Units::suiting(0.3).power, PowerUnit::Watt);
    assert_eq!(Units::suiting(1.5).power, PowerUnit::Kilowatt);
}
