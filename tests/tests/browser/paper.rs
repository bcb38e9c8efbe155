//! Sheets printed through the browser keep their size.

use anyhow::{Context, Result};
use serde_json::json;
use spokeshave_tests::browser::drive;
use spokeshave_tests::judge::ask;

/// The sheets as the browser prints them, judged by `MuPDF`.
async fn printed(paper: &'static str, size_mm: [&'static str; 2]) -> Result<()> {
    drive("print-sheets", async |browser| {
        browser.open_page().await?;
        // Printing itself would wait for a person.
        browser.run("window.print = () => { window.asked = (window.asked || 0) + 1 }").await?;
        browser.run("document.querySelector('#paper > summary').scrollIntoView()").await?;
        browser.run("document.querySelector('#paper > summary').click()").await?;
        browser.press(paper).await?;
        let button = browser.control_starting("button", "Print ").await?;
        button.click().await?;
        browser
            .wait("being asked to print", async || {
                Ok((browser.run("return window.asked || 0").await? == json!(1)).then_some(()))
            })
            .await?;
        let pages = browser.run("return document.querySelectorAll('.printed-sheets section').length").await?;
        let file = browser.folder().join("printed.pdf");
        // The page itself says what paper its sheets want.
        std::fs::write(&file, browser.printed(200.0, 200.0).await?)?;
        let file = file.to_str().context("a path that is not Unicode")?;
        let [w, h] = size_mm;
        print!("{}", ask("printed.py", &[file, &pages.to_string(), w, h])?);
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn sheets_printed_on_a4_keep_their_size() -> Result<()> {
    printed("A4", ["210", "297"]).await
}

#[tokio::test(flavor = "multi_thread")]
async fn sheets_printed_on_letter_keep_their_size() -> Result<()> {
    printed("Letter", ["215.9", "279.4"]).await
}
