//! Every file of the bench with its name.

use crate::caution::cautions;

use super::page::{Paper, Sheet, lay};
use super::sheet::{leaves, machine_drawings};
use super::unit::Unit;
use super::work::Bench;
use super::write::{dxf, pdf, stl, surface_csv, svg};

/// A file.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct File {
    /// Its name, with its ending.
    pub name: String,
    /// What is in it.
    pub bytes: Vec<u8>,
}

impl File {
    fn new(name: impl Into<String>, bytes: impl Into<Vec<u8>>) -> Self {
        Self { name: name.into(), bytes: bytes.into() }
    }
}

impl Bench {
    /// Every sheet of paper.
    #[must_use]
    pub fn sheets(&self, paper: Paper, unit: Unit) -> Vec<Sheet> {
        let title = if self.job.title.is_empty() { "Propeller" } else { &self.job.title };
        lay(title, &leaves(self, paper, unit), paper, &cautions(&self.job), self.warning().as_deref())
    }
}

/// One SVG for each sheet, and all of them as one PDF.
#[must_use]
pub fn sheet_files(bench: &Bench, paper: Paper, unit: Unit) -> Vec<File> {
    let sheets = bench.sheets(paper, unit);
    let pages = sheets.iter().enumerate();
    let mut files: Vec<File> =
        pages.map(|(i, sheet)| File::new(format!("sheet-{:02}.svg", i + 1), svg(sheet))).collect();
    files.push(File::new("sheets.pdf", pdf(&bench.job.title, &sheets)));
    files
}

/// The surface and the drawings for a machine: STL, CSV, DXF.
///
/// # Errors
/// That of the STL writer.
pub fn files(bench: &Bench, unit: Unit) -> std::io::Result<Vec<File>> {
    let solid = if bench.blank.boss.is_some() { "propeller.stl" } else { "blade.stl" };
    let mut files =
        vec![File::new(solid, stl(&bench.solid())?), File::new("surface.csv", surface_csv(bench))];
    files.extend(
        machine_drawings(bench, unit)
            .iter()
            .map(|leaf| File::new(format!("{}.dxf", leaf.name), dxf(&leaf.drawing))),
    );
    Ok(files)
}
