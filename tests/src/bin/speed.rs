//! What an analysis, a departure map, the speed range, a search and a polar take in the page, beside the same
//! work natively. The figures of the README.

use std::time::Instant;

use anyhow::{Context, Result, ensure};
use spokeshave_tests::browser::Browser;

/// What is timed, how often at once, and the rounds of which the least counts.
const WORK: [(&str, u32, u32); 5] =
    [("analysis", 1000, 30), ("map", 20, 30), ("range", 5, 30), ("search", 1, 3), ("polar", 1, 3)];

/// The least time of one piece of work in the page, ms: many at once less the getting ready, each the least
/// of many rounds.
const IN_PAGE: &str = r"
    const time = (times) => {
        const begun = performance.now();
        if (wasm_bindgen.work(WHAT, times) !== times) { throw new Error('not done'); }
        return performance.now() - begun;
    };
    let [empty, all] = [Infinity, Infinity];
    for (let round = 0; round < ROUNDS; round++) {
        empty = Math.min(empty, time(0));
        all = Math.min(all, time(TIMES));
    }
    return (all - empty) / TIMES;
";

#[tokio::main]
async fn main() -> Result<()> {
    let browser = Browser::start().await?;
    let outcome = measure(&browser).await;
    browser.close().await;
    outcome
}

async fn measure(browser: &Browser) -> Result<()> {
    browser.open_page().await?;
    for (what, times, rounds) in WORK {
        let script = IN_PAGE
            .replace("ROUNDS", &rounds.to_string())
            .replace("WHAT", &format!("'{what}'"))
            .replace("TIMES", &times.to_string());
        let page_ms = browser.run(&script).await?.as_f64().context("no time")?;
        let native_ms = native_ms(what, times, rounds)?;
        let ratio = page_ms / native_ms;
        println!("{what}: {page_ms:.4} ms in the page, {native_ms:.4} ms natively, ratio {ratio:.2}");
    }
    Ok(())
}

/// The same natively.
fn native_ms(what: &str, times: u32, rounds: u32) -> Result<f64> {
    let least = |times: u32| -> Result<f64> {
        let mut least = f64::INFINITY;
        for _ in 0..rounds {
            let begun = Instant::now();
            ensure!(spokeshave_web::timing::work(what, times) == times, "not done");
            least = least.min(begun.elapsed().as_secs_f64() * 1000.0);
        }
        Ok(least)
    };
    Ok((least(times)? - least(0)?) / f64::from(times))
}
