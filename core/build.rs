//! Packs `airfoils/*/polars.csv` and `family.json` into one compact table that the library embeds.

use std::error::Error;
use std::path::{Path, PathBuf};

use serde::Deserialize;

use packed::{ALPHA_STEPS, CD_STEPS, CL_STEPS, Column, PackedFamily, PackedPolar};

#[expect(dead_code, reason = "only the library unpacks")]
#[path = "src/section/packed.rs"]
mod packed;

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
    let (mut alpha, mut cl, mut cd) = (Vec::new(), Vec::new(), Vec::new());
    for row in csv::Reader::from_path(folder.join("polars.csv"))?.deserialize() {
        let row: Row = row?;
        let same = |p: &PackedPolar| {
            (p.thickness_ratio, p.reynolds, p.mach, p.n_crit)
                == (row.thickness_ratio, row.reynolds, row.mach, row.n_crit)
        };
        if !polars.last().is_some_and(same) {
            let Row { thickness_ratio, reynolds, mach, n_crit, .. } = row;
            polars.push(PackedPolar { thickness_ratio, reynolds, mach, n_crit, points: 0 });
        }
        // A row the solver could not answer stays out; nothing stands in for it.
        if let (Some(polar), "ok", Some(lift), Some(drag)) =
            (polars.last_mut(), row.state.as_str(), row.cl, row.cd)
        {
            polar.points += 1;
            alpha.push(row.alpha_deg);
            cl.push(lift);
            cd.push(drag);
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
        alpha: column(&alpha, ALPHA_STEPS),
        cl: column(&cl, CL_STEPS),
        cd: column(&cd, CD_STEPS),
    })
}

/// Figures in steps of `1 / steps`, by their second differences.
fn column(figures: &[f64], steps: f64) -> Column {
    let (mut last, mut slope) = (0, 0);
    let mut bend = |figure: &f64| {
        let value = (figure * steps).round() as i32;
        let (rise, was) = (value - last, slope);
        (last, slope) = (value, rise);
        rise - was
    };
    Column(figures.iter().map(&mut bend).collect())
}
