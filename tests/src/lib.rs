//! Outside checks of Spokeshave: published values, reference cases, other judges, real browsers.

#![forbid(unsafe_code)]

pub mod browser;
pub mod check;
pub mod formula;
pub mod goldstein;
pub mod goldstein_table;
pub mod judge;
pub mod page;
pub mod reference;
pub mod taken;
pub mod tunnel;
pub mod validation;
pub mod wood_case;

pub use spokeshave_prove::tools;
