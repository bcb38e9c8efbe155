//! Work to be timed from outside: see `speed` in the tests.

use std::hint::black_box;

use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::rotor::departure_map;
use wasm_bindgen::prelude::wasm_bindgen;

/// Does a piece of work on the first example's cruise so many times: `analysis` (30 elements) or `map` (60 speeds × 40 radii).
/// Gives back how often it did it: 0 for other words.
#[must_use]
#[wasm_bindgen]
pub fn work(what: &str, times: u32) -> u32 {
    let Ok(mut job) = Job::from_json(DEMOS[0].json) else { return 0 };
    job.method.elements = 30;
    let Ok(rig) = Rig::new(&job) else { return 0 };
    let Some(at) = rig.condition(2) else { return 0 };
    let line = spokeshave::fit::line(&rig, &at, 60);
    let radii: Vec<f64> = (1..=40).map(|i| 0.09 + 0.016 * f64::from(i)).collect();
    let mut done = 0;
    for _ in 0..times {
        match what {
            "analysis" => drop(black_box(rig.rotor.loads(black_box(&at)))),
            "map" => drop(black_box(departure_map(&rig.rotor, black_box(&line), &radii))),
            _ => continue,
        }
        done += 1;
    }
    done
}
