//! Which figures of the aircraft and the engine are still those of an invented example.

use std::sync::LazyLock;

use spokeshave::job::{DEMOS, Engine, Job, PowerPoint};

use super::{AircraftFigure, EngineFigure};

/// Fewer figures than this that agree with an example's may do so by chance.
const FEWEST: usize = 2;

/// The jobs that come with the program.
pub(super) static EXAMPLES: LazyLock<Vec<Job>> =
    LazyLock::new(|| DEMOS.iter().filter_map(|demo| Job::from_json(demo.json).ok()).collect());

/// Names of the aircraft's figures that are an example's. Counts are left out: they agree by themselves.
#[must_use]
pub fn aircraft_untouched(job: &Job) -> Vec<String> {
    use AircraftFigure as F;
    const MEASURED: [F; 9] = [
        F::Mass,
        F::WingArea,
        F::ZeroLiftDrag,
        F::InducedFactor,
        F::AspectRatio,
        F::Oswald,
        F::GreatestLift,
        F::RollingFriction,
        F::SlipstreamArea,
    ];
    let same = MEASURED.into_iter().filter(|f| is_an_examples(job, |j| f.value(j)));
    enough(same.map(|f| f.name().into()).collect())
}

/// Names of the engine's figures that are an example's; counts and ratios, which agree by themselves, are left
/// out.
#[must_use]
pub fn engine_untouched(job: &Job) -> Vec<String> {
    use EngineFigure as F;
    const MEASURED: [F; 12] = [
        F::LimitRpm,
        F::IdleRpm,
        F::Consumption,
        F::Fuel,
        F::SpeedConstant,
        F::Resistance,
        F::NoLoadCurrent,
        F::MostCurrent,
        F::ControllerResistance,
        F::CellVoltage,
        F::CellResistance,
        F::Capacity,
    ];
    let curve = is_an_examples(job, |j| full_throttle(j).map(<[PowerPoint]>::to_vec));
    let curve = curve.then(|| "full-throttle curve".to_owned());
    let same = MEASURED.into_iter().filter(|f| is_an_examples(job, |j| f.value(j)));
    enough(curve.into_iter().chain(same.map(F::name)).collect())
}

fn full_throttle(job: &Job) -> Option<&[PowerPoint]> {
    match &job.engine {
        Some(Engine::Piston(p)) => Some(&p.full_throttle),
        _ => None,
    }
}

fn is_an_examples<T: PartialEq>(job: &Job, part: impl Fn(&Job) -> Option<T>) -> bool {
    part(job).is_some_and(|own| EXAMPLES.iter().any(|example| part(example).as_ref() == Some(&own)))
}

fn enough(names: Vec<String>) -> Vec<String> {
    if names.len() < FEWEST { Vec::new() } else { names }
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::Aircraft;

    #[test]
    fn what_a_person_has_put_in_is_no_longer_an_examples() {
        let mut job = EXAMPLES[0].clone();
        assert!(aircraft_untouched(&job).contains(&"wing area".to_owned()));
        assert!(engine_untouched(&job).contains(&"full-throttle curve".to_owned()));
        let Some(Aircraft::Aeroplane(a)) = &mut job.aircraft else {
            panic!("the first example flies on wings")
        };
        a.wing_area_m2 += 0.1;
        let Some(Engine::Piston(p)) = &mut job.engine else { panic!("the first example has pistons") };
        p.full_throttle[0].power_w += 100.0;
        assert!(!aircraft_untouched(&job).contains(&"wing area".to_owned()));
        assert!(!engine_untouched(&job).contains(&"full-throttle curve".to_owned()));
        (job.aircraft, job.engine) = (None, None);
        assert!(aircraft_untouched(&job).is_empty() && engine_untouched(&job).is_empty());
    }
}
