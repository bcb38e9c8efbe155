//! A wrong entry or file is refused with a reason, and the job on the page stays.

use anyhow::Result;
use spokeshave::job::DEMOS;
use spokeshave_tests::browser::{Browser, drive};
use spokeshave_tests::page::example;

/// The station whose angle is mistyped, from 1 at the hub.
const STATION: usize = 6;

/// Waits for a message and gives its text.
async fn message(browser: &Browser) -> Result<String> {
    let shown = "const said = [...document.querySelectorAll('[role=alert]')].map(note => note.innerText);
        return said.find(text => text.trim()) || null";
    let said = async || Ok(browser.run(shown).await?.as_str().map(str::to_owned));
    browser.wait("a message", said).await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_wrong_figure_stays_as_typed_says_what_is_allowed_and_changes_nothing() -> Result<()> {
    for wrong in ["abc", "400", "1e999", "", "--3"] {
        drive("wrong-figure", async |browser| {
            browser.open_page().await?;
            browser.wait_for_departures_of(&example()?, STATION).await?;
            let angle = browser.angle_box(STATION).await?;
            angle.enter(wrong).await?;
            let said = message(browser).await?;
            println!("{wrong:?}: {said}");
            assert!(!said.contains("NaN") && !said.contains("inf"), "{said}");
            let angle = browser.angle_box(STATION).await?;
            assert_eq!(angle.value().await?, wrong);
            assert_eq!(angle.attribute("aria-invalid").await?.as_deref(), Some("true"));
            browser.wait_for_departures_of(&example()?, STATION).await
        })
        .await?;
    }
    Ok(())
}

#[tokio::test(flavor = "multi_thread")]
async fn a_wrong_file_is_refused_with_the_place_and_the_reason() -> Result<()> {
    let good = DEMOS[0].json;
    let half = &good[..good.len() / 2];
    let cases = [
        ("truncated.json", half.to_owned(), "line"),
        ("version.json", good.replacen("\"spokeshave\": 1", "\"spokeshave\": 99", 1), "99"),
        ("unknown.json", good.replacen("\"blades\"", "\"blade_count\"", 1), "blade_count"),
        (
            "negative.json",
            good.replacen("\"chord_m\": 0.", "\"chord_m\": -0.", 1),
            "propeller.stations[0].chord_m",
        ),
        ("picture.json", "\u{0}\u{1}PNG".to_owned(), "line"),
        ("empty.json", String::new(), "line"),
    ];
    drive("wrong-file", async |browser| {
        browser.open_page().await?;
        for (name, text, reason) in &cases {
            assert_ne!(text, good, "{name} is not wrong");
            let file = browser.folder().join(name);
            std::fs::write(&file, text)?;
            browser.choose_file(&file).await?;
            browser.wait_for_text(&format!("{name} was not opened")).await?;
            let said = message(browser).await?;
            println!("{said}");
            assert!(said.contains(reason), "{name}: {said}");
            browser.wait_for_departures_of(&example()?, STATION).await?;
        }
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_file_of_a_hundred_megabytes_is_refused_at_once() -> Result<()> {
    drive("huge-file", async |browser| {
        browser.open_page().await?;
        let file = browser.folder().join("huge.json");
        std::fs::File::create(&file)?.set_len(100_000_000)?;
        browser.choose_file(&file).await?;
        browser.wait_for_text("huge.json was not opened").await?;
        browser.wait_for_departures_of(&example()?, STATION).await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_kept_job_that_cannot_be_read_is_put_aside_and_not_overwritten() -> Result<()> {
    drive("kept-garbage", async |browser| {
        browser.open_page().await?;
        browser.run("spokeshave.keep.before('{\"spokeshave\": 1, \"half')").await?;
        browser.reload().await?;
        browser.wait_for_departures_of(&example()?, STATION).await?;
        println!("{}", message(browser).await?);
        let aside = browser.run("return localStorage.getItem('spokeshave.1.aside.blank')").await?;
        assert_eq!(aside, "{\"spokeshave\": 1, \"half");
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_browser_that_refuses_storage_still_works_and_says_so() -> Result<()> {
    drive("no-storage", async |browser| {
        let refuse = "Object.defineProperty(window, 'localStorage', {
            get() { throw new DOMException('refused', 'SecurityError') } })";
        browser.before_any_script(refuse).await?;
        browser.open_page().await?;
        browser.wait_for_departures_of(&example()?, STATION).await?;
        browser.wait_for_text("not kept").await
    })
    .await
}
