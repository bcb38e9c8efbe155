//! The job with what can be undone and redone, each step by name.

use std::rc::Rc;

use spokeshave::job::Job;

/// Steps kept.
const MOST_STEPS: usize = 200;

/// One step.
#[derive(Clone, Debug)]
struct Step {
    name: String,
    /// The job on the other side of the step.
    job: Rc<Job>,
    /// Steps with the same mark that follow one another are one.
    mark: Option<Mark>,
}

/// Names a run of small steps that count as one, such as presses of an arrow key on one ring.
pub type Mark = super::Field;

/// The job and its past and future.
#[derive(Clone, Debug)]
pub struct History {
    job: Rc<Job>,
    past: Vec<Step>,
    future: Vec<Step>,
}

impl History {
    /// A job without a past.
    #[must_use]
    pub fn new(job: Job) -> Self {
        Self { job: Rc::new(job), past: Vec::new(), future: Vec::new() }
    }

    /// The job as it is.
    #[must_use]
    pub fn job(&self) -> &Rc<Job> {
        &self.job
    }

    /// Shows a job without a step, while something is being dragged.
    pub fn show(&mut self, job: Rc<Job>) {
        self.job = job;
    }

    /// Takes a step. A job that is equal is no step.
    pub fn step(&mut self, name: String, job: Job) {
        self.take(name, job, None);
    }

    /// Takes a small step that joins the one before it if that has the same mark.
    pub fn small_step(&mut self, name: String, job: Job, mark: Mark) {
        self.take(name, job, Some(mark));
    }

    fn take(&mut self, name: String, job: Job, mark: Option<Mark>) {
        if *self.job == job {
            return;
        }
        let joins = mark.is_some() && self.past.last().is_some_and(|s| s.mark == mark);
        let before = std::mem::replace(&mut self.job, Rc::new(job));
        if !joins {
            self.past.push(Step { name, job: before, mark });
        }
        if self.past.len() > MOST_STEPS {
            self.past.remove(0);
        }
        self.future.clear();
    }

    /// Ends a run of small steps: the next one stands for itself.
    pub fn end_run(&mut self) {
        if let Some(last) = self.past.last_mut() {
            last.mark = None;
        }
    }

    /// The name of the step that undoing takes back.
    #[must_use]
    pub fn undoes(&self) -> Option<&str> {
        self.past.last().map(|s| s.name.as_str())
    }

    /// The name of the step that redoing takes again.
    #[must_use]
    pub fn redoes(&self) -> Option<&str> {
        self.future.last().map(|s| s.name.as_str())
    }

    /// Takes the latest step back; whether there was one.
    pub fn undo(&mut self) -> bool {
        let Some(step) = self.past.pop() else { return false };
        let job = std::mem::replace(&mut self.job, step.job);
        self.future.push(Step { name: step.name, job, mark: None });
        true
    }

    /// Takes a step again that was taken back; whether there was one.
    pub fn redo(&mut self) -> bool {
        let Some(step) = self.future.pop() else { return false };
        let job = std::mem::replace(&mut self.job, step.job);
        self.past.push(Step { name: step.name, job, mark: None });
        true
    }
}
