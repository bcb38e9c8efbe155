//! What is picked rather than typed, and what is added to or taken out of a job.

use spokeshave::drawn::{measured_by, with_station};
use spokeshave::job::{
    Aim, AngleReference, Flange, FlightPoint, Held, Job, PitchControl, Rotation, Section, Setting, TipLoss,
    most_governed_rpm,
};

use super::notice::in_words;
use super::wishes::some;

/// A blade needs an inner and an outer station.
pub const FEWEST_STATIONS: usize = 2;

use super::machine::making::change;
use super::machine::{AircraftChoice, EngineChoice, WoodChoice};
use super::readings::{CarvedChoice, LogbookChoice};

/// A change that is picked from a few.
#[derive(Clone, Debug, PartialEq)]
pub enum Choice {
    /// What blade angles are measured to; the blade stays as it is.
    Reference(AngleReference),
    /// Sense of rotation.
    Rotation(Rotation),
    /// How the blades turn in the hub.
    PitchControl(ControlKind),
    /// One section for every station.
    SectionOfAll(String),
    /// The section of a station.
    Section(usize, String),
    /// A section of the user's own joins the job, in place of one of the same name.
    JoinSection(Box<Section>),
    /// A section of the user's own is taken out.
    RemoveSection(String),
    /// What the engine is set to at a flight point.
    Setting(usize, SettingKind),
    /// Whether Mach number changes lift and drag.
    Compressibility(bool),
    /// Whether rotation delays stall inboard.
    StallDelay(bool),
    /// Whether the hub takes load off the root.
    HubLoss(bool),
    /// Whose factor tells what the tip takes off.
    TipLoss(TipLoss),
    /// Amplification exponent at which the tables' boundary layers turn turbulent.
    Amplification(f64),
    /// A station more, halfway to the next one outward.
    AddStation(usize),
    /// A station less.
    RemoveStation(usize),
    /// A flight point more, a copy of one.
    AddPoint(usize),
    /// A flight point less.
    RemovePoint(usize),
    /// Something of the aircraft.
    Aircraft(AircraftChoice),
    /// Something of the engine.
    Engine(EngineChoice),
    /// What counts in a search.
    Aims(Vec<Aim>),
    /// Whether a search leaves something as drawn.
    Hold(Held, bool),
    /// Something of the wood.
    Wood(WoodChoice),
    /// The flange the hub is drilled for; none for the pattern of the job's own hub.
    Flange(Option<Flange>),
    /// Something of the carved blades.
    Carved(CarvedChoice),
    /// Something of the logbook.
    Logbook(LogbookChoice),
}

/// Ways the blades turn in the hub.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ControlKind {
    /// One piece.
    Fixed,
    /// Set on the ground.
    GroundAdjustable,
    /// A governor holds the rpm.
    ConstantSpeed,
}

/// Kinds of setting at a flight point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SettingKind {
    /// A propeller rpm.
    Rpm,
    /// A shaft power.
    Power,
    /// Full throttle.
    FullThrottle,
    /// A share of full throttle.
    Throttle,
    /// Thrust equals drag.
    Level,
}

impl ControlKind {
    /// Every kind, in the order shown.
    pub const ALL: [Self; 3] = [Self::Fixed, Self::GroundAdjustable, Self::ConstantSpeed];

    /// The kind a propeller has.
    #[must_use]
    pub fn of(control: &PitchControl) -> Self {
        match control {
            PitchControl::Fixed {} => Self::Fixed,
            PitchControl::GroundAdjustable { .. } => Self::GroundAdjustable,
            PitchControl::ConstantSpeed { .. } => Self::ConstantSpeed,
        }
    }

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Fixed => "fixed",
            Self::GroundAdjustable => "set on the ground",
            Self::ConstantSpeed => "constant speed",
        }
    }

    /// As it begins on a job: a governor no faster than the engine may turn.
    fn started(self, job: &Job) -> PitchControl {
        match self {
            Self::Fixed => PitchControl::Fixed {},
            Self::GroundAdjustable => PitchControl::GroundAdjustable { turn_deg: 0.0 },
            Self::ConstantSpeed => {
                let most = most_governed_rpm(job.engine.as_ref()).unwrap_or(f64::INFINITY);
                let rpm = most.min(2_400.0);
                PitchControl::ConstantSpeed { rpm, turn_min_deg: -5.0, turn_max_deg: 20.0 }
            }
        }
    }
}

impl SettingKind {
    /// Every kind, in the order shown.
    pub const ALL: [Self; 5] = [Self::Rpm, Self::Power, Self::FullThrottle, Self::Throttle, Self::Level];

    /// The kind a setting is of.
    #[must_use]
    pub fn of(setting: &Setting) -> Self {
        match setting {
            Setting::Rpm { .. } => Self::Rpm,
            Setting::Power { .. } => Self::Power,
            Setting::FullThrottle {} => Self::FullThrottle,
            Setting::Throttle { .. } => Self::Throttle,
            Setting::Level {} => Self::Level,
        }
    }

    /// What it is called for an aircraft that hovers.
    #[must_use]
    pub fn hovering_words(self) -> &'static str {
        if self == Self::Level { "hover or steady climb" } else { self.words() }
    }

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Rpm => "rpm",
            Self::Power => "shaft power",
            Self::FullThrottle => "full throttle",
            Self::Throttle => "part throttle",
            Self::Level => "level flight",
        }
    }

    /// The setting with the figures the point runs at, where they are known.
    fn started(self, rpm: Option<f64>, power_w: Option<f64>) -> Setting {
        match self {
            Self::Rpm => Setting::Rpm { rpm: rpm.map_or(2_500.0, |r| r.round().max(1.0)) },
            Self::Power => Setting::Power { power_w: power_w.filter(|p| *p > 0.001).unwrap_or(10_000.0) },
            Self::FullThrottle => Setting::FullThrottle {},
            Self::Throttle => Setting::Throttle { fraction: 0.75 },
            Self::Level => Setting::Level {},
        }
    }
}

/// What the flight point runs at, so that another kind of setting starts from there.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Running {
    /// Propeller rpm.
    pub rpm: Option<f64>,
    /// Shaft power, W.
    pub power_w: Option<f64>,
}

impl Choice {
    /// What the step is called.
    #[must_use]
    pub fn name(&self, job: &Job) -> String {
        let point = |i: &usize| job.flight_points.get(*i).map_or("", |p| p.name.as_str());
        match self {
            Self::Reference(_) => "what angles are measured to".into(),
            Self::Rotation(_) => "rotation".into(),
            Self::PitchControl(_) => "pitch control".into(),
            Self::SectionOfAll(_) => "section".into(),
            Self::Section(i, _) => format!("section at station {}", i + 1),
            Self::JoinSection(section) => format!("section \u{201c}{}\u{201d}", section.name),
            Self::RemoveSection(name) => format!("remove section \u{201c}{name}\u{201d}"),
            Self::Setting(i, _) => format!("setting of {}", point(i)),
            Self::Compressibility(_) => "compressibility".into(),
            Self::StallDelay(_) => "stall delay".into(),
            Self::HubLoss(_) => "hub loss".into(),
            Self::TipLoss(_) => "tip loss".into(),
            Self::Amplification(_) => "quietness of the air".into(),
            Self::AddStation(i) => format!("add a station after {}", i + 1),
            Self::RemoveStation(i) => format!("remove station {}", i + 1),
            Self::AddPoint(_) => "add a flight point".into(),
            Self::RemovePoint(i) => format!("remove {}", point(i)),
            Self::Aircraft(choice) => choice.name(),
            Self::Engine(choice) => choice.name(),
            Self::Aims(_) => "what counts in a search".into(),
            Self::Hold(..) => "what a search leaves as drawn".into(),
            Self::Wood(choice) => choice.name(),
            Self::Flange(_) => "flange".into(),
            Self::Carved(choice) => choice.name(),
            Self::Logbook(choice) => choice.name(),
        }
    }

    /// The job with the change.
    ///
    /// # Errors
    /// Why it cannot be, with what is allowed.
    pub fn made(&self, job: &Job, running: Running) -> Result<Job, String> {
        let next = self.applied(job, running)?;
        let problems = next.check();
        if problems.is_empty() {
            return Ok(next);
        }
        Err(problems.iter().take(3).map(|p| in_words(job, p)).collect::<Vec<_>>().join(" "))
    }

    fn applied(&self, job: &Job, running: Running) -> Result<Job, String> {
        let mut next = job.clone();
        let method = &mut next.method;
        match self {
            Self::Reference(to) => return reference(job, *to),
            Self::Rotation(to) => next.propeller.rotation = *to,
            Self::PitchControl(to) => next.propeller.pitch_control = to.started(job),
            Self::SectionOfAll(name) => {
                next.propeller.stations.iter_mut().for_each(|s| s.section.clone_from(name));
            }
            Self::Section(i, name) => {
                if let Some(station) = next.propeller.stations.get_mut(*i) {
                    station.section.clone_from(name);
                }
            }
            Self::JoinSection(section) => return Ok(job.with_section(section.as_ref().clone())),
            Self::RemoveSection(name) => next.sections.retain(|own| own.name != *name),
            Self::Setting(i, to) => set(&mut next, *i, *to, running),
            Self::Compressibility(on) => method.compressibility = *on,
            Self::StallDelay(on) => method.stall_delay = *on,
            Self::HubLoss(on) => method.hub_loss = *on,
            Self::TipLoss(whose) => method.tip_loss = *whose,
            Self::Amplification(n) => method.n_crit = *n,
            Self::AddStation(after) => return more_stations(job, *after),
            Self::RemoveStation(i) => {
                remove(&mut next.propeller.stations, *i, FEWEST_STATIONS, "A blade needs two stations.")?;
            }
            Self::AddPoint(like) => add_point(&mut next, *like),
            Self::RemovePoint(i) => {
                let name = next.flight_points.get(*i).map_or_else(String::new, |p| p.name.clone());
                remove(&mut next.flight_points, *i, 1, "A job needs one flight point.")?;
                next.wishes.iter_mut().for_each(|wishes| wishes.forget_point(&name));
            }
            Self::Aircraft(choice) => choice.apply(&mut next),
            Self::Engine(choice) => choice.apply(&mut next)?,
            Self::Aims(aims) => next.wishes.get_or_insert_default().aims.clone_from(aims),
            Self::Hold(what, on) => {
                let held = &mut next.wishes.get_or_insert_default().held;
                held.retain(|h| h != what);
                held.extend(on.then_some(*what));
            }
            Self::Wood(choice) => choice.apply(&mut next),
            Self::Flange(to) => change(&mut next, |making| making.flange = *to),
            Self::Carved(choice) => choice.apply(&mut next),
            Self::Logbook(choice) => choice.apply(&mut next),
        }
        next.wishes = next.wishes.and_then(some);
        Ok(next)
    }
}

fn reference(job: &Job, to: AngleReference) -> Result<Job, String> {
    measured_by(job, to).ok_or_else(|| "A station's section has no flat face to lay a protractor on.".into())
}

fn more_stations(job: &Job, after: usize) -> Result<Job, String> {
    let share = |i: usize| job.propeller.stations.get(i).map(|s| s.radius_fraction);
    let inner = share(after).ok_or_else(|| "There is no such station.".to_string())?;
    let middle = f64::midpoint(inner, share(after + 1).unwrap_or(1.0));
    with_station(job, middle).ok_or_else(|| "There is no room for a station there.".into())
}

fn set(job: &mut Job, i: usize, to: SettingKind, running: Running) {
    if let Some(point) = job.flight_points.get_mut(i) {
        point.setting = to.started(running.rpm, running.power_w);
        if to != SettingKind::FullThrottle && point.airspeed_m_s.is_none() {
            point.airspeed_m_s = Some(0.0);
        }
    }
}

/// Takes out one of several, as long as enough are left.
pub(super) fn remove<T>(from: &mut Vec<T>, i: usize, fewest: usize, why: &str) -> Result<(), String> {
    if from.len() <= fewest || i >= from.len() {
        return Err(why.into());
    }
    from.remove(i);
    Ok(())
}

fn add_point(job: &mut Job, like: usize) {
    let Some(model) = job.flight_points.get(like).or(job.flight_points.first()) else { return };
    let taken = |name: &str| job.flight_points.iter().any(|p| p.name == name);
    // One more name than there are points: one of them is free.
    let mut names = (1..=job.flight_points.len() + 1).map(|n| format!("Point {n}"));
    let name = names.find(|name| !taken(name)).unwrap_or_default();
    job.flight_points.push(FlightPoint { name, ..model.clone() });
}
