//! The departure map: departure from the best angle over radius and a line of conditions.

use ndarray::Array2;

use super::element::{Balance, Near};
use super::{Condition, Ring, Rotor};
use crate::section::Best;

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
    /// The last condition: there the last node stands, however near the one before.
    last: usize,
}

impl BestLine {
    fn new(rotor: &Rotor, ring: &Ring, line: &[Condition]) -> Self {
        let count = line.len().div_ceil(BEST_EVERY) + 1;
        let last = line.len().saturating_sub(1);
        let node = |k: usize| rotor.element(ring, line.get((k * BEST_EVERY).min(last))?).0.section.best();
        Self { nodes: (0..count).map(node).collect(), last }
    }

    fn at(&self, i: usize) -> Option<Best> {
        let k = i / BEST_EVERY;
        let apart = (self.last - k * BEST_EVERY).clamp(1, BEST_EVERY);
        let w = (i % BEST_EVERY) as f64 / apart as f64;
        let (a, b) = (self.nodes[k]?, self.nodes[k + 1]?);
        Some(Best {
            alpha_rad: a.alpha_rad + w * (b.alpha_rad - a.alpha_rad),
            lift_to_drag: a.lift_to_drag + w * (b.lift_to_drag - a.lift_to_drag),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::rotor::tests::{at_speed, rotor};

    /// Speed, rpm and blade angle all change along the line, so that Reynolds and Mach number do.
    fn line() -> Vec<Condition> {
        let condition = |i: i32| {
            let share = f64::from(i) / 16.0;
            let (rotation_rad_s, turn_rad) = (120.0 + 180.0 * share, 0.05 * share);
            Condition { rotation_rad_s, turn_rad, ..at_speed(5.0 + 55.0 * share) }
        };
        (0..=16).map(condition).collect()
    }

    /// Each cell against its element solved by itself; its best angle is led over in a straight line between
    /// every eighth condition's.
    #[test]
    fn every_cell_tells_of_its_own_element() {
        let (rotor, line) = (rotor(|_| ()), line());
        let tip = rotor.blade.radius_m;
        let radii = [0.3 * tip, 0.5 * tip, 0.75 * tip, 0.9 * tip];
        let map = departure_map(&rotor, &line, &radii);
        assert_eq!((map.radii_m.as_slice(), map.cells.dim()), (radii.as_slice(), (4, 17)));
        let mut changes = 0;
        for (row, &r) in radii.iter().enumerate() {
            let ring = rotor.ring(r);
            let best = |i: usize| rotor.element(&ring, &line[i]).0.section.best().unwrap();
            for (column, at) in line.iter().enumerate() {
                let element = rotor.element(&ring, at).0;
                let balance = element.balance().unwrap();
                let (before, after) = (column / 8 * 8, (column / 8 * 8 + 8).min(16));
                let share = (column - before) as f64 / 8.0;
                let led = |of: fn(&Best) -> f64| (1.0 - share) * of(&best(before)) + share * of(&best(after));
                let (alpha, ratio) = (led(|b| b.alpha_rad), led(|b| b.lift_to_drag));
                let cell = map.cells[[row, column]];
                let close = |found: Option<f64>, wanted: f64| {
                    // Degrees and shares; the balance closes to 1e-9.
                    assert!((found.unwrap() - wanted).abs() < 1e-6, "{row} {column} {found:?} {wanted}");
                };
                close(cell.departure_deg, (balance.alpha_rad - alpha).to_degrees());
                close(cell.share_of_best, balance.section.cl / balance.section.cd / ratio);
                close(cell.past_stall_deg, (balance.alpha_rad - element.section.stall_rad()).to_degrees());
                changes += usize::from((alpha - best(before).alpha_rad).abs() > 1e-4);
            }
        }
        assert!(changes > 10, "{changes}: the best angle changes along the line");
    }

    /// Whatever is left of a line after its last eighth condition, at its end the best angle is its own.
    #[test]
    fn the_last_condition_has_its_own_best_angle() {
        let (rotor, line) = (rotor(|_| ()), line());
        for count in [1, 2, 8, 9, 12, 16, 17] {
            let (line, ring) = (&line[line.len() - count..], rotor.ring(0.5));
            let element = rotor.element(&ring, &line[count - 1]).0;
            let wanted = element.balance().unwrap().alpha_rad - element.section.best().unwrap().alpha_rad;
            let map = departure_map(&rotor, line, &[0.5]);
            let found = map.cells[[0, count - 1]].departure_deg.unwrap();
            assert!((found - wanted.to_degrees()).abs() < 1e-6, "{count}: {found} {wanted}");
        }
    }

    #[test]
    fn columns_carry_their_speed_and_rpm() {
        let (rotor, line) = (rotor(|_| ()), line());
        let map = departure_map(&rotor, &line, &[0.5]);
        for (i, share) in [(0, 0.0), (7, 7.0 / 16.0), (16, 1.0)] {
            let rpm = (120.0 + 180.0 * share) * 30.0 / std::f64::consts::PI;
            assert!((map.rpm[i] / rpm - 1.0).abs() < 1e-12);
            assert!((map.airspeeds_m_s[i] - (5.0 + 55.0 * share)).abs() < 1e-12);
        }
    }
}
