//! What a person typed: kept as typed, tried on a copy of the job, refused with what is allowed.

use std::collections::BTreeMap;

use spokeshave::carved::{angle_of, minutes_fault};
use spokeshave::drawn::DrawnStation;
use spokeshave::job::{Job, Problem};

use super::{EngineFigure, Field, LogFigure, Measure};
use crate::number;
use crate::units::{Quantity, Units};

/// A text that is not yet, or cannot be, part of the job.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Draft {
    /// As typed.
    pub text: String,
    /// Why it was refused; `None` while it is still being typed.
    pub message: Option<String>,
}

/// All drafts by field.
pub type Drafts = BTreeMap<Field, Draft>;

/// The text a box shows while nothing is typed: enough decimals to tell what is in the job, none that say
/// nothing.
#[must_use]
pub fn shown_text(job: &Job, drawn: &[DrawnStation], units: Units, field: Field) -> String {
    if let Some(text) = field.text(job) {
        return text.to_string();
    }
    let quantity = field.quantity(job);
    let Some(value) = field.value(job, drawn) else { return String::new() };
    let (fewest, most) = if field.is_given(job) {
        units.box_decimals(quantity)
    } else {
        (units.decimals(quantity), units.decimals(quantity))
    };
    let text = number::plain(units.shown(quantity, value), most);
    let spare = text.len() - text.trim_end_matches('0').len();
    let text = &text[..text.len() - spare.min(most - fewest)];
    text.trim_end_matches('.').into()
}

/// Tries a typed text on a job.
///
/// # Errors
/// What is wrong and what is allowed, in the unit shown.
pub fn tried(
    job: &Job,
    drawn: &[DrawnStation],
    units: Units,
    field: Field,
    text: &str,
) -> Result<Job, String> {
    if field.text(job).is_some() {
        return tried_text(job, field, text);
    }
    if let Some(without) = emptied(job, field, text) {
        return Ok(without);
    }
    let quantity = field.quantity(job);
    let minutes = (quantity == Quantity::Angle).then(|| angle_of(text)).flatten();
    if quantity == Quantity::Angle
        && let Some(why) = minutes_fault(text)
    {
        return Err(sentence(&why));
    }
    let full =
        matches!(field, Field::Log(_, LogFigure::Throttle)) && text.trim().eq_ignore_ascii_case("full");
    let typed = full.then_some(1.0).or(minutes).map_or_else(|| number::read(units, quantity, text), Ok);
    let value = typed.map_err(|why| {
        let was = field.value(job, drawn).map(|v| number::with_unit(units, quantity, Some(v)));
        let was = was.map(|was| format!("It was {was}."));
        // What is allowed is what is said of a figure that never is.
        let allowed = written(job, units, field, f64::NAN).err().filter(|said| said.starts_with("Allowed "));
        [Some(sentence(&why)), was, allowed].into_iter().flatten().collect::<Vec<_>>().join(" ")
    })?;
    if quantity == Quantity::Count && value.fract() != 0.0 {
        return Err("A whole number is needed.".into());
    }
    written(job, units, field, value)
}

/// An empty box takes out what the job may go without; full throttle without an airspeed means as fast as it
/// goes.
fn emptied(job: &Job, field: Field, text: &str) -> Option<Job> {
    let mut next = job.clone();
    (text.trim().is_empty() && field.clear(&mut next) && next.check().is_empty()).then_some(next)
}

fn tried_text(job: &Job, field: Field, text: &str) -> Result<Job, String> {
    let mut next = job.clone();
    field.write_text(&mut next, text.trim());
    match next.check().first() {
        None => Ok(next),
        Some(problem) => Err(format!(
            "{}: allowed is {}.",
            sentence(&problem.found).trim_end_matches('.'),
            problem.allowed
        )),
    }
}

/// Writes an SI value on a copy of a job.
///
/// # Errors
/// What is wrong and what is allowed, in the unit shown.
pub fn written(job: &Job, units: Units, field: Field, value: f64) -> Result<Job, String> {
    let mut next = job.clone();
    if !field.write(&mut next, value) {
        return Err("There is no place for this figure here.".into());
    }
    match next.check().first() {
        None => Ok(next),
        Some(problem) => Err(refusal(job, units, field, value, problem)),
    }
}

/// What is allowed, in the unit shown.
fn refusal(job: &Job, units: Units, field: Field, value: f64, problem: &Problem) -> String {
    if let Some((inner, outer)) = radius_span(job, field) {
        let text = |radius_m| number::with_unit(units, Quantity::Length, Some(radius_m));
        return format!(
            "Allowed is between its neighbours, above {} and below {}.",
            text(inner),
            text(outer)
        );
    }
    if let (Field::Engine(EngineFigure::CurveRpm(i)), None) = (field, problem.span) {
        return between_rows(job, i);
    }
    let own = problem.path == field.path(job);
    match problem.span {
        Some((low, high)) if own => {
            let scale = match field {
                Field::Station(i, Measure::Thickness) => chord_m(job, i),
                _ => 1.0,
            };
            let allowed =
                span_words(units, field.quantity(job), low * scale, high * scale, problem.above_lowest);
            allowed + &hint(problem, units.symbol(field.quantity(job)))
        }
        _ if own => sentence(&format!("allowed is {}", problem.allowed)),
        _ => elsewhere(job, units, field, value, problem),
    }
}

/// The likely cause, where the problem names one: not the unit in which the box already is.
fn hint(problem: &Problem, unit: &str) -> String {
    let cause = problem.allowed.split_once("; ").map(|(_, cause)| cause);
    let cause = cause.filter(|cause| !cause.ends_with(&format!(" in {unit}")));
    cause.map_or_else(String::new, |cause| format!(" {}", sentence(cause)))
}

fn elsewhere(job: &Job, units: Units, field: Field, value: f64, problem: &Problem) -> String {
    if let Field::Station(_, Measure::Chord) = field
        && problem.path.ends_with("thickness_ratio")
    {
        let chord = number::with_unit(units, Quantity::Length, Some(value));
        return format!("A chord of {chord} is too narrow for the thickness here. Make it thinner first.");
    }
    super::notice::in_words(job, problem)
}

/// Between the stations next to it.
fn radius_span(job: &Job, field: Field) -> Option<(f64, f64)> {
    let Field::Station(i, Measure::Radius) = field else { return None };
    let tip_m = job.propeller.diameter_m / 2.0;
    let radius_m = |i: usize| job.propeller.stations.get(i).map(|s| s.radius_fraction * tip_m);
    let low = i.checked_sub(1).and_then(radius_m).unwrap_or(0.0);
    Some((low, radius_m(i + 1).unwrap_or(tip_m)))
}

/// Between the rows next to it.
fn between_rows(job: &Job, i: usize) -> String {
    let rpm = |i: usize| EngineFigure::CurveRpm(i).value(job).map(|rpm| number::fixed(rpm, 0));
    let rows = (i.checked_sub(1).and_then(rpm), rpm(i + 1));
    match rows {
        (Some(low), Some(high)) => {
            format!("Allowed is above {low} and below {high}\u{a0}rpm, the rows beside it.")
        }
        (Some(low), None) => format!("Allowed is above {low}\u{a0}rpm, the row before."),
        (None, Some(high)) => format!("Allowed is below {high}\u{a0}rpm, the next row."),
        (None, None) => "There is no such row.".into(),
    }
}

fn chord_m(job: &Job, i: usize) -> f64 {
    job.propeller.stations.get(i).map_or(1.0, |s| s.chord_m)
}

fn span_words(units: Units, quantity: Quantity, low: f64, high: f64, above_low: bool) -> String {
    let text = |si: f64| {
        let shown = units.shown(quantity, si);
        let decimals = if quantity == Quantity::Count { 0 } else { decimals_of(shown) };
        number::fixed(shown, decimals)
    };
    let unit = match units.symbol(quantity) {
        "" => String::new(),
        "°" => "°".into(),
        unit => format!("\u{a0}{unit}"),
    };
    if above_low {
        return format!("Allowed is above {}, up to {}{unit}.", text(low), text(high));
    }
    format!("Allowed is {} to {}{unit}.", text(low), text(high))
}

/// Enough decimals to tell a bound, none that say nothing.
fn decimals_of(shown: f64) -> usize {
    (0..4).find(|&d| (shown * 10f64.powi(d)).fract().abs() < 1e-6).unwrap_or(2).clamp(0, 3) as usize
}

fn sentence(why: &str) -> String {
    let mut chars = why.chars();
    chars.next().map_or_else(String::new, |first| format!("{}{}.", first.to_uppercase(), chars.as_str()))
}
