//! Everybody can use the page: screen readers, small screens, light and dark, paper.

use anyhow::{Context, Result};
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave_tests::browser::{Look, NARROW, Size, WIDE, drive};
use spokeshave_tests::judge::ask;

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

#[tokio::test(flavor = "multi_thread")]
async fn no_accessibility_rule_is_broken_with_every_panel_open_on_a_phone_at_night() -> Result<()> {
    drive("rules-open", async |browser| {
        browser.open_page().await?;
        browser.set_look(Look::Dark).await?;
        browser.set_size(NARROW).await?;
        browser.reload().await?;
        let open = "for (const panel of document.querySelectorAll('details.panel:not([open]) > summary')) {
                panel.click();
            }
            return document.querySelectorAll('details.panel:not([open])').length === 0 &&
                !document.body.innerText.includes('Working out') || null;";
        browser
            .wait("every panel open and worked out", async || Ok(browser.run(open).await?.as_bool()))
            .await?;
        let broken = browser.violations().await?;
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
        browser.open_page().await?;
        let file = browser.folder().join("page.pdf");
        std::fs::write(&file, browser.printed(210.0, 297.0).await?)?;
        let file = file.to_str().context("a path that is not Unicode")?;
        // What stands on it: the job, its flight points, the departures of the one selected.
        let job = Job::from_json(DEMOS[0].json)?;
        let cruise = Rig::new(&job)?.point(2).context("an answer at cruise")?;
        let names = job.flight_points.iter().map(|p| p.name.clone());
        let departures = cruise.stations.iter().filter_map(|s| s.departure_deg);
        let signed = departures.map(|d| format!("{d:+.1}").replace('-', "\u{2212}"));
        let told: Vec<String> = [job.title.clone()].into_iter().chain(names).chain(signed).collect();
        let mut asked = vec![file, "210", "297"];
        asked.extend(told.iter().map(String::as_str));
        print!("{}", ask("page_printed.py", &asked)?);
        Ok(())
    })
    .await
}
