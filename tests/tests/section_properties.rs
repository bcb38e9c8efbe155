//! Sections as a beam sees them, against a finite-element tool of general use and closed forms.
//!
//! Values: `sectionproperties` 3.10.2 (meshes of some 3000 triangles; torsion constant by its warping analysis) and `shapely` 2.2.0 (areas), both from the Python package index,
//! on the very points of the shipped outlines.

use spokeshave::section::outline::{Outline, naca_four_digit};
use spokeshave::wood::section::{Section, Shape};

/// Area, least and greatest second moment, torsion constant, in chords.
struct Known {
    name: &'static str,
    text: &'static str,
    /// Ordinates times this, and chord made 1 again.
    thicker: f64,
    area: f64,
    second: [f64; 3],
    torsion: f64,
}

const fn outline(
    name: &'static str,
    text: &'static str,
    thicker: f64,
    area: f64,
    second: [f64; 3],
    torsion: f64,
) -> Known {
    Known { name, text, thicker, area, second, torsion }
}

/// `second`: `∫ y² dA`, `∫ x² dA`, `∫ x y dA` about the centroid in the points' own axes.
const KNOWN: [Known; 5] = [
    outline(
        "clark-y",
        include_str!("../../airfoils/clark-y/outline.dat"),
        1.0,
        0.080_951_266,
        [7.033_990e-5, 4.441_367e-3, -4.547_886e-6],
        2.540_612e-4,
    ),
    outline(
        "raf-6",
        include_str!("../../airfoils/raf-6/outline.dat"),
        1.0,
        0.074_380_843,
        [5.166_677e-5, 4.412_506e-3, -5.975_738e-5],
        1.789_801e-4,
    ),
    outline(
        "naca-44xx",
        include_str!("../../airfoils/naca-44xx/outline.dat"),
        1.0,
        0.082_425_774,
        [7.556_288e-5, 4.562_108e-3, 2.861_300e-5],
        2.667_264e-4,
    ),
    outline(
        "naca-00xx",
        include_str!("../../airfoils/naca-00xx/outline.dat"),
        1.0,
        0.082_189_073,
        [6.805_220e-5, 4.536_603e-3, 0.0],
        2.662_527e-4,
    ),
    outline(
        "clark-y at 35 %",
        include_str!("../../airfoils/clark-y/outline.dat"),
        3.0,
        0.242_856_840,
        [1.899_225e-3, 1.332_444e-2, -4.093_200e-5],
        5.818_890e-3,
    ),
];

fn near(what: &str, got: f64, expected: f64, rel: f64) {
    assert!((got - expected).abs() <= rel * expected.abs(), "{what}: got {got}, expected {expected}");
}

fn section(known: &Known) -> Section {
    let drawn = Outline::read(known.text).expect("a shipped outline");
    let points: Vec<[f64; 2]> = drawn.points().iter().map(|p| [p[0], known.thicker * p[1]]).collect();
    let outline = Outline::from_points(known.name, &points).expect("an outline");
    Shape::of(&outline).sized(1.0, outline.thickness_ratio())
}

#[test]
fn validate_sections_sectionproperties() {
    for known in &KNOWN {
        let section = section(known);
        let [flat, edge, product] = known.second;
        let (mean, radius) = (0.5 * (flat + edge), (0.5 * (edge - flat)).hypot(product));
        let (least, greatest, _) = section.principal();
        near(&format!("{} area", known.name), section.area_m2, known.area, 1e-3);
        near(&format!("{} least", known.name), least, mean - radius, 5e-3);
        near(&format!("{} greatest", known.name), greatest, mean + radius, 2e-3);
        near(&format!("{} torsion", known.name), section.torsion_m4, known.torsion, 5e-3);
    }
}

/// An ellipse of half axes a and b: `J = π a³ b³/(a² + b²)`, `I = π a b³/4` (standard tables).
#[test]
fn an_ellipse_has_its_closed_forms() {
    let (a, b) = (0.5, 0.125_f64);
    let points: Vec<[f64; 2]> = (0..=400)
        .map(|i| f64::from(i) * std::f64::consts::TAU / 400.0)
        .map(|t| [a + a * t.cos(), b * t.sin()])
        .collect();
    let outline = Outline::from_points("ellipse", &points[..400]).expect("an outline");
    let section = Shape::of(&outline).sized(1.0, outline.thickness_ratio());
    let pi = std::f64::consts::PI;
    near("J", section.torsion_m4, pi * (a * b).powi(3) / (a * a + b * b), 3e-3);
    near("I", section.flat_m4, pi * a * b.powi(3) / 4.0, 2e-3);
}

/// Thin aerofoil theory gives the 44xx mean line −0.106 about the quarter chord, a symmetric section nothing (H. Glauert; value from memory).
#[test]
fn the_moment_is_that_of_thin_aerofoil_theory() {
    let moment = |camber, place| {
        let outline = naca_four_digit(camber, place, 0.06).expect("an outline");
        Shape::of(&outline).sized(1.0, outline.thickness_ratio()).moment
    };
    assert!((moment(4, 4) + 0.106).abs() < 0.003, "{}", moment(4, 4));
    assert!(moment(0, 0).abs() < 1e-3, "{}", moment(0, 0));
}
