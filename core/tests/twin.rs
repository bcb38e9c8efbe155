//! Two of everything on an aircraft of twice the size: what each propeller does stays the same, what they do
//! together doubles.

use serde_json::Value;
use spokeshave::fit::{ceilings, envelope, take_off, take_off_in};
use spokeshave::job::{Aircraft, DEMOS, Engine, Job};
use spokeshave::rig::{Rig, air_of};

/// Figures of the whole aircraft.
const TOGETHER: [&str; 8] = [
    "total_thrust_n",
    "asked_n",
    "fuel_kg_per_h",
    "full.thrust_n",
    "standing.thrust_n",
    "closed_throttle_dive.value",
    "idle.value",
    "top_speed.value",
];

/// An example, and the same twice as large with twice as many engines.
fn pair(index: usize) -> [Job; 2] {
    let mut one = Job::from_json(DEMOS[index].json).unwrap();
    if let Some(Engine::Piston(engine)) = &mut one.engine {
        engine.idle_rpm = Some(1000.0);
    }
    let mut two = one.clone();
    match two.aircraft.as_mut().unwrap() {
        Aircraft::Aeroplane(a) => {
            a.mass_kg *= 2.0;
            a.wing_area_m2 *= 2.0;
            a.engines *= 2;
        }
        Aircraft::Multirotor(m) => {
            m.mass_kg *= 2.0;
            m.rotors *= 2;
        }
    }
    match two.engine.as_mut().unwrap() {
        Engine::Piston(engine) => engine.fuel_kg = engine.fuel_kg.map(|fuel| 2.0 * fuel),
        Engine::Electric(motor) => {
            motor.battery.capacity_ah *= 2.0;
            motor.battery.resistance_ohm_per_cell /= 2.0;
        }
    }
    [one, two]
}

/// Every number of two documents that are alike but for the factor of what belongs to the whole aircraft.
fn alike(path: &str, one: &Value, two: &Value) {
    match (one, two) {
        (Value::Object(a), Value::Object(b)) => {
            assert_eq!(a.len(), b.len(), "{path}");
            a.iter().for_each(|(k, v)| alike(&format!("{path}.{k}"), v, &b[k]));
        }
        (Value::Array(a), Value::Array(b)) => {
            assert_eq!(a.len(), b.len(), "{path}");
            a.iter().zip(b).enumerate().for_each(|(i, (v, w))| alike(&format!("{path}[{i}]"), v, w));
        }
        (Value::Number(a), Value::Number(b)) => {
            let factor = if TOGETHER.iter().any(|whole| path.ends_with(whole)) { 2.0 } else { 1.0 };
            let (a, b) = (factor * a.as_f64().unwrap(), b.as_f64().unwrap());
            assert!((a - b).abs() <= 1e-6 * a.abs().max(1e-3), "{path}: {a} {b}");
        }
        _ => assert_eq!(one, two, "{path}"),
    }
}

fn told(jobs: &[Job; 2], name: &str, of: impl Fn(&Rig) -> Value) {
    let [one, two] = [&jobs[0], &jobs[1]].map(|job| of(&Rig::new(job).unwrap()));
    alike(name, &one, &two);
}

#[test]
fn twins_meet_as_one_of_half_the_size_does() {
    for index in 0..DEMOS.len() {
        let jobs = pair(index);
        for i in 0..jobs[0].flight_points.len() {
            told(&jobs, &jobs[0].flight_points[i].name, |rig| {
                serde_json::to_value(rig.point(i).unwrap()).unwrap()
            });
        }
        let full = jobs[0].flight_points[0].clone();
        told(&jobs, "range", |rig| {
            let range = envelope(rig, &full, 24, &[0.75]).unwrap();
            let quick = take_off_in(rig, &air_of(&full).unwrap());
            serde_json::json!([range, take_off(rig, &range), quick, ceilings(rig, 0.0)])
        });
    }
}
