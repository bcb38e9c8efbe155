//! The one reducer: what each action makes of the state.

use std::rc::Rc;

use spokeshave::job::{DEMOS, Job};

use super::notice::refused;
use super::{
    Action, BLANK, Beside, Choice, Draft, Drag, Field, Held, Notice, Running, State, Variants, drawn, entry,
    places, shown_text,
};
use crate::units::Units;

impl State {
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
