//! The style sheets of the page: those of `web/style`, joined in the order of their names.

use crate::Workspace;
use anyhow::{Context, Result};
use std::path::PathBuf;

/// All style sheets as one, those of the start messages first, without remarks and needless blanks.
pub(crate) fn joined(workspace: &Workspace) -> Result<String> {
    let folder = workspace.root.join("web/style");
    let listed = std::fs::read_dir(&folder).with_context(|| format!("cannot list {}", folder.display()))?;
    let mut sheets: Vec<PathBuf> = listed.flatten().map(|entry| entry.path()).collect();
    sheets.retain(|path| path.extension().is_some_and(|extension| extension == "css"));
    sheets.sort();
    let mut joined = spokeshave_boot::BOOT_STYLE.to_owned();
    for sheet in sheets {
        let text = std::fs::read_to_string(&sheet);
        joined.push_str(&text.with_context(|| format!("cannot read {}", sheet.display()))?);
    }
    let small = minifier::css::minify(&joined);
    Ok(small.map_err(|what| anyhow::anyhow!("a style sheet cannot be read: {what}"))?.to_string())
}
