//! Readings of carved blades and of a logbook.

use super::{said, written};
use spokeshave::job::{DEMOS, Job};
use spokeshave::rig::Rig;
use spokeshave::{carved, logbook};

fn demo() -> Job {
    Job::from_json(DEMOS[0].json).expect("a valid demo")
}

pub(crate) fn blades(text: &str) {
    let mut job = demo();
    match carved::import::read(text, &job.propeller, None) {
        Ok((readings, _)) => job.carved = Some(readings),
        Err(e) => return said(&e.to_string()),
    }
    match Rig::new(&job) {
        Ok(rig) => match carved::analyse(&rig) {
            Ok(found) => drop(written(found)),
            Err(e) => said(&e.to_string()),
        },
        Err(e) => said(&e.to_string()),
    }
}

pub(crate) fn flights(text: &str) {
    let mut job = demo();
    match logbook::import::read(text, None) {
        Ok((readings, _)) => job.logbook = Some(readings),
        Err(e) => return said(&e.to_string()),
    }
    match Rig::new(&job) {
        Ok(rig) => match logbook::estimate(&rig) {
            Ok(found) => drop(written(found)),
            Err(e) => said(&e.to_string()),
        },
        Err(e) => said(&e.to_string()),
    }
}
