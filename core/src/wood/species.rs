//! Materials that come with the program.
//!
//! Values at 12 % moisture: USDA Forest Products Laboratory, *Wood Handbook*, FPL-GTR-190 (2010), Table 5-3a.
//! Green values: the same table, from memory but for white ash, sugar maple, white oak and black cherry.
//! Moisture at which drying begins to tell: Table 5-13 (white ash, yellow birch, Sitka spruce, Douglas-fir),
//! 25 % for the others as the Handbook says. Ratio of the shear modulus along the blade to Young's modulus:
//! mean of `GLR/EL` and `GLT/EL` of Table 5-1, from memory; for sweet birch and beech, which that table does
//! not have, those of yellow birch. European beech: DIN 68364 (2003), from memory. Materials for small
//! blades: usual data-sheet values, from memory.

/// What sort of material it is: decides its scatter, what lasts under repeated load, and whether moisture
/// tells.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Kind {
    /// Wood of a broad-leaved tree, grain along the blade.
    Hardwood,
    /// Wood of a conifer, grain along the blade.
    Softwood,
    /// A plastic, moulded or printed.
    Plastic,
    /// A laminate, fibres along the blade.
    Composite,
}

/// A material of the program's.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Species {
    /// The word a job file calls it by.
    pub name: &'static str,
    /// The name for people.
    pub title: &'static str,
    /// Sort of material.
    pub kind: Kind,
    /// Density at 12 % moisture, kg/m³; of wood `1120` times its specific gravity (oven-dry weight, volume
    /// at 12 %).
    pub density_kg_m3: f64,
    /// Bending strength (modulus of rupture) at 12 % and green, megapascal.
    pub bending_mpa: [f64; 2],
    /// Young's modulus at 12 % and green, megapascal.
    pub modulus_mpa: [f64; 2],
    /// Greatest compression along the grain at 12 % and green, megapascal.
    pub compression_mpa: [f64; 2],
    /// Compression across the grain at its proportional limit, at 12 % and green, megapascal.
    pub crushing_mpa: [f64; 2],
    /// Shear along the grain at 12 % and green, megapascal.
    pub shear_mpa: [f64; 2],
    /// Moisture at which drying begins to tell, percent.
    pub meets_percent: f64,
    /// Shear modulus over Young's modulus.
    pub shear_share: f64,
    /// Where the values come from.
    pub source: &'static str,
}

const HANDBOOK: &str = "USDA Wood Handbook (FPL-GTR-190, 2010), Table 5-3a";
const GREEN_RECALLED: &str = "USDA Wood Handbook (FPL-GTR-190, 2010), Table 5-3a; green values from memory";
const RECALLED: &str = "usual data-sheet values, from memory";

/// A wood: specific gravity, then bending, modulus, compression along and across the grain, and shear, each
/// at 12 % and green.
// A row of the handbook in its own order.
#[allow(clippy::too_many_arguments)]
const fn wood(
    name: &'static str,
    title: &'static str,
    gravity: f64,
    bending_mpa: [f64; 2],
    modulus_mpa: [f64; 2],
    compression_mpa: [f64; 2],
    crushing_mpa: [f64; 2],
    shear_mpa: [f64; 2],
    more: (Kind, f64, f64, &'static str),
) -> Species {
    let density_kg_m3 = 1120.0 * gravity;
    let (kind, meets_percent, shear_share, source) = more;
    Species {
        name,
        title,
        kind,
        density_kg_m3,
        bending_mpa,
        modulus_mpa,
        compression_mpa,
        crushing_mpa,
        shear_mpa,
        meets_percent,
        shear_share,
        source,
    }
}

/// A material that takes no moisture: density; modulus, bending, compression, crushing and shear, megapascal.
const fn made(
    name: &'static str,
    title: &'static str,
    kind: Kind,
    density_kg_m3: f64,
    mpa: [f64; 5],
    shear_share: f64,
) -> Species {
    let [modulus, bending, compression, crushing, shear] = mpa;
    Species {
        name,
        title,
        kind,
        density_kg_m3,
        bending_mpa: [bending; 2],
        modulus_mpa: [modulus; 2],
        compression_mpa: [compression; 2],
        crushing_mpa: [crushing; 2],
        shear_mpa: [shear; 2],
        meets_percent: 25.0,
        shear_share,
        source: RECALLED,
    }
}

/// The materials a job may name.
#[rustfmt::skip]
pub const SPECIES: &[Species] = &[
    wood("sugar-maple", "sugar maple", 0.63, [109.0, 65.0], [12_600.0, 10_700.0], [54.0, 27.7], [10.1, 4.4], [16.1, 10.1], (Kind::Hardwood, 25.0, 0.087, HANDBOOK)),
    wood("yellow-birch", "yellow birch", 0.62, [114.0, 57.0], [13_900.0, 10_300.0], [56.3, 23.3], [6.7, 3.0], [13.0, 7.7], (Kind::Hardwood, 27.0, 0.071, GREEN_RECALLED)),
    wood("sweet-birch", "sweet birch", 0.65, [117.0, 65.0], [15_000.0, 11_400.0], [58.9, 25.8], [7.4, 3.2], [15.4, 8.5], (Kind::Hardwood, 25.0, 0.071, GREEN_RECALLED)),
    wood("white-ash", "white ash", 0.60, [103.0, 66.0], [12_000.0, 9_900.0], [51.1, 27.5], [8.0, 4.6], [13.2, 9.5], (Kind::Hardwood, 24.0, 0.093, HANDBOOK)),
    wood("white-oak", "white oak", 0.68, [105.0, 57.0], [12_300.0, 8_600.0], [51.3, 24.5], [7.4, 4.6], [13.8, 8.6], (Kind::Hardwood, 25.0, 0.086, HANDBOOK)),
    wood("red-oak", "northern red oak", 0.63, [99.0, 57.0], [12_500.0, 9_300.0], [46.6, 23.7], [7.0, 4.2], [12.3, 8.3], (Kind::Hardwood, 25.0, 0.085, GREEN_RECALLED)),
    wood("black-walnut", "black walnut", 0.55, [101.0, 66.0], [11_600.0, 9_800.0], [52.3, 29.6], [7.0, 3.4], [9.4, 8.4], (Kind::Hardwood, 25.0, 0.074, GREEN_RECALLED)),
    wood("american-beech", "American beech", 0.64, [103.0, 59.0], [11_900.0, 9_500.0], [50.3, 24.5], [7.0, 3.7], [13.9, 8.9], (Kind::Hardwood, 25.0, 0.071, GREEN_RECALLED)),
    wood("black-cherry", "black cherry", 0.50, [85.0, 55.0], [10_300.0, 9_000.0], [49.0, 24.4], [4.8, 2.5], [11.7, 7.8], (Kind::Hardwood, 25.0, 0.122, HANDBOOK)),
    wood("yellow-poplar", "yellow-poplar", 0.42, [70.0, 41.0], [10_900.0, 8_400.0], [38.2, 18.3], [3.4, 1.9], [8.2, 5.4], (Kind::Hardwood, 25.0, 0.072, GREEN_RECALLED)),
    wood("sitka-spruce", "Sitka spruce", 0.40, [70.0, 39.0], [10_800.0, 8_500.0], [38.7, 18.4], [4.0, 1.9], [7.9, 5.2], (Kind::Softwood, 27.0, 0.063, GREEN_RECALLED)),
    wood("douglas-fir", "Douglas-fir, coast", 0.48, [85.0, 53.0], [13_400.0, 10_800.0], [49.9, 26.1], [5.5, 2.6], [7.8, 6.2], (Kind::Softwood, 24.0, 0.071, GREEN_RECALLED)),
    wood("european-beech", "European beech", 0.64, [120.0, 68.0], [14_000.0, 11_200.0], [60.0, 29.0], [8.0, 4.2], [10.0, 6.4], (Kind::Hardwood, 25.0, 0.071, "DIN 68364 (2003), from memory; green values by the ratios of American beech")),
    made("pla", "printed PLA, layers along the blade", Kind::Plastic, 1_240.0, [3_300.0, 55.0, 60.0, 60.0, 30.0], 0.37),
    made("petg", "printed PETG, layers along the blade", Kind::Plastic, 1_270.0, [2_000.0, 45.0, 45.0, 45.0, 25.0], 0.37),
    made("glass-nylon", "nylon with 30 % short glass, moulded", Kind::Plastic, 1_360.0, [7_000.0, 120.0, 120.0, 100.0, 60.0], 0.37),
    made("glass-epoxy", "glass and epoxy, most fibres along the blade", Kind::Composite, 1_900.0, [30_000.0, 450.0, 300.0, 120.0, 40.0], 0.14),
    made("carbon-epoxy", "carbon and epoxy, most fibres along the blade", Kind::Composite, 1_550.0, [90_000.0, 900.0, 500.0, 120.0, 50.0], 0.06),
];

impl Species {
    /// The material of a name, whatever its case, with spaces or underscores in place of hyphens.
    #[must_use]
    pub fn named(name: &str) -> Option<&'static Self> {
        let plain = name.trim().to_lowercase().replace([' ', '_'], "-");
        SPECIES.iter().find(|s| s.name == plain || s.title.to_lowercase().replace(' ', "-") == plain)
    }
}
