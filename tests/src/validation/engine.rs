//! What engines and motors give, against their laws worked out by hand.

use spokeshave::air::Air;
use spokeshave::engine::Shaft;
use spokeshave::job::{AltitudeLaw, Battery, Electric, Engine, Interpolation, Piston, PowerPoint};

use crate::check::{Basis, Check, Mark};

const MOTOR: Basis = Basis {
    source: "first-order motor in closed form: 1000 rpm/V, 0.05 Ω, 1.0 A at no load, 11.1 V; at 20 A 10 \
             100 rpm and 191.90 W",
    mark: Mark::Computed,
    why: "half a unit of the last figure, and what the solution for the current stops at",
};

fn motor() -> Engine {
    Engine::Electric(Electric {
        kv_rpm_per_v: 1000.0,
        resistance_ohm: 0.05,
        no_load_current_a: 1.0,
        no_load_voltage_v: None,
        max_current_a: None,
        gear_ratio: 1.0,
        controller_resistance_ohm: 0.0,
        battery: Battery {
            cells: 3,
            open_circuit_v_per_cell: 3.7,
            resistance_ohm_per_cell: 0.0,
            capacity_ah: 2.0,
            usable_fraction: 0.8,
        },
    })
}

/// A motor on a stiff battery.
pub(super) fn first_order_motor() -> Vec<Check> {
    let air = Air::standard(0.0, 0.0).expect("sea level");
    let shaft = Shaft::new(&motor(), 1.0).expect("a motor");
    let e = shaft.electrics(10_100.0, 191.90);
    let (current, duty) = e.map_or((f64::NAN, f64::NAN), |e| (e.motor_current_a, e.duty));
    vec![
        MOTOR.within("power at 10 100 rpm", shaft.power_w(10_100.0, &air, 1.0), 191.90, 0.01).unit("W"),
        MOTOR.within("current at that power", current, 20.0, 1e-3).unit("A"),
        MOTOR.within("duty at that power", duty, 1.0, 1e-4),
    ]
}

const HEIGHT: Basis = Basis {
    source: "R. F. Gagg and E. V. Ferrar, SAE Transactions 29, 1934: P/P0 = σ − (1 − σ)/7.55, with the \
             density of the standard atmosphere",
    mark: Mark::Computed,
    why: "two units of the last figure: density to four",
};

/// A naturally aspirated engine with height.
pub(super) fn gagg_ferrar() -> Vec<Check> {
    let point = |rpm: f64, power_w: f64| PowerPoint { rpm, power_w };
    let piston = Piston {
        full_throttle: vec![point(2000.0, 30_000.0), point(3000.0, 45_000.0)],
        interpolation: Interpolation::default(),
        gear_ratio: 1.0,
        max_rpm: None,
        idle_rpm: None,
        altitude_law: AltitudeLaw::NaturallyAspirated,
        bsfc_kg_per_kwh: None,
        bsfc_by_load: Vec::new(),
        fuel_kg: None,
    };
    let shaft = Shaft::new(&Engine::Piston(piston), 1.0).expect("an engine");
    let told = |(feet, factor): (f64, f64)| {
        let air = Air::standard(feet * 0.3048, 0.0).expect("a height of the standard");
        let got = shaft.power_w(3000.0, &air, 1.0) / 45_000.0;
        HEIGHT.within(format!("share of the power at {feet} ft"), got, factor, 2e-4)
    };
    [(5_000.0, 0.8433), (10_000.0, 0.7038), (20_000.0, 0.4709)].into_iter().map(told).collect()
}
