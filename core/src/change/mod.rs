//! What to change so that a flight point has a wanted rpm or speed, and what the change does elsewhere.
//!
//! Three ways: the whole blade turned; its outer half turned, from nothing at half the radius to the whole at
//! the tip; another diameter. Where there are readings of carved blades there is wood already: then turning
//! is planing, within what each station reaches ([`crate::carved`]), and a diameter only shrinks. Trimmed
//! tips leave everything inboard of them as it is; a longer drawing is scaled. The amount is sought by
//! bracketing from nothing outward and by Brent's method.

mod variant;

use roots::{SimpleConvergency, find_root_brent};
use thiserror::Error;

use crate::fit::highest_rpm;
use crate::job::FlightPoint;
use crate::result::{Brief, Change, Compared, Figure, Means};
use crate::rig::Rig;
use crate::shape::{brief, briefs};
use variant::Base;

/// Most a blade is turned either way, degrees.
const MOST_TURN_DEG: f64 = 10.0;
/// Least and greatest diameter over the drawn one.
const DIAMETERS: (f64, f64) = (0.75, 1.25);
/// Steps of the search either way.
const STEPS: u32 = 10;

/// What is wanted of a flight point.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Wanted {
    /// The flight point's index.
    pub point: usize,
    /// Rpm of the propeller or airspeed (m/s).
    pub figure: Figure,
    /// How much of it.
    pub value: f64,
}

/// Why there is nothing to change.
#[derive(Clone, Debug, Error, PartialEq)]
#[non_exhaustive]
pub enum ChangeError {
    /// No such flight point.
    #[error("flight point {0}: the job has no such point")]
    NoPoint(usize),
    /// A figure that no change reaches.
    #[error(
        "{name}: the {what} is set there, not found; choose a flight point at which it follows from the propeller"
    )]
    Given {
        /// The flight point.
        name: String,
        /// Which figure.
        what: &'static str,
    },
    /// A value that cannot be.
    #[error("{name}: {found}; allowed is {allowed}")]
    Value {
        /// Which.
        name: &'static str,
        /// What was found.
        found: f64,
        /// What is allowed.
        allowed: String,
    },
    /// The propeller before the change has no answer there.
    #[error("{name} has no answer with the propeller as it is: {state}")]
    NoAnswer {
        /// The flight point.
        name: String,
        /// Why.
        state: &'static str,
    },
}

/// The ways to what is wanted, each with its side effects.
///
/// # Errors
/// No such flight point, a figure that is given there, a value that cannot be, or no answer to start from.
pub fn changes(rig: &Rig, wanted: &Wanted) -> Result<Vec<Change>, ChangeError> {
    let point = rig.job.flight_points.get(wanted.point).ok_or(ChangeError::NoPoint(wanted.point))?;
    check(rig, point, wanted)?;
    let base = Base::new(rig);
    let before = brief(base.rig(), point);
    let Some(now) = figure(&before, wanted.figure) else {
        return Err(ChangeError::NoAnswer { name: point.name.clone(), state: before.state.sentence() });
    };
    let all = briefs(base.rig());
    let ways = [Means::Pitch, Means::Twist, Means::Diameter];
    Ok(ways.into_iter().map(|means| change(&base, point, wanted, means, now, &all)).collect())
}

/// The propeller of a change, in its job.
#[must_use]
pub fn changed(rig: &Rig, means: Means, amount: f64) -> Option<Rig> {
    Base::new(rig).changed(means, amount)
}

fn check(rig: &Rig, point: &FlightPoint, wanted: &Wanted) -> Result<(), ChangeError> {
    use crate::job::Setting;
    let name = point.name.clone();
    match wanted.figure {
        Figure::Rpm if matches!(point.setting, Setting::Rpm { .. }) => {
            return Err(ChangeError::Given { name, what: "rpm" });
        }
        Figure::AirspeedMS if point.airspeed_m_s.is_some() => {
            return Err(ChangeError::Given { name, what: "airspeed" });
        }
        _ => {}
    }
    let limit = rig.shaft.as_ref().map(highest_rpm);
    let (name, allowed, span) = match (wanted.figure, limit) {
        (Figure::AirspeedMS, _) => ("airspeed", "1 to 340 m/s".into(), 1.0..=340.0),
        (_, Some(limit)) => (
            "rpm",
            format!("10 to {limit:.0}, the most the engine may turn or has a power for, at the propeller"),
            10.0..=limit,
        ),
        (_, None) => ("rpm", "10 to 100000".into(), 10.0..=100_000.0),
    };
    if span.contains(&wanted.value) {
        Ok(())
    } else {
        Err(ChangeError::Value { name, found: wanted.value, allowed })
    }
}

fn figure(brief: &Brief, figure: Figure) -> Option<f64> {
    // An rpm that is held at the limit does not follow from the propeller.
    if brief.held_at_limit { None } else { figure.of(brief) }
}

fn change(
    base: &Base,
    point: &FlightPoint,
    wanted: &Wanted,
    means: Means,
    now: f64,
    before: &[Brief],
) -> Change {
    let had = |amount: f64| {
        let rig = base.changed(means, amount)?;
        figure(&brief(&rig, point), wanted.figure)
    };
    let off = |amount: f64| had(amount).map(|value| value - wanted.value);
    let (low, high) = base.range(means);
    let found = sought(&off, now - wanted.value, low, high);
    let amount = match found {
        Ok(amount) | Err(amount) => amount,
    };
    let rig = base.changed(means, amount).unwrap_or_else(|| base.rig().clone());
    let at = brief(&rig, point);
    let after = briefs(&rig);
    let (plan, no_plan) = match base.planing(means, amount, wanted.point).transpose() {
        Ok(plan) => (plan, None),
        Err(why) => (None, Some(format!("What to take off cannot be told: {why}."))),
    };
    Change {
        means,
        amount,
        reached: found.is_ok(),
        had: figure(&at, wanted.figure),
        state: at.state,
        by_removal: base.is_wood(),
        had_deg: had_deg(base.rig(), &rig, means),
        plan,
        no_plan,
        diameter_m: rig.job.propeller.diameter_m,
        pitch_m: rig.rotor.blade.pitch_075_m(rig.turn_rad()),
        flight_points: before
            .iter()
            .cloned()
            .zip(after)
            .map(|(drawn, shaped)| Compared { drawn, shaped })
            .collect(),
    }
}

/// How far the blade has turned where it tells: at three quarters of the radius, or at the tip where only the
/// outer half turns, degrees.
fn had_deg(before: &Rig, after: &Rig, means: Means) -> Option<f64> {
    let share = match means {
        Means::Pitch => 0.75,
        Means::Twist => 1.0,
        Means::Diameter => return None,
    };
    let angle = |rig: &Rig| rig.rotor.blade.cut(share * rig.rotor.blade.radius_m).angle_rad;
    Some((angle(after) - angle(before)).to_degrees())
}

/// The amount nearest to nothing at which the mismatch is nothing; else the one of least mismatch that was
/// looked at.
fn sought(off: &dyn Fn(f64) -> Option<f64>, at_nothing: f64, low: f64, high: f64) -> Result<f64, f64> {
    let mut best = (at_nothing.abs(), 0.0);
    let (mut below, mut above) = (Some((0.0, at_nothing)), Some((0.0, at_nothing)));
    for step in 1..=STEPS {
        for (last, end) in [(&mut below, low), (&mut above, high)] {
            let Some((from, value)) = *last else { continue };
            let to = end * f64::from(step) / f64::from(STEPS);
            let next = off(to).filter(|_| to != from);
            if let Some(next) = next {
                if (next < 0.0) != (value < 0.0) || next == 0.0 {
                    return Ok(refined(off, from, to));
                }
                if next.abs() < best.0 {
                    best = (next.abs(), to);
                }
            }
            *last = next.map(|next| (to, next));
        }
    }
    Err(best.1)
}

fn refined(off: &dyn Fn(f64) -> Option<f64>, from: f64, to: f64) -> f64 {
    let mut rule = SimpleConvergency { eps: 1e-6, max_iter: 60 };
    let value = |x: f64| off(x).unwrap_or(f64::NAN);
    find_root_brent(from.min(to), from.max(to), value, &mut rule).unwrap_or(to)
}
