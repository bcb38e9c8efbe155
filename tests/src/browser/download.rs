//! Files that the page offers and takes.

use super::Browser;
use anyhow::{Context, Result};
use fantoccini::Locator;
use serde_json::json;
use std::path::{Path, PathBuf};

impl Browser {
    /// Does something that makes the page offer a file; gives the file once it is complete.
    ///
    /// # Errors
    /// If `act` fails or no file arrives.
    pub async fn download(&self, act: impl AsyncFnOnce() -> Result<()>) -> Result<PathBuf> {
        let folder = tempfile::tempdir_in(self.folder.path())?.keep();
        let behaviour = json!({"behavior": "allow", "downloadPath": folder});
        self.command("Browser.setDownloadBehavior", behaviour).await?;
        act().await?;
        self.wait("a file from the page", async || complete_file(&folder)).await
    }

    /// Gives a file to the page's file field, as the user's choice in the file dialog would. The field
    /// may be hidden behind a button.
    ///
    /// # Errors
    /// If the page has no file field.
    pub async fn choose_file(&self, file: &Path) -> Result<()> {
        let field = self.client.find(Locator::Css("input[type=file]")).await?;
        let path = file.to_str().context("a path that is not Unicode")?;
        Ok(field.send_keys(path).await?)
    }

    /// A folder that lasts as long as the browser.
    #[must_use]
    pub fn folder(&self) -> &Path {
        self.folder.path()
    }
}

fn complete_file(folder: &Path) -> Result<Option<PathBuf>> {
    let files: Vec<PathBuf> = std::fs::read_dir(folder)?.flatten().map(|entry| entry.path()).collect();
    // Chromium writes into a file of its own naming until all is there; the last name may stand beside it,
    // empty, before.
    let partial = |file: &PathBuf| {
        let hidden = file.file_name().is_some_and(|name| name.to_string_lossy().starts_with('.'));
        hidden || file.extension().is_some_and(|extension| extension == "crdownload")
    };
    if files.iter().any(partial) {
        return Ok(None);
    }
    let written = |file: &PathBuf| file.metadata().is_ok_and(|about| about.len() > 0);
    Ok(files.into_iter().find(written))
}
