//! What an aeroplane asks for over its speeds, as a curve to draw.

use serde::Serialize;

use super::{drag_n, speeds};
use crate::air::Air;
use crate::job::Aeroplane;

/// Fastest speed of the curve over that of least drag.
const FASTEST: f64 = 2.2;
/// Slowest speed over that of least power, where no stall is known.
const SLOWEST: f64 = 0.75;

/// Level flight at one speed, all engines together.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Asked {
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
    /// Drag, N.
    pub drag_n: f64,
    /// Drag times speed, W.
    pub power_w: f64,
}

impl Asked {
    /// What level flight asks for at a speed above zero; `None` at rest.
    #[must_use]
    pub fn at(a: &Aeroplane, air: &Air, airspeed_m_s: f64) -> Option<Self> {
        let drag_n = drag_n(a, air, airspeed_m_s)?;
        Some(Self { airspeed_m_s, drag_n, power_w: drag_n * airspeed_m_s })
    }
}

/// Drag and power at `count` speeds from the stall (three quarters of the speed of least power where no
/// greatest lift coefficient is given) to 2.2 times the speed of least drag.
#[must_use]
pub fn asked(a: &Aeroplane, air: &Air, count: u32) -> Vec<Asked> {
    let speeds = speeds(a, air);
    let slowest = speeds.stall_m_s.unwrap_or(SLOWEST * speeds.least_power_m_s);
    let fastest = (FASTEST * speeds.least_drag_m_s).max(2.0 * slowest);
    let last = count.max(2) - 1;
    (0..=last)
        .map(|i| slowest + (fastest - slowest) * f64::from(i) / f64::from(last))
        .filter_map(|v| Asked::at(a, air, v))
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::job::{Aircraft, DEMOS, Job};

    /// Closed form for a parabolic polar: least drag is `2 W sqrt(k cd0)` (any aerodynamics text; common
    /// practice).
    #[test]
    fn the_curve_runs_from_the_stall_and_its_least_drag_is_the_closed_form() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        let Some(Aircraft::Aeroplane(a)) = &job.aircraft else { panic!("the first example is an aeroplane") };
        let air = Air::standard(0.0, 0.0).unwrap();
        let curve = asked(a, &air, 400);
        let weight = a.mass_kg * crate::air::G0_M_S2;
        let closed = 2.0 * weight * (a.drag.cd0 * a.drag.k.unwrap()).sqrt();
        let least = curve.iter().map(|p| p.drag_n).fold(f64::INFINITY, f64::min);
        assert!((least / closed - 1.0).abs() < 1e-4, "{least} {closed}");
        assert_eq!(curve.len(), 400);
        assert_eq!(Some(curve[0].airspeed_m_s), speeds(a, &air).stall_m_s);
        assert!(Asked::at(a, &air, 0.0).is_none());
    }
}
