//! Drawing: projection, ticks, numbers and paths as plain tested code, and the parts every chart is made of.

pub mod axis;
pub mod clear;
pub mod departure;
pub mod field;
pub mod figure;
pub mod hatch;
pub mod line;
pub mod linear;
pub mod number;
pub mod path;
pub mod pointer;
pub mod spread;
pub mod ticks;
#[cfg(test)]
mod tokens;
pub mod unit;
pub mod width;
