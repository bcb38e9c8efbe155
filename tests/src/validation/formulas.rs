//! Published formulas that the core follows, put together anew from what it gives.

use spokeshave::air::Air;
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::rotor::Condition;
use spokeshave::section::outline::naca_16_series;
use spokeshave::section::{About, Family, Local, Polar, PolarPoint, Situation};

use crate::check::{Basis, Check, Mark, worst};

const ROUNDING: &str = "the same formula written twice: rounding of the figures that go in";

const GLAUERT: Basis = Basis {
    source: "H. Glauert, The Effect of Compressibility on the Lift of an Aerofoil, 1928: lift grows by 1/√(1 − M²)",
    mark: Mark::FromMemory,
    why: ROUNDING,
};
const LOCK: Basis = Basis {
    source: "Korn's equation and Lock's fourth power, as in W. H. Mason, Configuration Aerodynamics: with κ 0.87, \
             12 % thick and no lift M_dd is 0.75, where by definition dcd/dM is 0.1 and the rise 20 (0.1/80)^(4/3)",
    mark: Mark::FromMemory,
    why: "rounding; the slope by a step of 1e-5 in M, which leaves 1e-4 of it",
};
const SNEL: Basis = Basis {
    source: "H. Snel, R. Houwink, J. Bosschers, Sectional Prediction of Lift Coefficients on Rotating Wind Turbine \
             Blades in Stall, ECN-C--93-052, 1994: 3.1 (c/r)² of the lift that is missing",
    mark: Mark::FromMemory,
    why: ROUNDING,
};
const BUHL: Basis = Basis {
    source: "M. L. Buhl, A New Empirical Relationship between Thrust Coefficient and Induction Factor for the \
             Turbulent Windmill State, NREL/TP-500-36834, 2005: CT = 8/9 + (4 F − 40/9) a + (50/9 − 4 F) a²",
    mark: Mark::FromMemory,
    why: "the balance is solved to 1e-12 rad of inflow; a millionth and more is left where the residual is flat",
};
const SIXTEEN: Basis = Basis {
    source: "W. F. Lindsey, D. B. Stevenson, B. N. Daley, NACA TN 1546, 1948: ordinates of the 16-009",
    mark: Mark::FromMemory,
    why: "half the last figure printed, 0.0005, and what the chords between 80 stations cut off, y'' h²/8: 0.0038 \
          at 1.25 where the nose runs as the root of x, up to 0.003 elsewhere",
};

/// A section with lift 0.1 per degree up to 10°, flat beyond, and drag 0.01.
fn plain() -> Family {
    let point = |i: i32| {
        let alpha_deg = 0.5 * f64::from(i);
        PolarPoint { alpha_deg, cl: 0.1 * alpha_deg.clamp(-8.0, 10.0), cd: 0.01, cm: None }
    };
    let about = About { korn_factor: 0.87, ..About::default() };
    let points = (-20..=60).map(point).collect();
    Family::new(about, &[Polar { reynolds: None, mach: 0.0, thickness_ratio: None, points }])
        .expect("a table")
}

/// What speed of sound and rotation do to a section.
pub(super) fn corrections() -> Vec<Check> {
    let family = plain();
    let at = |mach, stall_delay| {
        Local::new(&family, Situation { thickness_ratio: 0.12, reynolds: 1e6, mach, stall_delay })
    };
    let lift = |mach: f64| at(mach, 0.0).at(2_f64.to_radians()).cl / 0.2;
    let rise = |mach: f64| at(mach, 0.0).at(0.0).cd - 0.01;
    let slope = (rise(0.75 + 1e-5) - rise(0.75 - 1e-5)) / 2e-5;
    let gain = at(0.0, 0.5).at(20_f64.to_radians()).cl - 1.0;
    let missing = std::f64::consts::TAU * 20_f64.to_radians().sin() - 1.0;
    vec![
        GLAUERT.within("lift at M 0.4 beside that at rest", lift(0.4), 1.091_089, 1e-6),
        GLAUERT.within("lift at M 0.6 beside that at rest", lift(0.6), 1.25, 1e-6),
        LOCK.within("drag rise at M_dd", rise(0.75), 0.002_693_043, 1e-8),
        LOCK.within("drag rise at M 0.60, below the critical Mach number", rise(0.60), 0.0, 1e-12),
        LOCK.within("slope of drag over M at M_dd", slope, 0.1, 1e-4),
        SNEL.within("lift that half a delay gives back at 20°", gain, 0.5 * missing, 1e-9),
    ]
}

/// The share of stall delay along a blade that turns on the spot.
pub(super) fn stall_delay() -> Vec<Check> {
    let rig = example();
    let blade = &rig.rotor.blade;
    let at = Condition { air: sea_level(), airspeed_m_s: 0.0, rotation_rad_s: 250.0, turn_rad: 0.0 };
    let along = [0.4, 0.5, 0.6].map(|share| {
        let r = share * blade.radius_m;
        let found = rig.rotor.element(&rig.rotor.ring(r), &at).1.stall_delay;
        SNEL.within(format!("{share} R"), found, 3.1 * (blade.cut(r).chord_m / r).powi(2), 1e-9)
    });
    vec![worst("share of the missing lift, standing still", along.into())]
}

/// Thrust coefficient of elements that the wind drives hard, beside Buhl's.
pub(super) fn windmill_brake() -> Vec<Check> {
    let rig = example();
    let blade = &rig.rotor.blade;
    let mut checks = Vec::new();
    for rotation_rad_s in [180.0, 240.0, 300.0] {
        for share in [0.5, 0.6, 0.7, 0.8, 0.9] {
            let at = Condition { air: sea_level(), airspeed_m_s: 20.0, rotation_rad_s, turn_rad: -0.5 };
            let element = rig.rotor.element(&rig.rotor.ring(share * blade.radius_m), &at).0;
            let Some(b) = element.balance().filter(|b| b.windmill_brake) else { continue };
            let (cn, _) = b.normal_and_tangential();
            let found = -element.solidity * cn * (b.speed_m_s / element.axial_m_s).powi(2);
            let (a, f) = (-b.induced_axial_m_s / element.axial_m_s, b.loss);
            let told = 8.0 / 9.0 + (4.0 * f - 40.0 / 9.0) * a + (50.0 / 9.0 - 4.0 * f) * a * a;
            checks.push(BUHL.within(format!("{share} R at {rotation_rad_s} rad/s"), found, told, 1e-6));
        }
    }
    vec![worst("CT in the windmill brake state", checks)]
}

/// Half thicknesses in hundredths of the chord.
pub(super) fn sixteen_series() -> Vec<Check> {
    const PRINTED: [[f64; 2]; 15] = [
        [1.25, 0.969],
        [2.5, 1.354],
        [5.0, 1.882],
        [7.5, 2.274],
        [10.0, 2.593],
        [15.0, 3.101],
        [20.0, 3.498],
        [30.0, 4.063],
        [40.0, 4.391],
        [50.0, 4.500],
        [60.0, 4.376],
        [70.0, 3.952],
        [80.0, 3.149],
        [90.0, 1.888],
        [95.0, 1.061],
    ];
    let outline = naca_16_series(0.0, 0.09).expect("a published section");
    let upper = |x: f64| {
        let mut pairs = outline.points().windows(2).filter(|p| p[0][1] >= 0.0 && p[1][1] >= 0.0);
        let on = pairs.find(|p| (p[0][0] - x) * (p[1][0] - x) <= 0.0);
        on.map_or(f64::NAN, |p| p[0][1] + (p[1][1] - p[0][1]) * (x - p[0][0]) / (p[1][0] - p[0][0]))
    };
    let row = |[x, y]: [f64; 2]| {
        SIXTEEN.within(format!("16-009 at {x} %"), 100.0 * upper(x / 100.0), y, 4.5e-3).unit("%")
    };
    PRINTED.map(row).into()
}

fn example() -> Rig {
    Rig::new(&Job::from_json(DEMOS[0].json).expect("an example")).expect("an example")
}

fn sea_level() -> Air {
    Air::standard(0.0, 0.0).expect("sea level")
}
