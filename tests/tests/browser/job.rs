//! A person changes a job on the page, takes it back, and finds it again.

use anyhow::{Context, Result};
use fantoccini::key::Key;
use spokeshave::job::Job;
use spokeshave_tests::browser::{Browser, NARROW, built_page, drive};
use spokeshave_tests::page::{computed_departures_deg, example, with_angle};
use std::path::Path;

/// The station that is changed, from 1 at the hub.
const STATION: usize = 6;
/// By how much its blade is turned, degrees: enough to be seen in every figure.
const TURN_DEG: f64 = 1.5;

/// The example with one station turned.
fn turned() -> Result<(Job, String)> {
    let job = example()?;
    let drawn = job.propeller.stations[STATION - 1].angle_deg.context("drawn by pitch")?;
    let typed = format!("{:.1}", drawn + TURN_DEG);
    Ok((with_angle(&job, STATION, typed.parse()?)?, typed))
}

/// Turns the station on the page and waits until the page shows what follows.
async fn turn(browser: &Browser) -> Result<Job> {
    let (turned, typed) = turned()?;
    browser.angle_box(STATION).await?.enter(&typed).await?;
    browser.wait_for_departures_of(&turned, STATION).await?;
    Ok(turned)
}

#[tokio::test(flavor = "multi_thread")]
async fn turning_a_station_changes_its_departure_as_the_core_says_and_undo_brings_it_back() -> Result<()> {
    let before = computed_departures_deg(&example()?, STATION)?;
    let after = computed_departures_deg(&turned()?.0, STATION)?;
    let moved =
        |(before, after): (&Option<f64>, &Option<f64>)| (after.unwrap() - before.unwrap()).abs() > 0.2;
    assert!(before.iter().zip(&after).all(moved), "{before:?} {after:?}");
    drive("turn", async |browser| {
        browser.open_page().await?;
        browser.wait_for_departures_of(&example()?, STATION).await?;
        turn(browser).await?;
        browser.control_starting("button", "Undo: ").await?.click().await?;
        browser.wait_for_departures_of(&example()?, STATION).await?;
        browser.control_starting("button", "Redo: ").await?.click().await?;
        browser.wait_for_departures_of(&turned()?.0, STATION).await?;
        browser.keys(&format!("{}z{}", char::from(Key::Control), char::from(Key::Null))).await?;
        browser.wait_for_departures_of(&example()?, STATION).await?;
        browser.assert_quiet().await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_reload_finds_the_job_again() -> Result<()> {
    drive("reload", async |browser| {
        browser.open_page().await?;
        let job = turn(browser).await?;
        browser.reload().await?;
        browser.wait_for_departures_of(&job, STATION).await?;
        assert_eq!(browser.angle_box(STATION).await?.value().await?, turned()?.1);
        browser.assert_quiet().await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_saved_job_opens_in_another_browser() -> Result<()> {
    let folder = tempfile::tempdir()?;
    let copy = folder.path().join("job.json");
    drive("save", async |browser| {
        browser.open_page().await?;
        let job = turn(browser).await?;
        let file = browser.download(async || browser.press("Save").await).await?;
        let text = std::fs::read_to_string(&file)?;
        assert!(Job::from_json(&text)? == job, "the file holds another job: {text}");
        std::fs::copy(&file, &copy)?;
        browser.assert_quiet().await
    })
    .await?;
    drive("open", async |browser| {
        browser.open_page().await?;
        browser.wait_for_departures_of(&example()?, STATION).await?;
        browser.choose_file(&copy).await?;
        browser.wait_for_departures_of(&turned()?.0, STATION).await?;
        browser.assert_quiet().await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn on_a_narrow_screen_the_same_is_behind_the_menu() -> Result<()> {
    drive("narrow-save", async |browser| {
        browser.set_size(NARROW).await?;
        browser.open_page().await?;
        browser.control_starting("button", "Menu").await?.click().await?;
        let file = browser.download(async || browser.press("Save").await).await?;
        assert!(Job::from_json(&std::fs::read_to_string(file)?)? == example()?);
        browser.assert_quiet().await
    })
    .await
}

/// Saves the page with a job inside whose title would end a script, if it could.
async fn save_page(copy: &Path) -> Result<()> {
    drive("save-page", async |browser| {
        browser.open_page().await?;
        browser.control("textbox", "Title").await?.enter(HOSTILE_TITLE).await?;
        turn(browser).await?;
        let file = browser.download(async || browser.press("Save page with job").await).await?;
        assert_eq!(file.extension().and_then(|extension| extension.to_str()), Some("html"));
        std::fs::copy(&file, copy)?;
        browser.assert_quiet().await
    })
    .await
}

const HOSTILE_TITLE: &str = "</script><!-- {{boot}} & \"quoted\"";

#[tokio::test(flavor = "multi_thread")]
async fn the_page_saved_with_a_job_inside_opens_with_it_and_saves_on() -> Result<()> {
    let folder = tempfile::tempdir()?;
    let copy = folder.path().join("with-job.html");
    save_page(&copy).await?;
    drive("reopen-page", async |browser| {
        browser.open_file(&copy).await?;
        browser.wait_for_departures_of(&turned()?.0, STATION).await?;
        assert_eq!(browser.control("textbox", "Title").await?.value().await?, HOSTILE_TITLE);
        // A copy of the copy is the copy: nothing is lost or added on the way.
        let again = browser.download(async || browser.press("Save page with job").await).await?;
        assert!(std::fs::read(again)? == std::fs::read(&copy)?, "the copy of the copy differs");
        browser.assert_quiet().await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn but_for_the_job_a_saved_page_is_the_built_page() -> Result<()> {
    let folder = tempfile::tempdir()?;
    let copy = folder.path().join("with-job.html");
    save_page(&copy).await?;
    let (saved, built) = (std::fs::read_to_string(copy)?, std::fs::read_to_string(built_page()?)?);
    let node = r#"<script id="page-job" type="application/json">"#;
    let (before, rest) = saved.split_once(node).context("no job node")?;
    let (job, after) = rest.split_once("</script>").context("the job node does not end")?;
    assert_eq!(Job::from_json(job)?.title, HOSTILE_TITLE);
    assert!(
        format!("{before}{node}</script>{after}") == built,
        "the saved page differs in more than the job"
    );
    Ok(())
}

#[tokio::test(flavor = "multi_thread")]
async fn a_page_that_came_with_a_job_does_not_show_another_ones() -> Result<()> {
    let folder = tempfile::tempdir()?;
    let copy = folder.path().join("with-job.html");
    save_page(&copy).await?;
    drive("two-pages", async |browser| {
        // Every page from disk shares one storage: this one keeps a changed example in it.
        browser.open_page().await?;
        browser.angle_box(STATION).await?.enter("25").await?;
        browser.wait_for_departures_of(&with_angle(&example()?, STATION, 25.0)?, STATION).await?;
        browser.open_file(&copy).await?;
        browser.wait_for_departures_of(&turned()?.0, STATION).await?;
        browser.open_page().await?;
        browser.wait_for_departures_of(&with_angle(&example()?, STATION, 25.0)?, STATION).await
    })
    .await
}

/// Picks the second of a list as a person does: the browser moves the list before the page hears of it.
const PICK_FACE: &str = r#"
    const list = document.querySelector('[aria-label="Angles measured to"]');
    list.selectedIndex = 1;
    list.dispatchEvent(new Event('change', { bubbles: true }));
"#;

#[tokio::test(flavor = "multi_thread")]
async fn a_list_shows_what_was_picked_and_what_undo_brings_back() -> Result<()> {
    drive("list", async |browser| {
        let shown = async || {
            let text = "return document.querySelector('[aria-label=\"Angles measured to\"]').selectedOptions[0].text";
            browser.run(text).await
        };
        browser.open_page().await?;
        browser.run(PICK_FACE).await?;
        browser.wait("the flat face", async || Ok((shown().await? == "flat face").then_some(()))).await?;
        browser.control_starting("button", "Undo: what angles are measured to").await?.click().await?;
        browser.wait("the chord line", async || Ok((shown().await? == "chord line").then_some(()))).await?;
        browser.assert_quiet().await
    })
    .await
}
