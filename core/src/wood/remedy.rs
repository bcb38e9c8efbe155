//! Margins, what decides, and what would restore it.

use super::judged::{Loaded, worst};
use super::material::{Material, Strength};
use super::stress::{Carried, Stresses};
use super::verdict::{percent, place};
use super::{BladeBeam, Place};
use crate::result::{Finding, Governing, StressKind, StressStation, Verdict};
use crate::rig::Rig;

/// Most thickness over the drawn one that is tried.
const MOST_THICKER: f64 = 2.0;
/// Most passes of thickening and judging in turn.
const PASSES: u32 = 20;
/// Margin short of nothing that counts as nothing.
const WITHIN: f64 = 0.002;

/// The stress that is nearest its limit, with its limit.
pub(super) struct Nearest<'m> {
    pub(super) kind: StressKind,
    pub(super) stress_pa: f64,
    pub(super) limit: &'m Strength,
}

impl<'m> Nearest<'m> {
    pub(super) fn of(s: &Stresses, m: &'m Material) -> Self {
        let all = [
            (StressKind::Tension, s.tension_pa, &m.tension),
            (StressKind::Compression, s.compression_pa, &m.compression),
            (StressKind::Shear, s.shear_pa, &m.shear),
        ];
        let share = |x: &(StressKind, f64, &Strength)| x.1 / x.2.limit_pa;
        let [first, others @ ..] = all;
        let worst =
            others.into_iter().fold(first, |worst, x| if share(&x) > share(&worst) { x } else { worst });
        Self { kind: worst.0, stress_pa: worst.1, limit: worst.2 }
    }

    /// Limit over stress, less 1.
    pub(super) fn margin(&self) -> f64 {
        self.limit.limit_pa / self.stress_pa.max(1.0) - 1.0
    }
}

/// Thickness that is missing at each station, m, nothing where none is, so that every place is within its
/// limits under the air's load as it is: the blade's weight, its pull and the relief by its bending follow
/// the thickness. `None` where no more than twice the thickness does.
pub(super) fn remedy(rig: &Rig, beam: &BladeBeam, cases: &[&Loaded]) -> Option<Vec<f64>> {
    let stations = &rig.job.propeller.stations;
    let drawn: Vec<f64> = stations.iter().map(|s| s.thickness_ratio).collect();
    let mut ratios = drawn.clone();
    for _ in 0..PASSES {
        let thicker = beam.with_thickness(&ratios)?;
        let loaded: Vec<Loaded> = cases.iter().map(|c| c.on(rig, &thicker)).collect();
        let loaded: Vec<&Loaded> = loaded.iter().collect();
        let mut enough = true;
        for place in &thicker.places {
            let case = worst(&thicker, place, &loaded)?;
            if case.margin(&thicker, place) < -WITHIN {
                enough = false;
                let times = times(&thicker, place, &case.stressed(&thicker, place).0);
                ratios[place.of] = ratios[place.of].max(place.thickness_ratio * times);
            }
        }
        if enough {
            let missing = ratios.iter().zip(&drawn).zip(stations).map(|((r, d), s)| (r - d) * s.chord_m);
            return Some(missing.collect());
        }
        if ratios.iter().zip(&drawn).any(|(r, d)| *r > MOST_THICKER * d) {
            return None;
        }
    }
    None
}

/// How many times the thickness a place needs for what it carries, at most a half more.
fn times(beam: &BladeBeam, place: &Place, carried: &Carried) -> f64 {
    let chord_m = beam.chords_m[place.index];
    let holds = |times: f64| {
        let stresses = carried.stresses(&place.shape, chord_m, times * place.thickness_ratio);
        Nearest::of(&stresses, &beam.material).margin() >= 0.0
    };
    let (mut low, mut high) = (1.0, 1.5);
    for _ in 0..20 {
        let middle = 0.5 * (low + high);
        if holds(middle) { high = middle } else { low = middle }
    }
    high
}

/// What decides, of the stations' worst cases.
pub(super) fn governing(stations: &[StressStation], material: &Material) -> Option<Governing> {
    let answered = stations.iter().filter(|s| s.margin.is_some());
    let worst = answered.min_by(|a, b| a.margin.unwrap_or(0.0).total_cmp(&b.margin.unwrap_or(0.0)))?;
    let (kind, margin, case) = (worst.kind?, worst.margin?, worst.case.clone()?);
    let (stress_pa, limit) = match kind {
        StressKind::Tension => (worst.tension_pa?, &material.tension),
        StressKind::Compression => (worst.compression_pa?, &material.compression),
        StressKind::Shear => (worst.shear_pa?, &material.shear),
    };
    Some(Governing {
        case,
        station: worst.station,
        radius_m: worst.radius_m,
        kind,
        stress_pa,
        limit_pa: limit.limit_pa,
        reason: limit.reason.clone(),
        margin,
        sentence: String::new(),
    })
}

/// How stresses (Pa) and lengths (m) are said.
#[derive(Clone, Copy)]
pub struct Say<'f> {
    /// A stress with its unit.
    pub stress: &'f dyn Fn(f64) -> String,
    /// A length on the blade with its unit.
    pub length: &'f dyn Fn(f64) -> String,
    /// A thickness that is missing with its unit, never less than is missing.
    pub missing: &'f dyn Fn(f64) -> String,
}

impl Say<'_> {
    /// Megapascals and millimetres.
    pub const METRIC: Self = Self {
        stress: &|pa| format!("{:.1} MPa", pa / 1e6),
        length: &|m| format!("{:.1} mm", 1e3 * m),
        missing: &|m| format!("{:.1} mm", 1e3 * m),
    };
}

/// A figure rounded up at a decimal, but for what computing leaves: nobody shall add less than is missing.
#[must_use]
pub fn no_less(value: f64, decimals: usize) -> f64 {
    let steps = 10f64.powi(i32::try_from(decimals).unwrap_or(0));
    (value * steps - 1e-6).ceil() / steps
}

/// What decides of a blade in words: what holds as far as it was judged, or what would restore the margin.
#[must_use]
pub fn sentence(g: &Governing, stations: &[StressStation], verdict: &Verdict, say: &Say) -> String {
    let figures = format!(
        "{} {} at {} (radius {}) in “{}” where {} is the limit",
        g.kind.word(),
        (say.stress)(g.stress_pa),
        place(g),
        (say.length)(g.radius_m),
        g.case,
        (say.stress)(g.limit_pa)
    );
    let margin = percent(g.margin);
    if g.margin < 0.0 {
        return format!("Over the limit, margin {margin}: {figures}. {}", restored(stations, say));
    }
    match verdict.finding {
        Finding::Held => format!("Within the limits: margin {margin}, least of the blade at {figures}."),
        Finding::OverTheLimit => {
            format!(
                "The blade is within its limits, its hub is not: {}. Margin of the blade {margin}, at {figures}.",
                verdict.broken.join("; ")
            )
        }
        _ => format!(
            "Within the limits as far as judged: margin {margin}, least of the blade at {figures}. Not judged: {}.",
            verdict.missing.join("; ")
        ),
    }
}

/// What would restore every margin.
fn restored(all: &[StressStation], say: &Say) -> String {
    let missing: Vec<String> = all
        .iter()
        .filter_map(|s| Some(format!("{} at station {}", (say.missing)(s.thicker_m?), s.station?)))
        .collect();
    if missing.is_empty() {
        return "Even twice the thickness does not restore it: fewer revolutions, more chord or a stronger \
                material would."
            .into();
    }
    format!(
        "More thickness restores it everywhere, weight and stiffness taken into account, the air's load as \
         it is: {}.",
        missing.join(", ")
    )
}
