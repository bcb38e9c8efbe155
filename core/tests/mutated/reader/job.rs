//! The job file, and all that is made of a valid one.

use super::{said, written};
use spokeshave::bench::Bench;
use spokeshave::job::Job;
use spokeshave::rig::Rig;
use spokeshave::wood::strength;

pub(crate) fn read(text: &str) {
    let job = match Job::from_json(text) {
        Ok(job) => job,
        Err(e) => return said(&e.to_string()),
    };
    assert_eq!(Job::from_json(&job.to_json()).as_ref(), Ok(&job), "written and read again");
    let rig = match Rig::new(&job) {
        Ok(rig) => rig,
        Err(e) => return said(&e.to_string()),
    };
    written(rig.analysis());
    match strength(&rig) {
        Ok(sheet) => drop(written(sheet)),
        Err(e) => said(&e.to_string()),
    }
    match Bench::new(&rig) {
        Ok(bench) => assert!(bench.solid().volume_m3().is_finite(), "a volume"),
        Err(e) => said(&e.to_string()),
    }
}
