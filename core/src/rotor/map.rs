//! The departure map: departure from the best angle over radius and a line of conditions.

use ndarray::Array2;

use super::element::{Balance, Near};
use super::{Condition, Ring, Rotor};
use crate::section::{Best, best};

/// One cell of the map. Figures are `None` where there is no load or no best angle.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct MapCell {
    /// Angle of attack minus best angle, degrees.
    pub departure_deg: Option<f64>,
    /// Lift-to-drag over its best.
    pub share_of_best: Option<f64>,
    /// Angle of attack minus the angle of greatest lift, degrees; above zero is stalled.
    pub past_stall_deg: Option<f64>,
}

/// Departure over radius (rows) and conditions (columns).
#[derive(Clone, Debug, PartialEq)]
pub struct DepartureMap {
    /// Radius of each row, m, rising.
    pub radii_m: Vec<f64>,
    /// Airspeed of each column, m/s.
    pub airspeeds_m_s: Vec<f64>,
    /// Propeller rpm of each column.
    pub rpm: Vec<f64>,
    /// Cells, `[radius, condition]`.
    pub cells: Array2<MapCell>,
}

/// The best angle is worked out at every so many conditions and interpolated between: it changes slowly along
/// a line.
const BEST_EVERY: usize = 8;

/// The map of a propeller along a line of conditions, at the given radii (m).
#[must_use]
pub fn departure_map(rotor: &Rotor, line: &[Condition], radii_m: &[f64]) -> DepartureMap {
    let mut cells = Array2::default((radii_m.len(), line.len()));
    for (mut row, &radius) in cells.rows_mut().into_iter().zip(radii_m) {
        let ring = rotor.ring(radius);
        let bests = BestLine::new(rotor, &ring, line);
        let mut near = Near::default();
        for (i, (cell, at)) in row.iter_mut().zip(line).enumerate() {
            let element = rotor.element(&ring, at).0;
            if let Some(balance) = element.balance_near(&mut near) {
                *cell = filled(&balance, bests.at(i), element.section.stall_rad());
            }
        }
    }
    DepartureMap {
        radii_m: radii_m.to_vec(),
        airspeeds_m_s: line.iter().map(|c| c.airspeed_m_s).collect(),
        rpm: line.iter().map(|c| 60.0 * c.turns_per_s()).collect(),
        cells,
    }
}

fn filled(balance: &Balance, best: Option<Best>, stall_rad: f64) -> MapCell {
    let ratio = balance.section.cl / balance.section.cd;
    MapCell {
        departure_deg: best.map(|b| (balance.alpha_rad - b.alpha_rad).to_degrees()),
        share_of_best: best.map(|b| ratio / b.lift_to_drag),
        past_stall_deg: Some((balance.alpha_rad - stall_rad).to_degrees()),
    }
}

/// Best angles of one radius along a line of conditions.
struct BestLine {
    nodes: Vec<Option<Best>>,
}

impl BestLine {
    fn new(rotor: &Rotor, ring: &Ring, line: &[Condition]) -> Self {
        let count = line.len().div_ceil(BEST_EVERY) + 1;
        let last = line.len().saturating_sub(1);
        let node = |k: usize| {
            let element = rotor.element(ring, line.get((k * BEST_EVERY).min(last))?).0;
            best(|a| element.section.at(a), element.section.stall_rad())
        };
        Self { nodes: (0..count).map(node).collect() }
    }

    fn at(&self, i: usize) -> Option<Best> {
        let (k, w) = (i / BEST_EVERY, (i % BEST_EVERY) as f64 / BEST_EVERY as f64);
        let (a, b) = (self.nodes[k]?, self.nodes[k + 1]?);
        Some(Best {
            alpha_rad: a.alpha_rad + w * (b.alpha_rad - a.alpha_rad),
            lift_to_drag: a.lift_to_drag + w * (b.lift_to_drag - a.lift_to_drag),
        })
    }
}
