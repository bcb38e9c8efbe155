//! What the aircraft asks for, and angles and slip of a propeller that people of the trade have in their
//! heads.

use spokeshave::air::Air;
use spokeshave::aircraft::{drag_n, speeds};
use spokeshave::job::{Aeroplane, DEMOS, Drag, FlightPoint, Job, Setting};
use spokeshave::rig::Rig;

use crate::check::{Basis, Check, Mark};

const FOOT_M: f64 = 0.3048;
const POUND_N: f64 = 4.448_222;
const KNOT_M_S: f64 = 1852.0 / 3600.0;

fn aeroplane(mass_kg: f64, wing_area_m2: f64, drag: Drag) -> Aeroplane {
    Aeroplane {
        mass_kg,
        wing_area_m2,
        drag,
        cl_max: None,
        engines: 1,
        rolling_friction: None,
        slipstream_drag_area_m2: None,
    }
}

const ANDERSON: Basis = Basis {
    source: "J. D. Anderson, Introduction to Flight, chapter 6, the propeller aeroplane CP-1: 2950 lb, \
             span 35.8 ft, 174 ft², CD0 0.025, e 0.8",
    mark: Mark::FromMemory,
    why: "the book rounds to three figures, and CL before that: 0.5 %",
};

/// Drag over speed, and the speeds of a parabolic polar.
pub(super) fn anderson() -> Vec<Check> {
    let (b, s) = (35.8 * FOOT_M, 174.0 * FOOT_M * FOOT_M);
    let drag = Drag { cd0: 0.025, k: None, aspect_ratio: Some(b * b / s), oswald: Some(0.8) };
    let a = aeroplane(2950.0 * POUND_N / 9.806_65, s, drag);
    let mut air = Air::standard(0.0, 0.0).expect("sea level");
    air.density_kg_m3 = 0.002_377 * 515.379;
    let book =
        [(100.0, 279.0), (150.0, 217.0), (200.0, 263.0), (250.0, 359.0), (300.0, 491.0), (350.0, 652.0)];
    let told = |(v, pounds): (f64, f64)| {
        let got = drag_n(&a, &air, v * FOOT_M).map_or(f64::NAN, |d| d / POUND_N);
        ANDERSON.relative(format!("thrust required at {v} ft/s"), got, pounds, 0.005).unit("lb")
    };
    let found = speeds(&a, &air);
    let mut checks: Vec<Check> = book.into_iter().map(told).collect();
    checks.extend([
        ANDERSON.relative("greatest lift over drag", found.greatest_lift_to_drag, 13.6, 0.005),
        ANDERSON.relative("speed of least drag", found.least_drag_m_s / FOOT_M, 144.8, 0.005).unit("ft/s"),
        ANDERSON.relative("speed of least power", found.least_power_m_s / FOOT_M, 110.0, 0.005).unit("ft/s"),
    ]);
    checks
}

const LIGHT: Basis = Basis {
    source: "an aeroplane of 757 kg and 14.86 m² whose polar gives 63 kt for least drag at sea level has \
             48 kt for least power, 82 kt for best range by the 3^(1/4) rule, and needs there about 39 kW \
             at the shaft",
    mark: Mark::CommonPractice,
    why: "whole knots; the zero-lift drag is not given: 0.035 and a propeller's efficiency of 0.83 are \
          assumed, so that the power is a check of size only",
};

/// The speeds of one light aeroplane.
pub(super) fn light() -> Vec<Check> {
    let (mass_kg, area, least_drag) = (757.0, 14.86, 63.0 * KNOT_M_S);
    let lift = 2.0 * mass_kg * 9.806_65 / (1.225 * area * least_drag * least_drag);
    let drag = Drag { cd0: 0.035, k: Some(0.035 / (lift * lift)), aspect_ratio: None, oswald: None };
    let a = aeroplane(mass_kg, area, drag);
    let air = Air::standard(0.0, 0.0).expect("sea level");
    let found = speeds(&a, &air);
    let fast = 82.0 * KNOT_M_S;
    let shaft_kw = drag_n(&a, &air, fast).map_or(f64::NAN, |d| d * fast / 0.83 / 1e3);
    vec![
        LIGHT.within("speed of least power", found.least_power_m_s / KNOT_M_S, 48.0, 0.5).unit("kt"),
        LIGHT
            .within("speed of best range in a given time", found.fast_cruise_m_s / KNOT_M_S, 82.0, 1.0)
            .unit("kt"),
        LIGHT.within("power there at the shaft", shaft_kw, 39.0, 2.0).unit("kW"),
    ]
}

const ANGLES: Basis = Basis {
    source: "1.753 m across, 1.473 m pitch, 2000 rpm, J about 0.68: at 0.75 R an advance angle of about \
             16°, a blade angle of about 20°, an angle between them near 4°, slip about 20 %",
    mark: Mark::CommonPractice,
    why: "half a degree, as the figures are told; slip 1.5 %, as half a degree makes it",
};

/// The angles of one propeller of even pitch.
pub(super) fn angles() -> Vec<Check> {
    let mut job = Job::from_json(DEMOS[0].json).expect("a demo");
    job.propeller.diameter_m = 1.753;
    for s in &mut job.propeller.stations {
        (s.angle_deg, s.pitch_m) = (None, Some(1.473));
    }
    job.flight_points = vec![FlightPoint {
        name: "here".into(),
        altitude_m: 0.0,
        isa_offset_k: 0.0,
        airspeed_m_s: Some(0.68 * 1.753 * 2000.0 / 60.0),
        setting: Setting::Rpm { rpm: 2000.0 },
    }];
    let f = Rig::new(&job).expect("a valid job").point(0).expect("an answer").figures;
    let or_nothing = |v: Option<f64>| v.unwrap_or(f64::NAN);
    let (advance, blade) = (or_nothing(f.advance_angle_075_deg), or_nothing(f.blade_angle_075_deg));
    vec![
        ANGLES.within("advance angle at 0.75 R", advance, 16.0, 0.5).unit("°"),
        ANGLES.within("blade angle at 0.75 R", blade, 20.0, 0.5).unit("°"),
        ANGLES.within("angle between them", blade - advance, 4.0, 0.5).unit("°"),
        ANGLES.within("slip", or_nothing(f.slip), 0.2, 0.015),
    ]
}
