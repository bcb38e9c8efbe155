//! The standard atmosphere against its published tables.
//!
//! ISO 2533:1975 and US Standard Atmosphere 1976 (identical below 32 km): temperature, pressure, density, speed of sound and viscosity
//! recomputed from the standard's formulas and constants for the heights the tables print.

use spokeshave::air::{Air, geopotential_m};

/// Height (m), temperature (K), pressure (Pa), density (kg/m³), speed of sound (m/s), viscosity (Pa s).
type Row = (f64, f64, f64, f64, f64, f64);

const GEOPOTENTIAL: [Row; 9] = [
    (0.0, 288.150, 101_325.0, 1.225_000, 340.294, 1.78938e-5),
    (1_000.0, 281.650, 89_874.6, 1.111_643, 336.434, 1.75785e-5),
    (2_000.0, 275.150, 79_495.2, 1.006_490, 332.529, 1.72596e-5),
    (3_000.0, 268.650, 70_108.5, 0.909_122, 328.578, 1.69372e-5),
    (5_000.0, 255.650, 54_019.9, 0.736_116, 320.529, 1.62812e-5),
    (8_000.0, 236.150, 35_599.8, 0.525_167, 308.063, 1.52677e-5),
    (11_000.0, 216.650, 22_632.04, 0.363_918, 295.069, 1.42161e-5),
    (15_000.0, 216.650, 12_044.55, 0.193_673, 295.069, 1.42161e-5),
    (20_000.0, 216.650, 5_474.88, 0.088_035, 295.069, 1.42161e-5),
];

/// The column by geometric height, as USSA 1976 Table I prints first.
const GEOMETRIC: [Row; 4] = [
    (1_000.0, 281.651, 89_876.3, 1.111_660, 336.435, 1.75785e-5),
    (3_000.0, 268.659, 70_121.1, 0.909_254, 328.584, 1.69376e-5),
    (11_000.0, 216.774, 22_699.9, 0.364_801, 295.154, 1.42229e-5),
    (20_000.0, 216.650, 5_529.3, 0.088_910, 295.069, 1.42161e-5),
];

fn agrees(height_m: f64, row: Row) {
    let air = Air::standard(height_m, 0.0).unwrap();
    let figures = [
        (air.temperature_k, row.1, 6e-4),
        (air.pressure_pa, row.2, row.2 * 1e-5),
        (air.density_kg_m3, row.3, row.3 * 1e-5),
        (air.sound_speed_m_s, row.4, 6e-4),
        (air.viscosity_pa_s, row.5, 6e-11),
    ];
    // Tolerances: half a unit of the last printed figure.
    for (got, expected, allowed) in figures {
        assert!((got - expected).abs() <= allowed, "{height_m} m: {got} for {expected}");
    }
}

#[test]
fn validate_air_iso_2533() {
    for row in GEOPOTENTIAL {
        agrees(row.0, row);
    }
    for row in GEOMETRIC {
        agrees(geopotential_m(row.0), row);
    }
}
