//! The page in the other browser engines: the same task in each, judged by the core's own figures.

use anyhow::{Context, Result};
use serde_json::json;
use spokeshave_tests::browser::{built_page, target_folder};
use spokeshave_tests::judge::ask;
use spokeshave_tests::page::{computed_departures_deg, example, with_angle};
use spokeshave_tests::tools::axe_script;

/// The station that is turned, from 1 at the hub.
const STATION: usize = 6;
/// By how much, degrees.
const TURN_DEG: f64 = 1.5;

fn the_page_holds_in(engine: &str) -> Result<()> {
    let drawn = example()?;
    let angle_deg = drawn.propeller.stations[STATION - 1].angle_deg.context("drawn by pitch")?;
    let text = format!("{:.1}", angle_deg + TURN_DEG);
    let turned = with_angle(&drawn, STATION, text.parse()?)?;
    let asked = json!({
        "page": built_page()?, "axe": axe_script(&target_folder()?), "text": text, "station": STATION,
        "label": format!("Blade angle at station {STATION}, degrees"),
        "before": computed_departures_deg(&drawn, STATION)?, "after": computed_departures_deg(&turned, STATION)?,
    });
    let folder = tempfile::tempdir()?;
    let file = folder.path().join("asked.json");
    std::fs::write(&file, asked.to_string())?;
    print!("{}", ask("engines.py", &[engine, file.to_str().context("a plain path")?])?);
    Ok(())
}

#[test]
fn validate_page_firefox() {
    the_page_holds_in("firefox").unwrap();
}

#[test]
fn validate_page_webkit() {
    the_page_holds_in("webkit").unwrap();
}
