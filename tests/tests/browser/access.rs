//! Everybody can use the page: screen readers, small screens, light and dark, paper.

use anyhow::Result;
use spokeshave_tests::browser::{Look, NARROW, Size, WIDE, drive};

const TABLET: Size = Size { width: 1024, height: 768, touch: true };

#[tokio::test(flavor = "multi_thread")]
async fn no_accessibility_rule_is_broken_at_any_size_light_or_dark() -> Result<()> {
    drive("rules", async |browser| {
        let mut broken = Vec::new();
        browser.open_page().await?;
        for look in [Look::Light, Look::Dark] {
            for size in [WIDE, TABLET, NARROW] {
                browser.set_look(look).await?;
                browser.set_size(size).await?;
                browser.reload().await?;
                let found = browser.violations().await?;
                broken.extend(found.into_iter().map(|rule| (look, size.width, rule)));
            }
        }
        assert!(broken.is_empty(), "{broken:#?}");
        Ok(())
    })
    .await
}

/// The parts of the page are found by id, and so are the steps' panels.
#[tokio::test(flavor = "multi_thread")]
async fn no_two_nodes_have_the_same_id() -> Result<()> {
    drive("ids", async |browser| {
        browser.open_page().await?;
        let twice = browser
            .run(
                "const ids = [...document.querySelectorAll('[id]')].map(node => node.id);
                 return ids.filter((id, i) => ids.indexOf(id) !== i);",
            )
            .await?;
        assert_eq!(twice, serde_json::json!([]));
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn the_page_does_not_scroll_sideways() -> Result<()> {
    drive("sideways", async |browser| {
        browser.open_page().await?;
        for size in [WIDE, TABLET, NARROW, Size { width: 1280, height: 720, touch: false }] {
            browser.set_size(size).await?;
            browser.reload().await?;
            let overflow = browser.sideways_overflow().await?;
            assert!(overflow <= 0.0, "{overflow} px too wide at {} px", size.width);
        }
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn the_page_prints() -> Result<()> {
    drive("print", async |browser| {
        const A4_MM: (f64, f64) = (210.0, 297.0);
        browser.open_page().await?;
        let pdf = browser.printed(A4_MM.0, A4_MM.1).await?;
        println!("{} bytes of PDF", pdf.len());
        assert!(pdf.starts_with(b"%PDF"));
        // An empty sheet takes a few kilobytes.
        assert!(pdf.len() > 20_000, "{} bytes", pdf.len());
        Ok(())
    })
    .await
}
