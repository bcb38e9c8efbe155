//! The blade at one flight point and over the whole speed range: one radius axis, three readings.

pub mod map;
pub mod planform;
pub mod rack;
pub mod radius_axis;
pub mod station;
pub mod stations;
pub mod strip;

pub use map::{DepartureChart, FlightMark};
pub use planform::Planform;
pub use rack::{BladeRack, Ghost};
pub use radius_axis::RadiusAxis;
pub use station::StationCard;
pub use strip::BladeStrip;
