//! What a logbook learns from readings.

use spokeshave::job::{DEMOS, Factors, Job, LogReading, Logbook};
use spokeshave::logbook::estimate;
use spokeshave::result::Estimate;
use spokeshave::rig::Rig;

use crate::check::{Basis, Check, Mark};

const ONE_MISMATCH: Basis = Basis {
    source: "n readings of one mismatch m, each of variance s², and two factors believed to within w: the \
             quotient of the factors comes out as m n/(n + k) with k = s²/2w², and each factor keeps half of w² \
             and half of w² k/(1 + k) from one reading (linear least squares with a prior)",
    mark: Mark::Computed,
    why: "the slopes are taken at the rpm that comes out, which changes them by a part in a thousand",
};

/// What the logbook makes of so many equal readings at rest and full throttle.
fn estimated(job: &Job, reading: &LogReading, count: usize) -> Estimate {
    let logbook = Logbook { readings: vec![reading.clone(); count], ..Logbook::default() };
    let job = Job { logbook: Some(logbook), ..job.clone() };
    estimate(&Rig::new(&job).expect("a valid job")).expect("readings that tell something").estimate
}

/// A mismatch so small that everything is linear.
pub(super) fn one_mismatch() -> Vec<Check> {
    let job = Job::from_json(DEMOS[0].json).expect("a demo");
    let strong = Factors { engine_power: 1.001, ..Factors::default() };
    let standing = Rig::with_factors(&job, &strong).expect("a valid job").point(0).expect("a standing start");
    let reading = LogReading {
        altitude_m: Some(job.flight_points[0].altitude_m),
        engine_rpm: standing.meeting.engine_rpm,
        throttle: Some(1.0),
        ..LogReading::default()
    };
    let quotient = |count: usize| {
        let e = estimated(&job, &reading, count);
        (e.factors.engine_power / e.factors.propeller_power).ln()
    };
    // k and m from one reading and four.
    let (one, four) = (quotient(1), quotient(4));
    let k = (four - one) / (one - four / 4.0);
    let m = one * (1.0 + k);
    let believed = 0.05_f64;
    let left = believed * (0.5 + 0.5 * k / (1.0 + k)).sqrt();
    let deviation = estimated(&job, &reading, 1).found[0].deviation;
    let by_nine = m * 9.0 / (9.0 + k);
    vec![
        ONE_MISMATCH.relative("quotient of the factors from nine readings, ln", quotient(9), by_nine, 1e-3),
        ONE_MISMATCH.relative("deviation of a factor from one reading", deviation, left, 1e-3),
        ONE_MISMATCH.relative("mismatch without a prior, ln", m, 1.001_f64.ln(), 1e-3),
    ]
}
