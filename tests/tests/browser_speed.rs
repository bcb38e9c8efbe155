//! How soon an edit is seen, told and not judged: a time depends on the machine. A program of its own, so
//! that no other check takes the time.

use anyhow::{Context, Result};
use spokeshave_tests::browser::drive;
use spokeshave_tests::page::example;

/// One frame of an ordinary screen.
const FRAME_MS: f64 = 16.0;
/// What a person takes for "at once".
const AT_ONCE_MS: f64 = 100.0;
/// Edits timed. Of each time the least counts: it is what the page takes when nothing holds it up.
const EDITS: usize = 15;

/// Turns a station by a little, as typing does, and times what follows: until the departure in the
/// table has changed, until the last thing on the screen has, and the last on the page, panels further down
/// included.
const EDIT: &str = r#"
    const done = arguments[0];
    const box = document.querySelector('[aria-label="Blade angle at station 6, degrees"]');
    const shown = () => box.closest('tr').querySelector('.departure-column.now').textContent;
    const before = shown();
    const onScreen = record => {
        const node = record.target.nodeType === Node.ELEMENT_NODE ? record.target : record.target.parentElement;
        const box = node.getBoundingClientRect();
        return box.bottom > 0 && box.top < innerHeight;
    };
    box.closest('.panel').scrollIntoView();
    let first = null, seen = null, last = null;
    const begun = performance.now();
    const watch = new MutationObserver(records => {
        last = performance.now() - begun;
        if (records.some(onScreen)) { seen = last; }
        if (first === null && shown() !== before) { first = last; }
    });
    watch.observe(document.getElementById('app'),
        { childList: true, subtree: true, characterData: true, attributes: true });
    box.value = (Number(box.value.replace('−', '-')) + 0.7).toFixed(1);
    box.dispatchEvent(new InputEvent('input', { bubbles: true }));
    box.dispatchEvent(new Event('change', { bubbles: true }));
    setTimeout(() => { watch.disconnect(); done([first, seen, last]); }, 900);
"#;

#[tokio::test(flavor = "multi_thread")]
async fn an_edit_is_seen_first_in_the_departure() -> Result<()> {
    drive("speed", async |browser| {
        browser.open_page().await?;
        browser.wait_for_departures_of(&example()?, 6).await?;
        let (mut first, mut seen, mut last, mut computing) = (Vec::new(), Vec::new(), Vec::new(), Vec::new());
        for _ in 0..EDITS {
            let before_ms = browser.computing_ms().await?;
            let times = browser.run_async(EDIT).await?;
            computing.push(browser.computing_ms().await? - before_ms);
            first.push(times[0].as_f64().context("the departure did not change")?);
            seen.push(times[1].as_f64().context("nothing changed on the screen")?);
            last.push(times[2].as_f64().context("nothing changed")?);
        }
        let (first, seen) = (least(&first), least(&seen));
        let (last, computing) = (least(&last), least(&computing));
        let share = browser.share_of_processor().await?;
        println!(
            "departure after {first:.1} ms, everything on the screen after {seen:.1} ms, on the page after \
             {last:.1} ms"
        );
        println!("{computing:.1} ms of computing, with {:.0} % of a processor", 100.0 * share);
        println!("aimed at: {FRAME_MS} ms and {AT_ONCE_MS} ms, on a machine that does nothing else");
        assert!(first <= seen && seen <= last, "the departure is the first thing to change");
        Ok(())
    })
    .await
}

fn least(values: &[f64]) -> f64 {
    values.iter().copied().fold(f64::INFINITY, f64::min)
}
