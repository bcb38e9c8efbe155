//! The parts of the solver alone: potential flow without layers, and a layer in given speeds, to be held
//! against exact and measured ones.

use super::closure::{Gas, Kind, Point, props};
use super::dual::Dual;
use super::forces::lift_and_moment;
use super::layer::{State, fixed};
use super::potential::Potential;
use super::station::{Closing, Upstream, solve};
use super::{USUAL_NODES, spacing};
use crate::section::outline::Outline;

/// Potential flow about a section, in chords and the speed far away.
#[derive(Debug, Clone, PartialEq)]
pub struct Inviscid {
    /// Lift coefficient.
    pub cl: f64,
    /// Points of the surface and the speed there, without sign.
    pub surface: Vec<([f64; 2], f64)>,
}

/// Potential flow at an angle of attack in radians, Mach number 0; nothing where the equations are singular.
#[must_use]
pub fn inviscid(outline: &Outline, alpha_rad: f64) -> Option<Inviscid> {
    let potential = Potential::new(spacing::nodes(outline, USUAL_NODES))?;
    let speeds: Vec<f64> = potential.strengths(alpha_rad).iter().map(|g| -g).collect();
    let (cl, _) = lift_and_moment(&potential.body, &speeds, alpha_rad, 0.0);
    let surface = potential.body.nodes.iter().copied().zip(speeds.iter().map(|u| u.abs())).collect();
    Some(Inviscid { cl, surface })
}

/// A layer at one station, lengths and speeds in those of the Reynolds number.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LayerPoint {
    /// Momentum thickness.
    pub theta: f64,
    /// Displacement thickness.
    pub dstar: f64,
    /// Growth n of waves (laminar), or root of the shear stress coefficient (turbulent).
    pub growth: f64,
    /// Friction coefficient.
    pub cf: f64,
}

/// Marches an incompressible layer through stations, each a place and a speed, from a start of momentum
/// thickness, displacement thickness and growth at the first; as far as the equations have a solution.
#[must_use]
pub fn march(reynolds: f64, turbulent: bool, start: [f64; 3], stations: &[(f64, f64)]) -> Vec<LayerPoint> {
    let gas = Gas::new(reynolds, 0.0);
    let kind = if turbulent { Kind::Turbulent } else { Kind::Laminar };
    let Some(first) = stations.first() else { return Vec::new() };
    let mut state: State = [start[0], start[1], start[2], first.1];
    let told = |s: &State| {
        let cf = props(&gas, &fixed::<0>(s), kind).cf.v;
        LayerPoint { theta: s[0], dstar: s[1], growth: s[2], cf }
    };
    let mut points = vec![told(&state)];
    for pair in stations.windows(2) {
        let closing = Closing::Law { c: 0.0, v: pair[1].1 };
        let guess = [state[0], state[1], state[2], pair[1].1];
        match solve(&gas, kind, Upstream::Station(&state, pair[1].0 - pair[0].0), closing, &[guess]) {
            Some(next) => state = next,
            None => break,
        }
        points.push(told(&state));
    }
    points
}

/// Friction coefficient and dissipation `2 CD/H*` of an incompressible laminar layer by its shape
/// parameter, momentum thickness 0.001.
#[must_use]
pub fn laminar_closure(reynolds: f64, shape: f64) -> (f64, f64) {
    let point = Point {
        theta: Dual::<0>::constant(1e-3),
        dstar: Dual::constant(shape * 1e-3),
        c: Dual::constant(0.0),
        u: Dual::constant(1.0),
    };
    let q = props(&Gas::new(reynolds, 0.0), &point, Kind::Laminar);
    (q.cf.v, q.di.v)
}
