//! Stations and fits before `SciPy`, the atmosphere before ambiance, sections before sectionproperties.

use serde_json::{Value, json};
use spokeshave::air::Air;
use spokeshave::job::{DEMOS, FlightPoint, Job, Setting};
use spokeshave::rig::{Rig, rotation_rad_s};
use spokeshave::rotor::Condition;
use spokeshave::section::library;
use spokeshave::wood::section::Shape;
use spokeshave_tests::judge::ask;

/// How many stations of each example are solved anew.
const STATIONS: u32 = 24;
/// Points of a table over the whole turn, and of a table over rpm.
const ANGLES: u32 = 3600;
const SPEEDS: u32 = 60;

fn judged(script: &str, what: &Value) {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("asked.json");
    std::fs::write(&file, what.to_string()).unwrap();
    print!("{}", ask(script, &[file.to_str().unwrap()]).unwrap());
}

/// The golden ratio's multiples spread evenly over 0 to 1: the same each time.
fn spread(i: u32, k: u32) -> f64 {
    (f64::from(i + 1) * [0.618_033_988_7, 0.754_877_666_2, 0.569_840_291_0][k as usize]).fract()
}

fn demos() -> impl Iterator<Item = Rig> {
    DEMOS.iter().map(|demo| Rig::new(&Job::from_json(demo.json).unwrap()).unwrap())
}

/// A station at some speed of flight and rotation as the judge needs it; `None` where lift points backward or
/// the windmill brake state is met, for which the judge has no equations.
fn station(rig: &Rig, name: &str, i: u32) -> Option<Value> {
    let (blade, known) = (&rig.rotor.blade, rig.condition(0)?);
    let tip_m_s = known.rotation_rad_s * blade.radius_m * (0.5 + 0.6 * spread(i, 0));
    let at = Condition {
        rotation_rad_s: tip_m_s / blade.radius_m,
        // One in four stands still.
        airspeed_m_s: if i.is_multiple_of(4) { 0.0 } else { 0.45 * tip_m_s * spread(i, 1) },
        ..known
    };
    let first = blade.station_radii_m().next()?;
    let radius_m = first + (0.98 * blade.radius_m - first) * spread(i, 2);
    let element = rig.rotor.element(&rig.rotor.ring(radius_m), &at).0;
    let balance = element.balance()?;
    if balance.windmill_brake || balance.inflow_rad <= 0.0 || element.section.at(element.angle_rad).cl < 0.0 {
        return None;
    }
    let alpha_rad: Vec<f64> =
        (0..=ANGLES).map(|k| std::f64::consts::PI * (f64::from(2 * k) / f64::from(ANGLES) - 1.0)).collect();
    let of = |what: fn(&spokeshave::section::Coefficients) -> f64| -> Vec<f64> {
        alpha_rad.iter().map(|a| what(&element.section.at(*a))).collect()
    };
    Some(json!({
        "name": format!("{name}, r {radius_m:.4} m, {:.2} m/s, {tip_m_s:.1} m/s at the tip", at.airspeed_m_s),
        "axial_m_s": element.axial_m_s, "turning_m_s": element.turning_m_s, "angle_rad": element.angle_rad,
        "solidity": element.solidity, "blades": blade.count, "radius_m": radius_m, "tip_m": blade.radius_m,
        "hub_m": blade.hub_radius_m, "hub_loss": rig.job.method.hub_loss,
        "cl": of(|c| c.cl), "cd": of(|c| c.cd), "alpha_rad": alpha_rad, "inflow_rad": balance.inflow_rad,
    }))
}

/// A flight point of the job solved by the program, with what its propeller gives and takes over rpm.
fn fit(rig: &Rig, setting: &Setting, altitude_m: f64, airspeed_m_s: f64) -> Option<Value> {
    let point = FlightPoint {
        name: format!("{} at {airspeed_m_s} m/s, {altitude_m} m", rig.job.title),
        altitude_m,
        isa_offset_k: 0.0,
        airspeed_m_s: Some(airspeed_m_s),
        setting: setting.clone(),
    };
    let here = Rig::new(&Job { flight_points: vec![point.clone()], ..rig.job.clone() }).unwrap();
    let found_rpm = here.point(0)?.rpm?;
    let at = here.condition(0)?;
    let rpm: Vec<f64> =
        (0..=SPEEDS).map(|k| found_rpm * (0.7 + 0.6 * f64::from(k) / f64::from(SPEEDS))).collect();
    let loads: Vec<(f64, f64)> = rpm
        .iter()
        .map(|rpm| {
            let loads = here.rotor.loads(&Condition { rotation_rad_s: rotation_rad_s(*rpm), ..at });
            (loads.thrust_n, loads.torque_n_m * rotation_rad_s(*rpm))
        })
        .collect();
    let (thrust_n, power_w): (Vec<f64>, Vec<f64>) = loads.into_iter().unzip();
    let setting = if *setting == (Setting::Level {}) { "level" } else { "full-throttle" };
    Some(json!({
        "name": format!("{}, {setting}", point.name), "setting": setting, "airspeed_m_s": airspeed_m_s,
        "air": { "density_kg_m3": at.air.density_kg_m3 },
        "job": serde_json::from_str::<Value>(&rig.job.to_json()).unwrap(),
        "rpm": rpm, "thrust_n": thrust_n, "power_w": power_w, "found_rpm": found_rpm,
    }))
}

#[test]
fn validate_stations_and_fits_scipy() {
    let stations: Vec<Value> = demos()
        .flat_map(|rig| (0..STATIONS).filter_map(|i| station(&rig, &rig.job.title, i)).collect::<Vec<_>>())
        .collect();
    let fits: Vec<Value> = demos()
        .flat_map(|rig| {
            let speeds: &[f64] = match &rig.job.aircraft {
                Some(spokeshave::job::Aircraft::Multirotor(_)) => &[0.0],
                _ if rig.job.propeller.diameter_m > 1.0 => &[0.0, 25.0, 35.0, 45.0],
                _ => &[0.0, 14.0, 18.0, 24.0],
            };
            let at = |speed: &f64| {
                let level = if *speed > 0.0 || speeds.len() == 1 { Some(Setting::Level {}) } else { None };
                let settings = std::iter::once(Setting::FullThrottle {}).chain(level);
                let heights = [0.0, 2500.0];
                let all = settings.flat_map(|s| heights.map(|h| fit(&rig, &s, h, *speed)));
                all.flatten().collect::<Vec<_>>()
            };
            speeds.iter().flat_map(at).collect::<Vec<_>>()
        })
        .collect();
    assert!(stations.len() > 40 && fits.len() > 20, "{} stations, {} fits", stations.len(), fits.len());
    judged("solves.py", &json!({ "stations": stations, "fits": fits }));
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
