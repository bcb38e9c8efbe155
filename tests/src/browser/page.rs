//! The built page.

use anyhow::{Result, anyhow};
use spokeshave_press::{Source, Workspace, build_page};
use std::path::PathBuf;
use std::sync::OnceLock;

/// The page to test: the file that `SPOKESHAVE_PAGE` names, else one built now from the sources.
///
/// # Errors
/// If the page does not build.
pub fn built_page() -> Result<PathBuf> {
    static PAGE: OnceLock<Result<PathBuf, String>> = OnceLock::new();
    let find = || match std::env::var_os("SPOKESHAVE_PAGE") {
        Some(given) => Ok(PathBuf::from(given)),
        None => Ok(build_page(&Workspace::find()?, Source::Any)?.path),
    };
    let page = PAGE.get_or_init(|| find().map_err(|error: anyhow::Error| format!("{error:#}")));
    page.clone().map_err(|error| anyhow!(error))
}

/// Cargo's target folder, where everything that checks leave behind goes.
///
/// # Errors
/// If cargo cannot be asked.
pub fn target_folder() -> Result<PathBuf> {
    Ok(Workspace::find()?.target)
}
