//! The standard atmosphere against its published tables.

use spokeshave::air::{Air, geopotential_m};

use crate::check::{Basis, Check, Mark, worst};

const BASIS: Basis = Basis {
    source: "ISO 2533:1975, Standard Atmosphere; US Standard Atmosphere 1976 (identical below 32 km): \
             recomputed from the standard's formulas and constants for the heights that its tables print",
    mark: Mark::Computed,
    why: "half a unit of the last printed figure",
};

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

fn figures(height_m: f64, row: &Row) -> [Check; 5] {
    let air = Air::standard(height_m, 0.0).expect("a height of the standard");
    let at = |got, expected, allowed, unit| {
        BASIS.within(format!("at {:.0} m", row.0), got, expected, allowed).unit(unit)
    };
    [
        at(air.temperature_k, row.1, 6e-4, "K"),
        at(air.pressure_pa, row.2, row.2 * 1e-5, "Pa"),
        at(air.density_kg_m3, row.3, row.3 * 1e-5, "kg/m³"),
        at(air.sound_speed_m_s, row.4, 6e-4, "m/s"),
        at(air.viscosity_pa_s, row.5, 6e-11, "Pa s"),
    ]
}

/// Five figures by geopotential and by geometric height.
pub(super) fn standard() -> Vec<Check> {
    let names = ["temperature", "pressure", "density", "speed of sound", "viscosity"];
    let columns = |name: &str, of: fn(f64) -> f64, rows: &[Row]| -> Vec<Check> {
        let all: Vec<[Check; 5]> = rows.iter().map(|row| figures(of(row.0), row)).collect();
        let column = |k: usize| all.iter().map(|row| row[k].clone()).collect();
        let told = |(k, figure)| worst(&format!("{figure} by {name} height"), column(k));
        names.iter().enumerate().map(told).collect()
    };
    [columns("geopotential", |h| h, &GEOPOTENTIAL), columns("geometric", geopotential_m, &GEOMETRIC)].concat()
}
