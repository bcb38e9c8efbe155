//! Readings of carved blades are typed on a phone; what is hard to believe waits for a word.

use anyhow::{Context, Result};
use fantoccini::key::Key;
use serde_json::{Value, json};
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave_tests::browser::{Browser, NARROW, drive};

/// Stations that are measured, of the example's eleven.
const MEASURED: usize = 8;

fn enter() -> String {
    String::from(char::from(Key::Enter))
}

/// The job that the page keeps.
async fn kept(browser: &Browser) -> Result<Option<Job>> {
    let text = browser.run("return spokeshave.keep.atStart()").await?;
    Ok(text.as_str().and_then(|text| Job::from_json(text).ok()))
}

/// Goes on by the keyboard until a box of the readings has the focus.
async fn first_box(browser: &Browser) -> Result<()> {
    browser
        .run("const head = document.querySelector('#carved > summary'); head.scrollIntoView(); head.focus()")
        .await?;
    browser.keys(&enter()).await?;
    browser.wait_for_text("Type what the protractor").await?;
    for _ in 0..6 {
        browser.keys(&String::from(char::from(Key::Tab))).await?;
        let here = browser.run("return document.activeElement.matches('.carved-blades input.entry')").await?;
        if here == Value::Bool(true) {
            return Ok(());
        }
    }
    anyhow::bail!("no box of the readings comes after the heading")
}

/// The name of what has the focus.
async fn here(browser: &Browser) -> Result<String> {
    let name = browser.run("return document.activeElement.getAttribute('aria-label') || ''").await?;
    Ok(name.as_str().context("no name")?.to_owned())
}

/// What callipers and protractor read of a blade: angle on the face, chord and thickness at each station, as
/// typed.
fn read(rig: &Rig, blade: usize) -> [Vec<String>; 3] {
    let drawn = &rig.rotor.blade;
    let radii: Vec<f64> = drawn.station_radii_m().take(MEASURED).collect();
    let off = if blade == 0 { 0.4 } else { -0.3 };
    let angle = |r: &f64| {
        let face = drawn.cut(*r).angle_rad - drawn.face_to_chord_rad(*r).unwrap_or(0.0);
        let degrees = face.to_degrees() + off;
        // Every other one in degrees and minutes.
        let minutes = (60.0 * degrees).round() as i64;
        if blade == 0 { format!("{} {:02}", minutes / 60, minutes % 60) } else { format!("{degrees:.2}") }
    };
    let chord = |r: &f64| format!("{:.1}", 1e3 * drawn.cut(*r).chord_m + off);
    let thickness = |r: &f64| {
        let cut = drawn.cut(*r);
        format!("{:.1}", 1e3 * cut.chord_m * cut.thickness_ratio)
    };
    [
        radii.iter().map(angle).collect(),
        radii.iter().map(chord).collect(),
        radii.iter().map(thickness).collect(),
    ]
}

#[tokio::test(flavor = "multi_thread")]
async fn two_blades_of_eight_stations_are_typed_on_a_phone_without_a_mouse() -> Result<()> {
    let rig = Rig::new(&Job::from_json(DEMOS[0].json)?)?;
    drive("readings-phone", async |browser| {
        browser.set_size(NARROW).await?;
        browser.open_page().await?;
        first_box(browser).await?;
        // Large enough for a thumb, and letters that do not make a phone zoom in.
        let small = browser
            .run(
                "return [...document.querySelectorAll('.carved-blades input.entry')].filter(box => {
                    const place = box.getBoundingClientRect();
                    return place.height < 44 || place.width < 44 || parseFloat(getComputedStyle(box).fontSize) < 16;
                }).length",
            )
            .await?;
        assert_eq!(small, json!(0), "boxes too small");
        assert!(browser.sideways_overflow().await? <= 0.0);
        let stations = rig.job.propeller.stations.len();
        for blade in 0..2 {
            for (column, values) in read(&rig, blade).iter().enumerate() {
                for station in 0..stations {
                    let text = values.get(station).map_or("", String::as_str);
                    let name = here(browser).await?;
                    assert!(name.contains(&format!("blade {}", blade + 1)), "{column} {station}: {name}");
                    browser.keys(&format!("{text}{}", enter())).await?;
                }
            }
            // Nobody read the track.
            for _ in 0..stations {
                browser.keys(&enter()).await?;
            }
        }
        let all = async || {
            let job = kept(browser).await?;
            Ok(job.filter(|job| {
                job.carved.as_ref().is_some_and(|c| {
                    c.blades.iter().all(|b| b.readings.len() == MEASURED) && c.blades.len() == 2
                })
            }))
        };
        let job = browser.wait("sixteen readings kept", all).await?;
        let carved = job.carved.context("no readings")?;
        let drawn = &rig.rotor.blade;
        for (blade, off) in carved.blades.iter().zip([0.4, -0.3]) {
            for (reading, r) in blade.readings.iter().zip(drawn.station_radii_m()) {
                let face = drawn.cut(r).angle_rad - drawn.face_to_chord_rad(r).context("no face")?;
                let angle_deg = reading.angle_deg.context("no angle")? - face.to_degrees();
                let chord_mm = 1e3 * (reading.chord_m.context("no chord")? - drawn.cut(r).chord_m);
                assert!((angle_deg - off).abs() < 0.02, "{reading:?}");
                assert!((chord_mm - off).abs() < 0.06, "{reading:?}");
                assert!(reading.thickness_m.is_some() && reading.track_m.is_none());
            }
        }
        browser.wait_for_text("Blade 2 against the drawing").await?;
        browser.wait_for_text("What to take off").await?;
        assert!(browser.sideways_overflow().await? <= 0.0);
        Ok(())
    })
    .await
}

#[tokio::test(flavor = "multi_thread")]
async fn a_reading_that_is_hard_to_believe_is_left_out_until_it_is_confirmed() -> Result<()> {
    let rig = Rig::new(&Job::from_json(DEMOS[0].json)?)?;
    let drawn = &rig.rotor.blade;
    let on_face = |r: f64| Some((drawn.cut(r).angle_rad - drawn.face_to_chord_rad(r)?).to_degrees());
    let faces: Vec<f64> = drawn.station_radii_m().filter_map(on_face).collect();
    // The first read from the shaft, the second as drawn.
    let (shaft, face) = (format!("{:.1}", 90.0 - faces[0]), format!("{:.1}", faces[1]));
    drive("readings-doubted", async |browser| {
        browser.set_size(NARROW).await?;
        browser.open_page().await?;
        first_box(browser).await?;
        browser.keys(&format!("{shaft}{}{face}{}", enter(), enter())).await?;
        browser.wait_for_text("perhaps read from the shaft").await?;
        browser.wait_for_text("Left out until it is mended or you say that it is right.").await?;
        let line = "return document.querySelector('#carved > summary').innerText";
        browser
            .wait("the heading to say so", async || {
                let said = browser.run(line).await?;
                Ok(said
                    .as_str()
                    .filter(|text| text.contains("hard to believe and left out: 1"))
                    .map(str::to_owned))
            })
            .await?;
        // The bar of steps lies over the foot of a narrow window.
        browser
            .run("document.querySelector('#carved .carved-said button').scrollIntoView({ block: 'center' })")
            .await?;
        browser.control("button", "It is right: count it").await?.click().await?;
        browser.wait_for_text("It counts, for you said that it is right.").await?;
        let job = browser
            .wait("a confirmed reading", async || {
                Ok(kept(browser).await?.filter(|job| {
                    job.carved.iter().flat_map(|c| &c.blades).flat_map(|b| &b.readings).any(|r| r.confirmed)
                }))
            })
            .await?;
        let read = job.carved.context("no readings")?.blades[0].readings[0].angle_deg;
        assert_eq!(read, Some(shaft.parse()?));
        Ok(())
    })
    .await
}
