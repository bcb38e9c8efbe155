//! Better blades are made on the page, compared, taken and given back.

use anyhow::{Context, Result};
use spokeshave::job::{FlightPoint, Job};
use spokeshave::rig::Rig;
use spokeshave::shape::twist;
use spokeshave_tests::browser::{Browser, drive};
use spokeshave_tests::page::example;

/// The cruise, the flight point selected at the start.
const CRUISE: usize = 2;
/// A station in the middle of the blade.
const STATION: usize = 6;

/// The job with the best-incidence twist of the core.
fn twisted(job: &Job) -> Result<Job> {
    let rig = Rig::new(job)?;
    let weights: Vec<f64> = (0..job.flight_points.len()).map(|i| f64::from(u8::from(i == CRUISE))).collect();
    Ok(twist(&rig, &weights)?.job)
}

/// The blade angle that the box of a station has to show.
fn angle(job: &Job, station: usize) -> Result<f64> {
    job.propeller.stations[station].angle_deg.context("no angle")
}

async fn wait_for_angle(browser: &Browser, wanted_deg: f64) -> Result<()> {
    let shown = async || {
        let text = browser.angle_box(STATION + 1).await?.value().await?;
        Ok(text.parse::<f64>().is_ok_and(|deg| (deg - wanted_deg).abs() < 0.051).then_some(()))
    };
    browser.wait(&format!("{wanted_deg:.2}° at station {}", STATION + 1), shown).await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_twist_is_made_compared_used_and_taken_back() -> Result<()> {
    let before = example()?;
    let after = twisted(&before)?;
    assert!((angle(&before, STATION)? - angle(&after, STATION)?).abs() > 0.2, "something to see");
    drive("twist", async |browser| {
        browser.open_page().await?;
        wait_for_angle(browser, angle(&before, STATION)?).await?;
        browser.press("Best-incidence twist at Cruise").await?;
        browser.wait_for_text("“twist, Cruise” stands beside the drawn blade").await?;
        // It is compared at once, and never over the drawn one.
        wait_for_angle(browser, angle(&before, STATION)?).await?;
        let ghosts = browser.run("return document.querySelectorAll('svg .ghost').length").await?;
        assert!(ghosts.as_u64().context("no number")? >= 4, "ghosts: {ghosts}");
        browser.wait_for_text("Grey: twist, Cruise.").await?;
        browser.press("Compare twist, Cruise").await?;
        let gone = async || {
            Ok(browser.run("return !document.querySelector('svg .ghost')").await?.as_bool().filter(|b| *b))
        };
        browser.wait("no ghost", gone).await?;
        browser.press("Use twist, Cruise").await?;
        wait_for_angle(browser, angle(&after, STATION)?).await?;
        browser.press("Undo: use twist, Cruise").await?;
        wait_for_angle(browser, angle(&before, STATION)?).await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn the_page_answers_during_a_search_which_keeps_its_best_when_called_off() -> Result<()> {
    drive("search", async |browser| {
        browser.open_page().await?;
        // Many elements and flight points, so that the search is still at it when it is called off.
        let mut job = example()?;
        job.method.elements = 400;
        let cruise = job.flight_points[CRUISE].clone();
        job.flight_points
            .extend((1..=4).map(|i| FlightPoint { name: format!("Cruise {i}"), ..cruise.clone() }));
        browser.run(&format!("spokeshave.keep.before({})", serde_json::to_string(&job.to_json())?)).await?;
        browser.reload().await?;
        browser.press("Search").await?;
        browser.wait_for_text("blades tried; best so far").await?;
        let begun = std::time::Instant::now();
        browser.control_starting("radio", "Climb").await?.click().await?;
        browser.wait_for_text("Best-incidence twist at Climb").await?;
        assert!(begun.elapsed().as_secs_f64() < 3.0, "the page does not answer");
        browser.press("Call it off").await?;
        browser.wait_for_text("Called off; this is the best it had found.").await?;
        browser.control("button", "Use search").await?;
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn impossible_wishes_are_refused_with_what_is_in_the_way() -> Result<()> {
    drive("impossible", async |browser| {
        browser.open_page().await?;
        browser.wait_for_text("What counts, limits, what stays as drawn").await?;
        browser.run("document.querySelector('.wishes').open = true").await?;
        browser.control("textbox", "Greatest diameter, mm").await?.enter("800").await?;
        browser.press("Search").await?;
        browser.wait_for_text("No blade within limits was found.").await?;
        let text = browser.text().await?;
        assert!(text.contains("diameter") && text.contains("past the limit"), "{text}");
        Ok(())
    })
    .await
}
