//! Browsers that ended by themselves in the middle of a check.

use crate::tools;
use anyhow::Result;
use std::fs::OpenOptions;
use std::io::Write;

use super::target_folder;

/// Notes that a browser ended by itself, so that the summary of all checks says so.
pub(super) fn note(name: &str, words: &str) -> Result<()> {
    let file = tools::lost_browsers(&target_folder()?);
    if let Some(folder) = file.parent() {
        std::fs::create_dir_all(folder)?;
    }
    let mut file = OpenOptions::new().create(true).append(true).open(file)?;
    writeln!(file, "a browser ended by itself, {name} ran again in another: {}", words.replace('\n', " | "))?;
    Ok(())
}
