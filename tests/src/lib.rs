//! Outside checks of Spokeshave: published values, reference cases, other judges, real browsers.

pub mod reference;
