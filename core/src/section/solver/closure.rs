//! What the shape of a velocity profile says of friction, dissipation, growth of waves and shear stress.
//!
//! # References
//! Drela, Giles, "Viscous-Inviscid Analysis of Transonic and Low Reynolds Number Airfoils", AIAA J. 25(10),
//! 1987 (closures, lag equation, envelope of amplification); Drela, "Flight Vehicle Aerodynamics", 2014,
//! chapter 4; Whitfield's compressible shape relations as in the first. Coefficients from memory; one factor
//! is fitted here, see [`FRICTION_FACTOR`].

use super::dual::Dual;

/// First constant of the equilibrium locus.
pub(super) const LAG_A: f64 = 6.7;
/// Second constant of the equilibrium locus.
pub(super) const LAG_B: f64 = 0.75;
/// Rate of the lag.
pub(super) const LAG_RATE: f64 = 5.6;
/// Equilibrium shear stress: half of 1/(A^2 B).
const SHEAR: f64 = 0.5 / (LAG_A * LAG_A * LAG_B);

/// Factor on the turbulent friction at the wall: brings the closure, 2 to 6 % low, to the plate of Karman and
/// Schoenherr.
const FRICTION_FACTOR: f64 = 1.04;

/// What kind of layer a station is in.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Kind {
    Laminar,
    Turbulent,
    Wake,
}

/// Reynolds and Mach number as the closures want them.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Gas {
    pub(super) reynolds: f64,
    pub(super) mach: f64,
    lambda: f64,
}

impl Gas {
    pub(super) fn new(reynolds: f64, mach: f64) -> Self {
        let beta = (1.0 - mach * mach).sqrt();
        Self { reynolds, mach, lambda: (mach / (1.0 + beta)).powi(2) }
    }

    /// Compressible speed from the incompressible one (Karman-Tsien), limited short of its singularity.
    pub(super) fn speed<const K: usize>(&self, u: Dual<K>) -> Dual<K> {
        if self.mach == 0.0 {
            return u;
        }
        let below = (1.0 - self.lambda * u.square()).floor_at(0.05);
        u * (1.0 - self.lambda) / below
    }
}

/// State of a layer at a station: momentum and displacement thickness, amplification n (laminar) or root of
/// the shear stress coefficient (turbulent), and edge speed.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Point<const K: usize> {
    pub(super) theta: Dual<K>,
    pub(super) dstar: Dual<K>,
    pub(super) c: Dual<K>,
    pub(super) u: Dual<K>,
}

/// What follows from a [`Point`].
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Props<const K: usize> {
    pub(super) h: Dual<K>,
    pub(super) hk: Dual<K>,
    /// Square of the edge Mach number.
    pub(super) m2: Dual<K>,
    pub(super) re_theta: Dual<K>,
    /// Energy shape parameter H*.
    pub(super) hs: Dual<K>,
    /// Density shape parameter H**.
    pub(super) hss: Dual<K>,
    /// Friction coefficient.
    pub(super) cf: Dual<K>,
    /// Dissipation 2 CD/H*.
    pub(super) di: Dual<K>,
    /// Slip speed of the equivalent wall layer.
    pub(super) us: Dual<K>,
    /// Root of the equilibrium shear stress coefficient.
    pub(super) seq: Dual<K>,
    /// Nominal thickness.
    pub(super) delta: Dual<K>,
    /// Growth of n along the arc.
    pub(super) growth: Dual<K>,
}

/// Shape parameters and Reynolds number before the closures proper.
struct Shape<const K: usize> {
    h: Dual<K>,
    hk: Dual<K>,
    m2: Dual<K>,
    re_theta: Dual<K>,
}

fn shape<const K: usize>(gas: &Gas, p: &Point<K>, kind: Kind) -> Shape<K> {
    let h = p.dstar / p.theta;
    let least = if kind == Kind::Wake { 1.00005 } else { 1.02 };
    let (ue, theta_re) = (gas.speed(p.u), gas.reynolds * p.theta);
    if gas.mach == 0.0 {
        let re_theta = (theta_re * ue).floor_at(1e-3);
        return Shape { h, hk: h.floor_at(least), m2: Dual::constant(0.0), re_theta };
    }
    let square = gas.mach * gas.mach;
    let t = (1.0 + 0.2 * square * (1.0 - ue.square())).floor_at(0.2);
    let m2 = ue.square() * square / t;
    // Density and viscosity at the edge together.
    let re_theta = (theta_re * ue * t.powf(2.5 - 0.76)).floor_at(1e-3);
    let hk = ((h - 0.290 * m2) / (1.0 + 0.113 * m2)).floor_at(least);
    Shape { h, hk, m2, re_theta }
}

/// Closures at a station.
pub(super) fn props<const K: usize>(gas: &Gas, p: &Point<K>, kind: Kind) -> Props<K> {
    let Shape { h, hk, m2, re_theta } = shape(gas, p, kind);
    let laminar = kind == Kind::Laminar;
    let plain = if laminar { energy_laminar(hk) } else { energy_turbulent(hk, re_theta) };
    let (hs, hss) = if gas.mach == 0.0 {
        (plain, Dual::constant(0.0))
    } else {
        ((plain + 0.028 * m2) / (1.0 + 0.014 * m2), (0.064 / (hk - 0.8) + 0.251) * m2)
    };
    let zero = Dual::constant(0.0);
    if laminar {
        let cf = friction_laminar(hk) / re_theta;
        let (di, growth) = (dissipation_laminar(hk) / re_theta, amplification(hk, re_theta) / p.theta);
        return Props { h, hk, m2, re_theta, hs, hss, cf, di, us: zero, seq: zero, delta: zero, growth };
    }
    let us = slip(hs, hk, h, kind);
    let seq = equilibrium(hs, hk, h, us, re_theta, kind);
    let cf = if kind == Kind::Wake { zero } else { friction_turbulent(hk, re_theta, m2) };
    let di = dissipation_turbulent(hs, hk, cf, us, p.c, re_theta, kind);
    let delta = (p.theta * (3.15 + 1.72 / (hk - 1.0)) + p.dstar).min(12.0 * p.theta);
    Props { h, hk, m2, re_theta, hs, hss, cf, di, us, seq, delta, growth: zero }
}

/// Energy shape parameter of laminar profiles.
fn energy_laminar<const K: usize>(hk: Dual<K>) -> Dual<K> {
    let square = (hk - 4.0).square() / hk;
    1.515 + if hk.v < 4.0 { 0.076 * square } else { 0.015 * square }
}

/// Friction of laminar profiles, `Re_theta Cf`: the fit of 1987, which balances with the dissipation at the
/// shape of the Blasius profile, so that waves on a plate grow as they should.
fn friction_laminar<const K: usize>(hk: Dual<K>) -> Dual<K> {
    if hk.v < 7.4 {
        2.0 * (0.019_77 * (7.4 - hk).square() / (hk - 1.0) - 0.067)
    } else {
        2.0 * (0.022 * (1.0 - 1.4 / (hk - 6.0)).square() - 0.067)
    }
}

/// Dissipation of laminar profiles, `Re_theta 2 CD/H*`.
fn dissipation_laminar<const K: usize>(hk: Dual<K>) -> Dual<K> {
    if hk.v < 4.0 {
        0.207 + 0.00205 * (4.0 - hk).powf(5.5)
    } else {
        let square = (hk - 4.0).square();
        0.207 - 0.0016 * square / (1.0 + 0.02 * square)
    }
}

/// Growth of the envelope of waves, `theta dn/dx`, 0 below the critical Reynolds number.
fn amplification<const K: usize>(hk: Dual<K>, re_theta: Dual<K>) -> Dual<K> {
    let h = (hk - 1.0).recip();
    let critical = 2.492 * h.powf(0.43) + 0.7 * ((14.0 * h - 9.24).tanh() + 1.0);
    let r = (re_theta.ln() * std::f64::consts::LOG10_E - critical + 0.08) / 0.16;
    if r.v <= 0.0 {
        return Dual::constant(0.0);
    }
    let ramp = if r.v >= 1.0 { Dual::constant(1.0) } else { r.square() * (3.0 - 2.0 * r) };
    let per_re = 0.028 * (hk - 1.0) - 0.0345 * (-(3.87 * h - 2.52).square()).exp();
    // The last term keeps the growth from vanishing in the profiles of long bubbles.
    let re_rate = -0.05 + 2.7 * h - 5.5 * h.square() + 3.0 * h.cube() + 0.1 * (-20.0 * h).exp();
    ramp * per_re * re_rate
}

/// Energy shape parameter of turbulent profiles.
fn energy_turbulent<const K: usize>(hk: Dual<K>, re_theta: Dual<K>) -> Dual<K> {
    let re = re_theta.floor_at(200.0);
    let h0 = if re_theta.v > 400.0 { 3.0 + 400.0 / re_theta } else { Dual::constant(4.0) };
    let foot = 1.5 + 4.0 / re;
    if hk.v < h0.v {
        let part = (h0 - hk) / (h0 - 1.0);
        (0.5 - 4.0 / re) * part.square() * 1.5 / (hk + 0.5) + foot
    } else {
        let (d, log) = (hk - h0, re.ln());
        d.square() * (0.007 * log / (d + 4.0 / log).square() + 0.015 / hk) + foot
    }
}

/// Friction of turbulent profiles.
fn friction_turbulent<const K: usize>(hk: Dual<K>, re_theta: Dual<K>, m2: Dual<K>) -> Dual<K> {
    let fc = (1.0 + 0.2 * m2).sqrt();
    let log = ((re_theta / fc).ln() * std::f64::consts::LOG10_E).floor_at(3.0 / 2.303);
    let decay = (-1.33 * hk).floor_at(-20.0);
    let power = ((-1.74 - 0.31 * hk) * log.ln()).exp();
    FRICTION_FACTOR * (0.3 * decay.exp() * power + 0.00011 * ((4.0 - hk / 0.875).tanh() - 1.0)) / fc
}

fn slip<const K: usize>(hs: Dual<K>, hk: Dual<K>, h: Dual<K>, kind: Kind) -> Dual<K> {
    let us = 0.5 * hs * (1.0 - (hk - 1.0) / (0.75 * h));
    let most = if kind == Kind::Wake { 0.99995 } else { 0.98 };
    us.min(Dual::constant(most))
}

/// Root of the shear stress coefficient in equilibrium.
fn equilibrium<const K: usize>(
    hs: Dual<K>,
    hk: Dual<K>,
    h: Dual<K>,
    us: Dual<K>,
    re_theta: Dual<K>,
    kind: Kind,
) -> Dual<K> {
    let hkc = wall_shape(hk, re_theta, kind);
    (SHEAR * hs * (hk - 1.0) * hkc.square() / ((1.0 - us) * h * hk.square())).sqrt()
}

/// `Hk - 1` less the part of the wall layer.
pub(super) fn wall_shape<const K: usize>(hk: Dual<K>, re_theta: Dual<K>, kind: Kind) -> Dual<K> {
    if kind == Kind::Wake { hk - 1.0 } else { (hk - 1.0 - 18.0 / re_theta).floor_at(0.01) }
}

/// Dissipation of turbulent profiles, `2 CD/H*`: wall layer, outer layer, and at the wall not below the
/// laminar one.
fn dissipation_turbulent<const K: usize>(
    hs: Dual<K>,
    hk: Dual<K>,
    cf: Dual<K>,
    us: Dual<K>,
    s: Dual<K>,
    re_theta: Dual<K>,
    kind: Kind,
) -> Dual<K> {
    let free = 0.995 - us;
    let outer = (s.square() * free + 0.15 * free.square() / re_theta) * 2.0 / hs;
    if kind == Kind::Wake {
        return 2.0 * outer;
    }
    let fade = 0.5 + 0.5 * ((hk - 1.0) * re_theta.ln() / 2.1).tanh();
    let wall = cf * us / hs * fade;
    (wall + outer).max(dissipation_laminar(hk) / re_theta)
}

/// Root of the shear stress coefficient where the layer becomes turbulent.
pub(super) fn at_transition<const K: usize>(gas: &Gas, p: &Point<K>) -> Dual<K> {
    let now = props(gas, p, Kind::Turbulent);
    let excess = (-3.3 / (now.hk - 1.0)).floor_at(-20.0);
    (1.8 * excess.exp() * now.seq).min(Dual::constant(0.3)).floor_at(1e-4)
}
