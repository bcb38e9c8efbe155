//! Stations and fits before `SciPy`, the atmosphere before ambiance, sections before sectionproperties.

use std::time::Instant;

use serde_json::{Value, json};
use spokeshave::air::Air;
use spokeshave::job::{Aircraft, DEMOS, FlightPoint, Job, Setting};
use spokeshave::rig::Rig;
use spokeshave::rotor::Condition;
use spokeshave::rotor::element::Element;
use spokeshave::section::library;
use spokeshave::wood::section::Shape;
use spokeshave_tests::judge::ask;

/// How many stations of each example are solved anew.
const STATIONS: u32 = 24;
/// Heights at which fits are solved anew, m.
const HEIGHTS_M: [f64; 2] = [0.0, 2500.0];
/// Rounds of which the quickest is taken as the program's time.
const ROUNDS: u32 = 200;

/// Asks a judge about what is written to a file; gives what it says.
fn judged(script: &str, what: &Value) -> String {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("asked.json");
    std::fs::write(&file, what.to_string()).unwrap();
    let said = ask(script, &[file.to_str().unwrap()]).unwrap();
    print!("{said}");
    said
}

/// The golden ratio's multiples spread evenly over 0 to 1: the same each time.
fn spread(i: u32, k: u32) -> f64 {
    (f64::from(i + 1) * [0.618_033_988_7, 0.754_877_666_2, 0.569_840_291_0][k as usize]).fract()
}

fn demos() -> impl Iterator<Item = Rig> {
    DEMOS.iter().map(|demo| Rig::new(&Job::from_json(demo.json).unwrap()).unwrap())
}

/// A radius and a condition at some speed of flight and rotation.
fn place(rig: &Rig, i: u32) -> Option<(f64, Condition)> {
    let (blade, known) = (&rig.rotor.blade, rig.condition(0)?);
    let tip_m_s = known.rotation_rad_s * blade.radius_m * (0.5 + 0.6 * spread(i, 0));
    let at = Condition {
        rotation_rad_s: tip_m_s / blade.radius_m,
        // One in four stands still.
        airspeed_m_s: if i.is_multiple_of(4) { 0.0 } else { 0.8 * tip_m_s * spread(i, 1) },
        ..known
    };
    let first = blade.station_radii_m().next()?;
    Some((first + (0.98 * blade.radius_m - first) * spread(i, 2), at))
}

/// The stations of an example whose air comes from ahead: there the judge looks.
fn stations(rig: &Rig) -> Vec<(f64, Condition, Element<'_>)> {
    let ahead = |(radius_m, at): (f64, Condition)| {
        let element = rig.rotor.element(&rig.rotor.ring(radius_m), &at).0;
        element.balance().filter(|b| b.inflow_rad > 0.0).map(|_| (radius_m, at, element))
    };
    (0..STATIONS).filter_map(|i| place(rig, i)).filter_map(ahead).collect()
}

/// A station as the judge is asked for it.
fn station(rig: &Rig, job: usize, (radius_m, at, element): &(f64, Condition, Element<'_>)) -> Option<Value> {
    let name = format!("{}, r {radius_m:.4} m, {:.2} m/s", rig.job.title, at.airspeed_m_s);
    Some(json!({
        "name": name, "job": job, "altitude_m": rig.job.flight_points[0].altitude_m, "radius_m": radius_m,
        "airspeed_m_s": at.airspeed_m_s, "rotation_rad_s": at.rotation_rad_s,
        "inflow_rad": element.balance()?.inflow_rad,
    }))
}

/// A flight point of the job solved by the program.
fn fit(rig: &Rig, job: usize, setting: &Setting, altitude_m: f64, airspeed_m_s: f64) -> Option<Value> {
    let point = FlightPoint {
        name: format!("{} at {airspeed_m_s} m/s, {altitude_m} m", rig.job.title),
        altitude_m,
        isa_offset_k: 0.0,
        airspeed_m_s: Some(airspeed_m_s),
        setting: setting.clone(),
    };
    let here = Rig::new(&Job { flight_points: vec![point.clone()], ..rig.job.clone() }).unwrap();
    let found_rpm = here.point(0)?.rpm?;
    let setting = if *setting == (Setting::Level {}) { "level" } else { "full-throttle" };
    Some(json!({
        "name": format!("{}, {setting}", point.name), "job": job, "altitude_m": altitude_m,
        "setting": setting, "airspeed_m_s": airspeed_m_s, "found_rpm": found_rpm,
    }))
}

/// Full throttle and level flight of an example over speeds and heights, as far as it has them.
fn fits(rig: &Rig, job: usize) -> Vec<Value> {
    let speeds: &[f64] = match &rig.job.aircraft {
        Some(Aircraft::Multirotor(_)) => &[0.0],
        _ if rig.job.propeller.diameter_m > 1.0 => &[0.0, 25.0, 35.0, 45.0],
        _ => &[0.0, 14.0, 18.0, 24.0],
    };
    let at = |speed: &f64| {
        let level = if *speed > 0.0 || speeds.len() == 1 { Some(Setting::Level {}) } else { None };
        let settings = std::iter::once(Setting::FullThrottle {}).chain(level);
        settings.flat_map(|s| HEIGHTS_M.map(|h| fit(rig, job, &s, h, *speed))).flatten().collect::<Vec<_>>()
    };
    speeds.iter().flat_map(at).collect()
}

/// Time of one balance of the program, on average over the stations, ms: the least of some rounds.
fn balance_ms(rigs: &[Rig]) -> f64 {
    let all: Vec<_> = rigs.iter().flat_map(stations).map(|(_, _, element)| element).collect();
    let round = |_| {
        let begun = Instant::now();
        let lookups: u32 = all.iter().filter_map(Element::balance).map(|b| b.lookups).sum();
        assert!(lookups > 0);
        begun.elapsed().as_secs_f64() * 1e3 / all.len() as f64
    };
    (0..ROUNDS).map(round).fold(f64::INFINITY, f64::min)
}

/// The judge has the job files and the shipped tables of sections, and nothing else of the program's.
#[test]
fn validate_stations_and_fits_scipy() {
    let rigs: Vec<Rig> = demos().collect();
    let jobs: Vec<Value> = rigs.iter().map(|rig| serde_json::from_str(&rig.job.to_json()).unwrap()).collect();
    let of = |(job, rig): (usize, &Rig)| -> Vec<Value> {
        stations(rig).iter().filter_map(|s| station(rig, job, s)).collect()
    };
    let asked: Vec<Value> = rigs.iter().enumerate().flat_map(of).collect();
    let fits: Vec<Value> = rigs.iter().enumerate().flat_map(|(job, rig)| fits(rig, job)).collect();
    assert!(asked.len() > 60 && fits.len() > 20, "{} stations, {} fits", asked.len(), fits.len());
    let said = judged("solves.py", &json!({ "jobs": jobs, "stations": asked, "fits": fits }));
    let scipy_ms: f64 = said.lines().last().and_then(|time| time.parse().ok()).unwrap();
    // Told and not judged: a time depends on the machine.
    println!("one station: SciPy {scipy_ms:.2} ms, the program {:.5} ms", balance_ms(&rigs));
}

#[test]
fn validate_atmosphere_ambiance() {
    let rows: Vec<[f64; 6]> = (0..=40)
        .map(|i| {
            let h = 500.0 * f64::from(i);
            let air = Air::standard(h, 0.0).unwrap();
            [
                h,
                air.pressure_pa,
                air.density_kg_m3,
                air.temperature_k,
                air.sound_speed_m_s,
                air.viscosity_pa_s,
            ]
        })
        .collect();
    judged("atmosphere.py", &json!(rows));
}

#[test]
fn validate_drawn_sections_sectionproperties() {
    let rig = demos().next().unwrap();
    let names: Vec<&str> = library().names().collect();
    let section = |name: &str, thickness_ratio: f64| {
        let outline = rig.job.section_outline(name, thickness_ratio)?;
        let found = Shape::of(&outline).sized(1.0, outline.thickness_ratio());
        let (least, greatest, _) = found.principal();
        Some(json!({
            "name": format!("{name} {:.0} % thick", 100.0 * thickness_ratio), "points": outline.points(),
            "area": found.area_m2, "least": least, "greatest": greatest, "torsion": found.torsion_m4,
        }))
    };
    // Each once: its analysis of torsion takes seconds.
    let thick = [0.09, 0.17, 0.32].into_iter().cycle();
    let asked: Vec<Value> = names.iter().zip(thick).filter_map(|(name, t)| section(name, t)).collect();
    assert_eq!(asked.len(), names.len());
    judged("sections.py", &json!(asked));
}
