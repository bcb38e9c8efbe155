//! The page opens from disk, quickly, alone and without complaint.

use anyhow::Result;
use spokeshave_tests::browser::{built_page, drive};

/// Largest file that is still handed around by mail without a thought.
const LARGEST_PAGE_BYTES: u64 = 1_500_000;
/// From opening the file to a page that answers; the least of three openings, for the machine does other
/// things as well.
const LONGEST_START_MS: f64 = 1000.0;

#[tokio::test(flavor = "multi_thread")]
async fn the_page_starts_from_disk_without_network_or_complaint() -> Result<()> {
    drive("start", async |browser| {
        let mut started_ms = f64::INFINITY;
        for _ in 0..3 {
            started_ms = browser.open_page().await?.min(started_ms);
        }
        println!("started in {started_ms:.0} ms");
        assert!(started_ms <= LONGEST_START_MS, "started in {started_ms} ms");
        browser.wait_for_text("Spokeshave").await?;
        browser.assert_quiet().await
    })
    .await
}

#[test]
fn the_page_is_small_enough() -> Result<()> {
    let bytes = std::fs::metadata(built_page()?)?.len();
    println!("{bytes} bytes");
    assert!(bytes <= LARGEST_PAGE_BYTES, "{bytes} bytes");
    Ok(())
}
