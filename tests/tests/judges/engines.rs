//! The page in the other browser engines: one job from the drawing to the logbook in each, judged by the
//! core's own figures.

use std::path::Path;

use anyhow::{Context, Result};
use serde_json::{Value, json};
use spokeshave::carved;
use spokeshave::change::{Wanted, changes};
use spokeshave::job::{
    Aircraft, AngleReference, BladeReading, Carved, CarvedBlade, DEMOS, Engine, Figure, Job, LogReading,
    Logbook,
};
use spokeshave::logbook;
use spokeshave::rig::Rig;
use spokeshave::shape::twist;
use spokeshave::wood::strength;
use spokeshave_tests::browser::{built_page, target_folder};
use spokeshave_tests::judge::ask;
use spokeshave_tests::page::{computed_departures_deg, example, with_angle};
use spokeshave_tests::taken::{FILES, SHEETS, same_files};
use spokeshave_tests::tools::axe_script;

/// The station that is turned, from 1 at the hub, and by how much, degrees.
const STATION: usize = 6;
const TURN_DEG: f64 = 1.5;
/// The station that is reached and turned by the keyboard.
const KEYS_STATION: usize = 4;
/// Mass that is typed, kg.
const MASS_KG: f64 = 520.0;
/// Row of the full-throttle curve, from 1, and the power typed there, kW.
const ROW: usize = 3;
const POWER_KW: f64 = 56.0;
/// The cruise, the flight point selected at the start, and the standing start.
const CRUISE: usize = 2;
const STANDING: usize = 0;
/// Stations measured on each blade, and how far its angles lie off the drawing, degrees.
const MEASURED: usize = 3;
const OFF_DEG: [f64; 2] = [0.4, -0.3];
/// How much faster it is wanted to turn standing, rpm.
const WANTED_RPM: f64 = 40.0;
/// How far figures kept by the page may be off those of the core: another processor's elementary functions.
const SAME: f64 = 1e-6;

/// What the page has to show of a job: departures of the station, rpm of every flight point.
fn figures(job: &Job, station: usize) -> Result<Value> {
    let rpm: Vec<Option<f64>> = Rig::new(job)?.analysis().flight_points.iter().map(|p| p.rpm).collect();
    Ok(json!({"departures": computed_departures_deg(job, station)?, "rpm": rpm}))
}

/// The job through the edits that are typed, with each box and what is typed there.
fn edits(drawn: &Job) -> Result<(Job, Vec<Value>)> {
    let angle_deg = drawn.propeller.stations[STATION - 1].angle_deg.context("drawn by pitch")?;
    let turned_deg = format!("{:.1}", angle_deg + TURN_DEG);
    let turned = with_angle(drawn, STATION, turned_deg.parse()?)?;
    let mut heavier = turned.clone();
    match &mut heavier.aircraft {
        Some(Aircraft::Aeroplane(aeroplane)) => aeroplane.mass_kg = MASS_KG,
        _ => anyhow::bail!("the example is no aeroplane"),
    }
    let mut stronger = heavier.clone();
    match &mut stronger.engine {
        Some(Engine::Piston(piston)) => piston.full_throttle[ROW - 1].power_w = 1e3 * POWER_KW,
        _ => anyhow::bail!("the example has no piston engine"),
    }
    let box_of = |label: String, text: String, job: &Job| {
        Ok::<_, anyhow::Error>(json!({"label": label, "text": text, "shown": figures(job, STATION)?}))
    };
    let all = vec![
        box_of(format!("Blade angle at station {STATION}, degrees"), turned_deg, &turned)?,
        box_of("Mass in flight, kg".into(), MASS_KG.to_string(), &heavier)?,
        box_of(format!("Power in row {ROW} of the curve, kW"), POWER_KW.to_string(), &stronger)?,
    ];
    Ok((stronger, all))
}

/// What a protractor reads on the flat face of both blades, as typed, and the job with it.
fn measured(job: &Job) -> Result<(Job, Vec<Vec<String>>)> {
    let rig = Rig::new(job)?;
    let drawn = &rig.rotor.blade;
    let face = |r: f64| Some((drawn.cut(r).angle_rad - drawn.face_to_chord_rad(r)?).to_degrees());
    let radii: Vec<f64> = drawn.station_radii_m().take(MEASURED).collect();
    let faces: Vec<f64> = radii.iter().filter_map(|r| face(*r)).collect();
    let typed = OFF_DEG.map(|off| faces.iter().map(|deg| format!("{:.2}", deg + off)).collect::<Vec<_>>());
    let reading = |(radius_m, text): (&f64, &String)| {
        let angle_deg = Some(text.parse()?);
        Ok(BladeReading { radius_m: *radius_m, angle_deg, ..BladeReading::default() })
    };
    let blade = |texts: &Vec<String>| {
        let readings = radii.iter().zip(texts).map(reading).collect::<Result<_>>()?;
        Ok(CarvedBlade { readings })
    };
    let blades = typed.iter().map(blade).collect::<Result<_>>()?;
    let carved = Carved { angle_reference: AngleReference::FlatFace, blades, ..Carved::default() };
    Ok((Job { carved: Some(carved), ..job.clone() }, typed.to_vec()))
}

/// A standing run at full throttle, a little faster than expected, as typed, and the job with it.
fn logged(job: &Job) -> Result<(Job, String)> {
    let rpm = Rig::new(job)?.point(STANDING).and_then(|p| p.rpm).context("no rpm standing")?;
    let typed = format!("{:.0}", 1.01 * rpm);
    let reading =
        LogReading { engine_rpm: Some(typed.parse()?), throttle: Some(1.0), ..LogReading::default() };
    let logbook = Logbook { readings: vec![reading], ..Logbook::default() };
    Ok((Job { logbook: Some(logbook), ..job.clone() }, typed))
}

/// The whole task as the judge wants it, and the job that is in the file at its end.
fn task() -> Result<(Value, Job)> {
    let drawn = example()?;
    let (edited, edits) = edits(&drawn)?;
    let weights: Vec<f64> =
        (0..edited.flight_points.len()).map(|i| f64::from(u8::from(i == CRUISE))).collect();
    let twisted = twist(&Rig::new(&edited)?, &weights)?.job;
    let (carved, faces) = measured(&twisted)?;
    let differences = carved::analyse(&Rig::new(&carved)?)?;
    let from_drawn = |blade: &spokeshave::result::CarvedBlade| {
        blade.stations.iter().map(|s| s.angle_deg.from_drawn).collect::<Vec<_>>()
    };
    let (whole, rpm) = logged(&carved)?;
    let whole_rig = Rig::new(&whole)?;
    let told = logbook::estimate(&whole_rig)?;
    let known = Rig::with_factors(&whole, &told.estimate.factors)?;
    let standing = known.point(STANDING).and_then(|p| p.rpm).context("no rpm standing")?;
    let wanted_rpm = (standing + WANTED_RPM).round();
    let wanted = Wanted { point: STANDING, figure: Figure::Rpm, value: wanted_rpm };
    let changes = changes(&known, &wanted)?;
    let margins = strength(&whole_rig)?.stations.into_iter().map(|s| s.margin.map(|m| 100.0 * m));
    let task = json!({
        "station": STATION, "drawn": figures(&drawn, STATION)?, "edits": edits,
        "twisted": figures(&twisted, STATION)?,
        "faces": faces, "from_drawn": differences.blades.iter().map(from_drawn).collect::<Vec<_>>(),
        "log_rpm": rpm, "factors": told.estimate.found.iter().map(|f| f.value).collect::<Vec<_>>(),
        "wanted_rpm": wanted_rpm.to_string(),
        "changes_mm": changes.iter().filter(|c| !c.is_in_vain()).map(|c| [1e3 * c.diameter_m, 1e3 * c.pitch_m]).collect::<Vec<_>>(),
        "margins_percent": margins.collect::<Vec<_>>(),
        "files": FILES.map(|f| f.0).into_iter().chain([SHEETS]).collect::<Vec<_>>(),
        "diameter_m": whole.propeller.diameter_m, "title": whole.title,
        "about": listed(DEMOS[0].about),
    });
    Ok((task, whole))
}

/// An example as the page lists it.
fn listed(about: &str) -> String {
    let mut letters = about.chars();
    letters.next().into_iter().flat_map(char::to_uppercase).chain(letters).collect()
}

/// What is chosen and changed by the keyboard alone: the second example.
fn by_keyboard() -> Result<Value> {
    let demo = DEMOS.get(1).context("no second example")?;
    let drawn = Job::from_json(demo.json)?;
    let angle_deg = drawn.propeller.stations[KEYS_STATION - 1].angle_deg.context("drawn by pitch")?;
    let text = format!("{:.1}", angle_deg + TURN_DEG);
    let turned = with_angle(&drawn, KEYS_STATION, text.parse()?)?;
    Ok(json!({
        "about": listed(demo.about), "station": KEYS_STATION, "text": text, "title": drawn.title,
        "drawn": figures(&drawn, KEYS_STATION)?, "turned": figures(&turned, KEYS_STATION)?,
    }))
}

/// Whether two JSON values are alike but for the last digits of numbers.
fn alike(a: &Value, b: &Value) -> bool {
    match (a, b) {
        (Value::Number(_), Value::Number(_)) => a
            .as_f64()
            .zip(b.as_f64())
            .is_some_and(|(a, b)| (a - b).abs() <= SAME * (1.0 + a.abs().max(b.abs()))),
        (Value::Array(a), Value::Array(b)) => a.len() == b.len() && a.iter().zip(b).all(|(a, b)| alike(a, b)),
        (Value::Object(a), Value::Object(b)) => {
            a.len() == b.len() && a.iter().all(|(key, a)| b.get(key).is_some_and(|b| alike(a, b)))
        }
        _ => a == b,
    }
}

fn saved(file: &Path, wanted: &Job) -> Result<()> {
    let text =
        std::fs::read_to_string(file).with_context(|| format!("nothing saved at {}", file.display()))?;
    let (found, wanted) = (serde_json::to_value(Job::from_json(&text)?)?, serde_json::to_value(wanted)?);
    anyhow::ensure!(alike(&found, &wanted), "the file holds another job: {found} for {wanted}");
    Ok(())
}

fn the_page_holds_in(engine: &str) -> Result<()> {
    let (task, whole) = task()?;
    let folder = tempfile::tempdir()?;
    let asked = json!({
        "page": built_page()?, "axe": axe_script(&target_folder()?), "folder": folder.path(),
        "task": task, "keyboard": by_keyboard()?,
    });
    let file = folder.path().join("asked.json");
    std::fs::write(&file, asked.to_string())?;
    print!("{}", ask("engines.py", &[engine, file.to_str().context("a plain path")?])?);
    let file = folder.path().join("saved.json");
    // Where the environment leaves the job out, nothing is saved.
    if std::env::var("SPOKESHAVE_ENGINES").is_ok() && !file.exists() {
        return Ok(());
    }
    saved(&file, &whole)?;
    same_files(&folder.path().join("downloads"), &whole, CRUISE)
}

#[test]
fn validate_page_firefox() {
    the_page_holds_in("firefox").unwrap();
}

#[test]
fn validate_page_webkit() {
    the_page_holds_in("webkit").unwrap();
}
