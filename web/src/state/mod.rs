//! The page's state and the one reducer that changes it. Nothing here touches the browser: texts and events
//! come in as actions, and what has to be stored or computed is read off the state that comes out.

pub mod action;
pub mod choice;
pub mod drag;
pub mod entry;
pub mod field;
pub mod history;
pub mod machine;
pub mod measure;
pub mod notice;
pub mod opened;
pub mod point_figure;
pub mod readings;
#[cfg(test)]
mod tests;
#[cfg(test)]
mod tests_machine;
#[cfg(test)]
mod tests_readings;
#[cfg(test)]
mod tests_wood;
pub mod variant;
pub mod wishes;

use std::rc::Rc;

use spokeshave::fit::Along;
use spokeshave::job::{DEMOS, Job};

pub use action::Action;
pub use choice::{Choice, ControlKind, Running, SettingKind};
pub use drag::{Drag, Held, drawn, follows};
pub use entry::{Draft, Drafts, shown_text};
pub use field::Field;
pub use history::History;
pub use machine::{
    AircraftChoice, AircraftFigure, AircraftKind, AltitudeKind, DragBy, EngineChoice, EngineFigure,
    EngineKind, FuelBy, MakingFigure, WoodChoice, WoodFigure, aircraft_untouched, engine_untouched,
    species_of, wood_of,
};
pub use measure::Measure;
pub use notice::Notice;
pub use opened::{Opened, Part};
pub use point_figure::PointFigure;
pub use readings::{BladeFigure, CarvedChoice, LogFigure, LogbookChoice, between_stations};
pub use variant::{Beside, Variant, Variants};
pub use wishes::{LimitFigure, RpmBound};

use notice::refused;

use crate::units::Units;

/// A job to start from: a plain two-blade propeller of one pitch.
pub const BLANK: &str = include_str!("blank.json");

/// Colours of the page.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, serde::Serialize, serde::Deserialize)]
pub enum Theme {
    /// As the device says.
    #[default]
    Auto,
    /// Light.
    Light,
    /// Dark.
    Dark,
}

/// The state of the page.
#[derive(Clone, Debug)]
pub struct State {
    /// The job, its past and its future.
    pub history: History,
    /// Flight point selected.
    pub point: usize,
    /// Station selected.
    pub station: usize,
    /// Texts that are not part of the job.
    pub drafts: Drafts,
    /// A drag that has begun.
    pub drag: Option<Drag>,
    /// Stations on either side that follow a drag.
    pub follow: usize,
    /// Units shown.
    pub units: Units,
    /// Whether the user picked the units.
    pub units_picked: bool,
    /// What the departure map follows.
    pub along: Along,
    /// Colours.
    pub theme: Theme,
    /// Something to say.
    pub notice: Option<Notice>,
    /// The job as it was last opened from or saved as a file.
    pub filed: Option<Rc<Job>>,
    /// Panels that are open.
    pub opened: Opened,
    /// Blades beside the drawn one.
    pub variants: Variants,
}

impl State {
    /// The state with a job.
    #[must_use]
    pub fn new(job: Job) -> Self {
        let units = Units::suiting(job.propeller.diameter_m);
        let (point, station) = places(&job);
        Self {
            history: History::new(job),
            point,
            station,
            drafts: Drafts::new(),
            drag: None,
            follow: 1,
            units,
            units_picked: false,
            along: Along::default(),
            theme: Theme::default(),
            notice: None,
            filed: None,
            opened: Opened::default(),
            variants: Variants::default(),
        }
    }

    /// The state to start with: the job found, else the first example. A job that cannot be read is said. A
    /// page that was saved with a job is a file of that job.
    #[must_use]
    pub fn started(found: Option<&str>, in_file: Option<&str>) -> Self {
        match found.map(Job::from_json) {
            Some(Ok(job)) => {
                let filed = in_file.and_then(|text| Job::from_json(text).ok()).map(Rc::new);
                Self { filed, ..Self::new(job) }
            }
            Some(Err(error)) => {
                let title = "The job kept here cannot be read. It was put aside; an example is shown.";
                Self { notice: Some(refused(title, &error)), ..Self::new(example()) }
            }
            None => Self::new(example()),
        }
    }

    /// The job.
    #[must_use]
    pub fn job(&self) -> &Rc<Job> {
        self.history.job()
    }

    /// Whether the job is as it was last opened from or saved as a file.
    #[must_use]
    pub fn is_filed(&self) -> bool {
        self.filed.as_ref().is_some_and(|filed| filed == self.job())
    }

    /// The state after an action.
    #[must_use]
    pub fn after(&self, action: Action) -> Self {
        let mut next = self.clone();
        next.act(action);
        next.keep_places();
        next
    }

    fn act(&mut self, action: Action) {
        match action {
            Action::Type(..) | Action::Commit(_) | Action::GiveUp(_) => self.enter(action),
            Action::Choose(choice, running) => self.choose(&choice, running),
            Action::SelectPoint(i) => self.point = i,
            Action::SelectStation(i) => self.station = i,
            Action::Outward => self.station += 1,
            Action::Inward => self.station = self.station.saturating_sub(1),
            Action::Take(..)
            | Action::DragTo(_)
            | Action::LetGo
            | Action::PutBack
            | Action::Nudge(..)
            | Action::EndRun => self.drag(&action),
            Action::Follow(span) => self.follow = span.min(5),
            Action::Undo | Action::Redo => self.turn_back(matches!(action, Action::Undo)),
            Action::Open(name, text) => self.open(&name, &text),
            Action::Demo(i) => self.start_from(DEMOS.get(i).map_or(BLANK, |d| d.json), "open an example"),
            Action::Blank => self.start_from(BLANK, "start a new job"),
            Action::Units(units) => self.pick_units(units),
            Action::Along(along) => self.along = along,
            Action::Theme(theme) => self.theme = theme,
            Action::Say(notice) => self.notice = Some(notice),
            Action::Dismiss => self.notice = None,
            Action::Unfold(part, open) => self.opened = self.opened.with(part, open),
            Action::Beside(what) => self.beside(what),
            Action::Saved => self.filed = Some(self.job().clone()),
        }
    }

    fn beside(&mut self, what: Beside) {
        match what {
            Beside::Keep(variant) => self.variants.keep(variant),
            Beside::Compare(which) => self.variants.compared = which,
            Beside::Drop(i) => self.variants.drop(i),
            Beside::Use(i) => self.use_variant(i),
        }
    }

    /// The blade takes the place of the drawn one, if the job allows it as it stands now.
    fn use_variant(&mut self, i: usize) {
        let Some(variant) = self.variants.all.get(i).cloned() else { return };
        let next = variant.of(self.job());
        if let Some(problem) = next.check().first() {
            let title = "The blade was not taken; the drawn one stays.".into();
            self.notice = Some(Notice { title, lines: vec![problem.to_string()] });
            return;
        }
        self.drafts.clear();
        self.step(format!("use {}", variant.name), next);
        self.variants.compared = None;
    }

    /// Picking millimetres or inches leaves the other units free to suit the next job.
    fn pick_units(&mut self, units: Units) {
        self.units_picked |= Units { length: self.units.length, ..units } != self.units;
        self.units = units;
    }

    fn enter(&mut self, action: Action) {
        match action {
            Action::Type(field, text) => {
                self.drafts.insert(field, Draft { text, message: None });
            }
            Action::Commit(field) => self.commit(field),
            Action::GiveUp(field) => {
                self.drafts.remove(&field);
            }
            _ => {}
        }
    }

    fn commit(&mut self, field: Field) {
        let Some(draft) = self.drafts.get_mut(&field) else { return };
        let (job, drawn) = (self.history.job(), drawn(self.history.job()));
        if draft.text == shown_text(job, &drawn, self.units, field) {
            self.drafts.remove(&field);
            return;
        }
        match entry::tried(job, &drawn, self.units, field, &draft.text) {
            Ok(next) => {
                let name = field.name(job);
                self.drafts.remove(&field);
                self.step(name, next);
            }
            Err(message) => draft.message = Some(message),
        }
    }

    /// A change that was taken: what was said of the one before no longer holds.
    fn step(&mut self, name: String, job: Job) {
        self.history.step(name, job);
        self.notice = None;
    }

    fn choose(&mut self, choice: &Choice, running: Running) {
        match choice.made(self.job(), running) {
            Ok(next) => {
                let name = choice.name(self.job());
                self.step(name, next);
                self.follow_choice(choice);
            }
            Err(why) => self.notice = Some(Notice { title: "Nothing was changed.".into(), lines: vec![why] }),
        }
    }

    /// What is selected goes along with what was added or removed; texts that belong to other places go.
    fn follow_choice(&mut self, choice: &Choice) {
        match choice {
            Choice::AddStation(after) => self.station = after + 1,
            Choice::RemoveStation(i) if self.station > *i => self.station -= 1,
            Choice::AddPoint(_) => self.point = self.job().flight_points.len() - 1,
            Choice::RemovePoint(i) if self.point > *i => self.point -= 1,
            Choice::RemoveStation(_)
            | Choice::RemovePoint(_)
            | Choice::Aircraft(_)
            | Choice::Engine(_)
            | Choice::Wood(_)
            | Choice::Carved(_)
            | Choice::Logbook(_) => {}
            _ => return,
        }
        self.drafts.clear();
    }

    fn drag(&mut self, action: &Action) {
        match *action {
            Action::Take(held) => {
                self.select(held);
                self.drag = Some(Drag { held, start: self.job().clone() });
            }
            Action::DragTo(value) => self.drag_to(value),
            Action::LetGo => self.let_go(),
            Action::PutBack => {
                if let Some(drag) = self.drag.take() {
                    self.history.show(drag.start);
                }
            }
            Action::Nudge(held, value) => self.nudge(held, value),
            _ => self.history.end_run(),
        }
    }

    fn drag_to(&mut self, value: f64) {
        let Some(drag) = &self.drag else { return };
        if let Some(job) = drag.held.moved(&drag.start, value, self.follow) {
            self.history.show(Rc::new(job));
        }
    }

    fn let_go(&mut self) {
        let Some(drag) = self.drag.take() else { return };
        let job = self.job().clone();
        self.history.show(drag.start);
        let name = drag.held.field().name(&job);
        self.step(name, Rc::unwrap_or_clone(job));
        self.drafts.clear();
    }

    fn nudge(&mut self, held: Held, value: f64) {
        self.select(held);
        if let Some(job) = held.moved(self.job(), value, self.follow) {
            let field = held.field();
            let name = field.name(&job);
            self.history.small_step(name, job, field);
        }
    }

    /// What is held is what is looked at.
    fn select(&mut self, held: Held) {
        match held {
            Held::Station(station, _) => self.station = station,
            Held::Airspeed(point) => self.point = point,
        }
    }

    fn turn_back(&mut self, back: bool) {
        self.drag = None;
        self.drafts.clear();
        if back {
            self.history.undo();
        } else {
            self.history.redo();
        }
    }

    fn open(&mut self, name: &str, text: &str) {
        match Job::from_json(text) {
            Ok(job) => {
                self.show_new(job, format!("open {name}"));
                self.filed = Some(self.job().clone());
            }
            Err(error) => {
                self.notice =
                    Some(refused(&format!("{name} was not opened. The job on the page stays."), &error));
            }
        }
    }

    fn start_from(&mut self, json: &str, step: &str) {
        if let Ok(job) = Job::from_json(json) {
            self.show_new(job, step.into());
        }
    }

    /// Another job; the one before can be had back by undoing.
    fn show_new(&mut self, job: Job, step: String) {
        if !self.units_picked {
            self.units = Units { length: self.units.length, ..Units::suiting(job.propeller.diameter_m) };
        }
        (self.point, self.station) = places(&job);
        self.variants = Variants::default();
        self.history.step(step, job);
        (self.drag, self.notice) = (None, None);
        self.drafts.clear();
    }

    fn keep_places(&mut self) {
        let job = self.history.job();
        self.point = self.point.min(job.flight_points.len().saturating_sub(1));
        self.station = self.station.min(job.propeller.stations.len().saturating_sub(1));
    }
}

/// The example to start with.
fn example() -> Job {
    // A test of the core reads every example, and one below reads the plain job.
    Job::from_json(DEMOS[0].json).expect("the examples are valid jobs")
}

/// The flight point and the station shown first: the cruise, if one is called so, and the station nearest to
/// three quarters of the radius.
fn places(job: &Job) -> (usize, usize) {
    let off = |f: f64| (f - 0.75).abs();
    let stations = job.propeller.stations.iter().enumerate();
    let near = stations.min_by(|a, b| off(a.1.radius_fraction).total_cmp(&off(b.1.radius_fraction)));
    let cruise = job.flight_points.iter().position(|p| p.name.to_lowercase().contains("cruise"));
    (cruise.unwrap_or(0), near.map_or(0, |(i, _)| i))
}
