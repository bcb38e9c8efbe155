//! Packs `airfoils/*/polars.csv` and `family.json` into one compact table that the library embeds.
//!
//! Figures are kept as integers at the precision of the tables: angles in 0.01°, lift in 1e-4, drag in 1e-5.

use std::error::Error;
use std::path::{Path, PathBuf};

use serde::{Deserialize, Serialize};

#[derive(Deserialize)]
struct FamilyFile {
    name: String,
    title: String,
    origin: String,
    korn_ka: f64,
    #[serde(default)]
    face_angle_deg: Vec<FaceAngle>,
}

#[derive(Deserialize)]
struct FaceAngle {
    thickness_ratio: f64,
    angle_deg: f64,
}

#[derive(Deserialize)]
struct Row {
    thickness_ratio: f64,
    reynolds: f64,
    mach: f64,
    n_crit: f64,
    alpha_deg: f64,
    cl: Option<f64>,
    cd: Option<f64>,
    state: String,
}

#[derive(Serialize)]
struct PackedFamily {
    name: String,
    title: String,
    origin: String,
    korn_factor: f64,
    face_angle_deg: Vec<(f64, f64)>,
    outline: String,
    polars: Vec<PackedPolar>,
}

#[derive(Serialize)]
struct PackedPolar {
    thickness_ratio: f64,
    reynolds: f64,
    mach: f64,
    n_crit: f64,
    alpha: Vec<i16>,
    cl: Vec<i32>,
    cd: Vec<u32>,
}

fn main() -> Result<(), Box<dyn Error>> {
    let root = PathBuf::from(std::env::var("CARGO_MANIFEST_DIR")?).join("../airfoils");
    println!("cargo::rerun-if-changed={}", root.display());
    let mut folders: Vec<PathBuf> = std::fs::read_dir(&root)?
        .filter_map(Result::ok)
        .map(|e| e.path())
        .filter(|p| p.join("polars.csv").is_file())
        .collect();
    folders.sort();
    let families = folders.iter().map(|f| pack(f)).collect::<Result<Vec<_>, _>>()?;
    let out = PathBuf::from(std::env::var("OUT_DIR")?).join("airfoils.bin");
    std::fs::write(out, postcard::to_allocvec(&families)?)?;
    Ok(())
}

fn pack(folder: &Path) -> Result<PackedFamily, Box<dyn Error>> {
    let family: FamilyFile = serde_json::from_slice(&std::fs::read(folder.join("family.json"))?)?;
    let mut polars: Vec<PackedPolar> = Vec::new();
    for row in csv::Reader::from_path(folder.join("polars.csv"))?.deserialize() {
        let row: Row = row?;
        let same = |p: &PackedPolar| {
            (p.thickness_ratio, p.reynolds, p.mach, p.n_crit)
                == (row.thickness_ratio, row.reynolds, row.mach, row.n_crit)
        };
        if !polars.last().is_some_and(same) {
            polars.push(PackedPolar {
                thickness_ratio: row.thickness_ratio,
                reynolds: row.reynolds,
                mach: row.mach,
                n_crit: row.n_crit,
                alpha: vec![],
                cl: vec![],
                cd: vec![],
            });
        }
        // A row the solver could not answer stays out; nothing stands in for it.
        if let (Some(polar), "ok", Some(cl), Some(cd)) =
            (polars.last_mut(), row.state.as_str(), row.cl, row.cd)
        {
            polar.alpha.push((row.alpha_deg * 100.0).round() as i16);
            polar.cl.push((cl * 1e4).round() as i32);
            polar.cd.push((cd * 1e5).round() as u32);
        }
    }
    Ok(PackedFamily {
        name: family.name,
        title: family.title,
        origin: family.origin,
        korn_factor: family.korn_ka,
        face_angle_deg: family.face_angle_deg.iter().map(|f| (f.thickness_ratio, f.angle_deg)).collect(),
        outline: std::fs::read_to_string(folder.join("outline.dat")).unwrap_or_default(),
        polars,
    })
}
