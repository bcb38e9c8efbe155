//! Sections as a beam sees them, against a finite-element tool of general use and closed forms.

use std::f64::consts::{PI, TAU};

use spokeshave::section::outline::{Outline, naca_four_digit};
use spokeshave::wood::section::{Section, Shape};

use crate::check::{Basis, Check, Mark};

const TOOLS: Basis = Basis {
    source: "sectionproperties 3.10.2 (meshes of some 3000 triangles; torsion constant by its warping \
             analysis) and shapely 2.2.0 (areas), both from the Python package index, on the very points \
             of the shipped outlines",
    mark: Mark::Computed,
    why: "0.1 % of the area, 0.2 and 0.5 % of the second moments: several times what laying the points on \
          the chord line changes; torsion 0.5 %: an approximation from below",
};

/// Area, second moments, torsion constant, in chords.
struct Known {
    name: &'static str,
    text: &'static str,
    /// Ordinates times this, and chord made 1 again.
    thicker: f64,
    area: f64,
    /// `∫ y² dA`, `∫ x² dA`, `∫ x y dA` about the centroid in the points' own axes.
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

const KNOWN: [Known; 5] = [
    outline(
        "clark-y",
        include_str!("../../../airfoils/clark-y/outline.dat"),
        1.0,
        0.080_951_266,
        [7.033_990e-5, 4.441_367e-3, -4.547_886e-6],
        2.540_612e-4,
    ),
    outline(
        "raf-6",
        include_str!("../../../airfoils/raf-6/outline.dat"),
        1.0,
        0.074_380_843,
        [5.166_677e-5, 4.412_506e-3, -5.975_738e-5],
        1.789_801e-4,
    ),
    outline(
        "naca-44xx",
        include_str!("../../../airfoils/naca-44xx/outline.dat"),
        1.0,
        0.082_425_774,
        [7.556_288e-5, 4.562_108e-3, 2.861_300e-5],
        2.667_264e-4,
    ),
    outline(
        "naca-00xx",
        include_str!("../../../airfoils/naca-00xx/outline.dat"),
        1.0,
        0.082_189_073,
        [6.805_220e-5, 4.536_603e-3, 0.0],
        2.662_527e-4,
    ),
    outline(
        "clark-y at 35 %",
        include_str!("../../../airfoils/clark-y/outline.dat"),
        3.0,
        0.242_856_840,
        [1.899_225e-3, 1.332_444e-2, -4.093_200e-5],
        5.818_890e-3,
    ),
];

fn section(known: &Known) -> Section {
    let drawn = Outline::read(known.text).expect("a shipped outline");
    let points: Vec<[f64; 2]> = drawn.points().iter().map(|p| [p[0], known.thicker * p[1]]).collect();
    let outline = Outline::from_points(known.name, &points).expect("an outline");
    Shape::of(&outline).sized(1.0, outline.thickness_ratio())
}

/// The shipped outlines, chord 1.
pub(super) fn shipped() -> Vec<Check> {
    let of = |known: &Known| {
        let section = section(known);
        let [flat, edge, product] = known.second;
        let (mean, radius) = (0.5 * (flat + edge), (0.5 * (edge - flat)).hypot(product));
        let (least, greatest, _) = section.principal();
        let name = known.name;
        [
            TOOLS.relative(format!("{name} area"), section.area_m2, known.area, 1e-3).unit("c²"),
            TOOLS.relative(format!("{name} least second moment"), least, mean - radius, 5e-3).unit("c⁴"),
            TOOLS
                .relative(format!("{name} greatest second moment"), greatest, mean + radius, 2e-3)
                .unit("c⁴"),
            TOOLS
                .relative(format!("{name} torsion constant"), section.torsion_m4, known.torsion, 5e-3)
                .unit("c⁴"),
        ]
    };
    KNOWN.iter().flat_map(of).collect()
}

const ELLIPSE: Basis = Basis {
    source: "closed forms of an ellipse: J = π a³ b³/(a² + b²), I = π a b³/4 (standard tables)",
    mark: Mark::Computed,
    why: "the ellipse is given by 400 points",
};

/// An ellipse of half axes 0.5 and 0.125.
pub(super) fn ellipse() -> Vec<Check> {
    let (a, b) = (0.5, 0.125_f64);
    let points: Vec<[f64; 2]> =
        (0..400).map(|i| f64::from(i) * TAU / 400.0).map(|t| [a + a * t.cos(), b * t.sin()]).collect();
    let outline = Outline::from_points("ellipse", &points).expect("an outline");
    let section = Shape::of(&outline).sized(1.0, outline.thickness_ratio());
    vec![
        ELLIPSE
            .relative("ellipse J", section.torsion_m4, PI * (a * b).powi(3) / (a * a + b * b), 3e-3)
            .unit("c⁴"),
        ELLIPSE.relative("ellipse I", section.flat_m4, PI * a * b.powi(3) / 4.0, 2e-3).unit("c⁴"),
    ]
}

const THIN: Basis = Basis {
    source: "thin aerofoil theory (H. Glauert): moment about the quarter chord of the 44xx mean line \
             −0.106, of a symmetric section none",
    mark: Mark::FromMemory,
    why: "half a unit of the last figure and the straight pieces of the outline: 0.003; none to 0.001",
};

/// The moment that twists a blade.
pub(super) fn moment() -> Vec<Check> {
    let moment = |camber, place| {
        let outline = naca_four_digit(camber, place, 0.06).expect("an outline");
        Shape::of(&outline).sized(1.0, outline.thickness_ratio()).moment
    };
    vec![
        THIN.within("4406 moment coefficient", moment(4, 4), -0.106, 0.003),
        THIN.within("0006 moment coefficient", moment(0, 0), 0.0, 1e-3),
    ]
}
