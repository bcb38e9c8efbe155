//! The page still works when it was saved with the browser's own save command.

use anyhow::Result;
use spokeshave_tests::browser::{Browser, Desktop, SaveAs, built_page, drive, drive_on};
use spokeshave_tests::page::{example, with_angle};
use std::path::PathBuf;

/// The station that is turned before saving, from 1 at the hub, and where to, degrees.
const STATION: usize = 6;
const ANGLE_DEG: f64 = 25.0;

/// Changes the job on the built page in a window and saves the page the way the desktop says.
async fn save(desktop: &Desktop, name: &str) -> Result<PathBuf> {
    drive_on(Some(desktop), name, async |browser| {
        browser.open_page().await?;
        browser.angle_box(STATION).await?.enter(&ANGLE_DEG.to_string()).await?;
        browser.wait_for_departures_of(&with_angle(&example()?, STATION, ANGLE_DEG)?, STATION).await?;
        desktop.save(browser).await
    })
    .await
}

/// The page stands there once, quietly.
async fn assert_in_order(browser: &Browser) -> Result<()> {
    assert_eq!(browser.run("return document.querySelectorAll('h1').length").await?, 1, "drawn twice");
    browser.assert_quiet().await
}

#[tokio::test(flavor = "multi_thread")]
async fn saved_as_file_only_it_is_the_same_file() -> Result<()> {
    let desktop = Desktop::start(SaveAs::FileOnly)?;
    let saved = save(&desktop, "native-save-file").await?;
    assert!(std::fs::read(&saved)? == std::fs::read(built_page()?)?, "the saved file differs");
    Ok(())
}

#[tokio::test(flavor = "multi_thread")]
async fn saved_as_complete_page_it_starts_anew_with_the_job_as_it_was() -> Result<()> {
    let desktop = Desktop::start(SaveAs::CompletePage)?;
    let saved = save(&desktop, "native-save-page").await?;
    let text = std::fs::read_to_string(&saved)?;
    assert!(!text.contains("<div id=\"app\"></div>"), "the copy holds what the application had drawn");
    drive("native-save-page-again", async |browser| {
        browser.open_file(&saved).await?;
        browser.wait_for_departures_of(&with_angle(&example()?, STATION, ANGLE_DEG)?, STATION).await?;
        assert_in_order(browser).await
    })
    .await
}
