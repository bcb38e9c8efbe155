//! From the drawing to wood: where every section stands, the solid, the blank, the sheets of paper and the
//! files.
//!
//! Frame: the first blade along `x`, the direction in which it turns along `y` (a propeller that turns
//! clockwise seen from behind; against it for the other), the direction of flight along `z`. The rear of the
//! blank looks aft and lies down on the bench; its front looks ahead. Of the blade the flat, rear side is the
//! face, the cambered, forward one the back (common practice). Lengths are metres in the geometry and
//! millimetres on paper.
//!
//! Sections lie in planes square to the blade, each with its centroid (or a point of its chord line) on the
//! stacking line. Nothing here judges strength.

mod blank;
pub(crate) mod draw;
mod error;
mod file;
mod form;
mod loft;
pub(crate) mod page;
mod pierce;
mod ring;
mod shape;
pub(crate) mod sheet;
mod solid;
pub(crate) mod stock;
mod turned;
mod unit;
mod work;
mod write;

pub use crate::drilling::{Hole, Pattern};
pub use blank::{Blank, Heights, Layers, Plank};
pub use draw::{Anchor, Drawing, Item, Layer, Stroke, Text};
pub use error::{BenchError, Fault};
pub use file::{File, files, sheet_files};
pub use form::{Form, SIDE_POINTS};
pub use loft::{Boss, loft, root_radius_m};
pub use page::{Leaf, Paper, Sheet, View, bind, lay};
pub use ring::Ring;
pub use sheet::{Card, Side, leaves, machine_drawings, stack_drawing, template_card};
pub use solid::Solid;
pub use turned::{Face, turned};
pub use unit::Unit;
pub use work::{Bench, Carved};
pub use write::{dxf, pdf, picture, stl, surface_csv, svg};
