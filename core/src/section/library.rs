//! The families that come with the program, packed from `airfoils/` at build time.
//!
//! A family may hold two sets of tables, for quiet air (amplification n = 9 at transition) and for disturbed air (n = 4); a job's
//! `method.n_crit` takes the nearest set.

use std::sync::{Arc, OnceLock};

use serde::Deserialize;

use super::family::{About, Family};
use super::outline::Outline;
use super::polar::{FEWEST_POINTS, Polar, PolarPoint};

#[derive(Debug, Deserialize)]
struct PackedFamily {
    name: String,
    title: String,
    origin: String,
    korn_factor: f64,
    face_angle_deg: Vec<(f64, f64)>,
    outline: String,
    polars: Vec<PackedPolar>,
}

#[derive(Debug, Deserialize)]
struct PackedPolar {
    thickness_ratio: f64,
    reynolds: f64,
    mach: f64,
    n_crit: f64,
    alpha: Vec<i16>,
    cl: Vec<i32>,
    cd: Vec<u32>,
}

/// One family; its tables are made ready when first asked for.
#[derive(Debug)]
struct Entry {
    packed: PackedFamily,
    by_n: Vec<(f64, OnceLock<Option<Arc<Family>>>)>,
    outline: OnceLock<Option<Outline>>,
}

/// All families that come with the program.
#[derive(Debug)]
pub struct Library {
    families: Vec<Entry>,
}

/// The library, unpacked on first use.
pub fn library() -> &'static Library {
    static LIBRARY: OnceLock<Library> = OnceLock::new();
    LIBRARY.get_or_init(|| {
        let packed: Vec<PackedFamily> =
            postcard::from_bytes(include_bytes!(concat!(env!("OUT_DIR"), "/airfoils.bin")))
                .unwrap_or_default();
        Library { families: packed.into_iter().map(entry).collect() }
    })
}

impl Library {
    /// Names of the families, in order.
    pub fn names(&self) -> impl Iterator<Item = &str> {
        self.families.iter().map(|f| f.packed.name.as_str())
    }

    /// The family of a name, with the set of tables whose n is nearest to `n_crit`.
    #[must_use]
    pub fn family(&self, name: &str, n_crit: f64) -> Option<&Arc<Family>> {
        let entry = self.entry(name)?;
        let off = |n: f64| (n - n_crit).abs();
        let (n, set) = entry.by_n.iter().min_by(|a, b| off(a.0).total_cmp(&off(b.0)))?;
        set.get_or_init(|| one_set(&entry.packed, *n).map(Arc::new)).as_ref()
    }

    /// The outline of a family at a thickness ratio, where the family has one and it can be drawn that thick.
    #[must_use]
    pub fn outline(&self, name: &str, thickness_ratio: f64) -> Option<Outline> {
        let entry = self.entry(name)?;
        let base = entry.outline.get_or_init(|| Outline::read(&entry.packed.outline).ok()).as_ref()?;
        base.scaled_to(thickness_ratio).ok()
    }

    /// The values of n for which a family has tables.
    #[must_use]
    pub fn n_crits(&self, name: &str) -> Vec<f64> {
        self.entry(name).map_or_else(Vec::new, |e| e.by_n.iter().map(|(n, _)| *n).collect())
    }

    fn entry(&self, name: &str) -> Option<&Entry> {
        self.families.iter().find(|f| f.packed.name == name)
    }
}

fn entry(packed: PackedFamily) -> Entry {
    let mut ns: Vec<f64> = packed.polars.iter().map(|p| p.n_crit).collect();
    ns.sort_by(f64::total_cmp);
    ns.dedup();
    let by_n = ns.into_iter().map(|n| (n, OnceLock::new())).collect();
    Entry { packed, by_n, outline: OnceLock::new() }
}

fn one_set(packed: &PackedFamily, n: f64) -> Option<Family> {
    let about = About {
        name: packed.name.clone(),
        title: packed.title.clone(),
        origin: packed.origin.clone(),
        face_angle_deg: packed.face_angle_deg.clone(),
        korn_factor: packed.korn_factor,
    };
    let of_n = packed.polars.iter().filter(|p| p.n_crit == n && p.alpha.len() >= FEWEST_POINTS);
    Family::new(about, &of_n.map(polar).collect::<Vec<_>>()).ok()
}

fn polar(packed: &PackedPolar) -> Polar {
    let figures = packed.alpha.iter().zip(&packed.cl).zip(&packed.cd);
    let points = figures
        .map(|((&a, &cl), &cd)| PolarPoint {
            alpha_deg: f64::from(a) / 100.0,
            cl: f64::from(cl) / 1e4,
            cd: f64::from(cd) / 1e5,
        })
        .collect();
    Polar {
        reynolds: Some(packed.reynolds),
        mach: packed.mach,
        thickness_ratio: Some(packed.thickness_ratio),
        points,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_family_that_is_shipped_unpacks() {
        let names: Vec<&str> = library().names().collect();
        assert!(names.contains(&"clark-y"));
        for name in names {
            let sets = library().n_crits(name);
            assert!(!sets.is_empty(), "{name} has no tables");
            assert!(
                sets.iter().all(|n| library().family(name, *n).is_some()),
                "{name}'s tables are not usable"
            );
        }
    }
}
