//! The compact form of the section tables: `build.rs` writes it, `library` reads it.
//!
//! Figures are whole numbers at the precision of the tables (angles in 0.01°, lift in 1e-4, drag in 1e-5),
//! one long column of each for a family, kept as second differences: curves are smooth, so that these are
//! small and compress well.

use serde::{Deserialize, Serialize};

/// Steps of angle in a degree.
pub(crate) const ALPHA_STEPS: f64 = 1e2;
/// Steps of lift coefficient in one.
pub(crate) const CL_STEPS: f64 = 1e4;
/// Steps of drag coefficient in one.
pub(crate) const CD_STEPS: f64 = 1e5;

/// A family with all of its tables.
#[derive(Debug, Default, Serialize, Deserialize)]
pub(crate) struct PackedFamily {
    pub(crate) name: String,
    pub(crate) title: String,
    pub(crate) origin: String,
    pub(crate) korn_factor: f64,
    pub(crate) face_angle_deg: Vec<(f64, f64)>,
    pub(crate) outline: String,
    pub(crate) polars: Vec<PackedPolar>,
    pub(crate) alpha: Column,
    pub(crate) cl: Column,
    pub(crate) cd: Column,
}

/// What one table holds; its rows are the next `points` of the columns.
#[derive(Debug, PartialEq, Serialize, Deserialize)]
pub(crate) struct PackedPolar {
    pub(crate) thickness_ratio: f64,
    pub(crate) reynolds: f64,
    pub(crate) mach: f64,
    pub(crate) n_crit: f64,
    pub(crate) points: usize,
}

/// Whole numbers by their second differences.
#[derive(Debug, Default, Serialize, Deserialize)]
pub(crate) struct Column(pub(crate) Vec<i32>);

impl Column {
    /// The figures again.
    pub(crate) fn unpack(&self, steps: f64) -> Vec<f64> {
        let (mut last, mut slope) = (0i32, 0i32);
        let mut next = |bend: &i32| {
            slope = slope.wrapping_add(*bend);
            last = last.wrapping_add(slope);
            f64::from(last) / steps
        };
        self.0.iter().map(&mut next).collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_column_is_summed_twice() {
        let column = Column(vec![-1000, 1050, 0, 25]);
        assert_eq!(column.unpack(ALPHA_STEPS), [-10.0, -9.5, -9.0, -8.25]);
        assert!(Column::default().unpack(CL_STEPS).is_empty());
    }
}
