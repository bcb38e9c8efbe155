//! The page still works when it was saved with the browser's own save command.

use anyhow::Result;
use spokeshave_tests::browser::{Desktop, SaveAs, built_page, drive, drive_on};
use std::path::PathBuf;

/// Opens the built page in a window and saves it the way the desktop says.
async fn save(desktop: &Desktop, name: &str) -> Result<PathBuf> {
    let mut saved = None;
    drive_on(Some(desktop), name, async |browser| {
        browser.open_page().await?;
        saved = Some(desktop.save(browser).await?);
        Ok(())
    })
    .await?;
    saved.ok_or_else(|| anyhow::anyhow!("nothing was saved"))
}

#[tokio::test(flavor = "multi_thread")]
async fn saved_as_file_only_it_is_the_same_file() -> Result<()> {
    let desktop = Desktop::start(SaveAs::FileOnly)?;
    let saved = save(&desktop, "native-save-file").await?;
    assert!(std::fs::read(&saved)? == std::fs::read(built_page()?)?, "the saved file differs");
    Ok(())
}

#[tokio::test(flavor = "multi_thread")]
async fn saved_as_complete_page_it_starts_anew_without_leftovers() -> Result<()> {
    let desktop = Desktop::start(SaveAs::CompletePage)?;
    let saved = save(&desktop, "native-save-page").await?;
    let text = std::fs::read_to_string(&saved)?;
    assert!(!text.contains("<div id=\"app\"></div>"), "the copy holds what the application had drawn");
    drive("native-save-page-again", async |browser| {
        browser.open_file(&saved).await?;
        browser.wait_for_text("Spokeshave").await?;
        let headings = browser.names("heading").await?;
        let titles = headings.iter().filter(|heading| *heading == "Spokeshave").count();
        assert!(titles <= 1, "drawn twice: {headings:?}");
        let logs = browser.logs().await?;
        assert_eq!(logs.requests, Vec::<String>::new());
        assert!(logs.complaints().is_empty(), "{:?}", logs.complaints());
        Ok(())
    })
    .await
}
