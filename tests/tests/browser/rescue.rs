//! A fault in the program never loses the job, and a job that stops the page does not stop it for ever.

use std::time::Duration;

use anyhow::Result;
use spokeshave::job::Job;
use spokeshave_tests::browser::{Browser, drive};
use spokeshave_tests::page::example;

/// A job with a title that would end a script, if it could.
fn job() -> Result<String> {
    Ok(Job { title: "kept </script> & safe".into(), ..example()? }.to_json())
}

/// What the application does before it works a job out.
async fn begin_work(browser: &Browser) -> Result<()> {
    browser.run(&format!("spokeshave.keep.before({})", serde_json::to_string(&job()?)?)).await.map(drop)
}

#[tokio::test(flavor = "multi_thread")]
async fn a_fault_shows_a_message_that_offers_the_job() -> Result<()> {
    drive("fault", async |browser| {
        browser.open_page().await?;
        begin_work(browser).await?;
        browser.run("setTimeout(() => { throw new Error('a fault on purpose') })").await?;
        browser.wait_for_text("The page has stopped").await?;
        assert!(browser.violations().await?.is_empty(), "{:?}", browser.violations().await?);
        let file = browser.download(async || browser.press("Save the job as a file").await).await?;
        assert_eq!(std::fs::read_to_string(file)?, job()?);
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_panic_shows_the_same_message() -> Result<()> {
    drive("panic", async |browser| {
        browser.open_page().await?;
        begin_work(browser).await?;
        // Every element that the application wants to draw is refused, for which it has no answer.
        browser.run("Node.prototype.cloneNode = () => { throw new Error('refused') }").await?;
        browser.run("setTimeout(() => wasm_bindgen.start())").await?;
        browser.wait_for_text("The page has stopped").await?;
        let said = browser.run("return document.querySelector('#boot-overlay pre').textContent").await?;
        assert!(said.as_str().is_some_and(|said| said.starts_with("panicked at")), "{said}");
        browser.control("button", "Start again with this job").await.map(drop)
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_job_that_never_finished_is_not_tried_again_unasked() -> Result<()> {
    drive("held-back", async |browser| {
        browser.open_page().await?;
        // A browser that was killed in the middle of the work writes nothing more.
        browser.run("spokeshave.keep.after = () => {}").await?;
        begin_work(browser).await?;
        browser.reload_unstarted().await?;
        browser.wait_for_text("This job stopped the page last time").await?;
        let file = browser.download(async || browser.press("Save the job as a file").await).await?;
        assert_eq!(std::fs::read_to_string(file)?, job()?);

        browser.press("Start with an example").await?;
        browser.wait_until_started().await?;
        assert!(!browser.text().await?.contains("stopped"));
        browser.reload().await.map(drop)
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn leaving_in_the_middle_of_the_work_is_no_fault() -> Result<()> {
    drive("leave", async |browser| {
        browser.open_page().await?;
        begin_work(browser).await?;
        browser.reload().await?;
        assert_eq!(browser.run("return spokeshave.keep.atStart()").await?, job()?);
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_browser_that_lacks_something_is_told_so() -> Result<()> {
    drive("lacking", async |browser| {
        browser.before_any_script("delete window.DecompressionStream").await?;
        browser.go_to_file(&spokeshave_tests::browser::built_page()?).await?;
        browser.wait_for_text("it lacks DecompressionStream").await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_write_that_was_cut_off_leaves_the_one_before() -> Result<()> {
    drive("cut-off", async |browser| {
        browser.open_page().await?;
        let older = job()?;
        browser.run(&format!("spokeshave.keep.before({})", serde_json::to_string(&older)?)).await?;
        browser.run("spokeshave.keep.before('{\"newer\": 1}')").await?;
        let halved =
            "const keys = Object.keys(localStorage).filter(k => k.startsWith('spokeshave.1.job.blank.'));
            const turn = key => Number(localStorage[key].split(' ')[0]);
            const newest = keys.sort((a, b) => turn(b) - turn(a))[0];
            localStorage[newest] = localStorage[newest].slice(0, -3);
            return keys.length;";
        assert_eq!(browser.run(halved).await?, 2);
        assert_eq!(browser.run("return spokeshave.keep.atStart()").await?, older);
        browser.reload().await?;
        browser.wait_for_text("What this browser kept last of the job was cut off.").await?;
        browser.reload().await?;
        assert_eq!(browser.run("return spokeshave.keep.torn()").await?, false);
        Ok(())
    })
    .await
}

/// Edits, each with a reload after 0 to 90 ms; `SPOKESHAVE_RELOADS=200` goes on longer.
#[tokio::test(flavor = "multi_thread")]
async fn reloads_in_the_middle_of_edits_lose_no_job() -> Result<()> {
    let reloads: u32 = std::env::var("SPOKESHAVE_RELOADS").map_or(Ok(8), |n| n.parse())?;
    drive("reloads", async |browser| {
        browser.open_page().await?;
        let mut before = example()?.propeller.stations[3].chord_m;
        let mut last_edit_lost = 0;
        for i in 0..reloads {
            let chord_mm = 90.0 + 0.1 * f64::from(i);
            let edit = format!(
                "const box = [...document.querySelectorAll('input')].find(b => b.ariaLabel?.toLowerCase().startsWith('chord at station 4'));
                box.value = '{chord_mm}';
                for (const kind of ['input', 'change']) {{ box.dispatchEvent(new Event(kind, {{ bubbles: true }})); }}"
            );
            browser.run(&edit).await?;
            tokio::time::sleep(Duration::from_millis(10 * u64::from(i % 10))).await;
            browser.reload().await?;
            let kept = browser.run("return spokeshave.keep.atStart()").await?;
            let kept = Job::from_json(kept.as_str().unwrap_or_default())?.propeller.stations[3].chord_m;
            let taken = (kept - 1e-3 * chord_mm).abs() < 1e-9;
            assert!(taken || (kept - before).abs() < 1e-9, "reload {i}: {kept} m");
            last_edit_lost += u32::from(!taken);
            before = kept;
        }
        println!("{reloads} reloads, jobs lost 0, last edits lost {last_edit_lost}");
        Ok(())
    })
    .await
}
