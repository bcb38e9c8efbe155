//! Natural frequencies over the rpm, and what they meet.

use std::f64::consts::TAU;

use super::beam::{Bending, BendingMode};
use super::{BladeBeam, twist};
use crate::result::{FrequencyLine, ModeKind, NearOrder, Vibration};

/// Modes of bending and of twist that are looked at.
const BENDING: usize = 3;
const TWIST: usize = 1;
/// Speeds of rotation, from rest to the fastest.
const SPEEDS: usize = 7;
/// Highest number of times a turn that is looked at.
const ORDERS: u32 = 4;
/// The same of an engine's turn, where a gear stands between.
const ENGINE_ORDERS: u32 = 2;
/// Nearness at which an order is named (common practice keeps at least 10 % away).
const NEAR: f64 = 0.10;

/// Lines from rest to the fastest rotation, and the cases (name and rad/s) in which a mode comes near an
/// order; the gear ratio is the engine's turns over the propeller's.
pub(super) fn vibration(beam: &BladeBeam, cases: &[(String, f64)], gear_ratio: f64) -> Vibration {
    let fastest = cases.iter().map(|c| c.1).fold(0.0, f64::max);
    let speeds: Vec<f64> = (0..SPEEDS).map(|i| fastest * i as f64 / (SPEEDS - 1) as f64).collect();
    let lines = lines(beam, if fastest > 0.0 { &speeds } else { &speeds[..1] });
    Vibration { near: near(&lines, cases, gear_ratio), lines }
}

fn lines(beam: &BladeBeam, speeds_rad_s: &[f64]) -> Vec<FrequencyLine> {
    let rpm: Vec<f64> = speeds_rad_s.iter().map(|w| w * 60.0 / TAU).collect();
    let bending: Option<Vec<Vec<BendingMode>>> = speeds_rad_s.iter().map(|w| bending(beam, *w)).collect();
    let twist: Option<Vec<Vec<f64>>> =
        speeds_rad_s.iter().map(|w| twist::frequencies_rad_s(beam, *w, TWIST)).collect();
    let mut all: Vec<FrequencyLine> = Vec::new();
    // Each kind is counted by itself, from the slowest.
    let next = |all: &[FrequencyLine], mode| 1 + all.iter().filter(|line| line.mode == mode).count();
    for number in 0..BENDING {
        let Some(modes) = &bending else { break };
        let out = modes[0][number].out_share;
        let mode = if out >= 0.5 { ModeKind::Flap } else { ModeKind::Lag };
        let hz = modes.iter().map(|m| m[number].rad_s / TAU).collect();
        all.push(FrequencyLine { mode, number: next(&all, mode), rpm: rpm.clone(), hz });
    }
    for number in 0..TWIST {
        let Some(found) = &twist else { break };
        let hz = found.iter().map(|f| f[number] / TAU).collect();
        all.push(FrequencyLine { mode: ModeKind::Torsion, number: number + 1, rpm: rpm.clone(), hz });
    }
    all
}

/// Modes of bending at a speed of rotation, with sections in their own axes.
fn bending(beam: &BladeBeam, rotation_rad_s: f64) -> Option<Vec<BendingMode>> {
    let stiffness = beam.stiffness(0.0);
    beam.bending(&stiffness, rotation_rad_s).modes(BENDING)
}

/// Times a turn that are looked at: of the propeller, and of an engine that turns otherwise.
fn orders(gear_ratio: f64) -> Vec<(f64, u32, bool)> {
    let engine = if (gear_ratio - 1.0).abs() > 0.01 { ENGINE_ORDERS } else { 0 };
    let own = (1..=ORDERS).map(|n| (f64::from(n), n, false));
    own.chain((1..=engine).map(|n| (gear_ratio * f64::from(n), n, true))).collect()
}

fn near(lines: &[FrequencyLine], cases: &[(String, f64)], gear_ratio: f64) -> Vec<NearOrder> {
    let orders = orders(gear_ratio);
    let mut all = Vec::new();
    for (case, rotation_rad_s) in cases {
        let turn_hz = rotation_rad_s / TAU;
        for line in lines {
            let hz = at(line, 60.0 * turn_hz);
            for (times, order, of_engine) in &orders {
                let away = hz / (times * turn_hz) - 1.0;
                if away.abs() < NEAR {
                    let (mode, number, case) = (line.mode, line.number, case.clone());
                    all.push(NearOrder {
                        case,
                        mode,
                        number,
                        hz,
                        order: *order,
                        of_engine: *of_engine,
                        away,
                    });
                }
            }
        }
    }
    all
}

/// Frequency at an rpm: its square runs nearly straight over the square of the rpm.
fn at(line: &FrequencyLine, rpm: f64) -> f64 {
    if line.rpm.len() < 2 {
        return line.hz[0];
    }
    let b = line.rpm.partition_point(|r| *r <= rpm).clamp(1, line.rpm.len() - 1);
    let square = |v: f64| v * v;
    let (low, high) = (square(line.rpm[b - 1]), square(line.rpm[b]));
    let share = (square(rpm) - low) / (high - low);
    (square(line.hz[b - 1]) + share * (square(line.hz[b]) - square(line.hz[b - 1]))).sqrt()
}

impl BladeBeam {
    /// Bending stiffness out of the plane of rotation, in it, and between the two, N m², at the radii, turned
    /// by `turn_rad` besides the drawing.
    pub(super) fn stiffness(&self, turn_rad: f64) -> [Vec<f64>; 3] {
        let turned = |i: usize| -> [f64; 3] {
            let (s, c) = (self.angles_rad[i] + turn_rad).sin_cos();
            let section = &self.sections[i];
            let (flat, edge, both) = (section.flat_m4, section.edge_m4, section.product_m4);
            // Forward is η cos β − ξ sin β, against the turning ξ cos β + η sin β.
            let forward = flat * c * c + edge * s * s - 2.0 * both * s * c;
            let against = edge * c * c + flat * s * s + 2.0 * both * s * c;
            let between = (flat - edge) * s * c + both * (c * c - s * s);
            [forward, against, between].map(|second| self.material.modulus_pa * second)
        };
        let all: Vec<[f64; 3]> = (0..self.radii_m.len()).map(turned).collect();
        [0, 1, 2].map(|k| all.iter().map(|v| v[k]).collect())
    }

    /// The blade as a beam in bending.
    pub(super) fn bending<'a>(&'a self, stiffness: &'a [Vec<f64>; 3], rotation_rad_s: f64) -> Bending<'a> {
        Bending {
            radii_m: &self.radii_m,
            mass_kg_m: &self.mass_kg_m,
            out_n_m2: &stiffness[0],
            in_n_m2: Some([&stiffness[1], &stiffness[2]]),
            rotation_rad_s,
        }
    }
}
