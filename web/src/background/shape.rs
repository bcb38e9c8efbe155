//! Shaping a blade: what the page orders and what the worker reports, as plain data that goes over as JSON.

use std::ops::ControlFlow;

use serde::{Deserialize, Serialize};
use spokeshave::job::{Figure, Job, Propeller};
use spokeshave::result::{Brief, ChartCell, PitchDiameter, Tolerance};
use spokeshave::rig::Rig;
use spokeshave::shape::{
    LossTask, PitchBy, ShapeError, Wish, error_costs, least_loss, pitch_diameter, search, twist,
};

/// Work to do for a job.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Order {
    /// The job's file.
    pub job: String,
    /// What to do.
    pub task: Task,
}

/// What to do.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub enum Task {
    /// Angles at best lift-to-drag along the flight points, by weight.
    Twist(Vec<f64>),
    /// Least induced loss at a flight point.
    LeastLoss(usize),
    /// The search for what the job wishes for.
    Search,
    /// A figure over pitch and diameter at a flight point: so many steps each way.
    Chart(usize, Figure, usize),
    /// What errors cost, with a tolerance of angle (degrees), chord and thickness (mm).
    Errors([f64; 3]),
}

/// What the worker tells.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub enum Report {
    /// How far a search has come.
    Step(Step),
    /// A blade, and what is to be said of it.
    Blade(Box<Propeller>, Vec<String>),
    /// A chart.
    Chart(Box<Chart>),
    /// What errors cost.
    Errors(Vec<Cost>),
    /// Why there is nothing.
    Refused(String),
}

/// How far a search has come.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Step {
    /// Blades tried.
    pub trials: u32,
    /// Gain of the best within limits so far.
    pub gain: Option<f64>,
    /// That blade, where it is new.
    pub better: Option<Box<Propeller>>,
}

/// A figure over pitch and diameter.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Chart {
    /// The flight point.
    pub flight_point: String,
    /// The figure.
    pub figure: Figure,
    /// Pitches at 0.75 R, m.
    pub pitches_m: Vec<f64>,
    /// Diameters, m.
    pub diameters_m: Vec<f64>,
    /// The drawn pitch and diameter, m.
    pub drawn_m: (f64, f64),
    /// The figure, pitch by pitch, SI.
    pub values: Vec<Option<f64>>,
    /// The limits that are broken, by their numbers in `limits`, pitch by pitch.
    pub broken: Vec<Vec<u8>>,
    /// The limits that are broken somewhere.
    pub limits: Vec<String>,
}

/// What errors make of one figure.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Cost {
    /// The flight point.
    pub flight_point: String,
    /// The figure.
    pub figure: Figure,
    /// Its value with the blade as drawn, SI.
    pub drawn: f64,
    /// Change per degree, per mm of chord and per mm of thickness, station by station.
    pub slopes: [Vec<Option<f64>>; 3],
    /// Bands: independent errors of carving, all to the worse side, doubt of the polars.
    pub bands: [f64; 3],
}

/// Doubt of the polars either way, percent of lift and of drag.
pub const LIFT_PERCENT: f64 = 3.0;
/// The same of drag.
pub const DRAG_PERCENT: f64 = 10.0;
/// How often a search tells where it is, in blades.
const EVERY: u32 = 10;
/// How far a chart goes either way of the drawn blade.
const PITCH_SHARE: f64 = 0.25;
const DIAMETER_SHARE: f64 = 0.15;

/// Carries out an order; `hear` gets the steps, and what comes out is the last word.
pub fn carried_out(order: &Order, hear: impl FnMut(&Report)) -> Report {
    let rig = Job::from_json(&order.job).map_err(|e| e.to_string());
    let rig = rig.and_then(|job| Rig::new(&job).map_err(|e| e.to_string()));
    let made = rig.and_then(|rig| done(&rig, &order.task, hear).map_err(|e| e.to_string()));
    made.unwrap_or_else(Report::Refused)
}

fn done(rig: &Rig, task: &Task, hear: impl FnMut(&Report)) -> Result<Report, ShapeError> {
    Ok(match task {
        Task::Twist(weights) => {
            let shaped = twist(rig, weights)?;
            let told = &shaped.result;
            let plain = told.settled && told.governor_departure_deg.is_none();
            let said = if plain { Vec::new() } else { vec![told.sentence()] };
            Report::Blade(Box::new(shaped.job.propeller), said)
        }
        Task::LeastLoss(point) => {
            let shaped = least_loss(rig, &LossTask { point: *point, ..LossTask::default() })?;
            Report::Blade(Box::new(shaped.job.propeller), Vec::new())
        }
        Task::Search => searched(rig, hear)?,
        Task::Chart(point, figure, steps) => charted(rig, *point, *figure, *steps)?,
        Task::Errors([angle_deg, chord_mm, thickness_mm]) => {
            let (lift_percent, drag_percent) = (LIFT_PERCENT, DRAG_PERCENT);
            let (angle_deg, chord_mm, thickness_mm) = (*angle_deg, *chord_mm, *thickness_mm);
            let tolerance = Tolerance { angle_deg, chord_mm, thickness_mm, lift_percent, drag_percent };
            let cost = |c: spokeshave::result::Cost| Cost {
                flight_point: c.flight_point,
                figure: c.figure,
                drawn: c.drawn,
                slopes: [c.per_degree, c.per_mm_chord, c.per_mm_thickness],
                bands: [c.band_independent, c.band_worst, c.band_polars],
            };
            Report::Errors(error_costs(rig, tolerance)?.costs.into_iter().map(cost).collect())
        }
    })
}

fn searched(rig: &Rig, mut hear: impl FnMut(&Report)) -> Result<Report, ShapeError> {
    let mut untold = None;
    let shaped = search(rig, &Wish::of(rig), &mut |now| {
        untold = now.better.cloned().or(untold.take());
        if now.trials % EVERY == 0 {
            let better = untold.take().map(Box::new);
            hear(&Report::Step(Step { trials: now.trials, gain: now.best_gain, better }));
        }
        ControlFlow::Continue(())
    })?;
    let r = &shaped.result;
    let mut said = vec![format!("{} blades tried. {}", r.trials, r.stopped.sentence())];
    let ends: Vec<&str> = r.free.iter().filter(|f| f.at_end).map(|f| f.name).collect();
    if !ends.is_empty() {
        said.push(format!("At the end of its span, so that more might gain more: {}.", ends.join("; ")));
    }
    let tight = r.margins.iter().filter(|m| m.share < 0.01 && m.found.is_some());
    said.extend(tight.map(spokeshave::result::Margin::sentence));
    Ok(Report::Blade(Box::new(shaped.job.propeller), said))
}

fn charted(rig: &Rig, point: usize, figure: Figure, steps: usize) -> Result<Report, ShapeError> {
    let limits = rig.job.wishes.clone().unwrap_or_default().limits;
    let around = |middle: f64, share: f64| -> Vec<f64> {
        let place = |i: usize| 2.0 * i as f64 / (steps.max(2) - 1) as f64 - 1.0;
        (0..steps).map(|i| middle + share * middle.abs() * place(i)).collect()
    };
    let pitches = around(rig.rotor.blade.pitch_075_m(0.0), PITCH_SHARE);
    let diameters = around(rig.job.propeller.diameter_m, DIAMETER_SHARE);
    let chart = pitch_diameter(rig, point, &pitches, &diameters, PitchBy::Scale, &limits)?;
    Ok(Report::Chart(Box::new(plain(&chart, figure))))
}

fn plain(chart: &PitchDiameter, figure: Figure) -> Chart {
    let mut limits: Vec<String> = Vec::new();
    let mut number = |cell: &ChartCell| -> Vec<u8> {
        let mut place = |words: &str| {
            let known = limits.iter().position(|l| l == words).unwrap_or_else(|| {
                limits.push(words.to_string());
                limits.len() - 1
            });
            known as u8
        };
        cell.broken.iter().map(|limit| place(limit.words())).collect()
    };
    let broken = chart.cells.iter().map(|cell| cell.as_ref().map_or_else(Vec::new, &mut number)).collect();
    let value = |b: &Brief| figure.of(b);
    Chart {
        flight_point: chart.flight_point.clone(),
        figure,
        pitches_m: chart.pitches_m.clone(),
        diameters_m: chart.diameters_m.clone(),
        drawn_m: chart.drawn_m,
        values: chart.cells.iter().map(|cell| value(&cell.as_ref()?.figures)).collect(),
        broken,
        limits,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::DEMOS;

    fn told(task: Task) -> (Vec<Report>, Report) {
        let order = Order { job: DEMOS[0].json.into(), task };
        let order = serde_json::from_str(&serde_json::to_string(&order).unwrap()).unwrap();
        let mut steps = Vec::new();
        let last = carried_out(&order, |report| steps.push(report.clone()));
        let again = serde_json::from_str::<Report>(&serde_json::to_string(&last).unwrap()).unwrap();
        assert_eq!(again, last);
        (steps, last)
    }

    #[test]
    fn every_task_comes_to_something() {
        for task in [Task::Twist(vec![0.0, 0.0, 1.0, 1.0]), Task::LeastLoss(2)] {
            assert!(matches!(told(task).1, Report::Blade(..)));
        }
        let Report::Chart(chart) = told(Task::Chart(2, Figure::Efficiency, 5)).1 else { panic!() };
        assert_eq!((chart.values.len(), chart.broken.len()), (25, 25));
        let Report::Errors(costs) = told(Task::Errors([0.25, 0.5, 0.3])).1 else { panic!() };
        assert!(costs.iter().all(|c| c.slopes.iter().all(|s| s.len() == 11)));
    }

    #[test]
    fn a_search_tells_its_steps_and_the_best_so_far() {
        let (steps, last) = told(Task::Search);
        let better = |r: &&Report| matches!(r, Report::Step(s) if s.better.is_some());
        assert!(steps.len() > 10 && steps.iter().filter(better).count() > 3);
        let Report::Blade(_, said) = last else { panic!("{last:?}") };
        assert!(said[0].contains("blades tried"), "{said:?}");
    }

    #[test]
    fn what_cannot_be_is_refused_in_words() {
        let (_, last) = told(Task::LeastLoss(0));
        assert!(matches!(last, Report::Refused(why) if why.contains("airspeed is 0")));
    }
}
