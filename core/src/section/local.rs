//! A section where it works: at one station's thickness, Reynolds and Mach number, with what the tables do
//! not carry.
//!
//! Compressibility: lift about zero lift grows by Prandtl and Glauert's `sqrt((1 − Mt²)/(1 − M²))` (H.
//! Glauert, Proc. Roy. Soc. A 118, 1928; Mt is the Mach number the table holds for), with M held at the
//! drag-divergence Mach number; drag rises by Lock's fourth-power law `20 (M − Mcr)⁴`, with `Mcr = Mdd −
//! (0.1/80)^(1/3)` and Korn's relation `Mdd = ka − t/c − cl/10` (as given by W. H. Mason, *Configuration
//! Aerodynamics*; from memory). Choices: the growth fades out over 20° past stall; the thickness in Korn's
//! relation stops at 0.30 and the added drag at 0.30.
//!
//! Rotation delays stall inboard: H. Snel, R. Houwink and J. Bosschers, ECN-C-93-052, 1994: `cl = cl2D + 3.1
//! (c/r)² (cl_potential − cl2D) (Ω r/W)²`, full to 30°, none from 50° on. Choices: it fades out between 0.7
//! and 0.8 of the radius, the factor on the difference stops at 1, potential lift is `2π sin(α − α0)` and
//! only lift lost to separation (α past stall's onset, lift below potential) is given back.

use std::iter::Sum;
use std::ops::Mul;

use super::extend::Coefficients;
use super::family::{Family, Landmarks, Mix, Outside};

/// What a station tells its section.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Situation {
    /// Thickness over chord.
    pub thickness_ratio: f64,
    /// Chord Reynolds number.
    pub reynolds: f64,
    /// Helical Mach number; 0 switches compressibility off.
    pub mach: f64,
    /// Factor of Snel's stall delay, 0 to 1: `3.1 (c/r)² (Ω r/W)²`; 0 switches it off.
    pub stall_delay: f64,
}

/// One family at one station.
#[derive(Clone, Copy, Debug)]
pub struct Local<'f> {
    family: &'f Family,
    mix: Mix,
    landmarks: Landmarks,
    mach: f64,
    table_mach: f64,
    /// Korn's `ka − t/c`.
    korn: f64,
    stall_delay: f64,
}

const FADE_RAD: f64 = 20.0 * DEG;
const DEG: f64 = std::f64::consts::PI / 180.0;
const THICKEST_IN_KORN: f64 = 0.30;
const MOST_DRAG_RISE: f64 = 0.30;
/// Stall delay is full up to this angle, rad.
const DELAY_FULL_RAD: f64 = 30.0 * DEG;
/// Stall delay is gone from this angle on, rad.
const DELAY_NONE_RAD: f64 = 50.0 * DEG;

/// The most that the delay of stall adds to the rise for each 1 of its factor, 1/rad: potential lift less the
/// section's is at most about 4, let in or faded out over at least 7 degrees, and rises itself by 2π.
const DELAY_STEEPEST: f64 = 40.0;
/// Lift coefficients that sections do not pass.
const MOST_LIFT: f64 = 2.0;
/// Growth of lift with the Mach number stops below this by Korn's relation.
const FASTEST_IN_GROWTH: f64 = 0.9;
/// The most that Lock's law rises with the lift coefficient, where it reaches [`MOST_DRAG_RISE`]: `0.1 · 80
/// e³`, `e = 0.35`.
const LOCK_STEEPEST: f64 = 0.343;

impl<'f> Local<'f> {
    /// A family at a station.
    #[must_use]
    pub fn new(family: &'f Family, at: Situation) -> Self {
        let mix = family.mix(at.thickness_ratio, at.reynolds);
        Self {
            family,
            mix,
            landmarks: family.blend(&mix, |l, _| *l),
            mach: at.mach,
            table_mach: family.blend(&mix, |_, m| m),
            korn: family.about.korn_factor - at.thickness_ratio.min(THICKEST_IN_KORN),
            stall_delay: at.stall_delay,
        }
    }

    /// Lift and drag coefficients at an angle of attack to the chord line, rad.
    #[must_use]
    pub fn at(&self, alpha_rad: f64) -> Coefficients {
        let mut c = self.family.at(&self.mix, alpha_rad);
        if self.stall_delay > 0.0 {
            c.cl += self.delayed(alpha_rad, c.cl);
        }
        if self.mach > 0.0 {
            c = self.compressed(alpha_rad, c);
        }
        c
    }

    /// Zero lift, stall and the angles covered, rad.
    #[must_use]
    pub fn landmarks(&self) -> &Landmarks {
        &self.landmarks
    }

    /// The most that the rises of lift and drag coefficient with the angle add up to, with the coefficients
    /// themselves, 1/rad: the tables' own, and what compressibility and the delay of stall can make of
    /// it.
    #[must_use]
    pub fn steepest(&self) -> f64 {
        let table = self.landmarks.steepest;
        let delayed = table + self.stall_delay * (table + DELAY_STEEPEST);
        if self.mach == 0.0 {
            return delayed;
        }
        let m = self.mach.min(FASTEST_IN_GROWTH);
        let growth = 1.0 / (1.0 - m * m).sqrt();
        let diverges = self.mach > self.korn - LOCK_MARGIN - 0.1 * MOST_LIFT;
        let drag_rise = if diverges { LOCK_STEEPEST } else { 0.0 };
        growth * (1.0 + drag_rise) * delayed + (growth - 1.0) * MOST_LIFT / FADE_RAD
    }

    /// Whether thickness or Reynolds number lay outside the tables.
    #[must_use]
    pub fn outside(&self) -> Outside {
        self.mix.outside
    }

    fn delayed(&self, alpha: f64, cl: f64) -> f64 {
        let (zero_lift, stall) = (self.landmarks.zero_lift, self.landmarks.stall);
        // From zero lift to stall the loss is viscous, not separation: let the delay in over the last half.
        let onset = zero_lift + 0.5 * (stall - zero_lift);
        if alpha <= onset.max(zero_lift) || alpha >= DELAY_NONE_RAD {
            return 0.0;
        }
        let potential = std::f64::consts::TAU * (alpha - zero_lift).sin();
        let let_in = ((alpha - onset) / (stall - onset).max(DEG)).min(1.0);
        let fade = ((DELAY_NONE_RAD - alpha) / (DELAY_NONE_RAD - DELAY_FULL_RAD)).min(1.0);
        self.stall_delay * let_in * fade * (potential - cl).max(0.0)
    }

    fn compressed(&self, alpha: f64, c: Coefficients) -> Coefficients {
        let past = (alpha - self.landmarks.stall).max(self.landmarks.negative_stall - alpha).max(0.0);
        let share = (1.0 - past / FADE_RAD).max(0.0);
        let diverging = (self.korn - 0.1 * c.cl.abs()).max(0.0);
        let m = self.mach.min(diverging).max(self.table_mach);
        let growth = ((1.0 - self.table_mach * self.table_mach) / (1.0 - m * m)).sqrt();
        let cl = c.cl * (1.0 + share * (growth - 1.0));
        let critical = self.korn - 0.1 * cl.abs() - LOCK_MARGIN;
        let excess = (self.mach - critical.max(0.0)).max(0.0);
        let rise = (20.0 * excess.powi(4)).min(MOST_DRAG_RISE);
        Coefficients { cl, cd: c.cd + rise }
    }
}

/// `(0.1/80)^(1/3)`: how far below drag divergence Lock's law begins.
const LOCK_MARGIN: f64 = 0.107_721_734_501_593_9;

impl Mul<f64> for Landmarks {
    type Output = Self;
    fn mul(self, w: f64) -> Self {
        Self {
            zero_lift: self.zero_lift * w,
            stall: self.stall * w,
            negative_stall: self.negative_stall * w,
            first: self.first * w,
            last: self.last * w,
            steepest: self.steepest * w,
        }
    }
}

impl Sum for Landmarks {
    fn sum<I: Iterator<Item = Self>>(all: I) -> Self {
        all.fold(Self::default(), |a, b| Self {
            zero_lift: a.zero_lift + b.zero_lift,
            stall: a.stall + b.stall,
            negative_stall: a.negative_stall + b.negative_stall,
            first: a.first + b.first,
            last: a.last + b.last,
            steepest: a.steepest + b.steepest,
        })
    }
}

#[cfg(test)]
mod tests;
