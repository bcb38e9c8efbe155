//! The closures against figures worked out apart from them, in Python, from the relations as published.

use crate::section::solver::closure::{Gas, Kind, Point, at_transition, props};
use crate::section::solver::dual::Dual;

struct Row {
    kind: Kind,
    /// Reynolds and Mach number.
    gas: [f64; 2],
    theta: f64,
    shape: f64,
    shear: f64,
    speed: f64,
    /// Hk, square of the Mach number, `Re_theta`, H*, H**, cf, 2 CD/H*, slip speed, root of the equilibrium shear
    /// stress, thickness, growth.
    expected: [f64; 11],
}

fn point(theta: f64, shape: f64, shear: f64, speed: f64) -> Point<0> {
    let constant = Dual::constant;
    Point { theta: constant(theta), dstar: constant(theta * shape), c: constant(shear), u: constant(speed) }
}

/// Drela, Giles, AIAA J. 25(10), 1987, with the coefficients and the factor on the turbulent friction that the
/// module names; Karman-Tsien speed. Shapes before and behind separation, `Re_theta` below and above the bounds of
/// the relations, waves on and beyond the ramp of their growth, a dead layer whose dissipation is the laminar one.
#[rustfmt::skip]
const ROWS: [Row; 15] = [
    Row {
        kind: Kind::Laminar, gas: [1e6, 0.0], theta: 0.004, shape: 2.3, shear: 0.0, speed: 1.2,
        expected: [
            2.3, 0.0, 4.8e3, 1.610_495_652_2, 0.0, 1.368_966_987_2e-4, 5.103_145_295_7e-5, 0.0, 0.0,
            0.0, 2.897_887_024_5e-1
        ],
    },
    Row {
        kind: Kind::Laminar, gas: [1e6, 0.0], theta: 0.00027, shape: 2.591, shear: 0.0, speed: 1.0,
        expected: [
            2.591, 0.0, 2.7e2, 1.573_232_866_1, 0.0, 1.632_392_994_7e-3, 8.167_162_606_8e-4, 0.0,
            0.0, 0.0, 2.667_991_71
        ],
    },
    Row {
        kind: Kind::Laminar, gas: [1e6, 0.0], theta: 0.00011, shape: 3.3, shear: 0.0, speed: 1.1,
        expected: [
            3.3, 0.0, 1.21e2, 1.526_284_848_5, 0.0, 1.280_874_595_8e-3, 1.713_126_163_4e-3, 0.0, 0.0,
            0.0, 1.422_105_725_9e2
        ],
    },
    Row {
        kind: Kind::Laminar, gas: [1e6, 0.0], theta: 0.0004, shape: 5.5, shear: 0.0, speed: 1.1,
        expected: [
            5.5, 0.0, 4.4e2, 1.521_136_363_6, 0.0, -2.324_548_484_8e-4, 4.626_250_543_7e-4, 0.0, 0.0,
            0.0, 9.672_135_367_8e1
        ],
    },
    Row {
        kind: Kind::Laminar, gas: [1e6, 0.0], theta: 0.0004, shape: 9.0, shear: 0.0, speed: 1.1,
        expected: [
            9.0, 0.0, 4.4e2, 1.556_666_666_7, 0.0, -2.761_010_101e-4, 4.098_484_848_5e-4, 0.0, 0.0,
            0.0, 1.204_587_387_5e2
        ],
    },
    Row {
        kind: Kind::Laminar, gas: [1e6, 0.5], theta: 0.0003, shape: 2.9, shear: 0.0, speed: 1.3,
        expected: [
            2.611_356_073_5, 4.933_382_270_3e-1, 3.807_562_788_8e2, 1.574_063_335_1,
            1.412_588_391_2e-1, 1.125_894_353_3e-3, 5.764_158_245_7e-4, 0.0, 0.0, 0.0,
            8.300_533_739_5
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.0], theta: 0.002, shape: 1.4, shear: 0.05, speed: 1.1,
        expected: [
            1.4, 0.0, 2.2e3, 1.764_128_389_2, 0.0, 3.515_265_886_8e-3, 2.321_054_434e-3,
            5.460_397_395e-1, 3.593_836_135_1e-2, 1.77e-2, 0.0
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.0], theta: 0.0001, shape: 1.6, shear: 0.07, speed: 0.9,
        expected: [
            1.6, 0.0, 9.0e1, 1.739_428_571_4, 0.0, 8.302_225_933_5e-3, 5.685_311_335_5e-3,
            4.348_571_428_6e-1, 3.273_100_862_6e-2, 7.616_666_666_7e-4, 0.0
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.0], theta: 0.003, shape: 2.6, shear: 0.1, speed: 1.0,
        expected: [
            2.6, 0.0, 3.0e3, 1.516_413_978_5, 0.0, 3.856_156_749_4e-4, 1.141_144_967_2e-2,
            1.360_884_339_7e-1, 7.765_011_434_5e-2, 2.047_5e-2, 0.0
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.0], theta: 0.003, shape: 4.5, shear: 0.1, speed: 1.0,
        expected: [
            4.5, 0.0, 3.0e3, 1.537_613_812_7, 0.0, -1.918_962_013_7e-4, 1.338_418_041_9e-2,
            -2.847_432_986_5e-2, 1.020_339_330_6e-1, 2.442_428_571_4e-2, 0.0
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.5], theta: 0.002, shape: 1.7, shear: 0.06, speed: 1.25,
        expected: [
            1.496_769_334_9, 4.426_382_086_7e-1, 2.454_867_614_2e3, 1.725_490_587_3,
            1.517_596_130_5e-1, 2.802_114_921_5e-3, 2.804_444_148_7e-3, 5.265_998_774e-1,
            4.112_600_270_1e-2, 1.662_474_305_1e-2, 0.0
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.0], theta: 5e-05, shape: 1.2, shear: 0.06, speed: 1.0,
        expected: [
            1.2, 0.0, 5.0e1, 1.888_941_176_5, 0.0, 2.064_635_705_6e-2, 1.594_736_609_7e-2,
            7.345_882_352_9e-1, 1.106_042_534_2e-3, 6.0e-4, 0.0
        ],
    },
    Row {
        kind: Kind::Turbulent, gas: [1e6, 0.0], theta: 0.0002, shape: 2.2, shear: 0.001, speed: 1.0,
        expected: [
            2.2, 0.0, 2.0e2, 1.616, 0.0, 2.211_305_816_8e-3, 1.294_849_953_5e-3, 2.203_636_363_6e-1,
            6.537_832_398_5e-2, 1.356_666_666_7e-3, 0.0
        ],
    },
    Row {
        kind: Kind::Wake, gas: [1e6, 0.0], theta: 0.003, shape: 1.3, shear: 0.05, speed: 0.95,
        expected: [
            1.3, 0.0, 2.85e3, 1.808_588_000_8, 0.0, 0.0, 2.055_836_28e-3, 6.260_496_925_9e-1,
            2.971_045_457_8e-2, 3.055e-2, 0.0
        ],
    },
    Row {
        kind: Kind::Wake, gas: [1e6, 0.4], theta: 0.003, shape: 2.0, shear: 0.08, speed: 0.9,
        expected: [
            1.935_615_684_3, 1.265_602_630_9e-1, 2.707_290_689_1e3, 1.599_977_756_2,
            3.889_919_469_3e-2, 0.0, 1.117_085_635_6e-2, 3.010_007_837e-1, 6.095_513_616_3e-2,
            2.096_508_497_2e-2, 0.0
        ],
    },
];

#[test]
fn closures_are_the_relations_as_published() {
    for row in &ROWS {
        let gas = Gas::new(row.gas[0], row.gas[1]);
        let q = props(&gas, &point(row.theta, row.shape, row.shear, row.speed), row.kind);
        let found =
            [q.hk, q.m2, q.re_theta, q.hs, q.hss, q.cf, q.di, q.us, q.seq, q.delta, q.growth].map(|d| d.v);
        for (k, (found, expected)) in found.into_iter().zip(row.expected).enumerate() {
            // Ten figures are written.
            assert!(
                (found - expected).abs() <= 1e-9 * expected.abs(),
                "{:?} {} {k}: {found}",
                row.kind,
                row.shape
            );
        }
    }
}

/// Exact similar layers (Hartree 1937; Schlichting, Boundary-Layer Theory; from memory): plate, stagnation point,
/// separation. The relations are fits: within 1 % of H*, 3 % of the friction of the plate.
#[test]
fn laminar_relations_meet_exact_similar_layers() {
    for (shape, energy, half_friction) in [(2.591, 1.573, 0.2205), (2.216, 1.625, 0.3603), (4.03, 1.515, 0.0)]
    {
        let q = props(&Gas::new(1e6, 0.0), &point(3e-4, shape, 0.0, 1.0), Kind::Laminar);
        assert!((q.hs.v / energy - 1.0).abs() < 0.01, "{shape} {}", q.hs.v);
        assert!((0.5 * q.cf.v * q.re_theta.v - half_friction).abs() < 0.015, "{shape} {}", q.cf.v);
    }
}

/// `1.8 exp(-3.3/(Hk - 1))` of the equilibrium, and its least value where the layer is full.
#[test]
fn shear_stress_begins_at_its_share_of_the_equilibrium() {
    for (theta, shape, expected) in
        [(2e-3, 2.6, 1.776_009_184_8e-2), (1e-3, 3.5, 4.387_922_562_3e-2), (2e-4, 1.5, 1e-4)]
    {
        let found = at_transition(&Gas::new(1e6, 0.0), &point(theta, shape, 0.0, 1.0)).v;
        assert!((found / expected - 1.0).abs() < 1e-9, "{shape} {found}");
    }
}

/// Karman-Tsien: at Mach 0.5 an incompressible speed of 1.4 is 1.5123; 1 is 1.
#[test]
fn the_compressible_speed_is_that_of_karman_and_tsien() {
    let gas = Gas::new(1e6, 0.5);
    let speed = |u: f64| gas.speed(Dual::<0>::constant(u)).v;
    assert!((speed(1.0) - 1.0).abs() < 1e-12 && (speed(1.4) - 1.512_297_558).abs() < 1e-9);
}
