//! Full throttle over speed and height: every point solved from the blade elements.

use ndarray::Array2;

use super::Solver;
use super::figures::full_throttle;
use super::trail::Trail;
use crate::air::{Air, AirError};
use crate::result::FullThrottle;
use crate::rig::Rig;

/// Full throttle `[height, speed]`; held to the limit rpm, `None` where there is no answer.
///
/// # Errors
/// A height outside the atmosphere's table.
pub fn matched(
    rig: &Rig,
    altitudes_m: &[f64],
    airspeeds_m_s: &[f64],
    isa_offset_k: f64,
) -> Result<Array2<Option<FullThrottle>>, AirError> {
    let solver = Solver::new(rig);
    let mut cells = Array2::from_elem((altitudes_m.len(), airspeeds_m_s.len()), None);
    for (mut row, &altitude) in cells.rows_mut().into_iter().zip(altitudes_m) {
        let air = Air::standard(altitude, isa_offset_k)?;
        let mut trail = Trail::default();
        for (cell, &airspeed_m_s) in row.iter_mut().zip(airspeeds_m_s) {
            let at = rig.unsolved(air, airspeed_m_s);
            let full = solver.full(&at, &mut trail).ok();
            *cell = full.map(|full| full_throttle(rig, &full, Vec::new()));
        }
    }
    Ok(cells)
}
