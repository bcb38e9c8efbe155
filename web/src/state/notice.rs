//! What the page has to say when something did not go as asked.

use spokeshave::job::{Job, JobError, Problem};

/// Something the page has to say.
#[derive(Clone, Debug, PartialEq)]
pub struct Notice {
    /// What happened.
    pub title: String,
    /// Where, what, what is allowed; one line each.
    pub lines: Vec<String>,
}

/// A job that was refused, by path.
pub(super) fn refused(title: &str, error: &JobError) -> Notice {
    let lines = match error {
        JobError::Values(problems) => problems.iter().take(8).map(ToString::to_string).collect(),
        other => vec![other.to_string()],
    };
    Notice { title: title.into(), lines }
}

/// A problem of the job on the page, in the page's own words.
pub(super) fn in_words(job: &Job, problem: &Problem) -> String {
    format!("{}: {}. Allowed is {}.", place(job, &problem.path), problem.found, problem.allowed)
}

/// Units at the end of keys: what is found and allowed says them.
const UNITS: [&str; 12] =
    ["_m_s", "_m2", "_kg_m3", "_m", "_kg", "_deg", "_percent", "_rpm", "_w", "_pa", "_n_m", "_k"];

/// Where a path of the job file leads: a station, a flight point by name, or the figure itself.
fn place(job: &Job, path: &str) -> String {
    let index = |list: &str| -> Option<usize> {
        path.strip_prefix(list)?.strip_prefix('[')?.split_once(']')?.0.parse().ok()
    };
    if let Some(i) = index("propeller.stations") {
        return format!("Station {}", i + 1);
    }
    if let Some(point) = index("flight_points").and_then(|i| job.flight_points.get(i)) {
        return point.name.clone();
    }
    let last = path.rsplit('.').next().unwrap_or(path);
    let last = UNITS.iter().find_map(|unit| last.strip_suffix(unit)).unwrap_or(last).replace('_', " ");
    let mut letters = last.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::DEMOS;

    #[test]
    fn a_place_is_said_in_words() {
        let job = Job::from_json(DEMOS[0].json).unwrap();
        assert_eq!(place(&job, "propeller.stations[3].chord_m"), "Station 4");
        assert_eq!(place(&job, "flight_points[2].airspeed_m_s"), job.flight_points[2].name);
        assert_eq!(place(&job, "propeller.pitch_control"), "Pitch control");
        assert_eq!(place(&job, "propeller.hub_diameter_m"), "Hub diameter");
    }
}
