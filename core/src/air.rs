//! Air.
