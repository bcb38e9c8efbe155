//! Outlines of sections.

use super::said;
use spokeshave::section::outline::Outline;
use spokeshave::wood::section::Shape;

pub(crate) fn read(text: &str) {
    let outline = match Outline::read(text) {
        Ok(outline) => outline,
        Err(e) => return said(&e.to_string()),
    };
    let t = outline.thickness_ratio();
    assert!(t.is_finite() && t > 0.0, "thickness {t}");
    assert!(outline.points().iter().flatten().all(|v| v.is_finite()), "points");
    assert!(outline.sampled(40).iter().flatten().all(|v| v.is_finite()), "points between");
    let shape = Shape::of(&outline);
    assert!(shape.area > 0.0 && shape.flat > 0.0 && shape.torsion > 0.0, "{shape:?}");
    for changed in [outline.scaled_to(0.12), outline.with_edge_thickness(0.004)] {
        match changed {
            Ok(changed) => assert!(changed.thickness_ratio().is_finite(), "changed"),
            Err(e) => said(&e.to_string()),
        }
    }
}
