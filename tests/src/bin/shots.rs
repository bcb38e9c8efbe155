//! Takes pictures of the page for people to look at: wide and narrow, light and dark.

use anyhow::{Context, Result};
use spokeshave_tests::browser::{Browser, Look, NARROW, WIDE};
use std::path::{Path, PathBuf};

/// `shots FOLDER [--whole]`: `--whole` takes the page in its full length.
#[tokio::main]
async fn main() -> Result<()> {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    let folder = arguments.iter().find(|word| !word.starts_with("--"));
    let folder = PathBuf::from(folder.context("which folder shall the pictures go to?")?);
    std::fs::create_dir_all(&folder)?;
    let browser = Browser::start().await?;
    let outcome = take_all(&browser, &folder, arguments.iter().any(|word| word == "--whole")).await;
    browser.close().await;
    outcome
}

async fn take_all(browser: &Browser, folder: &Path, whole: bool) -> Result<()> {
    browser.open_page().await?;
    for (look, look_name) in [(Look::Light, "light"), (Look::Dark, "dark")] {
        for (size, size_name) in [(WIDE, "wide"), (NARROW, "narrow")] {
            browser.set_look(look).await?;
            browser.set_size(size).await?;
            let started_ms = browser.reload().await?;
            let rests = async || Ok((!browser.text().await?.contains("Working out")).then_some(()));
            browser.wait("everything on the page to be worked out", rests).await?;
            let file = folder.join(format!("{size_name}-{look_name}.png"));
            std::fs::write(&file, browser.picture(whole).await?)?;
            println!("{} (started in {started_ms:.0} ms)", file.display());
        }
    }
    for line in browser.logs().await?.complaints() {
        println!("{}: {}", line.level, line.text);
    }
    Ok(())
}
