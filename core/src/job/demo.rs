//! The jobs that come with the program. All aircraft, engines and figures in them are invented.

/// An invented job.
#[derive(Clone, Copy, Debug)]
pub struct Demo {
    /// The word that calls it on the command line.
    pub name: &'static str,
    /// One line about it.
    pub about: &'static str,
    /// The job file.
    pub json: &'static str,
}

/// A light aeroplane, a small unmanned aircraft and a multirotor.
pub const DEMOS: [Demo; 3] = [
    Demo {
        name: "light-aeroplane",
        about: "a light aeroplane with a two-blade wood propeller on a 58 kW direct-drive engine (invented)",
        json: include_str!("../../demos/light-aeroplane.json"),
    },
    Demo {
        name: "unmanned",
        about: "a small unmanned aircraft with an electric motor (invented)",
        json: include_str!("../../demos/unmanned.json"),
    },
    Demo {
        name: "multirotor",
        about: "a quadrotor in hover (invented)",
        json: include_str!("../../demos/multirotor.json"),
    },
];

#[cfg(test)]
mod tests {
    use crate::job::{DEMOS, Job};

    #[test]
    fn every_demo_is_a_valid_job_and_survives_a_round_trip() {
        for demo in DEMOS {
            let job = Job::from_json(demo.json).unwrap_or_else(|e| panic!("{}: {e}", demo.name));
            assert_eq!(Job::from_json(&job.to_json()).unwrap(), job, "{}", demo.name);
        }
    }
}
