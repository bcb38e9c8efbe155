//! Work that takes seconds, done in a worker: what is ordered and reported as plain data, the worker's side,
//! the page's side.

pub mod hand;
pub mod polars;
pub mod shape;
pub mod worker;
