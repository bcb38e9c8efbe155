//! Builds the page: compiles `web` to WebAssembly and packs everything into one HTML file.
//!
//! The file depends on the sources, the locked packages and the compiler only: no time stamp, no path
//! of this machine goes in, so two builds of one state of the sources are equal to the byte.

#![forbid(unsafe_code)]

mod command;
mod compile;
mod debian;
mod pack;
mod stylesheet;
mod toolchain;
mod workspace;

pub use command::run;
pub use toolchain::{Source, Toolchain};
pub use workspace::Workspace;

use anyhow::{Context, Result};
use std::path::{Path, PathBuf};

/// The page as it lies on disk.
#[derive(Debug, Clone)]
pub struct Page {
    /// Where the file is.
    pub path: PathBuf,
    /// Size of the file, bytes.
    pub bytes: usize,
    /// Size of the WebAssembly module before compression, bytes.
    pub module_bytes: usize,
}

/// Compiles and packs the page into the workspace's target folder.
///
/// # Errors
/// If the wasm32 target cannot be had, the page does not compile, or the file cannot be written. The
/// message says what to do.
pub fn build_page(workspace: &Workspace, source: Source) -> Result<Page> {
    let toolchain = Toolchain::find(workspace, source)?;
    let modules = compile::compile(workspace, &toolchain)?;
    let style = stylesheet::joined(workspace)?;
    let packed = pack::pack(&modules, &style)?;
    let folder = workspace.target.join("page");
    let path = folder.join("spokeshave.html");
    write(&folder, &path, &packed.html).with_context(|| format!("cannot write {}", path.display()))?;
    Ok(Page { path, bytes: packed.html.len(), module_bytes: packed.module_bytes })
}

/// Writes beside the file and then renames, so that nobody ever opens half a page.
fn write(folder: &Path, path: &Path, text: &str) -> std::io::Result<()> {
    let unfinished = folder.join(format!("spokeshave.{}.part", std::process::id()));
    std::fs::create_dir_all(folder)?;
    std::fs::write(&unfinished, text)?;
    std::fs::rename(unfinished, path)
}
