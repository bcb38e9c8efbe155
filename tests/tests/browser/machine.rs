//! Aircraft and engine are changed on the page: what follows is what the core says, and it can be taken back.

use anyhow::{Context, Result};
use spokeshave::job::{Aircraft, Job};
use spokeshave::rig::Rig;
use spokeshave_tests::browser::{Browser, drive};
use spokeshave_tests::page::example;

/// The cruise, a level flight, among the example's flight points.
const CRUISE: usize = 2;
/// Mass that is typed, kg: enough to be seen in the rpm.
const MASS_KG: f64 = 520.0;

/// The rpm that stands in the table at the cruise, digits only.
async fn shown_rpm(browser: &Browser) -> Result<String> {
    let cell =
        "const name = [...document.querySelectorAll('.points .name')].find(box => box.value === 'Cruise');
        const cell = name && name.closest('tr').querySelector('.figure-cell');
        return cell ? cell.textContent.replace(/[^0-9]/g, '') : ''";
    Ok(browser.run(cell).await?.as_str().context("no text")?.to_owned())
}

/// The rpm that the core computes at the cruise, as it is shown.
fn computed_rpm(job: &Job) -> Result<String> {
    let rpm = Rig::new(job)?.point(CRUISE).and_then(|point| point.rpm).context("no rpm at the cruise")?;
    Ok(format!("{rpm:.0}"))
}

async fn wait_for_rpm(browser: &Browser, job: &Job) -> Result<()> {
    let rpm = computed_rpm(job)?;
    browser.wait(&format!("{rpm} rpm"), async || Ok((shown_rpm(browser).await? == rpm).then_some(()))).await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_heavier_aircraft_turns_its_propeller_faster_in_level_flight_as_the_core_says() -> Result<()> {
    let before = example()?;
    let mut after = before.clone();
    match &mut after.aircraft {
        Some(Aircraft::Aeroplane(aeroplane)) => aeroplane.mass_kg = MASS_KG,
        _ => anyhow::bail!("the example is no aeroplane"),
    }
    assert_ne!(computed_rpm(&before)?, computed_rpm(&after)?);
    drive("mass", async |browser| {
        browser.open_page().await?;
        wait_for_rpm(browser, &before).await?;
        browser.control("textbox", "Mass in flight, kg").await?.enter(&format!("{MASS_KG}")).await?;
        wait_for_rpm(browser, &after).await?;
        browser.control_starting("button", "Undo: mass in flight").await?.click().await?;
        wait_for_rpm(browser, &before).await
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_row_of_the_engines_curve_is_added_and_taken_back() -> Result<()> {
    const NEW: &str = "Rpm in row 3 of the curve, rpm";
    drive("curve-row", async |browser| {
        let rows = async || {
            let names = browser.names("textbox").await?;
            Ok::<_, anyhow::Error>(names.iter().filter(|name| name.starts_with("Rpm in row")).count())
        };
        browser.open_page().await?;
        let before = rows().await?;
        browser.press("Full-throttle curve: add a row after row 2").await?;
        browser.wait("a row more", async || Ok((rows().await? == before + 1).then_some(()))).await?;
        assert_eq!(browser.control("textbox", NEW).await?.value().await?, "2600");
        browser.control_starting("button", "Undo: add a row").await?.click().await?;
        browser.wait("the rows as before", async || Ok((rows().await? == before).then_some(()))).await?;
        assert_eq!(browser.control("textbox", NEW).await?.value().await?, "2800");
        Ok(())
    })
    .await
}
