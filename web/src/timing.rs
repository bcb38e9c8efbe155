//! Work to be timed from outside: see `speed` in the tests.

use std::hint::black_box;
use std::ops::ControlFlow;

use spokeshave::fit::envelope;
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::rotor::departure_map;
use spokeshave::section::outline::clark_y;
use spokeshave::section::solver::{Settings, sweep};
use spokeshave::shape::{Wish, search};
use wasm_bindgen::prelude::wasm_bindgen;

/// Does a piece of work on the first example's cruise so many times: `analysis` (30 elements), `map` (60
/// speeds × 40 radii), `range` (the speed range at 60 speeds, departures at every station), `search` (for the
/// usual aims) or `polar` (30 points of Clark Y at one Reynolds number, 60,000). Gives back how often it did
/// it: 0 for other words.
#[must_use]
#[wasm_bindgen]
pub fn work(what: &str, times: u32) -> u32 {
    let Ok(mut job) = Job::from_json(DEMOS[0].json) else { return 0 };
    job.method.elements = 30;
    let Ok(rig) = Rig::new(&job) else { return 0 };
    let Some(at) = rig.condition(2) else { return 0 };
    let line = spokeshave::fit::line(&rig, &at, 60);
    let radii: Vec<f64> = (1..=40).map(|i| 0.09 + 0.016 * f64::from(i)).collect();
    let stations: Vec<f64> = job.propeller.stations.iter().map(|s| s.radius_fraction).collect();
    let wish = Wish::of(&rig);
    let Ok(section) = clark_y() else { return 0 };
    let angles: Vec<f64> = (-10..20).map(|k| 0.5 * f64::from(k)).collect();
    let mut done = 0;
    for _ in 0..times {
        match what {
            "analysis" => drop(black_box(rig.rotor.loads(black_box(&at)))),
            "map" => drop(black_box(departure_map(&rig.rotor, black_box(&line), &radii))),
            "range" => drop(black_box(envelope(&rig, &job.flight_points[2], 60, black_box(&stations)))),
            "search" => drop(black_box(search(&rig, black_box(&wish), &mut |_| ControlFlow::Continue(())))),
            "polar" => {
                drop(black_box(sweep(&section, black_box(&Settings::free(6e4, 9.0)), &angles, |_, _, _| {
                    ControlFlow::Continue(())
                })));
            }
            _ => continue,
        }
        done += 1;
    }
    done
}
