//! Files taken from the page beside those that the core makes of the same job.

use std::path::Path;

use anyhow::{Context, Result, ensure};
use spokeshave::bench::{Bench, Unit, files, pdf};
use spokeshave::dossier::{Scales, dossier};
use spokeshave::job::Job;
use spokeshave::rig::Rig;

use crate::validation::differences;

/// Names on the page's buttons, each with how its file's name ends in the core.
pub const FILES: [(&str, &str); 6] = [
    ("Solid, STL", ".stl"),
    ("Surface, CSV", "surface.csv"),
    ("Templates, DXF", "templates.dxf"),
    ("Blank from ahead, DXF", "blank-plan.dxf"),
    ("Blank from the side, DXF", "blank-side.dxf"),
    ("Hub, DXF", "hub.dxf"),
];
/// The button of all sheets of paper.
pub const SHEETS: &str = "Sheets, PDF";
/// How far corners of a solid may lie apart, mm: the last place of a single-precision number of a metre, and
/// what another processor's elementary functions make of it.
const CORNERS_MM: f32 = 2e-3;

/// Whether a folder holds the files of a job, in millimetres on A4, as the core makes them.
///
/// # Errors
/// Which is missing or differs, and how.
pub fn same_files(folder: &Path, job: &Job, point: usize) -> Result<()> {
    let rig = Rig::new(job)?;
    let bench = Bench::new(&rig)?;
    let made = files(&bench, Unit::Millimetre)?;
    for (_, ending) in FILES {
        let made = made.iter().find(|f| f.name.ends_with(ending)).context("not of this job")?;
        let taken = std::fs::read(folder.join(&made.name))
            .with_context(|| format!("{} is not among {:?}", made.name, names(folder)))?;
        let same =
            if ending == ".stl" { same_solid(&taken, &made.bytes) } else { same_text(&taken, &made.bytes) };
        same.context(made.name.clone())?;
    }
    let report = dossier(&rig, &Scales::METRIC, spokeshave::bench::Paper::A4, Some(point));
    let report = pdf(&job.title, &report).len() as f64;
    let taken: Vec<(String, Vec<u8>)> = names(folder)?
        .into_iter()
        .filter(|name| Path::new(name).extension().is_some_and(|e| e == "pdf"))
        .map(|name| std::fs::read(folder.join(&name)).map(|bytes| (name, bytes)))
        .collect::<std::io::Result<_>>()?;
    ensure!(taken.len() == 2 && taken.iter().all(|t| t.1.starts_with(b"%PDF")), "sheets and report as PDF");
    let found = taken.iter().find(|t| t.0.contains("report")).context("no report")?.1.len() as f64;
    // Last places of figures may be written shorter.
    ensure!((found / report - 1.0).abs() < 0.01, "a report of {found} bytes, the core's has {report}");
    Ok(())
}

fn names(folder: &Path) -> Result<Vec<String>> {
    std::fs::read_dir(folder)?.map(|entry| Ok(entry?.file_name().to_string_lossy().into_owned())).collect()
}

fn same_text(taken: &[u8], made: &[u8]) -> Result<()> {
    let found = differences(std::str::from_utf8(made)?, std::str::from_utf8(taken)?, true);
    ensure!(found.is_empty(), "{}", found.join("\n"));
    Ok(())
}

/// Two binary STL files: 84 bytes with the number of triangles, then 50 for each: normal, corners, two spare.
fn same_solid(taken: &[u8], made: &[u8]) -> Result<()> {
    ensure!(taken.len() == made.len() && taken.len() > 84, "{} bytes for {}", taken.len(), made.len());
    let numbers = |bytes: &[u8]| -> Vec<f32> {
        let corners = bytes[84..].chunks_exact(50).flat_map(|triangle| triangle[12..48].chunks_exact(4));
        corners.filter_map(|four| four.try_into().ok().map(f32::from_le_bytes)).collect()
    };
    let apart = numbers(taken).iter().zip(numbers(made)).map(|(a, b)| (a - b).abs()).fold(0.0, f32::max);
    ensure!(apart < CORNERS_MM, "corners up to {apart} mm apart");
    println!("STL: corners up to {apart:.1e} mm apart");
    Ok(())
}
