//! `spokeshave bench JOB files`: the blade for machines.

use std::path::PathBuf;

use spokeshave::bench::{Bench, File, Unit, files};
use spokeshave::cautions;
use spokeshave::rig::Rig;

use super::sheets::UnitName;
use crate::input::{Outcome, Stop, print};

#[derive(clap::Args)]
pub(crate) struct Args {
    #[command(flatten)]
    out: Folder,
}

/// Where files go, and the unit of the lengths written in them.
#[derive(clap::Args)]
pub(super) struct Folder {
    /// Folder for the files; made where it is missing, files of the same name are replaced
    #[arg(long, value_name = "FOLDER")]
    out: PathBuf,
    /// Unit of the lengths written down; drawings are full size in either
    #[arg(long, default_value = "mm")]
    units: UnitName,
}

impl Folder {
    pub(super) fn unit(&self) -> Unit {
        self.units.into()
    }

    /// Writes files and tells their names.
    pub(super) fn write(&self, files: &[File]) -> Result<(), Stop> {
        let fail =
            |path: &std::path::Path, e: std::io::Error| Stop::BadInput(format!("{}: {e}", path.display()));
        std::fs::create_dir_all(&self.out).map_err(|e| fail(&self.out, e))?;
        for file in files {
            let path = self.out.join(&file.name);
            std::fs::write(&path, &file.bytes).map_err(|e| fail(&path, e))?;
            print(&format!("{}  {} bytes", path.display(), file.bytes.len()))?;
        }
        Ok(())
    }
}

/// A job made ready for the bench, or what keeps it from being made.
pub(super) fn made_ready(rig: &Rig) -> Result<Bench, Stop> {
    Bench::new(rig).map_err(|e| Stop::BadInput(format!("this blade cannot be made:\n{e}")))
}

pub(crate) fn run(rig: &Rig, args: &Args) -> Outcome {
    let bench = made_ready(rig)?;
    args.out.write(&files(&bench, args.out.unit()).map_err(Stop::bad)?)?;
    if let Some(warning) = bench.warning() {
        print(&format!("\n{warning}"))?;
    }
    print(&format!("\nBefore you act: {}", cautions(&rig.job).join(" ")))?;
    Ok(true)
}
