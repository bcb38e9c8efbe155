//! What a blade is worth to a search: its gain over the drawn one and what is left of each limit.

use std::cell::RefCell;

use super::Wish;
use super::free::{FREE, shaped};
use super::possible::check_rpm;
use crate::fit::Near;
use crate::job::{Aim, Figure, FlightPoint, Limits, Setting};
use crate::result::{AimResult, Margin};
use crate::rig::Rig;
use crate::rotor::Rotor;
use crate::shape::ShapeError;
use crate::shape::brief::{Look, brief, figure_at, look};
use crate::shape::limits::{NO_FIGURE, beam, margins, standing};
use crate::wood::BladeBeam;

/// Limits count as kept to this share.
pub(super) const KEPT: f64 = 1e-6;
/// Logarithm of the ratio counted for a figure without an answer.
const NO_ANSWER: f64 = -1.0;
/// Elements of a rough look.
const FEW_ELEMENTS: u32 = 16;
/// Rates of climb are compared by their difference over the drawn one, or over this where that is less, m/s.
const LEAST_CLIMB_M_S: f64 = 0.5;

/// One blade looked at.
#[derive(Clone)]
pub(super) struct Trial {
    pub(super) x: [f64; FREE],
    /// Weighted mean of the logarithms of the figures' ratios.
    pub(super) gain: f64,
    pub(super) shares: Vec<f64>,
}

impl Trial {
    pub(super) fn worst(&self) -> f64 {
        self.shares.iter().copied().fold(f64::INFINITY, f64::min)
    }

    pub(super) fn kept(&self) -> bool {
        self.worst() >= -KEPT
    }

    /// The gain or, where a limit is broken, far below any gain by how much.
    pub(super) fn value(&self) -> f64 {
        if self.kept() { self.gain } else { self.worst().max(-1e3) - 10.0 }
    }

    pub(super) fn beats(&self, other: &Self) -> bool {
        self.value() > other.value()
    }
}

/// What does not change during a search.
#[derive(Clone)]
pub(super) struct Ground {
    pub(super) rig: Rig,
    limits: Limits,
    aims: Vec<Aim>,
    /// Points of the aims, each once, and of the limits of rpm.
    points: Vec<FlightPoint>,
    drawn: Vec<Option<f64>>,
    standing: Option<FlightPoint>,
    beam: Option<BladeBeam>,
    /// Number of margins.
    pub(super) count: usize,
    /// The last answers of the points, and of the standing one.
    near: RefCell<(Vec<Near>, Near)>,
}

impl Ground {
    pub(super) fn new(rig: &Rig, wish: &Wish) -> Result<Self, ShapeError> {
        let right = |a: &Aim| a.weight.is_finite() && a.weight > 0.0;
        if wish.aims.is_empty() || !wish.aims.iter().all(right) {
            return Err(ShapeError::NoWeight);
        }
        let known = |name: &str| rig.job.flight_points.iter().any(|p| p.name == name);
        if let Some(aim) = wish.aims.iter().find(|a| !known(&a.flight_point)) {
            return Err(ShapeError::NoPointNamed(aim.flight_point.clone()));
        }
        let limits = wish.limits.clone();
        let counts = |p: &&FlightPoint| {
            wish.aims.iter().any(|a| a.flight_point == p.name)
                || limits.rpm.iter().any(|l| l.flight_point == p.name)
        };
        let points: Vec<FlightPoint> = rig.job.flight_points.iter().filter(counts).cloned().collect();
        let standing = standing(rig, &limits);
        check_rpm(rig, &limits, &points, standing.as_ref())?;
        let beam = beam(rig, &limits);
        let near = RefCell::new((vec![Near::default(); points.len()], Near::default()));
        let mut ground = Self {
            rig: rig.clone(),
            limits,
            aims: wish.aims.clone(),
            points,
            drawn: Vec::new(),
            standing,
            beam,
            count: 0,
            near,
        };
        let looks = ground.looks(rig);
        ground.drawn = ground.aims.iter().map(|a| ground.value(rig, a, &looks)).collect();
        ground.check_aims()?;
        ground.count = ground.margins(rig, &looks).len();
        Ok(ground)
    }

    /// Whether a current limit puts a corner into the figures.
    pub(super) fn has_corner(&self) -> bool {
        self.rig.shaft.as_ref().is_some_and(|shaft| shaft.rounded(0.0).is_some())
    }

    /// The same by few elements and, where there is one, with the corner at a current limit rounded off.
    pub(super) fn rough(&self, rounded: f64) -> Self {
        let mut ground = self.clone();
        let rig = &mut ground.rig;
        rig.job.method.elements = rig.job.method.elements.min(FEW_ELEMENTS);
        rig.rotor = Rotor::new(rig.rotor.blade.clone(), &rig.job.method).taking(rig.rotor.power_factor());
        rig.shaft = rig.shaft.take().map(|shaft| shaft.rounded(rounded).unwrap_or(shaft));
        ground
    }

    /// A figure that a flight point does not have by its kind cannot be an aim.
    fn check_aims(&self) -> Result<(), ShapeError> {
        for aim in &self.aims {
            let point = self.points.iter().find(|p| p.name == aim.flight_point);
            let why = point.and_then(|p| senseless(&self.rig, p, aim.figure));
            if let Some(why) = why {
                return Err(ShapeError::Aim { name: aim.flight_point.clone(), why });
            }
        }
        Ok(())
    }

    pub(super) fn looks(&self, rig: &Rig) -> Vec<Look> {
        let (near, _) = &mut *self.near.borrow_mut();
        self.points.iter().zip(near).map(|(p, near)| look(rig, p, near)).collect()
    }

    pub(super) fn margins(&self, rig: &Rig, looks: &[Look]) -> Vec<Margin> {
        let (_, near) = &mut *self.near.borrow_mut();
        let standing = self.standing.as_ref().map(|p| look(rig, p, near).brief);
        margins(rig, &self.limits, looks, standing.as_ref(), self.beam.as_ref())
    }

    pub(super) fn trial(&self, x: &[f64; FREE]) -> Trial {
        let nothing = || Trial { x: *x, gain: NO_ANSWER, shares: vec![NO_FIGURE; self.count] };
        let Ok(rig) = shaped(&self.rig, x) else { return nothing() };
        let looks = self.looks(&rig);
        let shares = self.margins(&rig, &looks).iter().map(|m| m.share).collect();
        Trial { x: *x, gain: self.gain(&rig, &looks), shares }
    }

    fn gain(&self, rig: &Rig, looks: &[Look]) -> f64 {
        let total: f64 = self.aims.iter().map(|a| a.weight).sum();
        let gains = self.aims.iter().zip(&self.drawn).map(|(aim, drawn)| {
            let new = self.value(rig, aim, looks);
            aim.weight * new.map_or(NO_ANSWER, |new| gain(aim.figure, *drawn, new))
        });
        gains.sum::<f64>() / total
    }

    fn value(&self, rig: &Rig, aim: &Aim, looks: &[Look]) -> Option<f64> {
        let i = self.points.iter().position(|p| p.name == aim.flight_point)?;
        match aim.figure {
            Figure::TakeOffM => figure_at(rig, &self.points[i], aim.figure),
            figure => figure.of(&looks[i].brief),
        }
    }

    /// What counted, drawn and shaped.
    pub(super) fn aims(&self, rig: &Rig, looks: &[Look]) -> Vec<AimResult> {
        let told = |(aim, drawn): (&Aim, &Option<f64>)| AimResult {
            flight_point: aim.flight_point.clone(),
            figure: aim.figure,
            weight: aim.weight,
            drawn: *drawn,
            shaped: self.value(rig, aim, looks),
        };
        self.aims.iter().zip(&self.drawn).map(told).collect()
    }
}

/// Logarithm of the better ratio; with no figure of the drawn blade, of the figure itself, which leaves the
/// order of blades alone.
fn gain(figure: Figure, drawn: Option<f64>, new: f64) -> f64 {
    if figure == Figure::RateOfClimbMS {
        let old = drawn.unwrap_or(0.0);
        return ((new - old) / old.abs().max(LEAST_CLIMB_M_S)).clamp(NO_ANSWER, 3.0);
    }
    let more = (new / drawn.unwrap_or(1.0)).ln();
    let gain = if figure.less_is_better() { -more } else { more };
    if gain.is_finite() { gain.clamp(NO_ANSWER, 3.0) } else { NO_ANSWER }
}

/// The limit most in the way and by how much; where there is no answer, why, and the broken limits that have
/// a figure. `None` where all are kept.
pub(super) fn in_the_way(margins: &[Margin], looks: &[Look]) -> Option<String> {
    let broken = || margins.iter().filter(|m| m.share < -KEPT);
    let worst = broken().min_by(|a, b| a.share.total_cmp(&b.share))?;
    if worst.found.is_some() {
        return Some(worst.sentence());
    }
    let look = looks.iter().find(|l| worst.flight_point.as_ref() == Some(&l.brief.name));
    let why = look.filter(|l| l.brief.rpm.is_none()).map(|l| l.brief.state.sentence());
    let others = broken().filter(|m| m.found.is_some()).map(Margin::sentence);
    let said: Vec<String> =
        std::iter::once(worst.sentence()).chain(why.map(String::from)).chain(others).collect();
    Some(said.join(" "))
}

/// Why a figure tells nothing at a flight point.
fn senseless(rig: &Rig, point: &FlightPoint, figure: Figure) -> Option<&'static str> {
    let level = point.setting == Setting::Level {};
    let at_rest = point.airspeed_m_s == Some(0.0);
    match figure {
        Figure::AirspeedMS if point.airspeed_m_s.is_some() => {
            Some("its airspeed is given; only top speed can be sped up")
        }
        Figure::Efficiency | Figure::RateOfClimbMS if at_rest => Some("at rest there is no such figure"),
        Figure::RateOfClimbMS if level || point.airspeed_m_s.is_none() => {
            Some("in level flight nothing climbs")
        }
        Figure::ThrustN if level || point.airspeed_m_s.is_none() => {
            Some("in level flight the drag gives the thrust")
        }
        Figure::EnduranceS if rig.shaft.is_none() => Some("endurance needs an engine with fuel or a battery"),
        Figure::TakeOffM => figure_at(rig, point, figure)
            .is_none()
            .then_some("take-off needs an aeroplane with cl_max and an engine that gets it off"),
        _ => None,
    }
}

/// What a flight point is for by its setting: top speed by its airspeed, level flight by efficiency, hover by
/// power, all else by climb or thrust.
#[must_use]
pub fn usual_aims(rig: &Rig) -> Vec<Aim> {
    let of = |point: &FlightPoint| {
        let figures = brief(rig, point);
        let climbs = figures.rate_of_climb_m_s.is_some();
        match (&point.setting, point.airspeed_m_s) {
            (_, None) => Figure::AirspeedMS,
            (Setting::Level {}, Some(v)) if v > 0.0 && climbs => Figure::Efficiency,
            (Setting::Level {}, _) => Figure::PowerW,
            (_, Some(v)) if v > 0.0 && climbs => Figure::RateOfClimbMS,
            _ => Figure::ThrustN,
        }
    };
    let aim = |point: &FlightPoint| Aim { flight_point: point.name.clone(), figure: of(point), weight: 1.0 };
    rig.job.flight_points.iter().map(aim).collect()
}
