//! The families that come with the program, packed from `airfoils/` at build time.
//!
//! A family may hold two sets of tables, for quiet air (amplification n = 9 at transition) and for disturbed
//! air (n = 4); a job's `method.n_crit` takes the nearest set.

use std::sync::{Arc, OnceLock};

use super::family::{About, Family};
use super::outline::Outline;
use super::packed::{ALPHA_STEPS, CD_STEPS, CL_STEPS, PackedFamily, PackedPolar};
use super::polar::{FEWEST_POINTS, Polar, PolarPoint};

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
        set.get_or_init(|| one_set(entry, *n).map(Arc::new)).as_ref()
    }

    /// Whether a family's outline is known.
    #[must_use]
    pub fn has_outline(&self, name: &str) -> bool {
        self.entry(name).is_some_and(|e| !e.packed.outline.is_empty())
    }

    /// The outline of a family at a thickness ratio, where the family has one and it can be drawn that thick.
    #[must_use]
    pub fn outline(&self, name: &str, thickness_ratio: f64) -> Option<Outline> {
        self.entry(name)?.outline(thickness_ratio)
    }

    /// Title of a family.
    #[must_use]
    pub fn title(&self, name: &str) -> Option<&str> {
        Some(&self.entry(name)?.packed.title)
    }

    /// Whether a family has a flat face to lay a protractor on.
    #[must_use]
    pub fn has_face(&self, name: &str) -> bool {
        self.entry(name).is_some_and(|e| !e.packed.face_angle_deg.is_empty())
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

/// Thickness ratios past those of the tables at which the face angle is measured: roots are that thick.
const ROOTS: [f64; 4] = [0.3, 0.4, 0.5, 0.6];

impl Entry {
    /// The outline at a thickness ratio.
    fn outline(&self, thickness_ratio: f64) -> Option<Outline> {
        let base = self.outline.get_or_init(|| Outline::read(&self.packed.outline).ok()).as_ref()?;
        base.scaled_to(thickness_ratio).ok()
    }

    /// Angle from the flat face to the chord line by thickness ratio, as far as the section can be drawn.
    fn face_angles_deg(&self) -> Vec<(f64, f64)> {
        let mut angles = self.packed.face_angle_deg.clone();
        let Some(&(thickest, _)) = angles.last() else { return angles };
        let measured = |t: &f64| Some((*t, self.outline(*t)?.face_angle_rad()?.to_degrees()));
        angles.extend(ROOTS.iter().filter(|t| **t > thickest).filter_map(measured));
        angles
    }
}

fn one_set(entry: &Entry, n: f64) -> Option<Family> {
    let packed = &entry.packed;
    let about = About {
        name: packed.name.clone(),
        title: packed.title.clone(),
        origin: packed.origin.clone(),
        face_angle_deg: entry.face_angles_deg(),
        korn_factor: packed.korn_factor,
    };
    let of_n =
        polars(packed).into_iter().filter(|(p, points)| p.n_crit == n && points.len() >= FEWEST_POINTS);
    Family::new(about, &of_n.map(|(head, points)| polar(head, points)).collect::<Vec<_>>()).ok()
}

/// All tables of a family with their rows.
fn polars(packed: &PackedFamily) -> Vec<(&PackedPolar, Vec<PolarPoint>)> {
    let (cl, cd) = (packed.cl.unpack(CL_STEPS), packed.cd.unpack(CD_STEPS));
    let alpha = packed.alpha.unpack(ALPHA_STEPS).into_iter();
    let mut rows =
        alpha.zip(cl).zip(cd).map(|((alpha_deg, cl), cd)| PolarPoint { alpha_deg, cl, cd, cm: None });
    packed.polars.iter().map(|head| (head, rows.by_ref().take(head.points).collect())).collect()
}

fn polar(head: &PackedPolar, points: Vec<PolarPoint>) -> Polar {
    Polar {
        reynolds: Some(head.reynolds),
        mach: head.mach,
        thickness_ratio: Some(head.thickness_ratio),
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
        assert!(!library().has_outline("no such section"));
        for name in names {
            let sets = library().n_crits(name);
            assert!(!sets.is_empty(), "{name} has no tables");
            assert_eq!(library().has_outline(name), library().outline(name, 0.12).is_some(), "{name}");
            assert!(
                sets.iter().all(|n| library().family(name, *n).is_some()),
                "{name}'s tables are not usable"
            );
        }
    }

    /// A root is thicker than any table; the protractor lies on its face all the same.
    #[test]
    fn the_face_angle_of_a_thick_root_is_that_of_its_outline() {
        for name in ["clark-y", "raf-6"] {
            let family = library().family(name, 9.0).unwrap();
            for t in [0.15, 0.27, 0.35, 0.5] {
                let drawn = library().outline(name, t).unwrap().face_angle_rad().unwrap().to_degrees();
                let told = family.face_angle_rad(t).unwrap().to_degrees();
                assert!((drawn - told).abs() < 0.1, "{name} {t}: {told} where {drawn} is drawn");
            }
        }
    }

    #[test]
    fn the_shipped_figures_are_those_of_the_folder() {
        let rows = include_str!("../../../airfoils/raf-6/polars.csv").lines().skip(1);
        let rows: Vec<Vec<&str>> =
            rows.map(|l| l.split(',').collect()).filter(|r: &Vec<_>| r[10] == "ok").collect();
        let packed = &library().entry("raf-6").unwrap().packed;
        let points: Vec<PolarPoint> = polars(packed).into_iter().flat_map(|(_, points)| points).collect();
        assert_eq!(points.len(), rows.len());
        for (point, row) in points.iter().zip(&rows) {
            let figure = |i: usize| row[i].parse::<f64>().unwrap();
            assert_eq!([point.alpha_deg, point.cl, point.cd], [figure(4), figure(5), figure(6)]);
        }
    }
}
