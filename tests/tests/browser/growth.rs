//! A very large job, edited again and again: the page does not grow but for the steps that it can undo.

use anyhow::{Context, Result, ensure};
use spokeshave::job::{Job, Station};
use spokeshave_tests::browser::{Browser, drive};
use spokeshave_tests::page::example;

/// Stations of the large job: as many as a job may have.
const STATIONS: usize = 200;
/// Flight points of it.
const POINTS: usize = 12;
/// Memory that one step to undo may take, bytes: the job itself, two hundred stations of a hundred bytes and
/// their names.
const STEP_BYTES: f64 = 40e3;
/// Growth that is no leak, bytes: what a collector has not come to, pages of 64 KiB that memory grows by. Neither
/// the module's 23.3 MB nor the scripts' 2.7 MB grew by a tenth of one over the last 6 of 12 edits or the last 30
/// of 60 (Chromium); sixteen pages are left to chance.
const SLACK_BYTES: f64 = 1e6;

/// The example with many stations between its own, and its flight points again and again.
fn large() -> Result<Job> {
    let mut job = example()?;
    let drawn = job.propeller.stations.clone();
    let (first, last) = (drawn.first().context("stations")?, drawn.last().context("stations")?);
    let between = |k: usize| -> Option<Station> {
        let share = k as f64 / (STATIONS - 1) as f64;
        let at = first.radius_fraction + share * (last.radius_fraction - first.radius_fraction);
        let pair = drawn.windows(2).find(|pair| at <= pair[1].radius_fraction + 1e-12)?;
        let t = (at - pair[0].radius_fraction) / (pair[1].radius_fraction - pair[0].radius_fraction);
        let mix = |of: fn(&Station) -> f64| of(&pair[0]) + t * (of(&pair[1]) - of(&pair[0]));
        Some(Station {
            radius_fraction: at,
            chord_m: mix(|s| s.chord_m),
            angle_deg: Some(mix(|s| s.angle_deg.unwrap_or_default())),
            thickness_ratio: mix(|s| s.thickness_ratio),
            ..pair[0].clone()
        })
    };
    job.propeller.stations =
        (0..STATIONS).map(between).collect::<Option<_>>().context("a place between stations")?;
    let points = job.flight_points.clone();
    job.flight_points = (0..POINTS).map(|i| points[i % points.len()].clone()).collect();
    for (i, point) in job.flight_points.iter_mut().enumerate() {
        point.name = format!("{} {i}", point.name);
    }
    Ok(job)
}

/// Turns station 100 and waits until everything on the page has followed.
async fn edit(browser: &Browser, angle_deg: f64) -> Result<()> {
    let script = format!(
        "const done = arguments[0];
        const box = document.querySelector('[aria-label=\"Blade angle at station 100, degrees\"]');
        box.value = '{angle_deg:.2}';
        for (const kind of ['input', 'change']) {{ box.dispatchEvent(new Event(kind, {{ bubbles: true }})); }}
        let last = performance.now();
        const watch = new MutationObserver(() => {{ last = performance.now(); }});
        watch.observe(document.getElementById('app'), {{ childList: true, subtree: true, characterData: true, attributes: true }});
        const timer = setInterval(() => {{
            if (performance.now() - last > 300) {{ clearInterval(timer); watch.disconnect(); done(true); }}
        }}, 50);"
    );
    browser.run_async(&script).await.map(drop)
}

/// Memory of the module and of the page's scripts, bytes.
async fn memory(browser: &Browser) -> Result<[f64; 2]> {
    browser.command("HeapProfiler.collectGarbage", serde_json::json!({})).await?;
    let heap = browser.command("Runtime.getHeapUsage", serde_json::json!({})).await?;
    let module = browser.run("return window.moduleMemory.buffer.byteLength").await?;
    Ok([module.as_f64().context("no module")?, heap["usedSize"].as_f64().context("no heap")?])
}

/// `SPOKESHAVE_EDITS=500` goes on longer.
#[tokio::test(flavor = "multi_thread")]
async fn a_large_job_edited_again_and_again_does_not_grow_the_page() -> Result<()> {
    let edits: u32 = std::env::var("SPOKESHAVE_EDITS").map_or(Ok(12), |n| n.parse())?;
    drive("growth", async |browser| {
        browser
            .before_any_script(
                "const instantiate = WebAssembly.instantiate;
                WebAssembly.instantiate = (...given) => instantiate(...given).then(made => {
                    const memory = (made.instance || made).exports.memory;
                    if (!window.moduleMemory || memory.buffer.byteLength > window.moduleMemory.buffer.byteLength) { window.moduleMemory = memory; }
                    return made;
                });",
            )
            .await?;
        browser.open_page().await?;
        let job = serde_json::to_string(&large()?.to_json())?;
        browser.run(&format!("spokeshave.keep.before({job}); spokeshave.keep.after()")).await?;
        browser.reload().await?;
        let mut known = Vec::new();
        for i in 0..edits {
            edit(browser, 15.0 + 0.01 * f64::from(i)).await?;
            if i == edits / 2 - 1 || i == edits - 1 {
                known.push(memory(browser).await?);
            }
        }
        let [half, whole] = known[..] else { anyhow::bail!("two readings") };
        let [before, after] = [half, whole].map(|bytes| bytes.map(|b| b / 1e6));
        println!(
            "module and scripts, MB: {:.1} {:.1} after {} edits, {:.1} {:.1} after {edits}",
            before[0],
            before[1],
            edits / 2,
            after[0],
            after[1]
        );
        let allowed = SLACK_BYTES + STEP_BYTES * f64::from(edits - edits / 2);
        for (half, whole) in half.iter().zip(&whole) {
            ensure!(whole - half <= allowed, "{half} bytes grew to {whole}, {allowed} more are allowed");
        }
        Ok(())
    })
    .await
}
