//! Closed forms of engines.

use super::*;
use crate::job::{AltitudeLaw, Battery, Electric, Interpolation, LoadPoint, Piston, PowerPoint};

fn electric(kv: f64, ohm_per_cell: f64, motors: u32) -> Shaft {
    let battery = Battery {
        cells: 3,
        open_circuit_v_per_cell: 3.7,
        resistance_ohm_per_cell: ohm_per_cell,
        capacity_ah: 2.0,
        usable_fraction: 0.8,
    };
    let data = Electric {
        kv_rpm_per_v: kv,
        resistance_ohm: 0.05,
        no_load_current_a: 1.0,
        no_load_voltage_v: None,
        max_current_a: None,
        gear_ratio: 1.0,
        controller_resistance_ohm: 0.0,
        battery,
    };
    Shaft::new(&Engine::Electric(data), f64::from(motors)).unwrap()
}

#[test]
fn beyond_full_duty_there_is_no_answer() {
    assert!(electric(1000.0, 0.0, 1).electrics(10_500.0, 400.0).is_none());
}

fn piston(law: AltitudeLaw) -> Shaft {
    Shaft::new(&Engine::Piston(piston_data(law)), 1.0).unwrap()
}

fn piston_data(law: AltitudeLaw) -> Piston {
    let point = |rpm: f64, power_w: f64| PowerPoint { rpm, power_w };
    Piston {
        full_throttle: vec![point(2000.0, 30_000.0), point(3000.0, 45_000.0)],
        interpolation: Interpolation::default(),
        gear_ratio: 1.0,
        max_rpm: None,
        idle_rpm: None,
        altitude_law: law,
        bsfc_kg_per_kwh: None,
        bsfc_by_load: Vec::new(),
        fuel_kg: None,
    }
}

#[test]
fn held_power_is_held_and_then_falls() {
    let held = crate::job::HeldTo { kind: crate::job::HeldToKind::HeldTo, altitude_m: 3000.0 };
    let shaft = piston(AltitudeLaw::HeldTo(held));
    let at = |h: f64| shaft.power_w(3000.0, &Air::standard(h, 0.0).unwrap(), 1.0);
    assert_eq!(at(1000.0), 45_000.0);
    assert!((at(3000.0) - 45_000.0).abs() < 1e-6 && at(5000.0) < 40_000.0);
}

/// Ohm's law: N motors at one duty draw N d I from the battery, so that each meets N d² Rb. With Voc 11.1 V,
/// Rb 3 × 0.01 Ω, R 0.05 Ω, Kv 1000 rpm/V at 8 000 rpm and full duty: I = 3.1/(0.05 + 0.03 N), 38.75 A for
/// one motor, 18.235 A for each of four; the battery stands at 11.1 − 0.03 N I.
#[test]
fn motors_on_one_battery_sag_it_together() {
    let air = Air::standard(0.0, 0.0).unwrap();
    for motors in [1, 2, 4] {
        let n = f64::from(motors);
        let current = 3.1 / (0.05 + 0.03 * n);
        let power = (current - 1.0) * 8.0;
        let shaft = electric(1000.0, 0.01, motors);
        assert!((shaft.power_w(8_000.0, &air, 1.0) - power).abs() < 1e-9, "{motors}");
        let e = shaft.electrics(8_000.0, power).unwrap();
        assert!((e.duty - 1.0).abs() < 1e-9 && (e.battery_current_a - current).abs() < 1e-9, "{e:?}");
        assert!((e.battery_voltage_v - (11.1 - 0.03 * n * current)).abs() < 1e-9, "{e:?}");
        // At part load the motor's voltage is what duty makes of the battery's.
        let part = shaft.electrics(8_000.0, 0.4 * power).unwrap();
        let motor_v = 0.05 * part.motor_current_a + 8.0;
        assert!((part.duty * part.battery_voltage_v - motor_v).abs() < 1e-9, "{part:?}");
        assert!(shaft.electrics(8_000.0, 1.01 * power).is_none());
    }
}

#[test]
fn fuel_follows_the_load() {
    let air = Air::standard(0.0, 0.0).unwrap();
    let at = |load, bsfc_kg_per_kwh| LoadPoint { load, bsfc_kg_per_kwh };
    let mut data = piston_data(AltitudeLaw::NaturallyAspirated);
    data.bsfc_by_load = vec![at(0.2, 0.5), at(0.6, 0.3), at(1.0, 0.36)];
    let shaft = Shaft::new(&Engine::Piston(data.clone()), 1.0).unwrap();
    let full_w = shaft.available_w(3000.0, &air).unwrap();
    for (load, bsfc) in [(0.6, 0.3), (1.0, 0.36), (0.2, 0.5), (0.1, 0.5)] {
        let power_w = load * full_w;
        let flow = shaft.fuel_kg_s(3000.0, power_w, &air).unwrap() * 3600.0;
        assert!((flow - bsfc * power_w / 1000.0).abs() < 1e-9, "{power_w}: {flow}");
    }
    // Between the points it neither overshoots nor leaves them.
    let between = shaft.fuel_kg_s(3000.0, 18_000.0, &air).unwrap() * 3.6e6 / 18_000.0;
    assert!((0.3..0.5).contains(&between), "{between}");
    assert!(shaft.fuel_kg_s(1500.0, 9_000.0, &air).is_none(), "below the curve the load is not known");
    (data.bsfc_by_load, data.bsfc_kg_per_kwh) = (Vec::new(), Some(0.3));
    let constant = Shaft::new(&Engine::Piston(data), 1.0).unwrap();
    assert!((constant.fuel_kg_s(1500.0, 9_000.0, &air).unwrap() - 0.3 * 9.0 / 3600.0).abs() < 1e-12);
}
