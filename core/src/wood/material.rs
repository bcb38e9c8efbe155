//! The material of a job: what the wood is worth at its moisture, and how much of that may be asked of it.

use super::WoodError;
use super::moisture::at_moisture;
use super::species::{Kind, SPECIES, Species};
use crate::job::{OwnMaterial, Species as Named, Wood};

/// A material as the blade has it.
#[derive(Clone, Debug, PartialEq)]
pub struct Material {
    /// The name for people.
    pub title: String,
    /// Where the values come from.
    pub source: String,
    /// Density, kg/m³.
    pub density_kg_m3: f64,
    /// Young's modulus along the blade, Pa.
    pub modulus_pa: f64,
    /// Shear modulus, Pa.
    pub shear_modulus_pa: f64,
    /// Tension along the blade.
    pub tension: Strength,
    /// Compression along the blade.
    pub compression: Strength,
    /// Shear along the grain.
    pub shear: Strength,
    /// Crushing across the grain, where plates and bolts press.
    pub crushing: Strength,
}

/// How much of a strength may be asked: `mean (1 − 1.645 scatter) lasting / safety`, or the user's own limit.
///
/// In compression along the grain the strength of wood is its proportional limit, below which no fibres
/// buckle and repeated load takes nothing (ANC-18, *Design of Wood Aircraft Structures*, section 2.1: 0.75 of
/// the crushing strength of hardwoods, 0.80 of softwoods).
#[derive(Clone, Debug, PartialEq)]
pub struct Strength {
    /// Mean strength of the material at its moisture, Pa.
    pub mean_pa: f64,
    /// Most stress, Pa.
    pub limit_pa: f64,
    /// How the limit came about.
    pub reason: String,
}

/// What is taken off a mean strength.
#[derive(Clone, Copy)]
struct Taken {
    scatter: f64,
    lasting: f64,
    safety: f64,
}

/// Coefficients of variation of clear wood: bending, compression along, shear, compression across (Wood
/// Handbook, FPL-GTR-190, Table 5-6; from memory).
const WOOD_SCATTER: [f64; 4] = [0.16, 0.18, 0.14, 0.28];
/// Share of the static strength that clear straight-grained wood keeps over tens of millions of loadings
/// (Wood Handbook, FPL-GTR-190, chapter 5, fatigue; from memory).
const WOOD_LASTS: f64 = 0.5;
/// Moisture at which a wood's density is given, percent.
const USUAL_MOISTURE: f64 = 12.0;

/// Scatter of the four strengths and what lasts, by kind; for other materials than wood from memory, on the
/// low side.
fn habits(kind: Kind) -> ([f64; 4], f64) {
    match kind {
        Kind::Hardwood | Kind::Softwood => (WOOD_SCATTER, WOOD_LASTS),
        Kind::Plastic => ([0.10; 4], 0.3),
        Kind::Composite => ([0.10; 4], 0.4),
    }
}

/// The material of a job.
///
/// # Errors
/// [`WoodError::UnknownSpecies`] for a name that is not in [`SPECIES`].
pub fn material(wood: &Wood) -> Result<Material, WoodError> {
    let mut m = match &wood.species {
        Named::Own(own) => own_material(own, wood),
        Named::Named(name) => {
            let species = Species::named(name).ok_or_else(|| WoodError::UnknownSpecies {
                name: name.clone(),
                known: SPECIES.iter().map(|s| s.name).collect::<Vec<_>>().join(", "),
            })?;
            known_material(species, wood)
        }
    };
    for (strength, own) in [
        (&mut m.tension, wood.limits.tension_pa),
        (&mut m.compression, wood.limits.compression_pa),
        (&mut m.shear, wood.limits.shear_pa),
    ] {
        if let Some(limit_pa) = own {
            strength.limit_pa = limit_pa;
            strength.reason = format!("{}: the job's own limit", said(limit_pa));
        }
    }
    Ok(m)
}

/// A limit in the units of either bench.
fn said(limit_pa: f64) -> String {
    // A pound-force per square inch, as it is defined.
    const PSI_PA: f64 = 6894.757;
    format!("{:.1} MPa ({:.0} psi)", limit_pa / 1e6, limit_pa / PSI_PA)
}

/// Whether a job's material is known to be wood, which takes up moisture and has grain.
#[must_use]
pub fn is_wood(wood: &Wood) -> bool {
    match &wood.species {
        Named::Own(_) => false,
        Named::Named(name) => {
            Species::named(name).is_none_or(|s| matches!(s.kind, Kind::Hardwood | Kind::Softwood))
        }
    }
}

fn known_material(s: &Species, wood: &Wood) -> Material {
    let moisture = wood.moisture_percent;
    let wet = |[dry, green]: [f64; 2]| 1e6 * at_moisture(dry, green, s.meets_percent, moisture);
    let modulus_pa = wet(s.modulus_mpa);
    let ([bending, along, shear, across], lasting) = habits(s.kind);
    let taken = |scatter| Taken { scatter, lasting, safety: wood.safety_factor };
    let strength = |mpa, scatter| taken(scatter).off(wet(mpa));
    let pressed = |share: f64| taken(along).off_threshold(share, wet(s.compression_mpa));
    // The oven-dry wood stays, its water changes; the swelling of the volume is left out, less than 2 %.
    let heavier = match s.kind {
        Kind::Hardwood | Kind::Softwood => (100.0 + moisture) / (100.0 + USUAL_MOISTURE),
        Kind::Plastic | Kind::Composite => 1.0,
    };
    Material {
        title: s.title.into(),
        source: s.source.into(),
        density_kg_m3: s.density_kg_m3 * heavier,
        modulus_pa,
        shear_modulus_pa: s.shear_share * modulus_pa,
        tension: strength(s.bending_mpa, bending),
        compression: match s.kind {
            Kind::Hardwood => pressed(0.75),
            Kind::Softwood => pressed(0.80),
            Kind::Plastic | Kind::Composite => strength(s.compression_mpa, along),
        },
        shear: strength(s.shear_mpa, shear),
        crushing: strength(s.crushing_mpa, across),
    }
}

fn own_material(own: &OwnMaterial, wood: &Wood) -> Material {
    let bending = own.bending_strength_pa;
    let strength = |pa: f64, i: usize| {
        let scatter = own.scatter.unwrap_or(WOOD_SCATTER[i]);
        let lasting = own.lasting_share.unwrap_or(WOOD_LASTS);
        Taken { scatter, lasting, safety: wood.safety_factor }.off(pa)
    };
    Material {
        title: own.name.clone(),
        source: "the job's own values".into(),
        density_kg_m3: own.density_kg_m3,
        modulus_pa: own.modulus_pa,
        shear_modulus_pa: own.shear_modulus_pa.unwrap_or(own.modulus_pa / 14.0),
        tension: strength(bending, 0),
        compression: strength(own.compression_strength_pa.unwrap_or(0.75 * bending), 1),
        shear: strength(own.shear_strength_pa.unwrap_or(bending / 10.0), 2),
        crushing: strength(own.crushing_strength_pa.unwrap_or(bending / 15.0), 3),
    }
}

impl Taken {
    /// One in twenty pieces is weaker than `mean (1 − 1.645 scatter)` where strength is normally distributed.
    fn off(self, mean_pa: f64) -> Strength {
        let low = mean_pa * (1.0 - 1.645 * self.scatter);
        let limit_pa = low * self.lasting / self.safety;
        let reason = format!(
            "{}: mean {:.1} MPa, of which 19 pieces in 20 reach {:.1} MPa (scatter {:.0} %), {:.0} % of that under \
             repeated load, over a safety factor of {}",
            said(limit_pa),
            mean_pa / 1e6,
            low / 1e6,
            100.0 * self.scatter,
            100.0 * self.lasting,
            self.safety
        );
        Strength { mean_pa, limit_pa, reason }
    }

    /// The same for the share of a mean strength below which repeated load takes nothing.
    fn off_threshold(self, share: f64, crushing_pa: f64) -> Strength {
        let mean_pa = share * crushing_pa;
        let limit_pa = mean_pa * (1.0 - 1.645 * self.scatter) / self.safety;
        let reason = format!(
            "{}: proportional limit {:.1} MPa ({share} of the mean crushing strength {:.1} MPa), of which 19 \
             pieces in 20 reach {:.1} MPa (scatter {:.0} %), over a safety factor of {}",
            said(limit_pa),
            mean_pa / 1e6,
            crushing_pa / 1e6,
            limit_pa * self.safety / 1e6,
            100.0 * self.scatter,
            self.safety
        );
        Strength { mean_pa, limit_pa, reason }
    }
}
