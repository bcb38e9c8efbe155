//! Blade sections: outlines, tables of lift and drag, the best angle, and what lies beyond the tables.

mod best;
mod curves;
mod extend;
mod family;
pub mod import;
mod library;
mod local;
pub mod make;
pub mod outline;
mod packed;
mod polar;
pub mod solver;
mod table;

pub use best::{BAND_SHARE, Best, best, working_band};
pub use curves::{SectionCurve, section_curves};
pub use extend::{BLADE_ASPECT_RATIO, Coefficients, Extension};
pub use family::{About, Family, Landmarks, Outside};
pub use library::{Library, library};
pub use local::{Local, Situation};
pub(crate) use polar::check_polars;
pub use polar::{FEWEST_POINTS, MOST_POINTS, MOST_POLARS, Polar, PolarPoint, TableError};
pub use table::{FaceAngle, Table};
