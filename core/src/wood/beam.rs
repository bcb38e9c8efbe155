//! A slender beam clamped at its root, by plain arrays: tension, bending, deflection, twist, natural
//! frequencies.
//!
//! Every function takes radii from root to tip (m, rising, at least two, measured from the axis of rotation)
//! and figures per metre of radius at those radii, taken as straight lines between them.

mod banded;
mod bending;
mod figures;
mod integrate;
mod modes;
mod offset;
#[cfg(test)]
mod tests;
mod twisting;

pub use bending::{Bending, BendingMode};
pub(crate) use figures::at;
pub use integrate::{bending_n_m, first_moment, outboard, second_moment, tension_n, total};
pub use offset::Offset;
pub use twisting::Twisting;
