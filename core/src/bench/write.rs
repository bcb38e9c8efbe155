//! Files: one module per format, each from a plain drawing, a sheet or the surface.

mod dxf;
mod pdf;
mod stl;
mod surface;
mod svg;

pub use dxf::dxf;
pub use pdf::pdf;
pub use stl::stl;
pub use surface::surface_csv;
pub use svg::{picture, svg};
