//! Least induced loss for a given thrust or power.
//!
//! Method: C. N. Adkins and R. H. Liebeck, *Design of Optimum Propellers*, J. Propulsion and Power 10(5),
//! 1994. The displacement velocity ζ (over the airspeed) is the same at every radius. With `λ = V/(Ω R)`, `ξ
//! = r/R`, `x = ξ/λ`, `ε = cd/cl`: `tan φt = λ (1 + ζ/2)`, `tan φ = tan φt/ξ`, `F = (2/π) acos e^−f`,
//! `f = B/2 (1 − ξ)/sin φt`, `G = F x cos φ sin φ`. Without hub loss; not for rest. Where the job asks for
//! Goldstein's loss, F is his at the pitch `λ = tan φt` of the wake (A. Betz and S. Goldstein: the
//! circulation of least induced loss).

use std::f64::consts::{FRAC_2_PI, PI};

use super::ShapeError;
use crate::job::TipLoss;
use crate::rotor::loss::Ends;

/// What is asked of the propeller.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Wanted {
    /// A thrust, N, above zero.
    Thrust(f64),
    /// A shaft power, W, above zero.
    Power(f64),
}

/// The propeller to be designed, in SI units; all figures above zero but the hub radius, which may be zero.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Task {
    /// Airspeed V, m/s.
    pub airspeed_m_s: f64,
    /// Speed of rotation Ω, rad/s.
    pub rotation_rad_s: f64,
    /// Tip radius R, m.
    pub radius_m: f64,
    /// Hub radius, m.
    pub hub_radius_m: f64,
    /// Number of blades.
    pub blades: u32,
    /// Air density, kg/m³.
    pub density_kg_m3: f64,
    /// What is asked.
    pub wanted: Wanted,
    /// Whose factor F.
    pub tip_loss: TipLoss,
}

/// A propeller of least induced loss.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Design {
    /// What was asked.
    pub task: Task,
    /// Displacement velocity over airspeed.
    pub zeta: f64,
    /// Thrust coefficient `2T/(ρ V² π R²)`.
    pub tc: f64,
    /// Power coefficient `2P/(ρ V³ π R²)`.
    pub pc: f64,
}

/// The flow of a design at one radius.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Flow {
    /// Inflow angle φ, rad.
    pub inflow_rad: f64,
    /// The factor F.
    pub loss: f64,
    /// Axial factor a.
    pub axial: f64,
    /// Swirl factor a′.
    pub swirl: f64,
    /// Speed W, m/s.
    pub speed_m_s: f64,
    /// Chord times lift coefficient, m.
    pub chord_lift_m: f64,
}

/// Cosine-spaced steps of the integrals.
const STEPS: u32 = 240;
const MOST_PASSES: u32 = 200;
/// The design rests when ζ changes by no more, as a share: a few hundred roundings.
const AT_REST: f64 = 1e-13;

/// The design for sections whose drag over lift is given by `ξ`.
///
/// # Errors
/// A thrust that cannot be had; no convergence.
pub fn design(task: Task, drag_to_lift: impl Fn(f64) -> f64) -> Result<Design, ShapeError> {
    let disc = 0.5 * task.density_kg_m3 * task.airspeed_m_s.powi(2) * PI * task.radius_m.powi(2);
    let mut zeta = 0.0;
    for _ in 0..MOST_PASSES {
        let [i1, i2, j1, j2] = integrals(&task, zeta, &drag_to_lift);
        let next = match task.wanted {
            Wanted::Thrust(asked_n) => {
                let half = i1 / (2.0 * i2);
                let under = half * half - asked_n / disc / i2;
                if under < 0.0 {
                    return Err(ShapeError::Unattainable { asked_n, most_n: disc * half * half * i2 });
                }
                half - under.sqrt()
            }
            Wanted::Power(asked_w) => {
                let half = j1 / (2.0 * j2);
                (half * half + asked_w / (disc * task.airspeed_m_s) / j2).sqrt() - half
            }
        };
        if !next.is_finite() {
            return Err(ShapeError::NotConverged);
        }
        if (next - zeta).abs() <= AT_REST * (1.0 + next.abs()) {
            let (tc, pc) = (i1 * next - i2 * next * next, j1 * next + j2 * next * next);
            return Ok(Design { task, zeta: next, tc, pc });
        }
        zeta = next;
    }
    Err(ShapeError::NotConverged)
}

/// `I1, I2, J1, J2` over the blade.
fn integrals(task: &Task, zeta: f64, drag_to_lift: &impl Fn(f64) -> f64) -> [f64; 4] {
    let lambda = task.advance();
    let hub = task.hub_radius_m / task.radius_m;
    let step = PI / f64::from(STEPS);
    let mut sum = [0.0; 4];
    for i in 0..STEPS {
        let t = (f64::from(i) + 0.5) * step;
        let xi = hub + 0.5 * (1.0 - hub) * (1.0 - t.cos());
        let width = 0.5 * (1.0 - hub) * t.sin() * step;
        let (phi, _, g) = task.circulation(xi, zeta);
        let (eps, tan) = (drag_to_lift(xi), phi.tan());
        let (less, more) = (1.0 - eps * tan, 1.0 + eps / tan);
        let (i1, j1) = (4.0 * xi * g * less, 4.0 * xi * g * more);
        let i2 = lambda * i1 / (2.0 * xi) * more * phi.sin() * phi.cos();
        let j2 = 0.5 * j1 * less * phi.cos().powi(2);
        for (total, part) in sum.iter_mut().zip([i1, i2, j1, j2]) {
            *total += part * width;
        }
    }
    sum
}

impl Task {
    /// `λ = V/(Ω R)`.
    fn advance(&self) -> f64 {
        self.airspeed_m_s / (self.rotation_rad_s * self.radius_m)
    }

    /// `φ`, `F` and `G` at `ξ`.
    fn circulation(&self, xi: f64, zeta: f64) -> (f64, f64, f64) {
        let lambda = self.advance();
        let tan_tip = lambda * (1.0 + 0.5 * zeta);
        let sin_tip = tan_tip / tan_tip.hypot(1.0);
        let phi = tan_tip.atan2(xi);
        let b = f64::from(self.blades);
        let loss = match self.tip_loss {
            TipLoss::Prandtl => FRAC_2_PI * (-0.5 * b * (1.0 - xi).max(0.0) / sin_tip).exp().acos(),
            TipLoss::Goldstein => {
                Ends::new(b, xi, 1.0, 0.0, false).exact_at_tip(self.blades, xi).factor(phi.sin())
            }
        };
        (phi, loss, loss * xi / lambda * phi.cos() * phi.sin())
    }
}

impl Design {
    /// Thrust, N.
    #[must_use]
    pub fn thrust_n(&self) -> f64 {
        let t = &self.task;
        0.5 * t.density_kg_m3 * t.airspeed_m_s.powi(2) * PI * t.radius_m.powi(2) * self.tc
    }

    /// Shaft power, W.
    #[must_use]
    pub fn power_w(&self) -> f64 {
        self.thrust_n() * self.task.airspeed_m_s / self.efficiency()
    }

    /// `Tc/Pc`.
    #[must_use]
    pub fn efficiency(&self) -> f64 {
        self.tc / self.pc
    }

    /// The flow at `ξ`, above 0 and up to 1, for a section with this drag over lift.
    #[must_use]
    pub fn flow(&self, xi: f64, drag_to_lift: f64) -> Flow {
        let (t, eps) = (&self.task, drag_to_lift);
        let (phi, loss, g) = t.circulation(xi, self.zeta);
        let (sin, cos) = phi.sin_cos();
        let lambda = t.advance();
        let axial = 0.5 * self.zeta * cos * cos * (1.0 - eps * phi.tan());
        let speed_m_s = t.airspeed_m_s * (1.0 + axial) / sin;
        let strength = 4.0 * PI * lambda * g * t.airspeed_m_s * t.radius_m * self.zeta / f64::from(t.blades);
        Flow {
            inflow_rad: phi,
            loss,
            axial,
            swirl: 0.5 * self.zeta * lambda / xi * sin * cos * (1.0 + eps / phi.tan()),
            speed_m_s,
            chord_lift_m: strength / speed_m_s,
        }
    }
}
