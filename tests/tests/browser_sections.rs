//! Polars are made in the page from a pasted outline, and measured tables are brought in, without harm to the
//! job.

use anyhow::{Context, Result};
use serde_json::Value;
use spokeshave_tests::browser::{Browser, drive};

/// A polar of thirty angles, in the page.
const LONGEST_POLAR_S: f64 = 4.0;
/// What a person still takes for at once, on a machine that does other things as well.
const LONGEST_TURN_MS: f64 = 200.0;

/// A flat-faced section drawn by arcs: back y = 4 t x (1 − x), a nose circle, a flat face; not any real
/// section.
fn outline() -> String {
    let (thickness, nose) = (0.12, 0.012_f64);
    let back = |x: f64| 4.0 * thickness * x * (1.0 - x) + 2.0 * nose * (1.0 - x);
    let mut lines = vec!["Invented section".to_owned()];
    for k in (0..=40).rev() {
        let x = 0.5 * (1.0 - (std::f64::consts::PI * f64::from(k) / 40.0).cos());
        lines.push(format!(
            "{x:.5} {:.5}",
            if k == 0 { nose } else { nose + back(x) * (1.0 - (-8.0 * x.sqrt()).exp()) }
        ));
    }
    for k in 1..=40 {
        let x = 0.5 * (1.0 - (std::f64::consts::PI * f64::from(k) / 40.0).cos());
        lines.push(format!("{x:.5} {:.5}", nose * (-12.0 * x.sqrt()).exp()));
    }
    lines.join("\n")
}

/// Puts a text into the box of an id as a paste does.
async fn paste(browser: &Browser, id: &str, text: &str) -> Result<()> {
    let script = format!(
        "const box = document.getElementById({id:?}); box.value = {}; \
         box.dispatchEvent(new InputEvent('input', {{bubbles: true}}))",
        serde_json::to_string(text)?
    );
    browser.run(&script).await.map(drop)
}

/// The job as the page keeps it.
async fn job(browser: &Browser) -> Result<Value> {
    let text = browser.run("return spokeshave.keep.latest()").await?;
    Ok(serde_json::from_str(text.as_str().context("no job is kept")?)?)
}

async fn open_panel(browser: &Browser) -> Result<()> {
    browser.open_page().await?;
    browser.run("document.getElementById('sections').open = true").await?;
    browser.run("document.getElementById('sections').scrollIntoView()").await.map(drop)
}

#[tokio::test(flavor = "multi_thread")]
async fn a_pasted_outline_becomes_a_section_that_stations_can_take() -> Result<()> {
    drive("polar", async |browser| {
        open_panel(browser).await?;
        paste(browser, "make-outline", "Invented\n1 0\nhalf 0.1\n").await?;
        browser.wait_for_text("Line 3: `half 0.1` is not a pair of numbers").await?;
        paste(browser, "make-outline", &outline()).await?;
        browser.wait_for_text("chord line").await?;
        for (id, text) in [
            ("make-name", "mine"),
            ("make-reynolds", "fast"),
            ("make-thickness", ""),
            ("make-first", "-4.5"),
            ("make-last", "10"),
        ] {
            paste(browser, id, text).await?;
        }
        browser.press("Make the polar").await?;
        browser.wait_for_text("“fast” is no number").await?;
        paste(browser, "make-reynolds", "500000").await?;
        browser.press("Make the polar").await?;
        browser.wait_for_text("“mine” joined the job after").await?;
        let text = browser.text().await?;
        println!("{}", text.lines().find(|l| l.contains("joined the job")).unwrap_or_default());
        println!("aimed at: {LONGEST_POLAR_S} s, on a machine that does nothing else");
        let own = &job(browser).await?["sections"][0];
        assert_eq!(own["name"], "mine");
        assert!(own["outline"].as_array().is_some_and(|o| o.len() > 60));
        assert!(own["polars"][0]["points"].as_array().is_some_and(|p| p.len() > 15), "{own}");
        // One step, named; the tables are shown and stations can take them.
        browser.press("Undo: section “mine”").await?;
        browser
            .wait("the section to go", async || Ok(job(browser).await?["sections"].is_null().then_some(())))
            .await?;
        browser.press("Redo: section “mine”").await?;
        browser
            .wait("the section to come back", async || {
                Ok((job(browser).await?["sections"][0]["name"] == "mine").then_some(()))
            })
            .await?;
        assert_eq!(browser.logs().await?.requests, Vec::<String>::new());
        let violations = browser.violations().await?;
        assert!(violations.is_empty(), "{violations:?}");
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_run_can_be_called_off_and_a_fault_in_it_harms_nothing() -> Result<()> {
    drive("polar-cancel", async |browser| {
        open_panel(browser).await?;
        let before = job(browser).await?;
        paste(browser, "make-outline", &outline()).await?;
        paste(browser, "make-reynolds", "50000 100000 200000 400000 800000").await?;
        paste(browser, "make-step", "0.1").await?;
        browser.press("Make the polar").await?;
        browser.wait_for_text("angles;").await?;
        // The page answers while the worker works.
        let measure = "const begun = performance.now(); \
            setTimeout(() => { window.turnMs = performance.now() - begun }, 0)";
        browser.run(measure).await?;
        let turn = async || Ok(browser.run("return window.turnMs || null").await?.as_f64());
        let turn_ms = browser.wait("a turn of the page", turn).await?;
        println!("a turn of the page while the worker works: {turn_ms:.0} ms");
        assert!(turn_ms < LONGEST_TURN_MS, "{turn_ms} ms");
        browser.press("Call it off").await?;
        browser.wait_for_text("Called off. The job is as it was.").await?;
        assert_eq!(job(browser).await?, before);
        // A module that is none makes the worker fail.
        browser.run("spokeshave.module = null").await?;
        browser.press("Make the polar").await?;
        browser.wait_for_text("met a fault of its own and stopped; the job is as it was").await?;
        assert_eq!(job(browser).await?, before);
        assert!(!browser.text().await?.contains("The page has stopped"));
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_measured_table_is_brought_in_or_refused_with_its_line() -> Result<()> {
    drive("import", async |browser| {
        open_panel(browser).await?;
        let rows: Vec<String> = (-2..10).map(|a| format!("{a};{},{};0,01", a / 10, (a + 2) % 10)).collect();
        let table = format!("alpha [deg];cl;cd\n{}", rows.join("\n"));
        paste(browser, "import-table", &table.replace("\n4;", "\n1;")).await?;
        browser.press("Add it to the job").await?;
        browser.wait_for_text("line 8, column 1 (alpha): 1 degrees again, as on line 5").await?;
        assert!(job(browser).await?["sections"].is_null());
        paste(browser, "import-table", &table).await?;
        paste(browser, "import-name", "tunnel").await?;
        browser.press("Add it to the job").await?;
        browser.wait_for_text("12 rows, 1 polar joined the job as “tunnel”").await?;
        browser
            .wait("the section", async || {
                Ok((job(browser).await?["sections"][0]["name"] == "tunnel").then_some(()))
            })
            .await
    })
    .await
}
